//! What differs between two reports: quantities, governing conditions, requirements.

mod lines;

pub use lines::write;

use super::{
    Condition, Extreme, Governing, Quantity, Report, Requirement, ValueList, WorstCondition,
};
use serde::Serialize;
use std::collections::BTreeMap;

/// Numbers that differ by at most this part of the larger are the same.
const SAME_WITHIN: f64 = 1e-12;
/// Most conditions of one quantity that are listed.
const LISTED_MOST: usize = 100;

/// What differs, in the order of the new report, what only the old one has behind it.
#[derive(Clone, Debug, Default, PartialEq, Serialize)]
pub struct Differences {
    /// Quantities.
    pub quantities: Vec<QuantityDifference>,
    /// Largest and smallest values and where they stand.
    pub governing: Vec<GoverningDifference>,
    /// Requirements.
    pub requirements: Vec<RequirementDifference>,
}

/// A quantity that differs.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct QuantityDifference {
    /// Its symbol.
    pub symbol: String,
    /// Its unit in the old report; `None` for a pure number or where it was not there.
    pub old_unit: Option<String>,
    /// Its unit in the new report.
    pub new_unit: Option<String>,
    /// Whether the old report has it.
    pub in_old: bool,
    /// Whether the new report has it.
    pub in_new: bool,
    /// In how many conditions it differs.
    pub conditions: usize,
    /// The first hundred of them.
    pub changes: Vec<ValueChange>,
}

/// A value of one condition in both reports.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct ValueChange {
    /// The condition.
    pub condition: Condition,
    /// The old value; `None` where there is none.
    pub old: Option<Value>,
    /// The new value.
    pub new: Option<Value>,
    /// New less old, of numbers in the same unit.
    pub change: Option<f64>,
}

/// A value of any kind.
#[derive(Clone, Debug, PartialEq, Serialize)]
#[serde(untagged)]
#[allow(missing_docs)]
pub enum Value {
    Number(f64),
    Condition(bool),
    Text(String),
}

/// An extreme that differs, in value or in where it stands.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct GoverningDifference {
    /// The symbol.
    pub symbol: String,
    /// Its unit in the new report, else in the old one.
    pub unit: Option<String>,
    /// `largest` or `smallest`.
    pub of: &'static str,
    /// The condition of the axes that the statement leaves; empty for the extreme over all.
    pub group: Condition,
    /// In the old report.
    pub old: Option<Extreme>,
    /// In the new report.
    pub new: Option<Extreme>,
    /// New less old, in the same unit.
    pub change: Option<f64>,
}

/// A requirement that differs, in verdict or in reserve.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct RequirementDifference {
    /// The condition as typed.
    pub text: String,
    /// In the old report; `None` where it was not there.
    pub old: Option<Verdict>,
    /// In the new report.
    pub new: Option<Verdict>,
    /// Change of the reserve, in the same unit.
    pub change: Option<f64>,
}

/// How a requirement fared.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Verdict {
    /// Met, not met, or (`None`) not shown.
    pub met: Option<bool>,
    /// The condition of least reserve.
    pub worst: Option<WorstCondition>,
}

/// Finds what differs. Values that a report left out are compared by their extremes only, in `governing`; ask for them
/// to have them compared.
#[must_use]
pub fn differences(old: &Report, new: &Report) -> Differences {
    Differences {
        quantities: quantities(old, new),
        governing: governing(old, new),
        requirements: requirements(old, new),
    }
}

/// The entries of both lists that have the same key, in the order of the new one; then those only in the old one. Of
/// several with one key the first goes with the first.
fn paired<'a, T, K: Ord>(
    old: &'a [T],
    new: &'a [T],
    key: impl Fn(&'a T) -> K,
) -> Vec<(Option<&'a T>, Option<&'a T>)> {
    let mut left: BTreeMap<K, std::collections::VecDeque<usize>> = BTreeMap::new();
    for (i, entry) in old.iter().enumerate() {
        left.entry(key(entry)).or_default().push_back(i);
    }
    let mut taken = vec![false; old.len()];
    let mut pairs = Vec::new();
    for entry in new {
        let found = left
            .get_mut(&key(entry))
            .and_then(std::collections::VecDeque::pop_front);
        if let Some(place) = found.and_then(|i| taken.get_mut(i)) {
            *place = true;
        }
        pairs.push((found.and_then(|i| old.get(i)), Some(entry)));
    }
    let gone = old.iter().zip(taken).filter(|(_, taken)| !taken);
    pairs.extend(gone.map(|(entry, _)| (Some(entry), None)));
    pairs
}

fn quantities(old: &Report, new: &Report) -> Vec<QuantityDifference> {
    let pairs = paired(&old.quantities, &new.quantities, |q| q.symbol.as_str());
    let found = pairs.into_iter().filter_map(|(before, after)| {
        let changes = changes((old, before), (new, after));
        let units = [before, after].map(|q| q.and_then(|q| q.unit.clone()));
        let [old_unit, new_unit] = units;
        let both = before.is_some() && after.is_some();
        if both && changes.is_empty() && old_unit == new_unit {
            return None;
        }
        Some(QuantityDifference {
            symbol: before.or(after)?.symbol.clone(),
            old_unit,
            new_unit,
            in_old: before.is_some(),
            in_new: after.is_some(),
            conditions: changes.len(),
            changes: changes.into_iter().take(LISTED_MOST).collect(),
        })
    });
    found.collect()
}

