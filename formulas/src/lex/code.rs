//! Code: names, numbers with their units, brackets, text and signs of one line.

use super::Tokens;
use super::characters::{blank_length, is_blank, is_name_part, is_plain_part, name_length};
use super::number::{number, raised_power, unit};
use super::signs::{alone, sign};
use super::words::word;
use crate::token::TokenKind;

/// Tokens of `text` from byte `from` up to byte `to`, which lie in one line, its end left off.
pub(crate) fn code(text: &str, from: usize, to: usize, out: &mut Tokens) {
    let line = text.get(from..to).unwrap_or("");
    let mut at = 0;
    while at < line.len() {
        let plain = plain_token(line.as_bytes(), at);
        let Some((kind, length)) = plain.or_else(|| rare_token(line, at)) else {
            return;
        };
        let end = at + length;
        let kind = match kind {
            TokenKind::Name => line.get(at..end).map_or(kind, name_or_word),
            kind => kind,
        };
        out.push(kind, from + at, from + end);
        at = match kind {
            TokenKind::Number | TokenKind::BrokenNumber => unit_behind(line, from, end, out),
            _ => end,
        };
    }
}

fn name_or_word(text: &str) -> TokenKind {
    word(text).map_or(TokenKind::Name, TokenKind::Word)
}

/// The token at byte `at`, where it is one of those that most lines are made of: blanks, a name, digits or a sign of
/// one byte. Everything here can also be told by [`token`]; this is the short way.
fn plain_token(bytes: &[u8], at: usize) -> Option<(TokenKind, usize)> {
    let rest = bytes.get(at..)?;
    let first = *rest.first()?;
    let run = |belongs: fn(u8) -> bool| {
        let length = rest
            .iter()
            .position(|byte| !belongs(*byte))
            .unwrap_or(rest.len());
        (length, rest.get(length).copied().unwrap_or(b' '))
    };
    match first {
        b' ' => {
            let (length, next) = run(|byte| byte == b' ');
            (next.is_ascii_graphic() || next == b' ').then_some((TokenKind::Blank, length))
        }
        b'a'..=b'z' | b'A'..=b'Z' => {
            let (length, next) = run(is_plain_part);
            next.is_ascii().then_some((TokenKind::Name, length))
        }
        b'0'..=b'9' => {
            let (length, next) = run(|byte| byte.is_ascii_digit());
            let ends = next.is_ascii() && !matches!(next, b'.' | b'e' | b'E' | b'_' | b'\'');
            ends.then_some((TokenKind::Number, length))
        }
        _ => {
            let second = rest.get(1).copied().unwrap_or(b' ');
            let number = first == b'.' && second.is_ascii_digit();
            if number {
                None
            } else {
                alone(first, second).map(|kind| (kind, 1))
            }
        }
    }
}

fn rare_token(line: &str, at: usize) -> Option<(TokenKind, usize)> {
    let before = at.checked_sub(1).and_then(|at| line.as_bytes().get(at));
    line.get(at..).map(|rest| token(rest, before))
}

/// The first token of `rest`, behind the byte `before`.
fn token(rest: &str, before: Option<&u8>) -> (TokenKind, usize) {
    let first = rest.as_bytes().first().copied().unwrap_or(b' ');
    match first {
        b' ' => (TokenKind::Blank, blank_length(rest)),
        b'a'..=b'z' | b'A'..=b'Z' => (TokenKind::Name, name_length(rest)),
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

/// Takes the unit behind a number that ends at byte `at` of the line, and the blanks before it; the line stands at byte
/// `from`. Gives where the unit ends.
fn unit_behind(line: &str, from: usize, at: usize, out: &mut Tokens) -> usize {
    let rest = line.get(at..).unwrap_or("");
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
    let end = start + unit.len();
    out.push(TokenKind::Blank, from + at, from + start);
    out.push(TokenKind::Unit, from + start, from + end);
    end
}
