"""How far off the judges may find the program: `within.json`, of which the list of outside checks is made too."""

import json
from pathlib import Path

TESTS = json.loads(Path(__file__).with_name("within.json").read_text())
FIGURES = {figure["key"]: figure for test in TESTS for figure in test["figures"]}
# What comes out may be so many times what the list says: last places differ from machine to machine.
FRESH = 3.0


def within(key, off, where):
    """What comes out stays below what is allowed, and about what the list says."""
    figure = FIGURES[key]
    assert off < figure["within"], f"{where}: {figure['what']} off by {off}, allowed {figure['within']} {figure['unit']}"
    assert off <= FRESH * figure["came_out"], f"{where}: {figure['what']} off by {off}; within.json says {figure['came_out']}"
    return off
