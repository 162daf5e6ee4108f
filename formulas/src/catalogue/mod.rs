//! THE function table: one row a function, with names, dimensions, method, validity, source and example. The
//! dimensions come from the engine functions' own types, so the two cannot disagree.

mod air;
mod balance;
mod general;
mod macros;
mod mass;
mod moment;
mod row;
mod tail;

pub use row::{Compute, Entry, Field, Gives, Line, Parameter, Validity, Wants};
use std::collections::HashMap;
use std::sync::OnceLock;

/// The group of general mathematics.
pub const GENERAL: &str = "General mathematics";

/// Every group of functions, in reading order.
static GROUPS: &[&[Entry]] = &[
    air::ROWS,
    mass::ROWS,
    moment::ROWS,
    balance::ROWS,
    tail::ROWS,
    general::ROWS,
];

/// All functions, in reading order.
pub fn entries() -> impl Iterator<Item = &'static Entry> {
    GROUPS.iter().flat_map(|group| group.iter())
}

/// The function of that name.
#[must_use]
pub fn entry(name: &str) -> Option<&'static Entry> {
    static BY_NAME: OnceLock<HashMap<&'static str, &'static Entry>> = OnceLock::new();
    BY_NAME
        .get_or_init(|| entries().map(|entry| (entry.name, entry)).collect())
        .get(name)
        .copied()
}

#[cfg(test)]
mod tests {
    use super::{Compute, entries, entry};

    #[test]
    fn every_row_says_what_it_does_and_where_from() {
        for row in entries() {
            let texts = [row.what, row.method, row.holds, row.source, row.example];
            assert!(texts.iter().all(|t| !t.is_empty()), "{}", row.name);
            assert!(row.example.contains(row.name), "{}", row.name);
            assert_eq!(entry(row.name).map(|e| e.name), Some(row.name));
            assert_eq!(
                entries().filter(|e| e.name == row.name).count(),
                1,
                "{}",
                row.name
            );
        }
    }

    #[test]
    fn dimensions_come_from_the_engine() {
        let row = entry("pitching_moment").expect("a row");
        let Compute::Each(compute) = row.compute else {
            panic!("condition by condition")
        };
        let mut out = [0.0];
        compute(&[-0.05, 1531.25, 16.0, 1.5], &[""; 4], &mut out);
        assert_eq!(out[0], -1837.5);
    }
}
