//! What a group of steps does to a block: its instructions over registers, each register a block of values.

use super::{Instruction, Plan, SlotId, Work};
use crate::axes::{AxisSet, Runs, Shape};
use crate::syntax::BinaryOp;
use rustc_hash::FxHashMap;

/// A block of values.
pub type Register = u16;

/// What an instruction reads.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Operand {
    /// A block that the group makes.
    Register(Register),
    /// A column from elsewhere: index into [`Fused::loads`].
    Load(u16),
    /// One value for all conditions: index into [`Fused::scalars`].
    Scalar(u16),
}

/// A value that is the same in every condition.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Scalar {
    /// Known beforehand.
    Constant(f64),
    /// A column without axes.
    Slot(SlotId),
}

/// A sign that works on whole blocks.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum Arithmetic {
    Add,
    Subtract,
    Multiply,
    Divide,
}

/// One instruction over a block.
#[derive(Debug)]
pub enum Op {
    /// A sign; `checked` where its second operand may be no finite number and the result would not show it.
    Arithmetic {
        /// The sign.
        op: Arithmetic,
        /// Left operand.
        a: Operand,
        /// Right operand.
        b: Operand,
        /// Where the result goes.
        to: Register,
        /// Whether the divisor has to be looked at.
        checked: bool,
    },
    /// Anything else, value by value.
    Other {
        /// What.
        instruction: Instruction,
        /// Its operands.
        operands: Vec<Operand>,
        /// Where the result goes.
        to: Register,
    },
    /// Picks from a table at a position.
    Pick {
        /// Index of the step in [`Fused::steps`].
        step: usize,
        /// The position.
        position: Operand,
        /// Where the result goes.
        to: Register,
    },
    /// The step is done: its result is in a register.
    End {
        /// Index of the step in [`Fused::steps`].
        step: usize,
        /// Its result.
        from: Register,
        /// What the step reads, in the order of its reads.
        reads: Vec<Operand>,
    },
    /// A step that looks at blocks and makes no column of their length.
    Look {
        /// Index of the step in [`Fused::steps`].
        step: usize,
        /// What the step reads.
        reads: Vec<Operand>,
    },
}

/// How a column from elsewhere is read along the conditions of a group.
#[derive(Debug)]
pub struct Reading {
    /// The shape over which a column that is read in short stretches is spread out first, and how.
    pub spread: Option<(Shape, Runs)>,
    /// How it is read, once it is spread out.
    pub runs: Runs,
    /// Whether something is divided by it, and it is worth while to have its reciprocals.
    pub divides: bool,
}

/// Conditions in a block: long enough to pay for the instruction, short enough for the first-level cache.
pub const BLOCK: usize = 256;
/// The shortest stretch that blocks keep to.
const STRETCH_LEAST: usize = 160;
/// Values of a column that is spread out.
const SPREAD_MOST: f64 = 65_536.0;

impl Reading {
    /// A column that is read in short stretches, such as one that does not vary over the innermost axis, is spread out
    /// over the inner axes once, where that is little beside the conditions of the group.
    fn new(plan: &Plan, load: AxisSet, shape: &Shape, divides: bool) -> Self {
        let inner = plan.shape(load);
        let runs = Runs::new(&inner, shape);
        let wide = Self::wide(plan, load, shape);
        let all = shape.conditions_f64();
        let size = wide.conditions_f64();
        if runs.stretch() >= BLOCK || size > SPREAD_MOST || 8.0 * size > all {
            let divides = divides && 4.0 * inner.conditions_f64() <= all;
            return Reading {
                spread: None,
                runs,
                divides,
            };
        }
        Reading {
            runs: Runs::new(&wide, shape),
            spread: Some((wide.clone(), Runs::new(&inner, &wide))),
            divides,
        }
    }

    fn wide(plan: &Plan, load: AxisSet, shape: &Shape) -> Shape {
        let mut axes = load;
        let mut together = 1;
        for (axis, length) in shape.axes.iter().zip(&shape.lengths).rev() {
            if together >= 4 * BLOCK {
                break;
            }
            together *= length;
            axes = axes.with(AxisSet::of(*axis));
        }
        Shape::of(axes, &plan.lengths)
    }
}

/// Steps over the same conditions.
#[derive(Debug, Default)]
pub struct Fused {
    /// Their axes.
    pub axes: AxisSet,
    /// The steps, as indices into the plan's.
    pub steps: Vec<usize>,
    /// Columns read.
    pub loads: Vec<SlotId>,
    /// Values that are the same in every condition.
    pub scalars: Vec<Scalar>,
    /// How each of the loads is read.
    pub readings: Vec<Reading>,
    /// The conditions.
    pub shape: Shape,
    /// Conditions that blocks keep to, so that columns are read without a copy.
    pub stretch: usize,
    /// Whether a step picks from a table.
    pub picks: bool,
    /// Whether a step looks at blocks.
    pub looks: bool,
    /// The instructions.
    pub code: Vec<Op>,
    /// How many registers there are.
    pub registers: usize,
}

