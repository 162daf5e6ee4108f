//! A sign of another notation.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "foreign-sign",
    severity: Severity::Error,
    what: "Signs of other notations with one clear meaning, such as == or **, are named with the sign used here.",
    why: "They are habits of the hand, and the line means something only with the sign of this language.",
    example: Some("a = 3**2\n"),
    fixed: Some("a = 3^2\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &str) -> Draft {
    Draft::says(format!(
        "{} is no sign here; write {}.",
        quoted(text),
        quoted(mend)
    ))
    .mends(format!("Write {mend}"), site.replace(set_off(site, mend)))
}

/// A word that takes the place of a sign needs blanks where letters or digits touch it.
fn set_off(site: &Site<'_>, mend: &str) -> String {
    let joins = |c: char| c.is_alphanumeric() || matches!(c, '_' | '\'' | '.' | '"');
    let word = mend.starts_with(char::is_alphabetic);
    let before = if word && site.before().ends_with(joins) {
        " "
    } else {
        ""
    };
    let behind = if word && site.behind().starts_with(joins) {
        " "
    } else {
        ""
    };
    format!("{before}{mend}{behind}")
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn sign(text: &str, mend: &str) -> Fault {
        Fault::ForeignSign {
            text: text.to_owned(),
            mend: mend.to_owned(),
        }
    }

    #[test]
    fn a_sign_is_put_for_a_sign() {
        check(
            "a = 3**2",
            "**",
            sign("**", "^"),
            "“**” is no sign here; write “^”.",
            &[("Write ^", true, "a = 3^2")],
        );
    }

    #[test]
    fn a_word_is_set_off_by_blanks() {
        for (text, mended) in [("a&&b", "a and b"), ("(a) && (b)", "(a) and (b)")] {
            check(
                text,
                "&&",
                sign("&&", "and"),
                "“&&” is no sign here; write “and”.",
                &[("Write and", true, mended)],
            );
        }
    }
}
