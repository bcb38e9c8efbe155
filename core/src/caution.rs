//! What must be said wherever a blade's strength is shown, on every sheet of paper, and beside every file it can be made from.

/// The usual cautions, a sentence each; short enough for one line of a sheet.
pub const CAUTIONS: [&str; 6] = [
    "A propeller can kill: nobody stands in or near the plane of its disc. Run a new one first at low rpm, tied down, and balanced.",
    "All figures are estimates of steady load: they need margin and test, and do not say that a propeller is strong enough or airworthy.",
    "Wood varies: choose straight grain without knots, test pieces of the same board, inspect the blade and proof-load it before it runs.",
    "Hub bolts: tighten to the maker's torque and check it again after the first run, then regularly, for the wood moves with moisture.",
    "Look for cracks, loose glue and edge damage before every flight; after a strike it is scrap until a licensed person says otherwise.",
    "Limits and approval belong to the aviation authority, the makers of engine and aircraft, and a licensed inspector, whose rules come first.",
];
