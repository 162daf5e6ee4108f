//! Named axes: sets of them, their shapes, and the numbering of conditions (row-major in axis order).

use std::ops::Deref;
use std::rc::Rc;

/// Number of an axis, in the order in which the sheet declares them.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, PartialOrd, Ord)]
pub struct AxisId(pub u8);

/// Most axes that a sheet may have.
pub const AXES_MOST: usize = 64;

/// A set of axes.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, Default)]
pub struct AxisSet(pub u64);

impl AxisSet {
    /// No axis: a single value.
    pub const NONE: AxisSet = AxisSet(0);

    /// The set of one axis.
    #[must_use]
    pub fn of(axis: AxisId) -> Self {
        AxisSet(1 << axis.0)
    }

    /// Both together.
    #[must_use]
    pub fn with(self, other: AxisSet) -> Self {
        AxisSet(self.0 | other.0)
    }

    /// Those of this set that are not in the other.
    #[must_use]
    pub fn without(self, other: AxisSet) -> Self {
        AxisSet(self.0 & !other.0)
    }

    /// Those in both.
    #[must_use]
    pub fn common(self, other: AxisSet) -> Self {
        AxisSet(self.0 & other.0)
    }

    /// Whether the axis is in the set.
    #[must_use]
    pub fn has(self, axis: AxisId) -> bool {
        self.0 & (1 << axis.0) != 0
    }

    /// Whether all of the other's axes are in this set.
    #[must_use]
    pub fn holds(self, other: AxisSet) -> bool {
        other.0 & !self.0 == 0
    }

    /// Whether the set is empty.
    #[must_use]
    pub fn is_empty(self) -> bool {
        self.0 == 0
    }

    /// How many axes.
    #[must_use]
    pub fn count(self) -> u32 {
        self.0.count_ones()
    }

    /// The axes in their order.
    pub fn iter(self) -> impl DoubleEndedIterator<Item = AxisId> {
        Members(self.0)
    }
}

/// The axes of a set, from either end.
struct Members(u64);

impl Iterator for Members {
    type Item = AxisId;

    fn next(&mut self) -> Option<AxisId> {
        let first = self.0.trailing_zeros();
        self.0 &= self.0.wrapping_sub(1);
        (first < 64).then_some(AxisId(first as u8))
    }
}

impl DoubleEndedIterator for Members {
    fn next_back(&mut self) -> Option<AxisId> {
        let last = 63u32.checked_sub(self.0.leading_zeros())?;
        self.0 &= !(1 << last);
        Some(AxisId(last as u8))
    }
}

/// The axes of a column with their lengths. Many columns share one, so that a copy costs nothing.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Shape(Rc<Dimensions>);

/// What a shape consists of.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Dimensions {
    /// The axes in order.
    pub axes: Vec<AxisId>,
    /// Their lengths.
    pub lengths: Vec<usize>,
}

impl Deref for Shape {
    type Target = Dimensions;

    fn deref(&self) -> &Dimensions {
        &self.0
    }
}

impl Shape {
    /// The shape of a set, given the length of every axis of the sheet.
    #[must_use]
    pub fn of(set: AxisSet, lengths: &[usize]) -> Self {
        let axes: Vec<AxisId> = set.iter().collect();
        let lengths = axes
            .iter()
            .map(|a| lengths.get(a.0 as usize).copied().unwrap_or(1))
            .collect();
        Shape(Rc::new(Dimensions { axes, lengths }))
    }

    /// How many conditions.
    #[must_use]
    pub fn conditions(&self) -> usize {
        self.lengths.iter().product()
    }

    /// How many conditions, as a number that cannot run over.
    #[must_use]
    pub fn conditions_f64(&self) -> f64 {
        self.lengths.iter().map(|n| *n as f64).product()
    }

    /// For each axis, how far apart its neighbours stand.
    #[must_use]
    pub fn strides(&self) -> Vec<usize> {
        let mut strides = vec![1; self.lengths.len()];
        for i in (1..self.lengths.len()).rev() {
            strides[i - 1] = strides[i] * self.lengths[i];
        }
        strides
    }

    /// Position of an axis in the shape.
    #[must_use]
    pub fn position(&self, axis: AxisId) -> Option<usize> {
        self.axes.iter().position(|a| *a == axis)
    }

    /// The shape without an axis.
    #[must_use]
    pub fn without(&self, axis: Option<AxisId>) -> Self {
        let left = self
            .axes
            .iter()
            .zip(&self.lengths)
            .filter(|(a, _)| Some(**a) != axis);
        let (axes, lengths) = left.map(|(a, n)| (*a, *n)).unzip();
        Shape(Rc::new(Dimensions { axes, lengths }))
    }

    /// How far apart neighbours along an axis stand where it is put in its place among these.
    #[must_use]
    pub fn stride_before(&self, axis: AxisId) -> usize {
        let behind = self
            .axes
            .iter()
            .zip(&self.lengths)
            .filter(|(a, _)| **a > axis);
        behind.map(|(_, n)| n).product()
    }

    /// The labels of a condition: the index along each axis.
    #[must_use]
    pub fn indices(&self, mut condition: usize) -> Vec<usize> {
        let mut out = vec![0; self.lengths.len()];
        for i in (0..self.lengths.len()).rev() {
            let n = self.lengths[i].max(1);
            out[i] = condition % n;
            condition /= n;
        }
        out
    }

    /// Strides of `inner` along each axis of `self`: 0 where `inner` does not vary over it.
    #[must_use]
    pub fn strides_of(&self, inner: &Shape) -> Vec<usize> {
        let strides = inner.strides();
        self.axes
            .iter()
            .map(|a| inner.position(*a).map_or(0, |p| strides[p]))
            .collect()
    }
}

/// How a column of fewer axes is read along the conditions of more: lengths and strides of the axes, neighbours that are
/// both repeated or both stepped through being one, outermost first.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Runs(Rc<[(usize, usize)]>);

impl Runs {
    /// A column of shape `inner`, read along `outer`.
    #[must_use]
    pub fn new(inner: &Shape, outer: &Shape) -> Self {
        let strides = outer.strides_of(inner);
        let mut runs: Vec<(usize, usize)> = Vec::new();
        for (length, stride) in outer.lengths.iter().copied().zip(strides) {
            if length == 1 {
                continue;
            }
            match runs.last_mut() {
                Some(last) if last.1 == stride * length => *last = (last.0 * length, stride),
                _ => runs.push((length, stride)),
            }
        }
        Runs(runs.into())
    }

    /// Lengths and strides, outermost first.
    #[must_use]
    pub fn all(&self) -> &[(usize, usize)] {
        &self.0
    }

    /// Conditions that are read from one stretch of the column, or are all the same.
    #[must_use]
    pub fn stretch(&self) -> usize {
        self.0.last().map_or(usize::MAX, |(length, _)| *length)
    }
}
