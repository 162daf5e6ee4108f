//! Moment book-keeping: coefficients and moments carried from one point and reference to another.
//!
//! Pitching moments are nose up, `x` runs aft and `z` up. A normal force N acts up and an axial force A aft. The moment
//! about a point farther aft is the larger by N times the distance: the force now pulls up ahead of the point.

#![allow(
    non_snake_case,
    reason = "arguments carry the symbols of the trade: Cm, CN, S, M"
)]

use crate::elementary::{cos, sin};
use crate::numeric::line_through;
use crate::quantity::{Angle, Area, Force, Length, Pressure, Torque, Typed};

/// Normal-force coefficients of this magnitude and below count as zero for a centre of pressure.
///
/// It is a few thousand times the rounding error of coefficients near 1, and a million times below any that is measured.
pub const CN_ZERO: f64 = 1e-12;

/// Pitching moment of a coefficient, Cm q S c.
///
/// - `Cm`: pitching-moment coefficient, nose up.
/// - `q`: dynamic pressure.
/// - `S`: reference area.
/// - `c`: reference chord.
///
/// The moment is about the point that the coefficient is about.
///
/// Source: definition.
///
/// # Example
/// ```
/// use engine::moment::pitching_moment;
/// use engine::quantity::{Area, Length, Pressure, Typed};
/// let m = pitching_moment(-0.05, Pressure::from_si(1531.25), Area::from_si(16.0), Length::from_si(1.5));
/// assert!((m.si() + 1837.5).abs() < 1e-9);
/// ```
pub fn pitching_moment(Cm: f64, q: Pressure, S: Area, c: Length) -> Torque {
    Torque::from_si(Cm * q.si() * S.si() * c.si())
}

/// Coefficient of a pitching moment, M/(q S c), the inverse of [`pitching_moment`].
///
/// - `M`: pitching moment, nose up.
/// - `q`: dynamic pressure.
/// - `S`: reference area.
/// - `c`: reference chord.
///
/// A reference of zero gives no value (a number that is not finite).
///
/// Source: definition.
///
/// # Example
/// ```
/// use engine::moment::moment_coefficient;
/// use engine::quantity::{Area, Length, Pressure, Torque, Typed};
/// let cm = moment_coefficient(
///     Torque::from_si(-600.0), Pressure::from_si(1000.0), Area::from_si(12.0), Length::from_si(1.0));
/// assert_eq!(cm, -0.05);
/// ```
pub fn moment_coefficient(M: Torque, q: Pressure, S: Area, c: Length) -> f64 {
    M.si() / (q.si() * S.si() * c.si())
}

/// Coefficient of the force normal to the datum line, CL cos(alpha) + CD sin(alpha).
///
/// - `CL`, `CD`: lift and drag coefficients, across and along the stream.
/// - `alpha`: angle of attack of the datum line.
///
/// Source: resolution of the force, as in E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students.
///
/// # Example
/// ```
/// use engine::moment::normal_coefficient;
/// use engine::quantity::{Angle, Typed};
/// assert_eq!(normal_coefficient(0.8, 0.03, Angle::from_si(0.0)), 0.8);
/// ```
pub fn normal_coefficient(CL: f64, CD: f64, alpha: Angle) -> f64 {
    CL * cos(alpha.si()) + CD * sin(alpha.si())
}

/// Coefficient of the force along the datum line, positive aft, CD cos(alpha) - CL sin(alpha).
///
/// - `CL`, `CD`: lift and drag coefficients, across and along the stream.
/// - `alpha`: angle of attack of the datum line.
///
/// At high angles of attack it is negative: the lift pulls forward along the chord.
///
/// Source: resolution of the force, as in E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students.
///
/// # Example
/// ```
/// use engine::moment::axial_coefficient;
/// use engine::quantity::{Angle, Typed};
/// assert_eq!(axial_coefficient(0.8, 0.03, Angle::from_si(0.0)), 0.03);
/// assert!(axial_coefficient(1.4, 0.1, Angle::from_si(0.25)) < 0.0);
/// ```
pub fn axial_coefficient(CL: f64, CD: f64, alpha: Angle) -> f64 {
    CD * cos(alpha.si()) - CL * sin(alpha.si())
}

