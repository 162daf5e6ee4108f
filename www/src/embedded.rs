//! A sheet that a program has open: the same operations as in Rust, for whoever embeds the engine. What is asked for comes
//! as JSON in one piece or as typed arrays; what went wrong is thrown as one finding, a plain object.

use std::collections::BTreeMap;
use std::fmt::Display;

use formulas::diagnostics::{Finding, Severity};
use formulas::report::json::{plain_number, write_any};
use formulas::report::{Quantity, ValueList};
use formulas::run::Limits;
use formulas::sheet::{Around, Sheet};
use js_sys::Object;
use serde::Serialize;
use wasm_bindgen::prelude::{JsValue, wasm_bindgen};

use crate::{panic, sheets};

/// An open sheet with the texts of the sheets beside it.
#[wasm_bindgen]
#[derive(Debug)]
pub struct OpenSheet {
    sheet: Sheet,
    others: BTreeMap<String, String>,
    limits: Limits,
    /// Quantities whose columns are kept however large they are.
    asked: Vec<String>,
}

#[wasm_bindgen]
impl OpenSheet {
    /// Reads, checks and works out `text`. `others` holds the texts of other sheets by their names; `operations` lowers
    /// the most operations of a recalculation.
    #[wasm_bindgen(constructor)]
    #[must_use]
    pub fn new(text: &str, others: Option<Object>, operations: Option<f64>) -> Self {
        panic::listen();
        let most = Limits::default().operations;
        let limits = Limits {
            operations: operations.map_or(most, |given| given.max(0.0).min(most)),
        };
        let others: BTreeMap<String, String> =
            others.as_ref().map(sheets::texts).unwrap_or_default();
        OpenSheet {
            sheet: open(text, &others, limits, &[]),
            others,
            limits,
            asked: Vec::new(),
        }
    }

    /// The text as it is now.
    #[must_use]
    pub fn text(&self) -> String {
        self.sheet.text().to_owned()
    }

    /// Takes the text after an edit.
    pub fn update(&mut self, text: &str) {
        let others = &self.others;
        self.sheet
            .update_with(text, &|name| others.get(name).cloned());
    }

    /// Replaces the right side of an input.
    ///
    /// # Errors
    /// A finding where the symbol is no input or the expression cannot stand there; then nothing changes.
    pub fn set(&mut self, symbol: &str, expression: &str) -> Result<(), JsValue> {
        let outcome = self.sheet.set(symbol, expression);
        outcome.map_err(|message| fault("not-settable", self.line_of(symbol), message))
    }

    /// The same by numbers in the unit in which the input is shown: one, or one for each label.
    ///
    /// # Errors
    /// As for [`OpenSheet::set`], and where one is not finite.
    pub fn set_numbers(&mut self, symbol: &str, values: &[f64]) -> Result<(), JsValue> {
        if !values.iter().all(|value| value.is_finite()) {
            let message = format!("{symbol} is to be set to finite numbers.");
            return Err(fault("not-settable", self.line_of(symbol), message));
        }
        let behind = self.unit_behind(symbol);
        let typed = |value: &f64| format!("{}{behind}", plain_number(*value));
        let typed: Vec<String> = values.iter().map(typed).collect();
        self.set(symbol, &typed.join(" | "))
    }

