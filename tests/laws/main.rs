//! Laws that hold for every sheet, tried on generated ones: print after parse, the order of lines, units, and that
//! nothing whatever makes the program panic or hang.

use formulas::Sheet;
use formulas::parse::parse;
use formulas::print::print;
use tests::random::Random;

/// Sheets to a law.
const SHEETS: u64 = 500;

/// A length in feet or metres, by the same number of metres.
const LENGTHS: [(&str, f64); 3] = [("m", 1.0), ("ft", 0.3048), ("in", 0.0254)];
const FORCES: [(&str, f64); 3] = [("N", 1.0), ("lb", 4.448_221_615_260_5), ("daN", 10.0)];

/// A generated sheet: axis declarations, then definitions, each line apart. `units` chooses among equal sheets in other
/// units.
fn generated(random: &mut Random, units: &mut Random) -> (Vec<String>, Vec<String>) {
    let mut axes = Vec::new();
    for axis in 0..1 + random.below(3) {
        let labels: Vec<String> = (0..1 + random.below(4)).map(|l| format!("p{l}")).collect();
        axes.push((format!("a{axis}"), labels));
    }
    let declared = axes
        .iter()
        .map(|(n, l)| format!("vary {n}: {}", l.join(" | ")))
        .collect();
    let mut lines = Vec::new();
    for i in 0..4 {
        let (unit, factor) = *units.of(&LENGTHS);
        let (axis, labels) = random.of(&axes).clone();
        let values: Vec<String> = labels
            .iter()
            .map(|_| {
                format!(
                    "{} {unit}",
                    (random.below(900) + 100) as f64 / 64.0 / factor
                )
            })
            .collect();
        lines.push(format!("x{i} by {axis} = {}", values.join(" | ")));
        let (unit, factor) = *units.of(&FORCES);
        lines.push(format!(
            "f{i} = {} {unit} ; item {i}",
            (random.below(900) + 100) as f64 / factor
        ));
    }
    for i in 4..12 {
        let (a, b) = (random.below(i), random.below(i));
        let (c, d) = (random.below(i), random.below(i));
        lines.push(match random.below(4) {
            0 => format!("x{i} = x{a} + x{b}*f{c}/f{d}"),
            1 => format!("x{i} = if x{a} < x{b} then x{a} else x{b} - x{a}/3"),
            2 => format!("x{i} = max(x{a}, -x{b}) + 2*x{b}"),
            _ => format!("x{i} = (x{a}*x{b})^0.5 + mean(x{b})"),
        });
        lines.push(match random.below(3) {
            0 => format!("f{i} = f{a} + f{b}*(x{c}/x{d})"),
            1 => format!("f{i} = clamp(f{a}, 0, f{b}) + f{c}/7"),
            _ => format!("f{i} = f{a}*x{c}/x{d} + f{b}"),
        });
    }
    (declared, lines)
}

/// All values in SI, in the order of names.
fn values(text: &str) -> Vec<(String, Vec<f64>)> {
    let sheet = Sheet::open(text);
    let mut all: Vec<(String, Vec<f64>)> = sheet
        .program()
        .quantities
        .iter()
        .zip(&sheet.values().quantities)
        .map(|(q, v)| {
            (
                q.symbol.clone(),
                v.column
                    .as_ref()
                    .map(|c| c.values.to_vec())
                    .unwrap_or_default(),
            )
        })
        .collect();
    all.sort_by(|a, b| a.0.cmp(&b.0));
    all
}

fn joined(declared: &[String], lines: &[String]) -> String {
    declared
        .iter()
        .chain(lines)
        .map(|l| format!("{l}\n"))
        .collect()
}

#[test]
fn the_order_of_lines_does_not_matter() {
    for seed in 1..=SHEETS {
        let mut random = Random::new(seed);
        let (declared, mut lines) = generated(&mut random, &mut Random::new(7));
        let before = values(&joined(&declared, &lines));
        for i in (1..lines.len()).rev() {
            lines.swap(i, random.below(i + 1));
        }
        let after = values(&joined(&declared, &lines));
        let bits = |all: &[(String, Vec<f64>)]| -> Vec<(String, Vec<u64>)> {
            all.iter()
                .map(|(n, v)| (n.clone(), v.iter().map(|v| v.to_bits()).collect()))
                .collect()
        };
        assert_eq!(
            bits(&before),
            bits(&after),
            "seed {seed}\n{}",
            joined(&declared, &lines)
        );
        assert!(
            before.iter().any(|(_, v)| v.iter().any(|v| v.is_finite())),
            "seed {seed} has no value"
        );
    }
}

#[test]
fn units_change_nothing() {
    for seed in 1..=SHEETS {
        let of = |units: u64| {
            let (declared, lines) = generated(&mut Random::new(seed), &mut Random::new(units));
            values(&joined(&declared, &lines))
        };
        for ((name, a), (_, b)) in of(seed + 1000).iter().zip(of(seed + 2000).iter()) {
            let size = a
                .iter()
                .chain(b)
                .filter(|v| v.is_finite())
                .fold(0.0, |m: f64, v| m.max(v.abs()));
            for (a, b) in a.iter().zip(b) {
                // Sums of terms that nearly cancel keep fewer digits than their terms have.
                let same = a.is_nan() == b.is_nan()
                    && (a.is_nan() || (a - b).abs() <= 1e-9 * size.max(1.0));
                assert!(same, "seed {seed}, {name}: {a} is not {b}");
            }
        }
    }
}

