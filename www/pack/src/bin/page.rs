//! `cargo page` builds the page and opens it; `cargo page --build-only` builds it only.

use std::env;
use std::process::ExitCode;

use pack::{Paths, build, opening};

fn main() -> ExitCode {
    let arguments: Vec<String> = env::args().skip(1).collect();
    match arguments
        .iter()
        .map(String::as_str)
        .collect::<Vec<_>>()
        .as_slice()
    {
        [] => make(true),
        ["--build-only"] => make(false),
        _ => {
            eprintln!("usage: cargo page [--build-only]");
            ExitCode::from(64)
        }
    }
}

fn make(and_open: bool) -> ExitCode {
    let paths = Paths::here();
    if let Err(failure) = build::page(&paths) {
        eprintln!("{failure}");
        return ExitCode::FAILURE;
    }
    println!("{}", paths.output.display());
    if and_open && !opening::open(&paths.output) {
        eprintln!("There is no desktop here to open it on.");
    }
    ExitCode::SUCCESS
}
