//! Stalling and design speeds.

#![allow(
    non_snake_case,
    reason = "arguments and results carry the symbols of the trade: S, CL_max, VA"
)]

use super::category::Category;
use super::rule::Rule;
use super::{cs_vla, part_23};
use crate::quantity::{Area, EquivalentAirspeed, Force, MassDensity, Typed, Velocity};

/// Stalling speed at a load factor of 1, sqrt(2 weight/(density S CL_max)).
///
/// - `weight`: weight, a force.
/// - `S`: reference area of `CL_max`.
/// - `CL_max`: largest lift coefficient of the trimmed airplane, tail load within.
/// - `density`: air density; with that of sea level, 1.225 kg/m^3, the speed is an equivalent airspeed.
///
/// A coefficient of zero or less gives no value (a number that is not finite).
///
/// Source: definition of the lift coefficient.
///
/// # Example
/// ```
/// use engine::envelope::stall_speed;
/// use engine::quantity::{Area, Force, MassDensity, Typed};
/// let speed = stall_speed(Force::from_si(10_787.3), Area::from_si(14.0), 1.45, MassDensity::from_si(1.225));
/// assert!((speed.si() - 29.455_6).abs() < 1e-3);
/// ```
pub fn stall_speed(weight: Force, S: Area, CL_max: f64, density: MassDensity) -> Velocity {
    Velocity::from_si((2.0 * weight.si() / (density.si() * S.si() * CL_max)).sqrt())
}

/// The least design speeds that a set of rules allows, equivalent airspeeds.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct DesignSpeeds {
    /// Manoeuvring speed.
    pub VA: EquivalentAirspeed,
    /// Design cruising speed.
    pub VC: EquivalentAirspeed,
    /// Design dive speed.
    pub VD: EquivalentAirspeed,
    /// Flap speed.
    pub VF: EquivalentAirspeed,
}

impl DesignSpeeds {
    /// The speeds of a set of rules that is not coded.
    const NONE: Self = {
        let none = EquivalentAirspeed::new(Velocity {
            dimension: std::marker::PhantomData,
            units: std::marker::PhantomData,
            value: f64::NAN,
        });
        Self {
            VA: none,
            VC: none,
            VD: none,
            VF: none,
        }
    };
}

