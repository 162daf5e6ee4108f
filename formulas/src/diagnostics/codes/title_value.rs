//! A line of the title block that takes something else.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "title-value",
    severity: Severity::Error,
    what: "digits takes a whole number from 1 to 15, sources the word required, units names of units.",
    why: "These lines change how the whole sheet is shown or judged, so a slip in them must not pass unseen.",
    example: Some("digits 20\n"),
    fixed: Some("digits 12\n"),
};

pub(super) fn draft(word: &str, found: &str) -> Draft {
    let due = match word {
        "digits" => "a whole number from 1 to 15",
        "sources" => "the word required",
        "units" => "names of units, such as lb ft kt",
        _ => "another text",
    };
    let found = if found.trim().is_empty() {
        "nothing stands there".to_owned()
    } else {
        format!("{} stands there", quoted(found))
    };
    Draft::says(format!(
        "The line {} takes {due}, and {found}.",
        quoted(word)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_what_the_line_takes() {
        for (word, found, message) in [
            (
                "digits",
                "20",
                "The line “digits” takes a whole number from 1 to 15, and “20” stands there.",
            ),
            (
                "sources",
                "maybe",
                "The line “sources” takes the word required, and “maybe” stands there.",
            ),
            (
                "units",
                "",
                "The line “units” takes names of units, such as lb ft kt, and nothing stands there.",
            ),
        ] {
            let fault = Fault::TitleValue {
                word: word.to_owned(),
                found: found.to_owned(),
            };
            check(&format!("{word} {found}"), found, fault, message, &[]);
        }
    }
}
