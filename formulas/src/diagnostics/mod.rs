//! Problems in words: every fact that a stage reports becomes a sentence, a severity, a place and its fixes here and
//! nowhere else. One file a code in `codes`; [`CODES`] is the table of all.

mod codes;
mod draft;
mod finding;
mod gather;
mod place;
mod wording;

#[cfg(test)]
mod check;

pub use codes::CODES;
pub use finding::{Code, Edit, Finding, Fix, FoundConditions, Severity};

use crate::problem::Located;
use crate::span::Span;
use crate::syntax::Tree;
use draft::{Draft, DraftFix, Site};
use place::Lines;

/// The findings of a sheet, ordered by line, column and code.
///
/// `text` is the text that `tree` was read from. Of findings of one code at one place only the first stays, and of one
/// code at most a hundred, with one more that counts the rest.
#[must_use]
pub fn findings(problems: &[Located], tree: &Tree, text: &str) -> Vec<Finding> {
    let lines = Lines::of(text);
    let found = problems.iter().map(|p| finding(p, tree, text, &lines));
    gather::gather(found.collect())
}

/// The row of a code.
///
/// # Example
/// ```
/// let row = formulas::diagnostics::explain("decimal-comma").unwrap();
/// assert_eq!(row.example, Some("V [kt] = 12,5\n"));
/// assert_eq!(formulas::diagnostics::explain("no-such-code"), None);
/// ```
#[must_use]
pub fn explain(code: &str) -> Option<&'static Code> {
    CODES.iter().copied().find(|row| row.code == code)
}

fn finding(located: &Located, tree: &Tree, text: &str, lines: &Lines<'_>) -> Finding {
    let statement = located.statement.and_then(|i| tree.statements.get(i));
    let (start, length) = statement.map_or((0, text.len()), |s| (s.start, s.length));
    let site = Site {
        tree,
        statement,
        text: text.get(start..start + length).unwrap_or(""),
        span: located.problem.span,
    };
    let (code, draft) = codes::draft(&site, &located.problem.fault);
    placed(code, draft, site.span, start, lines)
}

/// Counts lines and columns for a draft whose spans count from `start`.
fn placed(code: &Code, draft: Draft, span: Span, start: usize, lines: &Lines<'_>) -> Finding {
    let place = lines.shown(start + span.start as usize, start + span.end as usize);
    Finding {
        severity: draft.severity.unwrap_or(code.severity),
        code: code.code,
        line: place.line,
        column: place.column,
        length: place.length,
        column16: place.column16,
        length16: place.length16,
        message: draft.message,
        conditions: draft.conditions.map(|c| FoundConditions {
            count: c.count,
            first: c.first,
        }),
        fixes: draft
            .fixes
            .into_iter()
            .map(|f| fix(f, start, lines))
            .collect(),
    }
}

fn fix(mut draft: DraftFix, start: usize, lines: &Lines<'_>) -> Fix {
    draft.mends.sort_by_key(|m| m.span);
    let edits = draft.mends.into_iter().map(|mend| {
        let span = mend.span;
        let place = lines.whole(start + span.start as usize, start + span.end as usize);
        Edit {
            line: place.line,
            column: place.column,
            length: place.length,
            column16: place.column16,
            length16: place.length16,
            text: mend.text,
        }
    });
    Fix {
        title: draft.title,
        safe: draft.safe,
        edits: edits.collect(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_row_is_complete_and_named_once() {
        for (i, row) in CODES.iter().enumerate() {
            assert!(
                CODES.iter().skip(i + 1).all(|other| other.code != row.code),
                "{}",
                row.code
            );
            assert!(
                row.code.chars().all(|c| c.is_ascii_lowercase() || c == '-'),
                "{}",
                row.code
            );
            for sentence in [row.what, row.why] {
                assert!(
                    sentence.ends_with('.') && sentence.len() > 20,
                    "{}",
                    row.code
                );
            }
            for sheet in [row.example, row.fixed].into_iter().flatten() {
                assert!(sheet.ends_with('\n'), "{}", row.code);
            }
            assert_ne!(row.example, row.fixed.or(Some("")), "{}", row.code);
            assert_eq!(explain(row.code), Some(*row));
        }
    }
}
