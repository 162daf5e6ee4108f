//! The plan run again under changed columns: for tolerances, and to see whether a free body closes by construction.

use super::{Again, Machine};
use crate::plan::fuse::fuse;
use crate::plan::{SlotId, Work};
use std::rc::Rc;

impl Machine<'_> {
    /// Runs `look` with columns replaced and all that rests on them worked out again; then everything is as before.
    /// `None` where a column that is needed cannot be worked out.
    pub(super) fn with_columns<R>(
        &mut self,
        replaced: Vec<(SlotId, Vec<f64>)>,
        look: impl FnOnce(&mut Self) -> R,
    ) -> Option<R> {
        let slots: Vec<SlotId> = replaced.iter().map(|(slot, _)| *slot).collect();
        let again = self.again(&slots);
        self.ensure(&again.reads)?;
        let problems = self.problems.len();
        let mut before: Vec<(SlotId, Option<Rc<Vec<f64>>>)> = Vec::new();
        let mut dirty = vec![false; self.plan.slots.len()];
        for slot in &again.out {
            dirty[slot.0 as usize] = true;
            before.push((*slot, self.columns[slot.0 as usize].take()));
        }
        for (slot, values) in replaced {
            dirty[slot.0 as usize] = true;
            let kept = self.columns[slot.0 as usize].replace(Rc::new(values));
            before.push((slot, kept));
        }
        let trying = std::mem::replace(&mut self.trying, true);
        let whole = again
            .groups
            .iter()
            .all(|g| self.run_group(g, &|_| true).is_some());
        let overlaid = std::mem::replace(&mut self.overlaid, dirty);
        let result = whole.then(|| look(self));
        self.overlaid = overlaid;
        self.trying = trying;
        for (slot, column) in before.into_iter().rev() {
            self.columns[slot.0 as usize] = column;
        }
        self.problems.truncate(problems);
        result
    }

    /// What runs again when columns change.
    fn again(&mut self, slots: &[SlotId]) -> Rc<Again> {
        if let Some(again) = self.again.get(slots) {
            return again.clone();
        }
        let plan = self.plan;
        let mut dirty = vec![false; plan.slots.len()];
        slots.iter().for_each(|s| dirty[s.0 as usize] = true);
        let (mut steps, mut out) = (Vec::new(), Vec::new());
        let mut reads: Vec<SlotId> = Vec::new();
        for (at, step) in plan.steps.iter().enumerate() {
            let rests = step.reads.iter().any(|s| dirty[s.0 as usize]);
            let given = step.out.iter().any(|s| slots.contains(s));
            if !rests || given || matches!(step.work, Work::Judge { .. }) {
                continue;
            }
            steps.push(at);
            step.out.iter().for_each(|s| dirty[s.0 as usize] = true);
            out.extend(&step.out);
            reads.extend(&step.reads);
        }
        reads.retain(|s| !dirty[s.0 as usize]);
        reads.sort_unstable();
        reads.dedup();
        let again = Rc::new(Again {
            groups: fuse(plan, steps.into_iter()),
            out,
            reads,
        });
        self.again.insert(slots.to_vec(), again.clone());
        again
    }

    /// Works out columns that were not kept.
    pub(super) fn ensure(&mut self, slots: &[SlotId]) -> Option<()> {
        if slots.iter().all(|s| self.column(*s).is_some()) {
            return Some(());
        }
        let plan = self.plan;
        let mut needed = vec![false; plan.slots.len()];
        let missing = slots.iter().filter(|s| self.column(**s).is_none());
        missing.for_each(|s| needed[s.0 as usize] = true);
        let mut steps = Vec::new();
        for (at, step) in plan.steps.iter().enumerate().rev() {
            if !step.out.iter().any(|s| needed[s.0 as usize]) {
                continue;
            }
            steps.push(at);
            let missing = step.reads.iter().filter(|s| self.column(**s).is_none());
            missing.for_each(|s| needed[s.0 as usize] = true);
        }
        let groups = fuse(plan, steps.into_iter().rev());
        let trying = std::mem::replace(&mut self.trying, true);
        let whole = groups
            .iter()
            .all(|g| self.run_group(g, &|_| true).is_some());
        self.trying = trying;
        whole.then_some(())
    }

    /// Whether a column was worked out anew under the change in hand.
    pub(super) fn is_overlaid(&self, slot: SlotId) -> bool {
        self.overlaid.get(slot.0 as usize).copied().unwrap_or(false)
    }
}
