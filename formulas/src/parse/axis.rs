//! `vary`, `unknown`: statements that give a name a range.

use super::cursor::{Cursor, Inside, Read, Unread, error, foreign};
use super::operand::unquoted;
use crate::problem::Fault;
use crate::syntax::{
    Expr, ExprKind, StatementKind, Unknown, UnknownSymbol, Vary, VaryPoints, Words,
};
use crate::token::{Token, TokenKind, Word};

impl Cursor<'_> {
    /// ```text
    /// vary loading: light | gross
    /// vary alpha [deg]: -4 to 12 step 2
    /// vary h [ft]: 0 to 10000 count 5
    /// vary n [1]: 1 | 2 | 3.8
    /// ```
    pub(super) fn vary(&mut self) -> Read<StatementKind> {
        self.bump();
        let name = self.name("the name of an axis")?;
        let (unit, fine) = self.opt_unit_part();
        if !self.eat(TokenKind::Colon) {
            let read: Read<()> = self.expected("`:` behind the name of the axis");
            let defines = Some(name);
            return read
                .map(|()| StatementKind::Blank)
                .or(Ok(StatementKind::Unreadable { defines }));
        }
        let mut points = if unit.is_some() {
            self.points()
        } else {
            VaryPoints::Labels(self.labels())
        };
        if !fine {
            points = VaryPoints::List(vec![error(self.since(0))]);
        }
        Ok(StatementKind::Vary(Vary { name, unit, points }))
    }

    fn labels(&mut self) -> Vec<Words> {
        let mut labels = Vec::new();
        loop {
            match self.peek() {
                Some(token) if token.kind == TokenKind::Label => {
                    self.bump();
                    labels.push(self.label_of(token));
                }
                _ => {
                    let _: Read<()> = self.expected("a label");
                    if self.kind() != Some(TokenKind::Bar) {
                        self.bump();
                    }
                }
            }
            if !self.eat(TokenKind::Bar) {
                return labels;
            }
        }
    }

    /// A label as compared: what stands between its quotes, where these enclose all of it.
    pub(super) fn label_of(&self, token: Token) -> Words {
        let text = self.word_of(token);
        let quoted =
            text.starts_with('"') && crate::lex::code::text_length(text) == Some(text.len());
        Words {
            text: if quoted {
                unquoted(text)
            } else {
                text.to_owned()
            },
            span: token.span,
        }
    }

    fn points(&mut self) -> VaryPoints {
        if (self.at..self.end).any(|at| self.is_at(at, TokenKind::Bar)) {
            return VaryPoints::List(self.point_list());
        }
        let first = self.at;
        self.stops = &["to", "step", "count"];
        let read = self
            .point_range()
            .and_then(|points| self.slot_end().map(|()| points));
        self.stops = &[];
        read.unwrap_or_else(|Unread| VaryPoints::List(vec![error(self.stretch(first, self.end))]))
    }

    fn point_list(&mut self) -> Vec<Expr> {
        let mut points = Vec::new();
        loop {
            let bar = (self.at..self.end).find(|at| self.is_at(*at, TokenKind::Bar));
            points.push(self.slot(bar.unwrap_or(self.end), Cursor::arithmetic));
            if !self.eat(TokenKind::Bar) {
                return points;
            }
        }
    }

    fn point_range(&mut self) -> Read<VaryPoints> {
        let from = *self.arithmetic()?;
        if !self.eat_word("to") {
            return Ok(VaryPoints::List(vec![from]));
        }
        let to = *self.arithmetic()?;
        if self.eat_word("step") {
            let step = *self.arithmetic()?;
            return Ok(VaryPoints::Step { from, to, step });
        }
        if self.eat_word("count") {
            let count = *self.arithmetic()?;
            return Ok(VaryPoints::Count { from, to, count });
        }
        self.expected("`step` or `count`")
    }

    /// ```text
    /// unknown a [deg] between -5 and 5 such that M(a) = 0
    /// unknown a between 0 and 1, b between 0 and 2 such that f(a, b) = 1 and g(a, b) = 2
    /// ```
    pub(super) fn unknown(&mut self) -> Read<StatementKind> {
        self.bump();
        let mut unknowns = Vec::new();
        let mut fine = true;
        loop {
            fine &= self.unknown_symbol(&mut unknowns).is_ok() || self.pass_to_next_unknown();
            if !self.eat(TokenKind::Comma) {
                break;
            }
        }
        let equations = match self.equations() {
            Ok(equations) if fine => equations,
            _ => unknowns
                .iter()
                .map(|unknown| (error(unknown.symbol.span), error(unknown.symbol.span)))
                .collect(),
        };
        if unknowns.is_empty() {
            return Err(Unread);
        }
        Ok(StatementKind::Unknown(Unknown {
            unknowns,
            equations,
        }))
    }

    /// One symbol with its bounds; it is known as soon as its name is read.
    fn unknown_symbol(&mut self, unknowns: &mut Vec<UnknownSymbol>) -> Read<()> {
        let symbol = self.name("the symbol of the unknown")?;
        let (unit, fine) = self.opt_unit_part();
        let (low, high) = (error(symbol.span), error(symbol.span));
        unknowns.push(UnknownSymbol {
            symbol,
            unit,
            low,
            high,
        });
        if !self.eat_word("between") {
            return self.expected("`between`");
        }
        let (low, high) = self.bounds()?;
        if let Some(last) = unknowns.last_mut().filter(|_| fine) {
            (last.low, last.high) = (low, high);
        }
        Ok(())
    }

    fn bounds(&mut self) -> Read<(Expr, Expr)> {
        self.stops = &["such"];
        let low = *self.arithmetic()?;
        if !self.eat(TokenKind::Word(Word::And)) {
            return self.expected("`and`");
        }
        let high = *self.arithmetic()?;
        self.stops = &[];
        Ok((low, high))
    }

    /// Passes what belongs to a broken entry. Always false: the statement has a problem.
    fn pass_to_next_unknown(&mut self) -> bool {
        (self.stops, self.open, self.nesting, self.inside) = (&[], 0, 0, Inside::Expression);
        while self.peek().is_some() && !self.at_word("such") {
            let next = self.kind() == Some(TokenKind::Comma)
                && self.kind_ahead(1) == Some(TokenKind::Name);
            let further = 2 + usize::from(super::form::is_bracket(self.kind_ahead(2)));
            let between = self
                .ahead(further)
                .is_some_and(|token| self.word_of(token) == "between");
            if next && between {
                break;
            }
            self.bump();
        }
        false
    }

    fn equations(&mut self) -> Read<Vec<(Expr, Expr)>> {
        if !(self.eat_word("such") && self.eat_word("that")) {
            return self.expected("`such that`");
        }
        let mut equations = Vec::new();
        loop {
            let left = *self.arithmetic()?;
            let sign = self.peek();
            let fine = self.equals()?;
            let mut right = *self.arithmetic()?;
            if !fine {
                right.kind = ExprKind::Error;
            }
            // A comparison in place of an equation.
            if let Some(token) = self
                .peek()
                .filter(|token| super::form::is_equals(self.text, Some(token)))
            {
                let fault = match sign {
                    Some(_) if token.kind == TokenKind::Foreign => foreign(self.word_of(token)),
                    _ => Fault::ChainedComparison { mend: None },
                };
                return self.fail(token.span, fault);
            }
            equations.push((left, right));
            if !self.eat(TokenKind::Word(Word::And)) {
                break;
            }
        }
        self.slot_end().map(|()| equations)
    }
}
