//! Sheets among the texts that JavaScript hands over.

use formulas::Sheet;
use js_sys::{Array, Object, Reflect};

/// Opens a text; `sheets` holds the texts of other sheets by their names.
pub(crate) fn open(text: &str, sheets: Option<&Object>) -> Sheet {
    let beside = |name: &str| {
        let sheets = sheets?;
        // An object of JavaScript answers to the names of its prototype too; only its own entries are sheets.
        if !Object::has_own(sheets, &name.into()) {
            return None;
        }
        Reflect::get(sheets, &name.into()).ok()?.as_string()
    };
    Sheet::open_with(text, &beside)
}

/// The texts of an object by their names, in its order.
pub(crate) fn entries(object: &Object) -> Vec<(String, String)> {
    let pair = |entry: wasm_bindgen::JsValue| {
        let entry = Array::from(&entry);
        Some((entry.get(0).as_string()?, entry.get(1).as_string()?))
    };
    Object::entries(object).iter().filter_map(pair).collect()
}
