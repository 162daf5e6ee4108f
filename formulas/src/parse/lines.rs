//! Lines to statements: which lines a statement takes, and what kind of statement it is.

use super::cursor::Cursor;
use super::form::{Form, form};
use super::table::{Header, empty_table};
use super::title::{TitleBlock, prose};
use crate::lex::characters::{blank_length, trimmed};
use crate::lex::labels::{labels, number_keys, row, vary_line};
use crate::lex::{Opening, Tokens, code::code, opening, opens_row};
use crate::problem::{Fault, Problem};
use crate::source::{Limits, Source};
use crate::span::Span;
use crate::syntax::{Row, Statement, StatementKind, Table, Tree, Words};
use crate::token::{Sign, TokenKind, Word};

/// All statements of a text.
pub(super) fn read(source: &Source<'_>, limits: &Limits) -> Tree {
    let mut reader = Reader::new(source, limits, 0, false);
    let mut statements = Vec::with_capacity(source.line_count());
    while !reader.is_done() {
        statements.push(reader.statement());
    }
    Tree {
        statements,
        problems: source.problems().to_vec(),
    }
}

/// Reads one statement after the other.
pub(super) struct Reader<'s, 't> {
    source: &'s Source<'t>,
    limits: &'s Limits,
    /// The next line, counted from 0.
    line: usize,
    tokens: Tokens,
    scratch: Tokens,
    block: TitleBlock,
}

/// Which lines a statement goes on in.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Course {
    Code,
    Labels,
    Header,
    Unknown,
}

/// A line of a statement: from byte `from` up to byte `to`, its end left off, both from the statement's start.
#[derive(Clone, Copy)]
struct Line<'t> {
    text: &'t str,
    from: usize,
    to: usize,
}

impl<'t> Line<'t> {
    fn content(self) -> &'t str {
        self.text.get(self.from..self.to).unwrap_or("")
    }
}

impl<'s, 't> Reader<'s, 't> {
    /// A reader that begins at a line, counted from 0, in front of the end of the title block or behind it.
    pub(super) fn new(
        source: &'s Source<'t>,
        limits: &'s Limits,
        line: usize,
        closed: bool,
    ) -> Self {
        Reader {
            source,
            limits,
            line,
            tokens: Tokens::default(),
            scratch: Tokens::default(),
            block: TitleBlock::new(closed),
        }
    }

    pub(super) fn is_done(&self) -> bool {
        self.line >= self.source.line_count()
    }

    /// The next line, counted from 0.
    pub(super) fn line(&self) -> usize {
        self.line
    }

    /// The byte at which the next line begins.
    pub(super) fn byte(&self) -> usize {
        self.source.line(self.line).start
    }

    pub(super) fn block_is_closed(&self) -> bool {
        self.block.is_closed()
    }

