//! Gusts: mass ratio, alleviation, velocities of the rules, load factor and tail load increments.

use super::rule::Rule;
use super::{cs_22, cs_vla, f2245, part_23};
use crate::quantity::constants::{G0, RHO0};
use crate::quantity::{
    Area, EquivalentAirspeed, Force, Length, MassDensity, PerAngle, Pressure, Typed, Velocity,
};

/// Mass ratio of the airplane in a gust, 2 (W/S)/(rho c a g0).
///
/// - `wing_loading`: weight over wing area, a force per area, at the weight of the condition.
/// - `density`: air density at the altitude of the condition.
/// - `chord`: mean geometric chord, wing area over span, and not the mean aerodynamic one.
/// - `slope`: lift slope: of the airplane's normal force where wing and tail are gusted together by a rational method, of
///   the wing where the tail's gust load is a condition of its own.
///
/// The forms with a mass per area and without g, of CS-VLA and CS-22, give the same number.
///
/// Source: 14 CFR 23.341(c) before amendment 64; K. G. Pratt, NACA TN 2964 (1953).
///
/// # Example
/// ```
/// use engine::envelope::mass_ratio;
/// use engine::quantity::{Length, MassDensity, PerAngle, Pressure, Typed};
/// let wing_loading = Pressure::from_si(450.0 * 9.80665 / 12.0);
/// let mu = mass_ratio(wing_loading, MassDensity::from_si(1.225), Length::from_si(1.2), PerAngle::new(4.8));
/// assert!((mu - 10.629_252).abs() < 1e-6);
/// ```
pub fn mass_ratio(
    wing_loading: Pressure,
    density: MassDensity,
    chord: Length,
    slope: PerAngle,
) -> f64 {
    2.0 * wing_loading.si() / (density.si() * chord.si() * slope.si() * G0)
}

/// Gust alleviation factor, 0.88 mu/(5.3 + mu).
///
/// - `mass_ratio`: see [`mass_ratio`].
///
/// Of a rigid airplane free to rise but not to pitch, in a gust that grows over 12.5 chords; speeds below that of sound.
///
/// Source: 14 CFR 23.341(c) before amendment 64, CS-VLA 341, CS 22.341; K. G. Pratt, NACA TN 2964 (1953).
///
/// # Example
/// ```
/// use engine::envelope::gust_alleviation;
/// assert!((gust_alleviation(10.629_252) - 0.587_205).abs() < 1e-6);
/// ```
pub fn gust_alleviation(mass_ratio: f64) -> f64 {
    0.88 * mass_ratio / (5.3 + mass_ratio)
}

/// The design speed that a gust belongs to.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum SpeedPoint {
    /// Rough-air speed.
    VB,
    /// Design cruising speed.
    VC,
    /// Design dive speed.
    VD,
    /// Flap speed, flaps extended.
    VF,
}

impl SpeedPoint {
    /// Every speed, in a fixed order.
    pub const ALL: [Self; 4] = [Self::VB, Self::VC, Self::VD, Self::VF];

    /// The word by which it is chosen.
    pub const fn word(self) -> &'static str {
        match self {
            Self::VB => "VB",
            Self::VC => "VC",
            Self::VD => "VD",
            Self::VF => "VF",
        }
    }

    /// The speed of a word, letter for letter.
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|point| point.word() == word)
    }
}

/// Gust velocity of a set of rules, an equivalent one, without sign: it is to be met upward and downward.
///
/// - `rule`: 14 CFR 23.333(c) and 23.345(a), 50 ft/s at VC, 25 at VD and VF, 66 at VB of the commuter category; VLA 333(c)
///   and 345(a), 15.24 m/s and 7.62; F2245, 15 and 7.5; CS 22.333 and 22.345, 15 m/s at VB, 7.5 at VD and VF.
/// - `speed_point`: the design speed. A set without it gives NaN, no value.
/// - `altitude`: 14 CFR 23 only: full up to 20,000 ft, then linear to 50,000 ft (half, 38 ft/s at VB), no value above.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, SpeedPoint, gust_velocity};
/// use engine::quantity::{Length, Typed};
/// let gust = gust_velocity(Rule::Part23, SpeedPoint::VC, Length::from_si(0.0));
/// assert!((gust.si() - 15.24).abs() < 1e-12);
/// ```
pub fn gust_velocity(rule: Rule, speed_point: SpeedPoint, altitude: Length) -> Velocity {
    Velocity::from_si(match rule {
        Rule::Part23 => {
            part_23::FOOT * part_23::gust_velocity(speed_point, altitude.si() / part_23::FOOT)
        }
        Rule::CsVla => cs_vla::gust_velocity(speed_point),
        Rule::F2245 => f2245::gust_velocity(speed_point),
        Rule::Cs22 => cs_22::gust_velocity(speed_point),
        Rule::Stated => f64::NAN,
    })
}

