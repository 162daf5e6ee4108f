//! What stands below the computation form: what governs, requirements, free bodies, assumptions, findings.

use super::page::{Page, padded};
use super::{at_condition, behind, condition_text, counted};
use crate::numbers::shown;
use crate::report::{
    Condition, CornerInput, Extreme, Form, Freebody, Governing, GoverningCorner, GoverningGroup,
    GoverningOthers, Report, Requirement, WorstCondition,
};

/// Significant figures of a residual, which says only how small it is.
const RESIDUAL_DIGITS: u8 = 2;
/// Width of the lead of a section's entries.
const LEAD: usize = 6;

pub(super) fn write(page: &mut Page, report: &Report, form: &Form) {
    section(
        page,
        "Governing conditions",
        &report.governing,
        |page, line| {
            governing(page, report, line);
        },
    );
    section(page, "Requirements", &report.requirements, |page, line| {
        requirement(page, report, item_of(form, line.line), line);
    });
    section(page, "Free bodies", &report.freebodies, |page, body| {
        freebody(page, item_of(form, body.line), body);
    });
    let assumed = assumptions(report, form);
    section(
        page,
        "Assumptions to be confirmed",
        &assumed,
        |page, (item, text)| {
            page.paragraph(&padded(item, LEAD, false), text);
        },
    );
    findings(page, report);
}

fn section<T>(page: &mut Page, heading: &str, entries: &[T], entry: impl Fn(&mut Page, &T)) {
    if entries.is_empty() {
        return;
    }
    page.heading(heading);
    entries.iter().for_each(|one| entry(page, one));
}

/// The item number of the statement at a line.
pub(in crate::report) fn item_of(form: &Form, line: u32) -> String {
    let row = form.rows.iter().find(|row| row.line == line);
    let item = row.and_then(|row| row.item);
    item.map_or_else(String::new, |item| item.to_string())
}

fn governing(page: &mut Page, report: &Report, line: &Governing) {
    let over = match line.over.as_slice() {
        [] => String::new(),
        axes => format!(" over {}", axes.join(", ")),
    };
    let mut text = format!(
        "{}{over}: {}",
        line.symbol,
        counted(line.conditions as u64, "condition")
    );
    if line.without_value > 0 {
        text += &format!(", {} without value", line.without_value);
    }
    if line.excluded > 0 {
        text += &format!(", {} excluded", line.excluded);
    }
    page.paragraph("", &text);
    let unit = line.unit.as_deref();
    extreme(page, report, "largest ", line.largest.as_ref(), unit);
    extreme(page, report, "smallest", line.smallest.as_ref(), unit);
    let with_axes = line.groups.iter().filter(|g| !g.condition.0.is_empty());
    with_axes.for_each(|group| governing_group(page, report, group, unit));
    for of in ["largest", "smallest"] {
        let moved = line.sensitivity.iter().filter(|s| s.of == of);
        let moved = moved.map(|s| (&s.symbol, &s.condition, s.effect, s.share));
        influences(page, report, of, unit, moved);
    }
    for corner in &line.corners {
        governing_corner(page, report, corner, unit);
    }
    line.others
        .iter()
        .for_each(|others| governing_others(page, others));
}

/// The inputs with tolerances by what they move.
fn influences<'a>(
    page: &mut Page,
    report: &Report,
    of: &str,
    unit: Option<&str>,
    moved: impl Iterator<Item = (&'a String, &'a Condition, f64, f64)>,
) {
    let text: Vec<String> = moved
        .map(|(symbol, condition, effect, share)| {
            let percent = shown(share * 100.0, 2);
            let effect = shown(effect, report.digits);
            format!(
                "{symbol}{} {effect}{} ({percent} %)",
                at_condition(condition),
                behind(unit)
            )
        })
        .collect();
    if !text.is_empty() {
        let lead = format!("{}tolerances move the {of} by: ", " ".repeat(LEAD));
        page.paragraph(&lead, &text.join(", "));
    }
}