    /// A line by its index, seen from the statement that starts at byte `start`.
    fn line_at(&self, index: usize, start: usize) -> Line<'t> {
        let range = self.source.line(index);
        let text = self.source.text().get(start..).unwrap_or("");
        let whole = self.source.text().get(range.clone()).unwrap_or("");
        let content = whole.trim_end_matches(['\n', '\r']).len();
        Line {
            text,
            from: range.start - start,
            to: range.start - start + content,
        }
    }

    /// Reads the next statement; there is one where the reader is not done.
    pub(super) fn statement(&mut self) -> Statement {
        let first = self.line;
        let start = self.source.line(first).start;
        let line = self.line_at(first, start);
        let (opening, word, word_end) = opening(line.content());
        self.line += 1;
        self.tokens.clear();
        let mut problems = Vec::new();
        let kind = match opening {
            Opening::Blank => StatementKind::Blank,
            Opening::Remark => {
                self.tokens
                    .push(TokenKind::Remark, line.from + word, line.to);
                StatementKind::Prose
            }
            opening if opening.is_prose() => prose(
                line.text,
                opening,
                (word, word_end, line.to),
                &mut self.block,
                &mut problems,
            ),
            Opening::Word(Word::Table) if !is_defined(line.content(), word_end) => {
                self.table(line, start, &mut problems)
            }
            opening => self.coded(line, start, opening, &mut problems),
        };
        self.block.pass(opening);
        let length = self.source.line(self.line - 1).end - start;
        Statement {
            start,
            length,
            line: first as u32 + 1,
            lines: (self.line - first) as u32,
            remark: remark(
                line.text,
                &self.tokens.remarks,
                kind == StatementKind::Prose,
            ),
            kind,
            problems,
        }
    }

    /// A statement of code, with the lines it goes on in.
    fn coded(
        &mut self,
        line: Line<'t>,
        start: usize,
        opening: Opening,
        problems: &mut Vec<Problem>,
    ) -> StatementKind {
        let course = match opening {
            Opening::Word(Word::Vary) => {
                if vary_line(line.text, 0, line.to, &mut self.tokens) {
                    Course::Labels
                } else {
                    Course::Code
                }
            }
            _ => {
                code(line.text, 0, line.to, &mut self.tokens);
                if opening == Opening::Word(Word::Unknown) {
                    Course::Unknown
                } else {
                    Course::Code
                }
            }
        };
        let end = self.further_lines(line, start, course);
        let text = line.text.get(..end).unwrap_or(line.text);
        let mut cursor = Cursor::new(text, &self.tokens.list, self.limits);
        let kind = match opening {
            Opening::Word(word) => cursor.worded(word),
            _ => match form(text, &self.tokens.list) {
                Some(Form::Symbol) => {
                    let read = cursor.definition();
                    cursor.or_unread(read)
                }
                Some(Form::Function) => {
                    let read = cursor.function();
                    cursor.or_unread(read)
                }
                None => cursor.no_statement(),
            },
        };
        problems.append(&mut cursor.problems);
        kind
    }

    /// Takes in the lines that the statement goes on in; gives where the last of them ends.
    fn further_lines(&mut self, first: Line<'t>, start: usize, course: Course) -> usize {
        let mut end = first.to;
        let mut brackets = Brackets::default();
        while self.line < self.source.line_count() {
            if !goes_on(&self.tokens, course, first.text, &mut brackets) {
                break;
            }
            let next = self.line_at(self.line, start);
            if !self.may_go_on(first, next, course) {
                break;
            }
            match course {
                Course::Labels => labels(next.text, next.from, next.to, false, &mut self.tokens),
                _ => code(next.text, next.from, next.to, &mut self.tokens),
            }
            end = next.to;
            self.line += 1;
        }
        end
    }

    /// Whether a line can be taken in: it is not blank, not only a remark, opens with no statement word and has not
    /// the form of a definition.
    fn may_go_on(&mut self, first: Line<'_>, next: Line<'_>, course: Course) -> bool {
        let indent = |line: Line<'_>| {
            let blanks = blank_length(line.content());
            line.content().get(..blanks).unwrap_or("").chars().count()
        };
        match opening(next.content()).0 {
            Opening::Code => {
                (course == Course::Unknown && indent(next) > indent(first))
                    || !self.is_definition(next)
            }
            _ => false,
        }
    }

    fn is_definition(&mut self, line: Line<'_>) -> bool {
        if !line.content().contains('=') {
            return false;
        }
        self.scratch.clear();
        code(line.text, line.from, line.to, &mut self.scratch);
        form(line.text, &self.scratch.list).is_some()
    }

    /// A table with its rows.
    fn table(
        &mut self,
        line: Line<'t>,
        start: usize,
        problems: &mut Vec<Problem>,
    ) -> StatementKind {
        let first = self.line - 1;
        code(line.text, 0, line.to, &mut self.tokens);
        let end = self.further_lines(line, start, Course::Header);
        let mut numbers = Vec::new();
        number_keys(&self.tokens, &mut numbers);
        let text = line.text.get(..end).unwrap_or(line.text);
        let mut cursor = Cursor::new(text, &self.tokens.list, self.limits);
        let header = cursor.header();
        problems.append(&mut cursor.problems);
        let span = self
            .tokens
            .list
            .first()
            .map_or(Span::default(), |word| word.span);
        let mut table = empty_table(&header);
        self.rows(&header, &numbers, (start, first), &mut table, problems);
        if !table.ended {
            let key = table
                .keys
                .first()
                .map_or(String::new(), |key| key.name.text.clone());
            problems.insert(
                0,
                Problem {
                    span,
                    fault: Fault::TableWithoutEnd { key },
                },
            );
        }
        StatementKind::Table(table)
    }

    /// The rows up to `end`, or up to the first line that cannot be one. Blank lines, remarks and asides behind the
    /// last row of a table without `end` stay statements of their own.
    fn rows(
        &mut self,
        header: &Header,
        numbers: &[bool],
        (start, first): (usize, usize),
        table: &mut Table,
        problems: &mut Vec<Problem>,
    ) {
        let mut index = self.line;
        while index < self.source.line_count() {
            let line = self.line_at(index, start);
            let opening = opening(line.content()).0;
            let worded = matches!(opening, Opening::Word(_) | Opening::Title(_));
            if worded && !opens_row(line.content(), numbers.len()) {
                match opening {
                    Opening::Word(Word::Aside) => {}
                    Opening::Word(Word::End) => {
                        table.ended = true;
                        self.line = index + 1;
                        self.end_line(line, problems);
                        return;
                    }
                    _ => return,
                }
            } else if !matches!(opening, Opening::Blank | Opening::Remark) {
                if self.is_definition(line) {
                    return;
                }
                table
                    .rows
                    .push(self.row(header, numbers, line, (index - first) as u32, problems));
                self.line = index + 1;
            }
            index += 1;
        }
    }

    fn row(
        &mut self,
        header: &Header,
        numbers: &[bool],
        line: Line<'t>,
        index: u32,
        problems: &mut Vec<Problem>,
    ) -> Row {
        self.scratch.clear();
        row(line.text, line.from, line.to, numbers, &mut self.scratch);
        let text = line.text.get(..line.to).unwrap_or(line.text);
        let mut cursor = Cursor::new(text, &self.scratch.list, self.limits);
        let mut row = cursor.row(header, index);
        problems.append(&mut cursor.problems);
        row.remark = remark(text, &self.scratch.remarks, false);
        row
    }

    /// Nothing but a remark may follow `end`.
    fn end_line(&mut self, line: Line<'t>, problems: &mut Vec<Problem>) {
        self.scratch.clear();
        code(line.text, line.from, line.to, &mut self.scratch);
        let text = line.text.get(..line.to).unwrap_or(line.text);
        let mut cursor = Cursor::new(text, &self.scratch.list, self.limits);
        cursor.bump();
        if cursor.peek().is_some() {
            let _: super::cursor::Read<()> = cursor.expected("nothing behind `end`");
        }
        problems.append(&mut cursor.problems);
    }
}

