//! `cargo abuse [seconds] [name …]`: tries the laws on generated sheets and every stage on mutated ones, each for so
//! many seconds (10 where none are given), and prints what was tried. A text that breaks something is kept in
//! `target/abuse`.

use std::panic::{AssertUnwindSafe, catch_unwind};
use std::process::ExitCode;
use std::time::{Duration, Instant};
use tests::laws::LAWS;
use tests::mutate::{TARGETS, corpus, mutated};
use tests::random::Random;

/// What takes longer than this is told as a hang.
const SLOW: Duration = Duration::from_secs(5);

fn main() -> ExitCode {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    let seconds = arguments.iter().find_map(|a| a.parse().ok()).unwrap_or(10);
    let names: Vec<&String> = arguments
        .iter()
        .filter(|a| a.parse::<u64>().is_err())
        .collect();
    let asked = |name: &str| names.is_empty() || names.iter().any(|n| *n == name);
    let time = Duration::from_secs(seconds);
    let corpus = corpus();
    let mut broken = 0;
    for (name, law) in LAWS {
        if asked(name) {
            broken += tries(name, time, &|seed| (law(seed), format!("seed {seed}")));
        }
    }
    for (name, target) in TARGETS {
        if asked(name) {
            broken += tries(name, time, &|seed| {
                let text = mutated(&corpus, &mut Random::new(seed));
                (target(&text), text)
            });
        }
    }
    if broken == 0 {
        ExitCode::SUCCESS
    } else {
        ExitCode::FAILURE
    }
}

/// Tries seeds for a time; how many broke something.
fn tries(name: &str, time: Duration, one: &dyn Fn(u64) -> (Result<(), String>, String)) -> usize {
    let start = Instant::now();
    let (mut seed, mut broken, mut slow) = (1_000_000, 0, 0);
    while start.elapsed() < time {
        seed += 1;
        let began = Instant::now();
        let result = catch_unwind(AssertUnwindSafe(|| one(seed)));
        let fault = match &result {
            Ok((Ok(()), _)) if began.elapsed() < SLOW => continue,
            Ok((Ok(()), _)) => {
                slow += 1;
                format!("took {:?}", began.elapsed())
            }
            Ok((Err(fault), _)) => fault.clone(),
            Err(_) => "a panic".to_owned(),
        };
        broken += 1;
        keep(name, seed, &fault, result.ok().map(|(_, text)| text));
    }
    println!(
        "{name}: {} tried in {:.0} s, {broken} broken, {slow} of them slow",
        seed - 1_000_000,
        start.elapsed().as_secs_f64()
    );
    broken
}

/// Keeps what broke and how, where it can be written, and tells of it in a line.
fn keep(name: &str, seed: u64, fault: &str, text: Option<String>) {
    let folder = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("../target/abuse");
    let file = folder.join(format!("{name}-{seed}.txt"));
    let whole = format!("{fault}\n\n{}", text.unwrap_or_default());
    let kept = std::fs::create_dir_all(&folder)
        .and_then(|()| std::fs::write(&file, whole))
        .is_ok();
    let place = if kept {
        file.display().to_string()
    } else {
        String::new()
    };
    let first = fault.lines().next().unwrap_or("");
    println!("{name}, seed {seed}: {first} {place}");
}
