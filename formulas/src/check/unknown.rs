//! Unknowns: their symbols stand before anything that uses them, their equations are checked when all else is.

use super::{Checker, Marks, Meaning, Typed};
use crate::axes::AxisSet;
use crate::names::Role;
use crate::problem::Fault;
use crate::program::{NodeId, Op, Unknown};
use crate::syntax::{self, StatementKind, UnknownSymbol};
use engine::numeric::UNKNOWNS_MOST;
use rustc_hash::FxHashMap;

impl Checker<'_> {
    /// The symbols of an `unknown`, with the axes that they are taken to vary over.
    pub(super) fn check_unknown(&mut self, unknown: &syntax::Unknown) {
        let (found, wanted) = (unknown.unknowns.len(), unknown.equations.len());
        let span = unknown
            .unknowns
            .first()
            .map_or_else(Default::default, |u| u.symbol.span);
        if found != wanted {
            let fault = Fault::EquationCount {
                unknowns: found,
                equations: wanted,
            };
            self.report(span, fault);
        }
        let too_many = found > UNKNOWNS_MOST;
        if too_many {
            let fault = Fault::UnknownLimit {
                found,
                limit: UNKNOWNS_MOST,
            };
            self.report(span, fault);
        }
        let bounds: Vec<Option<(Typed, Typed)>> =
            unknown.unknowns.iter().map(|u| self.bounds(u)).collect();
        let whole: Option<Vec<(Typed, Typed)>> = bounds.into_iter().collect();
        let Some(bounds) = whole.filter(|_| found == wanted && !too_many) else {
            for symbol in &unknown.unknowns {
                if self.gives(&symbol.symbol) {
                    self.add_failed(symbol.symbol.text.clone(), symbol.symbol.span);
                }
            }
            return;
        };
        let nodes: Vec<(NodeId, NodeId)> = bounds
            .iter()
            .map(|(low, high)| (low.node, high.node))
            .collect();
        let taken = self
            .unknown_axes
            .get(&self.statement)
            .copied()
            .unwrap_or_default();
        let axes = nodes.iter().fold(taken, |axes, (low, high)| {
            axes.with(self.axes_of_all(&[*low, *high]))
        });
        let index = self.program.unknowns.len();
        self.program.unknowns.push(Unknown {
            statement: self.statement,
            symbols: unknown
                .unknowns
                .iter()
                .map(|u| u.symbol.text.clone())
                .collect(),
            span,
            bounds: nodes,
            equations: Vec::new(),
            axes,
        });
        for (at, (symbol, (low, high))) in unknown.unknowns.iter().zip(bounds).enumerate() {
            self.define_unknown(&symbol.symbol, (index, at), axes, &low, &high);
        }
    }

    fn gives(&self, name: &syntax::Name) -> bool {
        let symbol = self.names.symbol(&name.text);
        symbol.is_some_and(|s| s.statement == self.statement && matches!(s.role, Role::Unknown(_)))
    }

    fn bounds(&mut self, symbol: &UnknownSymbol) -> Option<(Typed, Typed)> {
        let name = &symbol.symbol.text;
        let bracket = self.bracket(symbol.unit.as_ref(), name).ok()?;
        let low = self.value_under(&symbol.low, bracket.as_ref());
        let high = self.value_under(&symbol.high, bracket.as_ref());
        let low = self.wants_number(low?, "a bound");
        let high = self.wants_number(high?, "a bound");
        let (low, high) = (low?, high?);
        self.common("and", &low, &high, symbol.high.span)?;
        Some((low, high))
    }

    fn define_unknown(
        &mut self,
        name: &syntax::Name,
        (index, at): (usize, usize),
        axes: AxisSet,
        low: &Typed,
        high: &Typed,
    ) {
        if !self.gives(name) {
            return;
        }
        let kind = if low.fits_any() { high.kind } else { low.kind };
        let unit = self.unit_of_operands(&[low, high]);
        let node = self.node(Op::Unknown(index, at), axes);
        let kind = super::definition::settled(kind);
        let quantity = self.add_quantity(
            name.text.clone(),
            name.span,
            kind,
            unit.clone(),
            Some(node),
            false,
        );
        if let Some(symbol) = self.names.index(&name.text) {
            self.meanings[symbol] = Meaning::Value {
                quantity,
                unit,
                marks: Marks::default(),
            };
        }
    }

    /// The equations of all unknowns: what they rest on is checked by now.
    pub(super) fn check_equations(&mut self) {
        let tree = self.tree;
        for index in 0..self.program.unknowns.len() {
            self.statement = self.program.unknowns[index].statement;
            let StatementKind::Unknown(unknown) = &tree.statements[self.statement].kind else {
                continue;
            };
            let sides: Vec<Option<(NodeId, NodeId)>> =
                unknown.equations.iter().map(|e| self.equation(e)).collect();
            match sides.into_iter().collect::<Option<Vec<_>>>() {
                Some(sides) => self.program.unknowns[index].equations = sides,
                None => self.fail_unknown(index),
            }
        }
    }

    fn fail_unknown(&mut self, index: usize) {
        for quantity in &mut self.program.quantities {
            let node = quantity
                .node
                .and_then(|n| self.program.nodes.get(n.0 as usize));
            if matches!(node.map(|n| &n.op), Some(Op::Unknown(at, _)) if *at == index) {
                quantity.node = None;
            }
        }
    }

    fn equation(
        &mut self,
        (left, right): &(syntax::Expr, syntax::Expr),
    ) -> Option<(NodeId, NodeId)> {
        let l = self.expression(left);
        let r = self.expression(right);
        let l = self.wants_number(l?, "a side of an equation");
        let r = self.wants_number(r?, "a side of an equation");
        let (l, r) = (l?, r?);
        self.common("=", &l, &r, left.span.to(right.span))?;
        Some((l.node, r.node))
    }

    /// The axes of each unknown as its bounds and equations have them.
    pub(super) fn unknown_axes_found(&self) -> FxHashMap<usize, AxisSet> {
        let axes = |unknown: &Unknown| {
            let sides = unknown.equations.iter().chain(&unknown.bounds);
            let axes = sides.fold(unknown.axes, |axes, (l, r)| {
                axes.with(self.axes_of_all(&[*l, *r]))
            });
            (unknown.statement, axes)
        };
        let all = self.program.unknowns.iter().map(axes);
        // Where no axis is found there is nothing to come back for.
        all.filter(|(_, axes)| !axes.is_empty()).collect()
    }
}
