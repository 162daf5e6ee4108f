//! Puts script, style, engine and starting sheets into one HTML file with a content policy.

use std::fmt::Write as _;
use std::fs;
use std::path::Path;

use base64::Engine as _;
use base64::engine::general_purpose::STANDARD;
use sha2::{Digest, Sha256};
use zopfli::{Format, Options};

use crate::bundle::Bundle;
use crate::failure::{Failure, Outcome, while_doing};

/// What goes into the file.
#[derive(Clone, Debug)]
pub struct Parts {
    /// The HTML around everything, with a `{{name}}` where each part goes.
    pub frame: String,
    /// The page's own script and style.
    pub bundle: Bundle,
    /// The engine.
    pub wasm: Vec<u8>,
    /// The starting sheets: name without ending, and text, in the order in which they are offered.
    pub sheets: Vec<(String, String)>,
}

/// The finished page.
///
/// # Errors
/// When the frame lacks a place for a part, or the engine cannot be packed.
pub fn html(parts: &Parts) -> Outcome<String> {
    let nonce: String = digest(&parts.bundle.style)
        .chars()
        .filter(char::is_ascii_alphanumeric)
        .take(16)
        .collect();
    let bundle = &parts.bundle;
    let texts = [
        ("policy", policy(bundle, &nonce)),
        ("nonce", nonce),
        ("style", bundle.style.trim_end().to_owned()),
        ("boot", bundle.boot.clone()),
        ("engine", packed(&parts.wasm)?),
        ("sheet", first_sheet(&parts.sheets)),
        ("script", bundle.script.clone()),
        ("later", packed(bundle.later.as_bytes())?),
        ("shelf", packed(sheet_data(&parts.sheets).as_bytes())?),
    ];
    match texts
        .iter()
        .find(|(name, _)| !parts.frame.contains(&format!("{{{{{name}}}}}")))
    {
        Some((name, _)) => Err(Failure::new(format!(
            "the page's frame has no place {{{{{name}}}}}"
        ))),
        None => fill(&parts.frame, &texts),
    }
}

/// Reads the starting sheets of `folder`, those that its `order.txt` names first and in its order.
///
/// # Errors
/// When the folder or a sheet cannot be read.
pub fn read_sheets(folder: &Path) -> Outcome<Vec<(String, String)>> {
    let entries =
        fs::read_dir(folder).map_err(while_doing(format!("cannot list {}", folder.display())))?;
    let mut sheets = Vec::new();
    for entry in entries {
        let path = entry
            .map_err(while_doing("cannot list the starting sheets"))?
            .path();
        let name = path
            .file_stem()
            .map(|stem| stem.to_string_lossy().into_owned());
        if let (Some(name), Some("pitchwright")) =
            (name, path.extension().and_then(|ending| ending.to_str()))
        {
            let text = fs::read_to_string(&path)
                .map_err(while_doing(format!("cannot read {}", path.display())))?;
            sheets.push((name, text));
        }
    }
    let order = folder.join("order.txt");
    let order = fs::read_to_string(&order)
        .map_err(while_doing(format!("cannot read {}", order.display())))?;
    let place = |name: &str| order.lines().position(|line| line == name);
    sheets.sort_by_cached_key(|(name, _)| (place(name).unwrap_or(usize::MAX), name.clone()));
    Ok(sheets)
}

/// Only the page's own scripts run, only its own style applies, and nothing is ever asked for.
fn policy(bundle: &Bundle, nonce: &str) -> String {
    let scripts = [&bundle.boot, &bundle.script, &bundle.later];
    let hashes: Vec<String> = scripts
        .iter()
        .map(|script| format!("'sha256-{}'", digest(script)))
        .collect();
    format!(
        "default-src 'none'; script-src {} 'wasm-unsafe-eval'; style-src 'nonce-{nonce}'; img-src data: blob:; \
         worker-src blob:; connect-src 'none'; font-src 'none'; form-action 'none'; base-uri 'none'; frame-src 'self'; \
         object-src 'none'",
        hashes.join(" ")
    )
}

/// SHA-256 of `text` in base64, as a content policy writes it.
fn digest(text: &str) -> String {
    STANDARD.encode(Sha256::digest(text))
}

/// Bytes as the page unpacks them.
fn packed(bytes: &[u8]) -> Outcome<String> {
    Ok(STANDARD.encode(gzip(bytes)?))
}

fn gzip(bytes: &[u8]) -> Outcome<Vec<u8>> {
    let mut out = Vec::new();
    zopfli::compress(Options::default(), Format::Gzip, bytes, &mut out)
        .map_err(while_doing("cannot pack a part of the page"))?;
    Ok(out)
}

