//! Golden sheets: many named cases in a file, the expectations as note lines under the line they concern.
//!
//! A case begins `--- name ---`; prose up to the first blank line says what it proves; the sheet follows. A line that
//! begins with `//` is a note on the sheet line above: `//= symbol = value unit over axes` for every quantity of that
//! line, `// ^^^ severity[code]: message` for a finding at those columns, `// | fix(grade): title` for its fixes. The
//! notes of a case are whole: what is not noted is not there. Behind the sheet a line `+++ name +++` begins another one
//! that it may use; what stands there carries no notes. A line `>>> old => new` behind the sheet is an edit: the first
//! such text is replaced, and the note says which quantities were worked out again for it.

use formulas::Sheet;
use formulas::diagnostics::{Edit, Finding, Severity};
use formulas::report::{Quantity, Report, ValueList};
use formulas::sheet::Around;
use std::fmt::Write as _;
use std::path::{Path, PathBuf};

/// A case of a file.
pub struct Case {
    /// Its name, one of its own over the whole suite.
    pub name: String,
    /// The lines up to and with the blank line behind the prose.
    pub prose: String,
    /// The sheet without its notes.
    pub sheet: String,
    /// The sheet with its notes, as stored, and the other sheets.
    pub stored: String,
    /// The other sheets by their names, in the order of the file.
    pub others: Vec<(String, String)>,
    /// Edits one after another: a text of the sheet, and what takes its place.
    pub edits: Vec<(String, String)>,
}

impl Case {
    /// A text among the other sheets of the case.
    #[must_use]
    pub fn opened(&self, text: &str) -> Sheet {
        self.opened_for(text, false)
    }

    fn opened_for(&self, text: &str, editing: bool) -> Sheet {
        let text_of = |name: &str| {
            let other = self.others.iter().find(|(other, _)| other == name);
            other.map(|(_, text)| text.clone())
        };
        let around = Around {
            sheets: &text_of,
            editing,
            ..Around::default()
        };
        Sheet::open_around(text, &around)
    }

    /// Makes the edits one after another: for each the text, what ran again for it, and whether the result is that of
    /// opening the text.
    #[must_use]
    pub fn edited(&self) -> Vec<(String, String, bool)> {
        let mut text = self.sheet.clone();
        let mut sheet = self.opened_for(&text, true);
        let each = self.edits.iter().map(|(old, new)| {
            text = text.replacen(old, new, 1);
            sheet.update(&text);
            let json = |s: &Sheet| serde_json::to_string(&s.report(&[])).unwrap_or_default();
            let ran = sheet.ran().join(", ");
            (text.clone(), ran, json(&sheet) == json(&self.opened(&text)))
        });
        each.collect()
    }
}

/// The files of the suite, in order.
///
/// # Panics
/// Where the folder cannot be read.
#[must_use]
pub fn files() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("suite");
    let entries = std::fs::read_dir(folder).expect("the suite's folder");
    let mut files: Vec<PathBuf> = entries.filter_map(|e| Some(e.ok()?.path())).collect();
    files.retain(|f| f.extension().is_some_and(|e| e == "cases"));
    files.sort();
    files
}