/// Least design speeds of a set of rules.
///
/// - `rule`: 14 CFR 23.335 or VLA 335 and 345(b); other sets have no value here.
/// - `weight`, `S`: design maximum weight and wing area, of which the wing loading is made.
/// - `stall_speed`, `stall_speed_flaps`: at that weight, flaps up and fully down.
/// - `n`: positive limit manoeuvring load factor used in design.
/// - `category`: of 14 CFR 23; CS-VLA has the normal one only.
/// - `level_speed`: greatest speed in level flight at maximum continuous power; a NaN where it is not known.
///
/// VC of 14 CFR 23 is 33 sqrt(W/S) knots, 36 acrobatic, W/S in lb/ft^2, the factor falling above 20 lb/ft^2 to 28.6 at 100;
/// of CS-VLA 2.4 sqrt(W/S) m/s, W/S in N/m^2; neither need exceed 0.9 of the level speed. VD is the greater of 1.25 VC and
/// 1.40 VC (utility 1.50, acrobatic 1.55, falling above 20 lb/ft^2 to 1.35), the least VC being used. VA is stall_speed
/// sqrt(n) and need not exceed VC; where a higher VC is used in design, VA is to be at least the smaller of it and
/// stall_speed sqrt(n). VF is the greater of 1.4 stall_speed and 1.8 stall_speed_flaps.
///
/// Wing loadings up to 100 lb/ft^2 (4788 N/m^2); above, the factors stay.
///
/// Source: 14 CFR 23.335 before amendment 64; CS-VLA 335, 345.
///
/// # Example
/// ```
/// use engine::envelope::{Category, Rule, design_speeds};
/// use engine::quantity::{Area, EquivalentAirspeed, Force, Typed};
/// let eas = EquivalentAirspeed::from_si;
/// let speeds = design_speeds(
///     Rule::CsVla, Force::from_si(4900.0), Area::from_si(12.0), eas(20.0), eas(17.0), 3.8, Category::Normal,
///     eas(f64::NAN));
/// assert!((speeds.VC.si() - 48.497).abs() < 1e-3);
/// assert!((speeds.VD.si() - 1.4 * speeds.VC.si()).abs() < 1e-12);
/// assert!((speeds.VA.si() - 38.987).abs() < 1e-3);
/// assert!((speeds.VF.si() - 30.6).abs() < 1e-12);
/// ```
#[allow(
    clippy::too_many_arguments,
    reason = "each is a figure of its own in the paragraph"
)]
pub fn design_speeds(
    rule: Rule,
    weight: Force,
    S: Area,
    stall_speed: EquivalentAirspeed,
    stall_speed_flaps: EquivalentAirspeed,
    n: f64,
    category: Category,
    level_speed: EquivalentAirspeed,
) -> DesignSpeeds {
    let wing_loading = weight.si() / S.si();
    let (cruise, of_level, of_cruise, of_least, flaps) = match rule {
        Rule::Part23 => {
            let psf = wing_loading / part_23::PSF;
            (
                part_23::cruising_speed(psf, category) * part_23::KNOT,
                part_23::CRUISE_OF_LEVEL,
                part_23::DIVE_OF_CRUISE,
                part_23::dive_of_least_cruise(psf, category),
                part_23::FLAP_SPEEDS,
            )
        }
        Rule::CsVla if category == Category::Normal => (
            cs_vla::CRUISE * wing_loading.sqrt(),
            cs_vla::CRUISE_OF_LEVEL,
            cs_vla::DIVE_OF_CRUISE,
            cs_vla::DIVE_OF_LEAST_CRUISE,
            cs_vla::FLAP_SPEEDS,
        ),
        _ => return DesignSpeeds::NONE,
    };
    let eas = EquivalentAirspeed::from_si;
    // Of a number and a NaN, `min` takes the number: without a level speed the formula stands.
    let least_cruise = cruise.min(of_level * level_speed.si());
    DesignSpeeds {
        VA: eas((stall_speed.si() * n.sqrt()).min(least_cruise)),
        VC: eas(least_cruise),
        VD: eas(least_cruise * of_least.max(of_cruise)),
        VF: eas((flaps.0 * stall_speed.si()).max(flaps.1 * stall_speed_flaps.si())),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn knots(value: f64) -> EquivalentAirspeed {
        EquivalentAirspeed::from_si(value * part_23::KNOT)
    }

    fn speeds(rule: Rule, psf: f64, category: Category, level: f64) -> DesignSpeeds {
        let (weight, area) = (
            Force::from_si(psf * part_23::PSF * 12.0),
            Area::from_si(12.0),
        );
        design_speeds(
            rule,
            weight,
            area,
            knots(48.0),
            knots(40.0),
            3.8,
            category,
            knots(level),
        )
    }

    fn kt(speed: EquivalentAirspeed) -> f64 {
        speed.si() / part_23::KNOT
    }

    /// 14 CFR 23.335: 33 sqrt(15) = 127.808 knots, 1.40, 1.50 and 1.55 times for the dive speed.
    #[test]
    fn part_23_at_a_wing_loading_of_15() {
        let normal = speeds(Rule::Part23, 15.0, Category::Normal, f64::NAN);
        assert_relative_eq!(kt(normal.VC), 127.808_450_4, max_relative = 1e-9);
        assert_relative_eq!(kt(normal.VD), 1.4 * 127.808_450_4, max_relative = 1e-9);
        assert_relative_eq!(kt(normal.VA), 48.0 * 3.8_f64.sqrt(), max_relative = 1e-12);
        assert_relative_eq!(kt(normal.VF), 72.0, max_relative = 1e-12);
        let utility = speeds(Rule::Part23, 15.0, Category::Utility, f64::NAN);
        assert_relative_eq!(kt(utility.VD), 1.5 * 127.808_450_4, max_relative = 1e-9);
        let acrobatic = speeds(Rule::Part23, 15.0, Category::Acrobatic, f64::NAN);
        assert_relative_eq!(
            kt(acrobatic.VC),
            36.0 * 15.0_f64.sqrt(),
            max_relative = 1e-12
        );
        assert_relative_eq!(
            kt(acrobatic.VD),
            1.55 * kt(acrobatic.VC),
            max_relative = 1e-12
        );
    }

    #[test]
    fn factors_fall_between_20_and_100_pounds_per_square_foot() {
        let at = |psf: f64| speeds(Rule::Part23, psf, Category::Normal, f64::NAN);
        let factor = |psf: f64| kt(at(psf).VC) / psf.sqrt();
        assert_relative_eq!(factor(20.0), 33.0, max_relative = 1e-12);
        assert_relative_eq!(factor(60.0), 30.8, max_relative = 1e-12);
        assert_relative_eq!(factor(100.0), 28.6, max_relative = 1e-12);
        assert_relative_eq!(
            at(60.0).VD.si() / at(60.0).VC.si(),
            1.375,
            max_relative = 1e-12
        );
        assert_relative_eq!(
            at(100.0).VD.si() / at(100.0).VC.si(),
            1.35,
            max_relative = 1e-12
        );
    }

    #[test]
    fn no_speed_need_exceed_what_level_flight_gives() {
        let slow = speeds(Rule::Part23, 15.0, Category::Normal, 100.0);
        assert_relative_eq!(kt(slow.VC), 90.0, max_relative = 1e-12);
        assert_relative_eq!(kt(slow.VD), 126.0, max_relative = 1e-12);
        assert_relative_eq!(kt(slow.VA), 90.0, max_relative = 1e-12);
    }

    /// 33 sqrt(lb/ft^2) knots are 2.4534 sqrt(N/m^2) m/s, so that CS-VLA asks for 2.2 % less.
    #[test]
    fn the_cruising_speeds_of_the_two_sets_differ() {
        let part_23 = speeds(Rule::Part23, 8.0, Category::Normal, f64::NAN);
        let vla = speeds(Rule::CsVla, 8.0, Category::Normal, f64::NAN);
        assert_relative_eq!(
            part_23.VC.si() / vla.VC.si(),
            2.4534 / 2.4,
            max_relative = 2e-5
        );
    }

    #[test]
    fn what_is_not_coded_has_no_value() {
        for (rule, category) in [
            (Rule::CsVla, Category::Utility),
            (Rule::F2245, Category::Normal),
            (Rule::Cs22, Category::Utility),
            (Rule::Stated, Category::Normal),
        ] {
            let none = speeds(rule, 10.0, category, f64::NAN);
            assert!(none.VA.si().is_nan() && none.VF.si().is_nan());
        }
    }
}
