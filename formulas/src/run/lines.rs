//! Catalogue functions that are steps of their own: those that give records, and those that take whole lines.

use super::feed::Feed;
use super::kernel::Arguments;
use crate::axes::Shape;
use crate::catalogue::{Compute, Entry, Field, Wants};
use crate::missing::{lost, of_operands};
use crate::problem::Cause;
use crate::values::is_excluded;

/// A function worked out condition by condition.
type Each = fn(&[f64], &[&str], &mut [f64]);

/// Works out every field of a record, condition by condition.
#[must_use]
pub(super) fn each(
    (entry, compute): (&Entry, Each),
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

/// Where the values of a line stand in a column.
#[derive(Clone, Copy)]
struct Walk {
    stride: usize,
    length: usize,
}

impl Walk {
    /// The first of a line's values, lines being numbered in condition order of the axes that are left.
    fn start(self, line: usize) -> usize {
        line / self.stride * self.stride * self.length + line % self.stride
    }

    fn put(self, column: &mut [f64], line: usize, values: &[f64]) {
        for i in 0..self.length {
            let value = values.get(i).copied().unwrap_or(f64::NAN);
            if let Some(place) = column.get_mut(self.start(line) + i * self.stride) {
                *place = value;
            }
        }
    }
}

/// Works out a function of whole lines along an axis, for every line. `full` is the shape with the axis in it, at the
/// position `consumed`; `made` are stride and length of an axis that the function makes.
#[must_use]
pub(super) fn along(
    entry: &Entry,
    arguments: &[Option<usize>],
    feeds: &[Feed<'_>],
    (consumed, full): (Option<usize>, &Shape),
    made: Option<(usize, usize)>,
    texts: &[String],
) -> Vec<Vec<f64>> {
    let along = Walk {
        stride: consumed
            .and_then(|at| full.strides().get(at).copied())
            .unwrap_or(1),
        length: consumed
            .and_then(|at| full.lengths.get(at).copied())
            .unwrap_or(1)
            .max(1),
    };
    let lines = full.conditions() / along.length;
    let made = made.map(|(stride, length)| Walk { stride, length });
    let walk = |field: &Field| match made {
        Some(made) if field.made => made,
        _ if field.line => along,
        _ => Walk {
            stride: 1,
            length: 1,
        },
    };
    let mut out: Vec<Vec<f64>> = entry
        .fields
        .iter()
        .map(|f| vec![f64::NAN; lines * walk(f).length])
        .collect();
    let mut prepared = None;
    for line in 0..lines {
        let given = Given::new(entry, arguments, feeds, (along.start(line), along), texts);
        let most = made.map_or(along.length, |made| made.length.max(along.length));
        let results = given.results(entry, &mut prepared, most);
        for ((column, field), result) in out.iter_mut().zip(entry.fields).zip(results) {
            walk(field).put(column, line, &result);
        }
    }
    out
}

/// What the first part of a function made, and for what.
type Made = Option<(Vec<u64>, Box<dyn std::any::Any>)>;

/// The arguments of one line.
struct Given<'t> {
    lines: Vec<Vec<f64>>,
    words: Vec<&'t str>,
    missing: Option<f64>,
}

impl<'t> Given<'t> {
    fn new(
        entry: &Entry,
        arguments: &[Option<usize>],
        feeds: &[Feed<'_>],
        (start, along): (usize, Walk),
        texts: &'t [String],
    ) -> Self {
        let mut given = Given {
            lines: Vec::with_capacity(arguments.len()),
            words: Vec::with_capacity(arguments.len()),
            missing: None,
        };
        for (parameter, argument) in entry.parameters.iter().zip(arguments) {
            let feed = argument.and_then(|r| feeds.get(r));
            let count = if parameter.line { along.length } else { 1 };
            let default = parameter.default.unwrap_or(f64::NAN);
            let at = |i: usize| feed.map_or(default, |f| f.value(start + i * along.stride));
            let line: Vec<f64> = (0..count).map(at).collect();
            // What is left out on purpose is for the function to leave out; anything else that is missing spoils the
            // line.
            let gaps = line
                .iter()
                .copied()
                .filter(|v| v.is_nan() && !(parameter.line && is_excluded(*v)));
            if feed.is_some() {
                given.missing = of_operands(given.missing.into_iter().chain(gaps));
            }
            let text = feed
                .filter(|_| parameter.wants == Wants::Text)
                .map(|f| f.value(start) as usize);
            let word = text.and_then(|t| texts.get(t)).map(String::as_str);
            given
                .words
                .push(word.or(parameter.default_text).unwrap_or(""));
            given.lines.push(line);
        }
        given
    }

    /// Every field: one value, or as many as it has labels.
    fn results(&self, entry: &Entry, prepared: &mut Made, most: usize) -> Vec<Vec<f64>> {
        let mut results: Vec<Vec<f64>> = entry.fields.iter().map(|_| Vec::new()).collect();
        if let Some(missing) = self.missing {
            return entry.fields.iter().map(|_| vec![missing; most]).collect();
        }
        let lines: Vec<&[f64]> = self.lines.iter().map(Vec::as_slice).collect();
        match entry.compute {
            Compute::Lines(compute) => compute(&lines, &self.words, &mut results),
            Compute::Prepared(parts) => {
                let key = self.key(parts.swept);
                if prepared.as_ref().is_none_or(|(known, _)| *known != key) {
                    *prepared = Some((key, (parts.prepare)(&lines, &self.words)));
                }
                if let Some((_, made)) = prepared {
                    (parts.apply)(made.as_ref(), &lines, &mut results);
                }
            }
            Compute::Each(_) | Compute::Language => {}
        }
        // What a function says of its own reason stands.
        let settled = |v: &&mut f64| crate::missing::cause(**v).is_none();
        for value in results.iter_mut().flatten().filter(settled) {
            *value = if value.is_finite() {
                *value + 0.0
            } else {
                lost(Cause::NoValue)
            };
        }
        results
    }

    /// The arguments that the first part looks at.
    fn key(&self, swept: &[usize]) -> Vec<u64> {
        let kept = self
            .lines
            .iter()
            .enumerate()
            .filter(|(i, _)| !swept.contains(i));
        let each = kept.flat_map(|(_, line)| line.iter().map(|v| v.to_bits()).chain([u64::MAX]));
        each.collect()
    }
}
