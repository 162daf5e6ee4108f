//! Numbers with their units, compound numbers, and the forms of numbers that are refused.

use super::cursor::{Cursor, Inside, Node, Read, clipped, node, unread};
use super::unit::read_unit;
use crate::problem::Fault;
use crate::span::Span;
use crate::syntax::{ExprKind, UnitText};
use crate::token::{Token, TokenKind};
use engine::quantity::Unit;

impl Cursor<'_> {
    /// A number with what belongs to it.
    ///
    /// ```text
    /// 4.6 ft   0.105 /deg   12 ft 6 in      5.   1 000   1_000   12,5   65 [kt]
    /// ```
    #[inline(never)]
    pub(super) fn number(&mut self, token: Token) -> Read<Node> {
        let first = self.at;
        self.bump();
        if self.refused(token) {
            self.eat(TokenKind::Unit);
            return Ok(unread(self.since(first)));
        }
        let mut fine = true;
        let unit = self.opt_unit(&mut fine);
        if unit.is_none() && self.bracket_behind() {
            return Ok(unread(self.since(first)));
        }
        let mut more = Vec::new();
        while let Some((value, unit)) = self.opt_further(unit.as_ref(), &more) {
            more.push((value, unit));
        }
        let span = self.since(first);
        let Some(value) = number_value(self.word_of(token)) else {
            return self.fail(
                token.span,
                Fault::Expected {
                    what: "a number of the size that a computer holds",
                    found: clipped(self.word_of(token)),
                },
            );
        };
        let kind = if fine {
            ExprKind::Number { value, unit, more }
        } else {
            ExprKind::Error
        };
        Ok(node(span, kind))
    }

    fn opt_unit(&mut self, fine: &mut bool) -> Option<UnitText> {
        let token = self.peek().filter(|token| token.kind == TokenKind::Unit)?;
        self.bump();
        let (unit, read) = self.unit_of(token);
        *fine &= read;
        Some(unit)
    }

    /// `65 [kt]`.
    fn bracket_behind(&mut self) -> bool {
        let Some(token) = self.peek().filter(|token| token.kind == TokenKind::Bracket) else {
            return false;
        };
        self.bump();
        let unit = self.unit_of(token).0.text;
        self.note(token.span, Fault::BracketAfterNumber { unit });
        true
    }

    /// Whether the number just passed has a form that is refused; what belongs to it is passed as well.
    fn refused(&mut self, token: Token) -> bool {
        let first = self.at - 1;
        let fault = if token.kind == TokenKind::BrokenNumber {
            broken(self.word_of(token))
        } else if let Some(fault) = self.decimal_comma(first) {
            fault
        } else if self.grouped() {
            let text = self.since(first).of(self.text).to_owned();
            let mend = text.split(crate::lex::characters::is_blank).collect();
            Fault::NumberForm { text, mend }
        } else {
            return false;
        };
        // A form that is longer than any number is not worth a mend.
        const LONGEST: usize = 60;
        let span = self.since(first);
        let text = span.of(self.text);
        let fault = if text.len() > LONGEST {
            let (what, found) = ("a number", clipped(text));
            Fault::Expected { what, found }
        } else {
            fault
        };
        self.note(span, fault);
        true
    }

    /// `12,5`: a comma hard between digits where commas do not separate.
    fn decimal_comma(&mut self, first: usize) -> Option<Fault> {
        let mut commas = 0;
        while self.inside != Inside::Arguments && self.hard_comma() {
            self.at += 2;
            commas += 1;
        }
        let text = self.since(first).of(self.text).to_owned();
        match commas {
            0 => None,
            1 => Some(Fault::DecimalComma {
                mend: text.replace(',', "."),
                text,
            }),
            _ => Some(Fault::NumberForm {
                mend: text.replace(',', ""),
                text,
            }),
        }
    }

    fn hard_comma(&self) -> bool {
        let (Some(last), Some(comma), Some(next)) = (self.previous(), self.ahead(0), self.ahead(1))
        else {
            return false;
        };
        comma.kind == TokenKind::Comma
            && matches!(next.kind, TokenKind::Number | TokenKind::BrokenNumber)
            && last.span.end == comma.span.start
            && comma.span.end == next.span.start
            && self.word_of(next).starts_with(|c: char| c.is_ascii_digit())
    }

    /// Passes groups of three digits behind up to three.
    fn grouped(&mut self) -> bool {
        let digits = |text: &str, from: usize, to: usize| {
            (from..=to).contains(&text.len()) && text.bytes().all(|byte| byte.is_ascii_digit())
        };
        if !self
            .previous()
            .is_some_and(|first| digits(self.word_of(first), 1, 3))
        {
            return false;
        }
        let before = self.at;
        while let (Some(last), Some(next)) = (self.previous(), self.peek()) {
            let gap = Span {
                start: last.span.end,
                end: next.span.start,
            }
            .of(self.text);
            let text = self.word_of(next);
            let whole = text.split('.').next().unwrap_or("");
            if next.kind != TokenKind::Number || gap.chars().count() != 1 || !digits(whole, 3, 3) {
                break;
            }
            self.bump();
        }
        self.at > before
    }

    /// A further part of a compound number: a number in a smaller unit of the same dimension.
    fn opt_further(
        &mut self,
        unit: Option<&UnitText>,
        more: &[(f64, UnitText)],
    ) -> Option<(f64, UnitText)> {
        let larger = more.last().map_or(unit, |(_, unit)| Some(unit))?;
        let (number, token) = (self.ahead(0)?, self.ahead(1)?);
        if number.kind != TokenKind::Number || token.kind != TokenKind::Unit {
            return None;
        }
        let value = number_value(self.word_of(number))?;
        let (smaller, problems) = read_unit(self.word_of(token), token.span.start as usize, false);
        if !problems.is_empty() || !is_smaller(&smaller, larger) {
            return None;
        }
        self.at += 2;
        Some((value, smaller))
    }
}

