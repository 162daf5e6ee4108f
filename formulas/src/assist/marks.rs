//! Marks for highlighting: which stretch of the text is what.

use crate::lex::lex;
use crate::parse::parse;
use crate::span::Span;
use crate::syntax::{DefinitionValue, Statement, StatementKind};
use crate::token::{Token, TokenKind, Word};

/// What a stretch of the text is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum MarkKind {
    /// A word of the language.
    Word,
    /// A symbol, axis or field.
    Symbol,
    /// A number.
    Number,
    /// A unit, behind a number or in brackets.
    Unit,
    /// Text in quotes, a label, or prose.
    Text,
    /// A remark or an aside.
    Remark,
    /// The text of a heading or of the title block.
    Heading,
    /// A sign.
    Sign,
    /// The name of a function.
    Function,
    /// What the language does not have.
    Error,
}

/// A stretch of the text, in UTF-16 units from its start.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Mark {
    /// First unit.
    pub start16: u32,
    /// One past the last unit.
    pub end16: u32,
    /// What it is.
    pub kind: MarkKind,
}

/// The marks of a whole text, in order and without overlap; blanks have none.
///
/// ```
/// use formulas::assist::marks::{MarkKind, marks};
/// let kinds: Vec<MarkKind> = marks("S [ft^2] = 142 ; drawing").iter().map(|mark| mark.kind).collect();
/// assert_eq!(kinds, [MarkKind::Symbol, MarkKind::Unit, MarkKind::Sign, MarkKind::Number, MarkKind::Remark]);
/// ```
#[must_use]
pub fn marks(text: &str) -> Vec<Mark> {
    let mut marks = Vec::new();
    let mut counter = Counter {
        text,
        byte: 0,
        units: 0,
    };
    for statement in &parse(text).statements {
        let end = statement.start + statement.length;
        let typed = text.get(statement.start..end).unwrap_or("");
        for (span, kind) in statement_marks(statement, typed) {
            let start16 = counter.units_at(statement.start + span.start as usize);
            let end16 = counter.units_at(statement.start + span.end as usize);
            marks.push(Mark {
                start16,
                end16,
                kind,
            });
        }
    }
    marks
}

/// Counts UTF-16 units on a single walk over the text.
struct Counter<'t> {
    text: &'t str,
    byte: usize,
    units: u32,
}

impl Counter<'_> {
    fn units_at(&mut self, byte: usize) -> u32 {
        let stretch = self.text.get(self.byte..byte).unwrap_or("");
        self.units += stretch
            .chars()
            .map(|character| character.len_utf16() as u32)
            .sum::<u32>();
        self.byte = byte.max(self.byte);
        self.units
    }
}

fn statement_marks(statement: &Statement, typed: &str) -> Vec<(Span, MarkKind)> {
    let mut tokens = lex(typed);
    tokens.retain(|token| !matches!(token.kind, TokenKind::Blank | TokenKind::LineEnd));
    let labels = label_spans(statement);
    let wrong: Vec<Span> = statement
        .problems
        .iter()
        .map(|problem| problem.span)
        .filter(|span| {
            tokens
                .binary_search_by_key(span, |token| token.span)
                .is_ok()
        })
        .collect();
    let mut marks = Vec::with_capacity(tokens.len());
    let mut labels = labels.iter().peekable();
    for (index, token) in tokens.iter().enumerate() {
        while labels
            .next_if(|label| label.end <= token.span.start)
            .is_some()
        {}
        let in_label = labels
            .peek()
            .is_some_and(|label| label.start <= token.span.start);
        let kind = if in_label {
            MarkKind::Text
        } else if wrong.contains(&token.span) {
            MarkKind::Error
        } else {
            token_kind(statement, typed, &tokens, index, *token)
        };
        marks.push((token.span, kind));
    }
    marks
}

/// Where the labels of a list by axis stand.
fn label_spans(statement: &Statement) -> Vec<Span> {
    match &statement.kind {
        StatementKind::Definition(definition) => match &definition.value {
            DefinitionValue::ByAxis { items, .. } => items
                .iter()
                .filter_map(|item| item.label.as_ref())
                .map(|label| label.span)
                .collect(),
            DefinitionValue::One(_) => Vec::new(),
        },
        _ => Vec::new(),
    }
}

fn token_kind(
    statement: &Statement,
    typed: &str,
    tokens: &[Token],
    index: usize,
    token: Token,
) -> MarkKind {
    match token.kind {
        TokenKind::Word(_) | TokenKind::Title(_) => MarkKind::Word,
        TokenKind::Name => name_kind(statement, typed, tokens, index),
        TokenKind::Number | TokenKind::Raised => MarkKind::Number,
        TokenKind::Unit | TokenKind::Bracket => MarkKind::Unit,
        TokenKind::Text | TokenKind::Label => MarkKind::Text,
        TokenKind::Remark => MarkKind::Remark,
        TokenKind::Prose => match statement.kind {
            StatementKind::Title { .. } | StatementKind::Part(_) | StatementKind::Sub(_) => {
                MarkKind::Heading
            }
            StatementKind::Note(_) => MarkKind::Text,
            _ => MarkKind::Remark,
        },
        TokenKind::BrokenNumber
        | TokenKind::OpenBracket
        | TokenKind::OpenText
        | TokenKind::Foreign
        | TokenKind::Unknown => MarkKind::Error,
        _ => MarkKind::Sign,
    }
}

/// A name is a function before `(`, a word in its place, or a symbol.
fn name_kind(statement: &Statement, typed: &str, tokens: &[Token], index: usize) -> MarkKind {
    let kind_at = |index: usize| tokens.get(index).map(|token| token.kind);
    let text = tokens.get(index).map_or("", |token| token.span.of(typed));
    let before = index.checked_sub(1).and_then(kind_at);
    let ends_operand = !matches!(
        before,
        None | Some(
            TokenKind::Sign(_)
                | TokenKind::Equals
                | TokenKind::Comma
                | TokenKind::Open
                | TokenKind::Dot
                | TokenKind::Word(_)
                | TokenKind::Bar
        )
    );
    let opens_item = matches!(before, Some(TokenKind::Colon | TokenKind::Comma));
    let word = match (&statement.kind, text) {
        (StatementKind::Definition(_), "by") => index > 0 && ends_operand,
        (StatementKind::Vary(_), "to" | "step" | "count") => {
            ends_operand && before != Some(TokenKind::Colon)
        }
        (StatementKind::Unknown(_), "between" | "such" | "that") => ends_operand,
        (StatementKind::Figure { .. }, "against" | "each" | "closed") => {
            ends_operand && before != Some(TokenKind::Colon)
        }
        (StatementKind::Freebody { .. }, "couple" | "axial") => {
            opens_item && !matches!(kind_at(index + 1), Some(TokenKind::At))
        }
        (StatementKind::Use { .. }, "as") => before == Some(TokenKind::Text),
        (_, "smooth" | "nearest" | "held") => before == Some(TokenKind::Close),
        _ => false,
    };
    if word {
        MarkKind::Word
    } else if kind_at(index + 1) == Some(TokenKind::Open)
        && before != Some(TokenKind::Word(Word::Over))
    {
        MarkKind::Function
    } else {
        MarkKind::Symbol
    }
}
