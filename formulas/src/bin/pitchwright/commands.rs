//! The commands that work on sheets.

use crate::arguments::{Format, Run};
use crate::files::{Loaded, load, load_all};
use crate::mending;
use crate::outcome::{NO_FILE, NOT_MET, Outcome, SHEET_ERROR, WELL};
use formulas::assist::trail as steps;
use formulas::diagnostics::{Finding, Severity};
use formulas::report::{Report, compare as comparison, csv, json, text};
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
        Format::Html => sheet.print(),
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
    let mut sheet = loaded.opened(asked);
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
    let report = loaded.opened(&[]).report(&[]);
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
    let mended = loaded.around(&[], |around| mending::apply_safe(&loaded.text, around));
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
    let report = loaded.around(&[], |around| {
        Sheet::open_around(&mended.text, around).report(&[])
    });
    let status = status(&loaded, &report);
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

/// Prints how a value came about.
pub(crate) fn trail(path: &OsStr, symbol: &str, at: &[(String, String)]) -> Outcome {
    let loaded = match load(path) {
        Ok(loaded) => loaded,
        Err(message) => return Outcome::failed(NO_FILE, &message),
    };
    let sheet = loaded.opened(&[]);
    let report = sheet.report(&[]);
    match sheet.trail(symbol, at) {
        Ok(trail) => Outcome {
            results: steps::write(&trail),
            diagnostics: diagnostics(&loaded, &report.findings, Severity::Error),
            status: status(&loaded, &report),
        },
        Err(error) => Outcome::usage(&error.to_string()),
    }
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
    complete(loaded, &[], &loaded.opened(&[]).report(&[]))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::outcome::BAD_USAGE;

    /// A sheet in a file of its own, removed at the end.
    struct File(std::path::PathBuf);

    impl File {
        fn of(name: &str, text: &[u8]) -> Self {
            let name = format!("pitchwright-{}-{name}", std::process::id());
            let path = std::env::temp_dir().join(name);
            std::fs::write(&path, text).unwrap();
            File(path)
        }

        fn path(&self) -> OsString {
            self.0.clone().into_os_string()
        }
    }

    impl Drop for File {
        fn drop(&mut self) {
            let _ = std::fs::remove_file(&self.0);
        }
    }

    fn run_of(sheet: OsString, format: Format) -> Run {
        Run {
            sheet,
            format,
            set: Vec::new(),
            quantities: Vec::new(),
        }
    }

    #[test]
    fn the_exit_status_tells_how_the_sheet_fared() {
        for (i, (text, expected)) in [
            (&b"x = 1\nrequire x <= 2\n"[..], WELL),
            (b"x = 3\nrequire x <= 2\n", NOT_MET),
            (b"x = none\nrequire x <= 2\n", NOT_MET),
            (b"x = 1 +\nrequire x <= 2\n", SHEET_ERROR),
            (b"x = 1 ; \xff\n", SHEET_ERROR),
        ]
        .into_iter()
        .enumerate()
        {
            let file = File::of(&format!("status-{i}"), text);
            assert_eq!(
                run(&run_of(file.path(), Format::Text)).status,
                expected,
                "{i}"
            );
            assert_eq!(check(&[file.path()]).status, expected, "{i}");
        }
        assert_eq!(
            run(&run_of("no such file".into(), Format::Text)).status,
            NO_FILE
        );
        assert_eq!(check(&["no such file".into()]).status, NO_FILE);
    }

    #[test]
    fn inputs_are_set_and_unknown_symbols_are_bad_usage() {
        let file = File::of("set", b"x [ft] = 2\ny = 2*x\n");
        let mut asked = run_of(file.path(), Format::Csv);
        asked.set = vec![("x".to_owned(), "12 in".to_owned())];
        assert_eq!(
            run(&asked).results,
            "symbol,value,unit\r\nx,1,ft\r\ny,2,ft\r\n"
        );
        asked.set = vec![("y".to_owned(), "1 ft".to_owned())];
        assert_eq!(
            (run(&asked).status, run(&asked).results.as_str()),
            (BAD_USAGE, "")
        );
        let mut asked = run_of(file.path(), Format::Json);
        asked.quantities = vec!["z".to_owned()];
        assert_eq!(run(&asked).status, BAD_USAGE);
    }

    #[test]
    fn every_condition_has_its_row_of_values_however_many_there_are() {
        let file = File::of("rows", b"vary a [1]: 1 to 12000 step 1\nb = 2*a\n");
        let results = run(&run_of(file.path(), Format::Csv)).results;
        assert_eq!(results.lines().count(), 1 + 2 * 12_000);
    }

    #[test]
    fn findings_are_told_in_lines() {
        let file = File::of("findings", b"x = foo\n");
        let name = file.0.display().to_string();
        let outcome = check(&[file.path()]);
        assert!(
            outcome
                .results
                .starts_with(&format!("{name}:1:5: error[unknown-symbol]: ")),
            "{}",
            outcome.results
        );
        assert_eq!(
            run(&run_of(file.path(), Format::Json)).diagnostics,
            outcome.results
        );
    }

    #[test]
    fn safe_fixes_are_written_back_unless_it_is_a_dry_run() {
        let file = File::of("fix", b"x = 2,5\n");
        let outcome = fix(&file.path(), true);
        assert!(outcome.results.contains(":1:5: "), "{}", outcome.results);
        assert_eq!(std::fs::read(&file.0).unwrap(), b"x = 2,5\n");
        assert_eq!(fix(&file.path(), false).status, WELL);
        assert_eq!(std::fs::read(&file.0).unwrap(), b"x = 2.5\n");
    }

    #[test]
    fn the_printed_report_is_one_document() {
        let file = File::of("print", b"title <T>\nx [ft] = 2\nrequire x < 1 ft\n");
        let outcome = run(&run_of(file.path(), Format::Html));
        assert_eq!(outcome.status, NOT_MET);
        assert!(outcome.results.starts_with("<!DOCTYPE html>\n"));
        assert!(outcome.results.contains("<h1>&lt;T&gt;</h1>"));
        assert!(outcome.results.ends_with("</html>\n"));
    }

    #[test]
    fn two_sheets_are_compared() {
        let old = File::of("old", b"x [ft] = 2\n");
        let new = File::of("new", b"x [ft] = 3\n");
        let outcome = compare(&old.path(), &new.path());
        assert_eq!(
            outcome.results,
            "quantities\n  x: 2 ft -> 3 ft, change 1 ft\n"
        );
        assert_eq!(compare(&old.path(), &old.path()).results, "no difference\n");
    }
}
