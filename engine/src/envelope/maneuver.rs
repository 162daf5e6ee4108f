//! Manoeuvring load factors, the checked manoeuvre, unsymmetrical tail loads and factors of safety.

use super::category::Category;
use super::rule::Rule;
use super::{cs_22, cs_vla, f2245, part_23};
use crate::quantity::{AngularAcceleration, EquivalentAirspeed, Force, Typed};

/// Limit manoeuvring load factors, the least that a set of rules allows. What it does not have is a NaN.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct LoadFactors {
    /// Positive, up to the dive speed unless the next says otherwise.
    pub positive: f64,
    /// Negative, at the design cruising speed (of CS-22 at the manoeuvring speed).
    pub negative: f64,
    /// Positive at the dive speed.
    pub positive_at_dive: f64,
    /// Negative at the dive speed.
    pub negative_at_dive: f64,
    /// Positive with flaps fully extended.
    pub flaps: f64,
}

impl LoadFactors {
    /// Of a category that a set of rules does not have.
    pub(super) const NONE: Self = Self {
        positive: f64::NAN,
        negative: f64::NAN,
        positive_at_dive: f64::NAN,
        negative_at_dive: f64::NAN,
        flaps: f64::NAN,
    };
}

/// Limit manoeuvring load factors of a set of rules.
///
/// - `rule`: 14 CFR 23.337, 23.333(b), 23.345(a); VLA 337, 333(b), 345(a); CS 22.337, 22.345; F2245, of which those at the
///   dive speed and with flaps are not coded. Stated factors have no value here.
/// - `weight`: design maximum take-off weight, on which the normal and commuter category of 14 CFR 23 depends:
///   2.1 + 24,000/(W + 10,000), W in pounds, and need not exceed 3.8.
/// - `category`: of 14 CFR 23 and CS-22; the other two have the normal one only.
///
/// The negative factor holds at the design cruising speed (CS-22: manoeuvring speed) and goes linearly with speed to
/// that at the dive speed. A category that the set does not have gives NaN, no value.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Category, Rule, limit_load_factor};
/// use engine::quantity::{Force, Typed};
/// let light = limit_load_factor(Rule::Part23, Force::from_si(2500.0), Category::Normal);
/// assert_eq!((light.positive, light.negative_at_dive, light.flaps), (3.8, 0.0, 2.0));
/// assert!((light.negative + 1.52).abs() < 1e-12);
/// ```
pub fn limit_load_factor(rule: Rule, weight: Force, category: Category) -> LoadFactors {
    let normal = category == Category::Normal;
    match rule {
        Rule::Part23 => part_23::load_factors(weight.si() / part_23::POUND, category),
        Rule::CsVla if normal => cs_vla::LOAD_FACTORS,
        Rule::F2245 if normal => f2245::LOAD_FACTORS,
        Rule::Cs22 => cs_22::load_factors(category),
        Rule::CsVla | Rule::F2245 | Rule::Stated => LoadFactors::NONE,
    }
}

/// Pitch accelerations of the checked manoeuvre, each with the load factor at which it acts.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct PitchAcceleration {
    /// Nose-up acceleration, positive.
    pub nose_up: AngularAcceleration,
    /// Nose-down acceleration, negative.
    pub nose_down: AngularAcceleration,
    /// Load factor at the nose-up acceleration, 1.
    pub n_nose_up: f64,
    /// Load factor at the nose-down acceleration, the limit factor.
    pub n_nose_down: f64,
}

