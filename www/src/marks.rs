//! Marks for highlighting, as flat lists.

use wasm_bindgen::prelude::wasm_bindgen;

/// The names of the kinds that [`marks`] counts by, from 0.
#[wasm_bindgen]
#[must_use]
pub fn kinds() -> Vec<String> {
    let names = formulas::assist::marks::KINDS;
    names.iter().map(|&name| name.to_owned()).collect()
}

/// The marks of `text`: from, to and kind of each, one after the other, in UTF-16 units; kinds are positions in
/// [`kinds`].
#[wasm_bindgen]
#[must_use]
pub fn marks(text: &str) -> Vec<u32> {
    formulas::assist::marks::marks(text)
}
