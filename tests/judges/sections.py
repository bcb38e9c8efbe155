"""Sections as a beam sees them by sectionproperties: area, second moments, torsion constant.

sections.py FILE: JSON list of {name, points (closed by itself), area, least, greatest, torsion}, chord 1.
"""

import json
import sys
import warnings

from sectionproperties.analysis import Section
from sectionproperties.pre import Geometry
from shapely.geometry import Polygon

warnings.filterwarnings("ignore")
# Triangles of the mesh, and what the points are multiplied by: the mesher's own tolerances are absolute.
TRIANGLES, SCALE = 800, 100.0
# Of area and second moments less than 5e-5 comes out. The program's torsion constant is an approximation from below:
# 1.6e-3 comes out, and 5e-3 is left for other outlines, as in tests/src/validation/beam_section.rs.
WITHIN = {"area": 1e-4, "least": 1e-4, "greatest": 1e-4, "torsion": 5e-3}

with open(sys.argv[1]) as file:
    asked = json.load(file)
worst = dict.fromkeys(WITHIN, 0.0)
for s in asked:
    polygon = Polygon([(SCALE * x, SCALE * y) for x, y in s["points"]])
    assert polygon.is_valid, f"{s['name']} crosses itself"
    geometry = Geometry(polygon)
    geometry.create_mesh([polygon.area / TRIANGLES])
    section = Section(geometry)
    section.calculate_geometric_properties()
    section.calculate_warping_properties()
    greatest, least = section.get_ip()
    told = {
        "area": section.get_area() / SCALE**2,
        "least": least / SCALE**4,
        "greatest": greatest / SCALE**4,
        "torsion": section.get_j() / SCALE**4,
    }
    for name, within in WITHIN.items():
        off = abs(s[name] / told[name] - 1)
        worst[name] = max(worst[name], off)
        assert off < within, f"{s['name']}: {name} {s[name]}, sectionproperties {told[name]}"
print(f"{len(asked)} sections by sectionproperties: " + ", ".join(f"{n} within {100 * w:.2f} %" for n, w in worst.items()))
