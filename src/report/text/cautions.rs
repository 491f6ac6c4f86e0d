//! Cautions that every report carries, whatever was found.

use super::PLANNING_ONLY;

/// Key and text, in the order of the report. What a finding calls for (hazards, wind, collapse)
/// comes with the findings.
pub const ALWAYS: [(&str, &str); 5] = [
    ("planning_only", PLANNING_ONLY),
    (
        "local_procedures",
        "Local codes, procedures and orders come first, and licensed practice decides what is built or \
         changed. Where they differ from anything here, follow them.",
    ),
    (
        "absence_of_signs",
        "The absence of signs proves nothing: a room can be close to flashover or backdraft with no flame, \
         smoke or sound at its door. Nothing here says when a door may be opened.",
    ),
    (
        "doors",
        "Doors that protect stay shut, as local codes demand. A later time with a door open or leaking is \
         never a reason to open, wedge or undo one.",
    ),
    (
        "unlike_the_record",
        "The figures hold for the building as it is recorded. Goods, doors and use change: look at the room \
         before relying on them, by local procedures.",
    ),
];
