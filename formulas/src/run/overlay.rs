//! The plan run again under changed columns: for tolerances, and to see whether a free body closes by construction.

use super::Machine;
use crate::plan::SlotId;
use std::rc::Rc;

impl Machine<'_> {
    /// Runs `look` with columns replaced and all that rests on them worked out again; then everything is as before.
    /// `None` where a column that is needed was let go.
    pub(super) fn with_columns<R>(
        &mut self,
        replaced: Vec<(SlotId, Vec<f64>)>,
        look: impl FnOnce(&mut Self) -> R,
    ) -> Option<R> {
        let plan = self.plan;
        let problems = self.problems.len();
        let mut dirty = vec![false; plan.slots.len()];
        let mut before: Vec<(SlotId, Option<Rc<Vec<f64>>>)> = Vec::new();
        for (slot, values) in replaced {
            dirty[slot.0 as usize] = true;
            let kept = self.columns[slot.0 as usize].replace(Rc::new(values));
            before.push((slot, kept));
        }
        let given = before.len();
        let mut whole = true;
        for step in &plan.steps {
            let rests = step.reads.iter().any(|s| dirty[s.0 as usize]);
            let is_given = before[..given]
                .iter()
                .any(|(slot, _)| step.out.contains(slot));
            if !rests || is_given {
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
}
