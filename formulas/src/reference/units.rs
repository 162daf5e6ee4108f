//! Units in words.

use super::dimension_name;
use crate::report::json::plain_number;
use crate::syntax::UnitText;
use engine::quantity::{SpeedKind, Unit, UnitRow};

/// A row of the unit list: symbols, name, factor, source.
#[must_use]
pub fn unit_row(row: &UnitRow) -> String {
    let prefixes = if row.prefixes {
        "; takes SI prefixes"
    } else {
        ""
    };
    format!(
        "{}: {}, {}{prefixes}; {}",
        row.symbols.join(" "),
        row.name,
        unit_value(Unit::of_row(row)),
        row.source
    )
}

/// What a unit expression means: `1 lb is 4.4482216152605 kg.m/s^2; force`.
///
/// # Errors
/// A sentence where a name in it is no unit, or its powers are too large.
pub fn unit_meaning(typed: &UnitText) -> Result<String, String> {
    let unit = composed(typed)?;
    Ok(format!(
        "1 {} is {}; {}",
        typed.text,
        unit_value(unit),
        dimension_name(unit.dimension)
    ))
}

/// The unit that the factors make.
fn composed(typed: &UnitText) -> Result<Unit, String> {
    let mut whole: Option<Unit> = None;
    for factor in &typed.factors {
        let name = &factor.name.text;
        let unit = Unit::named(name).ok_or_else(|| format!("there is no unit `{name}`"))?;
        let unit = if factor.power == 1 {
            Some(unit)
        } else {
            unit.power(factor.power)
        };
        whole = match (whole, unit) {
            (None, unit) => unit,
            (Some(whole), Some(unit)) => whole.times(unit),
            (Some(_), None) => None,
        };
        if whole.is_none() {
            return Err(format!("the powers in `{}` are too large", typed.text));
        }
    }
    let whole = whole.unwrap_or(Unit::ONE);
    match &typed.kind {
        None => Ok(whole),
        Some(word) => SpeedKind::of_word(&word.text)
            .map(|kind| whole.of_kind(kind))
            .ok_or_else(|| format!("`{}` is no kind of airspeed", word.text)),
    }
}

/// `4.4482216152605 kg.m/s^2`, with the zero of a temperature scale and the kind of a speed.
#[must_use]
pub fn unit_value(unit: Unit) -> String {
    let mut text = format!(
        "{} {}",
        plain_number(unit.factor.value()),
        unit.dimension.symbols()
    );
    if unit.absolute {
        text += &format!(", its zero at {} K", plain_number(unit.to_si(0.0)));
    }
    if let Some(kind) = unit.speed_kind {
        text += &format!(" ({})", kind.name());
    }
    text
}