/// Writes the instructions of a group, first with a register for each result, then with as few as will do.
pub(super) struct Writer<'a> {
    plan: &'a Plan,
    group: Fused,
    places: FxHashMap<SlotId, Operand>,
    constants: FxHashMap<u64, u16>,
    /// For each virtual register, whether it may hold what is no finite number without the line knowing.
    computed: Vec<bool>,
}

impl<'a> Writer<'a> {
    pub(super) fn write(plan: &'a Plan, axes: AxisSet, steps: Vec<usize>) -> Fused {
        let mut writer = Writer {
            plan,
            group: Fused {
                axes,
                ..Fused::default()
            },
            places: FxHashMap::default(),
            constants: FxHashMap::default(),
            computed: Vec::new(),
        };
        for (index, step) in steps.iter().enumerate() {
            writer.step(index, *step);
        }
        writer.group.steps = steps;
        writer.readings();
        let code = &writer.group.code;
        let picks = code.iter().any(|op| matches!(op, Op::Pick { .. }));
        let looks = code.iter().any(|op| matches!(op, Op::Look { .. }));
        (writer.group.picks, writer.group.looks) = (picks, looks);
        allocate(&mut writer.group, writer.computed.len());
        writer.group
    }

    /// How the loads are read.
    fn readings(&mut self) {
        let shape = self.plan.shape(self.group.axes);
        let divides = divisors(&self.group);
        let axes = self
            .group
            .loads
            .iter()
            .map(|s| self.plan.slots[s.0 as usize]);
        let readings = axes.zip(divides);
        self.group.readings = readings
            .map(|(axes, divides)| Reading::new(self.plan, axes, &shape, divides))
            .collect();
        let stretches = self.group.readings.iter().map(|r| r.runs.stretch());
        self.group.stretch = stretches
            .filter(|s| *s >= STRETCH_LEAST)
            .fold(shape.conditions().max(1), usize::min);
        self.group.shape = shape;
    }

    fn register(&mut self, computed: bool) -> Register {
        self.computed.push(computed);
        (self.computed.len() - 1) as Register
    }

    /// A column that is read: from a register of the group, or from elsewhere.
    fn place(&mut self, slot: SlotId) -> Operand {
        if let Some(place) = self.places.get(&slot) {
            return *place;
        }
        let alone = self.plan.slots[slot.0 as usize].is_empty() && !self.group.axes.is_empty();
        let place = if alone {
            self.group.scalars.push(Scalar::Slot(slot));
            Operand::Scalar(self.group.scalars.len() as u16 - 1)
        } else {
            self.group.loads.push(slot);
            Operand::Load(self.group.loads.len() as u16 - 1)
        };
        self.places.insert(slot, place);
        place
    }

    fn constant(&mut self, value: f64) -> Operand {
        let scalars = &mut self.group.scalars;
        let at = self.constants.entry(value.to_bits()).or_insert_with(|| {
            scalars.push(Scalar::Constant(value));
            scalars.len() as u16 - 1
        });
        Operand::Scalar(*at)
    }

    fn step(&mut self, index: usize, at: usize) {
        let step = &self.plan.steps[at];
        match &step.work {
            Work::Kernel(code) => {
                let reads: Vec<Operand> = step.reads.iter().map(|s| self.place(*s)).collect();
                let from = self.kernel(code, &reads);
                self.group.code.push(Op::End {
                    step: index,
                    from,
                    reads,
                });
                self.made(step.out.first(), from);
            }
            Work::Pick { .. } => {
                let position = step.reads.get(1).map(|s| self.place(*s));
                let Some(position) = position else { return };
                let to = self.register(true);
                self.group.code.push(Op::Pick {
                    step: index,
                    position,
                    to,
                });
                let reads = Vec::new();
                self.group.code.push(Op::End {
                    step: index,
                    from: to,
                    reads,
                });
                self.made(step.out.first(), to);
            }
            _ => {
                let reads = step.reads.iter().map(|s| self.place(*s)).collect();
                self.group.code.push(Op::Look { step: index, reads });
            }
        }
    }

    /// From here on the slot is read from the register; what its step has settled is finite or marked.
    fn made(&mut self, slot: Option<&SlotId>, register: Register) {
        self.computed[register as usize] = false;
        if let Some(slot) = slot {
            self.places.insert(*slot, Operand::Register(register));
        }
    }

    /// From a stack to registers.
    fn kernel(&mut self, code: &[Instruction], reads: &[Operand]) -> Register {
        let mut stack: Vec<Operand> = Vec::new();
        for instruction in code {
            match instruction {
                Instruction::Load(read) => stack.push(reads[*read]),
                Instruction::Constant(value) => {
                    let place = self.constant(*value);
                    stack.push(place);
                }
                _ => {
                    let count = operands_of(instruction);
                    let operands = stack.split_off(stack.len().saturating_sub(count));
                    let to = self.operation(*instruction, operands);
                    stack.push(Operand::Register(to));
                }
            }
        }
        match stack.pop() {
            // A result that is a block already, or one value, is copied: a step has a register of its own.
            Some(Operand::Register(register)) if self.is_fresh(register, reads) => register,
            Some(place) => {
                let zero = self.zero();
                self.operation(Instruction::Binary(BinaryOp::Add), vec![place, zero])
            }
            None => self.register(false),
        }
    }

