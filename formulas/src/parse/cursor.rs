//! A walk over the tokens of one statement, and the problems met on it.

use crate::lex::signs::mend_of;
use crate::lex::{characters, code};
use crate::problem::{Fault, Problem};
use crate::source::Limits;
use crate::span::Span;
use crate::syntax::{Expr, ExprKind, Name};
use crate::token::{Sign, Token, TokenKind};
use unicode_normalization::UnicodeNormalization;

/// Something could not be read; its problem is noted already.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) struct Unread;

/// What a rule of the grammar yields.
pub(super) type Read<T> = Result<T, Unread>;

/// What a pair of brackets holds.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Inside {
    /// An expression; also outside all brackets.
    Expression,
    /// Arguments, between which commas stand.
    Arguments,
    /// The selections of a pick.
    Selections,
}

/// The place reached in the tokens of a statement, blanks and remarks left out.
pub(super) struct Cursor<'a> {
    /// The statement's text, and what follows it.
    pub(super) text: &'a str,
    pub(super) tokens: &'a [Token],
    /// The next token.
    pub(super) at: usize,
    /// One past the last token that may be taken.
    pub(super) end: usize,
    pub(super) problems: Vec<Problem>,
    pub(super) limits: &'a Limits,
    /// Brackets, signs, powers and calls around the place.
    pub(super) nesting: u32,
    pub(super) operators: u32,
    /// Brackets open at the place.
    pub(super) open: u32,
    /// What the innermost brackets around the place hold.
    pub(super) inside: Inside,
    /// Words that end an expression outside brackets.
    pub(super) stops: &'static [&'static str],
}

impl<'a> Cursor<'a> {
    pub(super) fn new(text: &'a str, tokens: &'a [Token], limits: &'a Limits) -> Self {
        Cursor {
            text,
            tokens,
            at: 0,
            end: tokens.len(),
            problems: Vec::new(),
            limits,
            nesting: 0,
            operators: 0,
            open: 0,
            inside: Inside::Expression,
            stops: &[],
        }
    }

    pub(super) fn peek(&self) -> Option<Token> {
        self.ahead(0)
    }

    pub(super) fn ahead(&self, further: usize) -> Option<Token> {
        let index = self.at + further;
        if index < self.end {
            self.tokens.get(index).copied()
        } else {
            None
        }
    }

    pub(super) fn kind(&self) -> Option<TokenKind> {
        self.peek().map(|token| token.kind)
    }

    pub(super) fn kind_ahead(&self, further: usize) -> Option<TokenKind> {
        self.ahead(further).map(|token| token.kind)
    }

    /// The token before the place.
    pub(super) fn previous(&self) -> Option<Token> {
        self.at
            .checked_sub(1)
            .and_then(|at| self.tokens.get(at))
            .copied()
    }

