//! Signs: those of the language, and those of other notations with what stands for them here.

use crate::token::{Sign, TokenKind};

/// Signs of other notations, the longer ones first, and what is typed instead.
const FOREIGN: [(&str, &str); 44] = [
    ("===", "="),
    ("!==", "!="),
    ("<=>", "="),
    ("==", "="),
    (":=", "="),
    ("=>", ">="),
    ("=<", "<="),
    ("<>", "!="),
    ("=/=", "!="),
    ("**", "^"),
    ("&&", "and"),
    ("&", "and"),
    ("//", ";"),
    ("/*", ";"),
    ("#", ";"),
    ("~=", "!="),
    ("!", "not "),
    ("~", "not "),
    ("{", "("),
    ("}", ")"),
    ("\u{2227}", "and"),
    ("\u{2228}", "or"),
    ("\u{ac}", "not "),
    ("\u{2013}", "-"),
    ("\u{2014}", "-"),
    ("\u{2010}", "-"),
    ("\u{2011}", "-"),
    ("\u{2012}", "-"),
    ("\u{2015}", "-"),
    ("\u{2217}", "*"),
    ("\u{2219}", "*"),
    ("\u{2022}", "*"),
    ("\u{2215}", "/"),
    ("\u{2044}", "/"),
    ("\u{2236}", ":"),
    ("\u{a6}", "|"),
    ("\u{2264}=", "<="),
    ("\u{2265}=", ">="),
    ("+-/", "+/-"),
    ("\u{2213}", "+/-"),
    ("\u{ff1b}", ";"),
    ("\u{ff0c}", ","),
    ("\u{ff1a}", ":"),
    ("\u{ff1d}", "="),
];

/// What is typed instead of a sign of another notation.
#[must_use]
pub(crate) fn mend_of(text: &str) -> Option<&'static str> {
    FOREIGN
        .iter()
        .find(|(foreign, _)| *foreign == text)
        .map(|(_, mend)| *mend)
}

/// The sign at the start of `text`, and its length in bytes.
pub(super) fn sign(text: &str) -> Option<(TokenKind, usize)> {
    let bytes = text.as_bytes();
    let first = *bytes.first()?;
    let second = bytes.get(1).copied().unwrap_or(b' ');
    if let Some(kind) = alone(first, second) {
        return Some((kind, 1));
    }
    if text.starts_with("+/-") {
        return Some((TokenKind::Sign(Sign::Tolerance), 3));
    }
    if text.starts_with("!=") && !text.starts_with("!==") {
        return Some((TokenKind::Sign(Sign::NotEqual), 2));
    }
    if let Some((foreign, _)) = FOREIGN
        .iter()
        .find(|(foreign, _)| text.starts_with(foreign))
    {
        return Some((TokenKind::Foreign, foreign.len()));
    }
    match (first, second) {
        (b'<', b'=') => Some((TokenKind::Sign(Sign::LessOrEqual), 2)),
        (b'>', b'=') => Some((TokenKind::Sign(Sign::GreaterOrEqual), 2)),
        _ => single(text),
    }
}

/// A sign of one byte that begins no longer one, seen from the byte behind it.
pub(super) fn alone(first: u8, second: u8) -> Option<TokenKind> {
    Some(match (first, second) {
        (b'(', _) => TokenKind::Open,
        (b')', _) => TokenKind::Close,
        (b'|', _) => TokenKind::Bar,
        (b',', _) => TokenKind::Comma,
        (b'-', _) => TokenKind::Sign(Sign::Minus),
        (b'^', _) => TokenKind::Sign(Sign::Power),
        (b'@', _) => TokenKind::At,
        (b'.', _) => TokenKind::Dot,
        (b'=', b' ') => TokenKind::Equals,
        (b'*', second) if second != b'*' => TokenKind::Sign(Sign::Times),
        (b'+', second) if !matches!(second, b'/' | b'-') => TokenKind::Sign(Sign::Plus),
        (b'/', second) if !matches!(second, b'/' | b'*') => TokenKind::Sign(Sign::Divide),
        (b':', second) if second != b'=' => TokenKind::Colon,
        _ => return None,
    })
}

fn single(text: &str) -> Option<(TokenKind, usize)> {
    let first = text.chars().next()?;
    let kind = match first {
        '=' => TokenKind::Equals,
        ':' => TokenKind::Colon,
        '+' => TokenKind::Sign(Sign::Plus),
        '\u{2212}' => TokenKind::Sign(Sign::Minus),
        '*' | '\u{d7}' | '\u{b7}' | '\u{22c5}' => TokenKind::Sign(Sign::Times),
        '/' | '\u{f7}' => TokenKind::Sign(Sign::Divide),
        '<' => TokenKind::Sign(Sign::Less),
        '>' => TokenKind::Sign(Sign::Greater),
        '\u{2264}' => TokenKind::Sign(Sign::LessOrEqual),
        '\u{2265}' => TokenKind::Sign(Sign::GreaterOrEqual),
        '\u{2260}' => TokenKind::Sign(Sign::NotEqual),
        '\u{b1}' => TokenKind::Sign(Sign::Tolerance),
        _ => return None,
    };
    Some((kind, first.len_utf8()))
}
