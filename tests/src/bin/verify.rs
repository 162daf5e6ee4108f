//! `cargo verify`: sets a fresh machine up and runs every test, the browser's included. The last line counts them.

use pack::{Paths, setup};
use std::path::Path;
use std::process::{Command, ExitCode, Stdio};

/// A step and the command that does it.
const STEPS: [(&str, &[&str]); 4] = [
    ("format", &["cargo", "fmt", "--all", "--check"]),
    (
        "clippy, native",
        &[
            "cargo",
            "clippy",
            "--quiet",
            "--workspace",
            "--all-targets",
            "--",
            "-D",
            "warnings",
        ],
    ),
    (
        "clippy, wasm",
        &[
            "cargo",
            "clippy",
            "--quiet",
            "--package",
            "www",
            "--target",
            setup::WASM_TARGET,
            "--",
            "-D",
            "warnings",
        ],
    ),
    ("tests", &["cargo", "test", "--workspace"]),
];

/// What was counted.
#[derive(Default)]
struct Count {
    passed: u64,
    failed: u64,
}

fn main() -> ExitCode {
    let mut count = Count::default();
    match everything(&mut count) {
        Ok(()) => {}
        Err(message) => {
            eprintln!("{message}");
            count.failed = count.failed.max(1);
        }
    }
    println!("{} passed, {} failed", count.passed, count.failed);
    if count.failed == 0 && count.passed > 0 {
        ExitCode::SUCCESS
    } else {
        ExitCode::FAILURE
    }
}

fn everything(count: &mut Count) -> Result<(), String> {
    let paths = Paths::here();
    let said = |e: pack::Failure| e.to_string();
    println!("== set-up");
    setup::wasm_target(&paths.root).map_err(said)?;
    setup::node_packages(&paths.page).map_err(said)?;
    let browser = paths.browser_tests.clone();
    setup::node_packages(&browser).map_err(said)?;
    setup::chromium().map_err(said)?;
    let mut broken = Vec::new();
    for (name, words) in STEPS {
        println!("== {name}");
        if !run(words, &paths.root, count)? {
            broken.push(name);
        }
    }
    println!("== outside");
    let compared = tests::outside::compare("")?;
    count.passed += compared.passed;
    count.failed += compared.failed;
    if compared.failed > 0 {
        broken.push("outside");
    }
    println!("== page");
    pack::build::page(&paths).map_err(said)?;
    println!("== browser");
    if !run(&["node", "--test", "--test-concurrency=1"], &browser, count)? {
        broken.push("browser");
    }
    if broken.is_empty() {
        Ok(())
    } else {
        Err(format!("failed: {}", broken.join(", ")))
    }
}

/// Runs a command, shows what it prints, and adds up the tests that it counts.
fn run(words: &[&str], folder: &Path, count: &mut Count) -> Result<bool, String> {
    let (program, arguments) = words.split_first().ok_or("nothing to run")?;
    let mut command = Command::new(program);
    command
        .args(arguments)
        .current_dir(folder)
        .stderr(Stdio::inherit());
    let output = command.output().map_err(|e| format!("{program}: {e}"))?;
    let text = String::from_utf8_lossy(&output.stdout);
    print!("{text}");
    for line in text.lines() {
        add_up(line, count);
    }
    Ok(output.status.success())
}

/// The closing lines of cargo test (`test result: ok. 3 passed; 0 failed; …`) and of node's runner (`# pass 3`).
fn add_up(line: &str, count: &mut Count) {
    let number = |text: &str| text.trim().parse::<u64>().unwrap_or(0);
    if let Some(rest) = line.strip_prefix("test result: ") {
        for part in rest.split([';', '.']) {
            if let Some(n) = part.trim().strip_suffix(" passed") {
                count.passed += number(n);
            } else if let Some(n) = part.trim().strip_suffix(" failed") {
                count.failed += number(n);
            }
        }
    } else if let Some(n) = line
        .strip_prefix("# pass ")
        .or(line.strip_prefix("ℹ pass "))
    {
        count.passed += number(n);
    } else if let Some(n) = line
        .strip_prefix("# fail ")
        .or(line.strip_prefix("ℹ fail "))
    {
        count.failed += number(n);
    }
}
