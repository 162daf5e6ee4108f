//! Thin-airfoil theory of mean lines.

use super::designation::Designation;
use super::spline::Spline;
use crate::elementary;
use crate::numeric::Sum;
use crate::quantity::constants::PI;
use crate::quantity::{Angle, PerAngle, Typed};

/// Intervals of Simpson's rule over a smooth stretch of a designation's mean line.
const STRETCH: usize = 2_000;
/// The same between two points of a mean line.
const BETWEEN: usize = 200;

/// What thin-airfoil theory says of a mean line.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct ThinSection {
    /// Angle of no lift, from the chord line.
    pub alpha_zero_lift: Angle,
    /// Moment coefficient about the quarter chord, positive nose up.
    pub cm_quarter: f64,
    /// Lift coefficient at which the flow meets the leading edge smoothly.
    pub cl_ideal: f64,
    /// Angle of attack at which it does.
    pub alpha_ideal: Angle,
    /// Lift slope, 2 pi.
    pub lift_slope: PerAngle,
}

/// Integrals over the mean line of its slope: plain, times cos t and times cos 2t, over t from 0 to pi.
#[derive(Default)]
struct Integrals([Sum; 3]);

impl Integrals {
    /// Adds a stretch of t by Simpson's rule; the slope is a smooth function of the place there.
    fn add(&mut self, from: f64, to: f64, intervals: usize, slope: impl Fn(f64) -> f64) {
        let step = (to - from) / intervals as f64;
        for i in 0..=intervals {
            let t = from + step * i as f64;
            let cosine = elementary::cos(t);
            let weight = if i == 0 || i == intervals {
                1.0
            } else if i % 2 == 1 {
                4.0
            } else {
                2.0
            };
            let value = weight * step / 3.0 * slope((1.0 - cosine) / 2.0);
            self.0[0].add(value);
            self.0[1].add(value * cosine);
            self.0[2].add(value * (2.0 * cosine * cosine - 1.0));
        }
    }

    fn section(&self) -> ThinSection {
        let [plain, first, second] = [0, 1, 2].map(|i: usize| self.0[i].total());
        let (a1, a2) = (2.0 / PI * first, 2.0 / PI * second);
        ThinSection {
            alpha_zero_lift: Angle::from_si((plain - first) / PI),
            cm_quarter: PI / 4.0 * (a2 - a1),
            cl_ideal: PI * a1,
            alpha_ideal: Angle::from_si(plain / PI),
            lift_slope: PerAngle::from_si(2.0 * PI),
        }
    }
}

fn no_value() -> ThinSection {
    ThinSection {
        alpha_zero_lift: Angle::from_si(f64::NAN),
        cm_quarter: f64::NAN,
        cl_ideal: f64::NAN,
        alpha_ideal: Angle::from_si(f64::NAN),
        lift_slope: PerAngle::from_si(f64::NAN),
    }
}

/// Thin-airfoil theory of the mean line of a four- or five-digit section.
///
/// - `designation`: see [`Designation::read`]; its thickness plays no part.
///
/// Holds for small camber, small angles and attached flow; measured moments of real sections differ by up to 0.01, and the
/// measured lift slope is some per cent below 2 pi. NaN where the designation is none.
///
/// Source: H. Glauert, The Elements of Aerofoil and Airscrew Theory, chapter VII; mean lines of NACA Reports 460 and 537.
///
/// # Example
/// ```
/// use engine::quantity::Typed;
/// use engine::section::thin_section;
/// let section = thin_section("2412");
/// assert!((section.alpha_zero_lift.si().to_degrees() + 2.077_240_40).abs() < 1e-7);
/// ```
#[must_use]
pub fn thin_section(designation: &str) -> ThinSection {
    let Some(section) = Designation::read(designation) else {
        return no_value();
    };
    let joint = elementary::acos(1.0 - 2.0 * section.joint());
    let mut integrals = Integrals::default();
    // At the joint itself both formulas give the same slope; elsewhere each is taken on its own side.
    for (from, to) in [(0.0, joint), (joint, PI)] {
        if to > from {
            integrals.add(from, to, STRETCH, |x| section.mean_line(x).1);
        }
    }
    integrals.section()
}

