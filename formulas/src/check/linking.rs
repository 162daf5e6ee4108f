//! Copies what a line needs of another sheet's program, so that tolerances and conditions come along.
//!
//! Nothing is checked again: the nodes of the other program are taken over with the numbers of axes, quantities and
//! unknowns changed to ours. Text values are numbered alike in all sheets of one reading.

use super::Checker;
use crate::axes::{AxisId, AxisSet};
use crate::program::{
    self, Axis, Node, NodeId, Op, Origin, Program, QuantityId, Reduction, Tolerance, ToleranceWidth,
};
use crate::span::Span;
use crate::used::UsedSheet;
use rustc_hash::FxHashMap;
use std::collections::BTreeSet;
use std::rc::Rc;

/// What of one other sheet stands in this program already.
#[derive(Debug, Default)]
pub(super) struct Links {
    axes: Vec<Option<AxisId>>,
    nodes: FxHashMap<NodeId, NodeId>,
    quantities: FxHashMap<QuantityId, QuantityId>,
    unknowns: FxHashMap<usize, usize>,
}

/// Where a quantity is taken from, and the line that takes it.
#[derive(Clone, Copy)]
pub(super) struct Source<'s> {
    pub(super) sheet: &'s Rc<UsedSheet>,
    /// The name by which this sheet calls it.
    pub(super) name: &'s str,
    pub(super) statement: usize,
    pub(super) span: Span,
}

/// Nodes, quantities and unknowns that a quantity rests on.
#[derive(Default)]
struct Needed {
    nodes: BTreeSet<NodeId>,
    quantities: BTreeSet<QuantityId>,
    unknowns: BTreeSet<usize>,
    axes: AxisSet,
}

