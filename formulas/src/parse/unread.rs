//! Lines that are no statement: what they may have been.

use super::cursor::{Cursor, Read, clipped};
use super::form::{is_bracket, is_equals};
use crate::lex::words::{STATEMENT_WORDS, TITLE_WORDS};
use crate::problem::Fault;
use crate::syntax::StatementKind;
use crate::token::TokenKind;

impl Cursor<'_> {
    /// A line without the form of any statement.
    pub(super) fn no_statement(&mut self) -> StatementKind {
        let Some(first) = self.peek() else {
            return StatementKind::Unreadable { defines: None };
        };
        let text = self.word_of(first);
        let mut defines = None;
        match first.kind {
            TokenKind::Word(_) if self.is_about_to_define(1) => {
                self.note(
                    first.span,
                    Fault::WordAsName {
                        word: text.to_owned(),
                    },
                );
            }
            TokenKind::Name if self.has_equals() => {
                defines = Some(self.name_of(first));
                self.bump();
                let _: Read<()> = self.broken_left_side();
            }
            TokenKind::Name | TokenKind::Word(_) => {
                let fault = Fault::NoStatement {
                    found: clipped(text),
                    looks_like: nearest_word(text),
                };
                self.note(first.span, fault);
            }
            TokenKind::Foreign | TokenKind::Unknown | TokenKind::Close | TokenKind::OpenText => {
                let _: Read<()> = self.expected("a statement");
            }
            _ => {
                let fault = Fault::NoStatement {
                    found: clipped(text),
                    looks_like: None,
                };
                self.note(first.span, fault);
            }
        }
        StatementKind::Unreadable { defines }
    }

    fn is_about_to_define(&self, from: usize) -> bool {
        let at = self.at + from + usize::from(is_bracket(self.kind_ahead(from)));
        let by = self
            .tokens
            .get(at)
            .is_some_and(|token| self.word_of(*token) == "by");
        is_equals(self.text, self.tokens.get(at)) || (by && self.has_equals())
    }

    fn has_equals(&self) -> bool {
        self.tokens
            .iter()
            .any(|token| token.kind == TokenKind::Equals)
    }

    /// What stands between a symbol and a later `=` and keeps them from being a definition.
    fn broken_left_side(&mut self) -> Read<()> {
        if self.kind() == Some(TokenKind::Open) {
            self.bump();
            return self
                .names("the name of a parameter")
                .and_then(|_| self.expected("`,` or `)`"));
        }
        if is_bracket(self.kind()) {
            self.opt_bracket();
            return self.expected("`=` or `by`");
        }
        if self.eat_word("by") {
            return self
                .names("the name of an axis")
                .and_then(|_| self.expected("`=`"));
        }
        self.expected("`=`, `[unit]` or `by`")
    }
}

/// The statement word nearest to what was typed, if it is near.
fn nearest_word(typed: &str) -> Option<String> {
    const LONGEST: usize = 12;
    if typed.chars().count() > LONGEST {
        return None;
    }
    let typed = typed.to_lowercase();
    let words = STATEMENT_WORDS.iter().chain(&TITLE_WORDS);
    let near = words
        .map(|word| (distance(&typed, word), word))
        .min_by_key(|(distance, _)| *distance)?;
    let allowed = if typed.len() < 5 { 1 } else { 2 };
    (near.0 <= allowed).then(|| (*near.1).to_owned())
}

/// How many letters are put in, left out or changed between two words.
fn distance(left: &str, right: &str) -> usize {
    let right: Vec<char> = right.chars().collect();
    let mut row: Vec<usize> = (0..=right.len()).collect();
    for (index, letter) in left.chars().enumerate() {
        let mut diagonal = index;
        let mut last = index + 1;
        for (cell, other) in row
            .iter_mut()
            .zip(std::iter::once(None).chain(right.iter().map(Some)))
        {
            let above = *cell;
            let value = match other {
                None => index + 1,
                Some(other) => (diagonal + usize::from(*other != letter))
                    .min(above + 1)
                    .min(last + 1),
            };
            (diagonal, last) = (above, value);
            *cell = value;
        }
    }
    row.last().copied().unwrap_or(0)
}
