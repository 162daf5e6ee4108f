//! Help while a sheet is typed: marks for highlighting, completion, what stands at a place, fixes; and the trail of a
//! value.

pub mod complete;
pub mod desk;
pub mod fix;
pub mod hover;
pub mod marks;
mod place;
#[cfg(test)]
mod tests;
pub mod trail;

use crate::used::UsedSheet;

/// Code of several lines in one, remarks left off.
pub(crate) fn joined(text: &str) -> String {
    if !text.contains(['\n', '\r']) {
        return text.trim().to_string();
    }
    let lines = text.lines().map(|line| without_remark(line).trim());
    let lines: Vec<&str> = lines.filter(|line| !line.is_empty()).collect();
    lines.join(" ")
}

fn without_remark(line: &str) -> &str {
    let mut quoted = false;
    for (at, c) in line.char_indices() {
        match c {
            '"' => quoted = !quoted,
            ';' if !quoted => return line.get(..at).unwrap_or(line),
            _ => {}
        }
    }
    line
}

/// What stands behind the name of another sheet, or of a record there: each name once, with what it is.
fn sheet_fields(sheet: &UsedSheet, within: &str) -> Vec<(String, String)> {
    let mut fields: Vec<(String, String)> = Vec::new();
    for quantity in sheet.program.quantities.iter().filter(|q| q.listed) {
        let rest = if within.is_empty() {
            Some(quantity.symbol.as_str())
        } else {
            let rest = quantity.symbol.strip_prefix(within);
            rest.and_then(|rest| rest.strip_prefix('.'))
        };
        let Some(rest) = rest else { continue };
        let unit = quantity.unit.as_ref().map(|u| &*u.text);
        let (name, detail) = match rest.split_once('.') {
            Some((record, _)) => (record, "record".to_string()),
            None => (rest, desk::what_it_is(quantity.kind, unit)),
        };
        if fields.iter().all(|(known, _)| known != name) {
            fields.push((name.to_string(), detail));
        }
    }
    fields
}
