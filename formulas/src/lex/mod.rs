//! Text to tokens. Total: any text has tokens, and put together they give the text back.

pub(crate) mod characters;
pub(crate) mod code;
pub(crate) mod labels;
pub(crate) mod number;
pub(crate) mod signs;
#[cfg(test)]
mod tests;
pub mod words;

use crate::span::Span;
use crate::syntax::TitleWord;
use crate::token::{Token, TokenKind, Word};
use characters::{blank_length, name_length};

/// Tokens on their way to the grammar.
#[derive(Debug, Default)]
pub(crate) struct Tokens {
    /// The tokens; without blanks, remarks and line ends unless they are asked for.
    pub(crate) list: Vec<Token>,
    /// Where remarks stand.
    pub(crate) remarks: Vec<Span>,
    trivia: bool,
}

impl Tokens {
    pub(crate) fn push(&mut self, kind: TokenKind, start: usize, end: usize) {
        let span = Span::new(start, end);
        if kind == TokenKind::Remark {
            self.remarks.push(span);
        }
        if start < end && (self.trivia || !kind.is_trivia()) {
            self.list.push(Token { kind, span });
        }
    }

    pub(crate) fn clear(&mut self) {
        self.list.clear();
        self.remarks.clear();
    }
}

/// How a line opens.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(crate) enum Opening {
    /// It holds nothing.
    Blank,
    /// It holds a remark only.
    Remark,
    /// A word of the title block.
    Title(TitleWord),
    /// A statement word.
    Word(Word),
    /// Anything else.
    Code,
}

impl Opening {
    /// Whether the line is plain text behind its word.
    pub(crate) fn is_prose(self) -> bool {
        use Word::{Aside, Note, Part, Sub};
        matches!(
            self,
            Opening::Title(_) | Opening::Word(Part | Sub | Note | Aside)
        )
    }
}

/// How a line opens, and the stretch of its first word; the line comes without its end.
pub(crate) fn opening(line: &str) -> (Opening, usize, usize) {
    let start = blank_length(line);
    let rest = line.get(start..).unwrap_or("");
    let length = name_length(rest);
    let kind = match rest.as_bytes().first() {
        None => Opening::Blank,
        Some(b';') => Opening::Remark,
        Some(_) => rest
            .get(..length)
            .map_or(Opening::Code, |first| opened_by(first, rest)),
    };
    (kind, start, start + length)
}

fn opened_by(first: &str, line: &str) -> Opening {
    use Word::{
        Aside, End, Figure, Freebody, Governing, Note, Part, Require, Sub, Table, Unknown, Use,
        Vary,
    };
    if !matches!(first.len(), 3..=9) {
        return Opening::Code;
    }
    match words::word(first) {
        Some(
            word @ (Aside | End | Figure | Freebody | Governing | Note | Part | Require | Sub
            | Table | Unknown | Use | Vary),
        ) => Opening::Word(word),
        Some(_) => Opening::Code,
        None => words::title_word(first)
            .filter(|_| !is_symbol_here(line.get(first.len()..).unwrap_or("")))
            .map_or(Opening::Code, Opening::Title),
    }
}

/// Whether a word of the title block before `behind` is a symbol: `=`, `[` or `by axis =` follows.
fn is_symbol_here(behind: &str) -> bool {
    let behind = behind.get(blank_length(behind)..).unwrap_or("");
    let length = name_length(behind);
    match behind.as_bytes().first() {
        Some(b'=' | b'[') => true,
        Some(b':') => behind.starts_with(":="),
        // `prepared by the office` is a line of the title block.
        Some(_) => behind.get(..length) == Some("by") && behind.contains('='),
        None => false,
    }
}

/// Where the content of the line that starts at `from` ends, and where the next line starts.
pub(crate) fn line_end(text: &str, from: usize) -> (usize, usize) {
    let bytes = text.as_bytes().get(from..).unwrap_or_default();
    match bytes.iter().position(|byte| matches!(byte, b'\n' | b'\r')) {
        None => (text.len(), text.len()),
        Some(at) => {
            let two = bytes.get(at..at + 2) == Some(b"\r\n");
            (from + at, from + at + 1 + usize::from(two))
        }
    }
}

