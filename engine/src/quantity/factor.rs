//! Exact conversion factors: a ratio of whole numbers times a power of pi, rounded once at the end.

/// Circle constant as a ratio: the convergent of its continued fraction with 62-bit parts, off by 1.4e-38.
const PI_RATIO: (u128, u128) = (2_646_693_125_139_304_345, 842_468_587_426_513_207);

/// Whole numbers up to this one are doubles exactly.
const WHOLE_MAX: u128 = 1 << 53;

/// A positive conversion factor.
///
/// It stays an exact ratio of whole numbers times a power of pi for as long as both fit in 127 bits, and is a rounded
/// double afterwards.
///
/// # Example
/// ```
/// use engine::quantity::Factor;
/// let foot = Factor::ratio(3048, 10_000);
/// assert_eq!(foot.value(), 0.3048);
/// assert_eq!(foot.power(3).value(), 0.028316846592);
/// assert!(foot.over(foot).is_exact());
/// ```
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Factor {
    form: Form,
}

#[derive(Clone, Copy, PartialEq, Debug)]
enum Form {
    /// `above / below * pi^pi`, reduced, both at least 1 and below 2^127.
    Exact {
        above: u128,
        below: u128,
        pi: i32,
    },
    Rounded(f64),
}

impl Factor {
    /// The factor 1.
    pub const ONE: Self = Self::ratio(1, 1);
    /// The factor pi.
    pub const PI: Self = Self::exact(1, 1, 1);

    /// `above / below`. Both are meant to be between 1 and 2^127; a zero gives the double that the quotient is.
    pub const fn ratio(above: u128, below: u128) -> Self {
        Self::exact(above, below, 0)
    }

    /// A factor that is only known as a double.
    pub const fn rounded(value: f64) -> Self {
        Self {
            form: Form::Rounded(value),
        }
    }

    /// The product.
    pub const fn times(self, other: Self) -> Self {
        if let (
            Form::Exact {
                above: a,
                below: b,
                pi: i,
            },
            Form::Exact {
                above: c,
                below: d,
                pi: j,
            },
        ) = (self.form, other.form)
        {
            // Crosswise reduction keeps the parts as small as they can be: nothing is common to the products.
            let (left, right) = (common(a, d), common(c, b));
            let above = (a / left).checked_mul(c / right);
            let below = (b / right).checked_mul(d / left);
            if let (Some(above), Some(below), Some(pi)) = (above, below, i.checked_add(j)) {
                return Self::reduced(above, below, pi);
            }
        }
        Self::rounded(self.value() * other.value())
    }

    /// The quotient.
    pub const fn over(self, other: Self) -> Self {
        self.times(other.inverse())
    }

    /// A whole power; the power 0 is 1.
    pub const fn power(self, exponent: i32) -> Self {
        let base = if exponent < 0 { self.inverse() } else { self };
        let (mut result, mut square, mut left) = (Self::ONE, base, exponent.unsigned_abs());
        while left > 0 {
            if left & 1 == 1 {
                result = result.times(square);
            }
            left >>= 1;
            if left > 0 {
                square = square.times(square);
            }
        }
        result
    }

    /// The nearest double: an exact factor is rounded once.
    pub const fn value(self) -> f64 {
        match self.form {
            Form::Rounded(value) => value,
            Form::Exact {
                above,
                below,
                pi: 0,
            } => quotient(above, below),
            Form::Exact { above, below, pi } => {
                let (up, down) = if pi > 0 {
                    PI_RATIO
                } else {
                    (PI_RATIO.1, PI_RATIO.0)
                };
                match (pi, above.checked_mul(up), below.checked_mul(down)) {
                    (1 | -1, Some(above), Some(below))
                        if above >> 127 == 0 && below >> 127 == 0 =>
                    {
                        quotient(above, below)
                    }
                    _ => quotient(above, below) * power_of_pi(pi),
                }
            }
        }
    }

    /// Whether the factor is still an exact ratio.
    pub const fn is_exact(self) -> bool {
        matches!(self.form, Form::Exact { .. })
    }

    /// `value` times the factor.
    ///
    /// Where the factor is a ratio of whole numbers that are doubles, the multiplication comes first and the division
    /// last, so that a short decimal such as 35 mm gives the very double that 0.035 m is.
    pub const fn scale(self, value: f64) -> f64 {
        if let Some((above, below)) = self.whole_parts() {
            let scaled = value * above / below;
            if scaled.is_finite() {
                return scaled;
            }
        }
        value * self.value()
    }

    /// `value` divided by the factor, the counterpart of [`Factor::scale`].
    pub const fn unscale(self, value: f64) -> f64 {
        self.inverse().scale(value)
    }

    /// The parts above and below the line, where both are doubles exactly and no pi is left.
    pub(crate) const fn whole_parts(self) -> Option<(f64, f64)> {
        match self.form {
            Form::Exact {
                above,
                below,
                pi: 0,
            } if above <= WHOLE_MAX && below <= WHOLE_MAX => Some((above as f64, below as f64)),
            _ => None,
        }
    }

