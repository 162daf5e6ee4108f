//! The rules of DEVELOPERS.md that can be read off the files.

use std::fs;
use std::path::{Path, PathBuf};

fn root() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("..")
}

/// Every file of a folder with one of the endings, generated and fetched ones left out.
fn sources(folder: &Path, endings: &[&str], out: &mut Vec<PathBuf>) {
    for entry in fs::read_dir(folder).expect("a folder") {
        let path = entry.expect("an entry").path();
        let name = path.file_name().and_then(|n| n.to_str()).unwrap_or("");
        if path.is_dir() {
            if !matches!(
                name,
                "node_modules" | "generated" | "target" | "dist" | "package"
            ) {
                sources(&path, endings, out);
            }
        } else if endings.iter().any(|e| name.ends_with(e)) {
            out.push(path);
        }
    }
}

fn all(endings: &[&str]) -> Vec<(PathBuf, String)> {
    let mut paths = Vec::new();
    for folder in ["engine", "formulas", "www", "tests"] {
        sources(&root().join(folder), endings, &mut paths);
    }
    paths.sort();
    assert!(paths.len() > 20);
    paths
        .into_iter()
        .map(|p| (p.clone(), fs::read_to_string(&p).expect("text")))
        .collect()
}

#[test]
fn the_top_level_shows_what_it_should() {
    let expected = [
        "Cargo.toml",
        "README.md",
        "DEVELOPERS.md",
        "engine",
        "formulas",
        "www",
        "tests",
        "Cargo.lock",
    ];
    for entry in fs::read_dir(root()).expect("the top") {
        let name = entry
            .expect("an entry")
            .file_name()
            .into_string()
            .expect("a name");
        let known = expected.contains(&name.as_str())
            || name.starts_with('.')
            || name.starts_with("LICENSE");
        assert!(known || name == "target", "{name} stands at the top level");
    }
}

#[test]
fn files_say_what_they_are_for_and_stay_short() {
    for (path, text) in all(&[".rs"]) {
        assert!(
            text.starts_with("//! "),
            "{} does not say what it is for",
            path.display()
        );
        let own = text.split("#[cfg(test)]").next().unwrap_or("");
        assert!(own.lines().count() <= 800, "{} is too long", path.display());
    }
    for (path, text) in all(&[".rs", ".ts", ".css", ".mjs"]) {
        for (at, line) in text.lines().enumerate() {
            assert_eq!(
                line.trim_end(),
                line,
                "{}:{}: a blank at the end",
                path.display(),
                at + 1
            );
            let todo = ["TO", "DO"].concat();
            assert!(
                !line.contains(&todo),
                "{}:{}: left for later",
                path.display(),
                at + 1
            );
        }
    }
}

#[test]
fn functions_stay_short() {
    let mut long: Vec<String> = Vec::new();
    for (path, text) in all(&[".rs"]) {
        // Samples and what spells a tree out are lists, whatever they are called.
        if path.components().any(|c| c.as_os_str() == "tests")
            && path.starts_with(root().join("formulas"))
        {
            continue;
        }
        let mut open: Option<(usize, usize)> = None;
        for (at, line) in text.lines().enumerate() {
            let indent = line.len() - line.trim_start().len();
            let head = line.trim_start();
            let begins = [
                "fn ",
                "pub fn ",
                "pub(crate) fn ",
                "pub(super) fn ",
                "pub const fn ",
                "const fn ",
            ];
            if open.is_none() && begins.iter().any(|b| head.starts_with(b)) {
                open = Some((at, indent));
            } else if let Some((start, depth)) = open
                && indent == depth
                && (head.starts_with('}') || head.ends_with(';'))
            {
                let length = at - start + 1;
                // A plain list of cases may be as long as what it lists.
                let table = text
                    .lines()
                    .skip(start)
                    .take(length)
                    .filter(|l| l.contains("=>"))
                    .count()
                    * 2
                    > length;
                if length > 70 && !table {
                    long.push(format!("{}:{}: {length} lines", path.display(), start + 1));
                }
                open = None;
            }
        }
    }
    assert!(long.is_empty(), "{}", long.join("\n"));
}