impl Checker<'_> {
    /// The quantity of another sheet as one of this program. `Err` names an axis that stands in its way.
    pub(super) fn link(
        &mut self,
        source: Source<'_>,
        wanted: QuantityId,
    ) -> Result<QuantityId, String> {
        let mut links = self
            .links
            .remove(&source.sheet.name)
            .unwrap_or_else(|| self.new_links(&source.sheet.program));
        let result = self.linked(source, wanted, &mut links);
        self.links.insert(source.sheet.name.clone(), links);
        result
    }

    fn new_links(&self, program: &Program) -> Links {
        Links {
            axes: program.axes.iter().map(|a| self.same_axis(a)).collect(),
            ..Links::default()
        }
    }

    /// Our axis of that name, where its labels are the same.
    pub(super) fn same_axis(&self, other: &Axis) -> Option<AxisId> {
        let id = *self.axis_of_symbol.get(&other.name)?;
        let own = self.program.axes.get(id.0 as usize)?;
        let same = match (&own.values, &other.values) {
            (None, None) => own.labels == other.labels,
            (Some(a), Some(b)) => {
                let near = |(a, b): (&f64, &f64)| (a - b).abs() <= 1e-12 * a.abs().max(b.abs());
                a.len() == b.len()
                    && a.iter().zip(b).all(near)
                    && dimension_of(own).matches(dimension_of(other))
            }
            _ => false,
        };
        same.then_some(id)
    }

    fn linked(
        &mut self,
        source: Source<'_>,
        wanted: QuantityId,
        links: &mut Links,
    ) -> Result<QuantityId, String> {
        if let Some(known) = links.quantities.get(&wanted) {
            return Ok(*known);
        }
        let program = &source.sheet.program;
        let needed = self.needed(source.sheet, wanted, links);
        for axis in needed.axes.iter() {
            if links.axes.get(axis.0 as usize).copied().flatten().is_none() {
                let axis = program.axes.get(axis.0 as usize);
                return Err(axis.map(|a| a.name.clone()).unwrap_or_default());
            }
        }
        self.reserve(source, &needed, links);
        self.copy(source, &needed, links);
        let linked = links.quantities.get(&wanted).copied();
        linked.ok_or_else(String::new)
    }

    /// What a quantity rests on that is not here yet.
    fn needed(&self, sheet: &UsedSheet, wanted: QuantityId, links: &Links) -> Needed {
        let program = &sheet.program;
        let mut needed = Needed::default();
        let mut parts = Parts::default();
        parts.quantities.push(wanted);
        loop {
            if let Some(id) = parts.quantities.pop() {
                let new = !links.quantities.contains_key(&id) && needed.quantities.insert(id);
                if let Some(quantity) = program.quantities.get(id.0 as usize).filter(|_| new) {
                    self.quantity_parts(sheet, id, quantity, &mut parts);
                }
            } else if let Some(at) = parts.unknowns.pop() {
                let new = !links.unknowns.contains_key(&at) && needed.unknowns.insert(at);
                if let Some(unknown) = program.unknowns.get(at).filter(|_| new) {
                    parts.axes = parts.axes.with(unknown.axes);
                    let pairs = unknown.bounds.iter().chain(&unknown.equations);
                    pairs.for_each(|(a, b)| parts.nodes.extend([*a, *b]));
                }
            } else if let Some(id) = parts.nodes.pop() {
                let new = !links.nodes.contains_key(&id) && needed.nodes.insert(id);
                if let Some(node) = program.nodes.get(id.0 as usize).filter(|_| new) {
                    parts.axes = parts.axes.with(node.axes);
                    map(&node.op, &mut parts);
                }
            } else {
                needed.axes = parts.axes;
                return needed;
            }
        }
    }

    /// What stands behind a quantity, unless it came here by way of another sheet already.
    fn quantity_parts(
        &self,
        sheet: &UsedSheet,
        id: QuantityId,
        quantity: &program::Quantity,
        parts: &mut Parts,
    ) {
        if self.origins.contains_key(&origin_of(sheet, quantity)) {
            return;
        }
        parts.nodes.extend(quantity.node);
        for at in sheet.tolerances_of(id) {
            if let Some(tolerance) = sheet.program.tolerances.get(*at) {
                parts.of_tolerance(tolerance);
            }
        }
    }

    /// Gives everything that is needed its number here, what another way has brought along keeping it.
    fn reserve(&mut self, source: Source<'_>, needed: &Needed, links: &mut Links) {
        let program = &source.sheet.program;
        for (at, node) in (self.program.nodes.len() as u32..).zip(&needed.nodes) {
            links.nodes.insert(*node, NodeId(at));
        }
        for unknown in &needed.unknowns {
            let at = self.program.unknowns.len();
            links.unknowns.insert(*unknown, at);
            if let Some(unknown) = program.unknowns.get(*unknown) {
                self.program.unknowns.push(unknown.clone());
            }
        }
        let order = program
            .order
            .iter()
            .filter(|q| needed.quantities.contains(q));
        for id in order {
            let Some(quantity) = program.quantities.get(id.0 as usize) else {
                continue;
            };
            let origin = origin_of(source.sheet, quantity);
            let place = match self.origins.get(&origin) {
                Some(place) => *place,
                None => {
                    let place = QuantityId(self.program.quantities.len() as u32);
                    self.program
                        .quantities
                        .push(taken(source, quantity, origin.clone()));
                    self.program.order.push(place);
                    self.origins.insert(origin, place);
                    self.fresh.push((*id, place));
                    place
                }
            };
            links.quantities.insert(*id, place);
        }
    }

    /// Copies the nodes, then sets what refers to them.
    fn copy(&mut self, source: Source<'_>, needed: &Needed, links: &Links) {
        let program = &source.sheet.program;
        for node in &needed.nodes {
            let node = program.nodes.get(node.0 as usize);
            let copied = node.map(|node| Node {
                op: renumbered(&node.op, links),
                axes: set_of(node.axes, links),
            });
            let nothing = Node {
                op: Op::None,
                axes: AxisSet::NONE,
            };
            self.program.nodes.push(copied.unwrap_or(nothing));
        }
        let node = |id: &NodeId| links.nodes.get(id).copied().unwrap_or(*id);
        for at in &needed.unknowns {
            let place = links.unknowns.get(at).copied();
            let Some(unknown) = place.and_then(|p| self.program.unknowns.get_mut(p)) else {
                continue;
            };
            unknown.statement = source.statement;
            unknown.span = source.span;
            unknown.axes = set_of(unknown.axes, links);
            for (a, b) in unknown.bounds.iter_mut().chain(&mut unknown.equations) {
                (*a, *b) = (node(a), node(b));
            }
        }
        for (theirs, ours) in std::mem::take(&mut self.fresh) {
            if let Some(quantity) = self.program.quantities.get_mut(ours.0 as usize) {
                quantity.node = quantity.node.as_ref().map(node);
                quantity.axes = set_of(quantity.axes, links);
            }
            for at in source.sheet.tolerances_of(theirs) {
                if let Some(tolerance) = program.tolerances.get(*at) {
                    self.program
                        .tolerances
                        .push(tolerance_of(tolerance, ours, links));
                }
            }
        }
    }
}

