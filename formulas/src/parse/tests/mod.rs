//! Samples of the grammar, and texts that are none.

mod faults;
mod generated;
mod lines;
mod shown;
mod statements;
mod values;
