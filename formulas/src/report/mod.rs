//! The report: plain public structs that say what a sheet gives, in the units shown. Built once from the values, then
//! written as JSON, CSV or text; the page gets the same structs.

mod build;
pub mod cautions;
pub mod compare;
mod convert;
pub mod csv;
mod figure;
pub mod form;
pub mod html;
pub mod json;
mod requirement;
#[cfg(test)]
mod sample;
mod sensitivity;
pub mod svg;
pub mod text;

pub(crate) use build::quantity_named;
pub use build::{Input, build, drawings};
pub(crate) use convert::{Scale, condition};
pub use form::{Form, FormRow, form};

use crate::diagnostics::Finding;
use serde::ser::{Serialize, SerializeMap, Serializer};

/// Number of the JSON format.
pub const FORMAT: u32 = 1;
/// Most conditions for which all values are written without being asked for.
pub const WRITTEN_MOST: usize = 10_000;

/// What a sheet gives.
#[derive(Clone, Debug, serde::Serialize)]
pub struct Report {
    /// Number of the format, [`FORMAT`].
    pub format: u32,
    /// Version of the engine.
    pub engine: &'static str,
    /// SHA-256 of the text, 64 lower-case hexadecimal digits.
    pub digest: String,
    /// The title block.
    pub sheet: TitleBlock,
    /// The other sheets that this one rests on, by their names: the digest of this one says nothing of them.
    pub sheets: Vec<OtherSheet>,
    /// The axes in the order of the sheet.
    pub axes: Vec<Axis>,
    /// Everything with a name and a value, in the order of the sheet.
    pub quantities: Vec<Quantity>,
    /// What governs, one entry for each symbol of each `governing` statement.
    pub governing: Vec<Governing>,
    /// How the requirements fared.
    pub requirements: Vec<Requirement>,
    /// How the free bodies fared.
    pub freebodies: Vec<Freebody>,
    /// The figures.
    pub figures: Vec<Figure>,
    /// The findings, by line, column and code.
    pub findings: Vec<Finding>,
    /// Significant figures shown, 1 to 15; for text and page, not part of the JSON.
    #[serde(skip)]
    pub digits: u8,
}

impl Report {
    /// The first 16 digits of the digest, as printed on a page.
    #[must_use]
    pub fn short_digest(&self) -> &str {
        self.digest.get(..16).unwrap_or(&self.digest)
    }

    /// The quantity of that symbol.
    #[must_use]
    pub fn quantity(&self, symbol: &str) -> Option<&Quantity> {
        self.quantities.iter().find(|q| q.symbol == symbol)
    }

    /// Whether every requirement is met; `false` also where one is not shown.
    #[must_use]
    pub fn all_met(&self) -> bool {
        self.requirements.iter().all(|r| r.met == Some(true))
    }
}

/// Another sheet as it was when this one was worked out.
#[derive(Clone, Debug, PartialEq, Eq, serde::Serialize)]
pub struct OtherSheet {
    /// Its name.
    pub name: String,
    /// SHA-256 of its text.
    pub digest: String,
}

/// The lines of the title block that the sheet has, as typed.
#[derive(Clone, Debug, Default, PartialEq, Eq, serde::Serialize)]
#[serde(default)]
#[allow(missing_docs)]
pub struct TitleBlock {
    #[serde(skip_serializing_if = "Option::is_none")]
    pub title: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub revision: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub date: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub prepared: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub checked: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub basis: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub digits: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub units: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub sources: Option<String>,
}

/// A condition: for each axis, in order, the axis and the label. An object in JSON.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Condition(pub Vec<(String, String)>);

impl Serialize for Condition {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(Some(self.0.len()))?;
        for (axis, label) in &self.0 {
            map.serialize_entry(axis, label)?;
        }
        map.end()
    }
}

/// An axis.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Axis {
    /// Its name.
    pub name: String,
    /// Its labels; of an axis of numbers the values as shown.
    pub labels: Vec<String>,
    /// Unit of the values; `None` for labels and for pure numbers.
    pub unit: Option<String>,
    /// The values in `unit`, of an axis of numbers.
    pub values: Option<Vec<f64>>,
}

/// What kind of values a quantity has.
#[derive(Clone, Copy, Debug, PartialEq, Eq, serde::Serialize)]
#[serde(rename_all = "lowercase")]
#[allow(missing_docs)]
pub enum QuantityKind {
    Number,
    Condition,
    Text,
}

/// The values of a quantity, row-major over its axes; `None` where there is none.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
#[serde(untagged)]
#[allow(missing_docs)]
pub enum ValueList {
    Numbers(Vec<Option<f64>>),
    Conditions(Vec<Option<bool>>),
    Texts(Vec<Option<String>>),
}

