//! What stands behind the lines: what governs, one condition worked in full, requirements, sensitivity, drawings,
//! findings.

use super::tables;
use crate::assist::trail::Trail;
use crate::numbers::shown;
use crate::report::svg::escaped;
use crate::report::text::closing::{
    corner_inputs, item_of, requirement_counts, residuals, worst_text,
};
use crate::report::text::{at_condition, behind, condition_text, counted};
use crate::report::{Extreme, Form, Freebody, Governing, Report, Requirement};
use std::fmt::Write as _;

fn heading(out: &mut String, text: &str) {
    let _ = writeln!(out, "<h2>{text}</h2>");
}

fn paragraph(out: &mut String, text: &str) {
    let _ = writeln!(out, "<p>{}</p>", escaped(text));
}

pub(super) fn governing(out: &mut String, report: &Report) {
    if report.governing.is_empty() {
        return;
    }
    heading(out, "Governing conditions");
    let mut rows = Vec::new();
    for line in &report.governing {
        rows.push(governing_row(
            report,
            line,
            "all",
            line.largest.as_ref(),
            line.smallest.as_ref(),
        ));
        for group in line.groups.iter().filter(|g| !g.condition.0.is_empty()) {
            let (largest, smallest) = (group.largest.as_ref(), group.smallest.as_ref());
            let of = condition_text(&group.condition);
            rows.push(governing_row(report, line, &of, largest, smallest));
        }
    }
    let heads = [
        "symbol", "unit", "of", "largest", "where", "smallest", "where", "out of",
    ];
    tables::table(out, &heads, &rows, heads.len());
}

fn governing_row(
    report: &Report,
    line: &Governing,
    of: &str,
    largest: Option<&Extreme>,
    smallest: Option<&Extreme>,
) -> Vec<String> {
    let value = |e: Option<&Extreme>| {
        e.map_or_else(|| "no value".to_owned(), |e| shown(e.value, report.digits))
    };
    let place = |e: Option<&Extreme>| e.map_or_else(String::new, |e| condition_text(&e.condition));
    let mut count = counted(line.conditions as u64, "condition");
    for (number, what) in [
        (line.without_value, "without value"),
        (line.excluded, "excluded"),
    ] {
        if number > 0 {
            count += &format!(", {number} {what}");
        }
    }
    vec![
        line.symbol.clone(),
        line.unit.clone().unwrap_or_default(),
        of.to_owned(),
        value(largest),
        place(largest),
        value(smallest),
        place(smallest),
        count,
    ]
}

/// One condition with numbers in every formula.
pub(super) fn worked(out: &mut String, trail: Option<&Trail>) {
    let Some((trail, first)) = trail.and_then(|t| Some((t, t.steps.first()?))) else {
        return;
    };
    let title = format!(
        "{}{}, worked in full",
        first.symbol,
        at_condition(&first.condition)
    );
    heading(out, &escaped(&title));
    let rows: Vec<Vec<String>> = trail
        .steps
        .iter()
        .rev()
        .map(|step| {
            let symbol = match &step.sheet {
                Some(sheet) => format!("{sheet}.{}", step.symbol),
                None => step.symbol.clone(),
            };
            let formula = match &step.numbers {
                Some(numbers) => format!("{} = {numbers}", step.formula),
                None => step.formula.clone(),
            };
            let mut remark: Vec<String> = step.remark.iter().cloned().collect();
            remark.extend(step.notes.iter().cloned());
            vec![
                symbol,
                condition_text(&step.condition),
                formula,
                step.shown.clone(),
                remark.join("; "),
            ]
        })
        .collect();
    tables::table(
        out,
        &[
            "symbol",
            "condition",
            "formula, with numbers",
            "result",
            "remark",
        ],
        &rows,
        5,
    );
    if trail.cut {
        paragraph(out, "There are more steps than are printed.");
    }
}

pub(super) fn requirements(out: &mut String, report: &Report, form: &Form) {
    if report.requirements.is_empty() {
        return;
    }
    heading(out, "Requirements");
    *out += "<table><thead><tr><th>item</th><th>required</th><th>result</th><th>worst condition, reserve and margin</th></tr></thead><tbody>\n";
    for line in &report.requirements {
        requirement(out, report, &item_of(form, line.line), line);
    }
    *out += "</tbody></table>\n";
}

