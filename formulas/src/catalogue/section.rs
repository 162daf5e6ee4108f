//! Sections: thin-airfoil theory, ordinates, flaps, vortex panels.

use super::macros::{
    Argument, along, at, attached, each, entry, field, field_of, line, made, numbers, of_first,
    one, parameter, put_along, within, within_lines,
};
use super::row::{Compute, Entry, Extreme, Field, Makes, Parameter, Prepared, Wants};
use crate::missing::lost;
use crate::problem::Cause;
use engine::quantity::{Angle, PerAngle, Typed};
use engine::section::{self, Designation, Panels, ThinSection, Trouble};

const GROUP: &str = "Sections";
const THIN: &str = "Small camber, small angles, attached flow; measured moments differ by up to 0.01, and the measured lift slope is some \
     per cent below 2 pi.";
const GLAUERT: &str = "H. Glauert, The Elements of Aerofoil and Airscrew Theory, chapter VII; NACA Reports 460 and 537";

/// A coordinate: a length or a part of the chord, in one unit with its fellows.
const fn coordinate(name: &'static str) -> Parameter {
    Parameter {
        name,
        wants: Wants::Any,
        line: true,
        ..<f64 as Argument>::PARAMETER
    }
}

const DESIGNATION: Parameter = Parameter {
    name: "designation",
    wants: Wants::Text,
    ..<f64 as Argument>::PARAMETER
};

/// The results of thin-airfoil theory.
const THIN_FIELDS: [Field; 5] = [
    field_of::<Angle>("alpha_zero_lift", "angle of no lift"),
    field_of::<f64>(
        "cm_quarter",
        "moment coefficient about the quarter chord, nose up",
    ),
    field_of::<f64>(
        "cl_ideal",
        "lift coefficient at which the flow meets the leading edge smoothly",
    ),
    field_of::<Angle>("alpha_ideal", "angle of attack at which it does"),
    field_of::<PerAngle>("lift_slope", "2 pi"),
];

fn thin(found: ThinSection) -> [f64; 5] {
    [
        found.alpha_zero_lift.si(),
        found.cm_quarter,
        found.cl_ideal,
        found.alpha_ideal.si(),
        found.lift_slope.si(),
    ]
}

/// The number of a point, counted from 1; 0 for one too far on to be told.
fn number(index: usize) -> u16 {
    u16::try_from(index + 1).unwrap_or(0)
}

/// What a contour that cannot be worked out is told.
fn cause(trouble: Trouble) -> Cause {
    match trouble {
        Trouble::TooFew => Cause::ContourPoints,
        Trouble::Repeated(point) => Cause::ContourRepeated(number(point)),
        Trouble::Crossing(first, second) => Cause::ContourCrossing(number(first), number(second)),
        Trouble::Singular => Cause::NoValue,
        Trouble::Open => Cause::ContourOpen,
    }
}

