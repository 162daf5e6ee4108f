//! Pitching moment of a fuselage or boom beside a wing.

use crate::elementary;
use crate::numeric::Sum;
use crate::planform::numbers;
use crate::quantity::constants::PI;
use crate::quantity::{Angle, Area, Length, PerAngle, Typed};

/// Where along the body the quarter chord of the wing root stands, and the factor there, per radian.
///
/// NACA TR 711 as tabulated in textbooks (from memory; the round values per degree are 0.002, 0.003, 0.006, 0.012, 0.020).
const FACTORS: [(f64, f64); 5] = [
    (0.1, 0.115),
    (0.2, 0.172),
    (0.3, 0.344),
    (0.5, 0.688),
    (0.7, 1.146),
];

/// Moment slope of a body from its length and greatest width, per radian of wing angle, K_f width^2 length/(S mac).
///
/// - `length`, `width`: length and greatest width of the body.
/// - `wing_area`, `mac`: reference area and chord.
/// - `root_quarter_fraction`: where the quarter chord of the wing root stands, as a part of the body's length from the nose.
///
/// Positive, destabilising. K_f is straight between the values known at 0.1, 0.2, 0.3, 0.5 and 0.7 of the length; outside
/// no value. Read off a figure: good to about 5 % of the factor.
///
/// Source: R. R. Gilruth and M. D. White, NACA TR 711; the values of K_f from memory.
///
/// # Example
/// ```
/// use engine::body::body_moment_slope;
/// use engine::quantity::{Area, Length, Typed};
/// let m = Length::from_si;
/// let slope = body_moment_slope(m(6.8), m(1.15), Area::from_si(14.0), m(1.35), 0.3);
/// assert!((slope.si() - 0.163_682_116_4).abs() < 1e-9);
/// ```
pub fn body_moment_slope(
    length: Length,
    width: Length,
    wing_area: Area,
    mac: Length,
    root_quarter_fraction: f64,
) -> PerAngle {
    let pair = FACTORS
        .windows(2)
        .find(|pair| pair[0].0 <= root_quarter_fraction && root_quarter_fraction <= pair[1].0);
    let factor = pair.map_or(f64::NAN, |pair| {
        let ((a, low), (b, high)) = (pair[0], pair[1]);
        low + (high - low) * (root_quarter_fraction - a) / (b - a)
    });
    let volume = width.si() * width.si() * length.si();
    PerAngle::from_si(factor * volume / (wing_area.si() * mac.si()))
}

/// Moment slope of a slender body by strips, per radian, pi/(2 S mac) Int width^2 flow_slope dx.
///
/// - `x`: stations along the body, nose to tail.
/// - `width`: width at each.
/// - `flow_slope`: d(beta)/d(alpha) at each: 1 in undisturbed flow, above 1 ahead of the wing, less behind it.
/// - `wing_area`, `mac`: reference area and chord.
///
/// Positive, destabilising. Between stations everything is straight and the integral exact; two stations at one place hold
/// a jump. NaN where the stations do not run aft.
///
/// Source: M. M. Munk, NACA TR 184; H. Multhopp, NACA TM 1036.
///
/// # Example
/// ```
/// use engine::body::slender_body_moment_slope;
/// use engine::quantity::{Area, Length, Typed};
/// let m = |v: [f64; 2]| v.map(Length::from_si);
/// let slope = slender_body_moment_slope(&m([0.0, 6.0]), &m([1.0; 2]), &[1.0; 2], Area::from_si(12.0), Length::from_si(1.5));
/// assert!((slope.si() - std::f64::consts::PI / 2.0 * 6.0 / 18.0).abs() < 1e-12);
/// ```
pub fn slender_body_moment_slope(
    x: &[Length],
    width: &[Length],
    flow_slope: &[f64],
    wing_area: Area,
    mac: Length,
) -> PerAngle {
    let strips = strips(&numbers(x), &numbers(width), flow_slope);
    PerAngle::from_si(PI / 2.0 * strips / (wing_area.si() * mac.si()))
}

