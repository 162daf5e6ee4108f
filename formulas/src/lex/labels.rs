//! Labels: the plain text between separators, in a `vary` without a bracket and in the key cells of a table.

use super::Tokens;
use super::characters::{blank_length, is_blank, name_length};
use super::code::{code, text_length};
use crate::token::TokenKind;

/// Labels of `text` from byte `from` up to byte `to`, separated by `|`, and by `,` if `commas` says so.
pub(crate) fn labels(text: &str, from: usize, to: usize, commas: bool, out: &mut Tokens) {
    let mut at = from;
    while let Some(rest) = text.get(at..to).filter(|rest| !rest.is_empty()) {
        let (kind, length) = label(rest, commas);
        out.push(kind, at, at + length);
        at += length;
    }
}

fn label(rest: &str, commas: bool) -> (TokenKind, usize) {
    let blanks = blank_length(rest);
    if blanks > 0 {
        return (TokenKind::Blank, blanks);
    }
    match rest.as_bytes().first() {
        Some(b'|') => return (TokenKind::Bar, 1),
        Some(b',') if commas => return (TokenKind::Comma, 1),
        Some(b';') => return (TokenKind::Remark, rest.len()),
        _ => {}
    }
    // Quotes count at the start of a label only, so that `1/4"` is a label as well.
    let quoted = if rest.starts_with('"') {
        text_length(rest)
    } else {
        Some(0)
    };
    let Some(quoted) = quoted else {
        return (TokenKind::OpenText, rest.len());
    };
    let behind = rest.get(quoted..).unwrap_or("");
    let end = behind
        .bytes()
        .position(|byte| matches!(byte, b'|' | b';') || (commas && byte == b','));
    let whole = rest
        .get(..quoted + end.unwrap_or(behind.len()))
        .unwrap_or(rest);
    (TokenKind::Label, whole.trim_end_matches(is_blank).len())
}

/// The first line of a `vary`. Gives whether labels stand behind its `:`, that is, no bracket before it.
pub(crate) fn vary_line(text: &str, from: usize, to: usize, out: &mut Tokens) -> bool {
    let rest = text.get(from..to).unwrap_or("");
    match label_colon(rest) {
        Some(colon) => {
            let colon = from + colon;
            code(text, from, colon, out);
            out.push(TokenKind::Colon, colon, colon + 1);
            labels(text, colon + 1, to, false, out);
            true
        }
        None => {
            code(text, from, to, out);
            false
        }
    }
}

/// Where the `:` of `vary name:` stands.
fn label_colon(rest: &str) -> Option<usize> {
    let mut at = blank_length(rest);
    for _ in 0..2 {
        at += name_length(rest.get(at..)?);
        at += blank_length(rest.get(at..)?);
    }
    (rest.as_bytes().get(at) == Some(&b':')).then_some(at)
}

/// A row of a table: key cells, of which `numbers` says which hold numbers, then code.
pub(crate) fn row(text: &str, from: usize, to: usize, numbers: &[bool], out: &mut Tokens) {
    let commas = numbers.len() > 1;
    let mut at = from;
    let mut key = 0;
    while let Some(rest) = text.get(at..to).filter(|rest| !rest.is_empty()) {
        let length = key_length(rest, commas);
        if numbers.get(key) == Some(&true) {
            code(text, at, at + length, out);
        } else {
            labels(text, at, at + length, commas, out);
        }
        at += length;
        match text.as_bytes().get(at).filter(|_| at < to) {
            Some(b',') => out.push(TokenKind::Comma, at, at + 1),
            Some(b'|') => {
                out.push(TokenKind::Bar, at, at + 1);
                code(text, at + 1, to, out);
                return;
            }
            _ => {
                code(text, at, to, out);
                return;
            }
        }
        at += 1;
        key += 1;
    }
}

/// The length of a key cell with its blanks.
fn key_length(rest: &str, commas: bool) -> usize {
    let blanks = blank_length(rest);
    let cell = rest.get(blanks..).unwrap_or("");
    let quoted = if cell.starts_with('"') {
        text_length(cell).unwrap_or(cell.len())
    } else {
        0
    };
    let behind = cell.get(quoted..).unwrap_or("");
    let end = behind
        .bytes()
        .position(|byte| matches!(byte, b'|' | b';') || (commas && byte == b','));
    blanks + quoted + end.unwrap_or(behind.len())
}

/// Which keys of a table hold numbers, read from the tokens of its header.
pub(crate) fn number_keys(out: &Tokens, keys: &mut Vec<bool>) {
    keys.clear();
    keys.push(false);
    for token in &out.list {
        match token.kind {
            TokenKind::Bar => break,
            TokenKind::Comma => keys.push(false),
            TokenKind::Bracket | TokenKind::OpenBracket => {
                if let Some(last) = keys.last_mut() {
                    *last = true;
                }
            }
            _ => {}
        }
    }
}
