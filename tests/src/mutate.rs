//! Texts made from the sheets of the suite by random changes, and what each stage, lexer to report, promises for any
//! text whatever.

use crate::golden::{applied, cases, files};
use crate::random::Random;
use formulas::Sheet;
use formulas::diagnostics::Severity;
use formulas::lex::lex;
use formulas::parse::parse;
use formulas::report::{Quantity, Report};
use formulas::syntax::Statement;
use std::collections::BTreeSet;

/// A promise of a stage for any text.
pub type Target = fn(&str) -> Result<(), String>;

/// The stages by their names.
pub const TARGETS: [(&str, Target); 6] = [
    ("lexer", lexer),
    ("parser", parser),
    ("printer", printer),
    ("report", report),
    ("fixes", fixes),
    ("assistance", assistance),
];

/// Sheets of the suite and of the page, each a text to begin with.
///
/// # Panics
/// Where the folders cannot be read.
#[must_use]
pub fn corpus() -> Vec<String> {
    let mut all = Vec::new();
    for file in files() {
        let text = std::fs::read_to_string(file).expect("a case file");
        all.extend(cases(&text).into_iter().map(|case| case.sheet));
    }
    all.extend(crate::starting::sheets().into_values());
    all
}

/// A text of the corpus with some changes: pieces cut, doubled, taken from another text, letters replaced, numbers made
/// extreme.
#[must_use]
pub fn mutated(corpus: &[String], random: &mut Random) -> String {
    const EXTREME: [&str; 8] = [
        "0", "-1", "1e308", "1e-320", "1e400", "none", "excluded", "1e15",
    ];
    const SIGNS: &[u8] = b"()[]{}|;:,=<>+-*/^\"'. \n\t@#%_0aZ";
    let mut text: Vec<char> = random.of(corpus).chars().collect();
    for _ in 0..1 + random.below(6) {
        let at = random.below(text.len() + 1);
        let to = (at + random.below(30)).min(text.len());
        match random.below(7) {
            0 => drop(text.drain(at..to)),
            1 => {
                let piece: Vec<char> = text[at..to].to_vec();
                text.splice(at..at, piece);
            }
            2 => {
                let other: Vec<char> = random.of(corpus).chars().collect();
                let from = random.below(other.len() + 1);
                let until = (from + random.below(120)).min(other.len());
                text.splice(at..at, other[from..until].iter().copied());
            }
            3 => {
                let sign = char::from(*random.of(SIGNS));
                text.insert(at, sign);
            }
            4 if at < text.len() => text[at] = char::from(*random.of(SIGNS)),
            5 => {
                let number = (at..text.len()).find(|i| text[*i].is_ascii_digit());
                if let Some(from) = number {
                    let rest = text[from..].iter();
                    let length = rest.take_while(|c| c.is_ascii_digit()).count();
                    text.splice(from..from + length, random.of(&EXTREME).chars());
                }
            }
            _ => {
                let letter = char::from_u32(random.below(0x3000) as u32);
                text.insert(at, letter.unwrap_or('\u{301}'));
            }
        }
    }
    text.into_iter().collect()
}

/// Every byte belongs to one token.
///
/// # Errors
/// What is wrong.
pub fn lexer(text: &str) -> Result<(), String> {
    let tokens = lex(text);
    let together: String = tokens.iter().map(|token| token.span.of(text)).collect();
    if together == text {
        Ok(())
    } else {
        Err(format!("read as {together:?}"))
    }
}

/// Every byte belongs to one statement.
///
/// # Errors
/// What is wrong.
pub fn parser(text: &str) -> Result<(), String> {
    let tree = parse(text);
    let length: usize = tree.statements.iter().map(|s| s.length).sum();
    if length == text.len() {
        Ok(())
    } else {
        Err(format!("{length} of {} bytes", text.len()))
    }
}

/// What is printed once is printed the same again.
///
/// # Errors
/// What is wrong.
pub fn printer(text: &str) -> Result<(), String> {
    let tree = parse(text);
    let faults = tree.statements.iter().any(|s| !s.problems.is_empty());
    if faults || !tree.problems.is_empty() {
        return Ok(());
    }
    let once = formulas::print::print(&tree, text);
    let twice = formulas::print::print(&parse(&once), &once);
    if once == twice {
        Ok(())
    } else {
        Err(format!("printed\n{once}\nand again\n{twice}"))
    }
}

