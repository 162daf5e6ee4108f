//! Promises across crates: what the tests share.

pub mod golden;
pub mod random;
pub mod schema;
pub mod xml;
