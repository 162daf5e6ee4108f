//! How a value came about, as one JavaScript object.

use js_sys::Object;
use serde::Serialize;
use serde_wasm_bindgen::Serializer;
use wasm_bindgen::prelude::{JsValue, wasm_bindgen};

use crate::{panic, sheets};

/// The trail of a value of the sheet `text`: its steps, the value asked for first. `condition` holds labels by the names
/// of axes; along those that it leaves the condition of largest magnitude is taken. `sheets` holds the texts of other
/// sheets by their names.
///
/// # Errors
/// A sentence where there is no such symbol, axis or label.
#[wasm_bindgen]
pub fn trail(
    text: &str,
    symbol: &str,
    condition: Option<Object>,
    sheets: Option<Object>,
) -> Result<JsValue, JsValue> {
    panic::listen();
    let sheet = sheets::read(text, sheets.as_ref());
    let condition = condition.map(|c| sheets::entries(&c)).unwrap_or_default();
    let trail = sheet
        .trail(symbol, &condition)
        .map_err(|error| JsValue::from(error.to_string()))?;
    Ok(trail.serialize(&Serializer::json_compatible())?)
}
