"""Stations and fits solved anew by SciPy, from the equations and the job file alone.

solves.py FILE: JSON with `stations` (speeds, blade angle, solidity, geometry of Prandtl's loss, tabled cl and cd, and the program's inflow angle)
and `fits` (job, air, tabled thrust and power of its propeller over rpm, and the program's rpm).

Stations: momentum theory with Prandtl's loss and drag in both equations (H. Glauert, Airplane Propellers, 1935). Fits: the engine's curve by
`PchipInterpolator` (F. N. Fritsch and J. Butland, 1984) with Gagg and Ferrar's altitude law (1934), a first-order motor on a battery with resistance,
a parabolic drag polar.
"""

import json
import sys
import time

import numpy as np
from scipy.interpolate import CubicSpline, PchipInterpolator
from scipy.optimize import brentq, fsolve

RHO0, G0 = 1.225, 9.80665


def section(s):
    """cl and cd over the angle of attack, rad."""
    lift, drag = (PchipInterpolator(s["alpha_rad"], s[k]) for k in ("cl", "cd"))
    return lambda a: (lift(a), drag(a))


def loss(s, sin_phi):
    """Prandtl's factor."""
    half, r = 0.5 * s["blades"], s["radius_m"]
    at = lambda f: 2 / np.pi * np.arccos(np.exp(-np.minimum(f / abs(sin_phi), 700.0)))
    hub = at(half * (r - s["hub_m"]) / s["hub_m"]) if s["hub_loss"] else 1.0
    return at(half * (s["tip_m"] - r) / r) * hub


def mismatch(s, coefficients, phi):
    """V/(Omega r) as geometry has it less as momentum has it, times both denominators."""
    sin, cos = np.sin(phi), np.cos(phi)
    cl, cd = coefficients(s["angle_rad"] - phi)
    k = s["solidity"] / (4 * loss(s, sin) * abs(sin))
    axial, swirl = sin - k * (cl * cos - cd * sin), cos + k * (cl * sin + cd * cos)
    return s["turning_m_s"] * axial - s["axial_m_s"] * swirl


def station(s):
    """The inflow angle of least angle of attack among all roots of a fine scan ahead of the disc, rad."""
    coefficients = section(s)
    grid = np.radians(np.arange(0.0125, 90.0, 0.0125))
    values = mismatch(s, coefficients, grid)
    cross = [i for i in range(len(grid) - 1) if values[i] * values[i + 1] < 0 and grid[i] > 0]
    roots = [brentq(lambda p: mismatch(s, coefficients, p), grid[i], grid[i + 1], xtol=1e-13) for i in cross]
    return min(roots, key=lambda p: abs(s["angle_rad"] - p))


def cost_ms(s, phi):
    """Time of one solution of a station whose root is known to a degree, ms: the least of some."""
    coefficients = section(s)
    def once():
        begun = time.perf_counter()
        brentq(lambda p: mismatch(s, coefficients, p), phi - 0.008, phi + 0.009, xtol=1e-12)
        return time.perf_counter() - begun
    return 1e3 * min(once() for _ in range(20))


def both(s, phi):
    """The same station in the two induced speeds, begun a little beside the answer: the momentum equations as they stand."""
    coefficients = section(s)

    def off(x):
        u, v = x
        w = np.hypot(s["axial_m_s"] + u, s["turning_m_s"] - v)
        sin, cos = (s["axial_m_s"] + u) / w, (s["turning_m_s"] - v) / w
        cl, cd = coefficients(s["angle_rad"] - np.arctan2(sin, cos))
        flow = 4 * loss(s, sin) * abs(s["axial_m_s"] + u)
        return [
            s["solidity"] * w * w * (cl * cos - cd * sin) - flow * u,
            s["solidity"] * w * w * (cl * sin + cd * cos) - flow * v,
        ]

    k = s["solidity"] / (4 * loss(s, np.sin(phi)) * abs(np.sin(phi)))
    cl, cd = coefficients(s["angle_rad"] - phi)
    # W from V or Omega r, whichever is the larger.
    axial = np.sin(phi) - k * (cl * np.cos(phi) - cd * np.sin(phi))
    swirl = np.cos(phi) + k * (cl * np.sin(phi) + cd * np.cos(phi))
    w = (s["axial_m_s"] * axial + s["turning_m_s"] * swirl) / (axial**2 + swirl**2)
    start = [w * np.sin(phi) - s["axial_m_s"], s["turning_m_s"] - w * np.cos(phi)]
    (u, v), _, found, said = fsolve(off, np.array(start) * 1.001, xtol=1e-12, full_output=True)
    assert found == 1, said
    return np.arctan2(s["axial_m_s"] + u, s["turning_m_s"] - v)


