//! Sheets read from files and standard input.

use formulas::sheet::{Around, Sheet};
use std::ffi::{OsStr, OsString};
use std::io::Read;
use std::path::{Path, PathBuf};

/// The text of a sheet as it was found.
pub(crate) struct Loaded {
    /// Its path as typed; `-` for standard input.
    pub(crate) name: String,
    /// Its text; bytes that are no UTF-8 are replaced.
    pub(crate) text: String,
    /// Byte of the text at which the first of them stood.
    pub(crate) broken_at: Option<usize>,
}

/// Reads a sheet, `-` being standard input.
///
/// # Errors
/// A message where there is no such file or it cannot be read.
pub(crate) fn load(path: &OsStr) -> Result<Loaded, String> {
    let name = path.to_string_lossy().into_owned();
    let bytes = if path == "-" {
        let mut bytes = Vec::new();
        let read = std::io::stdin().lock().read_to_end(&mut bytes);
        read.map(|_| bytes)
    } else {
        std::fs::read(Path::new(path))
    };
    match bytes {
        Ok(bytes) => Ok(decoded(name, bytes)),
        Err(error) => Err(format!("{name}: cannot be read: {error}")),
    }
}

/// Reads several sheets in order; those that cannot be read leave their message.
pub(crate) fn load_all(paths: &[OsString]) -> Vec<Result<Loaded, String>> {
    paths.iter().map(|path| load(path)).collect()
}

fn decoded(name: String, bytes: Vec<u8>) -> Loaded {
    match String::from_utf8(bytes) {
        Ok(text) => Loaded {
            name,
            text,
            broken_at: None,
        },
        Err(error) => Loaded {
            name,
            broken_at: Some(error.utf8_error().valid_up_to()),
            text: String::from_utf8_lossy(error.as_bytes()).into_owned(),
        },
    }
}

impl Loaded {
    /// The text of another sheet in the same folder.
    pub(crate) fn beside(&self, sheet: &str) -> Option<String> {
        let path = self.folder().join(format!("{sheet}.pitchwright"));
        let bytes = std::fs::read(path).ok()?;
        Some(decoded(String::new(), bytes).text)
    }

    fn folder(&self) -> PathBuf {
        let folder = Path::new(&self.name).parent();
        folder.map(Path::to_path_buf).unwrap_or_default()
    }

    /// The name by which other sheets use this one.
    fn used_as(&self) -> Option<&str> {
        Path::new(&self.name)
            .file_name()?
            .to_str()?
            .strip_suffix(".pitchwright")
    }

    /// Runs `look` with what lies around the sheet.
    pub(crate) fn around<R>(&self, asked: &[String], look: impl FnOnce(&Around<'_>) -> R) -> R {
        look(&Around {
            name: self.used_as(),
            sheets: &|name| self.beside(name),
            asked,
            ..Around::default()
        })
    }

    /// The sheet worked out among those beside it, the columns of the symbols asked for kept however long they are.
    pub(crate) fn opened(&self, asked: &[String]) -> Sheet {
        self.around(asked, |around| Sheet::open_around(&self.text, around))
    }

    /// Says where the bytes are that are no UTF-8, in the form of a finding.
    pub(crate) fn encoding_finding(&self) -> Option<String> {
        let before = self.text.get(..self.broken_at?)?;
        let line = before.matches('\n').count() + 1;
        let start = before.rfind('\n').map_or(0, |at| at + 1);
        let column = before.get(start..)?.chars().count() + 1;
        Some(format!(
            "{}:{line}:{column}: error[no-utf-8]: These bytes are no UTF-8 text; save the sheet as UTF-8.\n",
            self.name
        ))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn bytes_that_are_no_text_are_replaced_and_said() {
        let loaded = decoded("a".to_owned(), b"x = 1\ny \xff = 2\n".to_vec());
        assert_eq!(loaded.text, "x = 1\ny \u{fffd} = 2\n");
        let finding = loaded.encoding_finding().unwrap();
        assert!(finding.starts_with("a:2:3: error[no-utf-8]: "), "{finding}");
        let plain = decoded("a".to_owned(), "x = 1 ; \u{b0}".into());
        assert_eq!(plain.encoding_finding(), None);
    }

    #[test]
    fn other_sheets_lie_beside_the_sheet() {
        let folder =
            std::env::temp_dir().join(format!("pitchwright-beside-{}", std::process::id()));
        std::fs::create_dir_all(&folder).unwrap();
        let write = |name: &str, text: &str| std::fs::write(folder.join(name), text).unwrap();
        write("geometry.pitchwright", "S [ft^2] = 142\n");
        write(
            "loads.pitchwright",
            "use \"geometry\" as g\nuse \"loads\" as l\nx = g.S\n",
        );
        let loaded = load(folder.join("loads.pitchwright").as_os_str()).unwrap();
        let report = loaded.opened(&[]).report(&[]);
        std::fs::remove_dir_all(&folder).unwrap();
        let codes: Vec<&str> = report.findings.iter().map(|f| f.code).collect();
        assert_eq!(codes, ["sheet-name", "never-used"]);
        let value = report.quantity("x").and_then(|q| q.largest.as_ref());
        assert_eq!(value.map(|v| v.value), Some(142.0));
    }
}
