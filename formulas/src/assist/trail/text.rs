//! A trail as plain text.

use super::{Step, StepKind, Trail};
use std::fmt::Write as _;

/// Writes a trail, one paragraph a step.
#[must_use]
pub fn write(trail: &Trail) -> String {
    let mut out = String::new();
    for (at, step) in trail.steps.iter().enumerate() {
        if at > 0 {
            out.push('\n');
        }
        paragraph(&mut out, step);
    }
    if trail.cut {
        out += "\nThe trail is longer; this is its beginning.\n";
    }
    out
}

fn paragraph(out: &mut String, step: &Step) {
    let place = match &step.sheet {
        Some(sheet) => format!("sheet {sheet}, line {}", step.line),
        None => format!("line {}", step.line),
    };
    let _ = writeln!(out, "{}   ({place})", head(step));
    match step.kind {
        StepKind::Axis => {
            let _ = writeln!(out, "    axis: {}", step.formula);
        }
        StepKind::Input => {
            let _ = writeln!(out, "    input: {}", step.formula);
        }
        StepKind::Formula | StepKind::Unknown => {
            let sign = if step.kind == StepKind::Formula {
                "= "
            } else {
                ""
            };
            let _ = writeln!(out, "    {sign}{}", step.formula);
            if let Some(numbers) = &step.numbers {
                let _ = writeln!(out, "    = {numbers}");
            }
        }
    }
    for note in &step.notes {
        let _ = writeln!(out, "      {note}");
    }
    if let Some(remark) = &step.remark {
        let _ = writeln!(out, "    ; {remark}");
    }
    for method in &step.methods {
        let _ = writeln!(
            out,
            "    {}: {} {}\n      source: {}",
            method.function, method.what, method.method, method.source
        );
    }
}

/// `P_t at point D, cg aft = 178.2 lb`.
fn head(step: &Step) -> String {
    let condition: Vec<String> = step
        .condition
        .0
        .iter()
        .map(|(axis, label)| format!("{axis} {label}"))
        .collect();
    let at = if condition.is_empty() {
        String::new()
    } else {
        format!(" at {}", condition.join(", "))
    };
    format!("{}{at} = {}", step.symbol, step.shown)
}