    /// The report as `run --json` writes it.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn report(&self) -> Result<String, JsValue> {
        write(&self.sheet.report(&[]))
    }

    /// The rows of the computation form, as JSON.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn form(&self) -> Result<String, JsValue> {
        write(&self.sheet.form())
    }

    /// The significant figures that the sheet asks for, 1 to 15.
    #[must_use]
    pub fn digits(&self) -> u8 {
        self.sheet.program().digits
    }

    /// The values of a quantity in its unit, row-major over its axes, NaN where there is none; of a condition 1 for true
    /// and 0 for false. They are worked out again with the column kept where it was too large to keep.
    ///
    /// # Errors
    /// A finding where nothing has that symbol, or it stands for text.
    pub fn values(&mut self, symbol: &str) -> Result<Vec<f64>, JsValue> {
        Ok(self.numbered(symbol)?.1)
    }

    /// The same at some labels only, over the axes that are left. `condition` holds labels by the names of axes.
    ///
    /// # Errors
    /// As for [`OpenSheet::values`], and where the quantity does not vary over such an axis or it has no such label.
    pub fn slice(&mut self, symbol: &str, condition: &Object) -> Result<Vec<f64>, JsValue> {
        let (quantity, mut left) = self.numbered(symbol)?;
        let mut axes = self.lengths(&quantity.axes);
        for (name, label) in sheets::entries(condition) {
            let at = axes.iter().position(|(axis, _)| *axis == name);
            let place = self.place_of(&name, &label);
            let (Some(at), Some(place)) = (at, place) else {
                let message = format!("{symbol} has no value at {name} {label}.");
                return Err(fault("no-condition", quantity.line, message));
            };
            left = at_label(&left, &axes, at, place);
            axes.remove(at);
        }
        Ok(left)
    }

    /// How a value came about, as JSON. `condition` holds labels by the names of axes.
    ///
    /// # Errors
    /// A finding where there is no such symbol, axis or label.
    pub fn trail(&self, symbol: &str, condition: Option<Object>) -> Result<String, JsValue> {
        let condition = condition.map(|c| sheets::entries(&c)).unwrap_or_default();
        let trail = self.sheet.trail(symbol, &condition);
        let trail = trail.map_err(|error| fault("no-trail", self.line_of(symbol), error))?;
        write(&trail)
    }

    /// What could stand at a place, as JSON. Columns count Unicode characters from 1, or UTF-16 units.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn complete(&self, line: u32, column: u32, utf16: bool) -> Result<String, JsValue> {
        let desk = self.sheet.desk();
        let byte = byte(&self.sheet, line, column, utf16);
        write(&formulas::assist::complete::complete(&desk, byte))
    }

    /// What stands at a place, as JSON; null where there is nothing to say.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn hover(&self, line: u32, column: u32, utf16: bool) -> Result<String, JsValue> {
        let desk = self.sheet.desk();
        let byte = byte(&self.sheet, line, column, utf16);
        write(&formulas::assist::hover::hover(&desk, byte))
    }

    /// Applies a fix, by its place among those of the finding of that code at that place, and works the sheet out again.
    /// Gives the text.
    ///
    /// # Errors
    /// A finding where the sheet has no such finding or it has no such fix.
    pub fn fix(
        &mut self,
        code: &str,
        line: u32,
        column: u32,
        which: usize,
    ) -> Result<String, JsValue> {
        let found = self.sheet.findings().into_iter();
        let mut found = found.filter(|f| f.code == code && f.line == line && f.column == column);
        let fixed = found.find_map(|f| self.sheet.fixed(f.fixes.get(which)?));
        let text = fixed.ok_or_else(|| {
            fault(
                "no-fix",
                line,
                "The sheet has no such finding with such a fix.",
            )
        })?;
        self.update(&text);
        Ok(text)
    }

    /// The printed report as an HTML document, with nothing outside it and no script.
    #[must_use]
    pub fn print(&self) -> String {
        self.sheet.print()
    }

    /// The quantity, and its values as numbers taken out of it.
    fn numbered(&mut self, symbol: &str) -> Result<(Quantity, Vec<f64>), JsValue> {
        let mut quantity = self.quantity(symbol)?;
        let values = numbers(quantity.values.take()).ok_or_else(|| {
            let message = format!("{symbol} is text, and has no numbers.");
            fault("no-numbers", quantity.line, message)
        })?;
        Ok((quantity, values))
    }

    /// The quantity with its values.
    fn quantity(&mut self, symbol: &str) -> Result<Quantity, JsValue> {
        let unknown = || {
            fault(
                "unknown-symbol",
                1,
                format!("Nothing in this sheet is called {symbol}."),
            )
        };
        let found = self.sheet.quantity(symbol).ok_or_else(unknown)?;
        if found.values.is_some() {
            return Ok(found);
        }
        self.asked.push(symbol.to_owned());
        self.sheet = open(self.sheet.text(), &self.others, self.limits, &self.asked);
        self.sheet.quantity(symbol).ok_or_else(unknown)
    }

    fn line_of(&self, symbol: &str) -> u32 {
        let mut quantities = self.sheet.program().quantities.iter();
        quantities
            .find(|quantity| quantity.symbol == symbol)
            .map_or(1, |quantity| quantity.line)
    }

    /// The unit that a bare number lacks: where no bracket gives it.
    fn unit_behind(&self, symbol: &str) -> String {
        let rows = self.sheet.form().rows;
        let own = rows
            .iter()
            .find(|row| row.symbol.as_deref() == Some(symbol));
        if own.is_none_or(|row| row.unit.is_some()) {
            return String::new();
        }
        let unit = self.sheet.quantity(symbol).and_then(|q| q.unit);
        unit.map_or_else(String::new, |unit| format!(" {unit}"))
    }

    fn lengths(&self, names: &[String]) -> Vec<(String, usize)> {
        let axes = &self.sheet.program().axes;
        let length = |name: &String| axes.iter().find(|axis| axis.name == *name);
        let lengths = names.iter().map(|name| (name, length(name)));
        lengths
            .map(|(name, axis)| (name.clone(), axis.map_or(1, |axis| axis.labels.len())))
            .collect()
    }

    fn place_of(&self, axis: &str, label: &str) -> Option<usize> {
        let mut axes = self.sheet.program().axes.iter();
        axes.find(|a| a.name == axis)?.find(label)
    }
}

