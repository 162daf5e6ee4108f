//! Completion, what stands at a place, and fixes, as plain objects. Lines and columns count from 1, columns in UTF-16
//! units, as JavaScript's strings do.

use formulas::assist::{complete as completion, fix as fixes, hover as place};
use formulas::diagnostics::Fix;
use js_sys::Object;
use serde::Serialize;
use serde_wasm_bindgen::Serializer;
use wasm_bindgen::prelude::{JsValue, wasm_bindgen};

use crate::{panic, sheets};

/// What could stand at a place of `text`: `replaces`, the stretch typed so far, and `items`, the likeliest first.
///
/// # Errors
/// Only where the object itself cannot be made.
#[wasm_bindgen]
pub fn complete(
    text: &str,
    line: u32,
    column16: u32,
    sheets: Option<Object>,
) -> Result<JsValue, JsValue> {
    panic::listen();
    let sheet = sheets::read(text, sheets.as_ref());
    let desk = sheet.desk();
    let found = completion::complete(&desk, desk.byte16(line, column16));
    Ok(found.serialize(&Serializer::json_compatible())?)
}

/// What stands at a place of `text`: `at`, `title`, `text`, `facts`; null where there is nothing to say.
///
/// # Errors
/// Only where the object itself cannot be made.
#[wasm_bindgen]
pub fn hover(
    text: &str,
    line: u32,
    column16: u32,
    sheets: Option<Object>,
) -> Result<JsValue, JsValue> {
    panic::listen();
    let sheet = sheets::open(text, sheets.as_ref());
    let desk = sheet.desk();
    let found = place::hover(&desk, desk.byte16(line, column16));
    Ok(found.serialize(&Serializer::json_compatible())?)
}

/// The text with one of the `fixes` of a finding applied.
///
/// # Errors
/// Where it is no fix of this text.
#[wasm_bindgen]
pub fn fix(text: &str, fix: JsValue) -> Result<String, JsValue> {
    panic::listen();
    let fix: Fix = serde_wasm_bindgen::from_value(fix)?;
    let fixed = fixes::applied(text, &fix);
    fixed.ok_or_else(|| JsValue::from("the fix is not of this text"))
}
