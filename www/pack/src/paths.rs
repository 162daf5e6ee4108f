//! Where things stand in the work tree.

use std::env;
use std::path::{Path, PathBuf};

/// The places that a build reads and writes.
#[derive(Clone, Debug)]
pub struct Paths {
    /// The workspace: the folder of the top `Cargo.toml`.
    pub root: PathBuf,
    /// The page's TypeScript, CSS and HTML frame.
    pub page: PathBuf,
    /// What the build makes for the page's code to import; never committed.
    pub generated: PathBuf,
    /// The starting sheets.
    pub sheets: PathBuf,
    /// The tests of the built page in a browser.
    pub browser_tests: PathBuf,
    /// Cargo's folder for the wasm build. It is apart from the outer one, whose lock a running `cargo` may hold.
    pub wasm_target: PathBuf,
    /// The finished file.
    pub output: PathBuf,
}

impl Paths {
    /// The paths of the workspace at `root`.
    pub fn of(root: &Path) -> Self {
        let target = env::var_os("CARGO_TARGET_DIR")
            .map_or_else(|| root.join("target"), |given| root.join(given));
        let page = root.join("www/page");
        Self {
            root: root.to_path_buf(),
            generated: page.join("generated"),
            page,
            sheets: root.join("www/sheets"),
            browser_tests: root.join("tests/browser"),
            wasm_target: target.join("wasm"),
            output: root.join("www/dist/pitchwright.html"),
        }
    }

    /// The paths of the workspace that this crate was compiled in.
    pub fn here() -> Self {
        let pack = Path::new(env!("CARGO_MANIFEST_DIR"));
        Self::of(pack.ancestors().nth(2).unwrap_or(pack))
    }
}
