//! One sentence that an officer in a hurry understands: what, when, in which case, before or
//! after water.

use super::span::about;
use crate::assessment::findings::{
    BackdraftFinding, BackdraftRating, BeforeWater, BuildingFindings, FlashoverFinding, FlashoverRating,
    HoldsWhile, LargeSpaceFinding, Reason, RoomFindings, TransientFinding,
};
use crate::domain::assumptions::{Level, Scenario};
use crate::domain::room::Hazard;

/// The headline of a room.
pub fn room(room: &RoomFindings) -> String {
    let mut sentence = match (&room.large_space, room.flashover.rating) {
        (Some(large), FlashoverRating::NotAssessed) => large_space(large),
        _ => flashover(&room.flashover),
    };
    if let Some(clause) = backdraft(&room.backdraft, room.flashover.rating) {
        sentence.push_str(clause);
    }
    if let Some(lost_s) = room.transient.as_ref().and_then(way_out_lost_s) {
        sentence.push_str(&format!("; somebody upright in it has lost the way out after {}", about(lost_s)));
    }
    if room.wanted.iter().any(|wanted| wanted.key == "openings") {
        sentence.push_str("; its openings are not recorded");
    }
    let uncounted: Vec<&str> =
        room.hazards.iter().filter(|h| h.bars_not_indicated).filter_map(|h| hazard(h.hazard)).collect();
    if !uncounted.is_empty() {
        sentence.push_str("; not counted: ");
        sentence.push_str(&listed(&uncounted));
    }
    sentence.push('.');
    sentence
}

/// When the room of origin is lost to a person upright, with typical inputs.
fn way_out_lost_s(found: &TransientFinding) -> Option<f64> {
    let first = found.way_out.iter().find(|way| way.posture == "standing")?;
    first.lost_s.map(|lost_s| lost_s.typical)
}

/// The headline of a building: how many rooms, and the worst of them.
pub fn building(findings: &BuildingFindings) -> String {
    let all = findings.rooms.len();
    if all == 0 {
        return "No rooms are recorded, so nothing was assessed.".to_owned();
    }
    let before = count(findings, |room| {
        room.flashover.before_water == Some(true)
            && matches!(
                room.flashover.rating,
                FlashoverRating::Possible | FlashoverRating::Likely | FlashoverRating::Expected
            )
    });
    let hides = count(findings, |room| may_hide_backdraft(room.backdraft.rating));
    let open = count(findings, |room| room.flashover.rating == FlashoverRating::NotAssessed);

    let mut sentence = match before {
        0 => {
            let by = if findings.level == Level::Screening { "does the screen" } else { "do the runs" };
            format!("In none of {} {by} put flashover before water, as they are recorded", rooms(all))
        }
        n if n == all && all == 1 => "Its one room may flash over before water is on the fire".to_owned(),
        n => format!("{n} of {} may flash over before water is on the fire", rooms(all)),
    };
    if hides > 0 {
        sentence.push_str(&format!("; {hides} may hide a backdraft when shut"));
    }
    if open > 0 {
        sentence.push_str(&format!("; {open} could not be judged for flashover"));
    }
    sentence.push('.');
    if let Some(worst) = worst(findings) {
        sentence.push_str(&format!(" The worst, {}: {}.", worst.name.trim(), clause(&room(worst))));
    }
    sentence
}

fn worst(findings: &BuildingFindings) -> Option<&RoomFindings> {
    let first = findings.ranking.first()?;
    findings.rooms.iter().find(|room| room.key == first.room)
}

fn count(findings: &BuildingFindings, which: impl Fn(&RoomFindings) -> bool) -> usize {
    findings.rooms.iter().filter(|room| which(room)).count()
}

fn rooms(count: usize) -> String {
    if count == 1 { "1 room".to_owned() } else { format!("{count} rooms") }
}

fn flashover(finding: &FlashoverFinding) -> String {
    let verb = match finding.rating {
        FlashoverRating::NotIndicated => return not_indicated(finding.holds_while.first()),
        FlashoverRating::NotAssessed => {
            return match &finding.reason {
                Some(reason) if reason.key == "horizontal_openings_only" => {
                    "Not assessed, count it with the worst: it is open only through floor, ceiling or roof"
                        .to_owned()
                }
                Some(reason) => {
                    format!("Not assessed, count it with the worst: {}", clause(in_words(reason)))
                }
                None => "Not assessed, count it with the worst".to_owned(),
            };
        }
        FlashoverRating::Possible => "Flashover possible",
        FlashoverRating::Likely => "Flashover",
        FlashoverRating::Expected => "Flashover expected",
    };
    let case = finding.scenario.map_or("", scenario);
    if let Some(time) = finding.time_s {
        return format!("{verb} after {}{case}{}", about(time.typical), water(finding));
    }
    // "Flashover" alone needs its verb once no time follows.
    let verb = if finding.rating == FlashoverRating::Likely { "Flashover likely" } else { verb };
    match finding.reason.as_ref().map(|reason| reason.key) {
        Some(key) if key.starts_with("hazard_") => {
            "Flashover cannot be excluded, whatever the figures say".to_owned()
        }
        Some("only_at_the_worst_corner") => {
            format!("{verb}{case}, if fuel, growth and lining are at their worst")
        }
        Some("within_scatter") => format!("{verb}{case}: the fire comes close to what it takes"),
        Some("oxygen_budget") => format!("{verb}{case}, before the air inside is used up"),
        _ => format!("{verb}{case}, at a time that cannot be told"),
    }
}

