//! THE function table: one row a function, with names, dimensions, method, validity, source and example. The
//! dimensions come from the engine functions' own types, so the two cannot disagree.

mod row;

pub use row::{Compute, Entry, Field, Gives, Line, Parameter, Validity, Wants};

/// The group of general mathematics.
pub const GENERAL: &str = "General mathematics";

/// Every group of functions, in reading order.
static GROUPS: &[&[Entry]] = &[];

/// All functions, in reading order.
pub fn entries() -> impl Iterator<Item = &'static Entry> {
    GROUPS.iter().flat_map(|group| group.iter())
}

/// The function of that name.
#[must_use]
pub fn entry(name: &str) -> Option<&'static Entry> {
    entries().find(|entry| entry.name == name)
}
