//! How a value came about: its formula, the formula with numbers in, the result; then each thing it rests on, once,
//! down to inputs with their remarks.

mod columns;
mod line;
mod look;
mod numbers;
#[cfg(test)]
mod tests;
mod text;

pub use text::write;

use crate::check;
use crate::graph::Order;
use crate::names::Names;
use crate::program::{Kind, Program, QuantityId};
use crate::report::Condition;
use crate::run::Limits;
use crate::syntax::Tree;
use crate::used::UsedSheets;
use columns::{At, Columns};
use rustc_hash::FxHashMap;
use serde::Serialize;
use std::collections::VecDeque;

/// Most steps of a trail.
pub const STEPS_MOST: usize = 2_000;

/// The trail of a value.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Trail {
    /// The value asked for first, then what it rests on, each thing once, the nearest first.
    pub steps: Vec<Step>,
    /// Whether there were more than [`STEPS_MOST`].
    pub cut: bool,
}

/// What a step is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "lowercase")]
#[allow(missing_docs)]
pub enum StepKind {
    Input,
    Formula,
    Unknown,
    Axis,
}

/// A value of a trail.
#[derive(Clone, Debug, PartialEq, Serialize)]
#[serde(untagged)]
pub enum TrailValue {
    /// A number in the step's unit; `None` where there is no value.
    Number(Option<f64>),
    /// A condition.
    Condition(bool),
    /// A text.
    Text(String),
}

/// One line in one condition.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Step {
    /// Its symbol.
    pub symbol: String,
    /// The other sheet in which it stands, by the name it has here; `None` in this one.
    pub sheet: Option<String>,
    /// Its line there, from 1.
    pub line: u32,
    /// What it is.
    pub kind: StepKind,
    /// The condition, its own axes only.
    pub condition: Condition,
    /// The right side as typed; of a list or table the value or cell that counts here.
    pub formula: String,
    /// The right side with the numbers, each with its unit, in the place of symbols; `None` where it has no symbol.
    pub numbers: Option<String>,
    /// The result.
    pub value: TrailValue,
    /// The unit of the result.
    pub unit: Option<String>,
    /// The result as shown, with its unit.
    pub shown: String,
    /// The remark of the line or of the row.
    pub remark: Option<String>,
    /// What is to be said of its parts: the condition that supplied a largest value, the branch of an `if`, the
    /// points between which a value was taken, the body of an own function, what is left of an equation.
    pub notes: Vec<String>,
    /// The methods it calls.
    pub methods: Vec<Method>,
    /// The steps it rests on, by their place in the trail.
    pub rests_on: Vec<usize>,
}

/// A catalogue function that a step calls.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Method {
    /// Its name.
    pub function: &'static str,
    /// What it computes.
    pub what: &'static str,
    /// The method.
    pub method: &'static str,
    /// Where it holds.
    pub holds: &'static str,
    /// Where it was published.
    pub source: &'static str,
}

/// Why there is no trail.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum TrailError {
    /// Nothing has that symbol; the nearest that there is.
    UnknownSymbol(String, Option<String>),
    /// The symbol is a record; its fields.
    IsRecord(String, Vec<String>),
    /// No axis has that name.
    UnknownAxis(String),
    /// The axis has no such label.
    UnknownLabel(String, String),
}

impl std::fmt::Display for TrailError {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            TrailError::UnknownSymbol(symbol, None) => {
                write!(f, "the sheet has no symbol {symbol}")
            }
            TrailError::UnknownSymbol(symbol, Some(near)) => {
                write!(f, "the sheet has no symbol {symbol}; did you mean {near}?")
            }
            TrailError::IsRecord(symbol, fields) => write!(
                f,
                "{symbol} is a record; name one of its fields: {}",
                fields.join(", ")
            ),
            TrailError::UnknownAxis(axis) => write!(f, "the sheet has no axis {axis}"),
            TrailError::UnknownLabel(axis, label) => {
                write!(f, "the axis {axis} has no label {label}")
            }
        }
    }
}

/// The trail of a value of another sheet, asked for by the sheet's name, the symbol there and a condition.
pub type OtherTrail<'a> = &'a dyn Fn(&str, &str, &[(String, String)]) -> Option<Trail>;

/// What a trail is followed in.
#[derive(Clone, Copy)]
pub struct Followed<'a> {
    /// The text of the sheet.
    pub text: &'a str,
    /// Its tree.
    pub tree: &'a Tree,
    /// Its names.
    pub names: &'a Names,
    /// Its order.
    pub order: &'a Order,
    /// The other sheets it uses.
    pub used: &'a UsedSheets,
    /// What was checked.
    pub program: &'a Program,
    /// Limits of a run.
    pub limits: Limits,
    /// Trails in other sheets.
    pub other: OtherTrail<'a>,
}