    fn zero(&mut self) -> Operand {
        self.constant(0.0)
    }

    fn is_fresh(&self, register: Register, reads: &[Operand]) -> bool {
        !reads.contains(&Operand::Register(register))
    }

    fn operation(&mut self, instruction: Instruction, operands: Vec<Operand>) -> Register {
        let to = self.register(true);
        let sign = match instruction {
            Instruction::Binary(BinaryOp::Add) => Some(Arithmetic::Add),
            Instruction::Binary(BinaryOp::Subtract) => Some(Arithmetic::Subtract),
            Instruction::Binary(BinaryOp::Multiply) => Some(Arithmetic::Multiply),
            Instruction::Binary(BinaryOp::Divide) => Some(Arithmetic::Divide),
            _ => None,
        };
        let op = match (sign, operands.as_slice()) {
            (Some(op), [a, b]) => Op::Arithmetic {
                op,
                a: *a,
                b: *b,
                to,
                checked: op == Arithmetic::Divide && self.may_be_infinite(*b),
            },
            _ => Op::Other {
                instruction,
                operands,
                to,
            },
        };
        self.group.code.push(op);
        to
    }

    fn may_be_infinite(&self, place: Operand) -> bool {
        match place {
            Operand::Register(register) => self.computed[register as usize],
            Operand::Load(_) | Operand::Scalar(_) => false,
        }
    }
}

/// How many operands an instruction takes off the stack.
fn operands_of(instruction: &Instruction) -> usize {
    match instruction {
        Instruction::Load(_) | Instruction::Constant(_) => 0,
        Instruction::Negate | Instruction::Not | Instruction::Power(_) | Instruction::HasValue => 1,
        Instruction::Binary(_) => 2,
        Instruction::Select => 3,
        Instruction::Function(_, count) => *count,
        Instruction::Call(_, mask) => mask.count_ones() as usize,
    }
}

impl Op {
    /// What it reads.
    pub fn reads(&self) -> Vec<Operand> {
        match self {
            Op::Arithmetic { a, b, .. } => vec![*a, *b],
            Op::Other { operands, .. } => operands.clone(),
            Op::Pick { position, .. } => vec![*position],
            Op::End { from, reads, .. } => {
                let mut all = reads.clone();
                all.push(Operand::Register(*from));
                all
            }
            Op::Look { reads, .. } => reads.clone(),
        }
    }

    fn places(&mut self) -> Vec<&mut Operand> {
        match self {
            Op::Arithmetic { a, b, .. } => vec![a, b],
            Op::Other { operands, .. } => operands.iter_mut().collect(),
            Op::Pick { position, .. } => vec![position],
            Op::End { reads, .. } | Op::Look { reads, .. } => reads.iter_mut().collect(),
        }
    }
}

/// For each load whether something is divided by it.
fn divisors(group: &Fused) -> Vec<bool> {
    let mut divides = vec![false; group.loads.len()];
    for op in &group.code {
        if let Op::Arithmetic {
            op: Arithmetic::Divide,
            b: Operand::Load(load),
            ..
        } = op
        {
            divides[*load as usize] = true;
        }
    }
    divides
}

/// Gives registers that are no longer read to later results.
fn allocate(group: &mut Fused, count: usize) {
    let mut last = vec![0; count];
    for (at, op) in group.code.iter().enumerate() {
        for read in op.reads() {
            if let Operand::Register(register) = read {
                last[register as usize] = at;
            }
        }
    }
    let mut map: Vec<Register> = vec![0; count];
    let mut next: Register = 0;
    let mut free: Vec<Register> = Vec::new();
    for (at, op) in group.code.iter_mut().enumerate() {
        let read: Vec<Register> = op
            .reads()
            .iter()
            .filter_map(|o| match o {
                Operand::Register(r) => Some(*r),
                Operand::Load(_) | Operand::Scalar(_) => None,
            })
            .collect();
        let made = match op {
            Op::Arithmetic { to, .. } | Op::Other { to, .. } | Op::Pick { to, .. } => Some(to),
            Op::End { .. } | Op::Look { .. } => None,
        };
        if let Some(to) = made {
            let place = free.pop().unwrap_or_else(|| {
                next += 1;
                next - 1
            });
            map[*to as usize] = place;
            *to = place;
        }
        for place in op.places() {
            if let Operand::Register(register) = place {
                *register = map[*register as usize];
            }
        }
        if let Op::End { from, .. } = op {
            *from = map[*from as usize];
        }
        let mut done: Vec<Register> = read
            .into_iter()
            .filter(|r| last[*r as usize] == at)
            .collect();
        done.sort_unstable();
        done.dedup();
        free.extend(done.into_iter().map(|r| map[r as usize]));
    }
    group.registers = next as usize;
}
