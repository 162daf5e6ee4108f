//! A group of steps, block by block: signs run over whole blocks as plain IEEE arithmetic, and a block whose result
//! holds anything but finite numbers is worked out again value by value, with the reasons for what is missing.

use super::feed::Feed;
use super::kernel::{self, Arguments, Stack};
use super::look::Look;
use super::pick::Table;
use super::wide::{self, Source};
use super::{Machine, quotient, scalar};
use crate::axes::{AxisSet, Shape};
use crate::catalogue::Compute;
use crate::missing;
use crate::plan::code::{Arithmetic, Fused, Op, Operand, Register, Scalar};
use crate::plan::{Instruction, SlotId, Step, Work};
use crate::problem::{Cause, Fault};
use crate::program::Function;
use crate::syntax::BinaryOp;
use crate::values::{Extreme, NONE, Summary, is_excluded};
use std::rc::Rc;

/// Conditions in a block: long enough to pay for the instruction, short enough for the first-level cache.
const BLOCK: usize = 256;
/// The shortest stretch that blocks keep to, so that columns are read without a copy.
const STRETCH_LEAST: usize = 160;

/// Values of a column that is spread out.
const SPREAD_MOST: f64 = 65_536.0;

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
    fused: &'a Fused,
    steps: Vec<&'a Step>,
    scalars: Vec<f64>,
    feeds: Vec<Feed<'a>>,
    /// The reciprocals of loads that divide and vary over few conditions.
    reciprocals: Vec<Option<Feed<'a>>>,
    tables: Vec<Option<Table<'a>>>,
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
        let plan = self.plan;
        let shape = Shape::of(fused.axes, &plan.lengths);
        let steps: Vec<&Step> = fused.steps.iter().map(|s| &plan.steps[*s]).collect();
        self.count(&steps, fused.code.len() as f64 * shape.conditions_f64())?;
        // Columns are held apart from the machine, so that it can take what the group makes.
        let read: Option<Vec<Rc<Vec<f64>>>> = fused
            .loads
            .iter()
            .map(|s| self.column(*s).cloned())
            .collect();
        let read = read?;
        let scalars: Option<Vec<f64>> = fused.scalars.iter().map(|s| self.scalar(*s)).collect();
        let bases: Vec<Option<(Rc<Vec<f64>>, Shape)>> = steps
            .iter()
            .map(|step| match step.work {
                Work::Pick { .. } => {
                    let base = *step.reads.first()?;
                    Some((self.column(base)?.clone(), self.shape(base)))
                }
                _ => None,
            })
            .collect();
        let endings = self.endings(&steps, &shape, stored)?;
        let program = self.program;
        let shapes: Vec<Shape> = fused.loads.iter().map(|s| self.shape(*s)).collect();
        let columns: Vec<(Rc<Vec<f64>>, Shape)> = read
            .into_iter()
            .zip(shapes)
            .map(|(column, inner)| self.in_long_stretches(column, inner, &shape))
            .collect();
        let reciprocals: Vec<Option<Vec<f64>>> = columns
            .iter()
            .zip(&fused.divides)
            .map(|((column, inner), divides)| {
                let few = 4.0 * inner.conditions_f64() <= shape.conditions_f64();
                (*divides && few).then(|| quotient::reciprocals(column))?
            })
            .collect();
        let mut running = Running {
            fused,
            scalars: scalars?,
            reciprocals: reciprocals
                .iter()
                .zip(&columns)
                .map(|(known, (_, inner))| Some(Feed::new(known.as_ref()?, inner, &shape)))
                .collect(),
            feeds: columns
                .iter()
                .map(|(column, inner)| Feed::new(column, inner, &shape))
                .collect(),
            tables: steps
                .iter()
                .zip(&bases)
                .map(|(step, base)| Table::of(&step.work, base.as_ref(), &program.axes))
                .collect(),
            looks: steps
                .iter()
                .map(|step| Look::of(program, plan, &step.work, &shape, step))
                .collect(),
            endings,
            texts: &program.texts,
            steps,
        };
        let mut scratch = std::mem::take(&mut self.scratch);
        running.run(shape.conditions(), &mut scratch);
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

    /// A column that is read in short stretches, such as one that does not vary over the innermost axis, is spread out
    /// over the inner axes once, where that is little beside the conditions of the group.
    fn in_long_stretches(
        &self,
        column: Rc<Vec<f64>>,
        inner: Shape,
        shape: &Shape,
    ) -> (Rc<Vec<f64>>, Shape) {
        if Feed::new(&column, &inner, shape).stretch() >= BLOCK {
            return (column, inner);
        }
        let mut axes = inner
            .axes
            .iter()
            .fold(AxisSet::NONE, |set, a| set.with(AxisSet::of(*a)));
        let mut together = 1;
        for (axis, length) in shape.axes.iter().zip(&shape.lengths).rev() {
            if together >= 4 * BLOCK {
                break;
            }
            together *= length;
            axes = axes.with(AxisSet::of(*axis));
        }
        let wide = Shape::of(axes, &self.plan.lengths);
        let size = wide.conditions_f64();
        if size > SPREAD_MOST || 8.0 * size > shape.conditions_f64() {
            return (column, inner);
        }
        let mut spread = vec![0.0; wide.conditions()];
        Feed::new(&column, &inner, &wide).fill(0, &mut spread);
        (Rc::new(spread), wide)
    }

    fn scalar(&self, scalar: Scalar) -> Option<f64> {
        match scalar {
            Scalar::Constant(value) => Some(value),
            Scalar::Slot(slot) => self.column(slot)?.first().copied(),
        }
    }

    fn endings(
        &mut self,
        steps: &[&Step],
        shape: &Shape,
        stored: &dyn Fn(SlotId) -> bool,
    ) -> Option<Vec<Option<Ending>>> {
        let mut endings = Vec::with_capacity(steps.len());
        for step in steps {
            let slot = match step.work {
                Work::Kernel(_) | Work::Pick { .. } => step.out.first(),
                _ => None,
            };
            let ending = match slot {
                Some(slot) => {
                    let mut ending = Ending::new(*slot, self.is_line(*slot));
                    if stored(*slot) {
                        ending.column = Some(self.room(step, shape.conditions())?);
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
            (Arithmetic::Divide, Operand::Load(at)) => self.reciprocals[at as usize],
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
        let stretches = self.feeds.iter().map(Feed::stretch);
        let stretch = stretches
            .filter(|s| *s >= STRETCH_LEAST)
            .fold(conditions.max(1), usize::min);
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
                    if let Some(table) = &self.tables[*step] {
                        let each = out.iter_mut().enumerate();
                        each.for_each(|(i, v)| *v = table.value(position.at(i)));
                    }
                }),
                Op::End { step, from, reads } => {
                    let work = &self.steps[*step].work;
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
                    if let Some(look) = &mut self.looks[*step] {
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
