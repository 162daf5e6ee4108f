//! Tail lift and its control.

use super::macros::{Argument, at, each, positive, within};
use super::row::{Compute, Entry, Parameter};
use engine::quantity::{Angle, Area, Force, Length, PerAngle, PerLength, Pressure, Torque, Typed};

const GROUP: &str = super::tail::GROUP;
const GLAUERT: &str =
    "H. Glauert, Theoretical relationships for an aerofoil with hinged flap, ARC R&M 1095 (1927)";
const ETKIN: &str = "B. Etkin and L. D. Reid, Dynamics of Flight";
const SEALED: &str = "the method holds for a chord ratio above 0 and below 1";

fn chord_ratio_inside(given: &[f64]) -> bool {
    at(given, 0) > 0.0 && at(given, 0) < 1.0
}

pub(super) static ROWS: &[Entry] = &[
    within(
        |given| at(given, 0) > 0.0 && at(given, 0) <= 1.0,
        "the method holds for a chord ratio above 0 and up to 1",
        each!(GROUP, control::control_effectiveness(@part_of_chord chord_ratio: f64, area_ratio: f64 = 1.0,
                section_factor: f64 = 1.0) -> f64;
            "Change of angle of attack that a control deflection is worth.",
            "1 - (theta - sin theta)/pi with cos theta = 2 chord_ratio - 1, times area_ratio and section_factor. \
             chord_ratio is the chord aft of the hinge over the whole chord, area_ratio the part of the tail's area that \
             has the control, section_factor the measured over the theoretical effectiveness.",
            "Small deflections and a sealed gap. Real gaps and deflections above about 10 deg give 15 to 30 % less, for \
             which section_factor stands.",
            GLAUERT,
            "tau = control_effectiveness(0.35, 0.95, 0.8)\n\
             d_alpha [deg] = tau*(-12 deg)\n"),
    ),
    within(
        |given| positive(given, [0, 7, 8]) && at(given, 6) >= 0.0,
        "the method holds for a lift slope above 0 /rad, a dynamic pressure not below 0 Pa, a tail area above 0 m^2 and a \
         ratio of dynamic pressures above 0",
        each!(GROUP, control::tail_lift(@lift_slope slope: PerAngle, alpha: Angle, downwash: Angle, incidence: Angle,
                effectiveness: f64, deflection: Angle, q: Pressure, S: Area, q_ratio: f64 = 1.0,
                zero_lift: Angle = 0.0, pitch_angle: Angle = 0.0) -> Force;
            "Lift of the tail or canard, up positive.",
            "q_ratio q S slope (alpha - downwash + incidence + pitch_angle - zero_lift + effectiveness deflection). alpha \
             from the datum line, downwash positive downward, incidence nose up and deflection trailing edge down \
             positive; slope on the tail's own area.",
            "Linear lift, below the stall of the tail.",
            ETKIN,
            "alpha [deg] = 4 ; angle of attack of the condition\n\
             epsilon = downwash_angle(0.5, 6.2)\n\
             q = dynamic_pressure_of_eas(55 KEAS)\n\
             P_t [lb] = tail_lift(3.6 /rad, alpha, epsilon, -1.5 deg, 0.6, -3 deg, q, 24 ft^2, q_ratio: 0.9)\n"),
    ),
    within(
        chord_ratio_inside,
        SEALED,
        each!(GROUP, control::tail_load_split(@part_of_chord chord_ratio: f64, load_alpha: Force, load_delta: Force,
                x_le: Length, c: Length) -> {
                fixed: Force = "load ahead of the hinge, up positive",
                movable: Force = "load behind the hinge, up positive",
                x_cp: Length = "centre of pressure of both",
            };
            "Shares of the fixed and the movable part in a tail load.",
            "With cos t = 2 chord_ratio - 1 the part ahead of the hinge takes (t + sin t)/pi of the load by angle of \
             attack, at the quarter chord, and (t + sin t - t^2/pi)/(pi - t + sin t) of the load by deflection, at \
             1/4 + sin t (1 - cos t)/(4 (pi - t + sin t)). A small net load can hide two large opposing ones.",
            "Thin sections, a sealed gap, attached flow, no balance area ahead of the hinge.",
            GLAUERT,
            "P_alpha [lb] = 95 ; by angle of attack\n\
             P_delta [lb] = -110 ; by deflection\n\
             part_of = tail_load_split(0.4, P_alpha, P_delta, 16.4 ft, 2.6 ft)\n\
             P_fixed [lb] = part_of.fixed\n\
             P_movable [lb] = part_of.movable\n"),
    ),
    within(
        |given| at(given, 1) < 0.0,
        "the method holds for a slope C_h_delta below 0 /rad",
        each!(GROUP, control::free_control_factor(C_h_alpha: PerAngle, C_h_delta: PerAngle, effectiveness: f64) -> f64;
            "Factor on the tail's lift slope where the control floats.",
            "1 - effectiveness C_h_alpha/C_h_delta: the control floats where its hinge moment is 0.",
            "Without friction, springs and bob weights.",
            ETKIN,
            "F = free_control_factor(-0.25 /rad, -0.6 /rad, 0.6)\n\
             a_t_free = 3.6 /rad*F\n"),
    ),
    within(
        |given| positive(given, [6, 7]) && at(given, 5) >= 0.0,
        "the method holds for a dynamic pressure not below 0 Pa, and an area above 0 m^2 and a chord above 0 m aft of the \
         hinge",
        each!(GROUP, control::hinge_moment(C_h0: f64, C_h_alpha: PerAngle, C_h_delta: PerAngle, alpha: Angle,
                delta: Angle, q: Pressure, S: Area, c: Length, C_h_tab: PerAngle = 0.0, tab: Angle = 0.0) -> Torque;
            "Hinge moment of a control, positive where it turns the trailing edge down.",
            "q S c (C_h0 + C_h_alpha alpha + C_h_delta delta + C_h_tab tab). alpha is the angle at the tail, delta and tab \
             trailing edge down positive, S and c aft of the hinge.",
            "Linear, below the stall of the tail.",
            ETKIN,
            "q = dynamic_pressure_of_eas(55 KEAS)\n\
             H [ft.lb] = hinge_moment(0, -0.25 /rad, -0.6 /rad, 1 deg, -8 deg, q, 9 ft^2, 1.0 ft)\n"),
    ),
    each!(GROUP, control::pivot_moment(load: Force, x_load: Length, x_pivot: Length, M0: Torque = 0.0) -> Torque;
        "Moment about the pivot of an all-moving tail, nose up positive.",
        "M0 + load (x_pivot - x_load); the load up positive at its aerodynamic centre, M0 the couple there.",
        "Exact statics.",
        "statics",
        "P_t [lb] = -60 ; balancing load\n\
         M [ft.lb] = pivot_moment(P_t, 17.3 ft, 17.2 ft)\n"),
    within(
        |given| positive(given, [1]),
        "the method holds for a gearing above 0 rad/m, by which a pull raises the trailing edge",
        each!(GROUP, control::stick_force(hinge_moment: Torque, gearing: PerLength) -> Force;
            "Force of the pilot on the stick, pull positive.",
            "gearing times hinge moment. The gearing is the angle of the control over the travel of the grip, positive \
             where a pull raises the trailing edge; a hinge moment that turns the trailing edge down draws the stick \
             forward.",
            "A stiff control run without friction, springs and bob weights.",
            ETKIN,
            "H [ft.lb] = 12 ; hinge moment of the condition\n\
             G = 25 deg/0.6 ft ; of the drawing\n\
             F [lb] = stick_force(H, G)\n"),
    ),
];
