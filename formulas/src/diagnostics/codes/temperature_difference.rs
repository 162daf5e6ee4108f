//! A temperature where a difference is due.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "temperature-difference",
    severity: Severity::Error,
    what: "Steps, tolerances, spreads and deviations of temperature are in K or degR.",
    why: "A deviation of 10 degC would be 283 K.",
    example: Some("air = standard_atmosphere(0 m, 10 degC)\n"),
    fixed: Some("air = standard_atmosphere(0 m, 10 K)\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str) -> Draft {
    let draft = Draft::says(format!(
        "{} is a temperature and not a difference; differences are in K or degR.",
        short(text)
    ));
    let step = ["degC", "degF"]
        .into_iter()
        .zip(["K", "degR"])
        .find(|(scale, _)| text.contains(scale));
    match step.and_then(|(scale, step)| Some((site.find(scale)?, step))) {
        Some((at, step)) => draft.offers(format!("Write it in {step}"), put(at, step)),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn offers_the_unit_of_differences() {
        for (scale, step) in [("degC", "K"), ("degF", "degR")] {
            let typed = format!("10 {scale}");
            check(
                &format!("air = standard_atmosphere(0 m, {typed})"),
                &typed,
                Fault::TemperatureDifference {
                    text: typed.clone(),
                },
                &format!(
                    "{typed} is a temperature and not a difference; differences are in K or degR."
                ),
                &[(
                    &format!("Write it in {step}"),
                    false,
                    &format!("air = standard_atmosphere(0 m, 10 {step})"),
                )],
            );
        }
    }
}