/// Follows a value back. `wanted` names labels of axes; the axes that it leaves are taken where the value is largest in
/// magnitude.
///
/// # Errors
/// Says which symbol, axis or label there is not.
pub fn follow(
    sheet: &Followed<'_>,
    symbol: &str,
    wanted: &[(String, String)],
) -> Result<Trail, TrailError> {
    let asked = asked_for(sheet, symbol)?;
    let fixed = columns::labels(sheet.program, wanted)?;
    let statements = beneath(sheet, asked);
    let names = (sheet.names, sheet.order);
    let (program, trace) = check::trace(sheet.text, sheet.tree, names, sheet.used, &statements);
    let columns = Columns::of(program, &trace, &statements, sheet.limits);
    let at = columns.place(asked, &fixed);
    let walk = look::Walk {
        sheet,
        trace: &trace,
        columns: &columns,
    };
    Ok(gather(&walk, asked, at))
}

fn asked_for(sheet: &Followed<'_>, symbol: &str) -> Result<QuantityId, TrailError> {
    let quantities = &sheet.program.quantities;
    let found = quantities
        .iter()
        .position(|q| q.symbol == symbol && !matches!(q.kind, Kind::Record(_)));
    if let Some(at) = found {
        return Ok(QuantityId(at as u32));
    }
    let field = |s: &str| Some(s.strip_prefix(symbol)?.strip_prefix('.')?.to_string());
    let fields: Vec<String> = quantities.iter().filter_map(|q| field(&q.symbol)).collect();
    if !fields.is_empty() {
        return Err(TrailError::IsRecord(symbol.to_string(), fields));
    }
    let known = quantities.iter().map(|q| q.symbol.as_str());
    let nearest = crate::nearest::nearest(symbol, known);
    Err(TrailError::UnknownSymbol(symbol.to_string(), nearest))
}

/// The statements on which a quantity rests, its own among them.
fn beneath(sheet: &Followed<'_>, asked: QuantityId) -> Vec<bool> {
    let mut found = vec![false; sheet.tree.statements.len()];
    let first = sheet.program.quantities.get(asked.0 as usize);
    let mut open: Vec<usize> = first.map(|q| q.statement).into_iter().collect();
    while let Some(statement) = open.pop() {
        match found.get_mut(statement) {
            Some(known) if !*known => *known = true,
            _ => continue,
        }
        let edges = [&sheet.order.rests_on, &sheet.order.equations];
        for list in edges {
            open.extend(list.get(statement).into_iter().flatten());
        }
    }
    found
}

/// A step that is still to be made, or a trail of another sheet.
type Key = (QuantityId, Vec<(u8, usize)>);

/// The steps, the nearest first.
fn gather(walk: &look::Walk<'_>, asked: QuantityId, at: At) -> Trail {
    let mut places: FxHashMap<Key, usize> = FxHashMap::default();
    let mut trail = Trail {
        steps: Vec::new(),
        cut: false,
    };
    let mut made: Vec<Option<Step>> = vec![None];
    let mut queue = VecDeque::from([(asked, at.clone(), 0usize)]);
    places.insert(walk.columns.key(asked, &at), 0);
    let mut elsewhere: Vec<(usize, Trail)> = Vec::new();
    while let Some((quantity, at, place)) = queue.pop_front() {
        if let Some(other) = walk.elsewhere(quantity, &at) {
            elsewhere.push((place, other));
            continue;
        }
        let (mut step, rests) = walk.step(quantity, &at);
        for (quantity, at) in rests {
            let key = walk.columns.key(quantity, &at);
            let known = places.get(&key).copied();
            if known.is_none() && made.len() >= STEPS_MOST {
                trail.cut = true;
                continue;
            }
            let next = known.unwrap_or_else(|| {
                places.insert(key, made.len());
                made.push(None);
                queue.push_back((quantity, at, made.len() - 1));
                made.len() - 1
            });
            if next != place && !step.rests_on.contains(&next) {
                step.rests_on.push(next);
            }
        }
        if let Some(slot) = made.get_mut(place) {
            *slot = Some(step);
        }
    }
    for (place, other) in elsewhere {
        trail.cut |= other.cut;
        put_elsewhere(&mut made, place, other);
    }
    trail.steps = made.into_iter().flatten().collect();
    trail
}

/// Puts the steps of another sheet behind ours, those that stand here already left out.
fn put_elsewhere(made: &mut Vec<Option<Step>>, place: usize, other: Trail) {
    let mut places = Vec::with_capacity(other.steps.len());
    for (at, step) in other.steps.iter().enumerate() {
        let same = |known: &Option<Step>| {
            known.as_ref().is_some_and(|known| {
                known.sheet == step.sheet
                    && known.symbol == step.symbol
                    && known.condition == step.condition
            })
        };
        places.push(match made.iter().position(same) {
            _ if at == 0 => place,
            Some(known) => known,
            None => {
                made.push(None);
                made.len() - 1
            }
        });
        let target = places.last().copied().unwrap_or(place);
        if let Some(slot) = made.get_mut(target)
            && slot.is_none()
        {
            *slot = Some(step.clone());
            if let Some(step) = slot {
                // Numbers of the other trail until all of its places are known.
                step.rests_on.clear();
            }
        }
    }
    for (step, target) in other.steps.iter().zip(&places) {
        let rests: Vec<usize> = step
            .rests_on
            .iter()
            .filter_map(|at| places.get(*at).copied())
            .collect();
        if let Some(Some(slot)) = made.get_mut(*target) {
            slot.rests_on = rests;
        }
    }
}
