//! A sheet's report and its computation form as one JavaScript object.

use formulas::report::{Form, Report, ValueList};
use js_sys::{Array, Float64Array, Object, Reflect};
use serde::Serialize;
use serde_wasm_bindgen::Serializer;
use wasm_bindgen::prelude::{JsValue, wasm_bindgen};

use crate::{panic, sheets};

/// What the page gets: the report as `run --json` writes it, with the form beside.
#[derive(Serialize)]
struct Answer<'a> {
    #[serde(flatten)]
    report: &'a Report,
    form: Form,
}

/// Reads, checks and works out the sheet `text`.
///
/// Gives the object that `run --json` writes, with two differences: `form` holds the rows of the computation form, and
/// the numbers of a quantity are a `Float64Array` with NaN where there is no value. `sheets` holds the texts of other
/// sheets by their names; it may be left out.
///
/// # Errors
/// Only where the object itself cannot be made; a sheet with errors has them among its `findings`.
#[wasm_bindgen]
pub fn evaluate(text: &str, sheets: Option<Object>) -> Result<JsValue, JsValue> {
    panic::listen();
    let sheet = sheets::open(text, sheets.as_ref());
    let mut report = sheet.report(&[]);
    let columns = take_columns(&mut report);
    let answer = Answer {
        report: &report,
        form: sheet.form(),
    };
    let object = answer.serialize(&Serializer::json_compatible())?;
    put_columns(&object, &columns)?;
    Ok(object)
}

/// Takes the numbers out of the report: as typed arrays they go over at once and not one by one.
fn take_columns(report: &mut Report) -> Vec<Option<Vec<f64>>> {
    let take = |values: &mut Option<ValueList>| match values.take() {
        Some(ValueList::Numbers(numbers)) => {
            Some(numbers.into_iter().map(|n| n.unwrap_or(f64::NAN)).collect())
        }
        other => {
            *values = other;
            None
        }
    };
    report
        .quantities
        .iter_mut()
        .map(|quantity| take(&mut quantity.values))
        .collect()
}

fn put_columns(object: &JsValue, columns: &[Option<Vec<f64>>]) -> Result<(), JsValue> {
    let quantities = Array::from(&Reflect::get(object, &"quantities".into())?);
    for (quantity, column) in quantities.iter().zip(columns) {
        if let Some(column) = column {
            Reflect::set(
                &quantity,
                &"values".into(),
                &Float64Array::from(column.as_slice()),
            )?;
        }
    }
    Ok(())
}
