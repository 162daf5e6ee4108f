//! Exact rational exponents of a dimension.

use std::fmt;

/// The largest denominator that [`Exponent::from_f64`] looks for.
///
/// Exponents in formulas are halves, thirds and decimals such as 1.5 or 0.125, so three digits below the line are ample.
const DENOMINATOR_MAX: i32 = 1000;

/// An exact rational exponent, always reduced, with a positive denominator.
///
/// The arithmetic is checked: what no longer fits in 32 bits gives `None`.
///
/// # Example
/// ```
/// use engine::quantity::Exponent;
/// let half = Exponent::ratio(2, 4).unwrap();
/// assert_eq!((half.numerator(), half.denominator()), (1, 2));
/// assert_eq!(half.add(half), Some(Exponent::ONE));
/// assert_eq!(Exponent::ratio(1, 0), None);
/// ```
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub struct Exponent {
    numerator: i32,
    denominator: i32,
}

impl Exponent {
    /// The exponent 0.
    pub const ZERO: Self = Self::whole(0);
    /// The exponent 1.
    pub const ONE: Self = Self::whole(1);

    /// A whole exponent.
    pub const fn whole(value: i32) -> Self {
        Self {
            numerator: value,
            denominator: 1,
        }
    }

    /// `numerator / denominator`, reduced; `None` where the denominator is 0 or the result does not fit.
    pub fn ratio(numerator: i32, denominator: i32) -> Option<Self> {
        Self::reduced(i64::from(numerator), i64::from(denominator))
    }

    /// The rational p/q with the smallest q up to 1000 that equals `value` within one unit in the last place.
    ///
    /// `None` where there is none, as for an irrational exponent or one that is not finite.
    ///
    /// # Example
    /// ```
    /// use engine::quantity::Exponent;
    /// assert_eq!(Exponent::from_f64(1.0 / 3.0), Exponent::ratio(1, 3));
    /// assert_eq!(Exponent::from_f64(std::f64::consts::PI), None);
    /// ```
    pub fn from_f64(value: f64) -> Option<Self> {
        (1..=DENOMINATOR_MAX).find_map(|q| {
            let p = (value * f64::from(q)).round();
            if p.is_nan()
                || p.abs() > f64::from(i32::MAX)
                || !same_within_one_ulp(p / f64::from(q), value)
            {
                return None;
            }
            // The bound just checked makes the conversion exact.
            Self::ratio(p as i32, q)
        })
    }

    /// The sum, or `None` on overflow.
    #[allow(
        clippy::should_implement_trait,
        reason = "the checked sum gives an Option"
    )]
    pub fn add(self, other: Self) -> Option<Self> {
        let (a, b) = (i64::from(self.numerator), i64::from(self.denominator));
        let (c, d) = (i64::from(other.numerator), i64::from(other.denominator));
        Self::reduced((a * d).checked_add(c * b)?, b * d)
    }

    /// The difference, or `None` on overflow.
    #[allow(
        clippy::should_implement_trait,
        reason = "the checked difference gives an Option"
    )]
    pub fn sub(self, other: Self) -> Option<Self> {
        let (a, b) = (i64::from(self.numerator), i64::from(self.denominator));
        let (c, d) = (i64::from(other.numerator), i64::from(other.denominator));
        Self::reduced((a * d).checked_sub(c * b)?, b * d)
    }

    /// The product, or `None` on overflow.
    #[allow(
        clippy::should_implement_trait,
        reason = "the checked product gives an Option"
    )]
    pub fn mul(self, other: Self) -> Option<Self> {
        let numerator = i64::from(self.numerator) * i64::from(other.numerator);
        let denominator = i64::from(self.denominator) * i64::from(other.denominator);
        Self::reduced(numerator, denominator)
    }

    /// The nearest double.
    pub fn to_f64(self) -> f64 {
        f64::from(self.numerator) / f64::from(self.denominator)
    }

    /// Whether the exponent is 0.
    pub const fn is_zero(self) -> bool {
        self.numerator == 0
    }

    /// The part above the line, which carries the sign.
    pub const fn numerator(self) -> i32 {
        self.numerator
    }

    /// The part below the line, at least 1.
    pub const fn denominator(self) -> i32 {
        self.denominator
    }

    fn reduced(numerator: i64, denominator: i64) -> Option<Self> {
        let divisor = greatest_common_divisor(numerator.unsigned_abs(), denominator.unsigned_abs());
        // A divisor beyond i64 would need both parts at i64::MIN, which products of 32-bit numbers never reach.
        let divisor = i64::try_from(divisor).ok().filter(|_| denominator != 0)?;
        let sign = denominator.signum();
        Some(Self {
            numerator: i32::try_from(sign * (numerator / divisor)).ok()?,
            denominator: i32::try_from(sign * (denominator / divisor)).ok()?,
        })
    }
}

impl PartialOrd for Exponent {
    fn partial_cmp(&self, other: &Self) -> Option<std::cmp::Ordering> {
        Some(self.cmp(other))
    }
}

impl Ord for Exponent {
    fn cmp(&self, other: &Self) -> std::cmp::Ordering {
        let left = i64::from(self.numerator) * i64::from(other.denominator);
        let right = i64::from(other.numerator) * i64::from(self.denominator);
        left.cmp(&right)
    }
}

impl fmt::Display for Exponent {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self.denominator {
            1 => write!(out, "{}", self.numerator),
            _ => write!(out, "({}/{})", self.numerator, self.denominator),
        }
    }
}

fn same_within_one_ulp(a: f64, b: f64) -> bool {
    a == b
        || (a.is_sign_positive() == b.is_sign_positive() && a.to_bits().abs_diff(b.to_bits()) <= 1)
}

fn greatest_common_divisor(mut a: u64, mut b: u64) -> u64 {
    while b != 0 {
        (a, b) = (b, a % b);
    }
    a
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn arithmetic_is_reduced_and_checked() {
        let third = Exponent::ratio(1, 3).unwrap();
        let sixth = Exponent::ratio(-1, -6).unwrap();
        assert_eq!(third.sub(sixth), Some(sixth));
        assert_eq!(third.mul(Exponent::whole(3)), Some(Exponent::ONE));
        assert_eq!(Exponent::whole(i32::MAX).add(Exponent::ONE), None);
        assert_eq!(
            Exponent::whole(i32::MIN).mul(Exponent::whole(i32::MIN)),
            None
        );
        assert_eq!(Exponent::ratio(i32::MIN, i32::MIN), Some(Exponent::ONE));
        assert_eq!(Exponent::ratio(i32::MIN, -1), None);
        assert!(sixth < third && Exponent::whole(-1) < Exponent::ZERO);
    }

    #[test]
    fn decimals_become_small_ratios() {
        for (value, p, q) in [
            (0.5, 1, 2),
            (-1.5, -3, 2),
            (0.0, 0, 1),
            (0.1, 1, 10),
            (2.0 / 7.0, 2, 7),
            (5.25588, 0, 0),
        ] {
            assert_eq!(Exponent::from_f64(value), Exponent::ratio(p, q), "{value}");
        }
        assert_eq!(Exponent::from_f64(f64::NAN), None);
        assert_eq!(Exponent::from_f64(f64::INFINITY), None);
        assert_eq!(Exponent::from_f64(1e12), None);
    }
}
