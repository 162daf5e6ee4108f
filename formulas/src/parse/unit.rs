//! Units: behind a number, and in brackets, where more is allowed.

use super::cursor::{Cursor, clipped};
use crate::lex::characters::{blank_length, is_blank, is_dash, trimmed};
use crate::lex::number::{joint, power, power_value, unit_name};
use crate::problem::{Fault, Problem};
use crate::span::Span;
use crate::syntax::{Name, UnitFactor, UnitText};
use crate::token::{Token, TokenKind};

/// Deepest nesting of parentheses in a unit.
const PARENTHESES_MAX: u32 = 20;

/// A unit and whether it could be read.
pub(super) type Unit = (UnitText, bool);

impl Cursor<'_> {
    /// `[unit]` if one stands here.
    pub(super) fn opt_bracket(&mut self) -> Option<Unit> {
        let token = self.peek()?;
        if !matches!(token.kind, TokenKind::Bracket | TokenKind::OpenBracket) {
            return None;
        }
        self.bump();
        Some(self.unit_of(token))
    }

    /// The unit that a token holds.
    ///
    /// ```text
    /// kg/m^3   [lb/ft^2]   [1/deg]   [/deg]   [kg/(m s)]   [m/s EAS]   [1]
    /// ```
    pub(super) fn unit_of(&mut self, token: Token) -> Unit {
        let whole = self.word_of(token);
        let closed = token.kind != TokenKind::OpenBracket;
        if !closed {
            self.note(token.span, Fault::UnclosedBracket { bracket: '[' });
        }
        let inner = whole.strip_prefix('[').unwrap_or(whole);
        let inner = inner.strip_suffix(']').unwrap_or(inner);
        let text = trimmed(inner);
        let start = token.span.start as usize + usize::from(whole.len() > inner.len());
        let start = start + (inner.len() - inner.trim_start_matches(is_blank).len());
        let (unit, problems) = read_unit(text, start, token.kind != TokenKind::Unit);
        let fine = closed && problems.iter().all(|problem| is_advice(&problem.fault));
        self.problems.extend(problems);
        (unit, fine)
    }
}

fn is_advice(fault: &Fault) -> bool {
    matches!(fault, Fault::BelowTheLine { .. })
}

/// The unit that `text` spells, which stands at byte `start`, and its problems. In brackets blanks, `*`, parentheses,
/// and 1 or nothing above the line are allowed.
pub(crate) fn read_unit(text: &str, start: usize, brackets: bool) -> (UnitText, Vec<Problem>) {
    let mut reader = Reader {
        text,
        start,
        at: 0,
        brackets,
        unit: UnitText::default(),
        problems: Vec::new(),
    };
    reader.unit.text = text.to_owned();
    reader.unit.span = Span::new(start, start + text.len());
    let dash = text.chars().all(is_dash);
    let read = if text.is_empty() {
        reader.fail("a unit")
    } else if brackets && (dash || text == "1") {
        Ok(())
    } else {
        reader.group(1, 0).and_then(|()| reader.ended())
    };
    if read.is_err() && reader.problems.is_empty() {
        reader.problems.push(reader.problem("a unit"));
    }
    (reader.unit, reader.problems)
}

struct Reader<'t> {
    text: &'t str,
    start: usize,
    at: usize,
    brackets: bool,
    unit: UnitText,
    problems: Vec<Problem>,
}

/// What a group of factors has seen so far.
#[derive(Default)]
struct Group {
    /// Where its `/` stands.
    line: Option<usize>,
    /// Factors above and below the line.
    above: u32,
    below: u32,
    /// The sign directly before the next factor.
    sign: Option<char>,
    second: bool,
}

