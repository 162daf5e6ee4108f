//! Definitions: single values, lists by axis, own functions.

use super::bracket::Bracket;
use super::{Checker, Frame, Marks, Meaning, Typed};
use crate::axes::{AxisId, AxisSet};
use crate::names::{Use, statement_uses};
use crate::problem::Fault;
use crate::program::{Kind, NumberKind, Op, QuantityId, Tolerance, ToleranceWidth};
use crate::span::Span;
use crate::syntax::{
    Argument, Definition, DefinitionValue, Expr, ExprKind, FunctionDefinition, ListItem,
    StatementKind, Toleranced, UnitText, Words,
};
use engine::quantity::Dimension;

/// A value with the width of its tolerance.
pub(crate) struct Judged {
    pub(crate) typed: Typed,
    pub(crate) width: Option<ToleranceWidth>,
}

impl Checker<'_> {
    /// A bracket behind a symbol. `Err` where its unit could not be read.
    pub(crate) fn bracket(
        &mut self,
        unit: Option<&UnitText>,
        symbol: &str,
    ) -> Result<Option<Bracket>, ()> {
        let Some(text) = unit else { return Ok(None) };
        let unit = self.resolve_unit(text).ok_or(())?;
        Ok(Some(Bracket {
            unit,
            symbol: symbol.to_string(),
        }))
    }

    pub(crate) fn check_definition(&mut self, definition: &Definition) {
        let symbol = &definition.symbol;
        let stands = self
            .names
            .symbol(&symbol.text)
            .is_some_and(|s| s.statement == self.statement);
        let input = self.is_input();
        self.making = self.making_of(definition).filter(|_| stands);
        if self.making.is_some_and(|(_, axis)| axis.is_some()) {
            self.define_axis(&symbol.text, symbol.span);
        }
        let value = match self.bracket(definition.unit.as_ref(), &symbol.text) {
            Err(()) => None,
            Ok(bracket) => match &definition.value {
                DefinitionValue::One(value) => self.single(value, bracket.as_ref(), input),
                DefinitionValue::ByAxis { axis, items } => {
                    self.list(&symbol.text, &axis.text, items, bracket.as_ref(), input)
                }
            },
        };
        if stands {
            self.define(&symbol.text, symbol.span, value, input);
        }
        self.advise_load_factor(definition);
    }

    /// Whether the right side uses no symbol and no function of the trade.
    fn is_input(&self) -> bool {
        let Some(statement) = self.tree.statements.get(self.statement) else {
            return false;
        };
        let mut input = true;
        statement_uses(statement, &mut |used| input &= self.leaves_input(used));
        input
    }

    /// Whether a right side that uses this is an input still.
    pub(crate) fn leaves_input(&self, used: Use<'_>) -> bool {
        match used {
            Use::Symbol(name, _) => self.names.symbol(name).is_none(),
            Use::Function(name, _) => {
                let row = crate::catalogue::entry(name);
                let general = row.is_some_and(|e| e.group == crate::catalogue::GENERAL);
                general && self.names.function(name).is_none()
            }
            Use::Axis(..) => true,
        }
    }

    /// Lists the value of a symbol, or each field of a record.
    pub(crate) fn define(
        &mut self,
        name: &str,
        span: Span,
        value: Option<(Typed, Vec<PointTolerance>)>,
        input: bool,
    ) {
        let index = self.names.index(name);
        let Some((typed, tolerances)) = value else {
            self.add_failed(name.to_string(), span);
            return;
        };
        let meaning = if let Kind::Record(entry) = typed.kind {
            let mut fields = Vec::new();
            for (at, field) in entry.fields.iter().enumerate() {
                let typed = self.field_of_call(entry, typed.node, at, span);
                let symbol = format!("{name}.{}", field.name);
                fields.push(match typed {
                    Some(t) => self.add_quantity(symbol, span, t.kind, t.unit, Some(t.node), false),
                    None => self.add_quantity(
                        symbol,
                        span,
                        Kind::Number(NumberKind::of(Dimension::NONE)),
                        None,
                        None,
                        false,
                    ),
                });
            }
            Meaning::Record { entry, fields }
        } else {
            let kind = settled(typed.kind);
            let node = Some(typed.node);
            let quantity = self.add_quantity(
                name.to_string(),
                span,
                kind,
                typed.unit.clone(),
                node,
                input,
            );
            self.add_tolerances(quantity, tolerances);
            let marks = Marks {
                sea_level: typed.marks.sea_level,
                difference: typed.marks.difference,
                ..Marks::default()
            };
            Meaning::Value {
                quantity,
                unit: typed.unit,
                marks,
            }
        };
        if let Some(index) = index {
            self.meanings[index] = meaning;
        }
        if let Some(hidden) = super::constant(name) {
            self.report(
                span,
                Fault::HidesConstant {
                    name: hidden.name.to_string(),
                },
            );
        }
    }

    pub(crate) fn add_tolerances(&mut self, quantity: QuantityId, points: Vec<PointTolerance>) {
        for point in points {
            self.program.tolerances.push(Tolerance {
                quantity,
                at: point.at,
                width: point.width,
            });
        }
    }

    fn single(
        &mut self,
        value: &Toleranced,
        bracket: Option<&Bracket>,
        input: bool,
    ) -> Option<(Typed, Vec<PointTolerance>)> {
        let judged = self.judged(value, bracket, input)?;
        let points = judged
            .width
            .map(|width| PointTolerance {
                at: Vec::new(),
                width,
            })
            .into_iter()
            .collect();
        Some((judged.typed, points))
    }

    /// `x +/- t`.
    pub(crate) fn judged(
        &mut self,
        value: &Toleranced,
        bracket: Option<&Bracket>,
        input: bool,
    ) -> Option<Judged> {
        let typed = self.value_under(&value.value, bracket);
        let Some(tolerance) = &value.tolerance else {
            return Some(Judged {
                typed: typed?,
                width: None,
            });
        };
        if !input {
            self.report(tolerance.span, Fault::TolerancePlace);
            return None;
        }
        if let ExprKind::Number {
            value: part,
            unit: Some(unit),
            ..
        } = &tolerance.kind
            && unit.text == "%"
        {
            return Some(Judged {
                typed: typed?,
                width: Some(ToleranceWidth::Part((part * 0.01).abs())),
            });
        }
        let step = bracket.map(|b| Bracket {
            unit: step_of(&b.unit),
            symbol: b.symbol.clone(),
        });
        let width = self.value_under(tolerance, step.as_ref());
        let (typed, width) = (typed?, width?);
        if width.marks.scale {
            self.report(
                tolerance.span,
                Fault::TemperatureDifference {
                    text: self.words(tolerance.span),
                },
            );
            return None;
        }
        self.common("+/-", &typed, &width, tolerance.span)?;
        Some(Judged {
            typed,
            width: Some(ToleranceWidth::Node(width.node)),
        })
    }

    fn list(
        &mut self,
        symbol: &str,
        axis_name: &str,
        items: &[ListItem],
        bracket: Option<&Bracket>,
        input: bool,
    ) -> Option<(Typed, Vec<PointTolerance>)> {
        let judged: Vec<Option<Judged>> = items
            .iter()
            .map(|i| self.judged(&i.value, bracket, input))
            .collect();
        let axis = *self.axis_of_symbol.get(axis_name)?;
        let places = self.places_of_items(symbol, axis, items)?;
        let mut ordered: Vec<Option<Judged>> = self.program.axes[axis.0 as usize]
            .labels
            .iter()
            .map(|_| None)
            .collect();
        for (place, judged) in places.into_iter().zip(judged) {
            ordered[place] = Some(judged?);
        }
        let ordered: Vec<Judged> = ordered.into_iter().collect::<Option<_>>()?;
        self.column(symbol, axis, ordered.into_iter().map(Some).collect())
    }

    /// One value for each label of an axis; `None` where there is none.
    pub(crate) fn column(
        &mut self,
        name: &str,
        axis: AxisId,
        items: Vec<Option<Judged>>,
    ) -> Option<(Typed, Vec<PointTolerance>)> {
        let mut tolerances = Vec::new();
        let mut nodes = Vec::with_capacity(items.len());
        let mut all: Option<Typed> = None;
        for (label, judged) in items.into_iter().enumerate() {
            let Some(judged) = judged else {
                nodes.push(self.node(Op::None, AxisSet::NONE));
                continue;
            };
            nodes.push(judged.typed.node);
            if let Some(width) = judged.width {
                tolerances.push(PointTolerance {
                    at: vec![(axis, label)],
                    width,
                });
            }
            all = Some(self.merge(name, all, judged.typed)?);
        }
        let mut all = all.unwrap_or_else(|| self.no_value());
        let axes = self.axes_of_all(&nodes).with(AxisSet::of(axis));
        all.node = self.node(Op::List { axis, items: nodes }, axes);
        all.marks = Marks::default();
        Some((all, tolerances))
    }

    /// A value that is never there.
    pub(crate) fn no_value(&mut self) -> Typed {
        let node = self.node(Op::None, AxisSet::NONE);
        let kind = Kind::Number(NumberKind::of(Dimension::NONE));
        Typed {
            node,
            kind,
            unit: None,
            span: Span::default(),
            marks: Marks::default(),
        }
    }

    /// The kind and unit that the values of a list share.
    pub(crate) fn merge(&mut self, name: &str, all: Option<Typed>, next: Typed) -> Option<Typed> {
        let Some(all) = all else { return Some(next) };
        let any = |t: &Typed| matches!(t.kind, Kind::Number(n) if n.any);
        let kind = match (all.kind, next.kind) {
            (Kind::Number(_), Kind::Number(_)) => {
                Kind::Number(self.common(name, &all, &next, next.span)?)
            }
            (a, b) if a == b => a,
            (_, b) if any(&all) => b,
            (a, _) if any(&next) => a,
            (a, b) => {
                let wanted = super::operand::kind_name(a);
                return self.wrong_kind(next.span, name, wanted, b);
            }
        };
        let unit = self.unit_of_operands(&[&all, &next]);
        let marks = Marks {
            zero: all.marks.zero && next.marks.zero,
            ..Marks::default()
        };
        Some(Typed {
            kind,
            unit,
            marks,
            ..next
        })
    }

    /// Which label each item of a list belongs to.
    fn places_of_items(
        &mut self,
        symbol: &str,
        axis: AxisId,
        items: &[ListItem],
    ) -> Option<Vec<usize>> {
        let labels = self.program.axes[axis.0 as usize].labels.clone();
        let axis_name = self.program.axes[axis.0 as usize].name.clone();
        let labelled = items.iter().any(|i| i.label.is_some());
        if !labelled {
            if items.len() != labels.len() {
                let span = items
                    .first()
                    .zip(items.last())
                    .map_or(Span::default(), |(a, b)| a.span.to(b.span));
                let found = items.len();
                self.report(
                    span,
                    Fault::ByCount {
                        symbol: symbol.to_string(),
                        axis: axis_name,
                        labels,
                        found,
                    },
                );
                return None;
            }
            return Some((0..labels.len()).collect());
        }
        let mut places = Vec::new();
        for item in items {
            let Some(label) = &item.label else {
                return None;
            };
            places.push(self.place_of_label(axis, label)?);
        }
        let missing: Vec<String> = labels
            .iter()
            .enumerate()
            .filter(|(i, _)| !places.contains(i))
            .map(|(_, l)| l.clone())
            .collect();
        let twice = (0..places.len()).find(|i| places[..*i].contains(&places[*i]));
        if let Some(twice) = twice {
            let label = items[twice].label.clone().unwrap_or_default();
            self.report(
                label.span,
                Fault::LabelTwice {
                    axis: axis_name,
                    label: label.text,
                },
            );
            return None;
        }
        if !missing.is_empty() {
            let span = items
                .first()
                .zip(items.last())
                .map_or(Span::default(), |(a, b)| a.span.to(b.span));
            let fault = Fault::LabelMissing {
                symbol: symbol.to_string(),
                axis: axis_name,
                labels: missing,
            };
            self.report(span, fault);
            return None;
        }
        Some(places)
    }

    /// The label of an axis that a text means.
    pub(crate) fn place_of_label(&mut self, axis: AxisId, label: &Words) -> Option<usize> {
        let row = self.program.axes.get(axis.0 as usize);
        let found = row.and_then(|row| row.find(&label.text));
        if found.is_none() {
            let axis = &self.program.axes[axis.0 as usize];
            let nearest =
                crate::nearest::nearest(&label.text, axis.labels.iter().map(String::as_str));
            let fault = Fault::UnknownLabel {
                axis: axis.name.clone(),
                label: label.text.clone(),
                nearest,
            };
            self.report(label.span, fault);
        }
        found
    }

    /// Units of an own function's parameters and result are read even where nobody calls it.
    pub(crate) fn check_function(&mut self, function: &FunctionDefinition) {
        for parameter in &function.parameters {
            let _ = self.bracket(parameter.unit.as_ref(), &parameter.name.text);
        }
        let _ = self.bracket(function.unit.as_ref(), &function.name.text);
    }

    /// A call of an own function: its body, checked with the arguments in the place of the parameters.
    pub(crate) fn own_call(
        &mut self,
        statement: usize,
        arguments: &[Argument],
        span: Span,
    ) -> Option<Typed> {
        let tree = self.tree;
        let StatementKind::Function(function) = &tree.statements.get(statement)?.kind else {
            return None;
        };
        let parameters: Vec<(&str, bool)> = function
            .parameters
            .iter()
            .map(|p| (p.name.text.as_str(), true))
            .collect();
        let placed = self.place_arguments(&function.name.text, &parameters, arguments, span);
        let mut bound = Vec::new();
        let mut failed = placed.is_none();
        for (parameter, argument) in function.parameters.iter().zip(placed.unwrap_or_default()) {
            match argument.and_then(|a| self.expression(&a.value)) {
                Some(typed) => bound.push((parameter.name.text.clone(), typed)),
                None => failed = true,
            }
        }
        if failed || self.order.circular.get(statement).copied().unwrap_or(true) {
            return None;
        }
        for ((_, typed), parameter) in bound.iter_mut().zip(&function.parameters) {
            let caller = std::mem::replace(&mut self.statement, statement);
            let bracket = self.bracket(parameter.unit.as_ref(), &parameter.name.text);
            self.statement = caller;
            let Some(bracket) = bracket.ok()? else {
                continue;
            };
            let kept = typed.clone();
            self.fits_argument(
                &function.name.text,
                &parameter.name.text,
                bracket.unit.unit.dimension,
                &kept,
            )?;
            typed.unit = Some(bracket.unit).filter(|u| !u.text.is_empty());
        }
        self.write_out(statement, function, bound, span)
    }

    fn write_out(
        &mut self,
        statement: usize,
        function: &FunctionDefinition,
        parameters: Vec<(String, Typed)>,
        span: Span,
    ) -> Option<Typed> {
        let outer = self.trace_body(self.statement, span);
        self.frames.push(Frame {
            statement: self.statement,
            parameters,
        });
        self.statement = statement;
        let body: &Expr = &function.body;
        let result = match self.bracket(function.unit.as_ref(), &function.name.text) {
            Ok(bracket) => self.value_under(body, bracket.as_ref()),
            Err(()) => None,
        };
        if let Some(frame) = self.frames.pop() {
            self.statement = frame.statement;
        }
        self.trace_back(outer);
        result.map(|typed| Typed {
            span,
            marks: Marks::systems_of(&[&typed]),
            ..typed
        })
    }

    /// `n = 3.8 g`: a load factor is a bare number.
    fn advise_load_factor(&mut self, definition: &Definition) {
        let DefinitionValue::One(value) = &definition.value else {
            return;
        };
        if let ExprKind::Number {
            unit: Some(unit), ..
        } = &value.value.kind
            && unit.text == "g"
            && definition.symbol.text.starts_with('n')
        {
            let text = self.words(value.value.span);
            let mend = text.trim_end_matches('g').trim_end().to_string();
            self.report(value.value.span, Fault::LoadFactorUnit { text, mend });
        }
    }
}

/// A tolerance at one place of a list or column.
pub(crate) struct PointTolerance {
    pub(crate) at: Vec<(AxisId, usize)>,
    pub(crate) width: ToleranceWidth,
}

/// A definition of nothing but `none` is a pure number.
pub(super) fn settled(kind: Kind) -> Kind {
    match kind {
        Kind::Number(n) if n.any => Kind::Number(NumberKind { any: false, ..n }),
        kind => kind,
    }
}

/// The unit of a step under a bracket: on a temperature scale, kelvins or degrees Rankine.
pub(crate) fn step_of(unit: &crate::program::ShownUnit) -> crate::program::ShownUnit {
    if !unit.unit.absolute {
        return unit.clone();
    }
    let text = if &*unit.text == "degF" { "degR" } else { "K" };
    super::units::unit_of_text(text).unwrap_or_else(|| unit.clone())
}
