//! What an edit does not touch is kept: the results of a step are found again by what the step does and by the columns
//! it reads. Columns are told apart by their values, so that a line worked out anew with the same result stops the wave.

use super::block::Losses;
use super::look::LookResult;
use super::{Ending, Limits, Machine};
use crate::axes::AxisSet;
use crate::plan::fuse::{Group, STORED_MOST, fuse};
use crate::plan::{Instruction, Plan, SlotId, Step, Work};
use crate::problem::{Fault, Located};
use crate::program::Program;
use crate::values::{Summary, Values};
use rustc_hash::FxHashMap;
use std::rc::Rc;

/// The number of a column: the same for columns that hold the same values over the same axes.
type Content = u64;

/// What was worked out before.
#[derive(Debug, Default)]
pub struct Memo {
    texts: Vec<String>,
    axes: FxHashMap<String, u64>,
    kept: FxHashMap<Box<[u64]>, Kept>,
    /// For each line its columns, in the order of its steps.
    places: FxHashMap<(String, usize), Place>,
    next: Content,
    age: u64,
}

#[derive(Debug)]
struct Kept {
    contents: Vec<Content>,
    columns: Vec<Rc<Vec<f64>>>,
    lines: Vec<Option<(Summary, Losses)>>,
    look: Option<LookResult>,
    age: u64,
}

#[derive(Debug)]
struct Place {
    axes: Vec<u64>,
    contents: Vec<Content>,
    columns: Vec<Rc<Vec<f64>>>,
    age: u64,
}

/// What a run found, and what it had to work out.
#[derive(Debug)]
pub struct Outcome {
    /// The values.
    pub values: Values,
    /// What went wrong.
    pub problems: Vec<Located>,
    /// The quantities that were worked out, by their index in the program, in the order of the sheet.
    pub ran: Vec<usize>,
}

/// Runs a plan; what the memo knows is not worked out again.
#[must_use]
pub fn run_again(
    program: &Program,
    plan: &Plan,
    limits: Limits,
    asked: &[String],
    memo: &mut Memo,
) -> Outcome {
    let mut machine = Machine::new(program, plan, limits);
    memo.begin(program);
    let mut warm = Warm {
        contents: vec![None; plan.slots.len()],
        axes: memo.axis_numbers(program),
        ordinals: FxHashMap::default(),
        ran: Vec::new(),
        memo,
    };
    if warm.memo.kept.is_empty() {
        warm.cold(&mut machine, asked);
    } else {
        warm.steps(&mut machine, asked);
    }
    let ran = warm.ran_quantities(&machine);
    memo.end();
    let mut values = Values {
        quantities: std::mem::take(&mut machine.found.quantities),
        ..Values::default()
    };
    machine.finish(&mut values);
    Outcome {
        values,
        problems: machine.problems,
        ran,
    }
}

impl Memo {
    fn begin(&mut self, program: &Program) {
        // Texts are carried by their numbers: where these mean something else now, nothing is known.
        let known = self.texts.len().min(program.texts.len());
        if self.texts[..known] != program.texts[..known] {
            *self = Memo::default();
        }
        if program.texts.len() > self.texts.len() {
            self.texts.clone_from(&program.texts);
        }
        self.age += 1;
    }

    /// What this run has not used is let go.
    fn end(&mut self) {
        let age = self.age;
        self.kept.retain(|_, kept| kept.age == age);
        self.places.retain(|_, place| place.age == age);
    }

    /// A number for each axis: the same for axes with the same place, labels and values.
    fn axis_numbers(&mut self, program: &Program) -> Vec<u64> {
        let number = |(at, axis): (usize, &crate::program::Axis)| {
            let bits: Option<Vec<u64>> = axis
                .values
                .as_ref()
                .map(|v| v.iter().map(|v| v.to_bits()).collect());
            let key = format!("{at} {:?} {:?} {bits:?}", axis.name, axis.labels);
            let next = self.axes.len() as u64;
            *self.axes.entry(key).or_insert(next)
        };
        program.axes.iter().enumerate().map(number).collect()
    }

    fn fresh(&mut self) -> Content {
        self.next += 1;
        self.next
    }
}

/// A run in hand.
struct Warm<'m> {
    memo: &'m mut Memo,
    contents: Vec<Option<Content>>,
    axes: Vec<u64>,
    ordinals: FxHashMap<u32, usize>,
    ran: Vec<usize>,
}

