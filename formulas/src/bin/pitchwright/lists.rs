//! The catalogue and the unit list.

use crate::outcome::Outcome;
use engine::quantity::units as table;
use formulas::catalogue::{self, Entry};
use formulas::diagnostics::{Finding, Severity, findings};
use formulas::parse;
use formulas::problem::{Located, Problem};
use formulas::reference::{self, signature};
use formulas::syntax::Tree;

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

fn function(entry: &Entry) -> String {
    let mut out = format!("{}\n{}\n", signature(entry), entry.what);
    let arguments = entry.parameters.iter().map(reference::parameter);
    listed(&mut out, "arguments", arguments);
    listed(&mut out, "gives", reference::results(entry).into_iter());
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

/// All units, or what a unit expression means.
pub(crate) fn units(text: Option<&str>) -> Outcome {
    let Some(text) = text else {
        return Outcome::results(
            table::rows()
                .iter()
                .map(|row| format!("{}\n", reference::unit_row(row)))
                .collect(),
        );
    };
    let (typed, problems) = parse::unit(text);
    let said = said(text, problems);
    if let Some(error) = said.iter().find(|f| f.severity == Severity::Error) {
        return Outcome::usage(&error.message);
    }
    let advice = said.iter().map(|finding| format!("{}\n", finding.message));
    match reference::unit_meaning(&typed) {
        Ok(line) => Outcome {
            diagnostics: advice.collect(),
            ..Outcome::results(line + "\n")
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
