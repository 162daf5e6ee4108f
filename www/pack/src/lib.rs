//! Builds the page: sets up what a fresh machine lacks, compiles the engine to wasm, bundles the page's code and
//! puts everything into one HTML file that needs nothing else.
//!
//! In reading order: [`setup`] installs, [`wasm`] compiles, [`bundle`] checks and packs TypeScript and CSS,
//! [`assemble`] writes the one file, [`package`] the package for other pages and for Node, [`build`] runs them in turn,
//! [`opening`] shows the result.

pub mod assemble;
pub mod build;
pub mod bundle;
pub mod failure;
pub mod opening;
pub mod package;
pub mod paths;
pub mod setup;
pub mod wasm;

mod command;

pub use failure::{Failure, Outcome};
pub use paths::Paths;