impl Reader<'_> {
    fn rest(&self) -> &str {
        self.text.get(self.at..).unwrap_or("")
    }

    fn problem(&self, what: &'static str) -> Problem {
        let rest = self.rest();
        let length = rest.chars().next().map_or(0, char::len_utf8);
        let at = self.start + self.at;
        let found = clipped(rest.get(..length).unwrap_or(""));
        Problem {
            span: Span::new(at, at + length),
            fault: Fault::Expected { what, found },
        }
    }

    fn fail(&mut self, what: &'static str) -> Result<(), ()> {
        let problem = self.problem(what);
        self.problems.push(problem);
        Err(())
    }

    fn ended(&mut self) -> Result<(), ()> {
        if self.rest().is_empty() {
            Ok(())
        } else {
            self.fail("a unit")
        }
    }

    /// Factors up to the end or a `)`; `power` is that of what stands above their line.
    fn group(&mut self, power: i32, depth: u32) -> Result<(), ()> {
        let mut group = Group::default();
        let first = self.at;
        loop {
            let blanks = blank_length(self.rest());
            self.at += blanks;
            let Some(next) = self.rest().chars().next().filter(|next| *next != ')') else {
                break;
            };
            if self.sign(&mut group, next)? {
                continue;
            }
            if blanks > 0 && group.sign.is_none() && self.opt_kind() {
                continue;
            }
            self.term(&mut group, power, depth, next)?;
        }
        if group.sign.is_some() || group.above + group.below == 0 {
            return self.fail("a unit name");
        }
        self.judge(&group, first);
        Ok(())
    }

    /// A sign between factors, if one stands here.
    fn sign(&mut self, group: &mut Group, next: char) -> Result<bool, ()> {
        let sign = match next {
            '*' | '\u{d7}' if self.brackets => Some(('.', next.len_utf8())),
            _ => joint(self.rest()).ok().map(|(_, sign)| match sign {
                '\u{b7}' | '\u{22c5}' => ('.', sign.len_utf8()),
                _ => (sign, 1),
            }),
        };
        let Some((sign, length)) = sign else {
            return Ok(false);
        };
        let leads = group.above + group.below == 0;
        if group.sign.is_some() || (leads && sign != '/') {
            return self.fail("a unit name").map(|()| true);
        }
        if sign == '/' {
            group.second |= group.line.is_some();
            group.line = group.line.or(Some(self.at));
        }
        self.at += length;
        group.sign = Some(sign);
        Ok(true)
    }

    /// `EAS`, `CAS` or `TAS` at the end.
    fn opt_kind(&mut self) -> bool {
        let rest = self.rest();
        let found =
            self.brackets && matches!(rest, "EAS" | "CAS" | "TAS") && !self.unit.factors.is_empty();
        if found {
            let at = self.start + self.at;
            self.unit.kind = Some(Box::new(Name {
                text: rest.to_owned(),
                span: Span::new(at, at + rest.len()),
            }));
            self.at = self.text.len();
        }
        found
    }

    /// A name, `1` or a parenthesis, with its power.
    fn term(&mut self, group: &mut Group, power: i32, depth: u32, next: char) -> Result<(), ()> {
        let power = if group.line.is_some() {
            power.saturating_neg()
        } else {
            power
        };
        let first = self.unit.factors.len();
        let sign = group.sign.take();
        match next {
            '1' if self.brackets && group.above + group.below == 0 && group.line.is_none() => {
                self.at += 1
            }
            '(' if self.brackets => self.parenthesis(power, depth)?,
            _ => self.factor(sign, power)?,
        }
        let raised = self.opt_power();
        for factor in self.unit.factors.iter_mut().skip(first) {
            factor.power = factor.power.saturating_mul(raised);
        }
        if group.line.is_some() {
            group.below += 1
        } else {
            group.above += 1
        }
        Ok(())
    }

    fn parenthesis(&mut self, power: i32, depth: u32) -> Result<(), ()> {
        if depth >= PARENTHESES_MAX {
            return self.fail("fewer parentheses");
        }
        self.at += 1;
        self.group(power, depth + 1)?;
        if !self.rest().starts_with(')') {
            return self.fail("`)`");
        }
        self.at += 1;
        Ok(())
    }

    fn factor(&mut self, sign: Option<char>, power: i32) -> Result<(), ()> {
        let Ok((_, name)) = unit_name(self.rest()) else {
            return self.fail("a unit name");
        };
        let at = self.start + self.at;
        let (text, length) = (super::cursor::composed(name), name.len());
        let name = Name {
            text,
            span: Span::new(at, at + length),
        };
        self.unit.factors.push(UnitFactor {
            name,
            power,
            joined_by: sign,
        });
        self.at += length;
        Ok(())
    }

    fn opt_power(&mut self) -> i32 {
        let Ok((rest, text)) = power(self.rest()) else {
            return 1;
        };
        let (rest, value) = (rest.len(), power_value(text));
        self.at = self.text.len() - rest;
        value
    }

    /// Whether the line of a group is drawn clearly.
    fn judge(&mut self, group: &Group, first: usize) {
        // One remark on a unit is enough, and keeps the problems of a long one short.
        if !self.problems.is_empty() {
            return;
        }
        let span = Span::new(self.start, self.start + self.text.len());
        let text = self.text.to_owned();
        if group.second {
            let mend = self
                .unit
                .kind
                .is_none()
                .then(|| one_line(&self.unit.factors));
            self.problems.push(Problem {
                span,
                fault: Fault::SecondSlash { text, mend },
            });
        } else if let (Some(line), true) = (group.line, group.below > 1) {
            let above = if group.above == 0 { "1" } else { "" };
            let (before, below) = self.text.split_at_checked(line).unwrap_or((self.text, ""));
            let (below, behind) = below
                .split_at_checked(self.at - line)
                .unwrap_or((below, ""));
            let (lead, before) = before.split_at_checked(first).unwrap_or(("", before));
            let below = trimmed(below.trim_start_matches('/'));
            let meaning = format!("{lead}{above}{before}/({below}){behind}");
            self.problems.push(Problem {
                span,
                fault: Fault::BelowTheLine { text, meaning },
            });
        }
    }
}

/// Factors without a `/`, negative powers below the line.
fn one_line(factors: &[UnitFactor]) -> String {
    let written = factors.iter().map(|factor| match factor.power {
        1 => factor.name.text.clone(),
        power => format!("{}^{power}", factor.name.text),
    });
    written.collect::<Vec<_>>().join(".")
}
