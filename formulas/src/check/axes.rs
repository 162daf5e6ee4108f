//! Axes: declared by `vary` and by the keys of tables, before any expression is checked.

use super::bracket::Bracket;
use super::{Checker, Marks, Meaning};
use crate::axes::{AXES_MOST, AxisId, AxisSet};
use crate::names::Role;
use crate::problem::Fault;
use crate::program::{Axis, Kind, Op, ShownUnit};
use crate::span::Span;
use crate::syntax::{Expr, StatementKind, Table, Vary, VaryPoints, Words};
use rustc_hash::FxHashSet;

/// Most labels to an axis.
pub(crate) const LABELS_MOST: usize = 100_000;

/// The points of an axis before it is declared.
enum Points {
    Labels(Vec<String>),
    Numbers(Vec<f64>, ShownUnit),
}

impl Checker<'_> {
    /// Declares every axis, in the order of the sheet.
    pub(crate) fn declare_axes(&mut self) {
        let tree = self.tree;
        for (index, statement) in tree.statements.iter().enumerate() {
            self.statement = index;
            match &statement.kind {
                StatementKind::Vary(vary) => {
                    let points = self.vary_points(vary);
                    self.declare(&vary.name.text, vary.name.span, Role::Axis, points);
                }
                StatementKind::Table(table) => self.declare_keys(table),
                StatementKind::Definition(definition) => self.declare_made(definition),
                StatementKind::Use { name, .. } => self.declare_used_axes(name),
                _ => {}
            }
        }
    }

    /// Declares an axis of labels.
    pub(super) fn declare_labels(
        &mut self,
        name: &str,
        span: Span,
        role: Role,
        labels: Option<Vec<String>>,
    ) {
        self.declare(name, span, role, labels.map(Points::Labels));
    }

    fn declare(&mut self, name: &str, span: Span, role: Role, points: Option<Points>) {
        let stands = self
            .names
            .symbol(name)
            .is_some_and(|s| s.statement == self.statement && s.role == role);
        let (true, Some(points)) = (stands, points) else {
            return;
        };
        if self.program.axes.len() >= AXES_MOST {
            self.report(span, Fault::AxisLimit { limit: AXES_MOST });
            return;
        }
        let id = AxisId(self.program.axes.len() as u8);
        let axis = match points {
            Points::Labels(labels) => {
                let label_texts = labels.iter().map(|l| self.text_id(l)).collect();
                Axis {
                    name: name.to_string(),
                    statement: self.statement,
                    labels,
                    label_texts,
                    values: None,
                    unit: None,
                    listed: true,
                }
            }
            Points::Numbers(values, unit) => Axis {
                name: name.to_string(),
                statement: self.statement,
                labels: point_labels(&values, &unit, self.program.digits),
                label_texts: Vec::new(),
                values: Some(values),
                unit: (!unit.text.is_empty()).then_some(unit),
                listed: true,
            },
        };
        self.program.axes.push(axis);
        self.axis_of_symbol.insert(name.to_string(), id);
    }

    fn vary_points(&mut self, vary: &Vary) -> Option<Points> {
        let name = &vary.name.text;
        let bracket = self.bracket(vary.unit.as_ref(), name).ok()?;
        let unit = bracket.clone().map(|b| b.unit);
        match &vary.points {
            VaryPoints::Labels(labels) => self.labels(name, labels).map(Points::Labels),
            VaryPoints::List(list) => {
                let values: Vec<Option<f64>> = list
                    .iter()
                    .map(|e| self.fixed(e, bracket.as_ref(), name))
                    .collect();
                let values: Vec<f64> = values.into_iter().collect::<Option<_>>()?;
                self.distinct(name, list, &values)?;
                Some(Points::Numbers(values, unit.unwrap_or_else(unit_one)))
            }
            VaryPoints::Step { from, to, step } => {
                let step_bracket = bracket.as_ref().map(|b| Bracket {
                    unit: super::definition::step_of(&b.unit),
                    ..b.clone()
                });
                let a = self.fixed(from, bracket.as_ref(), name);
                let b = self.fixed(to, bracket.as_ref(), name);
                let d = self.fixed(step, step_bracket.as_ref(), name);
                let unit = unit.unwrap_or_else(unit_one);
                let (a, b) = (unit.unit.from_si(a?), unit.unit.from_si(b?));
                let d = step_bracket.map_or(d?, |s| s.unit.unit.from_si(d.unwrap_or(0.0)));
                let count = self.steps(name, step.span, a, b, d)?;
                self.advise_end(name, step.span, (a + count as f64 * d, b, d), &unit);
                let values = (0..=count)
                    .map(|i| unit.unit.to_si(a + i as f64 * d))
                    .collect();
                Some(Points::Numbers(values, unit))
            }
            VaryPoints::Count { from, to, count } => {
                let a = self.fixed(from, bracket.as_ref(), name);
                let b = self.fixed(to, bracket.as_ref(), name);
                let n = self.fixed(count, None, name)?;
                let unit = unit.unwrap_or_else(unit_one);
                let (a, b) = (unit.unit.from_si(a?), unit.unit.from_si(b?));
                let whole = n == n.floor() && n >= 1.0;
                if !whole || (n > 1.0 && a == b) {
                    self.report(count.span, Fault::AxisSteps { axis: name.clone() });
                    return None;
                }
                self.within_labels(name, count.span, n)?;
                let value = |i: usize| {
                    if i == 0 {
                        a
                    } else if i as f64 == n - 1.0 {
                        b
                    } else {
                        a + (b - a) * i as f64 / (n - 1.0)
                    }
                };
                Some(Points::Numbers(
                    (0..n as usize).map(|i| unit.unit.to_si(value(i))).collect(),
                    unit,
                ))
            }
        }
    }

    /// Advice where the last point is not the end that is written.
    fn advise_end(
        &mut self,
        axis: &str,
        span: Span,
        (last, b, d): (f64, f64, f64),
        unit: &ShownUnit,
    ) {
        if (b - last).abs() <= 1e-9 * d.abs().max(b.abs()) {
            return;
        }
        let text = (!unit.text.is_empty()).then_some(&*unit.text);
        let shown = crate::numbers::labels(&[last, b], self.program.digits, text);
        let [last, end] = shown.as_slice() else {
            return;
        };
        let (last, end) = (last.clone(), end.clone());
        let axis = axis.to_string();
        self.report(span, Fault::AxisEndLeftOut { axis, last, end });
    }

    pub(super) fn within_labels(&mut self, axis: &str, span: Span, found: f64) -> Option<()> {
        if found <= LABELS_MOST as f64 {
            return Some(());
        }
        let fault = Fault::LabelLimit {
            axis: axis.to_string(),
            limit: LABELS_MOST,
            found: found as u64,
        };
        self.report(span, fault);
        None
    }

    /// How many steps lead from a to b, both ends included where they meet.
    fn steps(&mut self, name: &str, span: Span, a: f64, b: f64, d: f64) -> Option<usize> {
        let steps = (b - a) / d;
        if !steps.is_finite() || steps < 0.0 {
            self.report(
                span,
                Fault::AxisSteps {
                    axis: name.to_string(),
                },
            );
            return None;
        }
        let steps = (steps + 1e-9).floor();
        self.within_labels(name, span, steps + 1.0)?;
        Some(steps as usize)
    }

    /// A number of an axis: numbers and units only.
    pub(super) fn fixed(
        &mut self,
        expr: &Expr,
        bracket: Option<&Bracket>,
        axis: &str,
    ) -> Option<f64> {
        let mut symbols = false;
        crate::names::uses(expr, &mut |_| symbols = true);
        let typed = if symbols {
            None
        } else {
            self.value_under(expr, bracket)
        };
        let value = typed.as_ref().and_then(|t| self.constant_of(t.node));
        if value.is_none() && (symbols || typed.is_some()) {
            self.report(
                expr.span,
                Fault::AxisNumbers {
                    axis: axis.to_string(),
                },
            );
        }
        value
    }

    fn labels(&mut self, name: &str, labels: &[Words]) -> Option<Vec<String>> {
        self.within_labels(name, labels.first()?.span, labels.len() as f64)?;
        let mut seen = FxHashSet::default();
        for label in labels {
            if !seen.insert(label.text.as_str()) {
                self.report(
                    label.span,
                    Fault::LabelTwice {
                        axis: name.to_string(),
                        label: label.text.clone(),
                    },
                );
                return None;
            }
        }
        Some(labels.iter().map(|l| l.text.clone()).collect())
    }

    fn distinct(&mut self, name: &str, list: &[Expr], values: &[f64]) -> Option<()> {
        let mut seen = FxHashSet::default();
        for (expr, value) in list.iter().zip(values) {
            if !seen.insert(value.to_bits()) {
                let value = self.words(expr.span);
                self.report(
                    expr.span,
                    Fault::AxisPointTwice {
                        axis: name.to_string(),
                        value,
                    },
                );
                return None;
            }
        }
        self.within_labels(name, list.first()?.span, list.len() as f64)
    }

    /// Keys of a table that no `vary` or earlier table has declared.
    fn declare_keys(&mut self, table: &Table) {
        for (at, key) in table.keys.iter().enumerate() {
            let name = &key.name.text;
            if self
                .names
                .symbol(name)
                .is_none_or(|s| s.statement != self.statement || s.role != Role::Key(at))
            {
                continue;
            }
            let points = match &key.unit {
                None => self.key_labels(table, at).map(Points::Labels),
                Some(text) => self
                    .bracket(Some(text), name)
                    .ok()
                    .flatten()
                    .and_then(|b| self.key_numbers(table, at, &b)),
            };
            self.declare(name, key.name.span, Role::Key(at), points);
        }
    }

    fn key_labels(&mut self, table: &Table, at: usize) -> Option<Vec<String>> {
        let mut seen = FxHashSet::default();
        let mut labels = Vec::new();
        for key in table.rows.iter().filter_map(|row| row.keys.get(at)) {
            if seen.insert(key.text.as_str()) {
                labels.push(key.text.clone());
            }
        }
        self.key_count(table, at, labels.len())?;
        Some(labels)
    }

    fn key_numbers(&mut self, table: &Table, at: usize, bracket: &Bracket) -> Option<Points> {
        let mut seen = FxHashSet::default();
        let mut values = Vec::new();
        for row in &table.rows {
            let Some(Some(expr)) = row.key_values.get(at) else {
                continue;
            };
            let Some(value) = self.fixed(expr, Some(bracket), &bracket.symbol) else {
                continue;
            };
            if seen.insert(value.to_bits()) {
                values.push(value);
            }
        }
        self.key_count(table, at, values.len())?;
        let rising = values.windows(2).all(|w| w[0] < w[1]);
        let falling = values.windows(2).all(|w| w[0] > w[1]);
        if !rising && !falling {
            self.report(
                table.keys[at].name.span,
                Fault::AxisOrder {
                    axis: bracket.symbol.clone(),
                },
            );
        }
        Some(Points::Numbers(values, bracket.unit.clone()))
    }

    fn key_count(&mut self, table: &Table, at: usize, count: usize) -> Option<()> {
        let key = &table.keys[at].name;
        if count == 0 {
            self.report(
                key.span,
                Fault::AxisEmpty {
                    axis: key.text.clone(),
                },
            );
            return None;
        }
        self.within_labels(&key.text, key.span, count as f64)
    }

    /// The quantity that an axis is along itself.
    pub(crate) fn define_axis(&mut self, name: &str, span: Span) {
        let index = self.names.index(name);
        let Some(axis) = self.axis_of_symbol.get(name).copied() else {
            return self.add_failed(name.to_string(), span);
        };
        let (kind, unit) = self.axis_kind(axis);
        let op = match kind {
            Kind::Text => Op::Labels(axis),
            _ => Op::Points(axis),
        };
        let node = self.node(op, AxisSet::of(axis));
        let quantity = self.add_quantity(
            name.to_string(),
            span,
            kind,
            unit.clone(),
            Some(node),
            false,
        );
        self.program.quantities[quantity.0 as usize].is_axis = true;
        if let Some(index) = index {
            self.meanings[index] = Meaning::Value {
                quantity,
                unit,
                marks: Marks::default(),
            };
        }
    }

    pub(crate) fn check_vary_symbol(&mut self, vary: &Vary) {
        let name = &vary.name.text;
        if self
            .names
            .symbol(name)
            .is_some_and(|s| s.statement == self.statement)
        {
            self.define_axis(name, vary.name.span);
        }
    }
}

fn unit_one() -> ShownUnit {
    ShownUnit {
        text: std::rc::Rc::from(""),
        unit: engine::quantity::Unit::ONE,
    }
}

/// The values of an axis as shown, with as many digits as make them differ.
fn point_labels(values: &[f64], unit: &ShownUnit, digits: u8) -> Vec<String> {
    let shown: Vec<f64> = values.iter().map(|v| unit.unit.from_si(*v)).collect();
    let text = (!unit.text.is_empty()).then_some(&*unit.text);
    crate::numbers::labels(&shown, digits, text)
}
