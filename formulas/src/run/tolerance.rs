//! Tolerances: everything worked out again with each input at its ends, the inputs ranked by what they move, and what
//! the worst corner of all comes to.

use super::look::{relative_reserve, reserve};
use super::{Machine, summary_of};
use crate::axes::Shape;
use crate::plan::SlotId;
use crate::problem::Fault;
use crate::program::{Comparison, Kind, Tolerance, ToleranceWidth};
use crate::run::scalar;
use crate::syntax::BinaryOp;
use crate::values::{Corner, Influence, Sensitivity, Values, is_excluded};
use std::rc::Rc;

/// Inputs whose ends are combined in every way.
const CORNER_INPUTS_MOST: usize = 8;
/// Further conditions that are named where they may govern.
const OTHERS_MOST: usize = 100;
/// A requirement `=` is met within this part of the larger side.
const REQUIRED_EQUAL_WITHIN: f64 = 1e-9;
/// A comparison includes a difference of this part of the larger side.
const EQUAL_WITHIN: f64 = 1e-12;

/// A tolerance and to which end it is moved: 1 or -1.
type Move = (usize, f64);

/// What is followed while tolerances are moved.
struct Ledger {
    /// For each requirement its parts' reserves, condition by condition.
    reserves: Vec<Vec<Vec<f64>>>,
    /// The sum of the effects on each of them.
    lost: Vec<Vec<Vec<f64>>>,
    /// For each governing value, how far every other condition may come closer to its largest and its smallest.
    closer: Vec<[Vec<f64>; 2]>,
    /// For requirements of another form: whether they are met wherever the tolerances were moved.
    met: Vec<bool>,
}

