//! JSON text to a tree, refusing what a lenient reader would let pass.
//!
//! serde_json alone drops all but the last of duplicate members and stops at 128 levels, so
//! the tree is built by a visitor of our own. The first fault ends the reading.

use std::cell::RefCell;
use std::fmt;

use serde::de::{DeserializeSeed, Deserializer, Error, MapAccess, SeqAccess, Visitor};

use crate::domain::{Invalid, Pointer};

/// Deepest nesting of arrays and objects that is read.
pub const MAX_DEPTH: usize = 32;

/// A JSON value; members in the order in which they were written.
#[derive(Debug, Clone, PartialEq)]
pub enum Json {
    /// `null`.
    Null,
    /// `true` or `false`.
    Bool(bool),
    /// A number.
    Number(serde_json::Number),
    /// A text.
    Text(String),
    /// An array.
    Array(Vec<Json>),
    /// An object, no name twice.
    Object(Vec<(String, Json)>),
}

impl Json {
    /// The member of an object.
    pub fn member(&self, name: &str) -> Option<&Json> {
        match self {
            Self::Object(members) => members.iter().find(|(known, _)| known == name).map(|(_, value)| value),
            _ => None,
        }
    }

    /// Sets a member of an object; of anything else nothing.
    pub fn set(&mut self, name: &str, value: Json) {
        if let Self::Object(members) = self {
            members.retain(|(known, _)| known != name);
            members.push((name.to_owned(), value));
        }
    }

    /// What sort of value it is, in words.
    pub fn sort(&self) -> &'static str {
        match self {
            Self::Null => "null",
            Self::Bool(_) => "true or false",
            Self::Number(_) => "a number",
            Self::Text(_) => "a string",
            Self::Array(_) => "an array",
            Self::Object(_) => "an object",
        }
    }
}

impl From<&serde_json::Value> for Json {
    fn from(value: &serde_json::Value) -> Self {
        use serde_json::Value;
        match value {
            Value::Null => Self::Null,
            Value::Bool(value) => Self::Bool(*value),
            Value::Number(number) => Self::Number(number.clone()),
            Value::String(text) => Self::Text(text.clone()),
            Value::Array(items) => Self::Array(items.iter().map(Self::from).collect()),
            Value::Object(members) => {
                Self::Object(members.iter().map(|(name, value)| (name.clone(), value.into())).collect())
            }
        }
    }
}

impl From<Json> for serde_json::Value {
    fn from(json: Json) -> Self {
        match json {
            Json::Null => Self::Null,
            Json::Bool(value) => Self::Bool(value),
            Json::Number(number) => Self::Number(number),
            Json::Text(text) => Self::String(text),
            Json::Array(items) => Self::Array(items.into_iter().map(Self::from).collect()),
            Json::Object(members) => {
                Self::Object(members.into_iter().map(|(name, value)| (name, value.into())).collect())
            }
        }
    }
}

/// Reads a whole body. The fault says what is wrong, where in the text and, as far as it had
/// come, in which member.
pub fn parse(bytes: &[u8]) -> Result<Json, Invalid> {
    let fault = |pointer, code, detail| Err(Invalid { pointer, code, detail, suggestion: None });
    if bytes.starts_with(b"\xef\xbb\xbf") {
        let detail = "the body begins with a byte order mark: send UTF-8 without one".to_owned();
        return fault(Pointer::root(), "byte_order_mark", detail);
    }
    let text = match std::str::from_utf8(bytes) {
        Ok(text) => text,
        Err(error) => {
            let (line, column) = position(bytes, error.valid_up_to());
            let detail = format!("the body is not UTF-8: line {line}, byte {column} of the line");
            return fault(Pointer::root(), "not_utf8", detail);
        }
    };
    let path = RefCell::new(Path::default());
    let mut reader = serde_json::Deserializer::from_str(text);
    let read = Node { path: &path, depth: 0 }.deserialize(&mut reader);
    match read.and_then(|json| reader.end().map(|()| json)) {
        Ok(json) => Ok(json),
        Err(error) => {
            let path = path.into_inner();
            fault(path.pointer(), path.code.unwrap_or("syntax"), error.to_string())
        }
    }
}

