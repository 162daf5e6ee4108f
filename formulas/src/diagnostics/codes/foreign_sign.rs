//! A sign of another notation.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{quoted, short};

pub(super) const ROW: Code = Code {
    code: "foreign-sign",
    severity: Severity::Error,
    what: "Signs of other notations with one clear meaning, such as == or **, are named with the sign used here.",
    why: "They are habits of the hand, and the line means something only with the sign of this language.",
    example: Some("a = 3**2\n"),
    fixed: Some("a = 3^2\n"),
};

/// Signs that stand for something else in one notation or another, or that come in pairs.
const SEVERAL_MEANINGS: [&str; 14] = [
    "<=>", "=>", "&", "//", "/*", "#", "~=", "!", "~", "{", "}", ".", "\u{2022}", "\u{2213}",
];

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &str) -> Draft {
    let (typed, due) = (quoted(text), quoted(mend));
    let curved = text.starts_with(|c| "“”„‟«»‘’‚‹›".contains(c));
    let message = if curved {
        format!(
            "A text stands in straight quotation marks: {}.",
            short(mend)
        )
    } else {
        format!("{typed} is no sign here; write {due}.")
    };
    let safe = !SEVERAL_MEANINGS.contains(&text);
    let title = format!("Write {}", short(mend));
    Draft::says(message).fix(title, safe, vec![site.replace(set_off(site, mend))])
}

/// A word that takes the place of a sign needs blanks where letters or digits touch it.
fn set_off(site: &Site<'_>, mend: &str) -> String {
    if !mend.starts_with(char::is_alphabetic) {
        return mend.to_owned();
    }
    let joins = |c: char| c.is_alphanumeric() || matches!(c, '_' | '\'' | '.' | '"');
    let before = if site.before().ends_with(joins) {
        " "
    } else {
        ""
    };
    let behind = if site.behind().starts_with([' ', '\t']) {
        ""
    } else {
        " "
    };
    format!("{before}{}{behind}", mend.trim())
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
    fn a_sign_with_several_meanings_is_only_offered() {
        let fixes = [("Write not", false, "require not a")];
        check(
            "require !a",
            "!",
            sign("!", "not "),
            "“!” is no sign here; write “not”.",
            &fixes,
        );
        let fixes = [("Write ;", false, "a = 1 ; remark")];
        check(
            "a = 1 # remark",
            "#",
            sign("#", ";"),
            "“#” is no sign here; write “;”.",
            &fixes,
        );
    }

    #[test]
    fn curved_quotation_marks_become_straight() {
        let message = "A text stands in straight quotation marks: \"2412\".";
        let fixes = [("Write \"2412\"", true, "s = thin_section(\"2412\")")];
        check(
            "s = thin_section(“2412”)",
            "“2412”",
            sign("“2412”", "\"2412\""),
            message,
            &fixes,
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
