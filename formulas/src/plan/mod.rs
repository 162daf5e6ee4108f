//! The plan: the checked program as a row of steps over columns. A step works out one column (or the fields of one
//! record) over its own axes only; what varies over fewer axes than its line is worked out once, beforehand.

pub mod code;
pub mod fuse;
mod lower;
mod solves;

use crate::axes::{AxisId, AxisSet, Shape};
use crate::catalogue::Entry;
use crate::program::{Along, Function, NodeId, PickMode, Program, QuantityId, Reduction};
use crate::syntax::BinaryOp;
use fuse::Group;
use rustc_hash::FxHashMap;
use std::rc::Rc;

pub use lower::plan;

/// Number of a column.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, PartialOrd, Ord)]
pub struct SlotId(pub u32);

/// The whole plan.
#[derive(Debug, Default)]
pub struct Plan {
    /// The axes of each column.
    pub slots: Vec<AxisSet>,
    /// The steps in order: what a step reads was worked out before it.
    pub steps: Vec<Step>,
    /// The column of each quantity; `None` where its line failed.
    pub quantities: Vec<Option<SlotId>>,
    /// The columns of the nodes that outputs ask for.
    pub nodes: FxHashMap<NodeId, SlotId>,
    /// How each statement of `Program::unknowns` is solved.
    pub solves: Vec<Solve>,
    /// The steps put together, in the order in which they are run.
    pub groups: Vec<Group>,
    /// The length of every axis.
    pub lengths: Vec<usize>,
    /// The quantities of each column.
    pub lines: Vec<Vec<u32>>,
    /// Whether there are columns that are kept only where somebody reads them.
    pub large: bool,
    /// The shapes of sets of axes, made once.
    pub shapes: FxHashMap<AxisSet, Shape>,
}

/// How an `unknown` is solved: its trial columns are put in the place of `out`, `steps` are worked out, and the sides
/// read.
#[derive(Debug, Default)]
pub struct Solve {
    /// The columns of its symbols.
    pub out: Vec<SlotId>,
    /// Columns of the bounds.
    pub bounds: Vec<(SlotId, SlotId)>,
    /// Columns of both sides of each equation.
    pub sides: Vec<(SlotId, SlotId)>,
    /// The steps between the unknown and the sides, as indices into the plan's steps.
    pub steps: Vec<usize>,
    /// The same steps put together.
    pub groups: Vec<Group>,
    /// Whether such a step looks along an axis over which the unknown varies.
    pub coupled: bool,
}

/// One step.
#[derive(Debug)]
pub struct Step {
    /// What it works out; the fields of a record are several.
    pub out: Vec<SlotId>,
    /// What it reads.
    pub reads: Vec<SlotId>,
    /// How.
    pub work: Work,
    /// The quantity whose line it belongs to; `None` for the sides of requirements and the like.
    pub quantity: Option<QuantityId>,
}

/// How a step works.
#[derive(Debug)]
#[allow(missing_docs)]
pub enum Work {
    /// Values that are known already.
    Values(Rc<Vec<f64>>),
    /// Condition by condition, in blocks.
    Kernel(Vec<Instruction>),
    /// One read for each label of the axis.
    List {
        axis: AxisId,
    },
    /// One read for each combination of labels; `None` where there is none.
    Grid {
        axes: Vec<AxisId>,
        items: Vec<Option<usize>>,
    },
    Reduce {
        how: Reduction,
        over: AxisSet,
    },
    /// The first read is the base, one more for each selection.
    Pick {
        selections: Vec<(AxisId, PickMode)>,
    },
    /// The first read is the value, the second the abscissa where there is one.
    Along {
        how: Along,
        axis: AxisId,
        has_x: bool,
    },
    /// An `unknown`, by its index in [`Plan::solves`]: bounds, and all that its steps read from elsewhere.
    Solve(usize),
    /// Looks at what an output asks about, over these axes.
    Judge {
        what: Judged,
        axes: AxisSet,
    },
    /// A catalogue function that gives a record, or takes whole lines. For each argument the read that holds it.
    Call {
        entry: &'static Entry,
        arguments: Vec<Option<usize>>,
        over: Option<AxisId>,
        made: Option<AxisId>,
    },
}

/// An output that is judged condition by condition, by its index in the program.
#[derive(Clone, Copy, Debug)]
#[allow(missing_docs)]
pub enum Judged {
    Governing(usize),
    Requirement(usize),
    Freebody(usize),
    /// A call, by its index among the guards.
    Guard(usize),
}

impl Plan {
    /// The shape of a set of axes.
    #[must_use]
    pub fn shape(&self, axes: AxisSet) -> Shape {
        match self.shapes.get(&axes) {
            Some(shape) => shape.clone(),
            None => Shape::of(axes, &self.lengths),
        }
    }

    /// What a run needs to know of the columns, once all of them are there.
    fn prepare(&mut self, program: &Program) {
        self.lines = vec![Vec::new(); self.slots.len()];
        for (quantity, slot) in self.quantities.iter().enumerate() {
            if let Some(slot) = slot {
                self.lines[slot.0 as usize].push(quantity as u32);
            }
        }
        self.large = self
            .slots
            .iter()
            .any(|axes| self.conditions(*axes) > fuse::STORED_MOST);
        let quantities = program.quantities.iter().map(|q| q.axes);
        let requirements = program.requirements.iter().map(|r| r.axes);
        let sets: Vec<AxisSet> = self.slots.iter().copied().chain(quantities).collect();
        for axes in sets.into_iter().chain(requirements) {
            let lengths = &self.lengths;
            self.shapes
                .entry(axes)
                .or_insert_with(|| Shape::of(axes, lengths));
        }
    }

    /// How many conditions a set of axes has.
    #[must_use]
    pub fn conditions(&self, axes: AxisSet) -> f64 {
        let lengths = axes
            .iter()
            .map(|a| self.lengths.get(a.0 as usize).copied().unwrap_or(1));
        lengths.map(|n| n as f64).product()
    }
}

/// One instruction of a kernel: it takes its operands from a stack of blocks and leaves its result there.
#[derive(Clone, Copy, Debug)]
#[allow(missing_docs)]
pub enum Instruction {
    /// The read of this index.
    Load(usize),
    Constant(f64),
    Negate,
    Not,
    Binary(BinaryOp),
    Power(f64),
    Select,
    Function(Function, usize),
    HasValue,
    /// A catalogue function of one result; the arguments given are the bits of the mask.
    Call(&'static Entry, u32),
}
