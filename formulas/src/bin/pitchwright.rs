//! The command line: reads sheets, hands them to the library, prints what it gives.

#[path = "pitchwright/arguments.rs"]
mod arguments;
#[path = "pitchwright/commands.rs"]
mod commands;
#[path = "pitchwright/files.rs"]
mod files;
#[path = "pitchwright/lists.rs"]
mod lists;
#[path = "pitchwright/mending.rs"]
mod mending;
#[path = "pitchwright/outcome.rs"]
mod outcome;

use arguments::{Command, USAGE, read};
use outcome::Outcome;
use std::process::ExitCode;

fn main() -> ExitCode {
    let outcome = match read(std::env::args_os().skip(1)) {
        Ok(command) => carry_out(command),
        Err(message) => Outcome::usage(&format!("{message}\n\n{USAGE}")),
    };
    outcome.print()
}

fn carry_out(command: Command) -> Outcome {
    match command {
        Command::Help => Outcome::results(USAGE.to_owned()),
        Command::Version => Outcome::results(format!("{}\n", env!("CARGO_PKG_VERSION"))),
        Command::Run(run) => commands::run(&run),
        Command::Check(sheets) => commands::check(&sheets),
        Command::Fix { sheet, dry_run } => commands::fix(&sheet, dry_run),
        Command::Trail { sheet, symbol, at } => commands::trail(&sheet, &symbol, &at),
        Command::Compare { old, new } => commands::compare(&old, &new),
        Command::Functions(name) => lists::functions(name.as_deref()),
        Command::Reference => Outcome::results(formulas::reference::write()),
        Command::Schema => Outcome::results(formulas::report::json::SCHEMA.to_owned()),
        Command::Units(text) => lists::units(text.as_deref()),
    }
}
