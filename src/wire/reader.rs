//! Reading that goes on after a fault, so that all of them come back at once.

use crate::catalogue::{Catalogue, Kind};
use crate::domain::check::Outline;
use crate::domain::simulation::check::Cross;
use crate::domain::{Invalid, Pointer};

use super::json::Json;

/// Most faults that are kept; a client that made more has read enough.
pub const MAX_FAULTS: usize = 1000;

/// Longest name for which a likeness is sought; it bounds the work of a hostile body.
const LONGEST_GUESS: usize = 64;
/// Likeness, by Jaro and Winkler, below which a word is no help. Ours: tried on plausible slips.
const LEAST_LIKENESS: f64 = 0.78;

/// What a reading needs and gathers.
pub struct Reader<'c> {
    catalogue: &'c Catalogue,
    /// A document that we wrote: its names and sums were checked when it came in.
    stored: bool,
    faults: Vec<Invalid>,
    left_out: usize,
    /// What could be read of the parts that rules compare.
    pub(super) outline: Outline,
    /// What the parts of a run name and measure of each other.
    pub(super) cross: Cross,
}

impl<'c> Reader<'c> {
    /// Reads what a client sent.
    pub fn new(catalogue: &'c Catalogue) -> Self {
        Self {
            catalogue,
            stored: false,
            faults: Vec::new(),
            left_out: 0,
            outline: Outline::default(),
            cross: Cross::default(),
        }
    }

    /// Reads what we have kept: catalogue names are not looked up again.
    pub fn stored(catalogue: &'c Catalogue) -> Self {
        Self { stored: true, ..Self::new(catalogue) }
    }

    /// Whether the document is one of ours.
    pub fn is_stored(&self) -> bool {
        self.stored
    }

    /// Records a fault.
    pub fn fault(&mut self, pointer: &Pointer, code: &'static str, detail: impl Into<String>) {
        self.add(Invalid { pointer: pointer.clone(), code, detail: detail.into(), suggestion: None });
    }

    /// Records a fault with its mend.
    pub fn fault_with(
        &mut self,
        pointer: &Pointer,
        code: &'static str,
        detail: impl Into<String>,
        suggestion: Option<impl Into<String>>,
    ) {
        let suggestion = suggestion.map(Into::into);
        self.add(Invalid { pointer: pointer.clone(), code, detail: detail.into(), suggestion });
    }

    /// Records a fault that is already put in words.
    pub fn add(&mut self, fault: Invalid) {
        if self.faults.len() < MAX_FAULTS {
            self.faults.push(fault);
        } else {
            self.left_out += 1;
        }
    }

    /// Whether no more faults are kept, so that looking for them is work for nothing.
    pub fn is_full(&self) -> bool {
        self.faults.len() >= MAX_FAULTS
    }

    /// Records a value of the wrong type.
    pub fn wrong_type(&mut self, pointer: &Pointer, json: &Json, wanted: &str) {
        self.fault(pointer, "wrong_type", format!("must be {wanted}, not {}", json.sort()));
    }

    /// Looks a name up in the catalogue.
    pub fn look_up(&mut self, pointer: &Pointer, kind: Kind, name: &str) -> bool {
        if self.stored || self.knows(kind, name) {
            return true;
        }
        let nearest = self.catalogue.nearest(kind, name).map(str::to_owned);
        let list = kind.name();
        let detail = format!(
            "`{}` is no name of /v1/catalogue/{list}; give a name from there or an object with the properties",
            shortened(name)
        );
        self.fault_with(pointer, "unknown_name", detail, nearest);
        false
    }

    fn knows(&self, kind: Kind, name: &str) -> bool {
        match kind {
            Kind::Uses => self.catalogue.use_of(name).is_some(),
            Kind::Items => self.catalogue.item(name).is_some(),
            Kind::Fuels => self.catalogue.fuel(name).is_some(),
            Kind::Materials => self.catalogue.material(name).is_some(),
            Kind::Leakage => self.catalogue.leakage(name).is_some(),
            Kind::Detectors => self.catalogue.detector(name).is_some(),
            Kind::Sprinklers => self.catalogue.sprinkler(name).is_some(),
        }
    }

    /// Records what is wrong within the parts that were read, without a building around them.
    pub fn judge_parts(&mut self) {
        for fault in self.outline.faults_of_parts() {
            self.add(fault);
        }
    }

    /// The faults: those of single members in the order of our definitions, then those between
    /// members.
    pub fn into_faults(self) -> Vec<Invalid> {
        let mut faults = self.faults;
        if self.left_out > 0 {
            faults.push(Invalid {
                pointer: Pointer::root(),
                code: "more",
                detail: format!("{} more faults are not listed", self.left_out),
                suggestion: None,
            });
        }
        faults
    }

    /// How many faults there are so far.
    pub fn count(&self) -> usize {
        self.faults.len() + self.left_out
    }
}

/// The word that somebody who wrote `name` most likely meant, if any is near.
pub fn nearest<'w>(words: impl IntoIterator<Item = &'w str>, name: &str) -> Option<&'w str> {
    if name.chars().count() > LONGEST_GUESS {
        return None;
    }
    let wanted = name.trim().to_ascii_lowercase().replace([' ', '-'], "_");
    words
        .into_iter()
        .map(|word| (strsim::jaro_winkler(&word.to_ascii_lowercase(), &wanted), word))
        .filter(|(likeness, _)| *likeness >= LEAST_LIKENESS)
        .max_by(|(a, _), (b, _)| a.total_cmp(b))
        .map(|(_, word)| word)
}

/// A text of a client, short enough to be said back.
pub fn shortened(text: &str) -> String {
    const LONGEST: usize = 60;
    let mut short: String =
        text.chars().take(LONGEST).map(|c| if c.is_control() { '�' } else { c }).collect();
    if text.chars().count() > LONGEST {
        short.push('…');
    }
    short
}
