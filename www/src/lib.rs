//! The browser door of the engine: a thin wasm-bindgen crate. Text goes in, plain objects, JSON and typed arrays come
//! out. Only a [`Desk`] keeps anything between two calls, the sheet last taken, which whoever gave it has too: so an
//! instance that broke off is replaced without loss.

mod answer;
mod assist;
mod catalogue;
mod desk;
mod marks;
mod panic;
mod print;
mod sheets;
mod trail;

pub use answer::evaluate;
pub use assist::{complete, fix, hover};
pub use catalogue::catalogue;
pub use desk::{Desk, difference};
pub use marks::{kinds, marks};
pub use panic::last_panic;
pub use print::print;
pub use trail::trail;