def engine_power(engine, air, rpm, motors):
    """Full-throttle shaft power at a propeller rpm, W."""
    if engine["kind"] == "piston":
        points = engine["full_throttle"]
        curve = PchipInterpolator([p["rpm"] for p in points], [p["power_w"] for p in points])
        sigma = air["density_kg_m3"] / RHO0
        return (sigma - (1 - sigma) / 7.55) * float(curve(rpm * engine.get("gear_ratio", 1.0)))
    cells = engine["battery"]["cells"]
    open_circuit = cells * engine["battery"]["open_circuit_v_per_cell"]
    battery = motors * cells * engine["battery"]["resistance_ohm_per_cell"]
    turning = rpm * engine.get("gear_ratio", 1.0)
    ohm = engine["resistance_ohm"] + engine.get("controller_resistance_ohm", 0.0) + battery
    current = min((open_circuit - turning / engine["kv_rpm_per_v"]) / ohm, engine.get("max_current_a", np.inf))
    return (current - engine["no_load_current_a"]) * turning / engine["kv_rpm_per_v"]


def thrust_asked(aircraft, air, speed):
    """Drag, or weight in hover, of one propeller, N."""
    weight = aircraft["mass_kg"] * G0
    if aircraft["kind"] == "multirotor":
        return weight / aircraft["rotors"]
    polar = aircraft["drag"]
    k = polar.get("k") or 1 / (np.pi * polar["oswald"] * polar["aspect_ratio"])
    pressure = 0.5 * air["density_kg_m3"] * speed**2 * aircraft["wing_area_m2"]
    return (pressure * polar["cd0"] + k * weight**2 / pressure) / aircraft.get("engines", 1)


def fit(f):
    """The rpm at which the propeller meets engine or aircraft."""
    job, air = f["job"], f["air"]
    rpm = np.array(f["rpm"])
    aircraft = job["aircraft"]
    motors = aircraft.get("rotors") or aircraft.get("engines", 1)
    if f["setting"] == "full-throttle":
        asked = CubicSpline(rpm, f["power_w"])
        off = lambda n: engine_power(job["engine"], air, n, motors) - float(asked(n))
    else:
        given, asked = CubicSpline(rpm, f["thrust_n"]), thrust_asked(aircraft, air, f["airspeed_m_s"])
        off = lambda n: float(given(n)) - asked
    values = [off(n) for n in rpm]
    cross = [i for i in range(len(rpm) - 1) if values[i] * values[i + 1] <= 0]
    return brentq(off, rpm[cross[-1]], rpm[cross[-1] + 1], xtol=1e-9)


with open(sys.argv[1]) as file:
    asked = json.load(file)
worst = 0.0
for i, s in enumerate(asked["stations"]):
    found = station(s)
    again = both(s, found)
    off = max(abs(found - s["inflow_rad"]), abs(again - s["inflow_rad"]))
    worst = max(worst, off)
    assert off < np.radians(0.001), f"station {i}: {np.degrees([found, again, s['inflow_rad']])} deg, {s['name']}"
print(f"{len(asked['stations'])} stations by SciPy: inflow angle within {np.degrees(worst):.1e} deg")
print(f"the last of them takes SciPy {cost_ms(s, found):.2f} ms, between bounds a degree apart")
worst = 0.0
for f in asked["fits"]:
    found = fit(f)
    off = abs(found / f["found_rpm"] - 1)
    worst = max(worst, off)
    assert off < 1e-6, f"{f['name']}: {found} rpm, the program {f['found_rpm']}"
print(f"{len(asked['fits'])} fits by SciPy: rpm within {worst:.1e}")
