"""The page in another browser engine, from disk: a whole job, by keyboard, on a phone, on paper, in other colours.

engines.py firefox|webkit FILE: JSON {page, axe, folder, task, keyboard}: what is typed, what the core makes of it.
"""

import json
import os
import sys
import time
import traceback
from pathlib import Path

from engine import job, keyboard, look, paper, phone
from engine.firefox import Firefox
from engine.webkit import WebKit

WIDE_PX = (1440, 900)
# What is looked at where the environment does not say: between them every subject, each once where once is enough.
USUAL = {
    "firefox": "job,light and dark,motion,keyboard,forced colours,paper",
    "webkit": "job,light and dark,motion,phone",
}


def quiet(browser):
    """The page has asked nobody for anything, and shows no figure that is none."""
    text = browser.run("return document.body.innerText")
    assert "NaN" not in text and "undefined" not in text, text
    fetched = browser.run("return performance.getEntriesByType('resource').map(r => r.name)")
    outside = [name for name in fetched if not name.startswith(("data:", "blob:", "file:"))]
    assert not outside, outside


def subjects(browser, asked, folder):
    """What is looked at, one after the other; what an engine cannot do is left to the others."""
    page = asked["page"]
    yield "keyboard", lambda: keyboard.whole(browser, page, asked["keyboard"])
    yield "light and dark", lambda: look.light_and_dark(browser, page, asked["axe"])
    yield "motion", lambda: look.motion(browser, page)
    if browser.can_prefer:
        yield "forced colours", lambda: look.forced(browser, page, asked["axe"])
    if browser.can_print:
        yield "paper", lambda: paper.whole(browser, page, folder)
    yield "phone", lambda: phone.whole(browser, page, folder, asked["task"])
    # Last, for the job it leaves in the browser is a large one.
    yield "job", lambda: job.whole(browser, page, folder, asked["task"], asked["axe"])


def holds(browser, name, look_at):
    """Whether a subject holds; a fault in one does not hide the others."""
    begun = time.time()
    try:
        look_at()
        quiet(browser)
    except Exception:
        traceback.print_exc()
        return False
    print(f"{browser.name}: {name} holds, {time.time() - begun:.1f} s", flush=True)
    return True


def main(engine, file):
    asked = json.loads(Path(file).read_text())
    folder = Path(asked["folder"])
    (folder / "downloads").mkdir()
    browser = {"firefox": Firefox, "webkit": WebKit}[engine](str(folder / "downloads"))
    try:
        browser.resize(*WIDE_PX)
        wanted = os.environ.get("SPOKESHAVE_ENGINES", USUAL[engine])
        able = list(subjects(browser, asked, folder))
        chosen = able if wanted == "all" else [s for s in able if s[0] in wanted.split(",")]
        assert chosen, f"SPOKESHAVE_ENGINES: {wanted}; {engine} can do {', '.join(s[0] for s in able)}, or all"
        faults = [name for name, look_at in chosen if not holds(browser, name, look_at)]
    finally:
        browser.close()
    assert not faults, faults


main(sys.argv[1], sys.argv[2])