/// Moment coefficient of a body where the wing has no lift, positive nose up,
/// (k2 - k1) pi/(2 S mac) Int width^2 (zero_lift + incidence) dx.
///
/// - `x`: stations along the body, nose to tail.
/// - `width`: width at each.
/// - `incidence`: incidence of the body's camber line against the datum line at each, positive nose up; negative for a
///   drooped nose and an upswept tail.
/// - `zero_lift`: angle of attack of the datum line at which the wing has no lift.
/// - `wing_area`, `mac`: reference area and chord.
/// - `fineness`: length over diameter, for the apparent mass factor k2 - k1 of a spheroid.
///
/// Between stations everything is straight and the integral exact. NaN where the stations do not run aft or the fineness is
/// not above 1.
///
/// Source: M. M. Munk, NACA TR 184; H. Multhopp, NACA TM 1036; H. Lamb, R&M 623, for k1 and k2.
///
/// # Example
/// ```
/// use engine::body::body_moment_zero;
/// use engine::quantity::{Angle, Area, Length, Typed};
/// let m = |v: [f64; 2]| v.map(Length::from_si);
/// let none = [0.0; 2].map(Angle::from_si);
/// let cm = body_moment_zero(&m([0.0, 6.0]), &m([1.0; 2]), &none, Angle::from_si(-0.05), Area::from_si(12.0),
///     Length::from_si(1.5), 6.0);
/// assert!(cm < 0.0);
/// ```
pub fn body_moment_zero(
    x: &[Length],
    width: &[Length],
    incidence: &[Angle],
    zero_lift: Angle,
    wing_area: Area,
    mac: Length,
    fineness: f64,
) -> f64 {
    let angle: Vec<f64> = incidence.iter().map(|i| i.si() + zero_lift.si()).collect();
    let strips = strips(&numbers(x), &numbers(width), &angle);
    let (k1, k2) = inertia_factors(fineness);
    (k2 - k1) * PI / 2.0 * strips / (wing_area.si() * mac.si())
}

/// Integral of width squared times something: a cubic between stations, for which Simpson's rule is exact.
fn strips(x: &[f64], width: &[f64], of: &[f64]) -> f64 {
    let aft = x.windows(2).all(|w| w[1] >= w[0]);
    if x.len() < 2 || width.len() != x.len() || of.len() != x.len() || !aft {
        return f64::NAN;
    }
    let mut sum = Sum::default();
    for i in 1..x.len() {
        let value = |w: f64, f: f64| w * w * f;
        let middle = value((width[i - 1] + width[i]) / 2.0, (of[i - 1] + of[i]) / 2.0);
        let ends = value(width[i - 1], of[i - 1]) + value(width[i], of[i]);
        sum.add((x[i] - x[i - 1]) * (ends + 4.0 * middle) / 6.0);
    }
    sum.total()
}

/// Axial and transverse inertia coefficients k1, k2 of a prolate spheroid; NaN where it is none.
fn inertia_factors(fineness: f64) -> (f64, f64) {
    if fineness.is_nan() || fineness <= 1.0 {
        return (f64::NAN, f64::NAN);
    }
    let squared = 1.0 - 1.0 / (fineness * fineness);
    let e = squared.sqrt();
    let log = elementary::ln((1.0 + e) / (1.0 - e));
    let cubed = squared * e;
    let alpha = 2.0 * (1.0 - squared) / cubed * (log / 2.0 - e);
    let beta = 1.0 / squared - (1.0 - squared) / (2.0 * cubed) * log;
    (alpha / (2.0 - alpha), beta / (2.0 - beta))
}

#[cfg(test)]
mod tests {
    use super::inertia_factors;

    /// Closed form of Lamb, R&M 623; his table prints 0.122 and 0.803 for 2.99, 0.045 and 0.918 for 6.01.
    #[test]
    fn inertia_factors_are_those_of_a_spheroid() {
        for (fineness, k1, k2) in [
            (1.5, 0.303_749_447_6, 0.622_084_408_9),
            (2.99, 0.122_529_561_1, 0.803_174_710_4),
            (4.99, 0.059_294_219_21, 0.893_983_851_1),
            (6.01, 0.045_070_974_28, 0.917_311_733),
            (9.97, 0.020_803_438_67, 0.960_055_105),
        ] {
            let found = inertia_factors(fineness);
            assert!(
                (found.0 - k1).abs() < 1e-8 && (found.1 - k2).abs() < 1e-8,
                "{fineness} {found:?}"
            );
        }
        assert!(inertia_factors(1.0).0.is_nan());
    }
}
