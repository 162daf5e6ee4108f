//! Tail lift and its control: effectiveness, shares of fixed and movable part, hinge and pivot moments, stick force.

#![allow(
    non_snake_case,
    reason = "arguments carry the symbols of the trade: C_h for a hinge-moment coefficient, S, M"
)]

use crate::elementary::{acos, sin};
use crate::quantity::constants::PI;
use crate::quantity::{Angle, Area, Force, Length, PerAngle, PerLength, Pressure, Torque, Typed};

/// The hinge line on Glauert's circle, counted from the leading edge: cos = 2 E - 1.
fn hinge_angle(chord_ratio: f64) -> f64 {
    acos(2.0 * chord_ratio - 1.0)
}

/// Change of the angle of attack that a control deflection is worth, 1 - (theta - sin theta)/pi with
/// cos theta = 2 chord_ratio - 1, times `area_ratio` and `section_factor`.
///
/// - `chord_ratio`: chord of the control aft of the hinge over the whole chord, 0 to 1.
/// - `area_ratio`: area of the tail over the span of the control over the whole area of the tail; 1 for a full-span control.
/// - `section_factor`: measured over theoretical effectiveness of the section; 1 takes the theory as it stands.
///
/// Thin-airfoil theory with a sealed gap and small deflections. Real gaps and deflections above about 10 degrees give 15 to
/// 30 % less, for which `section_factor` stands. A chord ratio outside 0 to 1 gives NaN, no value.
///
/// Source: H. Glauert, Theoretical relationships for an aerofoil with hinged flap, ARC R&M 1095 (1927).
///
/// # Example
/// ```
/// use engine::control::control_effectiveness;
/// assert!((control_effectiveness(0.25, 1.0, 1.0) - 0.608_998).abs() < 1e-6);
/// assert_eq!(control_effectiveness(1.0, 1.0, 1.0), 1.0);
/// ```
pub fn control_effectiveness(chord_ratio: f64, area_ratio: f64, section_factor: f64) -> f64 {
    let theta = hinge_angle(chord_ratio);
    area_ratio * section_factor * (1.0 - (theta - sin(theta)) / PI)
}

/// Lift of the tail, q_ratio q S slope (alpha - downwash + incidence + pitch_angle - zero_lift + effectiveness deflection),
/// positive up.
///
/// - `slope`: lift slope of the tail on its own area.
/// - `alpha`: angle of attack of the airplane's datum line.
/// - `downwash`: downwash angle at the tail, positive downward; an upwash at a canard is negative.
/// - `incidence`: setting of the tail to the datum line, nose up positive.
/// - `effectiveness`: angle of attack that a control deflection is worth, see [`control_effectiveness`].
/// - `deflection`: of the control, trailing edge down positive.
/// - `q`: dynamic pressure of flight.
/// - `S`: area of the tail.
/// - `q_ratio`: dynamic pressure at the tail over that of flight; 1 in the free stream.
/// - `zero_lift`: zero-lift angle of the tail's section with the control neutral.
/// - `pitch_angle`: angle that a pitch rate adds at the tail, see [`crate::tail::pitch_rate_angle`].
///
/// Linear lift, below the stall of the tail.
///
/// Source: definition; B. Etkin and L. D. Reid, Dynamics of Flight.
///
/// # Example
/// ```
/// use engine::control::tail_lift;
/// use engine::quantity::{Angle, Area, PerAngle, Pressure, Typed};
/// let a = Angle::from_si;
/// let lift = tail_lift(
///     PerAngle::new(4.0), a(0.10), a(0.04), a(-0.02), 0.5, a(-0.08), Pressure::from_si(1000.0), Area::from_si(2.0),
///     0.9, a(0.0), a(0.01));
/// assert!((lift.si() - 72.0).abs() < 1e-9);
/// ```
#[allow(
    clippy::too_many_arguments,
    reason = "each angle is a figure of its own in the sum that reaches the tail"
)]
pub fn tail_lift(
    slope: PerAngle,
    alpha: Angle,
    downwash: Angle,
    incidence: Angle,
    effectiveness: f64,
    deflection: Angle,
    q: Pressure,
    S: Area,
    q_ratio: f64,
    zero_lift: Angle,
    pitch_angle: Angle,
) -> Force {
    let setting = alpha.si() - downwash.si() + incidence.si() + pitch_angle.si() - zero_lift.si();
    let angle = setting + effectiveness * deflection.si();
    Force::from_si(q_ratio * q.si() * S.si() * slope.si() * angle)
}

