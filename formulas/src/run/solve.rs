//! Unknowns, condition by condition: every condition has a search of its own, and all searches are fed from the columns
//! of one trial. No search depends on another condition or on an earlier evaluation.

use super::feed::Feed;
use super::{Machine, conditions};
use crate::axes::Shape;
use crate::missing::lost;
use crate::names::located;
use crate::plan::{SlotId, Solve};
use crate::problem::{Cause, Fault};
use crate::values::{EXCLUDED, NONE, is_excluded};
use engine::numeric::{RootSearch, SystemSearch};
use std::rc::Rc;

/// A search in one condition.
enum Search {
    One(RootSearch),
    Several(SystemSearch),
}

impl Search {
    fn is_done(&self) -> bool {
        match self {
            Search::One(search) => search.is_done(),
            Search::Several(search) => search.is_done(),
        }
    }

    fn trial(&self, symbol: usize) -> f64 {
        match self {
            Search::One(search) => search.trial(),
            Search::Several(search) => search.trial().get(symbol).copied().unwrap_or(f64::NAN),
        }
    }

    fn tell(&mut self, left: &[f64], right: &[f64]) {
        match self {
            Search::One(search) => search.tell(left[0], right[0]),
            Search::Several(search) => search.tell(left, right),
        }
    }

    fn root(&self, symbol: usize) -> Option<f64> {
        match self {
            Search::One(search) => search.root(),
            Search::Several(search) => search.root()?.get(symbol).copied(),
        }
    }
}

/// What the sides were missing so far, in one condition.
#[derive(Clone, Copy, Default)]
struct Gaps {
    /// All were left out on purpose.
    excluded: bool,
    /// Something was missing before this line.
    missing: bool,
}

