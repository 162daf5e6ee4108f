//! Calls whose arguments are looked at while the sheet runs, since a method says in which range it holds.

use super::{Checker, Typed};
use crate::axes::{AxisId, AxisSet};
use crate::catalogue::{Entry, Extreme, Validity};
use crate::program::{Guard, NodeId, Op, Reduction};
use crate::span::Span;

impl Checker<'_> {
    /// Has the arguments of a call looked at, where its method says in which range it holds or what is suspect.
    pub(crate) fn guards(
        &mut self,
        entry: &'static Entry,
        typed: &[Option<Typed>],
        axis: Option<AxisId>,
        axes: AxisSet,
        span: Span,
    ) {
        let asked = [(entry.validity, false), (entry.trap, true)];
        for (validity, trap) in asked {
            let Some(validity) = validity else { continue };
            let mut arguments = Vec::with_capacity(typed.len());
            for (index, typed) in typed.iter().enumerate() {
                let looked_at = typed.as_ref().and_then(|typed| {
                    let node = self.looked_at(entry, index, &validity, typed.node, axis)?;
                    Some((node, typed.unit.clone()))
                });
                arguments.push(looked_at);
            }
            self.program.guards.push(Guard {
                statement: self.statement,
                span,
                entry,
                validity,
                trap,
                arguments,
                axes,
            });
        }
    }

    /// An argument, or of a whole line the value that is asked about.
    fn looked_at(
        &mut self,
        entry: &Entry,
        index: usize,
        validity: &Validity,
        node: NodeId,
        axis: Option<AxisId>,
    ) -> Option<NodeId> {
        if !entry.parameters.get(index).is_some_and(|p| p.line) {
            return Some(node);
        }
        let listed = validity.lines.iter().find(|(at, _)| *at == index);
        let how = match listed?.1 {
            Extreme::Least => Reduction::Min,
            Extreme::Most => Reduction::Max,
        };
        let has = self.axes_of(node);
        let over = axis.filter(|axis| has.has(*axis)).map(AxisSet::of);
        let Some(over) = over else { return Some(node) };
        let reduce = Op::Reduce {
            how,
            value: node,
            over,
        };
        Some(self.node(reduce, has.without(over)))
    }
}
