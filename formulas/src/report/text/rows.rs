//! The rows of the computation form in plain text.

use super::page::{Cell, Page, WIDTH, padded};
use super::values;
use crate::report::form::{FormHead, FormTable, RowKind};
use crate::report::{Form, FormRow, Quantity, Report};

/// Widths of the columns: item, symbol, unit, how obtained, value, remark; with the blanks between they fill a line.
type Widths = [usize; 6];

/// The widths where no symbol is long; a longer one takes from how it was obtained, up to this many.
const WIDTHS: Widths = [4, 14, 12, 42, 12, 31];
const SYMBOL_MOST: usize = 30;

fn widths(report: &Report) -> Widths {
    let [item, least, unit, how, value, remark] = WIDTHS;
    let symbols = report.quantities.iter().map(|q| q.symbol.chars().count());
    let symbol = symbols.max().unwrap_or(0).clamp(least, SYMBOL_MOST);
    [item, symbol, unit, how + least - symbol, value, remark]
}

const HEADS: [&str; 6] = ["item", "symbol", "unit", "how obtained", "value", "remark"];

pub(super) fn write(page: &mut Page, report: &Report, form: &Form) {
    let widths = &widths(report);
    page.blank();
    cells(page, widths, HEADS);
    page.rule("=");
    for row in &form.rows {
        write_row(page, widths, report, row);
    }
    page.rule("-");
}

fn cells(page: &mut Page, widths: &Widths, texts: [&str; 6]) {
    let mut cells: Vec<Cell> = Vec::new();
    for (i, (text, width)) in texts.iter().zip(*widths).enumerate() {
        let right = i == 0 || i == 4;
        cells.push(Cell { text, width, right });
    }
    page.cells(&cells);
}

fn write_row(page: &mut Page, widths: &Widths, report: &Report, row: &FormRow) {
    match row.kind {
        RowKind::Title | RowKind::Aside | RowKind::Blank => {}
        RowKind::Part => {
            page.blank();
            page.paragraph("", &row.how);
            page.rule("-");
        }
        RowKind::Sub => page.paragraph("     ", &row.how),
        RowKind::Note | RowKind::Prose => {
            page.paragraph("     ", &with_marks(Some(&row.how), &marks(report, row)));
        }
        _ => statement(page, widths, report, row),
    }
}

fn statement(page: &mut Page, widths: &Widths, report: &Report, row: &FormRow) {
    let quantities = own_quantities(report, row);
    let only = match quantities.as_slice() {
        [only] if row.table.is_none() => Some(*only),
        _ => None,
    };
    let unit = row.unit.as_deref().or(only.and_then(|q| q.unit.as_deref()));
    let value = only
        .and_then(|q| values::single(report, q))
        .or_else(|| verdict(report, row));
    let item = row.item.map_or_else(String::new, |item| item.to_string());
    cells(
        page,
        widths,
        [
            &item,
            row.symbol.as_deref().unwrap_or(""),
            unit.unwrap_or(""),
            &how(row),
            value.as_deref().unwrap_or(""),
            &with_marks(row.remark.as_deref(), &marks(report, row)),
        ],
    );
    if let Some(table) = &row.table {
        typed_table(page, table);
    } else if let Some(quantity) = only {
        values::block(page, report, quantity);
    } else {
        quantities
            .iter()
            .for_each(|q| member(page, widths, report, q));
    }
}

/// One of several quantities that a row gives: a field of a record, one of several unknowns.
fn member(page: &mut Page, widths: &Widths, report: &Report, quantity: &Quantity) {
    let unit = quantity.unit.as_deref().unwrap_or("");
    let value = values::single(report, quantity).unwrap_or_default();
    cells(page, widths, ["", &quantity.symbol, unit, "", &value, ""]);
    values::block(page, report, quantity);
}

