"""Sections as a beam sees them by sectionproperties: area, second moments, torsion constant.

sections.py FILE: JSON list of {name, points (closed by itself), area, least, greatest, torsion}, chord 1.
"""

import json
import sys
import warnings

from sectionproperties.analysis import Section
from sectionproperties.pre import Geometry
from shapely.geometry import Polygon
from told import within

warnings.filterwarnings("ignore")
# Triangles of the mesh, and what the points are multiplied by: the mesher's own tolerances are absolute.
TRIANGLES, SCALE = 800, 100.0
WITHIN = {"area": "section", "least": "section", "greatest": "section", "torsion": "torsion"}

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
    for name, key in WITHIN.items():
        off = within(key, abs(s[name] / told[name] - 1), f"{s['name']}, {name}")
        worst[name] = max(worst[name], off)
print(f"{len(asked)} sections by sectionproperties: " + ", ".join(f"{n} within {w:.1e}" for n, w in worst.items()))