/// A moment coefficient about another point, Cm + CN (to - from)/c - CA (z_to - z_from)/c.
///
/// - `Cm`: pitching-moment coefficient about the point (`from`, `z_from`), nose up.
/// - `from`, `to`: stations of the point it is about and of the new one, positive aft.
/// - `CN`: normal-force coefficient, positive up.
/// - `c`: reference chord of all three coefficients.
/// - `CA`: axial-force coefficient, positive aft; 0 where it is left out.
/// - `z_from`, `z_to`: heights of the two points, positive up.
///
/// Exact statics. With lift in place of normal force the error is that of cos(alpha) = 1 and of the drag's share.
///
/// Source: statics; E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students, without the height.
///
/// # Example
/// ```
/// use engine::moment::moment_coefficient_about;
/// use engine::quantity::{Length, Typed};
/// let m = Length::from_si;
/// let about_le = moment_coefficient_about(-0.05, m(0.25), m(0.0), 0.5, m(1.0), 0.0, m(0.0), m(0.0));
/// assert_eq!(about_le, -0.175);
/// ```
#[allow(
    clippy::too_many_arguments,
    reason = "each is a figure of its own in the transfer of a moment"
)]
pub fn moment_coefficient_about(
    Cm: f64,
    from: Length,
    to: Length,
    CN: f64,
    c: Length,
    CA: f64,
    z_from: Length,
    z_to: Length,
) -> f64 {
    Cm + CN * (to - from).si() / c.si() - CA * (z_to - z_from).si() / c.si()
}

/// A pitching moment about another point, M + N (to - from) - A (z_to - z_from).
///
/// - `M`: pitching moment about the point (`from`, `z_from`), nose up.
/// - `from`, `to`: stations of the point it is about and of the new one, positive aft.
/// - `N`: normal force, positive up.
/// - `A`: axial force, positive aft; 0 where it is left out.
/// - `z_from`, `z_to`: heights of the two points, positive up.
///
/// Exact statics; there and back gives the moment that was given.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::moment::moment_about;
/// use engine::quantity::{Force, Length, Torque, Typed};
/// let m = Length::from_si;
/// let about_cg = moment_about(
///     Torque::from_si(-300.0), m(2.0), m(2.25), Force::from_si(4000.0), Force::from_si(0.0), m(0.0), m(0.0));
/// assert_eq!(about_cg.si(), 700.0);
/// ```
pub fn moment_about(
    M: Torque,
    from: Length,
    to: Length,
    N: Force,
    A: Force,
    z_from: Length,
    z_to: Length,
) -> Torque {
    Torque::from_si(M.si() + N.si() * (to - from).si() - A.si() * (z_to - z_from).si())
}

/// A moment coefficient for another reference area and chord, C from_S from_c/(to_S to_c).
///
/// - `C`: coefficient for `from_S` and `from_c`.
/// - `from_S`, `from_c`: the area and chord it was made with.
/// - `to_S`, `to_c`: the area and chord of the new coefficient.
///
/// The moment itself and the point it is about stay as they are. A force coefficient has no chord in it: give the same
/// chord twice.
///
/// Source: definition of the coefficients.
///
/// # Example
/// ```
/// use engine::moment::rescale_coefficient;
/// use engine::quantity::{Area, Length, Typed};
/// let (s, c) = (Area::from_si(10.0), Length::from_si(1.25));
/// assert_eq!(rescale_coefficient(-0.06, s, c, Area::from_si(12.0), c), -0.05);
/// ```
pub fn rescale_coefficient(C: f64, from_S: Area, from_c: Length, to_S: Area, to_c: Length) -> f64 {
    C * (from_S.si() * from_c.si()) / (to_S.si() * to_c.si())
}

