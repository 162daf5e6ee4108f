//! Compiles the browser door of the engine and makes its JavaScript glue.

use std::env;
use std::path::{Path, PathBuf};

use wasm_bindgen_cli_support::Bindgen;

use crate::command::{command, run};
use crate::failure::{Outcome, while_doing};
use crate::paths::Paths;
use crate::setup::WASM_TARGET;

/// The profile of the workspace that the page is compiled with.
const PROFILE: &str = "page";

/// Compiles the crate `www` and writes `engine.js`, `engine.d.ts` and `engine_bg.wasm` into `paths.generated`.
/// Gives the path of the wasm file.
///
/// # Errors
/// When the compiler or the glue generator fails.
pub fn build(paths: &Paths) -> Outcome<PathBuf> {
    let module = compile(paths)?;
    let mut bindgen = Bindgen::new();
    bindgen
        .input_path(module)
        .out_name("engine")
        .typescript(true);
    bindgen
        .omit_default_module_path(true)
        .remove_name_section(true)
        .remove_producers_section(true);
    bindgen
        .web(true)
        .map_err(while_doing("cannot make the engine's glue"))?;
    bindgen
        .generate(&paths.generated)
        .map_err(while_doing("cannot make the engine's glue"))?;
    Ok(paths.generated.join("engine_bg.wasm"))
}

fn compile(paths: &Paths) -> Outcome<PathBuf> {
    let cargo = env::var("CARGO").unwrap_or_else(|_| "cargo".to_owned());
    let mut build = command(&cargo, &paths.root);
    build.args([
        "build",
        "--quiet",
        "--package",
        "www",
        "--lib",
        "--profile",
        PROFILE,
        "--target",
        WASM_TARGET,
    ]);
    build.arg("--target-dir").arg(&paths.wasm_target);
    // The encoded form overrules every other source of flags, so that the file does not depend on the machine's settings.
    build
        .env("CARGO_ENCODED_RUSTFLAGS", flags(&paths.root).join("\u{1f}"))
        .env_remove("RUSTFLAGS");
    run(&mut build)?;
    Ok(paths
        .wasm_target
        .join(WASM_TARGET)
        .join(PROFILE)
        .join("www.wasm"))
}

/// Compiler flags: vector instructions, which every current browser has, and no path of this machine in the file.
fn flags(root: &Path) -> Vec<String> {
    let mut flags = vec!["-Ctarget-feature=+simd128".to_owned()];
    flags.push(format!("--remap-path-prefix={}=.", root.display()));
    if let Some(home) = cargo_home() {
        flags.push(format!("--remap-path-prefix={}=cargo", home.display()));
    }
    flags
}

fn cargo_home() -> Option<PathBuf> {
    let given = env::var_os("CARGO_HOME").map(PathBuf::from);
    given.or_else(|| env::home_dir().map(|home| home.join(".cargo")))
}