/// Pitch accelerations of the checked manoeuvre above the manoeuvring speed.
///
/// - `rule`: 14 CFR 23.423(b), (39/V) n (n - 1.5) with V in knots, or VLA 423(b), (20.1/V) n (n - 1.5) with V in m/s,
///   which is 0.18 % more; other sets have no value here.
/// - `limit_factor`: positive limit manoeuvring load factor n used in design.
/// - `eas`: speed at which the manoeuvre begins.
///
/// The tail load of each is the balancing load at its load factor and the increment that its acceleration asks for. For
/// factors of 1.5 and more; a speed of zero gives no value (a number that is not finite).
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, maneuver_pitch_acceleration};
/// use engine::quantity::{EquivalentAirspeed, Typed};
/// let speed = EquivalentAirspeed::from_si(100.0 * 1852.0 / 3600.0);
/// let pitch = maneuver_pitch_acceleration(Rule::Part23, 3.8, speed);
/// assert!((pitch.nose_up.si() - 3.4086).abs() < 1e-9);
/// assert_eq!((pitch.n_nose_up, pitch.n_nose_down), (1.0, 3.8));
/// ```
pub fn maneuver_pitch_acceleration(
    rule: Rule,
    limit_factor: f64,
    eas: EquivalentAirspeed,
) -> PitchAcceleration {
    let constant = match rule {
        Rule::Part23 => part_23::PITCH_CONSTANT_KNOTS * part_23::KNOT,
        Rule::CsVla => cs_vla::PITCH_CONSTANT,
        Rule::F2245 | Rule::Cs22 | Rule::Stated => f64::NAN,
    };
    let nose_up = constant / eas.si() * limit_factor * (limit_factor - 1.5);
    PitchAcceleration {
        nose_up: AngularAcceleration::from_si(nose_up),
        nose_down: AngularAcceleration::from_si(-nose_up),
        n_nose_up: 1.0,
        n_nose_down: limit_factor,
    }
}

/// Parts of the greatest symmetrical loading on the two sides of the horizontal tail.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct TailShare {
    /// On the side of the greater load.
    pub greater: f64,
    /// On the other side.
    pub lesser: f64,
}

/// Unsymmetrical loads of the horizontal tail: 100 % of the greatest symmetrical loading on one side, on the other
/// 100 - 10 (n - 1) per cent, at most 80 and not below none.
///
/// - `rule`: 14 CFR 23.427 or VLA 427; other sets have no value here.
/// - `n`: positive limit manoeuvring load factor.
///
/// Not for tails with marked dihedral nor for those that the fin carries.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, unsymmetrical_tail_share};
/// let share = unsymmetrical_tail_share(Rule::CsVla, 3.8);
/// assert!((share.lesser - 0.72).abs() < 1e-12);
/// ```
pub fn unsymmetrical_tail_share(rule: Rule, n: f64) -> TailShare {
    match rule {
        Rule::Part23 | Rule::CsVla => TailShare {
            greater: 1.0,
            lesser: (1.0 - 0.1 * (n - 1.0)).clamp(0.0, 0.8),
        },
        Rule::F2245 | Rule::Cs22 | Rule::Stated => TailShare {
            greater: f64::NAN,
            lesser: f64::NAN,
        },
    }
}

/// Factor of safety, ultimate load over limit load: 14 CFR 23.303, VLA 303, F2245; other sets have no value here.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, factor_of_safety};
/// assert_eq!(factor_of_safety(Rule::Part23), 1.5);
/// ```
pub fn factor_of_safety(rule: Rule) -> f64 {
    match rule {
        Rule::Part23 => part_23::FACTOR_OF_SAFETY,
        Rule::CsVla => cs_vla::FACTOR_OF_SAFETY,
        Rule::F2245 => f2245::FACTOR_OF_SAFETY,
        Rule::Cs22 | Rule::Stated => f64::NAN,
    }
}

