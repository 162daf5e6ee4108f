//! CS-22, sailplanes and powered sailplanes. Its formulas are in SI units.

use super::category::Category;
use super::gust::SpeedPoint;
use super::maneuver::LoadFactors;

/// 22.415: speed of ground gusts, 100 km/h, in metres a second.
pub(super) const GROUND_GUST_SPEED: f64 = 100.0 / 3.6;

/// 22.337: limit manoeuvring load factors n1, n4 at VA and n2, n3 at VD, of category U (utility) and A (acrobatic);
/// 22.345: with landing flaps. Other categories do not exist.
pub(super) fn load_factors(category: Category) -> LoadFactors {
    let (positive, negative, positive_at_dive, negative_at_dive) = match category {
        Category::Utility => (5.3, -2.65, 4.0, -1.5),
        Category::Acrobatic => (7.0, -5.0, 7.0, -5.0),
        Category::Normal | Category::Commuter => return LoadFactors::NONE,
    };
    LoadFactors {
        positive,
        negative,
        positive_at_dive,
        negative_at_dive,
        flaps: 4.0,
    }
}

/// 22.333(c) at VB and VD, 22.345 with landing flaps: gust velocities in metres a second. There is no VC.
pub(super) fn gust_velocity(point: SpeedPoint) -> f64 {
    match point {
        SpeedPoint::VB => 15.0,
        SpeedPoint::VC => f64::NAN,
        SpeedPoint::VD | SpeedPoint::VF => 7.5,
    }
}
