//! Builds the page: wasm, bundle, one file.
