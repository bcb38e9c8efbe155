//! Every outside check of what the core computes, part by part, each worked out once: what the tests assert
//! on and what the list tests/validation.md tells.

mod air;
mod aircraft;
mod beam;
mod beam_section;
mod carved;
mod engine;
mod exact_flow;
mod fit;
mod formulas;
pub mod list;
mod logbook;
mod plots;
pub mod rotor;
pub mod section;
pub mod shape;
mod stale;
pub mod tip_loss;
pub mod tunnel;
mod wood;

pub use stale::differences;

use std::sync::LazyLock;

use crate::check::Check;

/// Checks of one kind.
pub struct Topic {
    /// The part of the program that they look at.
    pub part: &'static str,
    /// The test that asserts them.
    pub test: &'static str,
    checks: LazyLock<Vec<Check>>,
}

impl Topic {
    const fn new(part: &'static str, test: &'static str, checks: fn() -> Vec<Check>) -> Self {
        Self { part, test, checks: LazyLock::new(checks) }
    }

    /// The checks, worked out when first asked for.
    pub fn checks(&self) -> &[Check] {
        &self.checks
    }
}

const SOLVER: &str = "Section solver";
const OUTLINE: &str = "Outlines";
const ROTOR: &str = "Blade elements";
const TUNNEL: &str = "Whole propeller in the wind tunnel";
const MACHINE: &str = "Engine and aircraft";
const WOOD: &str = "Wood and strength";

/// All of them, in the order of the list.
pub static TOPICS: [Topic; 42] = [
    Topic::new("Air", "validate_air_iso_2533", air::standard),
    Topic::new(SOLVER, "joukowski_lift_is_exact", exact_flow::joukowski_lift),
    Topic::new(SOLVER, "joukowski_speeds_are_exact", exact_flow::joukowski_speeds),
    Topic::new(SOLVER, "validate_plate_laminar_blasius", exact_flow::blasius),
    Topic::new(SOLVER, "validate_plate_transition_by_growth", exact_flow::growth),
    Topic::new(SOLVER, "validate_plate_turbulent_karman_schoenherr", exact_flow::schoenherr),
    Topic::new(SOLVER, "validate_similar_flows_falkner_skan", exact_flow::falkner_skan),
    Topic::new(SOLVER, "validate_linear_retardation_howarth", exact_flow::howarth),
    Topic::new(SOLVER, "validate_section_solver_published", section::published),
    Topic::new(OUTLINE, "the_sixteen_series_has_its_published_ordinates", formulas::sixteen_series),
    Topic::new(ROTOR, "corrections_are_those_published", formulas::corrections),
    Topic::new(ROTOR, "stall_delay_is_that_published", formulas::stall_delay),
    Topic::new(ROTOR, "validate_windmill_brake_buhl", formulas::windmill_brake),
    Topic::new(ROTOR, "whole_propellers_agree", rotor::whole_propellers),
    Topic::new(ROTOR, "single_stations_agree", rotor::single_stations),
    Topic::new(ROTOR, "validate_tip_loss_goldstein", tip_loss::prandtl_by_goldstein),
    Topic::new(ROTOR, "validate_goldsteins_factor_of_the_core", tip_loss::the_core_by_goldstein),
    Topic::new(ROTOR, "validate_goldstein_by_another_grid", tip_loss::goldstein_twice),
    Topic::new(TUNNEL, "validate_thrust_and_power_deters_2014", tunnel::moving),
    Topic::new(TUNNEL, "validate_at_rest_deters_2014", tunnel::at_rest),
    Topic::new(TUNNEL, "validate_goldsteins_tip_deters_2014", tunnel::with_goldsteins_tip),
    Topic::new(TUNNEL, "known_miss_at_the_design_angle", tunnel::at_the_design_angle),
    Topic::new(MACHINE, "validate_drag_anderson_cp_1", aircraft::anderson),
    Topic::new(MACHINE, "validate_speeds_common_practice", aircraft::light),
    Topic::new(MACHINE, "validate_angles_common_practice", aircraft::angles),
    Topic::new(MACHINE, "an_electric_motor_gives_the_closed_form", engine::first_order_motor),
    Topic::new(MACHINE, "a_piston_engine_loses_power_with_height", engine::gagg_ferrar),
    Topic::new("Fit", "full_throttle_rpm_over_speed_agrees", fit::full_throttle),
    Topic::new("Shape", "validate_least_loss_adkins_liebeck", shape::least_loss),
    Topic::new("Shape", "validate_least_loss_goldstein", shape::least_loss_goldstein),
    Topic::new(WOOD, "validate_wood_independent_implementation", wood::arrays),
    Topic::new(WOOD, "a_job_gives_the_same_mass_and_tension", wood::as_a_job),
    Topic::new(WOOD, "validate_sections_sectionproperties", beam_section::shipped),
    Topic::new(WOOD, "an_ellipse_has_its_closed_forms", beam_section::ellipse),
    Topic::new(WOOD, "the_moment_is_that_of_thin_aerofoil_theory", beam_section::moment),
    Topic::new(WOOD, "frequencies_at_rest_are_those_of_the_beam_tables", beam::at_rest),
    Topic::new(WOOD, "turning_slowly_stiffens_by_southwells_coefficient", beam::southwell),
    Topic::new(WOOD, "turning_fast_gives_the_published_frequencies", beam::turning_fast),
    Topic::new(WOOD, "validate_moisture_wood_handbook", beam::moisture),
    Topic::new("As carved", "unequal_masses_pull_once_a_turn", carved::unequal),
    Topic::new("As carved", "a_blade_out_of_track_turns_its_couple_with_the_shaft", carved::out_of_track),
    Topic::new("Logbook", "one_reading_gives_the_closed_form", logbook::one_mismatch),
];

/// The topic that a test asserts.
///
/// # Panics
/// When there is none of that name.
#[must_use]
pub fn topic(test: &str) -> &'static Topic {
    TOPICS.iter().find(|t| t.test == test).unwrap_or_else(|| panic!("no topic {test}"))
}