fn requirement(out: &mut String, report: &Report, item: &str, line: &Requirement) {
    let verdict = match line.met {
        Some(true) => "met",
        Some(false) => "<span class=\"bad\">NOT MET</span>",
        None => "<span class=\"bad\">NOT SHOWN</span>",
    };
    let mut detail = requirement_counts(line);
    if let Some(worst) = &line.worst {
        detail += &format!("; {}", worst_text(report, worst));
    }
    if let Some(met) = line.met_at_worst {
        let word = if met { "met" } else { "NOT MET" };
        detail += &format!("; with all tolerances at their worst: {word}");
    }
    let reason = line
        .reason
        .as_deref()
        .map_or_else(String::new, |r| format!(" ({r})"));
    let _ = writeln!(
        out,
        "<tr><td>{}</td><td class=\"f\">{}{}</td><td>{verdict}</td><td>{}</td></tr>",
        escaped(item),
        escaped(&line.text),
        escaped(&reason),
        escaped(&detail)
    );
}

/// Which inputs with tolerances move what governs and what is required.
pub(super) fn sensitivity(out: &mut String, report: &Report) {
    let mut rows: Vec<Vec<String>> = Vec::new();
    let mut row = |of: String, unit: Option<&str>, symbol: String, effect: f64, share: f64| {
        let effect = format!("{}{}", shown(effect, report.digits), behind(unit));
        rows.push(vec![
            of,
            symbol,
            effect,
            format!("{} %", shown(share * 100.0, 2)),
        ]);
    };
    for line in &report.governing {
        for s in &line.sensitivity {
            let symbol = format!("{}{}", s.symbol, at_condition(&s.condition));
            row(
                format!("{} {}", s.of, line.symbol),
                line.unit.as_deref(),
                symbol,
                s.effect,
                s.share,
            );
        }
    }
    for line in &report.requirements {
        let unit = line.worst.as_ref().and_then(|w| w.unit.as_deref());
        for s in &line.sensitivity {
            let symbol = format!("{}{}", s.symbol, at_condition(&s.condition));
            row(
                format!("reserve of {}", line.text),
                unit,
                symbol,
                s.effect,
                s.share,
            );
        }
    }
    if rows.is_empty() {
        return;
    }
    heading(out, "Sensitivity to the tolerances of inputs");
    tables::table(out, &["of", "input", "effect", "share"], &rows, 2);
    corners(out, report);
}

/// The worst corners, and whether another condition could govern.
fn corners(out: &mut String, report: &Report) {
    for line in &report.governing {
        for corner in &line.corners {
            let value = format!(
                "{}{}",
                shown(corner.value, report.digits),
                behind(line.unit.as_deref())
            );
            let place = at_condition(&corner.condition);
            let text = format!(
                "{} {}, worst corner: {value}{place} ({})",
                corner.of,
                line.symbol,
                corner_inputs(&corner.inputs)
            );
            paragraph(out, &text);
        }
        for others in &line.others {
            let named: Vec<String> = others
                .conditions
                .iter()
                .take(10)
                .map(condition_text)
                .collect();
            let count = counted(others.conditions.len() as u64, "other condition");
            let text = format!(
                "{} {}: within the tolerances {count} could govern: {}",
                others.of,
                line.symbol,
                named.join("; ")
            );
            paragraph(out, &text);
        }
    }
}

pub(super) fn figures(out: &mut String, report: &Report) {
    if report.figures.is_empty() {
        return;
    }
    heading(out, "Figures");
    for figure in &report.figures {
        let _ = writeln!(out, "<figure>{}</figure>", figure.svg);
    }
}

pub(super) fn freebodies(out: &mut String, report: &Report, form: &Form) {
    if report.freebodies.is_empty() {
        return;
    }
    heading(out, "Free bodies");
    for body in &report.freebodies {
        let text = format!(
            "item {}, {}: {}",
            item_of(form, body.line),
            body.name,
            closing(body)
        );
        let _ = writeln!(out, "<section class=\"whole\"><p>{}</p>", escaped(&text));
        if body.closes.is_some() {
            let _ = writeln!(out, "<p class=\"small\">{}</p>", escaped(&residuals(body)));
        }
        if let Some(svg) = &body.svg {
            let _ = writeln!(out, "<figure>{svg}</figure>");
        }
        *out += "</section>\n";
    }
}

fn closing(body: &Freebody) -> String {
    match (body.closes, &body.taken_up_by) {
        (None, _) => "could not be worked out".to_owned(),
        (Some(false), _) => "DOES NOT CLOSE".to_owned(),
        (Some(true), Some(symbol)) => {
            format!("closes by construction: {symbol} takes up the force sum")
        }
        (Some(true), None) => "closes".to_owned(),
    }
}

pub(super) fn findings(out: &mut String, report: &Report) {
    heading(out, "Findings");
    if report.findings.is_empty() {
        return paragraph(out, "None.");
    }
    *out += "<ol>\n";
    for finding in &report.findings {
        let text = format!(
            "line {}, {}: {}",
            finding.line,
            finding.severity.word(),
            finding.message
        );
        let _ = writeln!(out, "<li>{}</li>", escaped(&text));
    }
    *out += "</ol>\n";
}
