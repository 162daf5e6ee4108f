//! Inputs with their sources, and the lines of the computation with what they rest on.

use super::{Input, tables};
use crate::names::{Use, statement_uses};
use crate::report::form::{FormHead, FormTable, RowKind};
use crate::report::svg::escaped;
use crate::report::text::closing::item_of;
use crate::report::text::rows::{how, own_quantities, verdict};
use crate::report::text::values::single;
use crate::report::{Form, FormRow, Quantity, Report};
use crate::syntax::Statement;
use rustc_hash::FxHashMap;
use std::collections::BTreeSet;
use std::fmt::Write as _;

/// Every input with its unit, value and where it comes from.
pub(super) fn inputs(out: &mut String, report: &Report, form: &Form) {
    let inputs: Vec<&Quantity> = report.quantities.iter().filter(|q| q.input).collect();
    if inputs.is_empty() {
        return;
    }
    *out += "<h2>Inputs</h2>\n";
    let rows: Vec<Vec<String>> = inputs
        .into_iter()
        .map(|q| {
            vec![
                item_of(form, q.line),
                q.symbol.clone(),
                q.unit.clone().unwrap_or_default(),
                tables::listed(report, q),
                q.remark.clone().unwrap_or_default(),
            ]
        })
        .collect();
    let heads = ["item", "symbol", "unit", "value", "source, remark"];
    tables::table(out, &heads, &rows, heads.len());
}

/// All lines in the order of the sheet.
pub(super) fn form(out: &mut String, input: &Input<'_>) {
    *out += "<h2>Computation</h2>\n<table class=\"form\">\n<colgroup><col class=\"item\"/><col class=\"symbol\"/>\
             <col class=\"unit\"/><col/><col class=\"value\"/><col class=\"remark\"/></colgroup>\n<thead><tr><th class=\"n\">item</th><th>symbol</th><th>unit</th>\
             <th>how obtained</th><th class=\"n\">value</th><th>remark</th></tr></thead>\n<tbody>\n";
    let items = items(input.form);
    let statements = input.tree.statements.iter();
    for (row, statement) in input.form.rows.iter().zip(statements) {
        match row.kind {
            RowKind::Title | RowKind::Aside | RowKind::Blank => {}
            RowKind::Part => wide(out, "part", &row.how),
            RowKind::Sub => wide(out, "sub", &row.how),
            RowKind::Note | RowKind::Prose => wide(out, "note", &row.how),
            _ => line(out, input.report, row, &from_items(&items, row, statement)),
        }
        queries(out, input.report, row);
    }
    *out += "</tbody></table>\n";
}

fn wide(out: &mut String, class: &str, text: &str) {
    let _ = writeln!(
        out,
        "<tr class=\"{class}\"><td colspan=\"6\">{}</td></tr>",
        escaped(text)
    );
}

/// The item that gives each symbol.
fn items(form: &Form) -> FxHashMap<&str, u32> {
    let mut items = FxHashMap::default();
    for row in &form.rows {
        let Some(item) = row.item else { continue };
        if matches!(
            row.kind,
            RowKind::Governing | RowKind::Require | RowKind::Freebody | RowKind::Figure
        ) {
            continue;
        }
        let name = |symbol: &str| symbol.find('(').unwrap_or(symbol.len());
        let symbol = row.symbol.as_deref().map(|s| &s[..name(s)]);
        let record = |symbol: &str| symbol.find('.').unwrap_or(symbol.len());
        let given = row.quantities.iter().map(|q| &q[..record(q)]);
        for symbol in symbol.into_iter().chain(given) {
            items.entry(symbol.trim()).or_insert(item);
        }
    }
    items
}

/// `from items 7, 12`; nothing for an input.
fn from_items(items: &FxHashMap<&str, u32>, row: &FormRow, statement: &Statement) -> String {
    let mut found = BTreeSet::new();
    statement_uses(statement, &mut |used| {
        let (Use::Symbol(name, _) | Use::Function(name, _)) = used else {
            return;
        };
        found.extend(
            items
                .get(name)
                .copied()
                .filter(|item| row.item != Some(*item)),
        );
    });
    let found: Vec<String> = found.into_iter().map(|item| item.to_string()).collect();
    match found.as_slice() {
        [] => String::new(),
        [one] => format!("from item {one}"),
        _ => format!("from items {}", found.join(", ")),
    }
}

