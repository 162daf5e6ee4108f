//! Checks the page's TypeScript and bundles its scripts and styles.

use std::fs;
use std::process::Command;

use crate::command::{command, run};
use crate::failure::{Outcome, while_doing};
use crate::paths::Paths;

/// The page's own code, ready to be put into the file.
#[derive(Clone, Debug)]
pub struct Bundle {
    /// The script that runs first and starts the engine's thread, whose source it holds as text.
    pub boot: String,
    /// The script that shows the sheet and its first values.
    pub script: String,
    /// The script that is unpacked after them: editors and panels.
    pub later: String,
    /// The one style sheet.
    pub style: String,
}

/// Type-checks and bundles the page. The worker comes first, because the first script carries it as text.
///
/// # Errors
/// When the types do not agree or the bundler fails.
pub fn build(paths: &Paths) -> Outcome<Bundle> {
    bundle(paths, "src/worker.ts", "worker.txt")?;
    run(node(paths, "node_modules/typescript/bin/tsc").args(["--project", "tsconfig.json"]))?;
    Ok(Bundle {
        boot: bundle(paths, "src/boot.ts", "boot.js")?,
        script: bundle(paths, "src/main.ts", "page.js")?,
        later: bundle(paths, "src/later-entry.ts", "later.js")?,
        style: bundle(paths, "src/page.css", "page.css")?,
    })
}

fn bundle(paths: &Paths, entry: &str, output: &str) -> Outcome<String> {
    let output = paths.generated.join(output);
    let mut esbuild = node(paths, "node_modules/esbuild/bin/esbuild");
    esbuild.args([
        entry,
        "--bundle",
        "--minify",
        "--charset=utf8",
        "--target=es2022",
        "--log-level=warning",
    ]);
    if entry.ends_with(".ts") {
        esbuild.arg("--format=iife");
    }
    run(esbuild.arg(format!("--outfile={}", output.display())))?;
    fs::read_to_string(&output).map_err(while_doing(format!("cannot read {}", output.display())))
}

/// Node with one of the page's own tools. The tools are called by their scripts, which are the same on every system.
fn node(paths: &Paths, tool: &str) -> Command {
    let mut node = command("node", &paths.page);
    node.arg(paths.page.join(tool));
    node
}