/// Thin-airfoil theory of a mean line given by points.
///
/// - `x`: places along the chord, rising from the leading edge to the trailing edge, in any unit of length.
/// - `z`: height of the mean line at each, in the same unit.
///
/// A cubic spline is laid through the points, so that a smooth line needs few of them; angles are from the x axis. NaN where
/// x does not rise or there are fewer than two points.
///
/// Source: as for [`thin_section`].
///
/// # Example
/// ```
/// use engine::section::thin_section_of;
/// let x = [0.0, 0.25, 0.5, 0.75, 1.0];
/// let z = x.map(|x| 4.0 * 0.04 * x * (1.0 - x));
/// let arc = thin_section_of(&x, &z);
/// assert!((arc.cm_quarter + std::f64::consts::PI * 0.04).abs() < 1e-9);
/// ```
#[must_use]
pub fn thin_section_of(x: &[f64], z: &[f64]) -> ThinSection {
    let (Some(spline), Some(first), Some(last)) = (Spline::new(x, z), x.first(), x.last()) else {
        return no_value();
    };
    let chord = last - first;
    let angle = |x: f64| elementary::acos((1.0 - 2.0 * (x - first) / chord).clamp(-1.0, 1.0));
    let mut integrals = Integrals::default();
    for (interval, (from, to)) in spline.intervals().enumerate() {
        integrals.add(angle(from), angle(to), BETWEEN, |part| {
            spline.slope(interval, first + part * chord)
        });
    }
    integrals.section()
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Classical thin-airfoil theory, the integrals done a second way: zero-lift angle in degrees and moment.
    #[test]
    fn mean_lines_have_the_theoretical_values() {
        for (designation, angle, moment) in [
            ("0012", 0.0, 0.0),
            ("2412", -2.077_240_40, f64::NAN),
            ("6712", -9.129_585_14, f64::NAN),
            ("21012", -0.625_694_33, f64::NAN),
            ("23012", -1.093_586_67, -0.012_836),
            ("24012", -1.291_611_99, f64::NAN),
            ("22112", -0.715_022_11, -0.001_338_031_5),
            ("23112", -0.753_948_35, 0.001_131_307_2),
            ("25112", -0.902_979_48, 0.000_097_272_6),
        ] {
            let found = thin_section(designation);
            assert!(
                (found.alpha_zero_lift.si().to_degrees() - angle).abs() < 1e-7,
                "{designation}"
            );
            if !moment.is_nan() {
                let within = if designation == "23012" { 1e-6 } else { 1e-9 };
                assert!(
                    (found.cm_quarter - moment).abs() < within,
                    "{designation} {}",
                    found.cm_quarter
                );
            }
        }
        let line = thin_section("6412");
        assert!((line.cl_ideal - 0.768_073_614).abs() < 1e-8);
        assert!((line.alpha_ideal.si().to_degrees() - 0.772_270_28).abs() < 1e-7);
    }

    /// Cubic camber z = a x (1 - x)(k - x): cm = (pi a/4)(7/8 - k).
    #[test]
    fn a_cubic_given_by_points_is_exact() {
        let x: Vec<f64> = (0..9).map(|i| f64::from(i) / 8.0).collect();
        let z: Vec<f64> = x.iter().map(|x| 0.05 * x * (1.0 - x) * (1.2 - x)).collect();
        let found = thin_section_of(&x, &z);
        assert!((found.cm_quarter + 0.012_762_720_16).abs() < 1e-10);
        assert!((found.alpha_zero_lift.si() - 0.05 * (0.375 - 0.6)).abs() < 1e-10);
        assert!(
            thin_section_of(&[0.0, 0.0], &[0.0, 0.0])
                .cm_quarter
                .is_nan()
        );
    }
}
