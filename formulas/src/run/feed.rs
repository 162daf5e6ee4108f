//! Broadcasting: how a column of fewer axes is read along the conditions of a line.

use super::wide::Source;
use crate::axes::{AXES_MOST, Runs, Shape};

/// Reads a column along the conditions of a larger shape, block by block.
pub(super) struct Feed<'a> {
    values: &'a [f64],
    runs: Runs,
}

impl<'a> Feed<'a> {
    /// A column of shape `inner`, read along `outer`.
    #[must_use]
    pub(super) fn new(values: &'a [f64], inner: &Shape, outer: &Shape) -> Self {
        Feed::along(values, Runs::new(inner, outer))
    }

    /// A column read in runs that are known.
    pub(super) fn along(values: &'a [f64], runs: Runs) -> Self {
        Feed { values, runs }
    }

    /// The whole column, where it is read straight through.
    #[must_use]
    pub(super) fn straight(&self) -> Option<&'a [f64]> {
        match self.runs.all() {
            [(length, 1)] if *length == self.values.len() => Some(self.values),
            _ => None,
        }
    }

    fn at(&self, offset: usize) -> f64 {
        self.values.get(offset).copied().unwrap_or(f64::NAN)
    }

    /// The value for one condition.
    #[must_use]
    pub(super) fn value(&self, mut condition: usize) -> f64 {
        let mut offset = 0;
        for (length, stride) in self.runs.all().iter().rev() {
            offset += condition % length * stride;
            condition /= length;
        }
        self.at(offset)
    }

    /// The values for `n` conditions from `start` on, without a copy where they stand together.
    pub(super) fn block<'s>(
        &'s self,
        start: usize,
        n: usize,
        room: &'s mut Vec<f64>,
    ) -> Source<'s> {
        let Some((&(inner, stride), outer)) = self.runs.all().split_last() else {
            return Source::Value(self.at(0));
        };
        let along = start % inner;
        if along + n <= inner && stride <= 1 {
            let mut rest = start / inner;
            let mut offset = along * stride;
            for (length, stride) in outer.iter().rev() {
                offset += rest % length * stride;
                rest /= length;
            }
            if stride == 0 {
                return Source::Value(self.at(offset));
            }
            if let Some(values) = self.values.get(offset..offset + n) {
                return Source::Block(values);
            }
        }
        room.resize(n, 0.0);
        self.fill(start, room);
        Source::Block(room)
    }

    /// The values for the conditions from `start` on.
    pub(super) fn fill(&self, start: usize, out: &mut [f64]) {
        if let Some(all) = self.straight()
            && let Some(part) = all.get(start..start + out.len())
        {
            out.copy_from_slice(part);
            return;
        }
        let Some((&(inner, stride), outer)) = self.runs.all().split_last() else {
            out.fill(self.at(0));
            return;
        };
        // Where the first condition stands along each axis; from there on the axes are stepped, not divided out.
        let mut indices = [0usize; AXES_MOST];
        let mut rest = start;
        let along = rest % inner;
        rest /= inner;
        let mut offset = 0;
        for (at, (length, stride)) in outer.iter().enumerate().rev() {
            indices[at] = rest % length;
            offset += indices[at] * stride;
            rest /= length;
        }
        let mut along = along;
        let mut done = 0;
        while done < out.len() {
            let length = (inner - along).min(out.len() - done);
            self.run(
                offset + along * stride,
                stride,
                &mut out[done..done + length],
            );
            done += length;
            along = 0;
            for (at, (length, stride)) in outer.iter().enumerate().rev() {
                indices[at] += 1;
                offset += stride;
                if indices[at] < *length {
                    break;
                }
                offset -= stride * length;
                indices[at] = 0;
            }
        }
    }

    /// Values from an offset on, so far apart.
    #[inline(always)]
    fn run(&self, offset: usize, stride: usize, part: &mut [f64]) {
        match stride {
            0 => part.fill(self.at(offset)),
            1 => match self.values.get(offset..offset + part.len()) {
                Some(values) => part.copy_from_slice(values),
                None => part.fill(f64::NAN),
            },
            _ => part
                .iter_mut()
                .enumerate()
                .for_each(|(i, v)| *v = self.at(offset + i * stride)),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::Feed;
    use crate::axes::{AxisSet, Shape};

    #[test]
    fn reads_columns_of_fewer_axes_in_condition_order() {
        let lengths = [2, 3, 2];
        let outer = Shape::of(AxisSet(0b111), &lengths);
        for inner in 0..8u64 {
            let inner = Shape::of(AxisSet(inner), &lengths);
            let values: Vec<f64> = (0..inner.conditions()).map(|i| i as f64).collect();
            let feed = Feed::new(&values, &inner, &outer);
            let strides = outer.strides_of(&inner);
            let mut all = vec![0.0; outer.conditions()];
            feed.fill(0, &mut all);
            for (condition, value) in all.iter().enumerate() {
                let offset: usize = outer
                    .indices(condition)
                    .iter()
                    .zip(&strides)
                    .map(|(i, s)| i * s)
                    .sum();
                assert_eq!(*value, values[offset]);
                assert_eq!(feed.value(condition), values[offset]);
            }
            for start in 0..all.len() {
                let mut part = vec![0.0; (all.len() - start).min(5)];
                feed.fill(start, &mut part);
                assert_eq!(part, all[start..start + part.len()]);
            }
        }
    }
}
