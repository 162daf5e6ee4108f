//! Where the solving of unknowns stands among the steps: behind all that its equations read from elsewhere, before
//! every line that rests on the unknown. The lines between an unknown and its equations are worked out for each trial,
//! and once more as lines of the sheet.

use super::{Plan, SlotId, Solve, Step, Work};
use crate::axes::AxisSet;
use rustc_hash::FxHashMap;

/// Puts a step for each unknown among the steps.
pub(super) fn place(plan: &mut Plan) {
    let wanted: Vec<usize> = (0..plan.solves.len())
        .filter(|s| !plan.solves[*s].out.is_empty())
        .collect();
    if wanted.is_empty() {
        return;
    }
    let steps = plan.steps.len();
    for at in &wanted {
        let step = solve_step(plan, *at);
        plan.steps.push(step);
    }
    let producers = producers(plan);
    let order = sorted(plan, &producers);
    let mut place = vec![0; plan.steps.len()];
    order
        .iter()
        .enumerate()
        .for_each(|(new, old)| place[*old] = new);
    debug_assert_eq!(order.len(), steps + wanted.len());
    let mut old: Vec<Option<Step>> = std::mem::take(&mut plan.steps)
        .into_iter()
        .map(Some)
        .collect();
    plan.steps = order.iter().filter_map(|at| old[*at].take()).collect();
    for solve in &mut plan.solves {
        solve.steps.iter_mut().for_each(|step| *step = place[*step]);
        solve.steps.sort_unstable();
    }
}

/// The step that makes each column.
fn producers(plan: &Plan) -> FxHashMap<SlotId, usize> {
    let each = plan.steps.iter().enumerate();
    each.flat_map(|(at, step)| step.out.iter().map(move |slot| (*slot, at)))
        .collect()
}

/// Finds what lies between an unknown and its equations, and what is read from elsewhere.
fn solve_step(plan: &mut Plan, at: usize) -> Step {
    let axes = plan.slots[plan.solves[at].out[0].0 as usize];
    let solve = &plan.solves[at];
    let mut moved = vec![false; plan.slots.len()];
    solve.out.iter().for_each(|s| moved[s.0 as usize] = true);
    for step in plan
        .steps
        .iter()
        .filter(|s| !matches!(s.work, Work::Solve(_)))
    {
        if step.reads.iter().any(|s| moved[s.0 as usize]) {
            step.out.iter().for_each(|s| moved[s.0 as usize] = true);
        }
    }
    let mut needed = vec![false; plan.slots.len()];
    let sides = solve.sides.iter().flat_map(|(l, r)| [*l, *r]);
    sides.for_each(|s| needed[s.0 as usize] = true);
    let mut between = Vec::new();
    for (index, step) in plan.steps.iter().enumerate().rev() {
        let makes = |of: &[bool]| step.out.iter().any(|s| of[s.0 as usize]);
        if makes(&needed) && makes(&moved) && !matches!(step.work, Work::Solve(_)) {
            step.reads.iter().for_each(|s| needed[s.0 as usize] = true);
            between.push(index);
        }
    }
    between.reverse();
    let bounds = solve.bounds.iter().flat_map(|(a, b)| [*a, *b]);
    let read = between
        .iter()
        .flat_map(|i| plan.steps[*i].reads.iter().copied());
    let sides = solve.sides.iter().flat_map(|(l, r)| [*l, *r]);
    let mut reads: Vec<SlotId> = bounds.chain(read).chain(sides).collect();
    reads.retain(|s| !moved[s.0 as usize]);
    reads.sort_unstable();
    reads.dedup();
    let coupled = between
        .iter()
        .any(|i| looks_along(plan, &plan.steps[*i], axes, &moved));
    let solve = &mut plan.solves[at];
    solve.steps = between;
    solve.coupled = coupled;
    let quantity = None;
    Step {
        out: solve.out.clone(),
        reads,
        work: Work::Solve(at),
        quantity,
    }
}

/// Whether a step takes a column that moves with the unknown along an axis over which the unknown varies.
fn looks_along(plan: &Plan, step: &Step, axes: AxisSet, moved: &[bool]) -> bool {
    let along = match &step.work {
        Work::Reduce { over, .. } => *over,
        Work::Along { axis, .. } => AxisSet::of(*axis),
        Work::Call { over, .. } => over.map_or(AxisSet::NONE, AxisSet::of),
        Work::Pick { selections } => selections
            .iter()
            .fold(AxisSet::NONE, |all, (axis, _)| all.with(AxisSet::of(*axis))),
        _ => return false,
    };
    // A pick may move its position, which is read condition by condition; only the base is looked along.
    let count = if matches!(step.work, Work::Pick { .. }) {
        1
    } else {
        step.reads.len()
    };
    let mut read = step.reads.iter().take(count);
    read.any(|s| {
        moved[s.0 as usize]
            && !plan.slots[s.0 as usize]
                .common(along)
                .common(axes)
                .is_empty()
    })
}

/// The steps so that what a step reads is made before it; otherwise as they stood.
fn sorted(plan: &Plan, producers: &FxHashMap<SlotId, usize>) -> Vec<usize> {
    let mut order = Vec::with_capacity(plan.steps.len());
    let mut entered = vec![false; plan.steps.len()];
    for start in 0..plan.steps.len() {
        let mut path = vec![(start, 0)];
        if std::mem::replace(&mut entered[start], true) {
            continue;
        }
        while let Some((step, next)) = path.last_mut() {
            let reads = &plan.steps[*step].reads;
            let Some(slot) = reads.get(*next) else {
                order.push(*step);
                path.pop();
                continue;
            };
            *next += 1;
            if let Some(producer) = producers.get(slot)
                && !std::mem::replace(&mut entered[*producer], true)
            {
                path.push((*producer, 0));
            }
        }
    }
    order
}

impl Solve {
    /// Whether a column is one of its unknowns.
    #[must_use]
    pub fn solves(&self, slot: SlotId) -> bool {
        self.out.contains(&slot)
    }
}
