//! Column headings: a quantity and its unit, as in `alpha_deg`, `alpha [deg]`, `Alpha (°)`, `t/c [%]`, `Re`.

use super::error::ImportError;
use crate::sheet::heading_parts;

/// What a column holds.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Quantity {
    Alpha,
    Cl,
    Cd,
    Cm,
    Reynolds,
    Mach,
    Thickness,
}

impl Quantity {
    pub(super) const ALL: [Self; 7] =
        [Self::Alpha, Self::Cl, Self::Cd, Self::Cm, Self::Reynolds, Self::Mach, Self::Thickness];

    pub(super) fn name(self) -> &'static str {
        match self {
            Self::Alpha => "alpha",
            Self::Cl => "cl",
            Self::Cd => "cd",
            Self::Cm => "cm",
            Self::Reynolds => "reynolds",
            Self::Mach => "mach",
            Self::Thickness => "thickness_ratio",
        }
    }

    fn of(name: &str) -> Option<Self> {
        Some(match name {
            "alpha" | "α" | "a" | "angle" | "angle_of_attack" | "incidence" => Self::Alpha,
            "cl" | "c_l" | "lift_coefficient" => Self::Cl,
            "cd" | "c_d" | "drag_coefficient" => Self::Cd,
            "cm" | "c_m" | "moment_coefficient" => Self::Cm,
            "re" | "reynolds" | "reynolds_number" => Self::Reynolds,
            "mach" | "ma" | "m" | "mach_number" => Self::Mach,
            "thickness" | "thickness_ratio" | "t/c" | "t_c" => Self::Thickness,
            _ => return None,
        })
    }

    /// What one unit of the column is in the unit of the tables; `None` for a unit that does not fit.
    fn scale(self, unit: &str) -> Option<f64> {
        Some(match (self, unit) {
            (Self::Alpha, "deg" | "degree" | "degrees" | "°") => 1.0,
            (Self::Alpha, "rad" | "radian" | "radians") => 1f64.to_degrees(),
            (Self::Thickness, "%" | "percent" | "pct") => 0.01,
            (Self::Reynolds, "thousand" | "thousands" | "k" | "1000") => 1e3,
            (Self::Reynolds, "million" | "millions" | "1e6") => 1e6,
            (Self::Alpha, _) => return None,
            (_, "" | "-" | "1" | "–") => 1.0,
            _ => return None,
        })
    }

    fn units(self) -> &'static str {
        match self {
            Self::Alpha => "alpha_deg or alpha_rad",
            Self::Thickness => "thickness_ratio, or thickness [%]",
            Self::Reynolds => "reynolds, reynolds [thousand] or reynolds [million]",
            Self::Cl | Self::Cd | Self::Cm | Self::Mach => "none, as in cl, cd, cm, mach",
        }
    }
}

/// Where a quantity stands and what one of its units is.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Column {
    /// Index of the cell.
    pub(super) index: usize,
    pub(super) scale: f64,
}

/// The columns of a table.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Header {
    columns: [Option<Column>; Quantity::ALL.len()],
    /// Number of headings.
    pub(super) width: usize,
    /// Headings that mean nothing here.
    pub(super) unused: Vec<String>,
}

impl Header {
    pub(super) fn column(&self, quantity: Quantity) -> Option<Column> {
        self.columns[quantity as usize]
    }

    /// Reads the headings.
    pub(super) fn read(line: u64, headings: &[&str]) -> Result<Self, ImportError> {
        if let Some(found) = headings.iter().find(|h| h.replace(',', ".").parse::<f64>().is_ok()) {
            return Err(ImportError::NoHeader { line, found: (*found).to_string() });
        }
        let mut header = Self { columns: [None; 7], width: headings.len(), unused: Vec::new() };
        for (index, heading) in headings.iter().enumerate() {
            header.join(line, index, heading)?;
        }
        let found = headings.join(", ");
        for (quantity, missing) in
            [(Quantity::Alpha, "alpha_deg or alpha_rad"), (Quantity::Cl, "cl"), (Quantity::Cd, "cd")]
        {
            if header.column(quantity).is_none() {
                return Err(ImportError::MissingColumn { line, missing, found });
            }
        }
        Ok(header)
    }

    fn join(&mut self, line: u64, index: usize, heading: &str) -> Result<(), ImportError> {
        let (quantity, unit) = heading_parts(heading, Quantity::of);
        let Some(quantity) = quantity else {
            if !heading.is_empty() {
                self.unused.push(heading.chars().take(40).collect());
            }
            return Ok(());
        };
        let column = index + 1;
        if let Some(first) = self.column(quantity) {
            let what = quantity.name();
            return Err(ImportError::RepeatedColumn { line, column, what, first: first.index + 1 });
        }
        let Some(scale) = quantity.scale(&unit) else {
            let heading = heading.chars().take(40).collect();
            return Err(ImportError::Unit { line, column, heading, allowed: quantity.units() });
        };
        self.columns[quantity as usize] = Some(Column { index, scale });
        Ok(())
    }
}
