//! A plain drawing: lines, circles and text on named layers, in millimetres, `y` upward. One module per file
//! format writes it; nothing in here knows of paper or files.

mod text;

pub(crate) use text::{BOLD, CAPITALS, HALF_SMALL, breadth_mm, fitted, wrapped};

/// What a line is for; also its layer's name.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Layer {
    /// Cut along it.
    Cut,
    /// A straight edge to measure from.
    Datum,
    /// Centre lines and axes.
    Centre,
    /// Angle lines and other guides.
    Guide,
    /// Glue lines between laminations.
    Glue,
    /// Dimensions, tables, frames.
    Thin,
    /// Marks by which sheets are joined.
    Join,
    /// The check ruler.
    Ruler,
}

/// How a layer's lines are drawn.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stroke {
    /// Width, mm.
    pub width_mm: f64,
    /// Lengths of dashes and gaps, mm; empty for a full line.
    pub dashes_mm: &'static [f64],
    /// Grey, 0 black to 1 white.
    pub grey: f64,
}

impl Layer {
    /// All layers.
    pub const ALL: [Self; 8] =
        [Self::Cut, Self::Datum, Self::Centre, Self::Guide, Self::Glue, Self::Thin, Self::Join, Self::Ruler];

    /// Its name in a file.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Cut => "CUT",
            Self::Datum => "DATUM",
            Self::Centre => "CENTRE",
            Self::Guide => "GUIDE",
            Self::Glue => "GLUE",
            Self::Thin => "THIN",
            Self::Join => "JOIN",
            Self::Ruler => "RULER",
        }
    }

    /// How its lines are drawn.
    #[must_use]
    pub fn stroke(self) -> Stroke {
        let (width_mm, dashes_mm, grey): (f64, &'static [f64], f64) = match self {
            Self::Cut => (0.3, &[], 0.0),
            Self::Datum => (0.5, &[], 0.0),
            Self::Centre => (0.15, &[6.0, 1.2, 0.8, 1.2], 0.2),
            Self::Guide => (0.18, &[2.4, 1.2], 0.2),
            Self::Glue => (0.12, &[1.0, 1.0], 0.35),
            Self::Thin => (0.12, &[], 0.3),
            Self::Join => (0.15, &[0.8, 1.6], 0.2),
            Self::Ruler => (0.2, &[], 0.0),
        };
        Stroke { width_mm, dashes_mm, grey }
    }
}

/// Where a text stands on its point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Anchor {
    /// It begins there.
    Start,
    /// Its middle is there.
    Middle,
    /// It ends there.
    End,
}

/// A text in one line; its foot stands on `at`.
#[derive(Clone, Debug, PartialEq)]
pub struct Text {
    /// Where it stands, mm.
    pub at: [f64; 2],
    /// Height of its letters' body, mm.
    pub size_mm: f64,
    /// Where on `at` it stands.
    pub anchor: Anchor,
    /// Bold.
    pub bold: bool,
    /// What it says.
    pub words: String,
}

/// One thing drawn.
#[derive(Clone, Debug, PartialEq)]
pub enum Item {
    /// Straight pieces from point to point.
    Line {
        /// Layer.
        layer: Layer,
        /// Points, mm.
        points: Vec<[f64; 2]>,
        /// Whether the last point is joined to the first.
        closed: bool,
    },
    /// A full circle.
    Circle {
        /// Layer.
        layer: Layer,
        /// Its middle, mm.
        centre: [f64; 2],
        /// Its radius, mm.
        radius_mm: f64,
    },
    /// A text.
    Text(Text),
}

/// A drawing.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Drawing {
    /// What is drawn.
    pub items: Vec<Item>,
}

impl Drawing {
    /// A line through points.
    pub fn line(&mut self, layer: Layer, points: impl Into<Vec<[f64; 2]>>) {
        self.items.push(Item::Line { layer, points: points.into(), closed: false });
    }

    /// A closed line through points.
    pub fn shape(&mut self, layer: Layer, points: impl Into<Vec<[f64; 2]>>) {
        self.items.push(Item::Line { layer, points: points.into(), closed: true });
    }

    /// A circle.
    pub fn circle(&mut self, layer: Layer, centre: [f64; 2], radius_mm: f64) {
        self.items.push(Item::Circle { layer, centre, radius_mm });
    }

    /// A cross of two lines, each `2 reach` long.
    pub fn cross(&mut self, layer: Layer, [x, y]: [f64; 2], reach_mm: f64) {
        self.line(layer, [[x - reach_mm, y], [x + reach_mm, y]]);
        self.line(layer, [[x, y - reach_mm], [x, y + reach_mm]]);
    }

    /// A text.
    pub fn text(&mut self, at: [f64; 2], size_mm: f64, anchor: Anchor, words: impl Into<String>) {
        self.items.push(Item::Text(Text { at, size_mm, anchor, bold: false, words: words.into() }));
    }

    /// A bold text.
    pub fn bold(&mut self, at: [f64; 2], size_mm: f64, anchor: Anchor, words: impl Into<String>) {
        self.items.push(Item::Text(Text { at, size_mm, anchor, bold: true, words: words.into() }));
    }

    /// Another drawing, moved.
    pub fn add(&mut self, other: &Self, by: [f64; 2]) {
        self.items.extend(other.items.iter().cloned().map(|item| item.moved(by)));
    }

    /// Whether anything but guides and centre lines lies within a box: lower left and upper right corner, mm.
    #[must_use]
    pub fn tells(&self, within: [[f64; 2]; 2]) -> bool {
        self.items.iter().any(|item| item.tells(within))
    }

    /// The box round everything: lower left and upper right corner, mm; `None` for an empty drawing.
    #[must_use]
    pub fn bounds(&self) -> Option<[[f64; 2]; 2]> {
        let corners = self.items.iter().flat_map(Item::bounds);
        corners.fold(None, |all: Option<[[f64; 2]; 2]>, p| {
            let [low, high] = all.unwrap_or([p, p]);
            Some([[low[0].min(p[0]), low[1].min(p[1])], [high[0].max(p[0]), high[1].max(p[1])]])
        })
    }
}

impl Item {
    fn tells(&self, [low, high]: [[f64; 2]; 2]) -> bool {
        let told = |layer: &Layer| !matches!(layer, Layer::Guide | Layer::Centre);
        let meets = |points: &[[f64; 2]]| {
            (0..2).all(|a| points.iter().any(|p| p[a] >= low[a]) && points.iter().any(|p| p[a] <= high[a]))
        };
        match self {
            Self::Line { layer, points, closed } => {
                let ends = closed.then(|| points.last().zip(points.first())).flatten();
                told(layer) && (points.windows(2).any(&meets) || ends.is_some_and(|(a, b)| meets(&[*a, *b])))
            }
            Self::Circle { layer, .. } => told(layer) && meets(&self.bounds()),
            Self::Text(_) => meets(&self.bounds()),
        }
    }

    fn moved(mut self, by: [f64; 2]) -> Self {
        let shift = |p: &mut [f64; 2]| {
            p[0] += by[0];
            p[1] += by[1];
        };
        match &mut self {
            Self::Line { points, .. } => points.iter_mut().for_each(shift),
            Self::Circle { centre, .. } => shift(centre),
            Self::Text(text) => shift(&mut text.at),
        }
        self
    }

    fn bounds(&self) -> Vec<[f64; 2]> {
        match self {
            Self::Line { points, .. } => points.clone(),
            Self::Circle { centre: [x, y], radius_mm: r, .. } => vec![[x - r, y - r], [x + r, y + r]],
            Self::Text(text) => text.corners().to_vec(),
        }
    }
}
