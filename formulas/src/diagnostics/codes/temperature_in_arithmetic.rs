//! A temperature in degC or degF inside a formula.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "temperature-in-arithmetic",
    severity: Severity::Error,
    what: "Temperatures in degC and degF stand alone; in arithmetic a temperature is in K or degR.",
    why: "Twice 15 degC is not 30 degC: these scales do not begin at zero.",
    example: Some("T = 15 degC + 10 K\n"),
    fixed: Some("T = 288.15 K + 10 K\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, kelvin: &str) -> Draft {
    let message = format!(
        "{} does not count from zero, so nothing can be worked out with it; as an absolute temperature it is {kelvin}.",
        short(text)
    );
    let draft = Draft::says(message);
    match site.find(text) {
        Some(at) => draft.offers(format!("Write {kelvin}"), put(at, kelvin)),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn offers_kelvin() {
        let fault = Fault::TemperatureInArithmetic {
            text: "15 degC".to_owned(),
            kelvin: "288.15 K".to_owned(),
        };
        let message = "15 degC does not count from zero, so nothing can be worked out with it; as an absolute temperature it is 288.15 K.";
        check(
            "T = 15 degC + 10 K",
            "15 degC",
            fault,
            message,
            &[("Write 288.15 K", false, "T = 288.15 K + 10 K")],
        );
    }
}
