//! The printed report of a sheet.

use js_sys::Object;
use wasm_bindgen::prelude::wasm_bindgen;

use crate::{panic, sheets};

/// The printed report of the sheet `text` as an HTML document with nothing outside it and no script, as `run --html`
/// writes it. `sheets` holds the texts of other sheets by their names.
#[wasm_bindgen]
#[must_use]
pub fn print(text: &str, sheets: Option<Object>) -> String {
    panic::listen();
    sheets::open(text, sheets.as_ref()).print()
}
