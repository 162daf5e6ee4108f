//! A cubic spline through points, without bends at the ends of its own: any cubic comes back as it is.

use crate::numeric::Factorised;

/// A spline through points of rising x.
#[derive(Clone, Debug)]
pub(super) struct Spline {
    x: Vec<f64>,
    z: Vec<f64>,
    /// Second derivative at each point.
    bend: Vec<f64>,
}

impl Spline {
    /// `None` where there are fewer than two points or x does not rise.
    pub(super) fn new(x: &[f64], z: &[f64]) -> Option<Self> {
        let n = x.len();
        if n < 2 || z.len() != n || !x.windows(2).all(|w| w[1] > w[0]) {
            return None;
        }
        let bend = match n {
            2 => vec![0.0; 2],
            3 => {
                let chord = |i: usize| (z[i + 1] - z[i]) / (x[i + 1] - x[i]);
                vec![2.0 * (chord(1) - chord(0)) / (x[2] - x[0]); 3]
            }
            _ => bends(x, z)?,
        };
        Some(Spline {
            x: x.to_vec(),
            z: z.to_vec(),
            bend,
        })
    }

    /// The intervals, from left to right.
    pub(super) fn intervals(&self) -> impl Iterator<Item = (f64, f64)> + '_ {
        self.x.windows(2).map(|w| (w[0], w[1]))
    }

    /// Slope at a place of an interval.
    pub(super) fn slope(&self, interval: usize, x: f64) -> f64 {
        let (a, b) = (self.x[interval], self.x[interval + 1]);
        let h = b - a;
        let (low, high) = (self.bend[interval], self.bend[interval + 1]);
        let chord = (self.z[interval + 1] - self.z[interval]) / h;
        let (s, t) = ((b - x) / h, (x - a) / h);
        chord + h / 6.0 * (low * (1.0 - 3.0 * s * s) + high * (3.0 * t * t - 1.0))
    }
}

/// Second derivatives, the third one continuous at the second point and the last but one.
fn bends(x: &[f64], z: &[f64]) -> Option<Vec<f64>> {
    let n = x.len();
    let h = |i: usize| x[i + 1] - x[i];
    let mut rows = vec![0.0; n * n];
    let mut right = vec![0.0; n];
    for i in 1..n - 1 {
        rows[i * n + i - 1] = h(i - 1);
        rows[i * n + i] = 2.0 * (h(i - 1) + h(i));
        rows[i * n + i + 1] = h(i);
        right[i] = 6.0 * ((z[i + 1] - z[i]) / h(i) - (z[i] - z[i - 1]) / h(i - 1));
    }
    for (row, i) in [(0, 0), (n - 1, n - 3)] {
        rows[row * n + i] = h(i + 1);
        rows[row * n + i + 1] = -(h(i) + h(i + 1));
        rows[row * n + i + 2] = h(i);
    }
    Some(Factorised::new(rows, n)?.solve(&right))
}