/// The cases of a file's text.
#[must_use]
pub fn cases(text: &str) -> Vec<Case> {
    let mut cases: Vec<Case> = Vec::new();
    let mut in_prose = false;
    for line in text.lines() {
        let heading = line
            .strip_prefix("--- ")
            .and_then(|l| l.strip_suffix(" ---"));
        if let Some(name) = heading {
            cases.push(Case {
                name: name.to_owned(),
                prose: String::new(),
                sheet: String::new(),
                stored: String::new(),
                others: Vec::new(),
                edits: Vec::new(),
            });
            in_prose = true;
            continue;
        }
        let Some(case) = cases.last_mut() else {
            continue;
        };
        if in_prose {
            case.prose.push_str(line);
            case.prose.push('\n');
            in_prose = !line.trim().is_empty();
            continue;
        }
        case.stored.push_str(line);
        case.stored.push('\n');
        if let Some((old, new)) = line.strip_prefix(">>> ").and_then(|l| l.split_once(" => ")) {
            case.edits.push((old.to_owned(), new.to_owned()));
            continue;
        }
        let other = line
            .strip_prefix("+++ ")
            .and_then(|l| l.strip_suffix(" +++"));
        if let Some(name) = other {
            case.others.push((name.to_owned(), String::new()));
        } else if let Some((_, other)) = case.others.last_mut() {
            other.push_str(line);
            other.push('\n');
        } else if !line.starts_with("//") {
            case.sheet.push_str(line);
            case.sheet.push('\n');
        }
    }
    for case in &mut cases {
        // Blank lines before the next heading belong to the file, not to the sheet.
        let others = case.others.iter_mut().map(|(_, text)| text);
        for text in [&mut case.sheet, &mut case.stored]
            .into_iter()
            .chain(others)
        {
            let length = text.trim_end().len();
            text.truncate(length);
            text.push('\n');
        }
    }
    cases
}

/// The sheet with the notes that the program gives, and the other sheets as they are.
#[must_use]
pub fn noted(case: &Case) -> String {
    let report = case.opened(&case.sheet).report(&[]);
    let mut out = String::new();
    let lines: Vec<&str> = case.sheet.lines().collect();
    for (index, line) in lines.iter().enumerate() {
        let number = index as u32 + 1;
        let _ = writeln!(out, "{line}");
        let last = index + 1 == lines.len();
        for finding in report
            .findings
            .iter()
            .filter(|f| f.line == number || last && f.line > number)
        {
            note_finding(finding, &mut out);
        }
        for quantity in report.quantities.iter().filter(|q| q.line == number) {
            let _ = writeln!(out, "//= {}", note_quantity(quantity));
        }
        note_outputs(&report, number, &mut out);
    }
    for (name, text) in &case.others {
        let _ = write!(out, "+++ {name} +++\n{text}");
    }
    for ((old, new), (_, ran, same)) in case.edits.iter().zip(case.edited()) {
        let _ = writeln!(out, ">>> {old} => {new}");
        let _ = writeln!(out, "//= ran: {ran}");
        if !same {
            let _ = writeln!(out, "//= NOT what opening the text gives");
        }
    }
    out
}

fn note_finding(finding: &Finding, out: &mut String) {
    let severity = match finding.severity {
        Severity::Error => "error",
        Severity::Warning => "warning",
        Severity::Advice => "advice",
    };
    let before = (finding.column as usize).saturating_sub(3);
    // The first two columns are taken by the mark of the note; a finding there is marked from column 3 on.
    let carets = "^".repeat((finding.length as usize).clamp(1, 60));
    let place = if finding.column < 3 {
        format!("@{} ", finding.column)
    } else {
        " ".repeat(before)
    };
    let _ = writeln!(
        out,
        "//{place}{carets} {severity}[{}]: {}",
        finding.code, finding.message
    );
    if let Some(conditions) = &finding.conditions {
        let _ = writeln!(out, "// | {} conditions", conditions.count);
    }
    for fix in &finding.fixes {
        let grade = if fix.safe { "safe" } else { "show" };
        let _ = writeln!(out, "// | fix({grade}): {}", fix.title);
    }
}

fn note_quantity(quantity: &Quantity) -> String {
    let values = match &quantity.values {
        None => "…".to_owned(),
        Some(list) => values(list),
    };
    let unit = quantity
        .unit
        .as_ref()
        .map_or(String::new(), |u| format!(" {u}"));
    let over = if quantity.axes.is_empty() {
        String::new()
    } else {
        format!(" over {}", quantity.axes.join(", "))
    };
    let spread = quantity.spread.as_ref().map_or(String::new(), |spread| {
        let list = |all: &[Option<f64>]| values_of(&serde_json::to_value(all).unwrap_or_default());
        format!(
            " +/- worst {}, rss {}",
            list(&spread.worst),
            list(&spread.rss)
        )
    });
    format!("{} = {values}{unit}{over}{spread}", quantity.symbol)
}