/// The sheet that the page opens with, and the titles of all, as JSON.
fn first_sheet(sheets: &[(String, String)]) -> String {
    let text = sheets.first().map_or("", |(_, text)| text.as_str());
    let titles: Vec<_> = sheets
        .iter()
        .map(|(name, text)| format!("[{},{}]", quoted(name), quoted(title(name, text))))
        .collect();
    format!(
        "{{\"text\":{},\"titles\":[{}]}}",
        quoted(text),
        titles.join(",")
    )
}

/// What a sheet is called: its title line, else its name.
fn title<'a>(name: &'a str, text: &'a str) -> &'a str {
    let lines = text.lines();
    lines
        .filter_map(|line| line.strip_prefix("title "))
        .map(str::trim)
        .next()
        .unwrap_or(name)
}

/// The sheets as JSON, with nothing in it that could end a script block.
fn sheet_data(sheets: &[(String, String)]) -> String {
    let entries: Vec<_> = sheets
        .iter()
        .map(|(name, text)| format!("{}:{}", quoted(name), quoted(text)))
        .collect();
    format!("{{{}}}", entries.join(","))
}

fn quoted(text: &str) -> String {
    let mut quoted = String::from("\"");
    for c in text.chars() {
        match c {
            '"' | '\\' => quoted.extend(['\\', c]),
            '\n' => quoted.push_str("\\n"),
            '<' | '\u{2028}' | '\u{2029}' | '\0'..='\u{1f}' => {
                let _ = write!(quoted, "\\u{:04x}", u32::from(c));
            }
            _ => quoted.push(c),
        }
    }
    quoted.push('"');
    quoted
}

/// `frame` with each `{{name}}` replaced. One pass, so that what is put in is never itself searched for places.
fn fill(frame: &str, texts: &[(&str, String)]) -> Outcome<String> {
    let mut page = String::new();
    let mut rest = frame;
    while let Some((before, after)) = rest.split_once("{{") {
        let Some((name, behind)) = after.split_once("}}") else {
            break;
        };
        let text = texts.iter().find(|(known, _)| *known == name);
        let (_, text) = text.ok_or_else(|| {
            Failure::new(format!(
                "the page's frame has an unknown place {{{{{name}}}}}"
            ))
        })?;
        page.push_str(before);
        page.push_str(text);
        rest = behind;
    }
    page.push_str(rest);
    Ok(page)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn parts() -> Parts {
        Parts {
            frame: "{{policy}}|{{nonce}}|{{style}}|{{boot}}|{{engine}}|{{sheet}}|{{later}}|{{shelf}}|{{script}}"
                .to_owned(),
            bundle: Bundle {
                boot: "let b = 2;".to_owned(),
                script: "let a = 1;".to_owned(),
                later: "let c = 3;".to_owned(),
                style: "p{}\n".to_owned(),
            },
            wasm: vec![0, 97, 115, 109],
            sheets: vec![("one".to_owned(), "title \"A\"\n</script>\n".to_owned())],
        }
    }

    #[test]
    fn the_policy_admits_the_script_by_its_hash() {
        // printf 'let a = 1;' | openssl dgst -sha256 -binary | base64
        let page = html(&parts()).unwrap();
        let hash = "'sha256-xY6QKfH9PRsQnLz56nj6MBwiK5oHg+im1Jkpdp1x/Ck='";
        assert!(page.contains(hash), "{page}");
        assert_eq!(page.matches("'sha256-").count(), 3, "{page}");
    }

    #[test]
    fn a_sheet_cannot_end_the_data_block() {
        let page = html(&parts()).unwrap();
        assert!(
            page.contains(r#"{"text":"title \"A\"\n\u003c/script>\n","titles":[["one","\"A\""]]}"#),
            "{page}"
        );
    }

    #[test]
    fn the_same_parts_give_the_same_bytes() {
        assert_eq!(html(&parts()).unwrap(), html(&parts()).unwrap());
    }

    #[test]
    fn places_are_looked_for_in_the_frame_only() {
        let bundle = Bundle {
            script: "'{{engine}}'".to_owned(),
            ..parts().bundle
        };
        assert!(
            html(&Parts { bundle, ..parts() })
                .unwrap()
                .ends_with("|'{{engine}}'")
        );
    }

    #[test]
    fn a_frame_without_a_place_is_refused() {
        let frame = "{{policy}}".to_owned();
        assert!(html(&Parts { frame, ..parts() }).is_err());
    }
}
