//! Picking values at positions of axes: by label, nearest, along straight lines, or along a smooth curve.

use super::feed::Feed;
use crate::axes::{AxisId, Shape};
use crate::missing::{lost, of_operands};
use crate::problem::Cause;
use crate::program::{Axis, PickMode};
use rustc_hash::FxHashMap;
use std::rc::Rc;

/// A position within this part of an axis's span of a point is that point.
const ON_POINT: f64 = 1e-9;

/// One selection with the positions of every condition.
struct Selector<'a> {
    points: Points,
    position: Feed<'a>,
    /// How far apart neighbours along the axis stand in the base.
    stride: usize,
}

/// The points of an axis, ready to be picked from.
struct Points {
    mode: PickMode,
    labels: FxHashMap<u64, usize>,
    /// The values of the axis in rising order, each with its index.
    values: Vec<(f64, usize)>,
}

/// A line of values along one axis, from which a position picks.
pub(super) struct Table {
    points: Points,
    values: Rc<Vec<f64>>,
}

impl Table {
    /// The table of a base that varies over the picked axis alone.
    pub(super) fn new(axes: &[Axis], axis: AxisId, mode: PickMode, values: Rc<Vec<f64>>) -> Self {
        Table {
            points: Points::new(axes, axis, mode),
            values,
        }
    }

    /// The value at a position.
    pub(super) fn value(&self, position: f64) -> f64 {
        let at = |index: usize| self.values.get(index).copied().unwrap_or(f64::NAN);
        self.points.value(position, at)
    }
}

/// Picks from a base for every condition of `out_shape`.
#[must_use]
pub(super) fn run(
    base: &[f64],
    base_shape: &Shape,
    selections: &[(AxisId, PickMode)],
    positions: Vec<Feed<'_>>,
    out_shape: &Shape,
    axes: &[Axis],
) -> Vec<f64> {
    let strides = base_shape.strides();
    let selectors: Vec<Selector<'_>> = selections
        .iter()
        .zip(positions)
        .map(|((axis, mode), position)| {
            Selector::new(axes, *axis, *mode, position, base_shape, &strides)
        })
        .collect();
    // Along an axis that is picked, the base is entered where the selection says, not where the condition stands.
    let mut steps = out_shape.strides_of(base_shape);
    for (step, axis) in steps.iter_mut().zip(&out_shape.axes) {
        if selections.iter().any(|(picked, _)| picked == axis) {
            *step = 0;
        }
    }
    (0..out_shape.conditions())
        .map(|condition| {
            let indices = out_shape.indices(condition);
            let offset = indices.iter().zip(&steps).map(|(i, s)| i * s).sum();
            value(base, offset, &selectors, condition)
        })
        .collect()
}

impl<'a> Selector<'a> {
    fn new(
        axes: &[Axis],
        axis: AxisId,
        mode: PickMode,
        position: Feed<'a>,
        base_shape: &Shape,
        strides: &[usize],
    ) -> Self {
        let stride = base_shape
            .position(axis)
            .and_then(|p| strides.get(p))
            .copied()
            .unwrap_or(0);
        Selector {
            points: Points::new(axes, axis, mode),
            position,
            stride,
        }
    }
}

impl Points {
    fn new(axes: &[Axis], axis: AxisId, mode: PickMode) -> Self {
        let axis = axes.get(axis.0 as usize);
        let labels = axis.map(|a| &a.label_texts[..]).unwrap_or_default();
        let labels = labels
            .iter()
            .enumerate()
            .map(|(i, t)| (u64::from(t.0), i))
            .collect();
        let values = axis.and_then(|a| a.values.as_deref()).unwrap_or_default();
        let mut values: Vec<(f64, usize)> = values.iter().copied().zip(0..).collect();
        values.sort_by(|a, b| a.0.total_cmp(&b.0));
        Points {
            mode,
            labels,
            values,
        }
    }

    /// The value at a position, each point's value being given by its index.
    fn value(&self, position: f64, at: impl Fn(usize) -> f64) -> f64 {
        if position.is_nan() {
            return of_operands(std::iter::once(position)).unwrap_or(position);
        }
        if self.mode == PickMode::Label {
            return match self.labels.get(&(position as u64)) {
                Some(index) => at(*index),
                None => lost(Cause::NoSuchLabel),
            };
        }
        along(self, position, at)
    }
}