/// How a tail load is shared between the parts ahead of and behind the hinge.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct TailLoadSplit {
    /// Load on the part ahead of the hinge, positive up.
    pub fixed: Force,
    /// Load on the part behind the hinge, positive up.
    pub movable: Force,
    /// Station of the centre of pressure of both; NaN, no value, where the loads cancel.
    pub x_cp: Length,
}

/// Shares of the fixed and the movable part in the tail load, and its centre of pressure.
///
/// - `chord_ratio`: chord of the control aft of the hinge over the whole chord, above 0, below 1.
/// - `load_alpha`: load by the angle of attack of the tail, positive up.
/// - `load_delta`: load by the deflection of the control, positive up.
/// - `x_le`: station of the leading edge of the tail's mean chord.
/// - `c`: chord of the tail.
///
/// With cos t = 2 chord_ratio - 1 the part ahead of the hinge takes (t + sin t)/pi of the load by angle of attack, which
/// acts at the quarter chord, and (t + sin t - t^2/pi)/(pi - t + sin t) of the load by deflection, which acts at
/// 1/4 + sin t (1 - cos t)/(4 (pi - t + sin t)) of the chord. A small net load can so hide two large opposing ones.
///
/// Thin-airfoil theory, sealed gap, attached flow; no balance area ahead of the hinge. A chord ratio outside the range
/// gives NaN, no value.
///
/// Source: H. Glauert, ARC R&M 1095 (1927); the shares are its pressures integrated up to the hinge.
///
/// # Example
/// ```
/// use engine::control::tail_load_split;
/// use engine::quantity::{Force, Length, Typed};
/// let n = Force::from_si;
/// let split = tail_load_split(0.4, n(500.0), n(-450.0), Length::from_si(5.0), Length::from_si(0.8));
/// assert!((split.fixed.si() + split.movable.si() - 50.0).abs() < 1e-9);
/// assert!(split.fixed.si() > 100.0 && split.movable.si() < -50.0);
/// ```
pub fn tail_load_split(
    chord_ratio: f64,
    load_alpha: Force,
    load_delta: Force,
    x_le: Length,
    c: Length,
) -> TailLoadSplit {
    let inside = chord_ratio > 0.0 && chord_ratio < 1.0;
    let t = if inside {
        hinge_angle(chord_ratio)
    } else {
        f64::NAN
    };
    let s = sin(t);
    let by_deflection = PI - t + s;
    let fixed =
        load_alpha.si() * (t + s) / PI + load_delta.si() * (t + s - t * t / PI) / by_deflection;
    let total = load_alpha.si() + load_delta.si();
    let aft = 0.25 + s * (2.0 - 2.0 * chord_ratio) / (4.0 * by_deflection);
    let moment = load_alpha.si() * 0.25 + load_delta.si() * aft;
    let x_cp = if total == 0.0 {
        f64::NAN
    } else {
        x_le.si() + c.si() * moment / total
    };
    TailLoadSplit {
        fixed: Force::from_si(fixed),
        movable: Force::from_si(total - fixed),
        x_cp: Length::from_si(x_cp),
    }
}

/// Factor by which freeing the control changes the lift slope of the tail, 1 - effectiveness C_h_alpha/C_h_delta.
///
/// - `C_h_alpha`, `C_h_delta`: slopes of the hinge-moment coefficient with angle of attack and deflection.
/// - `effectiveness`: angle of attack that a deflection is worth, see [`control_effectiveness`].
///
/// The control floats where its hinge moment is zero; without friction, springs and bob weights. `C_h_delta` of zero gives
/// no value (a number that is not finite).
///
/// Source: B. Etkin and L. D. Reid, Dynamics of Flight.
///
/// # Example
/// ```
/// use engine::control::free_control_factor;
/// use engine::quantity::PerAngle;
/// let factor = free_control_factor(PerAngle::new(-0.3), PerAngle::new(-0.6), 0.5);
/// assert_eq!(factor, 0.75);
/// ```
pub fn free_control_factor(C_h_alpha: PerAngle, C_h_delta: PerAngle, effectiveness: f64) -> f64 {
    1.0 - effectiveness * C_h_alpha.si() / C_h_delta.si()
}