fn line(out: &mut String, report: &Report, row: &FormRow, from: &str) {
    let quantities = own_quantities(report, row);
    let only = match quantities.as_slice() {
        [only] if row.table.is_none() => Some(*only),
        _ => None,
    };
    let unit = row.unit.as_deref().or(only.and_then(|q| q.unit.as_deref()));
    let value = only
        .and_then(|q| single(report, q))
        .or_else(|| verdict(report, row));
    let item = row.item.map_or_else(String::new, |item| item.to_string());
    let how = if row.table.is_some() {
        "table".to_owned()
    } else {
        how(row)
    };
    let _ = write!(
        out,
        "<tr><td class=\"n\">{item}</td><td>{}</td><td>{}</td><td class=\"f\">{}",
        escaped(row.symbol.as_deref().unwrap_or("")),
        escaped(unit.unwrap_or("")),
        escaped(&how)
    );
    if !from.is_empty() {
        let _ = write!(out, "<div class=\"from\">{from}</div>");
    }
    let _ = writeln!(
        out,
        "</td><td class=\"n\">{}</td><td class=\"r\">{}</td></tr>",
        escaped(value.as_deref().unwrap_or("")),
        escaped(row.remark.as_deref().unwrap_or(""))
    );
    below(out, report, row, &quantities, only.is_some());
}

/// What stands below a line over its whole width: the cells of a table, values that vary, the fields of a record.
fn below(out: &mut String, report: &Report, row: &FormRow, quantities: &[&Quantity], only: bool) {
    let mut cell = String::new();
    if let Some(table) = &row.table {
        typed(&mut cell, table);
    } else if matches!(row.kind, RowKind::Definition | RowKind::Unknown) {
        for quantity in quantities {
            if !only {
                let unit = quantity.unit.as_deref().unwrap_or("");
                let value = single(report, quantity).unwrap_or_default();
                let text = format!("{} {value} {unit}", quantity.symbol);
                let _ = writeln!(cell, "<p>{}</p>", escaped(text.trim()));
            }
            if !quantity.axes.is_empty() {
                tables::values(&mut cell, report, quantity);
            }
        }
    }
    if !cell.is_empty() {
        let _ = writeln!(out, "<tr><td></td><td colspan=\"5\">{cell}</td></tr>");
    }
}

/// A table as it was typed.
fn typed(out: &mut String, table: &FormTable) {
    let head = |head: &FormHead| match &head.unit {
        Some(unit) => format!("{} [{unit}]", head.symbol),
        None => head.symbol.clone(),
    };
    *out += "<table class=\"block\"><thead><tr>";
    for name in table.keys.iter().chain(&table.columns).map(head) {
        let _ = write!(out, "<th>{}</th>", escaped(&name));
    }
    *out += "<th>remark</th></tr></thead><tbody>";
    for row in &table.rows {
        *out += "<tr>";
        for (i, cell) in row.cells.iter().enumerate() {
            let class = if i < table.keys.len() {
                ""
            } else {
                " class=\"n\""
            };
            let _ = write!(out, "<td{class}>{}</td>", escaped(cell));
        }
        let _ = write!(
            out,
            "<td>{}</td></tr>",
            escaped(row.remark.as_deref().unwrap_or(""))
        );
    }
    *out += "</tbody></table>\n";
}

/// Findings beside what they touch, by their numbers at the end of the report.
fn queries(out: &mut String, report: &Report, row: &FormRow) {
    let lines = row.line..row.line.saturating_add(row.lines.max(1));
    let findings = report.findings.iter().enumerate();
    for (i, finding) in findings.filter(|(_, f)| lines.contains(&f.line)) {
        let text = format!(
            "finding {}, {}: {}",
            i + 1,
            finding.severity.word(),
            finding.message
        );
        let _ = writeln!(
            out,
            "<tr><td></td><td colspan=\"5\"><div class=\"query\">{}</div></td></tr>",
            escaped(&text)
        );
    }
}
