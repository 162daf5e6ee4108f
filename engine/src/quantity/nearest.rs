//! The unit that a misspelt one was probably meant to be.

use super::units;

/// Words and symbols of other hands, and the symbol of this table that they mean.
const ALSO_MEANT: &[(&str, &str)] = &[
    ("feet", "ft"),
    ("'", "ft"),
    ("inches", "in"),
    ("ins", "in"),
    ("\"", "in"),
    ("metre", "m"),
    ("metres", "m"),
    ("mtr", "m"),
    ("nmi", "NM"),
    ("sm", "mi"),
    ("litre", "L"),
    ("litres", "L"),
    ("l", "L"),
    ("ltr", "L"),
    ("gal", "USgal"),
    ("gallon", "USgal"),
    ("gallons", "USgal"),
    ("kgs", "kg"),
    ("kilo", "kg"),
    ("kilos", "kg"),
    ("gr", "g"),
    ("sec", "s"),
    ("secs", "s"),
    ("hr", "h"),
    ("hrs", "h"),
    ("mins", "min"),
    ("pound", "lb"),
    ("pounds", "lb"),
    ("#", "lb"),
    ("kip", "lb"),
    ("fps", "ft/s"),
    ("kmh", "km/h"),
    ("mps", "m/s"),
    ("KIAS", "KCAS"),
    ("keas", "KEAS"),
    ("degs", "deg"),
    ("\u{2032}", "arcmin"),
    ("C", "degC"),
    ("\u{b0}C", "degC"),
    ("celsius", "degC"),
    ("F", "degF"),
    ("\u{b0}F", "degF"),
    ("fahrenheit", "degF"),
    ("\u{b0}R", "degR"),
    ("percent", "%"),
    ("pct", "%"),
    ("torr", "mmHg"),
    ("tonne", "Mg"),
    ("um", "\u{b5}m"),
];

/// Prefixed symbols in common use, which a slip of the keys may have been aimed at.
const COMMON: &[&str] = &[
    "mm", "cm", "dm", "km", "kg", "mg", "kN", "MN", "kPa", "hPa", "MPa", "GPa", "mbar", "kW",
    "mrad", "ms", "mL", "kJ", "kHz",
];

/// The symbol of the unit that `text` was probably meant to be, or `None` where nothing is near.
///
/// First come units written out or in other symbols, then the same letters in another case, then symbols that one slip
/// of the keys away (a letter too many, too few, wrong, or two exchanged).
///
/// # Example
/// ```
/// use engine::quantity::nearest_unit;
/// assert_eq!(nearest_unit("feet"), Some("ft"));
/// assert_eq!(nearest_unit("KPA"), Some("kPa"));
/// assert_eq!(nearest_unit("slgu"), Some("slug"));
/// assert_eq!(nearest_unit("candela"), None);
/// ```
pub fn nearest_unit(text: &str) -> Option<&'static str> {
    let lower = text.to_lowercase();
    written_out(text, &lower)
        .or_else(|| symbols().find(|symbol| symbol.to_lowercase() == lower))
        .or_else(|| {
            symbols()
                .filter(|symbol| long_enough(symbol, text))
                .find(|symbol| one_slip(symbol, text))
        })
}

fn written_out(text: &str, lower: &str) -> Option<&'static str> {
    let exact = ALSO_MEANT
        .iter()
        .find(|(word, _)| *word == text)
        .or_else(|| {
            // The one-letter symbols are letter for letter: a small c is no temperature.
            ALSO_MEANT
                .iter()
                .find(|(word, _)| word.chars().count() > 1 && *word == lower)
        });
    exact.map(|(_, symbol)| *symbol).or_else(|| {
        let named =
            |row: &&units::UnitRow| lower == row.name || lower.strip_suffix('s') == Some(row.name);
        units::rows()
            .iter()
            .find(named)
            .and_then(|row| row.symbols.first().copied())
    })
}

fn symbols() -> impl Iterator<Item = &'static str> {
    let rows = units::rows()
        .iter()
        .flat_map(|row| row.symbols.iter().copied());
    rows.chain(COMMON.iter().copied())
}

/// One slip turns nearly any pair of letters into a unit, so only longer texts are guessed at.
fn long_enough(symbol: &str, text: &str) -> bool {
    symbol.chars().count() >= 3 && text.chars().count() >= 3
}

fn one_slip(a: &str, b: &str) -> bool {
    let (a, b): (Vec<char>, Vec<char>) = (a.chars().collect(), b.chars().collect());
    let (long, short) = if a.len() >= b.len() {
        (&a, &b)
    } else {
        (&b, &a)
    };
    let same = long.iter().zip(short).take_while(|(x, y)| x == y).count();
    let rest = |chars: &[char], from: usize| chars.get(from..).unwrap_or_default().to_vec();
    if long.len() == short.len() + 1 {
        return rest(long, same + 1) == rest(short, same);
    }
    let exchanged = long.get(same) == short.get(same + 1) && long.get(same + 1) == short.get(same);
    long.len() == short.len()
        && (rest(long, same + 1) == rest(short, same + 1)
            || (exchanged && rest(long, same + 2) == rest(short, same + 2)))
}

#[cfg(test)]
mod tests {
    use super::super::unit::Unit;
    use super::*;

    #[test]
    fn every_symbol_proposed_is_a_unit() {
        let compound = |symbol: &str| symbol.split('/').all(|part| Unit::named(part).is_some());
        assert!(symbols().all(compound));
        for (word, symbol) in ALSO_MEANT {
            assert!(compound(symbol), "{symbol}");
            assert_eq!(nearest_unit(word), Some(*symbol));
        }
    }

    #[test]
    fn slips_are_mended_and_strangers_left_alone() {
        for (typed, meant) in [
            ("Inch", "in"),
            ("knots", "kt"),
            ("KT", "kt"),
            ("degree", "deg"),
            ("inhg", "inHg"),
            ("USgall", "USgal"),
            ("KESA", "KEAS"),
            ("lbn", "lbm"),
        ] {
            assert_eq!(nearest_unit(typed), Some(meant), "{typed}");
        }
        for stranger in ["x", "", "mol", "furlong", "xy", "c"] {
            assert_eq!(nearest_unit(stranger), None, "{stranger}");
        }
    }
}
