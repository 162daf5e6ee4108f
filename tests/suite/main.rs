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

#[test]
fn every_report_fits_the_schema_and_itself() {
    let schema: serde_json::Value =
        serde_json::from_str(formulas::report::json::SCHEMA).expect("the schema is JSON");
    assert_eq!(
        schema["properties"]["format"]["const"],
        formulas::report::FORMAT
    );
    let mut seen = BTreeSet::new();
    for file in files() {
        let text = std::fs::read_to_string(&file).expect("a case file");
        for case in cases(&text) {
            let report = case.opened(&case.sheet).report(&[]);
            let json = formulas::report::json::write(&report).expect("JSON");
            let value: serde_json::Value = serde_json::from_str(&json).expect("JSON");
            let faults = tests::schema::faults(&schema, &value);
            assert!(faults.is_empty(), "{}: {faults:#?}", case.name);
            fits_itself(&case.name, &report);
            let full = |(name, part): (&String, &serde_json::Value)| {
                part.as_array()
                    .is_some_and(|list| !list.is_empty())
                    .then(|| name.clone())
            };
            seen.extend(value.as_object().into_iter().flatten().filter_map(full));
        }
    }
    for part in [
        "axes",
        "quantities",
        "governing",
        "requirements",
        "freebodies",
        "figures",
        "findings",
    ] {
        assert!(seen.contains(part), "no case has {part}");
    }
}

#[test]
fn a_report_that_does_not_fit_is_told() {
    let schema: serde_json::Value =
        serde_json::from_str(formulas::report::json::SCHEMA).expect("the schema is JSON");
    let report = formulas::Sheet::open("x = 2\ny = x*z\n").report(&[]);
    let value = serde_json::to_value(&report).expect("JSON");
    let changes: [(&str, serde_json::Value); 5] = [
        ("/format", 2.into()),
        ("/quantities/0/line", 0.into()),
        ("/quantities/0/kind", "integer".into()),
        ("/findings/0/message", serde_json::Value::Null),
        ("/quantities/0/values", "2".into()),
    ];
    for (place, other) in changes {
        let mut changed = value.clone();
        *changed.pointer_mut(place).expect("a place") = other;
        assert_eq!(tests::schema::faults(&schema, &changed).len(), 1, "{place}");
    }
    let mut changed = value.clone();
    changed["quantities"][0]["colour"] = "red".into();
    assert_eq!(tests::schema::faults(&schema, &changed).len(), 1);
    let axis = changed["quantities"][0].as_object_mut().expect("an object");
    axis.remove("unit");
    assert_eq!(tests::schema::faults(&schema, &changed).len(), 2);
}

/// What a schema cannot say: lists are as long as their axes make them, findings stand in order.
fn fits_itself(name: &str, report: &formulas::report::Report) {
    let length = |axis: &String| {
        let axis = report.axes.iter().find(|a| a.name == *axis);
        axis.map(|a| a.labels.len())
    };
    for quantity in &report.quantities {
        let lengths: Option<Vec<usize>> = quantity.axes.iter().map(length).collect();
        let conditions = lengths.map(|l| l.iter().product::<usize>());
        assert_eq!(
            conditions,
            Some(quantity.conditions),
            "{name}: {}",
            quantity.symbol
        );
        if let Some(values) = &quantity.values {
            assert_eq!(
                values.len(),
                quantity.conditions,
                "{name}: {}",
                quantity.symbol
            );
        }
    }
    let order = |f: &formulas::diagnostics::Finding| (f.line, f.column, f.code);
    assert!(report.findings.is_sorted_by_key(order), "{name}");
}

#[test]
fn every_drawing_is_well_formed_and_holds_no_text_as_markup() {
    let mut drawn = 0;
    for file in files() {
        let text = std::fs::read_to_string(&file).expect("a case file");
        for case in cases(&text) {
            let report = case.opened(&case.sheet).report(&[]);
            let bodies = report.freebodies.iter().filter_map(|b| b.svg.as_ref());
            for svg in report.figures.iter().map(|f| &f.svg).chain(bodies) {
                let fits = tests::xml::well_formed(svg);
                assert_eq!(fits, Ok(()), "{}: {svg}", case.name);
                assert!(!svg.contains("<script"), "{}", case.name);
                drawn += 1;
            }
        }
    }
    assert!(drawn >= 20, "only {drawn} drawings");
}

#[test]
fn every_print_is_well_formed_and_holds_no_text_as_markup() {
    for file in files() {
        let text = std::fs::read_to_string(&file).expect("a case file");
        for case in cases(&text) {
            let print = case.opened(&case.sheet).print();
            let body = print
                .strip_prefix("<!DOCTYPE html>\n")
                .expect("a document type");
            let fits = tests::xml::well_formed(body);
            assert_eq!(fits, Ok(()), "{}", case.name);
            assert!(!print.contains("<script"), "{}", case.name);
        }
    }
}

#[test]
fn a_title_is_text_in_every_form_of_the_report() {
    let text = "title <script>alert(1)</script>\npart <script>\nvary c: <script> | b\nx [N] by c = 1 | 2 ; <script>\n\
        y [m] by c = 3 | 4\nfigure \"<script>\": x against c\nfigure \"</svg><script>\": x, y against y\n\
        freebody \"<script>\": x @ y, -x @ y\nrequire x < 2 N ; <script>\ngoverning x\n";
    let sheet = formulas::Sheet::open(text);
    let report = sheet.report(&[]);
    assert_eq!((report.figures.len(), report.freebodies.len()), (2, 1));
    let drawings = report.figures.iter().map(|f| Some(f.svg.clone()));
    let bodies = report.freebodies.iter().map(|b| b.svg.clone());
    for svg in drawings.chain(bodies).map(|svg| svg.expect("a drawing")) {
        assert_eq!(tests::xml::well_formed(&svg), Ok(()));
        assert!(
            svg.contains("&lt;script&gt;") && !svg.contains("<script"),
            "{svg}"
        );
    }
    let print = sheet.print();
    assert!(
        print.contains("&lt;script&gt;") && !print.contains("<script"),
        "{print}"
    );
}
