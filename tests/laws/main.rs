//! The laws that hold for every sheet, tried on generated ones, and the limits. `cargo abuse` tries more of them.

use formulas::Sheet;
use tests::laws::{LAWS, share_with_values};
use tests::random::Random;

/// Sheets to a law: more of them are tried by hand, see the contributors' guide.
const SHEETS: u64 = 60;

#[test]
fn every_law_holds_for_generated_sheets() {
    for (name, law) in LAWS {
        for seed in 1..=SHEETS {
            let held = law(seed);
            assert!(held.is_ok(), "{name}, seed {seed}: {}", held.unwrap_err());
        }
    }
}

#[test]
fn most_generated_lines_have_values() {
    let share = share_with_values(1..200);
    assert!(share > 0.7, "only {share} of the sheets");
}

#[test]
fn no_mutation_of_a_sheet_breaks_a_stage() {
    let corpus = tests::mutate::corpus();
    assert!(corpus.len() > 100, "only {} texts", corpus.len());
    for (name, target) in tests::mutate::TARGETS {
        for seed in 1..=SHEETS {
            let text = tests::mutate::mutated(&corpus, &mut Random::new(seed));
            let held = target(&text);
            assert!(held.is_ok(), "{name}, seed {seed}: {}", held.unwrap_err());
        }
    }
}

/// Texts beyond each limit, with the code that tells so.
fn beyond_limits() -> Vec<(String, &'static str)> {
    let deep = format!("x = {}1{}\n", "(".repeat(5000), ")".repeat(5000));
    let doubling: String = (1..=40)
        .map(|i| format!("f{i}(x) = f{}(x) + f{}(x)\n", i - 1, i - 1))
        .collect();
    let axes: String = (0..8)
        .map(|i| {
            let labels: Vec<String> = (0..30).map(|l| l.to_string()).collect();
            format!(
                "vary a{i}: {}\nv{i} by a{i} = {}\n",
                labels.join(" | "),
                labels.join(" | ")
            )
        })
        .collect();
    let product: Vec<String> = (0..8).map(|i| format!("v{i}")).collect();
    vec![
        (format!("x = 1{}\n", "+1".repeat(100_000)), "operator-limit"),
        (deep, "nesting-limit"),
        (format!("x = {}1\n", "-".repeat(50_000)), "nesting-limit"),
        (
            format!("f0(x) = x + 1\n{doubling}y = f40(2)\n"),
            "operator-limit",
        ),
        (
            format!("{axes}y = {}\n", product.join("*")),
            "condition-limit",
        ),
        ("x [ft] = 1 ; r\n".repeat(360_000), "sheet-too-large"),
        (
            (0..70).map(|i| format!("vary a{i}: p | q\n")).collect(),
            "axis-limit",
        ),
        (
            "vary a [1]: 0 to 1000000 step 1\n".to_owned(),
            "label-limit",
        ),
    ]
}

#[test]
fn limits_answer_with_a_finding() {
    for (text, code) in beyond_limits() {
        let report = Sheet::open(&format!("z = 3\n{text}")).report(&[]);
        assert!(
            report.findings.iter().any(|f| f.code == code),
            "{code}: {:?}",
            report.findings.first()
        );
        let kept = serde_json::to_value(&report.quantity("z").expect("z").values).expect("plain");
        assert_eq!(kept, serde_json::json!([3.0]), "{code} hides another value");
    }
}
