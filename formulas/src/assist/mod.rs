//! Help while a sheet is typed.

pub mod marks;
pub mod trail;
