//! Catalogue functions that are steps of their own: those that give records, and those that take whole lines.

use super::feed::Feed;
use super::kernel::Arguments;
use super::missing::{lost, of_operands};
use crate::axes::{AxisId, Shape};
use crate::catalogue::{Compute, Entry, Wants};
use crate::problem::Cause;
use crate::values::is_excluded;

/// Works out every field of a record, condition by condition.
#[must_use]
pub(super) fn each(
    entry: &Entry,
    arguments: &[Option<usize>],
    feeds: &[Feed<'_>],
    conditions: usize,
    texts: &[String],
) -> Vec<Vec<f64>> {
    let mut out: Vec<Vec<f64>> = entry
        .fields
        .iter()
        .map(|_| Vec::with_capacity(conditions))
        .collect();
    let Compute::Each(compute) = entry.compute else {
        return out;
    };
    let mask = arguments
        .iter()
        .enumerate()
        .fold(0, |m, (i, a)| m | u32::from(a.is_some()) << i);
    let mut put = Arguments::new(entry);
    for condition in 0..conditions {
        let operands = arguments
            .iter()
            .flatten()
            .filter_map(|r| feeds.get(*r))
            .map(|f| f.value(condition));
        let (_, results) = put.result(compute, operands, mask, texts);
        out.iter_mut()
            .zip(results)
            .for_each(|(column, value)| column.push(*value));
    }
    out
}

/// Works out a function of whole lines along `axis`, for every line. `full` is the shape with the axis in it.
#[must_use]
pub(super) fn along(
    entry: &Entry,
    arguments: &[Option<usize>],
    feeds: &[Feed<'_>],
    axis: AxisId,
    full: &Shape,
    texts: &[String],
) -> Vec<Vec<f64>> {
    let at = full.position(axis).unwrap_or(0);
    let length = full.lengths.get(at).copied().unwrap_or(1).max(1);
    let stride = full.strides().get(at).copied().unwrap_or(1);
    let lines = full.conditions() / length;
    let size = |line: bool| if line { full.conditions() } else { lines };
    let mut out: Vec<Vec<f64>> = entry
        .fields
        .iter()
        .map(|f| vec![f64::NAN; size(f.line)])
        .collect();
    for line in 0..lines {
        let start = line / stride * stride * length + line % stride;
        let results = one_line(entry, arguments, feeds, start, stride, length, texts);
        for ((column, field), result) in out.iter_mut().zip(entry.fields).zip(results) {
            if field.line {
                (0..length).for_each(|i| {
                    column[start + i * stride] = result.get(i).copied().unwrap_or(f64::NAN)
                });
            } else {
                column[line] = result.first().copied().unwrap_or(f64::NAN);
            }
        }
    }
    out
}

fn one_line(
    entry: &Entry,
    arguments: &[Option<usize>],
    feeds: &[Feed<'_>],
    start: usize,
    stride: usize,
    length: usize,
    texts: &[String],
) -> Vec<Vec<f64>> {
    let mut missing: Option<f64> = None;
    let mut lines: Vec<Vec<f64>> = Vec::with_capacity(arguments.len());
    let mut words: Vec<&str> = Vec::with_capacity(arguments.len());
    for (parameter, argument) in entry.parameters.iter().zip(arguments) {
        let feed = argument.and_then(|r| feeds.get(r));
        let count = if parameter.line { length } else { 1 };
        let line: Vec<f64> = (0..count)
            .map(|i| {
                feed.map_or(parameter.default.unwrap_or(f64::NAN), |f| {
                    f.value(start + i * stride)
                })
            })
            .collect();
        // What is left out on purpose is for the function to leave out; anything else that is missing spoils the line.
        let gaps = line
            .iter()
            .copied()
            .filter(|v| v.is_nan() && !(parameter.line && is_excluded(*v)));
        if feed.is_some() {
            missing = of_operands(missing.into_iter().chain(gaps));
        }
        let text = feed
            .filter(|_| parameter.wants == Wants::Text)
            .map(|f| f.value(start) as usize);
        words.push(
            text.and_then(|t| texts.get(t))
                .map_or(parameter.default_text.unwrap_or(""), String::as_str),
        );
        lines.push(line);
    }
    let mut results: Vec<Vec<f64>> = entry.fields.iter().map(|_| Vec::new()).collect();
    let count = |line: bool| if line { length } else { 1 };
    if let Some(missing) = missing {
        return entry
            .fields
            .iter()
            .map(|f| vec![missing; count(f.line)])
            .collect();
    }
    if let Compute::Lines(compute) = entry.compute {
        let given: Vec<&[f64]> = lines.iter().map(Vec::as_slice).collect();
        compute(&given, &words, &mut results);
    }
    for value in results.iter_mut().flatten() {
        *value = if value.is_finite() {
            *value + 0.0
        } else {
            lost(Cause::NoValue)
        };
    }
    results
}
