"""The STL by trimesh: closed, handed as asked, drilled as asked, and of the volume of its sections.

solid.py FOLDER BLADES right|left HOLES DRILLED_MM3
"""

import csv
import sys
from collections import defaultdict
from pathlib import Path

import numpy
import trimesh
from shapely.geometry import Polygon
from told import within

folder, blades, hand = Path(sys.argv[1]), int(sys.argv[2]), sys.argv[3]
holes, drilled = int(sys.argv[4]), float(sys.argv[5])
whole = folder / "propeller.stl"
mesh = trimesh.load_mesh(whole if whole.exists() else folder / "blade.stl")
assert mesh.is_watertight, "not watertight"
assert mesh.is_winding_consistent, "triangles turn both ways"
assert mesh.is_volume and mesh.volume > 0, f"inside out: {mesh.volume}"
# A closed body without a hole through it has Euler's number 2, 2 less for every hole.
assert mesh.euler_number == 2 - 2 * holes, f"Euler's number {mesh.euler_number} for {holes} holes"

rings = defaultdict(list)
with open(folder / "surface.csv", newline="") as file:
    for row in csv.DictReader(file):
        rings[float(row["radius_m"])].append((1e3 * float(row["y_m"]), 1e3 * float(row["z_m"])))
radii = numpy.array(sorted(rings))
polygons = [Polygon(rings[r]) for r in radii]
assert all(p.is_valid for p in polygons), "a section crosses itself"
areas = numpy.array([p.area for p in polygons])
tip = mesh.bounds[1][0] if whole.exists() and blades == 2 else numpy.hypot(*mesh.vertices[:, :2].T).max()
one = numpy.trapezoid(numpy.append(areas, 0.0), numpy.append(1e3 * radii, tip))
sections = one * (blades if whole.exists() else 1) - drilled
off = mesh.volume / sections - 1
print(f"volume {mesh.volume:.0f} mm3, of the sections less the drilling {sections:.0f} mm3, {100 * off:+.3f} %")
within("volume", abs(off), folder)

# At three quarters of the radius the leading edge is the one farther ahead (+z): it must lie where the blade turns to.
near = radii[numpy.argmin(abs(radii - 0.75e-3 * tip))]
at = mesh.vertices[(abs(mesh.vertices[:, 0] - 1e3 * near) < 1e-3) & (abs(mesh.vertices[:, 1]) < 0.5 * tip)]
assert len(at) > 20
slope = numpy.polyfit(at[:, 1], at[:, 2], 1)[0]
print(f"{len(at)} corners at {1e3 * near:.1f} mm, slope {slope:+.3f}")
assert (slope > 0) == (hand == "right"), f"handed the wrong way: {slope}"