/// Whether `=` follows a word, so that the line was to define it.
fn is_defined(line: &str, word_end: usize) -> bool {
    let rest = line.get(word_end..).unwrap_or("");
    trimmed(rest).starts_with('=')
}

/// The texts of the remarks of a statement as one.
fn remark(text: &str, spans: &[Span], keep_empty: bool) -> Option<Words> {
    let (first, last) = (spans.first()?, spans.last()?);
    let parts = spans.iter().map(|span| {
        let words = span.of(text);
        trimmed(words.strip_prefix(';').unwrap_or(words))
    });
    let parts: Vec<&str> = parts.filter(|part| !part.is_empty()).collect();
    let words = parts.join(" ");
    (keep_empty || !words.is_empty()).then(|| Words {
        text: words,
        span: first.to(*last),
    })
}

/// How many brackets are open behind the tokens passed.
#[derive(Default)]
struct Brackets {
    passed: usize,
    open: u32,
}

impl Brackets {
    /// Whether no bracket is open behind all tokens.
    fn closed_behind(&mut self, tokens: &Tokens) -> bool {
        for token in tokens.list.iter().skip(self.passed) {
            match token.kind {
                TokenKind::Open => self.open += 1,
                TokenKind::Close => self.open = self.open.saturating_sub(1),
                TokenKind::Bar => self.open = 0,
                _ => {}
            }
        }
        self.passed = tokens.list.len();
        self.open == 0
    }
}

/// Whether what is read so far asks for a further line; `brackets` are those of the lines before.
fn goes_on(tokens: &Tokens, course: Course, text: &str, brackets: &mut Brackets) -> bool {
    let Some(last) = tokens.list.last() else {
        return false;
    };
    match course {
        Course::Labels => last.kind == TokenKind::Bar,
        Course::Header => matches!(last.kind, TokenKind::Bar | TokenKind::Comma),
        Course::Code | Course::Unknown => match last.kind {
            TokenKind::Sign(Sign::Minus) => !is_left_out(tokens, brackets),
            TokenKind::Sign(_)
            | TokenKind::At
            | TokenKind::Comma
            | TokenKind::Bar
            | TokenKind::Open => true,
            TokenKind::Word(
                Word::And | Word::Or | Word::Not | Word::Then | Word::Else | Word::Over,
            ) => true,
            TokenKind::Name => course == Course::Unknown && ends_in_such_that(tokens, text),
            _ => false,
        },
    }
}

/// Whether the `-` at the end is a value left out: directly behind `=`, `|` or the `:` of a label.
fn is_left_out(tokens: &Tokens, brackets: &mut Brackets) -> bool {
    let before = tokens
        .list
        .len()
        .checked_sub(2)
        .and_then(|at| tokens.list.get(at));
    match before.map(|token| token.kind) {
        Some(TokenKind::Equals | TokenKind::Bar) => true,
        Some(TokenKind::Colon) => brackets.closed_behind(tokens),
        _ => false,
    }
}

/// Whether the tokens end in `such` or `such that`.
fn ends_in_such_that(tokens: &Tokens, text: &str) -> bool {
    let mut words = tokens.list.iter().rev().map(|token| token.span.of(text));
    match words.next() {
        Some("such") => true,
        Some("that") => words.next() == Some("such"),
        _ => false,
    }
}
