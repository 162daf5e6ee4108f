//! The run: steps are worked out in order, each over its own axes only.

mod along;
mod feed;
mod kernel;
mod lines;
pub mod missing;
mod outputs;
mod overlay;
mod pick;
mod reduce;
pub(crate) mod scalar;
mod solve;
mod tolerance;

use crate::axes::{AxisSet, Shape};
use crate::names::located;
use crate::plan::{Plan, SlotId, Step, Work};
use crate::problem::{Cause, Conditions, Fault, Located};
use crate::program::Program;
use crate::span::Span;
use crate::values::{Column, NONE, QuantityValues, Summary, Values, is_excluded};
use feed::Feed;
use std::rc::Rc;

/// Most operations in a recalculation: counted, not timed, so that every machine stops at the same place.
pub const OPERATIONS_MOST: f64 = 2e10;
/// Numbers kept at a time before columns that are no longer read are let go.
const KEPT_MOST: usize = 48 << 20;
/// Conditions up to which the column of a quantity is kept for good.
pub const COLUMN_KEPT_MOST: usize = 65_536;

/// Limits that a host may lower.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Limits {
    /// Operations in a recalculation.
    pub operations: f64,
}

impl Default for Limits {
    fn default() -> Self {
        Limits {
            operations: OPERATIONS_MOST,
        }
    }
}

/// The columns while a plan is run.
pub(crate) struct Machine<'a> {
    pub(crate) program: &'a Program,
    pub(crate) plan: &'a Plan,
    pub(crate) columns: Vec<Option<Rc<Vec<f64>>>>,
    pub(crate) problems: Vec<Located>,
    limits: Limits,
    operations: f64,
    stopped: bool,
    /// Columns worked out anew under a change in hand.
    overlaid: Vec<bool>,
    /// For each slot the last step that reads it.
    last_read: Vec<usize>,
}

/// Runs a plan from the start.
#[must_use]
pub fn run(
    program: &Program,
    plan: &Plan,
    limits: Limits,
    asked: &[String],
) -> (Values, Vec<Located>) {
    let mut machine = Machine {
        program,
        plan,
        columns: vec![None; plan.slots.len()],
        problems: Vec::new(),
        limits,
        operations: 0.0,
        stopped: false,
        overlaid: Vec::new(),
        last_read: last_reads(plan),
    };
    let mut values = Values {
        quantities: program
            .quantities
            .iter()
            .map(|q| unknown(q.axes, plan))
            .collect(),
        ..Values::default()
    };
    machine.run_all(&mut values, asked);
    machine.finish(&mut values);
    (values, machine.problems)
}

fn unknown(axes: AxisSet, plan: &Plan) -> QuantityValues {
    QuantityValues {
        shape: Shape::of(axes, &plan.lengths),
        ..QuantityValues::default()
    }
}

/// The last step that reads each slot; outputs read at the very end.
fn last_reads(plan: &Plan) -> Vec<usize> {
    let mut last = vec![0; plan.slots.len()];
    for (at, step) in plan.steps.iter().enumerate() {
        step.reads
            .iter()
            .chain(&step.out)
            .for_each(|slot| last[slot.0 as usize] = at);
    }
    last
}

