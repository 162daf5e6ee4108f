//! Several equations in as many unknowns: damped Newton inside bounds, from the middle and then from eight stated
//! points. The searcher asks for one point at a time, so that many searches can be fed from whole columns at once.

/// Each equation is solved to this part of its larger side over the corners.
const CLOSE: f64 = 1e-10;
/// Newton steps from one start.
const STEPS_MOST: u32 = 60;
/// Halvings of a step.
const HALVINGS_MOST: u32 = 14;
/// Part of the bounds by which a slope is felt.
const PROBE: f64 = 1e-6;
/// Starts: the middle, and eight more.
const STARTS: u32 = 9;
/// Most unknowns to a search, as all corners are looked at.
pub const UNKNOWNS_MOST: usize = 10;
/// Bases of the points from which the search starts again.
const BASES: [u32; UNKNOWNS_MOST] = [2, 3, 5, 7, 11, 13, 17, 19, 23, 29];

#[derive(Clone, Copy, PartialEq, Debug)]
enum Stage {
    /// Looking at a corner for the size of the sides.
    Corner(usize),
    /// At a start.
    Start,
    /// Feeling the slope along one unknown.
    Probe(usize),
    /// Trying a step.
    Step,
    Done,
}

/// A search for `left[i] = right[i]` for all i, inside bounds.
///
/// [`SystemSearch::trial`] is the point to try; [`SystemSearch::tell`] takes the sides there until
/// [`SystemSearch::is_done`]. Unknowns are scaled by their bounds and equations by the larger side over the corners of
/// the bounds. A step that leaves the bounds is cut back to them, one that does not lower the largest residual is halved. Starts
/// are the middle, then the first eight points of the Halton sequence (bases 2, 3, 5, ...) in the bounds. No start
/// depends on another search.
///
/// # Example
/// ```
/// use engine::numeric::SystemSearch;
/// let mut search = SystemSearch::new(&[0.0, 0.0], &[3.0, 3.0]);
/// while !search.is_done() {
///     let (x, y) = (search.trial()[0], search.trial()[1]);
///     search.tell(&[x * y, x + y], &[2.0, 3.0]);
/// }
/// let root = search.root().unwrap();
/// assert!((root[0] * root[1] - 2.0).abs() < 1e-9);
/// ```
#[derive(Clone, Debug)]
pub struct SystemSearch {
    low: Vec<f64>,
    high: Vec<f64>,
    trial: Vec<f64>,
    stage: Stage,
    start: u32,
    steps: u32,
    halvings: u32,
    valued: bool,
    scale: Vec<f64>,
    /// The point in hand, as parts of the bounds, its scaled residuals and the largest of them.
    at: Vec<f64>,
    residual: Vec<f64>,
    norm: f64,
    /// Slopes of all residuals, one row an equation.
    slopes: Vec<f64>,
    /// The point that is tried.
    tried: Vec<f64>,
    step: Vec<f64>,
    solved: bool,
}

impl SystemSearch {
    /// A search inside bounds, one pair for each unknown. Bounds without value have no solution.
    #[must_use]
    pub fn new(low: &[f64], high: &[f64]) -> Self {
        let n = low.len().min(high.len()).min(UNKNOWNS_MOST);
        let pairs = || low.iter().zip(high).take(n);
        let bounded = n > 0 && pairs().all(|(a, b)| a.is_finite() && b.is_finite());
        let mut search = SystemSearch {
            low: pairs().map(|(a, b)| a.min(*b)).collect(),
            high: pairs().map(|(a, b)| a.max(*b)).collect(),
            trial: vec![0.0; n],
            stage: if bounded {
                Stage::Corner(0)
            } else {
                Stage::Done
            },
            start: 0,
            steps: 0,
            halvings: 0,
            valued: false,
            scale: vec![0.0; n],
            at: vec![0.5; n],
            residual: vec![f64::NAN; n],
            norm: f64::INFINITY,
            slopes: vec![0.0; n * n],
            tried: vec![0.0; n],
            step: vec![0.0; n],
            solved: false,
        };
        search.try_parts(vec![0.0; n]);
        search
    }

    /// Whether the search has ended.
    #[must_use]
    pub fn is_done(&self) -> bool {
        self.stage == Stage::Done
    }

    /// The point to try; once done, the last one.
    #[must_use]
    pub fn trial(&self) -> &[f64] {
        &self.trial
    }

    /// The solution, once done; `None` where there is none.
    #[must_use]
    pub fn root(&self) -> Option<&[f64]> {
        self.solved.then_some(&self.trial[..])
    }

    /// Whether all equations had a value at any point looked at.
    #[must_use]
    pub fn was_valued(&self) -> bool {
        self.valued
    }

