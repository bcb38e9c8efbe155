//! A plain sentence for each limit of a fit.

use spokeshave::result::{Fit, Margin};

/// A plain sentence for each limit; of those of the wishes and the engine only what is broken.
pub(super) fn limits(fit: &Fit, kept: &[Margin]) -> Vec<String> {
    let m = &fit.envelope.marks;
    let broken = kept.iter().filter(|m| m.share < 0.0 && m.found.is_some());
    let mut said: Vec<String> = broken.map(Margin::sentence).collect();
    if let Some(stall) = fit.envelope.speeds.and_then(|s| s.stall_m_s) {
        said.push(format!(
            "The stall is at {:.0} km/h; level flight and climb count from there on.",
            3.6 * stall
        ));
    }
    if let Some(v) = m.limit_rpm_from_m_s {
        said.push(format!(
            "From {:.0} km/h on full throttle would pass the engine's limit rpm, or the end of its power \
             curve: figures there are throttled back to it.",
            3.6 * v
        ));
    }
    if m.top_speed.is_some_and(|t| t.held_at_limit) {
        let what = if fit.envelope.hover_n().is_some() { "The fastest climb" } else { "Top speed" };
        said.push(format!(
            "{what} is held at the limit rpm: the engine could give more than the propeller may take."
        ));
    }
    said.extend(not_held_up(fit));
    for t in &m.tip_mach_from {
        said.push(format!("From {:.0} km/h on the tip passes Mach {:.2}.", 3.6 * t.airspeed_m_s, t.tip_mach));
    }
    if let Some(d) = m.closed_throttle_dive {
        said.push(format!(
            "In a dive with closed throttle the air alone drives the propeller to the limit rpm, {:.0}, at \
             {:.0} km/h, if the engine then neither drives nor brakes; one that brakes allows somewhat \
             more. The airframe's own limit may come first.",
            d.rpm,
            3.6 * d.airspeed_m_s
        ));
    }
    if let Some(idle) = m.idle {
        said.push(format!(
            "Standing at idle, {:.0} rpm, it pulls {:.0} N: brakes and chocks have to hold that.",
            idle.rpm, idle.value
        ));
    }
    if fit.standing_crossings.len() > 1 {
        said.push(format!(
            "At rest engine and propeller agree at {} rpm; the highest stable one counts.",
            fit.standing_crossings.iter().map(|c| format!("{:.0}", c.rpm)).collect::<Vec<_>>().join(", ")
        ));
    }
    if m.limit_rpm_from_m_s.is_none() && m.tip_mach_from.is_empty() {
        said.push("Neither the limit rpm nor a tip Mach number of note is passed in this range.".into());
    }
    said.extend(gap(fit));
    said.push(
        "Estimates at this mass, without reserve, wind or slope; keep to the handbook and to local rules."
            .into(),
    );
    said
}

/// Why full throttle holds nothing up, where that is so.
fn not_held_up(fit: &Fit) -> Option<String> {
    let e = &fit.envelope;
    if let Some(says) = e.cannot_hover(|n| format!("{n:.0} N")) {
        return Some(says);
    }
    let speeds = e.speeds.filter(|_| e.marks.top_speed.is_none())?;
    let words = if speeds.stall_m_s.is_some() {
        "No level flight at full throttle is as fast as the stall."
    } else {
        "Full throttle holds level flight at no speed."
    };
    Some(words.into())
}

/// Speeds between which the engine cannot turn the propeller at any rpm of its power curve.
fn gap(fit: &Fit) -> Option<String> {
    let (from, to) = fit.envelope.too_slow_to_turn_m_s()?;
    Some(format!(
        "From {:.0} to {:.0} km/h full throttle cannot turn this propeller at any rpm of the engine's power \
         curve: no figures there.",
        3.6 * from,
        3.6 * to
    ))
}
