//! The whole build, from a fresh checkout to the finished file.

use std::fs;

use crate::assemble::{self, Parts};
use crate::bundle;
use crate::failure::{Outcome, while_doing};
use crate::package;
use crate::paths::Paths;
use crate::setup;
use crate::wasm;

/// Builds the page into `paths.output` and the package beside it, setting up what is missing first. Two builds of the same
/// sources give the same bytes.
///
/// # Errors
/// When a tool is missing, or a step fails.
pub fn page(paths: &Paths) -> Outcome<()> {
    setup::wasm_target(&paths.root)?;
    setup::node_packages(&paths.page)?;
    fs::create_dir_all(&paths.generated).map_err(while_doing("cannot make the build folder"))?;
    let wasm = wasm::build(paths)?;
    let bundle = bundle::build(paths)?;
    let frame = paths.page.join("src/page.html");
    let page = assemble::html(&Parts {
        frame: fs::read_to_string(&frame)
            .map_err(while_doing(format!("cannot read {}", frame.display())))?,
        bundle,
        wasm: fs::read(&wasm).map_err(while_doing(format!("cannot read {}", wasm.display())))?,
        sheets: assemble::read_sheets(&paths.sheets)?,
    })?;
    write(paths, &page)?;
    package::build(paths)
}

fn write(paths: &Paths, page: &str) -> Outcome<()> {
    if let Some(folder) = paths.output.parent() {
        fs::create_dir_all(folder).map_err(while_doing("cannot make the output folder"))?;
    }
    fs::write(&paths.output, page).map_err(while_doing(format!(
        "cannot write {}",
        paths.output.display()
    )))
}
