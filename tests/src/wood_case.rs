//! The blade of a reference case of kind `wood.…` as arrays, and as a job.

use serde_json::{Value, json};
use spokeshave::job::Job;
use spokeshave::wood::section::{Section, Shape};

use crate::formula::Formula;
use crate::reference::numbers;

/// Radii of the arrays.
const POINTS: usize = 601;

/// A blade by arrays from root to tip.
#[derive(Clone, Debug)]
pub struct WoodCase {
    /// Radii, m.
    pub radii_m: Vec<f64>,
    /// Chords, m.
    pub chords_m: Vec<f64>,
    /// Thickness over chord.
    pub thickness_ratios: Vec<f64>,
    /// Blade angles, rad.
    pub angles_rad: Vec<f64>,
    /// Mass per metre, kg/m.
    pub mass_kg_m: Vec<f64>,
    /// The sections' shape.
    pub shape: Shape,
    /// Young's modulus, Pa.
    pub modulus_pa: f64,
    /// Number of blades.
    pub blades: f64,
}

/// A number, a formula in r, or a list over the case's `r`, at each radius.
///
/// # Panics
/// When it is none of these.
#[must_use]
pub fn spread(value: &Value, list_radii_m: &[f64], radii_m: &[f64]) -> Vec<f64> {
    match value {
        Value::String(text) => {
            let formula = Formula::new(text);
            radii_m.iter().map(|r| formula.at(&[("r", *r)])).collect()
        }
        Value::Array(_) => {
            let y = numbers(value);
            let line = spokeshave::curve::Curve::polyline(list_radii_m.to_vec(), y).expect("a list over r");
            radii_m.iter().map(|r| line.at(*r)).collect()
        }
        other => vec![other.as_f64().expect("a number, a formula or a list"); radii_m.len()],
    }
}

/// Factors of `A = … c t; I_flat = … c t^3; I_edge = … c^3 t; extreme fibres … t and … c`.
fn shape(text: &str) -> Shape {
    let part = |name: &str| {
        let found = text.split(';').find_map(|p| p.trim().strip_prefix(name)).expect("the section's part");
        Formula::new(found.trim_start_matches('=')).at(&[("c", 1.0), ("t", 1.0)])
    };
    let fibres = text.split("extreme fibres").nth(1).expect("extreme fibres");
    let (y, x) = fibres.split_once("and").expect("two fibres");
    let [y, x] = [y, x].map(|f| Formula::new(f).at(&[("c", 1.0), ("t", 1.0)]));
    Shape {
        area: part("A"),
        flat: part("I_flat"),
        edge: part("I_edge"),
        product: 0.0,
        rim: vec![[-x, -y], [x, -y], [x, y], [-x, y]],
        ..Shape::usual()
    }
}

impl WoodCase {
    /// The blade of a case.
    ///
    /// # Panics
    /// When the case is not understood.
    #[must_use]
    pub fn new(inputs: &Value) -> Self {
        let blade = &inputs["blade"];
        let number = |key: &str| blade[key].as_f64().unwrap_or_else(|| panic!("{key}"));
        let (root, tip) = (number("r_root"), number("R"));
        let radii_m: Vec<f64> =
            (0..POINTS).map(|i| root + (tip - root) * i as f64 / (POINTS - 1) as f64).collect();
        let list = blade["r"].as_array().map(|_| numbers(&blade["r"])).unwrap_or_default();
        let of = |key: &str| spread(&blade[key], &list, &radii_m);
        let (chords_m, thickness_ratios) = (of("chord"), of("t_over_c"));
        let shape = shape(blade["section"].as_str().expect("section"));
        let area = |i: usize| shape.sized(chords_m[i], thickness_ratios[i]).area_m2;
        Self {
            mass_kg_m: (0..POINTS).map(|i| number("rho_wood") * area(i)).collect(),
            angles_rad: of("twist"),
            modulus_pa: number("E"),
            blades: number("blades"),
            radii_m,
            chords_m,
            thickness_ratios,
            shape,
        }
    }

    /// The section at a radius of the arrays by index.
    #[must_use]
    pub fn section(&self, i: usize) -> Section {
        self.shape.sized(self.chords_m[i], self.thickness_ratios[i])
    }

    /// Values at a radius, straight between those of the arrays.
    ///
    /// # Panics
    /// Never: the radii rise.
    #[must_use]
    pub fn at(&self, values: &[f64], radius_m: f64) -> f64 {
        let line = spokeshave::curve::Curve::polyline(self.radii_m.clone(), values.to_vec());
        line.expect("rising radii").at(radius_m)
    }

    /// A job with this blade, a section without an outline, a material of the case's density and one flight
    /// point at its rpm.
    ///
    /// # Panics
    /// When the job made is refused.
    #[must_use]
    pub fn job(&self, inputs: &Value) -> Job {
        let (root, tip) = (self.radii_m[0], self.radii_m[POINTS - 1]);
        let asked = inputs["r"].as_array().map(|_| numbers(&inputs["r"])).unwrap_or_default();
        let even = (0..=40).map(|i| root + (tip - root) * f64::from(i) / 40.0);
        let mut radii: Vec<f64> = asked.iter().copied().chain(even).collect();
        radii.sort_by(f64::total_cmp);
        radii.dedup_by(|a, b| (*a - *b).abs() < 1e-6);
        let stations: Vec<Value> = radii
            .iter()
            .map(|r| {
                json!({
                    "radius_fraction": (r / tip).min(1.0), "chord_m": self.at(&self.chords_m, *r),
                    "angle_deg": self.at(&self.angles_rad, *r).to_degrees(),
                    "thickness_ratio": self.at(&self.thickness_ratios, *r), "section": "plain"
                })
            })
            .collect();
        let rows: Vec<Value> =
            (-4..=8).map(|i| json!({"alpha_deg": 2 * i, "cl": 0.2 * f64::from(i), "cd": 0.01})).collect();
        let document = json!({
            "spokeshave": 1,
            "propeller": {
                "blades": inputs["blade"]["blades"], "diameter_m": 2.0 * tip, "hub_diameter_m": 2.0 * root,
                "stations": stations
            },
            "sections": [{"name": "plain", "polars": [{"points": rows}]}],
            "flight_points": [{"name": "case", "airspeed_m_s": 20, "setting": {"kind": "rpm", "rpm": inputs["rpm"]}}],
            "wood": {"overspeed": 1.0, "species": {
                "name": "case", "density_kg_m3": inputs["blade"]["rho_wood"], "modulus_pa": self.modulus_pa,
                "bending_strength_pa": 1e8
            }}
        });
        Job::from_json(&document.to_string()).expect("a valid job")
    }
}
