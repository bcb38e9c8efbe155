"""PDF and SVG by MuPDF: exact scale, nothing off the page.

paper.py FOLDER WIDTH_MM HEIGHT_MM
"""

import sys
from pathlib import Path

import pymupdf
from scale import judged

folder, size = Path(sys.argv[1]), [float(v) for v in sys.argv[2:4]]
pdf = pymupdf.open(folder / "sheets.pdf")
sheets = sorted(folder.glob("sheet-*.svg"))
assert len(pdf) == len(sheets) > 3, (len(pdf), len(sheets))
for page in pdf:
    long = judged(f"page {page.number + 1}", page, size)
    words = page.get_text("words")
    assert "100 mm" in page.get_text() and "A propeller can kill" in page.get_text()
    # What a window cuts off is not on the page; the rest must be.
    shown = [w for w in words if w[0] > 0 and w[2] < page.rect.width and w[1] > 0 and w[3] < page.rect.height]
    heading = [w for w in words if w[4] == "sheet"]
    assert shown and heading and all(w in shown for w in heading)
print(f"{len(pdf)} pages, last ruler {long:.4f} mm")
for path in sheets:
    drawn = pymupdf.open(path)
    drawn = pymupdf.open("pdf", drawn.convert_to_pdf())
    long = judged(path.name, drawn[0], size)
print(f"{len(sheets)} SVG sheets, last ruler {long:.4f} mm")
