"""Rules of access, light and dark; no motion where none is wanted; colours that the user forces."""

import json
from pathlib import Path

from engine.hand import open_page, press, script, until

# Yellow on black.
FORCED = {
    "browser.display.document_color_use": 2,
    "browser.display.use_system_colors": False,
    "browser.anchor_color": "#00ffff",
    "browser.anchor_color.dark": "#00ffff",
    "browser.visited_color": "#00ffff",
    "browser.visited_color.dark": "#00ffff",
    "browser.display.background_color": "#000000",
    "browser.display.foreground_color": "#ffff00",
    "browser.display.background_color.dark": "#000000",
    "browser.display.foreground_color.dark": "#ffff00",
}
BACKGROUND = "return getComputedStyle(document.body).backgroundColor"


def rules(browser, axe, what, only=None):
    browser.run(Path(axe).read_text() + "; return null")
    faults = browser.wait_for(script("rules").replace("OPTIONS", json.dumps({"runOnly": only} if only else {})))
    assert faults == [], f"{what}: {faults}"


def light_and_dark(browser, page, axe):
    """The rules in both; dark comes by the page's own button and, where it can be set, by the user's preference."""
    open_page(browser, page)
    rules(browser, axe, "light")
    light = browser.run(BACKGROUND)
    for _ in ("light", "dark"):
        press(browser, start="Colours: ")
    until("dark colours", lambda: browser.run(BACKGROUND) != light)
    dark = browser.run(BACKGROUND)
    rules(browser, axe, "dark")
    press(browser, start="Colours: dark")
    until("the device's own colours", lambda: browser.run(BACKGROUND) == light)
    if browser.can_prefer:
        browser.prefer("layout.css.prefers-color-scheme.content-override", 0)
        until("the dark that the device asks for", lambda: browser.run(BACKGROUND) == dark)
        browser.prefer("layout.css.prefers-color-scheme.content-override", None)


def motion(browser, page):
    """Nothing moves for a user who wants no motion; WebKit's user does not from the start."""
    open_page(browser, page)
    wanted = "return matchMedia('(prefers-reduced-motion: reduce)').matches"
    if browser.can_prefer:
        assert not browser.run(wanted) and browser.run(script("moving")) == 2, "what moves is not seen to move"
        browser.prefer("ui.prefersReducedMotion", 1)
    until("the wish for no motion", lambda: browser.run(wanted))
    assert browser.run(script("moving")) == 0, "the page lets things move"
    restless = browser.run(script("restless"))
    assert restless == 0, f"{restless} things move"
    if browser.can_prefer:
        browser.prefer("ui.prefersReducedMotion", None)


def forced(browser, page, axe):
    """Colours of the user's own: lines, frames, what is chosen and the departure scale are still seen."""
    open_page(browser, page)
    for name, value in FORCED.items():
        browser.prefer(name, value)
    until("forced colours", lambda: browser.run("return matchMedia('(forced-colors: active)').matches"))
    seen = browser.run(script("seen"))
    # Text needs 4.5 : 1, lines and frames 3 : 1: WCAG 2.1, success criteria 1.4.3 and 1.4.11.
    assert min(seen["tags"], seen["written"]) >= 4.5 and min(seen["outline"], seen["frames"]) >= 3, seen
    assert seen["unmarked"] == [] and seen["pairs"] >= 3, seen
    assert seen["fills"] == seen["steps"] > 3, seen
    rules(browser, axe, "forced colours", ["color-contrast"])
    for name in FORCED:
        browser.prefer(name, None)
