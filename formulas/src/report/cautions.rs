//! What every print says beside the numbers.

use super::Report;

/// The cautions that stand at the end of every print.
pub const CAUTIONS: &[&str] = &[
    "Results are for design work. The applicable airworthiness requirements, and the authority or the person or \
     organisation it recognises, decide.",
    "A structure is proved by test.",
    "Not covered: flutter and mass balance, fin, ground and water loads, recovery parachute, towing, fatigue, \
     aeroelastic effects, cloth wings that change shape, and strength itself.",
];

/// What stands under the title block of a sheet that shows a result in `lb`.
pub const POUND_IS_FORCE: &str = "lb is pound-force.";

/// Whether a unit that is shown has the pound in it.
#[must_use]
pub fn shows_pounds(report: &Report) -> bool {
    let units = report.quantities.iter().map(|q| &q.unit);
    let worst = report.requirements.iter().filter_map(|r| r.worst.as_ref());
    units
        .chain(worst.map(|w| &w.unit))
        .flatten()
        .any(|unit| has_pound(unit))
}

fn has_pound(unit: &str) -> bool {
    let names = unit.split(|c: char| !c.is_alphanumeric());
    names.into_iter().any(|name| name == "lb" || name == "lbs")
}

#[cfg(test)]
mod tests {
    use super::has_pound;

    #[test]
    fn the_pound_is_seen_in_compound_units_and_not_in_others() {
        for unit in ["lb", "lb/ft^2", "ft.lb", "lbs"] {
            assert!(has_pound(unit), "{unit}");
        }
        for unit in ["lbf", "lbm", "N", "slug/ft^3"] {
            assert!(!has_pound(unit), "{unit}");
        }
    }
}
