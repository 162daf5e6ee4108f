//! Airspeeds of different kinds side by side.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{cannot, short, with_article};
use engine::quantity::SpeedKind;

pub(super) const ROW: Code = Code {
    code: "speed-kinds",
    severity: Severity::Error,
    what: "Equivalent, calibrated and true airspeeds are neither added to nor compared with one another.",
    why: "At altitude the three differ by a fifth and more.",
    example: Some("V [KEAS] = 90\nU [KTAS] = 100\nrequire V < U\n"),
    fixed: Some("V [KEAS] = 90\nU [KEAS] = 100\nrequire V < U\n"),
};

pub(super) fn draft(sign: &str, left: &(String, SpeedKind), right: &(String, SpeedKind)) -> Draft {
    let (left_is, right_is) = (with_article(left.1.name()), with_article(right.1.name()));
    let (left, right) = (short(&left.0), short(&right.0));
    Draft::says(format!(
        "{left} ({left_is}) and {right} ({right_is}) {}.",
        cannot(sign)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;
    use engine::quantity::SpeedKind;

    #[test]
    fn names_both_kinds() {
        let fault = Fault::SpeedKinds {
            sign: "<".to_owned(),
            left: ("V".to_owned(), SpeedKind::Equivalent),
            right: ("U".to_owned(), SpeedKind::True),
        };
        let message = "V (an equivalent airspeed) and U (a true airspeed) cannot be compared.";
        check("require V < U", "<", fault, message, &[]);
    }
}