fn values(list: &ValueList) -> String {
    values_of(&serde_json::to_value(list).unwrap_or_default())
}

fn values_of(text: &serde_json::Value) -> String {
    let items = text.as_array().cloned().unwrap_or_default();
    let shown: Vec<String> = items
        .iter()
        .map(|v| {
            if v.is_null() {
                "-".to_owned()
            } else {
                v.to_string()
            }
        })
        .collect();
    shown.join(" | ")
}

fn note_outputs(report: &Report, line: u32, out: &mut String) {
    let json = |value: serde_json::Result<String>| value.unwrap_or_default();
    for governing in report.governing.iter().filter(|g| g.line == line) {
        let ends =
            [&governing.largest, &governing.smallest].map(|e| json(serde_json::to_string(e)));
        let _ = writeln!(
            out,
            "//= {}: largest {}, smallest {}",
            governing.symbol, ends[0], ends[1]
        );
        for group in governing
            .groups
            .iter()
            .filter(|_| governing.groups.len() > 1)
        {
            let _ = writeln!(out, "// | {}", json(serde_json::to_string(group)));
        }
        for moved in &governing.sensitivity {
            let _ = writeln!(out, "// | {}", json(serde_json::to_string(moved)));
        }
        for corner in &governing.corners {
            let _ = writeln!(out, "// | corner {}", json(serde_json::to_string(corner)));
        }
        for others in &governing.others {
            let _ = writeln!(out, "// | others {}", json(serde_json::to_string(others)));
        }
    }
    for requirement in report.requirements.iter().filter(|r| r.line == line) {
        let met = match requirement.met {
            Some(true) => "met",
            Some(false) => "not met",
            None => "not shown",
        };
        let worst = serde_json::to_string(&requirement.worst).unwrap_or_default();
        let _ = writeln!(out, "//= {met}, worst {worst}");
        if let Some(met) = requirement.met_at_worst {
            let _ = writeln!(out, "// | met at worst: {met}");
        }
        if let Some(corner) = &requirement.corner {
            let _ = writeln!(out, "// | corner {}", json(serde_json::to_string(corner)));
        }
    }
    for body in report.freebodies.iter().filter(|b| b.line == line) {
        let taken = body
            .taken_up_by
            .as_deref()
            .map_or(String::new(), |s| format!(" by construction, {s}"));
        let closes = serde_json::to_string(&body.closes).unwrap_or_default();
        let _ = writeln!(out, "//= closes {closes}{taken}");
    }
    figures(out, report, line);
}

fn figures(out: &mut String, report: &Report, line: u32) {
    for figure in report.figures.iter().filter(|f| f.line == line) {
        let closed = if figure.closed { ", closed" } else { "" };
        let x = serde_json::to_string(&figure.x).unwrap_or_default();
        let _ = writeln!(out, "//= against {x}{closed}");
        for curve in &figure.curves {
            let curve = serde_json::to_string(curve).unwrap_or_default();
            let _ = writeln!(out, "// | {curve}");
        }
    }
}

/// A sheet with the edits of a fix applied.
#[must_use]
pub fn applied(sheet: &str, edits: &[Edit]) -> String {
    let mut lines: Vec<Vec<char>> = sheet.split('\n').map(|l| l.chars().collect()).collect();
    let mut sorted: Vec<&Edit> = edits.iter().collect();
    sorted.sort_by_key(|e| std::cmp::Reverse((e.line, e.column)));
    for edit in sorted {
        let Some(line) = lines.get_mut(edit.line as usize - 1) else {
            continue;
        };
        let from = (edit.column as usize - 1).min(line.len());
        let to = (from + edit.length as usize).min(line.len());
        line.splice(from..to, edit.text.chars());
    }
    let lines: Vec<String> = lines.into_iter().map(|l| l.into_iter().collect()).collect();
    lines.join("\n")
}
