//! A line that is no statement.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "no-statement",
    severity: Severity::Error,
    what: "Every line begins with a statement word or gives a symbol its value.",
    why: "A line that is neither does nothing, and what it was to do is missing from the results.",
    example: Some("S [ft^2] = 142\nrequre S > 100 ft^2\n"),
    fixed: Some("S [ft^2] = 142\nrequire S > 100 ft^2\n"),
};

pub(super) fn draft(site: &Site<'_>, found: &str, looks_like: &Option<String>) -> Draft {
    let Some(word) = looks_like else {
        return as_note(site, found);
    };
    let draft = Draft::says(format!(
        "{} begins no statement. Did you mean {word}?",
        quoted(found)
    ));
    match site.find(found) {
        Some(at) => draft.offers(format!("Write {word}"), put(at, word)),
        None => draft,
    }
}

/// Most such lines are prose.
fn as_note(site: &Site<'_>, found: &str) -> Draft {
    let message = format!(
        "{} begins no statement, and the line gives no symbol a value.",
        quoted(found)
    );
    let line = site.text.len() - site.text.trim_start().len();
    Draft::says(message).offers("Make it a note", put(Span::new(line, line), "note "))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn a_slip_in_the_word_is_mended() {
        let fault = Fault::NoStatement {
            found: "requre".to_owned(),
            looks_like: Some("require".to_owned()),
        };
        let message = "“requre” begins no statement. Did you mean require?";
        let fixes = [("Write require", false, "require S > 100 ft^2")];
        check(
            "requre S > 100 ft^2",
            "requre S > 100 ft^2",
            fault,
            message,
            &fixes,
        );
    }

    #[test]
    fn prose_becomes_a_note() {
        let fault = Fault::NoStatement {
            found: "Balance".to_owned(),
            looks_like: None,
        };
        let message = "“Balance” begins no statement, and the line gives no symbol a value.";
        check(
            "  Balance only",
            "Balance",
            fault,
            message,
            &[("Make it a note", false, "  note Balance only")],
        );
    }
}
