"""DXF by ezdxf and shapely: sound, in millimetres, and cards that leave the section between them.

drawings.py FOLDER STATIONS.json
"""

import json
import sys
from pathlib import Path

import ezdxf
from ezdxf import units
from shapely.affinity import translate
from shapely.geometry import Polygon, box
from shapely.ops import unary_union
from told import within

# By how much the upper card of a pair is drawn off the lower one, mm.
LIFT = 4.0
folder = Path(sys.argv[1])
stations = json.loads(Path(sys.argv[2]).read_text())
for path in sorted(folder.glob("*.dxf")):
    drawing = ezdxf.readfile(path)
    audit = drawing.audit()
    assert not audit.errors and not audit.fixes, (path.name, audit.errors, audit.fixes)
    assert drawing.units == units.MM, (path.name, drawing.units)
    used = {entity.dxf.layer for entity in drawing.modelspace()}
    assert used <= {layer.dxf.name for layer in drawing.layers}, (path.name, used)
    print(f"{path.name}: {len(drawing.modelspace())} entities on {', '.join(sorted(used))}")

cards = [
    Polygon([(v.dxf.location.x, v.dxf.location.y) for v in line.vertices])
    for line in ezdxf.readfile(folder / "templates.dxf").modelspace().query("POLYLINE[layer=='CUT']")
    if line.is_closed
]
assert len(cards) == 2 * len(stations), (len(cards), len(stations))
for station, lower, upper in zip(stations, cards[0::2], cards[1::2]):
    assert lower.is_valid and upper.is_valid, station["number"]
    upper = translate(upper, 0, -LIFT)
    pair = unary_union([lower.buffer(1e-4), upper.buffer(1e-4)])
    # Cards that only touch share rounding, 5e-14 mm2; a hundredth is a strip as long as a card and thinner than a hair.
    assert lower.intersection(upper).area < 1e-2, "the cards lie over one another"
    left = [p for p in getattr(box(*pair.bounds).difference(pair), "geoms", [box(*pair.bounds).difference(pair)]) if p.area > 1]
    assert len(left) == 1, (station["number"], [p.area for p in left])
    wood, section = left[0], Polygon(station["points_mm"])
    off = wood.area / section.area - 1
    within("cards_area", abs(off), station["number"])
    move = [section.bounds[k] - wood.bounds[k] for k in (0, 1)]
    apart = translate(wood, *move).hausdorff_distance(section)
    within("cards_rim", apart, station["number"])
    print(f"station {station['number']}: {wood.area:.2f} mm2 between the cards, {100 * off:+.4f} %, apart {apart:.4f} mm")
