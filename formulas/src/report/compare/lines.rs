//! Differences as text.

use super::{
    Differences, GoverningDifference, QuantityDifference, RequirementDifference, Value,
    ValueChange, Verdict,
};
use crate::report::{Condition, Extreme, json};

/// The differences as text, a line each, numbers in full.
#[must_use]
pub fn write(differences: &Differences) -> String {
    let quantities = differences.quantities.iter().flat_map(quantity_lines);
    let governing = differences.governing.iter().map(governing_line);
    let requirements = differences.requirements.iter().map(requirement_line);
    let sections = [
        ("quantities", quantities.collect::<Vec<_>>()),
        ("governing", governing.collect()),
        ("requirements", requirements.collect()),
    ];
    let mut out = String::new();
    for (heading, lines) in sections.iter().filter(|(_, lines)| !lines.is_empty()) {
        out += &format!("{heading}\n");
        lines.iter().for_each(|line| out += &format!("  {line}\n"));
    }
    if out.is_empty() {
        out.push_str("no difference\n");
    }
    out
}

fn quantity_lines(found: &QuantityDifference) -> Vec<String> {
    let symbol = &found.symbol;
    let [old_unit, new_unit] = [&found.old_unit, &found.new_unit].map(|u| unit_text(u.as_deref()));
    let mut lines = match (found.in_old, found.in_new) {
        (false, _) => vec![format!("{symbol}: only in the new sheet")],
        (_, false) => vec![format!("{symbol}: only in the old sheet")],
        _ => Vec::new(),
    };
    let changes = found.changes.iter();
    lines.extend(changes.map(|change| value_line(symbol, change, &old_unit, &new_unit)));
    if found.changes.is_empty() && found.in_old && found.in_new {
        lines.push(format!("{symbol}: unit{old_unit} ->{new_unit}"));
    }
    let left = found.conditions.saturating_sub(found.changes.len());
    if left > 0 {
        lines.push(format!("{symbol}: and {left} more conditions"));
    }
    lines
}

fn value_line(symbol: &str, change: &ValueChange, old_unit: &str, new_unit: &str) -> String {
    let mut line = format!(
        "{symbol}{}: {} -> {}",
        at(&change.condition),
        value_text(change.old.as_ref(), old_unit),
        value_text(change.new.as_ref(), new_unit)
    );
    if let Some(change) = change.change {
        line += &format!(", change {}{new_unit}", json::plain_number(change));
    }
    line
}

fn governing_line(found: &GoverningDifference) -> String {
    let unit = unit_text(found.unit.as_deref());
    let one = |extreme: &Option<Extreme>| match extreme {
        Some(e) => format!("{}{unit}{}", json::plain_number(e.value), at(&e.condition)),
        None => "no value".to_owned(),
    };
    let group = found
        .group
        .0
        .iter()
        .map(|(axis, label)| format!(" {axis} {label}"));
    let group: String = group.collect();
    let mut line = format!(
        "{} {}{group}: {} -> {}",
        found.of,
        found.symbol,
        one(&found.old),
        one(&found.new)
    );
    if let Some(change) = found.change {
        line += &format!(", change {}{unit}", json::plain_number(change));
    }
    line
}

fn requirement_line(found: &RequirementDifference) -> String {
    let one = |verdict: &Option<Verdict>| match verdict {
        Some(verdict) => verdict_text(verdict),
        None => "not there".to_owned(),
    };
    let mut line = format!("{}: {} -> {}", found.text, one(&found.old), one(&found.new));
    if let Some(change) = found.change {
        let worst = found.new.as_ref().and_then(|v| v.worst.as_ref());
        let unit = unit_text(worst.and_then(|w| w.unit.as_deref()));
        line += &format!(", change of reserve {}{unit}", json::plain_number(change));
    }
    line
}

fn verdict_text(verdict: &Verdict) -> String {
    let word = match verdict.met {
        Some(true) => "met",
        Some(false) => "not met",
        None => "not shown",
    };
    let worst = verdict.worst.as_ref().map(|worst| {
        let unit = unit_text(worst.unit.as_deref());
        let reserve = json::plain_number(worst.reserve);
        format!(", reserve {reserve}{unit}{}", at(&worst.condition))
    });
    format!("{word}{}", worst.unwrap_or_default())
}

fn value_text(value: Option<&Value>, unit: &str) -> String {
    match value {
        Some(Value::Number(number)) => format!("{}{unit}", json::plain_number(*number)),
        Some(Value::Condition(truth)) => truth.to_string(),
        Some(Value::Text(text)) => format!("\"{text}\""),
        None => "no value".to_owned(),
    }
}

fn unit_text(unit: Option<&str>) -> String {
    unit.map_or_else(String::new, |unit| format!(" {unit}"))
}

fn at(condition: &Condition) -> String {
    let pairs = condition.0.iter();
    let pairs: Vec<String> = pairs
        .map(|(axis, label)| format!("{axis} {label}"))
        .collect();
    match pairs.len() {
        0 => String::new(),
        _ => format!(" at {}", pairs.join(", ")),
    }
}
