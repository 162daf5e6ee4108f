//! Something else than what was due.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "unexpected-text",
    severity: Severity::Error,
    what: "Each statement has the form that its first word or its sign = calls for.",
    why: "What does not fit the form cannot be read, and nothing is guessed into its place.",
    example: Some("S [ft^2] = * 4\n"),
    fixed: Some("S [ft^2] = 4\n"),
};

pub(super) fn draft(what: &str, found: &str) -> Draft {
    let what = in_marks(what);
    let found = found.trim();
    Draft::says(match what.strip_prefix("nothing ") {
        Some(place) => format!("{} stands {place}, where nothing is due.", quoted(found)),
        None if found.is_empty() => format!("The line stops where {what} is due."),
        None => format!("{} stands where {what} is due.", quoted(found)),
    })
}

/// Signs and words to be typed stand between backquotes in the fact.
fn in_marks(what: &str) -> String {
    let mut marks = ['“', '”'].into_iter().cycle();
    what.chars()
        .map(|c| {
            if c == '`' {
                marks.next().unwrap_or(c)
            } else {
                c
            }
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn says(text: &str, what: &'static str, found: &str, message: &str) {
        let fault = Fault::Expected {
            what,
            found: found.to_owned(),
        };
        check(text, found, fault, message, &[]);
    }

    #[test]
    fn says_what_was_due() {
        says(
            "S [ft^2] = * 4",
            "a value",
            "*",
            "“*” stands where a value is due.",
        );
        says(
            "vary cg: fwd |",
            "a label",
            "",
            "The line stops where a label is due.",
        );
        says(
            "x [m] 3",
            "`=` or `by`",
            "3",
            "“3” stands where “=” or “by” is due.",
        );
        says(
            "end n",
            "nothing behind `end`",
            "n",
            "“n” stands behind “end”, where nothing is due.",
        );
    }
}