    /// The sides of all equations at the trial point, NaN where there is no value.
    pub fn tell(&mut self, left: &[f64], right: &[f64]) {
        let residual: Vec<f64> = left.iter().zip(right).map(|(l, r)| l - r).collect();
        self.valued |= residual.iter().all(|r| !r.is_nan());
        match self.stage {
            Stage::Corner(at) => self.corner(at, left, right),
            Stage::Start => {
                self.grow_scale(left, right);
                self.take(&residual);
                if self.norm.is_finite() {
                    self.probe(0);
                } else {
                    self.next_start();
                }
            }
            Stage::Probe(unknown) => self.probed(unknown, &residual),
            Stage::Step => self.stepped(&residual),
            Stage::Done => {}
        }
    }

    fn count(&self) -> usize {
        self.low.len()
    }

    fn try_parts(&mut self, parts: Vec<f64>) {
        for (i, part) in parts.iter().enumerate() {
            let (low, high) = (self.low[i], self.high[i]);
            self.trial[i] = if *part == 1.0 {
                high
            } else {
                low + (high - low) * part
            };
        }
        self.tried = parts;
    }

    fn grow_scale(&mut self, left: &[f64], right: &[f64]) {
        for (scale, (l, r)) in self.scale.iter_mut().zip(left.iter().zip(right)) {
            let larger = l.abs().max(r.abs());
            if larger.is_finite() {
                *scale = scale.max(larger);
            }
        }
    }

    fn corner(&mut self, at: usize, left: &[f64], right: &[f64]) {
        self.grow_scale(left, right);
        let next = at + 1;
        if next < 1 << self.count() {
            self.stage = Stage::Corner(next);
            let parts = (0..self.count()).map(|i| f64::from(u8::from(next >> i & 1 == 1)));
            return self.try_parts(parts.collect());
        }
        self.begin(0);
    }

    fn begin(&mut self, start: u32) {
        self.start = start;
        self.steps = 0;
        self.stage = Stage::Start;
        let bases = BASES.iter().take(self.count());
        let parts = bases.map(|b| if start == 0 { 0.5 } else { halton(start, *b) });
        self.try_parts(parts.collect());
    }

    fn next_start(&mut self) {
        if self.start + 1 < STARTS {
            self.begin(self.start + 1);
        } else {
            self.stage = Stage::Done;
        }
    }

    fn scaled(&self, residual: &[f64]) -> Vec<f64> {
        let scale = |s: f64| if s > 0.0 { s } else { 1.0 };
        let pairs = residual.iter().zip(&self.scale);
        pairs.map(|(r, s)| r / scale(*s)).collect()
    }

    /// Makes the point that was tried the one in hand.
    fn take(&mut self, residual: &[f64]) {
        self.residual = self.scaled(residual);
        self.norm = largest(&self.residual);
        self.at.clone_from(&self.tried);
    }

    /// Feels the slope along an unknown, towards the inside.
    fn probe(&mut self, unknown: usize) {
        self.stage = Stage::Probe(unknown);
        let mut parts = self.at.clone();
        let forward = parts[unknown] <= 0.5;
        parts[unknown] += if forward { PROBE } else { -PROBE };
        self.try_parts(parts);
    }

    fn probed(&mut self, unknown: usize, residual: &[f64]) {
        let n = self.count();
        let scaled = self.scaled(residual);
        let by = self.tried[unknown] - self.at[unknown];
        for (row, (new, old)) in scaled.iter().zip(&self.residual).enumerate() {
            self.slopes[row * n + unknown] = (new - old) / by;
        }
        if unknown + 1 < n {
            return self.probe(unknown + 1);
        }
        match solve(&self.slopes, &self.residual) {
            Some(step) => {
                self.step = step;
                self.halvings = 0;
                self.try_step(1.0);
            }
            None => self.settle(),
        }
    }

    fn try_step(&mut self, part: f64) {
        self.stage = Stage::Step;
        let moved = self.at.iter().zip(&self.step);
        let parts = moved.map(|(at, step)| (at - part * step).clamp(0.0, 1.0));
        let parts = parts.collect();
        self.try_parts(parts);
    }

    fn stepped(&mut self, residual: &[f64]) {
        let norm = largest(&self.scaled(residual));
        if norm < self.norm {
            let little = norm > 0.25 * self.norm;
            self.take(residual);
            self.steps += 1;
            // What is solved already goes on while each step still gains much.
            if norm == 0.0 || (norm <= CLOSE && little) || self.steps >= STEPS_MOST {
                return self.settle();
            }
            return self.probe(0);
        }
        self.halvings += 1;
        if self.halvings > HALVINGS_MOST || self.norm <= CLOSE {
            return self.settle();
        }
        let part = (0..self.halvings).fold(1.0, |part, _| part * 0.5);
        self.try_step(part);
    }

