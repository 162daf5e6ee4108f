//! Slips that have a mend of their own: chained comparisons, and operands without a sign between them.

use super::cursor::{Cursor, Inside, Node, Read, unread};
use super::expression::ADD;
use crate::lex::characters::name_length;
use crate::problem::{Fault, Mend};
use crate::span::Span;
use crate::token::{Token, TokenKind};
use engine::quantity::Unit;

impl Cursor<'_> {
    /// `a < b < c`: the comparison from token `first` on, its first sign at token `sign`, met a second sign.
    pub(super) fn chained(&mut self, first: usize, sign: usize) -> Read<Node> {
        let mut mend = self.since(first).of(self.text).to_owned();
        let mut operand = self.stretch(sign + 1, self.at);
        while let Some(infix) = self.infix().filter(|next| next.op.compares()) {
            self.count_operator()?;
            let before = self.at;
            self.at += infix.tokens;
            let typed = self.since(before).of(self.text);
            let after = self.at;
            self.binary(ADD)?;
            let right = self.since(after);
            mend.push_str(&format!(
                " and {} {typed} {}",
                operand.of(self.text),
                right.of(self.text)
            ));
            operand = right;
        }
        let span = self.since(first);
        // The operands of a long chain would make its mend grow beyond all use.
        const LONGEST: usize = 500;
        let mend = (mend.len() <= LONGEST).then_some(Mend { span, text: mend });
        self.note(span, Fault::ChainedComparison { mend });
        Ok(unread(span))
    }

    /// Two operands side by side: `2 (x)`, `S c`, `(a)(b)`.
    pub(super) fn implied_product(&mut self, first: usize) -> Read<Node> {
        self.count_operator()?;
        let span = self.here();
        let mend = self.product_mend();
        // `2 min(a, b)`: what looks like a unit was to be a function.
        let call = mend.as_ref().is_some_and(|mend| mend.span.end < span.start);
        self.note(span, Fault::ImpliedProduct { mend });
        if call {
            self.in_brackets(Inside::Arguments, Cursor::arguments)?;
        } else {
            self.postfix()?;
        }
        Ok(unread(self.since(first)))
    }

    /// The sign that was left out, where one can be told.
    fn product_mend(&self) -> Option<Mend> {
        let (last, next) = (self.previous()?, self.peek()?);
        if is_numeral(last.kind) && is_numeral(next.kind) {
            return None;
        }
        if last.kind == TokenKind::Unit
            && next.kind == TokenKind::Open
            && self.unit_is_call(last, next)
        {
            let before = self
                .at
                .checked_sub(2)
                .and_then(|at| self.tokens.get(at))
                .copied()?;
            return Some(put_between(before, last, "*"));
        }
        let unit = self.word_of(next);
        let is_unit = next.kind == TokenKind::Name && Unit::named(unit).is_some();
        // `5 ft lb`: the second unit joins the first.
        if last.kind == TokenKind::Unit && is_unit {
            return Some(put_between(last, next, "."));
        }
        // `(2 + 3) ft`: a letter alone is more often a symbol.
        if last.kind == TokenKind::Close && is_unit && unit.chars().count() > 1 {
            let span = Span {
                start: last.span.end,
                end: next.span.end,
            };
            return Some(Mend {
                span,
                text: format!("*[{unit}]"),
            });
        }
        Some(put_between(last, next, "*"))
    }

    /// `2 min(a, b)`: whether what looks like a unit was to be a function.
    fn unit_is_call(&self, unit: Token, bracket: Token) -> bool {
        let text = self.word_of(unit);
        unit.span.end == bracket.span.start && name_length(text) == text.len()
    }
}

fn is_numeral(kind: TokenKind) -> bool {
    matches!(
        kind,
        TokenKind::Number | TokenKind::BrokenNumber | TokenKind::Unit
    )
}

fn put_between(left: Token, right: Token, sign: &str) -> Mend {
    let span = Span {
        start: left.span.end,
        end: right.span.start,
    };
    Mend {
        span,
        text: sign.to_owned(),
    }
}
