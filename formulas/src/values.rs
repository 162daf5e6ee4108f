//! The values: what `run` found for every quantity, and what governs. SI throughout; only `report` turns to units.

use crate::axes::Shape;
use crate::problem::Conditions;
use std::rc::Rc;

/// A value left out by nobody's intent: bits of a NaN, so that a column stays a plain list of numbers.
const NONE_BITS: u64 = 0x7ff8_0000_0000_0001;
/// A value left out on purpose.
const EXCLUDED_BITS: u64 = 0x7ff8_0000_0000_0002;

/// A missing value.
pub const NONE: f64 = f64::from_bits(NONE_BITS);
/// A value left out on purpose.
pub const EXCLUDED: f64 = f64::from_bits(EXCLUDED_BITS);

/// Whether a value was left out on purpose. Anything else that is no number is a missing value.
#[must_use]
pub fn is_excluded(value: f64) -> bool {
    value.to_bits() == EXCLUDED_BITS
}

/// The values of a line over its own axes, row-major in axis order. `NONE` and `EXCLUDED` stand in for values.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Column {
    /// Its axes.
    pub shape: Shape,
    /// One value for each condition.
    pub values: Rc<Vec<f64>>,
}

/// Everything that was worked out.
#[derive(Clone, Debug, Default)]
pub struct Values {
    /// In the order of `Program::quantities`.
    pub quantities: Vec<QuantityValues>,
    /// In the order of `Program::governing`.
    pub governing: Vec<GoverningValues>,
    /// In the order of `Program::requirements`.
    pub requirements: Vec<RequirementValues>,
    /// In the order of `Program::freebodies`.
    pub freebodies: Vec<FreebodyValues>,
    /// In the order of `Program::figures`.
    pub figures: Vec<FigureValues>,
}

/// The columns of a figure; `None` where a line that it rests on failed.
#[derive(Clone, Debug, Default)]
pub struct FigureValues {
    /// What it is drawn against.
    pub x: Option<Column>,
    /// What is drawn, in the order of the statement.
    pub curves: Vec<Option<Column>>,
}

/// The values of one quantity.
#[derive(Clone, Debug, Default)]
pub struct QuantityValues {
    /// Its axes, also where the column is not kept.
    pub shape: Shape,
    /// The column; `None` where the line failed or the column was too large to keep.
    pub column: Option<Column>,
    /// Whether the line has values at all.
    pub known: bool,
    /// Counts and extremes.
    pub summary: Summary,
    /// The sum of the effects of all tolerances, condition by condition.
    pub worst: Option<Vec<f64>>,
    /// The root of the sum of the squared effects.
    pub rss: Option<Vec<f64>>,
}

/// Counts and extremes of a column.
#[derive(Clone, Copy, PartialEq, Debug, Default)]
pub struct Summary {
    /// Conditions without value, `excluded` not among them.
    pub without_value: u64,
    /// Conditions left out on purpose.
    pub excluded: u64,
    /// The largest value and its condition; the first of equals.
    pub largest: Option<Extreme>,
    /// The smallest.
    pub smallest: Option<Extreme>,
}

/// A value and where it stands.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Extreme {
    /// The value.
    pub value: f64,
    /// Its condition, in the numbering of the quantity's own shape.
    pub condition: usize,
}

/// What governs.
#[derive(Clone, Debug, Default)]
pub struct GoverningValues {
    /// Over all conditions.
    pub all: Summary,
    /// For each condition of the axes not named, in condition order of `group_shape`.
    pub groups: Vec<Summary>,
    /// The axes not named.
    pub group_shape: Shape,
    /// What tolerances do to the largest value.
    pub largest: Sensitivity,
    /// What they do to the smallest.
    pub smallest: Sensitivity,
}

/// What the tolerances of inputs do to a governing value or to the reserve of a requirement.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Sensitivity {
    /// The tolerances by effect, the largest first; none without effect.
    pub ranked: Vec<Influence>,
    /// The worst that the ends of the first eight come to, combined in every way.
    pub corner: Option<Corner>,
    /// Other conditions that govern in some corner.
    pub others: Vec<usize>,
}

/// The effect of one tolerance: the larger change with the input at either end.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Influence {
    /// Which of `Program::tolerances`.
    pub tolerance: usize,
    /// The larger change, in SI.
    pub effect: f64,
}

/// A corner of the tolerances.
#[derive(Clone, Debug, PartialEq)]
pub struct Corner {
    /// By which corners are compared; the largest is the worst.
    pub rank: f64,
    /// The value or reserve there, in SI.
    pub value: f64,
    /// The condition that governs there.
    pub condition: usize,
    /// The tolerances that were moved, and whether upwards.
    pub moves: Vec<(usize, bool)>,
}

/// How a requirement fared.
#[derive(Clone, Debug, Default)]
pub struct RequirementValues {
    /// Axes of the requirement.
    pub shape: Shape,
    /// `None` where some condition could not be judged and none failed, or the line has no value.
    pub met: Option<bool>,
    /// Conditions in which it is not met.
    pub not_met: u64,
    /// Conditions in which it could not be judged.
    pub without_value: u64,
    /// Conditions left out on purpose.
    pub excluded: u64,
    /// The condition of least reserve.
    pub worst: Option<WorstCondition>,
    /// The same judged with all tolerances at their worst; `None` without tolerances.
    pub met_at_worst: Option<bool>,
    /// What tolerances do to the least reserve.
    pub sensitivity: Sensitivity,
}

/// The condition of a requirement that has the least reserve.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct WorstCondition {
    /// Which of the comparisons.
    pub part: usize,
    /// In the numbering of the requirement's shape.
    pub condition: usize,
    /// Left side there.
    pub left: f64,
    /// Right side there.
    pub right: f64,
}

/// How a free body fared.
#[derive(Clone, Debug, Default)]
pub struct FreebodyValues {
    /// Axes of the free body.
    pub shape: Shape,
    /// Whether it was worked out at all.
    pub known: bool,
    /// Whether the sums close in every condition.
    pub closes: bool,
    /// The symbol that takes up a trial amount, where the force sum closes by construction.
    pub taken_up_by: Option<String>,
    /// Largest force sum over the sum of magnitudes.
    pub force_residual: f64,
    /// The same along the axis.
    pub axial_residual: f64,
    /// The same for moments about the first station and height.
    pub moment_residual: f64,
    /// The condition in which the sums are farthest from closing.
    pub worst: Option<usize>,
    /// Conditions in which it does not close.
    pub open: Conditions,
    /// Conditions in which it could not be judged.
    pub without_value: u64,
    /// The condition that is drawn, with its values.
    pub drawn: Option<FreebodyDrawn>,
}

/// A free body in one condition, in SI.
#[derive(Clone, Debug, PartialEq)]
pub struct FreebodyDrawn {
    /// In the numbering of the free body's shape.
    pub condition: usize,
    /// Value and station of each entry; 0 for the station of a couple.
    pub items: Vec<(f64, f64)>,
    /// Sum of the forces across.
    pub force: f64,
    /// Sum of the axial forces.
    pub axial: f64,
    /// Sum of the moments about the first station and height.
    pub moment: f64,
}
