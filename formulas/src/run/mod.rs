//! The run: steps are worked out in order, each over its own axes only.

mod along;
mod block;
mod feed;
mod kernel;
mod lines;
mod look;
mod memo;
mod outputs;
mod overlay;
mod pick;
mod quotient;
mod reduce;
pub(crate) mod scalar;
mod solve;
mod tolerance;
mod wide;

use crate::axes::{AxisSet, Shape};
use crate::catalogue::Compute;
use crate::names::located;
use crate::plan::fuse::{Group, STORED_MOST};
use crate::plan::{Plan, SlotId, Step, Work};
use crate::problem::{Conditions, Fault, Located};
use crate::program::Program;
use crate::span::Span;
use crate::values::{
    Column, NONE, QuantityValues, RequirementValues, Summary, Values, is_excluded,
};
use block::Ending;
use feed::Feed;
use reduce::Reducer;
use rustc_hash::FxHashMap;
use std::rc::Rc;

pub use memo::{Memo, Outcome, run_again};

/// Most operations in a recalculation: counted, not timed, so that every machine stops at the same place.
pub const OPERATIONS_MOST: f64 = 2e10;
/// Conditions up to which the column of a quantity is kept for good.
pub const COLUMN_KEPT_MOST: usize = STORED_MOST as usize;

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
    /// Columns worked out anew under the change in hand.
    overlaid: Vec<bool>,
    /// Whether the run in hand is a trial, whose results are not those of the sheet.
    trying: bool,
    scratch: block::Scratch,
    found: Found,
    /// What lines came to, where it is to be kept.
    recorded: Option<FxHashMap<SlotId, (Summary, block::Losses)>>,
    /// Groups of steps by the columns whose change makes them run again.
    again: FxHashMap<Vec<SlotId>, Rc<Again>>,
}

/// What runs again when columns change.
struct Again {
    groups: Vec<Group>,
    /// The columns that are made anew.
    out: Vec<SlotId>,
    /// Columns read that stay as they are.
    reads: Vec<SlotId>,
}

/// What was found so far.
#[derive(Default)]
struct Found {
    quantities: Vec<QuantityValues>,
    groups: Vec<Option<Vec<Summary>>>,
    requirements: Vec<RequirementValues>,
    freebodies: Vec<Option<look::FreebodyLook>>,
    guards: Vec<look::Outside>,
}

/// Runs a plan from the start.
#[must_use]
pub fn run(
    program: &Program,
    plan: &Plan,
    limits: Limits,
    asked: &[String],
) -> (Values, Vec<Located>) {
    let mut machine = Machine::new(program, plan, limits);
    machine.run_all(asked);
    let mut values = Values {
        quantities: std::mem::take(&mut machine.found.quantities),
        ..Values::default()
    };
    machine.finish(&mut values);
    (values, machine.problems)
}

impl<'a> Machine<'a> {
    fn new(program: &'a Program, plan: &'a Plan, limits: Limits) -> Self {
        let unknown = |axes: AxisSet| QuantityValues {
            shape: plan.shape(axes),
            ..QuantityValues::default()
        };
        let not_judged = |r: &crate::program::Requirement| RequirementValues {
            shape: plan.shape(r.axes),
            ..RequirementValues::default()
        };
        Machine {
            program,
            plan,
            columns: vec![None; plan.slots.len()],
            problems: Vec::new(),
            limits,
            operations: 0.0,
            stopped: false,
            overlaid: Vec::new(),
            trying: false,
            scratch: block::Scratch::default(),
            found: Found {
                quantities: program.quantities.iter().map(|q| unknown(q.axes)).collect(),
                groups: vec![None; program.governing.len()],
                requirements: program.requirements.iter().map(not_judged).collect(),
                freebodies: program.freebodies.iter().map(|_| None).collect(),
                guards: vec![look::Outside::default(); program.guards.len()],
            },
            recorded: None,
            again: FxHashMap::default(),
        }
    }

    fn run_all(&mut self, asked: &[String]) {
        let plan = self.plan;
        self.run_groups(&plan.groups, asked);
    }

    /// Runs groups; long columns are kept only where one is asked for or read by another group.
    fn run_groups(&mut self, groups: &[Group], asked: &[String]) {
        let plan = self.plan;
        if !plan.large {
            for group in groups {
                if self.stopped {
                    break;
                }
                self.run_group(group, &|_| true);
            }
            return;
        }
        let wanted = self.wanted(asked);
        let (read, last) = reads_of(plan, groups);
        let stored = |slot: SlotId| {
            let at = slot.0 as usize;
            read[at] || wanted[at] || plan.conditions(plan.slots[at]) <= STORED_MOST
        };
        for (at, group) in groups.iter().enumerate() {
            if self.stopped {
                break;
            }
            self.run_group(group, &stored);
            for slot in &last[at] {
                let large = plan.conditions(plan.slots[slot.0 as usize]) > STORED_MOST;
                if large && !wanted[slot.0 as usize] {
                    self.columns[slot.0 as usize] = None;
                }
            }
        }
    }

