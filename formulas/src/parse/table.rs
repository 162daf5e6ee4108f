//! Tables: header and rows. Which lines are rows is decided in `lines`.

use super::cursor::{Cursor, Read, error};
use crate::problem::Fault;
use crate::syntax::{Expr, ExprKind, Name, Parameter, Row, Table, Toleranced, Words};
use crate::token::TokenKind;

/// A header, and which of its columns could be read.
pub(super) struct Header {
    pub(super) keys: Vec<Parameter>,
    pub(super) columns: Vec<Parameter>,
    fine: Vec<bool>,
}

impl Cursor<'_> {
    /// ```text
    /// table point | V [KEAS] | n
    /// table flap, alpha [deg] | CL
    /// ```
    pub(super) fn header(&mut self) -> Header {
        self.bump();
        let mut header = Header {
            keys: Vec::new(),
            columns: Vec::new(),
            fine: Vec::new(),
        };
        let bar = self.next_bar();
        loop {
            let comma = (self.at..bar).find(|at| self.is_at(*at, TokenKind::Comma));
            let (key, fine) = self.header_cell(comma.unwrap_or(bar), "the name of a key");
            header.keys.push(key);
            header.fine.push(fine);
            if !self.eat(TokenKind::Comma) {
                break;
            }
        }
        while self.eat(TokenKind::Bar) {
            let bar = self.next_bar();
            let (column, fine) = self.header_cell(bar, "a symbol");
            header.columns.push(column);
            header.fine.push(fine);
        }
        header
    }

    fn next_bar(&self) -> usize {
        (self.at..self.end)
            .find(|at| self.is_at(*at, TokenKind::Bar))
            .unwrap_or(self.end)
    }

    /// A name and its unit; one that cannot be read keeps its place, so that the cells below stay in theirs.
    fn header_cell(&mut self, end: usize, what: &'static str) -> (Parameter, bool) {
        let outer = std::mem::replace(&mut self.end, end);
        let first = self.at;
        let mut parameter = Parameter {
            name: Name {
                text: String::new(),
                span: self.stretch(first, end),
            },
            unit: None,
        };
        let mut fine = true;
        let read = self.name(what).and_then(|name| {
            parameter.name = name;
            (parameter.unit, fine) = self.opt_unit_part();
            if self.peek().is_none() {
                Ok(())
            } else {
                self.expected("`[unit]` or `|`")
            }
        });
        (self.at, self.end) = (end, outer);
        (parameter, fine && read.is_ok())
    }

    /// A row, its line counted from the first of the statement as 0.
    ///
    /// ```text
    /// A | 55 | 3.8 | -0.055
    /// up, -4 | 0.21
    /// ```
    pub(super) fn row(&mut self, header: &Header, line: u32) -> Row {
        let mut row = Row {
            line,
            span: self.stretch(0, self.end),
            keys: Vec::new(),
            key_values: Vec::new(),
            cells: Vec::new(),
            remark: None,
        };
        let bar = self.next_bar();
        self.keys(header, bar, &mut row);
        let mut found = 1;
        while self.eat(TokenKind::Bar) {
            let bar = self.next_bar();
            found += 1;
            if found > header.columns.len() + 1 {
                self.at = bar;
                continue;
            }
            let cell = self.toleranced(bar);
            let fine = header.fine.get(header.keys.len() + found - 2) == Some(&true);
            row.cells.push(if fine { cell } else { unread(cell.value) });
        }
        let expected = header.columns.len() + 1;
        if found != expected {
            self.note(row.span, Fault::RowLength { expected, found });
            // Which cell is missing, or one too many, is not known.
            for cell in &mut row.cells {
                cell.value.kind = ExprKind::Error;
            }
            row.cells
                .resize_with(expected - 1, || unread(error(row.span.behind())));
        }
        row
    }

    fn keys(&mut self, header: &Header, bar: usize, row: &mut Row) {
        loop {
            let numbers = header
                .keys
                .get(row.keys.len())
                .is_some_and(|key| key.unit.is_some());
            let comma = (self.at..bar)
                .find(|at| header.keys.len() > 1 && self.is_at(*at, TokenKind::Comma));
            let end = comma.unwrap_or(bar);
            let (words, value) = self.key(end, numbers);
            row.keys.push(words);
            row.key_values.push(value);
            self.at = end;
            if comma.is_none() {
                break;
            }
            self.bump();
        }
        let (expected, found) = (header.keys.len(), row.keys.len());
        if expected != found {
            self.note(self.stretch(0, bar), Fault::RowLength { expected, found });
            row.keys.resize_with(expected, Words::default);
            row.key_values.resize_with(expected, || None);
        }
    }

    fn key(&mut self, end: usize, numbers: bool) -> (Words, Option<Expr>) {
        let span = self.stretch(self.at, end);
        if numbers {
            let text = span.of(self.text).to_owned();
            let value = self.slot(end, Cursor::arithmetic);
            return (Words { text, span }, Some(value));
        }
        match self
            .peek()
            .filter(|token| token.kind == TokenKind::Label && self.at + 1 == end)
        {
            Some(token) => (self.label_of(token), None),
            None => {
                let _: Read<()> = self.expected("a label");
                (
                    Words {
                        text: String::new(),
                        span,
                    },
                    None,
                )
            }
        }
    }
}

fn unread(value: Expr) -> Toleranced {
    Toleranced {
        value: Expr {
            span: value.span,
            kind: ExprKind::Error,
        },
        tolerance: None,
    }
}

/// The table that a header opens, without rows yet.
pub(super) fn empty_table(header: &Header) -> Table {
    Table {
        keys: header.keys.clone(),
        columns: header.columns.clone(),
        rows: Vec::new(),
        ended: false,
    }
}
