//! Formulas as the reference cases write them: `0.875*(0.10+0.32x-0.36x^2), x=r/0.875`.
//!
//! Numbers, names, `+ - * / ^`, brackets, `atan tan sin cos sqrt exp`, a product without a sign, and after
//! commas what further names stand for.

/// A formula with what its names stand for.
#[derive(Clone, Debug)]
pub struct Formula {
    text: String,
    names: Vec<(String, String)>,
}

impl Formula {
    /// A formula from its text.
    #[must_use]
    pub fn new(text: &str) -> Self {
        let mut parts = text.split(',');
        let text = parts.next().unwrap_or_default().into();
        let name = |p: &str| p.split_once('=').map(|(n, t)| (n.trim().into(), t.into()));
        Self { text, names: parts.filter_map(name).collect() }
    }

    /// Its value with given values of names.
    ///
    /// # Panics
    /// When the text is no formula: then the tests cannot be run.
    #[must_use]
    pub fn at(&self, given: &[(&str, f64)]) -> f64 {
        let mut known: Vec<(String, f64)> = given.iter().map(|(n, v)| ((*n).into(), *v)).collect();
        for (name, text) in &self.names {
            let value = Reader { rest: text, known: &known }.whole();
            known.push((name.clone(), value));
        }
        Reader { rest: &self.text, known: &known }.whole()
    }
}

struct Reader<'a> {
    rest: &'a str,
    known: &'a [(String, f64)],
}

impl Reader<'_> {
    fn whole(mut self) -> f64 {
        let value = self.sum();
        assert!(self.next().is_none(), "not understood: {:?}", self.rest);
        value
    }

    fn next(&mut self) -> Option<char> {
        self.rest = self.rest.trim_start();
        self.rest.chars().next()
    }

    fn takes(&mut self, sign: char) -> bool {
        let here = self.next() == Some(sign);
        if here {
            self.rest = &self.rest[sign.len_utf8()..];
        }
        here
    }

    fn sum(&mut self) -> f64 {
        let mut value = if self.takes('-') { -self.product() } else { self.product() };
        loop {
            if self.takes('+') {
                value += self.product();
            } else if self.takes('-') {
                value -= self.product();
            } else {
                return value;
            }
        }
    }

    fn product(&mut self) -> f64 {
        let mut value = self.power();
        loop {
            if self.takes('/') {
                value /= self.power();
            } else if self.takes('*') || self.next().is_some_and(|c| c == '(' || c.is_alphanumeric()) {
                value *= self.power();
            } else {
                return value;
            }
        }
    }

    fn power(&mut self) -> f64 {
        let base = self.single();
        if self.takes('^') { base.powf(self.single()) } else { base }
    }

    fn single(&mut self) -> f64 {
        if self.takes('(') {
            let value = self.sum();
            assert!(self.takes(')'), "a bracket is open: {:?}", self.rest);
            return value;
        }
        let first = self.next().expect("a value");
        let number = first.is_ascii_digit() || first == '.';
        let within =
            |c: char| if number { c.is_ascii_digit() || c == '.' } else { c.is_alphanumeric() || c == '_' };
        let end = self.rest.find(|c| !within(c)).unwrap_or(self.rest.len());
        let (word, rest) = self.rest.split_at(end);
        self.rest = rest;
        if number { word.parse().expect("a number") } else { self.named(word) }
    }

    fn named(&mut self, word: &str) -> f64 {
        if let Some((_, value)) = self.known.iter().find(|(name, _)| name == word) {
            return *value;
        }
        match word {
            "pi" => std::f64::consts::PI,
            "atan" => self.single().atan(),
            "tan" => self.single().tan(),
            "sin" => self.single().sin(),
            "cos" => self.single().cos(),
            "sqrt" => self.single().sqrt(),
            "exp" => self.single().exp(),
            other => panic!("{other:?} is not known"),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn reads_what_the_cases_write() {
        let chord = Formula::new("0.875*(0.10+0.32x-0.36x^2), x=r/0.875");
        assert!((chord.at(&[("r", 0.875)]) - 0.875 * 0.06).abs() < 1e-15);
        let angle = Formula::new("atan(1.25/(2 pi r))").at(&[("r", 0.5)]);
        assert!((angle - (1.25 / std::f64::consts::PI).atan()).abs() < 1e-15);
        assert_eq!(Formula::new("0.5-0.25 (r-1)/2").at(&[("r", 5.0)]), 0.0);
        assert_eq!(Formula::new("0.5 c t^3").at(&[("c", 2.0), ("t", 2.0)]), 8.0);
    }
}
