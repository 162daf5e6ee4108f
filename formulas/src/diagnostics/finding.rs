//! What a person sees of a problem: plain public structs, ready for every report.

use serde::ser::{SerializeMap, Serializer};
use serde::{Deserialize, Serialize};

/// How much a finding matters.
#[derive(Clone, Copy, PartialEq, Eq, Debug, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "lowercase")]
pub enum Severity {
    /// Text that cannot be read or checked, a limit, a missing sheet.
    Error,
    /// Some conditions lack a value, or a check fails.
    Warning,
    /// A value stands but deserves a look.
    Advice,
}

impl Severity {
    /// The word that reports print.
    #[must_use]
    pub fn word(self) -> &'static str {
        match self {
            Severity::Error => "error",
            Severity::Warning => "warning",
            Severity::Advice => "advice",
        }
    }
}

/// One problem in words, with its place and its fixes. Lines and columns count from 1; `column` and `length` count
/// Unicode characters, `column16` and `length16` UTF-16 units. The length ends with the line.
#[derive(Clone, PartialEq, Eq, Debug, Serialize)]
#[allow(missing_docs)]
pub struct Finding {
    pub severity: Severity,
    /// The name of the fault, a row of [`super::CODES`].
    pub code: &'static str,
    pub line: u32,
    pub column: u32,
    pub length: u32,
    pub column16: u32,
    pub length16: u32,
    /// One sentence.
    pub message: String,
    /// The conditions concerned, where it is about some.
    pub conditions: Option<FoundConditions>,
    pub fixes: Vec<Fix>,
}

/// The conditions that a finding is about.
#[derive(Clone, PartialEq, Eq, Debug, Default, Serialize)]
pub struct FoundConditions {
    /// How many.
    pub count: u64,
    /// The first five, each as pairs of axis and label.
    #[serde(serialize_with = "as_objects")]
    pub first: Vec<Vec<(String, String)>>,
}

/// A change of the text that would mend the problem.
#[derive(Clone, PartialEq, Eq, Debug, Serialize, Deserialize)]
pub struct Fix {
    /// What it does, in a few words.
    pub title: String,
    /// Whether it is always right: it removes its problem and adds none.
    pub safe: bool,
    /// The changes, none touching another, in the order of the text.
    pub edits: Vec<Edit>,
}

/// Replace a stretch of the text. Lengths count on through line ends, each of which counts its own characters.
#[derive(Clone, PartialEq, Eq, Debug, Serialize, Deserialize)]
#[allow(missing_docs)]
pub struct Edit {
    pub line: u32,
    pub column: u32,
    pub length: u32,
    pub column16: u32,
    pub length16: u32,
    /// By what.
    pub text: String,
}

/// A row of the table of codes: one kind of problem, explained.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Code {
    /// The name of the fault, in lower case with hyphens.
    pub code: &'static str,
    /// How much it matters, where nothing else is said.
    pub severity: Severity,
    /// What is checked, in a sentence.
    pub what: &'static str,
    /// Why it matters.
    pub why: &'static str,
    /// A small sheet that shows it; `None` where only a very large sheet or another sheet would.
    pub example: Option<&'static str>,
    /// The same sheet, mended.
    pub fixed: Option<&'static str>,
}

/// Writes each condition as an object of axis and label, in axis order.
fn as_objects<S: Serializer>(
    first: &[Vec<(String, String)>],
    serializer: S,
) -> Result<S::Ok, S::Error> {
    serializer.collect_seq(first.iter().map(|pairs| Labels(pairs)))
}

struct Labels<'a>(&'a [(String, String)]);

impl Serialize for Labels<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(Some(self.0.len()))?;
        for (axis, label) in self.0 {
            map.serialize_entry(axis, label)?;
        }
        map.end()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn conditions_become_objects_in_axis_order() {
        let pair = |axis: &str, label: &str| (axis.to_owned(), label.to_owned());
        let found = FoundConditions {
            count: 7,
            first: vec![vec![pair("point", "A"), pair("cg", "aft")], vec![]],
        };
        assert_eq!(
            serde_json::to_string(&found).unwrap(),
            r#"{"count":7,"first":[{"point":"A","cg":"aft"},{}]}"#
        );
    }

    #[test]
    fn severities_are_written_as_their_words() {
        for severity in [Severity::Error, Severity::Warning, Severity::Advice] {
            let json = serde_json::to_string(&severity).unwrap();
            assert_eq!(json, format!("\"{}\"", severity.word()));
        }
    }
}
