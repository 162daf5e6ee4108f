//! A group of steps, block by block: signs run over whole blocks as plain IEEE arithmetic, and a block whose result
//! holds anything but finite numbers is worked out again value by value, with the reasons for what is missing.

use super::feed::Feed;
use super::kernel::{self, Arguments, Stack};
use super::look::Look;
use super::pick::Table;
use super::wide::{self, Source};
use super::{Machine, quotient, scalar};
use crate::catalogue::Compute;
use crate::missing;
use crate::plan::code::{Arithmetic, BLOCK, Fused, Op, Operand, Reading, Register, Scalar};
use crate::plan::{Instruction, Plan, SlotId, Step, Work};
use crate::problem::{Cause, Fault};
use crate::program::Function;
use crate::syntax::BinaryOp;
use crate::values::{Extreme, NONE, Summary, is_excluded};
use std::rc::Rc;

/// How often a cause took a value, and in which first five conditions.
pub(super) type Losses = Vec<(Cause, (u64, Vec<usize>))>;

/// What is gathered of a step's result.
pub(super) struct Ending {
    pub(super) slot: SlotId,
    pub(super) column: Option<Vec<f64>>,
    pub(super) summary: Summary,
    pub(super) losses: Losses,
    /// Whether it is the result of a line, whose losses are told there.
    line: bool,
    done: usize,
}

impl Ending {
    pub(super) fn new(slot: SlotId, line: bool) -> Self {
        Ending {
            slot,
            column: None,
            summary: Summary::default(),
            losses: Vec::new(),
            line,
            done: 0,
        }
    }

    /// Takes the next values, with their extremes where all are finite; those lost in this line become plain missing
    /// ones.
    pub(super) fn take(&mut self, values: &mut [f64], extremes: Option<(f64, f64)>) {
        if self.line {
            match extremes {
                Some(extremes) => self.extremes(values, extremes),
                None => self.one_by_one(values),
            }
        }
        if let Some(column) = &mut self.column {
            column.extend_from_slice(values);
        }
        self.done += values.len();
    }

    fn extremes(&mut self, values: &[f64], (high, low): (f64, f64)) {
        let place = |value: f64| {
            let at = wide::position(values, value);
            Extreme {
                value,
                condition: self.done + at,
            }
        };
        if self.summary.largest.is_none_or(|l| high > l.value) && !values.is_empty() {
            self.summary.largest = Some(place(high));
        }
        if self.summary.smallest.is_none_or(|s| low < s.value) && !values.is_empty() {
            self.summary.smallest = Some(place(low));
        }
    }

    fn one_by_one(&mut self, values: &mut [f64]) {
        for (i, value) in values.iter_mut().enumerate() {
            let condition = self.done + i;
            if value.is_nan() && !is_excluded(*value) {
                if let Some(cause) = missing::cause(*value) {
                    self.lose(cause, condition);
                }
                *value = NONE;
            }
            super::take_value(&mut self.summary, condition, *value);
        }
    }

    fn lose(&mut self, cause: Cause, condition: usize) {
        let at = match self.losses.iter().position(|(c, _)| *c == cause) {
            Some(at) => at,
            None => {
                self.losses.push((cause, (0, Vec::new())));
                self.losses.len() - 1
            }
        };
        let (_, (count, first)) = &mut self.losses[at];
        *count += 1;
        if first.len() < 5 {
            first.push(condition);
        }
    }
}

/// What a group is run with.
struct Running<'a> {
    plan: &'a Plan,
    fused: &'a Fused,
    scalars: Vec<f64>,
    feeds: Vec<Feed<'a>>,
    /// The reciprocals of loads that divide; none at all where no load does.
    reciprocals: Vec<Option<Feed<'a>>>,
    /// By the index of the step; none at all where no step picks.
    tables: Vec<Option<Table>>,
    /// By the index of the step; none at all where no step looks.
    looks: Vec<Option<Look<'a>>>,
    endings: Vec<Option<Ending>>,
    texts: &'a [String],
}

