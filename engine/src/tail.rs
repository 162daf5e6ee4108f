//! Tail and stability: downwash, pitch rate at the tail, neutral point, static margin.

#![allow(
    non_snake_case,
    reason = "arguments carry the symbols of the trade: CL, S"
)]

use crate::elementary;
use crate::quantity::constants::{G0, PI};
use crate::quantity::{Angle, Area, Length, PerAngle, TrueAirspeed, Typed};

/// Downwash angle far behind an elliptically loaded wing, 2 CL/(pi A), positive downward.
///
/// - `CL`: lift coefficient of the wing.
/// - `aspect_ratio`: aspect ratio of the wing.
///
/// Holds for a plane, unswept wing without flaps, out of ground effect, and a tail in its far wake. Near the wing, off the
/// plane of its wake and for other loadings the downwash differs, and no accuracy is claimed there. Not for a canard,
/// which flies ahead of the wing. An aspect ratio of zero gives no value (a number that is not finite).
///
/// Source: Prandtl's lifting-line theory: twice the induced angle at the wing.
///
/// # Example
/// ```
/// use engine::quantity::Typed;
/// use engine::tail::downwash_angle;
/// let angle = downwash_angle(0.5, 6.0);
/// assert!((angle.si() - 0.053_052).abs() < 1e-6);
/// ```
pub fn downwash_angle(CL: f64, aspect_ratio: f64) -> Angle {
    Angle::from_si(2.0 * CL / (PI * aspect_ratio))
}

/// Downwash slope at the tail, d(epsilon)/d(alpha), 4.44 [K_A K_l K_H sqrt(cos(sweep))]^1.19.
///
/// - `aspect_ratio`, `taper`, `span`, `sweep_quarter`: of the wing; the sweep that of its quarter-chord line.
/// - `tail_arm`: from the quarter point of the wing's mean aerodynamic chord to that of the tail, along the datum line.
/// - `tail_height`: of the tail above (or below) the wing's root chord plane.
///
/// K_A = 1/A - 1/(1 + A^1.7), K_l = (10 - 3 taper)/7, K_H = (1 - |h/b|)/(2 l/b)^(1/3). Low speed; a tail aft of the wing,
/// not a canard. No value for an arm, span or aspect ratio that is not positive.
///
/// Source: USAF Stability and Control Datcom, 4.4.1.
///
/// # Example
/// ```
/// use engine::quantity::{Angle, Length, Typed};
/// use engine::tail::downwash_slope;
/// let m = Length::from_si;
/// let slope = downwash_slope(6.0, 1.0, m(9.0), Angle::from_si(0.0), m(4.0), m(0.0));
/// assert!(slope > 0.3 && slope < 0.6);
/// ```
pub fn downwash_slope(
    aspect_ratio: f64,
    taper: f64,
    span: Length,
    sweep_quarter: Angle,
    tail_arm: Length,
    tail_height: Length,
) -> f64 {
    let (b, l, h) = (span.si(), tail_arm.si(), tail_height.si());
    if !(aspect_ratio > 0.0 && b > 0.0 && l > 0.0) {
        return f64::NAN;
    }
    let k_a = 1.0 / aspect_ratio - 1.0 / (1.0 + elementary::power(aspect_ratio, 1.7));
    let k_l = (10.0 - 3.0 * taper) / 7.0;
    let k_h = (1.0 - (h / b).abs()) / elementary::cbrt(2.0 * l / b);
    let cosine = elementary::cos(sweep_quarter.si());
    4.44 * elementary::power(k_a * k_l * k_h * cosine.sqrt(), 1.19)
}

/// The steady manoeuvre that a pitch rate belongs to.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Maneuver {
    /// Pull-up in the vertical plane, at its lowest point.
    PullUp,
    /// Level turn.
    Turn,
}

impl Maneuver {
    /// Every manoeuvre, in a fixed order.
    pub const ALL: [Self; 2] = [Self::PullUp, Self::Turn];

