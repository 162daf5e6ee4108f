//! 14 CFR part 23 before amendment 64, in the state of amendment 62. Its formulas are in knots, feet, pounds and slugs.

use super::category::Category;
use super::gust::SpeedPoint;
use super::maneuver::LoadFactors;

/// Foot in metres, knot in metres a second, pound-force in newtons: exact, NIST SP 811, appendix B.
pub(super) const FOOT: f64 = 0.3048;
pub(super) const KNOT: f64 = 1852.0 / 3600.0;
pub(super) const POUND: f64 = 4.448_221_615_260_5;
/// Pound-force per square foot in pascals.
pub(super) const PSF: f64 = POUND / (FOOT * FOOT);

/// 23.303.
pub(super) const FACTOR_OF_SAFETY: f64 = 1.5;
/// 23.625, where strength is not proven by tests that simulate the actual stresses.
pub(super) const FITTING_FACTOR: f64 = 1.15;
/// 23.341(c), 23.425(d): 2/rho0 in knots and feet a second, which is 498.54, as the rule rounds it.
pub(super) const GUST_CONSTANT: f64 = 498.0;
/// 23.423(b): pitch acceleration of the checked manoeuvre, speed in knots.
pub(super) const PITCH_CONSTANT_KNOTS: f64 = 39.0;
/// 23.335(d): flap speed over the stalling speeds with flaps up and down.
pub(super) const FLAP_SPEEDS: (f64, f64) = (1.4, 1.8);
/// 23.335(a): the design cruising speed need not exceed this part of the level speed.
pub(super) const CRUISE_OF_LEVEL: f64 = 0.9;
/// 23.335(b)(1): dive speed over design cruising speed.
pub(super) const DIVE_OF_CRUISE: f64 = 1.25;

/// 23.337: limit manoeuvring load factors; 23.333(b): at the dive speed; 23.345(a): with flaps.
pub(super) fn load_factors(pounds: f64, category: Category) -> LoadFactors {
    let positive = match category {
        Category::Normal | Category::Commuter => (2.1 + 24_000.0 / (pounds + 10_000.0)).min(3.8),
        Category::Utility => 4.4,
        Category::Acrobatic => 6.0,
    };
    let negative_part = match category {
        Category::Acrobatic => 0.5,
        _ => 0.4,
    };
    let negative_at_dive = match category {
        Category::Normal | Category::Commuter => 0.0,
        Category::Utility | Category::Acrobatic => -1.0,
    };
    LoadFactors {
        positive,
        negative: -negative_part * positive,
        positive_at_dive: positive,
        negative_at_dive,
        flaps: 2.0,
    }
}

/// 23.335(a): least design cruising speed in knots for a wing loading in pounds per square foot. The factor falls
/// linearly from 20 lb/ft^2 to 28.6 at 100 lb/ft^2.
pub(super) fn cruising_speed(psf: f64, category: Category) -> f64 {
    let factor = match category {
        Category::Acrobatic => 36.0,
        _ => 33.0,
    };
    falling(psf, factor, 28.6) * psf.sqrt()
}

/// 23.335(b)(2) to (4): dive speed over the least design cruising speed, falling to 1.35 at 100 lb/ft^2.
pub(super) fn dive_of_least_cruise(psf: f64, category: Category) -> f64 {
    let factor = match category {
        Category::Normal | Category::Commuter => 1.40,
        Category::Utility => 1.50,
        Category::Acrobatic => 1.55,
    };
    falling(psf, factor, 1.35)
}

/// A factor that holds up to 20 lb/ft^2 and is `end` from 100 lb/ft^2 on.
fn falling(psf: f64, factor: f64, end: f64) -> f64 {
    let part = ((psf - 20.0) / 80.0).clamp(0.0, 1.0);
    factor + (end - factor) * part
}

/// 23.333(c), 23.345(a): derived gust velocities in feet a second for an altitude in feet: full up to 20,000 ft, then
/// linear to 50,000 ft, above which the rule has none. The gust with flaps does not change with altitude. That at VB is
/// of the commuter category.
pub(super) fn gust_velocity(point: SpeedPoint, feet: f64) -> f64 {
    let (low, high) = match point {
        SpeedPoint::VB => (66.0, 38.0),
        SpeedPoint::VC => (50.0, 25.0),
        SpeedPoint::VD => (25.0, 12.5),
        SpeedPoint::VF => return 25.0,
    };
    if feet > 50_000.0 {
        return f64::NAN;
    }
    low + (high - low) * ((feet - 20_000.0) / 30_000.0).max(0.0)
}

/// 23.415(a): least design speed of ground gusts in feet a second.
pub(super) fn ground_gust_speed(psf: f64) -> f64 {
    (14.6 * psf.sqrt() + 14.6).min(88.0)
}
