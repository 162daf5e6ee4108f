//! A sign that the language does not use.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "unknown-character",
    severity: Severity::Error,
    what: "Every sign outside texts, headings, notes and remarks has a meaning in the language.",
    why: "A sign without a meaning, often one that cannot be seen and came along with pasted text, leaves the line unread.",
    example: Some("S [ft^2] = 142 § 2\n"),
    fixed: Some("S [ft^2] = 142 * 2\n"),
};

pub(super) fn draft(site: &Site<'_>, character: char) -> Draft {
    if !is_invisible(character) {
        return Draft::says(format!("The sign “{character}” has no meaning here."));
    }
    let number = u32::from(character);
    Draft::says(format!(
        "A character that cannot be seen (U+{number:04X}) stands here and has no meaning."
    ))
    .offers("Take it out", site.replace(""))
}

/// Blanks of other kinds, control characters, and the marks that only steer how text is set.
fn is_invisible(c: char) -> bool {
    c.is_control()
        || c.is_whitespace()
        || matches!(c, '\u{ad}' | '\u{200b}'..='\u{200f}' | '\u{202a}'..='\u{202e}' | '\u{2060}'..='\u{206f}' | '\u{feff}')
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_sign() {
        let fault = Fault::UnknownCharacter { character: '§' };
        check(
            "S = 142 § 2",
            "§",
            fault,
            "The sign “§” has no meaning here.",
            &[],
        );
    }

    #[test]
    fn offers_to_take_out_what_cannot_be_seen() {
        check(
            "S = 1\u{200b}42",
            "\u{200b}",
            Fault::UnknownCharacter {
                character: '\u{200b}',
            },
            "A character that cannot be seen (U+200B) stands here and has no meaning.",
            &[("Take it out", false, "S = 142")],
        );
    }
}
