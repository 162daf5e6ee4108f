//! The only door to the elementary functions, so that every machine computes the same bits.
//!
//! The functions of the platform differ in the last digit from one machine to another; these come from the `libm`
//! crate, whose code is the same everywhere. Square roots need no door: IEEE 754 rounds them correctly.
//!
//! Angles are in radians. A NaN in gives a NaN out; an argument outside the domain gives a NaN.
//!
//! # Example
//! ```
//! use engine::elementary;
//! assert_eq!(elementary::power(3.0, 2.0), 9.0);
//! assert_eq!(elementary::sin(0.0), 0.0);
//! assert!(elementary::ln(-1.0).is_nan());
//! ```

/// The largest whole exponent that is worked out by repeated squaring.
pub const SQUARING_EXPONENT_MAX: f64 = 16.0;

/// Sine of an angle in radians.
pub fn sin(angle: f64) -> f64 {
    libm::sin(angle)
}

/// Cosine of an angle in radians.
pub fn cos(angle: f64) -> f64 {
    libm::cos(angle)
}

/// Tangent of an angle in radians.
pub fn tan(angle: f64) -> f64 {
    libm::tan(angle)
}

/// Angle from -pi/2 to pi/2 whose sine is `value`; NaN outside -1 to 1.
pub fn asin(value: f64) -> f64 {
    libm::asin(value)
}

/// Angle from 0 to pi whose cosine is `value`; NaN outside -1 to 1.
pub fn acos(value: f64) -> f64 {
    libm::acos(value)
}

/// Angle from -pi/2 to pi/2 whose tangent is `value`.
pub fn atan(value: f64) -> f64 {
    libm::atan(value)
}

/// Angle from -pi to pi of the point (`x`, `y`) seen from the origin; 0 at the origin.
pub fn atan2(y: f64, x: f64) -> f64 {
    libm::atan2(y, x)
}

/// e raised to `value`.
pub fn exp(value: f64) -> f64 {
    libm::exp(value)
}

/// e raised to `value`, less 1, without loss of digits near 0.
pub fn exp_m1(value: f64) -> f64 {
    libm::expm1(value)
}

/// Natural logarithm; NaN below 0.
pub fn ln(value: f64) -> f64 {
    libm::log(value)
}

/// Natural logarithm of 1 + `value`, without loss of digits near 0; NaN below -1.
pub fn ln_1p(value: f64) -> f64 {
    libm::log1p(value)
}

/// Logarithm to the base 10; NaN below 0.
pub fn log10(value: f64) -> f64 {
    libm::log10(value)
}

/// Cube root, also of a negative number.
pub fn cbrt(value: f64) -> f64 {
    libm::cbrt(value)
}

/// Length of the diagonal over the sides `a` and `b`, without overflow on the way.
pub fn hypot(a: f64, b: f64) -> f64 {
    libm::hypot(a, b)
}

/// `base` raised to `exponent`.
///
/// The exponent 0.5 is the square root; a whole exponent of magnitude up to [`SQUARING_EXPONENT_MAX`] is worked out by
/// repeated squaring from the lowest bit up, a negative one as 1 over the positive power; any other goes to the `pow` of
/// `libm`. A base or exponent of NaN gives NaN, whatever the other is; a negative base with a broken exponent gives NaN.
///
/// # Example
/// ```
/// use engine::elementary::power;
/// assert_eq!(power(2.0, 10.0), 1024.0);
/// assert_eq!(power(2.0, -2.0), 0.25);
/// assert_eq!(power(2.0, 0.5), 2f64.sqrt());
/// assert!(power(-8.0, 1.5).is_nan());
/// ```
pub fn power(base: f64, exponent: f64) -> f64 {
    if base.is_nan() || exponent.is_nan() {
        f64::NAN
    } else if exponent == 0.5 {
        base.sqrt()
    } else if exponent.abs() <= SQUARING_EXPONENT_MAX && exponent.fract() == 0.0 {
        whole_power(base, exponent)
    } else {
        libm::pow(base, exponent)
    }
}

fn whole_power(base: f64, exponent: f64) -> f64 {
    let (mut result, mut square, mut left) = (1.0, base, exponent.abs() as u32);
    while left > 0 {
        if left & 1 == 1 {
            result *= square;
        }
        square *= square;
        left >>= 1;
    }
    if exponent < 0.0 { 1.0 / result } else { result }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    #[test]
    fn functions_meet_known_values() {
        let pi = std::f64::consts::PI;
        assert_relative_eq!(sin(pi / 6.0), 0.5, max_relative = 1e-15);
        assert_relative_eq!(cos(pi / 3.0), 0.5, max_relative = 1e-15);
        assert_relative_eq!(tan(pi / 4.0), 1.0, max_relative = 1e-15);
        assert_relative_eq!(asin(0.5), pi / 6.0, max_relative = 1e-15);
        assert_relative_eq!(acos(0.5), pi / 3.0, max_relative = 1e-15);
        assert_relative_eq!(atan(1.0), pi / 4.0, max_relative = 1e-15);
        assert_relative_eq!(atan2(-1.0, -1.0), -0.75 * pi, max_relative = 1e-15);
        assert_relative_eq!(exp(1.0), std::f64::consts::E, max_relative = 1e-15);
        assert_relative_eq!(ln(10.0), std::f64::consts::LN_10, max_relative = 1e-15);
        assert_eq!(log10(1000.0), 3.0);
        assert_eq!(cbrt(-27.0), -3.0);
        assert_relative_eq!(hypot(3e200, 4e200), 5e200, max_relative = 1e-15);
        assert_eq!(exp_m1(1e-20), 1e-20);
        assert_eq!(ln_1p(1e-20), 1e-20);
    }

    #[test]
    fn powers_take_the_stated_way() {
        assert_eq!(power(1.1, 3.0), 1.1 * (1.1 * 1.1));
        assert_eq!(power(1.1, 4.0), (1.1 * 1.1) * (1.1 * 1.1));
        assert_eq!(power(1.1, 17.0), libm::pow(1.1, 17.0));
        assert_eq!(power(1.1, 1.5), libm::pow(1.1, 1.5));
        assert_eq!(power(1.1, -1.0), 1.0 / 1.1);
        assert_eq!(power(0.0, 0.0), 1.0);
        assert!(power(f64::NAN, 0.0).is_nan() && power(1.0, f64::NAN).is_nan());
        assert_eq!(power(0.0, -1.0), f64::INFINITY);
        assert!(power(-1.0, 0.5).is_nan());
    }

    #[test]
    fn what_lies_outside_the_domain_is_no_number() {
        for value in [
            asin(1.1),
            acos(-1.1),
            ln(-1.0),
            log10(-1.0),
            ln_1p(-2.0),
            sin(f64::INFINITY),
        ] {
            assert!(value.is_nan());
        }
    }
}