/// Half the sea-level density, by which gust loads grow with gust and speed. 14 CFR 23 rounds it: 1/498 in knots, feet a
/// second and pounds is 0.107 % more.
fn half_density(rule: Rule) -> f64 {
    match rule {
        Rule::Part23 => part_23::PSF / (part_23::GUST_CONSTANT * part_23::FOOT * part_23::KNOT),
        Rule::CsVla | Rule::Cs22 | Rule::Stated => 0.5 * RHO0,
        Rule::F2245 => f64::NAN,
    }
}

/// Increment of the load factor in a gust, to be added to 1.
///
/// - `rule`: 14 CFR 23.341(c), K U V a/(498 W/S) in feet a second, knots and lb/ft^2; VLA 341, CS 22.341 and stated
///   gusts, rho0 V a K U/(2 W/S). F2245 has no value here.
/// - `gust`: gust velocity, positive upward, see [`gust_velocity`].
/// - `eas`: speed.
/// - `slope`: lift slope, as in [`mass_ratio`].
/// - `wing_loading`: weight over wing area, a force per area.
/// - `alleviation`: see [`gust_alleviation`]; 1 for a sharp-edged gust.
///
/// CS 22.341(b), by which the load factor need not exceed a multiple of (V/VS1)^2, is not applied.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, gust_load_increment};
/// use engine::quantity::{EquivalentAirspeed, PerAngle, Pressure, Typed, Velocity};
/// let wing_loading = Pressure::from_si(450.0 * 9.80665 / 12.0);
/// let dn = gust_load_increment(
///     Rule::CsVla, Velocity::from_si(15.24), EquivalentAirspeed::from_si(45.0), PerAngle::new(4.8), wing_loading,
///     0.587_205);
/// assert!((dn - 3.219_459).abs() < 1e-5);
/// ```
pub fn gust_load_increment(
    rule: Rule,
    gust: Velocity,
    eas: EquivalentAirspeed,
    slope: PerAngle,
    wing_loading: Pressure,
    alleviation: f64,
) -> f64 {
    let pressure = half_density(rule) * gust.si() * eas.si();
    alleviation * pressure * slope.si() / wing_loading.si()
}

