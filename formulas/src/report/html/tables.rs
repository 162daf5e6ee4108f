//! Values as tables; one wider than the page is cut into blocks of columns.

use crate::numbers::shown;
use crate::report::svg::escaped;
use crate::report::text::values::value_text;
use crate::report::text::{at_condition, counted};
use crate::report::{Quantity, Report, ValueList};
use std::fmt::Write as _;

/// Most values that are all printed; above, the extremes say more than the columns.
const PRINTED_MOST: usize = 600;
/// Most labels of the axis that runs across, where another could.
const ACROSS_MOST: usize = 12;
/// Characters that fit across a table.
const ACROSS: usize = 92;

/// A table of texts. Columns from `numbers_from` on are set to the right; remarks and formulas may be broken anywhere.
pub(super) fn table(out: &mut String, heads: &[&str], rows: &[Vec<String>], numbers_from: usize) {
    let class = |i: usize| {
        let head = heads.get(i).copied().unwrap_or_default();
        if i >= numbers_from {
            " class=\"n\""
        } else if head.ends_with("remark") || head.starts_with("formula") {
            " class=\"r\""
        } else {
            ""
        }
    };
    *out += "<table>\n<thead><tr>";
    for (i, head) in heads.iter().enumerate() {
        let _ = write!(out, "<th{}>{}</th>", class(i), escaped(head));
    }
    *out += "</tr></thead>\n<tbody>\n";
    for row in rows {
        *out += "<tr>";
        for (i, cell) in row.iter().enumerate() {
            let _ = write!(out, "<td{}>{}</td>", class(i), escaped(cell));
        }
        *out += "</tr>\n";
    }
    *out += "</tbody></table>\n";
}

/// The values of a quantity that varies: the longest axis that fits the page runs across, the others stand in the rows.
pub(super) fn values(out: &mut String, report: &Report, quantity: &Quantity) {
    let Some(values) = quantity.values.as_ref().filter(|v| v.len() <= PRINTED_MOST) else {
        return extremes(out, report, quantity);
    };
    let axes: Vec<&[String]> = quantity.axes.iter().map(|a| labels(report, a)).collect();
    let fits = |at: &usize| axes.get(*at).is_some_and(|a| a.len() <= ACROSS_MOST);
    let longest = (0..axes.len())
        .rev()
        .filter(fits)
        .max_by_key(|at| axes.get(*at).map_or(0, |a| a.len()));
    let Some(across) = longest.or(axes.len().checked_sub(1)) else {
        return;
    };
    if axes.iter().map(|a| a.len()).product::<usize>() != values.len() {
        return extremes(out, report, quantity);
    }
    let stride: usize = axes.iter().skip(across + 1).map(|a| a.len()).product();
    let across_labels = axes.get(across).copied().unwrap_or_default();
    let mut down = quantity.axes.clone();
    let name = down.remove(across);
    let line = |(row, label): (usize, String)| {
        let first = row / stride * stride * across_labels.len() + row % stride;
        let cells =
            (0..across_labels.len()).map(|i| value_text(report, values, first + i * stride));
        (label, cells.collect())
    };
    let rows = conditions(report, &down).into_iter().enumerate();
    let lines: Vec<(String, Vec<String>)> = rows.map(line).collect();
    let head = if down.is_empty() {
        name
    } else {
        format!("{} \\ {name}", down.join(", "))
    };
    blocks(out, &head, across_labels, &lines);
}

