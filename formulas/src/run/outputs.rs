//! Governing conditions, requirements, free bodies.

use super::feed::Feed;
use super::look::{CLOSE, Look, LookResult, Outside, Sums, ratio, sums};
use super::{Machine, conditions};
use crate::axes::Shape;
use crate::names::located;
use crate::plan::{Judged, SlotId};
use crate::problem::Fault;
use crate::program::{EntryKind, Figure, FigureEntry, Freebody, FreebodyEntry, NodeId, QuantityId};
use crate::span::Span;
use crate::values::{Column, FigureValues, FreebodyValues, GoverningValues, Values};
use std::rc::Rc;

/// A column and its shape, held while outputs are worked out.
pub(super) struct Held {
    values: Rc<Vec<f64>>,
    shape: Shape,
}

impl Held {
    pub(super) fn feed(&self, outer: &Shape) -> Feed<'_> {
        Feed::new(&self.values, &self.shape, outer)
    }
}

impl Machine<'_> {
    /// Everything that is asked of the values, once they are there.
    pub(super) fn finish(&mut self, values: &mut Values) {
        let program = self.program;
        for at in 0..program.governing.len() {
            let result = self.governing(at, values);
            values.governing.push(result);
        }
        values.requirements = std::mem::take(&mut self.found.requirements);
        for at in 0..program.freebodies.len() {
            let result = self.freebody(at);
            values.freebodies.push(result);
        }
        values.figures = program.figures.iter().map(|f| self.figure(f)).collect();
        self.tolerances(values);
    }

    fn figure(&self, figure: &Figure) -> FigureValues {
        let column = |entry: &FigureEntry| {
            let held = self.held(entry.node)?;
            Some(Column {
                shape: held.shape,
                values: held.values,
            })
        };
        FigureValues {
            x: figure.x.as_ref().and_then(column),
            curves: figure.curves.iter().map(column).collect(),
        }
    }

    pub(super) fn held(&self, node: NodeId) -> Option<Held> {
        self.held_slot(self.slot_of(node)?)
    }

    fn held_slot(&self, slot: SlotId) -> Option<Held> {
        Some(Held {
            values: self.column(slot)?.clone(),
            shape: self.shape(slot),
        })
    }

    /// Takes over what a look has found.
    pub(super) fn finish_look(&mut self, look: Look<'_>) {
        match look {
            Look::Reduce(slot, reducer) => self.finish_small(slot, reducer.finish()),
            Look::Guard(at, look) => {
                self.outside(at, &look.outside);
                self.found.guards[at] = look.outside;
            }
            Look::Groups(at, groups) => self.found.groups[at] = Some(groups.summaries),
            Look::Requirement(at, look) => self.found.requirements[at] = look.finish(),
            Look::Freebody(at, look) => self.found.freebodies[at] = Some(look),
        }
    }

    /// Advice on a call outside the range of its method, with the arguments of the first condition concerned.
    fn outside(&mut self, at: usize, outside: &Outside) {
        let Some(guard) = self.program.guards.get(at).filter(|_| outside.count > 0) else {
            return;
        };
        let shape = self.plan.shape(guard.axes);
        let arguments = guard.entry.parameters.iter().zip(&guard.arguments);
        let named: Vec<String> = arguments
            .zip(&outside.numbers)
            .filter_map(|((parameter, argument), value)| {
                let (_, unit) = argument.as_ref()?;
                if parameter.wants == crate::catalogue::Wants::Text {
                    return None;
                }
                let shown = unit.as_ref().map_or(*value, |u| u.unit.from_si(*value));
                let unit = unit
                    .as_ref()
                    .map_or(String::new(), |u| format!(" {}", u.text));
                let number = crate::numbers::shown(shown, self.program.digits);
                Some(format!("{} {number}{unit}", parameter.name))
            })
            .collect();
        let function = guard.entry.name.to_string();
        let text = format!("{} (here {})", guard.validity.advice, named.join(", "));
        let conditions = conditions(self.program, &shape, outside.count, &outside.first);
        let fault = if guard.trap {
            Fault::ReferenceTrap {
                function,
                text,
                conditions,
            }
        } else {
            Fault::Validity {
                function,
                text,
                conditions,
            }
        };
        self.problems
            .push(located(guard.statement, guard.span, fault));
    }

    /// Takes over what a look has found before.
    pub(super) fn take_look(&mut self, what: Judged, result: LookResult) {
        match (what, result) {
            (Judged::Governing(at), LookResult::Groups(groups)) => {
                self.found.groups[at] = Some(groups);
            }
            (Judged::Requirement(at), LookResult::Requirement(result)) => {
                self.found.requirements[at] = result;
            }
            (Judged::Guard(at), LookResult::Guard(outside)) => {
                self.outside(at, &outside);
                self.found.guards[at] = outside;
            }
            (Judged::Freebody(at), LookResult::Freebody(look)) => {
                self.found.freebodies[at] = Some(*look);
            }
            _ => {}
        }
    }

    /// What a look has found.
    pub(super) fn look_of(&self, what: Judged) -> Option<LookResult> {
        Some(match what {
            Judged::Governing(at) => LookResult::Groups(self.found.groups.get(at)?.clone()?),
            Judged::Requirement(at) => {
                LookResult::Requirement(self.found.requirements.get(at)?.clone())
            }
            Judged::Guard(at) => LookResult::Guard(self.found.guards.get(at)?.clone()),
            Judged::Freebody(at) => {
                LookResult::Freebody(Box::new(self.found.freebodies.get(at)?.clone()?))
            }
        })
    }

    fn governing(&mut self, at: usize, values: &Values) -> GoverningValues {
        let governing = &self.program.governing[at];
        let index = governing.quantity.0 as usize;
        let quantity = &self.program.quantities[index];
        let Some(found) = values.quantities.get(index).filter(|q| q.known) else {
            return GoverningValues::default();
        };
        let axes = quantity.axes.without(governing.over);
        let groups = self.found.groups[at].take();
        GoverningValues {
            all: found.summary,
            groups: groups.unwrap_or_else(|| vec![found.summary]),
            group_shape: self.plan.shape(axes),
            ..GoverningValues::default()
        }
    }

    fn freebody(&mut self, at: usize) -> FreebodyValues {
        let body = &self.program.freebodies[at];
        let shape = self.plan.shape(body.axes);
        let Some(look) = self.found.freebodies[at].take() else {
            return FreebodyValues {
                shape,
                ..FreebodyValues::default()
            };
        };
        let mut result = look.result;
        result.closes &= result.without_value == 0;
        result.open = conditions(self.program, &shape, result.open.count, &look.open);
        if result.open.count > 0 {
            self.report_open(body, &result, &look.worst_sums);
        }
        if result.closes {
            result.taken_up_by = self.taken_up_by(body, &shape);
        }
        result
    }

    /// The entries of a free body with their columns; `None` where one is not there.
    fn loaded(&self, body: &Freebody) -> Option<Vec<Loaded>> {
        let load = |entry: &FreebodyEntry| {
            let at = match entry.at {
                Some(node) => Some(self.held(node)?),
                None => None,
            };
            let value = self.held(entry.value)?;
            Some(Loaded {
                kind: entry.kind,
                value,
                at,
            })
        };
        body.items.iter().map(load).collect()
    }

    fn report_open(&mut self, body: &Freebody, result: &FreebodyValues, sums: &Sums) {
        let unit = |kind: EntryKind| {
            body.items
                .iter()
                .find(|e| e.kind == kind)
                .and_then(|e| e.unit.as_ref())
        };
        let force = unit(EntryKind::Force).or(unit(EntryKind::Axial));
        let moment = unit(EntryKind::Couple);
        let shown = |value: f64, unit: Option<&crate::program::ShownUnit>, si: &str| {
            let digits = self.program.digits;
            match unit {
                Some(u) => format!(
                    "{} {}",
                    crate::numbers::shown(u.unit.from_si(value), digits),
                    u.text
                ),
                None => format!("{} {si}", crate::numbers::shown(value, digits)),
            }
        };
        let axial = body.items.iter().any(|e| e.kind == EntryKind::Axial);
        let fault = Fault::FreebodyOpen {
            name: body.name.clone(),
            conditions: result.open.clone(),
            force: shown(sums.force.0, force, "N"),
            axial: axial.then(|| shown(sums.axial.0, force, "N")),
            moment: shown(sums.moment.0, moment, "N.m"),
        };
        self.problems.push(located(
            body.statement,
            Span::new(0, "freebody".len()),
            fault,
        ));
    }

    /// The symbol that takes up a trial amount added to another one, so that the force sum closes by construction.
    fn taken_up_by(&mut self, body: &Freebody, shape: &Shape) -> Option<String> {
        let forces: Vec<&FreebodyEntry> = body
            .items
            .iter()
            .filter(|e| e.kind == EntryKind::Force)
            .collect();
        let listed: Vec<(QuantityId, SlotId)> = forces
            .iter()
            .filter_map(|e| e.quantity)
            .filter_map(|q| {
                Some((
                    q,
                    self.plan.quantities.get(q.0 as usize).copied().flatten()?,
                ))
            })
            .collect();
        for (quantity, slot) in &listed {
            let column = self.column(*slot)?.clone();
            let size = column
                .iter()
                .filter(|v| !v.is_nan())
                .fold(0.0, |m: f64, v| m.max(v.abs()));
            let trial = if size > 0.0 { 0.375 * size } else { 1000.0 };
            let moved: Vec<f64> = column.iter().map(|v| v + trial).collect();
            let changed = self.with_columns(vec![(*slot, moved)], |machine| {
                if !machine.force_sum_closes(body, shape) {
                    return None;
                }
                let other = |(q, s): &&(QuantityId, SlotId)| {
                    q != quantity && s != slot && machine.is_overlaid(*s)
                };
                listed.iter().find(other).map(|(q, _)| *q)
            });
            if let Some(taker) = changed.flatten() {
                return self
                    .program
                    .quantities
                    .get(taker.0 as usize)
                    .map(|q| q.symbol.clone());
            }
        }
        None
    }

    fn force_sum_closes(&self, body: &Freebody, shape: &Shape) -> bool {
        let Some(items) = self.loaded(body) else {
            return false;
        };
        let items = reads(&items, shape);
        let at = |condition: usize| {
            let each = items.iter().map(|item| {
                let at = item.at.as_ref().map_or(0.0, |at| at.value(condition));
                (item.kind, item.value.value(condition), at)
            });
            sums(each).is_some_and(|s| ratio(s.force) <= CLOSE)
        };
        (0..shape.conditions()).all(at)
    }
}

/// An entry of a free body with its columns.
struct Loaded {
    kind: EntryKind,
    value: Held,
    at: Option<Held>,
}

/// The same, read along the conditions of the free body.
struct Read<'a> {
    kind: EntryKind,
    value: Feed<'a>,
    at: Option<Feed<'a>>,
}

fn reads<'a>(items: &'a [Loaded], shape: &Shape) -> Vec<Read<'a>> {
    let read = |item: &'a Loaded| Read {
        kind: item.kind,
        value: item.value.feed(shape),
        at: item.at.as_ref().map(|at| at.feed(shape)),
    };
    items.iter().map(read).collect()
}
