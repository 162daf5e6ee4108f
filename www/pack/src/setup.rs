//! Installs what a fresh machine lacks: the wasm target, the page's node packages, a browser for the tests.

use std::fs;
use std::path::Path;

use crate::command::{command, present, run};
use crate::failure::{Failure, Outcome, while_doing};

/// The compilation target of the page's engine.
pub const WASM_TARGET: &str = "wasm32-unknown-unknown";

/// Where Debian puts the browser of the tests.
pub const CHROMIUM: &str = "/usr/bin/chromium";

/// Adds the wasm target to the toolchain in use, unless it is there already.
///
/// # Errors
/// When the target is missing and rustup is absent or cannot add it.
pub fn wasm_target(root: &Path) -> Outcome<()> {
    let libraries =
        run(command("rustc", root).args(["--print", "target-libdir", "--target", WASM_TARGET]))?;
    if Path::new(libraries.trim()).is_dir() {
        return Ok(());
    }
    if !present("rustup", root) {
        return Err(Failure::new(format!(
            "this toolchain lacks {WASM_TARGET}, and there is no rustup to add it"
        )));
    }
    run(command("rustup", root).args(["target", "add", WASM_TARGET])).map(drop)
}

/// Installs the node packages that `folder`'s lock file names, unless that lock file is what is installed.
///
/// # Errors
/// When node or npm is absent, or npm cannot install.
pub fn node_packages(folder: &Path) -> Outcome<()> {
    let lock = fs::read(folder.join("package-lock.json"))
        .map_err(while_doing("cannot read package-lock.json"))?;
    // A copy of the lock file, written after the last whole installation.
    let installed = folder.join("node_modules/.installed-lock.json");
    if fs::read(&installed).is_ok_and(|copy| copy == lock) {
        return Ok(());
    }
    for program in ["node", "npm"] {
        if !present(program, folder) {
            return Err(Failure::new(format!(
                "{program} is needed to build the page (Node 20 or newer)"
            )));
        }
    }
    run(command("npm", folder).args(["ci", "--ignore-scripts", "--no-audit", "--no-fund"]))?;
    fs::write(&installed, lock).map_err(while_doing("cannot note the installed packages"))
}

/// Installs the browser that the tests drive, unless it is there already. Only Debian's package manager is
/// asked, and only by root.
///
/// # Errors
/// When the browser is missing and cannot be installed here.
pub fn chromium() -> Outcome<()> {
    if Path::new(CHROMIUM).exists() {
        return Ok(());
    }
    let root = Path::new("/");
    let is_root = run(command("id", root).arg("-u")).is_ok_and(|id| id.trim() == "0");
    if !is_root || !present("apt-get", root) {
        return Err(Failure::new(format!(
            "the browser tests need {CHROMIUM}: on Debian, as root, apt-get install chromium fonts-dejavu-core"
        )));
    }
    let mut update = command("apt-get", root);
    run(update
        .args(["update", "-qq"])
        .env("DEBIAN_FRONTEND", "noninteractive"))?;
    let mut install = command("apt-get", root);
    install.args([
        "install",
        "-y",
        "-qq",
        "--no-install-recommends",
        "chromium",
        "fonts-dejavu-core",
    ]);
    run(install.env("DEBIAN_FRONTEND", "noninteractive")).map(drop)
}
