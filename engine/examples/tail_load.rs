//! The engine alone, without sheets: the balancing tail load of an ultralight over its speeds, printed as a list.
//!
//! `cargo run --example tail_load -p engine`

use engine::air::dynamic_pressure_of_eas;
use engine::balance::{balancing_load, wing_lift};
use engine::moment::pitching_moment;
use engine::quantity::{Area, EquivalentAirspeed, Force, Length, Torque, Typed, Unit};

fn main() {
    if let Some(list) = loads(&[45.0, 60.0, 75.0, 90.0]) {
        print!("{list}");
    }
}

/// A line for each speed in knots: speed, tail load and wing lift in pounds. Nothing where a unit is missing.
fn loads(speeds: &[f64]) -> Option<String> {
    let (pound, foot, knot) = (Unit::named("lb")?, Unit::named("ft")?, Unit::named("KEAS")?);
    let feet = |value: f64| Length::from_si(foot.to_si(value));
    let weight = Force::from_si(pound.to_si(560.0));
    let area = Area::from_si(foot.power(2)?.to_si(142.0));
    let (chord, x_ac, x_tail, x_cg) = (feet(4.6), feet(6.10), feet(17.30), feet(6.45));
    let mut list = String::from("V_KEAS,P_t_lb,L_w_lb\n");
    for &speed in speeds {
        let pressure = dynamic_pressure_of_eas(EquivalentAirspeed::from_si(knot.to_si(speed)));
        let moment = pitching_moment(-0.062, pressure, area, chord);
        let tail = balancing_load(
            moment,
            3.8,
            weight,
            x_cg,
            x_ac,
            x_tail,
            Torque::from_si(0.0),
        );
        let wing = wing_lift(3.8, weight, tail);
        let (tail, wing) = (pound.from_si(tail.si()), pound.from_si(wing.si()));
        list += &format!("{speed},{tail:.2},{wing:.2}\n");
    }
    Some(list)
}
