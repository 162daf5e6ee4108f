//! Structure and test: sums from the tip, chordwise loads, bags.

use super::macros::{
    Argument, along, at, entry, field, line, numbers, one, parameter, put, put_along, within,
};
use super::row::{Compute, Entry, Parameter, Wants};
use engine::quantity::{Force, ForcePerLength, Length, Pressure, Torque, Typed};
use engine::structure::{self, Shape};

const GROUP: &str = "Structure and test";
const STATICS: &str = "statics";
const OUTWARD: &str = "Stations from root to tip, the load straight between them; two stations at one place hold a jump.";

const SHAPE: Parameter = Parameter {
    name: "shape",
    wants: Wants::Text,
    words: &[Shape::FigureA7.word(), Shape::Triangle.word()],
    ..<f64 as Argument>::PARAMETER
};

pub(super) static ROWS: &[Entry] = &[
    entry!(GROUP, shear_from_tip,
        &[parameter!(load: [ForcePerLength]), parameter!(y: [Length])],
        &[along(field!("", Force, ""))],
        Compute::Lines(|given, _, out| {
            let (load, y) = (line(given, 0), line(given, 1));
            put_along(out, [numbers(structure::shear_from_tip(&load, &y))]);
        });
        "Shear at each station of one half, with the sign of the load.",
        "Sum of the load outboard of the station. The load is per span of that half; load and y are whole lines.",
        OUTWARD,
        STATICS,
        "table station | y [m] | w [N/m] ; lift less inertia of one half\n\
         1 | 0 | 900\n\
         2 | 2 | 800\n\
         3 | 4 | 300\n\
         end\n\
         V = shear_from_tip(w, y over station)\n"),
    entry!(GROUP, bending_from_tip,
        &[parameter!(load: [ForcePerLength]), parameter!(y: [Length])],
        &[along(field!("", Torque, ""))],
        Compute::Lines(|given, _, out| {
            let (load, y) = (line(given, 0), line(given, 1));
            put_along(out, [numbers(structure::bending_from_tip(&load, &y))]);
        });
        "Bending moment at each station of one half; a load up gives a positive moment.",
        "Moment about the station of the load outboard of it. The load is per span of that half; load and y are whole lines.",
        OUTWARD,
        STATICS,
        "table station | y [m] | w [N/m] ; lift less inertia of one half\n\
         1 | 0 | 900\n\
         2 | 2 | 800\n\
         3 | 4 | 300\n\
         end\n\
         M_b = bending_from_tip(w, y over station)\n"),
    entry!(GROUP, torsion_from_tip,
        &[parameter!(torque: [Force]), parameter!(y: [Length])],
        &[along(field!("", Torque, ""))],
        Compute::Lines(|given, _, out| {
            let (torque, y) = (line(given, 0), line(given, 1));
            put_along(out, [numbers(structure::torsion_from_tip(&torque, &y))]);
        });
        "Torsion at each station of one half, nose up positive.",
        "Sum of the torque outboard of the station. The torque is a moment per span of that half, about a straight axis \
         along the span; torque and y are whole lines.",
        OUTWARD,
        STATICS,
        "table station | y [m] | t [N.m/m] ; moment about the elastic axis of one half\n\
         1 | 0 | -60\n\
         2 | 2 | -50\n\
         3 | 4 | -30\n\
         end\n\
         T = torsion_from_tip(t, y over station)\n"),
    within(
        |given| {
            let (ratio, x_cp) = (at(given, 3), at(given, 4));
            at(given, 2) > 0.0
                && ratio > 0.0
                && ratio < 1.0
                && (x_cp.is_nan() || (0.0..=0.5).contains(&x_cp))
        },
        "the appendix holds for a chord above 0 m, a chord ratio above 0 and below 1 and centres of pressure from 0 to 0.5 \
         of the chord",
        entry!(GROUP, chordwise_load,
            &[
                SHAPE,
                parameter!(load: ForcePerLength),
                parameter!(chord: Length),
                super::macros::part_of_chord(parameter!(chord_ratio: f64)),
                super::macros::part_of_chord(parameter!(x_cp: f64 = f64::NAN)),
                parameter!(bay: Length = 0.0),
            ],
            &[
                field!("p_leading", Pressure, "pressure at the leading edge"),
                field!("p_hinge", Pressure, "pressure at the hinge"),
                field!("p_trailing", Pressure, "pressure at the trailing edge"),
                field!("rib_load", Force, "load of a rib from its bay"),
            ],
            Compute::Each(|given, texts, out| {
                let shape = texts.first().and_then(|word| Shape::of_word(word));
                out.fill(f64::NAN);
                if let Some(shape) = shape {
                    let length = |index| Length::from_si(at(given, index));
                    let load = ForcePerLength::from_si(at(given, 1));
                    let found =
                        structure::chordwise_load(shape, load, length(2), at(given, 3), at(given, 4), length(5));
                    put(
                        out,
                        &[
                            found.p_leading.si(),
                            found.p_hinge.si(),
                            found.p_trailing.si(),
                            found.rib_load.si(),
                        ],
                    );
                }
            });
            "Chordwise pressures of a tail surface, positive with the load, straight from one to the next.",
            "\"Fig. A7\" with w = load/chord, E = chord_ratio and d = x_cp: 2 w (2 - E - 3 d)/(1 - E) at the leading edge, \
             2 w (3 d + E - 1) at the hinge, 0 at the trailing edge. \"triangle\": 2 w, 2 w E and 0, its centre of pressure \
             at a third of the chord. load is per span, x_cp a part of the chord aft of the leading edge, bay the span from \
             which a rib takes its load.",
            "Conventional tails. The appendix asks for every centre of pressure from the leading edge to half the chord.",
            "14 CFR 23 before amendment 64, appendix A, A23.11(c), figure A7",
            "w [lb/ft] = 15 ; tail load over its span\n\
             p = chordwise_load(\"Fig. A7\", w, 2.6 ft, 0.4, 0.25, 0.9 ft)\n\
             p_1 [lb/ft^2] = p.p_leading\n\
             R [lb] = p.rib_load\n"),
    ),
    entry!(GROUP, bag_plan,
        &[
            parameter!(load: [ForcePerLength]),
            parameter!(y: [Length]),
            parameter!(bag: Force),
            parameter!(tare: [ForcePerLength] = 0.0),
            parameter!(factor: f64 = 1.0),
        ],
        &[
            along(field!("bags", f64, "whole bags at the station")),
            along(field!("load_error", Force, "load placed less wanted at the station")),
            along(field!("shear_error", Force, "shear placed less wanted, just inboard of the station")),
            along(field!("bending_error", Torque, "bending placed less wanted, about the station")),
        ],
        Compute::Lines(|given, _, out| {
            let (load, y, tare) = (line(given, 0), line(given, 1), line(given, 3));
            let plan = structure::bag_plan(&load, &y, one(given, 2), &tare, one(given, 4));
            put_along(out, [
                plan.bags,
                numbers(plan.load_error),
                numbers(plan.shear_error),
                numbers(plan.bending_error),
            ]);
        });
        "Whole bags at the stations of one half for a load test, with the errors that they make.",
        "The test load factor load - tare of each bay is shared between its stations by statics; from the tip inward the \
         nearest whole number of bags is taken for what is still due, or its neighbour where the bending error would grow \
         above one bag times the bay. The shear error is nowhere more than one bag, the bending error nowhere more than one \
         bag times the widest bay. load is the limit load per span, air less inertia; tare the structure's own weight per \
         span, which pulls with the bags; bag a force.",
        "Stations from root to tip, and nowhere more tare than test load: bags do not push.",
        STATICS,
        "table station | y [m] | w [N/m] ; limit load of one half, air less inertia\n\
         1 | 0.2 | 900\n\
         2 | 2 | 800\n\
         3 | 4 | 300\n\
         end\n\
         plan = bag_plan(w, y, 10 kgf, 60 N/m, 1.5 over station)\n"),
];
