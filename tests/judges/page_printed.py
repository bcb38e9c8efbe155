"""The page itself as a browser printed it: on paper of its size, with what it tells, nothing off it.

page_printed.py FILE WIDTH_MM HEIGHT_MM WORDS…
"""

import sys

import pymupdf

MM = 25.4 / 72
pdf = pymupdf.open(sys.argv[1])
size = [float(v) for v in sys.argv[2:4]]
for page in pdf:
    # A printer's driver rounds to points.
    assert all(abs(a * MM - b) < 0.4 for a, b in zip(page.rect[2:], size)), (page.rect, size)
    off = [w[4] for w in page.get_text("words") if w[2] > page.rect.width or w[0] < 0]
    assert not off, f"page {page.number + 1}: {off[:5]} beyond the edge"
text = " ".join(" ".join(page.get_text() for page in pdf).split())
missing = [words for words in sys.argv[4:] if words not in text]
assert not missing, missing
print(f"{len(pdf)} pages with {len(sys.argv) - 4} texts")
