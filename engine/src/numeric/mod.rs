//! Numerical methods on plain numbers, one family a file.

mod least_squares;
mod sum;

pub use least_squares::{Line, line_through};
pub use sum::{Sum, sum};