/// Fitting factor, by which ultimate loads of a fitting are multiplied where no test shows its stresses: 14 CFR 23.625,
/// VLA 625; other sets have no value here.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, fitting_factor};
/// assert_eq!(fitting_factor(Rule::CsVla), 1.15);
/// ```
pub fn fitting_factor(rule: Rule) -> f64 {
    match rule {
        Rule::Part23 => part_23::FITTING_FACTOR,
        Rule::CsVla => cs_vla::FITTING_FACTOR,
        Rule::F2245 | Rule::Cs22 | Rule::Stated => f64::NAN,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn part_23(pounds: f64, category: Category) -> LoadFactors {
        let weight = Force::from_si(pounds * part_23::POUND);
        limit_load_factor(Rule::Part23, weight, category)
    }

    /// 14 CFR 23.337: 3.8 up to 4117.65 lb, then 2.1 + 24,000/(W + 10,000).
    #[test]
    fn the_factor_of_heavy_airplanes_falls() {
        for (pounds, expected) in [
            (1500.0, 3.8),
            (4117.0, 3.8),
            (4118.0, 3.799_957_501),
            (5000.0, 3.7),
            (6000.0, 3.6),
            (12_500.0, 3.166_666_667),
        ] {
            let found = part_23(pounds, Category::Normal);
            assert_relative_eq!(found.positive, expected, max_relative = 1e-9);
            assert_eq!(found, part_23(pounds, Category::Commuter));
        }
    }

    /// 14 CFR 23.337(b) and 23.333(b); the negative factor of the simplified criteria, appendix A, is another.
    #[test]
    fn negative_factors_differ_between_categories_and_sets() {
        for (category, positive, negative, at_dive) in [
            (Category::Normal, 3.8, -1.52, 0.0),
            (Category::Utility, 4.4, -1.76, -1.0),
            (Category::Acrobatic, 6.0, -3.0, -1.0),
        ] {
            let found = part_23(1500.0, category);
            assert_eq!(
                (found.positive, found.positive_at_dive),
                (positive, positive)
            );
            assert_relative_eq!(found.negative, negative, max_relative = 1e-12);
            assert_eq!(found.negative_at_dive, at_dive);
        }
        let weight = Force::from_si(4500.0);
        let of = |rule, category| limit_load_factor(rule, weight, category);
        let vla = of(Rule::CsVla, Category::Normal);
        assert_eq!((vla.negative, vla.negative_at_dive), (-1.5, 0.0));
        assert_eq!(of(Rule::F2245, Category::Normal).negative, -2.0);
        assert!(of(Rule::F2245, Category::Normal).flaps.is_nan());
        let utility = of(Rule::Cs22, Category::Utility);
        assert_eq!((utility.negative, utility.negative_at_dive), (-2.65, -1.5));
        assert_eq!((utility.positive, utility.positive_at_dive), (5.3, 4.0));
        for (rule, category) in [
            (Rule::Cs22, Category::Normal),
            (Rule::CsVla, Category::Acrobatic),
            (Rule::F2245, Category::Commuter),
            (Rule::Stated, Category::Normal),
        ] {
            assert!(of(rule, category).positive.is_nan());
        }
    }

    /// 14 CFR 23.423(b) with V in knots; VLA 423(b) has V in m/s and rounds to 0.18 % more.
    #[test]
    fn pitch_accelerations_of_the_checked_manoeuvre() {
        for (n, knots, expected) in [
            (3.8, 100.0, 3.4086),
            (3.8, 120.0, 2.8405),
            (4.4, 110.0, 4.524),
            (6.0, 130.0, 8.1),
            (4.0, 60.0, 6.5),
        ] {
            let speed = EquivalentAirspeed::from_si(knots * part_23::KNOT);
            let us = maneuver_pitch_acceleration(Rule::Part23, n, speed);
            assert_relative_eq!(us.nose_up.si(), expected, max_relative = 1e-12);
            assert_eq!(us.nose_down.si(), -us.nose_up.si());
            let vla = maneuver_pitch_acceleration(Rule::CsVla, n, speed);
            let more = vla.nose_up.si() / us.nose_up.si();
            assert_relative_eq!(more, 20.1 / (39.0 * 1852.0 / 3600.0), max_relative = 1e-12);
            assert!((more - 1.0018).abs() < 1e-4);
            let none = maneuver_pitch_acceleration(Rule::Cs22, n, speed);
            assert!(none.nose_up.si().is_nan());
        }
    }

    /// 14 CFR 23.427: 72 % at 3.8, 66 % at 4.4, 50 % at 6.0.
    #[test]
    fn the_other_side_carries_less_the_higher_the_factor() {
        for (n, expected) in [
            (3.8, 0.72),
            (4.4, 0.66),
            (6.0, 0.5),
            (2.0, 0.8),
            (12.0, 0.0),
        ] {
            let share = unsymmetrical_tail_share(Rule::Part23, n);
            assert_relative_eq!(share.lesser, expected, max_relative = 1e-12);
            assert_eq!(share.greater, 1.0);
        }
        assert!(unsymmetrical_tail_share(Rule::F2245, 4.0).lesser.is_nan());
    }

    #[test]
    fn factors_that_are_not_coded_have_no_value() {
        assert!(factor_of_safety(Rule::Stated).is_nan());
        assert!(fitting_factor(Rule::F2245).is_nan());
    }
}
