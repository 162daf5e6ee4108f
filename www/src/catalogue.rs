//! The catalogue for a reader: every function, unit, statement and sign as plain rows of text.

use engine::quantity::{UnitRow, units};
use formulas::catalogue::{Entry, entries};
use formulas::reference::{self, EXPRESSIONS, Row, STATEMENTS};
use formulas::report::json::write_any;
use serde::Serialize;
use wasm_bindgen::prelude::{JsValue, wasm_bindgen};

use crate::panic;

#[derive(Serialize)]
struct Catalogue {
    functions: Vec<Function>,
    units: Vec<UnitLine>,
    statements: Vec<Wording>,
    expressions: Vec<Wording>,
}

#[derive(Serialize)]
struct Function {
    name: &'static str,
    group: &'static str,
    signature: String,
    /// The arguments in order, each with what it is to be.
    arguments: Vec<String>,
    /// What it gives, a line for each field.
    gives: Vec<String>,
    what: &'static str,
    method: &'static str,
    holds: &'static str,
    source: &'static str,
    example: &'static str,
}

#[derive(Serialize)]
struct UnitLine {
    symbols: &'static [&'static str],
    name: &'static str,
    /// The unit in words: symbols, name, factor and source.
    line: String,
    dimension: String,
}

#[derive(Serialize)]
struct Wording {
    word: &'static str,
    form: &'static str,
    meaning: &'static str,
    example: &'static str,
}

/// The catalogue as JSON: `functions`, `units`, `statements` and `expressions`, in the order of their tables.
///
/// # Errors
/// Only where the JSON cannot be written.
#[wasm_bindgen]
pub fn catalogue() -> Result<String, JsValue> {
    panic::listen();
    let all = Catalogue {
        functions: entries().map(function).collect(),
        units: units::rows().iter().map(unit).collect(),
        statements: STATEMENTS.iter().map(wording).collect(),
        expressions: EXPRESSIONS.iter().map(wording).collect(),
    };
    write_any(&all).map_err(|error| error.to_string().into())
}

fn function(entry: &'static Entry) -> Function {
    Function {
        name: entry.name,
        group: entry.group,
        signature: reference::signature(entry),
        arguments: entry.parameters.iter().map(reference::parameter).collect(),
        gives: reference::results(entry),
        what: entry.what,
        method: entry.method,
        holds: entry.holds,
        source: entry.source,
        example: entry.example,
    }
}

fn unit(row: &'static UnitRow) -> UnitLine {
    UnitLine {
        symbols: row.symbols,
        name: row.name,
        line: reference::unit_row(row),
        dimension: reference::dimension_name(row.dimension),
    }
}

fn wording(row: &'static Row) -> Wording {
    Wording {
        word: row.word,
        form: row.form,
        meaning: row.meaning,
        example: row.example,
    }
}
