"""A phone held upright: every panel opened, nothing wider than the screen; a station is turned there."""

from pathlib import Path

from engine.hand import enter, fold_out, press, script, shows, started, until

WIDTH_PX, HEIGHT_PX = 390, 844


def whole(browser, page, folder, task):
    frame = folder / "phone.html"
    style = f"width: {WIDTH_PX}px; height: {HEIGHT_PX}px; border: 0"
    frame.write_text(f'<!doctype html><iframe src="{Path(page).as_uri()}" style="{style}"></iframe>')
    browser.go(frame.as_uri())
    browser.enter_frame("iframe")
    started(browser)
    assert browser.run("return [innerWidth, innerHeight]") == [WIDTH_PX, HEIGHT_PX]
    fits(browser, "closed")
    press(browser, "Menu")
    fits(browser, "the menu open")
    press(browser, task["about"])
    panels = browser.run("return [...document.querySelectorAll('details.panel')].map(panel => panel.id)")
    assert len(panels) > 10, panels
    for panel in panels:
        fold_out(browser, panel)
        fits(browser, panel)
    shows(browser, task["station"], task["drawn"])
    first = task["edits"][0]
    enter(browser, first["label"], first["text"])
    shows(browser, task["station"], first["shown"])
    thumbs(browser)
    fits(browser, "all open")


def fits(browser, what):
    wider = lambda: browser.run(script("wider"))
    try:
        until(what, lambda: wider()[0] <= 0)
    except AssertionError:
        raise AssertionError(f"{what}: wider than the screen, px and by what: {wider()}") from None


def thumbs(browser):
    """Boxes of readings are large enough for a thumb, with letters that do not make a phone zoom in."""
    small = browser.run(
        """return [...document.querySelectorAll('.carved-blades input.entry')].filter(box => {
            const place = box.getBoundingClientRect();
            return place.height < 44 || place.width < 44 || parseFloat(getComputedStyle(box).fontSize) < 16;
        }).length"""
    )
    assert small == 0, f"{small} boxes of readings are too small for a thumb"