/// Hinge moment of a control, q S c (C_h0 + C_h_alpha alpha + C_h_delta delta + C_h_tab tab), positive where it turns the
/// trailing edge down.
///
/// - `C_h0`: coefficient with all angles zero.
/// - `C_h_alpha`, `C_h_delta`, `C_h_tab`: slopes with the angle of attack at the tail, the deflection and the tab's.
/// - `alpha`: angle of attack at the tail, downwash and setting within.
/// - `delta`, `tab`: deflections of control and tab, trailing edge down positive.
/// - `q`: dynamic pressure at the tail.
/// - `S`, `c`: area and mean chord of the control aft of the hinge.
///
/// Linear, below the stall of the tail.
///
/// Source: definition; B. Etkin and L. D. Reid, Dynamics of Flight.
///
/// # Example
/// ```
/// use engine::control::hinge_moment;
/// use engine::quantity::{Angle, Area, Length, PerAngle, Pressure, Typed};
/// let (slope, angle) = (PerAngle::new, Angle::from_si);
/// let moment = hinge_moment(
///     0.0, slope(-0.2), slope(-0.5), angle(0.05), angle(-0.1), Pressure::from_si(1000.0), Area::from_si(0.8),
///     Length::from_si(0.25), slope(0.0), angle(0.0));
/// assert!((moment.si() - 8.0).abs() < 1e-12);
/// ```
#[allow(
    clippy::too_many_arguments,
    reason = "each is a coefficient of the linear hinge moment or its angle"
)]
pub fn hinge_moment(
    C_h0: f64,
    C_h_alpha: PerAngle,
    C_h_delta: PerAngle,
    alpha: Angle,
    delta: Angle,
    q: Pressure,
    S: Area,
    c: Length,
    C_h_tab: PerAngle,
    tab: Angle,
) -> Torque {
    let of_angles = C_h_alpha.si() * alpha.si() + C_h_delta.si() * delta.si();
    let coefficient = C_h0 + of_angles + C_h_tab.si() * tab.si();
    Torque::from_si(q.si() * S.si() * c.si() * coefficient)
}

/// Moment about the pivot of an all-moving tail, M0 + load (x_pivot - x_load), nose up positive.
///
/// - `load`: load on the tail, positive up.
/// - `x_load`: station at which it acts: the aerodynamic centre of the tail, where `M0` is the moment there.
/// - `x_pivot`: station of the pivot.
/// - `M0`: couple of the tail, of a cambered section or an anti-balance tab for one.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::control::pivot_moment;
/// use engine::quantity::{Force, Length, Torque, Typed};
/// let m = Length::from_si;
/// let moment = pivot_moment(Force::from_si(-400.0), m(5.20), m(5.15), Torque::from_si(-3.0));
/// assert!((moment.si() - 17.0).abs() < 1e-9);
/// ```
pub fn pivot_moment(load: Force, x_load: Length, x_pivot: Length, M0: Torque) -> Torque {
    Torque::from_si(M0.si() + load.si() * (x_pivot - x_load).si())
}

