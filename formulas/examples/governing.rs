//! A sheet run by a program of one's own: opens it, changes an input, prints what governs before and after.
//!
//! `cargo run --example governing -p formulas -- SHEET SYMBOL EXPRESSION`

use formulas::Sheet;
use std::process::ExitCode;

fn main() -> ExitCode {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    let [path, symbol, expression] = arguments.as_slice() else {
        eprintln!("usage: governing SHEET SYMBOL EXPRESSION");
        return ExitCode::from(64);
    };
    match compare(path, symbol, expression) {
        Ok(said) => {
            print!("{said}");
            ExitCode::SUCCESS
        }
        Err(message) => {
            eprintln!("{message}");
            ExitCode::FAILURE
        }
    }
}

fn compare(path: &str, symbol: &str, expression: &str) -> Result<String, String> {
    let text = std::fs::read_to_string(path).map_err(|error| format!("{path}: {error}"))?;
    let mut sheet = Sheet::open(&text);
    let before = governing(&sheet);
    sheet.set(symbol, expression)?;
    Ok(format!(
        "as written\n{before}with {symbol} = {expression}\n{}",
        governing(&sheet)
    ))
}

/// A line for each governed quantity and extreme.
fn governing(sheet: &Sheet) -> String {
    let mut said = String::new();
    for line in &sheet.report(&[]).governing {
        let unit = line.unit.as_deref().unwrap_or("");
        for extreme in [&line.smallest, &line.largest].into_iter().flatten() {
            let labels: Vec<_> = extreme
                .condition
                .0
                .iter()
                .map(|(axis, label)| format!("{axis} {label}"))
                .collect();
            said += &format!(
                "  {} = {} {unit} at {}\n",
                line.symbol,
                extreme.value,
                labels.join(", ")
            );
        }
    }
    said
}
