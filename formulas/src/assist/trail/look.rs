//! Walking from a value to what it rests on.

use super::columns::{At, Columns};
use super::{Followed, Method, Step, StepKind, Trail, TrailValue};
use crate::catalogue::{Entry, GENERAL};
use crate::check::{Part, Seen, Trace};
use crate::program::{Kind, Op, QuantityId};
use crate::report::Scale;
use crate::span::Span;
use crate::syntax::Statement;

/// What a walk looks at.
pub(super) struct Walk<'a> {
    pub(super) sheet: &'a Followed<'a>,
    pub(super) trace: &'a Trace,
    pub(super) columns: &'a Columns,
}

/// What a line says of its parts while it is walked through.
#[derive(Default)]
pub(super) struct Said {
    pub(super) rests: Vec<(QuantityId, At)>,
    pub(super) notes: Vec<String>,
    pub(super) methods: Vec<&'static Entry>,
}

impl Said {
    pub(super) fn note(&mut self, note: String) {
        if !self.notes.contains(&note) {
            self.notes.push(note);
        }
    }

    pub(super) fn method(&mut self, entry: &'static Entry) {
        if entry.group != GENERAL && !self.methods.contains(&entry) {
            self.methods.push(entry);
        }
    }
}

impl<'a> Walk<'a> {
    pub(super) fn statement(&self, index: usize) -> Option<&'a Statement> {
        self.sheet.tree.statements.get(index)
    }

    /// The text of a statement.
    pub(super) fn text(&self, index: usize) -> &'a str {
        let text = self.sheet.text;
        self.statement(index)
            .and_then(|s| text.get(s.start..s.start + s.length))
            .unwrap_or("")
    }

    pub(super) fn seen(&self, frame: u32, statement: usize, span: Span) -> Option<&'a Seen> {
        self.trace.seen.get(&Part {
            frame,
            statement,
            span,
        })
    }

    /// The trail of a quantity that another sheet gives.
    pub(super) fn elsewhere(&self, id: QuantityId, at: &At) -> Option<Trail> {
        let quantity = self.columns.quantity(id)?;
        let origin = quantity.origin.as_ref()?;
        let condition = self.columns.condition(quantity.axes, at).0;
        let trail = (self.sheet.other)(&origin.sheet, &origin.symbol, &condition)?;
        // `g.S` is called so here, and so is all that it rests on there.
        let name = quantity.symbol.strip_suffix(&*origin.symbol);
        let name = name.map_or(&*origin.sheet, |n| n.trim_end_matches('.'));
        let mut trail = trail;
        for step in &mut trail.steps {
            step.sheet = Some(match &step.sheet {
                Some(inner) => format!("{name}.{inner}"),
                None => name.to_string(),
            });
        }
        Some(trail)
    }

    /// A line in one condition, and what it rests on.
    pub(super) fn step(&self, id: QuantityId, at: &At) -> (Step, Vec<(QuantityId, At)>) {
        let mut said = Said::default();
        let mut step = self.bare(id, at);
        if let Some(quantity) = self.columns.quantity(id) {
            self.fill(&mut step, quantity, at, &mut said);
        }
        step.notes = said.notes;
        step.methods = said.methods.into_iter().map(method).collect();
        (step, said.rests)
    }

    fn bare(&self, id: QuantityId, at: &At) -> Step {
        let quantity = self.columns.quantity(id);
        let value = self.columns.of_quantity(id, at);
        let kind = quantity.map_or(Kind::Condition, |q| q.kind);
        let unit = quantity.and_then(|q| q.unit.as_ref());
        let axes = quantity.map_or_else(Default::default, |q| q.axes);
        Step {
            symbol: quantity.map(|q| q.symbol.clone()).unwrap_or_default(),
            sheet: None,
            line: quantity.map_or(0, |q| q.line),
            kind: StepKind::Formula,
            condition: self.columns.condition(axes, at),
            formula: String::new(),
            numbers: None,
            value: self.value(value, kind, unit),
            unit: unit.map(|u| u.text.to_string()),
            shown: self.columns.shown(value, kind, unit),
            remark: quantity.and_then(|q| q.remark.clone()),
            notes: Vec::new(),
            methods: Vec::new(),
            rests_on: Vec::new(),
        }
    }

    fn value(
        &self,
        value: Option<f64>,
        kind: Kind,
        unit: Option<&crate::program::ShownUnit>,
    ) -> TrailValue {
        let Some(number) = value.filter(|v| !v.is_nan()) else {
            return TrailValue::Number(None);
        };
        match kind {
            Kind::Text => {
                let text = self.columns.program.texts.get(number as usize);
                TrailValue::Text(text.cloned().unwrap_or_default())
            }
            Kind::Condition => TrailValue::Condition(number != 0.0),
            _ => TrailValue::Number(Scale::of(unit, kind).number(number)),
        }
    }

    /// The quantity that a part is nothing but, if it is one.
    pub(super) fn quantity_of(&self, seen: &Seen) -> Option<QuantityId> {
        match self.columns.op(seen.node)? {
            Op::Quantity(id) => Some(*id),
            _ => None,
        }
    }
}

fn method(entry: &'static Entry) -> Method {
    Method {
        function: entry.name,
        what: entry.what,
        method: entry.method,
        holds: entry.holds,
        source: entry.source,
    }
}
