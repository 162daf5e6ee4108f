//! One equation in one unknown: the bounds are cut into equal parts, and the first part with a change of sign is
//! refined. The searcher asks for one value at a time, so that many searches can be fed from whole columns at once.

/// Parts into which the bounds are cut.
pub const PARTS: usize = 64;
/// A residual within this part of the larger side over the ends of the part is a solution.
const CLOSE: f64 = 1e-10;
/// The refinement goes on to the last digit, as the last steps cost little.
const CLOSER: f64 = 0.0;
/// Steps of a refinement; halving alone needs fewer to get to neighbouring numbers from anywhere.
const STEPS_MOST: u32 = 1_200;

/// How far a search has come.
#[derive(Clone, Copy, PartialEq, Debug)]
enum Stage {
    /// Trying the ends of all parts, from the lower bound.
    Scan(usize),
    /// Trying the lower end of a part again.
    Lower(usize),
    /// Trying the upper end of a part again.
    Upper(usize),
    /// Between the ends.
    Refine,
    Done,
}

/// A search for `left = right` between two bounds, both included.
///
/// [`RootSearch::trial`] is the value to try; [`RootSearch::tell`] takes both sides there (NaN where there is none)
/// until [`RootSearch::is_done`]. The root is in the first part from the lower bound over which `left - right` changes
/// sign or is 0, refined by Chandrupatla's method (inverse quadratic interpolation where that is safe, else halving;
/// T. R. Chandrupatla, Advances in Engineering Software 28 (1997) 145-149). It counts where `|left - right|` comes to
/// 1e-10 of the larger side over the ends of the part, or to neighbouring numbers without a jump; a part that holds a
/// jump or a pole is passed over, and so is one with an end without value.
///
/// # Example
/// ```
/// use engine::numeric::RootSearch;
/// let mut search = RootSearch::new(0.0, 3.0);
/// while !search.is_done() {
///     let x = search.trial();
///     search.tell(x * x, 2.0);
/// }
/// assert!((search.root().unwrap() - 2.0_f64.sqrt()).abs() < 1e-15);
/// ```
#[derive(Clone, Debug)]
pub struct RootSearch {
    low: f64,
    high: f64,
    trial: f64,
    stage: Stage,
    /// The residual at the part's end before.
    before: f64,
    /// The parts that hold a root, a jump or a pole, as bits.
    candidates: u64,
    several: bool,
    valued: bool,
    scale: f64,
    steps: u32,
    /// The ends of the bracket and the one given up last, each with its residual.
    a: (f64, f64),
    b: (f64, f64),
    c: (f64, f64),
    /// Sum of the residuals' magnitudes at the ends of the part.
    ends: f64,
    best: (f64, f64),
    root: Option<f64>,
}

impl RootSearch {
    /// A search between two bounds in any order. Bounds without value have no root.
    #[must_use]
    pub fn new(one: f64, other: f64) -> Self {
        let none = (f64::NAN, f64::NAN);
        let bounded = one.is_finite() && other.is_finite();
        RootSearch {
            low: one.min(other),
            high: one.max(other),
            trial: one.min(other),
            stage: if bounded { Stage::Scan(0) } else { Stage::Done },
            before: f64::NAN,
            candidates: 0,
            several: false,
            valued: false,
            scale: 0.0,
            steps: 0,
            a: none,
            b: none,
            c: none,
            ends: 0.0,
            best: none,
            root: None,
        }
    }

    /// Whether the search has ended.
    #[must_use]
    pub fn is_done(&self) -> bool {
        self.stage == Stage::Done
    }

    /// The value to try; once done, the last one tried.
    #[must_use]
    pub fn trial(&self) -> f64 {
        self.trial
    }

    /// The root, once done; `None` where there is none.
    #[must_use]
    pub fn root(&self) -> Option<f64> {
        self.root
    }

    /// Whether further parts change sign.
    #[must_use]
    pub fn has_several(&self) -> bool {
        self.several
    }

    /// Whether the equation had a value anywhere at the ends of the parts.
    #[must_use]
    pub fn was_valued(&self) -> bool {
        self.valued
    }