fn dimension_of(axis: &Axis) -> engine::quantity::Dimension {
    axis.unit
        .as_ref()
        .map_or(engine::quantity::Dimension::NONE, |u| u.unit.dimension)
}

fn origin_of(sheet: &UsedSheet, quantity: &program::Quantity) -> Origin {
    quantity.origin.clone().unwrap_or_else(|| Origin {
        sheet: Rc::from(sheet.name.as_str()),
        symbol: Rc::from(quantity.symbol.as_str()),
    })
}

/// A quantity of another sheet as it stands here; its node and axes are still that sheet's.
fn taken(source: Source<'_>, quantity: &program::Quantity, origin: Origin) -> program::Quantity {
    program::Quantity {
        symbol: format!("{}.{}", source.name, quantity.symbol),
        statement: source.statement,
        line: 0,
        span: source.span,
        input: false,
        is_axis: false,
        part: None,
        listed: false,
        origin: Some(origin),
        ..quantity.clone()
    }
}

fn tolerance_of(tolerance: &Tolerance, quantity: QuantityId, links: &Links) -> Tolerance {
    let axis = |id: AxisId| {
        links
            .axes
            .get(id.0 as usize)
            .copied()
            .flatten()
            .unwrap_or(id)
    };
    Tolerance {
        quantity,
        at: tolerance
            .at
            .iter()
            .map(|(a, label)| (axis(*a), *label))
            .collect(),
        width: match tolerance.width {
            ToleranceWidth::Node(node) => {
                ToleranceWidth::Node(links.nodes.get(&node).copied().unwrap_or(node))
            }
            part @ ToleranceWidth::Part(_) => part,
        },
    }
}

fn set_of(set: AxisSet, links: &Links) -> AxisSet {
    set.iter()
        .filter_map(|a| links.axes.get(a.0 as usize).copied().flatten())
        .fold(AxisSet::NONE, |set, a| set.with(AxisSet::of(a)))
}

/// What an operation refers to, looked at or replaced one by one.
trait Visit {
    fn node(&mut self, id: NodeId) -> NodeId;
    fn axis(&mut self, id: AxisId) -> AxisId;
    fn quantity(&mut self, id: QuantityId) -> QuantityId;
    fn unknown(&mut self, at: usize) -> usize;

    fn set(&mut self, set: AxisSet) -> AxisSet {
        set.iter()
            .fold(AxisSet::NONE, |all, a| all.with(AxisSet::of(self.axis(a))))
    }
}

/// Gathers.
#[derive(Default)]
struct Parts {
    nodes: Vec<NodeId>,
    quantities: Vec<QuantityId>,
    unknowns: Vec<usize>,
    axes: AxisSet,
}

impl Parts {
    fn of_tolerance(&mut self, tolerance: &Tolerance) {
        if let ToleranceWidth::Node(node) = tolerance.width {
            self.nodes.push(node);
        }
        for (axis, _) in &tolerance.at {
            self.axis(*axis);
        }
    }
}

impl Visit for Parts {
    fn node(&mut self, id: NodeId) -> NodeId {
        self.nodes.push(id);
        id
    }
    fn axis(&mut self, id: AxisId) -> AxisId {
        self.axes = self.axes.with(AxisSet::of(id));
        id
    }
    fn quantity(&mut self, id: QuantityId) -> QuantityId {
        self.quantities.push(id);
        id
    }
    fn unknown(&mut self, at: usize) -> usize {
        self.unknowns.push(at);
        at
    }
}