impl Machine<'_> {
    /// Runs a group and keeps the columns of slots for which `stored` says so.
    pub(super) fn run_fused(
        &mut self,
        fused: &Fused,
        stored: &dyn Fn(SlotId) -> bool,
    ) -> Option<()> {
        let (plan, program) = (self.plan, self.program);
        let first = fused.steps.first().map(|s| &plan.steps[*s]);
        let operations = fused.code.len() as f64 * fused.shape.conditions_f64();
        self.count(first, operations)?;
        // Columns are held apart from the machine, so that it can take what the group makes.
        let columns = self.columns_read(fused)?;
        let scalars = fused.scalars.iter().map(|s| self.scalar(*s));
        let scalars = scalars.collect::<Option<Vec<f64>>>()?;
        let endings = self.endings(fused, stored)?;
        let known = reciprocals(fused, &columns);
        let mut running = Running {
            plan,
            fused,
            scalars,
            feeds: feeds(fused, &columns).collect(),
            reciprocals: known
                .iter()
                .zip(&fused.readings)
                .map(|(known, reading)| Some(Feed::along(known.as_ref()?, reading.runs.clone())))
                .collect(),
            tables: self.tables(fused),
            looks: self.looks(fused),
            endings,
            texts: &program.texts,
        };
        let mut scratch = std::mem::take(&mut self.scratch);
        running.run(fused.shape.conditions(), &mut scratch);
        self.scratch = scratch;
        let Running { endings, looks, .. } = running;
        for ending in endings.into_iter().flatten() {
            self.finish_ending(ending);
        }
        for look in looks.into_iter().flatten() {
            self.finish_look(look);
        }
        Some(())
    }

    /// The columns that a group reads, spread out where that is worth while.
    fn columns_read(&self, fused: &Fused) -> Option<Vec<Rc<Vec<f64>>>> {
        let column = |(slot, reading): (&SlotId, &Reading)| {
            let column = self.column(*slot)?.clone();
            let Some((wide, runs)) = &reading.spread else {
                return Some(column);
            };
            let mut spread = vec![0.0; wide.conditions()];
            Feed::along(&column, runs.clone()).fill(0, &mut spread);
            Some(Rc::new(spread))
        };
        fused
            .loads
            .iter()
            .zip(&fused.readings)
            .map(column)
            .collect()
    }

    /// The tables of the steps that pick.
    fn tables(&self, fused: &Fused) -> Vec<Option<Table>> {
        if !fused.picks {
            return Vec::new();
        }
        let table = |at: &usize| {
            let step = &self.plan.steps[*at];
            let Work::Pick { selections } = &step.work else {
                return None;
            };
            let (axis, mode) = selections.first()?;
            let values = self.column(*step.reads.first()?)?.clone();
            Some(Table::new(&self.program.axes, *axis, *mode, values))
        };
        fused.steps.iter().map(table).collect()
    }

    /// What looks at the blocks.
    fn looks<'l>(&self, fused: &'l Fused) -> Vec<Option<Look<'l>>>
    where
        Self: 'l,
    {
        if !fused.looks {
            return Vec::new();
        }
        let look = |at: &usize| {
            let step = &self.plan.steps[*at];
            Look::of(self.program, self.plan, &step.work, &fused.shape, step)
        };
        fused.steps.iter().map(look).collect()
    }

    fn scalar(&self, scalar: Scalar) -> Option<f64> {
        match scalar {
            Scalar::Constant(value) => Some(value),
            Scalar::Slot(slot) => self.column(slot)?.first().copied(),
        }
    }

    fn endings(
        &mut self,
        fused: &Fused,
        stored: &dyn Fn(SlotId) -> bool,
    ) -> Option<Vec<Option<Ending>>> {
        let plan = self.plan;
        let mut endings = Vec::with_capacity(fused.steps.len());
        for at in &fused.steps {
            let step = &plan.steps[*at];
            let slot = match step.work {
                Work::Kernel(_) | Work::Pick { .. } => step.out.first(),
                _ => None,
            };
            let ending = match slot {
                Some(slot) => {
                    let mut ending = Ending::new(*slot, self.is_line(*slot));
                    if stored(*slot) {
                        ending.column = Some(self.room(step, fused.shape.conditions())?);
                    }
                    Some(ending)
                }
                None => None,
            };
            endings.push(ending);
        }
        Some(endings)
    }

    /// Memory for a column; where there is none the line says so.
    fn room(&mut self, step: &Step, conditions: usize) -> Option<Vec<f64>> {
        let mut column = Vec::new();
        if column.try_reserve_exact(conditions).is_err() {
            let symbol = step
                .quantity
                .and_then(|q| self.program.quantities.get(q.0 as usize));
            let symbol = symbol.map(|q| q.symbol.clone()).unwrap_or_default();
            self.report_at_step(step, Fault::MemoryLimit { symbol });
            return None;
        }
        Some(column)
    }
}

