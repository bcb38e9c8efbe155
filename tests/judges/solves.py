"""Stations and fits solved anew by SciPy, from the job file, the shipped section tables and the equations alone (`propeller.py`).

solves.py FILE: JSON with `jobs`, `stations` (job, altitude, airspeed, speed of rotation, radius, the program's inflow angle) and `fits` (job,
altitude, airspeed, setting, the program's rpm). Prints what it compared; the last line is the time of one station, ms.

Engines: the curve by `PchipInterpolator` (F. N. Fritsch and J. Butland, 1984) with Gagg and Ferrar's altitude law (1934), a first-order motor on a
battery with resistance; a parabolic drag polar.
"""

import json
import sys
import time

import numpy as np
from propeller import G0, RHO0, Air, Propeller
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq, fsolve
from told import within

# Rpm looked at for a fit, as shares of the program's: the highest root among them counts.
SHARES = np.linspace(0.7, 1.3, 5)


def cost_ms(station, phi):
    """Time of one solution of a station whose root is known to a degree, ms: the least of some."""

    def once():
        begun = time.perf_counter()
        brentq(station.mismatch, phi - 0.008, phi + 0.009, xtol=1e-12)
        return time.perf_counter() - begun

    return 1e3 * min(once() for _ in range(20))


def both(s, phi):
    """The same station in the two induced speeds, begun a little beside the answer: the momentum equations as they stand."""

    def off(x):
        u, v = x
        w = np.hypot(s.axial + u, s.turning - v)
        sin, cos = (s.axial + u) / w, (s.turning - v) / w
        cl, cd = s.coefficients(s.angle - np.arctan2(sin, cos))
        flow = 4 * s.loss(sin) * abs(s.axial + u)
        return [
            s.solidity * w * w * (cl * cos - cd * sin) - flow * u,
            s.solidity * w * w * (cl * sin + cd * cos) - flow * v,
        ]

    w = s.speed(phi)
    start = [w * np.sin(phi) - s.axial, s.turning - w * np.cos(phi)]
    (u, v), _, found, said = fsolve(off, np.array(start) * 1.001, xtol=1e-12, full_output=True)
    assert found == 1, said
    return np.arctan2(s.axial + u, s.turning - v)


def engine_power(engine, air, rpm, motors):
    """Full-throttle shaft power at a propeller rpm, W."""
    if engine["kind"] == "piston":
        points = engine["full_throttle"]
        curve = PchipInterpolator([p["rpm"] for p in points], [p["power_w"] for p in points])
        sigma = air.density / RHO0
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
    assert not aircraft.get("slipstream_drag_area_m2"), "no parts in the slipstream"
    polar = aircraft["drag"]
    k = polar.get("k") or 1 / (np.pi * polar["oswald"] * polar["aspect_ratio"])
    pressure = 0.5 * air.density * speed**2 * aircraft["wing_area_m2"]
    return (pressure * polar["cd0"] + k * weight**2 / pressure) / aircraft.get("engines", 1)


def fit(f, job, propeller):
    """The rpm at which the propeller meets engine or aircraft."""
    air, aircraft, speed = Air(f["altitude_m"]), job["aircraft"], f["airspeed_m_s"]
    motors = aircraft.get("rotors") or aircraft.get("engines", 1)

    def off(rpm):
        thrust, power = propeller.loads(speed, rpm * np.pi / 30, air)
        if f["setting"] == "full-throttle":
            return engine_power(job["engine"], air, rpm, motors) - power
        return thrust - thrust_asked(aircraft, air, speed)

    rpm = f["found_rpm"] * SHARES
    values = [off(n) for n in rpm]
    cross = [i for i in range(len(rpm) - 1) if values[i] * values[i + 1] <= 0]
    return brentq(off, rpm[cross[-1]], rpm[cross[-1] + 1], xtol=1e-6)


with open(sys.argv[1]) as file:
    asked = json.load(file)
propellers = [Propeller(job) for job in asked["jobs"]]
worst, driven = 0.0, 0
for i, s in enumerate(asked["stations"]):
    at = propellers[s["job"]].station(s["radius_m"], s["airspeed_m_s"], s["rotation_rad_s"], Air(s["altitude_m"]))
    found = [at.solved()]
    windmill = bool(at.balance(found[0])[2])
    driven += windmill
    if not windmill:
        found.append(both(at, found[0]))
        last = at, found[0]
    off = np.degrees(max(abs(phi - s["inflow_rad"]) for phi in found))
    worst = max(worst, within("inflow", off, f"station {i}, {s['name']}"))
print(f"{len(asked['stations'])} stations by SciPy, {driven} driven by the wind: inflow angle within {worst:.1e} deg")
worst = 0.0
for f in asked["fits"]:
    found = fit(f, asked["jobs"][f["job"]], propellers[f["job"]])
    off = within("rpm", abs(found / f["found_rpm"] - 1), f"{f['name']}: {found} rpm, the program {f['found_rpm']}")
    worst = max(worst, off)
print(f"{len(asked['fits'])} fits by SciPy: rpm within {worst:.1e}")
print(cost_ms(*last))
