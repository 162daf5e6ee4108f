//! General mathematics, and the way to the functions of axes.

use super::{Checker, Marks, Typed};
use crate::catalogue::Entry;
use crate::problem::Fault;
use crate::program::{Function, Kind, NumberKind, Op};
use crate::span::Span;
use crate::syntax::{Argument, Name};
use engine::quantity::{Dimension, Exponent};

/// How a general function treats the dimensions of its arguments.
#[derive(Clone, Copy, PartialEq)]
enum Rule {
    /// Pure numbers (angles count as such) give a pure number.
    Numbers,
    /// A pure number gives an angle.
    NumberToAngle,
    /// Keeps the dimension and the unit of its one argument.
    Keeps,
    /// All of one dimension; keeps it.
    Alike,
    /// The square or cube root of a dimension.
    Root(i32),
    /// Any dimension gives a pure number.
    ToNumber,
    /// Two of one dimension give an angle.
    RatioToAngle,
}

fn rule(name: &str) -> Option<(Function, Rule)> {
    Some(match name {
        "sqrt" => (Function::Sqrt, Rule::Root(2)),
        "cbrt" => (Function::Cbrt, Rule::Root(3)),
        "abs" => (Function::Abs, Rule::Keeps),
        "sign" => (Function::Sign, Rule::ToNumber),
        "exp" => (Function::Exp, Rule::Numbers),
        "ln" => (Function::Ln, Rule::Numbers),
        "log10" => (Function::Log10, Rule::Numbers),
        "sin" => (Function::Sin, Rule::Numbers),
        "cos" => (Function::Cos, Rule::Numbers),
        "tan" => (Function::Tan, Rule::Numbers),
        "asin" => (Function::Asin, Rule::NumberToAngle),
        "acos" => (Function::Acos, Rule::NumberToAngle),
        "atan" => (Function::Atan, Rule::NumberToAngle),
        "atan2" => (Function::Atan2, Rule::RatioToAngle),
        "hypot" => (Function::Hypot, Rule::Alike),
        "floor" => (Function::Floor, Rule::Numbers),
        "ceil" => (Function::Ceil, Rule::Numbers),
        "round" => (Function::Round, Rule::Numbers),
        "min" => (Function::Min, Rule::Alike),
        "max" => (Function::Max, Rule::Alike),
        "clamp" => (Function::Clamp, Rule::Alike),
        _ => return None,
    })
}

impl Checker<'_> {
    /// A function that the language works out itself.
    pub(crate) fn language_call(
        &mut self,
        entry: &'static Entry,
        function: &Name,
        arguments: &[Argument],
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Typed> {
        let name = entry.name;
        let reduces = over.is_some() || arguments.len() == 1;
        if name == "has_value" {
            return self.has_value(arguments, over, function, span);
        }
        let Some((general, rule)) =
            rule(name).filter(|_| !(matches!(name, "min" | "max") && reduces))
        else {
            return self.axis_function(entry, function, arguments, over, span);
        };
        self.takes_no_over(function, over)?;
        let operands = self.general_arguments(entry, arguments, span)?;
        self.apply(name, general, rule, operands, span)
    }

    fn general_arguments(
        &mut self,
        entry: &'static Entry,
        arguments: &[Argument],
        span: Span,
    ) -> Option<Vec<Typed>> {
        let values: Vec<&Argument> = if matches!(entry.name, "min" | "max") {
            if arguments.is_empty() {
                let function = entry.name.to_string();
                self.report(
                    span,
                    Fault::ArgumentCount {
                        function,
                        least: 1,
                        most: 99,
                        found: 0,
                    },
                );
                return None;
            }
            arguments.iter().collect()
        } else {
            let parameters: Vec<(&str, bool)> =
                entry.parameters.iter().map(|p| (p.name, true)).collect();
            self.place_arguments(entry.name, &parameters, arguments, span)?
                .into_iter()
                .flatten()
                .collect()
        };
        let mut operands = Vec::with_capacity(values.len());
        let mut failed = false;
        for argument in values {
            let place = format!("the argument of {}", entry.name);
            let typed = self
                .expression(&argument.value)
                .and_then(|t| self.wants_number(t, &place));
            match typed.and_then(|t| self.not_on_a_scale(t)) {
                Some(typed) => operands.push(typed),
                None => failed = true,
            }
        }
        (!failed).then_some(operands)
    }

    fn apply(
        &mut self,
        name: &str,
        function: Function,
        rule: Rule,
        operands: Vec<Typed>,
        span: Span,
    ) -> Option<Typed> {
        let first = operands.first()?.clone();
        let (kind, unit) = match rule {
            Rule::Numbers | Rule::NumberToAngle => {
                self.pure_number(name, &first)?;
                let angle = rule == Rule::NumberToAngle;
                (
                    NumberKind::of(if angle {
                        Dimension::ANGLE
                    } else {
                        Dimension::NONE
                    }),
                    self.degrees(angle),
                )
            }
            Rule::Keeps => (first.number_kind(), self.unit_of_operands(&[&first])),
            Rule::ToNumber => (NumberKind::of(Dimension::NONE), None),
            Rule::Alike | Rule::RatioToAngle => {
                let kind = self.alike(name, &operands, span)?;
                let refs: Vec<&Typed> = operands.iter().collect();
                if rule == Rule::Alike {
                    (kind, self.unit_of_operands(&refs))
                } else {
                    (NumberKind::of(Dimension::ANGLE), self.degrees(true))
                }
            }
            Rule::Root(n) => {
                let root = Exponent::ratio(1, n)?;
                let Some(dimension) = first.dimension().power(root) else {
                    self.report(span, Fault::DimensionLimit);
                    return None;
                };
                let kind = NumberKind {
                    speed: first.number_kind().speed,
                    ..NumberKind::of(dimension)
                };
                (kind, self.usual_unit(dimension, &[&first]))
            }
        };
        let any = operands.iter().all(|t| t.number_kind().any);
        let literal = operands.iter().all(|t| t.marks.literal);
        let systems = Marks::systems_of(&operands.iter().collect::<Vec<_>>());
        let node = self.function(function, operands.iter().map(|t| t.node).collect());
        let kind = Kind::Number(NumberKind { any, ..kind });
        Some(Typed {
            node,
            kind,
            unit,
            span,
            marks: Marks { literal, ..systems },
        })
    }

    fn degrees(&self, angle: bool) -> Option<crate::program::ShownUnit> {
        if angle {
            super::units::unit_of_text("deg")
        } else {
            None
        }
    }

    fn pure_number(&mut self, name: &str, typed: &Typed) -> Option<()> {
        if typed.fits_any() || typed.dimension().is_number() {
            return Some(());
        }
        let value = self.operand(typed);
        self.report(
            typed.span,
            Fault::NotANumber {
                place: format!("the argument of {name}"),
                value,
            },
        );
        None
    }

    fn has_value(
        &mut self,
        arguments: &[Argument],
        over: Option<&[Name]>,
        function: &Name,
        span: Span,
    ) -> Option<Typed> {
        self.takes_no_over(function, over)?;
        let placed = self.place_arguments("has_value", &[("x", true)], arguments, span)?;
        let typed = self.expression(&placed.first().copied().flatten()?.value)?;
        if let Kind::Record(_) = typed.kind {
            return self.wants_number(typed, "the argument of has_value");
        }
        let axes = self.axes_of(typed.node);
        let node = self.node(Op::HasValue(typed.node), axes);
        Some(Typed::condition(node, span))
    }
}
