"""Firefox, driven by Mozilla's own client."""

import base64
import shutil
from pathlib import Path

ELEMENT = "css selector"


class Firefox:
    """A window with a fresh profile; what a user sets in the preferences can be set while it runs."""

    can_print = can_prefer = True

    def __init__(self, downloads):
        from marionette_driver.marionette import Marionette

        program = shutil.which("firefox-esr") or shutil.which("firefox")
        assert program, "Firefox is missing: run `cargo prove`, or install the package firefox-esr"
        wanted = {
            "browser.download.folderList": 2,
            "browser.download.dir": downloads,
            "browser.download.useDownloadDir": True,
            "browser.download.always_ask_before_handling_new_types": False,
            "browser.download.alwaysOpenPanel": False,
        }
        # Never the null device: the driver removes what stands where its log is to be, and as root it can.
        log = str(Path(downloads).parent / "firefox.log")
        self.client = Marionette(bin=program, headless=True, prefs=wanted, gecko_log=log)
        self.client.start_session()
        self.name = "{browserName} {browserVersion}".format(**self.client.session_capabilities)

    def go(self, url):
        self.client.navigate(url)

    def run(self, script, *given):
        return self.client.execute_script(script, given, sandbox=None)

    def wait_for(self, script):
        return self.client.execute_async_script(script, sandbox=None, script_timeout=150000)

    def find(self, css):
        return self.client.find_element(ELEMENT, css)

    def click(self, css):
        self.find(css).click()

    def type(self, css, text):
        self.find(css).send_keys(text)

    def keys(self, text):
        """Keys to whatever has the focus, one by one, as a keyboard sends them."""
        self.client.actions.sequence("key", "keyboard").send_keys(text).perform()

    def enter_frame(self, css):
        self.client.switch_to_frame(self.find(css))

    def leave_frame(self):
        self.client.switch_to_frame()

    def resize(self, width, height):
        self.client.set_window_rect(width=width, height=height)

    def prefer(self, name, value):
        """A preference of the user; None as it was at first."""
        if value is None:
            self.client.clear_pref(name)
        else:
            self.client.set_pref(name, value)

    def printed(self, width_mm, height_mm):
        """The page as it is printed; PDF."""
        paper = {"width": width_mm / 10, "height": height_mm / 10}
        none = {"top": 0, "bottom": 0, "left": 0, "right": 0}
        asked = {"page": paper, "margin": none, "shrinkToFit": False, "background": True}
        return base64.b64decode(self.client._send_message("WebDriver:Print", asked, key="value"))

    def close(self):
        self.client.quit()
        # Its own tidying up at the end of Python fails noisily.
        self.client.cleanup()
