//! An argument of another dimension.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{a_dimension, is_what, short};
use crate::problem::Operand;
use engine::quantity::Dimension;

pub(super) const ROW: Code = Code {
    code: "argument-dimension",
    severity: Severity::Error,
    what: "Each argument of a function has the dimension that the function states.",
    why: "A speed in the place of a density gives a number all the same, and a wrong one.",
    example: Some("W [lb] = 560\nq = dynamic_pressure(W, rho0)\n"),
    fixed: Some("V [kt] = 90\nq = dynamic_pressure(V, rho0)\n"),
};

pub(super) fn draft(function: &str, argument: &str, wanted: Dimension, value: &Operand) -> Draft {
    let due = a_dimension(wanted);
    let text = short(&value.text);
    Draft::says(format!(
        "The argument {argument} of {function} is to be {due}, but {text} {}.",
        is_what(value)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, operand};
    use crate::problem::Fault;
    use engine::quantity::Dimension;

    #[test]
    fn names_what_is_due() {
        let text = "q = dynamic_pressure(W, rho0)";
        let fault = |wanted| Fault::ArgumentDimension {
            function: "dynamic_pressure".to_owned(),
            argument: "speed".to_owned(),
            wanted,
            value: operand(text, "W", Dimension::FORCE, Some("lb")),
        };
        let message =
            "The argument speed of dynamic_pressure is to be a speed, but W is a force (lb).";
        check(text, "W", fault(Dimension::SPEED), message, &[]);
        let message = "The argument speed of dynamic_pressure is to be a quantity in m^6, but W is a force (lb).";
        check(text, "W", fault(Dimension::of(6, 0, 0, 0, 0)), message, &[]);
    }
}
