//! Help while a sheet is typed.

pub mod marks;
