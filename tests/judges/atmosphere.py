"""The standard atmosphere by ambiance (ISO 2533).

atmosphere.py FILE: JSON list of [pressure altitude m, pressure Pa, density kg/m3, temperature K, speed of sound m/s, viscosity Pa s].
"""

import json
import sys

from ambiance import Atmosphere
from told import within

# Radius of the Earth in the standard, m: it tables over geometric heights too.
EARTH_M = 6_356_766.0

with open(sys.argv[1]) as file:
    rows = json.load(file)
worst = 0.0
for height, *found in rows:
    at = Atmosphere(EARTH_M * height / (EARTH_M - height))
    told = [at.pressure, at.density, at.temperature, at.speed_of_sound, at.dynamic_viscosity]
    for name, a, b in zip(("pressure", "density", "temperature", "speed of sound", "viscosity"), found, told):
        worst = max(worst, within("air", abs(a / float(b[0]) - 1), f"{name} at {height} m, ambiance {b[0]}"))
print(f"{len(rows)} heights by ambiance: within {worst:.1e}")