    pub(super) fn word_of(&self, token: Token) -> &'a str {
        token.span.of(self.text)
    }

    /// Passes the next token.
    pub(super) fn bump(&mut self) {
        if self.at < self.end {
            self.at += 1;
        }
    }

    pub(super) fn eat(&mut self, kind: TokenKind) -> bool {
        let found = self.kind() == Some(kind);
        if found {
            self.at += 1;
        }
        found
    }

    /// Whether the next token is a word in its place.
    pub(super) fn at_word(&self, word: &str) -> bool {
        self.peek()
            .is_some_and(|token| token.kind == TokenKind::Name && self.word_of(token) == word)
    }

    pub(super) fn eat_word(&mut self, word: &str) -> bool {
        let found = self.at_word(word);
        if found {
            self.at += 1;
        }
        found
    }

    /// The next token's span, or the empty one behind the last token taken.
    pub(super) fn here(&self) -> Span {
        match (self.peek(), self.previous()) {
            (Some(token), _) => token.span,
            (None, Some(last)) => last.span.behind(),
            (None, None) => Span::default(),
        }
    }

    /// The span of the tokens from index `first` up to the place.
    pub(super) fn since(&self, first: usize) -> Span {
        self.stretch(first, self.at)
    }

    /// The span of the tokens from index `first` up to index `end`; empty where there are none.
    pub(super) fn stretch(&self, first: usize, end: usize) -> Span {
        let last = end.checked_sub(1).and_then(|at| self.tokens.get(at));
        match (self.tokens.get(first), last) {
            (Some(first), Some(last)) if first.span.start <= last.span.start => {
                first.span.to(last.span)
            }
            (_, Some(last)) => last.span.behind(),
            (Some(first), None) => Span {
                start: first.span.start,
                end: first.span.start,
            },
            (None, None) => Span::default(),
        }
    }

    pub(super) fn note(&mut self, span: Span, fault: Fault) {
        self.problems.push(Problem { span, fault });
    }

    pub(super) fn fail<T>(&mut self, span: Span, fault: Fault) -> Read<T> {
        self.note(span, fault);
        Err(Unread)
    }

    /// Notes that something else was due at the place; `what` reads after 'expected'.
    pub(super) fn expected<T>(&mut self, what: &'static str) -> Read<T> {
        let (span, fault) = match self.peek() {
            Some(token) => (token.span, self.unexpected(token, what)),
            None => match self.previous().filter(|last| asks_for_more(last.kind)) {
                Some(last) => (
                    last.span,
                    Fault::Dangling {
                        sign: clipped(self.word_of(last)),
                    },
                ),
                None => (
                    self.here(),
                    Fault::Expected {
                        what,
                        found: String::new(),
                    },
                ),
            },
        };
        self.fail(span, fault)
    }

    fn unexpected(&self, token: Token, what: &'static str) -> Fault {
        let text = self.word_of(token);
        match token.kind {
            TokenKind::OpenText => Fault::UnclosedText,
            TokenKind::OpenBracket => Fault::UnclosedBracket { bracket: '[' },
            TokenKind::Close if self.open == 0 => Fault::UnopenedBracket { bracket: ')' },
            TokenKind::Unknown if text == "]" => Fault::UnopenedBracket { bracket: ']' },
            TokenKind::Unknown => Fault::UnknownCharacter {
                character: text.chars().next().unwrap_or(' '),
            },
            TokenKind::Foreign => foreign(text),
            TokenKind::Sign(Sign::Tolerance) => Fault::TolerancePlace,
            _ => Fault::Expected {
                what,
                found: clipped(text),
            },
        }
    }

    /// A name; `what` reads after 'expected'.
    pub(super) fn name(&mut self, what: &'static str) -> Read<Name> {
        match self.peek() {
            Some(token) if token.kind == TokenKind::Name => {
                self.bump();
                Ok(self.name_of(token))
            }
            Some(token) if matches!(token.kind, TokenKind::Word(_)) => {
                let word = self.word_of(token).to_owned();
                self.fail(token.span, Fault::WordAsName { word })
            }
            _ => self.expected(what),
        }
    }

    pub(super) fn name_of(&self, token: Token) -> Name {
        Name {
            text: composed(self.word_of(token)),
            span: token.span,
        }
    }

    /// Names separated by commas.
    pub(super) fn names(&mut self, what: &'static str) -> Read<Vec<Name>> {
        let mut names = vec![self.name(what)?];
        while self.eat(TokenKind::Comma) {
            names.push(self.name(what)?);
        }
        Ok(names)
    }

    /// Goes one level deeper.
    pub(super) fn enter(&mut self) -> Read<()> {
        self.nesting += 1;
        let limit = self.limits.nesting;
        if self.nesting > limit {
            let span = self.here();
            return self.fail(span, Fault::NestingLimit { limit });
        }
        Ok(())
    }

    pub(super) fn leave(&mut self) {
        self.nesting = self.nesting.saturating_sub(1);
    }

    pub(super) fn count_operator(&mut self) -> Read<()> {
        self.operators += 1;
        let limit = self.limits.operators;
        if self.operators > limit {
            let span = self.here();
            return self.fail(span, Fault::OperatorLimit { limit });
        }
        Ok(())
    }
}

/// An expression on its way to its place in the tree. Rules hand on boxes, so that a deep text needs little stack.
pub(super) type Node = Box<Expr>;

pub(super) fn node(span: Span, kind: ExprKind) -> Node {
    Box::new(Expr { span, kind })
}

/// A node that could not be read.
pub(super) fn unread(span: Span) -> Node {
    Box::new(error(span))
}

/// An expression that could not be read.
pub(super) fn error(span: Span) -> Expr {
    Expr {
        span,
        kind: ExprKind::Error,
    }
}

/// A name as compared: in the composed normal form.
pub(super) fn composed(text: &str) -> String {
    if text.is_ascii() {
        text.to_owned()
    } else {
        text.nfc().collect()
    }
}

/// A piece of the text short enough for a sentence.
pub(super) fn clipped(text: &str) -> String {
    const LONGEST: usize = 40;
    match text.char_indices().nth(LONGEST) {
        Some((end, _)) => format!("{}…", text.get(..end).unwrap_or("")),
        None => text.to_owned(),
    }
}

/// The problem of a sign of another notation.
pub(super) fn foreign(text: &str) -> Fault {
    let mend = match mend_of(text) {
        Some(mend) => mend.to_owned(),
        None => {
            let inner = text.trim_matches(code::is_curved_quote);
            format!("\"{}\"", characters::trimmed(inner))
        }
    };
    Fault::ForeignSign {
        text: clipped(text),
        mend,
    }
}

/// Whether nothing can end with such a token.
fn asks_for_more(kind: TokenKind) -> bool {
    use crate::token::Word::{And, At, Else, If, Not, Or, Over, Then};
    matches!(
        kind,
        TokenKind::Sign(_)
            | TokenKind::Equals
            | TokenKind::Comma
            | TokenKind::Bar
            | TokenKind::Colon
            | TokenKind::At
            | TokenKind::Word(And | At | Else | If | Not | Or | Over | Then)
    )
}