pub(super) static ROWS: &[Entry] = &[
    entry!(GROUP, thin_section,
        &[DESIGNATION],
        &THIN_FIELDS,
        Compute::Each(|_, words, out| {
            let designation = words.first().copied().unwrap_or("");
            let none = Designation::read(designation).is_none();
            let found = thin(section::thin_section(designation));
            let found = if none { [lost(Cause::Designation); 5] } else { found };
            super::macros::put(out, &found);
        });
        "Thin-airfoil theory of a four- or five-digit section.",
        "Integrals over the slope of the mean line; the thickness plays no part. Angles from the chord line, moments nose up.",
        THIN,
        GLAUERT,
        "s = thin_section(\"2412\")\n\
         cm = s.cm_quarter\n"),
    within_lines(
        &[(0, Extreme::Most), (1, Extreme::Most)],
        |given| at(given, 1) <= 0.12 * at(given, 0),
        "the method holds for small camber, up to about a tenth of the chord",
        entry!(GROUP, thin_section_of,
        &[coordinate("x"), coordinate("z")],
        &THIN_FIELDS,
        Compute::Lines(|given, _, out| {
            let found = section::thin_section_of(&line::<f64>(given, 0), &line::<f64>(given, 1));
            put_along(out, thin(found).map(|v| vec![v]));
        });
        "Thin-airfoil theory of a mean line given by points.",
        "The same with a cubic spline through the points; x rises from the leading edge to the trailing edge, angles are from \
         the x axis. x and z are whole lines, in one unit.",
        THIN,
        GLAUERT,
        "table point | x | z ; camber line, drawing of the rib\n\
         1 | 0 | 0\n\
         2 | 0.3 | 0.021\n\
         3 | 1 | 0\n\
         end\n\
         s = thin_section_of(x, z over point)\n"),
    ),
    Entry {
        makes: Some(Makes::Count(1)),
        ..entry!(GROUP, section_points,
            &[DESIGNATION, parameter!(count: f64)],
            &[made(field!("x", f64, "place along the chord, 0 at the leading edge and 1 at the trailing edge")),
              made(field!("z", f64, "height above the chord line"))],
            Compute::Lines(|given, words, out| {
                let designation = words.first().copied().unwrap_or("");
                let count = one::<f64>(given, 1);
                if Designation::read(designation).is_none() {
                    let none = vec![lost(Cause::Designation); count.clamp(0.0, 1e6) as usize];
                    return put_along(out, [none.clone(), none]);
                }
                let points = section::section_points(designation, count.clamp(0.0, 1e6) as usize);
                put_along(out, [points.x, points.z]);
            });
            "Points of a four- or five-digit section, chord 1.",
            "Trailing edge, upper side, leading edge, lower side, trailing edge, closer together at the edges; thickness \
             square to the mean line, trailing edge closed. Makes the axis of the points, named as the result.",
            "5 points and more; an odd number has the leading edge among them.",
            "NACA Reports 460 and 537; NASA TM 4741",
            "s = section_points(\"2412\", 81)\n\
             top = max(s.z)\n")
    },
    within(
        |given| attached(at(given, 2)),
        "the method holds for attached flow, angles of attack up to about 15 degrees",
        entry!(GROUP, section_flow,
        &[coordinate("x"), coordinate("z"), parameter!(alpha: Angle)],
        &[
            field!("cl", f64, "lift coefficient"),
            field!("cm_quarter", f64, "moment coefficient about the quarter chord, nose up"),
            of_first(field!("x_cp", f64, "where the resultant cuts the chord; none without lift")),
            field!("cp_min", f64, "lowest pressure coefficient at a point"),
            of_first(field!("x_cp_min", f64, "where it stands")),
            along(field!("cp", f64, "pressure coefficient at each point")),
        ],
        Compute::Prepared(Prepared {
            swept: &[2],
            prepare: |given, _| Box::new(Panels::new(&line::<f64>(given, 0), &line::<f64>(given, 1))),
            apply: |panels, given, out| {
                let points = given.first().map_or(0, |x| x.len());
                match panels.downcast_ref::<Result<Panels, Trouble>>() {
                    Some(Ok(panels)) => {
                        let found = panels.at(one(given, 2));
                        let single = [found.cl, found.cm_quarter, found.x_cp, found.cp_min, found.x_cp_min];
                        put_along(out, single.map(|v| vec![v]).into_iter().chain([numbers(found.cp)]));
                    }
                    Some(Err(trouble)) => {
                        put_along(out, std::iter::repeat_n(vec![lost(cause(*trouble)); points.max(1)], 6));
                    }
                    None => {}
                }
            },
        });
        "Pressures, lift and moment of a section given by its contour.",
        "Vortex panels of linear strength, the stream function the same at all points, smooth flow off the trailing edge. \
         Points from the trailing edge over the upper side to the leading edge and back (the other way round is found out); \
         chord from the trailing edge to the point farthest from it; alpha from the x axis. x and z are whole lines, in one \
         unit.",
        "Incompressible, without viscosity, attached flow, up to about 12 degrees from the angle of no lift. At 200 panels \
         within 0.02 % of the lift of exact sections; four times as near with twice as many.",
        "vortex panels of linear strength, as in J. Moran, An Introduction to Theoretical and Computational Aerodynamics",
        "s = section_points(\"2412\", 101)\n\
         f = section_flow(s.x, s.z, 4 deg over s)\n\
         cl = f.cl\n"),
    ),
    within(
        |given| (0.02..=0.6).contains(&at(given, 0)) && at(given, 1) < 1.0,
        "holds for a flap chord from 2 to 60 % and reads 15 to 30 % high at real gaps and angles, which a section factor below \
         1 takes off",
        each!(GROUP, section::flap_effect(chord_ratio: f64, section_factor: f64 = 1.0) -> {
                effectiveness: f64 = "change of the angle of no lift per flap angle",
                lift_slope: PerAngle = "lift slope with the flap angle",
                moment_slope: PerAngle = "moment about the quarter chord with the flap angle, nose up",
                hinge_alpha: PerAngle = "hinge moment with the angle of attack, on flap chord squared",
                hinge_delta: PerAngle = "hinge moment with the flap angle, on flap chord squared",
            };
            "What a plain flap does to a section.",
            "Thin-airfoil theory: effectiveness 1 - (t - sin t)/pi with cos t = 2 chord_ratio - 1, moment slope \
             sin t (cos t - 1)/2, pressures integrated over the flap for the hinge moment (trailing edge down positive); all \
             times section_factor. Flap trailing edge down positive.",
            "Small angles, attached flow, sealed gap. Reads 15 to 30 % high at real gaps and angles (common practice).",
            "H. Glauert, R&M 1095",
            "f = flap_effect(0.3, 0.8)\n\
             tau = f.effectiveness\n"),
    ),
];
