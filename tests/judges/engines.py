"""The page in another browser engine: a person turns a station, takes it back, turns it again, reloads, and looks at it on a phone.

engines.py firefox|webkit FILE: JSON {page, axe, label, text, station, before, after}: departures of the station's row as the core has them, degrees.
Firefox is driven by Mozilla's own client, WebKit by the driver of WebKitGTK through the W3C's WebDriver protocol.
"""

import json
import os
import shutil
import subprocess
import sys
import time
import urllib.request
from pathlib import Path

PATIENCE_S = 60.0
ENTER, CONTROL, RELEASED = "\ue007", "\ue009", "\ue000"
ELEMENT = "element-6066-11e4-a52e-4f735466cecf"


class Firefox:
    def __init__(self):
        from marionette_driver.marionette import Marionette

        program = shutil.which("firefox-esr") or shutil.which("firefox")
        assert program, "Firefox is missing: run `cargo prove`, or install the package firefox-esr"
        self.client = Marionette(bin=program, headless=True)
        self.client.start_session()
        self.name = "{browserName} {browserVersion}".format(**self.client.session_capabilities)

    def go(self, url):
        self.client.navigate(url)

    def run(self, script):
        return self.client.execute_script(script, sandbox=None)

    def wait_for(self, script):
        return self.client.execute_async_script(script, sandbox=None, script_timeout=60000)

    def type(self, css, text):
        self.client.find_element("css selector", css).send_keys(text)

    def resize(self, width, height):
        self.client.set_window_rect(width=width, height=height)

    def close(self):
        self.client.quit()
        # Its own tidying up at the end of Python fails noisily.
        self.client.cleanup()


class WebKit:
    def __init__(self):
        program = shutil.which("WebKitWebDriver")
        assert program, "WebKitWebDriver is missing: run `cargo prove`, or install the package webkit2gtk-driver"
        browsers = sorted(Path("/usr/lib").glob("*/webkit2gtk-*/MiniBrowser"))
        assert browsers, "WebKitGTK's own browser is missing"
        screen = ["Xvfb", "-displayfd", "1", "-screen", "0", "1440x900x24", "-nolisten", "tcp"]
        self.screen = subprocess.Popen(screen, stdout=subprocess.PIPE, stderr=subprocess.DEVNULL)
        display = ":" + self.screen.stdout.readline().decode().strip()
        port = 20000 + os.getpid() % 20000
        self.driver = subprocess.Popen([program, f"--port={port}"], env={**os.environ, "DISPLAY": display})
        self.root = f"http://127.0.0.1:{port}/session"
        options = {"binary": str(browsers[-1]), "args": ["--automation"]}
        wanted = {"capabilities": {"alwaysMatch": {"webkitgtk:browserOptions": options}}}
        begun = time.time()
        while True:
            try:
                session = self.ask("POST", "", wanted)
                break
            except OSError:
                assert time.time() - begun < PATIENCE_S, "WebKitWebDriver does not answer"
                time.sleep(0.2)
        self.root += "/" + session["sessionId"]
        self.name = "WebKitGTK {browserVersion}".format(**session["capabilities"])

    def ask(self, method, path, body=None):
        data = None if body is None else json.dumps(body).encode()
        request = urllib.request.Request(self.root + path, data, {"Content-Type": "application/json"}, method=method)
        with urllib.request.urlopen(request, timeout=PATIENCE_S) as answer:
            return json.load(answer)["value"]

    def go(self, url):
        self.ask("POST", "/url", {"url": url})

    def run(self, script):
        return self.ask("POST", "/execute/sync", {"script": script, "args": []})

    def wait_for(self, script):
        return self.ask("POST", "/execute/async", {"script": script, "args": []})

    def type(self, css, text):
        element = self.ask("POST", "/element", {"using": "css selector", "value": css})[ELEMENT]
        self.ask("POST", f"/element/{element}/value", {"text": text})

    def resize(self, width, height):
        self.ask("POST", "/window/rect", {"width": width, "height": height})

    def close(self):
        self.ask("DELETE", "")
        self.driver.kill()
        self.screen.kill()


def until(what, ask):
    begun = time.time()
    while not ask():
        assert time.time() - begun < PATIENCE_S, f"waited in vain for {what}"
        time.sleep(0.05)


def shows(browser, station, wanted):
    """Whether the station's row shows these departures, to half of the last decimal."""
    cells = browser.run(
        f"""const row = document.querySelector('[aria-label="Station {station}"]').closest('tr');
        return [...row.querySelectorAll('.departure-column')].map(cell => cell.textContent)"""
    )
    number = lambda text: float(text.replace("\u2212", "-")) if text.strip("\u2212-+.0123456789") == "" else None
    shown = [number(cell) for cell in cells]
    near = lambda a, b: (a is None) == (b is None) and (a is None or abs(a - b) <= 0.05 + 1e-9)
    return len(shown) == len(wanted) and all(map(near, shown, wanted))


def whole(browser, asked):
    browser.resize(1440, 900)
    browser.go(Path(asked["page"]).as_uri())
    started = lambda: browser.run("return window.spokeshave && window.spokeshave.startedMs || null")
    until("the application to start", started)
    box = f'input[aria-label="{asked["label"]}"]'
    row = lambda wanted: until(f"departures {wanted}", lambda: shows(browser, asked["station"], wanted))
    all_selected = CONTROL + "a" + RELEASED
    row(asked["before"])
    browser.type(box, all_selected)
    browser.type(box, asked["text"] + ENTER)
    row(asked["after"])
    browser.type(box, CONTROL + "z" + RELEASED)
    row(asked["before"])
    browser.type(box, all_selected)
    browser.type(box, asked["text"] + ENTER)
    row(asked["after"])
    time.sleep(1.0)
    browser.go(Path(asked["page"]).as_uri())
    until("the application to start again", started)
    row(asked["after"])
    text = browser.run("return document.body.innerText")
    assert "NaN" not in text and "undefined" not in text, text
    fetched = browser.run("return performance.getEntriesByType('resource').map(r => r.name)")
    outside = [name for name in fetched if not name.startswith(("data:", "blob:", "file:"))]
    assert not outside, outside
    browser.run(Path(asked["axe"]).read_text() + "; return null")
    faults = browser.wait_for(
        "const done = arguments[arguments.length - 1]; axe.run(document).then(found => done(found.violations.map(v => v.id)), e => done([String(e)]))"
    )
    assert faults == [], faults
    browser.resize(500, 844)
    until("a narrow page", lambda: browser.run("return innerWidth") <= 600)
    overflow = "return document.documentElement.scrollWidth - document.documentElement.clientWidth"
    until("a page no wider than a narrow screen", lambda: browser.run(overflow) == 0)


with open(sys.argv[2]) as file:
    asked = json.load(file)
browser = {"firefox": Firefox, "webkit": WebKit}[sys.argv[1]]()
try:
    whole(browser, asked)
    print(f"{browser.name}: the page holds")
finally:
    browser.close()