impl Machine<'_> {
    /// The columns of an unknown's symbols.
    pub(super) fn solve(&mut self, at: usize) -> Option<Vec<Vec<f64>>> {
        let (program, plan) = (self.program, self.plan);
        let unknown = program.unknowns.get(at)?;
        let solve = plan.solves.get(at)?;
        let symbol = unknown.symbols.first().cloned().unwrap_or_default();
        if solve.coupled {
            let fault = Fault::UnknownCoupled { symbol };
            self.problems
                .push(located(unknown.statement, unknown.span, fault));
            return None;
        }
        let shape = self.shape(*solve.out.first()?);
        let (mut searches, mut gaps) = self.searches(solve, &shape)?;
        let before: Vec<(SlotId, Option<Rc<Vec<f64>>>)> = solve
            .steps
            .iter()
            .flat_map(|s| plan.steps[*s].out.iter().copied())
            .chain(solve.out.iter().copied())
            .map(|slot| (slot, self.columns[slot.0 as usize].take()))
            .collect();
        let trying = std::mem::replace(&mut self.trying, true);
        let mut whole = true;
        while whole && searches.iter().any(|s| !s.is_done()) {
            whole = self
                .try_all(solve, &shape, &mut searches, &mut gaps)
                .is_some();
        }
        self.trying = trying;
        for (slot, column) in before {
            self.columns[slot.0 as usize] = column;
        }
        if !whole {
            return None;
        }
        self.report_several(&searches, &shape, at, &symbol);
        let column = |symbol: usize| {
            let each = searches.iter().zip(&gaps);
            each.map(|(search, gaps)| found(search, *gaps, symbol))
                .collect()
        };
        Some((0..solve.out.len()).map(column).collect())
    }

    /// A search for each condition of the shape.
    fn searches(&self, solve: &Solve, shape: &Shape) -> Option<(Vec<Search>, Vec<Gaps>)> {
        let columns = |slot: SlotId| Some((self.column(slot)?.clone(), self.shape(slot)));
        let held: Option<Vec<_>> = solve
            .bounds
            .iter()
            .map(|(a, b)| Some((columns(*a)?, columns(*b)?)))
            .collect();
        let held = held?;
        let feeds: Vec<(Feed<'_>, Feed<'_>)> = held
            .iter()
            .map(|(a, b)| (Feed::new(&a.0, &a.1, shape), Feed::new(&b.0, &b.1, shape)))
            .collect();
        let search = |condition: usize| {
            let low: Vec<f64> = feeds.iter().map(|(a, _)| a.value(condition)).collect();
            let high: Vec<f64> = feeds.iter().map(|(_, b)| b.value(condition)).collect();
            let missing = low
                .iter()
                .chain(&high)
                .any(|v| v.is_nan() && !is_excluded(*v));
            let gaps = Gaps {
                excluded: true,
                missing,
            };
            let search = match (&low[..], &high[..]) {
                ([low], [high]) => Search::One(RootSearch::new(*low, *high)),
                _ => Search::Several(SystemSearch::new(&low, &high)),
            };
            (search, gaps)
        };
        Some((0..shape.conditions()).map(search).unzip())
    }

    /// Works the equations out for one trial of every search.
    fn try_all(
        &mut self,
        solve: &Solve,
        shape: &Shape,
        searches: &mut [Search],
        gaps: &mut [Gaps],
    ) -> Option<()> {
        for (symbol, slot) in solve.out.iter().enumerate() {
            let trial = searches.iter().map(|s| s.trial(symbol)).collect();
            self.columns[slot.0 as usize] = Some(Rc::new(trial));
        }
        for group in &solve.groups {
            self.run_group(group, &|_| true)?;
        }
        let held = |slot: SlotId| Some((self.column(slot)?.clone(), self.shape(slot)));
        let sides: Option<Vec<_>> = solve
            .sides
            .iter()
            .map(|(l, r)| Some((held(*l)?, held(*r)?)))
            .collect();
        let sides = sides?;
        let feeds: Vec<(Feed<'_>, Feed<'_>)> = sides
            .iter()
            .map(|(l, r)| (Feed::new(&l.0, &l.1, shape), Feed::new(&r.0, &r.1, shape)))
            .collect();
        let (mut left, mut right) = (vec![0.0; feeds.len()], vec![0.0; feeds.len()]);
        for (condition, (search, gaps)) in searches.iter_mut().zip(gaps).enumerate() {
            if search.is_done() {
                continue;
            }
            for (at, (l, r)) in feeds.iter().enumerate() {
                (left[at], right[at]) = (l.value(condition), r.value(condition));
            }
            let mut values = left.iter().chain(&right).filter(|v| v.is_nan()).peekable();
            gaps.excluded &= values.peek().is_some() && values.clone().all(|v| is_excluded(*v));
            gaps.missing |= values.any(|v| v.to_bits() == NONE.to_bits());
            search.tell(&left, &right);
        }
        Some(())
    }

    fn report_several(&mut self, searches: &[Search], shape: &Shape, at: usize, symbol: &str) {
        let several = |search: &Search| matches!(search, Search::One(s) if s.has_several() && s.root().is_some());
        let mut which = (0..searches.len()).filter(|i| several(&searches[*i]));
        let first: Vec<usize> = which.by_ref().take(5).collect();
        let count = (first.len() + which.count()) as u64;
        if count > 0 {
            let unknown = &self.program.unknowns[at];
            let fault = Fault::FurtherSolutions {
                symbol: symbol.to_string(),
                conditions: conditions(self.program, shape, count, &first),
            };
            self.problems
                .push(located(unknown.statement, unknown.span, fault));
        }
    }
}

/// The solution, or why there is none: what was left out on purpose stays so, and a value missing elsewhere is told of
/// there.
fn found(search: &Search, gaps: Gaps, symbol: usize) -> f64 {
    if let Some(root) = search.root(symbol) {
        return root + 0.0;
    }
    let valued = match search {
        Search::One(search) => search.was_valued(),
        Search::Several(search) => search.was_valued(),
    };
    if valued {
        lost(Cause::NoSolution)
    } else if gaps.excluded && !gaps.missing {
        EXCLUDED
    } else if gaps.missing {
        NONE
    } else {
        lost(Cause::NoSolution)
    }
}