    /// Both sides at the trial value.
    pub fn tell(&mut self, left: f64, right: f64) {
        let residual = left - right;
        let larger = left.abs().max(right.abs());
        match self.stage {
            Stage::Scan(at) => self.scanned(at, residual),
            Stage::Lower(part) => {
                self.a = (self.trial, residual);
                self.scale = larger;
                self.go(Stage::Upper(part), self.end(part + 1));
            }
            Stage::Upper(_) => {
                self.b = (self.trial, residual);
                self.scale = self.scale.max(larger);
                self.begin();
            }
            Stage::Refine => self.refined(residual),
            Stage::Done => {}
        }
    }

    fn go(&mut self, stage: Stage, trial: f64) {
        self.stage = stage;
        self.trial = trial;
    }

    /// The end of a part: both bounds are met exactly.
    fn end(&self, at: usize) -> f64 {
        if at == 0 {
            self.low
        } else if at == PARTS {
            self.high
        } else {
            self.low + (self.high - self.low) * (at as f64 / PARTS as f64)
        }
    }

    fn scanned(&mut self, at: usize, residual: f64) {
        self.valued |= !residual.is_nan();
        let before = self.before;
        if at > 0 && !before.is_nan() && !residual.is_nan() {
            let crossed = (before < 0.0 && residual > 0.0) || (before > 0.0 && residual < 0.0);
            // A 0 belongs to the part that ends there; at the lower bound, or behind a gap, to the one that begins.
            let starts = before == 0.0 && self.candidates & bit(at.wrapping_sub(2)) == 0;
            if crossed || residual == 0.0 || starts {
                self.candidates |= bit(at - 1);
            }
        }
        self.before = residual;
        if at < PARTS {
            return self.go(Stage::Scan(at + 1), self.end(at + 1));
        }
        self.several = self.candidates.count_ones() > 1;
        self.next_part();
    }

    fn next_part(&mut self) {
        if self.candidates == 0 {
            self.stage = Stage::Done;
            return;
        }
        let part = self.candidates.trailing_zeros() as usize;
        self.candidates &= self.candidates - 1;
        self.go(Stage::Lower(part), self.end(part));
    }

    fn found(&mut self, root: f64) {
        self.root = Some(root);
        self.go(Stage::Done, root);
    }

    fn begin(&mut self) {
        for (x, residual) in [self.a, self.b] {
            if residual == 0.0 {
                return self.found(x);
            }
        }
        self.steps = 0;
        self.ends = self.a.1.abs() + self.b.1.abs();
        self.best = if self.a.1.abs() < self.b.1.abs() {
            self.a
        } else {
            self.b
        };
        self.c = self.a;
        self.halve();
    }

    fn halve(&mut self) {
        let middle = self.a.0 + (self.b.0 - self.a.0) * 0.5;
        self.step_to(middle);
    }

    /// Goes on between the ends, or settles where nothing lies between them.
    fn step_to(&mut self, x: f64) {
        let (low, high) = (self.a.0.min(self.b.0), self.a.0.max(self.b.0));
        let inside = |x: f64| x > low && x < high;
        let middle = self.a.0 + (self.b.0 - self.a.0) * 0.5;
        let close = self.best.1.abs() <= CLOSER * self.scale;
        if close || !inside(middle) || self.steps >= STEPS_MOST {
            return self.settle();
        }
        self.steps += 1;
        self.go(Stage::Refine, if inside(x) { x } else { middle });
    }

    fn settle(&mut self) {
        let neighbours = self.a.1.abs() + self.b.1.abs();
        if self.best.1.abs() <= CLOSE * self.scale || neighbours <= 1e-3 * self.ends {
            self.found(self.best.0);
        } else {
            self.next_part();
        }
    }

