"""By the keyboard alone, the focus always seen: another job, a station, its angle changed, the change taken back."""

from engine.hand import BACK, DOWN, ENTER, TAB, box, open_page, script, shows, until

MOST_STOPS = 400


def here_of(browser):
    """What has the focus, and what is wrong with how it shows."""
    return browser.run(script("focus"))


def well(browser):
    """What has the focus, once it is seen to have it; the page itself, beyond the last stop, has no ring."""
    here = here_of(browser)
    return here if not here["faults"] or here["kind"].startswith("body") else None


def to(browser, what, wanted):
    """Tab until the wanted control has the focus; every stop on the way shows that it has it."""
    for _ in range(MOST_STOPS):
        browser.keys(TAB)
        here = until("a focus that is seen", lambda: well(browser))
        if wanted(here):
            return here
    raise AssertionError(f"{MOST_STOPS} stops and no {what}")


def named(name):
    return lambda here: here["name"] == name


def whole(browser, page, task):
    station = task["station"]
    open_page(browser, page)
    to(browser, "Jobs", named("Jobs"))
    browser.keys(ENTER)
    to(browser, "the example", named(task["about"]))
    browser.keys(ENTER)
    title = "return document.querySelector('input[aria-label=Title]').value"
    until("the example", lambda: browser.run(title) == task["title"])
    shows(browser, station, task["drawn"])
    # The focus is where it was before, not at the top of a page that is to be gone through again.
    assert here_of(browser)["name"] == "Jobs", here_of(browser)
    moves = MOST_STOPS
    to(browser, "the blade", lambda here: here["kind"] == "g.stations")
    row = f'return document.querySelector(\'button[aria-label="Station {station}"]\').getAttribute("aria-pressed")'
    while browser.run(row) != "true":
        browser.keys(DOWN)
        here = here_of(browser)
        moves -= 1
        assert moves > 0, "the arrows do not reach the station"
        assert not here["faults"], here
    to(browser, "the box", named(f"Blade angle at station {station}, degrees"))
    # What a box holds is marked when Tab leads into it.
    browser.keys(task["text"] + ENTER)
    shows(browser, station, task["turned"])
    browser.type(box(f"Blade angle at station {station}, degrees"), BACK)
    shows(browser, station, task["drawn"])
