//! What must be said wherever a blade's strength is shown.

/// The usual cautions, a sentence each.
pub const CAUTIONS: [&str; 6] = [
    "These are estimates of steady load: they need margin and test, and do not say that a propeller is strong enough or airworthy.",
    "Wood varies: choose straight grain without knots, test pieces of the same board, inspect the blade and proof-load it before it runs.",
    "Balance the blades, and run a new propeller first at low rpm, tied down, with nobody in or near the plane of the disc.",
    "Hub bolts: tighten to the maker's torque and check it again after the first run, then regularly, for the wood moves with moisture.",
    "Look for cracks, loose glue and edge damage before every flight; after a strike the propeller is scrap until a licensed person says otherwise.",
    "Limits and approval belong to the aviation authority, the makers of engine and aircraft, and a licensed inspector or engineer, whose rules come first.",
];
