//! Governing conditions, requirements, free bodies.

use super::feed::Feed;
use super::{Machine, conditions, scalar, summary_of};
use crate::axes::Shape;
use crate::names::located;
use crate::plan::SlotId;
use crate::problem::Fault;
use crate::program::{
    EntryKind, Freebody, FreebodyEntry, Governing, NodeId, QuantityId, Requirement,
};
use crate::span::Span;
use crate::syntax::BinaryOp;
use crate::values::{
    FreebodyValues, GoverningValues, RequirementValues, Values, WorstCondition, is_excluded,
};
use std::rc::Rc;

/// A requirement `=` is met within this part of the larger side, and a free body closes within it.
const CLOSE: f64 = 1e-9;

/// A column and its shape, held while outputs are worked out.
pub(super) struct Held {
    values: Rc<Vec<f64>>,
    shape: Shape,
}

impl Held {
    pub(super) fn feed(&self, outer: &Shape) -> Feed<'_> {
        Feed::new(&self.values, &self.shape, outer)
    }
}

impl Machine<'_> {
    /// Everything that is asked of the values, once they are there.
    pub(super) fn finish(&mut self, values: &mut Values) {
        let program = self.program;
        values.governing = program
            .governing
            .iter()
            .map(|g| self.governing(g))
            .collect();
        values.requirements = program
            .requirements
            .iter()
            .map(|r| self.requirement(r))
            .collect();
        for body in &program.freebodies {
            let result = self.freebody(body);
            values.freebodies.push(result);
        }
        self.tolerances(values);
    }

    pub(super) fn held(&self, node: NodeId) -> Option<Held> {
        self.held_slot(self.slot_of(node)?)
    }

    fn held_slot(&self, slot: SlotId) -> Option<Held> {
        Some(Held {
            values: self.column(slot)?.clone(),
            shape: self.shape(slot),
        })
    }

    fn governing(&self, governing: &Governing) -> GoverningValues {
        let slot = self
            .plan
            .quantities
            .get(governing.quantity.0 as usize)
            .copied()
            .flatten();
        let Some(held) = slot.and_then(|s| self.held_slot(s)) else {
            return GoverningValues::default();
        };
        let all = summary_of(held.values.iter().copied().enumerate());
        let axes = self.program.quantities[governing.quantity.0 as usize]
            .axes
            .without(governing.over);
        let group_shape = Shape::of(axes, &self.plan.lengths);
        let strides = held.shape.strides_of(&group_shape);
        let mut members: Vec<Vec<usize>> = vec![Vec::new(); group_shape.conditions()];
        for condition in 0..held.values.len() {
            let group: usize = held
                .shape
                .indices(condition)
                .iter()
                .zip(&strides)
                .map(|(i, s)| i * s)
                .sum();
            members[group].push(condition);
        }
        let groups = members
            .iter()
            .map(|m| summary_of(m.iter().map(|c| (*c, held.values[*c]))))
            .collect();
        GoverningValues {
            all,
            groups,
            group_shape,
            ..GoverningValues::default()
        }
    }

    fn requirement(&self, requirement: &Requirement) -> RequirementValues {
        let shape = Shape::of(requirement.axes, &self.plan.lengths);
        let mut result = RequirementValues {
            shape: shape.clone(),
            ..RequirementValues::default()
        };
        let Some(condition) = requirement.condition.and_then(|c| self.held(c)) else {
            return result;
        };
        let sides: Option<Vec<(BinaryOp, Held, Held)>> = requirement
            .parts
            .iter()
            .map(|p| Some((p.op, self.held(p.left)?, self.held(p.right)?)))
            .collect();
        let sides = sides.unwrap_or_default();
        let feeds: Vec<(BinaryOp, Feed<'_>, Feed<'_>)> = sides
            .iter()
            .map(|(op, l, r)| (*op, l.feed(&shape), r.feed(&shape)))
            .collect();
        let truth = condition.feed(&shape);
        let mut least = f64::INFINITY;
        for at in 0..shape.conditions() {
            count_condition(&mut result, judged(&feeds, truth.value(at), at));
            for (part, (op, left, right)) in feeds.iter().enumerate() {
                let (left, right) = (left.value(at), right.value(at));
                let ratio = relative_reserve(*op, left, right);
                if ratio < least {
                    least = ratio;
                    result.worst = Some(WorstCondition {
                        part,
                        condition: at,
                        left,
                        right,
                    });
                }
            }
        }
        result.met = match (result.not_met, result.without_value) {
            (0, 0) => Some(true),
            (0, _) => None,
            _ => Some(false),
        };
        result
    }

    fn freebody(&mut self, body: &Freebody) -> FreebodyValues {
        let shape = Shape::of(body.axes, &self.plan.lengths);
        let mut result = FreebodyValues {
            shape: shape.clone(),
            ..FreebodyValues::default()
        };
        if body.items.is_empty() {
            return result;
        }
        let Some(items) = self.loaded(body) else {
            return result;
        };
        let items = reads(&items, &shape);
        result.known = true;
        result.closes = true;
        let mut open: Vec<usize> = Vec::new();
        let mut farthest = -1.0;
        let mut worst_sums = Sums::default();
        for at in 0..shape.conditions() {
            let sums = sums(&items, at);
            let Some(sums) = sums else {
                result.without_value += 1;
                continue;
            };
            let parts = [ratio(sums.force), ratio(sums.axial), ratio(sums.moment)];
            result.force_residual = result.force_residual.max(parts[0]);
            result.axial_residual = result.axial_residual.max(parts[1]);
            result.moment_residual = result.moment_residual.max(parts[2]);
            let far = parts.iter().copied().fold(0.0, f64::max);
            if far > farthest {
                farthest = far;
                result.worst = Some(at);
                worst_sums = sums;
            }
            if far > CLOSE {
                result.closes = false;
                result.open.count += 1;
                if open.len() < 5 {
                    open.push(at);
                }
            }
        }
        result.closes &= result.without_value == 0;
        result.open = conditions(self.program, &shape, result.open.count, &open);
        if result.open.count > 0 {
            self.report_open(body, &result, &worst_sums);
        }
        if result.closes {
            result.taken_up_by = self.taken_up_by(body, &shape);
        }
        result
    }

    /// The entries of a free body with their columns; `None` where one is not there.
    fn loaded(&self, body: &Freebody) -> Option<Vec<Loaded>> {
        let load = |entry: &FreebodyEntry| {
            let at = match entry.at {
                Some(node) => Some(self.held(node)?),
                None => None,
            };
            let value = self.held(entry.value)?;
            Some(Loaded {
                kind: entry.kind,
                value,
                at,
            })
        };
        body.items.iter().map(load).collect()
    }

    fn report_open(&mut self, body: &Freebody, result: &FreebodyValues, sums: &Sums) {
        let unit = |kind: EntryKind| {
            body.items
                .iter()
                .find(|e| e.kind == kind)
                .and_then(|e| e.unit.as_ref())
        };
        let force = unit(EntryKind::Force).or(unit(EntryKind::Axial));
        let moment = unit(EntryKind::Couple);
        let shown = |value: f64, unit: Option<&crate::program::ShownUnit>, si: &str| {
            let digits = self.program.digits;
            match unit {
                Some(u) => format!(
                    "{} {}",
                    crate::numbers::shown(u.unit.from_si(value), digits),
                    u.text
                ),
                None => format!("{} {si}", crate::numbers::shown(value, digits)),
            }
        };
        let axial = body.items.iter().any(|e| e.kind == EntryKind::Axial);
        let fault = Fault::FreebodyOpen {
            name: body.name.clone(),
            conditions: result.open.clone(),
            force: shown(sums.force.0, force, "N"),
            axial: axial.then(|| shown(sums.axial.0, force, "N")),
            moment: shown(sums.moment.0, moment, "N.m"),
        };
        self.problems.push(located(
            body.statement,
            Span::new(0, "freebody".len()),
            fault,
        ));
    }

    /// The symbol that takes up a trial amount added to another one, so that the force sum closes by construction.
    fn taken_up_by(&mut self, body: &Freebody, shape: &Shape) -> Option<String> {
        let forces: Vec<&FreebodyEntry> = body
            .items
            .iter()
            .filter(|e| e.kind == EntryKind::Force)
            .collect();
        let listed: Vec<(QuantityId, SlotId)> = forces
            .iter()
            .filter_map(|e| e.quantity)
            .filter_map(|q| {
                Some((
                    q,
                    self.plan.quantities.get(q.0 as usize).copied().flatten()?,
                ))
            })
            .collect();
        for (quantity, slot) in &listed {
            let column = self.column(*slot)?.clone();
            let size = column
                .iter()
                .filter(|v| !v.is_nan())
                .fold(0.0, |m: f64, v| m.max(v.abs()));
            let trial = if size > 0.0 { 0.375 * size } else { 1000.0 };
            let moved: Vec<f64> = column.iter().map(|v| v + trial).collect();
            let changed = self.with_columns(vec![(*slot, moved)], |machine| {
                if !machine.force_sum_closes(body, shape) {
                    return None;
                }
                let other = |(q, s): &&(QuantityId, SlotId)| {
                    q != quantity && s != slot && machine.is_overlaid(*s)
                };
                listed.iter().find(other).map(|(q, _)| *q)
            });
            if let Some(taker) = changed.flatten() {
                return self
                    .program
                    .quantities
                    .get(taker.0 as usize)
                    .map(|q| q.symbol.clone());
            }
        }
        None
    }

    fn force_sum_closes(&self, body: &Freebody, shape: &Shape) -> bool {
        let Some(items) = self.loaded(body) else {
            return false;
        };
        let items = reads(&items, shape);
        (0..shape.conditions()).all(|at| sums(&items, at).is_some_and(|s| ratio(s.force) <= CLOSE))
    }
}

