//! Sudden movements of the elevator: by its deflection, and by the change of load factor that it makes.

#![allow(
    non_snake_case,
    reason = "arguments carry the symbols of the trade: S for an area"
)]

use super::rule::Rule;
use crate::quantity::constants::{G0, RHO0};
use crate::quantity::{Angle, Area, Force, Length, PerAngle, Pressure, Typed};

/// Increment of the tail load by a sudden elevator movement, q S_t a_t effectiveness deflection, positive up.
///
/// - `q`: dynamic pressure at the tail.
/// - `tail_area`, `tail_slope`: lift slope of the tail on its own area.
/// - `effectiveness`: angle of attack that a deflection is worth, see [`crate::control::control_effectiveness`].
/// - `deflection`: change of deflection, trailing edge down positive; up to the stops or what the pilot's effort gives.
///
/// The airplane has not yet begun to move. Linear lift, below the stall of the tail.
///
/// Source: 14 CFR 23.423(a) before amendment 64, CS-VLA 423(a), (c) and AMC 22.423 ask for it; linear aerodynamics.
///
/// # Example
/// ```
/// use engine::envelope::elevator_step_load;
/// use engine::quantity::{Angle, Area, PerAngle, Pressure, Typed};
/// let load = elevator_step_load(
///     Pressure::from_si(1000.0), Area::from_si(2.0), PerAngle::new(3.5), 0.6, Angle::from_si(-0.4));
/// assert!((load.si() + 1680.0).abs() < 1e-9);
/// ```
pub fn elevator_step_load(
    q: Pressure,
    tail_area: Area,
    tail_slope: PerAngle,
    effectiveness: f64,
    deflection: Angle,
) -> Force {
    let lift = q.si() * tail_area.si() * tail_slope.si();
    Force::from_si(lift * effectiveness * deflection.si())
}

/// Increment of the tail load that takes the airplane from one load factor to another, positive up:
/// dn W [(x_cg - x_ac)/arm - (S_t/S)(a_t/a)(1 - downwash_slope) - (rho0/2)(S_t a_t arm/m)].
///
/// - `rule`: VLA 423(d), AMC 22.423, or a stated condition; the other sets have no value here.
/// - `dn`: change of the load factor.
/// - `weight`: weight, a force.
/// - `x_cg`, `x_ac`: centre of gravity, and aerodynamic centre of the airplane less horizontal tail.
/// - `arm`: distance of the tail's aerodynamic centre aft of the centre of gravity.
/// - `S`, `slope`: wing area and lift slope.
/// - `tail_area`, `tail_slope`: those of the tail on its own area.
/// - `downwash_slope`: change of downwash at the tail per change of angle of attack.
///
/// Speed and attitude do not change; the terms are the static moment, the lift that the tail gains by the angle of attack,
/// and the damping of the pitch rate dn g/V. The loads are reacted by inertia. Both load-factor steps and their
/// reverses are to be taken at VA and VD.
///
/// Source: CS-VLA 423(d); AMC 22.423.
///
/// # Example
/// ```
/// use engine::envelope::{Rule, load_factor_step_load};
/// use engine::quantity::{Area, Force, Length, PerAngle, Typed};
/// let (m, area, slope) = (Length::from_si, Area::from_si, PerAngle::new);
/// let load = load_factor_step_load(
///     Rule::CsVla, 2.8, Force::from_si(450.0 * 9.80665), m(2.1), m(2.0), m(4.0), area(12.0), slope(4.8), area(2.0),
///     slope(3.6), 0.4);
/// assert!((load.si() + 1102.189).abs() < 1e-3);
/// ```
#[allow(
    clippy::too_many_arguments,
    reason = "each is a figure of its own in the paragraph"
)]
pub fn load_factor_step_load(
    rule: Rule,
    dn: f64,
    weight: Force,
    x_cg: Length,
    x_ac: Length,
    arm: Length,
    S: Area,
    slope: PerAngle,
    tail_area: Area,
    tail_slope: PerAngle,
    downwash_slope: f64,
) -> Force {
    let coded = match rule {
        Rule::CsVla | Rule::Cs22 | Rule::Stated => dn,
        Rule::Part23 | Rule::F2245 => f64::NAN,
    };
    let tail = tail_area.si() * tail_slope.si();
    let static_part = (x_cg - x_ac).si() / arm.si();
    let by_angle = tail / (S.si() * slope.si()) * (1.0 - downwash_slope);
    let damping = 0.5 * RHO0 * tail * arm.si() * G0 / weight.si();
    Force::from_si(coded * weight.si() * (static_part - by_angle - damping))
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn step(rule: Rule, dn: f64, downwash_slope: f64) -> f64 {
        let (m, area, slope) = (Length::from_si, Area::from_si, PerAngle::new);
        let weight = Force::from_si(450.0 * G0);
        let (wing, tail) = ((area(12.0), slope(4.8)), (area(2.0), slope(3.6)));
        load_factor_step_load(
            rule,
            dn,
            weight,
            m(0.1),
            m(0.0),
            m(4.0),
            wing.0,
            wing.1,
            tail.0,
            tail.1,
            downwash_slope,
        )
        .si()
    }

    /// The bracket of VLA 423(d) by hand: 0.0250 - 0.0750 - 0.0392 = -0.0892.
    #[test]
    fn the_bracket_by_hand() {
        let bracket = step(Rule::CsVla, 1.0, 0.4) / (450.0 * G0);
        assert_relative_eq!(bracket, 0.025 - 0.075 - 0.0392, max_relative = 1e-12);
    }

    #[test]
    fn a_pull_up_of_a_stable_airplane_asks_for_a_download() {
        assert!(step(Rule::CsVla, 2.8, 0.4) < 0.0);
        assert_eq!(step(Rule::CsVla, -2.8, 0.4), -step(Rule::CsVla, 2.8, 0.4));
        assert_eq!(step(Rule::Cs22, 2.8, 0.4), step(Rule::Stated, 2.8, 0.4));
        assert!(step(Rule::Part23, 2.8, 0.4).is_nan());
    }
}
