//! `cargo bench --package tests`: the workloads beside their floors. A sample is the quickest of three, a ratio the median
//! of nine samples in one run, each to the floor just before and just after it; names as arguments choose workloads. What the numbers mean, and what was
//! tried, stands in the contributors' guide.

mod envelope;
mod floor;
mod reader;

use engine::quantity::{Area, Force, Length, MassDensity, Ratio, Velocity};
use floor::{Envelope, SIZES};
use formulas::Sheet;
use formulas::parse::parse;
use formulas::plan::Plan;
use formulas::program::Program;
use formulas::run::{Limits, run};
use formulas::sheet::Around;
use formulas::used::UsedSheets;
use formulas::values::Values;
use formulas::{check, graph, names};
use std::hint::black_box;
use std::time::Instant;
use uom::si::{area, force, length, mass_density, velocity};

/// A sample lasts at least this long, in seconds.
const SAMPLE: f64 = 2e-3;

fn main() {
    // Cargo hands on `--bench`; what is left are names.
    let names: Vec<String> = std::env::args()
        .skip(1)
        .filter(|a| !a.starts_with("--"))
        .collect();
    let asked = |name: &str| names.is_empty() || names.iter().any(|n| name.starts_with(n.as_str()));
    println!(
        "{:<34}{:>12}{:>12}{:>8}{:>7}{:>7}",
        "workload", "floor", "ours", "ratio", "bar", "goal"
    );
    let targets = [(10.0, 4.0), (6.0, 3.5), (4.5, 2.5), (4.5, 2.5), (4.5, 2.3)];
    for ((name, lengths), target) in SIZES.into_iter().zip(targets) {
        let conditions = conditions_of(lengths);
        let title = format!("envelope {name}, {conditions} conditions");
        if asked(&title) {
            envelope_at(&title, lengths, name != 'e', target);
        }
    }
    for (lines, text, expected) in [
        (
            300,
            include_str!("sheets/s300.pitchwright"),
            79.017_836_269_193_52,
        ),
        (
            2000,
            include_str!("sheets/s2000.pitchwright"),
            44.661_435_754_904_34,
        ),
    ] {
        let title = format!("reading {lines} lines");
        if asked(&title) {
            reading(&title, text, expected);
        }
    }
    if asked("edit") {
        edit();
    }
    if asked("expression") {
        expression_over_conditions();
        expression_once();
    }
}

fn conditions_of(lengths: [usize; 5]) -> usize {
    lengths.iter().product()
}

/// The envelope sheet's plan, run again: what an edit of an input costs once the text is read.
fn envelope_at(title: &str, lengths: [usize; 5], stored: bool, target: (f64, f64)) {
    let (program, plan) = planned(&envelope::text(lengths));
    let asked: Vec<String> = stored.then(|| "P".to_owned()).into_iter().collect();
    let mut by_hand = Envelope::new(lengths, stored);
    let (values, found) = (work_out(&program, &plan, &asked), by_hand.run());
    let p = program.quantities.iter().position(|q| q.symbol == "P");
    let summary = values.quantities[p.expect("the sheet has P")].summary;
    for (ours, floor) in [
        (summary.largest, found.largest),
        (summary.smallest, found.smallest),
    ] {
        let ours = ours.expect("P has values");
        let near = (ours.value - floor.0).abs() <= 1e-9 * floor.0.abs();
        assert!(near && ours.condition == floor.1, "{ours:?}, not {floor:?}");
    }
    // By a plain loop over the conditions, one at a time, with every division written out.
    let known = match conditions_of(lengths) {
        8 => Some(((1_223.215_676_821_171_4, 5), (-3_493.750_680_984_763_7, 3))),
        1000 => Some((
            (1_320.230_157_925_816_5, 454),
            (-3_493.750_680_984_763_7, 799),
        )),
        _ => None,
    };
    for (known, found) in known
        .into_iter()
        .flat_map(|(high, low)| [(high, found.largest), (low, found.smallest)])
    {
        let near = (known.0 - found.0).abs() <= 1e-9 * known.0.abs();
        assert!(near && known.1 == found.1, "{found:?}, not {known:?}");
    }
    let ratio = compared(
        &mut || {
            black_box(by_hand.run());
        },
        &mut || {
            black_box(work_out(&program, &plan, &asked));
        },
    );
    ratio.line(title, Some(target));
}

