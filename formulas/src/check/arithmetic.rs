//! Sums, products, powers and opposites: dimensions, angles, kinds of airspeed, temperatures.

use super::{Checker, Marks, Typed};
use crate::problem::Fault;
use crate::program::{Kind, NumberKind, ShownUnit};
use crate::span::Span;
use crate::syntax::BinaryOp;
use engine::quantity::{Dimension, Exponent, SpeedKind};

impl Checker<'_> {
    /// `-x`.
    pub(crate) fn opposite(&mut self, inner: Typed, span: Span) -> Option<Typed> {
        let inner = self.wants_number(inner, "what stands behind -")?;
        let inner = self.not_on_a_scale(inner)?;
        let node = self.negate(inner.node);
        let marks = Marks {
            sea_level: false,
            ..inner.marks
        };
        Some(Typed {
            node,
            span,
            marks,
            ..inner
        })
    }

    /// A number typed in degC or degF stands alone.
    pub(crate) fn not_on_a_scale(&mut self, typed: Typed) -> Option<Typed> {
        if !typed.marks.scale {
            return Some(typed);
        }
        let kelvin = self
            .constant_of(typed.node)
            .map_or_else(String::new, |k| format!("{k} K"));
        self.report(
            typed.span,
            Fault::TemperatureInArithmetic {
                text: self.words(typed.span),
                kelvin,
            },
        );
        None
    }

    fn both_numbers(
        &mut self,
        left: Typed,
        right: Typed,
        sign: BinaryOp,
    ) -> Option<(Typed, Typed)> {
        let place = format!("what stands beside {}", sign.sign());
        let left = self
            .wants_number(left, &place)
            .and_then(|t| self.not_on_a_scale(t));
        let right = self
            .wants_number(right, &place)
            .and_then(|t| self.not_on_a_scale(t));
        Some((left?, right?))
    }

    /// `a + b`, `a - b`.
    pub(crate) fn sum(
        &mut self,
        op: BinaryOp,
        op_span: Span,
        left: Typed,
        right: Typed,
        span: Span,
    ) -> Option<Typed> {
        let (left, right) = self.both_numbers(left, right, op)?;
        let mut kind = self.common(op.sign(), &left, &right, op_span)?;
        let (a, b) = (left.number_kind().absolute, right.number_kind().absolute);
        let difference = op == BinaryOp::Subtract && a && b;
        kind.absolute = (a || b) && !difference;
        let mut unit = self.unit_of_operands(&[&left, &right]);
        if !kind.absolute && unit.as_ref().is_some_and(|u| u.unit.absolute) {
            unit = self.step_unit(&[&left, &right]);
        }
        let node = self.binary(op, left.node, right.node);
        let marks = Marks {
            literal: left.marks.literal && right.marks.literal,
            bare: left.marks.bare && right.marks.bare,
            difference,
            ..Marks::systems_of(&[&left, &right])
        };
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks,
        })
    }

    /// The unit of a step between temperatures shown on a scale.
    fn step_unit(&mut self, operands: &[&Typed]) -> Option<ShownUnit> {
        let fahrenheit = operands
            .iter()
            .any(|t| t.unit.as_ref().is_some_and(|u| &*u.text == "degF"));
        super::units::unit_of_text(if fahrenheit { "degR" } else { "K" })
    }

    /// What two numbers that are added, compared or chosen between have in common; a mismatch is reported.
    pub(crate) fn common(
        &mut self,
        sign: &str,
        left: &Typed,
        right: &Typed,
        span: Span,
    ) -> Option<NumberKind> {
        let (l, r) = (left.number_kind(), right.number_kind());
        if left.fits_any() || right.fits_any() {
            let kind = match (left.fits_any(), right.fits_any()) {
                (true, false) => r,
                (false, true) => l,
                // A lone 0 beside `none` is a pure number.
                _ => NumberKind {
                    any: l.any && r.any,
                    ..NumberKind::of(Dimension::NONE)
                },
            };
            // Beside a lone 0 an angle is an angle still only where the 0 is `none`.
            return Some(kind);
        }
        if !l.dimension.matches(r.dimension) {
            self.mismatch(sign, left, right, span);
            return None;
        }
        let speed = self.common_speed(sign, left, right, span)?;
        let dimension = if l.dimension == r.dimension {
            l.dimension
        } else {
            l.dimension.without_angle()
        };
        Some(NumberKind {
            dimension,
            speed,
            absolute: l.absolute || r.absolute,
            any: false,
        })
    }

    fn common_speed(
        &mut self,
        sign: &str,
        left: &Typed,
        right: &Typed,
        span: Span,
    ) -> Option<Option<SpeedKind>> {
        match (left.number_kind().speed, right.number_kind().speed) {
            (Some(a), Some(b)) if a != b => {
                let fault = Fault::SpeedKinds {
                    sign: sign.to_string(),
                    left: (self.words(left.span), a),
                    right: (self.words(right.span), b),
                };
                self.report(span, fault);
                None
            }
            (a, b) => Some(a.or(b)),
        }
    }

    /// `a * b`, `a / b`.
    pub(crate) fn product(
        &mut self,
        op: BinaryOp,
        left: Typed,
        right: Typed,
        span: Span,
    ) -> Option<Typed> {
        let (left, right) = self.both_numbers(left, right, op)?;
        let (l, r) = (left.number_kind(), right.number_kind());
        let divides = op == BinaryOp::Divide;
        let dimension = if divides {
            l.dimension.over(r.dimension)
        } else {
            l.dimension.times(r.dimension)
        };
        let Some(dimension) = dimension else {
            self.report(span, Fault::DimensionLimit);
            return None;
        };
        let marks = self.product_marks(divides, &left, &right)?;
        // A kind of airspeed lasts through numbers typed in the line; any other factor drops it.
        let speed = if right.marks.literal {
            l.speed.or(r.speed.filter(|_| left.marks.literal))
        } else if left.marks.literal {
            r.speed
        } else {
            None
        };
        let kind = NumberKind {
            dimension,
            speed,
            absolute: false,
            any: l.any || r.any,
        };
        let unit = self.unit_of_product(dimension, &left, &right);
        let node = self.binary(op, left.node, right.node);
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks,
        })
    }

    /// What is remembered of a product, and what must not meet in one: an airspeed and the wrong density.
    fn product_marks(&mut self, divides: bool, left: &Typed, right: &Typed) -> Option<Marks> {
        let (a, b) = (factors(left), factors(right));
        let b = if divides { Marks::default() } else { b };
        let marks = Marks {
            literal: left.marks.literal && right.marks.literal,
            bare: left.marks.bare && right.marks.bare,
            sea_level: left.marks.sea_level && right.marks.literal && !divides
                || right.marks.sea_level && left.marks.literal && !divides,
            airspeed: a.airspeed.or(b.airspeed),
            density: a.density.or(b.density),
            any_density: a.any_density || b.any_density,
            ..Marks::systems_of(&[left, right])
        };
        // Told where the two meet, not again at every further factor.
        let told = a.airspeed.is_some() && a.any_density || b.airspeed.is_some() && b.any_density;
        if let (Some((kind, place)), false) = (marks.airspeed, told) {
            let speed = self.words(place);
            match (kind, marks.density) {
                (SpeedKind::Equivalent, Some(density)) => {
                    let density = self.words(density);
                    self.report(place, Fault::EquivalentWithDensity { speed, density });
                    return None;
                }
                (SpeedKind::Calibrated, _) if marks.any_density => {
                    self.report(place, Fault::CalibratedInPressure { speed });
                    return None;
                }
                _ => {}
            }
        }
        Some(marks)
    }

    /// `a ^ b`.
    pub(crate) fn raised(&mut self, base: Typed, exponent: Typed, span: Span) -> Option<Typed> {
        let (base, exponent) = self.both_numbers(base, exponent, BinaryOp::Power)?;
        if !exponent.dimension().is_number() {
            let value = self.operand(&exponent);
            self.report(
                exponent.span,
                Fault::NotANumber {
                    place: "the exponent".to_string(),
                    value,
                },
            );
            return None;
        }
        let fixed = self
            .constant_of(exponent.node)
            .filter(|_| exponent.marks.literal);
        let kind = base.number_kind();
        let marks = Marks {
            literal: base.marks.literal && exponent.marks.literal,
            bare: base.marks.bare && exponent.marks.bare,
            airspeed: factors(&base).airspeed,
            ..Marks::systems_of(&[&base])
        };
        let Some(value) = fixed else {
            if kind.dimension != Dimension::NONE && !kind.dimension.is_number() {
                let base = self.operand(&base);
                self.report(exponent.span, Fault::ExponentNotFixed { base });
                return None;
            }
            let node = self.binary(BinaryOp::Power, base.node, exponent.node);
            let kind = NumberKind {
                any: kind.any,
                ..NumberKind::of(Dimension::NONE)
            };
            return Some(Typed {
                node,
                kind: Kind::Number(kind),
                unit: None,
                span,
                marks,
            });
        };
        let dimension = self.dimension_of_power(&base, value, exponent.span, span)?;
        let unit = self.unit_of_power(&base, dimension, value);
        let node = self.power(base.node, value);
        let kind = NumberKind {
            dimension,
            speed: kind.speed,
            absolute: false,
            any: kind.any,
        };
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks,
        })
    }

    fn dimension_of_power(
        &mut self,
        base: &Typed,
        exponent: f64,
        exponent_span: Span,
        span: Span,
    ) -> Option<Dimension> {
        let dimension = base.dimension();
        if dimension == Dimension::NONE {
            return Some(Dimension::NONE);
        }
        match Exponent::from_f64(exponent) {
            Some(power) => {
                let raised = dimension.power(power);
                if raised.is_none() {
                    self.report(span, Fault::DimensionLimit);
                }
                raised
            }
            None if dimension.is_number() => Some(Dimension::NONE),
            None => {
                let base = self.operand(base);
                self.report(exponent_span, Fault::ExponentNotFixed { base });
                None
            }
        }
    }

    fn unit_of_power(
        &mut self,
        base: &Typed,
        dimension: Dimension,
        exponent: f64,
    ) -> Option<ShownUnit> {
        if exponent == 1.0
            && !dimension.is_number()
            && !base.unit.as_ref().is_some_and(|u| u.unit.absolute)
        {
            return base.unit.clone();
        }
        self.usual_unit(dimension, &[base])
    }
}

/// The airspeed and density factors of an operand: remembered ones of a product, else the operand itself.
fn factors(typed: &Typed) -> Marks {
    let mut marks = typed.marks;
    let kind = typed.number_kind();
    if marks.airspeed.is_none()
        && let Some(speed @ (SpeedKind::Equivalent | SpeedKind::Calibrated)) = kind.speed
    {
        marks.airspeed = Some((speed, typed.span));
    }
    if kind.dimension.matches(Dimension::DENSITY) {
        marks.any_density = true;
        if !marks.sea_level && marks.density.is_none() {
            marks.density = Some(typed.span);
        }
    }
    marks
}
