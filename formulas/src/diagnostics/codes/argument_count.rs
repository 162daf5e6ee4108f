//! Too few or too many arguments.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::counted;

pub(super) const ROW: Code = Code {
    code: "argument-count",
    severity: Severity::Error,
    what: "A function is given as many arguments as it takes.",
    why: "Arguments stand by position, so one left out moves all that follow.",
    example: Some("y = sqrt(4, 2)\n"),
    fixed: Some("y = sqrt(4)\n"),
};

pub(super) fn draft(function: &str, least: usize, most: usize, found: usize) -> Draft {
    let takes = match (least, most) {
        (_, usize::MAX) => format!("at least {}", counted(least as u64, "argument")),
        _ if least == most => counted(least as u64, "argument"),
        _ => format!("{least} to {}", counted(most as u64, "argument")),
    };
    let given = match found {
        0 => "none is given".to_owned(),
        1 => "1 is given".to_owned(),
        _ => format!("{found} are given"),
    };
    Draft::says(format!("{function} takes {takes}, and {given}."))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn counts_both() {
        for (least, most, found, message) in [
            (1, 1, 2, "hypot takes 1 argument, and 2 are given."),
            (2, 3, 1, "hypot takes 2 to 3 arguments, and 1 is given."),
            (
                1,
                usize::MAX,
                0,
                "hypot takes at least 1 argument, and none is given.",
            ),
        ] {
            let fault = Fault::ArgumentCount {
                function: "hypot".to_owned(),
                least,
                most,
                found,
            };
            check("y = hypot(4, 2)", "hypot", fault, message, &[]);
        }
    }
}