/// The reason without the stable word that it may lead with.
fn in_words(reason: &Reason) -> &str {
    let text = &*reason.text;
    text.strip_prefix(reason.key).and_then(|rest| rest.strip_prefix(':')).unwrap_or(text)
}

/// Leads with its condition: it must never read as an all-clear.
fn not_indicated(holds: Option<&HoldsWhile>) -> String {
    match holds {
        Some(holds) if holds.value.is_some() => {
            let words = clause(strip_lead(&holds.words));
            match words.split_once("; now ") {
                Some((bound, now)) => format!("Flashover not indicated, but only while {bound} (now {now})"),
                None => format!("Flashover not indicated, but only while {words}"),
            }
        }
        _ => "Flashover not indicated in the cases computed, as the room is recorded".to_owned(),
    }
}

fn strip_lead(words: &str) -> &str {
    let words = words.strip_prefix("Holds while ").unwrap_or(words);
    words.strip_prefix("holds while ").unwrap_or(words)
}

fn water(finding: &FlashoverFinding) -> &'static str {
    match (finding.before_water_case, finding.before_water) {
        (Some(BeforeWater::InEveryCase), _) | (None, Some(true)) => ", before water is on the fire",
        (Some(BeforeWater::Typically), _) => ", most likely before water is on the fire",
        (Some(BeforeWater::InTheWorstCase), _) => ", at worst before water is on the fire",
        (Some(BeforeWater::InNoCase), _) | (None, Some(false)) => ", after water should be on the fire",
        (None, None) => "",
    }
}

/// How the building stands, to be put behind a time.
pub fn scenario(scenario: Scenario) -> &'static str {
    match scenario {
        Scenario::AsFound => " with doors and windows as recorded",
        Scenario::DoorOpen => " with the door open",
        Scenario::Shut => " with everything shut",
        Scenario::ShutLate => " with the door shut late",
        Scenario::WindowFails => " once window glass has fallen",
        Scenario::Entry => " once a crew has opened the door",
    }
}

fn large_space(large: &LargeSpaceFinding) -> String {
    let mut expected = Vec::new();
    if large.flame_reaches_ceiling {
        expected.push("flames reach the ceiling".to_owned());
    }
    if large.next_pile_ignites == Some(true) {
        expected.push("fire crosses to the next pile".to_owned());
    }
    if let Some(time) = large.layer_to_2_m_s {
        expected.push(format!("smoke is down to head height after {}", about(time.typical)));
    }
    let lead = "Too large to be judged as one room for flashover";
    if expected.is_empty() {
        format!("{lead}, count it with the worst")
    } else {
        let expected: Vec<&str> = expected.iter().map(String::as_str).collect();
        format!("{lead}: {}", listed(&expected))
    }
}

fn may_hide_backdraft(rating: BackdraftRating) -> bool {
    matches!(
        rating,
        BackdraftRating::CannotBeExcluded | BackdraftRating::Credible | BackdraftRating::CredibleViolent
    )
}

fn backdraft(finding: &BackdraftFinding, flashover: FlashoverRating) -> Option<&'static str> {
    match finding.rating {
        BackdraftRating::CannotBeExcluded => Some("; shut, it may hide a backdraft"),
        BackdraftRating::Credible => Some("; shut, it can hide a backdraft"),
        BackdraftRating::CredibleViolent => Some("; shut, it can hide a violent backdraft"),
        BackdraftRating::NotAssessed if flashover != FlashoverRating::NotAssessed => {
            Some("; backdraft not assessed")
        }
        BackdraftRating::NotAssessed | BackdraftRating::NotIndicated => None,
    }
}

/// The hazard as people call it; none where nothing is recorded that could be named.
pub fn hazard(hazard: Hazard) -> Option<&'static str> {
    Some(match hazard {
        Hazard::None | Hazard::NotRecorded => return None,
        Hazard::LithiumIon => "lithium-ion batteries",
        Hazard::GasCylinders => "gas cylinders",
        Hazard::FlammableLiquid => "flammable liquid",
        Hazard::FlammableGas => "flammable gas",
        Hazard::CombustibleDust => "combustible dust",
        Hazard::Oxidisers => "oxidisers",
        Hazard::Explosives => "explosives",
        Hazard::Hoard => "hoarded goods",
        Hazard::ExposedFoam => "exposed foam",
        Hazard::MedicalOxygen => "medical oxygen",
    })
}

/// "a, b and c".
fn listed(words: &[&str]) -> String {
    match words {
        [] => String::new(),
        [only] => (*only).to_owned(),
        [front @ .., last] => format!("{} and {last}", front.join(", ")),
    }
}

/// A sentence made ready to stand inside another: no full stop, and no capital unless it is a name's.
fn clause(sentence: &str) -> String {
    let sentence = sentence.trim().trim_end_matches('.');
    let mut letters = sentence.chars();
    match (letters.next(), letters.next()) {
        (Some(first), Some(second)) if second.is_lowercase() || second == ' ' => {
            first.to_lowercase().chain(sentence.chars().skip(1)).collect()
        }
        _ => sentence.to_owned(),
    }
}