    const fn inverse(self) -> Self {
        match self.form {
            Form::Exact { above, below, pi } => match pi.checked_neg() {
                Some(pi) => Self {
                    form: Form::Exact {
                        above: below,
                        below: above,
                        pi,
                    },
                },
                None => Self::rounded(1.0 / self.value()),
            },
            Form::Rounded(value) => Self::rounded(1.0 / value),
        }
    }

    const fn exact(above: u128, below: u128, pi: i32) -> Self {
        if above == 0 || below == 0 {
            return Self::rounded(above as f64 / below as f64 * power_of_pi(pi));
        }
        let divisor = common(above, below);
        Self::reduced(above / divisor, below / divisor, pi)
    }

    /// From parts that have nothing in common.
    const fn reduced(above: u128, below: u128, pi: i32) -> Self {
        if above >> 127 != 0 || below >> 127 != 0 {
            return Self::rounded(above as f64 / below as f64 * power_of_pi(pi));
        }
        Self {
            form: Form::Exact { above, below, pi },
        }
    }
}

const fn common(mut a: u128, mut b: u128) -> u128 {
    // Dividing 128 bits costs some ten times what dividing 64 does, and nearly all factors are short.
    while b >> 64 != 0 || a >> 64 != 0 {
        if b == 0 {
            return a;
        }
        (a, b) = (b, a % b);
    }
    let (mut a, mut b) = (a as u64, b as u64);
    while b != 0 {
        (a, b) = (b, a % b);
    }
    a as u128
}

/// pi to a whole power by repeated squaring.
const fn power_of_pi(exponent: i32) -> f64 {
    let (mut result, mut square, mut left) = (1.0, std::f64::consts::PI, exponent.unsigned_abs());
    while left > 0 {
        if left & 1 == 1 {
            result *= square;
        }
        square *= square;
        left >>= 1;
    }
    if exponent < 0 { 1.0 / result } else { result }
}

/// The double nearest to `above / below`, both from 1 to below 2^127.
const fn quotient(above: u128, below: u128) -> f64 {
    // 55 bits are the 53 of a double, one to round by, and one that says whether anything follows.
    let (mut bits, mut rest, mut shift) = (above / below, above % below, 0u64);
    while bits < 1 << 54 {
        rest *= 2;
        bits *= 2;
        if rest >= below {
            rest -= below;
            bits += 1;
        }
        shift += 1;
    }
    if rest != 0 {
        bits |= 1;
    }
    // The scale is a power of two down to 2^-182, so that the multiplication is exact.
    bits as f64 * f64::from_bits((1023 - shift) << 52)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn decimals_come_out_as_their_own_doubles() {
        for (above, below, text) in [
            (3048, 10_000, "0.3048"),
            (1, 1000, "0.001"),
            (1, 3, "0.3333333333333333333333333333"),
            (5463, 20, "273.15"),
            (45_359_237 * 980_665, 10_000_000_000_000, "4.4482216152605"),
            (1 << 60, 3, "384307168202282325.33333333333333"),
            ((1 << 53) + 1, 1, "9007199254740993"),
            (1, (1 << 126) + 1, "1.17549435082228750796873653722211e-38"),
        ] {
            assert_eq!(
                Factor::ratio(above, below).value(),
                text.parse::<f64>().unwrap(),
                "{above}/{below}"
            );
        }
    }

    #[test]
    fn pi_is_rounded_once() {
        assert_eq!(Factor::PI.value(), std::f64::consts::PI);
        // pi/180 to 40 digits: 0.01745329251994329576923690768488612713443
        let degree = Factor::PI.over(Factor::ratio(180, 1));
        assert_eq!(
            degree.value(),
            "0.01745329251994329576923690768488612713443"
                .parse::<f64>()
                .unwrap()
        );
        // 180/pi to 40 digits: 57.29577951308232087679815481410517033240
        assert_eq!(
            degree.power(-1).value(),
            "57.29577951308232087679815481410517033240"
                .parse::<f64>()
                .unwrap()
        );
        assert!((degree.power(2).value() / (degree.value() * degree.value()) - 1.0).abs() < 1e-15);
    }

    #[test]
    fn what_no_longer_fits_is_a_rounded_double() {
        let pound = Factor::ratio(45_359_237, 100_000_000);
        assert!(pound.power(4).is_exact());
        let far = pound.power(40);
        assert!(!far.is_exact());
        // 0.45359237^40 = exp(40 ln 0.45359237)
        let expected = libm::exp(40.0 * libm::log(0.45359237));
        assert!((far.value() / expected - 1.0).abs() < 1e-13);
        assert_eq!(Factor::ratio(0, 1).value(), 0.0);
        assert_eq!(far.power(0), Factor::ONE);
    }

    #[test]
    fn powers_and_quotients_undo_each_other() {
        let knot = Factor::ratio(1852, 3600);
        assert_eq!(knot.times(knot).power(-1).times(knot.power(2)), Factor::ONE);
        assert_eq!(Factor::ratio(1, 1000).scale(35.0), 0.035);
        assert_eq!(Factor::ratio(1, 1000).unscale(0.035), 35.0);
        assert!(Factor::ratio(1, 1000).scale(f64::MAX).is_finite());
    }
}
