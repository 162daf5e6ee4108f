//! Numbers as shown: significant figures, trailing zeros kept, exponent form for the very large and very small.

/// Significant figures where the sheet says nothing.
pub const DIGITS: u8 = 4;
/// Most significant figures.
pub const DIGITS_MOST: u8 = 15;

/// From this power of ten on the exponent form is used.
const EXPONENT_FROM: i32 = 7;
/// Below this power of ten the exponent form is used.
const EXPONENT_BELOW: i32 = -4;
/// Digits that tell almost every number from a tie: a double has 17 that matter.
const TIE_DIGITS: usize = 40;
/// No double has more significant decimal digits than 767.
const EXACT_DIGITS: usize = 767;

/// The number with so many significant figures (1 to 15): `0.1000`, `123500`, `1.234e7`, `-1.234e-5`; zero is `0`.
///
/// Rounded from the exact binary value, ties away from zero. What is no finite number is shown as `-`.
///
/// ```
/// use formulas::numbers::shown;
/// assert_eq!(shown(142.0, 4), "142.0");
/// assert_eq!(shown(12_345_678.0, 4), "1.235e7");
/// assert_eq!(shown(0.5, 1), "0.5");
/// assert_eq!(shown(f64::NAN, 4), "-");
/// ```
#[must_use]
pub fn shown(value: f64, digits: u8) -> String {
    if !value.is_finite() {
        return "-".to_owned();
    }
    if value == 0.0 {
        return "0".to_owned();
    }
    let (figures, exponent) = rounded(value.abs(), digits.clamp(1, DIGITS_MOST) as usize);
    let sign = if value < 0.0 { "-" } else { "" };
    format!("{sign}{}", placed(&figures, exponent))
}

/// The labels of an axis of numbers: its values as shown, trailing zeros left off, with more figures where fewer would
/// not tell them apart, and the unit behind. Values that are equal as doubles stay equal.
///
/// ```
/// use formulas::numbers::labels;
/// assert_eq!(labels(&[-4.0, 0.0, 12.5], 4, Some("deg")), ["-4 deg", "0 deg", "12.5 deg"]);
/// assert_eq!(labels(&[1.00001, 1.00002], 4, None), ["1.00001", "1.00002"]);
/// ```
#[must_use]
pub fn labels(values: &[f64], digits: u8, unit: Option<&str>) -> Vec<String> {
    let shortened = |digits: u8| -> Vec<String> {
        let list = values.iter();
        list.map(|v| without_zeros(&shown(*v, digits))).collect()
    };
    let texts = (digits.clamp(1, DIGITS_MOST)..=DIGITS_MOST)
        .map(shortened)
        .find(|texts| all_differ(texts))
        .unwrap_or_else(|| values.iter().map(|v| v.to_string()).collect());
    match unit {
        Some(unit) => texts.iter().map(|t| format!("{t} {unit}")).collect(),
        None => texts,
    }
}

fn all_differ(texts: &[String]) -> bool {
    let mut sorted: Vec<&String> = texts.iter().collect();
    sorted.sort_unstable();
    sorted.windows(2).all(|pair| pair.first() != pair.last())
}

/// `12.50` is `12.5`, `1.200e7` is `1.2e7`.
fn without_zeros(text: &str) -> String {
    let (figures, exponent) = match text.find('e') {
        Some(at) => text.split_at(at),
        None => (text, ""),
    };
    if !figures.contains('.') {
        return text.to_owned();
    }
    let figures = figures.trim_end_matches('0').trim_end_matches('.');
    format!("{figures}{exponent}")
}

/// The figures of a positive number and the power of ten of the first.
fn rounded(value: f64, digits: usize) -> (String, i32) {
    let text = format!("{:.*e}", digits - 1, value);
    match tie(value, digits) {
        // Formatting rounds a tie to the even neighbour, so the figures below it are taken and counted up by one.
        Some(below) => counted_up(&below.0, below.1),
        None => parts(&text),
    }
}

/// The figures below the tie, where the number stands exactly half-way between two of that many figures.
fn tie(value: f64, digits: usize) -> Option<(String, i32)> {
    let halfway = |length: usize| {
        let (figures, exponent) = parts(&format!("{:.*e}", length - 1, value));
        let (kept, rest) = figures.split_at_checked(digits)?;
        let rest = rest.strip_prefix('5')?;
        rest.bytes()
            .all(|b| b == b'0')
            .then(|| (kept.to_owned(), exponent))
    };
    halfway(TIE_DIGITS)?;
    halfway(EXACT_DIGITS)
}

/// The figures of `1.234e-5` without the point, and the exponent.
fn parts(text: &str) -> (String, i32) {
    let (figures, exponent) = text.split_once('e').unwrap_or((text, "0"));
    let figures = figures.chars().filter(char::is_ascii_digit).collect();
    (figures, exponent.parse().unwrap_or(0))
}

