//! The catalogue and the unit list.

use crate::outcome::Outcome;
use engine::quantity::{Dimension, SpeedKind, Unit, UnitRow, units as table};
use formulas::catalogue::{self, Entry, Field, Gives, Parameter, Wants};
use formulas::diagnostics::{Finding, Severity, findings};
use formulas::parse;
use formulas::problem::{Located, Problem};
use formulas::report::json::plain_number;
use formulas::syntax::{Tree, UnitText};

/// All functions by group, or everything about one.
pub(crate) fn functions(name: Option<&str>) -> Outcome {
    match name {
        None => Outcome::results(all_functions()),
        Some(name) => match catalogue::entry(name) {
            Some(entry) => Outcome::results(function(entry)),
            None => Outcome::usage(&format!("there is no function `{name}`")),
        },
    }
}

fn all_functions() -> String {
    let mut out = String::new();
    let mut group = "";
    for entry in catalogue::entries() {
        if entry.group != group {
            group = entry.group;
            let gap = if out.is_empty() { "" } else { "\n" };
            out += &format!("{gap}{group}\n");
        }
        out += &format!("  {}\n      {}\n", signature(entry), entry.what);
    }
    out
}

/// `dynamic_pressure(V, rho)`.
fn signature(entry: &Entry) -> String {
    let names: Vec<&str> = entry.parameters.iter().map(|p| p.name).collect();
    format!("{}({})", entry.name, names.join(", "))
}

fn function(entry: &Entry) -> String {
    let mut out = format!("{}\n{}\n", signature(entry), entry.what);
    let arguments = entry.parameters.iter().map(parameter_line);
    let fields = entry.fields.iter().map(|field| field_line(entry, field));
    listed(&mut out, "arguments", arguments);
    listed(&mut out, "gives", fields);
    let facts = [
        ("method", entry.method),
        ("holds", entry.holds),
        ("source", entry.source),
    ];
    for (word, text) in facts.iter().filter(|(_, text)| !text.is_empty()) {
        out += &format!("{word}: {text}\n");
    }
    listed(
        &mut out,
        "example",
        entry.example.lines().map(str::to_owned),
    );
    out
}

fn listed(out: &mut String, heading: &str, lines: impl Iterator<Item = String>) {
    let lines: Vec<String> = lines.collect();
    if lines.is_empty() {
        return;
    }
    *out += &format!("{heading}:\n");
    lines.iter().for_each(|line| *out += &format!("  {line}\n"));
}

fn parameter_line(parameter: &Parameter) -> String {
    let mut line = format!("{}: {}", parameter.name, wanted(parameter.wants));
    if let Some(kind) = parameter.speed {
        line += &format!(" ({})", kind.name());
    }
    if parameter.difference {
        line += ", a difference";
    }
    if parameter.line {
        line += ", a whole line of values";
    }
    match parameter.default {
        Some(value) if value.is_nan() => line += ", may be left out",
        Some(value) => line += &format!(", {} in SI where left out", plain_number(value)),
        None => {}
    }
    line
}

fn wanted(wants: Wants) -> String {
    match wants {
        Wants::Dimension(dimension) => dimension_text(dimension),
        Wants::ForceOrMass | Wants::MassOrWeight => "force or mass".to_owned(),
        Wants::Text => "text".to_owned(),
        Wants::Any => "any dimension".to_owned(),
        Wants::Condition => "condition".to_owned(),
    }
}

fn field_line(entry: &Entry, field: &Field) -> String {
    let dimension = match field.gives {
        Gives::Dimension(dimension) => dimension_text(dimension),
        Gives::Argument(index, factor) => {
            let argument = entry.parameters.get(index).map_or("argument", |p| p.name);
            if factor == Dimension::NONE {
                format!("dimension of {argument}")
            } else {
                format!("dimension of {argument} times {}", dimension_text(factor))
            }
        }
    };
    let head = if field.name.is_empty() {
        dimension
    } else {
        format!("{}: {dimension}", field.name)
    };
    let kind = field.speed.map(SpeedKind::name);
    let kind = kind.map_or_else(String::new, |kind| format!(" ({kind})"));
    let what = if field.what.is_empty() {
        String::new()
    } else {
        format!(", {}", field.what)
    };
    format!("{head}{kind}{what}")
}

fn dimension_text(dimension: Dimension) -> String {
    match dimension.name() {
        Some(name) => name.to_owned(),
        None => dimension.symbols(),
    }
}

