//! Expressions from the loosest sign to the tightest, and `if`.

use super::cursor::{Cursor, Inside, Node, Read, Unread, error, foreign, node, unread};
use super::number::is_absolute;
use crate::lex::number::power_value;
use crate::lex::signs::mend_of;
use crate::problem::Fault;
use crate::syntax::{BinaryOp, Expr, ExprKind, Toleranced};
use crate::token::{Sign, Token, TokenKind, Word};

/// How tightly signs bind; a larger number binds tighter.
const OR: u8 = 1;
const AND: u8 = 2;
const NOT: u8 = 3;
const COMPARE: u8 = 4;
pub(super) const ADD: u8 = 5;
const MULTIPLY: u8 = 6;
const UNARY: u8 = 7;
const POWER: u8 = 8;

/// A sign between two operands.
#[derive(Clone, Copy)]
pub(super) struct Infix {
    pub(super) op: BinaryOp,
    binds: u8,
    /// How many tokens it takes.
    pub(super) tokens: usize,
    /// Whether it is one of another notation.
    foreign: bool,
}

impl Cursor<'_> {
    /// All tokens up to index `end` as one expression; what cannot be read becomes an error.
    #[inline(never)]
    pub(super) fn slot(&mut self, end: usize, rule: impl FnOnce(&mut Self) -> Read<Node>) -> Expr {
        let (first, outer, nesting) = (self.at, self.end, self.nesting);
        self.end = end;
        let read = rule(self).and_then(|expr| self.slot_end().map(|()| expr));
        let expr = match read {
            Ok(node) => *node,
            Err(Unread) => error(self.stretch(first, end)),
        };
        (self.at, self.end, self.nesting) = (end, outer, nesting);
        (self.open, self.inside) = (0, Inside::Expression);
        expr
    }

    pub(super) fn slot_end(&mut self) -> Read<()> {
        match self.peek() {
            None => Ok(()),
            Some(_) => self.expected("an operator or the end of the line"),
        }
    }

    /// All tokens up to index `end` as `x` or `x +/- t`; a dash or nothing is `none`.
    pub(super) fn toleranced(&mut self, end: usize) -> Toleranced {
        if self.at >= end || (self.at + 1 == end && self.at_dash()) {
            let span = self.stretch(self.at, end);
            self.at = end;
            return Toleranced {
                value: Expr {
                    span,
                    kind: ExprKind::None,
                },
                tolerance: None,
            };
        }
        let mut tolerance = None;
        let value = self.slot(end, |cursor| {
            let value = cursor.whole()?;
            if cursor.eat(TokenKind::Sign(Sign::Tolerance)) {
                tolerance = Some(cursor.slot(end, Cursor::arithmetic));
            }
            Ok(value)
        });
        Toleranced { value, tolerance }
    }

    fn at_dash(&self) -> bool {
        self.peek().is_some_and(|token| {
            token.kind == TokenKind::Sign(Sign::Minus) || is_long_dash(token, self.word_of(token))
        })
    }

    /// An expression where `if` may stand.
    pub(super) fn whole(&mut self) -> Read<Node> {
        if self.kind() == Some(TokenKind::Word(Word::If)) {
            return self.conditional();
        }
        self.binary(OR)
    }

    /// An expression where `if` may not stand.
    pub(super) fn condition(&mut self) -> Read<Node> {
        self.binary(OR)
    }

    /// An expression that ends before comparisons, `and` and `or`.
    pub(super) fn arithmetic(&mut self) -> Read<Node> {
        self.binary(ADD)
    }

    /// `if c then a else b`.
    pub(super) fn conditional(&mut self) -> Read<Node> {
        let first = self.at;
        let word = self.here();
        self.bump();
        self.enter()?;
        let condition = self.condition()?;
        if !self.eat(TokenKind::Word(Word::Then)) {
            return self.expected("`then`");
        }
        let then = self.whole()?;
        if !self.eat(TokenKind::Word(Word::Else)) {
            return if self.peek().is_none_or(|next| closes(next.kind)) {
                self.fail(word, Fault::IfWithoutElse)
            } else {
                self.expected("`else`")
            };
        }
        let otherwise = self.whole()?;
        self.leave();
        let kind = ExprKind::If {
            condition,
            then,
            otherwise,
        };
        Ok(node(self.since(first), kind))
    }

    /// Operands joined by signs that bind at least as tightly as `least`.
    pub(super) fn binary(&mut self, least: u8) -> Read<Node> {
        let first = self.at;
        let mut left = self.prefix(least)?;
        loop {
            match self.infix() {
                Some(infix) if infix.binds < least => return Ok(left),
                Some(infix) => left = self.operation(first, left, infix)?,
                None if self.begins_operand() => left = self.implied_product(first)?,
                None => return Ok(left),
            }
        }
    }

    /// The sign that stands next.
    pub(super) fn infix(&self) -> Option<Infix> {
        use BinaryOp::{
            Add, And, Divide, Equal, Greater, GreaterOrEqual, Less, LessOrEqual, Multiply,
            NotEqual, Or, Power, Subtract,
        };
        let token = self.peek()?;
        let (op, binds) = match token.kind {
            TokenKind::Sign(Sign::Plus) => (Add, ADD),
            TokenKind::Sign(Sign::Minus) => (Subtract, ADD),
            TokenKind::Sign(Sign::Times) => (Multiply, MULTIPLY),
            TokenKind::Sign(Sign::Divide) => (Divide, MULTIPLY),
            TokenKind::Sign(Sign::Power) | TokenKind::Raised => (Power, POWER),
            TokenKind::Sign(Sign::Less) => (Less, COMPARE),
            TokenKind::Sign(Sign::LessOrEqual) => (LessOrEqual, COMPARE),
            TokenKind::Sign(Sign::Greater) => (Greater, COMPARE),
            TokenKind::Sign(Sign::GreaterOrEqual) => (GreaterOrEqual, COMPARE),
            TokenKind::Sign(Sign::NotEqual) => (NotEqual, COMPARE),
            TokenKind::Equals => (Equal, COMPARE),
            TokenKind::Word(Word::And) => (And, AND),
            TokenKind::Word(Word::Or) => (Or, OR),
            TokenKind::Foreign => return foreign_infix(mend_of(self.word_of(token))?),
            TokenKind::Bar if self.double_bar() => {
                return Some(Infix {
                    op: Or,
                    binds: OR,
                    tokens: 2,
                    foreign: true,
                });
            }
            _ => return None,
        };
        Some(Infix {
            op,
            binds,
            tokens: 1,
            foreign: false,
        })
    }

    fn double_bar(&self) -> bool {
        match (self.ahead(0), self.ahead(1)) {
            (Some(first), Some(second)) => {
                second.kind == TokenKind::Bar && first.span.end == second.span.start
            }
            _ => false,
        }
    }

    /// The sign that stands next, and what is right of it. `first` is the token at which `left` begins.
    fn operation(&mut self, first: usize, left: Node, infix: Infix) -> Read<Node> {
        self.count_operator()?;
        let sign = self.at;
        let raised = self.peek().filter(|token| token.kind == TokenKind::Raised);
        self.at += infix.tokens;
        let op_span = self.since(sign);
        if infix.foreign {
            self.note(op_span, foreign_sign(op_span.of(self.text)));
        }
        let right = match (infix.op, raised) {
            (BinaryOp::Power, Some(token)) => self.raised_exponent(token)?,
            (BinaryOp::Power, None) => {
                self.enter()?;
                let right = self.binary(UNARY)?;
                self.leave();
                right
            }
            _ => self.binary(infix.binds + 1)?,
        };
        if infix.op.compares() && self.infix().is_some_and(|next| next.op.compares()) {
            return self.chained(first, sign);
        }
        let span = self.since(first);
        if infix.foreign {
            return Ok(unread(span));
        }
        let kind = ExprKind::Binary {
            op: infix.op,
            op_span,
            left,
            right,
        };
        Ok(node(span, kind))
    }

    /// A power in raised digits, and a further power of it.
    fn raised_exponent(&mut self, token: Token) -> Read<Node> {
        let value = f64::from(power_value(self.word_of(token)));
        let number = |value: f64| {
            let (unit, more) = (None, Vec::new());
            node(token.span, ExprKind::Number { value, unit, more })
        };
        let exponent = if value < 0.0 {
            node(token.span, ExprKind::Negate(number(-value)))
        } else {
            number(value)
        };
        match self.infix().filter(|next| next.op == BinaryOp::Power) {
            None => Ok(exponent),
            Some(next) => {
                self.enter()?;
                let exponent = self.operation(self.at - 1, exponent, next)?;
                self.leave();
                Ok(exponent)
            }
        }
    }

    /// A sign before an operand, or the operand.
    fn prefix(&mut self, least: u8) -> Read<Node> {
        let (first, Some(token)) = (self.at, self.peek()) else {
            return self.expected("a value");
        };
        match token.kind {
            TokenKind::Sign(Sign::Minus) => self.negation(first, token),
            TokenKind::Sign(Sign::Plus) => {
                self.bump();
                self.nested(UNARY)
            }
            TokenKind::Word(Word::Not) if least <= NOT => {
                self.bump();
                let operand = self.nested(NOT)?;
                Ok(node(self.since(first), ExprKind::Not(operand)))
            }
            TokenKind::Foreign if is_foreign_prefix(self.word_of(token)) => {
                self.note(token.span, foreign(self.word_of(token)));
                self.bump();
                self.nested(least.max(NOT))?;
                Ok(unread(self.since(first)))
            }
            _ => self.postfix(),
        }
    }

    fn nested(&mut self, least: u8) -> Read<Node> {
        self.enter()?;
        let operand = self.binary(least)?;
        self.leave();
        Ok(operand)
    }

    /// `-x`. A sign directly before a temperature in degC or degF, or before a compound number, belongs to the number.
    fn negation(&mut self, first: usize, sign: Token) -> Read<Node> {
        self.bump();
        let next = self.peek();
        let mut operand = self.nested(UNARY)?;
        let span = self.since(first);
        let hard = next
            .is_some_and(|next| next.kind == TokenKind::Number && next.span.start == sign.span.end);
        if let ExprKind::Number { value, unit, more } = &mut operand.kind
            && hard
            && (!more.is_empty() || unit.as_ref().is_some_and(is_absolute))
        {
            *value = -*value;
            more.iter_mut().for_each(|(value, _)| *value = -*value);
            operand.span = span;
            return Ok(operand);
        }
        Ok(node(span, ExprKind::Negate(operand)))
    }

    /// Whether an operand begins here, where a sign is due.
    fn begins_operand(&self) -> bool {
        match self.peek() {
            Some(token) if token.kind == TokenKind::Name => !self.ends_operand(token),
            Some(token) => matches!(
                token.kind,
                TokenKind::Number | TokenKind::BrokenNumber | TokenKind::Open | TokenKind::Bracket
            ),
            None => false,
        }
    }

    /// Whether a name is a word in its place that ends what stands before it.
    fn ends_operand(&self, token: Token) -> bool {
        let word = self.word_of(token);
        if self.open == 0 {
            return self.stops.contains(&word);
        }
        self.inside == Inside::Selections
            && self.kind_ahead(1) == Some(TokenKind::Close)
            && matches!(word, "smooth" | "nearest" | "held")
    }
}