impl Machine<'_> {
    pub(crate) fn shape(&self, slot: SlotId) -> Shape {
        let axes = self
            .plan
            .slots
            .get(slot.0 as usize)
            .copied()
            .unwrap_or(AxisSet::NONE);
        Shape::of(axes, &self.plan.lengths)
    }

    pub(crate) fn column(&self, slot: SlotId) -> Option<&Rc<Vec<f64>>> {
        self.columns.get(slot.0 as usize)?.as_ref()
    }

    fn run_all(&mut self, values: &mut Values, asked: &[String]) {
        let plan = self.plan;
        let mut waiting = quantities_by_step(plan);
        let needed_at_end = self.needed_at_end();
        let mut kept = 0usize;
        for (at, step) in plan.steps.iter().enumerate() {
            if !self.stopped {
                self.run_step(step);
                kept += step
                    .out
                    .iter()
                    .map(|s| self.column(*s).map_or(0, |c| c.len()))
                    .sum::<usize>();
            }
            for quantity in waiting.get_mut(at).map(std::mem::take).unwrap_or_default() {
                self.take_quantity(quantity, values, asked);
            }
            if kept > KEPT_MOST {
                kept = self.let_go(at, &needed_at_end);
            }
        }
    }

    /// Slots that governing lists, requirements and free bodies read after all steps.
    fn needed_at_end(&self) -> Vec<bool> {
        let mut needed = vec![false; self.plan.slots.len()];
        let mut need = |slot: Option<&SlotId>| {
            if let Some(slot) = slot {
                needed[slot.0 as usize] = true;
            }
        };
        for governing in &self.program.governing {
            need(
                self.plan
                    .quantities
                    .get(governing.quantity.0 as usize)
                    .and_then(Option::as_ref),
            );
        }
        for requirement in &self.program.requirements {
            let sides = requirement.parts.iter().flat_map(|p| [p.left, p.right]);
            requirement
                .condition
                .into_iter()
                .chain(sides)
                .for_each(|n| need(self.plan.nodes.get(&n)));
        }
        for entry in self.program.freebodies.iter().flat_map(|b| &b.items) {
            need(self.slot_of(entry.value).as_ref());
            need(entry.at.and_then(|n| self.slot_of(n)).as_ref());
        }
        needed
    }

    /// The slot of a node that an output reads.
    pub(crate) fn slot_of(&self, node: crate::program::NodeId) -> Option<SlotId> {
        self.plan.nodes.get(&node).copied()
    }

    fn let_go(&mut self, at: usize, needed: &[bool]) -> usize {
        let mut kept = 0;
        for (slot, column) in self.columns.iter_mut().enumerate() {
            let read_later = self.last_read[slot] > at || needed[slot];
            match column {
                Some(values) if !read_later && values.len() > COLUMN_KEPT_MOST => *column = None,
                Some(values) => kept += values.len(),
                None => {}
            }
        }
        kept
    }

    /// Takes over the values of a quantity whose step is done: counts, extremes, what was lost in its line.
    fn take_quantity(&mut self, at: usize, values: &mut Values, asked: &[String]) {
        let Some(slot) = self.plan.quantities.get(at).copied().flatten() else {
            return;
        };
        let shape = self.shape(slot);
        let quantity = &self.program.quantities[at];
        if let Some(column) = self
            .columns
            .get_mut(slot.0 as usize)
            .and_then(Option::as_mut)
        {
            let lost = settle_losses(column);
            for (cause, places) in lost {
                let conditions = conditions(self.program, &shape, places.0, &places.1);
                let fault = Fault::WithoutValue {
                    symbol: quantity.symbol.clone(),
                    cause,
                    conditions,
                };
                self.problems
                    .push(located(quantity.statement, quantity.span, fault));
            }
        }
        let Some(column) = self.columns.get(slot.0 as usize).and_then(Option::as_ref) else {
            return;
        };
        let record = quantity.symbol.split('.').next().unwrap_or("");
        let wanted = asked.iter().any(|s| *s == quantity.symbol || s == record);
        let keep = column.len() <= COLUMN_KEPT_MOST || wanted;
        let Some(result) = values.quantities.get_mut(at) else {
            return;
        };
        result.known = true;
        result.summary = summary(column);
        result.column = keep.then(|| Column {
            shape: shape.clone(),
            values: column.as_ref().clone(),
        });
        result.shape = shape;
    }

    /// Runs one step; where it cannot be run its columns stay unknown.
    pub(crate) fn run_step(&mut self, step: &Step) {
        let Some(columns) = self.evaluate(step) else {
            return;
        };
        for (slot, column) in step.out.iter().zip(columns) {
            self.columns[slot.0 as usize] = Some(Rc::new(column));
        }
    }

    /// The columns of a step.
    pub(crate) fn evaluate(&mut self, step: &Step) -> Option<Vec<Vec<f64>>> {
        let out = *step.out.first()?;
        let shape = self.shape(out);
        self.count(step, shape.conditions_f64())?;
        let reads: Option<Vec<Rc<Vec<f64>>>> = step
            .reads
            .iter()
            .map(|s| self.column(*s).cloned())
            .collect();
        let reads = reads?;
        let shapes: Vec<Shape> = step.reads.iter().map(|s| self.shape(*s)).collect();
        let read = Reads {
            columns: &reads,
            shapes: &shapes,
        };
        match &step.work {
            Work::Values(values) => Some(vec![values.clone()]),
            Work::Solve(at) => self.solve(*at),
            Work::Kernel(code) => {
                let mut column = self.room(step, shape.conditions())?;
                kernel::run(code, &read.along(&shape), &self.program.texts, &mut column);
                Some(vec![column])
            }
            Work::Call {
                entry,
                arguments,
                over,
            } => {
                let texts = &self.program.texts;
                Some(match over {
                    None => {
                        let feeds = read.along(&shape);
                        lines::each(entry, arguments, &feeds, shape.conditions(), texts)
                    }
                    Some(axis) => {
                        let full = self.widened(&step.reads, *axis);
                        lines::along(entry, arguments, &read.along(&full), *axis, &full, texts)
                    }
                })
            }
            work => self
                .across(work, step, &read, &shape)
                .map(|column| vec![column]),
        }
    }

    /// The column of a step that takes its reads along axes.
    fn across(
        &self,
        work: &Work,
        step: &Step,
        read: &Reads<'_>,
        shape: &Shape,
    ) -> Option<Vec<f64>> {
        let axes = &self.program.axes;
        let lengths = &self.plan.lengths;
        let (base, base_shape) = (read.columns.first(), read.shapes.first());
        Some(match work {
            Work::List { axis } => list(&read.along(shape), shape, &[*axis], None, lengths),
            Work::Grid { axes: keys, items } => {
                list(&read.along(shape), shape, keys, Some(items), lengths)
            }
            Work::Reduce { how, over } => reduce::run(*how, base?, base_shape?, *over, shape, axes),
            Work::Pick { selections } => {
                let positions = read.along(shape).into_iter().skip(1).collect();
                pick::run(base?, base_shape?, selections, positions, shape, axes)
            }
            Work::Along { how, axis, has_x } => {
                let full = self.widened(&step.reads, *axis);
                let feeds = read.along(&full);
                let x = if *has_x { feeds.get(1) } else { None };
                along::run(*how, feeds.first()?, x, *axis, &full)
            }
            _ => return None,
        })
    }

    /// The shape of all reads together, with an axis that is consumed.
    fn widened(&self, reads: &[SlotId], axis: crate::axes::AxisId) -> Shape {
        let all = reads.iter().fold(AxisSet::NONE, |set, s| {
            set.with(self.plan.slots[s.0 as usize])
        });
        Shape::of(all.with(AxisSet::of(axis)), &self.plan.lengths)
    }

    /// Counts the operations of a step, and stops the run where there are too many.
    fn count(&mut self, step: &Step, conditions: f64) -> Option<()> {
        let each = match &step.work {
            Work::Kernel(code) => code.len() as f64,
            Work::Values(_) => 0.0,
            _ => 8.0,
        };
        let read = step
            .reads
            .iter()
            .map(|s| self.shape(*s).conditions_f64())
            .fold(conditions, f64::max);
        self.operations += each * read;
        if self.operations > self.limits.operations && !self.stopped {
            self.stopped = true;
            let fault = Fault::OperationLimit {
                limit: self.limits.operations,
            };
            self.report_at_step(step, fault);
        }
        (!self.stopped).then_some(())
    }

    /// Memory for a column; where there is none the line says so.
    fn room(&mut self, step: &Step, conditions: usize) -> Option<Vec<f64>> {
        let mut column = Vec::new();
        if column.try_reserve_exact(conditions).is_err() {
            let symbol = step
                .quantity
                .map(|q| self.program.quantities[q.0 as usize].symbol.clone());
            self.report_at_step(
                step,
                Fault::MemoryLimit {
                    symbol: symbol.unwrap_or_default(),
                },
            );
            return None;
        }
        column.resize(conditions, 0.0);
        Some(column)
    }

    fn report_at_step(&mut self, step: &Step, fault: Fault) {
        let quantity = step
            .quantity
            .and_then(|q| self.program.quantities.get(q.0 as usize));
        let (statement, span) = quantity.map_or((0, Span::default()), |q| (q.statement, q.span));
        self.problems.push(located(statement, span, fault));
    }
}