/// Tokens of a line of prose.
pub(crate) fn prose(text: &str, from: usize, to: usize, out: &mut Tokens) {
    let (opening, start, end) = opening(text.get(from..to).unwrap_or(""));
    out.push(TokenKind::Blank, from, from + start);
    let kind = match opening {
        Opening::Title(word) => TokenKind::Title(word),
        Opening::Word(word) => TokenKind::Word(word),
        _ => TokenKind::Prose,
    };
    out.push(kind, from + start, from + end);
    let rest = text.get(from + end..to).unwrap_or("");
    let blanks = blank_length(rest);
    let words = rest
        .trim_end_matches(characters::is_blank)
        .len()
        .max(blanks);
    let first = from + end + blanks;
    out.push(TokenKind::Blank, from + end, first);
    out.push(TokenKind::Prose, first, from + end + words);
    out.push(TokenKind::Blank, from + end + words, to);
}

/// What the lines of a statement are made of.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
enum Mode {
    Code,
    Labels,
    Header,
    Rows,
}

/// The tokens of the text of one statement, blanks and remarks among them.
///
/// ```
/// use formulas::lex::lex;
/// let text = "S [ft^2] = 142 ; drawing OS-010";
/// let together: String = lex(text).iter().map(|token| token.span.of(text)).collect();
/// assert_eq!(together, text);
/// ```
#[must_use]
pub fn lex(text: &str) -> Vec<Token> {
    let mut out = Tokens {
        trivia: true,
        ..Tokens::default()
    };
    let (mut from, mut mode, mut keys) = (0, None, Vec::new());
    while from < text.len() {
        let (to, next) = line_end(text, from);
        mode = Some(lex_line(text, (from, to), mode, &mut keys, &mut out));
        out.push(TokenKind::LineEnd, to, next);
        from = next;
    }
    out.list
}

/// The tokens of one more line; gives how the next one is to be read.
fn lex_line(
    text: &str,
    (from, to): (usize, usize),
    mode: Option<Mode>,
    keys: &mut Vec<bool>,
    out: &mut Tokens,
) -> Mode {
    let line = text.get(from..to).unwrap_or("");
    match (mode, opening(line).0) {
        (None, opening) if opening.is_prose() => prose(text, from, to, out),
        (None, Opening::Word(Word::Vary)) => {
            if labels::vary_line(text, from, to, out) {
                return Mode::Labels;
            }
        }
        (Some(Mode::Labels), _) => {
            labels::labels(text, from, to, false, out);
            return Mode::Labels;
        }
        (None, Opening::Word(Word::Table)) | (Some(Mode::Header), _) => {
            code::code(text, from, to, out);
            let last = out.list.iter().rev().find(|token| !token.kind.is_trivia());
            if last.is_some_and(|last| matches!(last.kind, TokenKind::Bar | TokenKind::Comma)) {
                return Mode::Header;
            }
            labels::number_keys(out, keys);
            return Mode::Rows;
        }
        (Some(Mode::Rows), opening) => {
            lex_row(text, (from, to), opening, keys, out);
            return Mode::Rows;
        }
        _ => code::code(text, from, to, out),
    }
    Mode::Code
}

/// A line between the header of a table and its `end`, that one included.
fn lex_row(
    text: &str,
    (from, to): (usize, usize),
    opening: Opening,
    keys: &[bool],
    out: &mut Tokens,
) {
    let line = text.get(from..to).unwrap_or("");
    match opening {
        Opening::Word(Word::End) if !opens_row(line, keys.len()) => code::code(text, from, to, out),
        Opening::Word(Word::Aside) if !opens_row(line, keys.len()) => prose(text, from, to, out),
        Opening::Blank | Opening::Remark => code::code(text, from, to, out),
        _ => labels::row(text, from, to, keys, out),
    }
}

/// Whether a line of a table that begins with a word is a row: the word is all of its first key cell.
pub(crate) fn opens_row(line: &str, keys: usize) -> bool {
    let (_, _, end) = opening(line);
    let rest = line.get(end..).unwrap_or("");
    match rest.as_bytes().get(blank_length(rest)) {
        Some(b'|') => true,
        Some(b',') => keys > 1,
        _ => false,
    }
}
