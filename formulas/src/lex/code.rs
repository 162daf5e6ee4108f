//! Code: names, numbers with their units, brackets, text and signs of one line.

use super::Tokens;
use super::characters::{blank_length, is_blank, is_name_part, name_length};
use super::number::{number, raised_power, unit};
use super::signs::sign;
use super::words::word;
use crate::token::TokenKind;

/// Tokens of `text` from byte `from` up to byte `to`, which lie in one line, its end left off.
pub(crate) fn code(text: &str, from: usize, to: usize, out: &mut Tokens) {
    let bytes = text.as_bytes();
    let mut at = from;
    while at < to {
        if bytes.get(at) == Some(&b' ') && bytes.get(at + 1).is_some_and(u8::is_ascii_graphic) {
            out.push(TokenKind::Blank, at, at + 1);
            at += 1;
            continue;
        }
        let Some(rest) = text.get(at..to) else {
            return;
        };
        let before = at.checked_sub(1).and_then(|at| bytes.get(at));
        let (kind, length) = token(rest, before);
        out.push(kind, at, at + length);
        at += length;
        if matches!(kind, TokenKind::Number | TokenKind::BrokenNumber) {
            at = unit_behind(text, at, to, out);
        }
    }
}

/// The first token of `rest`, behind the byte `before`.
fn token(rest: &str, before: Option<&u8>) -> (TokenKind, usize) {
    let first = rest.as_bytes().first().copied().unwrap_or(b' ');
    match first {
        b' ' => (TokenKind::Blank, blank_length(rest)),
        b'a'..=b'z' | b'A'..=b'Z' => name(rest),
        b'0'..=b'9' => numeral(rest),
        b'.' if rest.as_bytes().get(1).is_some_and(u8::is_ascii_digit) => numeral(rest),
        b';' => (TokenKind::Remark, rest.len()),
        b'[' => bracket(rest),
        // Directly behind a digit the sign is one for inches and opens no text.
        b'"' if before.is_some_and(u8::is_ascii_digit) => (TokenKind::OpenText, 1),
        b'"' => match text_length(rest) {
            Some(length) => (TokenKind::Text, length),
            None => (TokenKind::OpenText, rest.len()),
        },
        _ => sign(rest).unwrap_or_else(|| rare(rest)),
    }
}

fn name(rest: &str) -> (TokenKind, usize) {
    let length = name_length(rest);
    let kind = rest.get(..length).and_then(word);
    (kind.map_or(TokenKind::Name, TokenKind::Word), length)
}

fn numeral(rest: &str) -> (TokenKind, usize) {
    match number(rest) {
        Ok((_, (text, true))) => (TokenKind::Number, text.len()),
        Ok((_, (text, false))) => (TokenKind::BrokenNumber, text.len()),
        Err(_) => (TokenKind::Unknown, first_length(rest)),
    }
}

/// What begins with no plain letter, digit or sign.
fn rare(rest: &str) -> (TokenKind, usize) {
    let blanks = blank_length(rest);
    if blanks > 0 {
        return (TokenKind::Blank, blanks);
    }
    let length = name_length(rest);
    if length > 0 {
        return (TokenKind::Name, length);
    }
    if let Ok((_, power)) = raised_power(rest) {
        return (TokenKind::Raised, power.len());
    }
    foreign_text(rest).unwrap_or((TokenKind::Unknown, first_length(rest)))
}

fn first_length(rest: &str) -> usize {
    rest.chars().next().map_or(0, char::len_utf8)
}

/// The length of a text in quotes at the start of `rest`, if a quote closes it.
pub(crate) fn text_length(rest: &str) -> Option<usize> {
    let bytes = rest.as_bytes();
    let mut at = 1;
    loop {
        at += bytes.get(at..)?.iter().position(|byte| *byte == b'"')? + 1;
        if bytes.get(at) != Some(&b'"') {
            return Some(at);
        }
        at += 1;
    }
}

/// Whether it is one of the quotes that word processors put in place of the plain one.
pub(crate) fn is_curved_quote(character: char) -> bool {
    matches!(character, '\u{201c}'..='\u{201f}' | '\u{ab}' | '\u{bb}')
}

/// Text in curved quotes.
fn foreign_text(rest: &str) -> Option<(TokenKind, usize)> {
    let first = rest
        .chars()
        .next()
        .filter(|first| is_curved_quote(*first))?;
    // Any curved quote closes, so that no stretch is looked through twice.
    let inner = rest.get(first.len_utf8()..)?;
    let close = inner
        .char_indices()
        .find(|(_, character)| is_curved_quote(*character));
    let length = close.map_or(0, |(at, character)| at + character.len_utf8());
    Some((TokenKind::Foreign, first.len_utf8() + length))
}

/// A unit in brackets, or what an open one may have held.
fn bracket(rest: &str) -> (TokenKind, usize) {
    let bytes = rest.as_bytes();
    let stop = bytes
        .iter()
        .skip(1)
        .position(|byte| matches!(byte, b']' | b'[' | b'|' | b';' | b'=' | b'"'));
    if let Some(stop) = stop.filter(|stop| bytes.get(stop + 1) == Some(&b']')) {
        return (TokenKind::Bracket, stop + 2);
    }
    let of_unit = |c: char| {
        is_name_part(c)
            || is_blank(c)
            || matches!(c, '.' | '\u{b7}' | '/' | '-' | '^' | '\u{b0}' | '%')
            || super::characters::raised(c).is_some()
    };
    let inner = rest.get(1..).unwrap_or("");
    let held = inner
        .find(|c| !of_unit(c))
        .and_then(|end| inner.get(..end))
        .unwrap_or(inner);
    (
        TokenKind::OpenBracket,
        1 + held.trim_end_matches(is_blank).len(),
    )
}

/// Takes the unit behind a number that ends at `at`, and the blanks before it. Gives where it ends.
fn unit_behind(text: &str, at: usize, to: usize, out: &mut Tokens) -> usize {
    let rest = text.get(at..to).unwrap_or("");
    let blanks = blank_length(rest);
    let behind = rest.get(blanks..).unwrap_or("");
    let may_begin =
        |byte: &u8| byte.is_ascii_alphabetic() || !byte.is_ascii() || matches!(byte, b'%' | b'/');
    if !behind.as_bytes().first().is_some_and(may_begin) {
        return at;
    }
    let Ok((_, unit)) = unit(behind, blanks > 0) else {
        return at;
    };
    let start = at + blanks;
    if blanks > 0 {
        out.push(TokenKind::Blank, at, start);
    }
    out.push(TokenKind::Unit, start, start + unit.len());
    start + unit.len()
}