/// What a step reads.
struct Reads<'a> {
    columns: &'a [Rc<Vec<f64>>],
    shapes: &'a [Shape],
}

impl Reads<'_> {
    /// The reads along the conditions of a shape.
    fn along(&self, outer: &Shape) -> Vec<Feed<'_>> {
        let each = self.columns.iter().zip(self.shapes);
        each.map(|(values, inner)| Feed::new(values, inner, outer))
            .collect()
    }
}

/// The quantities whose column is done after each step.
fn quantities_by_step(plan: &Plan) -> Vec<Vec<usize>> {
    let mut step_of_slot = vec![0; plan.slots.len()];
    for (at, step) in plan.steps.iter().enumerate() {
        step.out
            .iter()
            .for_each(|s| step_of_slot[s.0 as usize] = at);
    }
    let mut by_step = vec![Vec::new(); plan.steps.len()];
    for (quantity, slot) in plan.quantities.iter().enumerate() {
        if let Some(slot) = slot {
            by_step[step_of_slot[slot.0 as usize]].push(quantity);
        }
    }
    by_step
}

/// Each condition takes the value of the read that its labels choose.
fn list(
    feeds: &[Feed<'_>],
    shape: &Shape,
    keys: &[crate::axes::AxisId],
    items: Option<&Vec<Option<usize>>>,
    lengths: &[usize],
) -> Vec<f64> {
    let places: Vec<(Option<usize>, usize)> = keys
        .iter()
        .map(|k| {
            (
                shape.position(*k),
                lengths.get(k.0 as usize).copied().unwrap_or(1),
            )
        })
        .collect();
    (0..shape.conditions())
        .map(|condition| {
            let indices = shape.indices(condition);
            let at = places
                .iter()
                .fold(0, |at, (p, n)| at * n + p.map_or(0, |p| indices[p]));
            let read = match items {
                Some(items) => items.get(at).copied().flatten(),
                None => Some(at),
            };
            read.and_then(|r| feeds.get(r))
                .map_or(NONE, |f| f.value(condition))
        })
        .collect()
}

/// How often and in which first five conditions values were lost, by cause; their marks become plain `none`.
fn settle_losses(column: &mut Rc<Vec<f64>>) -> Vec<(Cause, (u64, Vec<usize>))> {
    let mut lost: Vec<(Cause, (u64, Vec<usize>))> = Vec::new();
    for (at, value) in column.iter().enumerate().filter(|(_, v)| v.is_nan()) {
        let Some(cause) = missing::cause(*value) else {
            continue;
        };
        let entry = match lost.iter_mut().find(|(c, _)| *c == cause) {
            Some(entry) => entry,
            None => {
                lost.push((cause, (0, Vec::new())));
                let last = lost.len() - 1;
                &mut lost[last]
            }
        };
        entry.1.0 += 1;
        if entry.1.1.len() < 5 {
            entry.1.1.push(at);
        }
    }
    if !lost.is_empty() {
        for value in Rc::make_mut(column)
            .iter_mut()
            .filter(|v| v.is_nan() && !is_excluded(**v))
        {
            *value = NONE;
        }
    }
    lost
}

/// Conditions by their numbers, as pairs of axis and label.
pub(crate) fn conditions(
    program: &Program,
    shape: &Shape,
    count: u64,
    first: &[usize],
) -> Conditions {
    let first = first.iter().map(|c| labels(program, shape, *c)).collect();
    Conditions { count, first }
}

/// The labels of a condition.
pub(crate) fn labels(program: &Program, shape: &Shape, condition: usize) -> Vec<(String, String)> {
    let indices = shape.indices(condition);
    shape
        .axes
        .iter()
        .zip(indices)
        .filter_map(|(axis, index)| {
            let axis = program.axes.get(axis.0 as usize)?;
            Some((axis.name.clone(), axis.labels.get(index)?.clone()))
        })
        .collect()
}

/// Counts and extremes of a column.
#[must_use]
pub(crate) fn summary(values: &[f64]) -> Summary {
    summary_of(values.iter().copied().enumerate())
}

/// Counts and extremes of numbered values; the first of equals stands.
pub(crate) fn summary_of(values: impl Iterator<Item = (usize, f64)>) -> Summary {
    let mut summary = Summary::default();
    for (condition, value) in values {
        if value.is_nan() {
            if is_excluded(value) {
                summary.excluded += 1;
            } else {
                summary.without_value += 1;
            }
            continue;
        }
        let extreme = crate::values::Extreme { value, condition };
        if summary.largest.is_none_or(|l| value > l.value) {
            summary.largest = Some(extreme);
        }
        if summary.smallest.is_none_or(|s| value < s.value) {
            summary.smallest = Some(extreme);
        }
    }
    summary
}
