//! Makes the package for other pages and for Node: the engine, its entries and their types.

use std::fs;
use std::path::Path;
use std::process::Command;

use crate::command::{command, run};
use crate::failure::{Outcome, while_doing};
use crate::paths::Paths;

/// The declarations that someone who uses the package sees.
const TYPES: [&str; 10] = [
    "index", "browser", "names", "errors", "open", "source", "sheet", "far", "types", "element",
];

/// What is taken as it stands: from the element's folder, or from the top of the workspace.
const PLAIN: [&str; 2] = ["package.json", "README.md"];
const LICENCES: [&str; 2] = ["LICENSE-APACHE", "LICENSE-MIT"];

/// Builds `www/package` from the engine's wasm and glue, which are there already.
///
/// # Errors
/// When the types do not agree, the bundler fails, or a file cannot be written.
pub fn build(paths: &Paths) -> Outcome<()> {
    let source = paths.root.join("www/element");
    let output = paths.root.join("www/package");
    if output.exists() {
        fs::remove_dir_all(&output).map_err(while_doing("cannot empty the package's folder"))?;
    }
    fs::create_dir_all(output.join("types"))
        .map_err(while_doing("cannot make the package's folder"))?;
    bundle(paths, &source, &output)?;
    declare(paths, &source, &output)?;
    for name in PLAIN {
        copy(&source.join(name), &output.join(name))?;
    }
    for name in LICENCES {
        copy(&paths.root.join(name), &output.join(name))?;
    }
    let wasm = "engine_bg.wasm";
    copy(&paths.generated.join(wasm), &output.join(wasm))
}

/// The thread's script comes first, because the entries carry it as text. What entries share goes to a file of its own,
/// so that a page has one engine however it came to it.
fn bundle(paths: &Paths, source: &Path, output: &Path) -> Outcome<()> {
    let thread = paths.generated.join("thread.txt");
    let mut esbuild = tool(paths, source, "esbuild/bin/esbuild");
    esbuild.args(COMMON).arg("src/thread.ts");
    esbuild.args(["--format=iife"]);
    run(esbuild.arg(format!("--outfile={}", thread.display())))?;
    let mut esbuild = tool(paths, source, "esbuild/bin/esbuild");
    esbuild
        .args(COMMON)
        .args(["src/index.ts", "src/node.ts", "src/element.ts"]);
    esbuild.args([
        "--format=esm",
        "--splitting",
        "--platform=neutral",
        "--external:node:*",
        "--chunk-names=shared-[hash]",
    ]);
    run(esbuild.arg(format!("--outdir={}", output.display()))).map(drop)
}

const COMMON: [&str; 5] = [
    "--bundle",
    "--minify",
    "--charset=utf8",
    "--target=es2022",
    "--log-level=warning",
];

/// Checks the types and writes those that are seen from outside.
fn declare(paths: &Paths, source: &Path, output: &Path) -> Outcome<()> {
    let written = paths.generated.join("types");
    let mut tsc = tool(paths, source, "typescript/bin/tsc");
    tsc.args(["--project", "tsconfig.json", "--noEmit", "false"]);
    tsc.args(["--declaration", "--emitDeclarationOnly", "--stripInternal"]);
    tsc.args(["--rootDir", ".."]).arg("--outDir").arg(&written);
    run(&mut tsc)?;
    for name in TYPES {
        let file = format!("{name}.d.ts");
        copy(
            &written.join("element/src").join(&file),
            &output.join("types").join(&file),
        )?;
    }
    Ok(())
}

fn copy(from: &Path, to: &Path) -> Outcome<()> {
    let doing = format!("cannot copy {} to {}", from.display(), to.display());
    fs::copy(from, to).map_err(while_doing(doing)).map(drop)
}

/// Node with one of the page's tools, in the folder of the element.
fn tool(paths: &Paths, folder: &Path, name: &str) -> Command {
    let mut node = command("node", folder);
    node.arg(paths.page.join("node_modules").join(name));
    node
}
