//! Methods along one axis: integrals by straight lines, differences, least squares.

use super::feed::Feed;
use crate::axes::{AxisId, Shape};
use crate::missing::{lost, of_operands};
use crate::problem::Cause;
use crate::program::Along;
use crate::values::NONE;
use engine::numeric::{Sum, line_through};

/// Works out a method along `axis` for every line of values.
#[must_use]
pub(super) fn run(
    how: Along,
    f: &Feed<'_>,
    x: Option<&Feed<'_>>,
    axis: AxisId,
    shape: &Shape,
) -> Vec<f64> {
    let keeps = matches!(how, Along::RunningIntegral | Along::Difference);
    let at = shape.position(axis).unwrap_or(0);
    let length = shape.lengths.get(at).copied().unwrap_or(1);
    let stride = shape.strides().get(at).copied().unwrap_or(1);
    let lines = shape.conditions() / length.max(1);
    let mut out = vec![NONE; if keeps { shape.conditions() } else { lines }];
    let (mut fs, mut xs) = (vec![0.0; length], vec![0.0; length]);
    for line in 0..lines {
        // Lines are numbered in condition order of the axes that are left.
        let start = line / stride * stride * length + line % stride;
        for i in 0..length {
            fs[i] = f.value(start + i * stride);
            xs[i] = x.map_or(i as f64, |x| x.value(start + i * stride));
        }
        if keeps {
            running(how, &fs, &xs, |i, v| out[start + i * stride] = v);
        } else {
            out[line] = single(how, &fs, &xs);
        }
    }
    out
}

fn single(how: Along, f: &[f64], x: &[f64]) -> f64 {
    let result = if how == Along::Integral {
        if let Some(missing) = of_operands(f.iter().chain(x).copied()) {
            return missing;
        }
        let mut sum = Sum::default();
        for i in 1..f.len() {
            sum.add((x[i] - x[i - 1]) * (f[i] + f[i - 1]) / 2.0);
        }
        sum.total()
    } else {
        // A point that is missing or left out on purpose is no point of the line.
        let points = f.iter().zip(x).filter(|(f, x)| !f.is_nan() && !x.is_nan());
        let (ys, xs): (Vec<f64>, Vec<f64>) = points.map(|(f, x)| (*f, *x)).unzip();
        let line = line_through(&xs, &ys);
        if how == Along::Slope {
            line.slope
        } else {
            line.intercept
        }
    };
    if result.is_finite() {
        result + 0.0
    } else {
        lost(Cause::Domain)
    }
}

fn running(how: Along, f: &[f64], x: &[f64], mut put: impl FnMut(usize, f64)) {
    if how == Along::Difference {
        put(0, NONE);
        for i in 1..f.len() {
            let value = of_operands([f[i], f[i - 1]].into_iter()).unwrap_or(f[i] - f[i - 1] + 0.0);
            put(i, value);
        }
        return;
    }
    let mut missing = f
        .first()
        .zip(x.first())
        .and_then(|(f, x)| of_operands([*f, *x].into_iter()));
    let mut sum = Sum::default();
    put(0, missing.unwrap_or(0.0));
    for i in 1..f.len() {
        missing = missing.or_else(|| of_operands([f[i], x[i]].into_iter()));
        if missing.is_none() {
            sum.add((x[i] - x[i - 1]) * (f[i] + f[i - 1]) / 2.0);
        }
        let value = missing.unwrap_or_else(|| sum.total() + 0.0);
        put(
            i,
            if value.is_infinite() {
                lost(Cause::Overflow)
            } else {
                value
            },
        );
    }
}
