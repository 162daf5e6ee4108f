//! The text of a sheet as it was handed in: what of it is read, where its lines start, and which line and column a
//! byte has.

use crate::problem::{Fault, Problem};
use crate::span::Span;

/// Bounds on the text of a sheet. A host can set lower ones.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Limits {
    /// Bytes that are read.
    pub bytes: usize,
    /// Lines that are read.
    pub lines: usize,
    /// Nesting of brackets, signs, powers, `else if` and calls.
    pub nesting: u32,
    /// Operators in one statement, or in one row of a table.
    pub operators: u32,
}

impl Limits {
    /// The bounds of the language.
    pub const USUAL: Limits = Limits {
        bytes: 1 << 20,
        lines: 20_000,
        nesting: 200,
        operators: 2_000,
    };
}

impl Default for Limits {
    fn default() -> Self {
        Limits::USUAL
    }
}

/// A place as people count it.
#[derive(Clone, Copy, PartialEq, Eq, Debug, PartialOrd, Ord)]
pub struct Place {
    /// Line, from 1.
    pub line: u32,
    /// Column in Unicode characters, from 1. A byte order mark at the start of the text is not counted.
    pub column: u32,
    /// Column in UTF-16 units, from 1.
    pub column16: u32,
}

/// The byte order mark that some editors write at the start of a file.
pub(crate) const BYTE_ORDER_MARK: char = '\u{feff}';

/// A text and the starts of its lines.
#[derive(Clone, Debug)]
pub struct Source<'t> {
    text: &'t str,
    starts: Vec<usize>,
    problems: Vec<Problem>,
}

impl<'t> Source<'t> {
    /// The text within the usual limits.
    #[must_use]
    pub fn new(text: &'t str) -> Self {
        Source::within(text, &Limits::USUAL)
    }

    /// The text within given limits. What is beyond is cut off at the end of a line, and a problem says so.
    #[must_use]
    pub fn within(text: &'t str, limits: &Limits) -> Self {
        let mut problems = Vec::new();
        let mut kept = cut_bytes(text, limits.bytes, &mut problems);
        let mut starts = line_starts(kept);
        if starts.len() > limits.lines {
            let lines = starts.len();
            let end = starts.get(limits.lines).copied().unwrap_or(0);
            starts.truncate(limits.lines);
            kept = kept.get(..end).unwrap_or("");
            let limit = limits.lines;
            let span = Span::new(end, end);
            problems.push(Problem {
                span,
                fault: Fault::LineLimit { lines, limit },
            });
        }
        Source {
            text: kept,
            starts,
            problems,
        }
    }

    /// What is read.
    #[must_use]
    pub fn text(&self) -> &'t str {
        self.text
    }

    /// Why not all of it is read.
    #[must_use]
    pub fn problems(&self) -> &[Problem] {
        &self.problems
    }

    /// How many lines there are. The end of the last line opens no further one.
    #[must_use]
    pub fn line_count(&self) -> usize {
        self.starts.len()
    }

    /// The bytes of a line, counted from 0, its end included; empty behind the last one.
    #[must_use]
    pub fn line(&self, index: usize) -> std::ops::Range<usize> {
        let end = self.text.len();
        let start = self.starts.get(index).copied().unwrap_or(end);
        start..self.starts.get(index + 1).copied().unwrap_or(end)
    }

    /// Line and columns of a byte of the text. A byte inside a character counts as its first, one beyond the end as
    /// the end.
    #[must_use]
    pub fn place(&self, byte: usize) -> Place {
        let index = self
            .starts
            .partition_point(|&start| start <= byte)
            .saturating_sub(1);
        let mut place = Place {
            line: index as u32 + 1,
            column: 1,
            column16: 1,
        };
        let line = self.line(index);
        for (at, character) in self.text.get(line.clone()).unwrap_or("").char_indices() {
            if line.start + at + character.len_utf8() > byte {
                break;
            }
            if line.start + at > 0 || character != BYTE_ORDER_MARK {
                place.column += 1;
                place.column16 += character.len_utf16() as u32;
            }
        }
        place
    }

    /// The byte at a line and a column in Unicode characters, both from 1; the end of the line where it is shorter.
    #[must_use]
    pub fn byte(&self, line: u32, column: u32) -> usize {
        self.find(line, column, |_| 1)
    }

    /// The byte at a line and a column in UTF-16 units, both from 1; the end of the line where it is shorter.
    #[must_use]
    pub fn byte16(&self, line: u32, column16: u32) -> usize {
        self.find(line, column16, |character| character.len_utf16() as u32)
    }

    fn find(&self, line: u32, column: u32, width: impl Fn(char) -> u32) -> usize {
        let range = self.line((line as usize).saturating_sub(1));
        let text = self.text.get(range.clone()).unwrap_or("");
        let mut before = 1;
        for (at, character) in text.char_indices() {
            let mark = range.start + at == 0 && character == BYTE_ORDER_MARK;
            if (before >= column && !mark) || matches!(character, '\n' | '\r') {
                return range.start + at;
            }
            before += if mark { 0 } else { width(character) };
        }
        range.end
    }
}