/// Station at which the normal force alone has the moment, x_ref - Cm c/CN.
///
/// - `Cm`: pitching-moment coefficient about `x_ref`, nose up.
/// - `CN`: normal-force coefficient.
/// - `x_ref`: station that `Cm` is about.
/// - `c`: reference chord.
///
/// It runs to infinity as the normal force goes to zero while the moment stays: where the magnitude of `CN` is at most
/// [`CN_ZERO`] there is no value.
///
/// Source: statics, as in J. D. Anderson, Fundamentals of Aerodynamics.
///
/// # Example
/// ```
/// use engine::moment::center_of_pressure;
/// use engine::quantity::{Length, Typed};
/// let (x_ref, c) = (Length::from_si(0.25), Length::from_si(1.0));
/// assert_eq!(center_of_pressure(-0.05, 0.5, x_ref, c).si(), 0.35);
/// assert!(center_of_pressure(-0.05, 0.0, x_ref, c).si().is_nan());
/// ```
pub fn center_of_pressure(Cm: f64, CN: f64, x_ref: Length, c: Length) -> Length {
    let acting = CN.abs() > CN_ZERO;
    Length::from_si(if acting {
        x_ref.si() - Cm * c.si() / CN
    } else {
        f64::NAN
    })
}

/// An aerodynamic centre and how well the points agree with it.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct AerodynamicCenter {
    /// Station of the aerodynamic centre.
    pub x: Length,
    /// Moment coefficient about it, nose up: that at zero normal force.
    pub Cm: f64,
    /// Largest departure of a point's moment coefficient from the line.
    pub residual: f64,
}

/// Aerodynamic centre of a measured or computed polar.
///
/// - `CN`, `Cm`: normal-force and moment coefficients of the points, whole lines of the same length; the points that are
///   left out are not in them.
/// - `x_ref`: station that `Cm` is about.
/// - `c`: reference chord.
///
/// Method: the least-squares line of Cm over CN; its slope is (x_ref - x)/c. Exact where the points lie on a line; a
/// polar that curves, near the stall for one, shows in `residual` and asks for a shorter range. Fewer than two points,
/// points of one CN, and a NaN give no value.
///
/// Source: definition; the point about which Cm does not change with CN.
///
/// # Example
/// ```
/// use engine::moment::aerodynamic_center;
/// use engine::quantity::{Length, Typed};
/// let ac = aerodynamic_center(&[0.2, 1.0], &[-0.040, -0.024], Length::from_si(0.25), Length::from_si(1.0));
/// assert!((ac.x.si() - 0.23).abs() < 1e-12);
/// assert!((ac.Cm + 0.044).abs() < 1e-12);
/// assert!(aerodynamic_center(&[0.2], &[0.0], Length::from_si(0.25), Length::from_si(1.0)).x.si().is_nan());
/// ```
pub fn aerodynamic_center(CN: &[f64], Cm: &[f64], x_ref: Length, c: Length) -> AerodynamicCenter {
    let line = line_through(CN, Cm);
    AerodynamicCenter {
        x: Length::from_si(x_ref.si() - line.slope * c.si()),
        Cm: line.intercept,
        residual: line.residual,
    }
}

/// Moment of the thrust about the centre of gravity, nose up.
///
/// - `thrust`: thrust, positive forward.
/// - `z_thrust`, `z_cg`: heights of a point of the thrust line and of the centre of gravity, positive up.
/// - `angle`: inclination of the thrust line, positive tilted up; 0 where it lies along the datum.
/// - `x_thrust`, `x_cg`: stations of that point and of the centre of gravity.
///
/// -T cos(angle)(z_thrust - z_cg) + T sin(angle)(x_cg - x_thrust). The lift T sin(angle) of a tilted thrust belongs in
/// the vertical balance too.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::moment::thrust_moment;
/// use engine::quantity::{Angle, Force, Length, Typed};
/// let m = Length::from_si;
/// let high = thrust_moment(Force::from_si(1000.0), m(0.5), m(0.25), Angle::from_si(0.0), m(0.0), m(0.0));
/// assert_eq!(high.si(), -250.0);
/// ```
pub fn thrust_moment(
    thrust: Force,
    z_thrust: Length,
    z_cg: Length,
    angle: Angle,
    x_thrust: Length,
    x_cg: Length,
) -> Torque {
    let forward = thrust.si() * cos(angle.si());
    let up = thrust.si() * sin(angle.si());
    Torque::from_si(up * (x_cg - x_thrust).si() - forward * (z_thrust - z_cg).si())
}