    /// Ends at the point in hand, or starts from another.
    fn settle(&mut self) {
        if self.norm <= CLOSE {
            self.solved = true;
            self.stage = Stage::Done;
            let at = self.at.clone();
            self.try_parts(at);
        } else {
            self.next_start();
        }
    }
}

fn largest(residual: &[f64]) -> f64 {
    let larger = |m: f64, r: &f64| {
        if r.is_nan() {
            f64::INFINITY
        } else {
            m.max(r.abs())
        }
    };
    residual.iter().fold(0.0, larger)
}

/// The point of the Halton sequence in one base.
fn halton(mut index: u32, base: u32) -> f64 {
    let (mut value, mut part) = (0.0, 1.0);
    while index > 0 {
        part /= f64::from(base);
        value += part * f64::from(index % base);
        index /= base;
    }
    value
}

/// The solution of a small dense system, one row an equation, by elimination with the largest pivot; `None` where it
/// is singular or holds no number.
fn solve(matrix: &[f64], right: &[f64]) -> Option<Vec<f64>> {
    let n = right.len();
    let mut rows: Vec<Vec<f64>> = (0..n)
        .map(|r| {
            let mut row = matrix[r * n..(r + 1) * n].to_vec();
            row.push(right[r]);
            row
        })
        .collect();
    for column in 0..n {
        let pivot = (column..n).fold(column, |best, r| {
            if rows[r][column].abs() > rows[best][column].abs() {
                r
            } else {
                best
            }
        });
        rows.swap(column, pivot);
        let lead = rows[column].clone();
        if lead[column] == 0.0 || lead.iter().any(|v| !v.is_finite()) {
            return None;
        }
        for row in rows.iter_mut().skip(column + 1) {
            let factor = row[column] / lead[column];
            (column..=n).for_each(|k| row[k] -= factor * lead[k]);
        }
    }
    let mut x = vec![0.0; n];
    for row in (0..n).rev() {
        let known: f64 = (row + 1..n).fold(rows[row][n], |sum, k| sum - rows[row][k] * x[k]);
        x[row] = known / rows[row][row];
    }
    x.iter().all(|v| v.is_finite()).then_some(x)
}

#[cfg(test)]
mod tests {
    use super::SystemSearch;

    fn search(
        low: &[f64],
        high: &[f64],
        sides: impl Fn(&[f64]) -> (Vec<f64>, Vec<f64>),
    ) -> Option<Vec<f64>> {
        let mut search = SystemSearch::new(low, high);
        let mut asked = 0;
        while !search.is_done() {
            let (left, right) = sides(search.trial());
            search.tell(&left, &right);
            asked += 1;
            assert!(asked < 100_000);
        }
        search.root().map(<[f64]>::to_vec)
    }

    #[test]
    fn solves_linear_and_curved_systems() {
        let linear = search(&[-10.0, -10.0], &[10.0, 10.0], |x| {
            (vec![2.0 * x[0] + x[1], x[0] - 3.0 * x[1]], vec![5.0, -8.0])
        });
        let linear = linear.unwrap();
        assert!((linear[0] - 1.0).abs() < 1e-12 && (linear[1] - 3.0).abs() < 1e-12);
        let circle = search(&[0.0, 0.0], &[2.0, 2.0], |x| {
            (vec![x[0] * x[0] + x[1] * x[1], x[0]], vec![2.0, x[1]])
        });
        let circle = circle.unwrap();
        assert!((circle[0] - 1.0).abs() < 1e-10 && (circle[1] - 1.0).abs() < 1e-10);
    }

    #[test]
    fn a_solution_outside_the_bounds_is_none() {
        let outside = search(&[0.0, 0.0], &[1.0, 1.0], |x| {
            (vec![x[0] + x[1], x[0] - x[1]], vec![5.0, 0.0])
        });
        assert!(outside.is_none());
        let nowhere = search(&[-5.0, -5.0], &[5.0, 5.0], |x| {
            (vec![x[0] + x[1], x[0] + x[1]], vec![1.0, 2.0])
        });
        assert!(nowhere.is_none());
    }

    #[test]
    fn bounds_are_included_and_scales_may_differ() {
        let at_corner = search(&[0.0, 0.0], &[1e6, 1e-6], |x| {
            (vec![x[0], x[1]], vec![1e6, 1e-6])
        });
        assert_eq!(at_corner, Some(vec![1e6, 1e-6]));
    }

    #[test]
    fn points_without_value_are_backed_away_from() {
        let root = search(&[0.0, -1.0], &[4.0, 1.0], |x| {
            let left = if x[0] < 1.0 {
                f64::NAN
            } else {
                (x[0] - 1.0).sqrt()
            };
            (vec![left, x[0] * x[1]], vec![1.0, 1.0])
        });
        let root = root.unwrap();
        assert!((root[0] - 2.0).abs() < 1e-9 && (root[1] - 0.5).abs() < 1e-9);
    }
}
