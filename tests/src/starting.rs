//! The starting sheets of the page.

use std::collections::BTreeMap;
use std::path::Path;

/// Their texts by the names of their files without ending.
///
/// # Panics
/// Where they cannot be read.
#[must_use]
pub fn sheets() -> BTreeMap<String, String> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("../www/sheets");
    let entries = std::fs::read_dir(folder).expect("the folder of starting sheets");
    let paths = entries
        .map(|entry| entry.expect("an entry").path())
        .filter(|path| path.extension().is_some_and(|e| e == "pitchwright"));
    let read = |path: std::path::PathBuf| {
        let text = std::fs::read_to_string(&path).expect("a starting sheet");
        let name = path.file_stem().and_then(|n| n.to_str()).unwrap_or("");
        (name.to_owned(), text)
    };
    paths.map(read).collect()
}
