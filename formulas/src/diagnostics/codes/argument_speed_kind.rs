//! An argument of another kind of airspeed.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{conversion, with_article};
use engine::quantity::SpeedKind;

pub(super) const ROW: Code = Code {
    code: "argument-speed-kind",
    severity: Severity::Error,
    what: "An argument that is an airspeed is of the kind that the function states, or of none.",
    why: "A function that means the true airspeed is off by the density ratio when given the equivalent one.",
    example: Some("V [KTAS] = 90\nq = dynamic_pressure_of_eas(V)\n"),
    fixed: Some("V [KEAS] = 90\nq = dynamic_pressure_of_eas(V)\n"),
};

pub(super) fn draft(
    function: &str,
    argument: &str,
    wanted: Option<SpeedKind>,
    given: SpeedKind,
) -> Draft {
    let is = with_article(given.name());
    let (due, rest) = match wanted {
        Some(kind) => (
            with_article(kind.name()),
            format!(": {} it", conversion(given, kind)),
        ),
        None => ("a speed of no kind".to_owned(), String::new()),
    };
    Draft::says(format!(
        "The argument {argument} of {function} is to be {due}, but {is} is given{rest}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;
    use engine::quantity::SpeedKind;

    #[test]
    fn names_both_kinds() {
        let text = "q = dynamic_pressure_of_eas(V)";
        let fault = |wanted| Fault::ArgumentSpeedKind {
            function: "dynamic_pressure_of_eas".to_owned(),
            argument: "eas".to_owned(),
            wanted,
            given: SpeedKind::True,
        };
        let message = "The argument eas of dynamic_pressure_of_eas is to be an equivalent airspeed, but a true airspeed is given: eas_of_tas converts it.";
        check(text, "V", fault(Some(SpeedKind::Equivalent)), message, &[]);
        let message = "The argument eas of dynamic_pressure_of_eas is to be a speed of no kind, but a true airspeed is given.";
        check(text, "V", fault(None), message, &[]);
    }
}
