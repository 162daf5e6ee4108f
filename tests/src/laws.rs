//! Laws that hold for every sheet: print after parse, the order of lines, units, warm runs equal to cold ones, and that
//! nothing whatever makes the program panic. Each is tried on the sheet of a seed and says what is wrong.

use crate::generate::{Style, generate};
use crate::random::Random;
use formulas::Sheet;
use formulas::parse::parse;
use formulas::print::print;

/// A law: tried on the sheet of a seed.
pub type Law = fn(u64) -> Result<(), String>;

/// The laws by their names.
pub const LAWS: [(&str, Law); 5] = [
    ("order", order),
    ("units", units),
    ("print", printed),
    ("warm", warm),
    ("pieces", pieces),
];

/// All values in SI, in the order of names.
fn values(text: &str) -> Vec<(String, Vec<f64>)> {
    let sheet = Sheet::open(text);
    let symbols = sheet.program().quantities.iter().map(|q| q.symbol.clone());
    let columns = sheet.values().quantities.iter().map(|v| {
        let column = v.column.as_ref().map(|c| c.values.to_vec());
        column.unwrap_or_default()
    });
    let mut all: Vec<_> = symbols.zip(columns).collect();
    all.sort_by(|a, b| a.0.cmp(&b.0));
    all
}

/// The same with the bits of the values.
fn bits(text: &str) -> Vec<(String, Vec<u64>)> {
    let bits =
        |(name, values): (String, Vec<f64>)| (name, values.into_iter().map(f64::to_bits).collect());
    values(text).into_iter().map(bits).collect()
}

fn json(sheet: &Sheet) -> String {
    serde_json::to_string(&sheet.report(&[])).unwrap_or_default()
}

/// The order of lines changes no bit.
///
/// # Errors
/// What differs.
pub fn order(seed: u64) -> Result<(), String> {
    let random = &mut Random::new(seed);
    let mut sheet = generate(random, &mut Random::new(7), Style::Mixed);
    let before = sheet.text();
    sheet.shuffle(random);
    let after = sheet.text();
    let (one, two) = (bits(&before), bits(&after));
    if one != two {
        let differing = one.iter().zip(&two).find(|(a, b)| a != b);
        return Err(format!("{differing:?}\n{before}\nbut\n{after}"));
    }
    Ok(())
}

/// The share of sheets in `seeds` whose lines have values for the most part: the laws say little of others.
#[must_use]
pub fn share_with_values(seeds: std::ops::Range<u64>) -> f64 {
    let count = (seeds.end - seeds.start) as f64;
    let good = seeds.filter(|seed| {
        let sheet = generate(&mut Random::new(*seed), &mut Random::new(7), Style::Mixed);
        let all = values(&sheet.text());
        let known = all.iter().filter(|(_, v)| v.iter().any(|v| v.is_finite()));
        known.count() * 4 >= all.len() * 3
    });
    good.count() as f64 / count
}

/// Other units change no value beyond rounding, and metric ones no bit.
///
/// # Errors
/// What differs.
pub fn units(seed: u64) -> Result<(), String> {
    let of = |units: u64, style| {
        let text = generate(&mut Random::new(seed), &mut Random::new(units), style);
        text.text()
    };
    let (one, two) = (seed + 1000, seed + 2000);
    let (metric, other) = (of(one, Style::Metric), of(two, Style::Metric));
    let pairs = bits(&metric).into_iter().zip(bits(&other));
    for (a, b) in pairs {
        if a != b {
            return Err(format!("{a:?} is not {b:?}\n{metric}\nbut\n{other}"));
        }
    }
    let (mixed, other) = (of(one, Style::Tame), of(two, Style::Tame));
    for ((name, a), (_, b)) in values(&mixed).iter().zip(values(&other).iter()) {
        for (a, b) in a.iter().zip(b) {
            let near = (a - b).abs() <= 1e-12 * a.abs();
            if a.is_nan() != b.is_nan() || !a.is_nan() && !near {
                return Err(format!("{name}: {a} is not {b}\n{mixed}\nbut\n{other}"));
            }
        }
    }
    Ok(())
}

/// What is printed from a sheet says the same.
///
/// # Errors
/// What differs.
pub fn printed(seed: u64) -> Result<(), String> {
    let text = generate(&mut Random::new(seed), &mut Random::new(seed), Style::Mixed).text();
    let once = print(&parse(&text), &text);
    let twice = print(&parse(&once), &once);
    if once != twice {
        return Err(format!("printed\n{once}\nand again\n{twice}"));
    }
    if bits(&text) != bits(&once) {
        return Err(format!("other values\n{text}\nprinted\n{once}"));
    }
    Ok(())
}

/// After every edit a sheet that was open says what one opened anew says.
///
/// # Errors
/// The sheet for which it does not.
pub fn warm(seed: u64) -> Result<(), String> {
    let random = &mut Random::new(seed + 1);
    let mut sheet = generate(random, &mut Random::new(seed), Style::Mixed);
    let editing = formulas::sheet::Around {
        editing: true,
        ..formulas::sheet::Around::default()
    };
    let mut text = sheet.text();
    let mut open = Sheet::open_around(&text, &editing);
    for _ in 0..8 {
        sheet.edit(random);
        let before = std::mem::replace(&mut text, sheet.text());
        open.update(&text);
        if *open.tree() != parse(&text) {
            return Err(format!("another tree: before\n{before}\nnow\n{text}"));
        }
        if json(&open) != json(&Sheet::open(&text)) {
            return Err(format!("before\n{before}\nnow\n{text}"));
        }
    }
    Ok(())
}

/// Pieces of the language, thrown together at random.
const PIECES: &[&str] = &[
    "x",
    "P_t",
    " = ",
    "[lb/ft^2]",
    "12",
    "3 ft",
    "(",
    ")",
    "+",
    "-",
    "*",
    "/",
    "^",
    "|",
    ":",
    ";",
    ",",
    "\n",
    " ",
    "if ",
    "then ",
    "else ",
    "vary ",
    "table ",
    "end\n",
    "by ",
    "at ",
    "over ",
    "max(",
    "\"",
    "none",
    "unknown ",
    "between ",
    "such that ",
    "governing ",
    "require ",
    "freebody ",
    "figure ",
    "against ",
    "use ",
    "as ",
    "note ",
    "+/-",
    "°",
    "é",
    "\u{301}",
    "\0",
    "\r\n",
    "degC",
    "1e400",
    "%",
    "<",
    ">=",
    "!=",
    "and ",
    "not ",
    "title ",
];

/// Pieces in any order: nothing panics, every finding has a place, every byte belongs to one statement.
///
/// # Errors
/// What is wrong.
pub fn pieces(seed: u64) -> Result<(), String> {
    let mut random = Random::new(seed);
    let text: String = (0..random.below(120)).map(|_| *random.of(PIECES)).collect();
    crate::mutate::report(&text)
}
