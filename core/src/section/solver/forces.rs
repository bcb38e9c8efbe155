//! Lift, drag and moment from a converged flow.
//!
//! Lift and moment from the pressure on the outline; drag from the wake by the formula of Squire and Young,
//! ARC R&M 1838 (1937): `cd = 2 theta u^((H + 5)/2)` at the end of the wake. Compressible pressure by Karman,
//! J. Aero. Sci. 8 (1941), and Tsien (1939).

use super::dual::Dual;
use super::layer::Layer;
use super::potential::Strip;

/// Coefficients of the section.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Forces {
    pub(super) cl: f64,
    pub(super) cd: f64,
    pub(super) cm: f64,
}

/// Pressure coefficient from the speed.
fn pressure(speed: f64, mach: f64) -> f64 {
    let plain = 1.0 - speed * speed;
    let beta = (1.0 - mach * mach).sqrt();
    plain / (beta + 0.5 * mach * mach * plain / (1.0 + beta))
}

/// Lift square to the free stream and moment about the quarter chord, nose up positive, from the speeds along
/// the outline.
pub(super) fn lift_and_moment(body: &Strip, speeds: &[f64], alpha_rad: f64, mach: f64) -> (f64, f64) {
    let (sin, cos) = alpha_rad.sin_cos();
    let count = body.nodes.len();
    let (mut lift, mut moment) = (0.0, 0.0);
    for i in 0..count {
        let j = (i + 1) % count;
        let (a, b) = (body.nodes[i], body.nodes[j]);
        let mean = 0.5 * (pressure(speeds[i], mach) + pressure(speeds[j], mach));
        let force = [-mean * (b[1] - a[1]), mean * (b[0] - a[0])];
        lift += force[1] * cos - force[0] * sin;
        moment -= (0.5 * (a[0] + b[0]) - 0.25) * force[1] - 0.5 * (a[1] + b[1]) * force[0];
    }
    (lift, moment)
}

/// All coefficients.
pub(super) fn forces(body: &Strip, layer: &Layer, alpha_rad: f64) -> Forces {
    let gas = &layer.course.gas;
    let speeds: Vec<f64> = (0..layer.course.body).map(|i| layer.signed_speed(i)).collect();
    let (cl, cm) = lift_and_moment(body, &speeds, alpha_rad, gas.mach);
    let last = layer.total() - 1;
    let [theta, _, _, u] = layer.state[last];
    let speed = gas.speed(Dual::<0>::constant(u)).v;
    let cd = 2.0 * theta * speed.powf(0.5 * (layer.shape(last) + 5.0));
    Forces { cl, cd, cm }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Karman, Tsien: `Cp/(beta + M^2 Cp/(2 (1 + beta)))`, which is `2/(1 + beta)` where the flow is at rest since
    /// `M^2 = (1 - beta)(1 + beta)`; nothing at the speed of the stream.
    #[test]
    fn pressure_is_that_of_karman_and_tsien() {
        for mach in [0.0, 0.3, 0.6] {
            let beta = (1.0_f64 - mach * mach).sqrt();
            assert!((pressure(0.0, mach) - 2.0 / (1.0 + beta)).abs() < 1e-12, "{mach}");
            assert!(pressure(1.0, mach).abs() < 1e-12 && pressure(1.3, mach) < -0.69);
        }
    }
}