impl ValueList {
    /// How many conditions.
    #[must_use]
    pub fn len(&self) -> usize {
        match self {
            ValueList::Numbers(list) => list.len(),
            ValueList::Conditions(list) => list.len(),
            ValueList::Texts(list) => list.len(),
        }
    }

    /// Whether there is no condition.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.len() == 0
    }
}

/// A value in the unit shown and where it stands.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Extreme {
    /// The value.
    pub value: f64,
    /// Its condition.
    pub condition: Condition,
}

/// What the tolerances do to a quantity, condition by condition, in its unit (a difference: no offset).
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Spread {
    /// The sum of the effects.
    pub worst: Vec<Option<f64>>,
    /// The root of the sum of their squares.
    pub rss: Vec<Option<f64>>,
}

/// A named value.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Quantity {
    /// Its symbol; of a record's field `air.density`.
    pub symbol: String,
    /// Line of its statement, from 1.
    pub line: u32,
    /// Kind of its values.
    pub kind: QuantityKind,
    /// The unit shown; `None` for a pure number, a condition or text.
    pub unit: Option<String>,
    /// Names of its axes in order.
    pub axes: Vec<String>,
    /// How many conditions.
    pub conditions: usize,
    /// Conditions without value, `excluded` not among them.
    pub without_value: u64,
    /// Conditions left out on purpose.
    pub excluded: u64,
    /// All values, where there are at most [`WRITTEN_MOST`] or they were asked for.
    pub values: Option<ValueList>,
    /// The largest number.
    pub largest: Option<Extreme>,
    /// The smallest number.
    pub smallest: Option<Extreme>,
    /// What the tolerances do, where there are any; left out together with `values`.
    pub spread: Option<Spread>,
    /// Whether it is an input.
    pub input: bool,
    /// Remark of its line.
    pub remark: Option<String>,
    /// The part under which it stands.
    pub part: Option<String>,
}

/// What governs a symbol.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Governing {
    /// The symbol.
    pub symbol: String,
    /// Line of the statement, from 1.
    pub line: u32,
    /// Its unit.
    pub unit: Option<String>,
    /// Names of the axes over which the extremes are sought.
    pub over: Vec<String>,
    /// How many conditions there were.
    pub conditions: usize,
    /// Those without value.
    pub without_value: u64,
    /// Those left out on purpose.
    pub excluded: u64,
    /// The largest of all.
    pub largest: Option<Extreme>,
    /// The smallest of all.
    pub smallest: Option<Extreme>,
    /// The extremes for each condition of the axes that are left.
    pub groups: Vec<GoverningGroup>,
    /// The inputs with tolerances by effect, the largest first; empty without tolerances.
    pub sensitivity: Vec<GoverningSensitivity>,
    /// The worst corner of the tolerances for either extreme; empty without tolerances.
    pub corners: Vec<GoverningCorner>,
    /// Whether another condition could govern within the tolerances; empty where none can.
    pub others: Vec<GoverningOthers>,
}

/// What the worst corner of the tolerances comes to: the ends of up to eight inputs, combined in every way.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct GoverningCorner {
    /// `largest` or `smallest`.
    pub of: &'static str,
    /// The value there, in the unit of the governed symbol.
    pub value: f64,
    /// The condition that governs there.
    pub condition: Condition,
    /// To which end each input is moved.
    pub inputs: Vec<CornerInput>,
}

/// Other conditions that could govern: with all tolerances at their worst they come as far as the governing one.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct GoverningOthers {
    /// `largest` or `smallest`.
    pub of: &'static str,
    /// At most the first hundred.
    pub conditions: Vec<Condition>,
}

/// An input of a corner.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct CornerInput {
    /// The input.
    pub symbol: String,
    /// Where in a list the input stands.
    pub condition: Condition,
    /// `+` or `-`.
    pub end: &'static str,
}

/// What governs under one condition of the axes left.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct GoverningGroup {
    /// The condition of the axes left.
    pub condition: Condition,
    /// The largest.
    pub largest: Option<Extreme>,
    /// The smallest.
    pub smallest: Option<Extreme>,
}

/// Effect of one input on a governing value.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct GoverningSensitivity {
    /// `largest` or `smallest`.
    pub of: &'static str,
    /// The input.
    pub symbol: String,
    /// Where in a list the input stands.
    pub condition: Condition,
    /// The larger change, in the unit of the governed symbol.
    pub effect: f64,
    /// Part of the sum of all effects.
    pub share: f64,
}