fn value(base: &[f64], offset: usize, selectors: &[Selector<'_>], condition: usize) -> f64 {
    let Some((selector, rest)) = selectors.split_first() else {
        return base.get(offset).copied().unwrap_or(f64::NAN);
    };
    let position = selector.position.value(condition);
    let at = |index: usize| value(base, offset + index * selector.stride, rest, condition);
    selector.points.value(position, at)
}

/// The value at a position along an axis of numbers.
fn along(along: &Points, position: f64, at: impl Fn(usize) -> f64) -> f64 {
    let points = &along.values;
    let (Some(first), Some(last)) = (points.first(), points.last()) else {
        return lost(Cause::BeyondEnd);
    };
    let span = last.0 - first.0;
    let above = points.partition_point(|p| p.0 < position);
    let near = |i: usize| {
        points
            .get(i)
            .is_some_and(|p| (p.0 - position).abs() <= ON_POINT * span)
    };
    if near(above) {
        return at(points[above].1);
    }
    if above > 0 && near(above - 1) {
        return at(points[above - 1].1);
    }
    if above == 0 || above == points.len() {
        let end = if above == 0 { first } else { last };
        return match along.mode {
            PickMode::Held | PickMode::Nearest => at(end.1),
            _ => lost(Cause::BeyondEnd),
        };
    }
    let (low, high) = (points[above - 1], points[above]);
    match along.mode {
        PickMode::Nearest => at(if position - low.0 <= high.0 - position {
            low.1
        } else {
            high.1
        }),
        PickMode::Smooth => smooth(points, above, position, at),
        _ => {
            let (a, b) = (at(low.1), at(high.1));
            of_operands([a, b].into_iter())
                .unwrap_or_else(|| a + (b - a) * ((position - low.0) / (high.0 - low.0)) + 0.0)
        }
    }
}

/// Monotone cubic through the points: F. N. Fritsch and J. Butland, A Method for Constructing Local Monotone Piecewise
/// Cubic Interpolants, SIAM J. Sci. Stat. Comput. 5 (1984); at the ends the three-point slope, limited so that the
/// curve stays monotone.
fn smooth(points: &[(f64, usize)], above: usize, position: f64, at: impl Fn(usize) -> f64) -> f64 {
    let from = above.saturating_sub(2);
    let to = (above + 2).min(points.len());
    let near: Vec<(f64, f64)> = points[from..to].iter().map(|p| (p.0, at(p.1))).collect();
    let k = above - 1 - from;
    // The interval's own ends must have values; a neighbour without one leaves the end as if it were the last.
    if let Some(missing) = of_operands([near[k].1, near[k + 1].1].into_iter()) {
        return missing;
    }
    let h = near[k + 1].0 - near[k].0;
    let s = (near[k + 1].1 - near[k].1) / h;
    let (left, right) = (slope_at(&near, k), slope_at(&near, k + 1));
    let t = (position - near[k].0) / h;
    let u = 1.0 - t;
    let value = near[k].1 * u * u * (1.0 + 2.0 * t)
        + near[k + 1].1 * t * t * (1.0 + 2.0 * u)
        + h * t * u * (left * u - right * t);
    let value = if s == 0.0 { near[k].1 } else { value };
    if value.is_finite() {
        value + 0.0
    } else {
        lost(Cause::Overflow)
    }
}

fn slope_at(near: &[(f64, f64)], i: usize) -> f64 {
    let chord = |j: usize| {
        let (a, b) = (near.get(j)?, near.get(j + 1)?);
        let slope = (b.1 - a.1) / (b.0 - a.0);
        slope.is_finite().then_some((b.0 - a.0, slope))
    };
    let before = i.checked_sub(1).and_then(chord);
    match (before, chord(i)) {
        (Some((h0, s0)), Some((h1, s1))) => {
            if s0 * s1 <= 0.0 {
                return 0.0;
            }
            let (w0, w1) = (2.0 * h1 + h0, h1 + 2.0 * h0);
            (w0 + w1) / (w0 / s0 + w1 / s1)
        }
        (None, Some((h0, s0))) => end_slope(h0, s0, chord(i + 1)),
        (Some((h0, s0)), None) => end_slope(h0, s0, i.checked_sub(2).and_then(chord)),
        (None, None) => 0.0,
    }
}

fn end_slope(h0: f64, s0: f64, next: Option<(f64, f64)>) -> f64 {
    let Some((h1, s1)) = next else { return s0 };
    let slope = ((2.0 * h0 + h1) * s0 - h0 * s1) / (h0 + h1);
    if slope * s0 <= 0.0 {
        0.0
    } else if s0 * s1 <= 0.0 && slope.abs() > 3.0 * s0.abs() {
        3.0 * s0
    } else {
        slope
    }
}
