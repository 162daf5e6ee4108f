//! Sums in one fixed order, the same on every machine and with any width of vector registers.

/// Number of partial sums.
const LANES: usize = 8;

/// Terms after which the partial sums are added up; groups keep the rounding error of long lines small.
const GROUP: usize = 4096;

/// A running sum in the fixed order.
///
/// Term i of a group goes to partial sum i mod 8; every 4,096 terms the partial sums are added as
/// ((0+4)+(2+6))+((1+5)+(3+7)), and the groups are added one after another.
///
/// # Example
/// ```
/// use engine::numeric::{Sum, sum};
/// let mut total = Sum::default();
/// for term in [1.0, 2.5, -0.5] {
///     total.add(term);
/// }
/// assert_eq!(total.total(), 3.0);
/// assert_eq!(total.total(), sum([1.0, 2.5, -0.5]));
/// ```
#[derive(Clone, Debug, Default)]
pub struct Sum {
    partials: [f64; LANES],
    terms: usize,
    groups: f64,
}

impl Sum {
    /// Takes the next term.
    pub fn add(&mut self, term: f64) {
        if let Some(partial) = self.partials.get_mut(self.terms % LANES) {
            *partial += term;
        }
        self.terms += 1;
        if self.terms == GROUP {
            *self = Self {
                groups: self.total(),
                ..Self::default()
            };
        }
    }

    /// The sum of the terms so far; 0 of none.
    pub fn total(&self) -> f64 {
        let [a, b, c, d, e, f, g, h] = self.partials;
        self.groups + (((a + e) + (c + g)) + ((b + f) + (d + h)))
    }
}

impl Extend<f64> for Sum {
    fn extend<T: IntoIterator<Item = f64>>(&mut self, terms: T) {
        terms.into_iter().for_each(|term| self.add(term));
    }
}

/// The sum of the terms in the fixed order of [`Sum`]; 0 of none.
pub fn sum(terms: impl IntoIterator<Item = f64>) -> f64 {
    let mut total = Sum::default();
    total.extend(terms);
    total.total()
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Terms whose sum depends on the order of addition.
    fn terms(count: usize) -> Vec<f64> {
        (0..count)
            .map(|i| 1.0 / (1.0 + (i * 7919 % 1013) as f64) * if i % 3 == 0 { -1e3 } else { 1.0 })
            .collect()
    }

    /// The order written out by index, independently of the running form.
    fn written_out(terms: &[f64]) -> f64 {
        let mut total = 0.0;
        for group in terms.chunks(4096) {
            let lane = |k: usize| group.iter().skip(k).step_by(8).fold(0.0, |s, t| s + t);
            let even = (lane(0) + lane(4)) + (lane(2) + lane(6));
            let odd = (lane(1) + lane(5)) + (lane(3) + lane(7));
            total += even + odd;
        }
        total
    }

    #[test]
    fn the_order_is_the_stated_one() {
        for count in [0, 1, 2, 7, 8, 9, 100, 4095, 4096, 4097, 10_000] {
            let terms = terms(count);
            assert_eq!(
                sum(terms.iter().copied()).to_bits(),
                written_out(&terms).to_bits(),
                "{count}"
            );
        }
    }

    #[test]
    fn long_sums_stay_accurate() {
        let total = sum(std::iter::repeat_n(0.1, 1_000_000));
        assert!((total - 100_000.0).abs() < 1e-8, "{total}");
        assert!(sum([1.0, f64::NAN]).is_nan());
    }
}