    /// Columns that are kept however long they are: those asked for, and those that outputs read afterwards.
    fn wanted(&self, asked: &[String]) -> Vec<bool> {
        let mut wanted = vec![false; self.plan.slots.len()];
        for (quantity, slot) in self.program.quantities.iter().zip(&self.plan.quantities) {
            let record = quantity.symbol.split('.').next().unwrap_or("");
            let named = asked.iter().any(|s| *s == quantity.symbol || s == record);
            if let Some(slot) = slot.filter(|_| named) {
                wanted[slot.0 as usize] = true;
            }
        }
        for figure in &self.program.figures {
            let entries = figure.x.iter().chain(&figure.curves);
            let slots = entries.filter_map(|entry| self.slot_of(entry.node));
            slots.for_each(|slot| wanted[slot.0 as usize] = true);
        }
        wanted
    }

    pub(crate) fn shape(&self, slot: SlotId) -> Shape {
        let axes = self.plan.slots.get(slot.0 as usize).copied();
        self.plan.shape(axes.unwrap_or(AxisSet::NONE))
    }

    pub(crate) fn column(&self, slot: SlotId) -> Option<&Rc<Vec<f64>>> {
        self.columns.get(slot.0 as usize)?.as_ref()
    }

    /// The slot of a node that an output reads.
    pub(crate) fn slot_of(&self, node: crate::program::NodeId) -> Option<SlotId> {
        self.plan.nodes.get(&node).copied()
    }

    /// Whether a column is the result of a line of the sheet.
    fn is_line(&self, slot: SlotId) -> bool {
        !self.trying && !self.plan.lines[slot.0 as usize].is_empty()
    }

    fn run_group(&mut self, group: &Group, stored: &dyn Fn(SlotId) -> bool) -> Option<()> {
        match group {
            Group::Fused(fused) => self.run_fused(fused, stored),
            Group::Single(step) => self.run_single(&self.plan.steps[*step]),
        }
    }

    /// Runs a step over whole columns; where it cannot be run its columns stay unknown.
    fn run_single(&mut self, step: &Step) -> Option<()> {
        let columns = self.evaluate(step)?;
        for (slot, column) in step.out.iter().zip(columns) {
            self.finish_column(*slot, column);
        }
        Some(())
    }

    /// Takes over a whole column: counts, extremes, what was lost in its line.
    fn finish_column(&mut self, slot: SlotId, mut column: Rc<Vec<f64>>) {
        if self.is_line(slot) {
            let mut ending = Ending::new(slot, true);
            if column.iter().all(|v| v.is_finite()) {
                ending.summary = summary_of(column.iter().copied().enumerate());
            } else {
                ending.take(Rc::<Vec<f64>>::make_mut(&mut column).as_mut_slice(), None);
            }
            self.finish_line(&ending, Some(&column));
        }
        self.columns[slot.0 as usize] = Some(column);
    }

    fn finish_small(&mut self, slot: SlotId, column: Vec<f64>) {
        self.finish_column(slot, Rc::new(column));
    }

    /// Takes over what a group has made of a step.
    fn finish_ending(&mut self, mut ending: Ending) {
        let column = ending.column.take().map(Rc::new);
        if self.is_line(ending.slot) {
            self.finish_line(&ending, column.as_ref());
        }
        if column.is_some() {
            self.columns[ending.slot.0 as usize] = column;
        }
    }

    /// The values of every quantity that a column belongs to; what was lost is told once.
    fn finish_line(&mut self, ending: &Ending, column: Option<&Rc<Vec<f64>>>) {
        let shape = self.shape(ending.slot);
        let plan = self.plan;
        let lines = &plan.lines[ending.slot.0 as usize];
        if let Some(first) = lines.first() {
            let quantity = &self.program.quantities[*first as usize];
            for (cause, (count, first)) in &ending.losses {
                let fault = Fault::WithoutValue {
                    symbol: quantity.symbol.clone(),
                    cause: *cause,
                    conditions: conditions(self.program, &shape, *count, first),
                };
                self.problems
                    .push(located(quantity.statement, quantity.span, fault));
            }
        }
        for at in lines {
            let Some(result) = self.found.quantities.get_mut(*at as usize) else {
                continue;
            };
            result.known = true;
            result.summary = ending.summary;
            result.column = column.map(|values| Column {
                shape: shape.clone(),
                values: values.clone(),
            });
        }
        if let Some(recorded) = &mut self.recorded {
            recorded.insert(ending.slot, (ending.summary, ending.losses.clone()));
        }
    }

