//! `cargo golden [filter]`: writes the notes of golden cases anew, to be read before they are committed. With
//! `--sheets FILE` it writes every sheet of the suite, and the bits of its values, for the comparison with wasm.

use std::fmt::Write as _;
use tests::golden::{cases, files, noted};

fn main() -> Result<(), Box<dyn std::error::Error>> {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    if let [flag, file] = arguments.as_slice()
        && flag == "--sheets"
    {
        return write_bits(file);
    }
    let filter = arguments.first().map_or("", String::as_str);
    for file in files() {
        let text = std::fs::read_to_string(&file)?;
        let mut out = String::new();
        for (at, case) in cases(&text).into_iter().enumerate() {
            let body = if case.name.contains(filter) {
                noted(&case)
            } else {
                case.stored
            };
            let gap = if at == 0 { "" } else { "\n" };
            let _ = write!(out, "{gap}--- {} ---\n{}{body}", case.name, case.prose);
        }
        if out != text {
            println!("{} changed", file.display());
            std::fs::write(&file, out)?;
        }
    }
    Ok(())
}

/// Every sheet with the bits of all its numbers, as JSON.
fn write_bits(file: &str) -> Result<(), Box<dyn std::error::Error>> {
    let mut all = Vec::new();
    for path in files() {
        for case in cases(&std::fs::read_to_string(path)?) {
            let sheet = case.opened(&case.sheet);
            let report = sheet.report(&[]);
            let quantities: Vec<serde_json::Value> = report
                .quantities
                .iter()
                .map(|q| serde_json::json!({ "symbol": q.symbol, "bits": bits(&serde_json::to_value(&q.values).unwrap_or_default()) }))
                .collect();
            let others: serde_json::Map<String, serde_json::Value> = case
                .others
                .iter()
                .map(|(name, text)| (name.clone(), text.clone().into()))
                .collect();
            all.push(serde_json::json!({
                "name": case.name,
                "text": case.sheet,
                "sheets": others,
                "quantities": quantities,
            }));
        }
    }
    std::fs::write(file, serde_json::to_string(&all)?)?;
    println!("{} sheets written", all.len());
    Ok(())
}

/// The numbers of a list by their bits in hexadecimal; anything else as it is.
fn bits(values: &serde_json::Value) -> Vec<String> {
    let list = values.as_array().cloned().unwrap_or_default();
    let one = |v: &serde_json::Value| {
        v.as_f64()
            .map_or_else(|| v.to_string(), |n| format!("{:016x}", n.to_bits()))
    };
    list.iter().map(one).collect()
}
