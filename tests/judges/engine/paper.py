"""The sheets printed through the browser, judged by MuPDF."""

import pymupdf
from engine.hand import fold_out, open_page, press, until
from scale import judged

A4_MM = [210.0, 297.0]


def whole(browser, page, folder):
    open_page(browser, page)
    # Printing itself would wait for a person.
    browser.run("window.print = () => { window.asked = (window.asked || 0) + 1 }")
    fold_out(browser, "paper")
    press(browser, "A4")
    press(browser, start="Print ")
    until("being asked to print", lambda: browser.run("return window.asked || 0") == 1)
    sheets = browser.run("return document.querySelectorAll('.printed-sheets section').length")
    file = folder / "printed.pdf"
    file.write_bytes(browser.printed(*A4_MM))
    pdf = pymupdf.open(file)
    assert len(pdf) == sheets > 3, (len(pdf), sheets)
    rulers = [judged(f"page {leaf.number + 1}", leaf, A4_MM, by="firefox_") for leaf in pdf]
    print(f"{len(pdf)} sheets printed, rulers {min(rulers):.3f} to {max(rulers):.3f} mm")
