//! The browser door of the engine: a thin wasm-bindgen crate.

use wasm_bindgen::prelude::wasm_bindgen;

/// The version of the engine.
#[wasm_bindgen]
#[must_use]
pub fn version() -> String {
    env!("CARGO_PKG_VERSION").to_owned()
}
