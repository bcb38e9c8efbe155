"""Lengths on paper, for the judges that look at pages."""

from told import within

POINT = 25.4 / 72


def ruler_mm(page):
    """Length of the horizontal line nearest to 100 mm."""
    lines = [
        abs(item[1].x - item[2].x) * POINT
        for path in page.get_drawings()
        for item in path["items"]
        if item[0] == "l" and abs(item[1].y - item[2].y) < 1e-3
    ]
    return min(lines, key=lambda mm: abs(mm - 100), default=0.0)


def judged_size(name, page, size, key):
    """The page has the size, mm; `key` names what is allowed."""
    found = [page.rect.width * POINT, page.rect.height * POINT]
    within(key, max(abs(a - b) for a, b in zip(found, size)), f"{name}, {found}")


def judged(name, page, size, by=""):
    """The page has the size and its ruler is 100 mm long, as the program made it or as printed `by` a browser; gives that length."""
    judged_size(name, page, size, f"{by}sheet")
    long = ruler_mm(page)
    within(f"{by}ruler", abs(long - 100), f"{name}, {long}")
    return long
