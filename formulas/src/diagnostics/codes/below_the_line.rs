//! A unit whose factors behind the / are all below the line.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "below-the-line",
    severity: Severity::Advice,
    what: "A unit with several factors behind its sign / is shown as it is read.",
    why: "kg/m.s may have been meant as (kg/m) s.",
    example: Some("mu = 2 kg/m.s\n"),
    fixed: Some("mu = 2 kg.m^-1.s^-1\n"),
};

pub(super) fn draft(text: &str, meaning: &str) -> Draft {
    Draft::says(format!(
        "{text} is read as {meaning}: all that follows the / is below the line."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn shows_the_reading() {
        let fault = Fault::BelowTheLine {
            text: "kg/m.s".to_owned(),
            meaning: "kg/(m s)".to_owned(),
        };
        let message = "kg/m.s is read as kg/(m s): all that follows the / is below the line.";
        check("mu = 2 kg/m.s", "kg/m.s", fault, message, &[]);
    }
}