impl Warm<'_> {
    /// Everything, put together as well as it can be; then all that can be kept is.
    fn cold(&mut self, machine: &mut Machine<'_>, asked: &[String]) {
        machine.recorded = Some(FxHashMap::default());
        machine.run_all(asked);
        let plan = machine.plan;
        let told = told(machine);
        for (at, step) in plan.steps.iter().enumerate() {
            if !matches!(step.work, Work::Values(_) | Work::Judge { .. }) {
                self.ran.push(at);
            }
            let Some(key) = self.key(machine, step) else {
                continue;
            };
            let columns: Option<Vec<Rc<Vec<f64>>>> = step
                .out
                .iter()
                .map(|s| machine.column(*s).cloned())
                .collect();
            if let Some(columns) = columns
                && !told.contains(&statement_of(machine.program, step))
            {
                let contents = step.out.iter().map(|_| self.memo.fresh()).collect();
                self.keep(machine, step, key, columns, contents);
            }
        }
    }

    /// Step by step: what is known is taken over. Steps over long columns, and all that rests on them, go together.
    fn steps(&mut self, machine: &mut Machine<'_>, asked: &[String]) {
        machine.recorded = Some(FxHashMap::default());
        let plan = machine.plan;
        let mut together = Vec::new();
        for (at, step) in plan.steps.iter().enumerate() {
            let Some(key) = self.key(machine, step) else {
                together.push(at);
                continue;
            };
            if self.restored(machine, step, &key) {
                continue;
            }
            self.one(machine, at, key);
        }
        let computed = together
            .iter()
            .filter(|at| !matches!(plan.steps[**at].work, Work::Judge { .. }));
        self.ran.extend(computed);
        let groups = fuse(plan, together.into_iter());
        machine.run_groups(&groups, asked);
    }

    /// Works out one step and keeps its result.
    fn one(&mut self, machine: &mut Machine<'_>, at: usize, key: Box<[u64]>) {
        let plan = machine.plan;
        let step = &plan.steps[at];
        let before = machine.problems.len();
        let group = fuse(plan, std::iter::once(at))
            .pop()
            .unwrap_or(Group::Single(at));
        let whole = machine.run_group(&group, &|_| true).is_some();
        if !matches!(step.work, Work::Values(_) | Work::Judge { .. }) {
            self.ran.push(at);
        }
        let others = machine.problems[before..]
            .iter()
            .any(|p| !matches!(p.problem.fault, Fault::WithoutValue { .. }));
        let columns: Option<Vec<Rc<Vec<f64>>>> = step
            .out
            .iter()
            .map(|s| machine.column(*s).cloned())
            .collect();
        let Some(columns) = columns.filter(|_| whole) else {
            return;
        };
        let contents = self.contents_of(machine, step, &columns);
        if others {
            // What it has to say is not kept: it is worked out again each time.
            self.place(machine, step, &columns, &contents);
            return;
        }
        self.keep(machine, step, key, columns, contents);
    }

    /// The numbers of new columns: those of the line's columns before, where the values are the same.
    fn contents_of(
        &mut self,
        machine: &Machine<'_>,
        step: &Step,
        columns: &[Rc<Vec<f64>>],
    ) -> Vec<Content> {
        let axes = self.axes_of(machine.plan, step);
        let same = |a: &Rc<Vec<f64>>, b: &Rc<Vec<f64>>| {
            a.len() == b.len()
                && a.iter()
                    .zip(b.iter())
                    .all(|(a, b)| a.to_bits() == b.to_bits())
        };
        if let Some(name) = self.name_of(machine, step, false)
            && let Some(place) = self.memo.places.get(&name)
            && place.axes == axes
            && place.columns.len() == columns.len()
            && place.columns.iter().zip(columns).all(|(a, b)| same(a, b))
        {
            return place.contents.clone();
        }
        columns.iter().map(|_| self.memo.fresh()).collect()
    }

    fn restored(&mut self, machine: &mut Machine<'_>, step: &Step, key: &[u64]) -> bool {
        let age = self.memo.age;
        let Some(kept) = self.memo.kept.get_mut(key) else {
            return false;
        };
        kept.age = age;
        let (columns, contents) = (kept.columns.clone(), kept.contents.clone());
        for ((slot, column), line) in step.out.iter().zip(&columns).zip(&kept.lines) {
            machine.columns[slot.0 as usize] = Some(column.clone());
            if let Some((summary, losses)) = line {
                let mut ending = Ending::new(*slot, true);
                ending.summary = *summary;
                ending.losses.clone_from(losses);
                machine.finish_line(&ending, Some(column));
            }
        }
        if let (Some(look), Work::Judge { what, .. }) = (&kept.look, &step.work) {
            machine.take_look(*what, look.clone());
        }
        self.place(machine, step, &columns, &contents);
        true
    }

    fn keep(
        &mut self,
        machine: &mut Machine<'_>,
        step: &Step,
        key: Box<[u64]>,
        columns: Vec<Rc<Vec<f64>>>,
        contents: Vec<Content>,
    ) {
        self.place(machine, step, &columns, &contents);
        let recorded = machine.recorded.as_mut();
        let lines = match recorded {
            Some(recorded) => step.out.iter().map(|slot| recorded.remove(slot)).collect(),
            None => step.out.iter().map(|_| None).collect(),
        };
        let look = match &step.work {
            Work::Judge { what, .. } => machine.look_of(*what),
            _ => None,
        };
        let age = self.memo.age;
        self.memo.kept.insert(
            key,
            Kept {
                contents,
                columns,
                lines,
                look,
                age,
            },
        );
    }

    /// From here on the step's columns are known by these numbers.
    fn place(
        &mut self,
        machine: &Machine<'_>,
        step: &Step,
        columns: &[Rc<Vec<f64>>],
        contents: &[Content],
    ) {
        for (slot, content) in step.out.iter().zip(contents) {
            self.contents[slot.0 as usize] = Some(*content);
        }
        let axes = self.axes_of(machine.plan, step);
        if let Some(name) = self.name_of(machine, step, true) {
            let place = Place {
                axes,
                contents: contents.to_vec(),
                columns: columns.to_vec(),
                age: self.memo.age,
            };
            self.memo.places.insert(name, place);
        }
    }

    /// The line a step belongs to, and which of its steps it is.
    fn name_of(
        &mut self,
        machine: &Machine<'_>,
        step: &Step,
        taken: bool,
    ) -> Option<(String, usize)> {
        let quantity = step.quantity?;
        let ordinal = self.ordinals.entry(quantity.0).or_default();
        let at = *ordinal;
        *ordinal += usize::from(taken);
        let symbol = machine
            .program
            .quantities
            .get(quantity.0 as usize)?
            .symbol
            .clone();
        Some((symbol, at))
    }

    fn axes_of(&self, plan: &Plan, step: &Step) -> Vec<u64> {
        let out = step.out.iter().map(|s| plan.slots[s.0 as usize]);
        self.numbers(out.fold(AxisSet::NONE, AxisSet::with))
    }

    fn numbers(&self, axes: AxisSet) -> Vec<u64> {
        axes.iter()
            .map(|a| self.axes.get(a.0 as usize).copied().unwrap_or(u64::MAX))
            .collect()
    }

    /// What a step does to what; `None` where something it reads is not known by a number, or its columns are long.
    fn key(&self, machine: &Machine<'_>, step: &Step) -> Option<Box<[u64]>> {
        let plan = machine.plan;
        let mut axes = step
            .out
            .iter()
            .map(|s| plan.slots[s.0 as usize])
            .fold(AxisSet::NONE, AxisSet::with);
        if let Work::Judge { axes: judged, .. } = &step.work {
            axes = axes.with(*judged);
        }
        let read = step.reads.iter().map(|s| plan.slots[s.0 as usize]);
        let all = read.fold(axes, AxisSet::with);
        if plan.conditions(all) > STORED_MOST {
            return None;
        }
        let mut words = Vec::with_capacity(16 + step.reads.len());
        self.work(machine, step, &mut words)?;
        words.push(u64::MAX);
        words.extend(self.numbers(all));
        words.push(axes.0);
        words.extend(
            step.out
                .iter()
                .map(|s| u64::from(!machine.plan.lines[s.0 as usize].is_empty())),
        );
        for slot in &step.reads {
            words.push(self.contents[slot.0 as usize]?);
            words.push(plan.slots[slot.0 as usize].0);
        }
        Some(words.into_boxed_slice())
    }

    fn work(&self, machine: &Machine<'_>, step: &Step, words: &mut Vec<u64>) -> Option<()> {
        match &step.work {
            Work::Values(values) => {
                words.push(1);
                words.extend(values.iter().map(|v| v.to_bits()));
            }
            Work::Kernel(code) => {
                words.push(2);
                code.iter().for_each(|i| instruction(i, words));
            }
            Work::Judge { what, .. } => {
                words.push(3);
                machine.judged_words(*what, words);
            }
            Work::Solve(at) => {
                words.push(4);
                return self.solve_words(machine, *at, words);
            }
            work => {
                // No number stands in any other work, so that its text says all.
                words.push(5);
                words.extend(format!("{work:?}").bytes().map(u64::from));
            }
        }
        Some(())
    }

    /// An unknown: all steps between it and its equations, with the columns they read by number or by place.
    fn solve_words(&self, machine: &Machine<'_>, at: usize, words: &mut Vec<u64>) -> Option<()> {
        let plan = machine.plan;
        let solve = plan.solves.get(at)?;
        let mut places: FxHashMap<SlotId, u64> = FxHashMap::default();
        let inner = solve.steps.iter().flat_map(|s| &plan.steps[*s].out);
        for slot in solve.out.iter().chain(inner) {
            let next = places.len() as u64;
            places.entry(*slot).or_insert(next);
        }
        let name = |slot: &SlotId, words: &mut Vec<u64>| {
            match places.get(slot) {
                Some(place) => words.extend([0, *place]),
                None => words.extend([1, self.contents[slot.0 as usize]?]),
            }
            words.push(plan.slots[slot.0 as usize].0);
            Some(())
        };
        for step in &solve.steps {
            let step = &plan.steps[*step];
            self.work(machine, step, words)?;
            words.push(u64::MAX);
            step.reads.iter().try_for_each(|slot| name(slot, words))?;
        }
        for (a, b) in solve.bounds.iter().chain(&solve.sides) {
            name(a, words)?;
            name(b, words)?;
        }
        words.push(solve.out.len() as u64);
        Some(())
    }

    fn ran_quantities(&self, machine: &Machine<'_>) -> Vec<usize> {
        let steps = self.ran.iter().map(|at| &machine.plan.steps[*at]);
        let of_step = |step: &Step| {
            let made = step
                .out
                .iter()
                .flat_map(|s| &machine.plan.lines[s.0 as usize]);
            let made = made.map(|q| *q as usize);
            made.chain(step.quantity.map(|q| q.0 as usize))
                .collect::<Vec<_>>()
        };
        let mut ran: Vec<usize> = steps.flat_map(of_step).collect();
        ran.sort_unstable();
        ran.dedup();
        ran
    }
}