fn governing_corner(
    page: &mut Page,
    report: &Report,
    corner: &GoverningCorner,
    unit: Option<&str>,
) {
    let value = shown(corner.value, report.digits);
    let text = format!(
        "worst corner of the {}: {value}{}{} ({})",
        corner.of,
        behind(unit),
        at_condition(&corner.condition),
        corner_inputs(&corner.inputs)
    );
    page.paragraph(&" ".repeat(LEAD), &text);
}

fn governing_others(page: &mut Page, others: &GoverningOthers) {
    let named: Vec<String> = others
        .conditions
        .iter()
        .take(5)
        .map(condition_text)
        .collect();
    let more = if others.conditions.len() > 5 {
        "; …"
    } else {
        ""
    };
    let text = format!(
        "within the tolerances, {} could govern the {} too: {}{more}",
        counted(others.conditions.len() as u64, "condition"),
        others.of,
        named.join("; ")
    );
    page.paragraph(&" ".repeat(LEAD), &text);
}

pub(in crate::report) fn corner_inputs(inputs: &[CornerInput]) -> String {
    let each = inputs
        .iter()
        .map(|i| format!("{}{} at {}", i.symbol, at_condition(&i.condition), i.end));
    each.collect::<Vec<_>>().join(", ")
}

fn governing_group(page: &mut Page, report: &Report, group: &GoverningGroup, unit: Option<&str>) {
    page.paragraph(
        &" ".repeat(LEAD),
        &format!("{}:", condition_text(&group.condition)),
    );
    extreme(page, report, "  largest ", group.largest.as_ref(), unit);
    extreme(page, report, "  smallest", group.smallest.as_ref(), unit);
}

fn extreme(
    page: &mut Page,
    report: &Report,
    word: &str,
    found: Option<&Extreme>,
    unit: Option<&str>,
) {
    let lead = format!("{}{word}  ", " ".repeat(LEAD));
    match found {
        Some(found) => {
            let value = padded(&shown(found.value, report.digits), 12, true);
            let text = format!("{}{}", behind(unit), at_condition(&found.condition));
            page.paragraph(&format!("{lead}{value} "), &text);
        }
        None => page.line(&format!("{lead}no value")),
    }
}

fn requirement(page: &mut Page, report: &Report, item: String, line: &Requirement) {
    let verdict = match line.met {
        Some(true) => "met",
        Some(false) => "NOT MET",
        None => "NOT SHOWN",
    };
    let reason = line.reason.as_deref();
    let reason = reason.map_or_else(String::new, |reason| format!(" ({reason})"));
    let lead = padded(&item, LEAD, false);
    page.paragraph(&lead, &format!("{}: {verdict}{reason}", line.text));
    page.paragraph(&" ".repeat(LEAD), &requirement_counts(line));
    if let Some(worst) = &line.worst {
        page.paragraph(&" ".repeat(LEAD), &worst_text(report, worst));
    }
    if let Some(met) = line.met_at_worst {
        let word = if met { "met" } else { "NOT MET" };
        let text = format!("with all tolerances at their worst: {word}");
        page.paragraph(&" ".repeat(LEAD), &text);
    }
    let unit = line.worst.as_ref().and_then(|w| w.unit.as_deref());
    let moved = line
        .sensitivity
        .iter()
        .map(|s| (&s.symbol, &s.condition, s.effect, s.share));
    influences(page, report, "reserve", unit, moved);
    if let Some(corner) = &line.corner {
        let reserve = shown(corner.reserve, report.digits);
        let text = format!(
            "worst corner: reserve {reserve}{}{} ({})",
            behind(unit),
            at_condition(&corner.condition),
            corner_inputs(&corner.inputs)
        );
        page.paragraph(&" ".repeat(LEAD), &text);
    }
}