    /// The columns of a step that takes whole columns.
    fn evaluate(&mut self, step: &Step) -> Option<Vec<Rc<Vec<f64>>>> {
        if let Work::Values(values) = &step.work {
            return Some(vec![values.clone()]);
        }
        let out = *step.out.first()?;
        let shape = self.shape(out);
        let read = step.reads.iter().map(|s| self.shape(*s).conditions_f64());
        let largest = read.fold(shape.conditions_f64(), f64::max);
        self.count(Some(step), 8.0 * largest)?;
        let columns = match &step.work {
            Work::Solve(at) => self.solve(*at)?,
            _ => self.over_columns(step, &shape)?,
        };
        Some(columns.into_iter().map(Rc::new).collect())
    }

    fn over_columns(&mut self, step: &Step, shape: &Shape) -> Option<Vec<Vec<f64>>> {
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
            Work::Call {
                entry,
                arguments,
                over,
                made,
            } => {
                let texts = &self.program.texts;
                if let Compute::Each(compute) = entry.compute {
                    let feeds = read.along(shape);
                    let n = shape.conditions();
                    return Some(lines::each((entry, compute), arguments, &feeds, n, texts));
                }
                let full = self.widened(&step.reads, *over);
                let lines = self.widened(&step.reads, *over).without(*over);
                let made = made.map(|axis| {
                    let length = self.plan.lengths.get(axis.0 as usize).copied().unwrap_or(1);
                    (lines.stride_before(axis), length)
                });
                let consumed = over.and_then(|axis| full.position(axis));
                Some(lines::along(
                    entry,
                    arguments,
                    &read.along(&full),
                    (consumed, &full),
                    made,
                    texts,
                ))
            }
            work => self
                .across(work, step, &read, shape)
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
            Work::Reduce { how, over } => {
                let mut reducer = Reducer::new(*how, base_shape?, *over, shape, axes);
                reducer.take(base?.iter().copied());
                reducer.finish()
            }
            Work::Pick { selections } => {
                let positions = read.along(shape).into_iter().skip(1).collect();
                pick::run(base?, base_shape?, selections, positions, shape, axes)
            }
            Work::Along { how, axis, has_x } => {
                let full = self.widened(&step.reads, Some(*axis));
                let feeds = read.along(&full);
                let x = if *has_x { feeds.get(1) } else { None };
                along::run(*how, feeds.first()?, x, *axis, &full)
            }
            _ => return None,
        })
    }

    /// The shape of all reads together, with an axis that is consumed.
    fn widened(&self, reads: &[SlotId], axis: Option<crate::axes::AxisId>) -> Shape {
        let all = reads.iter().fold(AxisSet::NONE, |set, s| {
            set.with(self.plan.slots[s.0 as usize])
        });
        let axis = axis.map_or(AxisSet::NONE, AxisSet::of);
        self.plan.shape(all.with(axis))
    }

    /// Counts operations, those of a step among them, and stops the run where there are too many.
    fn count(&mut self, step: Option<&Step>, operations: f64) -> Option<()> {
        self.operations += operations;
        if self.operations > self.limits.operations && !self.stopped {
            self.stopped = true;
            let fault = Fault::OperationLimit {
                limit: self.limits.operations,
            };
            if let Some(step) = step {
                self.report_at_step(step, fault);
            }
        }
        (!self.stopped).then_some(())
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

/// Which columns are read by another group than the one that makes them, and for each group those it reads last.
fn reads_of(plan: &Plan, groups: &[Group]) -> (Vec<bool>, Vec<Vec<SlotId>>) {
    let mut last: Vec<Option<usize>> = vec![None; plan.slots.len()];
    for (at, group) in groups.iter().enumerate() {
        for slot in group.reads(plan) {
            last[slot.0 as usize] = Some(at);
        }
    }
    let mut by_group = vec![Vec::new(); groups.len()];
    for (slot, group) in last.iter().enumerate() {
        if let Some(group) = group {
            by_group[*group].push(SlotId(slot as u32));
        }
    }
    (last.iter().map(Option::is_some).collect(), by_group)
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

/// Counts and extremes of numbered values; the first of equals stands.
pub(crate) fn summary_of(values: impl Iterator<Item = (usize, f64)>) -> Summary {
    let mut summary = Summary::default();
    values.for_each(|(condition, value)| take_value(&mut summary, condition, value));
    summary
}

/// Takes one more value.
fn take_value(summary: &mut Summary, condition: usize, value: f64) {
    if value.is_nan() {
        if is_excluded(value) {
            summary.excluded += 1;
        } else {
            summary.without_value += 1;
        }
        return;
    }
    let extreme = crate::values::Extreme { value, condition };
    if summary.largest.is_none_or(|l| value > l.value) {
        summary.largest = Some(extreme);
    }
    if summary.smallest.is_none_or(|s| value < s.value) {
        summary.smallest = Some(extreme);
    }
}
