//! Claims about whole reports.

mod contract;
mod headlines;
mod printed;
#[path = "../../../tests/it/reading.rs"]
mod reading;
mod schema;
mod whole;

use reading::{banned, not_rounded, texts};

#[test]
fn the_ban_catches_whole_words_only() {
    assert_eq!(banned("This room is safe."), Some("safe"));
    assert_eq!(banned("There is NO RISK here"), Some("no risk"));
    assert_eq!(banned("unsafe compass, cleared"), None);
}