/// Moment of a drag about the centre of gravity, nose up, D (z_drag - z_cg).
///
/// - `drag`: drag, positive aft.
/// - `z_drag`: height at which it acts, positive up.
/// - `z_cg`: height of the centre of gravity.
///
/// Drag that acts above the centre of gravity pitches the nose up.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::moment::drag_moment;
/// use engine::quantity::{Force, Length, Typed};
/// assert_eq!(drag_moment(Force::from_si(800.0), Length::from_si(0.5), Length::from_si(0.25)).si(), 200.0);
/// ```
pub fn drag_moment(drag: Force, z_drag: Length, z_cg: Length) -> Torque {
    Torque::from_si(drag.si() * (z_drag - z_cg).si())
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_abs_diff_eq, assert_relative_eq};

    fn m(value: f64) -> Length {
        Length::from_si(value)
    }

    fn degrees(value: f64) -> Angle {
        Angle::from_si(value * std::f64::consts::PI / 180.0)
    }

    /// J. D. Anderson, Introduction to Flight, Prob. 5.2: NACA 1412, 3 ft chord, 100 ft/s, 0.002377 slug/ft^3; lift 23.9
    /// lb/ft at cl = 0.67 and moment -2.68 ft.lb/ft at cm = -0.025. A strip of 1 ft span, in slugs, feet and seconds.
    #[test]
    fn moment_of_a_textbook_section() {
        let q = 0.5 * 0.002_377 * 100.0 * 100.0;
        let moment = pitching_moment(-0.025, Pressure::from_si(q), Area::from_si(3.0), m(3.0));
        assert_abs_diff_eq!(moment.si(), -2.68, epsilon = 0.02);
        assert_abs_diff_eq!(0.67 * q * 3.0, 23.9, epsilon = 0.1);
    }

    /// Vector statics by an independent sum of moments of the force at (0.25 c, 0).
    #[test]
    fn transfer_with_drag_and_height() {
        for (cl, cd, cm, alpha, to, z_to, expected) in [
            (0.8, 0.03, -0.05, 6.0, 0.3, 0.0, -0.010_062_331_49),
            (1.1, 0.08, -0.09, 10.0, 0.32, -0.12, -0.026_664_778_25),
        ] {
            let cn = normal_coefficient(cl, cd, degrees(alpha));
            let ca = axial_coefficient(cl, cd, degrees(alpha));
            let about =
                moment_coefficient_about(cm, m(0.25), m(to), cn, m(1.0), ca, m(0.0), m(z_to));
            assert_abs_diff_eq!(about, expected, epsilon = 1e-10);
        }
    }

    /// cm_LE = cm_c/4 - cl/4 and x_cp = 1/4 - cm_c/4/cl for small angles.
    #[test]
    fn leading_edge_and_center_of_pressure() {
        for (cl, cm, about_le, x_cp) in [(0.5, -0.05, -0.175, 0.35), (1.2, -0.093, -0.393, 0.3275)]
        {
            let moved =
                moment_coefficient_about(cm, m(0.25), m(0.0), cl, m(1.0), 0.0, m(0.0), m(0.0));
            assert_abs_diff_eq!(moved, about_le, epsilon = 1e-12);
            let x = center_of_pressure(cm, cl, m(0.25), m(1.0));
            assert_abs_diff_eq!(x.si(), x_cp, epsilon = 1e-12);
            // About the centre of pressure nothing is left.
            let left = moment_coefficient_about(cm, m(0.25), x, cl, m(1.0), 0.0, m(0.0), m(0.0));
            assert_abs_diff_eq!(left, 0.0, epsilon = 1e-15);
        }
        assert!(center_of_pressure(0.1, 1e-13, m(0.0), m(1.0)).si().is_nan());
        assert!(
            center_of_pressure(0.1, f64::NAN, m(0.0), m(1.0))
                .si()
                .is_nan()
        );
    }

    /// E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students, moments about a third of the chord
    /// (data from memory, fairly sure): aerodynamic centre 0.2333 c, Cm -0.04.
    #[test]
    fn aerodynamic_center_of_a_straight_polar() {
        let ac = aerodynamic_center(
            &[0.2, 0.4, 0.6, 0.8],
            &[-0.02, 0.0, 0.02, 0.04],
            m(1.0 / 3.0),
            m(1.0),
        );
        assert_abs_diff_eq!(ac.x.si(), 0.233_333_333_3, epsilon = 1e-9);
        assert_abs_diff_eq!(ac.Cm, -0.04, epsilon = 1e-12);
        assert_abs_diff_eq!(ac.residual, 0.0, epsilon = 1e-15);
        let curved = aerodynamic_center(&[0.2, 0.6, 1.0], &[-0.04, -0.032, -0.04], m(0.25), m(1.0));
        assert!(curved.residual > 0.004);
    }

    /// J. D. Anderson, Aircraft Performance and Design, Ex. 2.4: cm -0.045 at -8 deg and -0.035 at 10 deg, lift slope
    /// 0.105 per degree; x_ac/c = 0.2447.
    #[test]
    fn aerodynamic_center_of_a_textbook_section() {
        let ac = aerodynamic_center(
            &[0.105 * -8.0, 0.105 * 10.0],
            &[-0.045, -0.035],
            m(0.25),
            m(1.0),
        );
        assert_abs_diff_eq!(ac.x.si(), 0.2447, epsilon = 1e-4);
    }

    #[test]
    fn there_and_back_leaves_the_moment() {
        for (n, a) in [(4000.0, 250.0), (-1500.0, 90.0), (0.0, -30.0)] {
            let (n, a) = (Force::from_si(n), Force::from_si(a));
            let there = moment_about(
                Torque::from_si(-420.0),
                m(1.9),
                m(2.35),
                n,
                a,
                m(0.1),
                m(-0.4),
            );
            let back = moment_about(there, m(2.35), m(1.9), n, a, m(-0.4), m(0.1));
            assert_relative_eq!(back.si(), -420.0, max_relative = 1e-12);
        }
    }

    #[test]
    fn coefficients_follow_the_moment_through_changes_of_reference() {
        let (q, s, c) = (Pressure::from_si(900.0), Area::from_si(11.0), m(1.3));
        let (s2, c2) = (Area::from_si(13.2), m(1.21));
        let moment = pitching_moment(-0.07, q, s, c);
        let other = rescale_coefficient(-0.07, s, c, s2, c2);
        assert_relative_eq!(
            pitching_moment(other, q, s2, c2).si(),
            moment.si(),
            max_relative = 1e-14
        );
        assert_relative_eq!(
            moment_coefficient(moment, q, s, c),
            -0.07,
            max_relative = 1e-15
        );
        // The moment of the coefficient about another point is the moment of the moment.
        let about = moment_coefficient_about(-0.07, m(2.0), m(2.2), 0.9, c, 0.05, m(0.0), m(0.3));
        let force = |k: f64| Force::from_si(k * 900.0 * 11.0);
        let moved = moment_about(
            moment,
            m(2.0),
            m(2.2),
            force(0.9),
            force(0.05),
            m(0.0),
            m(0.3),
        );
        assert_relative_eq!(
            pitching_moment(about, q, s, c).si(),
            moved.si(),
            max_relative = 1e-13
        );
    }

    #[test]
    fn the_resultant_is_kept_by_resolution() {
        for step in -10..=20 {
            let alpha = degrees(f64::from(step) * 2.0);
            let (cn, ca) = (
                normal_coefficient(1.1, 0.09, alpha),
                axial_coefficient(1.1, 0.09, alpha),
            );
            assert_relative_eq!(
                cn * cn + ca * ca,
                1.1 * 1.1 + 0.09 * 0.09,
                max_relative = 1e-14
            );
        }
    }

    /// A tilted thrust line: the moment is the thrust times the distance of the line from the centre of gravity, so it
    /// does not matter which point of the line is given.
    #[test]
    fn thrust_may_be_moved_along_its_line() {
        let (thrust, angle) = (Force::from_si(1500.0), degrees(4.0));
        let first = thrust_moment(thrust, m(0.3), m(0.1), angle, m(0.5), m(2.0));
        let forward = m(0.5 - 0.7 * cos(angle.si()));
        let second = thrust_moment(
            thrust,
            m(0.3 + 0.7 * sin(angle.si())),
            m(0.1),
            angle,
            forward,
            m(2.0),
        );
        assert_relative_eq!(first.si(), second.si(), max_relative = 1e-12);
        assert!(
            first.si() < 0.0
                && thrust_moment(thrust, m(0.1), m(0.1), angle, m(0.5), m(2.0)).si() > 0.0
        );
    }
}
