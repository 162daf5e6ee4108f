//! Tail and stability.

use super::macros::{each, field, parameter};
use super::row::{Compute, Entry, Field, Gives, Parameter, Wants};
use engine::quantity::{Angle, Area, Length, PerAngle, TrueAirspeed, Typed};
use engine::tail::Maneuver;

const GROUP: &str = "Tail and control";

pub(super) static ROWS: &[Entry] = &[
    each!(GROUP, tail::downwash_angle(CL: f64, aspect_ratio: f64) -> Angle, shown "deg";
        "Downwash far behind a wing.",
        "2 CL/(pi A), the far wake of an elliptic wing.",
        "behind a wing of its own; not for canards, flaps or ground effect",
        "L. Prandtl, lifting-line theory",
        "epsilon = downwash_angle(0.5, 6.2)\n"),
    Entry {
        name: "pitch_rate_angle",
        group: GROUP,
        parameters: &[
            parameter!(n, f64),
            parameter!(speed, TrueAirspeed),
            parameter!(arm, Length),
            Parameter {
                wants: Wants::Text,
                default_text: Some("pull-up"),
                ..parameter!(maneuver, f64)
            },
        ],
        fields: &[field!("", Angle, Some("deg"), "")],
        compute: Compute::Each(|given, texts, out| {
            let at = |i: usize| given.get(i).copied().unwrap_or(f64::NAN);
            let maneuver = texts.get(3).and_then(|word| Maneuver::of_word(word));
            let angle = maneuver.map(|maneuver| {
                let speed = TrueAirspeed::from_si(at(1));
                engine::tail::pitch_rate_angle(at(0), speed, Length::from_si(at(2)), maneuver).si()
            });
            out.fill(angle.unwrap_or(f64::NAN));
        }),
        validity: None,
        what: "Angle of attack that pitching adds at the tail.",
        method: "(n - 1) g0 arm/speed^2 in a \"pull-up\", (n - 1/n) g0 arm/speed^2 in a \"turn\".",
        holds: "steady manoeuvres",
        source: "kinematics of the steady pull-up and the level turn",
        example: "V [KTAS] = 90\ne = pitch_rate_angle(3.8, V, 11.2 ft)\n",
    },
    each!(GROUP, tail::neutral_point(x_ac: Length, slope: PerAngle, S: Area, mac: Length, x_tail: Length,
        tail_slope: PerAngle, tail_area: Area, downwash_slope: f64, q_ratio: f64 = 1.0,
        body_slope: PerAngle = 0.0) -> Length;
        "Stick-fixed neutral point.",
        "Station about which the moment of wing, body and tail does not change with angle of attack.",
        "small angles, linear lift",
        "statics of two lifting surfaces; B. Etkin and L. D. Reid, Dynamics of Flight (from memory)",
        "x_np [ft] = neutral_point(6.1 ft, 4.7 /rad, 142 ft^2, 4.6 ft, 17.3 ft, 3.6 /rad, 24 ft^2, 0.4)\n"),
    each!(GROUP, tail::static_margin(x_cg: Length, x_np: Length, mac: Length) -> f64, shown "%";
        "Static margin, positive when stable.",
        "(x_np - x_cg)/mac.",
        "where mac is not 0",
        "definition",
        "m = static_margin(6.2 ft, 6.9 ft, 4.6 ft)\n"),
];