fn open(text: &str, others: &BTreeMap<String, String>, limits: Limits, asked: &[String]) -> Sheet {
    let around = Around {
        sheets: &|name| others.get(name).cloned(),
        limits,
        asked,
        editing: true,
        ..Around::default()
    };
    Sheet::open_around(text, &around)
}

/// The numbers of a list; `None` for texts.
fn numbers(values: Option<ValueList>) -> Option<Vec<f64>> {
    match values? {
        ValueList::Numbers(list) => Some(list.into_iter().map(|n| n.unwrap_or(f64::NAN)).collect()),
        ValueList::Conditions(list) => {
            let number =
                |truth: Option<bool>| truth.map_or(f64::NAN, |t| if t { 1.0 } else { 0.0 });
            Some(list.into_iter().map(number).collect())
        }
        ValueList::Texts(_) => None,
    }
}

/// What row-major `values` over `axes` are at one label of one of them.
fn at_label(values: &[f64], axes: &[(String, usize)], axis: usize, label: usize) -> Vec<f64> {
    let inner: usize = axes.iter().skip(axis + 1).map(|(_, n)| n).product();
    let labels = axes.get(axis).map_or(1, |(_, n)| *n);
    let rows = values
        .chunks(inner.max(1))
        .skip(label)
        .step_by(labels.max(1));
    rows.flatten().copied().collect()
}

fn byte(sheet: &Sheet, line: u32, column: u32, utf16: bool) -> usize {
    let desk = sheet.desk();
    if utf16 {
        desk.byte16(line, column)
    } else {
        desk.byte(line, column)
    }
}

/// A mistake of whoever asks, told as the findings of a sheet are.
fn fault(code: &'static str, line: u32, message: impl Display) -> JsValue {
    let finding = Finding {
        severity: Severity::Error,
        code,
        line,
        column: 1,
        length: 0,
        column16: 1,
        length16: 0,
        message: message.to_string(),
        conditions: None,
        fixes: Vec::new(),
    };
    let objects = serde_wasm_bindgen::Serializer::json_compatible();
    let thrown = finding.serialize(&objects);
    thrown.unwrap_or_else(|error| error.to_string().into())
}

fn write<T: Serialize>(answer: &T) -> Result<String, JsValue> {
    write_any(answer).map_err(|error| error.to_string().into())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_label_is_taken_out_of_row_major_values() {
        let axes = [("a".to_owned(), 2), ("b".to_owned(), 3)];
        let values = [1.0, 2.0, 3.0, 4.0, 5.0, 6.0];
        assert_eq!(at_label(&values, &axes, 0, 1), [4.0, 5.0, 6.0]);
        assert_eq!(at_label(&values, &axes, 1, 2), [3.0, 6.0]);
    }

    #[test]
    fn conditions_are_ones_and_noughts() {
        let found = numbers(Some(ValueList::Conditions(vec![
            Some(true),
            Some(false),
            None,
        ])));
        let bits: Vec<_> = found.unwrap().iter().map(|v| v.to_bits()).collect();
        assert_eq!(bits, [1.0, 0.0, f64::NAN].map(f64::to_bits));
        assert_eq!(numbers(Some(ValueList::Texts(vec![None]))), None);
    }
}
