//! Numerical methods on plain numbers, one family a file.

mod least_squares;
mod newton;
mod root;
mod sum;

pub use least_squares::{Line, line_through};
pub use newton::{SystemSearch, UNKNOWNS_MOST};
pub use root::{PARTS, RootSearch};
pub use sum::{Sum, sum};
