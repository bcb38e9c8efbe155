"""What a person does on the page and reads on it."""

import time
from pathlib import Path

PATIENCE_S = 60.0
ENTER, TAB, CONTROL, RELEASED, DOWN = "\ue007", "\ue004", "\ue009", "\ue000", "\ue015"
ALL_SELECTED = CONTROL + "a" + RELEASED
BACK = CONTROL + "z" + RELEASED
MARK = "data-under-hand"
# The one button in sight with this name, marked; gives how many there are.
FIND = f"""
const [whole, start] = arguments;
const name = e => (e.getAttribute('aria-label') || e.innerText || '').trim();
const fits = e => start ? name(e).startsWith(start) : name(e) === whole;
const found = [...document.querySelectorAll('button')].filter(e => e.getClientRects().length > 0 && fits(e));
document.querySelectorAll('[{MARK}]').forEach(e => e.removeAttribute('{MARK}'));
if (found.length === 1) found[0].setAttribute('{MARK}', '');
return found.length;
"""


def script(name):
    """A script that runs in the page."""
    return (Path(__file__).parent / "page" / f"{name}.js").read_text()


def until(what, ask):
    """Asks until there is an answer; gives it."""
    begun = time.time()
    while not (answer := ask()):
        assert time.time() - begun < PATIENCE_S, f"waited in vain for {what}"
        time.sleep(0.03)
    return answer


def open_page(browser, page):
    browser.go(Path(page).as_uri())
    started(browser)


def started(browser):
    ready = "return window.spokeshave && window.spokeshave.startedMs || null"
    until("the application to start", lambda: browser.run(ready))


def press(browser, name="", start=""):
    """Presses the one button with this name, or with a name that starts so."""
    until(f"one button {name or start}", lambda: browser.run(FIND, name, start) == 1)
    hit(browser, f"[{MARK}]")


def hit(browser, css):
    """Clicks a thing in view; again, where the page moved it away from under the hand."""
    reach = """const thing = document.querySelector(arguments[0]);
        thing.scrollIntoView({block: 'center'});
        window.wasHit = false;
        thing.addEventListener('click', () => window.wasHit = true, {capture: true, once: true});"""
    for _ in range(3):
        browser.run(reach, css)
        still(browser, css)
        browser.click(css)
        if browser.run("return window.wasHit"):
            return
    raise AssertionError(f"{css} was missed three times")


def still(browser, css):
    """Waits until a thing stays where it is: what is worked out later may move it away from under the hand."""
    place = lambda: browser.run(
        "const {top, left} = document.querySelector(arguments[0]).getBoundingClientRect(); return [top, left]", css
    )
    looks = []

    def same():
        looks.append(place())
        return len(looks) > 3 and all(look == looks[-1] for look in looks[-4:])

    until(f"{css} to stay where it is", same)


def fold_out(browser, panel):
    """Opens a panel by its heading, where it is not."""
    is_open = lambda: browser.run("return document.getElementById(arguments[0]).open", panel)
    if not is_open():
        hit(browser, f"#{panel} > summary")
        until(f"{panel} open", is_open)


def fold_out_all(browser):
    """Opens every panel and waits until all of it is worked out."""
    for panel in browser.run("return [...document.querySelectorAll('details.panel:not([open])')].map(panel => panel.id)"):
        fold_out(browser, panel)
    until("everything worked out", lambda: "Working out" not in browser.run("return document.body.innerText"))


def box(label):
    return f'input[aria-label="{label}"]'


def enter(browser, label, text):
    """Types over what stands in a box."""
    browser.type(box(label), ALL_SELECTED)
    browser.type(box(label), text + ENTER)


def says(browser, text):
    until(f"the text {text!r}", lambda: text in browser.run("return document.body.innerText"))


def number(text):
    """A figure as the page writes it; None for no figure."""
    plain = text.replace("\u2212", "-").replace("\u00a0", "").replace("\u202f", "").replace(" ", "")
    try:
        return float(plain)
    except ValueError:
        return None


def near(shown, wanted):
    """Whether a text shows a figure, to half of its last decimal."""
    value = number(shown)
    if value is None or wanted is None:
        return value is None and wanted is None
    decimals = len(shown.partition(".")[2])
    return abs(value - wanted) <= 0.5 * 10.0**-decimals + 1e-9


def figures(browser, station):
    """Departures of a station's row and the rpm of every flight point, as written."""
    return browser.run(
        """const row = document.querySelector(`button[aria-label="Station ${arguments[0]}"]`).closest('tr');
        const rpm = box => box.closest('tr').querySelector('.figure-cell')?.textContent || '';
        return {departures: [...row.querySelectorAll('.departure-column')].map(cell => cell.textContent),
            rpm: [...document.querySelectorAll('.points .name')].map(rpm)}""",
        station,
    )


def shows(browser, station, wanted):
    """Waits until the page shows what the core computes."""

    def agree():
        shown = figures(browser, station)
        same = lambda key: len(shown[key]) == len(wanted[key]) and all(map(near, shown[key], wanted[key]))
        return same("departures") and same("rpm")

    try:
        until("the core's figures", agree)
    except AssertionError:
        raise AssertionError(f"shown {figures(browser, station)}, computed {wanted}") from None
