//! Wing and body: lift slopes, the lifting line, wing moments, spanwise loads, moments of bodies.

use super::macros::{
    Argument, along, at, attached, each, entry, field, line, made, numbers, one, parameter, points,
    positive, put_along, trap, within, within_lines,
};
use super::row::{Compute, Entry, Extreme, Field, Line, Makes, Parameter, Prepared, Wants};
use engine::body;
use engine::quantity::{Angle, Area, Force, ForcePerLength, Length, PerAngle, Typed};
use engine::wing::{self, LiftingLine, LiftingSurfaces, Stations};

const GROUP: &str = "Wing and body";
const TWO_PI: f64 = 2.0 * std::f64::consts::PI;
const STATIONS: &str = "Stations of one half from root to tip, everything straight between them; two at one place hold a jump.";

const LATTICE: &str = "J. J. Bertin and M. L. Smith, Aerodynamics for Engineers (vortex lattice)";

const REFLEXED: &str = "sections with an angle of no lift below 0 have a moment below 0 too, nose down, unless they are reflexed";

/// The text by which stations are told apart.
const SURFACE: Parameter = Parameter {
    name: "surface",
    wants: Wants::Text,
    line: true,
    ..<f64 as Argument>::PARAMETER
};

/// The stations of each surface, in the order of first appearance; texts are told apart by their numbers.
fn by_surface(given: &[Line<'_>]) -> Vec<Stations> {
    let marks = given.first().copied().unwrap_or_default();
    let mut seen: Vec<f64> = Vec::new();
    for mark in marks {
        if !seen.contains(mark) {
            seen.push(*mark);
        }
    }
    let stations = |mark: &f64| {
        let own = |index: usize| -> Vec<f64> {
            let values: Vec<f64> = line(given, index);
            values
                .into_iter()
                .zip(marks)
                .filter(|(_, m)| *m == mark)
                .map(|(v, _)| v)
                .collect()
        };
        let lengths = |index: usize| own(index).into_iter().map(Length::from_si).collect();
        let angles = |index: usize| own(index).into_iter().map(Angle::from_si).collect();
        Stations {
            y: lengths(1),
            z: lengths(2),
            chord: lengths(3),
            x_le: lengths(4),
            twist: angles(5),
            zero_lift: angles(6),
            cm: own(7),
        }
    };
    seen.iter().map(stations).collect()
}

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
            "A = 6.2 ; drawing of the wing\n\
             a_w = elliptic_lift_slope(A)\n"),
    ),
    within_lines(
        &[(0, Extreme::Most), (1, Extreme::Most)],
        |given| 2.0 * at(given, 0) >= 3.0 * at(given, 1) && attached(at(given, 5)),
        "the method holds for slender wings, of an aspect ratio of about 4 and more, and angles of attack up to 15 degrees",
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
    ),
    trap(
        &[(4, Extreme::Most), (5, Extreme::Most)],
        |given| at(given, 4) >= 0.0 || at(given, 5) <= 0.0,
        REFLEXED,
        within_lines(
            &[(0, Extreme::Least)],
            |given| at(given, 0) == 0.0 && attached(at(given, 6)),
            "the method holds for a first station in the plane of symmetry, y = 0, with no gap between the halves, and angles of \
         attack up to 15 degrees",
            entry!(GROUP, lifting_surface,
        &[parameter!(y: [Length]), parameter!(chord: [Length]), parameter!(x_le: [Length]), parameter!(twist: [Angle]),
          parameter!(zero_lift: [Angle]), parameter!(cm: [f64]), parameter!(alpha: Angle), parameter!(x_ref: Length)],
        &[
            field!("area", Area, "area of both halves"),
            field!("mac", Length, "mean aerodynamic chord"),
            field!("CL", f64, "lift coefficient"),
            field!("CL_alpha", PerAngle, "lift slope"),
            field!("Cm", f64, "moment coefficient about x_ref, nose up"),
            field!("Cm_alpha", PerAngle, "its slope"),
            field!("x_ac", Length, "aerodynamic centre"),
            field!("CDi", f64, "coefficient of induced drag"),
            station_field::<f64>("cl", "section lift coefficient"),
        ],
        Compute::Prepared(Prepared {
            swept: &[6, 7],
            prepare: |given, _| {
                let count = given.first().map_or(0, |y| y.len());
                Box::new(LiftingSurfaces::new(&[Stations {
                    y: line(given, 0),
                    z: vec![Length::from_si(0.0); count],
                    chord: line(given, 1),
                    x_le: line(given, 2),
                    twist: line(given, 3),
                    zero_lift: line(given, 4),
                    cm: line(given, 5),
                }]))
            },
            apply: |wing, given, out| {
                let wing = wing.downcast_ref::<Option<LiftingSurfaces>>().and_then(Option::as_ref);
                let stations = given.first().map_or(0, |y| y.len());
                let Some(found) = wing.map(|wing| wing.at(one(given, 6), one(given, 7))) else {
                    return put_along(out, std::iter::repeat_n(vec![f64::NAN; stations.max(1)], 9));
                };
                let single = [found.area.si(), found.mac.si(), found.CL, found.CL_alpha.si(), found.Cm,
                    found.Cm_alpha.si(), found.x_ac.si(), found.CDi];
                put_along(out, single.map(|v| vec![v]).into_iter().chain(found.cl));
            },
        });
        "Lift, moment and induced drag of a wing of any sweep, taper and twist.",
        "Vortex lattice, six panels along the chord and 36 or more over the half span, closer together at stations and tips; \
         section moments included; area and mean chord of the planform are the reference. Stations of one half from root to tip; alpha of the datum line, twist against it, zero_lift \
         against the section's chord line; moments about x_ref, nose up.",
        "Symmetrical, incompressible, attached flow at small angles, section slopes of 2 pi. Of the limit of finer \
         lattices, lift slope within 0.25 %, induced drag within 0.5 %, aerodynamic centre within 0.5 % of the mean chord.",
        LATTICE,
        "table station | y [ft] | c [ft] | x [ft] | eps [deg] | a0 [deg] | cm ; drawing of the wing\n\
         1 | 0 | 5.0 | 4.9 | 0 | -2.1 | -0.05\n\
         2 | 14 | 3.6 | 6.8 | -2 | -2.1 | -0.05\n\
         end\n\
         w = lifting_surface(y, c, x, eps, a0, cm, 4 deg, 6 ft over station)\n\
         CL_w = w.CL\n"),
        ),
    ),
    trap(
        &[(6, Extreme::Most), (7, Extreme::Most)],
        |given| at(given, 6) >= 0.0 || at(given, 7) <= 0.0,
        REFLEXED,
        within(
            |given| attached(at(given, 8)),
            "the method holds for angles of attack up to 15 degrees",
            Entry {
                makes: Some(Makes::Texts(0)),
                ..entry!(GROUP, lifting_surfaces,
            &[SURFACE, parameter!(y: [Length]), parameter!(z: [Length]), parameter!(chord: [Length]),
              parameter!(x_le: [Length]), parameter!(twist: [Angle]), parameter!(zero_lift: [Angle]), parameter!(cm: [f64]),
              parameter!(alpha: Angle), parameter!(x_ref: Length)],
            &[
                field!("CL", f64, "lift coefficient of all, on the area of the largest surface"),
                field!("Cm", f64, "moment coefficient about x_ref, nose up"),
                field!("CL_alpha", PerAngle, "lift slope"),
                field!("Cm_alpha", PerAngle, "slope of the moment"),
                field!("x_np", Length, "neutral point"),
                made(field!("CL_surface", f64, "lift coefficient of a surface on its own area")),
                made(field!("downwash", Angle, "downwash at a surface from the others")),
                made(field!("downwash_slope", f64, "its slope with the angle of attack")),
            ],
            Compute::Prepared(Prepared {
                swept: &[8, 9],
                prepare: |given, _| Box::new(LiftingSurfaces::new(&by_surface(given))),
                apply: |wing, given, out| {
                    let wing = wing.downcast_ref::<Option<LiftingSurfaces>>().and_then(Option::as_ref);
                    let stations = given.first().map_or(0, |y| y.len());
                    let Some(found) = wing.map(|wing| wing.at(one(given, 8), one(given, 9))) else {
                        return put_along(out, std::iter::repeat_n(vec![f64::NAN; stations.max(1)], 8));
                    };
                    let single = [found.CL, found.Cm, found.CL_alpha.si(), found.Cm_alpha.si(), found.x_ac.si()];
                    let made = [found.CL_surface, numbers(found.downwash), found.downwash_slope];
                    put_along(out, single.map(|v| vec![v]).into_iter().chain(made));
                },
            });
            "Lift, moment and neutral point of wing and tail or canard together.",
            "Vortex lattice of all surfaces with their influence on each other; surface is a text along the stations, and the \
             axis of its texts is named as the result. Area and mean chord of the largest surface are the reference; the \
             downwash is the mean over a surface's quarter chord from the others, positive downward, upwash negative.",
            "Symmetrical, incompressible, attached flow at small angles, straight wakes, no body. Of the limit of finer lattices, \
             lift slope within 0.25 %, neutral point within 0.5 % of the mean chord, downwash slope within 0.01; a tail close \
             to the height of the wing's wake is less well met.",
            LATTICE,
            "table station | unit | y [ft] | z [ft] | c [ft] | x [ft] | i [deg] ; drawings\n\
             1 | \"wing\" | 0 | 0 | 4.6 | 5 | 2\n\
             2 | \"wing\" | 14 | 0.6 | 4.6 | 5 | 2\n\
             3 | \"tail\" | 0 | 1 | 2.6 | 16.6 | -1\n\
             4 | \"tail\" | 4.6 | 1 | 2.6 | 16.6 | -1\n\
             end\n\
             a = lifting_surfaces(unit, y, z, c, x, i, 0 deg, 0, 3 deg, 6 ft over station)\n")
            },
        ),
    ),
    within_lines(
        &[(0, Extreme::Least)],
        |given| at(given, 0) == 0.0,
        "the method holds for a first station in the plane of symmetry, y = 0: the part inside of it is not counted",
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
    ),
    within_lines(
        &[(0, Extreme::Least)],
        |given| at(given, 0) == 0.0,
        "the method holds for a first station in the plane of symmetry, y = 0: the lift is shared out over what is given",
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
    ),
    within(
        |given| (0.1..=0.7).contains(&at(given, 4)),
        "holds for a quarter chord of the wing root from 0.1 to 0.7 of the body's length",
        each!(GROUP, body::body_moment_slope(length: Length, width: Length, wing_area: Area, mac: Length,
                root_quarter_fraction: f64) -> PerAngle;
            "Moment slope of a body, per radian of wing angle.",
            "K_f width^2 length/(S mac), nose up positive: destabilising. K_f per radian, straight between the values known \
             at 0.1, 0.2, 0.3, 0.5 and 0.7 of the length.",
            "A quarter chord of the wing root from 0.1 to 0.7 of the body's length; read off a figure, good to about 5 %.",
            "R. R. Gilruth and M. D. White, NACA TR 711; the values of K_f from memory",
            "w = 2.6 ft ; drawing of the fuselage\n\
             Cm_b = body_moment_slope(19 ft, w, 142 ft^2, 4.6 ft, 0.3)\n"),
    ),
    within_lines(
        &[(2, Extreme::Least)],
        |given| at(given, 2) >= 0.0,
        "the method holds for flow slopes not below 0: 1 undisturbed, above 1 ahead of the wing, 1 less the downwash slope \
         behind it",
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
         3 | 18 | 0.6 | 0.6\n\
         end\n\
         Cm_b = slender_body_moment_slope(x, w, f, 142 ft^2, 4.6 ft over frame)\n"),
    ),
    within(
        |given| at(given, 6) >= 4.0,
        "the method holds for slender bodies, of a fineness of about 4 and more",
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
    ),
];