/// Force of the pilot on the stick, gearing times hinge moment, pull positive.
///
/// - `hinge_moment`: of the control, positive where it turns the trailing edge down, and so draws the stick forward.
/// - `gearing`: angle of the control over the travel of the grip, radians a metre; positive where a pull raises the
///   trailing edge.
///
/// Work of the pilot equals work at the hinge: no friction, springs or bob weights, a stiff control run.
///
/// Source: B. Etkin and L. D. Reid, Dynamics of Flight.
///
/// # Example
/// ```
/// use engine::control::stick_force;
/// use engine::quantity::{PerLength, Torque, Typed};
/// assert_eq!(stick_force(Torque::from_si(8.0), PerLength::from_si(2.0)).si(), 16.0);
/// ```
pub fn stick_force(hinge_moment: Torque, gearing: PerLength) -> Force {
    Force::from_si(gearing.si() * hinge_moment.si())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::elementary::{cos, ln};
    use approx::{assert_abs_diff_eq, assert_relative_eq};

    /// Pressures of a thin section by deflection: (1 - t/pi) (1 + cos u) plus sin u times the logarithm of Glauert's hinge
    /// singularity, over du; added up here by the midpoint rule.
    fn fixed_share_by_pressures(chord_ratio: f64) -> f64 {
        let t = hinge_angle(chord_ratio);
        let count = 400_000;
        let (mut ahead, mut all) = (0.0, 0.0);
        for i in 0..count {
            let u = PI * (f64::from(i) + 0.5) / f64::from(count);
            let singular = (sin((u + t) / 2.0) / sin((u - t) / 2.0)).abs();
            let load = (1.0 - t / PI) * (1.0 + cos(u)) + sin(u) * ln(singular) / PI;
            all += load;
            ahead += if u < t { load } else { 0.0 };
        }
        ahead / all
    }

    #[test]
    fn the_share_ahead_of_the_hinge_is_that_of_the_pressures() {
        for chord_ratio in [0.1, 0.3, 0.45, 0.8] {
            let none = Force::from_si(0.0);
            let m = Length::from_si;
            let split = tail_load_split(chord_ratio, none, Force::from_si(1.0), m(0.0), m(1.0));
            let expected = fixed_share_by_pressures(chord_ratio);
            assert_abs_diff_eq!(split.fixed.si(), expected, epsilon = 2e-5);
        }
    }

    /// Glauert: lift slope 2 (pi - t + sin t), moment slope about the quarter chord sin t (cos t - 1)/2, by which the load
    /// by deflection acts behind the quarter chord.
    #[test]
    fn loads_act_where_their_moments_put_them() {
        let (m, n) = (Length::from_si, Force::from_si);
        let split = tail_load_split(0.3, n(0.0), n(10.0), m(2.0), m(0.7));
        let t = hinge_angle(0.3);
        let moment = sin(t) * (cos(t) - 1.0) / 2.0 / (2.0 * (PI - t + sin(t)));
        assert_relative_eq!(
            split.x_cp.si(),
            2.0 + 0.7 * (0.25 - moment),
            max_relative = 1e-12
        );
        let split = tail_load_split(0.3, n(10.0), n(0.0), m(2.0), m(0.7));
        assert_relative_eq!(split.x_cp.si(), 2.175, max_relative = 1e-12);
    }

    #[test]
    fn equal_and_opposite_loads_have_no_centre_of_pressure() {
        let (m, n) = (Length::from_si, Force::from_si);
        let split = tail_load_split(0.4, n(300.0), n(-300.0), m(0.0), m(1.0));
        assert!(split.x_cp.si().is_nan());
        assert!(split.fixed.si() > 25.0);
        assert_abs_diff_eq!(split.fixed.si() + split.movable.si(), 0.0, epsilon = 1e-9);
        assert!(
            tail_load_split(0.0, n(1.0), n(1.0), m(0.0), m(1.0))
                .fixed
                .si()
                .is_nan()
        );
    }

    #[test]
    fn an_all_moving_surface_is_its_own_control() {
        assert_eq!(control_effectiveness(1.0, 1.0, 1.0), 1.0);
        assert_abs_diff_eq!(control_effectiveness(0.0, 1.0, 1.0), 0.0, epsilon = 1e-15);
        assert!(control_effectiveness(1.1, 1.0, 1.0).is_nan());
        let part = control_effectiveness(0.4, 0.9, 0.8) / control_effectiveness(0.4, 1.0, 1.0);
        assert_relative_eq!(part, 0.72, max_relative = 1e-14);
    }

    #[test]
    fn a_floating_control_loses_lift_where_both_slopes_have_one_sign() {
        let slope = PerAngle::new;
        assert!(free_control_factor(slope(-0.2), slope(-0.4), 0.5) < 1.0);
        assert!(free_control_factor(slope(0.2), slope(-0.4), 0.5) > 1.0);
        assert_eq!(free_control_factor(slope(0.0), slope(-0.4), 0.5), 1.0);
        assert!(!free_control_factor(slope(-0.1), slope(0.0), 0.5).is_finite());
    }

    #[test]
    fn trailing_edge_down_lifts_the_tail_and_asks_for_a_push() {
        let (slope, angle) = (PerAngle::new, Angle::from_si);
        let zero = angle(0.0);
        let (q, area) = (Pressure::from_si(900.0), Area::from_si(1.5));
        let lift = tail_lift(
            slope(3.5),
            zero,
            zero,
            zero,
            0.6,
            angle(0.1),
            q,
            area,
            1.0,
            zero,
            zero,
        );
        assert!(lift.si() > 0.0);
        let moment = hinge_moment(
            0.0,
            slope(-0.1),
            slope(-0.5),
            zero,
            angle(0.1),
            q,
            area,
            Length::from_si(0.3),
            slope(0.0),
            zero,
        );
        assert!(stick_force(moment, PerLength::from_si(2.5)).si() < 0.0);
    }
}
