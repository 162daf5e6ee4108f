//! A plain flap by thin-airfoil theory.

use crate::control::control_effectiveness;
use crate::elementary;
use crate::numeric::Sum;
use crate::quantity::constants::PI;
use crate::quantity::{PerAngle, Typed};

/// Intervals of Simpson's rule over the flap.
const INTERVALS: usize = 2_000;

/// What a flap does to a section.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct FlapEffect {
    /// Change of the angle of no lift per flap angle, positive: trailing edge down lowers it.
    pub effectiveness: f64,
    /// Lift slope with the flap angle at constant angle of attack.
    pub lift_slope: PerAngle,
    /// Slope of the moment coefficient about the quarter chord with the flap angle, at constant angle of attack.
    pub moment_slope: PerAngle,
    /// Slope of the hinge moment coefficient with the angle of attack, on flap chord squared, trailing edge down positive.
    pub hinge_alpha: PerAngle,
    /// The same with the flap angle.
    pub hinge_delta: PerAngle,
}

/// A plain, sealed flap on a thin section.
///
/// - `chord_ratio`: flap chord aft of the hinge over total chord, above 0 and below 1.
/// - `section_factor`: by which all results are multiplied; 1 is thin-airfoil theory, which reads 15 to 30 % high at real
///   gaps and angles (common practice).
///
/// With cos(t) = 2 chord_ratio - 1: effectiveness 1 - (t - sin t)/pi, moment slope sin t (cos t - 1)/2; hinge moments are
/// the pressure difference integrated over the flap. Small angles, attached flow, sealed gap. NaN for other ratios.
///
/// Source: H. Glauert, R&M 1095; The Elements of Aerofoil and Airscrew Theory, chapter VII.
///
/// # Example
/// ```
/// use engine::section::flap_effect;
/// assert!((flap_effect(0.25, 1.0).effectiveness - 0.608_997_781).abs() < 1e-9);
/// ```
#[must_use]
pub fn flap_effect(chord_ratio: f64, section_factor: f64) -> FlapEffect {
    let valid = chord_ratio > 0.0 && chord_ratio < 1.0;
    let ratio = if valid { chord_ratio } else { f64::NAN };
    let hinge = elementary::acos(2.0 * ratio - 1.0);
    let sine = elementary::sin(hinge);
    let effectiveness = control_effectiveness(ratio, 1.0, section_factor);
    let moment = section_factor * sine * (2.0 * ratio - 2.0) / 2.0;
    let cotangent = |t: f64| elementary::cos(t / 2.0) / elementary::sin(t / 2.0);
    let alpha = over_flap(hinge, ratio, cotangent);
    let delta = over_flap(hinge, ratio, |t| {
        let both = elementary::sin((t + hinge) / 2.0) / elementary::sin((t - hinge) / 2.0);
        (1.0 - hinge / PI) * cotangent(t) + elementary::ln(both.abs()) / PI
    });
    FlapEffect {
        effectiveness,
        lift_slope: PerAngle::from_si(2.0 * PI * effectiveness),
        moment_slope: PerAngle::from_si(moment),
        hinge_alpha: PerAngle::from_si(section_factor * alpha),
        hinge_delta: PerAngle::from_si(section_factor * delta),
    }
}

/// Hinge moment coefficient of a pressure difference of 4 times `load`, t running from the hinge to the trailing edge. The
/// steps are close together at the hinge, where the load of a deflected flap has a logarithm.
fn over_flap(hinge: f64, ratio: f64, load: impl Fn(f64) -> f64) -> f64 {
    if hinge.is_nan() {
        return f64::NAN;
    }
    let span = PI - hinge;
    let mut sum = Sum::default();
    for i in 1..INTERVALS {
        let part = i as f64 / INTERVALS as f64;
        let t = hinge + span * part * part * part;
        let weight = if i % 2 == 1 { 4.0 } else { 2.0 };
        let arm = (elementary::cos(hinge) - elementary::cos(t)) / 2.0;
        let step = span * 3.0 * part * part * elementary::sin(t) / 2.0;
        sum.add(weight / (3.0 * INTERVALS as f64) * 4.0 * load(t) * arm * step);
    }
    // At both ends of the flap the arm or the step is 0.
    -sum.total() / (ratio * ratio)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Glauert's closed forms; hinge moments by a series of 20,000 terms.
    #[test]
    fn a_quarter_chord_flap_has_glauerts_values() {
        let flap = flap_effect(0.25, 1.0);
        assert!((flap.moment_slope.si() + 0.649_519_052_8).abs() < 1e-9);
        assert!(
            (flap.hinge_alpha.si() + 0.565_347_256_5).abs() < 1e-6,
            "{}",
            flap.hinge_alpha.si()
        );
        assert!(
            (flap.hinge_delta.si() + 0.943_607_864_2).abs() < 1e-5,
            "{}",
            flap.hinge_delta.si()
        );
        let shallow = flap_effect(0.15, 1.0);
        assert!((shallow.moment_slope.si() + 0.607_021_416_4).abs() < 1e-9);
        assert!(
            flap_effect(0.0, 1.0).effectiveness.is_nan()
                && flap_effect(1.2, 1.0).hinge_delta.si().is_nan()
        );
    }
}