/// The report has places for its findings, fits its schema's JSON, and its prints and drawings are well formed.
///
/// # Errors
/// What is wrong.
pub fn report(text: &str) -> Result<(), String> {
    let sheet = Sheet::open(text);
    let report = sheet.report(&[]);
    let placed = report.findings.iter().all(|f| f.line >= 1 && f.column >= 1);
    if !placed {
        return Err("a finding without a place".to_owned());
    }
    formulas::report::json::write(&report).map_err(|e| e.to_string())?;
    if let Some(symbol) = without_reason(&sheet, &report) {
        return Err(format!("{symbol} has no values, and nothing says why"));
    }
    let print = sheet.print();
    let body = print.strip_prefix("<!DOCTYPE html>\n").unwrap_or(&print);
    crate::xml::well_formed(body).map_err(|e| format!("the print: {e}"))?;
    parser(text)
}

/// A quantity that could not be worked out, though nothing is wrong with its line nor with anything that it names.
fn without_reason(sheet: &Sheet, report: &Report) -> Option<String> {
    let wrong = |statement: &&Statement| {
        let lines = statement.line..statement.line + statement.lines;
        let mut errors = report
            .findings
            .iter()
            .filter(|f| f.severity == Severity::Error);
        errors.any(|f| lines.contains(&f.line))
    };
    let statements = &sheet.tree().statements;
    let known = &sheet.values().quantities;
    let quantities = report.quantities.iter().zip(known);
    let failed: Vec<&Quantity> = quantities
        .filter(|(_, v)| !v.known)
        .map(|(q, _)| q)
        .collect();
    let words = |s: &Statement| -> BTreeSet<String> {
        let text = sheet.text().get(s.start..s.start + s.length).unwrap_or("");
        let words = text.split(|c: char| !c.is_alphanumeric() && !"_'".contains(c));
        words.map(str::to_owned).collect()
    };
    let mut suspect: BTreeSet<String> = failed
        .iter()
        .filter_map(|q| Some(q.symbol.split('.').next()?.to_owned()))
        .collect();
    let broken: Vec<&Statement> = statements.iter().filter(wrong).collect();
    suspect.extend(broken.iter().flat_map(|s| words(s)));
    let whole = report
        .findings
        .iter()
        .any(|f| f.code.ends_with("-limit") || f.code == "circle");
    let excused = |q: &&&Quantity| {
        let lines = |s: &&Statement| (s.line..s.line + s.lines).contains(&q.line);
        statements.iter().find(lines).is_some_and(|s| {
            let own = q.symbol.split('.').next().unwrap_or("");
            wrong(&s) || words(s).iter().any(|w| w != own && suspect.contains(w))
        })
    };
    let first = failed.iter().find(|q| !excused(q))?;
    (!whole).then(|| first.symbol.clone())
}

/// A safe fix leaves a text that can be read, without the finding.
///
/// # Errors
/// What is wrong.
pub fn fixes(text: &str) -> Result<(), String> {
    for finding in Sheet::open(text).report(&[]).findings {
        for fix in finding.fixes.iter().filter(|f| f.safe) {
            let mended = applied(text, &fix.edits);
            if mended == text {
                return Err(format!("{}: {} changes nothing", finding.code, fix.title));
            }
            let _ = Sheet::open(&mended).report(&[]);
        }
    }
    Ok(())
}

/// Completions, hover and trail answer at any place.
///
/// # Errors
/// What is wrong.
pub fn assistance(text: &str) -> Result<(), String> {
    let sheet = Sheet::open(text);
    for (at, line) in (1u32..).zip(text.lines()) {
        let middle = line.chars().count() as u32 / 2 + 1;
        for column in [1, middle, 2 * middle + 1] {
            let _ = sheet.complete(at, column);
            let _ = sheet.hover(at, column);
        }
    }
    for quantity in sheet.report(&[]).quantities {
        sheet
            .trail(&quantity.symbol, &[])
            .map_err(|e| format!("{}: {e}", quantity.symbol))?;
    }
    Ok(())
}