fn is_long_dash(token: Token, text: &str) -> bool {
    token.kind == TokenKind::Foreign && text.chars().all(crate::lex::characters::is_dash)
}

/// Whether a token ends what stands before it.
fn closes(kind: TokenKind) -> bool {
    matches!(kind, TokenKind::Close | TokenKind::Comma | TokenKind::Bar)
}

fn is_foreign_prefix(text: &str) -> bool {
    matches!(mend_of(text), Some("not " | "-"))
}

fn foreign_sign(text: &str) -> Fault {
    if text == "||" {
        let (text, mend) = (text.to_owned(), "or".to_owned());
        return Fault::ForeignSign { text, mend };
    }
    foreign(text)
}

/// What a sign of another notation was to say, by its mend.
fn foreign_infix(mend: &str) -> Option<Infix> {
    let (op, binds) = match mend {
        "=" => (BinaryOp::Equal, COMPARE),
        "!=" => (BinaryOp::NotEqual, COMPARE),
        "<=" => (BinaryOp::LessOrEqual, COMPARE),
        ">=" => (BinaryOp::GreaterOrEqual, COMPARE),
        "^" => (BinaryOp::Power, POWER),
        "and" => (BinaryOp::And, AND),
        "or" => (BinaryOp::Or, OR),
        "-" => (BinaryOp::Subtract, ADD),
        "*" => (BinaryOp::Multiply, MULTIPLY),
        "/" => (BinaryOp::Divide, MULTIPLY),
        _ => return None,
    };
    Some(Infix {
        op,
        binds,
        tokens: 1,
        foreign: true,
    })
}
