//! Fixes applied to a text.

use crate::diagnostics::{Edit, Fix};
use crate::source::Source;
use std::ops::Range;

/// The text with a fix applied; `None` where an edit lies outside the text.
///
/// # Example
/// ```
/// use formulas::{Sheet, assist::fix};
/// let text = "V [kt] = 12,5\n";
/// let findings = Sheet::open(text).findings();
/// let fixed = fix::applied(text, &findings[0].fixes[0]);
/// assert_eq!(fixed.as_deref(), Some("V [kt] = 12.5\n"));
/// ```
#[must_use]
pub fn applied(text: &str, fix: &Fix) -> Option<String> {
    let source = Source::new(text);
    let mut edits: Vec<(Range<usize>, &str)> = fix
        .edits
        .iter()
        .map(|edit| Some((bytes(&source, edit)?, edit.text.as_str())))
        .collect::<Option<_>>()?;
    edits.sort_by_key(|(range, _)| std::cmp::Reverse(range.start));
    let mut out = text.to_string();
    for (range, by) in edits {
        out.replace_range(range, by);
    }
    Some(out)
}

/// The bytes that an edit replaces.
#[must_use]
pub fn bytes(source: &Source<'_>, edit: &Edit) -> Option<Range<usize>> {
    if edit.line == 0 || edit.column == 0 {
        return None;
    }
    if edit.line as usize > source.line_count().max(1) {
        return None;
    }
    let start = source.byte(edit.line, edit.column);
    let rest = source.text().get(start..)?;
    let ends = rest.char_indices().map(|(at, _)| at).chain([rest.len()]);
    let end = ends.map(|at| start + at).nth(edit.length as usize)?;
    Some(start..end)
}