/// The value of a number of the right form, if a double holds it.
fn number_value(text: &str) -> Option<f64> {
    text.parse().ok().filter(|value: &f64| value.is_finite())
}

/// `5.`, `1_000`, `1'000`, `1.2.3`.
fn broken(text: &str) -> Fault {
    let plain: String = text
        .chars()
        .filter(|c| !matches!(c, '_' | '\'' | '\u{2019}'))
        .collect();
    let mantissa_end = plain.find(['e', 'E']).unwrap_or(plain.len());
    let (mantissa, exponent) = plain.split_at_checked(mantissa_end).unwrap_or((&plain, ""));
    let mend = format!(
        "{}{exponent}",
        mantissa.strip_suffix('.').unwrap_or(mantissa)
    );
    if mend.parse::<f64>().is_ok() {
        Fault::NumberForm {
            text: clipped(text),
            mend,
        }
    } else {
        Fault::Expected {
            what: "a number",
            found: clipped(text),
        }
    }
}

fn is_smaller(unit: &UnitText, than: &UnitText) -> bool {
    let (Some(small), Some(large)) = (unit_value(unit), unit_value(than)) else {
        return false;
    };
    small.dimension == large.dimension && small.to_si(1.0) < large.to_si(1.0)
}

/// The unit a text means, where all its names are units.
fn unit_value(unit: &UnitText) -> Option<Unit> {
    let mut factors = unit.factors.iter();
    let value = |name: &str, power: i32| match power {
        1 => Unit::named(name),
        _ => Unit::named(name)?.power(power),
    };
    let first = factors.next()?;
    let start = value(&first.name.text, first.power)?;
    factors.try_fold(start, |product, factor| {
        product.times(value(&factor.name.text, factor.power)?)
    })
}

/// Whether the unit is that of an absolute temperature, to which a sign directly before the number belongs.
pub(super) fn is_absolute(unit: &UnitText) -> bool {
    match unit.factors.as_slice() {
        [only] => only.power == 1 && Unit::named(&only.name.text).is_some_and(|unit| unit.absolute),
        _ => false,
    }
}
