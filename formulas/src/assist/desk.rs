//! What an editor's questions are answered from: the sheet as far as it is known, and the place that is asked about.

use crate::axes::AxisSet;
use crate::lex::lex;
use crate::names::{Names, Role};
use crate::program::{Kind, Program, Quantity};
use crate::reference::dimension_name;
use crate::source::{Place, Source};
use crate::span::Span;
use crate::syntax::{Expr, FunctionDefinition, Statement, StatementKind, Tree};
use crate::token::{Token, TokenKind};
use crate::used::{UsedSheet, UsedSheets};
use crate::values::Values;
use engine::quantity::Dimension;
use serde::Serialize;

/// A sheet that is asked about while it is typed.
#[derive(Clone, Copy)]
pub struct Desk<'a> {
    /// Its text.
    pub text: &'a str,
    /// Its tree.
    pub tree: &'a Tree,
    /// Its names.
    pub names: &'a Names,
    /// What was checked.
    pub program: &'a Program,
    /// Its values, as far as they were worked out.
    pub values: &'a Values,
    /// The other sheets that it uses.
    pub used: &'a UsedSheets,
}

/// A stretch of a line, in Unicode characters and in UTF-16 units, all from 1.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[allow(missing_docs)]
pub struct Stretch {
    pub line: u32,
    pub column: u32,
    pub length: u32,
    pub column16: u32,
    pub length16: u32,
}

/// The statement at a byte of the text, its tokens, and how far into it the byte lies.
pub(super) struct Spot<'a> {
    pub(super) statement: &'a Statement,
    /// The text of the statement.
    pub(super) text: &'a str,
    /// The byte within it.
    pub(super) at: usize,
}

impl<'a> Desk<'a> {
    /// The byte at a line and a column in Unicode characters.
    #[must_use]
    pub fn byte(&self, line: u32, column: u32) -> usize {
        Source::new(self.text).byte(line, column)
    }

    /// The byte at a line and a column in UTF-16 units.
    #[must_use]
    pub fn byte16(&self, line: u32, column16: u32) -> usize {
        Source::new(self.text).byte16(line, column16)
    }

    /// Where some bytes of the text stand.
    pub(super) fn stretch(&self, from: usize, to: usize) -> Stretch {
        let source = Source::new(self.text);
        let (start, end): (Place, Place) = (source.place(from), source.place(to.max(from)));
        let one_line = start.line == end.line;
        let length = |start: u32, end: u32| if one_line { end - start } else { 0 };
        Stretch {
            line: start.line,
            column: start.column,
            length: length(start.column, end.column),
            column16: start.column16,
            length16: length(start.column16, end.column16),
        }
    }

    pub(super) fn spot(&self, byte: usize) -> Option<Spot<'a>> {
        let statements = &self.tree.statements;
        let behind = statements.partition_point(|s| s.start <= byte);
        let index = behind.checked_sub(1)?;
        let statement = statements.get(index)?;
        let end = statement.start.saturating_add(statement.length);
        let text = self.text.get(statement.start..end)?;
        let at = byte.saturating_sub(statement.start);
        // Behind the last line end a new line begins, which is no statement yet.
        let new_line = at >= text.len() && text.ends_with(['\n', '\r']);
        let (text, at) = if new_line {
            ("", 0)
        } else {
            (text, at.min(text.len()))
        };
        text.is_char_boundary(at).then_some(Spot {
            statement,
            text,
            at,
        })
    }

    /// The quantity of a symbol, fields as `air.density`.
    pub(super) fn quantity(&self, symbol: &str) -> Option<(usize, &'a Quantity)> {
        let mut all = self.program.quantities.iter().enumerate();
        all.find(|(_, q)| q.listed && q.symbol == symbol)
            .or_else(|| {
                let mut all = self.program.quantities.iter().enumerate();
                all.find(|(_, q)| q.symbol == symbol)
            })
    }

    /// The other sheet of a name.
    pub(super) fn sheet(&self, name: &str) -> Option<&'a UsedSheet> {
        let symbol = self.names.symbol(name)?;
        let used = self.used.sheet(symbol.statement)?;
        (symbol.role == Role::Sheet).then_some(used)
    }

    /// An own function.
    pub(super) fn own_function(
        &self,
        name: &str,
    ) -> Option<(&'a Statement, &'a FunctionDefinition)> {
        let statement = self.tree.statements.get(self.names.function(name)?)?;
        match &statement.kind {
            StatementKind::Function(function) => Some((statement, function)),
            _ => None,
        }
    }

    /// A stretch of a statement as typed.
    pub(super) fn typed(&self, statement: &Statement, expr: &Expr) -> String {
        let end = statement.start.saturating_add(statement.length);
        let text = self.text.get(statement.start..end).unwrap_or("");
        super::joined(expr.span.of(text))
    }

    /// The names of axes in a set.
    pub(super) fn axis_names(&self, axes: AxisSet) -> Vec<String> {
        let name = |id: crate::axes::AxisId| {
            let axis = self.program.axes.get(id.0 as usize)?;
            Some(axis.name.clone())
        };
        axes.iter().filter_map(name).collect()
    }

    /// The labels of an axis of labels.
    pub(super) fn labels(&self, axis: &str) -> Option<&'a [String]> {
        let axis = self.program.axes.iter().find(|a| a.name == axis)?;
        axis.values.is_none().then_some(axis.labels.as_slice())
    }
}

/// The dimension of a number.
pub(super) fn dimension_of(kind: Kind) -> Option<Dimension> {
    match kind {
        Kind::Number(number) => Some(number.dimension),
        _ => None,
    }
}

/// `pressure in lb/ft^2`, `text`, `a pure number`.
pub(super) fn what_it_is(kind: Kind, unit: Option<&str>) -> String {
    let dimension = match kind {
        Kind::Number(number) => number.dimension,
        Kind::Condition => return "condition".to_string(),
        Kind::Text => return "text".to_string(),
        Kind::Record(_) => return "record".to_string(),
    };
    match (dimension_name(dimension), unit) {
        (name, Some(unit)) => format!("{name} in {unit}"),
        (name, None) => name,
    }
}

/// The tokens of a text that matter to the grammar, up to a byte.
pub(super) fn tokens_before(text: &str, at: usize) -> Vec<Token> {
    let cut = text.get(..at).unwrap_or("");
    let mut tokens = lex(cut);
    // A remark that begins before the byte goes on there, so it is kept.
    tokens.retain(|t| !t.kind.is_trivia() || t.kind == TokenKind::Remark);
    tokens
}

/// The token at a byte, or the one that ends there.
pub(super) fn token_at(tokens: &[Token], at: usize) -> Option<(usize, Token)> {
    let holds = |span: Span| (span.start as usize) <= at && at < span.end as usize;
    let ends = |token: &Token| token.span.end as usize == at && !token.kind.is_trivia();
    let all = || tokens.iter().copied().enumerate();
    let inside = all().find(|(_, t)| holds(t.span));
    let names = |kind| matches!(kind, TokenKind::Name | TokenKind::Unit | TokenKind::Bracket);
    match inside {
        Some((index, token)) if names(token.kind) => Some((index, token)),
        inside => all().find(|(_, t)| ends(t) && names(t.kind)).or(inside),
    }
}
