//! Moment book-keeping: coefficients and moments from one point and reference to another.

use super::macros::{Argument, at, each, points, positive, trap, within};
use super::row::{Compute, Entry, Parameter};
use engine::moment::CN_ZERO;
use engine::quantity::{Angle, Area, Force, Length, Pressure, Torque, Typed};

const GROUP: &str = "Moment book-keeping";
const RESOLVED: &str = "resolution of the force, as in E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering \
                        Students";
const REFERENCE: &str = "the method holds for a dynamic pressure not below 0 Pa, a reference area above 0 m^2 and a \
                         reference chord above 0 m";
/// The least magnitude of Cm0 that CS 22.331 lets a sailplane be balanced with.
const LEAST_MOMENT: f64 = 0.025;
const CHORD: &str = "the method holds for a reference chord above 0 m";

pub(super) static ROWS: &[Entry] = &[
    trap(
        &[],
        |given| at(given, 0).abs() >= LEAST_MOMENT,
        "a moment coefficient next to 0; that of the airplane less tail is taken as at least 0.025 in magnitude (CS 22.331)",
        within(
            |given| at(given, 1) >= 0.0 && positive(given, [2, 3]),
            REFERENCE,
            each!(GROUP, moment::pitching_moment(Cm: f64, q: Pressure, S: Area, c: Length) -> Torque;
            "Pitching moment of a coefficient, nose up positive.",
            "Cm q S c, about the point that the coefficient is about.",
            "Everywhere, as a definition.",
            "definition",
            "q = dynamic_pressure_of_eas(90 KEAS)\n\
             M [ft.lb] = pitching_moment(-0.062, q, 142 ft^2, 4.6 ft)\n"),
        ),
    ),
    within(
        |given| at(given, 1) >= 0.0 && positive(given, [2, 3]),
        REFERENCE,
        each!(GROUP, moment::moment_coefficient(M: Torque, q: Pressure, S: Area, c: Length) -> f64;
            "Coefficient of a pitching moment, nose up positive.",
            "M/(q S c), about the point that the moment is about.",
            "Where q, S and c are not 0.",
            "definition",
            "q = dynamic_pressure_of_eas(90 KEAS)\n\
             Cm = moment_coefficient(-900 ft.lb, q, 142 ft^2, 4.6 ft)\n"),
    ),
    each!(GROUP, moment::normal_coefficient(CL: f64, CD: f64, alpha: Angle) -> f64;
        "Coefficient of the force normal to the datum line, up positive.",
        "CL cos(alpha) + CD sin(alpha), alpha the angle of attack of the datum line.",
        "Everywhere.",
        RESOLVED,
        "alpha [deg] = 6 ; of the datum line\n\
         CN = normal_coefficient(0.8, 0.03, alpha)\n"),
    each!(GROUP, moment::axial_coefficient(CL: f64, CD: f64, alpha: Angle) -> f64;
        "Coefficient of the force along the datum line, aft positive.",
        "CD cos(alpha) - CL sin(alpha), alpha the angle of attack of the datum line. At high angles it is negative: the \
         lift pulls forward along the chord.",
        "Everywhere.",
        RESOLVED,
        "alpha [deg] = 6 ; of the datum line\n\
         CA = axial_coefficient(0.8, 0.03, alpha)\n"),
    within(
        |given| positive(given, [4]),
        CHORD,
        each!(GROUP, moment::moment_coefficient_about(Cm: f64, from: Length, to: Length, CN: f64, c: Length,
                CA: f64 = 0.0, z_from: Length = 0.0, z_to: Length = 0.0) -> f64;
            "A moment coefficient carried from one point to another, nose up positive.",
            "Cm + CN (to - from)/c - CA (z_to - z_from)/c; stations positive aft, heights up, CN up, CA aft. The force \
             pulls up ahead of a point farther aft.",
            "Exact statics. With lift in place of the normal force the drag's share and cos(alpha) are missing.",
            "statics; E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students, without the height",
            "x_ref [ft] = 6.10 ; the coefficients are about it\n\
             x_cg [ft] = 6.45 ; weighing report\n\
             Cm_cg = moment_coefficient_about(-0.05, x_ref, x_cg, 0.8, 4.6 ft)\n"),
    ),
    each!(GROUP, moment::moment_about(M: Torque, from: Length, to: Length, N: Force, A: Force = 0.0,
            z_from: Length = 0.0, z_to: Length = 0.0) -> Torque;
        "A moment carried from one point to another, nose up positive.",
        "M + N (to - from) - A (z_to - z_from); stations positive aft, heights up, N up, A aft.",
        "Exact statics.",
        "statics",
        "x_ref [m] = 1.80 ; the moment is about it\n\
         x_cg [m] = 1.95 ; weighing report\n\
         M_cg [N.m] = moment_about(-300 N.m, x_ref, x_cg, 5800 N)\n"),
    within(
        |given| positive(given, [1, 2, 3, 4]),
        "the method holds for reference areas above 0 m^2 and reference chords above 0 m",
        each!(GROUP, moment::rescale_coefficient(C: f64, from_S: Area, from_c: Length, to_S: Area,
                to_c: Length) -> f64;
            "A moment coefficient for another reference area and chord.",
            "C from_S from_c/(to_S to_c); the moment itself and its point stay. A force coefficient has no chord in it: \
             give the same chord twice.",
            "Where to_S and to_c are not 0.",
            "definition of the coefficients",
            "Cm_tunnel = -0.05 ; wind tunnel, on 12 m^2 and 1.2 m\n\
             Cm = rescale_coefficient(Cm_tunnel, 12 m^2, 1.2 m, 12.6 m^2, 1.25 m)\n"),
    ),
    within(
        |given| at(given, 1).abs() > CN_ZERO && positive(given, [3]),
        "the method holds where a normal force acts, CN other than 0, and for a reference chord above 0 m",
        each!(GROUP, moment::center_of_pressure(Cm: f64, CN: f64, x_ref: Length, c: Length) -> Length;
            "Station at which the normal force alone has the moment.",
            "x_ref - Cm c/CN, Cm about x_ref.",
            "As CN goes to 0 it runs to infinity, and there is no value.",
            "statics, as in J. D. Anderson, Fundamentals of Aerodynamics",
            "x_ref [m] = 0.25 ; Cm is about it\n\
             x_cp [m] = center_of_pressure(-0.05, 0.5, x_ref, 1 m)\n"),
    ),
    points!(GROUP, moment::aerodynamic_center(CN: [f64], Cm: [f64], x_ref: Length, c: Length) -> {
            x: Length = "station of the aerodynamic centre",
            Cm: f64 = "moment coefficient about it: that at zero normal force",
            residual: f64 = "largest departure of a point's Cm from the straight line",
        };
        "Aerodynamic centre of a polar: the point about which Cm does not change with CN.",
        "Least-squares line of Cm over CN through the points that are not excluded; its slope is (x_ref - x)/c. CN and Cm \
         are whole lines, Cm about x_ref.",
        "Over the straight part of the polar: exclude the points near the stall, and read from the residual how straight \
         the rest is. At least two points of different CN.",
        "definition; least squares",
        "table alpha [deg] | CN | Cm ; wind tunnel, about the quarter chord\n\
         -4 | 0.10 | -0.048\n\
         4 | 0.90 | -0.052\n\
         14 | 1.45 | excluded\n\
         end\n\
         ac = aerodynamic_center(CN, Cm, 0.25 m, 1 m over alpha)\n"),
    each!(GROUP, moment::thrust_moment(thrust: Force, z_thrust: Length, z_cg: Length, angle: Angle = 0.0,
            x_thrust: Length = 0.0, x_cg: Length = 0.0) -> Torque;
        "Moment of the thrust about the centre of gravity, nose up positive.",
        "-T cos(angle) (z_thrust - z_cg) + T sin(angle) (x_cg - x_thrust); thrust positive forward, angle positive with \
         the thrust line tilted up. The lift T sin(angle) belongs in the vertical balance too.",
        "Exact statics. A tilted thrust line needs x_thrust and x_cg.",
        "statics",
        "T [N] = 900 ; full throttle at climb speed\n\
         M_T [N.m] = thrust_moment(T, 1.10 m, 0.95 m, 2 deg, 0.3 m, 1.9 m)\n"),
    each!(GROUP, moment::drag_moment(drag: Force, z_drag: Length, z_cg: Length) -> Torque;
        "Moment of the drag about the centre of gravity, nose up positive.",
        "D (z_drag - z_cg); drag positive aft. Drag above the centre of gravity pitches the nose up.",
        "Exact statics.",
        "statics",
        "D [N] = 700 ; estimate of drag\n\
         M_D [N.m] = drag_moment(D, 1.20 m, 0.95 m)\n"),
];