type Side<'a> = (&'a Report, Option<&'a Quantity>);

/// The conditions in which a quantity differs: those of the new report in their order, then those only in the old one.
fn changes(old: Side, new: Side) -> Vec<ValueChange> {
    let (before, after) = (listed(old), listed(new));
    let same_unit = unit_of(old) == unit_of(new);
    let pairs = paired(&before, &after, |(condition, _)| sorted(condition));
    let changed = pairs.into_iter().filter_map(|(before, after)| {
        let condition = before.or(after)?.0.clone();
        let old = before.and_then(|(_, value)| value.clone());
        let new = after.and_then(|(_, value)| value.clone());
        let here = before.is_some() && after.is_some();
        if here && same_unit && same(&old, &new) {
            return None;
        }
        let change = change_of(&old, &new).filter(|_| same_unit);
        Some(ValueChange {
            condition,
            old,
            new,
            change,
        })
    });
    changed.collect()
}

fn unit_of<'a>(side: Side<'a>) -> Option<&'a str> {
    side.1.and_then(|quantity| quantity.unit.as_deref())
}

/// Axis order does not matter to what a condition is.
fn sorted(condition: &Condition) -> Vec<(&str, &str)> {
    let pairs = condition.0.iter();
    let mut pairs: Vec<_> = pairs.map(|(a, l)| (a.as_str(), l.as_str())).collect();
    pairs.sort_unstable();
    pairs
}

/// All conditions of a quantity with their values.
fn listed((report, quantity): Side) -> Vec<(Condition, Option<Value>)> {
    let Some((quantity, values)) = quantity.and_then(|q| Some((q, q.values.as_ref()?))) else {
        return Vec::new();
    };
    let axes = quantity.axes.iter();
    let axes: Vec<_> = axes
        .filter_map(|name| report.axes.iter().find(|axis| axis.name == *name))
        .collect();
    (0..values.len())
        .map(|mut index| {
            let mut labels = Vec::new();
            for axis in axes.iter().rev() {
                let count = axis.labels.len().max(1);
                let label = axis.labels.get(index % count).cloned().unwrap_or_default();
                labels.push((axis.name.clone(), label));
                index /= count;
            }
            labels.reverse();
            labels
        })
        .enumerate()
        .map(|(i, labels)| (Condition(labels), value(values, i)))
        .collect()
}

fn value(values: &ValueList, index: usize) -> Option<Value> {
    match values {
        ValueList::Numbers(list) => list.get(index).copied().flatten().map(Value::Number),
        ValueList::Conditions(list) => list.get(index).copied().flatten().map(Value::Condition),
        ValueList::Texts(list) => list.get(index).cloned().flatten().map(Value::Text),
    }
}

fn same(old: &Option<Value>, new: &Option<Value>) -> bool {
    match (old, new) {
        (Some(Value::Number(a)), Some(Value::Number(b))) => same_number(*a, *b),
        _ => old == new,
    }
}

fn same_number(a: f64, b: f64) -> bool {
    (a - b).abs() <= SAME_WITHIN * a.abs().max(b.abs())
}

fn change_of(old: &Option<Value>, new: &Option<Value>) -> Option<f64> {
    match (old, new) {
        (Some(Value::Number(a)), Some(Value::Number(b))) => finite(b - a),
        _ => None,
    }
}

fn finite(change: f64) -> Option<f64> {
    change.is_finite().then_some(change + 0.0)
}

fn governing(old: &Report, new: &Report) -> Vec<GoverningDifference> {
    let pairs = paired(&old.governing, &new.governing, |g| {
        (g.symbol.as_str(), &g.over)
    });
    let mut found = Vec::new();
    for (before, after) in pairs {
        let Some(either) = after.or(before) else {
            continue;
        };
        let rows = [before, after].map(|g| g.map(extremes).unwrap_or_default());
        let [old_rows, new_rows] = &rows;
        let units = [before, after].map(|g| g.map(|g| &g.unit));
        let same_unit = matches!(units, [Some(a), Some(b)] if a == b);
        for (a, b) in paired(old_rows, new_rows, |row| (sorted(&row.0), row.1)) {
            let Some((group, of, _)) = b.or(a) else {
                continue;
            };
            let (old, new) = (a.and_then(|row| row.2), b.and_then(|row| row.2));
            if same_unit && same_extreme(old, new) {
                continue;
            }
            let change = old.zip(new).and_then(|(a, b)| finite(b.value - a.value));
            found.push(GoverningDifference {
                symbol: either.symbol.clone(),
                unit: either.unit.clone(),
                of,
                group: group.clone(),
                old: old.cloned(),
                new: new.cloned(),
                change: change.filter(|_| same_unit),
            });
        }
    }
    found
}

type ExtremeRow<'a> = (Condition, &'static str, Option<&'a Extreme>);

