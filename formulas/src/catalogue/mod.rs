//! THE function table: one row a function, with names, dimensions, method, validity, source and example. The
//! dimensions come from the engine functions' own types, so the two cannot disagree.

mod air;
mod axes;
mod balance;
mod control;
mod envelope;
mod general;
mod macros;
mod mass;
mod moment;
mod row;
mod section;
mod structure;
mod tail;
mod wing;

pub use row::{
    Compute, Entry, Extreme, Field, Gives, Line, Makes, Parameter, Prepared, Validity, Wants,
};
use rustc_hash::FxHashMap;
use std::sync::OnceLock;

/// The group of general mathematics.
pub const GENERAL: &str = "General mathematics";

/// The group of the functions that run along an axis or over several.
pub const AXES: &str = "Along and over axes";

/// Every group of functions, in reading order.
static GROUPS: &[&[Entry]] = &[
    air::ROWS,
    mass::ROWS,
    moment::ROWS,
    section::ROWS,
    wing::ROWS,
    tail::ROWS,
    control::ROWS,
    balance::ROWS,
    envelope::ROWS,
    structure::ROWS,
    general::ROWS,
    axes::ROWS,
];

/// All functions, in reading order.
pub fn entries() -> impl Iterator<Item = &'static Entry> {
    GROUPS.iter().flat_map(|group| group.iter())
}

/// The function of that name.
#[must_use]
pub fn entry(name: &str) -> Option<&'static Entry> {
    static BY_NAME: OnceLock<FxHashMap<&'static str, &'static Entry>> = OnceLock::new();
    BY_NAME
        .get_or_init(|| entries().map(|entry| (entry.name, entry)).collect())
        .get(name)
        .copied()
}

#[cfg(test)]
mod tests;
