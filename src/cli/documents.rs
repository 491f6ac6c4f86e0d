//! Building documents in files: one, an array of them, or one a line.

use std::fs;
use std::io::Read;
use std::path::{Path, PathBuf};

use serde_json::value::RawValue;

use super::Failure;
use crate::domain::Invalid;
use crate::wire::Refused;

/// A document and where it was found, for messages.
pub struct Document {
    /// File, and the place in it where there are several.
    pub place: String,
    /// Its text.
    pub text: Vec<u8>,
}

/// The bytes of a file, or of standard input for a dash.
pub fn read(path: &Path) -> Result<Vec<u8>, Failure> {
    if path == Path::new("-") {
        let mut text = Vec::new();
        std::io::stdin().read_to_end(&mut text)?;
        return Ok(text);
    }
    fs::read(path).map_err(|error| format!("cannot read {}: {error}", path.display()).into())
}

/// The documents of a file, or of a folder's files in order of name.
pub fn all(from: &Path) -> Result<Vec<Document>, Failure> {
    let mut found = Vec::new();
    for path in files(from)? {
        let text = read(&path)?;
        split(&path.display().to_string(), text, &mut found);
    }
    Ok(found)
}

fn files(from: &Path) -> Result<Vec<PathBuf>, Failure> {
    if !from.is_dir() {
        return Ok(vec![from.to_owned()]);
    }
    let mut files = Vec::new();
    for entry in fs::read_dir(from)? {
        let path = entry?.path();
        let ending = path.extension().and_then(|ending| ending.to_str());
        if path.is_file() && matches!(ending, Some("json" | "ndjson")) {
            files.push(path);
        }
    }
    files.sort();
    if files.is_empty() {
        return Err(format!("{} holds no .json or .ndjson file", from.display()).into());
    }
    Ok(files)
}

/// What is no array and no sequence of lines stays whole: the reader of buildings then says what is wrong.
fn split(place: &str, text: Vec<u8>, found: &mut Vec<Document>) {
    if let Ok(elements) = serde_json::from_slice::<Vec<&RawValue>>(&text) {
        found.extend(elements.iter().enumerate().map(|(index, element)| Document {
            place: format!("{place} element {index}"),
            text: element.get().as_bytes().to_vec(),
        }));
        return;
    }
    let one = serde_json::from_slice::<&RawValue>(&text).is_ok();
    let lines: Vec<&[u8]> = text.split(|&byte| byte == b'\n').collect();
    let several = lines.iter().filter(|line| !line.trim_ascii().is_empty()).count() > 1;
    if one || !several || serde_json::from_slice::<&RawValue>(lines[0]).is_err() {
        found.push(Document { place: place.to_owned(), text });
        return;
    }
    for (number, line) in lines.iter().enumerate().filter(|(_, line)| !line.trim_ascii().is_empty()) {
        found.push(Document { place: format!("{place} line {}", number + 1), text: line.to_vec() });
    }
}

/// The faults of a document, one a line, each with its place and its mend.
pub fn faults(place: &str, refused: &Refused) -> String {
    let one = |fault: &Invalid| {
        let mend = fault.suggestion.as_deref().map(|text| format!(" ({text})")).unwrap_or_default();
        let at = if fault.pointer.as_str().is_empty() { "(the document)" } else { fault.pointer.as_str() };
        format!("{place}: {at}: {}{mend}", fault.detail)
    };
    match refused {
        Refused::Unreadable(fault) => one(fault),
        Refused::Invalid(faults) => faults.iter().map(one).collect::<Vec<_>>().join("\n"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn places(text: &str) -> Vec<String> {
        let mut found = Vec::new();
        split("f", text.as_bytes().to_vec(), &mut found);
        found.into_iter().map(|document| document.place).collect()
    }

    #[test]
    fn a_file_holds_one_document_an_array_or_one_a_line() {
        assert_eq!(places("{\n  \"name\": \"a\"\n}\n"), ["f"]);
        assert_eq!(places("[{}, {}]"), ["f element 0", "f element 1"]);
        assert_eq!(places("{}\n\n{}\n"), ["f line 1", "f line 3"]);
    }

    #[test]
    fn a_broken_document_stays_whole_for_the_reader_to_refuse() {
        assert_eq!(places("{\n \"name\": \n}"), ["f"]);
        assert_eq!(places(""), ["f"]);
    }
}
