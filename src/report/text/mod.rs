//! Every sentence that the report itself writes. Those about a finding come with the finding.

pub(super) mod cautions;
pub(super) mod headline;
pub(super) mod span;

/// What each rating is conditional on; stands beside every one of them.
pub const RATING_IS: &str = "What follows if an established flaming fire burns in this room and nobody fights it. \
                             It is not the chance of a fire.";

/// What the figures are for; stands in every report.
pub const PLANNING_ONLY: &str = "These figures are for planning before a fire. They do not replace size-up on \
                                 arrival, local codes and procedures, or the judgement of a licensed engineer.";