#[test]
fn printing_what_was_read_says_the_same() {
    for seed in 1..=SHEETS {
        let (declared, lines) = generated(&mut Random::new(seed), &mut Random::new(seed));
        let text = joined(&declared, &lines);
        let once = print(&parse(&text), &text);
        let twice = print(&parse(&once), &once);
        assert_eq!(once, twice, "seed {seed}");
        let same = values(&text).iter().zip(values(&once)).all(|(a, b)| {
            a.0 == b.0
                && a.1
                    .iter()
                    .zip(&b.1)
                    .all(|(a, b)| a.to_bits() == b.to_bits())
        });
        assert!(same, "seed {seed}\n{text}\n{once}");
    }
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

#[test]
fn no_text_makes_it_panic() {
    for seed in 1..=3 * SHEETS {
        let mut random = Random::new(seed);
        let text: String = (0..random.below(120)).map(|_| *random.of(PIECES)).collect();
        let sheet = Sheet::open(&text);
        let report = sheet.report(&[]);
        assert!(
            report.findings.iter().all(|f| f.line >= 1 && f.column >= 1),
            "{text:?}"
        );
        let length: usize = sheet.tree().statements.iter().map(|s| s.length).sum();
        assert_eq!(
            length,
            text.len(),
            "every byte belongs to one statement: {text:?}"
        );
    }
}

#[test]
fn cut_and_spliced_sheets_do_not_make_it_panic() {
    let whole = include_str!("../../www/sheets/osier-balancing-loads.pitchwright");
    let characters: Vec<char> = whole.chars().collect();
    for seed in 1..=SHEETS {
        let mut random = Random::new(seed);
        let (from, to) = (
            random.below(characters.len()),
            random.below(characters.len()),
        );
        let mut text: Vec<char> = characters.clone();
        if from < to {
            text.drain(from..to.min(from + 40));
        } else {
            let piece: Vec<char> = characters[to..from.min(to + 40)].to_vec();
            text.splice(from..from, piece);
        }
        let text: String = text.into_iter().collect();
        let _ = Sheet::open(&text).report(&[]);
    }
}

/// Texts beyond each limit, with the code that tells so.
fn beyond_limits() -> Vec<(String, &'static str)> {
    let deep = format!("x = {}1{}\n", "(".repeat(5000), ")".repeat(5000));
    let doubling: String = (1..=40)
        .map(|i| format!("f{i}(x) = f{}(x) + f{}(x)\n", i - 1, i - 1))
        .collect();
    let axes: String = (0..8)
        .map(|i| {
            let labels: Vec<String> = (0..30).map(|l| l.to_string()).collect();
            format!(
                "vary a{i}: {}\nv{i} by a{i} = {}\n",
                labels.join(" | "),
                labels.join(" | ")
            )
        })
        .collect();
    let product: Vec<String> = (0..8).map(|i| format!("v{i}")).collect();
    vec![
        (format!("x = 1{}\n", "+1".repeat(100_000)), "operator-limit"),
        (deep, "nesting-limit"),
        (format!("x = {}1\n", "-".repeat(50_000)), "nesting-limit"),
        (
            format!("f0(x) = x + 1\n{doubling}y = f40(2)\n"),
            "operator-limit",
        ),
        (
            format!("{axes}y = {}\n", product.join("*")),
            "condition-limit",
        ),
        ("x [ft] = 1 ; r\n".repeat(360_000), "sheet-too-large"),
        (
            (0..70).map(|i| format!("vary a{i}: p | q\n")).collect(),
            "axis-limit",
        ),
        (
            "vary a [1]: 0 to 1000000 step 1\n".to_owned(),
            "label-limit",
        ),
    ]
}

#[test]
fn limits_answer_with_a_finding() {
    for (text, code) in beyond_limits() {
        let report = Sheet::open(&format!("z = 3\n{text}")).report(&[]);
        assert!(
            report.findings.iter().any(|f| f.code == code),
            "{code}: {:?}",
            report.findings.first()
        );
        let kept = serde_json::to_value(&report.quantity("z").expect("z").values).expect("plain");
        assert_eq!(kept, serde_json::json!([3.0]), "{code} hides another value");
    }
}

#[test]
fn a_warm_run_equals_a_cold_one() {
    let editing = formulas::sheet::Around {
        editing: true,
        ..formulas::sheet::Around::default()
    };
    let json = |s: &Sheet| serde_json::to_string(&s.report(&[])).expect("a report");
    for seed in 0..SHEETS / 5 {
        let random = &mut Random::new(seed + 1);
        let (declared, mut lines) = generated(random, &mut Random::new(seed));
        lines.push("governing x11, f11".to_owned());
        lines.push("require x11 < f11*1 m/1 N".to_owned());
        lines.push("unknown u between -50 and 50 such that u*x4 = x5 + u*x6/3".to_owned());
        let mut sheet = Sheet::open_around(&joined(&declared, &lines), &editing);
        for _ in 0..8 {
            edit(&mut lines, random);
            let text = joined(&declared, &lines);
            sheet.update(&text);
            assert_eq!(json(&sheet), json(&Sheet::open(&text)), "{text}");
        }
    }
}

/// Changes a line as somebody who types does: another number, a line away, two in another order, a slip.
fn edit(lines: &mut Vec<String>, random: &mut Random) {
    let at = random.below(lines.len());
    match random.below(6) {
        0 | 1 => lines[at] = lines[at].replacen('3', "4", 1).replacen("x1", "x2", 1),
        2 => lines[at] += " + 0*x0",
        3 => {
            let other = random.below(lines.len());
            lines.swap(at, other);
        }
        4 => lines[at] = lines[at].replacen('=', "= 2*", 1),
        _ => {
            lines.remove(at);
        }
    }
}
