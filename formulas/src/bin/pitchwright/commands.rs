//! The commands that work on sheets.

use crate::arguments::{Format, Run};
use crate::files::{Loaded, load, load_all};
use crate::mending;
use crate::outcome::{NO_FILE, NOT_MET, Outcome, SHEET_ERROR, WELL};
use formulas::diagnostics::{Finding, Severity};
use formulas::report::{Report, compare as comparison, csv, json, text};
use formulas::run::Limits;
use formulas::sheet::Sheet;
use std::ffi::{OsStr, OsString};

/// Evaluates a sheet and writes its report.
pub(crate) fn run(run: &Run) -> Outcome {
    let loaded = match load(&run.sheet) {
        Ok(loaded) => loaded,
        Err(message) => return Outcome::failed(NO_FILE, &message),
    };
    let sheet = match opened(&loaded, &run.set, &run.quantities) {
        Ok(sheet) => sheet,
        Err(message) => return Outcome::usage(&message),
    };
    let report = sheet.report(&run.quantities);
    if let Some(unknown) = run.quantities.iter().find(|symbol| !knows(&report, symbol)) {
        return Outcome::usage(&format!(
            "--quantity {unknown}: the sheet has no such symbol"
        ));
    }
    let results = match run.format {
        Format::Text => text::write(&report, &sheet.form()),
        Format::Json => json::write(&report).unwrap_or_default() + "\n",
        Format::Csv => csv::write(&complete(&loaded, &run.set, &report)),
    };
    Outcome {
        results,
        diagnostics: diagnostics(&loaded, &report.findings, Severity::Warning),
        status: status(&loaded, &report),
    }
}

/// The sheet with its inputs set, the columns of the symbols asked for kept however long they are.
fn opened(loaded: &Loaded, set: &[(String, String)], asked: &[String]) -> Result<Sheet, String> {
    let mut sheet = Sheet::open_within(&loaded.text, Limits::default(), asked);
    for (symbol, value) in set {
        sheet
            .set(symbol, value)
            .map_err(|message| format!("--set {symbol}: {message}"))?;
    }
    Ok(sheet)
}

/// The report with all values of all quantities.
fn complete(loaded: &Loaded, set: &[(String, String)], report: &Report) -> Report {
    if report.quantities.iter().all(|q| q.values.is_some()) {
        return report.clone();
    }
    let all: Vec<String> = report.quantities.iter().map(|q| q.symbol.clone()).collect();
    match opened(loaded, set, &all) {
        Ok(sheet) => sheet.report(&all),
        Err(_) => report.clone(),
    }
}

/// Whether the report has the symbol, or the fields of a record of that name.
fn knows(report: &Report, symbol: &str) -> bool {
    let record = |known: &str| {
        known
            .rsplit_once('.')
            .is_some_and(|(name, _)| name == symbol)
    };
    let mut known = report.quantities.iter();
    known.any(|q| q.symbol == symbol || record(&q.symbol))
}

fn status(loaded: &Loaded, report: &Report) -> u8 {
    let is_error = |finding: &Finding| finding.severity == Severity::Error;
    if loaded.broken_at.is_some() || report.findings.iter().any(is_error) {
        SHEET_ERROR
    } else if report.all_met() {
        WELL
    } else {
        NOT_MET
    }
}

/// The findings of at least that severity, one a line.
fn diagnostics(loaded: &Loaded, findings: &[Finding], least: Severity) -> String {
    let shown = findings.iter().filter(|f| f.severity <= least);
    let lines = shown.map(|f| finding_line(&loaded.name, f));
    loaded.encoding_finding().into_iter().chain(lines).collect()
}

/// `sheet:line:column: severity[code]: message`.
fn finding_line(name: &str, finding: &Finding) -> String {
    let Finding {
        line,
        column,
        code,
        message,
        ..
    } = finding;
    let severity = finding.severity.word();
    format!("{name}:{line}:{column}: {severity}[{code}]: {message}\n")
}

/// Prints the findings of sheets, those of all severities.
pub(crate) fn check(paths: &[OsString]) -> Outcome {
    let mut outcome = Outcome::default();
    for loaded in load_all(paths) {
        let status = match loaded {
            Ok(loaded) => check_one(&mut outcome, &loaded),
            Err(message) => {
                outcome.diagnostics += &format!("{message}\n");
                NO_FILE
            }
        };
        outcome.status = outcome.status.max(status);
    }
    outcome
}

fn check_one(outcome: &mut Outcome, loaded: &Loaded) -> u8 {
    let report = Sheet::open(&loaded.text).report(&[]);
    outcome.results += &diagnostics(loaded, &report.findings, Severity::Advice);
    for line in report.requirements.iter().filter(|r| r.met != Some(true)) {
        let verdict = match line.met {
            Some(_) => "not met",
            None => "not shown",
        };
        outcome.diagnostics +=
            &format!("{}:{}: {verdict}: {}\n", loaded.name, line.line, line.text);
    }
    status(loaded, &report)
}

/// Applies the fixes marked safe and writes the sheet back; from standard input the mended text goes to standard output.
pub(crate) fn fix(path: &OsStr, dry_run: bool) -> Outcome {
    let loaded = match load(path) {
        Ok(loaded) => loaded,
        Err(message) => return Outcome::failed(NO_FILE, &message),
    };
    if let Some(message) = loaded.encoding_finding() {
        return Outcome::failed(SHEET_ERROR, &message);
    }
    let mended = mending::apply_safe(&loaded.text);
    let said: String = mended
        .applied
        .iter()
        .map(|a| said(&loaded.name, a))
        .collect();
    let to_stdout = path == "-" && !dry_run;
    let written = if dry_run || to_stdout || mended.text == loaded.text {
        Ok(())
    } else {
        std::fs::write(path, &mended.text)
    };
    if let Err(error) = written {
        let message = format!("{}: cannot be written: {error}", loaded.name);
        return Outcome::failed(NO_FILE, &message);
    }
    let status = status(&loaded, &Sheet::open(&mended.text).report(&[]));
    let (results, diagnostics) = if to_stdout {
        (mended.text, said)
    } else {
        (said, String::new())
    };
    Outcome {
        results,
        diagnostics,
        status,
    }
}

/// `sheet:line:column: what was changed`.
fn said(name: &str, applied: &mending::Applied) -> String {
    let mending::Applied {
        line,
        column,
        title,
        message,
    } = applied;
    format!("{name}:{line}:{column}: {title} ({message})\n")
}

/// Prints what differs between two sheets.
pub(crate) fn compare(old: &OsStr, new: &OsStr) -> Outcome {
    if old == "-" && new == "-" {
        return Outcome::usage("only one of the two sheets can be standard input");
    }
    let (old, new) = match (load(old), load(new)) {
        (Ok(old), Ok(new)) => (old, new),
        (Err(message), _) | (_, Err(message)) => return Outcome::failed(NO_FILE, &message),
    };
    let reports = [&old, &new].map(full_report);
    let [before, after] = &reports;
    Outcome {
        results: comparison::write(&comparison::differences(before, after)),
        diagnostics: diagnostics(&old, &before.findings, Severity::Error)
            + &diagnostics(&new, &after.findings, Severity::Error),
        status: status(&old, before).max(status(&new, after)),
    }
}

/// The report with all values of all quantities.
fn full_report(loaded: &Loaded) -> Report {
    complete(loaded, &[], &Sheet::open(&loaded.text).report(&[]))
}