/// How a requirement fared.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Requirement {
    /// Its line, from 1.
    pub line: u32,
    /// The condition as typed.
    pub text: String,
    /// The remark of the line.
    pub reason: Option<String>,
    /// Met, not met, or (`None`) not shown.
    pub met: Option<bool>,
    /// How many conditions there were.
    pub conditions: usize,
    /// Those in which it is not met.
    pub not_met: u64,
    /// Those in which it could not be judged.
    pub without_value: u64,
    /// The condition of least reserve; `None` for a requirement that is no comparison.
    pub worst: Option<WorstCondition>,
    /// The same with all tolerances at their worst; `None` without tolerances.
    pub met_at_worst: Option<bool>,
    /// The inputs with tolerances by effect on the reserve; empty without tolerances.
    pub sensitivity: Vec<RequirementSensitivity>,
    /// The worst corner of the tolerances; `None` without tolerances.
    pub corner: Option<RequirementCorner>,
}

/// What the worst corner of the tolerances comes to for a requirement.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct RequirementCorner {
    /// The least reserve, in the unit of the requirement.
    pub reserve: f64,
    /// The condition in which it stands.
    pub condition: Condition,
    /// To which end each input is moved.
    pub inputs: Vec<CornerInput>,
}

/// The condition of least reserve.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct WorstCondition {
    /// The condition.
    pub condition: Condition,
    /// Left side, in `unit`.
    pub left: f64,
    /// Right side, in `unit`.
    pub right: f64,
    /// Unit of both sides.
    pub unit: Option<String>,
    /// Distance to the limit in `unit`, positive where met.
    pub reserve: f64,
    /// Allowable over applied, minus one; `None` where it would mean nothing.
    pub margin: Option<f64>,
}

/// Effect of one input on the reserve of a requirement.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct RequirementSensitivity {
    /// The input.
    pub symbol: String,
    /// Where in a list the input stands.
    pub condition: Condition,
    /// The larger change of the reserve, in the unit of the requirement.
    pub effect: f64,
    /// Part of the sum of all effects.
    pub share: f64,
}

/// How a free body fared.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Freebody {
    /// Its name.
    pub name: String,
    /// Its line, from 1.
    pub line: u32,
    /// Whether the sums close in every condition; `None` where they could not be worked out.
    pub closes: Option<bool>,
    /// Whether a symbol takes up whatever is added to another, so that the force sum cannot fail to close.
    pub by_construction: bool,
    /// Largest force sum over the sum of magnitudes.
    pub force_residual: f64,
    /// The same along the axis.
    pub axial_residual: f64,
    /// The same for moments about the first station and height.
    pub moment_residual: f64,
    /// The condition in which the sums are farthest from closing.
    pub worst: Option<Condition>,
    /// Forces across, up positive.
    pub forces: Vec<FreebodyForce>,
    /// Axial forces, aft positive; their station is the height.
    pub axials: Vec<FreebodyForce>,
    /// Couples, nose up positive.
    pub couples: Vec<FreebodyCouple>,
    /// The drawing: forces at their stations in the condition of the largest governed one; `None` where no condition has
    /// all values.
    pub svg: Option<String>,
    /// The symbol that takes it up; for text and page, not part of the JSON.
    #[serde(skip)]
    pub taken_up_by: Option<String>,
}

/// A force of a free body.
#[derive(Clone, Debug, PartialEq, Eq, serde::Serialize)]
pub struct FreebodyForce {
    /// The force as typed.
    pub text: String,
    /// The symbol, where the entry is nothing but one.
    pub quantity: Option<String>,
    /// The station or height as typed.
    pub station: String,
}

/// A couple of a free body.
#[derive(Clone, Debug, PartialEq, Eq, serde::Serialize)]
pub struct FreebodyCouple {
    /// The couple as typed.
    pub text: String,
    /// The symbol, where the entry is nothing but one.
    pub quantity: Option<String>,
}

/// A figure.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct Figure {
    /// Its name.
    pub name: String,
    /// Its line, from 1.
    pub line: u32,
    /// What it is drawn against.
    pub x: FigureAxis,
    /// Its curves.
    pub curves: Vec<FigureCurve>,
    /// Whether the points of each curve are joined into an outline.
    pub closed: bool,
    /// The drawing.
    pub svg: String,
}

/// What a figure is drawn against.
#[derive(Clone, Debug, PartialEq, Eq, serde::Serialize)]
pub struct FigureAxis {
    /// The symbol.
    pub symbol: String,
    /// Its unit.
    pub unit: Option<String>,
}

/// A curve of a figure.
#[derive(Clone, Debug, PartialEq, serde::Serialize)]
pub struct FigureCurve {
    /// The symbol drawn.
    pub symbol: String,
    /// Its unit.
    pub unit: Option<String>,
    /// The labels of `each` for which it is drawn.
    pub condition: Condition,
    /// Values of the symbol it is drawn against.
    pub x: ValueList,
    /// Values of the symbol drawn.
    pub y: ValueList,
    /// The label of each point along the axis of the curve; for drawing, not part of the JSON.
    #[serde(skip)]
    pub points: Vec<String>,
}
