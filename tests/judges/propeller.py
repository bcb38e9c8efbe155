"""A propeller by blade elements and momentum, written anew from the job file and the section tables that are shipped, by NumPy and SciPy.

What it reads of the program's own making: `airfoils/*/polars.csv`, the tables as the command line wrote them. Everything else is worked out here:
the blade between its stations, the coefficients between the tables and past their ends, the air, the balance of every element, the loads.

Air: ISO 2533; Sutherland's viscosity (US Standard Atmosphere 1976). Monotone cubics: F. N. Fritsch and J. Butland, 1984, as `PchipInterpolator`. Past the
tables: L. A. Viterna and R. D. Corrigan, 1981. Mach number: H. Glauert, 1928; Korn and Lock as given by W. H. Mason. Delay of stall: H. Snel, R. Houwink
and J. Bosschers, 1994. Momentum theory with Prandtl's loss and drag in both equations (H. Glauert, Airplane Propellers, 1935); windmill brake state:
M. L. Buhl, 2005. Where these leave something open, the choices are those that the program says it makes (head of `local.rs`, `extend.rs`, `element.rs`).
"""

import csv
import json
from collections import defaultdict
from functools import cache
from pathlib import Path

import numpy as np
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq

AIRFOILS = Path(__file__).resolve().parents[2] / "airfoils"
G0, RHO0 = 9.80665, 1.225
# Rows that make a table; a choice of the program.
FEWEST_ROWS = 5
# Steps of the scan for roots ahead of the disc, rad.
SCAN = np.radians(np.arange(0.0125, 90.0, 0.0125))
COARSE_SCAN = SCAN[::40]


class Air:
    """The standard atmosphere at a pressure altitude below 11 km."""

    def __init__(self, altitude_m):
        gas = 287.05287
        kelvin = 288.15 - 0.0065 * altitude_m
        self.density = 101_325.0 * (kelvin / 288.15) ** (G0 / (gas * 0.0065)) / (gas * kelvin)
        self.sound = np.sqrt(1.4 * gas * kelvin)
        self.viscosity = 1.458e-6 * kelvin**1.5 / (kelvin + 110.4)


class Polar:
    """One table: cubics of lift and drag over the angle all the way round, and the angles that mark it, rad."""

    def __init__(self, rows):
        a, cl, cd = np.array(rows).T
        rad = np.radians(a)
        self.curve = PchipInterpolator(*extended(rad, np.column_stack([cl, cd])))
        near = abs(a) <= 25.0
        # Of equal lifts the first.
        self.stall = rad[near][np.argmax(cl[near])]
        low = near & (rad <= self.stall)
        # Of equal lifts the last.
        self.negative_stall = rad[low][::-1][np.argmin(cl[low][::-1])]
        self.zero_lift = 0.0
        for i in range(len(a) - 1):
            if rad[i] >= self.negative_stall and rad[i + 1] <= self.stall and cl[i] <= 0 < cl[i + 1]:
                self.zero_lift = rad[i] + (rad[i + 1] - rad[i]) * -cl[i] / (cl[i + 1] - cl[i])
                break


def extended(rad, rows):
    """Rows carried on to ±180°: Viterna and Corrigan from the last row to 90°, mirrored beyond, by steps of 2.5°."""
    anchor, (cl, cd) = np.clip(rad[-1], *np.radians([3, 80])), rows[-1]
    s, c, most = np.sin(anchor), np.cos(anchor), 1.11 + 0.018 * 8
    a2, b2 = (cl - most * s * c) * s / c**2, (cd - most * s * s) / c

    def front(x):
        s, c = np.sin(np.maximum(x, anchor)), np.cos(np.maximum(x, anchor))
        return most * s * c + a2 * c * c / s, most * s * s + b2 * c

    def at(a):
        x, sign = abs(a), -1.0 if a < 0 else 1.0
        if x <= np.pi / 2:
            cl, cd = front(x)
            cl *= 0.7 if a < 0 else 1.0
        else:
            cl, cd = front(np.pi - x)
            cl *= -0.7 * min((np.pi - x) / anchor, 1.0)
        return sign * cl, max(cd, 1e-4)

    nodes, gap = np.radians(2.5 * np.arange(-72, 73)), np.radians(2.0)
    before, after = nodes[nodes < rad[0] - gap], nodes[nodes > rad[-1] + gap]
    made = [np.array([at(a) for a in part]) for part in (before, after)]
    return np.concatenate([before, rad, after]), np.concatenate([made[0], rows, made[1]])


