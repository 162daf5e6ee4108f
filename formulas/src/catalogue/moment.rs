//! Moment book-keeping: coefficients and moments from one point and reference to another.

use super::macros::{each, field, parameter};
use super::row::{Compute, Entry, Field, Gives, Line, Parameter, Wants};
use crate::values::is_excluded;
use engine::quantity::{Angle, Area, Force, Length, Pressure, Torque, Typed};

const GROUP: &str = "Moment book-keeping";
const RESOLVED: &str = "resolution of the force, as in E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students";

pub(super) static ROWS: &[Entry] = &[
    each!(GROUP, moment::pitching_moment(Cm: f64, q: Pressure, S: Area, c: Length) -> Torque;
        "Pitching moment of a coefficient, nose up positive.",
        "Cm q S c, about the point to which the coefficient belongs.",
        "everywhere",
        "definition",
        "M [ft.lb] = pitching_moment(-0.05, 27 lb/ft^2, 142 ft^2, 4.6 ft)\n"),
    each!(GROUP, moment::moment_coefficient(M: Torque, q: Pressure, S: Area, c: Length) -> f64;
        "Coefficient of a pitching moment.",
        "M/(q S c).",
        "where q, S and c are not 0",
        "definition",
        "Cm = moment_coefficient(-900 ft.lb, 27 lb/ft^2, 142 ft^2, 4.6 ft)\n"),
    each!(GROUP, moment::normal_coefficient(CL: f64, CD: f64, alpha: Angle) -> f64;
        "Normal force coefficient, up from the datum line.",
        "CL cos(alpha) + CD sin(alpha).",
        "everywhere",
        RESOLVED,
        "CN = normal_coefficient(0.8, 0.03, 6 deg)\n"),
    each!(GROUP, moment::axial_coefficient(CL: f64, CD: f64, alpha: Angle) -> f64;
        "Axial force coefficient, aft along the datum line.",
        "CD cos(alpha) - CL sin(alpha).",
        "everywhere",
        RESOLVED,
        "CA = axial_coefficient(0.8, 0.03, 6 deg)\n"),
    each!(GROUP, moment::moment_coefficient_about(Cm: f64, from: Length, to: Length, CN: f64, c: Length,
        CA: f64 = 0.0, z_from: Length = 0.0, z_to: Length = 0.0) -> f64;
        "A moment coefficient carried from one point to another.",
        "Cm + CN (to - from)/c - CA (z_to - z_from)/c; x aft, z up, nose up positive.",
        "everywhere",
        "statics; E. L. Houghton and P. W. Carpenter, Aerodynamics for Engineering Students, without the height",
        "Cm = moment_coefficient_about(-0.05, 0.25 m, 0.30 m, 0.8, 1 m)\n"),
    each!(GROUP, moment::moment_about(M: Torque, from: Length, to: Length, N: Force, A: Force = 0.0,
        z_from: Length = 0.0, z_to: Length = 0.0) -> Torque;
        "A moment carried from one point to another.",
        "M + N (to - from) - A (z_to - z_from); N up, A aft.",
        "everywhere",
        "statics",
        "M [N.m] = moment_about(-300 N.m, 1.80 m, 1.95 m, 5800 N)\n"),
    each!(GROUP, moment::rescale_coefficient(C: f64, from_S: Area, from_c: Length, to_S: Area, to_c: Length) -> f64;
        "A moment coefficient on another reference area and chord.",
        "C from_S from_c/(to_S to_c).",
        "where to_S and to_c are not 0",
        "definition of the coefficients",
        "Cm = rescale_coefficient(-0.05, 12 m^2, 1.2 m, 12.6 m^2, 1.25 m)\n"),
    each!(GROUP, moment::center_of_pressure(Cm: f64, CN: f64, x_ref: Length, c: Length) -> Length;
        "Station of the centre of pressure.",
        "x_ref - Cm c/CN.",
        "where CN is not 0: as it goes to 0 the point goes to infinity",
        "statics, as in J. D. Anderson, Fundamentals of Aerodynamics",
        "x = center_of_pressure(-0.05, 0.5, 0.25 m, 1 m)\n"),
    Entry {
        name: "aerodynamic_center",
        group: GROUP,
        parameters: &[
            Parameter {
                line: true,
                ..parameter!(CN, f64)
            },
            Parameter {
                line: true,
                ..parameter!(Cm, f64)
            },
            parameter!(x_ref, Length),
            parameter!(c, Length),
        ],
        fields: &[
            field!("x", Length, None, "station of the aerodynamic centre"),
            field!("Cm", f64, None, "moment coefficient about it"),
            field!(
                "residual",
                f64,
                None,
                "largest departure of Cm from the straight line"
            ),
        ],
        compute: Compute::Lines(aerodynamic_center),
        validity: None,
        what: "Aerodynamic centre of a polar: the point about which Cm does not change with CN.",
        method: "Least-squares line of Cm over CN through the points that are not excluded; x_ref less its slope times \
                 the chord.",
        holds: "over the linear range of the polar; the residual says how straight it is",
        source: "definition; least squares",
        example: "table alpha [deg] | CN | Cm ; wind tunnel, about the quarter chord\n-4 | 0.10 | -0.048\n0 | 0.50 | \
                  -0.050\n4 | 0.90 | -0.052\nend\nac = aerodynamic_center(CN, Cm, 0.25 m, 1 m over alpha)\n",
    },
    each!(GROUP, moment::thrust_moment(thrust: Force, z_thrust: Length, z_cg: Length, angle: Angle = 0.0,
        x_thrust: Length = 0.0, x_cg: Length = 0.0) -> Torque;
        "Moment of the thrust about the centre of gravity, nose up positive.",
        "-T cos(angle) (z_thrust - z_cg) + T sin(angle) (x_cg - x_thrust); angle positive with the thrust line tilted \
         up. The lift T sin(angle) belongs in the vertical balance too.",
        "everywhere",
        "statics",
        "M [N.m] = thrust_moment(900 N, 1.10 m, 0.95 m)\n"),
    each!(GROUP, moment::drag_moment(drag: Force, z_drag: Length, z_cg: Length) -> Torque;
        "Moment of the drag about the centre of gravity, nose up positive.",
        "D (z_drag - z_cg).",
        "everywhere",
        "statics",
        "M [N.m] = drag_moment(700 N, 1.20 m, 0.95 m)\n"),
];

fn aerodynamic_center(given: &[Line<'_>], _: &[&str], out: &mut [Vec<f64>]) {
    let line = |i: usize| given.get(i).copied().unwrap_or_default();
    let single = |i: usize| line(i).first().copied().unwrap_or(f64::NAN);
    let points = line(0)
        .iter()
        .zip(line(1))
        .filter(|(n, m)| !is_excluded(**n) && !is_excluded(**m));
    let (normal, moment): (Vec<f64>, Vec<f64>) = points.map(|(n, m)| (*n, *m)).unzip();
    let center = engine::moment::aerodynamic_center(
        &normal,
        &moment,
        Length::from_si(single(2)),
        Length::from_si(single(3)),
    );
    let fields = [center.x.si(), center.Cm, center.residual];
    out.iter_mut()
        .zip(fields)
        .for_each(|(out, value)| *out = vec![value]);
}
