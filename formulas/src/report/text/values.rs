//! Values of a quantity in plain text: one, a line along an axis, a small table, or what governs.

use super::page::{Page, WIDTH, padded};
use super::{at_condition, counted};
use crate::numbers::shown;
use crate::report::{Quantity, Report, ValueList};

/// Where the tables of values begin.
const INDENT: usize = 6;
/// Most values that are all printed; above, the extremes say more than the columns.
const PRINTED_MOST: usize = 240;

/// The value of a quantity that does not vary.
pub(in crate::report) fn single(report: &Report, quantity: &Quantity) -> Option<String> {
    let values = quantity.values.as_ref()?;
    (quantity.axes.is_empty() && values.len() == 1).then(|| value_text(report, values, 0))
}

/// The values of a quantity that varies, below its row.
pub(super) fn block(page: &mut Page, report: &Report, quantity: &Quantity) {
    let Some(values) = &quantity.values else {
        return extremes(page, report, quantity);
    };
    let lengths: Vec<usize> = quantity
        .axes
        .iter()
        .map(|axis| labels(report, axis).len())
        .collect();
    let whole = lengths.iter().product::<usize>() == values.len();
    match (quantity.axes.as_slice(), lengths.as_slice()) {
        ([], _) => {}
        ([across], _) if whole && values.len() <= PRINTED_MOST => {
            let rows = vec![(String::new(), texts(report, values))];
            table(page, across, labels(report, across), &rows);
        }
        ([down, across], [_, columns]) if whole && values.len() <= PRINTED_MOST => {
            let texts = texts(report, values);
            let lines = texts.chunks((*columns).max(1)).map(<[String]>::to_vec);
            let rows: Vec<_> = labels(report, down).iter().cloned().zip(lines).collect();
            table(
                page,
                &format!("{down} \\ {across}"),
                labels(report, across),
                &rows,
            );
        }
        _ => extremes(page, report, quantity),
    }
}

fn labels<'a>(report: &'a Report, name: &str) -> &'a [String] {
    let axis = report.axes.iter().find(|axis| axis.name == name);
    axis.map_or(&[], |axis| axis.labels.as_slice())
}

fn texts(report: &Report, values: &ValueList) -> Vec<String> {
    (0..values.len())
        .map(|i| value_text(report, values, i))
        .collect()
}

/// A value as shown; a dash where there is none.
pub(in crate::report) fn value_text(report: &Report, values: &ValueList, index: usize) -> String {
    let text = match values {
        ValueList::Numbers(list) => {
            let value = list.get(index).copied().flatten();
            value.map(|v| shown(v, report.digits))
        }
        ValueList::Conditions(list) => {
            let value = list.get(index).copied().flatten();
            value.map(|v| v.to_string())
        }
        ValueList::Texts(list) => list.get(index).cloned().flatten(),
    };
    text.unwrap_or_else(|| "-".to_owned())
}

/// Labels across, rows below; cut into several tables where it is wider than the page.
fn table(page: &mut Page, head: &str, labels: &[String], rows: &[(String, Vec<String>)]) {
    let lead = rows
        .iter()
        .map(|(label, _)| length(label))
        .max()
        .unwrap_or(0);
    let lead = lead.max(length(head)).min(WIDTH / 3);
    let in_columns = rows.iter().flat_map(|(_, cells)| cells);
    let width = labels.iter().chain(in_columns).map(|t| length(t)).max();
    let width = width.unwrap_or(0) + 2;
    let fitting = (WIDTH.saturating_sub(INDENT + lead) / width).max(1);
    let mut start = 0;
    while start < labels.len() {
        let end = labels.len().min(start + fitting);
        page.line(&table_line(head, lead, labels.get(start..end), width));
        for (label, cells) in rows {
            page.line(&table_line(label, lead, cells.get(start..end), width));
        }
        start = end;
    }
}

fn table_line(head: &str, lead: usize, cells: Option<&[String]>, width: usize) -> String {
    let cells = cells.unwrap_or(&[]).iter();
    let cells: String = cells.map(|cell| padded(cell, width, true)).collect();
    format!("{}{}{cells}", " ".repeat(INDENT), padded(head, lead, false))
}

fn length(text: &str) -> usize {
    text.chars().count()
}

/// Largest and smallest with their conditions, for what is too large for a table.
fn extremes(page: &mut Page, report: &Report, quantity: &Quantity) {
    let lead = " ".repeat(INDENT);
    let mut notes = vec![counted(quantity.conditions as u64, "condition")];
    notes.push(format!("over {}", quantity.axes.join(", ")));
    if quantity.without_value > 0 {
        notes.push(format!("{} without value", quantity.without_value));
    }
    if quantity.excluded > 0 {
        notes.push(format!("{} excluded", quantity.excluded));
    }
    page.paragraph(&lead, &notes.join(", "));
    let ends = [
        ("largest ", &quantity.largest),
        ("smallest", &quantity.smallest),
    ];
    for (word, extreme) in ends {
        if let Some(extreme) = extreme {
            let value = shown(extreme.value, report.digits);
            let text = format!("{value}{}", at_condition(&extreme.condition));
            page.paragraph(&format!("{lead}{word} "), &text);
        }
    }
}
