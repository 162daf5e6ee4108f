//! CS-VLA, very light aeroplanes. Its formulas are in SI units.

use super::gust::SpeedPoint;
use super::maneuver::LoadFactors;

/// VLA 303.
pub(super) const FACTOR_OF_SAFETY: f64 = 1.5;
/// VLA 625.
pub(super) const FITTING_FACTOR: f64 = 1.15;
/// VLA 335(a): least design cruising speed in metres a second over the root of a wing loading in newtons a square metre.
pub(super) const CRUISE: f64 = 2.4;
/// VLA 335(a): the design cruising speed need not exceed this part of the level speed.
pub(super) const CRUISE_OF_LEVEL: f64 = 0.9;
/// VLA 335(b): dive speed over design cruising speed, and over the least one.
pub(super) const DIVE_OF_CRUISE: f64 = 1.25;
pub(super) const DIVE_OF_LEAST_CRUISE: f64 = 1.40;
/// VLA 345(b): flap speed over the stalling speeds with flaps up and down.
pub(super) const FLAP_SPEEDS: (f64, f64) = (1.4, 1.8);
/// VLA 423(b): pitch acceleration of the checked manoeuvre, speed in metres a second. 39 knots are 20.06 m/s.
pub(super) const PITCH_CONSTANT: f64 = 20.1;

/// VLA 337: limit manoeuvring load factors; VLA 333(b): at the dive speed; VLA 345(a): with flaps.
pub(super) const LOAD_FACTORS: LoadFactors = LoadFactors {
    positive: 3.8,
    negative: -1.5,
    positive_at_dive: 3.8,
    negative_at_dive: 0.0,
    flaps: 2.0,
};

/// VLA 333(c), VLA 345(a): gust velocities in metres a second. There is no VB.
pub(super) fn gust_velocity(point: SpeedPoint) -> f64 {
    match point {
        SpeedPoint::VB => f64::NAN,
        SpeedPoint::VC => 15.24,
        SpeedPoint::VD | SpeedPoint::VF => 7.62,
    }
}
