//! A calibrated airspeed in a dynamic pressure.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "calibrated-in-pressure",
    severity: Severity::Error,
    what: "A dynamic pressure is worked out from an equivalent airspeed with rho0, or from a true one with the density.",
    why: "The calibrated airspeed holds the compressibility of standard sea-level air and gives too high a pressure.",
    example: Some("V [KCAS] = 90\nq = dynamic_pressure(V, rho0)\n"),
    fixed: Some("V [KEAS] = 90\nq = dynamic_pressure(V, rho0)\n"),
};

pub(super) fn draft(speed: &str) -> Draft {
    let speed = short(speed);
    let message = format!(
        "{speed} is a calibrated airspeed, and a dynamic pressure rests on the equivalent one: eas_of_cas converts it."
    );
    Draft::says(message)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_what_converts() {
        let fault = Fault::CalibratedInPressure {
            speed: "V".to_owned(),
        };
        let message = "V is a calibrated airspeed, and a dynamic pressure rests on the equivalent one: eas_of_cas converts it.";
        check("q = dynamic_pressure(V, rho0)", "V", fault, message, &[]);
    }
}
