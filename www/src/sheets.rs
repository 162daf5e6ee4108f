//! Sheets among the texts that JavaScript hands over.

use std::collections::BTreeMap;

use formulas::sheet::{Around, Sheet};
use js_sys::{Array, Object, Reflect};

/// Opens a text that is going to be edited.
pub(crate) fn open_for_edits(text: &str, sheets: Option<&Object>) -> Sheet {
    let around = Around {
        sheets: &|name| beside(sheets, name),
        editing: true,
        ..Around::default()
    };
    Sheet::open_around(text, &around)
}

/// The text of another sheet. An object of JavaScript answers to the names of its prototype too; only its own entries are
/// sheets.
pub(crate) fn beside(sheets: Option<&Object>, name: &str) -> Option<String> {
    let sheets = sheets.filter(|sheets| Object::has_own(sheets, &name.into()))?;
    Reflect::get(sheets, &name.into()).ok()?.as_string()
}

/// The texts of an object by their names.
pub(crate) fn texts(object: &Object) -> BTreeMap<String, String> {
    entries(object).into_iter().collect()
}

/// The texts of an object by their names, in its order.
pub(crate) fn entries(object: &Object) -> Vec<(String, String)> {
    let pair = |entry: wasm_bindgen::JsValue| {
        let entry = Array::from(&entry);
        Some((entry.get(0).as_string()?, entry.get(1).as_string()?))
    };
    Object::entries(object).iter().filter_map(pair).collect()
}