/// The loads of a group, read along its conditions.
fn feeds<'a>(fused: &'a Fused, columns: &'a [Rc<Vec<f64>>]) -> impl Iterator<Item = Feed<'a>> + 'a {
    let pairs = columns.iter().zip(&fused.readings);
    pairs.map(|(column, reading)| Feed::along(column, reading.runs.clone()))
}

/// The reciprocals of the loads that divide and vary over few conditions.
fn reciprocals(fused: &Fused, columns: &[Rc<Vec<f64>>]) -> Vec<Option<Vec<f64>>> {
    if !fused.readings.iter().any(|r| r.divides) {
        return Vec::new();
    }
    let pairs = columns.iter().zip(&fused.readings);
    pairs
        .map(|(column, reading)| reading.divides.then(|| quotient::reciprocals(column))?)
        .collect()
}

/// Blocks that are used again from group to group.
#[derive(Default)]
pub(super) struct Scratch {
    registers: Vec<Vec<f64>>,
    rooms: Vec<Vec<f64>>,
    /// The same for reciprocals.
    known: Vec<Vec<f64>>,
    stack: Stack,
}

/// What the instructions of a block work on.
struct Room<'r> {
    n: usize,
    registers: &'r mut [Vec<f64>],
    loaded: &'r [Source<'r>],
    reciprocals: &'r [Option<Source<'r>>],
    scalars: &'r [f64],
}

impl Room<'_> {
    fn source(&self, operand: Operand) -> Source<'_> {
        match operand {
            Operand::Register(at) => Source::Block(&self.registers[at as usize][..self.n]),
            Operand::Load(at) => self.loaded[at as usize],
            Operand::Scalar(at) => Source::Value(self.scalars[at as usize]),
        }
    }

    fn arithmetic(&self, op: Arithmetic, a: Operand, b: Operand, out: &mut [f64]) {
        let (left, right) = (self.source(a), self.source(b));
        let known = match (op, b) {
            (Arithmetic::Divide, Operand::Load(at)) => {
                self.reciprocals.get(at as usize).copied().flatten()
            }
            _ => None,
        };
        let divided = match (op, right, known) {
            (Arithmetic::Divide, Source::Value(divisor), _) => {
                quotient::by_value(left, divisor, out)
            }
            (Arithmetic::Divide, _, Some(known)) => quotient::by_known(left, right, known, out),
            _ => false,
        };
        if !divided {
            wide::arithmetic(op, left, right, out);
        }
    }

    fn sources(&self, operands: &[Operand]) -> Vec<Source<'_>> {
        operands.iter().map(|o| self.source(*o)).collect()
    }

    /// Takes a register out while its result is made: no instruction reads the one it writes.
    fn into(&mut self, register: Register, make: impl FnOnce(&Self, &mut [f64])) {
        let mut out = std::mem::take(&mut self.registers[register as usize]);
        make(self, &mut out[..self.n]);
        self.registers[register as usize] = out;
    }
}

