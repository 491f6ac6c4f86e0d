//! The table for people.

use super::super::table::COLUMNS;
use super::super::{building_report, sample, table};
use super::banned;
use crate::assessment::findings::{FlashoverRating, RoomFindings};
use crate::domain::Assumptions;

fn printed(rooms: Vec<RoomFindings>) -> String {
    let building = sample::building(&rooms);
    let assumptions = Assumptions::default();
    table(&building_report(&sample::findings(rooms), &sample::head(&building, &assumptions)))
}

#[test]
fn each_room_has_its_row_and_its_headline() {
    let text = printed(vec![sample::room("store"), sample::room("hall")]);

    let row = text.lines().find(|line| line.contains("The store") && line.starts_with('1')).unwrap();
    assert_eq!(
        row.split_whitespace().collect::<Vec<_>>().join(" "),
        "1 The store likely ? 5:12 (4:10-7:00) yes cannot be excluded"
    );
    assert!(text.contains("\n    Flashover after about 5 minutes with the door open, before water"));
}

#[test]
fn no_line_is_longer_than_the_terminal_and_none_steers_it() {
    let mut long = sample::room("store");
    long.name = format!("\u{1b}[31m{}", "Very long name of a room ".repeat(8));
    let text = printed(vec![long]);

    assert!(!text.chars().any(|c| c.is_control() && c != '\n'));
    for line in text.lines() {
        assert!(line.chars().count() <= COLUMNS, "{line}");
    }
}

#[test]
fn nothing_printed_reassures() {
    let rooms = FlashoverRating::ALL
        .iter()
        .map(|&rating| {
            let mut room = sample::room("store");
            room.flashover.rating = rating;
            room
        })
        .collect();
    let text = printed(rooms);

    assert_eq!(banned(&text), None);
    assert!(text.contains("not the chance of a fire"));
    assert!(text.contains("for planning before a fire"));
}

#[test]
fn a_caution_that_several_rooms_share_is_printed_once() {
    let text = printed(vec![sample::room("store"), sample::room("hall")]);

    assert_eq!(text.matches("Wind is taken as still air").count(), 1);
    assert!(text.contains("  - Every room: Wind is taken as still air"));
}
