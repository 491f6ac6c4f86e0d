//! A building's report as plain text for people at a terminal: 100 columns, no colour.

use std::fmt::Write as _;

use super::building::{BuildingReport, RankedRoom};
use super::flashover::Flashover;
use super::room::RoomBody;
use super::text::span::clock;

/// Columns of a line.
pub const COLUMNS: usize = 100;

/// Widths of the columns: rank, room, flashover, time, before water, backdraft.
const WIDTHS: [usize; 6] = [4, 26, 16, 21, 14, 19];

/// The report for people. Every room has its row and, below it, its headline.
#[must_use]
pub fn table(report: &BuildingReport) -> String {
    let mut out = String::new();
    let name = match &report.reference {
        Some(reference) => format!("{} ({reference})", report.name),
        None => report.name.clone(),
    };
    paragraph(&mut out, &name, "", "");
    paragraph(&mut out, &report.headline, "", "");
    out.push('\n');
    paragraph(&mut out, &format!("Each rating tells: {}", lower_first(report.rating_is)), "", "");
    out.push('\n');

    row(&mut out, ["#", "Room", "Flashover", "after", "before water", "Backdraft if shut"]);
    out.push_str(&"-".repeat(COLUMNS));
    out.push('\n');
    for ranked in &report.ranking {
        if let Some(room) = body(report, &ranked.room) {
            room_row(&mut out, ranked, room);
        }
    }
    out.push('\n');
    legend(&mut out, report);
    water(&mut out, report);
    wanted(&mut out, report);
    cautions(&mut out, report);
    footer(&mut out, report);
    out
}

fn body<'a>(report: &'a BuildingReport, key: &str) -> Option<&'a RoomBody> {
    report.rooms.iter().map(|room| &room.body).find(|room| room.key == key)
}

fn room_row(out: &mut String, ranked: &RankedRoom, room: &RoomBody) {
    let mark = if room.flashover.provisional { " ?" } else { "" };
    row(
        out,
        [
            &ranked.rank.to_string(),
            &room.name,
            &format!("{}{mark}", spaced(room.flashover.rating.word())),
            &time(&room.flashover),
            yes_no(room.flashover.before_water),
            &spaced(room.backdraft.rating.word()),
        ],
    );
    paragraph(out, &room.headline, "    ", "    ");
}

/// `5:12 (4:10 to 7:00)`.
fn time(flashover: &Flashover) -> String {
    flashover.time_s.map_or_else(
        || "-".to_owned(),
        |range| {
            format!("{} ({}-{})", clock(range.typical.get()), clock(range.low.get()), clock(range.high.get()))
        },
    )
}

fn yes_no(answer: Option<bool>) -> &'static str {
    match answer {
        Some(true) => "yes",
        Some(false) => "no",
        None => "-",
    }
}

fn legend(out: &mut String, report: &BuildingReport) {
    let text = "Times are minutes and seconds from established burning: typical (earliest-latest); \
                \"from\" where it may stay out.";
    paragraph(out, text, "", "");
    if report.rooms.iter().any(|room| room.body.flashover.provisional) {
        paragraph(out, "?  rests on inputs that are assumed, not recorded.", "", "");
    }
    out.push('\n');
}

fn water(out: &mut String, report: &BuildingReport) {
    let water = &report.water;
    let (Some(room), Some(needed)) = (&water.room, water.needed_l_min) else { return };
    let name = body(report, room).map_or(room.as_str(), |room| room.name.as_str());
    let against = match (water.available_l_min, water.enough) {
        (Some(available), Some(true)) => format!("{} L/min are recorded.", available.get()),
        (Some(available), _) => format!("only {} L/min are recorded.", available.get()),
        (None, _) => "no supply is recorded.".to_owned(),
    };
    let text = format!("Water: a fire in {name} calls for {:.0} L/min; {against}", needed.get());
    paragraph(out, &text, "", "");
    out.push('\n');
}

fn wanted(out: &mut String, report: &BuildingReport) {
    let lines = by_room(
        report
            .rooms
            .iter()
            .map(|room| (&room.body, room.body.wanted.iter().map(|want| &*want.text).collect())),
    );
    list(out, "To record", report.rooms.len(), &lines);
}

