//! Ground gusts on control surfaces.

#![allow(
    non_snake_case,
    reason = "arguments carry the symbols of the trade: S for an area"
)]

use super::rule::Rule;
use super::{cs_22, part_23};
use crate::quantity::constants::RHO0;
use crate::quantity::{Area, Force, Length, Torque, Typed};

/// A control surface in a ground gust.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Surface {
    /// Aileron, the column locked or lashed amid.
    Aileron,
    /// Aileron at full throw, one up and one down.
    AileronFullThrow,
    /// Elevator.
    Elevator,
    /// Rudder.
    Rudder,
}

impl Surface {
    /// Every surface, in a fixed order.
    pub const ALL: [Self; 4] = [
        Self::Aileron,
        Self::AileronFullThrow,
        Self::Elevator,
        Self::Rudder,
    ];

    /// The words by which it is chosen.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Aileron => "aileron",
            Self::AileronFullThrow => "aileron at full throw",
            Self::Elevator => "elevator",
            Self::Rudder => "rudder",
        }
    }

    /// The surface of a word, letter for letter.
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|surface| surface.word() == word)
    }

    /// Factor of 14 CFR 23.415(b) and CS 22.415.
    const fn factor(self) -> f64 {
        match self {
            Self::AileronFullThrow => 0.50,
            Self::Aileron | Self::Elevator | Self::Rudder => 0.75,
        }
    }
}

/// Limit hinge moment of a control surface in a ground gust, k S_control c_control q, without sign: it is to be met both
/// ways.
///
/// - `rule`: 14 CFR 23.415, q at 14.6 sqrt(W/S) + 14.6 ft/s, W/S in lb/ft^2, at most 88 ft/s; CS 22.415, q at 100 km/h;
///   other sets have no value here.
/// - `surface`: the factor k is 0.75, of ailerons at full throw 0.50.
/// - `weight`, `S`: design maximum weight and wing area; they do not matter in CS-22.
/// - `S_control`, `c_control`: area and mean chord of the surface aft of the hinge.
///
/// Source: the paragraphs named.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, Surface, ground_gust_hinge_moment};
/// use engine::quantity::{Area, Force, Length, Typed};
/// let moment = ground_gust_hinge_moment(
///     Rule::Cs22, Surface::Elevator, Force::from_si(4000.0), Area::from_si(12.0), Area::from_si(0.9),
///     Length::from_si(0.3));
/// assert!((moment.si() - 0.75 * 0.9 * 0.3 * 0.5 * 1.225 * (100.0_f64 / 3.6).powi(2)).abs() < 1e-9);
/// ```
pub fn ground_gust_hinge_moment(
    rule: Rule,
    surface: Surface,
    weight: Force,
    S: Area,
    S_control: Area,
    c_control: Length,
) -> Torque {
    let speed = match rule {
        Rule::Part23 => {
            let psf = weight.si() / S.si() / part_23::PSF;
            part_23::FOOT * part_23::ground_gust_speed(psf)
        }
        Rule::Cs22 => cs_22::GROUND_GUST_SPEED,
        Rule::CsVla | Rule::F2245 | Rule::Stated => f64::NAN,
    };
    let q = 0.5 * RHO0 * speed * speed;
    Torque::from_si(surface.factor() * S_control.si() * c_control.si() * q)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn moment(rule: Rule, surface: Surface, psf: f64) -> f64 {
        let (weight, wing) = (Force::from_si(psf * part_23::PSF), Area::from_si(1.0));
        let (area, chord) = (Area::from_si(2.0), Length::from_si(0.5));
        ground_gust_hinge_moment(rule, surface, weight, wing, area, chord).si()
    }

    /// 14 CFR 23.415: 14.6 sqrt(W/S) + 14.6 ft/s, at most 88 ft/s.
    #[test]
    fn ground_gusts_grow_with_the_wing_loading_up_to_88_feet_a_second() {
        let at = |feet: f64| 0.75 * 0.5 * RHO0 * (feet * 0.3048) * (feet * 0.3048);
        let elevator = |psf| moment(Rule::Part23, Surface::Elevator, psf);
        assert_relative_eq!(elevator(4.0), at(43.8), max_relative = 1e-12);
        assert_relative_eq!(elevator(9.0), at(58.4), max_relative = 1e-12);
        assert_relative_eq!(elevator(30.0), at(88.0), max_relative = 1e-12);
    }

    #[test]
    fn ailerons_at_full_throw_take_less() {
        let of = |surface| moment(Rule::Cs22, surface, 5.0);
        assert_relative_eq!(
            of(Surface::AileronFullThrow) / of(Surface::Aileron),
            2.0 / 3.0,
            max_relative = 1e-12
        );
        assert_eq!(of(Surface::Rudder), of(Surface::Elevator));
        assert!(moment(Rule::CsVla, Surface::Rudder, 5.0).is_nan());
        assert_eq!(
            Surface::of_word("aileron at full throw"),
            Some(Surface::AileronFullThrow)
        );
    }
}
