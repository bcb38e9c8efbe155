"""The page's sheets as a browser printed them: as many pages, of the paper's size, at exact scale.

printed.py FILE PAGES WIDTH_MM HEIGHT_MM
"""

import sys

import pymupdf
from scale import judged

pdf = pymupdf.open(sys.argv[1])
assert len(pdf) == int(sys.argv[2]) > 3, len(pdf)
size = [float(v) for v in sys.argv[3:5]]
rulers = [judged(f"page {page.number + 1}", page, size, by="chromium_") for page in pdf]
print(f"{len(pdf)} pages, rulers {min(rulers):.3f} to {max(rulers):.3f} mm")
