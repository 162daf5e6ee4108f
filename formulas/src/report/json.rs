//! The one writer of JSON.

use super::Report;
use serde::Serialize;

/// What the JSON of a report holds, as a JSON Schema (draft 2020-12).
pub const SCHEMA: &str = include_str!("format.schema.json");

/// The report as JSON, on one line without a line end. Numbers are the shortest decimals that give the double back.
///
/// # Errors
/// Where a value cannot be written; the structs of the report have none such.
pub fn write(report: &Report) -> Result<String, serde_json::Error> {
    write_any(report)
}

/// Anything else that is handed out as JSON (the computation form, differences) by the same writer.
///
/// # Errors
/// Where a value cannot be written.
pub fn write_any<T: Serialize>(value: &T) -> Result<String, serde_json::Error> {
    serde_json::to_string(value)
}

/// A number by itself, as it stands in JSON.
pub(super) fn number(value: f64) -> String {
    serde_json::to_string(&value).unwrap_or_default()
}

/// A number by itself as in JSON, but a whole number without `.0`.
#[must_use]
pub fn plain_number(value: f64) -> String {
    let mut text = number(value);
    if text.ends_with(".0") {
        text.truncate(text.len() - 2);
    }
    text
}