/// The extremes over all, then those of each group that is not all.
fn extremes(line: &Governing) -> Vec<ExtremeRow<'_>> {
    let all = Condition::default();
    let mut rows = vec![
        (all.clone(), "largest", line.largest.as_ref()),
        (all, "smallest", line.smallest.as_ref()),
    ];
    for group in line.groups.iter().filter(|g| !g.condition.0.is_empty()) {
        rows.push((group.condition.clone(), "largest", group.largest.as_ref()));
        rows.push((group.condition.clone(), "smallest", group.smallest.as_ref()));
    }
    rows
}

fn same_extreme(old: Option<&Extreme>, new: Option<&Extreme>) -> bool {
    match (old, new) {
        (Some(a), Some(b)) => {
            same_number(a.value, b.value) && sorted(&a.condition) == sorted(&b.condition)
        }
        _ => old.is_none() && new.is_none(),
    }
}

fn requirements(old: &Report, new: &Report) -> Vec<RequirementDifference> {
    let pairs = paired(&old.requirements, &new.requirements, |r| r.text.as_str());
    let found = pairs.into_iter().filter_map(|(before, after)| {
        let text = before.or(after)?.text.clone();
        let [old, new] = [before, after].map(|r| r.map(verdict));
        let reserves = [&old, &new].map(|v| v.as_ref().and_then(|v| v.worst.as_ref()));
        let [a, b] = reserves;
        let same_unit = a.map(|w| &w.unit) == b.map(|w| &w.unit);
        if same_unit
            && old.as_ref().map(|v| v.met) == new.as_ref().map(|v| v.met)
            && same_worst(a, b)
        {
            return None;
        }
        let change = a.zip(b).and_then(|(a, b)| finite(b.reserve - a.reserve));
        Some(RequirementDifference {
            text,
            change: change.filter(|_| same_unit),
            old,
            new,
        })
    });
    found.collect()
}

fn verdict(line: &Requirement) -> Verdict {
    Verdict {
        met: line.met,
        worst: line.worst.clone(),
    }
}

/// The reserve is a difference, so it is the sides that are compared.
fn same_worst(old: Option<&WorstCondition>, new: Option<&WorstCondition>) -> bool {
    match (old, new) {
        (Some(a), Some(b)) => {
            same_number(a.left, b.left)
                && same_number(a.right, b.right)
                && sorted(&a.condition) == sorted(&b.condition)
        }
        _ => old.is_none() && new.is_none(),
    }
}

#[cfg(test)]
mod tests {
    use super::super::sample::sample;
    use super::*;

    #[test]
    fn a_report_does_not_differ_from_itself() {
        let report = sample().report();
        let found = differences(&report, &report);
        assert_eq!(found, Differences::default());
        assert_eq!(write(&found), "no difference\n");
    }

    #[test]
    fn what_differs_is_told_with_old_new_and_change() {
        let old = sample().report();
        let mut new = old.clone();
        new.quantities[0].values = Some(ValueList::Numbers(vec![Some(570.0)]));
        new.quantities[2].values = Some(ValueList::Numbers(vec![
            Some(-20.0 * (1.0 + 1e-13)),
            Some(1.0),
            Some(701.0),
            None,
        ]));
        new.quantities.remove(4);
        let extreme = new.governing[0].largest.as_mut().unwrap();
        extreme.value = 701.0;
        extreme.condition.0[1].1 = "aft".to_owned();
        let requirement = &mut new.requirements[0];
        requirement.met = Some(true);
        let worst = requirement.worst.as_mut().unwrap();
        worst.right = 710.0;
        worst.reserve = 10.0;
        assert_eq!(
            write(&differences(&old, &new)),
            "\
quantities
  W: 560 lb -> 570 lb, change 10 lb
  P at point A, cg aft: no value -> 1 lb
  P at point C, cg fwd: 700 lb -> 701 lb, change 1 lb
  name: only in the old sheet
  name: \"at \"\" -> no value
governing
  largest P: 700 lb at point C, cg fwd -> 701 lb at point C, cg aft, change 1 lb
requirements
  P <= W: not met, reserve -140 lb at point C, cg fwd -> met, reserve 10 lb at point C, cg fwd, change of reserve 150 lb
"
        );
    }

    #[test]
    fn the_order_of_axes_makes_no_difference() {
        let old = sample().report();
        let mut new = old.clone();
        new.axes.swap(0, 1);
        new.quantities[2].axes = vec!["cg".to_owned(), "point".to_owned()];
        new.quantities[2].values = Some(ValueList::Numbers(vec![
            Some(-20.0),
            Some(700.0),
            None,
            None,
        ]));
        assert_eq!(differences(&old, &new).quantities, []);
    }

    #[test]
    fn another_unit_is_a_difference_without_a_change() {
        let old = sample().report();
        let mut new = old.clone();
        new.quantities[0].unit = Some("N".to_owned());
        let found = differences(&old, &new);
        assert_eq!(found.quantities.len(), 1);
        assert_eq!(found.quantities[0].changes[0].change, None);
        assert!(write(&found).contains("W: 560 lb -> 560 N\n"));
    }
}
