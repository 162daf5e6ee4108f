//! Rules of the envelope: load factors, design speeds, gusts and the tail loads that the airworthiness codes ask for.
//!
//! Each set of rules is a file of its own that holds its constants, each with its paragraph; what several sets share is
//! written once, in the file of its subject. What a set does not have is a NaN, no value, and so is every number of a set
//! that could not be had firmly: a designer then states the factors instead. Where a rule rounds a constant, its numbers
//! are those of the rounded one.

mod category;
mod cs_22;
mod cs_vla;
mod f2245;
mod ground;
mod gust;
mod maneuver;
mod part_23;
mod rule;
mod speeds;
mod step;

pub use category::Category;
pub use ground::{Surface, ground_gust_hinge_moment};
pub use gust::{
    SpeedPoint, gust_alleviation, gust_load_increment, gust_velocity, mass_ratio, tail_gust_load,
};
pub use maneuver::{
    LoadFactors, PitchAcceleration, TailShare, factor_of_safety, fitting_factor, limit_load_factor,
    maneuver_pitch_acceleration, unsymmetrical_tail_share,
};
pub use rule::Rule;
pub use speeds::{DesignSpeeds, design_speeds, stall_speed};
pub use step::{elevator_step_load, load_factor_step_load};