impl Running<'_> {
    fn run(&mut self, conditions: usize, scratch: &mut Scratch) {
        let stretch = self.fused.stretch;
        let size = block_size(stretch);
        let Scratch {
            registers,
            rooms,
            known,
            stack,
        } = scratch;
        grow(registers, self.fused.registers, size);
        grow(rooms, self.fused.loads.len(), 0);
        grow(known, self.fused.loads.len(), 0);
        let feeds = std::mem::take(&mut self.feeds);
        let reciprocals = std::mem::take(&mut self.reciprocals);
        let scalars = std::mem::take(&mut self.scalars);
        let mut start = 0;
        while start < conditions {
            let n = (stretch - start % stretch)
                .min(size)
                .min(conditions - start);
            let pairs = feeds.iter().zip(rooms.iter_mut());
            let loaded: Vec<Source<'_>> = pairs.map(|(f, room)| f.block(start, n, room)).collect();
            let pairs = reciprocals.iter().zip(known.iter_mut());
            let known: Vec<Option<Source<'_>>> = pairs
                .map(|(f, room)| Some(f.as_ref()?.block(start, n, room)))
                .collect();
            let mut room = Room {
                n,
                registers: &mut *registers,
                loaded: &loaded,
                reciprocals: &known,
                scalars: &scalars,
            };
            self.block(start, &mut room, stack);
            start += n;
        }
    }

    fn block(&mut self, start: usize, room: &mut Room<'_>, stack: &mut Stack) {
        let texts = self.texts;
        let mut doubtful = false;
        for op in &self.fused.code {
            match op {
                Op::Arithmetic {
                    op,
                    a,
                    b,
                    to,
                    checked,
                } => room.into(*to, |room, out| {
                    doubtful |= *checked && !wide::finite(room.source(*b));
                    room.arithmetic(*op, *a, *b, out);
                }),
                Op::Other {
                    instruction,
                    operands,
                    to,
                } => room.into(*to, |room, out| {
                    doubtful |= other(instruction, &room.sources(operands), texts, out);
                }),
                Op::Pick { step, position, to } => room.into(*to, |room, out| {
                    let position = room.source(*position);
                    if let Some(Some(table)) = self.tables.get(*step) {
                        let each = out.iter_mut().enumerate();
                        each.for_each(|(i, v)| *v = table.value(position.at(i)));
                    }
                }),
                Op::End { step, from, reads } => {
                    let work = &self.plan.steps[self.fused.steps[*step]].work;
                    let ending = self.endings[*step].as_mut();
                    let doubted = std::mem::take(&mut doubtful);
                    room.into(*from, |room, values| {
                        let settled = wide::settle(values);
                        let finite = settled.finite && !doubted;
                        if !finite && let Work::Kernel(code) = work {
                            kernel::run(stack, code, &room.sources(reads), texts, values);
                        }
                        if let Some(ending) = ending {
                            let extremes = (settled.largest, settled.smallest);
                            ending.take(values, finite.then_some(extremes));
                        }
                    });
                }
                Op::Look { step, reads } => {
                    if let Some(Some(look)) = self.looks.get_mut(*step) {
                        look.take(start, room.n, &room.sources(reads));
                    }
                }
            }
        }
    }
}

/// The size of blocks that share out a stretch evenly, in whole vector registers.
fn block_size(stretch: usize) -> usize {
    let pieces = ((stretch + BLOCK / 2) / BLOCK).max(1);
    stretch.div_ceil(pieces).next_multiple_of(8)
}

fn grow(blocks: &mut Vec<Vec<f64>>, count: usize, size: usize) {
    if blocks.len() < count {
        blocks.resize_with(count, Vec::new);
    }
    for block in blocks.iter_mut().take(count).filter(|b| b.len() < size) {
        block.resize(size, 0.0);
    }
}

