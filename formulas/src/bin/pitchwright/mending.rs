//! Applies the fixes of a sheet that are marked safe.

use formulas::assist::fix::bytes;
use formulas::diagnostics::Finding;
use formulas::sheet::{Around, Sheet};
use formulas::source::Source;

/// Most rounds of reading a sheet again after its mending.
const ROUNDS_MOST: usize = 20;

/// A sheet with what could be mended.
pub(crate) struct Mended {
    pub(crate) text: String,
    pub(crate) applied: Vec<Applied>,
}

/// A fix that was applied, at the place it had in the text of its round.
#[derive(Debug, PartialEq, Eq)]
pub(crate) struct Applied {
    pub(crate) line: u32,
    pub(crate) column: u32,
    pub(crate) title: String,
    pub(crate) message: String,
}

/// Applies safe fixes until none is left. A round takes at most one fix for each line, from the end of the text, so that
/// no fix moves the place of another.
pub(crate) fn apply_safe(text: &str, around: &Around<'_>) -> Mended {
    let mut mended = Mended {
        text: text.to_owned(),
        applied: Vec::new(),
    };
    for _ in 0..ROUNDS_MOST {
        let findings = Sheet::open_around(&mended.text, around).findings();
        let (next, applied) = round(&mended.text, &findings);
        if applied.is_empty() || next == mended.text {
            break;
        }
        mended.text = next;
        mended.applied.extend(applied);
    }
    mended
}

fn round(text: &str, findings: &[Finding]) -> (String, Vec<Applied>) {
    let source = Source::new(text);
    let mut next = text.to_owned();
    let mut applied = Vec::new();
    let mut free_end = text.len();
    let mut sorted: Vec<&Finding> = findings.iter().collect();
    sorted.sort_by_key(|finding| std::cmp::Reverse((finding.line, finding.column)));
    for finding in sorted {
        let Some(fix) = finding.fixes.iter().find(|fix| fix.safe) else {
            continue;
        };
        let edits = fix.edits.iter();
        let spans = edits.map(|edit| Some((bytes(&source, edit)?, edit.text.as_str())));
        let Some(mut edits) = spans.collect::<Option<Vec<_>>>() else {
            continue;
        };
        edits.sort_by_key(|(range, _)| std::cmp::Reverse(range.start));
        if edits.iter().any(|(range, _)| range.end > free_end) {
            continue;
        }
        for (range, by) in &edits {
            next.replace_range(range.clone(), by);
        }
        let first = edits.last().map_or(free_end, |(range, _)| range.start);
        free_end = source.byte(source.place(first).line, 1);
        applied.push(Applied {
            line: finding.line,
            column: finding.column,
            title: fix.title.clone(),
            message: finding.message.clone(),
        });
    }
    applied.reverse();
    (next, applied)
}

#[cfg(test)]
mod tests {
    use super::*;
    use formulas::diagnostics::{Edit, Fix, Severity};

    fn finding(line: u32, column: u32, length: u32, by: &str, safe: bool) -> Finding {
        let edit = Edit {
            line,
            column,
            length,
            column16: column,
            length16: length,
            text: by.to_owned(),
        };
        Finding {
            severity: Severity::Error,
            code: "foreign-sign",
            line,
            column,
            length,
            column16: column,
            length16: length,
            message: String::new(),
            conditions: None,
            fixes: vec![Fix {
                title: format!("write {by}"),
                safe,
                edits: vec![edit],
            }],
        }
    }

    #[test]
    fn only_safe_fixes_are_taken_one_to_a_line_in_a_round() {
        let text = "ä == 1\nb == 2 == c\n";
        let findings = [
            finding(1, 3, 2, "=", true),
            finding(2, 3, 2, "=", true),
            finding(2, 8, 2, "=", true),
            finding(2, 11, 1, "d", false),
        ];
        let (next, applied) = round(text, &findings);
        assert_eq!(next, "ä = 1\nb == 2 = c\n");
        let places: Vec<_> = applied.iter().map(|a| (a.line, a.column)).collect();
        assert_eq!(places, [(1, 3), (2, 8)]);
    }

    #[test]
    fn an_edit_outside_the_text_is_left() {
        let (next, applied) = round("a\n", &[finding(9, 1, 1, "b", true)]);
        assert_eq!((next.as_str(), applied.len()), ("a\n", 0));
    }
}
