//! Units as typed become units as meant.

use super::Checker;
use crate::names::located;
use crate::problem::{Fault, Mend};
use crate::program::ShownUnit;
use crate::span::Span;
use crate::syntax::{UnitFactor, UnitText, Words};
use engine::quantity::{Dimension, SpeedKind, Unit, nearest_unit};
use std::rc::Rc;

impl Checker<'_> {
    /// The unit that a text means; what is no unit is reported.
    pub(crate) fn resolve_unit(&mut self, text: &UnitText) -> Option<ShownUnit> {
        if let Some(known) = self.unit_cache.get(&text.text) {
            let known = known.clone();
            self.advise_unit(text);
            return Some(known);
        }
        let mut unit = Unit::ONE;
        for (index, factor) in text.factors.iter().enumerate() {
            let Some(named) = Unit::named(&factor.name.text) else {
                return self.unknown_unit(text, index);
            };
            let single = text.factors.len() == 1 && factor.power == 1;
            let next = if single {
                Some(named)
            } else {
                named.power(factor.power).and_then(|n| unit.times(n))
            };
            let Some(next) = next else {
                self.report(text.span, Fault::DimensionLimit);
                return None;
            };
            unit = next;
        }
        if let Some(kind) = &text.kind {
            match SpeedKind::of_word(&kind.text).filter(|_| unit.dimension == Dimension::SPEED) {
                Some(speed) => unit = unit.of_kind(speed),
                None => {
                    let fault = Fault::UnknownUnit {
                        name: kind.text.clone(),
                        nearest: None,
                        mend: None,
                    };
                    self.report(kind.span, fault);
                    return None;
                }
            }
        }
        self.advise_unit(text);
        let shown = ShownUnit {
            text: Rc::from(canonical(text).as_str()),
            unit,
        };
        self.unit_cache.insert(text.text.clone(), shown.clone());
        Some(shown)
    }

    fn unknown_unit(&mut self, text: &UnitText, index: usize) -> Option<ShownUnit> {
        let factor = &text.factors[index];
        let name = factor.name.text.clone();
        let mend = self.unit_mend(text, factor, index);
        let nearest = nearest_unit(&name).map(str::to_string);
        self.report(
            factor.name.span,
            Fault::UnknownUnit {
                name,
                nearest,
                mend,
            },
        );
        None
    }

    /// `560 lb/S` is mended to `560 lb / S`, `2 m` with an unknown `m` to `2*m`.
    fn unit_mend(&self, text: &UnitText, factor: &UnitFactor, index: usize) -> Option<Mend> {
        let known = self.names.symbol(&factor.name.text).is_some()
            || super::constant(&factor.name.text).is_some();
        let sign = match factor.joined_by {
            Some('/') => " / ",
            Some('-') => " - ",
            None if index == 0 && known => "*",
            Some(_) if known => "*",
            _ => return None,
        };
        let name = factor.name.span;
        let behind = Span {
            start: name.start,
            end: text.span.end.max(name.end),
        };
        let rest = behind.of(self.statement_text());
        let from = if index == 0 {
            self.end_of_number(name.start)
        } else {
            name.start.saturating_sub(1)
        };
        Some(Mend {
            span: Span {
                start: from,
                end: behind.end,
            },
            text: format!("{sign}{rest}"),
        })
    }

    /// Where the blanks before a place begin.
    fn end_of_number(&self, place: u32) -> u32 {
        let before = self.statement_text().get(..place as usize).unwrap_or("");
        before.trim_end().len() as u32
    }

    /// Advice on units that look like something else.
    fn advise_unit(&mut self, text: &UnitText) {
        for factor in &text.factors {
            let name = &factor.name.text;
            if let Some(sign @ ('-' | '/')) = factor.joined_by
                && self.names.symbol(name).is_some()
                && self.is_typed_after_number(text)
            {
                let fault = Fault::UnitIsSymbol {
                    name: name.clone(),
                    sign,
                };
                self.problems
                    .push(located(self.statement, factor.name.span, fault));
            }
            if name == "nm" {
                let fault = Fault::LikelyOtherUnit {
                    unit: name.clone(),
                    likely: "NM".to_string(),
                };
                self.problems
                    .push(located(self.statement, factor.name.span, fault));
            }
        }
    }

    /// A unit in brackets cannot be mistaken for a symbol.
    fn is_typed_after_number(&self, text: &UnitText) -> bool {
        let before = self
            .statement_text()
            .get(..text.span.start as usize)
            .unwrap_or("");
        !before.trim_end().ends_with('[')
    }

    /// `units lb ft kt`: what results without a bracket prefer.
    pub(crate) fn preferred_units(&mut self, text: &Words) {
        let mut at = text.span.start as usize;
        for word in text.text.split_whitespace() {
            let start = self
                .statement_text()
                .get(at..)
                .and_then(|t| t.find(word))
                .map_or(at, |i| at + i);
            at = start + word.len();
            let span = Span::new(start, at);
            match unit_of_text(word) {
                Some(unit) => self.prefer.push(unit),
                None => {
                    let nearest = nearest_unit(word).map(str::to_string);
                    self.report(
                        span,
                        Fault::UnknownUnit {
                            name: word.to_string(),
                            nearest,
                            mend: None,
                        },
                    );
                }
            }
        }
    }
}

/// A unit text of our own making, such as `lb/ft^2` or `kg.m^2`; also `/deg`.
pub(crate) fn unit_of_text(text: &str) -> Option<ShownUnit> {
    let mut unit = Unit::ONE;
    let (above, below) = text.split_once('/').map_or((text, ""), |(a, b)| (a, b));
    for (part, sign) in [(above, 1), (below, -1)] {
        for factor in part.split('.').filter(|f| !f.is_empty()) {
            let (name, power) = factor
                .split_once('^')
                .map_or((factor, 1), |(n, p)| (n, p.parse().unwrap_or(0)));
            let named = Unit::named(name)?;
            unit = if text == name {
                named
            } else {
                unit.times(named.power(sign * power)?)?
            };
        }
    }
    Some(ShownUnit {
        text: Rc::from(text),
        unit,
    })
}

/// A unit as printed: names joined by points, one stroke, whole powers.
pub(crate) fn canonical(text: &UnitText) -> String {
    let mut out = String::new();
    for factor in text.factors.iter().filter(|f| f.power > 0) {
        let first = out.is_empty();
        push_factor(&mut out, factor, factor.power, first);
    }
    let below: Vec<&UnitFactor> = text.factors.iter().filter(|f| f.power < 0).collect();
    if !below.is_empty() {
        out.push('/');
        for factor in below {
            let first = out.ends_with('/');
            push_factor(&mut out, factor, -factor.power, first);
        }
    }
    if let Some(kind) = &text.kind {
        out.push(' ');
        out.push_str(&kind.text);
    }
    out
}

fn push_factor(out: &mut String, factor: &UnitFactor, power: i32, first: bool) {
    if !first {
        out.push('.');
    }
    out.push_str(&factor.name.text);
    if power != 1 {
        out.push('^');
        out.push_str(&power.to_string());
    }
}
