//! Wing and body: lift slopes, the lifting line, wing moments, spanwise loads, moments of bodies.

use super::macros::{
    Argument, along, at, each, entry, field, line, numbers, one, parameter, points, positive,
    put_along, within,
};
use super::row::{Compute, Entry, Field, Parameter, Prepared};
use engine::body;
use engine::quantity::{Angle, Area, Force, ForcePerLength, Length, PerAngle, Typed};
use engine::wing::{self, LiftingLine};

const GROUP: &str = "Wing and body";
const TWO_PI: f64 = 2.0 * std::f64::consts::PI;
const STATIONS: &str = "Stations of one half from root to tip, everything straight between them; two at one place hold a jump.";

/// A result along the stations.
const fn station_field<T: Typed>(name: &'static str, what: &'static str) -> Field {
    along(super::macros::field_of::<T>(name, what))
}

pub(super) static ROWS: &[Entry] = &[
    within(
        |given| positive(given, [0, 1]) && at(given, 3).abs() < 0.7,
        "holds for an aspect ratio and a section slope above 0 and a Mach number below 0.7",
        each!(GROUP, wing::lift_slope(aspect_ratio: f64, @lift_slope section_slope: PerAngle = TWO_PI,
                half_chord_sweep: Angle = 0.0, mach: f64 = 0.0) -> PerAngle;
            "Lift slope of a wing from its aspect ratio, per radian.",
            "2 pi A/(2 + sqrt(A^2 beta^2/kappa^2 (1 + tan^2(sweep)/beta^2) + 4)), kappa the section slope over 2 pi. \
             Without sweep and at low speed that is Helmbold's formula.",
            "Subsonic, attached flow; an aspect ratio above 0.",
            "H. B. Helmbold (1942); E. C. Polhamus; USAF Stability and Control Datcom, 4.1.3.2",
            "a_w = lift_slope(6.2)\n\
             a_t = lift_slope(3.8, 6.0 /rad, 5 deg)\n"),
    ),
    within(
        |given| at(given, 0) >= 4.0 && positive(given, [1]),
        "holds for an aspect ratio of 4 and more",
        each!(GROUP, wing::elliptic_lift_slope(aspect_ratio: f64, @lift_slope section_slope: PerAngle = TWO_PI)
                -> PerAngle;
            "Lift slope of an elliptically loaded wing, per radian.",
            "a0/(1 + a0/(pi A)).",
            "Unswept wings of an aspect ratio of 4 and more, incompressible, attached flow.",
            "Prandtl's lifting-line theory",
            "a_w = elliptic_lift_slope(6.2)\n"),
    ),
    entry!(GROUP, lifting_line,
        &[parameter!(y: [Length]), parameter!(chord: [Length]), parameter!(twist: [Angle]),
          parameter!(zero_lift: [Angle]), parameter!(@lift_slope section_slope: [PerAngle]), parameter!(alpha: Angle)],
        &[
            field!("CL", f64, "lift coefficient of the wing"),
            field!("CL_alpha", PerAngle, "lift slope of the wing"),
            field!("alpha_zero_lift", Angle, "angle of attack at which the wing has no lift"),
            field!("CDi", f64, "coefficient of induced drag"),
            field!("efficiency", f64, "CL^2/(pi A CDi); none without lift"),
            station_field::<f64>("cl", "section lift coefficient"),
            station_field::<f64>("cl_basic", "section lift coefficient without lift of the wing"),
            station_field::<f64>("cl_additional", "section lift coefficient at CL = 1, less the basic one"),
            station_field::<f64>("load_share", "cl c/(mean chord CL)"),
        ],
        Compute::Prepared(Prepared {
            swept: &[5],
            prepare: |given, _| Box::new(LiftingLine::new(
                &line(given, 0), &line(given, 1), &line(given, 2), &line(given, 3), &line(given, 4))),
            apply: |wing, given, out| {
                let wing = wing.downcast_ref::<Option<LiftingLine>>().and_then(Option::as_ref);
                let found = wing.map(|wing| wing.at(one(given, 5)));
                let stations = given.first().map_or(0, |y| y.len());
                let Some(found) = found else {
                    return put_along(out, std::iter::repeat_n(vec![f64::NAN; stations.max(1)], 9));
                };
                let single = [found.CL, found.CL_alpha.si(), found.alpha_zero_lift.si(), found.CDi, found.efficiency];
                let lines = [found.cl, found.cl_basic, found.cl_additional, found.load_share];
                put_along(out, single.map(|v| vec![v]).into_iter().chain(lines));
            },
        });
        "Lift, its distribution and induced drag of an unswept wing.",
        "Prandtl's lifting line in Glauert's series, 120 and 240 odd terms at points clustered to the tip, extrapolated. \
         All but alpha are whole lines; twist is positive nose up against the datum line, zero_lift the section's angle of \
         no lift against its own chord line, alpha the angle of attack of the datum line. Positive up and nose up.",
        "Symmetrical, unswept, no dihedral, incompressible, attached flow; the first station in the plane of symmetry.",
        "H. Glauert, The Elements of Aerofoil and Airscrew Theory, chapter XI",
        "table station | y [ft] | c [ft] | eps [deg] | a0 [deg] ; drawing of the wing\n\
         1 | 0 | 5.0 | 0 | -2.1\n\
         2 | 14 | 3.6 | -2 | -2.1\n\
         end\n\
         wing = lifting_line(y, c, eps, a0, 6.1 /rad, 4 deg over station)\n\
         CL_w = wing.CL\n"),
    points!(GROUP, wing::wing_moment(y: [Length], chord: [Length], x_le: [Length], cm: [f64], cl_basic: [f64],
            cl_additional: [f64]) -> {
            Cm0: f64 = "moment coefficient about the aerodynamic centre, nose up, on S and mac of the planform",
            x_ac: Length = "station of the aerodynamic centre",
        };
        "Moment coefficient and aerodynamic centre of a wing from its sections.",
        "x_ac = Int cl_a c x_q dy/Int cl_a c dy; Cm0 = 2/(S mac) [Int cm c^2 dy - Int cl_b c (x_q - x_ac) dy], x_q the \
         quarter chord; exact for what is straight between the stations. All are whole lines.",
        STATIONS,
        "R. F. Anderson, NACA TR 572",
        "table station | y [ft] | c [ft] | x [ft] | cm | clb | cla ; sections and lifting line\n\
         1 | 0 | 5.0 | 4.9 | -0.05 | 0.02 | 0.98\n\
         2 | 14 | 3.6 | 5.2 | -0.05 | -0.02 | 0.9\n\
         end\n\
         m = wing_moment(y, c, x, cm, clb, cla over station)\n\
         Cm_w = m.Cm0\n"),
    entry!(GROUP, schrenk_load,
        &[parameter!(y: [Length]), parameter!(chord: [Length]), parameter!(lift: Force)],
        &[along(field!("", ForcePerLength, ""))],
        Compute::Lines(|given, _, out| {
            let load = wing::schrenk_load(&line(given, 0), &line(given, 1), one(given, 2));
            put_along(out, [numbers(load)]);
        });
        "Load per span along one half of a wing, by Schrenk's approximation.",
        "lift/S times the mean of the chord and that of an ellipse of the same area and span. The lift is that of the \
         whole wing, positive up; y and chord are whole lines.",
        "Unswept, untwisted wings of moderate taper; no flaps.",
        "O. Schrenk, NACA TM 948",
        "table station | y [ft] | c [ft] ; drawing of the wing\n\
         1 | 0 | 5.0\n\
         2 | 7 | 4.3\n\
         3 | 14 | 3.6\n\
         end\n\
         w [lb/ft] = schrenk_load(y, c, 2100 lb over station)\n"),
    within(
        |given| (0.1..=0.7).contains(&at(given, 4)),
        "has values of K_f only for a quarter chord of the wing root from 0.1 to 0.7 of the body's length",
        each!(GROUP, body::body_moment_slope(length: Length, width: Length, wing_area: Area, mac: Length,
                root_quarter_fraction: f64) -> PerAngle;
            "Moment slope of a body, per radian of wing angle.",
            "K_f width^2 length/(S mac), nose up positive: destabilising. K_f per radian, straight between the values known \
             at 0.1, 0.2, 0.3, 0.5 and 0.7 of the length.",
            "A quarter chord of the wing root from 0.1 to 0.7 of the body's length; read off a figure, good to about 5 %.",
            "R. R. Gilruth and M. D. White, NACA TR 711; the values of K_f from memory",
            "Cm_b = body_moment_slope(19 ft, 2.6 ft, 142 ft^2, 4.6 ft, 0.3)\n"),
    ),
    entry!(GROUP, slender_body_moment_slope,
        &[parameter!(x: [Length]), parameter!(width: [Length]), parameter!(flow_slope: [f64]),
          parameter!(wing_area: Area), parameter!(mac: Length)],
        &[field!("", PerAngle, "")],
        Compute::Lines(|given, _, out| {
            let flow: Vec<f64> = line(given, 2);
            let slope = body::slender_body_moment_slope(
                &line(given, 0), &line(given, 1), &flow, one(given, 3), one(given, 4));
            put_along(out, [vec![slope.si()]]);
        });
        "Moment slope of a slender body by strips, per radian.",
        "pi/(2 S mac) Int width^2 d(beta)/d(alpha) dx, nose up positive; flow_slope is d(beta)/d(alpha): 1 undisturbed, \
         above 1 ahead of the wing. x, width and flow_slope are whole lines, nose to tail.",
        "Slender bodies at small angles; two stations at one place hold a jump.",
        "M. M. Munk, NACA TR 184; H. Multhopp, NACA TM 1036",
        "table frame | x [ft] | w [ft] | f ; drawing of the fuselage\n\
         1 | 0 | 1.2 | 1.1\n\
         2 | 4 | 2.6 | 1.5\n\
         3 | 10 | 1.9 | 0.3\n\
         4 | 18 | 0.6 | 0.6\n\
         end\n\
         Cm_b = slender_body_moment_slope(x, w, f, 142 ft^2, 4.6 ft over frame)\n"),
    entry!(GROUP, body_moment_zero,
        &[parameter!(x: [Length]), parameter!(width: [Length]), parameter!(incidence: [Angle]),
          parameter!(zero_lift: Angle), parameter!(wing_area: Area), parameter!(mac: Length), parameter!(fineness: f64)],
        &[field!("", f64, "")],
        Compute::Lines(|given, _, out| {
            let cm = body::body_moment_zero(&line(given, 0), &line(given, 1), &line(given, 2), one(given, 3),
                one(given, 4), one(given, 5), one(given, 6));
            put_along(out, [vec![cm]]);
        });
        "Moment coefficient of a body where the wing has no lift.",
        "(k2 - k1) pi/(2 S mac) Int width^2 (zero_lift + incidence) dx, nose up positive; incidence is that of the body's \
         camber line against the datum line, zero_lift the datum's angle of attack at which the wing has no lift, k2 - k1 \
         that of a spheroid of this length over diameter. x, width and incidence are whole lines, nose to tail.",
        "Slender bodies at small angles, a fineness above 1.",
        "M. M. Munk, NACA TR 184; H. Multhopp, NACA TM 1036; H. Lamb, R&M 623",
        "table frame | x [ft] | w [ft] | i [deg] ; drawing of the fuselage\n\
         1 | 0 | 1.2 | -4\n\
         2 | 6 | 2.6 | 0\n\
         3 | 18 | 0.6 | -2\n\
         end\n\
         Cm_0 = body_moment_zero(x, w, i, -3 deg, 142 ft^2, 4.6 ft, 6.9 over frame)\n"),
];
