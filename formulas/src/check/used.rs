//! `use "sheet-name" as g`: the axes of another sheet, and its quantities as values of this one.

use super::linking::Source;
use super::{Checker, Marks, Meaning, Typed};
use crate::axes::{AXES_MOST, AxisId};
use crate::names::Role;
use crate::problem::Fault;
use crate::program::{Axis, Kind, QuantityId};
use crate::span::Span;
use crate::syntax::{Expr, ExprKind, Name, Words};
use crate::used::{DEPTH_MOST, Used, UsedSheet};
use engine::quantity::{Dimension, constants};
use std::rc::Rc;

impl Checker<'_> {
    /// Axes that only another sheet declares stand where it is used.
    pub(super) fn declare_used_axes(&mut self, name: &Name) {
        let Some(sheet) = self.used.sheet(self.statement).cloned() else {
            return;
        };
        for axis in &sheet.program.axes {
            if !self.takes(&axis.name) {
                continue;
            }
            if self.program.axes.len() >= AXES_MOST {
                self.report(name.span, Fault::AxisLimit { limit: AXES_MOST });
                return;
            }
            let id = AxisId(self.program.axes.len() as u8);
            self.program.axes.push(Axis {
                statement: self.statement,
                listed: false,
                ..axis.clone()
            });
            self.axis_of_symbol.insert(axis.name.clone(), id);
        }
    }

    /// Whether an axis of that name is taken over by the statement in hand.
    fn takes(&self, axis: &str) -> bool {
        let symbol = self.names.symbol(axis);
        symbol.is_some_and(|s| s.statement == self.statement && s.role == Role::Axis)
    }

    pub(super) fn check_use(&mut self, words: &Words, name: &Name) {
        let sheet = words.text.clone();
        let fault = match self.used.by_statement.get(&self.statement) {
            Some(Used::Sheet(used)) => return self.check_sheet(&used.clone(), words, name),
            Some(Used::Circular(chain)) => Fault::Circular {
                chain: chain.clone(),
            },
            Some(Used::NotAName) => Fault::SheetName { sheet },
            Some(Used::TooDeep) => Fault::SheetDepth { limit: DEPTH_MOST },
            Some(Used::Missing) | None => Fault::MissingSheet { sheet },
        };
        self.report(words.span, fault);
    }

    fn check_sheet(&mut self, used: &Rc<UsedSheet>, words: &Words, name: &Name) {
        if used.errors + used.warnings > 0 {
            let fault = Fault::SheetFindings {
                sheet: used.name.clone(),
                errors: used.errors,
                warnings: used.warnings,
            };
            self.report(words.span, fault);
        }
        for axis in &used.program.axes {
            if self.takes(&axis.name) {
                self.define_axis(&axis.name, name.span);
            } else if self.axis_of_symbol.contains_key(&axis.name) && self.same_axis(axis).is_none()
            {
                let fault = Fault::SheetAxis {
                    sheet: used.name.clone(),
                    axis: axis.name.clone(),
                };
                self.report(words.span, fault);
            }
        }
        let index = self.names.index(&name.text);
        let stands = |s: &crate::names::Symbol| s.statement == self.statement;
        if let Some(index) = index.filter(|i| self.names.symbols.get(*i).is_some_and(stands)) {
            self.meanings[index] = Meaning::Sheet(used.clone());
        }
    }

    /// The other sheet at the bottom of `g.air.density`, and the names behind it.
    pub(super) fn used_path<'e>(&self, base: &'e Expr) -> Option<(Rc<UsedSheet>, Vec<&'e Name>)> {
        let mut path = Vec::new();
        let mut first = base;
        while let ExprKind::Field { base, field } = &first.kind {
            path.push(field);
            first = base;
        }
        path.reverse();
        let ExprKind::Name(name) = &first.kind else {
            return None;
        };
        let hidden = self
            .frames
            .last()
            .is_some_and(|f| f.parameters.iter().any(|(n, _)| n == name));
        let index = self.names.index(name).filter(|_| !hidden)?;
        match self.meanings.get(index)? {
            Meaning::Sheet(sheet) => Some((sheet.clone(), path)),
            _ => None,
        }
    }

    /// The value of `g.S` or `g.air.density`.
    pub(super) fn used_value(
        &mut self,
        sheet: &Rc<UsedSheet>,
        path: &[&Name],
        span: Span,
    ) -> Option<Typed> {
        let symbol: Vec<&str> = path.iter().map(|n| n.text.as_str()).collect();
        let symbol = symbol.join(".");
        match sheet.quantity(&symbol) {
            Some(quantity) => self.taken_value(sheet, quantity, span),
            None => self.not_in_sheet(sheet, path, &symbol, span),
        }
    }

    fn taken_value(
        &mut self,
        sheet: &Rc<UsedSheet>,
        quantity: QuantityId,
        span: Span,
    ) -> Option<Typed> {
        // A line that failed there was counted there.
        sheet
            .program
            .quantities
            .get(quantity.0 as usize)
            .filter(|q| q.node.is_some())?;
        let (statement, name, place) = self.use_of(&sheet.name)?;
        let source = Source {
            sheet,
            name: &name,
            statement,
            span: place,
        };
        let linked = match self.link(source, quantity) {
            Ok(linked) => linked,
            Err(axis) => {
                self.hidden_axis(sheet, axis, span);
                return None;
            }
        };
        let quantity = self.program.quantities.get(linked.0 as usize)?;
        let (unit, node) = (quantity.unit.clone(), quantity.node);
        let density = matches!(quantity.kind, Kind::Number(n) if n.dimension == Dimension::DENSITY);
        let value = node.and_then(|n| self.constant_of(n)).filter(|_| density);
        let marks = Marks {
            sea_level: value.is_some_and(|v| (v - constants::RHO0).abs() <= 1e-12),
            ..Marks::default()
        };
        self.quantity_value(linked, unit, marks, span)
    }

    /// The first line that uses a sheet: what it gives is listed there.
    fn use_of(&self, sheet: &str) -> Option<(usize, String, Span)> {
        let symbols = self.names.symbols.iter().zip(&self.meanings);
        let mut uses = symbols.filter_map(|(symbol, meaning)| match meaning {
            Meaning::Sheet(used) if used.name == sheet => Some(symbol),
            _ => None,
        });
        uses.next().map(|s| (s.statement, s.name.clone(), s.span))
    }

    /// An axis of other labels was told of where the sheet is used; one whose name is taken is told of here.
    fn hidden_axis(&mut self, sheet: &Rc<UsedSheet>, axis: String, span: Span) {
        if !self.axis_of_symbol.contains_key(&axis) {
            let sheet = sheet.name.clone();
            self.report(span, Fault::SheetAxisHidden { sheet, axis });
        }
    }

    fn not_in_sheet(
        &mut self,
        sheet: &Rc<UsedSheet>,
        path: &[&Name],
        symbol: &str,
        span: Span,
    ) -> Option<Typed> {
        let (last, before) = path.split_last()?;
        let fields = sheet.fields(symbol);
        if !fields.is_empty() {
            let record = self.words(span);
            self.report(span, Fault::RecordAsNumber { record, fields });
            return None;
        }
        let outer: Vec<&str> = before.iter().map(|n| n.text.as_str()).collect();
        let outer = outer.join(".");
        let whole = self.words(span);
        let base = whole.strip_suffix(&format!(".{}", last.text));
        let typed = base.map_or_else(|| outer.clone(), str::to_string);
        let fields = sheet.fields(&outer);
        if let Some(known) = sheet.quantity(&outer) {
            let failed = sheet.program.quantities.get(known.0 as usize);
            if failed.is_some_and(|q| q.node.is_some()) {
                let (name, field) = (typed, last.text.clone());
                self.report(last.span, Fault::FieldOfNumber { name, field });
            }
        } else if !before.is_empty() && !fields.is_empty() {
            let nearest = crate::nearest::nearest(&last.text, fields.iter().map(String::as_str));
            let fault = Fault::UnknownField {
                record: typed,
                field: last.text.clone(),
                fields,
                nearest,
            };
            self.report(last.span, fault);
        } else {
            let first = path.first()?;
            let fault = Fault::UnknownInSheet {
                sheet: sheet.name.clone(),
                name: first.text.clone(),
                nearest: crate::nearest::nearest(&first.text, sheet.symbols()),
            };
            self.report(first.span, fault);
        }
        None
    }

    /// A sheet is no value by itself.
    pub(super) fn sheet_as_value(&mut self, name: &str, span: Span) -> Option<Typed> {
        let fault = Fault::WrongKind {
            place: name.to_string(),
            wanted: "a value",
            found: "another sheet",
            quote: None,
        };
        self.report(span, fault);
        None
    }

    /// Tells of the axes of other sheets over which a line of this one varies, and of no other.
    pub(super) fn list_used_axes(&mut self) {
        let own = self
            .program
            .quantities
            .iter()
            .filter(|q| q.listed && !q.is_axis);
        let sides = self.program.requirements.iter().map(|r| r.axes);
        let bodies = self.program.freebodies.iter().map(|b| b.axes);
        let varied = own
            .map(|q| q.axes)
            .chain(sides)
            .chain(bodies)
            .fold(crate::axes::AxisSet::NONE, crate::axes::AxisSet::with);
        for (at, axis) in self.program.axes.iter_mut().enumerate() {
            axis.listed |= varied.has(AxisId(at as u8));
        }
        for quantity in self.program.quantities.iter_mut().filter(|q| q.is_axis) {
            let axis = self.axis_of_symbol.get(&quantity.symbol);
            let axis = axis.and_then(|id| self.program.axes.get(id.0 as usize));
            quantity.listed &= axis.is_none_or(|a| a.listed);
        }
    }
}
