//! What looks at the blocks of a group and makes no column of their length: reductions of large columns, governing
//! values by group, requirements, free bodies.

use super::reduce::{Reducer, Walk};
use super::wide::Source;
use super::{scalar, take_value};
use crate::axes::Shape;
use crate::plan::{Judged, Plan, SlotId, Step, Work};
use crate::program::{EntryKind, Guard, Program};
use crate::syntax::BinaryOp;
use crate::values::{
    FreebodyDrawn, FreebodyValues, RequirementValues, Summary, WorstCondition, is_excluded,
};

/// A requirement `=` is met within this part of the larger side, and a free body closes within it.
pub(super) const CLOSE: f64 = 1e-9;

/// More than any load, so that a condition that does not close is drawn before all others.
const OPEN_WEIGHT: f64 = 1e300;

/// One that looks.
pub(super) enum Look<'a> {
    Reduce(SlotId, Reducer<'a>),
    Groups(usize, Groups),
    Requirement(usize, RequirementLook),
    Freebody(usize, FreebodyLook),
    Guard(usize, GuardLook),
}

impl<'a> Look<'a> {
    /// What a step looks for in the conditions of a shape.
    pub(super) fn of(
        program: &'a Program,
        plan: &Plan,
        work: &Work,
        shape: &Shape,
        step: &Step,
    ) -> Option<Self> {
        match work {
            Work::Reduce { how, over } => {
                let out = *step.out.first()?;
                let axes = plan.slots.get(out.0 as usize).copied()?;
                let out_shape = plan.shape(axes);
                let reducer = Reducer::new(*how, shape, *over, &out_shape, &program.axes);
                Some(Look::Reduce(out, reducer))
            }
            Work::Judge { what, .. } => match what {
                Judged::Governing(at) => {
                    let line = program.governing.get(*at)?;
                    let quantity = program.quantities.get(line.quantity.0 as usize)?;
                    let left = quantity.axes.without(line.over);
                    Some(Look::Groups(*at, Groups::new(shape, &plan.shape(left))))
                }
                Judged::Requirement(at) => {
                    let line = program.requirements.get(*at)?;
                    let ops = line.parts.iter().map(|p| p.op).collect();
                    Some(Look::Requirement(*at, RequirementLook::new(shape, ops)))
                }
                Judged::Guard(at) => {
                    let guard = program.guards.get(*at)?;
                    Some(Look::Guard(*at, GuardLook::new(guard)))
                }
                Judged::Freebody(at) => {
                    let items = &program.freebodies.get(*at)?.items;
                    let kinds = items.iter().map(|e| (e.kind, e.at.is_some())).collect();
                    let governed = items.iter().map(|e| {
                        e.quantity
                            .is_some_and(|q| program.governing.iter().any(|g| g.quantity == q))
                    });
                    let governed = governed.collect();
                    Some(Look::Freebody(
                        *at,
                        FreebodyLook::new(shape, kinds, governed),
                    ))
                }
            },
            _ => None,
        }
    }

    /// Takes the next block.
    pub(super) fn take(&mut self, start: usize, n: usize, reads: &[Source<'_>]) {
        let Some(first) = reads.first() else { return };
        match self {
            Look::Reduce(_, reducer) => reducer.take((0..n).map(|i| first.at(i))),
            Look::Groups(_, groups) => groups.take(start, (0..n).map(|i| first.at(i))),
            Look::Requirement(_, look) => {
                (0..n).for_each(|i| look.take(start + i, |read| reads[read].at(i)));
            }
            Look::Guard(_, look) => {
                (0..n).for_each(|i| look.take(start + i, |read| reads[read].at(i)));
            }
            Look::Freebody(_, look) => {
                (0..n).for_each(|i| look.take(start + i, |read| reads[read].at(i)));
            }
        }
    }
}

/// What a look at an output comes to.
#[derive(Clone, Debug)]
pub(super) enum LookResult {
    Groups(Vec<Summary>),
    Requirement(RequirementValues),
    Freebody(Box<FreebodyLook>),
    Guard(Outside),
}

/// Conditions in which a call is outside the range of its method.
#[derive(Clone, Debug, Default)]
pub(super) struct Outside {
    pub(super) count: u64,
    pub(super) first: Vec<usize>,
    /// The arguments in the first of them.
    pub(super) numbers: Vec<f64>,
}

/// A call whose arguments are looked at.
pub(super) struct GuardLook {
    holds: fn(&[f64]) -> bool,
    /// For each argument whether it is given, and what it is otherwise.
    given: Vec<(bool, f64)>,
    numbers: Vec<f64>,
    pub(super) outside: Outside,
}

impl GuardLook {
    fn new(guard: &Guard) -> Self {
        let pairs = guard.entry.parameters.iter().zip(&guard.arguments);
        let given = pairs
            .map(|(p, a)| (a.is_some(), p.default.unwrap_or(f64::NAN)))
            .collect();
        GuardLook {
            holds: guard.validity.holds,
            given,
            numbers: vec![0.0; guard.entry.parameters.len()],
            outside: Outside::default(),
        }
    }

