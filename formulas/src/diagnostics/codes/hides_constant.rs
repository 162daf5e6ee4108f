//! A symbol with the name of a constant.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "hides-constant",
    severity: Severity::Advice,
    what: "A symbol of the sheet is not called like one of the constants.",
    why: "A reader takes g0 or rho0 for the constant, while the sheet means its own.",
    example: Some("rho0 [kg/m^3] = 1.2\nq = rho0/2*(30 m/s)^2\n"),
    fixed: Some("rho_site [kg/m^3] = 1.2\nq = rho_site/2*(30 m/s)^2\n"),
};

pub(super) fn draft(name: &str) -> Draft {
    Draft::says(format!(
        "In this sheet {name} is what this line says and no longer the constant of that name."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_constant() {
        let fault = Fault::HidesConstant {
            name: "g0".to_owned(),
        };
        let message =
            "In this sheet g0 is what this line says and no longer the constant of that name.";
        check("g0 [m/s^2] = 9.8", "g0", fault, message, &[]);
    }
}
