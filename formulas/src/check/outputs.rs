//! What a sheet asks of its values: governing conditions, requirements, free bodies; and what is said of it as a whole.

use super::figure::Drawn;
use super::{Checker, Typed};
use crate::axes::{AxisSet, Shape};
use crate::names::{Role, located};
use crate::problem::Fault;
use crate::program::{
    Comparison, EntryKind, Freebody, FreebodyEntry, Governing, Kind, NodeId, Op, QuantityId,
    Requirement,
};
use crate::span::Span;
use crate::syntax::{
    BinaryOp, Expr, ExprKind, FreebodyItem, Name, StatementKind, TitleWord, Words,
};
use engine::quantity::Dimension;

/// Most conditions to a line.
pub(crate) const CONDITIONS_MOST: f64 = 1e8;

impl Checker<'_> {
    pub(crate) fn check_output(&mut self, statement: usize) {
        let tree = self.tree;
        match &tree.statements[statement].kind {
            StatementKind::Governing { symbols, over } => {
                self.check_governing(symbols, over.as_deref())
            }
            StatementKind::Require { condition } => self.check_require(condition),
            StatementKind::Freebody { name, items } => self.check_freebody(name, items),
            StatementKind::Figure {
                name,
                curves,
                against,
                each,
                closed,
            } => self.check_figure(&Drawn {
                name,
                curves,
                against,
                each,
                closed: *closed,
            }),
            _ => {}
        }
    }

    fn check_governing(&mut self, symbols: &[Expr], over: Option<&[Name]>) {
        let mut axes = AxisSet::NONE;
        for axis in over.unwrap_or_default() {
            if let Some(id) = self.axis_of_symbol.get(&axis.text) {
                axes = axes.with(AxisSet::of(*id));
            }
        }
        for symbol in symbols {
            let Some(typed) = self.expression(symbol) else {
                continue;
            };
            let Some(typed) = self.wants_number(typed, "what governs") else {
                continue;
            };
            let Some(quantity) = self.quantity_of(&typed) else {
                let found = self.words(symbol.span);
                self.report(
                    symbol.span,
                    Fault::Expected {
                        what: "a symbol",
                        found,
                    },
                );
                continue;
            };
            let has = self.program.quantities[quantity.0 as usize].axes;
            let over = if over.is_some() {
                axes.common(has)
            } else {
                has
            };
            self.program.governing.push(Governing {
                statement: self.statement,
                quantity,
                over,
            });
        }
    }

    /// The symbol that an expression is, where it is nothing but one.
    fn quantity_of(&self, typed: &Typed) -> Option<QuantityId> {
        match self.program.nodes.get(typed.node.0 as usize).map(|n| &n.op) {
            Some(Op::Quantity(id)) => Some(*id),
            _ => None,
        }
    }

    fn check_require(&mut self, condition: &Expr) {
        let text = self.words(condition.span);
        let checked = self
            .expression(condition)
            .and_then(|t| self.wants_condition(t, "what is required"));
        let mut parts = Vec::new();
        if checked.is_some() {
            let known = self.problems.len();
            self.comparisons(condition, &mut parts);
            // The sides were checked once already: what was wrong with them is told.
            self.problems.truncate(known);
        }
        let node = checked.map(|t| t.node);
        let axes = node.map_or(AxisSet::NONE, |n| self.axes_of(n));
        self.program.requirements.push(Requirement {
            statement: self.statement,
            condition: node,
            axes,
            parts,
            text,
        });
    }

    /// The comparisons of a condition that is nothing but comparisons joined by `and`.
    fn comparisons(&mut self, condition: &Expr, parts: &mut Vec<Comparison>) {
        let mut open = vec![condition];
        while let Some(expr) = open.pop() {
            match &expr.kind {
                ExprKind::Binary {
                    op: BinaryOp::And,
                    left,
                    right,
                    ..
                } => {
                    open.push(right);
                    open.push(left);
                }
                ExprKind::Binary {
                    op, left, right, ..
                } if op.compares() => match (self.expression(left), self.expression(right)) {
                    (Some(l), Some(r)) if l.kind != Kind::Text && r.kind != Kind::Text => {
                        parts.push(self.comparison_part(*op, &l, &r));
                    }
                    _ => return parts.clear(),
                },
                _ => return parts.clear(),
            }
        }
    }

    fn comparison_part(&mut self, op: BinaryOp, left: &Typed, right: &Typed) -> Comparison {
        let dimension = if left.fits_any() {
            right.dimension()
        } else {
            left.dimension()
        };
        let margin = [
            Dimension::FORCE,
            Dimension::MOMENT,
            Dimension::PRESSURE,
            Dimension::FORCE_PER_LENGTH,
        ];
        Comparison {
            op,
            left: left.node,
            right: right.node,
            unit: self.unit_of_operands(&[left, right]),
            margin: margin.iter().any(|d| d.matches(dimension)),
        }
    }

    fn check_freebody(&mut self, name: &Words, items: &[FreebodyItem]) {
        let mut entries = Vec::new();
        let mut failed = false;
        for item in items {
            let entry = match item {
                FreebodyItem::Force { force, station } => {
                    self.entry(EntryKind::Force, force, Dimension::FORCE, Some(station))
                }
                FreebodyItem::Axial { force, height } => {
                    self.entry(EntryKind::Axial, force, Dimension::FORCE, Some(height))
                }
                FreebodyItem::Couple { moment } => {
                    self.entry(EntryKind::Couple, moment, Dimension::MOMENT, None)
                }
            };
            match entry {
                Some(entry) => entries.push(entry),
                None => failed = true,
            }
        }
        if failed {
            entries.clear();
        }
        let nodes: Vec<NodeId> = entries
            .iter()
            .flat_map(|e| std::iter::once(e.value).chain(e.at))
            .collect();
        let axes = self.axes_of_all(&nodes);
        self.program.freebodies.push(Freebody {
            statement: self.statement,
            name: name.text.clone(),
            items: entries,
            axes,
        });
    }

    fn entry(
        &mut self,
        kind: EntryKind,
        value: &Expr,
        wanted: Dimension,
        at: Option<&Expr>,
    ) -> Option<FreebodyEntry> {
        let typed = self.expression(value);
        let place = at.map(|at| (self.expression(at), at));
        let typed = self.fits_argument("freebody", "a force or couple", wanted, &typed?)?;
        let (at, at_text, at_unit) = match place {
            None => (None, String::new(), None),
            Some((at_typed, at)) => {
                let at_typed = at_typed?;
                let fits = at_typed.marks.zero;
                let at_typed = if fits {
                    at_typed
                } else {
                    self.fits_argument("freebody", "a station", Dimension::LENGTH, &at_typed)?
                };
                (Some(at_typed.node), self.words(at.span), at_typed.unit)
            }
        };
        Some(FreebodyEntry {
            kind,
            text: self.words(value.span),
            value: typed.node,
            quantity: self.quantity_of(&typed),
            unit: typed.unit,
            at_text,
            at,
            at_unit,
        })
    }

    /// Puts the quantities in the order of the sheet and renumbers every use of them.
    pub(crate) fn sort_quantities(&mut self) {
        let count = self.program.quantities.len();
        let mut order: Vec<usize> = (0..count).collect();
        order.sort_by_key(|i| {
            let q = &self.program.quantities[*i];
            (q.statement, q.span.start, *i)
        });
        let mut place = vec![QuantityId(0); count];
        for (new, old) in order.iter().enumerate() {
            place[*old] = QuantityId(new as u32);
        }
        let moved = |id: &mut QuantityId| *id = place[id.0 as usize];
        let mut old: Vec<Option<crate::program::Quantity>> =
            std::mem::take(&mut self.program.quantities)
                .into_iter()
                .map(Some)
                .collect();
        self.program.quantities = order.iter().filter_map(|i| old[*i].take()).collect();
        self.program.order.iter_mut().for_each(moved);
        self.program
            .governing
            .iter_mut()
            .for_each(|g| moved(&mut g.quantity));
        self.program
            .tolerances
            .iter_mut()
            .for_each(|t| moved(&mut t.quantity));
        for body in &mut self.program.freebodies {
            body.items
                .iter_mut()
                .filter_map(|e| e.quantity.as_mut())
                .for_each(moved);
        }
        for node in &mut self.program.nodes {
            if let Op::Quantity(id) = &mut node.op {
                moved(id);
            }
        }
        self.limit_conditions();
    }

    /// A line of too many conditions is refused before anything is worked out.
    fn limit_conditions(&mut self) {
        let lengths: Vec<usize> = self.program.axes.iter().map(|a| a.labels.len()).collect();
        for at in 0..self.program.quantities.len() {
            let quantity = &self.program.quantities[at];
            let found = Shape::of(quantity.axes, &lengths).conditions_f64();
            if found > CONDITIONS_MOST {
                let fault = Fault::ConditionLimit {
                    symbol: quantity.symbol.clone(),
                    found,
                    limit: CONDITIONS_MOST,
                };
                self.problems
                    .push(located(quantity.statement, quantity.span, fault));
                self.program.quantities[at].node = None;
            }
        }
    }

    /// Lines that nothing uses: advice. Axes and the outputs of the sheet count as used by being there; so does a
    /// result, which is why only inputs are told of.
    pub(crate) fn advise_unused(&mut self) {
        for quantity in self
            .program
            .quantities
            .iter()
            .filter(|q| q.listed && q.input && q.node.is_some())
        {
            let Some(index) = self.names.index(&quantity.symbol) else {
                continue;
            };
            let used = self.order.symbol_used.get(index).copied().unwrap_or(true);
            if !used
                && matches!(
                    self.names.symbols[index].role,
                    Role::Definition | Role::Column(_)
                )
            {
                let fault = Fault::NeverUsed {
                    name: quantity.symbol.clone(),
                };
                self.problems
                    .push(located(quantity.statement, quantity.span, fault));
            }
        }
        self.advise_unused_sheets();
        for (name, statement) in &self.names.function_list {
            if !self.order.functions_called.contains(statement) {
                let span = self.function_span(*statement);
                self.problems.push(located(
                    *statement,
                    span,
                    Fault::NeverUsed { name: name.clone() },
                ));
            }
        }
    }

    fn advise_unused_sheets(&mut self) {
        for (at, symbol) in self.names.symbols.iter().enumerate() {
            let used = self.order.symbol_used.get(at).copied().unwrap_or(true);
            if symbol.role == Role::Sheet && !used {
                let name = symbol.name.clone();
                self.problems.push(located(
                    symbol.statement,
                    symbol.span,
                    Fault::NeverUsed { name },
                ));
            }
        }
    }

    fn function_span(&self, statement: usize) -> Span {
        match self.tree.statements.get(statement).map(|s| &s.kind) {
            Some(StatementKind::Function(f)) => f.name.span,
            _ => Span::default(),
        }
    }

    /// `sources required`: an input without a remark is a warning.
    pub(crate) fn advise_sources(&mut self) {
        let required = self.tree.statements.iter().any(|s| {
            matches!(&s.kind, StatementKind::Title { word: TitleWord::Sources, text } if text.text == "required")
        });
        if !required {
            return;
        }
        for quantity in &self.program.quantities {
            let table_rows_told = match &self.tree.statements[quantity.statement].kind {
                StatementKind::Table(t) => {
                    !t.rows.is_empty() && t.rows.iter().all(|r| r.remark.is_some())
                }
                _ => false,
            };
            if quantity.input
                && quantity.node.is_some()
                && quantity.remark.is_none()
                && !table_rows_told
            {
                let fault = Fault::InputWithoutSource {
                    symbol: quantity.symbol.clone(),
                };
                self.problems
                    .push(located(quantity.statement, quantity.span, fault));
            }
        }
    }
}
