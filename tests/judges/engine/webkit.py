"""WebKitGTK's own small browser, driven through the W3C's WebDriver protocol."""

import json
import os
import shutil
import socket
import subprocess
import time
import urllib.error
import urllib.request
from pathlib import Path

PATIENCE_S = 60.0
# The rules of access take long on a page with everything open.
SCRIPT_S = 150.0
ELEMENT = "element-6066-11e4-a52e-4f735466cecf"


class WebKit:
    """A window on a screen of its own. Its driver has no command to print, and WebKit has no forced colours."""

    can_print = can_prefer = False

    def __init__(self, downloads):
        program = shutil.which("WebKitWebDriver")
        assert program, "WebKitWebDriver is missing: run `cargo prove`, or install the package webkit2gtk-driver"
        browsers = sorted(Path("/usr/lib").glob("*/webkit2gtk-*/MiniBrowser"))
        assert browsers, "WebKitGTK's own browser is missing"
        screen = ["Xvfb", "-displayfd", "1", "-screen", "0", "1440x900x24", "-nolisten", "tcp"]
        self.screen = subprocess.Popen(screen, stdout=subprocess.PIPE, stderr=subprocess.DEVNULL)
        display = ":" + self.screen.stdout.readline().decode().strip()
        with socket.socket() as free:
            free.bind(("127.0.0.1", 0))
            port = free.getsockname()[1]
        environment = {**os.environ, "DISPLAY": display, "XDG_CONFIG_HOME": settings(Path(downloads))}
        self.driver = subprocess.Popen([program, f"--port={port}"], env=environment)
        self.root = f"http://127.0.0.1:{port}/session"
        options = {"binary": str(browsers[-1]), "args": ["--automation"]}
        wanted = {"capabilities": {"alwaysMatch": {"webkitgtk:browserOptions": options}}}
        try:
            session = self.begin(wanted)
        except BaseException:
            self.end()
            raise
        self.root += "/" + session["sessionId"]
        self.ask("POST", "/timeouts", {"script": int(1e3 * SCRIPT_S)})
        self.name = "WebKitGTK {browserVersion}".format(**session["capabilities"])

    def begin(self, wanted):
        begun = time.time()
        while True:
            try:
                return self.ask("POST", "", wanted)
            except OSError:
                assert self.driver.poll() is None, "WebKitWebDriver has ended"
                assert time.time() - begun < PATIENCE_S, "WebKitWebDriver does not answer"
                time.sleep(0.2)

    def ask(self, method, path, body=None):
        data = None if body is None else json.dumps(body).encode()
        request = urllib.request.Request(self.root + path, data, {"Content-Type": "application/json"}, method=method)
        try:
            with urllib.request.urlopen(request, timeout=SCRIPT_S + PATIENCE_S) as answer:
                return json.load(answer)["value"]
        except urllib.error.HTTPError as fault:
            raise AssertionError(f"{path} {str(body)[:300]}: {fault.read().decode()[:600]}") from None

    def go(self, url):
        self.ask("POST", "/url", {"url": url})

    def run(self, script, *given):
        return self.ask("POST", "/execute/sync", {"script": script, "args": given})

    def wait_for(self, script):
        return self.ask("POST", "/execute/async", {"script": script, "args": []})

    def find(self, css):
        return self.ask("POST", "/element", {"using": "css selector", "value": css})

    def click(self, css):
        self.ask("POST", f"/element/{self.find(css)[ELEMENT]}/click", {})

    def type(self, css, text):
        self.ask("POST", f"/element/{self.find(css)[ELEMENT]}/value", {"text": text})

    def keys(self, text):
        """Keys to whatever has the focus, one by one, as a keyboard sends them."""
        strokes = [{"type": way, "value": key} for key in text for way in ("keyDown", "keyUp")]
        self.ask("POST", "/actions", {"actions": [{"type": "key", "id": "keyboard", "actions": strokes}]})

    def enter_frame(self, css):
        self.ask("POST", "/frame", {"id": self.find(css)})

    def leave_frame(self):
        self.ask("POST", "/frame", {"id": None})

    def resize(self, width, height):
        self.ask("POST", "/window/rect", {"width": width, "height": height})

    def close(self):
        try:
            self.ask("DELETE", "")
        finally:
            self.end()

    def end(self):
        self.driver.kill()
        self.screen.kill()


def settings(downloads):
    """A user's folder of settings: files go where the judge looks, and motion is not wanted."""
    folder = downloads / "settings"
    for toolkit in ("gtk-3.0", "gtk-4.0"):
        (folder / toolkit).mkdir(parents=True)
        (folder / toolkit / "settings.ini").write_text("[Settings]\ngtk-enable-animations=0\n")
    (folder / "user-dirs.dirs").write_text(f'XDG_DOWNLOAD_DIR="{downloads}"\n')
    return str(folder)
