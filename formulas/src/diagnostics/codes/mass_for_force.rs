//! A mass where a force is due.

use crate::diagnostics::draft::{Draft, put, put_behind};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{bracketed, short};
use crate::problem::Operand;
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "mass-for-force",
    severity: Severity::Error,
    what: "A weight that acts as a force is a force.",
    why: "A scale shows kilograms, but a load is newtons or pounds: left as it is, the balance would be wrong by g0.",
    example: Some("W [N] = 600 kg\n"),
    fixed: Some("W [N] = 600 kg*g0\n"),
};

pub(super) fn draft(value: &Operand, is_number: bool) -> Draft {
    let text = short(&value.text);
    let draft = Draft::says(format!("{text} is a mass, and a force is due here."));
    let whole = bracketed(&value.text);
    let draft = if whole == value.text {
        draft.offers(format!("Write {text}*g0"), put_behind(value.span, "*g0"))
    } else {
        draft.offers(
            format!("Write {}*g0", short(&whole)),
            put(value.span, format!("{whole}*g0")),
        )
    };
    match force_unit(&value.text).filter(|_| is_number) {
        Some((typed, force)) => {
            let start = value.span.end.saturating_sub(typed.len() as u32);
            let unit = Span {
                start,
                end: value.span.end,
            };
            draft.offers(
                format!("Write {}{force}", text.strip_suffix(typed).unwrap_or(&text)),
                put(unit, force),
            )
        }
        None => draft,
    }
}

/// The unit of mass at the end, and the unit of the force that it weighs.
fn force_unit(text: &str) -> Option<(&'static str, &'static str)> {
    let unit = text
        .trim_start_matches(|c: char| c.is_ascii_digit() || c == '.')
        .trim_start();
    match unit {
        "kg" => Some(("kg", "kgf")),
        "lbm" => Some(("lbm", "lb")),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, operand};
    use crate::problem::Fault;
    use engine::quantity::Dimension;

    fn mass(text: &str, part: &str, is_number: bool) -> Fault {
        Fault::MassForForce {
            value: operand(text, part, Dimension::MASS, Some("kg")),
            is_number,
        }
    }

    #[test]
    fn a_number_becomes_a_weight_in_two_ways() {
        let text = "W [N] = 600 kg";
        check(
            text,
            "600 kg",
            mass(text, "600 kg", true),
            "600 kg is a mass, and a force is due here.",
            &[
                ("Write 600 kg*g0", false, "W [N] = 600 kg*g0"),
                ("Write 600 kgf", false, "W [N] = 600 kgf"),
            ],
        );
        let text = "W [lb] = 560 lbm";
        check(
            text,
            "560 lbm",
            mass(text, "560 lbm", true),
            "560 lbm is a mass, and a force is due here.",
            &[
                ("Write 560 lbm*g0", false, "W [lb] = 560 lbm*g0"),
                ("Write 560 lb", false, "W [lb] = 560 lb"),
            ],
        );
    }

    #[test]
    fn a_symbol_is_multiplied() {
        let text = "P = L + m";
        let fixes = [("Write m*g0", false, "P = L + m*g0")];
        check(
            text,
            "m",
            mass(text, "m", false),
            "m is a mass, and a force is due here.",
            &fixes,
        );
    }

    #[test]
    fn a_sum_is_bracketed() {
        let text = "P [N] = m + m_fuel";
        let fixes = [("Write (m + m_fuel)*g0", false, "P [N] = (m + m_fuel)*g0")];
        let message = "m + m_fuel is a mass, and a force is due here.";
        check(
            text,
            "m + m_fuel",
            mass(text, "m + m_fuel", false),
            message,
            &fixes,
        );
    }
}
