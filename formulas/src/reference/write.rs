//! The whole language as one text, in Markdown: made from the tables that the program itself works by.

use super::{EXPRESSIONS, Row, STATEMENTS, parameter, results, signature, unit_row};
use crate::catalogue::{self, Entry};
use crate::diagnostics::{CODES, Code};
use crate::report::json::plain_number;
use engine::quantity::{constants, units};
use std::fmt::Write as _;

/// The reference of the language: statements, expressions, constants, functions, units and findings.
#[must_use]
pub fn write() -> String {
    let mut out = String::from("# Language reference\n");
    let version = env!("CARGO_PKG_VERSION");
    let _ = writeln!(
        out,
        "\nOf version {version}. Made from the tables that the program works by; every example runs.\n"
    );
    out += "## Statements\n";
    STATEMENTS.iter().for_each(|row| put_row(&mut out, row));
    out += "\n## Expressions\n";
    EXPRESSIONS.iter().for_each(|row| put_row(&mut out, row));
    put_constants(&mut out);
    put_functions(&mut out);
    put_units(&mut out);
    put_findings(&mut out);
    out
}

fn put_row(out: &mut String, row: &Row) {
    let _ = writeln!(
        out,
        "\n### {}\n\n`{}`\n\n{}\n",
        row.word, row.form, row.meaning
    );
    put_sheet(out, row.example);
}

fn put_sheet(out: &mut String, sheet: &str) {
    for line in sheet.lines() {
        let _ = writeln!(out, "    {line}");
    }
}

fn put_constants(out: &mut String) {
    *out += "\n## Constants\n\n";
    for row in constants::rows() {
        let value = format!("{} {}", plain_number(row.value), row.unit);
        let _ = writeln!(
            out,
            "- `{}`: {}, {}; {}",
            row.name,
            row.meaning,
            value.trim_end(),
            row.source
        );
    }
}

fn put_functions(out: &mut String) {
    *out += "\n## Functions\n";
    let mut group = "";
    for entry in catalogue::entries() {
        if entry.group != group {
            group = entry.group;
            let _ = writeln!(out, "\n### {group}");
        }
        put_function(out, entry);
    }
}

fn put_function(out: &mut String, entry: &Entry) {
    let _ = writeln!(out, "\n#### `{}`\n\n{}\n", signature(entry), entry.what);
    for argument in entry.parameters {
        let _ = writeln!(out, "- {}", parameter(argument));
    }
    for result in results(entry) {
        let _ = writeln!(out, "- gives {result}");
    }
    let facts = [
        ("Method", entry.method),
        ("Holds", entry.holds),
        ("Source", entry.source),
    ];
    for (word, text) in facts.iter().filter(|(_, text)| !text.is_empty()) {
        let _ = writeln!(out, "- {word}: {text}");
    }
    out.push('\n');
    put_sheet(out, entry.example);
}

fn put_units(out: &mut String) {
    *out += "\n## Units\n\n";
    for row in units::rows() {
        let _ = writeln!(out, "- {}", unit_row(row));
    }
}

fn put_findings(out: &mut String) {
    *out += "\n## Findings\n";
    CODES.iter().for_each(|code| put_code(out, code));
}

fn put_code(out: &mut String, code: &Code) {
    let severity = code.severity.word();
    let _ = writeln!(
        out,
        "\n### {} ({severity})\n\n{} {}",
        code.code, code.what, code.why
    );
    if let Some(example) = code.example {
        out.push('\n');
        put_sheet(out, example);
    }
    if let Some(fixed) = code.fixed {
        *out += "\nMended:\n\n";
        put_sheet(out, fixed);
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostics::Severity;
    use crate::lex::words;
    use crate::sheet::Sheet;

    #[test]
    fn every_row_has_an_example_that_runs() {
        let beside = |name: &str| {
            (name == "osier-geometry").then(|| "S [ft^2] = 142\nc = S/30 ft\n".to_owned())
        };
        for row in STATEMENTS.iter().chain(EXPRESSIONS) {
            let sheet = Sheet::open_with(row.example, &beside);
            let wrong: Vec<String> = sheet
                .findings()
                .into_iter()
                .filter(|f| f.severity != Severity::Advice)
                .map(|f| f.message)
                .collect();
            assert!(wrong.is_empty(), "{}: {wrong:?}\n{}", row.word, row.example);
            assert!(row.meaning.ends_with('.'), "{}", row.word);
        }
    }

    #[test]
    fn every_example_uses_what_it_shows() {
        for row in STATEMENTS.iter().chain(EXPRESSIONS) {
            let named = |word: &str| row.example.contains(word);
            let shown = match row.word {
                "definition" | "function" | "call" => named("="),
                "number" => named("12 ft 6 in"),
                "text" => named("\"aft\""),
                "[unit]" => named("[kt]"),
                words => words.split(' ').any(named),
            };
            assert!(shown, "{}", row.word);
        }
    }

    #[test]
    fn every_word_of_the_language_has_a_row() {
        let has = |word: &str| {
            let rows = || STATEMENTS.iter().chain(EXPRESSIONS);
            rows().any(|row| row.word.split(' ').any(|w| w == word))
                || rows().any(|row| {
                    let mut parts = row.form.split(|c: char| !c.is_alphabetic());
                    parts.any(|w| w == word) || row.meaning.contains(word)
                })
        };
        let all = words::STATEMENT_WORDS.iter().chain(&words::TITLE_WORDS);
        let all = all.chain(&words::PLACE_WORDS);
        let expression = [
            "if", "then", "else", "and", "or", "not", "none", "excluded", "over", "at",
        ];
        for word in all.chain(&expression) {
            assert!(has(word), "{word}");
        }
        for row in constants::rows() {
            assert!(has(row.name), "{}", row.name);
        }
    }

    #[test]
    fn the_text_has_every_function_unit_and_finding() {
        let text = write();
        for entry in catalogue::entries() {
            assert!(
                text.contains(&format!("#### `{}", entry.name)),
                "{}",
                entry.name
            );
        }
        for row in units::rows() {
            assert!(text.contains(&unit_row(row)), "{}", row.name);
        }
        for code in CODES {
            assert!(
                text.contains(&format!("### {} (", code.code)),
                "{}",
                code.code
            );
        }
        assert!(text.lines().count() > 1000);
    }
}
