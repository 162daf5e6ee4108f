//! Promises across crates: what the tests share.

pub mod generate;
pub mod golden;
pub mod laws;
pub mod mutate;
pub mod outside;
pub mod random;
pub mod schema;
pub mod starting;
pub mod xml;