/// All units, or what a unit expression means.
pub(crate) fn units(text: Option<&str>) -> Outcome {
    let Some(text) = text else {
        return Outcome::results(table::rows().iter().map(unit_row).collect());
    };
    let (typed, problems) = parse::unit(text);
    let said = said(text, problems);
    if let Some(error) = said.iter().find(|f| f.severity == Severity::Error) {
        return Outcome::usage(&error.message);
    }
    let advice = said.iter().map(|finding| format!("{}\n", finding.message));
    match meaning(&typed) {
        Ok(line) => Outcome {
            diagnostics: advice.collect(),
            ..Outcome::results(line)
        },
        Err(message) => Outcome::usage(&message),
    }
}

/// The problems of a unit expression in words.
fn said(text: &str, problems: Vec<Problem>) -> Vec<Finding> {
    let located = problems.into_iter().map(|problem| Located {
        statement: None,
        problem,
    });
    let located: Vec<Located> = located.collect();
    findings(&located, &Tree::default(), text)
}

fn unit_row(row: &UnitRow) -> String {
    let prefixes = if row.prefixes {
        "; takes SI prefixes"
    } else {
        ""
    };
    let unit = Unit::of_row(row);
    format!(
        "{}: {}, {}{prefixes}; {}\n",
        row.symbols.join(" "),
        row.name,
        value_text(unit),
        row.source
    )
}

fn meaning(typed: &UnitText) -> Result<String, String> {
    let unit = composed(typed)?;
    Ok(format!(
        "1 {} is {}; {}\n",
        typed.text,
        value_text(unit),
        dimension_text(unit.dimension)
    ))
}

/// The unit that the factors make.
fn composed(typed: &UnitText) -> Result<Unit, String> {
    let mut whole: Option<Unit> = None;
    for factor in &typed.factors {
        let name = &factor.name.text;
        let unit = Unit::named(name).ok_or_else(|| format!("there is no unit `{name}`"))?;
        let unit = if factor.power == 1 {
            Some(unit)
        } else {
            unit.power(factor.power)
        };
        whole = match (whole, unit) {
            (None, unit) => unit,
            (Some(whole), Some(unit)) => whole.times(unit),
            (Some(_), None) => None,
        };
        if whole.is_none() {
            return Err(format!("the powers in `{}` are too large", typed.text));
        }
    }
    let whole = whole.unwrap_or(Unit::ONE);
    match &typed.kind {
        None => Ok(whole),
        Some(word) => SpeedKind::of_word(&word.text)
            .map(|kind| whole.of_kind(kind))
            .ok_or_else(|| format!("`{}` is no kind of airspeed", word.text)),
    }
}

/// `4.4482216152605 kg.m/s^2`, with the zero of a temperature scale and the kind of a speed.
fn value_text(unit: Unit) -> String {
    let mut text = format!(
        "{} {}",
        plain_number(unit.factor.value()),
        unit.dimension.symbols()
    );
    if unit.absolute {
        text += &format!(", its zero at {} K", plain_number(unit.to_si(0.0)));
    }
    if let Some(kind) = unit.speed_kind {
        text += &format!(" ({})", kind.name());
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Exact by definition: NIST SP 811, appendix B.8 (pound-force, knot, degree Celsius).
    #[test]
    fn a_unit_expression_says_what_it_means() {
        for (text, expected) in [
            ("lb", "1 lb is 4.4482216152605 kg.m/s^2; force\n"),
            ("kg/m^3", "1 kg/m^3 is 1 kg/m^3; density\n"),
            (
                "KEAS",
                "1 KEAS is 0.5144444444444445 m/s (equivalent airspeed); speed\n",
            ),
            ("degC", "1 degC is 1 K, its zero at 273.15 K; temperature\n"),
        ] {
            assert_eq!(units(Some(text)), Outcome::results(expected.to_owned()));
        }
        assert_eq!(units(Some("furlong")).status, crate::outcome::BAD_USAGE);
    }

    #[test]
    fn the_list_has_every_unit_and_the_catalogue_every_function() {
        let list = units(None).results;
        assert_eq!(list.lines().count(), table::rows().len());
        let all = functions(None).results;
        for entry in catalogue::entries() {
            assert!(all.contains(&signature(entry)), "{}", entry.name);
            let one = functions(Some(entry.name)).results;
            assert!(one.contains(entry.source), "{}", entry.name);
        }
        assert_eq!(functions(Some("no_such")).status, crate::outcome::BAD_USAGE);
    }
}