/// The next number of as many figures.
fn counted_up(figures: &str, exponent: i32) -> (String, i32) {
    let mut bytes = figures.as_bytes().to_vec();
    for byte in bytes.iter_mut().rev() {
        if *byte == b'9' {
            *byte = b'0';
        } else {
            *byte += 1;
            return (text_of(bytes), exponent);
        }
    }
    bytes.insert(0, b'1');
    bytes.pop();
    (text_of(bytes), exponent + 1)
}

fn text_of(bytes: Vec<u8>) -> String {
    bytes.into_iter().map(char::from).collect()
}

/// The figures with point, zeros and exponent.
fn placed(figures: &str, exponent: i32) -> String {
    if !(EXPONENT_BELOW..EXPONENT_FROM).contains(&exponent) {
        return format!("{}e{exponent}", pointed(figures, 1));
    }
    match usize::try_from(exponent) {
        Ok(whole) => pointed(figures, whole + 1),
        Err(_) => {
            let zeros = exponent.unsigned_abs() as usize - 1;
            format!("0.{}{figures}", "0".repeat(zeros))
        }
    }
}

/// The figures with so many of them before the point, zeros filled in.
fn pointed(figures: &str, whole: usize) -> String {
    match figures.split_at_checked(whole) {
        Some((_, "")) => figures.to_owned(),
        Some((before, after)) => format!("{before}.{after}"),
        None => format!("{figures}{}", "0".repeat(whole - figures.len())),
    }
}

/// A unit as it is typed behind a number: ` ft`, ` /deg`, or as a factor where only brackets can hold it.
pub(crate) fn behind_number(unit: &str) -> String {
    let plain = unit.strip_prefix('1').filter(|rest| rest.starts_with('/'));
    match plain.unwrap_or(unit) {
        held if held.contains([' ', '*', '(']) => format!("*[{unit}]"),
        plain => format!(" {plain}"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn check(cases: &[(f64, u8, &str)]) {
        for (value, digits, text) in cases {
            assert_eq!(shown(*value, *digits), *text, "{value:e} with {digits}");
        }
    }

    #[test]
    fn figures_are_kept_with_their_zeros() {
        check(&[
            (142.0, 4, "142.0"),
            (4.6, 4, "4.600"),
            (0.1, 4, "0.1000"),
            (-0.055, 4, "-0.05500"),
            (1234.0, 4, "1234"),
            (123_456.0, 4, "123500"),
            (0.0, 4, "0"),
            (-0.0, 4, "0"),
            (9.0, 1, "9"),
            (1.0 / 3.0, 15, "0.333333333333333"),
        ]);
    }

    #[test]
    fn very_large_and_very_small_take_the_exponent_form() {
        check(&[
            (9_999_000.0, 4, "9999000"),
            (9_999_499.0, 4, "9999000"),
            (9_999_500.0, 4, "1.000e7"),
            (1e7, 4, "1.000e7"),
            (12_340_000.0, 4, "1.234e7"),
            (1e7, 1, "1e7"),
            (-1.234e-5, 4, "-1.234e-5"),
            (1e-4, 4, "0.0001000"),
            (0.000_099_994, 4, "9.999e-5"),
            (0.000_099_999, 4, "0.0001000"),
            (1.797e308, 2, "1.8e308"),
            (5e-324, 3, "4.94e-324"),
        ]);
    }

    /// The same as `toPrecision` of ECMA-262: of two numbers equally near the larger is taken, and nearness is judged
    /// on the exact binary value (1.005 is a little less than its decimal, 2.5 is exact).
    #[test]
    fn ties_go_away_from_zero_on_the_binary_value() {
        check(&[
            (2.5, 1, "3"),
            (-2.5, 1, "-3"),
            (0.5, 1, "0.5"),
            (1.5, 1, "2"),
            (1.25, 2, "1.3"),
            (1.35, 2, "1.4"),
            (1.005, 3, "1.00"),
            (1234.5, 4, "1235"),
            (1233.5, 4, "1234"),
            (9.5, 1, "10"),
            (99.5, 2, "100"),
            (0.125, 2, "0.13"),
            (1e21, 1, "1e21"),
            (25.0, 1, "30"),
            (4_503_599_627_370_497.5, 15, "4.50359962737050e15"),
        ]);
    }

    #[test]
    fn what_is_no_number_is_a_dash() {
        check(&[
            (f64::NAN, 4, "-"),
            (f64::INFINITY, 4, "-"),
            (crate::values::NONE, 4, "-"),
        ]);
    }

    #[test]
    fn labels_differ_with_as_few_figures_as_the_sheet_allows() {
        assert_eq!(labels(&[8.0, 10.0, 12.0], 1, None), ["8", "10", "12"]);
        assert_eq!(
            labels(&[0.1, 0.2, 0.1 + 0.2], 4, Some("rad")),
            ["0.1 rad", "0.2 rad", "0.3 rad"]
        );
        assert_eq!(labels(&[1e7, 2e7], 4, None), ["1e7", "2e7"]);
        assert_eq!(labels(&[100.0, 120.0], 4, Some("kt")), ["100 kt", "120 kt"]);
        assert_eq!(
            labels(&[1.0, 1.000_000_000_000_000_2], 4, None),
            ["1", "1.0000000000000002"]
        );
    }
}
