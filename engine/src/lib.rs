//! Aerodynamics and loads of light airplanes: typed quantities in, typed quantities out, no text.
//!
//! # A tour: the tail load of one condition
//!
//! A single-seater of 560 pounds flies at 90 knots equivalent airspeed under a load factor of 3.8. Numbers come in by
//! their units and are typed from there on: a length where a force is due does not compile.
//!
//! ```
//! use engine::air::dynamic_pressure_of_eas;
//! use engine::balance::{balancing_load, wing_lift};
//! use engine::moment::pitching_moment;
//! use engine::quantity::{Area, EquivalentAirspeed, Force, Length, Torque, Typed, Unit};
//!
//! let unit = |symbol: &str| Unit::named(symbol).expect("a unit of the table");
//! let feet = |value: f64| Length::from_si(unit("ft").to_si(value));
//!
//! let weight = Force::from_si(unit("lb").to_si(560.0));
//! let area = Area::from_si(unit("ft").power(2).expect("small").to_si(142.0));
//! let (chord, x_ac, x_tail, x_cg) = (feet(4.6), feet(6.10), feet(17.30), feet(6.45));
//!
//! // Dynamic pressure, then the moment of the airplane less tail about its aerodynamic centre.
//! let q = dynamic_pressure_of_eas(EquivalentAirspeed::from_si(unit("KEAS").to_si(90.0)));
//! let moment = pitching_moment(-0.062, q, area, chord);
//!
//! // The tail load that balances it, and the lift that is left for the wing.
//! let tail = balancing_load(moment, 3.8, weight, x_cg, x_ac, x_tail, Torque::from_si(0.0));
//! let wing = wing_lift(3.8, weight, tail);
//!
//! assert!((unit("psf").from_si(q.si()) - 27.4228).abs() < 1e-4);
//! assert!((unit("lb").from_si(tail.si()) + 32.6588).abs() < 1e-3);
//! assert!((unit("lb").from_si(wing.si()) - 2160.6588).abs() < 1e-3);
//! ```
//!
//! # Conventions
//!
//! Stations `x` are positive aft from the datum, heights `z` positive up, `y` from the plane of symmetry to the tip.
//! Pitching moment, angle of attack and pitch acceleration are positive nose up, forces positive up, axial forces and drag
//! positive aft, thrust positive forward, control deflection positive trailing edge down. Angles of attack are from the
//! datum line. A half wing is given by stations from root to tip; a result is for the whole wing unless it says half.
//!
//! # No value
//!
//! The functions are pure and never panic. An argument outside a method's domain gives a NaN inside the result's type; a
//! division by zero gives what IEEE 754 gives. So a result that is no finite number means: no value.
//!
//! Every sum is taken in one fixed order ([`numeric::Sum`]) and every elementary function comes from [`elementary`], so
//! that all machines compute the same bits.

pub mod quantity;

pub mod air;
pub mod mass;
pub mod moment;
pub mod planform;

pub mod body;
pub mod section;
pub mod wing;

pub mod balance;
pub mod control;
pub mod envelope;
pub mod structure;
pub mod tail;

pub mod elementary;
pub mod numeric;
