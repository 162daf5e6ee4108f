//! The sheet that a page has open, for as long as it is open: each text is taken as an edit of the one before, and what
//! the page asks is answered from it. Answers are JSON in one piece of text, numbers apart as one typed array: that goes
//! from one thread to another at once, where an object would be taken apart and put together twice.

use formulas::assist::{complete as completion, hover as place};
use formulas::report::compare;
use formulas::report::json::write_any;
use formulas::report::{Figure, Form, Freebody, Report, ValueList};
use formulas::sheet::{Around, Sheet};
use js_sys::Object;
use serde::Serialize;
use wasm_bindgen::prelude::{JsValue, wasm_bindgen};

use crate::{panic, sheets};

/// The open sheet.
#[wasm_bindgen]
#[derive(Debug, Default)]
pub struct Desk {
    sheet: Option<Sheet>,
    numbers: Vec<f64>,
}

/// The report as `run --json` writes it, with the rows of the computation form beside it and the drawings left out.
#[derive(Serialize)]
struct Answer<'a> {
    #[serde(flatten)]
    report: &'a Report,
    form: Form,
    /// How many numbers of the typed array each quantity has, in their order; null for one whose values are no numbers
    /// or are not written.
    columns: Vec<Option<usize>>,
}

/// What is drawn.
#[derive(Serialize)]
struct Drawings<'a> {
    figures: Vec<Drawing<'a>>,
    freebodies: Vec<Drawing<'a>>,
}

#[derive(Serialize)]
struct Drawing<'a> {
    name: &'a str,
    line: u32,
    svg: &'a str,
}

#[wasm_bindgen]
impl Desk {
    /// A desk without a sheet.
    #[wasm_bindgen(constructor)]
    #[must_use]
    pub fn new() -> Self {
        panic::listen();
        Self::default()
    }

    /// Takes `text` as the sheet's, reads, checks and works out what differs from the text before. Gives the report as
    /// JSON with `form` and `columns` beside it; the numbers stand in [`Desk::numbers`]. `others` holds the texts of
    /// other sheets by their names.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn take(&mut self, text: &str, others: Option<Object>) -> Result<String, JsValue> {
        let sheet = match self.sheet.take() {
            Some(mut sheet) => {
                sheet.update_with(text, &|name| sheets::beside(others.as_ref(), name));
                sheet
            }
            None => sheets::open_for_edits(text, others.as_ref()),
        };
        let mut report = sheet.report_undrawn(&[]);
        self.numbers.clear();
        let columns = self.take_numbers(&mut report);
        let answer = Answer {
            report: &report,
            form: sheet.form(),
            columns,
        };
        let json = write(&answer);
        self.sheet = Some(sheet);
        json
    }

    /// The numbers of the last report, quantity after quantity, NaN where there is no value. They are handed over once.
    pub fn numbers(&mut self) -> Vec<f64> {
        std::mem::take(&mut self.numbers)
    }

    /// The drawings of the sheet as JSON: `figures` and `freebodies`, each with `name`, `line` and `svg`.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn drawings(&self) -> Result<String, JsValue> {
        let drawn = self.sheet.as_ref().map(Sheet::drawings);
        let (figures, freebodies) = drawn.unwrap_or_default();
        write(&Drawings {
            figures: figures.iter().map(figure).collect(),
            freebodies: freebodies.iter().filter_map(freebody).collect(),
        })
    }

    /// How a value came about, as JSON.
    ///
    /// # Errors
    /// A sentence where there is no such symbol, axis or label.
    pub fn trail(&self, symbol: &str, condition: Option<Object>) -> Result<String, JsValue> {
        let condition = condition.map(|c| sheets::entries(&c)).unwrap_or_default();
        let sheet = self.open()?;
        let trail = sheet.trail(symbol, &condition).map_err(sentence)?;
        write(&trail)
    }

    /// What could stand at a place of `text`, as JSON. The text may be newer than the one taken.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn complete(&self, text: &str, line: u32, column16: u32) -> Result<String, JsValue> {
        let newer = self.newer(text);
        let Some(sheet) = newer.as_ref().or(self.sheet.as_ref()) else {
            return Ok("null".to_owned());
        };
        let desk = sheet.desk();
        write(&completion::complete(&desk, desk.byte16(line, column16)))
    }

    /// What stands at a place of `text`, as JSON; null where there is nothing to say.
    ///
    /// # Errors
    /// Only where the JSON cannot be written.
    pub fn hover(&self, text: &str, line: u32, column16: u32) -> Result<String, JsValue> {
        let newer = self.newer(text);
        let Some(sheet) = newer.as_ref().or(self.sheet.as_ref()) else {
            return Ok("null".to_owned());
        };
        let desk = sheet.desk();
        write(&place::hover(&desk, desk.byte16(line, column16)))
    }

    /// The printed report as an HTML document, with nothing outside it and no script.
    ///
    /// # Errors
    /// Where no sheet is open.
    pub fn print(&self) -> Result<String, JsValue> {
        Ok(self.open()?.print())
    }

    fn open(&self) -> Result<&Sheet, JsValue> {
        self.sheet.as_ref().ok_or_else(|| "no sheet is open".into())
    }

    /// The text read anew, where it is not the one taken.
    fn newer(&self, text: &str) -> Option<Sheet> {
        let same = self.sheet.as_ref().is_some_and(|s| s.text() == text);
        (!same).then(|| Sheet::open_unrun(text, &Around::default()))
    }

    /// Takes the numbers out of the report and says how many each quantity had.
    fn take_numbers(&mut self, report: &mut Report) -> Vec<Option<usize>> {
        let mut take = |values: &mut Option<ValueList>| match values.take() {
            Some(ValueList::Numbers(list)) => {
                let numbers = list.iter().map(|n| n.unwrap_or(f64::NAN));
                self.numbers.extend(numbers);
                Some(list.len())
            }
            other => {
                *values = other;
                None
            }
        };
        let quantities = report.quantities.iter_mut();
        quantities
            .map(|quantity| take(&mut quantity.values))
            .collect()
    }
}

/// What differs between the results of two texts, as JSON.
///
/// # Errors
/// Only where the JSON cannot be written.
#[wasm_bindgen]
pub fn difference(old: &str, new: &str) -> Result<String, JsValue> {
    panic::listen();
    let (old, new) = (Sheet::open(old), Sheet::open(new));
    write(&compare::differences(&old.report(&[]), &new.report(&[])))
}

fn figure(figure: &Figure) -> Drawing<'_> {
    Drawing {
        name: &figure.name,
        line: figure.line,
        svg: &figure.svg,
    }
}

fn freebody(body: &Freebody) -> Option<Drawing<'_>> {
    Some(Drawing {
        name: &body.name,
        line: body.line,
        svg: body.svg.as_deref()?,
    })
}

fn write<T: Serialize>(answer: &T) -> Result<String, JsValue> {
    write_any(answer).map_err(sentence)
}

fn sentence(error: impl std::fmt::Display) -> JsValue {
    error.to_string().into()
}
