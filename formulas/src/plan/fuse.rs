//! Steps that vary over the same axes are worked out together, block by block: what one makes the next reads from the
//! block, and a column is only stored where something else needs it.

use super::code::{Fused, Scalar, Writer};
use super::{Plan, SlotId, Step, Work};
use crate::axes::AxisSet;
use rustc_hash::FxHashMap;
use std::collections::{BTreeMap, BTreeSet};

/// Conditions up to which a reduction reads a stored column rather than the blocks.
pub const STORED_MOST: f64 = 65_536.0;

/// Steps that are worked out together.
#[derive(Debug)]
pub enum Group {
    /// One step over whole columns.
    Single(usize),
    /// Steps over the same conditions, block by block.
    Fused(Fused),
}

/// Where a column comes from.
#[derive(Clone, Copy)]
struct Source {
    group: usize,
    /// Whether it is there only when the group is done.
    after: bool,
}

struct Building {
    axes: AxisSet,
    steps: Vec<usize>,
    fused: bool,
}

/// Puts steps, given in an order in which they can be worked out, into groups in such an order. What varies over few
/// conditions goes first, so that steps over many wait until all of them can go together.
#[must_use]
pub fn fuse(plan: &Plan, steps: impl Iterator<Item = usize>) -> Vec<Group> {
    let steps: Vec<usize> = steps.collect();
    let mut groups: Vec<Building> = Vec::new();
    let mut open: FxHashMap<AxisSet, usize> = FxHashMap::default();
    let mut sources: Vec<Option<Source>> = vec![None; plan.slots.len()];
    for at in scheduled(plan, &steps) {
        let step = &plan.steps[at];
        let axes = block_axes(plan, step);
        let first = step.reads.iter().filter_map(|s| sources[s.0 as usize]);
        let first = first
            .map(|s| s.group + usize::from(s.after))
            .max()
            .unwrap_or(0);
        let joined = axes
            .and_then(|axes| open.get(&axes).copied())
            .filter(|group| *group >= first);
        let group = joined.unwrap_or_else(|| {
            groups.push(Building {
                axes: axes.unwrap_or(AxisSet::NONE),
                steps: Vec::new(),
                fused: axes.is_some(),
            });
            groups.len() - 1
        });
        if let Some(axes) = axes {
            open.insert(axes, group);
        }
        groups[group].steps.push(at);
        let after = axes.is_none() || matches!(step.work, Work::Reduce { .. });
        for slot in &step.out {
            sources[slot.0 as usize] = Some(Source { group, after });
        }
    }
    groups.into_iter().flat_map(|g| written(plan, g)).collect()
}

/// The steps in an order in which they can be worked out: of those that are ready, one over the fewest conditions, and
/// then all others over the same axes.
fn scheduled(plan: &Plan, steps: &[usize]) -> Vec<usize> {
    let mut maker: Vec<Option<usize>> = vec![None; plan.slots.len()];
    for (index, at) in steps.iter().enumerate() {
        for slot in &plan.steps[*at].out {
            maker[slot.0 as usize] = Some(index);
        }
    }
    let mut waits = vec![0usize; steps.len()];
    let mut users: Vec<Vec<usize>> = vec![Vec::new(); steps.len()];
    for (index, at) in steps.iter().enumerate() {
        for slot in &plan.steps[*at].reads {
            if let Some(from) = maker[slot.0 as usize] {
                users[from].push(index);
                waits[index] += 1;
            }
        }
    }
    let axes = |index: usize| {
        let step = &plan.steps[steps[index]];
        let out = step
            .out
            .first()
            .map_or(AxisSet::NONE, |s| plan.slots[s.0 as usize]);
        block_axes(plan, step).unwrap_or(out)
    };
    let key = |index: usize| {
        // What is known needs nothing, and others may be put together the sooner it is there.
        if matches!(plan.steps[steps[index]].work, Work::Values(_)) {
            return (0, 0);
        }
        let axes = axes(index);
        (plan.conditions(axes).to_bits(), axes.0)
    };
    // Ready steps by the number of conditions and the axes, each list in the order given.
    let mut ready: BTreeMap<(u64, u64), BTreeSet<usize>> = BTreeMap::new();
    for index in (0..steps.len()).filter(|i| waits[*i] == 0) {
        ready.entry(key(index)).or_default().insert(index);
    }
    let mut order = Vec::with_capacity(steps.len());
    while let Some((axes, mut list)) = ready.pop_first() {
        while let Some(index) = list.pop_first() {
            order.push(steps[index]);
            for user in &users[index] {
                waits[*user] -= 1;
                if waits[*user] == 0 {
                    let at = key(*user);
                    if at == axes {
                        list.insert(*user);
                    } else {
                        ready.entry(at).or_default().insert(*user);
                    }
                }
            }
        }
    }
    order
}

fn written(plan: &Plan, group: Building) -> Vec<Group> {
    if group.fused {
        return vec![Group::Fused(Writer::write(plan, group.axes, group.steps))];
    }
    group.steps.into_iter().map(Group::Single).collect()
}

/// The axes over which a step can be worked out block by block; `None` where it takes whole columns.
fn block_axes(plan: &Plan, step: &Step) -> Option<AxisSet> {
    let axes = |slot: &SlotId| plan.slots[slot.0 as usize];
    match &step.work {
        Work::Kernel(_) => step.out.first().map(axes),
        Work::Judge { axes, .. } => Some(*axes),
        // The table is small and read as a whole; only the position goes by blocks.
        Work::Pick { selections } => {
            let (base, out) = (step.reads.first()?, step.out.first()?);
            let [(axis, _)] = selections.as_slice() else {
                return None;
            };
            let plain = axes(base) == AxisSet::of(*axis) && !axes(out).has(*axis);
            plain.then(|| axes(out))
        }
        Work::Reduce { .. } => {
            let read = axes(step.reads.first()?);
            (plan.conditions(read) > STORED_MOST).then_some(read)
        }
        _ => None,
    }
}

impl Group {
    /// The columns read that the group does not make itself.
    pub fn reads<'a>(&'a self, plan: &'a Plan) -> Vec<SlotId> {
        match self {
            Group::Single(step) => plan.steps[*step].reads.clone(),
            Group::Fused(fused) => {
                let scalars = fused.scalars.iter().filter_map(|s| match s {
                    Scalar::Slot(slot) => Some(*slot),
                    Scalar::Constant(_) => None,
                });
                let picks = fused.steps.iter().filter_map(|step| {
                    let step = &plan.steps[*step];
                    matches!(step.work, Work::Pick { .. }).then(|| step.reads.first().copied())?
                });
                let loads = fused.loads.iter().copied();
                loads.chain(scalars).chain(picks).collect()
            }
        }
    }
}
