//! Balance of the airplane in one condition.

use super::macros::{each, field, parameter};
use super::row::{Compute, Entry, Field, Gives, Parameter, Wants};
use engine::quantity::{AngularAcceleration, Force, Length, MomentOfInertia, Torque, Typed};

const GROUP: &str = "Balance";

pub(super) static ROWS: &[Entry] = &[
    each!(GROUP, balance::balancing_load(M: Torque, n: f64, weight: Force, x_cg: Length, x_ac: Length,
        x_tail: Length, M_other: Torque = 0.0) -> Force;
        "Load that the horizontal tail or canard carries to balance the airplane, up positive.",
        "(M + M_other + n W (x_cg - x_ac))/(x_tail - x_ac). M is the moment about x_ac of the airplane less tail in \
         this condition, M_other a couple. A canard's station is ahead of the wing, and the sign comes out by itself.",
        "without pitch acceleration; where x_tail is not x_ac",
        "equilibrium of forces and moments about x_ac",
        "M [ft.lb] = -1110\nP_t [lb] = balancing_load(M, 3.8, 560 lb, 6.45 ft, 6.10 ft, 17.3 ft)\n"),
    each!(GROUP, balance::wing_lift(n: f64, weight: Force, tail_load: Force) -> Force;
        "Lift of the airplane less tail.",
        "n W less the tail load.",
        "everywhere",
        "equilibrium of vertical forces",
        "L_w [lb] = wing_lift(3.8, 560 lb, -33 lb)\n"),
    each!(GROUP, balance::inertia_load(n: f64, weight: Force, pitch_acceleration: AngularAcceleration,
        x: Length, x_cg: Length) -> Force;
        "Inertia load of a mass item, up positive.",
        "-weight (n - pitch_acceleration (x - x_cg)/g0).",
        "everywhere",
        "equilibrium with the inertia of the item",
        "F [lb] = inertia_load(3.8, 12 lb, 3 rad/s^2, 17 ft, 6.2 ft)\n"),
    each!(GROUP, balance::pitch_acceleration_load(inertia: MomentOfInertia, acceleration: AngularAcceleration,
        x_tail: Length, x_cg: Length) -> Force;
        "Tail load that gives the airplane a pitch acceleration, up positive.",
        "-I acceleration/(x_tail - x_cg).",
        "where x_tail is not x_cg",
        "moment of momentum about the centre of gravity",
        "P [N] = pitch_acceleration_load(420 kg.m^2, 3.4 rad/s^2, 5.2 m, 1.9 m)\n"),
];