/// An entry of a free body with its columns.
struct Loaded {
    kind: EntryKind,
    value: Held,
    at: Option<Held>,
}

/// The same, read along the conditions of the free body.
struct Read<'a> {
    kind: EntryKind,
    value: Feed<'a>,
    at: Option<Feed<'a>>,
}

fn reads<'a>(items: &'a [Loaded], shape: &Shape) -> Vec<Read<'a>> {
    let read = |item: &'a Loaded| Read {
        kind: item.kind,
        value: item.value.feed(shape),
        at: item.at.as_ref().map(|at| at.feed(shape)),
    };
    items.iter().map(read).collect()
}

/// Sums and sums of magnitudes.
#[derive(Clone, Copy, Default)]
struct Sums {
    force: (f64, f64),
    axial: (f64, f64),
    moment: (f64, f64),
}

fn add(sum: &mut (f64, f64), value: f64) {
    sum.0 += value;
    sum.1 += value.abs();
}

fn ratio(sum: (f64, f64)) -> f64 {
    if sum.1 == 0.0 {
        0.0
    } else {
        sum.0.abs() / sum.1
    }
}

/// The sums in one condition, moments about the first station and height; `None` where a value is missing.
fn sums(items: &[Read<'_>], condition: usize) -> Option<Sums> {
    let mut sums = Sums::default();
    let (mut first_station, mut first_height) = (None, None);
    for item in items {
        let value = item.value.value(condition);
        let at = item.at.as_ref().map_or(0.0, |at| at.value(condition));
        if value.is_nan() || at.is_nan() {
            return None;
        }
        match item.kind {
            EntryKind::Force => {
                add(&mut sums.force, value);
                add(
                    &mut sums.moment,
                    -value * (at - *first_station.get_or_insert(at)),
                );
            }
            EntryKind::Axial => {
                add(&mut sums.axial, value);
                add(
                    &mut sums.moment,
                    value * (at - *first_height.get_or_insert(at)),
                );
            }
            EntryKind::Couple => add(&mut sums.moment, value),
        }
    }
    Some(sums)
}

/// What one condition of a requirement comes to; a requirement `=` has a wider tolerance than a comparison.
fn judged(feeds: &[(BinaryOp, Feed<'_>, Feed<'_>)], truth: f64, at: usize) -> f64 {
    if !feeds.iter().any(|(op, _, _)| *op == BinaryOp::Equal) {
        return truth;
    }
    feeds.iter().fold(1.0, |all, (op, left, right)| {
        let (left, right) = (left.value(at), right.value(at));
        let part = if left.is_nan() || right.is_nan() {
            if left.is_nan() && !is_excluded(left) {
                left
            } else if right.is_nan() {
                right
            } else {
                left
            }
        } else if *op == BinaryOp::Equal {
            f64::from(u8::from(
                (left - right).abs() <= CLOSE * left.abs().max(right.abs()),
            ))
        } else {
            scalar::binary(*op, left, right)
        };
        super::kernel::logical(BinaryOp::And, all, part)
    })
}

fn count_condition(result: &mut RequirementValues, truth: f64) {
    if truth.is_nan() {
        if is_excluded(truth) {
            result.excluded += 1;
        } else {
            result.without_value += 1;
        }
    } else if truth == 0.0 {
        result.not_met += 1;
    }
}

/// Distance to the limit, positive when met.
#[must_use]
pub(super) fn reserve(op: BinaryOp, left: f64, right: f64) -> f64 {
    match op {
        BinaryOp::Less | BinaryOp::LessOrEqual => right - left,
        BinaryOp::Greater | BinaryOp::GreaterOrEqual => left - right,
        BinaryOp::NotEqual => (left - right).abs(),
        _ => -(left - right).abs(),
    }
}

/// The reserve over the sum of both sides' magnitudes, by which conditions are ranked.
pub(super) fn relative_reserve(op: BinaryOp, left: f64, right: f64) -> f64 {
    let size = left.abs() + right.abs();
    if size == 0.0 {
        0.0
    } else {
        reserve(op, left, right) / size
    }
}