/// Increment of the tail load in a gust, positive up for an upward gust.
///
/// - `rule`: 14 CFR 23.425(d), K U V a_t S_t (1 - downwash_slope)/498 in feet a second, knots and pounds; VLA 425, CS 22.425
///   and stated gusts, rho0 K U V a_t S_t (1 - downwash_slope)/2. F2245 has no value here.
/// - `gust`: gust velocity, positive upward.
/// - `eas`: speed.
/// - `tail_slope`, `tail_area`: lift slope of the tail on its own area.
/// - `downwash_slope`: change of downwash at the tail per change of angle of attack.
/// - `alleviation`: that of the wing, see [`gust_alleviation`].
///
/// It is added to the balancing load of steady level flight. For tails aft of the wing; a canard or a tandem wing meets the
/// gust first and is to be shown by a rational analysis (14 CFR 23.341(b)).
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, tail_gust_load};
/// use engine::quantity::{Area, EquivalentAirspeed, PerAngle, Typed, Velocity};
/// let load = tail_gust_load(
///     Rule::CsVla, Velocity::from_si(15.24), EquivalentAirspeed::from_si(50.0), PerAngle::new(3.6), Area::from_si(2.0),
///     0.4, 0.65);
/// assert!((load.si() - 0.5 * 1.225 * 0.65 * 15.24 * 50.0 * 3.6 * 2.0 * 0.6).abs() < 1e-9);
/// ```
pub fn tail_gust_load(
    rule: Rule,
    gust: Velocity,
    eas: EquivalentAirspeed,
    tail_slope: PerAngle,
    tail_area: Area,
    downwash_slope: f64,
    alleviation: f64,
) -> Force {
    let pressure = half_density(rule) * gust.si() * eas.si();
    let lift = pressure * tail_slope.si() * tail_area.si();
    Force::from_si(alleviation * lift * (1.0 - downwash_slope))
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn knots(value: f64) -> EquivalentAirspeed {
        EquivalentAirspeed::from_si(value * part_23::KNOT)
    }

    fn feet(value: f64) -> Velocity {
        Velocity::from_si(value * part_23::FOOT)
    }

    /// Worked in the units of 14 CFR 23.341(c): W/S in lb/ft^2, chord in ft, slope, V in knots, U in ft/s; with
    /// rho = 0.0023769 slug/ft^3 and g = 32.174 ft/s^2, which are rounded.
    #[test]
    fn gusts_of_part_23_in_its_own_units() {
        for (psf, chord, slope, v, gust, ratio, increment) in [
            (12.0, 4.5, 4.8, 110.0, 50.0, 14.529_194, 2.848_475),
            (12.0, 4.5, 4.8, 154.0, 25.0, 14.529_194, 1.993_933),
            (5.0, 4.5, 4.5, 60.0, 50.0, 6.457_420, 2.620_379),
            (16.0, 5.0, 4.6, 120.0, 50.0, 18.193_078, 2.360_525),
        ] {
            let wing_loading = Pressure::from_si(psf * part_23::PSF);
            let slope = PerAngle::new(slope);
            let chord = Length::from_si(chord * part_23::FOOT);
            let mu = mass_ratio(wing_loading, MassDensity::from_si(RHO0), chord, slope);
            assert_relative_eq!(mu, ratio, max_relative = 2e-5);
            let (gust, eas) = (feet(gust), knots(v));
            let relief = gust_alleviation(mu);
            let dn = gust_load_increment(Rule::Part23, gust, eas, slope, wing_loading, relief);
            assert_relative_eq!(dn, increment, max_relative = 1e-5);
        }
    }

    /// The rule's 498 is 498.54 exactly: 0.107 % more than the SI form.
    #[test]
    fn the_rounded_constant_is_followed() {
        let load = |rule| {
            let (slope, area) = (PerAngle::new(3.6), Area::from_si(3.0));
            tail_gust_load(rule, feet(50.0), knots(110.0), slope, area, 0.45, 0.64).si()
        };
        let more = load(Rule::Part23) / load(Rule::CsVla);
        assert_relative_eq!(more, 498.536_492_1 / 498.0, max_relative = 1e-9);
        assert_eq!(load(Rule::CsVla), load(Rule::Stated));
        assert!(load(Rule::F2245).is_nan());
    }

    /// 14 CFR 23.425(d) with K 0.644791: 422.999 lb, worked in knots, ft/s, ft^2 and lb.
    #[test]
    fn the_tail_in_a_gust() {
        let area = Area::from_si(30.0 * part_23::FOOT * part_23::FOOT);
        let (slope, gust) = (PerAngle::new(3.6), feet(50.0));
        let up = tail_gust_load(
            Rule::Part23,
            gust,
            knots(110.0),
            slope,
            area,
            0.45,
            0.644_791,
        );
        assert_relative_eq!(up.si() / part_23::POUND, 422.999, max_relative = 1e-5);
    }

    /// 50 and 25 ft/s are 15.24 and 7.62 m/s exactly; F2245 and CS-22 have 15 and 7.5.
    #[test]
    fn gust_velocities_of_the_sets() {
        let sea = Length::from_si(0.0);
        let at = |rule, point| gust_velocity(rule, point, sea).si();
        for (point, rounded) in [(SpeedPoint::VC, 15.24), (SpeedPoint::VD, 7.62)] {
            assert_relative_eq!(at(Rule::Part23, point), rounded, max_relative = 1e-12);
            assert_eq!(at(Rule::CsVla, point), rounded);
        }
        assert_eq!(at(Rule::F2245, SpeedPoint::VC), 15.0);
        assert_eq!(at(Rule::Cs22, SpeedPoint::VB), 15.0);
        assert_eq!(at(Rule::Cs22, SpeedPoint::VF), 7.5);
        assert!(at(Rule::Cs22, SpeedPoint::VC).is_nan());
        assert!(at(Rule::CsVla, SpeedPoint::VB).is_nan());
        assert!(at(Rule::Stated, SpeedPoint::VC).is_nan());
    }

    /// 14 CFR 23.333(c): full to 20,000 ft, half at 50,000 ft.
    #[test]
    fn gusts_of_part_23_fall_with_altitude() {
        let at = |point, ft: f64| {
            let altitude = Length::from_si(ft * part_23::FOOT);
            gust_velocity(Rule::Part23, point, altitude).si() / part_23::FOOT
        };
        for (point, ft, expected) in [
            (SpeedPoint::VC, 20_000.0, 50.0),
            (SpeedPoint::VC, 35_000.0, 37.5),
            (SpeedPoint::VD, 49_999.999, 12.5),
            (SpeedPoint::VB, 35_000.0, 52.0),
            (SpeedPoint::VF, 35_000.0, 25.0),
        ] {
            assert_relative_eq!(at(point, ft), expected, max_relative = 1e-6);
        }
        assert!(at(SpeedPoint::VC, 50_001.0).is_nan());
    }

    /// The mass ratio of a mass per area without g is the same number, 10.6293 for 450 kg on 12 m^2.
    #[test]
    fn both_forms_of_the_mass_ratio_agree() {
        let without_g = 2.0 * (450.0 / 12.0) / (RHO0 * 1.2 * 4.8);
        let wing_loading = Pressure::from_si(450.0 * G0 / 12.0);
        let density = MassDensity::from_si(RHO0);
        let mu = mass_ratio(
            wing_loading,
            density,
            Length::from_si(1.2),
            PerAngle::new(4.8),
        );
        assert_relative_eq!(mu, without_g, max_relative = 1e-14);
    }
}
