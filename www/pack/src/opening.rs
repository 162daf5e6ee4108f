//! Shows the finished page to the person who built it, where there is a desktop.

use std::env;
use std::path::Path;
use std::process::{Command, Stdio};

/// Opens `file` with the desktop's own opener. Gives false where there is no desktop or no opener.
pub fn open(file: &Path) -> bool {
    opener(file).is_some_and(|mut opener| {
        opener
            .stdin(Stdio::null())
            .stdout(Stdio::null())
            .stderr(Stdio::null());
        opener.status().is_ok_and(|status| status.success())
    })
}

fn opener(file: &Path) -> Option<Command> {
    if cfg!(windows) {
        // `start` takes its first quoted argument for a window title.
        let mut command = Command::new("cmd");
        command.args(["/C", "start", ""]).arg(file);
        return Some(command);
    }
    if cfg!(not(target_os = "macos")) && !has_display() {
        return None;
    }
    let mut command = Command::new(if cfg!(target_os = "macos") {
        "open"
    } else {
        "xdg-open"
    });
    command.arg(file);
    Some(command)
}

fn has_display() -> bool {
    ["DISPLAY", "WAYLAND_DISPLAY"]
        .iter()
        .any(|name| env::var_os(name).is_some_and(|value| !value.is_empty()))
}
