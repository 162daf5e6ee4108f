//! ASTM F2245, light sport airplanes: load factors, gusts and the factor of safety only.

use super::gust::SpeedPoint;
use super::maneuver::LoadFactors;

/// Clause of the factor of safety: ultimate over limit loads.
pub(super) const FACTOR_OF_SAFETY: f64 = 1.5;

/// Clause of the limit manoeuvring load factors. Those at the dive speed and with flaps are not coded.
pub(super) const LOAD_FACTORS: LoadFactors = LoadFactors {
    positive: 4.0,
    negative: -2.0,
    positive_at_dive: f64::NAN,
    negative_at_dive: f64::NAN,
    flaps: f64::NAN,
};

/// Clause of the gust load factors: gust velocities in metres a second at VC and VD, and with flaps at VF. There is no VB.
pub(super) fn gust_velocity(point: SpeedPoint) -> f64 {
    match point {
        SpeedPoint::VB => f64::NAN,
        SpeedPoint::VC => 15.0,
        SpeedPoint::VD | SpeedPoint::VF => 7.5,
    }
}