#[test]
fn dependencies_point_one_way() {
    let forbidden = [
        (
            "engine",
            &["formulas", "www", "pack", "tests", "serde", "nom"][..],
        ),
        ("formulas", &["www", "pack", "tests", "wasm_bindgen"][..]),
    ];
    for (path, text) in all(&[".rs"]) {
        for (folder, names) in &forbidden {
            if !path.starts_with(root().join(folder)) {
                continue;
            }
            for name in *names {
                let uses = text
                    .lines()
                    .any(|l| l.trim_start().starts_with(&format!("use {name}::")));
                assert!(!uses, "{} uses {name}", path.display());
            }
        }
    }
}

/// The stages of `formulas`, each with what it may not reach.
#[test]
fn stages_use_only_earlier_ones() {
    let order = [
        &[
            "span", "problem", "axes", "numbers", "nearest", "source", "syntax", "token",
        ][..],
        &["lex"],
        &["parse", "print"],
        &["values", "missing", "catalogue"],
        &["program", "used"],
        &["names", "graph", "check", "plan", "run"],
        &["diagnostics"],
        &["report", "reference", "assist"],
        &["setting", "reading", "sheet", "bin"],
    ];
    let rank = |name: &str| order.iter().position(|stage| stage.contains(&name));
    let base = root().join("formulas/src");
    let mut wrong: Vec<String> = Vec::new();
    for (path, text) in all(&[".rs"]) {
        let Ok(inside) = path.strip_prefix(&base) else {
            continue;
        };
        let first = inside
            .components()
            .next()
            .and_then(|c| c.as_os_str().to_str())
            .unwrap_or("");
        let own = first.trim_end_matches(".rs");
        let Some(at) = rank(own) else {
            assert!(
                matches!(own, "lib" | "assist"),
                "{} has no stage",
                inside.display()
            );
            continue;
        };
        let code = text.split("#[cfg(test)]").next().unwrap_or("");
        for line in code
            .lines()
            .filter(|_| !inside.to_string_lossy().contains("tests"))
        {
            let Some(rest) = line.trim_start().strip_prefix("use crate::") else {
                continue;
            };
            let name: String = rest
                .chars()
                .take_while(|c| c.is_alphanumeric() || *c == '_')
                .collect();
            let Some(used) = rank(&name) else { continue };
            // The tree carries problems, and problems are told of by the stages behind it.
            if used > at {
                wrong.push(format!("{} uses {name}, a later stage", inside.display()));
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn every_row_of_a_table_has_its_source_and_example() {
    for row in engine::quantity::units::rows() {
        assert!(!row.source.is_empty(), "{} has no source", row.name);
    }
    for row in engine::quantity::constants::rows() {
        assert!(!row.source.is_empty(), "{} has no source", row.name);
    }
    for entry in formulas::catalogue::entries() {
        assert!(
            !entry.source.is_empty() && !entry.example.is_empty(),
            "{}",
            entry.name
        );
        let report = formulas::Sheet::open(entry.example).report(&[]);
        let wrong = report
            .findings
            .iter()
            .find(|f| f.severity == formulas::diagnostics::Severity::Error);
        assert!(
            wrong.is_none(),
            "the example of {}: {:?}",
            entry.name,
            wrong.map(|f| &f.message)
        );
    }
}

#[test]
fn every_code_is_shown_by_its_example_and_gone_when_mended() {
    let mut wrong: Vec<String> = Vec::new();
    for code in formulas::diagnostics::CODES {
        assert!(
            !code.what.is_empty() && !code.why.is_empty(),
            "{}",
            code.code
        );
        let has = |text: &str| {
            formulas::Sheet::open(text)
                .report(&[])
                .findings
                .iter()
                .any(|f| f.code == code.code)
        };
        if let Some(example) = code.example
            && !later(code.code)
            && !has(example)
        {
            wrong.push(format!(
                "{} is not shown by its example:\n{example}",
                code.code
            ));
        }
        if let Some(fixed) = code.fixed
            && has(fixed)
        {
            wrong.push(format!(
                "{} stays in its mended example:\n{fixed}",
                code.code
            ));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

/// Codes of what this version reads but does not work out.
fn later(code: &str) -> bool {
    matches!(
        code,
        "further-solutions"
            | "equation-count"
            | "outside-validity"
            | "memory-limit"
            | "operation-limit"
    )
}