/// The quantities whose values stand in the row: none where the row only looks at them, or declares an axis.
pub(in crate::report) fn own_quantities<'a>(
    report: &'a Report,
    row: &FormRow,
) -> Vec<&'a Quantity> {
    if !matches!(row.kind, RowKind::Definition | RowKind::Unknown) {
        return Vec::new();
    }
    let symbols = row.quantities.iter();
    symbols
        .filter_map(|symbol| report.quantity(symbol))
        .collect()
}

pub(in crate::report) fn how(row: &FormRow) -> String {
    match (&row.word, row.kind) {
        (Some(word), _) => format!("{word} {}", row.how),
        (None, RowKind::Unreadable) => format!("cannot be read: {}", row.how),
        (None, _) => row.how.clone(),
    }
}

/// What a requirement or a free body comes to.
pub(in crate::report) fn verdict(report: &Report, row: &FormRow) -> Option<String> {
    let words = match row.kind {
        RowKind::Require => {
            let found = report.requirements.iter().find(|r| r.line == row.line)?;
            ["met", "NOT MET", "NOT SHOWN"][index(found.met)]
        }
        RowKind::Freebody => {
            let found = report.freebodies.iter().find(|f| f.line == row.line)?;
            ["closes", "OPEN", "NOT SHOWN"][index(found.closes)]
        }
        _ => return None,
    };
    Some(words.to_owned())
}

fn index(verdict: Option<bool>) -> usize {
    match verdict {
        Some(true) => 0,
        Some(false) => 1,
        None => 2,
    }
}

/// Numbers of the findings that stand in the lines of a row.
fn marks(report: &Report, row: &FormRow) -> String {
    let lines = row.line..row.line.saturating_add(row.lines.max(1));
    let findings = report.findings.iter().enumerate();
    let numbers = findings.filter(|(_, finding)| lines.contains(&finding.line));
    let numbers: Vec<String> = numbers.map(|(i, _)| (i + 1).to_string()).collect();
    match numbers.len() {
        0 => String::new(),
        1 => format!("(finding {})", numbers.join(", ")),
        _ => format!("(findings {})", numbers.join(", ")),
    }
}

fn with_marks(remark: Option<&str>, marks: &str) -> String {
    let parts = [remark.unwrap_or(""), marks];
    let parts: Vec<&str> = parts.into_iter().filter(|part| !part.is_empty()).collect();
    parts.join(" ")
}

/// A table as it was typed, its columns lined up.
fn typed_table(page: &mut Page, table: &FormTable) {
    let heads = table.keys.iter().chain(&table.columns).map(head_text);
    let heads: Vec<String> = heads.collect();
    let widths: Vec<usize> = (0..heads.len())
        .map(|i| column_width(table, &heads, i))
        .collect();
    let lead = "      ";
    let used = lead.len() + widths.iter().map(|w| w + 2).sum::<usize>();
    let mut line = |cells: &[String], remark: Option<&str>| {
        let cells = cells.iter().zip(&widths).enumerate();
        let cells: String = cells
            .map(|(i, (cell, width))| padded(cell, *width, i >= table.keys.len()) + "  ")
            .collect();
        // A remark that finds no room beside the cells goes below them.
        match remark {
            Some(remark) if used + 20 <= WIDTH => page.paragraph(&format!("{lead}{cells}"), remark),
            Some(remark) => {
                page.line(&format!("{lead}{cells}"));
                page.paragraph(&lead.repeat(2), remark);
            }
            None => page.line(&format!("{lead}{cells}")),
        }
    };
    line(&heads, None);
    for row in &table.rows {
        line(&row.cells, row.remark.as_deref());
    }
}

fn head_text(head: &FormHead) -> String {
    match &head.unit {
        Some(unit) => format!("{} [{unit}]", head.symbol),
        None => head.symbol.clone(),
    }
}

fn column_width(table: &FormTable, heads: &[String], column: usize) -> usize {
    let cells = table.rows.iter().filter_map(|row| row.cells.get(column));
    let texts = heads.get(column).into_iter().chain(cells);
    texts.map(|text| text.chars().count()).max().unwrap_or(0)
}