fn position(bytes: &[u8], at: usize) -> (usize, usize) {
    let before = bytes.get(..at).unwrap_or(bytes);
    let line = before.iter().filter(|&&byte| byte == b'\n').count() + 1;
    let column = before.iter().rev().take_while(|&&byte| byte != b'\n').count() + 1;
    (line, column)
}

/// How far the reading had come when it failed: a step is taken back only on success.
#[derive(Default)]
struct Path {
    steps: Vec<Step>,
    code: Option<&'static str>,
}

enum Step {
    Member(String),
    Element(usize),
}

impl Path {
    fn pointer(&self) -> Pointer {
        self.steps.iter().fold(Pointer::root(), |pointer, step| match step {
            Step::Member(name) => pointer.member(name),
            Step::Element(index) => pointer.element(*index),
        })
    }
}

#[derive(Clone, Copy)]
struct Node<'p> {
    path: &'p RefCell<Path>,
    depth: usize,
}

impl Node<'_> {
    fn refuse<E: Error>(self, code: &'static str, detail: fmt::Arguments<'_>) -> E {
        self.path.borrow_mut().code = Some(code);
        E::custom(detail)
    }

    /// One level down.
    fn down<E: Error>(self) -> Result<Self, E> {
        if self.depth == MAX_DEPTH {
            return Err(self.refuse("too_deep", format_args!("nested deeper than {MAX_DEPTH} levels")));
        }
        Ok(Self { depth: self.depth + 1, ..self })
    }

    fn step(self, step: Step) {
        self.path.borrow_mut().steps.push(step);
    }

    fn step_back(self) {
        self.path.borrow_mut().steps.pop();
    }
}

impl<'de> DeserializeSeed<'de> for Node<'_> {
    type Value = Json;

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<Json, D::Error> {
        deserializer.deserialize_any(self)
    }
}

impl<'de> Visitor<'de> for Node<'_> {
    type Value = Json;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a JSON value")
    }

    fn visit_unit<E>(self) -> Result<Json, E> {
        Ok(Json::Null)
    }

    fn visit_bool<E>(self, value: bool) -> Result<Json, E> {
        Ok(Json::Bool(value))
    }

    fn visit_u64<E>(self, value: u64) -> Result<Json, E> {
        Ok(Json::Number(value.into()))
    }

    fn visit_i64<E>(self, value: i64) -> Result<Json, E> {
        Ok(Json::Number(value.into()))
    }

    fn visit_f64<E: Error>(self, value: f64) -> Result<Json, E> {
        let number = serde_json::Number::from_f64(value);
        number.map(Json::Number).ok_or_else(|| self.refuse("syntax", format_args!("number out of range")))
    }

    fn visit_str<E>(self, value: &str) -> Result<Json, E> {
        Ok(Json::Text(value.to_owned()))
    }

    fn visit_string<E>(self, value: String) -> Result<Json, E> {
        Ok(Json::Text(value))
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut elements: A) -> Result<Json, A::Error> {
        let inner = self.down()?;
        let mut read = Vec::new();
        loop {
            self.step(Step::Element(read.len()));
            let Some(element) = elements.next_element_seed(inner)? else { break };
            self.step_back();
            read.push(element);
        }
        self.step_back();
        Ok(Json::Array(read))
    }

    fn visit_map<A: MapAccess<'de>>(self, mut members: A) -> Result<Json, A::Error> {
        let inner = self.down()?;
        let mut read: Vec<(String, Json)> = Vec::new();
        let mut names = std::collections::HashSet::new();
        while let Some(name) = members.next_key::<String>()? {
            self.step(Step::Member(name.clone()));
            if !names.insert(name.clone()) {
                return Err(self.refuse("duplicate_member", format_args!("the member `{name}` stands twice")));
            }
            let value = members.next_value_seed(inner)?;
            self.step_back();
            read.push((name, value));
        }
        Ok(Json::Object(read))
    }
}

#[cfg(test)]
mod tests;