/// From the text to the values, every stage: what the floor does in one pass, with places, findings and recovery.
fn reading(title: &str, text: &str, expected: f64) {
    let near = |value: f64| (value - expected).abs() <= 1e-9 * expected;
    assert!(reader::last_value(text).is_some_and(near), "the floor");
    let sheet = Sheet::open(text);
    let last = sheet
        .values()
        .quantities
        .last()
        .and_then(|q| q.summary.largest);
    assert!(last.is_some_and(|l| near(l.value)), "{last:?}");
    let ratio = compared(
        &mut || {
            black_box(reader::last_value(black_box(text)));
        },
        &mut || {
            black_box(Sheet::open(black_box(text)));
        },
    );
    ratio.line(title, Some((5.0, 3.0)));
}

/// One input typed anew in a sheet of 300 lines, 40 of which depend on it over 100 conditions: to the values, the line
/// read again. The bar is a time, 1 ms, as there is no floor for it.
fn edit() {
    let text = include_str!("sheets/s300.pitchwright");
    let mut varied = String::from("vary k [1]: 0 to 99 step 1\n");
    for line in text.lines() {
        let symbol = line.split(' ').next().unwrap_or("");
        let changed = [
            "area_1", "rho_4", "one_7", "force_10", "spd_13", "len_16", "press_19", "mom_22",
            "area_25", "rho_28",
        ];
        varied += line;
        if changed.contains(&symbol) {
            varied += "*(1 + 0.3*k/99)";
        }
        varied += "\n";
    }
    let other = varied.replacen("force_xe = 1000.0 lbf", "force_xe = 1100.0 lbf", 1);
    assert_ne!(varied, other);
    let editing = Around {
        editing: true,
        ..Around::default()
    };
    let mut sheet = Sheet::open_around(&varied, &editing);
    sheet.update(&other);
    assert!(sheet.ran().len() >= 40, "{:?}", sheet.ran());
    let mut turn = false;
    let time = sampled(&mut || {
        turn = !turn;
        sheet.update(if turn { &varied } else { &other });
    });
    println!(
        "{:<34}{:>12}{:>12}{:>8}   bar 1 ms",
        "edit, 40 lines of 300",
        "",
        shown(time),
        ""
    );
}

/// One expression of seven quantities over very many conditions.
fn expression_over_conditions() {
    const COUNT: usize = 100_000;
    let text = format!(
        "vary V [kn]: 60 to 160 count {COUNT}\nrho [slug/ft^3] = 0.002377\nS [ft^2] = 142\nc [ft] = 4.6\nCm = -0.05\n\
         l [ft] = 11.2\nP [lbf] = 0.5*rho*V^2*S*c*Cm/l\n"
    );
    let (program, plan) = planned(&text);
    let asked = ["P".to_owned()];
    let last = work_out(&program, &plan, &asked);
    let last = last.quantities.last().and_then(|q| q.summary.smallest);
    // 142.169643277 lbf at 120 kn, and the square of the speed.
    let expected = -142.169_643_277 * (160.0 * 160.0 / (120.0 * 120.0)) * 4.448_221_615_260_5;
    assert!(last.is_some_and(|l| (l.value / expected - 1.0).abs() < 1e-9));
    let speeds: Vec<f64> = (0..COUNT).map(|i| 60.0 + i as f64 * 1e-3).collect();
    let mut out = vec![0.0; COUNT];
    let ratio = compared(
        &mut || {
            for (out, v) in out.iter_mut().zip(black_box(&speeds)) {
                *out = by_hand(*v);
            }
            black_box(&out);
        },
        &mut || {
            black_box(work_out(&program, &plan, &asked));
        },
    );
    ratio.line("expression, each condition", Some((4.0, 2.0)));
}

/// The same with the engine's typed quantities, one call after the other.
fn expression_once() {
    let ratio = compared(
        &mut || {
            black_box(
                (0..1000)
                    .map(|i| by_hand(black_box(120.0 + f64::from(i))))
                    .sum::<f64>(),
            );
        },
        &mut || {
            black_box(
                (0..1000)
                    .map(|i| typed(black_box(120.0 + f64::from(i))))
                    .sum::<f64>(),
            );
        },
    );
    ratio.line("expression, typed, 1000 calls", None);
}