impl Machine<'_> {
    /// Spreads of all quantities, and what the tolerances do to governing values and requirements.
    pub(super) fn tolerances(&mut self, values: &mut Values) {
        if self.program.tolerances.is_empty() || self.stopped {
            return;
        }
        let reserves = self.reserves();
        let mut ledger = Ledger {
            lost: reserves
                .iter()
                .map(|r| r.iter().map(|p| vec![0.0; p.len()]).collect())
                .collect(),
            closer: values
                .governing
                .iter()
                .map(|_| [Vec::new(), Vec::new()])
                .collect(),
            met: vec![true; reserves.len()],
            reserves,
        };
        for at in 0..self.program.tolerances.len() {
            self.one_tolerance(at, values, &mut ledger);
        }
        let spread = values.quantities.iter_mut().flat_map(|q| &mut q.rss);
        spread.flatten().for_each(|s| *s = s.sqrt());
        rank(values);
        self.others(values, &ledger);
        self.corners(values, &mut ledger);
        self.judge(values, &ledger);
        if self.stopped {
            let fault = Fault::OperationLimit {
                limit: self.limits.operations,
            };
            self.problems.push(crate::names::located(
                0,
                crate::span::Span::default(),
                fault,
            ));
        }
    }

    /// Columns of inputs with some tolerances moved; `None` where one has no column.
    fn moved(&self, moves: &[Move]) -> Option<Vec<(SlotId, Vec<f64>)>> {
        let mut columns: Vec<(SlotId, Vec<f64>)> = Vec::new();
        for (at, sign) in moves {
            let tolerance = self.program.tolerances.get(*at)?;
            let slot = (*self.plan.quantities.get(tolerance.quantity.0 as usize)?)?;
            let nominal = self.column(slot)?.clone();
            let width = self.width(tolerance)?;
            let shape = self.shape(slot);
            let place = match columns.iter().position(|(s, _)| *s == slot) {
                Some(place) => place,
                None => {
                    columns.push((slot, nominal.to_vec()));
                    columns.len() - 1
                }
            };
            for (condition, value) in nominal.iter().enumerate() {
                if stands_at(tolerance, &shape, condition) {
                    columns[place].1[condition] = match width {
                        Width::Is(width) => value + sign * width,
                        Width::PartOf(part) => value + sign * part * value.abs(),
                    };
                }
            }
        }
        Some(columns)
    }

    fn width(&self, tolerance: &Tolerance) -> Option<Width> {
        Some(match tolerance.width {
            ToleranceWidth::Node(node) => {
                Width::Is(self.column(self.slot_of(node)?)?.first().copied()?)
            }
            ToleranceWidth::Part(part) => Width::PartOf(part),
        })
    }

    /// The larger effect of a tolerance on everything that rests on it.
    fn one_tolerance(&mut self, at: usize, values: &mut Values, ledger: &mut Ledger) {
        let base = self.columns.clone();
        let mut effects: Vec<(usize, Vec<f64>)> = Vec::new();
        let mut lost: Vec<(usize, usize, Vec<f64>)> = Vec::new();
        let mut closer: Vec<((usize, usize), Vec<f64>)> = Vec::new();
        for sign in [1.0, -1.0] {
            let Some(moved) = self.moved(&[(at, sign)]) else {
                return;
            };
            let whole = self.with_columns(moved, |machine| {
                machine.larger_changes(&base, &mut effects);
                machine.reserves_lost(ledger, &mut lost);
                machine.come_closer(&base, values, &mut closer);
            });
            if whole.is_none() {
                return;
            }
        }
        for ((line, end), effect) in closer {
            let sum = &mut ledger.closer[line][end];
            sum.resize(effect.len(), 0.0);
            sum.iter_mut().zip(&effect).for_each(|(s, e)| *s += e);
        }
        for (requirement, part, effect) in lost {
            let sum = &mut ledger.lost[requirement][part];
            sum.iter_mut().zip(&effect).for_each(|(s, e)| *s += e);
            let influence = |condition: usize| Influence {
                tolerance: at,
                effect: effect.get(condition).copied().unwrap_or(0.0),
            };
            if let Some(result) = values.requirements.get_mut(requirement)
                && let Some(worst) = result.worst.filter(|w| w.part == part)
            {
                result.sensitivity.ranked.push(influence(worst.condition));
            }
        }
        for (quantity, effect) in effects {
            self.note_governing(at, quantity, &effect, values);
            let Some(quantity) = values.quantities.get_mut(quantity) else {
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

    fn note_governing(&self, at: usize, quantity: usize, effect: &[f64], values: &mut Values) {
        let lines = self.program.governing.iter().zip(&mut values.governing);
        for (_, found) in lines.filter(|(line, _)| line.quantity.0 as usize == quantity) {
            let ends = [
                (found.all.largest, &mut found.largest),
                (found.all.smallest, &mut found.smallest),
            ];
            for (extreme, sensitivity) in ends {
                let Some(effect) = extreme.and_then(|e| effect.get(e.condition)) else {
                    continue;
                };
                sensitivity.ranked.push(Influence {
                    tolerance: at,
                    effect: *effect,
                });
            }
        }
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
            if !matches!(self.program.quantities[at].kind, Kind::Number(_)) {
                continue;
            }
            let changes = new
                .iter()
                .zip(old.iter())
                .map(|(n, o)| change(*n, *o))
                .collect();
            larger(
                effects,
                |(quantity, _)| *quantity == at,
                |(_, c)| c,
                (at, changes),
            );
        }
    }

    /// By how much the distance of each condition from the largest and from the smallest value has changed.
    fn come_closer(
        &self,
        base: &[Option<Rc<Vec<f64>>>],
        values: &Values,
        closer: &mut Vec<((usize, usize), Vec<f64>)>,
    ) {
        for (line, found) in values.governing.iter().enumerate() {
            let quantity = self.program.governing[line].quantity.0 as usize;
            let slot = self.plan.quantities.get(quantity).copied().flatten();
            let Some(slot) = slot.filter(|s| self.is_overlaid(*s)) else {
                continue;
            };
            let (Some(new), Some(Some(old))) = (self.column(slot), base.get(slot.0 as usize))
            else {
                continue;
            };
            for (end, extreme) in [found.all.largest, found.all.smallest]
                .into_iter()
                .enumerate()
            {
                let Some(at) = extreme.map(|e| e.condition) else {
                    continue;
                };
                let distance = |column: &[f64], i: usize| column[at] - column[i];
                let changes = (0..new.len()).map(|i| change(distance(new, i), distance(old, i)));
                let entry = ((line, end), changes.collect());
                larger(closer, |(key, _)| *key == (line, end), |(_, c)| c, entry);
            }
        }
    }

    /// Other conditions that come as far as the governing one, with all tolerances at their worst.
    fn others(&self, values: &mut Values, ledger: &Ledger) {
        for (line, found) in values.governing.iter_mut().enumerate() {
            let quantity = self.program.governing[line].quantity.0 as usize;
            let slot = self.plan.quantities.get(quantity).copied().flatten();
            let Some(column) = slot.and_then(|s| self.column(s)) else {
                continue;
            };
            let ends = [
                (found.all.largest, &mut found.largest),
                (found.all.smallest, &mut found.smallest),
            ];
            for ((extreme, sensitivity), closer) in ends.into_iter().zip(&ledger.closer[line]) {
                let Some(extreme) = extreme else { continue };
                let apart = |value: f64| (value - extreme.value).abs();
                let comes = |(i, closer): &(usize, &f64)| {
                    let value = column[*i];
                    *i != extreme.condition && !value.is_nan() && **closer > apart(value)
                };
                let others = closer.iter().enumerate().filter(comes).map(|(i, _)| i);
                sensitivity.others = others.take(OTHERS_MOST).collect();
            }
        }
    }

    /// The reserve of every part of every requirement, condition by condition.
    fn reserves(&self) -> Vec<Vec<Vec<f64>>> {
        let requirements = self.program.requirements.iter();
        requirements
            .map(|r| {
                let shape = self.plan.shape(r.axes);
                r.parts
                    .iter()
                    .map(|part| self.reserve_of(part, &shape))
                    .collect()
            })
            .collect()
    }

    fn reserve_of(&self, part: &Comparison, shape: &Shape) -> Vec<f64> {
        let sides = |at: usize, sides: &[super::feed::Feed<'_>; 2]| {
            reserve(part.op, sides[0].value(at), sides[1].value(at))
        };
        self.with_sides(part, shape, |feeds| {
            (0..shape.conditions()).map(|at| sides(at, feeds)).collect()
        })
        .unwrap_or_default()
    }

    fn with_sides<R>(
        &self,
        part: &Comparison,
        shape: &Shape,
        look: impl FnOnce(&[super::feed::Feed<'_>; 2]) -> R,
    ) -> Option<R> {
        let (left, right) = (self.held(part.left)?, self.held(part.right)?);
        Some(look(&[left.feed(shape), right.feed(shape)]))
    }

    fn reserves_lost(&self, ledger: &mut Ledger, lost: &mut Vec<(usize, usize, Vec<f64>)>) {
        self.note_met(ledger);
        for (requirement, nominal) in ledger.reserves.iter().enumerate() {
            let line = &self.program.requirements[requirement];
            let shape = self.plan.shape(line.axes);
            for (at, (part, old)) in line.parts.iter().zip(nominal).enumerate() {
                let new = self.reserve_of(part, &shape);
                let changes: Vec<f64> = new.iter().zip(old).map(|(n, o)| change(*n, *o)).collect();
                if changes.iter().any(|c| *c > 0.0) {
                    let here = |(r, p, _): &(usize, usize, Vec<f64>)| (*r, *p) == (requirement, at);
                    larger(lost, here, |(_, _, c)| c, (requirement, at, changes));
                }
            }
        }
    }

    /// Whether requirements that are no comparison are met as things stand.
    fn note_met(&self, ledger: &mut Ledger) {
        let lines = self.program.requirements.iter().zip(&mut ledger.met);
        for (line, met) in lines.filter(|(line, _)| line.parts.is_empty()) {
            if let Some(truth) = line.condition.and_then(|c| self.held(c)) {
                let shape = self.plan.shape(line.axes);
                let feed = truth.feed(&shape);
                *met &= (0..shape.conditions()).all(|at| feed.value(at) != 0.0);
            }
        }
    }

    /// The ends of the inputs that matter most, combined in every way.
    fn corners(&mut self, values: &mut Values, ledger: &mut Ledger) {
        let inputs = |s: &Sensitivity| {
            let mut inputs: Vec<usize> = s
                .ranked
                .iter()
                .take(CORNER_INPUTS_MOST)
                .map(|i| i.tolerance)
                .collect();
            inputs.sort_unstable();
            inputs
        };
        let governing = values
            .governing
            .iter()
            .flat_map(|g| [&g.largest, &g.smallest]);
        let all = governing.chain(values.requirements.iter().map(|r| &r.sensitivity));
        let mut sets: Vec<Vec<usize>> = all.map(inputs).filter(|s| !s.is_empty()).collect();
        sets.sort_unstable();
        sets.dedup();
        for set in sets {
            for corner in 0..1usize << set.len() {
                let sign = |bit: usize| if corner >> bit & 1 == 1 { 1.0 } else { -1.0 };
                let moves: Vec<Move> = set
                    .iter()
                    .enumerate()
                    .map(|(bit, t)| (*t, sign(bit)))
                    .collect();
                let Some(moved) = self.moved(&moves) else {
                    continue;
                };
                self.with_columns(moved, |machine| {
                    machine.note_met(ledger);
                    machine.corner(values, &moves, |s| inputs(s) == set);
                });
            }
        }
    }

    fn corner(&self, values: &mut Values, moves: &[Move], concerns: impl Fn(&Sensitivity) -> bool) {
        for (line, found) in self.program.governing.iter().zip(&mut values.governing) {
            let slot = self
                .plan
                .quantities
                .get(line.quantity.0 as usize)
                .copied()
                .flatten();
            let Some(column) = slot.and_then(|s| self.column(s)) else {
                continue;
            };
            let summary = summary_of(column.iter().copied().enumerate());
            let ends = [
                (summary.largest, &mut found.largest, 1.0),
                (summary.smallest, &mut found.smallest, -1.0),
            ];
            for (extreme, sensitivity, sign) in ends {
                if let Some(extreme) = extreme.filter(|_| concerns(sensitivity)) {
                    sensitivity.offer(
                        sign * extreme.value,
                        extreme.value,
                        extreme.condition,
                        moves,
                    );
                }
            }
        }
        for (line, found) in self
            .program
            .requirements
            .iter()
            .zip(&mut values.requirements)
        {
            if !concerns(&found.sensitivity) {
                continue;
            }
            let shape = self.plan.shape(line.axes);
            for part in &line.parts {
                self.with_sides(part, &shape, |[left, right]| {
                    for at in 0..shape.conditions() {
                        let (left, right) = (left.value(at), right.value(at));
                        let ratio = relative_reserve(part.op, left, right);
                        let value = reserve(part.op, left, right);
                        if !ratio.is_nan() {
                            found.sensitivity.offer(-ratio, value, at, moves);
                        }
                    }
                });
            }
        }
    }

    /// Requirements with the effects of all tolerances taken off their reserves.
    fn judge(&self, values: &mut Values, ledger: &Ledger) {
        for (at, found) in values.requirements.iter_mut().enumerate() {
            let line = &self.program.requirements[at];
            if line.parts.is_empty() {
                found.met_at_worst = found.met.map(|met| met && ledger.met[at]);
                continue;
            }
            let mut failed = false;
            let mut unknown = found.without_value > 0 || line.condition.is_none();
            for (part, (reserves, lost)) in line
                .parts
                .iter()
                .zip(ledger.reserves[at].iter().zip(&ledger.lost[at]))
            {
                let met = self.with_sides(part, &found.shape, |[left, right]| {
                    reserves
                        .iter()
                        .zip(lost)
                        .enumerate()
                        .all(|(i, (reserve, lost))| {
                            let (left, right) = (left.value(i), right.value(i));
                            let gap = [left, right].iter().any(|v| v.is_nan());
                            gap || held(part.op, left, right, *reserve, *lost)
                        })
                });
                failed |= met == Some(false);
                unknown |= met.is_none();
            }
            found.met_at_worst = match (failed, unknown) {
                (true, _) => Some(false),
                (false, true) => None,
                (false, false) => Some(true),
            };
        }
    }
}

#[derive(Clone, Copy)]
enum Width {
    Is(f64),
    PartOf(f64),
}

/// Whether a comparison holds with so much of its reserve lost.
fn held(op: BinaryOp, left: f64, right: f64, reserve: f64, lost: f64) -> bool {
    let larger = left.abs().max(right.abs());
    if lost == 0.0 {
        return match op {
            BinaryOp::Equal => (left - right).abs() <= REQUIRED_EQUAL_WITHIN * larger,
            _ => scalar::binary(op, left, right) != 0.0,
        };
    }
    let rest = reserve - lost;
    match op {
        BinaryOp::Less | BinaryOp::Greater | BinaryOp::NotEqual => rest > EQUAL_WITHIN * larger,
        BinaryOp::Equal => rest >= -REQUIRED_EQUAL_WITHIN * larger,
        _ => rest >= -EQUAL_WITHIN * larger,
    }
}

fn stands_at(tolerance: &Tolerance, shape: &Shape, condition: usize) -> bool {
    if tolerance.at.is_empty() {
        return true;
    }
    let indices = shape.indices(condition);
    let at = |(axis, label): &(crate::axes::AxisId, usize)| {
        shape.position(*axis).is_none_or(|p| indices[p] == *label)
    };
    tolerance.at.iter().all(at)
}

fn change(new: f64, old: f64) -> f64 {
    if new.is_nan() || old.is_nan() {
        0.0
    } else {
        (new - old).abs()
    }
}

/// Keeps the larger of the changes known and new, value by value.
fn larger<T>(
    known: &mut Vec<T>,
    same: impl Fn(&T) -> bool,
    changes: impl Fn(&mut T) -> &mut Vec<f64>,
    mut new: T,
) {
    match known.iter_mut().find(|t| same(t)) {
        Some(entry) => {
            let pairs = changes(entry).iter_mut().zip(changes(&mut new).iter());
            pairs.for_each(|(k, c)| *k = k.max(*c));
        }
        None => known.push(new),
    }
}

/// The largest effect first, those without effect left out.
fn rank(values: &mut Values) {
    let governing = values
        .governing
        .iter_mut()
        .flat_map(|g| [&mut g.largest, &mut g.smallest]);
    let requirements = values.requirements.iter_mut().map(|r| &mut r.sensitivity);
    for sensitivity in governing.chain(requirements) {
        sensitivity.ranked.retain(|i| i.effect > 0.0);
        sensitivity.ranked.sort_by(|a, b| {
            b.effect
                .total_cmp(&a.effect)
                .then(a.tolerance.cmp(&b.tolerance))
        });
    }
}

impl Sensitivity {
    /// Takes a corner that is worse than the one known.
    fn offer(&mut self, rank: f64, value: f64, condition: usize, moves: &[Move]) {
        if value.is_nan()
            || is_excluded(value)
            || self.corner.as_ref().is_some_and(|c| c.rank >= rank)
        {
            return;
        }
        self.corner = Some(Corner {
            rank,
            value,
            condition,
            moves: moves.iter().map(|(t, sign)| (*t, *sign > 0.0)).collect(),
        });
    }
}
