//! Aerodynamics and loads of light airplanes: typed quantities in, typed quantities out, no text.

pub mod quantity;

pub mod air;

pub mod elementary;
pub mod numeric;
