//! Runs other programs, quiet while they succeed.

use std::ffi::OsStr;
use std::path::Path;
use std::process::{Command, Stdio};

use crate::failure::{Failure, Outcome, while_doing};

/// A command for `program` in `folder`. On Windows npm is a script, which only its full name starts.
pub(crate) fn command(program: &str, folder: &Path) -> Command {
    let name = if cfg!(windows) && program == "npm" {
        "npm.cmd"
    } else {
        program
    };
    let mut command = Command::new(name);
    command.current_dir(folder);
    command
}

/// Runs `command` to its end and gives its standard output; its output becomes the failure when it does not succeed.
pub(crate) fn run(command: &mut Command) -> Outcome<String> {
    let name = command.get_program().to_string_lossy().into_owned();
    let output = command
        .stdin(Stdio::null())
        .output()
        .map_err(while_doing(format!("cannot start {name}")))?;
    let standard = String::from_utf8_lossy(&output.stdout).into_owned();
    if output.status.success() {
        return Ok(standard);
    }
    let arguments: Vec<_> = command.get_args().map(OsStr::to_string_lossy).collect();
    let errors = String::from_utf8_lossy(&output.stderr);
    Err(Failure::new(format!(
        "{name} {} failed\n{standard}{errors}",
        arguments.join(" ")
    )))
}

/// Whether `program --version` can be run at all.
pub(crate) fn present(program: &str, folder: &Path) -> bool {
    let mut command = command(program, folder);
    command
        .arg("--version")
        .stdin(Stdio::null())
        .stdout(Stdio::null())
        .stderr(Stdio::null());
    command.status().is_ok_and(|status| status.success())
}
