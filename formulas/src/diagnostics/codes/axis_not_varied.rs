//! An axis over which the value does not vary.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "axis-not-varied",
    severity: Severity::Error,
    what: "A value is reduced, summed or picked along axes that it has.",
    why: "A sum over an axis that is not there would be a guess at how often to count the value.",
    example: Some("vary a: p | q\nx by a = 1 | 4\nn = 2\ny = x*sum(n over a)\n"),
    fixed: Some("vary a: p | q\nx by a = 1 | 4\nn = 2\ny = x*n*2\n"),
};

pub(super) fn draft(function: &str, axis: &str, refused: bool) -> Draft {
    let draft = Draft::says(match function {
        "at" => format!("The value does not vary over {axis}, so nothing can be picked along it."),
        _ if refused => format!("What {function} is given does not vary over {axis}."),
        _ => format!("What {function} is given does not vary over {axis}, so it stays as it is."),
    });
    if refused {
        draft
    } else {
        draft.severity(Severity::Advice)
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::diagnostics::finding::Severity;
    use crate::problem::Fault;

    fn found(function: &str, refused: bool, message: &str) -> Severity {
        let fault = Fault::AxisNotVaried {
            function: function.to_owned(),
            axis: "cg".to_owned(),
            refused,
        };
        check("y = max(n over cg)", "cg", fault, message, &[]).severity
    }

    #[test]
    fn is_an_error_or_an_advice() {
        assert_eq!(
            found("sum", true, "What sum is given does not vary over cg."),
            Severity::Error
        );
        let message = "What max is given does not vary over cg, so it stays as it is.";
        assert_eq!(found("max", false, message), Severity::Advice);
        let message = "The value does not vary over cg, so nothing can be picked along it.";
        assert_eq!(found("at", true, message), Severity::Error);
    }
}
