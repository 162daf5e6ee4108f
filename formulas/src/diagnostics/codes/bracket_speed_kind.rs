//! A bracket of another kind of airspeed.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{conversion, with_article};
use engine::quantity::SpeedKind;

pub(super) const ROW: Code = Code {
    code: "bracket-speed-kind",
    severity: Severity::Error,
    what: "The kind of airspeed in a bracket is that of the value.",
    why: "Writing KTAS over an equivalent airspeed does not convert it.",
    example: Some("V [KEAS] = 90\nU [KTAS] = V\n"),
    fixed: Some("V [KEAS] = 90\nU [KTAS] = tas_of_eas(V, 1.1 kg/m^3)\n"),
};

pub(super) fn draft(symbol: &str, bracket: SpeedKind, value: SpeedKind) -> Draft {
    let (due, is) = (with_article(bracket.name()), with_article(value.name()));
    let converts = conversion(value, bracket);
    Draft::says(format!(
        "{symbol} is to be {due}, but its value is {is}: {converts} it."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;
    use engine::quantity::SpeedKind;

    #[test]
    fn names_what_converts() {
        use SpeedKind::{Calibrated, Equivalent, True};
        for (bracket, value, message) in [
            (
                True,
                Equivalent,
                "U is to be a true airspeed, but its value is an equivalent airspeed: tas_of_eas converts it.",
            ),
            (
                Equivalent,
                True,
                "U is to be an equivalent airspeed, but its value is a true airspeed: eas_of_tas converts it.",
            ),
            (
                True,
                Calibrated,
                "U is to be a true airspeed, but its value is a calibrated airspeed: eas_of_cas and then tas_of_eas convert it.",
            ),
        ] {
            let fault = Fault::BracketSpeedKind {
                symbol: "U".to_owned(),
                bracket,
                value,
            };
            check("U [KTAS] = V", "V", fault, message, &[]);
        }
    }
}
