//! The layer about a section, and the coupled step: what the elimination gives solves the linearised equations, and
//! these are the derivatives of the equations.

use crate::section::outline::{Outline, clark_y, naca_four_digit};
use crate::section::solver::attempt::stations;
use crate::section::solver::chains::Chains;
use crate::section::solver::closure::{Gas, Kind, props};
use crate::section::solver::couple::{iterate, re_march, speed_defect};
use crate::section::solver::interval::critical_part;
use crate::section::solver::layer::{Course, Layer, State, fixed};
use crate::section::solver::march::Drive;
use crate::section::solver::potential::Potential;
use crate::section::solver::spacing;
use crate::section::solver::station::{Closing, Upstream, solve};
use crate::section::solver::wake::Flow;

/// The flow about a section at an angle of attack, and its layer after the first march.
fn cold(section: &Outline, alpha_deg: f64, trips: [Option<f64>; 2]) -> (Flow, Layer) {
    let potential = Potential::new(spacing::nodes(section, 120)).expect("regular");
    let flow = Flow::new(&potential, f64::to_radians(alpha_deg));
    let (x, arc) = stations(&potential.body, &flow.wake);
    let (body, gap) = (potential.count(), potential.gap());
    let course = Course { gas: Gas::new(1e6, 0.0), n_crit: [9.0; 2], trips, body, gap };
    let mut layer = Layer::new(course, x, arc, &flow.still);
    layer.march(&Drive::Cold);
    (flow, layer)
}

/// A layer on its way: three coupled steps on from the first march.
fn on_its_way() -> (Flow, Layer) {
    let (flow, mut layer) = cold(&naca_four_digit(0, 0, 0.12).expect("drawn"), 1.0, [None; 2]);
    for _ in 0..3 {
        iterate(&mut layer, &flow, f64::INFINITY, 1.0).expect("goes on");
    }
    (flow, layer)
}

/// Every linearised equation of sides and wake, the sums where the wake begins, and the speeds by the mass defects.
#[test]
fn the_eliminated_step_solves_the_linearised_equations() {
    let (flow, mut layer) = on_its_way();
    let c = re_march(&mut layer, &flow);
    let (body, total) = (layer.course.body, layer.total());
    let shape: Vec<f64> = (body..total).map(|i| layer.shape(i)).collect();
    let influence = flow.influence(&shape, 0.01);
    // Lacks of its own, so that the step is not next to nothing.
    let mut r = speed_defect(&layer, &flow, &influence);
    r.iter_mut().enumerate().for_each(|(i, r)| *r += 1e-3 * (0.3 * i as f64).sin());
    let chains = Chains::new(&layer, &c).expect("regular");
    let outside = chains.solve(&layer, &influence, &c, &r).expect("regular");
    let changes = chains.changes(&layer, &outside);

    let holds = |what: &str, at: usize, terms: &[f64]| {
        let (sum, size) = (terms.iter().sum::<f64>(), terms.iter().map(|t| t.abs()).fold(0.0, f64::max));
        assert!(sum.abs() <= 1e-7 * size.max(1e-9), "{what} {at}: {sum} of {size}");
    };
    for i in 0..total {
        let by_mass = (0..total).map(|j| {
            let own = if i == j { c[i] } else { 0.0 };
            (layer.sign(i) * layer.sign(j) * influence.row(i)[j] - own) * changes[j][1]
        });
        let terms: Vec<f64> = by_mass.chain([r[i], -outside[i]]).collect();
        holds("speed", i, &terms);
    }
    let delta: Vec<[f64; 4]> = (0..total)
        .map(|i| {
            let [_, dstar, _, u] = layer.state[i];
            let du = c[i] * changes[i][1] + outside[i];
            [changes[i][0], (changes[i][1] - dstar * du) / u, changes[i][2], du]
        })
        .collect();
    let row = |value: f64, before: &[f64; 4], from: &[f64; 4], own: &[f64; 4], to: &[f64; 4]| -> Vec<f64> {
        let products = |a: &[f64; 4], b: &[f64; 4]| [0, 1, 2, 3].map(|k| a[k] * b[k]);
        [vec![value], products(before, from).to_vec(), products(own, to).to_vec()].concat()
    };
    for (side, about) in layer.sides.iter().enumerate() {
        assert!(about.transition.is_some(), "this section turns on both sides");
        for (station, &node) in about.nodes.iter().enumerate() {
            let found = layer.side_residual(side, station, &c);
            let k = layer.stagnation;
            let gradient = (delta[k][3] + delta[k + 1][3]) / layer.dx(k, k + 1);
            let from = if station == 0 { [0.0, 0.0, 0.0, gradient] } else { delta[about.nodes[station - 1]] };
            for q in 0..3 {
                holds(
                    "side",
                    node,
                    &row(found.value[q], &found.before[q], &from, &found.own[q], &delta[node]),
                );
            }
        }
    }
    for node in body + 1..total {
        let found = layer.wake_residual(node);
        for q in 0..3 {
            let terms = row(found.value[q], &found.before[q], &delta[node - 1], &found.own[q], &delta[node]);
            holds("wake", node, &terms);
        }
    }
    // Thicknesses add where the wake begins; the shear stress is the mean by momentum thickness.
    let (up, low) = (0, body - 1);
    let [up_z, low_z, sum_z] = [up, low, body].map(|node| delta[node]);
    for (k, sum) in sum_z.into_iter().enumerate().take(2) {
        holds("edge", k, &[up_z[k], low_z[k], -sum]);
    }
    let part = |i: usize| {
        let [theta, _, shear, _] = layer.state[i];
        [theta * delta[i][2], (shear - layer.state[body][2]) * delta[i][0]]
    };
    let sum = [&part(up)[..], &part(low)[..], &[-layer.state[body][0] * delta[body][2]]].concat();
    holds("edge", 2, &sum);
}

