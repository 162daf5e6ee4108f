//! Operands: numbers, names, calls, brackets, and what binds tightest behind them.

use super::cursor::{Cursor, Inside, Node, Read, node, unread};
use crate::problem::Fault;
use crate::span::Span;
use crate::syntax::{Argument, ExprKind, Name, PickWord, Selection};
use crate::token::{Token, TokenKind, Word};

/// The selections of a pick, and the word among them.
type Selections = (Vec<Selection>, Option<(PickWord, Span)>);

impl Cursor<'_> {
    /// An operand with its fields and picks.
    ///
    /// ```text
    /// air.density   P_t at (point: "D")   f(x) at (alpha: 2 deg) smooth
    /// ```
    pub(super) fn postfix(&mut self) -> Read<Node> {
        let first = self.at;
        let mut base = self.operand()?;
        let mut links = 0;
        loop {
            base = match self.kind() {
                Some(TokenKind::Dot) => self.field(first, base)?,
                Some(TokenKind::Word(Word::At)) => self.pick(first, base)?,
                _ => break,
            };
            // A chain of fields and picks is as deep as it is long.
            self.enter()?;
            links += 1;
        }
        self.nesting -= links;
        Ok(base)
    }

    #[inline(never)]
    fn field(&mut self, first: usize, base: Node) -> Read<Node> {
        let dot = self.here();
        let hard = self
            .previous()
            .is_some_and(|last| last.span.end == dot.start);
        self.bump();
        let next = self.peek().filter(|next| next.kind == TokenKind::Name);
        match next.filter(|next| hard && next.span.start == dot.end) {
            Some(token) => {
                self.bump();
                let field = self.name_of(token);
                Ok(node(self.since(first), ExprKind::Field { base, field }))
            }
            None if next.is_some() => {
                let (text, mend) = (".".to_owned(), "*".to_owned());
                self.fail(dot, Fault::ForeignSign { text, mend })
            }
            None => self.expected("the name of a field"),
        }
    }

    /// `at (axis: position, …, held)`; the word may also stand behind the bracket.
    #[inline(never)]
    fn pick(&mut self, first: usize, base: Node) -> Read<Node> {
        self.bump();
        let (selections, inside) = self.in_brackets(Inside::Selections, Cursor::selections)?;
        let word = inside.or_else(|| self.opt_pick_word());
        let kind = ExprKind::Pick {
            base,
            selections,
            word,
        };
        Ok(node(self.since(first), kind))
    }

    fn selections(&mut self) -> Read<Selections> {
        let mut selections = Vec::new();
        loop {
            let axis = self.name("the name of an axis")?;
            if !self.eat(TokenKind::Colon) {
                return self.expected("`:` behind the axis");
            }
            let position = self.whole()?;
            selections.push(Selection {
                axis,
                position: *position,
            });
            let comma = self.eat(TokenKind::Comma);
            let last = self.kind_ahead(1) == Some(TokenKind::Close);
            let word = last.then(|| self.opt_pick_word()).flatten();
            if word.is_some() || !comma {
                return Ok((selections, word));
            }
        }
    }

    fn opt_pick_word(&mut self) -> Option<(PickWord, Span)> {
        let token = self.peek().filter(|token| token.kind == TokenKind::Name)?;
        let word = match self.word_of(token) {
            "smooth" => PickWord::Smooth,
            "nearest" => PickWord::Nearest,
            "held" => PickWord::Held,
            _ => return None,
        };
        self.bump();
        Some((word, token.span))
    }

    fn operand(&mut self) -> Read<Node> {
        let Some(token) = self.peek() else {
            return self.expected("a value");
        };
        match token.kind {
            TokenKind::Name if self.kind_ahead(1) == Some(TokenKind::Open) => self.call(token),
            TokenKind::Name => {
                let name = self.name_of(token).text;
                Ok(self.leaf(token, ExprKind::Name(name)))
            }
            TokenKind::Number | TokenKind::BrokenNumber => self.number(token),
            TokenKind::Open => self.in_brackets(Inside::Expression, Cursor::whole),
            TokenKind::Text => {
                let text = unquoted(self.word_of(token));
                Ok(self.leaf(token, ExprKind::Text(text)))
            }
            TokenKind::Bracket | TokenKind::OpenBracket => Ok(self.unit_one(token)),
            TokenKind::Word(word) => self.word_operand(token, word),
            _ => self.expected("a value"),
        }
    }

    fn leaf(&mut self, token: Token, kind: ExprKind) -> Node {
        self.bump();
        node(token.span, kind)
    }

    /// `[kt]`: one of that unit.
    #[inline(never)]
    fn unit_one(&mut self, token: Token) -> Node {
        self.bump();
        let (unit, fine) = self.unit_of(token);
        let kind = if fine {
            ExprKind::UnitOne(unit)
        } else {
            ExprKind::Error
        };
        node(token.span, kind)
    }

    /// A word of the language where a value is due.
    #[inline(never)]
    fn word_operand(&mut self, token: Token, word: Word) -> Read<Node> {
        match word {
            Word::None => Ok(self.leaf(token, ExprKind::None)),
            Word::Excluded => Ok(self.leaf(token, ExprKind::Excluded)),
            Word::If => {
                self.note(token.span, Fault::IfPlace);
                let span = self.conditional()?.span;
                Ok(unread(span))
            }
            Word::Then | Word::Else | Word::And | Word::Or | Word::Not | Word::At => {
                self.expected("a value")
            }
            _ => {
                let word = self.word_of(token).to_owned();
                self.note(token.span, Fault::WordAsName { word });
                Ok(self.leaf(token, ExprKind::Error))
            }
        }
    }

    /// `( … )`, one level deeper.
    pub(super) fn in_brackets<T>(
        &mut self,
        inside: Inside,
        rule: impl FnOnce(&mut Self) -> Read<T>,
    ) -> Read<T> {
        let bracket = self.here();
        if !self.eat(TokenKind::Open) {
            return self.expected("`(`");
        }
        self.enter()?;
        self.open += 1;
        let outer = std::mem::replace(&mut self.inside, inside);
        let inner = rule(self);
        // Where the line ends inside, the bracket that nothing closes is the problem, unless one is known.
        if self.peek().is_none() && (inner.is_ok() || self.dangles_at(bracket)) {
            if inner.is_err() {
                self.problems.pop();
            }
            return self.fail(bracket, Fault::UnclosedBracket { bracket: '(' });
        }
        let inner = inner?;
        if !self.eat(TokenKind::Close) {
            return self.expected("an operator or `)`");
        }
        self.open -= 1;
        self.inside = outer;
        self.leave();
        Ok(inner)
    }

    /// Whether the bracket is the last token, so that what was reported is only that nothing follows it.
    fn dangles_at(&self, bracket: Span) -> bool {
        self.previous().is_some_and(|last| last.span == bracket)
    }

    /// `name(a, b, c: d over axis)`.
    #[inline(never)]
    fn call(&mut self, token: Token) -> Read<Node> {
        let first = self.at;
        let function = self.name_of(token);
        self.bump();
        let (arguments, over) = self.in_brackets(Inside::Arguments, Cursor::arguments)?;
        let kind = ExprKind::Call {
            function,
            arguments,
            over,
        };
        Ok(node(self.since(first), kind))
    }

    pub(super) fn arguments(&mut self) -> Read<(Vec<Argument>, Option<Vec<Name>>)> {
        let mut arguments = Vec::new();
        if self.kind() == Some(TokenKind::Close) {
            return Ok((arguments, None));
        }
        loop {
            arguments.push(self.argument()?);
            if self.eat(TokenKind::Word(Word::Over)) {
                let axes = self.names("the name of an axis")?;
                return Ok((arguments, Some(axes)));
            }
            if !self.eat(TokenKind::Comma) {
                return Ok((arguments, None));
            }
        }
    }

    fn argument(&mut self) -> Read<Argument> {
        let named =
            self.kind() == Some(TokenKind::Name) && self.kind_ahead(1) == Some(TokenKind::Colon);
        let name = if named {
            Some(self.name("a name")?)
        } else {
            None
        };
        if named {
            self.bump();
        }
        let value = *self.whole()?;
        Ok(Argument { name, value })
    }
}

/// What stands between the quotes of a text.
pub(super) fn unquoted(text: &str) -> String {
    let inner = text.strip_prefix('"').unwrap_or(text);
    inner
        .strip_suffix('"')
        .unwrap_or(inner)
        .replace("\"\"", "\"")
}