    /// The word by which it is chosen: `"pull-up"` or `"turn"`.
    pub const fn word(self) -> &'static str {
        match self {
            Self::PullUp => "pull-up",
            Self::Turn => "turn",
        }
    }

    /// The manoeuvre of a word, letter for letter.
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL
            .into_iter()
            .find(|maneuver| maneuver.word() == word)
    }
}

/// Change of the angle of attack at the tail due to the pitch rate of a steady manoeuvre.
///
/// - `n`: load factor.
/// - `speed`: true airspeed.
/// - `arm`: distance of the tail aft of the centre of gravity; negative for a canard.
/// - `maneuver`: pull-up, (n - 1) g0 arm/speed^2, or level turn, (n - 1/n) g0 arm/speed^2.
///
/// Positive where it adds to the angle of attack. Small angles; a level turn has no load factor between -1 and 1 and gives
/// NaN, no value, there. Speed of zero gives no value (a number that is not finite).
///
/// Source: kinematics of the steady manoeuvre, pitch rate times arm over speed.
///
/// # Example
/// ```
/// use engine::quantity::{Length, TrueAirspeed, Typed};
/// use engine::tail::{Maneuver, pitch_rate_angle};
/// let (speed, arm) = (TrueAirspeed::from_si(60.0), Length::from_si(4.5));
/// let angle = pitch_rate_angle(3.8, speed, arm, Maneuver::PullUp);
/// assert!((angle.si().to_degrees() - 1.966_578_797).abs() < 1e-8);
/// assert!(pitch_rate_angle(0.5, speed, arm, Maneuver::Turn).si().is_nan());
/// ```
pub fn pitch_rate_angle(n: f64, speed: TrueAirspeed, arm: Length, maneuver: Maneuver) -> Angle {
    let excess = match maneuver {
        Maneuver::PullUp => n - 1.0,
        Maneuver::Turn if n.abs() >= 1.0 => n - 1.0 / n,
        Maneuver::Turn => f64::NAN,
    };
    Angle::from_si(excess * G0 * arm.si() / (speed.si() * speed.si()))
}

/// Stick-fixed neutral point: the station of the aerodynamic centre of the whole airplane.
///
/// - `x_ac`: aerodynamic centre of the wing, or of wing and body.
/// - `slope`: lift slope of the airplane less tail on area `S`.
/// - `S`, `mac`: reference area and chord.
/// - `x_tail`: aerodynamic centre of the tail.
/// - `tail_slope`: lift slope of the tail on its own area.
/// - `tail_area`: area of the tail.
/// - `downwash_slope`: change of downwash at the tail per change of angle of attack; that of the upwash at a canard is
///   negative.
/// - `q_ratio`: dynamic pressure at the tail over that of flight; 1 in the free stream.
/// - `body_slope`: destabilising slope of the body's moment coefficient where `x_ac` does not hold it; else 0.
///
/// Method: x_ac + (t (x_tail - x_ac) - body_slope mac)/(slope + t) with the tail's slope on the reference area
/// t = q_ratio (tail_area/S) tail_slope (1 - downwash_slope): the arm runs from aerodynamic centre to aerodynamic centre
/// and the slope below the line is that of the whole airplane. Linear aerodynamics, no thrust, rigid structure.
///
/// Source: B. Etkin and L. D. Reid, Dynamics of Flight.
///
/// # Example
/// ```
/// use engine::quantity::{Area, Length, PerAngle, Typed};
/// use engine::tail::neutral_point;
/// let x_np = neutral_point(
///     Length::from_si(2.0), PerAngle::new(4.5), Area::from_si(12.0), Length::from_si(1.4), Length::from_si(6.2),
///     PerAngle::new(3.6), Area::from_si(2.2), 0.4, 0.9, PerAngle::new(0.0));
/// assert!((x_np.si() - 2.308_228).abs() < 1e-6);
/// ```
#[allow(
    clippy::too_many_arguments,
    reason = "each is a figure of its own in the sum of the airplane's parts"
)]
pub fn neutral_point(
    x_ac: Length,
    slope: PerAngle,
    S: Area,
    mac: Length,
    x_tail: Length,
    tail_slope: PerAngle,
    tail_area: Area,
    downwash_slope: f64,
    q_ratio: f64,
    body_slope: PerAngle,
) -> Length {
    let tail = q_ratio * (tail_area.si() / S.si()) * tail_slope.si() * (1.0 - downwash_slope);
    let moment = tail * (x_tail - x_ac).si() - body_slope.si() * mac.si();
    Length::from_si(x_ac.si() + moment / (slope.si() + tail))
}