fn by_hand(knots: f64) -> f64 {
    let (v, foot) = (knots * (1852.0 / 3600.0), 0.3048);
    let rho = black_box(0.002377) * 515.378_818_393_196_1;
    0.5 * rho
        * v
        * v
        * (black_box(142.0) * foot * foot)
        * (black_box(4.6) * foot)
        * black_box(-0.05)
        / (black_box(11.2) * foot)
        / 4.448_221_615_260_5
}

fn typed(knots: f64) -> f64 {
    let v = Velocity::new::<velocity::knot>(knots);
    let rho = MassDensity::new::<mass_density::slug_per_cubic_foot>(black_box(0.002377));
    let s = Area::new::<area::square_foot>(black_box(142.0));
    let c = Length::new::<length::foot>(black_box(4.6));
    let l = Length::new::<length::foot>(black_box(11.2));
    let p: Force = 0.5 * rho * v * v * s * (c / l) * Ratio::from(black_box(-0.05));
    p.get::<force::pound_force>()
}

fn planned(text: &str) -> (Program, Plan) {
    let tree = parse(text);
    let mut problems = Vec::new();
    let names = names::collect(&tree, &mut problems);
    let order = graph::order(&tree, &names, &mut problems);
    let (program, _) = check::check(text, &tree, &names, &order, &UsedSheets::default());
    let plan = formulas::plan::plan(&program);
    (program, plan)
}

fn work_out(program: &Program, plan: &Plan, asked: &[String]) -> Values {
    run(program, plan, Limits::default(), asked).0
}

/// Medians of interleaved samples, in seconds.
struct Compared {
    floor: f64,
    ours: f64,
    ratio: f64,
}

impl Compared {
    fn line(&self, title: &str, target: Option<(f64, f64)>) {
        let (bar, goal) = match target {
            Some((bar, goal)) => (bar.to_string(), goal.to_string()),
            None => (String::new(), String::new()),
        };
        let missed = target.is_some_and(|(bar, _)| self.ratio > bar);
        println!(
            "{title:<34}{:>12}{:>12}{:>8.2}{bar:>7}{goal:>7}{}",
            shown(self.floor),
            shown(self.ours),
            self.ratio,
            if missed { "  bar missed" } else { "" }
        );
    }
}

/// Times both again and again, the floor before and after ours.
fn compared(floor: &mut dyn FnMut(), ours: &mut dyn FnMut()) -> Compared {
    const SAMPLES: usize = 9;
    sampled(floor);
    let (mut floors, mut all, mut ratios) = (Vec::new(), Vec::new(), Vec::new());
    let mut before = sampled(floor);
    for _ in 0..SAMPLES {
        let time = sampled(ours);
        let after = sampled(floor);
        ratios.push(time / ((before + after) / 2.0));
        floors.push(after);
        all.push(time);
        before = after;
    }
    Compared {
        floor: median(floors),
        ours: median(all),
        ratio: median(ratios),
    }
}

fn median(mut list: Vec<f64>) -> f64 {
    list.sort_by(f64::total_cmp);
    list[list.len() / 2]
}

/// The time of one call: of the quickest of three samples, each of so many calls that it lasts long enough.
fn sampled(call: &mut dyn FnMut()) -> f64 {
    let start = Instant::now();
    call();
    let calls = (SAMPLE / start.elapsed().as_secs_f64()).ceil().max(1.0) as usize;
    let sample = |_| {
        let start = Instant::now();
        for _ in 0..calls {
            call();
        }
        start.elapsed().as_secs_f64() / calls as f64
    };
    (0..3).map(sample).fold(f64::INFINITY, f64::min)
}

fn shown(seconds: f64) -> String {
    if seconds < 1e-6 {
        format!("{:.1} ns", seconds * 1e9)
    } else if seconds < 1e-3 {
        format!("{:.2} us", seconds * 1e6)
    } else {
        format!("{:.2} ms", seconds * 1e3)
    }
}
