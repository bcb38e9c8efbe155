//! What must be said wherever a blade's strength is shown, on every sheet of paper, and beside every file it
//! can be made from.

use crate::job::Job;
use crate::wood::is_wood;

/// How many sentences of caution there are.
pub(crate) const CAUTION_COUNT: usize = 6;

/// The usual cautions, a sentence each; short enough for one line of a sheet. What they say of the material
/// is that of the job's: wood, and so where it names none.
#[must_use]
pub fn cautions(job: &Job) -> [&'static str; CAUTION_COUNT] {
    let [material, bolts] = if job.wood.as_ref().is_none_or(is_wood) {
        [
            "Wood varies: choose straight grain without knots, test pieces of the same board, inspect the \
             blade and proof-load it before it runs.",
            "Hub bolts: tighten to the maker's torque and check it again after the first run, then \
             regularly, for the wood moves with moisture.",
        ]
    } else {
        [
            "Material varies: test pieces made the same way from the same lot, inspect the blade for voids \
             and cracks, proof-load it before it runs.",
            "Hub bolts: tighten to the maker's torque and check it again after the first run, then \
             regularly, for the material creeps and settles.",
        ]
    };
    [
        "A propeller can kill: nobody stands in or near the plane of its disc. Run a new one first at low \
         rpm, tied down, and balanced.",
        "All figures are estimates of steady load: they need margin and test, and do not say that a \
         propeller is strong enough or airworthy.",
        material,
        bolts,
        "Look for cracks, loose glue and edge damage before every flight; after a strike it is scrap until \
         a licensed person says otherwise.",
        "Limits and approval belong to the aviation authority, the makers of engine and aircraft, and a \
         licensed inspector, whose rules come first.",
    ]
}
