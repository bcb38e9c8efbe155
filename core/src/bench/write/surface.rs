//! The surface of one blade as a list of points, CSV in metres.

use std::fmt::Write;

use crate::bench::work::Bench;

/// Ring by ring from the inside out, point by point round each: radius, side, and the point in the
/// propeller's frame (see [`crate::bench`]; `y` is turned over for a propeller that turns the other way).
#[must_use]
pub fn surface_csv(bench: &Bench) -> String {
    let mut out = String::from("ring,radius_m,side,point,x_m,y_m,z_m\n");
    for (i, ring) in bench.rings.iter().enumerate() {
        let lead = ring.points.len() / 2;
        for (k, p) in ring.points.iter().enumerate() {
            let side = match k {
                0 => "trailing-edge",
                k if k < lead => "upper",
                k if k == lead => "leading-edge",
                _ => "lower",
            };
            let (r, y, z) = (ring.radius_m, bench.hand() * p[0], p[1]);
            let _ = writeln!(out, "{i},{r:.7},{side},{k},{r:.7},{y:.7},{z:.7}");
        }
    }
    out
}
