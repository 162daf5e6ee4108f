//! The browser door of the engine: a thin wasm-bindgen crate. Text goes in, JSON and typed arrays come out. A [`Desk`], for
//! the page, keeps the sheet last taken, which whoever gave it has too: so an instance that broke off is replaced without
//! loss. An [`OpenSheet`], for programs, is a sheet with all that can be asked of it.

mod catalogue;
mod desk;
mod embedded;
mod marks;
mod panic;
mod sheets;

pub use catalogue::catalogue;
pub use desk::{Desk, difference};
pub use embedded::OpenSheet;
pub use marks::{kinds, marks};
pub use panic::last_panic;
