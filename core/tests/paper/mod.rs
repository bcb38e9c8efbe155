//! Words on sheets of paper.

use spokeshave::bench::{Item, Sheet};

/// Boxes of a drawing's words: left, low, right, high, mm.
fn boxes(items: &[Item]) -> Vec<[f64; 4]> {
    let of = |item: &Item| match item {
        Item::Text(t) => {
            let left = t.at[0] + t.left_mm();
            let (low, high) = (t.at[1] - 0.1 * t.size_mm, t.at[1] + 0.65 * t.size_mm);
            Some([left, low, left + t.breadth_mm(), high])
        }
        _ => None,
    };
    items.iter().filter_map(of).collect()
}

/// All words stay on their sheet, and apart.
pub(crate) fn words_apart(sheet: &Sheet) {
    let [w, h] = sheet.size_mm;
    let mut all = boxes(&sheet.frame.items);
    for [x0, y0, x1, y1] in &all {
        assert!(*x0 > 5.0 && *y0 > 5.0 && *x1 < w - 5.0 && *y1 < h - 5.0, "{}", sheet.name);
    }
    for view in &sheet.views {
        let [low, high] = view.window_mm;
        let within = |t: &[f64; 4]| t[0] >= low[0] && t[2] <= high[0] && t[1] >= low[1] && t[3] <= high[1];
        all.extend(boxes(&view.drawing.items).into_iter().filter(within));
    }
    for (i, a) in all.iter().enumerate() {
        for b in &all[i + 1..] {
            let apart = a[0] >= b[2] || b[0] >= a[2] || a[1] >= b[3] || b[1] >= a[3];
            assert!(apart, "{}: words at {a:?} and {b:?}", sheet.name);
        }
    }
}
