//! Statements that open with a word: what is judged, drawn or taken from elsewhere.

use super::cursor::{Cursor, Read, Unread, error};
use super::operand::unquoted;
use crate::problem::Fault;
use crate::syntax::{Expr, ExprKind, FreebodyItem, Name, StatementKind, Words};
use crate::token::{TokenKind, Word};

impl Cursor<'_> {
    /// The statement that the word opens.
    pub(super) fn worded(&mut self, word: Word) -> StatementKind {
        let equals = 1 + usize::from(super::form::is_bracket(self.kind_ahead(1)));
        if let Some(token) = self
            .peek()
            .filter(|_| self.kind_ahead(equals) == Some(TokenKind::Equals))
        {
            let word = self.word_of(token).to_owned();
            self.note(token.span, Fault::WordAsName { word });
            return StatementKind::Unreadable { defines: None };
        }
        let read = match word {
            Word::Vary => self.vary(),
            Word::Unknown => self.unknown(),
            Word::Governing => self.governing(),
            Word::Require => Ok(self.require()),
            Word::Freebody => self.freebody(),
            Word::Figure => self.figure(),
            Word::Use => self.other_sheet(),
            Word::End => {
                let span = self.here();
                self.fail(span, Fault::EndWithoutTable)
            }
            _ => Err(Unread),
        };
        read.unwrap_or(StatementKind::Unreadable { defines: None })
    }

    /// ```text
    /// governing P_t, air.density over point, cg
    /// ```
    fn governing(&mut self) -> Read<StatementKind> {
        self.bump();
        let mut symbols = Vec::new();
        loop {
            symbols.push(self.quantity()?);
            if !self.eat(TokenKind::Comma) {
                break;
            }
        }
        let over = if self.eat(TokenKind::Word(Word::Over)) {
            Some(self.names("the name of an axis")?)
        } else {
            None
        };
        self.slot_end()?;
        Ok(StatementKind::Governing { symbols, over })
    }

    /// A symbol or a field.
    fn quantity(&mut self) -> Read<Expr> {
        let expr = *self.postfix()?;
        match expr.kind {
            ExprKind::Name(_) | ExprKind::Field { .. } | ExprKind::Error => Ok(expr),
            _ => {
                let found = super::cursor::clipped(expr.span.of(self.text));
                self.fail(
                    expr.span,
                    Fault::Expected {
                        what: "a symbol",
                        found,
                    },
                )
            }
        }
    }

    /// ```text
    /// require CL <= CL_max
    /// ```
    fn require(&mut self) -> StatementKind {
        self.bump();
        let condition = self.slot(self.end, Cursor::condition);
        StatementKind::Require { condition }
    }

    /// A name in quotes, then `:`.
    fn titled(&mut self) -> Read<Words> {
        self.bump();
        let name = self.quoted("a name in quotes")?;
        if self.eat(TokenKind::Colon) {
            Ok(name)
        } else {
            self.expected("`:`")
        }
    }

    fn quoted(&mut self, what: &'static str) -> Read<Words> {
        match self.peek() {
            Some(token) if token.kind == TokenKind::Text => {
                self.bump();
                Ok(Words {
                    text: unquoted(self.word_of(token)),
                    span: token.span,
                })
            }
            _ => self.expected(what),
        }
    }

    /// ```text
    /// freebody "Balance": L_w @ x_ac, axial T @ z_t, couple M
    /// ```
    fn freebody(&mut self) -> Read<StatementKind> {
        let name = self.titled()?;
        let mut items = Vec::new();
        loop {
            let comma = self.next_comma();
            items.push(self.freebody_item(comma));
            self.at = comma;
            if !self.eat(TokenKind::Comma) {
                return Ok(StatementKind::Freebody { name, items });
            }
        }
    }

    /// The next comma that separates: outside brackets, and not hard between digits.
    fn next_comma(&self) -> usize {
        let mut depth = 0u32;
        for at in self.at..self.end {
            match self.tokens.get(at).map(|token| token.kind) {
                Some(TokenKind::Open) => depth += 1,
                Some(TokenKind::Close) => depth = depth.saturating_sub(1),
                Some(TokenKind::Comma) if depth == 0 && !self.comma_between_digits(at) => {
                    return at;
                }
                _ => {}
            }
        }
        self.end
    }

    fn comma_between_digits(&self, at: usize) -> bool {
        let number = |at: usize| {
            self.tokens
                .get(at)
                .filter(|token| token.kind == TokenKind::Number)
        };
        match (
            at.checked_sub(1).and_then(number),
            self.tokens.get(at),
            number(at + 1),
        ) {
            (Some(left), Some(comma), Some(right)) => {
                left.span.end == comma.span.start && comma.span.end == right.span.start
            }
            _ => false,
        }
    }

    fn freebody_item(&mut self, end: usize) -> FreebodyItem {
        let station = (self.at..end).find(|at| self.is_at(*at, TokenKind::At));
        if self.at_word("couple") && station.is_none() {
            self.bump();
            return FreebodyItem::Couple {
                moment: self.slot(end, Cursor::arithmetic),
            };
        }
        let axial = self.at_word("axial") && self.kind_ahead(1).is_some_and(begins_force);
        if axial {
            self.bump();
        }
        let force = self.slot(station.unwrap_or(end), Cursor::arithmetic);
        let station = if self.eat(TokenKind::At) {
            self.slot(end, Cursor::arithmetic)
        } else {
            if force.kind != ExprKind::Error {
                let _: Read<()> = self.slot_expected(end, "`@` and a station");
            }
            error(self.stretch(end, end))
        };
        if axial {
            return FreebodyItem::Axial {
                force,
                height: station,
            };
        }
        FreebodyItem::Force { force, station }
    }

    fn slot_expected(&mut self, end: usize, what: &'static str) -> Read<()> {
        let outer = std::mem::replace(&mut self.end, end);
        let read = self.expected(what);
        self.end = outer;
        read
    }

    /// ```text
    /// figure "Tail load": P_t, P_m against point each cg, loading
    /// figure "V-n": n against V closed
    /// ```
    fn figure(&mut self) -> Read<StatementKind> {
        let name = self.titled()?;
        let curves = self.curves()?;
        if !self.eat_word("against") {
            return self.expected("`against`");
        }
        self.stops = &["each", "closed"];
        let against = *self.arithmetic()?;
        self.stops = &[];
        let each: Vec<Name> = if self.eat_word("each") {
            self.names("the name of an axis")?
        } else {
            Vec::new()
        };
        let closed = self.eat_word("closed");
        self.slot_end()?;
        Ok(StatementKind::Figure {
            name,
            curves,
            against,
            each,
            closed,
        })
    }

    fn curves(&mut self) -> Read<Vec<Expr>> {
        self.stops = &["against"];
        let mut curves = Vec::new();
        loop {
            curves.push(*self.arithmetic()?);
            if !self.eat(TokenKind::Comma) {
                self.stops = &[];
                return Ok(curves);
            }
        }
    }

    /// ```text
    /// use "osier-geometry" as g
    /// ```
    fn other_sheet(&mut self) -> Read<StatementKind> {
        self.bump();
        let read = self
            .quoted("the name of a sheet in quotes")
            .and_then(|sheet| {
                if self.eat_word("as") {
                    Ok(sheet)
                } else {
                    self.expected("`as` and a name")
                }
            });
        let Ok(sheet) = read else {
            return Ok(StatementKind::Unreadable {
                defines: self.name_behind("as"),
            });
        };
        let name = self.name("a name")?;
        match self.slot_end() {
            Ok(()) => Ok(StatementKind::Use { sheet, name }),
            Err(Unread) => Ok(StatementKind::Unreadable {
                defines: Some(name),
            }),
        }
    }

    fn name_behind(&self, word: &str) -> Option<Name> {
        let mut tokens = self
            .tokens
            .iter()
            .skip_while(|token| token.span.of(self.text) != word)
            .skip(1);
        let next = tokens
            .next()
            .filter(|token| token.kind == TokenKind::Name)?;
        Some(self.name_of(*next))
    }
}

/// Whether a force can begin with such a token behind `axial`.
fn begins_force(kind: TokenKind) -> bool {
    !matches!(
        kind,
        TokenKind::At
            | TokenKind::Dot
            | TokenKind::Raised
            | TokenKind::Sign(
                crate::token::Sign::Times | crate::token::Sign::Divide | crate::token::Sign::Power
            )
    )
}
