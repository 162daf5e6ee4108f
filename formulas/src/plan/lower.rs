//! From nodes to steps.

use super::fuse::fuse;
use super::{Instruction, Judged, Plan, SlotId, Solve, Step, Work};
use crate::axes::{AxisId, AxisSet};
use crate::catalogue::Compute;
use crate::program::{Axis, NodeId, Op, Program, QuantityId};
use crate::values::{EXCLUDED, NONE};
use rustc_hash::FxHashMap;
use std::rc::Rc;

/// Lays out the steps of a program.
#[must_use]
pub fn plan(program: &Program) -> Plan {
    let mut lowering = Lowering {
        program,
        plan: Plan {
            quantities: vec![None; program.quantities.len()],
            lengths: program.axes.iter().map(|a| a.labels.len()).collect(),
            ..Plan::default()
        },
        fields: FxHashMap::default(),
        unknowns: Vec::new(),
        quantity: None,
    };
    lowering.unknown_slots();
    for id in &program.order {
        lowering.quantity(*id);
    }
    lowering.quantity = None;
    lowering.solves();
    lowering.judged();
    for entry in program
        .figures
        .iter()
        .flat_map(|f| f.x.iter().chain(&f.curves))
    {
        lowering.slot(entry.node);
    }
    lowering.guards();
    for tolerance in &program.tolerances {
        if let crate::program::ToleranceWidth::Node(node) = tolerance.width {
            lowering.slot(node);
        }
    }
    let mut plan = lowering.plan;
    super::solves::place(&mut plan);
    plan.prepare(program);
    plan.groups = fuse(&plan, 0..plan.steps.len());
    for at in 0..plan.solves.len() {
        plan.solves[at].groups = fuse(&plan, plan.solves[at].steps.iter().copied());
    }
    plan
}

struct Lowering<'a> {
    program: &'a Program,
    plan: Plan,
    /// The columns of the fields of calls that give records.
    fields: FxHashMap<NodeId, Vec<SlotId>>,
    /// The columns of each unknown's symbols; none where it cannot be solved.
    unknowns: Vec<Vec<SlotId>>,
    quantity: Option<QuantityId>,
}

