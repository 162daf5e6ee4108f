//! Independent references: the scripts of `tests/outside` recompute sheets with general libraries of Python and compare
//! them with what the command line prints.

use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Stdio};

/// How many comparisons held, and how many did not.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Compared {
    /// Numbers within their tolerance.
    pub passed: u64,
    /// Numbers outside, and one for each script that did not run to its end or compared nothing.
    pub failed: u64,
}

/// Runs each script whose name has `filter` in it, after setting Python's libraries up under the build folder.
///
/// # Errors
/// When Python is missing, the libraries cannot be installed, or the command line cannot be built.
pub fn compare(filter: &str) -> Result<Compared, String> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("outside");
    let binary = command_line(&folder)?;
    let python = python(&folder, &built()?.with_file_name("outside"))?;
    let mut compared = Compared::default();
    for script in scripts(&folder, filter)? {
        let Compared { passed, failed } = one(&script, &python, &binary)?;
        compared.passed += passed;
        compared.failed += failed;
    }
    if compared == Compared::default() {
        return Err(format!("no script of {} was run", folder.display()));
    }
    Ok(compared)
}

/// The folder with the programs of this build.
fn built() -> Result<PathBuf, String> {
    let here = std::env::current_exe().map_err(|e| format!("no path of this program: {e}"))?;
    Ok(here
        .parent()
        .ok_or("this program has no folder")?
        .to_owned())
}

/// Builds the command line, in the build that this program is of, and gives its path.
fn command_line(folder: &Path) -> Result<PathBuf, String> {
    let mut cargo = Command::new("cargo");
    cargo.args(["build", "--quiet", "--package", "formulas", "--bin"]);
    carry_out(cargo.arg("pitchwright").current_dir(folder))?;
    let name = format!("pitchwright{}", std::env::consts::EXE_SUFFIX);
    Ok(built()?.join(name))
}

/// Python with the libraries of `requirements.txt`, in a folder of its own that is made anew when the list changes.
fn python(folder: &Path, place: &Path) -> Result<PathBuf, String> {
    let list = folder.join("requirements.txt");
    let wanted = fs::read(&list).map_err(|e| format!("{}: {e}", list.display()))?;
    let python = place.join(if cfg!(windows) {
        "Scripts/python.exe"
    } else {
        "bin/python"
    });
    // A copy of the list, written after the last whole installation.
    let installed = place.join("installed.txt");
    if python.exists() && fs::read(&installed).is_ok_and(|copy| copy == wanted) {
        return Ok(python);
    }
    environment(place)?;
    let mut pip = Command::new(&python);
    pip.args(["-m", "pip", "install", "--quiet", "--no-deps"]);
    pip.args(["--only-binary", ":all:", "--no-compile"]);
    pip.args(["--disable-pip-version-check", "--requirement"]);
    carry_out(pip.arg(&list))?;
    fs::write(&installed, wanted).map_err(|e| format!("{}: {e}", installed.display()))?;
    Ok(python)
}

/// Makes an empty environment. Debian keeps the module for that in a package of its own, which root may install.
fn environment(place: &Path) -> Result<(), String> {
    let make = || {
        let mut command = Command::new("python3");
        carry_out(command.args(["-m", "venv", "--clear"]).arg(place))
    };
    make().or_else(|first| {
        let mut update = Command::new("apt-get");
        carry_out(update.args(["update", "-qq"]))
            .and_then(|()| {
                let mut install = Command::new("apt-get");
                install.args(["install", "-y", "-qq", "--no-install-recommends"]);
                install.env("DEBIAN_FRONTEND", "noninteractive");
                carry_out(install.args(["python3", "python3-venv"]))
            })
            .map_err(|_| format!("Python 3.10 or newer with its module venv is needed: {first}"))?;
        make()
    })
}

/// The scripts, in the order of their names.
fn scripts(folder: &Path, filter: &str) -> Result<Vec<PathBuf>, String> {
    let entries = fs::read_dir(folder).map_err(|e| format!("{}: {e}", folder.display()))?;
    let mut scripts: Vec<PathBuf> = entries
        .filter_map(|entry| entry.ok().map(|e| e.path()))
        .filter(|path| path.extension().is_some_and(|e| e == "py"))
        .filter(|path| {
            path.file_stem()
                .is_some_and(|name| name.to_string_lossy().contains(filter))
        })
        .collect();
    scripts.sort();
    Ok(scripts)
}

fn one(script: &Path, python: &Path, binary: &Path) -> Result<Compared, String> {
    let mut command = Command::new(python);
    command.arg(script).env("PITCHWRIGHT", binary);
    command.env("PYTHONDONTWRITEBYTECODE", "1");
    command.env("OMP_NUM_THREADS", "1");
    command.stdin(Stdio::null()).stderr(Stdio::inherit());
    let ended = command
        .output()
        .map_err(|e| format!("{}: {e}", script.display()))?;
    let text = String::from_utf8_lossy(&ended.stdout);
    print!("{text}");
    Ok(counted(&text, ended.status.success()).unwrap_or_else(|| {
        println!("{}: did not run to its end", script.display());
        Compared {
            passed: 0,
            failed: 1,
        }
    }))
}

/// Reads the closing line, `name: 3 passed, 0 failed`. A script that says it failed, or compared nothing, has failed.
fn counted(text: &str, success: bool) -> Option<Compared> {
    let (_, counts) = text.lines().last()?.rsplit_once(": ")?;
    let (passed, failed) = counts.split_once(", ")?;
    let passed: u64 = passed.strip_suffix(" passed")?.parse().ok()?;
    let failed: u64 = failed.strip_suffix(" failed")?.parse().ok()?;
    let broken = u64::from(failed == 0 && (passed == 0 || !success));
    Some(Compared {
        passed,
        failed: failed + broken,
    })
}

fn carry_out(command: &mut Command) -> Result<(), String> {
    let name = format!("{command:?}");
    let ended = command
        .stdin(Stdio::null())
        .output()
        .map_err(|e| format!("{name}: {e}"))?;
    if ended.status.success() {
        return Ok(());
    }
    let said = String::from_utf8_lossy(&ended.stderr);
    let printed = String::from_utf8_lossy(&ended.stdout);
    Err(format!("{name} failed\n{printed}{said}"))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_script_that_compares_nothing_or_breaks_off_has_failed() {
        let of = |passed, failed| Some(Compared { passed, failed });
        assert_eq!(counted("x\nair: 3 passed, 0 failed\n", true), of(3, 0));
        assert_eq!(counted("air: 3 passed, 2 failed\n", false), of(3, 2));
        assert_eq!(counted("air: 0 passed, 0 failed\n", false), of(0, 1));
        assert_eq!(counted("air: 3 passed, 0 failed\n", false), of(3, 1));
        assert_eq!(counted("Traceback", false), None);
        assert_eq!(counted("", true), None);
    }
}