@cache
def family(name, n_crit):
    """Korn's factor and the tables {thickness: {Reynolds number: Polar}} of a shipped section, of the set of n nearest to the one asked for."""
    rows = defaultdict(list)
    with open(AIRFOILS / name / "polars.csv", newline="") as file:
        for r in csv.DictReader(file):
            if r["state"] == "ok":
                assert float(r["mach"]) == 0, "tables at rest"
                key = tuple(float(r[k]) for k in ("n_crit", "thickness_ratio", "reynolds"))
                rows[key].append(tuple(float(r[k]) for k in ("alpha_deg", "cl", "cd")))
    nearest = min({key[0] for key in rows}, key=lambda n: abs(n - n_crit))
    tables = defaultdict(dict)
    for (n, thickness, reynolds), own in sorted(rows.items()):
        if n == nearest and len(own) >= FEWEST_ROWS:
            tables[thickness][reynolds] = Polar(own)
    return json.loads((AIRFOILS / name / "family.json").read_text())["korn_ka"], dict(tables)


def bracket(keys, x, of=lambda k: k):
    """The neighbours of x among keys with their shares, on a line over `of`; held at the ends."""
    keys = sorted(keys)
    if x <= keys[0] or x >= keys[-1]:
        return [(keys[0] if x <= keys[0] else keys[-1], 1.0)]
    i = int(np.searchsorted(keys, x, side="right")) - 1
    w = (of(x) - of(keys[i])) / (of(keys[i + 1]) - of(keys[i]))
    return [(keys[i], 1 - w), (keys[i + 1], w)]


class Section:
    """One section at a station: tables mixed on lines over thickness and ln Re, then the delay of stall, then the Mach number."""

    def __init__(self, name, n_crit, thickness, reynolds, mach, delay):
        korn, tables = family(name, n_crit)
        self.parts = [
            (row[re], w * v)
            for t, w in bracket(tables, thickness)
            for row in [tables[t]]
            for re, v in bracket(row, reynolds, np.log)
        ]
        self.zero_lift, self.stall, self.negative_stall = (
            sum(w * getattr(p, k) for p, w in self.parts) for k in ("zero_lift", "stall", "negative_stall")
        )
        self.korn, self.mach, self.delay = korn - min(thickness, 0.30), mach, delay

    def __call__(self, a):
        cl, cd = np.moveaxis(sum(w * p.curve(a) for p, w in self.parts), -1, 0)
        if self.delay > 0:
            onset = self.zero_lift + 0.5 * (self.stall - self.zero_lift)
            let_in = np.clip((a - onset) / max(self.stall - onset, np.radians(1)), 0, 1)
            fade = np.clip((np.radians(50) - a) / np.radians(20), 0, 1)
            lost = np.maximum(2 * np.pi * np.sin(a - self.zero_lift) - cl, 0)
            past = a > max(onset, self.zero_lift)
            cl = cl + np.where(past, self.delay * let_in * fade * lost, 0)
        if self.mach > 0:
            past = np.maximum(np.maximum(a - self.stall, self.negative_stall - a), 0)
            share = np.maximum(1 - past / np.radians(20), 0)
            m = np.minimum(self.mach, np.maximum(self.korn - 0.1 * abs(cl), 0))
            cl = cl * (1 + share * (1 / np.sqrt(1 - m * m) - 1))
            critical = self.korn - 0.1 * abs(cl) - (0.1 / 80) ** (1 / 3)
            excess = np.maximum(self.mach - np.maximum(critical, 0), 0)
            cd = cd + np.minimum(20 * excess**4, 0.30)
        return cl, cd


class Propeller:
    """A job's propeller: the blade at any radius."""

    def __init__(self, job):
        p, self.method = job["propeller"], job["method"]
        assert p["pitch_control"]["kind"] == "fixed" and p["angle_reference"] == "chord-line" and not p.get("blockage")
        assert self.method["tip_loss"] == "prandtl"
        stations = p["stations"]
        assert len({s["section"] for s in stations}) == 1, "one section all along"
        self.section = stations[0]["section"]
        self.blades, self.tip_m, self.hub_m = p["blades"], p["diameter_m"] / 2, p["hub_diameter_m"] / 2
        radii = np.array([s["radius_fraction"] for s in stations]) * self.tip_m
        figures = [[s[k] for s in stations] for k in ("chord_m", "angle_deg", "thickness_ratio")]
        curve = PchipInterpolator(radii, np.array(figures).T)
        self.cut = lambda r: curve(np.clip(r, radii[0], radii[-1]))

    def station(self, r, speed, turn, air):
        """The element at a radius (m), a speed (m/s) and a speed of rotation (rad/s)."""
        return Station(self, r, speed, turn, air)

    def loads(self, speed, turn, air):
        """Thrust, N, and power, W, by the midpoint rule on elements spaced by the cosine."""
        n = self.method["elements"]
        at = (np.arange(n) + 0.5) * np.pi / n
        span = self.tip_m - self.hub_m
        thrust = torque = 0.0
        for t in at:
            station = self.station(self.hub_m + 0.5 * span * (1 - np.cos(t)), speed, turn, air)
            normal, tangential = station.forces(station.solved(COARSE_SCAN))
            width = 0.5 * span * np.sin(t) * np.pi / n
            thrust += normal * width
            torque += tangential * station.r * width
        return thrust, torque * turn