fn cautions(out: &mut String, report: &BuildingReport) {
    out.push_str("Cautions\n");
    // What each rating is conditional on stands above the rows already.
    for caution in report.cautions.iter().filter(|caution| caution.key != "conditional") {
        paragraph(out, &caution.text, "  - ", "    ");
    }
    let lines = by_room(
        report.rooms.iter().map(|room| (&room.body, room.cautions.iter().map(|each| &*each.text).collect())),
    );
    for (text, rooms) in &lines {
        paragraph(out, &format!("{}: {text}", whom(rooms, report.rooms.len())), "  - ", "    ");
    }
    out.push('\n');
}

fn footer(out: &mut String, report: &BuildingReport) {
    let recalled = report.methods.iter().filter(|method| method.provenance.word() == "memory").count();
    let text = format!(
        "Level {}, rating rule {}, engine {}. {} methods, {recalled} of them rest on recalled values; \
         sources, assumptions and rules: --json.",
        report.head.level.word(),
        report.head.rating_rule,
        report.head.engine_version,
        report.methods.len(),
    );
    paragraph(out, &text, "", "");
}

/// Texts in the order of their first room, each with the rooms that say it.
fn by_room<'a>(rooms: impl Iterator<Item = (&'a RoomBody, Vec<&'a str>)>) -> Vec<(&'a str, Vec<&'a str>)> {
    let mut lines: Vec<(&str, Vec<&str>)> = Vec::new();
    for (room, texts) in rooms {
        for text in texts {
            match lines.iter_mut().find(|(known, _)| *known == text) {
                Some((_, whose)) => whose.push(&room.name),
                None => lines.push((text, vec![&room.name])),
            }
        }
    }
    lines
}

fn list(out: &mut String, title: &str, all: usize, lines: &[(&str, Vec<&str>)]) {
    if lines.is_empty() {
        return;
    }
    out.push_str(title);
    out.push('\n');
    for (text, rooms) in lines {
        paragraph(out, &format!("{}: {text}", whom(rooms, all)), "  - ", "    ");
    }
    out.push('\n');
}

/// Names a few rooms; counts many.
fn whom(rooms: &[&str], all: usize) -> String {
    if rooms.len() == all && all > 1 {
        "Every room".to_owned()
    } else if rooms.len() > 4 {
        format!("{} and {} more rooms", rooms[..3].join(", "), rooms.len() - 3)
    } else {
        rooms.join(", ")
    }
}

fn spaced(word: &str) -> String {
    word.replace('_', " ")
}

fn lower_first(sentence: &str) -> String {
    let mut letters = sentence.chars();
    letters.next().map_or_else(String::new, |first| first.to_lowercase().chain(letters).collect())
}

fn row(out: &mut String, cells: [&str; 6]) {
    let mut line = String::new();
    for (cell, width) in cells.iter().zip(WIDTHS) {
        let cell = shortened(&printable(cell), width - 1);
        let _ = write!(line, "{cell:width$}");
    }
    out.push_str(line.trim_end());
    out.push('\n');
}

fn shortened(text: &str, width: usize) -> String {
    if text.chars().count() <= width {
        return text.to_owned();
    }
    let mut short: String = text.chars().take(width.saturating_sub(1)).collect();
    short.push('…');
    short
}

/// Names are free text: what would steer the terminal becomes a space.
fn printable(text: &str) -> String {
    text.chars().map(|c| if c.is_control() { ' ' } else { c }).collect()
}

/// Fills lines up to the last column; a longer word gets a line of its own.
fn paragraph(out: &mut String, text: &str, first: &str, rest: &str) {
    let text = printable(text);
    let mut line = first.to_owned();
    let mut empty = true;
    for word in text.split_whitespace() {
        if !empty && line.chars().count() + 1 + word.chars().count() > COLUMNS {
            out.push_str(line.trim_end());
            out.push('\n');
            line = rest.to_owned();
            empty = true;
        }
        if !empty {
            line.push(' ');
        }
        line.push_str(word);
        empty = false;
    }
    out.push_str(line.trim_end());
    out.push('\n');
}
