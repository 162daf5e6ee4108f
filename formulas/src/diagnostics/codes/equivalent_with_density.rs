//! An equivalent airspeed with a density other than rho0.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "equivalent-with-density",
    severity: Severity::Error,
    what: "An equivalent airspeed goes with the standard sea-level density.",
    why: "With the density at altitude the dynamic pressure comes out too small by the density ratio.",
    example: Some("V [KEAS] = 90\nrho = 1.1 kg/m^3\nq [Pa] = rho*V^2/2\n"),
    fixed: Some("V [KEAS] = 90\nq [Pa] = rho0*V^2/2\n"),
};

pub(super) fn draft(site: &Site<'_>, speed: &str, density: &str) -> Draft {
    let message = format!(
        "{} is an equivalent airspeed, which goes with rho0 and not with {}: tas_of_eas converts it.",
        short(speed),
        short(density)
    );
    let draft = Draft::says(message);
    match alone(site, density) {
        Some(at) => draft.offers("Write rho0", put(at, "rho0")),
        None => draft,
    }
}

/// Where the density stands as a word of its own.
fn alone(site: &Site<'_>, density: &str) -> Option<Span> {
    let at = site.find(density)?;
    let joins = |c: char| c.is_alphanumeric() || matches!(c, '_' | '\'' | '.');
    let before = site.text.get(..at.start as usize)?;
    let behind = site.text.get(at.end as usize..)?;
    let part = before.ends_with(joins) || behind.starts_with(joins) || behind.starts_with('(');
    (!part).then_some(at)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn density(density: &str) -> Fault {
        Fault::EquivalentWithDensity {
            speed: "V".to_owned(),
            density: density.to_owned(),
        }
    }

    #[test]
    fn offers_the_density_that_fits() {
        check(
            "q [Pa] = rho*V^2/2",
            "rho*V^2",
            density("rho"),
            "V is an equivalent airspeed, which goes with rho0 and not with rho: tas_of_eas converts it.",
            &[("Write rho0", false, "q [Pa] = rho0*V^2/2")],
        );
    }

    #[test]
    fn offers_nothing_where_the_density_is_elsewhere() {
        let message = "V is an equivalent airspeed, which goes with rho0 and not with rho: tas_of_eas converts it.";
        check(
            "q [Pa] = rho_x*V^2/2",
            "rho_x*V^2",
            density("rho"),
            message,
            &[],
        );
    }
}
