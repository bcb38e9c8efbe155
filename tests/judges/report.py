"""A report by MuPDF: pages of the paper's size, its parts in their order, text as text in the fonts every viewer has, charts as lines.

report.py FILE WIDTH_MM HEIGHT_MM PART...
"""

import sys

import pymupdf
from scale import judged_size

pdf = pymupdf.open(sys.argv[1])
size, parts = [float(v) for v in sys.argv[2:4]], sys.argv[4:]
text, curves = "", 0
for page in pdf:
    judged_size(f"page {page.number + 1}", page, size, "report")
    assert not page.get_images(), "a picture in dots"
    fonts = {font[3] for font in page.get_fonts()}
    assert fonts <= {"Helvetica", "Helvetica-Bold"}, fonts
    words = page.get_text("words")
    room = page.rect + (20, 20, -20, -20)
    outside = [w[4] for w in words if not room.contains(pymupdf.Rect(w[:4]))]
    assert not outside, (page.number, outside)
    for i, a in enumerate(words):
        for b in words[i + 1 :]:
            wide, tall = min(a[2], b[2]) - max(a[0], b[0]), min(a[3], b[3]) - max(a[1], b[1])
            # Boxes of words are as high as the font's tallest letters; what counts is that they are beside or under one another.
            assert wide < 0.5 or tall < 3.5, (page.number, a, b)
    said = page.get_text()
    assert f"page {page.number + 1} of {len(pdf)}" in said and "A propeller can kill" in said
    text += said
    curves += sum(len(path["items"]) > 9 for path in page.get_drawings())
places = [text.find("\n" + part) for part in parts]
assert -1 not in places and places == sorted(places), list(zip(parts, places))
assert "?" not in text and "NaN" not in text
assert curves > 5, curves
print(f"{len(pdf)} pages, {len(text)} letters, {curves} paths of curves")