struct Renumber<'l>(&'l Links);

impl Visit for Renumber<'_> {
    fn node(&mut self, id: NodeId) -> NodeId {
        self.0.nodes.get(&id).copied().unwrap_or(id)
    }
    fn axis(&mut self, id: AxisId) -> AxisId {
        let axis = self.0.axes.get(id.0 as usize).copied().flatten();
        axis.unwrap_or(id)
    }
    fn quantity(&mut self, id: QuantityId) -> QuantityId {
        self.0.quantities.get(&id).copied().unwrap_or(id)
    }
    fn unknown(&mut self, at: usize) -> usize {
        self.0.unknowns.get(&at).copied().unwrap_or(at)
    }
}

fn renumbered(op: &Op, links: &Links) -> Op {
    map(op, &mut Renumber(links))
}

/// The operation with all that it refers to replaced.
fn map(op: &Op, to: &mut dyn Visit) -> Op {
    match op {
        Op::Constant(_) | Op::None | Op::Excluded => op.clone(),
        Op::Labels(axis) => Op::Labels(to.axis(*axis)),
        Op::Points(axis) => Op::Points(to.axis(*axis)),
        Op::List { axis, items } => Op::List {
            axis: to.axis(*axis),
            items: items.iter().map(|n| to.node(*n)).collect(),
        },
        Op::Grid { axes, items } => Op::Grid {
            axes: axes.iter().map(|a| to.axis(*a)).collect(),
            items: items.iter().map(|n| n.map(|n| to.node(n))).collect(),
        },
        Op::Quantity(id) => Op::Quantity(to.quantity(*id)),
        Op::Unknown(at, which) => Op::Unknown(to.unknown(*at), *which),
        Op::Negate(n) => Op::Negate(to.node(*n)),
        Op::Not(n) => Op::Not(to.node(*n)),
        Op::Binary(sign, a, b) => Op::Binary(*sign, to.node(*a), to.node(*b)),
        Op::Power(n, exponent) => Op::Power(to.node(*n), *exponent),
        Op::Select {
            condition,
            then,
            otherwise,
        } => Op::Select {
            condition: to.node(*condition),
            then: to.node(*then),
            otherwise: to.node(*otherwise),
        },
        Op::Function(f, arguments) => {
            Op::Function(*f, arguments.iter().map(|n| to.node(*n)).collect())
        }
        Op::HasValue(n) => Op::HasValue(to.node(*n)),
        Op::Field(n, at) => Op::Field(to.node(*n), *at),
        Op::Call { .. } | Op::Pick { .. } | Op::Reduce { .. } | Op::Along { .. } => {
            map_over_axes(op, to)
        }
    }
}

/// The same for operations that name axes beside their operands.
fn map_over_axes(op: &Op, to: &mut dyn Visit) -> Op {
    match op {
        Op::Call {
            entry,
            arguments,
            over,
            made,
        } => Op::Call {
            entry,
            arguments: arguments.iter().map(|n| n.map(|n| to.node(n))).collect(),
            over: over.map(|a| to.axis(a)),
            made: made.map(|a| to.axis(a)),
        },
        Op::Pick { base, selections } => Op::Pick {
            base: to.node(*base),
            selections: selections
                .iter()
                .map(|(axis, at, mode)| (to.axis(*axis), to.node(*at), *mode))
                .collect(),
        },
        Op::Reduce { how, value, over } => Op::Reduce {
            how: match how {
                Reduction::WhereMax(axis) => Reduction::WhereMax(to.axis(*axis)),
                Reduction::WhereMin(axis) => Reduction::WhereMin(to.axis(*axis)),
                how => *how,
            },
            value: to.node(*value),
            over: to.set(*over),
        },
        Op::Along {
            how,
            value,
            x,
            axis,
        } => Op::Along {
            how: *how,
            value: to.node(*value),
            x: x.map(|n| to.node(n)),
            axis: to.axis(*axis),
        },
        other => other.clone(),
    }
}