pub(in crate::report) fn requirement_counts(line: &Requirement) -> String {
    let mut text = counted(line.conditions as u64, "condition");
    if line.not_met > 0 {
        text += &format!(", {} not met", line.not_met);
    }
    if line.without_value > 0 {
        text += &format!(", {} without value", line.without_value);
    }
    text
}

pub(in crate::report) fn worst_text(report: &Report, worst: &WorstCondition) -> String {
    let number = |value: f64| shown(value, report.digits);
    let unit = behind(worst.unit.as_deref());
    let mut text = format!(
        "worst{}: left {}{unit}, right {}{unit}, reserve {}{unit}",
        at_condition(&worst.condition),
        number(worst.left),
        number(worst.right),
        number(worst.reserve)
    );
    if let Some(margin) = worst.margin {
        text += &format!(", margin {}", number(margin));
    }
    text
}

fn freebody(page: &mut Page, item: String, body: &Freebody) {
    let verdict = match (body.closes, &body.taken_up_by) {
        (None, _) => "could not be worked out".to_owned(),
        (Some(false), _) => "DOES NOT CLOSE".to_owned(),
        (Some(true), Some(symbol)) => {
            format!("closes by construction: {symbol} takes up the force sum")
        }
        (Some(true), None) => "closes".to_owned(),
    };
    let lead = padded(&item, LEAD, false);
    page.paragraph(&lead, &format!("\"{}\": {verdict}", body.name));
    if body.closes.is_some() {
        page.paragraph(&" ".repeat(LEAD), &residuals(body));
    }
}

pub(in crate::report) fn residuals(body: &Freebody) -> String {
    let residual = |value: f64| shown(value, RESIDUAL_DIGITS);
    let worst = body.worst.as_ref().filter(|w| !w.0.is_empty());
    let worst = worst.map_or_else(String::new, |worst| {
        format!("; farthest from closing{}", at_condition(worst))
    });
    format!(
        "largest sum over the sum of magnitudes: force {}, axial {}, moment {}{worst}",
        residual(body.force_residual),
        residual(body.axial_residual),
        residual(body.moment_residual)
    )
}

/// Inputs and rows of tables whose remark begins `assumed`, with their item numbers.
pub(in crate::report) fn assumptions(report: &Report, form: &Form) -> Vec<(String, String)> {
    let mut found: Vec<(u32, String)> = Vec::new();
    for quantity in report.quantities.iter().filter(|q| q.input) {
        if let Some(remark) = quantity.remark.as_deref().filter(|r| is_assumed(r)) {
            found.push((quantity.line, format!("{}: {remark}", quantity.symbol)));
        }
    }
    for row in &form.rows {
        let rows = row.table.iter().flat_map(|table| &table.rows);
        for one in rows {
            let key = one.cells.first().map_or("", String::as_str);
            if let Some(remark) = one.remark.as_deref().filter(|r| is_assumed(r)) {
                found.push((row.line, format!("row {key}: {remark}")));
            }
        }
    }
    found.sort_by_key(|(line, _)| *line);
    let items = found.into_iter();
    items
        .map(|(line, text)| (item_of(form, line), text))
        .collect()
}

/// Whether a remark marks its input as an assumption.
fn is_assumed(remark: &str) -> bool {
    let rest = remark.strip_prefix("assumed");
    rest.is_some_and(|rest| !rest.starts_with(char::is_alphanumeric))
}

fn findings(page: &mut Page, report: &Report) {
    page.heading("Findings");
    if report.findings.is_empty() {
        page.line("none");
    }
    for (i, finding) in report.findings.iter().enumerate() {
        let lead = padded(&format!("{}.", i + 1), LEAD, false);
        let place = format!("line {}, column {}", finding.line, finding.column);
        let text = format!("{place}: {}: {}", finding.severity.word(), finding.message);
        page.paragraph(&lead, &text);
        for fix in &finding.fixes {
            page.paragraph(&" ".repeat(LEAD), &format!("fix: {}", fix.title));
        }
    }
}
