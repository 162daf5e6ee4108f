//! Aerodynamics and loads of light airplanes: typed quantities in, typed quantities out, no text.

pub mod quantity;
