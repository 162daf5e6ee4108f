//! The browser door of the engine: a thin wasm-bindgen crate. Text goes in, plain objects, JSON and typed arrays come
//! out. Only a [`Desk`] keeps anything between two calls, the sheet last taken, which whoever gave it has too: so an
//! instance that broke off is replaced without loss.

#[cfg(feature = "objects")]
mod answer;
#[cfg(feature = "objects")]
mod assist;
mod catalogue;
mod desk;
mod embedded;
mod marks;
mod panic;
#[cfg(feature = "objects")]
mod print;
mod sheets;
#[cfg(feature = "objects")]
mod trail;

#[cfg(feature = "objects")]
pub use answer::evaluate;
#[cfg(feature = "objects")]
pub use assist::{complete, fix, hover};
pub use catalogue::catalogue;
pub use desk::{Desk, difference};
pub use embedded::OpenSheet;
pub use marks::{kinds, marks};
pub use panic::last_panic;
#[cfg(feature = "objects")]
pub use print::print;
#[cfg(feature = "objects")]
pub use trail::trail;
