//! Nodes of the program: made once, folded where all their operands are constants.

use super::Checker;
use crate::axes::AxisSet;
use crate::program::{Function, Node, NodeId, Op};
use crate::run::scalar;
use crate::syntax::BinaryOp;

impl Checker<'_> {
    /// The axes of a node.
    pub(crate) fn axes_of(&self, node: NodeId) -> AxisSet {
        self.program
            .nodes
            .get(node.0 as usize)
            .map_or(AxisSet::NONE, |n| n.axes)
    }

    /// The value of a node that is a constant.
    pub(crate) fn constant_of(&self, node: NodeId) -> Option<f64> {
        match self.program.nodes.get(node.0 as usize).map(|n| &n.op) {
            Some(Op::Constant(value)) => Some(*value),
            _ => None,
        }
    }

    /// A constant.
    pub(crate) fn number(&mut self, value: f64) -> NodeId {
        let value = value + 0.0;
        if let Some(node) = self.constants.get(&value.to_bits()) {
            return *node;
        }
        let node = self.node(Op::Constant(value), AxisSet::NONE);
        self.constants.insert(value.to_bits(), node);
        node
    }

    /// A node as it is.
    pub(crate) fn node(&mut self, op: Op, axes: AxisSet) -> NodeId {
        let id = NodeId(self.program.nodes.len() as u32);
        self.program.nodes.push(Node { op, axes });
        id
    }

    fn fold(&mut self, value: f64) -> Option<NodeId> {
        // What has no value is left to the run, which knows how to say so.
        value.is_finite().then(|| self.number(value))
    }

    /// A sign between two operands.
    pub(crate) fn binary(&mut self, op: BinaryOp, left: NodeId, right: NodeId) -> NodeId {
        if let (Some(a), Some(b)) = (self.constant_of(left), self.constant_of(right))
            && let Some(node) = self.fold(scalar::binary(op, a, b))
        {
            return node;
        }
        let axes = self.axes_of(left).with(self.axes_of(right));
        self.node(Op::Binary(op, left, right), axes)
    }

    /// A power with a fixed exponent.
    pub(crate) fn power(&mut self, base: NodeId, exponent: f64) -> NodeId {
        if let Some(a) = self.constant_of(base)
            && let Some(node) = self.fold(scalar::power(a, exponent))
        {
            return node;
        }
        let axes = self.axes_of(base);
        self.node(Op::Power(base, exponent), axes)
    }

    /// The opposite.
    pub(crate) fn negate(&mut self, inner: NodeId) -> NodeId {
        if let Some(a) = self.constant_of(inner) {
            return self.number(-a);
        }
        let axes = self.axes_of(inner);
        self.node(Op::Negate(inner), axes)
    }

    /// A general function.
    pub(crate) fn function(&mut self, function: Function, arguments: Vec<NodeId>) -> NodeId {
        let constants: Option<Vec<f64>> = arguments.iter().map(|a| self.constant_of(*a)).collect();
        if let Some(values) = constants
            && let Some(node) = self.fold(scalar::function(function, &values))
        {
            return node;
        }
        let axes = self.axes_of_all(&arguments);
        self.node(Op::Function(function, arguments), axes)
    }

    /// `if`.
    pub(crate) fn select(&mut self, condition: NodeId, then: NodeId, otherwise: NodeId) -> NodeId {
        let axes = self.axes_of_all(&[condition, then, otherwise]);
        self.node(
            Op::Select {
                condition,
                then,
                otherwise,
            },
            axes,
        )
    }

    /// The axes of all of them together.
    pub(crate) fn axes_of_all(&self, nodes: &[NodeId]) -> AxisSet {
        nodes
            .iter()
            .fold(AxisSet::NONE, |axes, n| axes.with(self.axes_of(*n)))
    }
}
