//! Balance of the airplane in one condition.

use super::macros::{Argument, at, each, positive, within};
use super::row::{Compute, Entry, Parameter};
use engine::quantity::{AngularAcceleration, Force, Length, MomentOfInertia, Torque, Typed};

const GROUP: &str = "Balance";
const WEIGHT: &str = "the method holds for weights not below 0 N";

pub(super) static ROWS: &[Entry] = &[
    within(
        |given| at(given, 2) >= 0.0,
        WEIGHT,
        each!(GROUP, balance::balancing_load(M: Torque, n: f64, weight: Force, x_cg: Length, x_ac: Length,
                x_tail: Length, M_other: Torque = 0.0) -> Force;
            "Load on the horizontal tail or canard that balances the airplane, up positive.",
            "(M + M_other + n W (x_cg - x_ac))/(x_tail - x_ac). M is the moment about x_ac of the airplane less tail in \
             this condition, nose up positive, M_other any other couple. A canard's station is ahead of the wing, and \
             the sign comes out by itself.",
            "Exact statics without pitch acceleration, where x_tail is not x_ac.",
            "statics; T. H. G. Megson, Aircraft Structures for Engineering Students, has the same sum with the arms of \
             drag and thrust",
            "W [lb] = 560 ; weighing report\n\
             q = dynamic_pressure_of_eas(90 KEAS)\n\
             M = pitching_moment(-0.062, q, 142 ft^2, 4.6 ft)\n\
             P_t [lb] = balancing_load(M, 3.8, W, 6.45 ft, 6.10 ft, 17.3 ft)\n"),
    ),
    within(
        |given| at(given, 1) >= 0.0,
        WEIGHT,
        each!(GROUP, balance::wing_lift(n: f64, weight: Force, tail_load: Force) -> Force;
            "Lift of the airplane less tail, up positive.",
            "n W less the tail load, which is positive up.",
            "Exact statics where no other vertical force acts, a tilted thrust for one.",
            "statics",
            "W [lb] = 560 ; weighing report\n\
             P_t [lb] = -33 ; balancing load of the condition\n\
             L_w [lb] = wing_lift(3.8, W, P_t)\n"),
    ),
    each!(GROUP, balance::inertia_load(n: f64, weight: Force, pitch_acceleration: AngularAcceleration,
            x: Length, x_cg: Length) -> Force;
        "Inertia load of an item of mass, up positive.",
        "-weight (n - pitch_acceleration (x - x_cg)/g0); n at the centre of gravity, pitch acceleration nose up positive. \
         It relieves an item aft of the centre of gravity, which moves down.",
        "A rigid airplane; the centripetal part of a pitch rate lies along the fuselage and is left out.",
        "rigid-body dynamics",
        "W_t [lb] = 12 ; weight of the tail\n\
         F [lb] = inertia_load(3.8, W_t, 3 rad/s^2, 17 ft, 6.2 ft)\n"),
    within(
        |given| positive(given, [0]),
        "the method holds for a moment of inertia above 0 kg.m^2",
        each!(GROUP, balance::pitch_acceleration_load(inertia: MomentOfInertia, acceleration: AngularAcceleration,
                x_tail: Length, x_cg: Length) -> Force;
            "Tail load that gives the airplane a pitch acceleration, up positive: the increment over the balancing load.",
            "-I acceleration/(x_tail - x_cg), acceleration nose up positive. The change of wing load that the force itself \
             brings about is left out.",
            "A rigid airplane, where x_tail is not x_cg.",
            "rigid-body dynamics",
            "I_y [kg.m^2] = 420 ; mass properties\n\
             P [N] = pitch_acceleration_load(I_y, 3.4 rad/s^2, 5.2 m, 1.9 m)\n"),
    ),
];