    fn take(&mut self, condition: usize, read: impl Fn(usize) -> f64) {
        let mut next = 0;
        for (number, (given, default)) in self.numbers.iter_mut().zip(&self.given) {
            *number = *default;
            if *given {
                *number = read(next);
                next += 1;
                // An argument without a value has no result, and is told of there.
                if number.is_nan() {
                    return;
                }
            }
        }
        if (self.holds)(&self.numbers) {
            return;
        }
        self.outside.count += 1;
        if self.outside.first.is_empty() {
            self.outside.numbers.clone_from(&self.numbers);
        }
        if self.outside.first.len() < 5 {
            self.outside.first.push(condition);
        }
    }
}

/// Counts and extremes for each condition of fewer axes.
pub(super) struct Groups {
    walk: Walk,
    pub(super) summaries: Vec<Summary>,
}

impl Groups {
    fn new(shape: &Shape, group_shape: &Shape) -> Self {
        Groups {
            walk: Walk::new(shape, group_shape),
            summaries: vec![Summary::default(); group_shape.conditions()],
        }
    }

    fn take(&mut self, start: usize, values: impl Iterator<Item = f64>) {
        for (i, value) in values.enumerate() {
            if let Some(summary) = self.summaries.get_mut(self.walk.place()) {
                take_value(summary, start + i, value);
            }
            self.walk.step();
        }
    }
}

/// A requirement, judged condition by condition.
pub(super) struct RequirementLook {
    ops: Vec<BinaryOp>,
    least: f64,
    result: RequirementValues,
}

impl RequirementLook {
    fn new(shape: &Shape, ops: Vec<BinaryOp>) -> Self {
        RequirementLook {
            ops,
            least: f64::INFINITY,
            result: RequirementValues {
                shape: shape.clone(),
                ..RequirementValues::default()
            },
        }
    }

    /// Reads are the condition, then both sides of each comparison.
    fn take(&mut self, condition: usize, read: impl Fn(usize) -> f64) {
        let sides = |part: usize| (read(1 + 2 * part), read(2 + 2 * part));
        count_condition(&mut self.result, judged(&self.ops, read(0), sides));
        for (part, op) in self.ops.iter().enumerate() {
            let (left, right) = sides(part);
            let ratio = relative_reserve(*op, left, right);
            if ratio < self.least {
                self.least = ratio;
                self.result.worst = Some(WorstCondition {
                    part,
                    condition,
                    left,
                    right,
                });
            }
        }
    }

    pub(super) fn finish(mut self) -> RequirementValues {
        self.result.met = match (self.result.not_met, self.result.without_value) {
            (0, 0) => Some(true),
            (0, _) => None,
            _ => Some(false),
        };
        self.result
    }
}

/// A free body, added up condition by condition.
#[derive(Clone, Debug)]
pub(super) struct FreebodyLook {
    /// What each entry is, and whether it has a station.
    entries: Vec<(EntryKind, bool)>,
    /// Which entries are governed somewhere: their largest says which condition is drawn.
    governed: Vec<bool>,
    farthest: f64,
    heaviest: f64,
    pub(super) result: FreebodyValues,
    pub(super) worst_sums: Sums,
    pub(super) open: Vec<usize>,
}

impl FreebodyLook {
    fn new(shape: &Shape, entries: Vec<(EntryKind, bool)>, governed: Vec<bool>) -> Self {
        FreebodyLook {
            entries,
            governed,
            farthest: -1.0,
            heaviest: -1.0,
            result: FreebodyValues {
                shape: shape.clone(),
                known: true,
                closes: true,
                ..FreebodyValues::default()
            },
            worst_sums: Sums::default(),
            open: Vec::new(),
        }
    }

