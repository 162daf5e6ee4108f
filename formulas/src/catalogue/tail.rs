//! Tail and stability.

use super::macros::{Argument, at, each, entry, field, parameter, positive, within};
use super::row::{Compute, Entry, Parameter, Wants};
use engine::quantity::{Angle, Area, Length, PerAngle, TrueAirspeed, Typed};
use engine::tail::Maneuver;

pub(super) const GROUP: &str = "Tail and control";

/// The word of the manoeuvre.
const MANEUVER: Parameter = Parameter {
    name: "maneuver",
    wants: Wants::Text,
    default_text: Some(Maneuver::PullUp.word()),
    words: &[Maneuver::PullUp.word(), Maneuver::Turn.word()],
    ..<f64 as Argument>::PARAMETER
};

pub(super) static ROWS: &[Entry] = &[
    within(
        |given| (2.0..=12.0).contains(&at(given, 0)) && positive(given, [2, 4]),
        "holds for a tail aft of a wing of an aspect ratio from 2 to 12",
        each!(GROUP, tail::downwash_slope(aspect_ratio: f64, taper: f64, span: Length, sweep_quarter: Angle,
                tail_arm: Length, tail_height: Length) -> f64;
            "Downwash slope at the tail, d(epsilon)/d(alpha).",
            "4.44 [K_A K_l K_H sqrt(cos(sweep))]^1.19, K_A = 1/A - 1/(1 + A^1.7), K_l = (10 - 3 taper)/7, \
             K_H = (1 - |h/b|)/(2 l/b)^(1/3); tail_arm from the quarter point of the wing's mean chord to that of the tail.",
            "Low speed, a tail aft of the wing, not a canard.",
            "USAF Stability and Control Datcom, 4.4.1",
            "b = 29 ft ; drawing of the wing\n\
             de = downwash_slope(6.2, 0.7, b, 0 deg, 11.2 ft, 1.5 ft)\n"),
    ),
    within(
        |given| positive(given, [1]),
        "the method holds for aspect ratios above 0",
        each!(GROUP, tail::downwash_angle(CL: f64, aspect_ratio: f64) -> Angle;
            "Downwash angle far behind a wing, positive downward.",
            "2 CL/(pi A): twice the induced angle at an elliptically loaded wing.",
            "A tail in the far wake of a plane, unswept wing without flaps, out of ground effect. Not for a canard, which \
             flies ahead of the wing.",
            "L. Prandtl, lifting-line theory",
            "CL = 0.5 ; of the wing in this condition\n\
             epsilon = downwash_angle(CL, 6.2)\n"),
    ),
    within(
        |given| positive(given, [1]),
        "the method holds for speeds above 0 m/s",
        entry!(GROUP, pitch_rate_angle,
            &[parameter!(n: f64), parameter!(speed: TrueAirspeed), parameter!(arm: Length), MANEUVER],
            &[field!("", Angle, "")],
            Compute::Each(|given, texts, out| {
                let maneuver = texts.get(3).and_then(|word| Maneuver::of_word(word));
                let angle: Option<Angle> = maneuver.map(|maneuver| {
                    let speed = TrueAirspeed::from_si(at(given, 1));
                    engine::tail::pitch_rate_angle(at(given, 0), speed, Length::from_si(at(given, 2)), maneuver)
                });
                out.fill(angle.map_or(f64::NAN, Angle::si));
            });
            "Change of the angle of attack at the tail by the pitch rate of a steady manoeuvre, positive where it adds.",
            "(n - 1) g0 arm/speed^2 in a \"pull-up\", (n - 1/n) g0 arm/speed^2 in a \"turn\"; the arm from the centre of \
             gravity to the tail, positive aft.",
            "Small angles. A level turn has a load factor of 1 or more, or -1 or less: no value between.",
            "kinematics of the steady manoeuvre: pitch rate times arm over speed",
            "V [KTAS] = 90 ; of the condition\n\
             d_alpha = pitch_rate_angle(3.8, V, 11.2 ft)\n\
             d_turn = pitch_rate_angle(3.8, V, 11.2 ft, \"turn\")\n"),
    ),
    within(
        |given| positive(given, [1, 2, 3, 8]) && at(given, 6) >= 0.0,
        "the method holds for a lift slope above 0 /rad, a wing area above 0 m^2, a mean aerodynamic chord above 0 m, a \
         tail area not below 0 m^2 and a ratio of dynamic pressures above 0",
        each!(GROUP, tail::neutral_point(x_ac: Length, @lift_slope slope: PerAngle, S: Area, mac: Length,
                x_tail: Length, @lift_slope tail_slope: PerAngle, tail_area: Area, downwash_slope: f64,
                q_ratio: f64 = 1.0, body_slope: PerAngle = 0.0) -> Length;
            "Stick-fixed neutral point: station of the aerodynamic centre of the whole airplane.",
            "x_ac + (t (x_tail - x_ac) - body_slope mac)/(slope + t) with t = q_ratio (tail_area/S) tail_slope \
             (1 - downwash_slope). slope is that of the airplane less tail on S, body_slope the destabilising one of the \
             body where x_ac does not hold it. The downwash slope of a canard in upwash is negative.",
            "Linear lift, no thrust, rigid structure.",
            "B. Etkin and L. D. Reid, Dynamics of Flight",
            "a_w [/rad] = 4.7 ; lift slope of the wing\n\
             a_t [/rad] = 3.6 ; lift slope of the tail\n\
             x_np [ft] = neutral_point(6.1 ft, a_w, 142 ft^2, 4.6 ft, 17.3 ft, a_t, 24 ft^2, 0.4, q_ratio: 0.9)\n"),
    ),
    within(
        |given| positive(given, [2]),
        "the method holds for a mean aerodynamic chord above 0 m",
        each!(GROUP, tail::static_margin(x_cg: Length, x_np: Length, mac: Length) -> @percent f64;
            "Static margin, positive where the airplane is stable.",
            "(x_np - x_cg)/mac. A fraction: 0.05 is 5 %.",
            "Where mac is not 0.",
            "definition",
            "x_np [ft] = 6.9 ; neutral point\n\
             x_cg [ft] = 6.45 ; weighing report\n\
             margin = static_margin(x_cg, x_np, 4.6 ft)\n"),
    ),
];
