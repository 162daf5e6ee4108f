//! Lift slope of a whole wing from its aspect ratio.

use crate::elementary;
use crate::quantity::constants::PI;
use crate::quantity::{Angle, PerAngle, Typed};

/// Lift slope of a wing, per radian, 2 pi A/(2 + sqrt(A^2 beta^2/kappa^2 (1 + tan^2(sweep)/beta^2) + 4)).
///
/// - `aspect_ratio`: A, span squared over area.
/// - `section_slope`: lift slope of the sections; kappa is that over 2 pi.
/// - `half_chord_sweep`: sweep of the half-chord line.
/// - `mach`: Mach number; beta^2 = 1 - mach^2.
///
/// Holds for subsonic, attached flow; without sweep and at low speed it is Helmbold's formula. No value at and above Mach
/// 1 and for an aspect ratio that is not positive.
///
/// Source: H. B. Helmbold (1942); E. C. Polhamus; USAF Stability and Control Datcom, 4.1.3.2.
///
/// # Example
/// ```
/// use engine::quantity::{Angle, PerAngle, Typed};
/// use engine::wing::lift_slope;
/// let slope = lift_slope(6.0, PerAngle::from_si(6.02), Angle::from_si(0.0), 0.0);
/// assert!((slope.si() - 4.396_947_217).abs() < 1e-8);
/// ```
pub fn lift_slope(
    aspect_ratio: f64,
    section_slope: PerAngle,
    half_chord_sweep: Angle,
    mach: f64,
) -> PerAngle {
    let beta = 1.0 - mach * mach;
    let kappa = section_slope.si() / (2.0 * PI);
    let tangent = elementary::tan(half_chord_sweep.si());
    let swept = aspect_ratio * aspect_ratio / (kappa * kappa) * (beta + tangent * tangent);
    let valid = beta > 0.0 && aspect_ratio > 0.0 && kappa > 0.0;
    let slope = 2.0 * PI * aspect_ratio / (2.0 + (swept + 4.0).sqrt());
    PerAngle::from_si(if valid { slope } else { f64::NAN })
}

/// Lift slope of an elliptically loaded wing, per radian, a0/(1 + a0/(pi A)).
///
/// - `aspect_ratio`: A, span squared over area.
/// - `section_slope`: lift slope of the sections, a0.
///
/// Holds for unswept wings of high aspect ratio in incompressible, attached flow; below an aspect ratio of about 4 it reads
/// high. No value for an aspect ratio that is not positive.
///
/// Source: Prandtl's lifting-line theory.
///
/// # Example
/// ```
/// use engine::quantity::{PerAngle, Typed};
/// use engine::wing::elliptic_lift_slope;
/// let slope = elliptic_lift_slope(8.0, PerAngle::from_si(2.0 * std::f64::consts::PI));
/// assert!((slope.si() - 5.026_548_246).abs() < 1e-9);
/// ```
pub fn elliptic_lift_slope(aspect_ratio: f64, section_slope: PerAngle) -> PerAngle {
    let slope = section_slope.si() / (1.0 + section_slope.si() / (PI * aspect_ratio));
    PerAngle::from_si(if aspect_ratio > 0.0 { slope } else { f64::NAN })
}
