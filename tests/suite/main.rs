//! The golden sheets: what the program says of each is what its case notes, no more and no less.

use std::collections::BTreeSet;
use tests::golden::{applied, cases, files, noted};

#[test]
fn every_case_says_what_it_notes() {
    let mut names = BTreeSet::new();
    let mut wrong = Vec::new();
    for file in files() {
        let text = std::fs::read_to_string(&file).expect("a case file");
        for case in cases(&text) {
            assert!(
                names.insert(case.name.clone()),
                "two cases are called {}",
                case.name
            );
            assert!(
                !case.prose.trim().is_empty(),
                "{} does not say what it proves",
                case.name
            );
            let now = noted(&case);
            if now != case.stored {
                wrong.push(format!(
                    "--- {} ---\nnoted:\n{}\nfound:\n{now}",
                    case.name, case.stored
                ));
            }
        }
    }
    assert!(names.len() > 60, "only {} cases", names.len());
    assert!(
        wrong.is_empty(),
        "{} cases differ:\n{}",
        wrong.len(),
        wrong.join("\n")
    );
}

#[test]
fn a_safe_fix_removes_its_problem_and_adds_none() {
    let mut tried = 0;
    for file in files() {
        let text = std::fs::read_to_string(&file).expect("a case file");
        for case in cases(&text) {
            let report = case.opened(&case.sheet).report(&[]);
            let errors = |r: &formulas::report::Report| {
                r.findings
                    .iter()
                    .filter(|f| f.severity == formulas::diagnostics::Severity::Error)
                    .count()
            };
            for finding in &report.findings {
                for fix in finding.fixes.iter().filter(|f| f.safe) {
                    let mended = applied(&case.sheet, &fix.edits);
                    let after = case.opened(&mended).report(&[]);
                    let same = |f: &&formulas::diagnostics::Finding| {
                        f.code == finding.code
                            && f.line == finding.line
                            && f.message == finding.message
                    };
                    assert!(
                        !after.findings.iter().any(|f| same(&f)),
                        "{}: {}\n{mended}",
                        case.name,
                        fix.title
                    );
                    assert!(
                        errors(&after) <= errors(&report),
                        "{}: {}\n{mended}",
                        case.name,
                        fix.title
                    );
                    tried += 1;
                }
            }
        }
    }
    assert!(tried >= 10, "only {tried} safe fixes");
}

#[test]
fn every_value_has_a_trail_down_to_inputs() {
    use formulas::assist::trail::{StepKind, TrailValue};
    for file in files() {
        let text = std::fs::read_to_string(&file).expect("a case file");
        for case in cases(&text) {
            let sheet = case.opened(&case.sheet);
            for quantity in sheet.report(&[]).quantities {
                let trail = sheet.trail(&quantity.symbol, &[]);
                let trail = trail.unwrap_or_else(|e| panic!("{}: {e}", case.name));
                let first = &trail.steps[0];
                let name = format!("{}: {}", case.name, quantity.symbol);
                let ends = [&quantity.largest, &quantity.smallest];
                let ends = ends.map(|e| e.as_ref().map(|e| e.value));
                if let (TrailValue::Number(value), [Some(a), Some(b)]) = (&first.value, ends) {
                    assert!(*value == Some(a) || *value == Some(b), "{name}: {value:?}");
                }
                for step in &trail.steps {
                    let within = step.rests_on.iter().all(|at| *at < trail.steps.len());
                    assert!(within && !step.symbol.is_empty(), "{name}: {step:?}");
                    if step.kind == StepKind::Input {
                        assert!(step.rests_on.is_empty(), "{name}: {step:?}");
                    }
                }
            }
        }
    }
}