fn blocks(out: &mut String, head: &str, labels: &[String], lines: &[(String, Vec<String>)]) {
    let cells = lines.iter().flat_map(|(_, cells)| cells.iter());
    let width = labels.iter().chain(cells).map(|t| t.chars().count()).max();
    let width = width.unwrap_or(0).min(24) + 3;
    let lead = lines.iter().map(|(label, _)| label.chars().count()).max();
    let lead = lead.unwrap_or(0).max(head.chars().count()).min(40) + 3;
    let fitting = (ACROSS.saturating_sub(lead) / width).max(1);
    for start in (0..labels.len()).step_by(fitting) {
        let end = labels.len().min(start + fitting);
        let _ = write!(
            out,
            "<table class=\"block\"><thead><tr><th>{}</th>",
            escaped(head)
        );
        for label in labels.get(start..end).unwrap_or_default() {
            let _ = write!(out, "<th class=\"n\">{}</th>", escaped(label));
        }
        *out += "</tr></thead><tbody>";
        for (label, cells) in lines {
            let _ = write!(out, "<tr><td>{}</td>", escaped(label));
            for cell in cells.get(start..end).unwrap_or_default() {
                let _ = write!(out, "<td class=\"n\">{}</td>", escaped(cell));
            }
            *out += "</tr>";
        }
        *out += "</tbody></table>\n";
    }
}

fn labels<'a>(report: &'a Report, name: &str) -> &'a [String] {
    let axis = report.axes.iter().find(|axis| axis.name == name);
    axis.map_or(&[], |axis| axis.labels.as_slice())
}

/// The labels of all conditions of some axes, in condition order; one without text where there is no axis.
fn conditions(report: &Report, axes: &[String]) -> Vec<String> {
    let mut all = vec![String::new()];
    for axis in axes {
        let labels = labels(report, axis);
        let with = |before: &String| {
            let join = |label: &String| match before.is_empty() {
                true => label.clone(),
                false => format!("{before}, {label}"),
            };
            labels.iter().map(join).collect::<Vec<_>>()
        };
        all = all.iter().flat_map(with).collect();
    }
    all
}

/// How many values there are and between which they lie.
fn extremes(out: &mut String, report: &Report, quantity: &Quantity) {
    let _ = write!(
        out,
        "<p class=\"small\">{}</p>",
        escaped(&span(report, quantity))
    );
}

/// `24 conditions over point, cg; largest 700.0 at point A, smallest -20.00 at point D`.
pub(super) fn span(report: &Report, quantity: &Quantity) -> String {
    let mut text = counted(quantity.conditions as u64, "condition");
    text += &format!(" over {}", quantity.axes.join(", "));
    for (count, what) in [
        (quantity.without_value, "without value"),
        (quantity.excluded, "excluded"),
    ] {
        if count > 0 {
            text += &format!(", {count} {what}");
        }
    }
    for (word, extreme) in [
        ("largest", &quantity.largest),
        ("smallest", &quantity.smallest),
    ] {
        if let Some(extreme) = extreme {
            let value = shown(extreme.value, report.digits);
            text += &format!("; {word} {value}{}", at_condition(&extreme.condition));
        }
    }
    text
}

/// The values of a short list with their labels, `fwd 5.950, aft 6.450`; of a longer one where they lie.
pub(super) fn listed(report: &Report, quantity: &Quantity) -> String {
    let list = quantity.values.as_ref().filter(|v| v.len() <= 12);
    let Some(values) = list else {
        return span(report, quantity);
    };
    let each = conditions(report, &quantity.axes).into_iter().enumerate();
    let each = each.map(|(i, label)| {
        let value = value_text(report, values, i);
        let spread = spread(report, quantity, values, i);
        let text = format!("{label} {value}{spread}");
        text.trim().to_owned()
    });
    each.collect::<Vec<_>>().join(", ")
}

/// The tolerance of an input, which is what moves it.
fn spread(report: &Report, quantity: &Quantity, values: &ValueList, index: usize) -> String {
    let found = quantity
        .spread
        .as_ref()
        .filter(|_| quantity.input && !values.is_empty());
    let found = found.and_then(|s| s.worst.get(index).copied().flatten());
    match found {
        Some(width) if width > 0.0 => format!(" ± {}", shown(width, report.digits)),
        _ => String::new(),
    }
}