impl Lowering<'_> {
    fn quantity(&mut self, id: QuantityId) {
        let Some(node) = self
            .program
            .quantities
            .get(id.0 as usize)
            .and_then(|q| q.node)
        else {
            return;
        };
        self.quantity = Some(id);
        // Equal numbers are one node. Each input has a column of its own all the same: moving one is to leave the others.
        let is_number = matches!(
            self.program.nodes.get(node.0 as usize).map(|n| &n.op),
            Some(Op::Constant(_))
        );
        let slot = if is_number {
            self.make(node)
        } else {
            self.slot(node)
        };
        self.plan.quantities[id.0 as usize] = slot;
    }

    /// The columns of unknowns are there before any step: lines that rest on them are laid out like all others, and the
    /// solving is put in its place at the end.
    fn unknown_slots(&mut self) {
        for unknown in &self.program.unknowns {
            let count = if unknown.equations.is_empty() {
                0
            } else {
                unknown.symbols.len()
            };
            let slots = (0..count).map(|_| self.new_slot(unknown.axes)).collect();
            self.unknowns.push(slots);
        }
    }

    fn solves(&mut self) {
        let program = self.program;
        for (at, unknown) in program.unknowns.iter().enumerate() {
            let out = self.unknowns.get(at).cloned().unwrap_or_default();
            let pairs = |lowering: &mut Self, nodes: &[(NodeId, NodeId)]| {
                let pair =
                    |(a, b): &(NodeId, NodeId)| Some((lowering.slot(*a)?, lowering.slot(*b)?));
                nodes.iter().map(pair).collect::<Option<Vec<_>>>()
            };
            let bounds = pairs(self, &unknown.bounds);
            let sides = pairs(self, &unknown.equations);
            let solve = match (bounds, sides) {
                (Some(bounds), Some(sides)) if !out.is_empty() => Solve {
                    out,
                    bounds,
                    sides,
                    ..Solve::default()
                },
                _ => Solve::default(),
            };
            self.plan.solves.push(solve);
        }
    }

    /// What outputs ask about, and steps that look at it.
    fn judged(&mut self) {
        let program = self.program;
        for (at, governing) in program.governing.iter().enumerate() {
            let slot = self
                .plan
                .quantities
                .get(governing.quantity.0 as usize)
                .copied()
                .flatten();
            let axes = slot.map(|s| self.plan.slots[s.0 as usize]);
            if let (Some(slot), Some(axes)) = (slot, axes)
                && !governing.over.holds(axes)
            {
                self.judge(Judged::Governing(at), axes, vec![slot]);
            }
        }
        for (at, requirement) in program.requirements.iter().enumerate() {
            let sides = requirement.parts.iter().flat_map(|p| [p.left, p.right]);
            let nodes: Vec<NodeId> = requirement.condition.into_iter().chain(sides).collect();
            let slots: Vec<Option<SlotId>> = nodes.iter().map(|n| self.slot(*n)).collect();
            if let Some(slots) = slots.into_iter().collect::<Option<Vec<_>>>()
                && requirement.condition.is_some()
            {
                self.judge(Judged::Requirement(at), requirement.axes, slots);
            }
        }
        for (at, body) in program.freebodies.iter().enumerate() {
            let nodes = body
                .items
                .iter()
                .flat_map(|e| std::iter::once(e.value).chain(e.at));
            let slots: Vec<Option<SlotId>> = nodes.map(|n| self.slot(n)).collect();
            if let Some(slots) = slots.into_iter().collect::<Option<Vec<_>>>()
                && !body.items.is_empty()
            {
                self.judge(Judged::Freebody(at), body.axes, slots);
            }
        }
    }

    /// Calls whose arguments are looked at.
    fn guards(&mut self) {
        let program = self.program;
        for (at, guard) in program.guards.iter().enumerate() {
            let nodes = guard.arguments.iter().flatten().map(|(node, _)| *node);
            let slots: Vec<Option<SlotId>> = nodes.map(|n| self.slot(n)).collect();
            if let Some(slots) = slots.into_iter().collect::<Option<Vec<_>>>() {
                self.judge(Judged::Guard(at), guard.axes, slots);
            }
        }
    }

    fn judge(&mut self, what: Judged, axes: AxisSet, reads: Vec<SlotId>) {
        self.plan.steps.push(Step {
            out: Vec::new(),
            reads,
            work: Work::Judge { what, axes },
            quantity: None,
        });
    }

    fn new_slot(&mut self, axes: AxisSet) -> SlotId {
        self.plan.slots.push(axes);
        SlotId(self.plan.slots.len() as u32 - 1)
    }

    fn step(&mut self, axes: AxisSet, reads: Vec<SlotId>, work: Work) -> SlotId {
        let out = self.new_slot(axes);
        let quantity = self.quantity;
        self.plan.steps.push(Step {
            out: vec![out],
            reads,
            work,
            quantity,
        });
        out
    }

    /// The column of a node, worked out by steps of its own where it has none yet. `None` where it rests on a line
    /// that failed.
    fn slot(&mut self, node: NodeId) -> Option<SlotId> {
        if let Some(slot) = self.plan.nodes.get(&node) {
            return Some(*slot);
        }
        let slot = self.make(node)?;
        self.plan.nodes.insert(node, slot);
        Some(slot)
    }

    fn slots(&mut self, nodes: &[NodeId]) -> Option<Vec<SlotId>> {
        nodes.iter().map(|n| self.slot(*n)).collect()
    }

    fn make(&mut self, id: NodeId) -> Option<SlotId> {
        let program = self.program;
        let node = program.nodes.get(id.0 as usize)?;
        let axes = node.axes;
        match &node.op {
            Op::Constant(value) => {
                Some(self.step(axes, Vec::new(), Work::Values(Rc::new(vec![*value]))))
            }
            Op::None => Some(self.step(axes, Vec::new(), Work::Values(Rc::new(vec![NONE])))),
            Op::Excluded => {
                Some(self.step(axes, Vec::new(), Work::Values(Rc::new(vec![EXCLUDED]))))
            }
            Op::Labels(axis) => {
                let texts = &program.axes.get(axis.0 as usize)?.label_texts;
                let values = Rc::new(texts.iter().map(|t| f64::from(t.0)).collect());
                Some(self.step(axes, Vec::new(), Work::Values(values)))
            }
            Op::Points(axis) => {
                let Axis {
                    values: Some(values),
                    ..
                } = program.axes.get(axis.0 as usize)?
                else {
                    return None;
                };
                Some(self.step(axes, Vec::new(), Work::Values(Rc::new(values.clone()))))
            }
            Op::Quantity(quantity) => self
                .plan
                .quantities
                .get(quantity.0 as usize)
                .copied()
                .flatten(),
            Op::Unknown(unknown, at) => self.unknowns.get(*unknown)?.get(*at).copied(),
            Op::List { axis, items } => self.list(*axis, items, axes),
            Op::Grid { axes: keys, items } => self.grid(keys, items, axes),
            Op::Reduce { .. } | Op::Pick { .. } | Op::Along { .. } => {
                self.over_axes(&node.op, axes)
            }
            Op::Field(call, at) => self.field(*call, *at, id),
            Op::Call { .. } => None,
            _ => self.kernel(id, axes),
        }
    }

    /// Steps that take their reads along axes.
    fn over_axes(&mut self, op: &Op, axes: AxisSet) -> Option<SlotId> {
        match op {
            Op::Reduce { how, value, over } => {
                let read = self.slot(*value)?;
                Some(self.step(
                    axes,
                    vec![read],
                    Work::Reduce {
                        how: *how,
                        over: *over,
                    },
                ))
            }
            Op::Pick { base, selections } => {
                let mut reads = vec![self.slot(*base)?];
                for (_, position, _) in selections {
                    reads.push(self.slot(*position)?);
                }
                let selections = selections
                    .iter()
                    .map(|(axis, _, mode)| (*axis, *mode))
                    .collect();
                Some(self.step(axes, reads, Work::Pick { selections }))
            }
            Op::Along {
                how,
                value,
                x,
                axis,
            } => {
                let mut reads = vec![self.slot(*value)?];
                if let Some(x) = x {
                    reads.push(self.slot(*x)?);
                }
                Some(self.step(
                    axes,
                    reads,
                    Work::Along {
                        how: *how,
                        axis: *axis,
                        has_x: x.is_some(),
                    },
                ))
            }
            _ => None,
        }
    }

    fn list(&mut self, axis: AxisId, items: &[NodeId], axes: AxisSet) -> Option<SlotId> {
        let constants: Option<Vec<f64>> = items.iter().map(|n| self.known(*n)).collect();
        if let Some(values) = constants {
            return Some(self.step(axes, Vec::new(), Work::Values(Rc::new(values))));
        }
        let reads = self.slots(items)?;
        Some(self.step(axes, reads, Work::List { axis }))
    }

    fn grid(&mut self, keys: &[AxisId], items: &[Option<NodeId>], axes: AxisSet) -> Option<SlotId> {
        let mut reads = Vec::new();
        let mut places = Vec::with_capacity(items.len());
        for item in items {
            match item {
                None => places.push(None),
                Some(node) => {
                    places.push(Some(reads.len()));
                    reads.push(self.slot(*node)?);
                }
            }
        }
        Some(self.step(
            axes,
            reads,
            Work::Grid {
                axes: keys.to_vec(),
                items: places,
            },
        ))
    }

    /// A value that needs no working out.
    fn known(&self, node: NodeId) -> Option<f64> {
        match self.program.nodes.get(node.0 as usize)?.op {
            Op::Constant(value) => Some(value),
            Op::None => Some(NONE),
            Op::Excluded => Some(EXCLUDED),
            _ => None,
        }
    }

    /// A field of a catalogue function: one result condition by condition is part of a kernel, all else a step.
    fn field(&mut self, call: NodeId, at: usize, id: NodeId) -> Option<SlotId> {
        let program = self.program;
        let node = program.nodes.get(call.0 as usize)?;
        let Op::Call {
            entry,
            arguments,
            over,
            made,
        } = &node.op
        else {
            return None;
        };
        if matches!(entry.compute, Compute::Each(_)) && !entry.is_record() {
            return self.kernel(id, node.axes);
        }
        if !self.fields.contains_key(&call) {
            let mut reads = Vec::new();
            let mut places = Vec::new();
            for argument in arguments {
                match argument {
                    None => places.push(None),
                    Some(node) => {
                        places.push(Some(reads.len()));
                        reads.push(self.slot(*node)?);
                    }
                }
            }
            let out: Vec<SlotId> = entry
                .fields
                .iter()
                .map(|f| {
                    let of = |axis: Option<AxisId>| axis.map_or(AxisSet::NONE, AxisSet::of);
                    let along = of(over.filter(|_| f.line)).with(of(made.filter(|_| f.made)));
                    self.new_slot(node.axes.with(along))
                })
                .collect();
            let work = Work::Call {
                entry,
                arguments: places,
                over: *over,
                made: *made,
            };
            let quantity = self.quantity;
            self.plan.steps.push(Step {
                out: out.clone(),
                reads,
                work,
                quantity,
            });
            self.fields.insert(call, out);
        }
        self.fields.get(&call)?.get(at).copied()
    }

    fn kernel(&mut self, id: NodeId, axes: AxisSet) -> Option<SlotId> {
        let mut code = Vec::new();
        let mut reads = Vec::new();
        self.emit(id, axes, &mut code, &mut reads)?;
        Some(self.step(axes, reads, Work::Kernel(code)))
    }

    /// Writes the instructions of a node, operands first. Works with a list of its own: a long sum leans to the left
    /// as deep as it is long.
    fn emit(
        &mut self,
        root: NodeId,
        axes: AxisSet,
        code: &mut Vec<Instruction>,
        reads: &mut Vec<SlotId>,
    ) -> Option<()> {
        enum Task {
            Visit(NodeId),
            Write(Instruction),
        }
        let program = self.program;
        let mut tasks = vec![Task::Visit(root)];
        while let Some(task) = tasks.pop() {
            let id = match task {
                Task::Write(instruction) => {
                    code.push(instruction);
                    continue;
                }
                Task::Visit(id) => id,
            };
            let node = program.nodes.get(id.0 as usize)?;
            if let Some(value) = self.known(id) {
                code.push(Instruction::Constant(value));
                continue;
            }
            match self
                .operation(id)
                .filter(|_| id == root || node.axes == axes)
            {
                Some((instruction, operands)) => {
                    tasks.push(Task::Write(instruction));
                    tasks.extend(operands.into_iter().rev().map(Task::Visit));
                }
                None => {
                    let slot = self.slot(id)?;
                    let at = reads.iter().position(|r| *r == slot).unwrap_or_else(|| {
                        reads.push(slot);
                        reads.len() - 1
                    });
                    code.push(Instruction::Load(at));
                }
            }
        }
        Some(())
    }

    /// The instruction of a node that is worked out condition by condition.
    fn operation(&self, id: NodeId) -> Option<(Instruction, Vec<NodeId>)> {
        let node = self.program.nodes.get(id.0 as usize)?;
        Some(match &node.op {
            Op::Negate(a) => (Instruction::Negate, vec![*a]),
            Op::Not(a) => (Instruction::Not, vec![*a]),
            Op::Binary(op, a, b) => (Instruction::Binary(*op), vec![*a, *b]),
            Op::Power(a, exponent) => (Instruction::Power(*exponent), vec![*a]),
            Op::Select {
                condition,
                then,
                otherwise,
            } => (Instruction::Select, vec![*condition, *then, *otherwise]),
            Op::Function(function, arguments) => (
                Instruction::Function(*function, arguments.len()),
                arguments.clone(),
            ),
            Op::HasValue(a) => (Instruction::HasValue, vec![*a]),
            Op::Field(call, 0) => {
                let Op::Call {
                    entry,
                    arguments,
                    over: None,
                    made: None,
                } = &self.program.nodes.get(call.0 as usize)?.op
                else {
                    return None;
                };
                if entry.is_record() || !matches!(entry.compute, Compute::Each(_)) {
                    return None;
                }
                let mask = arguments
                    .iter()
                    .enumerate()
                    .fold(0, |m, (i, a)| m | u32::from(a.is_some()) << i);
                (
                    Instruction::Call(entry, mask),
                    arguments.iter().copied().flatten().collect(),
                )
            }
            _ => return None,
        })
    }
}