/// The text up to the last line end within `limit` bytes.
fn cut_bytes<'t>(text: &'t str, limit: usize, problems: &mut Vec<Problem>) -> &'t str {
    if text.len() <= limit {
        return text;
    }
    let within = text.as_bytes().get(..limit).unwrap_or_default();
    // A line feed right behind the limit belongs to a carriage return before it.
    let split = within.ends_with(b"\r") && text.as_bytes().get(limit) == Some(&b'\n');
    let within = within.get(..limit - usize::from(split)).unwrap_or_default();
    let end = within
        .iter()
        .rposition(|byte| matches!(byte, b'\n' | b'\r'))
        .map_or(0, |at| at + 1);
    let bytes = text.len();
    problems.push(Problem {
        span: Span::new(end, end),
        fault: Fault::SizeLimit { bytes, limit },
    });
    text.get(..end).unwrap_or("")
}

/// The first byte of each line. Lines end with a line feed, a carriage return, or both in this order.
fn line_starts(text: &str) -> Vec<usize> {
    let bytes = text.as_bytes();
    let mut starts = Vec::with_capacity(bytes.len() / 24 + 1);
    if !bytes.is_empty() {
        starts.push(0);
    }
    let mut pieces = bytes.chunks_exact(8);
    let mut from = 0;
    for piece in pieces.by_ref() {
        if piece.try_into().is_ok_and(may_end_line) {
            starts_in(bytes, from, piece, &mut starts);
        }
        from += piece.len();
    }
    starts_in(bytes, from, pieces.remainder(), &mut starts);
    starts
}

/// Whether one of eight bytes is a line feed or a carriage return, or, rarely, another that is looked at in vain.
fn may_end_line(piece: [u8; 8]) -> bool {
    // A byte below 14 borrows into its highest bit; one from 128 on has it set from the start and is left out.
    const LOW: u64 = 0x0e0e_0e0e_0e0e_0e0e;
    const HIGHEST: u64 = 0x8080_8080_8080_8080;
    let word = u64::from_le_bytes(piece);
    word.wrapping_sub(LOW) & !word & HIGHEST != 0
}

/// The line starts behind the line ends of a piece that begins at byte `from`.
fn starts_in(bytes: &[u8], from: usize, piece: &[u8], starts: &mut Vec<usize>) {
    for (at, byte) in piece.iter().enumerate() {
        let next = from + at + 1;
        let ends = match byte {
            b'\n' => true,
            b'\r' => bytes.get(next) != Some(&b'\n'),
            _ => false,
        };
        if ends && next < bytes.len() {
            starts.push(next);
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_end_in_three_ways() {
        let source = Source::new("a\r\nb\rc\n\nd");
        let lines: Vec<&str> = (0..source.line_count())
            .map(|at| &source.text()[source.line(at)])
            .collect();
        assert_eq!(lines, ["a\r\n", "b\r", "c\n", "\n", "d"]);
        assert_eq!(Source::new("a\n").line_count(), 1);
        assert_eq!(Source::new("").line_count(), 0);
    }

    #[test]
    fn places_count_characters_and_utf_16_units() {
        let text = "\u{feff}aé\n\u{1d6fc}b\n";
        let source = Source::new(text);
        for (byte, line, column, column16) in [
            (0, 1, 1, 1),
            (3, 1, 1, 1),
            (4, 1, 2, 2),
            (6, 1, 3, 3),
            (7, 2, 1, 1),
            (11, 2, 2, 3),
            (12, 2, 3, 4),
        ] {
            assert_eq!(
                source.place(byte),
                Place {
                    line,
                    column,
                    column16
                },
                "{byte}"
            );
            if byte > 0 {
                assert_eq!(source.byte(line, column), byte);
                assert_eq!(source.byte16(line, column16), byte);
            }
        }
        assert_eq!(source.byte(2, 99), 12);
        assert_eq!(source.byte(9, 1), text.len());
    }

    #[test]
    fn what_is_beyond_the_limits_is_not_read() {
        let limits = Limits {
            bytes: 10,
            lines: 2,
            ..Limits::USUAL
        };
        let read = |text| {
            let source = Source::within(text, &limits);
            (
                source.text(),
                source
                    .problems()
                    .iter()
                    .map(|one| one.fault.clone())
                    .collect::<Vec<_>>(),
            )
        };
        assert_eq!(read("1234\n6789\n"), ("1234\n6789\n", vec![]));
        let size = |bytes| Fault::SizeLimit { bytes, limit: 10 };
        assert_eq!(read("1234\n6789\n1"), ("1234\n6789\n", vec![size(11)]));
        assert_eq!(read("1234\n67890123"), ("1234\n", vec![size(13)]));
        assert_eq!(read("12345678\n\r\n"), ("12345678\n", vec![size(11)]));
        assert_eq!(read("12345678901"), ("", vec![size(11)]));
        assert_eq!(
            read("1\n2\n3\n4"),
            ("1\n2\n", vec![Fault::LineLimit { lines: 4, limit: 2 }])
        );
    }
}
