//! Numerical methods on plain numbers, one family a file.

mod dense;
mod least_squares;
mod newton;
mod root;
mod sum;

pub use dense::Factorised;
pub use least_squares::{Line, line_through};
pub use newton::{SystemSearch, UNKNOWNS_MOST};
pub use root::{PARTS, RootSearch};
pub use sum::{Sum, sum};
