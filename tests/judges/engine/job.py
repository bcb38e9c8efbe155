"""One job from the drawing to the logbook: changed, shaped, measured, flown, saved, opened again, read in inches."""

import re
import shutil
from pathlib import Path

from engine.hand import BACK, ENTER, box, enter, fold_out, fold_out_all, hit, near, open_page, press, says, shows, started, until
from engine.look import rules

INCH_M = 0.0254


def whole(browser, page, folder, task, axe):
    station = task["station"]
    open_page(browser, page)
    press(browser, "Jobs")
    press(browser, task["about"])
    shows(browser, station, task["drawn"])
    edit(browser, page, task)
    shape(browser, task)
    carve(browser, task)
    log(browser, task)
    change(browser, task)
    hold(browser, task)
    take_away(browser, folder, task)
    save(browser, folder)
    reopen(browser, folder, task)
    inches(browser, task)
    fold_out_all(browser)
    rules(browser, axe, "after the whole job, everything open")


def edit(browser, page, task):
    """A station turned, taken back, turned and found after a reload; then mass and engine, which the fit follows."""
    station = task["station"]
    first, *others = task["edits"]
    enter(browser, first["label"], first["text"])
    shows(browser, station, first["shown"])
    browser.type(box(first["label"]), BACK)
    shows(browser, station, task["drawn"])
    enter(browser, first["label"], first["text"])
    shows(browser, station, first["shown"])
    angle = f"return JSON.parse(spokeshave.keep.atStart() || '{{}}').propeller?.stations[{station - 1}].angle_deg"
    until("the job to be kept", lambda: browser.run(angle) == float(first["text"]))
    browser.go(Path(page).as_uri())
    started(browser)
    shows(browser, station, first["shown"])
    for other in others:
        enter(browser, other["label"], other["text"])
        shows(browser, station, other["shown"])


def shape(browser, task):
    press(browser, "Best-incidence twist at Cruise")
    says(browser, "“twist, Cruise” stands beside the drawn blade")
    press(browser, "Use twist, Cruise")
    shows(browser, task["station"], task["twisted"])


def carve(browser, task):
    """Readings of both blades, down the column by Enter; the differences are the core's."""
    fold_out(browser, "carved")
    says(browser, "Type what the protractor")
    for blade, faces in enumerate(task["faces"], 1):
        hit(browser, box(f"Angle of blade {blade} at station 1, degrees"))
        browser.keys("".join(text + ENTER for text in faces))
    for blade, wanted in enumerate(task["from_drawn"], 1):
        cells(browser, f"Blade {blade} against the drawing", 1, wanted)


def log(browser, task):
    """A standing run; what it tells is what the core finds."""
    fold_out(browser, "logbook")
    press(browser, "Add a reading")
    first = "return document.activeElement.matches('.log-readings .entry')"
    until("the first box of the reading", lambda: browser.run(first))
    browser.keys(task["log_rpm"] + ENTER + "full" + ENTER)
    cells(browser, "Factors found", 0, task["factors"])


def change(browser, task):
    """The rpm wanted at a flight point, and what to change for it: diameter and pitch of each way."""
    browser.type("#wanted", task["wanted_rpm"])
    press(browser, "Work out the changes")
    ways = "return [...document.querySelectorAll('.change details > summary')].map(way => way.innerText)"
    size = re.compile(r"Then (.+?)\s*mm across, pitch (.+?)\s*mm")
    wanted = task["changes_mm"]
    found = until("the ways to change it", lambda: browser.run(ways))
    sizes = [size.search(way).groups() for way in found]
    assert len(sizes) == len(wanted), (found, wanted)
    assert all(near(*pair) for way in zip(sizes, wanted) for pair in zip(*way)), (sizes, wanted)


def hold(browser, task):
    """Whether the wood holds: the margin at every station."""
    fold_out(browser, "bench")
    cells(browser, "Stress by station", 0, task["margins_percent"])


def take_away(browser, folder, task):
    """Every file of the bench, and the report; what stands in them is compared elsewhere."""
    fold_out(browser, "paper")
    for label in task["files"]:
        take(browser, folder, label)
    fold_out(browser, "report")
    press(browser, "Make the report")
    take(browser, folder, "Save the report as PDF")


def take(browser, folder, label):
    """One more whole file is on the disk."""
    finished = lambda: {file for file in (folder / "downloads").glob("*.*") if file.suffix != ".part"}
    before = finished()
    press(browser, label)
    until(f"the file of {label}", lambda: [file for file in finished() - before if file.stat().st_size > 0])


def cells(browser, table, column, wanted):
    """Waits until a column of a table shows these figures."""
    asked = """const rows = document.querySelectorAll(`[aria-label="${arguments[0]}"] tbody tr`);
        return [...rows].map(row => row.querySelectorAll('td')[arguments[1]].textContent)"""
    shown = lambda: browser.run(asked, table, column)
    same = lambda texts: len(texts) == len(wanted) and all(map(near, texts, wanted))
    try:
        until(table, lambda: same(shown()))
    except AssertionError:
        raise AssertionError(f"{table}: shown {shown()}, computed {wanted}") from None


def save(browser, folder):
    """The file that the page offers is on the disk."""
    press(browser, "Save")
    written = lambda: [file for file in folder.glob("downloads/*.json") if file.stat().st_size > 0]
    file = until("a file from the page", written)[0]
    until("the whole file", lambda: file.read_text().endswith(("}", "}\n")))
    shutil.copy(file, folder / "saved.json")


def reopen(browser, folder, task):
    """Another job, and the saved one over it."""
    title = "return document.querySelector('input[aria-label=Title]').value"
    press(browser, "Jobs")
    press(browser, start="New: a plain two-blade propeller")
    until("another job", lambda: browser.run(title) != task["title"])
    browser.type("input[type=file]", str(folder / "saved.json"))
    until("the saved job", lambda: browser.run(title) == task["title"])
    shows(browser, task["station"], task["twisted"])


def inches(browser, task):
    """The diameter in inches; what is worked out stays as it was."""
    press(browser, "in")
    diameter = "return document.querySelector('input[aria-label=\"Diameter, in\"]')?.value || ''"
    until("the diameter in inches", lambda: near(browser.run(diameter), task["diameter_m"] / INCH_M))
    shows(browser, task["station"], task["twisted"])