class Station:
    """One element of a blade at one condition."""

    def __init__(self, of, r, speed, turn, air):
        chord, angle_deg, thickness = of.cut(r)
        self.of, self.r, self.chord, self.angle, self.air = of, r, chord, np.radians(angle_deg), air
        self.axial, self.turning = speed, turn * r
        self.solidity = of.blades * chord / (2 * np.pi * r)
        w, method = np.hypot(speed, self.turning), of.method
        snel = min(3.1 * (chord / r) ** 2, 1.0) * np.clip((0.8 - r / of.tip_m) / 0.1, 0, 1) * (self.turning / w) ** 2
        self.coefficients = Section(
            of.section,
            method["n_crit"],
            thickness,
            air.density * w * chord / air.viscosity,
            w / air.sound if method["compressibility"] else 0.0,
            min(snel, 1.0) if method["stall_delay"] else 0.0,
        )

    def loss(self, sin):
        """Prandtl's factor of tip and hub."""
        half, r, hub = 0.5 * self.of.blades, self.r, self.of.hub_m
        at = lambda f: 2 / np.pi * np.arccos(np.exp(-np.minimum(f / abs(sin), 700.0)))
        inner = at(half * (r - hub) / hub) if self.of.method["hub_loss"] else 1.0
        return at(half * (self.of.tip_m - r) / r) * inner

    def balance(self, phi):
        """Momentum less blade force along the axis and round it, N and M, each W² r-wise alike; and whether the wind drives the blade."""
        sin, cos = np.sin(phi), np.cos(phi)
        cl, cd = self.coefficients(self.angle - phi)
        normal, tangential = self.solidity * (cl * cos - cd * sin), self.solidity * (cl * sin + cd * cos)
        f = self.loss(sin)
        windmill = (self.axial > 0) & (-normal > 8 / 3 * f * sin**2)
        root = np.sqrt(np.maximum(-normal / 2 - f * (4 / 3 - f) * sin**2, 0))
        n = np.where(windmill, 4 * f * sin * ((5 / 3 - f) * sin + root), 4 * f * sin**2 - normal)
        return n, 4 * f * sin * cos + tangential, windmill

    def mismatch(self, phi):
        """What V M = Omega r N misses, in units of their hypotenuse."""
        n, m, _ = self.balance(phi)
        return (self.turning * n - self.axial * m) / np.hypot(self.axial, self.turning)

    def solved(self, scan=SCAN):
        """The inflow angle of least angle of attack among all roots of a scan ahead of the disc, rad."""
        values = self.mismatch(scan)
        cross = np.flatnonzero(values[:-1] * values[1:] < 0)
        assert len(cross), f"no root ahead of the disc at {self.r} m"
        off = lambda i: max(scan[i] - self.angle, self.angle - scan[i + 1], 0.0)
        nearest = sorted(cross, key=off)[:2]
        roots = [brentq(self.mismatch, scan[i], scan[i + 1], xtol=1e-13) for i in nearest]
        return min(roots, key=lambda p: abs(self.angle - p))

    def speed(self, phi):
        """W from V or Omega r, whichever is the larger, m/s."""
        n, m, _ = self.balance(phi)
        four = 4 * self.loss(np.sin(phi)) * np.sin(phi)
        n, m = n / four, m / four
        return (self.axial * n + self.turning * m) / (n * n + m * m)

    def forces(self, phi):
        """Forces of all blades per metre of radius along the axis and against the turning, N/m."""
        cl, cd = self.coefficients(self.angle - phi)
        sin, cos = np.sin(phi), np.cos(phi)
        head = 0.5 * self.air.density * self.speed(phi) ** 2 * self.chord * self.of.blades
        return head * (cl * cos - cd * sin), head * (cl * sin + cd * cos)
