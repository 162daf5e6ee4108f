//! Axes of a drawing: where values stand, and round numbers beside them.

use crate::numbers;

/// A row of numbers from `low` to `high`, with marks at round ones.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Numbers {
    low: f64,
    high: f64,
    /// The marks, lowest first, with their labels.
    pub(super) ticks: Vec<(f64, String)>,
}

impl Numbers {
    /// An axis that holds all values, in about so many parts. Where `zero` is asked for, values all well on one side of
    /// zero are shown from zero on.
    pub(super) fn of(values: impl Iterator<Item = f64>, parts: f64, zero: bool) -> Self {
        let found = values.fold(None, |ends: Option<(f64, f64)>, v| {
            Some(ends.map_or((v, v), |(low, high)| (low.min(v), high.max(v))))
        });
        let (mut low, mut high) = found.unwrap_or((0.0, 1.0));
        if zero && low > 0.0 && low < 0.5 * high {
            low = 0.0;
        }
        if zero && high < 0.0 && high > 0.5 * low {
            high = 0.0;
        }
        if low == high {
            let room = if low == 0.0 { 1.0 } else { 0.1 * low.abs() };
            (low, high) = (low - room, high + room);
        }
        let (figure, power) = step(low, high, parts);
        let value = |count: f64| {
            let text = format!("{}e{power}", count * figure);
            text.parse::<f64>().unwrap_or(0.0)
        };
        let unit = value(1.0);
        if unit <= 0.0 {
            return Numbers {
                low,
                high,
                ticks: Vec::new(),
            };
        }
        let first = (low / unit + 1e-9).floor();
        let last = (high / unit - 1e-9).ceil();
        let counts = (0..=30).map(|i| first + f64::from(i));
        let ticks: Vec<f64> = counts.take_while(|c| *c <= last).map(value).collect();
        let ticks: Vec<f64> = ticks.into_iter().filter(|t| t.is_finite()).collect();
        let labels = numbers::labels(&ticks, 4, None);
        Numbers {
            low: ticks.first().copied().unwrap_or(low).min(low),
            high: ticks.last().copied().unwrap_or(high).max(high),
            ticks: ticks.into_iter().zip(labels).collect(),
        }
    }

    /// How far along the axis a value stands, from 0 to 1.
    pub(super) fn part(&self, value: f64) -> f64 {
        // Halves keep the difference of the largest numbers there are within range.
        let span = self.high * 0.5 - self.low * 0.5;
        let part = (value * 0.5 - self.low * 0.5) / span;
        if part.is_finite() {
            part.clamp(0.0, 1.0)
        } else {
            0.5
        }
    }

    /// Whether zero stands inside.
    pub(super) fn crosses_zero(&self) -> bool {
        self.low < 0.0 && self.high > 0.0
    }
}

/// A round step, 1, 2 or 5 times a power of ten: its figure and the power.
fn step(low: f64, high: f64, parts: f64) -> (f64, i32) {
    let wanted = (high * 0.5 - low * 0.5) / (0.5 * parts);
    let text = format!("{wanted:e}");
    let (figure, power) = text.split_once('e').unwrap_or(("1", "0"));
    let figure: f64 = figure.parse().unwrap_or(1.0);
    let power: i32 = power.parse().unwrap_or(0);
    match figure {
        f if f <= 1.0 => (1.0, power),
        f if f <= 2.0 => (2.0, power),
        f if f <= 5.0 => (5.0, power),
        _ => (1.0, power + 1),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn labels(values: &[f64]) -> Vec<String> {
        let axis = Numbers::of(values.iter().copied(), 6.0, true);
        axis.ticks.into_iter().map(|(_, label)| label).collect()
    }

    #[test]
    fn marks_are_round_and_hold_all_values() {
        assert_eq!(labels(&[-4.0, 12.0]), ["-5", "0", "5", "10", "15"]);
        assert_eq!(
            labels(&[0.1, 0.6]),
            ["0", "0.1", "0.2", "0.3", "0.4", "0.5", "0.6"]
        );
        assert_eq!(labels(&[100.0]), ["90", "95", "100", "105", "110"]);
        assert_eq!(labels(&[]).len(), 6);
    }

    #[test]
    fn no_value_is_too_large_too_small_or_too_near() {
        for values in [
            [-1.7e308, 1.7e308],
            [5e-324, 1e-323],
            [1.0, 1.000_000_000_000_000_2],
        ] {
            let axis = Numbers::of(values.into_iter(), 6.0, true);
            for value in values {
                let part = axis.part(value);
                assert!((0.0..=1.0).contains(&part), "{values:?} {part}");
            }
        }
    }
}
