//! Against the outside: published and independently computed values, each worked out by a sheet as a designer would type
//! it, with its source beside it. `cargo test -p tests --test checks -- --nocapture` prints the table.

mod example;
mod rows;
mod starting;

use formulas::Sheet;
use formulas::diagnostics::Severity;
use formulas::report::{Report, ValueList};
use rows::Row;
use std::collections::{BTreeMap, BTreeSet};
use std::sync::OnceLock;

/// The text of a sheet beside this file, with its name.
macro_rules! sheet {
    ($name:literal) => {
        (
            $name,
            include_str!(concat!("sheets/", $name, ".pitchwright")),
        )
    };
}

/// The sheets, by the name of their file.
const SHEETS: [(&str, &str); 20] = [
    sheet!("airspeeds"),
    sheet!("atmosphere"),
    sheet!("balancing-loads"),
    sheet!("envelope"),
    sheet!("exact-sections"),
    sheet!("general-aviation-airplane"),
    sheet!("load-test"),
    sheet!("loads-and-bodies"),
    sheet!("mapped-sections"),
    sheet!("mean-lines"),
    sheet!("measured-sections"),
    sheet!("mass-and-planform"),
    sheet!("model-and-elevator"),
    sheet!("moment-transfer"),
    sheet!("symmetric-manoeuvre"),
    sheet!("tail-increments"),
    sheet!("trim-problems"),
    sheet!("units"),
    sheet!("wind-tunnel-model"),
    sheet!("wings"),
];

/// The reports of all sheets, worked out once.
fn reports() -> &'static BTreeMap<&'static str, Report> {
    static REPORTS: OnceLock<BTreeMap<&str, Report>> = OnceLock::new();
    REPORTS.get_or_init(|| {
        SHEETS
            .iter()
            .map(|(name, text)| (*name, Sheet::open(text).report(&[])))
            .collect()
    })
}

/// What a row gives in its report, in the unit of the row; a sentence where it gives nothing.
fn obtained(row: &Row, reports: &BTreeMap<&'static str, Report>) -> Result<f64, String> {
    let place = row.place.as_ref().ok_or("left out")?;
    let report = reports
        .get(place.sheet.as_str())
        .ok_or(format!("there is no sheet {}", place.sheet))?;
    let quantity = report
        .quantity(&place.symbol)
        .ok_or(format!("there is no symbol {}", place.symbol))?;
    let unit = quantity.unit.as_deref().unwrap_or("1");
    if unit != row.unit {
        return Err(format!(
            "{} is in {unit}, not in {}",
            place.symbol, row.unit
        ));
    }
    let at = condition(report, &quantity.axes, &place.condition)?;
    match &quantity.values {
        Some(ValueList::Numbers(list)) => list.get(at).copied().flatten(),
        _ => None,
    }
    .ok_or(format!("{} has no value there", place.symbol))
}

/// Number of a condition, row-major over the axes, by the labels of all of them.
fn condition(
    report: &Report,
    axes: &[String],
    labels: &[(String, String)],
) -> Result<usize, String> {
    if axes.len() != labels.len() {
        return Err(format!("{} axes, {} labels", axes.len(), labels.len()));
    }
    axes.iter().try_fold(0, |at, name| {
        let axis = report.axes.iter().find(|a| a.name == *name);
        let axis = axis.ok_or(format!("there is no axis {name}"))?;
        let label = labels.iter().find(|(axis, _)| axis == name);
        let (_, label) = label.ok_or(format!("no label of {name}"))?;
        let position = axis.labels.iter().position(|l| l == label);
        let position = position.ok_or(format!("{name} has no label {label}"))?;
        Ok(at * axis.labels.len() + position)
    })
}

#[test]
fn published_values_come_out_of_sheets() {
    let reports = reports();
    let mut wrong = Vec::new();
    println!(
        "{:18} {:44} {:>16} {:>16} {:>10} {:>10}  unit, source (kind)",
        "row", "quantity", "expected", "obtained", "difference", "tolerance"
    );
    for row in rows::all().iter().filter(|row| row.place.is_some()) {
        let value = match obtained(row, reports) {
            Ok(value) => value,
            Err(why) => {
                wrong.push(format!("{}: {why}", row.id));
                continue;
            }
        };
        let difference = value - row.expected;
        let allowed = row.tolerance.of(row.expected);
        println!(
            "{:18} {:44.44} {:16.9e} {value:16.9e} {difference:10.1e} {allowed:10.1e}  {}, {} ({})",
            row.id, row.quantity, row.expected, row.unit, row.source, row.kind
        );
        if difference.is_nan() || difference.abs() > allowed {
            wrong.push(format!(
                "{}: expected {} {}, obtained {value}, tolerance {allowed:e}",
                row.id, row.expected, row.unit
            ));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn every_row_is_worked_out_or_left_out_for_a_reason() {
    let all = rows::all();
    let ids: BTreeSet<&str> = all.iter().map(|row| row.id.as_str()).collect();
    assert_eq!(ids.len(), all.len(), "an id stands twice");
    for row in &all {
        match &row.place {
            Some(place) => assert!(
                !place.symbol.is_empty() && SHEETS.iter().any(|(name, _)| *name == place.sheet),
                "{} stands in no sheet",
                row.id
            ),
            None => {
                assert!(row.note.len() > 20, "{} is left out without reason", row.id);
                println!("left out: {} ({}): {}", row.id, row.quantity, row.note);
            }
        }
        // A tolerance as large as the value would let nought pass.
        let allowed = row.tolerance.of(row.expected);
        assert!(
            row.place.is_none() || row.expected == 0.0 || allowed < 0.5 * row.expected.abs(),
            "{} would pass whatever the program gives",
            row.id
        );
    }
    for (name, _) in SHEETS {
        assert!(
            all.iter()
                .any(|row| row.place.as_ref().is_some_and(|p| p.sheet == name)),
            "no row looks at {name}"
        );
    }
}

/// How many values of each subject there are, so that a lost line of a table shows.
#[test]
fn the_tables_are_whole() {
    let counts = [
        ("moment", 17),
        ("balance", 55),
        ("trim", 26),
        ("mass", 30),
        ("atmosphere", 304),
        ("units", 32),
        ("envelope", 70),
        ("structure", 14),
        ("section", 140),
        ("wing", 89),
    ];
    for (name, count) in counts {
        assert_eq!(rows::table(name).len(), count, "{name}");
    }
}

#[test]
fn the_sheets_are_sound() {
    for (name, report) in reports() {
        for finding in &report.findings {
            assert_eq!(
                finding.severity,
                Severity::Advice,
                "{name}:{}: {}",
                finding.line,
                finding.message
            );
        }
        for requirement in &report.requirements {
            assert_eq!(requirement.met, Some(true), "{name}: {}", requirement.text);
        }
        for body in &report.freebodies {
            assert_eq!(body.closes, Some(true), "{name}: {}", body.name);
        }
    }
}