/// Static margin, (x_np - x_cg)/mac: positive where the airplane is stable.
///
/// - `x_cg`: station of the centre of gravity.
/// - `x_np`: station of the neutral point.
/// - `mac`: mean aerodynamic chord.
///
/// A fraction: 0.05 is 5 %. A chord of zero gives no value (a number that is not finite).
///
/// Source: definition.
///
/// # Example
/// ```
/// use engine::quantity::{Length, Typed};
/// use engine::tail::static_margin;
/// let m = Length::from_si;
/// assert_eq!(static_margin(m(2.0), m(2.25), m(1.25)), 0.2);
/// ```
pub fn static_margin(x_cg: Length, x_np: Length, mac: Length) -> f64 {
    (x_np - x_cg).si() / mac.si()
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// Closed form h_n = h_ac + (eta V a_t (1 - e') - Cm_a,body)/a with the whole airplane's slope a = a_wb + eta S_t/S a_t
    /// (1 - e') (B. Etkin and L. D. Reid, Dynamics of Flight); chord and wing area 1.
    #[test]
    fn neutral_points_of_two_airplanes() {
        for (h_ac, volume, a_t, a_wb, downwash, eta, body, expected) in [
            (0.25, 0.568, 4.0, 5.0, 0.45, 0.9, 0.0, 0.459_961_914_7),
            (0.24, 0.45, 3.8, 4.7, 0.4, 0.95, 0.2, 0.392_203_981_2),
        ] {
            let m = Length::from_si;
            let x_tail = m(h_ac + volume / 0.18);
            let (wing, tail) = (PerAngle::new(a_wb), PerAngle::new(a_t));
            let areas = (Area::from_si(1.0), Area::from_si(0.18));
            let x = neutral_point(
                m(h_ac),
                wing,
                areas.0,
                m(1.0),
                x_tail,
                tail,
                areas.1,
                downwash,
                eta,
                PerAngle::new(body),
            );
            assert_relative_eq!(x.si(), expected, max_relative = 1e-9);
        }
    }

    /// R. C. Nelson, Flight Stability and Automatic Control, ch. 2: downwash slope 2 CL_alpha/(pi A) = 0.45 for 4.3 per
    /// radian and aspect ratio 6.06.
    #[test]
    fn downwash_of_a_textbook_wing() {
        assert_relative_eq!(downwash_angle(4.3, 6.06).si(), 0.45, epsilon = 0.003);
    }

    #[test]
    fn turns_pitch_faster_than_pull_ups() {
        let (speed, arm) = (TrueAirspeed::from_si(40.0), Length::from_si(4.0));
        let angle = |n, maneuver| pitch_rate_angle(n, speed, arm, maneuver).si();
        assert!(angle(3.0, Maneuver::Turn) > angle(3.0, Maneuver::PullUp));
        assert_eq!(angle(1.0, Maneuver::Turn), 0.0);
        assert_eq!(angle(1.0, Maneuver::PullUp), 0.0);
        assert!(angle(f64::NAN, Maneuver::Turn).is_nan());
        assert_eq!(Maneuver::of_word("turn"), Some(Maneuver::Turn));
        assert_eq!(Maneuver::of_word("loop"), None);
    }

    #[test]
    fn the_margin_vanishes_at_the_neutral_point() {
        let m = Length::from_si;
        assert_eq!(static_margin(m(2.3), m(2.3), m(1.2)), 0.0);
        assert!(static_margin(m(2.5), m(2.3), m(1.2)) < 0.0);
    }
}