    fn refined(&mut self, residual: f64) {
        let at = (self.trial, residual);
        if residual.is_nan() {
            return self.next_part();
        }
        if residual == 0.0 {
            return self.found(at.0);
        }
        if residual.abs() < self.best.1.abs() {
            self.best = at;
        }
        if (residual > 0.0) == (self.a.1 > 0.0) {
            self.c = self.a;
            self.a = at;
        } else {
            self.c = self.b;
            self.b = self.a;
            self.a = at;
        }
        let (a, b, c) = (self.a, self.b, self.c);
        let xi = (a.0 - b.0) / (c.0 - b.0);
        let phi = (a.1 - b.1) / (c.1 - b.1);
        let safe = phi * phi < xi && (1.0 - phi) * (1.0 - phi) < 1.0 - xi;
        if !safe {
            return self.halve();
        }
        let t = a.1 / (b.1 - a.1) * c.1 / (b.1 - c.1)
            + (c.0 - a.0) / (b.0 - a.0) * a.1 / (c.1 - a.1) * b.1 / (c.1 - b.1);
        // A step that would not leave the end is one number long.
        let least = f64::EPSILON * a.0.abs().max(f64::MIN_POSITIVE) / (b.0 - a.0).abs();
        let t = if t.is_finite() {
            t.max(least).min(1.0 - least)
        } else {
            0.5
        };
        self.step_to(a.0 + t * (b.0 - a.0));
    }
}

fn bit(part: usize) -> u64 {
    if part < PARTS { 1 << part } else { 0 }
}

#[cfg(test)]
mod tests {
    use super::RootSearch;

    fn solve(low: f64, high: f64, left: impl Fn(f64) -> f64, right: f64) -> RootSearch {
        let mut search = RootSearch::new(low, high);
        let mut asked = 0;
        while !search.is_done() {
            search.tell(left(search.trial()), right);
            asked += 1;
            assert!(asked < 100_000);
        }
        search
    }

    #[test]
    fn finds_the_first_root_and_says_where_there_are_more() {
        let cubic = |x: f64| (x - 1.0) * (x - 2.0) * (x - 4.0);
        let found = solve(0.0, 5.0, cubic, 0.0);
        assert!((found.root().unwrap() - 1.0).abs() < 1e-14);
        assert!(found.has_several());
        let only = solve(3.1, 5.0, cubic, 0.0);
        assert!((only.root().unwrap() - 4.0).abs() < 1e-14);
        assert!(!only.has_several());
    }

    #[test]
    fn both_bounds_are_included() {
        assert_eq!(solve(2.0, 3.0, |x| x, 2.0).root(), Some(2.0));
        assert_eq!(solve(2.0, 3.0, |x| x, 3.0).root(), Some(3.0));
        assert_eq!(solve(3.0, 2.0, |x| x, 3.0).root(), Some(3.0));
        assert_eq!(solve(2.0, 2.0, |x| x, 2.0).root(), Some(2.0));
        assert_eq!(solve(2.0, 3.0, |x| x, 3.5).root(), None);
    }

    #[test]
    fn a_jump_and_a_pole_are_no_solution() {
        let jump = solve(0.0, 1.0, |x| if x < 0.3 { -1.0 } else { 1.0 }, 0.0);
        assert_eq!(jump.root(), None);
        let pole = solve(0.0, 1.0, |x| 1.0 / (x - 0.3), 0.0);
        assert_eq!(pole.root(), None);
        // Behind a pole, the root is found still.
        let behind = solve(0.0, 1.0, |x| (x - 0.7) / (x - 0.3), 0.0);
        assert!((behind.root().unwrap() - 0.7).abs() < 1e-14);
    }

    #[test]
    fn parts_with_an_end_without_value_are_passed_over() {
        let found = solve(-1.0, 1.0, |x| if x < 0.0 { f64::NAN } else { x }, 0.5);
        assert!((found.root().unwrap() - 0.5).abs() < 1e-15);
        let never = solve(-1.0, 1.0, |_| f64::NAN, 0.5);
        assert!(never.root().is_none() && !never.was_valued());
        assert!(solve(f64::NAN, 1.0, |x| x, 0.5).root().is_none());
    }

    #[test]
    fn flat_and_steep_equations_are_refined_to_the_last_digits() {
        let steep = solve(0.0, 1.0, |x| 1e12 * (x - 0.1), 0.0);
        assert!((steep.root().unwrap() - 0.1).abs() < 1e-16);
        let flat = solve(0.0, 2.0, |x| (x - 1.01) * (x - 1.01) * (x - 1.01), 0.0);
        assert!((flat.root().unwrap() - 1.01).abs() < 1e-3);
        let tiny = solve(-1.0, 1.0, |x| x - 1e-200, 0.0);
        assert!((tiny.root().unwrap() - 1e-200).abs() < 1e-12);
    }
}
