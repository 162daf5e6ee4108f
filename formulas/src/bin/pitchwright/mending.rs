//! Applies the fixes of a sheet that are marked safe.

use formulas::diagnostics::{Edit, Finding};
use formulas::sheet::{Around, Sheet};

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
    let starts = line_starts(text);
    let mut next = text.to_owned();
    let mut applied = Vec::new();
    let mut free_end = text.len();
    let mut sorted: Vec<&Finding> = findings.iter().collect();
    sorted.sort_by_key(|finding| std::cmp::Reverse((finding.line, finding.column)));
    for finding in sorted {
        let Some(fix) = finding.fixes.iter().find(|fix| fix.safe) else {
            continue;
        };
        let spans = fix.edits.iter().map(|edit| span(text, &starts, edit));
        let Some(mut edits) = spans.collect::<Option<Vec<_>>>() else {
            continue;
        };
        edits.sort_by_key(|(start, ..)| std::cmp::Reverse(*start));
        if edits.iter().any(|(_, end, _)| *end > free_end) {
            continue;
        }
        for (start, end, by) in &edits {
            next.replace_range(start..end, by);
        }
        let first = edits.last().map_or(free_end, |(start, ..)| *start);
        let line = starts.partition_point(|start| *start <= first);
        free_end = line
            .checked_sub(1)
            .and_then(|i| starts.get(i))
            .copied()
            .unwrap_or(0);
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

fn line_starts(text: &str) -> Vec<usize> {
    let ends = text.match_indices('\n').map(|(at, _)| at + 1);
    std::iter::once(0).chain(ends).collect()
}

/// First byte, end and new text of an edit.
fn span<'a>(text: &str, starts: &[usize], edit: &'a Edit) -> Option<(usize, usize, &'a str)> {
    let line = *starts.get((edit.line as usize).checked_sub(1)?)?;
    let start = ahead(text, line, edit.column.checked_sub(1)?)?;
    let end = ahead(text, start, edit.length)?;
    Some((start, end, edit.text.as_str()))
}

/// The byte so many characters behind another.
fn ahead(text: &str, from: usize, characters: u32) -> Option<usize> {
    let rest = text.get(from..)?;
    let ends = rest.char_indices().map(|(at, _)| at).chain([rest.len()]);
    ends.map(|at| from + at).nth(characters as usize)
}

#[cfg(test)]
mod tests {
    use super::*;
    use formulas::diagnostics::{Fix, Severity};

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
