//! Against the outside: published values, each run through a sheet as a designer would type it, with its source beside
//! it. `cargo test -p tests --test checks -- --nocapture` prints the table.

mod example;

use formulas::Sheet;
use formulas::report::Report;

/// The rows, in blocks.
const PUBLISHED: &str = include_str!("published.cases");
/// The rows that do not apply.
const LEFT_OUT: &str = include_str!("left-out.txt");

/// One check.
struct Check {
    id: String,
    quantity: String,
    kind: String,
    source: String,
    symbol: String,
    expected: f64,
    unit: String,
    relative: bool,
    within: f64,
    sheet: String,
}

fn checks() -> Vec<Check> {
    PUBLISHED.split("\n--- ").skip(1).map(block).collect()
}

fn block(text: &str) -> Check {
    let mut lines = text.lines();
    let id = lines
        .next()
        .unwrap_or("")
        .trim_end_matches(" ---")
        .to_owned();
    let mut word = |word: &str| {
        let line = lines.next().unwrap_or("");
        line.strip_prefix(word)
            .unwrap_or_else(|| panic!("{id}: {word} is due, not {line}"))
            .trim()
            .to_owned()
    };
    let (quantity, kind, source, expect) = (
        word("quantity"),
        word("kind"),
        word("source"),
        word("expect"),
    );
    let (symbol, rest) = expect.split_once(" = ").expect("symbol = value");
    let (value, rest) = rest.split_once(" [").expect("[unit]");
    let (unit, rest) = rest.split_once("] within ").expect("within");
    let (grade, within) = rest.split_once(' ').expect("abs or rel");
    Check {
        quantity,
        kind,
        source,
        symbol: symbol.to_owned(),
        expected: value.parse().expect("a number"),
        unit: unit.to_owned(),
        relative: grade == "rel",
        within: within.parse().expect("a number"),
        sheet: lines.map(|l| format!("{l}\n")).collect(),
        id,
    }
}

/// The one value of a quantity, in its unit.
fn value(report: &Report, symbol: &str, unit: &str) -> Option<f64> {
    let quantity = report.quantity(symbol)?;
    let value = serde_json::to_value(&quantity.values)
        .ok()?
        .as_array()?
        .first()?
        .as_f64()?;
    assert_eq!(
        quantity.unit.as_deref().unwrap_or("1"),
        unit,
        "the unit of {symbol}"
    );
    Some(value)
}

#[test]
fn published_values_come_out_of_sheets() {
    let all = checks();
    assert!(all.len() > 130, "only {} checks", all.len());
    let mut wrong = Vec::new();
    for check in &all {
        assert!(
            !check.source.is_empty() && !check.kind.is_empty(),
            "{} has no source",
            check.id
        );
        let report = Sheet::open(&check.sheet).report(&[]);
        let Some(obtained) = value(&report, &check.symbol, &check.unit) else {
            let messages: Vec<&str> = report.findings.iter().map(|f| f.message.as_str()).collect();
            wrong.push(format!("{}: no value: {}", check.id, messages.join(" ")));
            continue;
        };
        let difference = obtained - check.expected;
        let allowed = if check.relative {
            check.within * check.expected.abs()
        } else {
            check.within
        };
        println!(
            "{:16} {:40.40} {:14.6e} {:14.6e} {:10.1e} {:8.0e} {} ({})",
            check.id,
            check.quantity,
            check.expected,
            obtained,
            difference,
            allowed,
            check.source,
            check.kind
        );
        if difference.is_nan() || difference.abs() > allowed {
            wrong.push(format!(
                "{}: expected {}, obtained {obtained}",
                check.id, check.expected
            ));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn what_is_left_out_has_its_reason() {
    let ids: Vec<String> = checks().into_iter().map(|c| c.id).collect();
    for line in LEFT_OUT.lines().skip(2) {
        let (id, reason) = line.split_once(": ").expect("id: reason");
        assert!(
            !reason.is_empty() && !ids.iter().any(|i| i == id),
            "{id} is checked and left out"
        );
    }
    let mut sorted = ids.clone();
    sorted.sort();
    sorted.dedup();
    assert_eq!(sorted.len(), ids.len(), "an id stands twice");
}