    /// Reads are the value of each entry and behind it its station, where it has one.
    fn take(&mut self, condition: usize, read: impl Fn(usize) -> f64) {
        let mut next = 0;
        let mut read = || {
            next += 1;
            read(next - 1)
        };
        let items = self.entries.iter().map(|(kind, has_station)| {
            let value = read();
            (*kind, value, if *has_station { read() } else { 0.0 })
        });
        let items: Vec<(EntryKind, f64, f64)> = items.collect();
        let Some(sums) = sums(items.iter().copied()) else {
            self.result.without_value += 1;
            return;
        };
        self.draw(condition, &items, &sums);
        let result = &mut self.result;
        let parts = [ratio(sums.force), ratio(sums.axial), ratio(sums.moment)];
        result.force_residual = result.force_residual.max(parts[0]);
        result.axial_residual = result.axial_residual.max(parts[1]);
        result.moment_residual = result.moment_residual.max(parts[2]);
        let far = parts.iter().copied().fold(0.0, f64::max);
        if far > self.farthest {
            self.farthest = far;
            result.worst = Some(condition);
            self.worst_sums = sums;
        }
        if far > CLOSE {
            result.closes = false;
            result.open.count += 1;
            if self.open.len() < 5 {
                self.open.push(condition);
            }
        }
    }
}

impl FreebodyLook {
    /// Keeps the condition that is drawn: that of the largest governed entry, else that of the largest loads; where the
    /// body does not close, that in which it is farthest from it.
    fn draw(&mut self, condition: usize, items: &[(EntryKind, f64, f64)], sums: &Sums) {
        let far = [sums.force, sums.axial, sums.moment].map(ratio);
        let far = far.into_iter().fold(0.0, f64::max);
        let governed = items.iter().zip(&self.governed).filter(|(_, g)| **g);
        let largest = governed.map(|((_, value, _), _)| value.abs());
        let weight = if far > CLOSE {
            OPEN_WEIGHT * (1.0 + far)
        } else if self.governed.contains(&true) {
            largest.fold(0.0, f64::max)
        } else {
            sums.force.1 + sums.axial.1 + sums.moment.1
        };
        if weight > self.heaviest {
            self.heaviest = weight;
            self.result.drawn = Some(FreebodyDrawn {
                condition,
                items: items.iter().map(|(_, value, at)| (*value, *at)).collect(),
                force: sums.force.0,
                axial: sums.axial.0,
                moment: sums.moment.0,
            });
        }
    }
}

/// Sums and sums of magnitudes.
#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Sums {
    pub(super) force: (f64, f64),
    pub(super) axial: (f64, f64),
    pub(super) moment: (f64, f64),
}

fn add(sum: &mut (f64, f64), value: f64) {
    sum.0 += value;
    sum.1 += value.abs();
}

pub(super) fn ratio(sum: (f64, f64)) -> f64 {
    if sum.1 == 0.0 {
        0.0
    } else {
        sum.0.abs() / sum.1
    }
}

/// The sums in one condition, moments about the first station and height; `None` where a value is missing.
pub(super) fn sums(items: impl Iterator<Item = (EntryKind, f64, f64)>) -> Option<Sums> {
    let mut sums = Sums::default();
    let (mut first_station, mut first_height) = (None, None);
    for (kind, value, at) in items {
        if value.is_nan() || at.is_nan() {
            return None;
        }
        match kind {
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
fn judged(ops: &[BinaryOp], truth: f64, sides: impl Fn(usize) -> (f64, f64)) -> f64 {
    if !ops.contains(&BinaryOp::Equal) {
        return truth;
    }
    ops.iter().enumerate().fold(1.0, |all, (part, op)| {
        let (left, right) = sides(part);
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