/// Anything but a plain sign over a block. Says whether an operand held what is no finite number, so that the result
/// cannot be trusted.
fn other(
    instruction: &Instruction,
    operands: &[Source<'_>],
    texts: &[String],
    out: &mut [f64],
) -> bool {
    match (instruction, operands) {
        (Instruction::Negate, [a]) => wide::singles(*a, out, |v| 0.0 - v),
        (Instruction::Function(Function::Abs, _), [a]) => wide::singles(*a, out, f64::abs),
        (Instruction::Function(Function::Sqrt, _), [a]) => wide::singles(*a, out, f64::sqrt),
        (Instruction::Power(exponent), [a]) if *exponent == 2.0 => {
            wide::singles(*a, out, |v| v * v);
        }
        (Instruction::Power(exponent), [a]) => {
            let exponent = *exponent;
            (0..out.len()).for_each(|i| out[i] = scalar::power(a.at(i), exponent));
            return !wide::finite(*a);
        }
        (Instruction::Function(Function::Max, _), [a, b]) => {
            wide::pairs(*a, *b, out, |x, y| if x > y { x } else { y });
            return !(wide::finite(*a) && wide::finite(*b));
        }
        (Instruction::Function(Function::Min, _), [a, b]) => {
            wide::pairs(*a, *b, out, |x, y| if x < y { x } else { y });
            return !(wide::finite(*a) && wide::finite(*b));
        }
        (Instruction::Binary(op), [a, b]) => {
            compared(*op, *a, *b, out);
            return !(wide::finite(*a) && wide::finite(*b));
        }
        (Instruction::Select, [c, a, b]) => {
            for (i, out) in out.iter_mut().enumerate() {
                *out = if c.at(i) != 0.0 { a.at(i) } else { b.at(i) };
            }
            return !wide::finite(*c);
        }
        (Instruction::Not, [a]) => {
            wide::singles(*a, out, |v| f64::from(u8::from(v == 0.0)));
            return !wide::finite(*a);
        }
        (Instruction::HasValue, [a]) => {
            out.fill(1.0);
            return !wide::finite(*a);
        }
        (Instruction::Function(function, _), _) => {
            let mut values = vec![0.0; operands.len()];
            for (i, out) in out.iter_mut().enumerate() {
                let at = operands.iter().map(|o| o.at(i) + 0.0);
                values.iter_mut().zip(at).for_each(|(v, o)| *v = o);
                *out = scalar::function(*function, &values);
            }
            return !operands.iter().all(|o| wide::finite(*o));
        }
        (Instruction::Call(entry, mask), _) => {
            let Compute::Each(compute) = entry.compute else {
                return true;
            };
            let mut arguments = Arguments::new(entry);
            for (i, out) in out.iter_mut().enumerate() {
                let values = operands.iter().map(|o| o.at(i));
                *out = arguments.result(compute, values, *mask, texts).0;
            }
            return !operands.iter().all(|o| wide::finite(*o));
        }
        _ => return true,
    }
    false
}

fn compared(op: BinaryOp, a: Source<'_>, b: Source<'_>, out: &mut [f64]) {
    let truth = |condition: bool| f64::from(u8::from(condition));
    match op {
        BinaryOp::Less => wide::pairs(a, b, out, |x, y| truth(x < y && !scalar::equal(x, y))),
        BinaryOp::LessOrEqual => wide::pairs(a, b, out, |x, y| truth(x < y || scalar::equal(x, y))),
        BinaryOp::Greater => wide::pairs(a, b, out, |x, y| truth(x > y && !scalar::equal(x, y))),
        BinaryOp::GreaterOrEqual => {
            wide::pairs(a, b, out, |x, y| truth(x > y || scalar::equal(x, y)));
        }
        _ => (0..out.len()).for_each(|i| out[i] = scalar::binary(op, a.at(i), b.at(i))),
    }
}
