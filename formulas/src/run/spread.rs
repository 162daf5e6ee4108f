//! Tolerances: everything worked out again with each at its ends, and the plan run again under a changed column.

use super::Machine;
use crate::plan::SlotId;
use crate::program::{Tolerance, ToleranceWidth};
use crate::values::Values;
use std::rc::Rc;

impl Machine<'_> {
    /// Runs `look` with a column replaced and all that rests on it worked out again; then everything is as before.
    /// `None` where a column that is needed was let go.
    pub(super) fn with_column<R>(
        &mut self,
        slot: SlotId,
        values: Vec<f64>,
        look: impl FnOnce(&mut Self) -> R,
    ) -> Option<R> {
        let plan = self.plan;
        let problems = self.problems.len();
        let mut dirty = vec![false; plan.slots.len()];
        dirty[slot.0 as usize] = true;
        let mut before: Vec<(SlotId, Option<Rc<Vec<f64>>>)> = Vec::new();
        let kept = self.columns[slot.0 as usize].replace(Rc::new(values));
        before.push((slot, kept));
        let mut whole = true;
        for step in &plan.steps {
            let rests = step.reads.iter().any(|s| dirty[s.0 as usize]);
            if !rests || step.out.contains(&slot) {
                continue;
            }
            let Some(columns) = self.evaluate(step) else {
                whole = false;
                break;
            };
            for (out, column) in step.out.iter().zip(columns) {
                dirty[out.0 as usize] = true;
                let kept = self.columns[out.0 as usize].replace(Rc::new(column));
                before.push((*out, kept));
            }
        }
        let overlaid = std::mem::replace(&mut self.overlaid, dirty);
        let result = whole.then(|| look(self));
        self.overlaid = overlaid;
        for (slot, column) in before.into_iter().rev() {
            self.columns[slot.0 as usize] = column;
        }
        self.problems.truncate(problems);
        result
    }

    /// Whether a column was worked out anew under the change in hand.
    pub(super) fn is_overlaid(&self, slot: SlotId) -> bool {
        self.overlaid.get(slot.0 as usize).copied().unwrap_or(false)
    }

    /// The spread of every quantity: the effects of all tolerances, added up and by root of squares.
    pub(super) fn spreads(&mut self, values: &mut Values) {
        let program = self.program;
        for tolerance in &program.tolerances {
            let Some(effects) = self.effects(tolerance) else {
                continue;
            };
            for (at, effect) in effects {
                let Some(quantity) = values.quantities.get_mut(at) else {
                    continue;
                };
                let count = effect.len();
                let worst = quantity.worst.get_or_insert_with(|| vec![0.0; count]);
                worst.iter_mut().zip(&effect).for_each(|(w, e)| *w += e);
                let squares = quantity.rss.get_or_insert_with(|| vec![0.0; count]);
                squares
                    .iter_mut()
                    .zip(&effect)
                    .for_each(|(s, e)| *s += e * e);
            }
        }
        for quantity in &mut values.quantities {
            quantity
                .rss
                .iter_mut()
                .flatten()
                .for_each(|s| *s = s.sqrt());
        }
    }

    /// For every quantity that a tolerance moves, the larger change in each condition.
    fn effects(&mut self, tolerance: &Tolerance) -> Option<Vec<(usize, Vec<f64>)>> {
        let slot = self
            .plan
            .quantities
            .get(tolerance.quantity.0 as usize)
            .copied()
            .flatten()?;
        let nominal = self.column(slot)?.clone();
        let shape = self.shape(slot);
        let width = match tolerance.width {
            ToleranceWidth::Node(node) => Some(self.column(self.slot_of(node)?)?.first().copied()?),
            ToleranceWidth::Part(_) => None,
        };
        let here = |condition: usize| {
            let indices = shape.indices(condition);
            tolerance
                .at
                .iter()
                .all(|(axis, label)| shape.position(*axis).is_none_or(|p| indices[p] == *label))
        };
        let mut effects: Vec<(usize, Vec<f64>)> = Vec::new();
        let base = self.columns.clone();
        for sign in [1.0, -1.0] {
            let moved = nominal
                .iter()
                .enumerate()
                .map(|(at, value)| match tolerance.width {
                    _ if !here(at) => *value,
                    ToleranceWidth::Part(part) => value + sign * part * value.abs(),
                    ToleranceWidth::Node(_) => value + sign * width.unwrap_or(0.0),
                });
            let moved: Vec<f64> = moved.collect();
            self.with_column(slot, moved, |machine| {
                machine.larger_changes(&base, &mut effects)
            })?;
        }
        Some(effects)
    }

    fn larger_changes(&self, base: &[Option<Rc<Vec<f64>>>], effects: &mut Vec<(usize, Vec<f64>)>) {
        for (at, slot) in self.plan.quantities.iter().enumerate() {
            let Some(slot) = slot.filter(|s| self.is_overlaid(*s)) else {
                continue;
            };
            let (Some(new), Some(Some(old))) = (self.column(slot), base.get(slot.0 as usize))
            else {
                continue;
            };
            if !matches!(
                self.program.quantities[at].kind,
                crate::program::Kind::Number(_)
            ) {
                continue;
            }
            let change = |(n, o): (&f64, &f64)| {
                if n.is_nan() || o.is_nan() {
                    0.0
                } else {
                    (n - o).abs()
                }
            };
            let changes: Vec<f64> = new.iter().zip(old.iter()).map(change).collect();
            match effects.iter_mut().find(|(quantity, _)| *quantity == at) {
                Some((_, known)) => known
                    .iter_mut()
                    .zip(changes)
                    .for_each(|(k, c)| *k = k.max(c)),
                None => effects.push((at, changes)),
            }
        }
    }
}
