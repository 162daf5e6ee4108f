//! The browser door of the engine: a thin wasm-bindgen crate.