fn instruction(instruction: &Instruction, words: &mut Vec<u64>) {
    match instruction {
        Instruction::Load(at) => words.extend([0, *at as u64]),
        Instruction::Constant(value) => words.extend([1, value.to_bits()]),
        Instruction::Negate => words.push(2),
        Instruction::Not => words.push(3),
        Instruction::Binary(op) => words.extend([4, *op as u64]),
        Instruction::Power(exponent) => words.extend([5, exponent.to_bits()]),
        Instruction::Select => words.push(6),
        Instruction::Function(function, count) => {
            words.extend([7, *function as u64, *count as u64]);
        }
        Instruction::HasValue => words.push(8),
        Instruction::Call(entry, mask) => {
            // Rows of the function table stay where they are.
            words.extend([
                9,
                std::ptr::from_ref(*entry).addr() as u64,
                u64::from(*mask),
            ]);
        }
    }
}

/// Statements about which a run has said more than that values are missing.
fn told(machine: &Machine<'_>) -> Vec<Option<usize>> {
    let others = machine
        .problems
        .iter()
        .filter(|p| !matches!(p.problem.fault, Fault::WithoutValue { .. }));
    others.map(|p| p.statement).collect()
}

/// The statement whose line a step belongs to.
fn statement_of(program: &Program, step: &Step) -> Option<usize> {
    if let Work::Solve(at) = step.work {
        return program.unknowns.get(at).map(|u| u.statement);
    }
    let quantity = step.quantity?;
    program
        .quantities
        .get(quantity.0 as usize)
        .map(|q| q.statement)
}

impl Machine<'_> {
    /// What an output asks, in words.
    fn judged_words(&self, what: crate::plan::Judged, words: &mut Vec<u64>) {
        use crate::plan::Judged;
        match what {
            Judged::Governing(at) => {
                words.push(0);
                words.extend(self.program.governing.get(at).map(|g| g.over.0));
            }
            Judged::Requirement(at) => {
                words.push(1);
                let parts = self.program.requirements.get(at).map(|r| &r.parts);
                words.extend(parts.into_iter().flatten().map(|p| p.op as u64));
            }
            Judged::Guard(at) => {
                words.push(3);
                let guard = self.program.guards.get(at);
                words.extend(guard.map(|g| std::ptr::from_ref(g.entry).addr() as u64));
                let given = guard.into_iter().flat_map(|g| &g.arguments);
                words.extend(given.map(|a| u64::from(a.is_some())));
            }
            Judged::Freebody(at) => {
                words.push(2);
                let items = self.program.freebodies.get(at).map(|b| &b.items);
                let items = items.into_iter().flatten();
                words.extend(items.flat_map(|e| [e.kind as u64, u64::from(e.at.is_some())]));
            }
        }
    }
}
