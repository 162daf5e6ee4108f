//! Reductions over axes, and methods along one axis.

use super::{Checker, Marks, Typed};
use crate::axes::{AxisId, AxisSet};
use crate::catalogue::Entry;
use crate::problem::Fault;
use crate::program::{Along, Kind, NumberKind, Op, Reduction, ShownUnit};
use crate::span::Span;
use crate::syntax::{Argument, Name};
use engine::quantity::Dimension;

impl Checker<'_> {
    pub(crate) fn axis_function(
        &mut self,
        entry: &'static Entry,
        function: &Name,
        arguments: &[Argument],
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Typed> {
        let parameters: Vec<(&str, bool)> = match entry.name {
            "min" | "max" => vec![("x", true)],
            _ => entry.parameters.iter().map(|p| (p.name, true)).collect(),
        };
        let placed = self.place_arguments(entry.name, &parameters, arguments, span)?;
        let values: Vec<Option<Typed>> = placed
            .iter()
            .flatten()
            .map(|a| self.expression(&a.value))
            .collect();
        let values: Vec<Typed> = values.into_iter().collect::<Option<_>>()?;
        match entry.name {
            "integral" | "running_integral" | "difference" | "slope" | "intercept" => {
                self.along(entry.name, values, over, span)
            }
            "where_max" | "where_min" => self.place_of_extreme(entry.name, values, over, span),
            _ => self.reduction(entry.name, values, over, function, span),
        }
    }

    /// The axes of an `over`; axes that the value lacks are told of, and left out.
    fn over_axes(
        &mut self,
        name: &str,
        over: Option<&[Name]>,
        has: AxisSet,
        refused: bool,
    ) -> Option<AxisSet> {
        let Some(over) = over else { return Some(has) };
        let mut axes = AxisSet::NONE;
        let mut failed = false;
        for axis in over {
            let Some(id) = self.axis_of_symbol.get(&axis.text).copied() else {
                failed = true;
                continue;
            };
            if has.has(id) {
                axes = axes.with(AxisSet::of(id));
            } else {
                let fault = Fault::AxisNotVaried {
                    function: name.to_string(),
                    axis: axis.text.clone(),
                    refused,
                };
                self.report(axis.span, fault);
                failed |= refused;
            }
        }
        (!failed).then_some(axes)
    }

    fn reduction(
        &mut self,
        name: &str,
        values: Vec<Typed>,
        over: Option<&[Name]>,
        function: &Name,
        span: Span,
    ) -> Option<Typed> {
        let value = values.into_iter().next()?;
        let place = format!("the argument of {name}");
        let how = self.how_to_reduce(name, &value, &place)?;
        if let Kind::Record(_) = value.kind {
            return self.wants_number(value, &place);
        }
        let has = self.axes_of(value.node);
        let refused = matches!(name, "sum" | "count");
        if over.is_none() && has.is_empty() && !matches!(name, "sum" | "count" | "all" | "any") {
            let fault = Fault::AxisNotVaried {
                function: name.to_string(),
                axis: String::new(),
                refused: false,
            };
            self.report(function.span, fault);
        }
        let axes = self.over_axes(name, over, has, refused)?;
        if axes.is_empty()
            && matches!(
                how,
                Reduction::Max | Reduction::Min | Reduction::Mean | Reduction::Rms
            )
        {
            return Some(Typed { span, ..value });
        }
        let node = self.node(
            Op::Reduce {
                how,
                value: value.node,
                over: axes,
            },
            has.without(axes),
        );
        let (kind, unit) = match how {
            Reduction::Count | Reduction::CountTrue => {
                (Kind::Number(NumberKind::of(Dimension::NONE)), None)
            }
            Reduction::All | Reduction::Any => (Kind::Condition, None),
            _ => (value.kind, value.unit.clone()),
        };
        Some(Typed {
            node,
            kind,
            unit,
            span,
            marks: Marks::systems_of(&[&value]),
        })
    }

    /// The reduction that a name means for a value of this kind.
    fn how_to_reduce(&mut self, name: &str, value: &Typed, place: &str) -> Option<Reduction> {
        match name {
            "all" | "any" => {
                self.wants_condition(value.clone(), place)?;
                Some(if name == "all" {
                    Reduction::All
                } else {
                    Reduction::Any
                })
            }
            "count" if value.kind == Kind::Condition => Some(Reduction::CountTrue),
            "count" => Some(Reduction::Count),
            _ => {
                self.wants_number(value.clone(), place)?;
                Some(match name {
                    "max" => Reduction::Max,
                    "min" => Reduction::Min,
                    "sum" => Reduction::Sum,
                    "mean" => Reduction::Mean,
                    _ => Reduction::Rms,
                })
            }
        }
    }

    /// `where_max(P over cg)` gives the label, on an axis of numbers the value along it.
    fn place_of_extreme(
        &mut self,
        name: &str,
        values: Vec<Typed>,
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Typed> {
        let value = self.wants_number(
            values.into_iter().next()?,
            &format!("the argument of {name}"),
        )?;
        let has = self.axes_of(value.node);
        let axis = self.single_axis(name, over, has, span)?;
        let how = if name == "where_max" {
            Reduction::WhereMax(axis)
        } else {
            Reduction::WhereMin(axis)
        };
        let over = AxisSet::of(axis);
        let node = self.node(
            Op::Reduce {
                how,
                value: value.node,
                over,
            },
            has.without(over),
        );
        let (kind, unit) = self.axis_kind(axis);
        Some(Typed {
            node,
            kind,
            unit,
            span,
            marks: Marks::systems_of(&[&value]),
        })
    }

    /// What a point of an axis is: text, or a number with its unit.
    pub(crate) fn axis_kind(&self, axis: AxisId) -> (Kind, Option<ShownUnit>) {
        let axis = &self.program.axes[axis.0 as usize];
        if axis.values.is_none() {
            return (Kind::Text, None);
        }
        let unit = axis.unit.clone();
        let known = unit.as_ref().map(|u| u.unit);
        let kind = NumberKind {
            speed: known.and_then(|u| u.speed_kind),
            absolute: known.is_some_and(|u| u.absolute),
            ..NumberKind::of(known.map_or(Dimension::NONE, |u| u.dimension))
        };
        (Kind::Number(kind), unit)
    }

    fn along(
        &mut self,
        name: &str,
        values: Vec<Typed>,
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Typed> {
        let place = format!("the argument of {name}");
        let mut numbers = Vec::new();
        for value in values {
            numbers.push(self.wants_number(value, &place)?);
        }
        let nodes: Vec<_> = numbers.iter().map(|t| t.node).collect();
        let all = self.axes_of_all(&nodes);
        let possible = match numbers.get(1) {
            // The axis is the one along which the abscissa varies, where only one is.
            Some(x) if over.is_none() && self.axes_of(x.node).count() == 1 => self.axes_of(x.node),
            _ => all,
        };
        let axis = self.single_axis(name, over, possible, span)?;
        let (f, x) = (numbers.first()?, numbers.get(1));
        let (df, dx) = (f.dimension(), x.map_or(Dimension::NONE, Typed::dimension));
        let (how, dimension, keeps) = match name {
            "integral" => (Along::Integral, df.times(dx), false),
            "running_integral" => (Along::RunningIntegral, df.times(dx), true),
            "difference" => (Along::Difference, Some(df), true),
            "slope" => (Along::Slope, df.over(dx), false),
            _ => (Along::Intercept, Some(df), false),
        };
        let Some(dimension) = dimension else {
            self.report(span, Fault::DimensionLimit);
            return None;
        };
        let axes = if keeps {
            all
        } else {
            all.without(AxisSet::of(axis))
        };
        let unit = match (name, x) {
            ("difference" | "intercept", _) => f.unit.clone().filter(|u| !u.unit.absolute),
            (_, Some(x)) => self.unit_of_product(dimension, f, x),
            _ => None,
        };
        let op = Op::Along {
            how,
            value: f.node,
            x: x.map(|x| x.node),
            axis,
        };
        let node = self.node(op, axes);
        let speed = f
            .number_kind()
            .speed
            .filter(|_| matches!(how, Along::Difference | Along::Intercept));
        let kind = NumberKind {
            speed,
            ..NumberKind::of(dimension)
        };
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks: Marks::default(),
        })
    }
}
