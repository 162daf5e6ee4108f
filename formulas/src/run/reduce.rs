//! Reductions over axes. Values are taken in condition order; missing ones are skipped.

use crate::axes::{AxisId, AxisSet, Shape};
use crate::program::{Axis, Reduction};
use crate::values::{EXCLUDED, NONE, is_excluded};
use engine::numeric::Sum;

/// What one result has gathered so far.
#[derive(Clone)]
struct Gathered {
    sum: Sum,
    count: u64,
    excluded: u64,
    missing: u64,
    best: f64,
    place: usize,
}

/// A reduction that takes its values in condition order.
pub(super) struct Reducer<'a> {
    how: Reduction,
    gathered: Vec<Gathered>,
    walk: Walk,
    along: Option<usize>,
    axes: &'a [Axis],
}

/// A walk over conditions that knows the condition of fewer axes to which each belongs.
pub(super) struct Walk {
    lengths: Vec<usize>,
    strides: Vec<usize>,
    indices: Vec<usize>,
    place: usize,
}

impl Walk {
    pub(super) fn new(shape: &Shape, inner: &Shape) -> Self {
        Walk {
            lengths: shape.lengths.clone(),
            strides: shape.strides_of(inner),
            indices: vec![0; shape.lengths.len()],
            place: 0,
        }
    }

    /// The condition of fewer axes to which the condition in hand belongs.
    pub(super) fn place(&self) -> usize {
        self.place
    }

    /// Goes on to the next condition.
    pub(super) fn step(&mut self) {
        for at in (0..self.indices.len()).rev() {
            self.indices[at] += 1;
            self.place += self.strides[at];
            if self.indices[at] < self.lengths[at] {
                break;
            }
            self.place -= self.strides[at] * self.indices[at];
            self.indices[at] = 0;
        }
    }
}

impl<'a> Reducer<'a> {
    pub(super) fn new(
        how: Reduction,
        shape: &Shape,
        over: AxisSet,
        out_shape: &Shape,
        axes: &'a [Axis],
    ) -> Self {
        let empty = Gathered {
            sum: Sum::default(),
            count: 0,
            excluded: 0,
            missing: 0,
            best: f64::NAN,
            place: 0,
        };
        Reducer {
            how,
            gathered: vec![empty; out_shape.conditions()],
            walk: Walk::new(shape, out_shape),
            along: over.iter().next().and_then(|a| shape.position(a)),
            axes,
        }
    }

    /// Takes the next values.
    pub(super) fn take(&mut self, values: impl Iterator<Item = f64>) {
        for value in values {
            if let Some(result) = self.gathered.get_mut(self.walk.place()) {
                gather(
                    result,
                    self.how,
                    value,
                    self.along.map_or(0, |a| self.walk.indices[a]),
                );
            }
            self.walk.step();
        }
    }

    /// The results.
    pub(super) fn finish(&self) -> Vec<f64> {
        self.gathered
            .iter()
            .map(|g| settle(g, self.how, self.axes))
            .collect()
    }
}

fn gather(result: &mut Gathered, how: Reduction, value: f64, along: usize) {
    if value.is_nan() {
        if is_excluded(value) {
            result.excluded += 1
        } else {
            result.missing += 1
        }
        return;
    }
    let better = match how {
        Reduction::Max | Reduction::WhereMax(_) => value > result.best,
        Reduction::Min | Reduction::WhereMin(_) => value < result.best,
        _ => false,
    };
    if result.count == 0 || better {
        result.best = value;
        result.place = along;
    }
    result.count += 1;
    match how {
        Reduction::Sum | Reduction::Mean => result.sum.add(value),
        Reduction::Rms => result.sum.add(value * value),
        Reduction::CountTrue | Reduction::All | Reduction::Any => {
            result.sum.add(f64::from(u8::from(value != 0.0)));
        }
        _ => {}
    }
}

fn settle(g: &Gathered, how: Reduction, axes: &[Axis]) -> f64 {
    let count = g.count as f64;
    if matches!(how, Reduction::Count) {
        return count;
    }
    if matches!(how, Reduction::CountTrue) {
        return g.sum.total();
    }
    if g.count == 0 {
        return if g.excluded > 0 && g.missing == 0 {
            EXCLUDED
        } else {
            NONE
        };
    }
    let result = match how {
        Reduction::Max | Reduction::Min => g.best,
        Reduction::Sum => g.sum.total(),
        Reduction::Mean => g.sum.total() / count,
        Reduction::Rms => (g.sum.total() / count).sqrt(),
        Reduction::All => f64::from(u8::from(g.sum.total() == count)),
        Reduction::Any => f64::from(u8::from(g.sum.total() > 0.0)),
        Reduction::WhereMax(axis) | Reduction::WhereMin(axis) => point(axes, axis, g.place),
        Reduction::Count | Reduction::CountTrue => count,
    };
    if result.is_finite() {
        result + 0.0
    } else {
        crate::missing::lost(crate::problem::Cause::Overflow)
    }
}

/// A point of an axis as a value: the text of its label, or its number.
fn point(axes: &[Axis], axis: AxisId, at: usize) -> f64 {
    let Some(axis) = axes.get(axis.0 as usize) else {
        return NONE;
    };
    match &axis.values {
        Some(values) => values.get(at).copied().unwrap_or(NONE),
        None => axis.label_texts.get(at).map_or(NONE, |t| f64::from(t.0)),
    }
}
