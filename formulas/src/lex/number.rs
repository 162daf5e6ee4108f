//! Numbers and the units behind them, as combinators over the rest of a line.

use super::characters::{is_name_part, is_name_start, raised};
use super::words::is_word;
use nom::branch::alt;
use nom::bytes::complete::{take_while, take_while1};
use nom::character::complete::{char, digit1, one_of, satisfy};
use nom::combinator::{not, opt, peek, recognize, verify};
use nom::sequence::{pair, preceded};
use nom::{IResult, Parser};

/// A number as typed, and whether it has the form of one.
///
/// ```text
/// 12   1.5   .5   2e-3        5.   1_000   1.2.3
/// ```
pub(super) fn number(input: &str) -> IResult<&str, (&str, bool)> {
    let (rest, well) = recognize((mantissa, opt(exponent))).parse(input)?;
    let Ok((rest, _)) = broken_tail(rest) else {
        return Ok((rest, (well, true)));
    };
    let length = input.len() - rest.len();
    Ok((rest, (input.get(..length).unwrap_or(well), false)))
}

fn mantissa(input: &str) -> IResult<&str, &str> {
    alt((
        recognize((digit1, opt((char('.'), digit1)))),
        recognize((char('.'), digit1)),
    ))
    .parse(input)
}

fn exponent(input: &str) -> IResult<&str, &str> {
    recognize((one_of("eE"), opt(one_of("+-")), digit1)).parse(input)
}

/// What follows a number without a blank and cannot: a point, or signs that group digits.
fn broken_tail(input: &str) -> IResult<&str, &str> {
    let (_, _) = alt((
        recognize(char('.')),
        recognize((one_of("_'\u{2019}"), satisfy(|c| c.is_ascii_digit()))),
    ))
    .parse(input)?;
    let run =
        take_while1(|c: char| c.is_ascii_digit() || matches!(c, '.' | '_' | '\'' | '\u{2019}'));
    recognize((run, opt(exponent))).parse(input)
}

/// The unit that stands right at the start of `input`: unit names joined by `.`, `·`, `-` or `/`, each with an
/// optional whole power. With `after_blank` it may begin with a `/` directly before a name.
///
/// ```text
/// ft   kg/m^3   ft-lb   N·m   m²   /deg (after a blank)
/// ```
///
/// A second `/` before a name is taken in, so that the one problem is that there are two.
pub(super) fn unit(input: &str, after_blank: bool) -> IResult<&str, &str> {
    let start = input;
    let (mut rest, _) = if after_blank {
        preceded(opt(pair(char('/'), peek(unit_name))), factor).parse(input)?
    } else {
        factor(input)?
    };
    while let Ok((further, _)) = preceded(joint, factor).parse(rest) {
        rest = further;
    }
    Ok((rest, start.get(..start.len() - rest.len()).unwrap_or("")))
}

/// The signs between two unit names.
pub(crate) fn joint(input: &str) -> IResult<&str, char> {
    one_of("./-\u{b7}\u{22c5}").parse(input)
}

/// A unit name and its power.
fn factor(input: &str) -> IResult<&str, (&str, Option<&str>)> {
    pair(unit_name, opt(power)).parse(input)
}

/// A name where a unit is due: `ft`, `°C`, `%`; also a name that is no unit. Words of the language are none.
pub(crate) fn unit_name(input: &str) -> IResult<&str, &str> {
    let letters = recognize(pair(
        satisfy(|c| is_name_start(c) || c == '\u{b0}'),
        take_while(is_name_part),
    ));
    alt((
        recognize(char('%')),
        verify(letters, |name: &str| !is_word(name)),
    ))
    .parse(input)
}

/// A whole power: `^2`, `^-1`, `²`, `⁻¹`. `^0.5` is none, so that the sign stays one of the expression.
pub(crate) fn power(input: &str) -> IResult<&str, &str> {
    let fraction = alt((
        recognize(pair(char('.'), satisfy(|c| c.is_ascii_digit()))),
        exponent,
    ));
    let typed = recognize((char('^'), opt(one_of("-\u{2212}")), digit1, not(fraction)));
    alt((typed, raised_power)).parse(input)
}

/// A power in raised digits.
pub(super) fn raised_power(input: &str) -> IResult<&str, &str> {
    let digit = |c: char| raised(c).is_some_and(|digit| digit != '-');
    recognize(pair(opt(char('\u{207b}')), take_while1(digit))).parse(input)
}

/// The value of a power as typed, its sign and the `^` included. A power too large for any unit stays large.
pub(crate) fn power_value(text: &str) -> i32 {
    const LARGE: i32 = 9_999;
    let mut value: i32 = 0;
    let mut negative = false;
    for character in text.chars() {
        let plain = raised(character).unwrap_or(character);
        match plain.to_digit(10) {
            Some(digit) => value = (value * 10 + digit as i32).min(LARGE),
            None => negative |= matches!(plain, '-' | '\u{2212}'),
        }
    }
    if negative { -value } else { value }
}
