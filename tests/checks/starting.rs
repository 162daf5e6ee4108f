//! The starting sheets: each is complete, every unit fits, every requirement is met and every free body closes.

use formulas::Sheet;
use formulas::diagnostics::Severity;
use formulas::report::Report;

/// The reports of all starting sheets, by the name of their file; they may use one another.
fn reports() -> Vec<(String, Report)> {
    let texts = tests::starting::sheets();
    let open = |text: &String| Sheet::open_with(text, &|other| texts.get(other).cloned());
    texts
        .iter()
        .map(|(name, text)| (name.clone(), open(text).report(&[])))
        .collect()
}

#[test]
fn starting_sheets_are_clean() {
    let reports = reports();
    assert!(reports.len() >= 4);
    for (name, report) in &reports {
        for finding in &report.findings {
            let (line, message) = (finding.line, &finding.message);
            assert_eq!(
                finding.severity,
                Severity::Advice,
                "{name}:{line}: {message}"
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

#[test]
fn starting_sheets_have_a_full_title_block() {
    for (name, report) in reports() {
        let block = &report.sheet;
        for text in [&block.title, &block.revision, &block.prepared, &block.basis] {
            assert!(text.is_some(), "{name} lacks a line of its title block");
        }
    }
}