/// By central differences at the transition of both sides, where the laminar trial is found anew for each change,
/// and at a laminar and a turbulent station.
#[test]
fn linearised_equations_are_their_derivatives() {
    let (flow, mut layer) = on_its_way();
    let c = re_march(&mut layer, &flow);
    for side in 0..2 {
        let turns = layer.sides[side].transition.expect("turns").station;
        for station in [turns - 3, turns, turns + 3] {
            let nodes = [layer.sides[side].nodes[station - 1], layer.sides[side].nodes[station]];
            let dx = layer.dx(nodes[0], nodes[1]);
            let value = |put: &dyn Fn(&mut Layer)| {
                let mut changed = layer.clone();
                put(&mut changed);
                if station == turns {
                    let (gas, own) = (&changed.course.gas, changed.state[nodes[1]]);
                    let law = Closing::Law { c: c[nodes[1]], v: own[3] - c[nodes[1]] * own[3] * own[1] };
                    let mut turn = changed.sides[side].transition.expect("turns");
                    assert!(!turn.forced);
                    let upstream = Upstream::Station(&changed.state[nodes[0]], dx);
                    turn.trial = solve(gas, Kind::Laminar, upstream, law, &[turn.trial]).expect("solved");
                    changed.sides[side].transition = Some(turn);
                }
                changed.side_residual(side, station, &c).value
            };
            let found = layer.side_residual(side, station, &c);
            for (which, slopes) in [found.before, found.own].into_iter().enumerate() {
                for k in 0..4 {
                    let size = layer.state[nodes[which]][k];
                    let h = 1e-5 * size;
                    if h == 0.0 {
                        continue;
                    }
                    let moved = |by: f64| value(&|l: &mut Layer| l.state[nodes[which]][k] += by);
                    let (more, less) = (moved(h), moved(-h));
                    for q in 0..3 {
                        let by_difference = (more[q] - less[q]) / 2e-5;
                        let largest = (0..4).map(|k| (slopes[q][k] * layer.state[nodes[which]][k]).abs());
                        let scale = largest.fold(1e-3, f64::max);
                        // The trial is found to 1e-9, over a difference of 2e-5.
                        assert!(
                            (slopes[q][k] * size - by_difference).abs() < 1e-3 * scale,
                            "side {side} station {station} {which} {k} {q}: {} {by_difference}",
                            slopes[q][k] * size
                        );
                    }
                }
            }
        }
    }
}

/// A trip is taken where it is asked for, and the growth told there is the one whose critical place it is.
#[test]
fn a_trip_turns_the_layer_where_it_is() {
    let section = naca_four_digit(0, 0, 0.12).expect("drawn");
    let (_, layer) = cold(&section, 0.0, [Some(0.3), Some(0.23)]);
    for (side, place) in [0.3, 0.23].into_iter().enumerate() {
        assert!((layer.transition_x(side) - place).abs() < 1e-9, "{}", layer.transition_x(side));
        let n = layer.growth_at_trip(side).expect("tripped");
        let turn = layer.sides[side].transition.expect("tripped");
        let nodes = [turn.station - 1, turn.station].map(|s| layer.sides[side].nodes[s]);
        let first = layer.state[nodes[0]];
        let growth = |s: &State| props(&layer.course.gas, &fixed::<0>(s), Kind::Laminar).growth;
        let (before, behind) = (growth(&first), growth(&turn.trial));
        let part = critical_part(n, fixed::<0>(&first).c, before, behind, layer.dx(nodes[0], nodes[1])).v;
        assert!(n > first[2] && n < 9.0 && (part - turn.part).abs() < 1e-9, "{n} {part} {turn:?}");
    }
}

/// Where the speeds beside the stagnation point turn, their nodes change side, and no other node is touched.
#[test]
fn the_stagnation_point_follows_the_speeds() {
    let (_, layer) = cold(&clark_y().expect("drawn"), 2.0, [None; 2]);
    let k = layer.stagnation;
    for (turned, to) in [(k + 1, k + 1), (k, k - 1)] {
        let mut moved = layer.clone();
        moved.state[turned][3] = -0.05;
        moved.follow_stagnation();
        assert_eq!(moved.stagnation, to);
        assert_eq!((moved.state[turned][2], moved.state[turned][3]), (0.0, 0.05));
        for i in (0..layer.total()).filter(|&i| i != turned) {
            assert_eq!(moved.state[i], layer.state[i], "{i}");
        }
        assert_eq!(moved.sides[0].nodes, (0..=to).rev().collect::<Vec<_>>());
    }
}
