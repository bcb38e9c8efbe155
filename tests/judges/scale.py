"""Lengths on paper, for the judges that look at pages."""

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


def judged(name, page, size):
    """The page has the size and its ruler is 100 mm long; gives that length."""
    found = [page.rect.width * POINT, page.rect.height * POINT]
    # The program's own sheets are within 2e-5 mm; Firefox prints pages of whole points: A4 as 596 by 842, 0.26 mm
    # wider than asked. So one point is allowed.
    assert all(abs(a - b) < POINT for a, b in zip(found, size)), (name, found)
    long = ruler_mm(page)
    # Less than a pencil line; on the program's own sheets 4e-6 mm comes out.
    assert abs(long - 100) < 0.1, (name, long)
    return long
