//! Text to tree. Total: broken text is an entry with problems, and every other line is read.

mod axis;
pub(crate) mod cursor;
mod definition;
mod edited;
mod expression;
mod form;
mod lines;
mod number;
mod operand;
mod slips;
mod statement;
mod table;
#[cfg(test)]
mod tests;
mod title;
mod unit;
mod unread;

use crate::problem::Problem;
use crate::source::{Limits, Source};
use crate::syntax::{Expr, Tree, UnitText};

/// The tree of a sheet, read within the limits of the language.
///
/// ```
/// use formulas::parse::parse;
/// use formulas::syntax::StatementKind;
/// let tree = parse("S [ft^2] = 142 ; drawing OS-010\nc [ft] = = 4.6\nb [ft] = 31");
/// assert!(matches!(tree.statements[0].kind, StatementKind::Definition(_)));
/// assert!(!tree.statements[1].problems.is_empty());
/// assert!(tree.statements[2].problems.is_empty());
/// ```
#[must_use]
pub fn parse(text: &str) -> Tree {
    parse_within(text, &Limits::USUAL)
}

/// The tree of a sheet, read within limits of the host's.
#[must_use]
pub fn parse_within(text: &str, limits: &Limits) -> Tree {
    let source = Source::within(text, limits);
    lines::read(&source, limits)
}

/// The tree of a sheet that came by an edit from another one, given with its tree: what [`parse`] gives, but only
/// statements that the edit may touch are read.
#[must_use]
pub fn parse_edited(text: &str, before: (&str, Tree)) -> Tree {
    let source = Source::within(text, &Limits::USUAL);
    edited::read(&source, &Limits::USUAL, before)
}

/// An expression that stands alone, and what could not be read of it; spans count from the start of `text`.
#[must_use]
pub fn expression(text: &str) -> (Expr, Vec<Problem>) {
    let mut tokens = crate::lex::Tokens::default();
    let (end, _) = crate::lex::line_end(text, 0);
    crate::lex::code::code(text, 0, end, &mut tokens);
    let mut cursor = cursor::Cursor::new(text, &tokens.list, &Limits::USUAL);
    let expr = cursor.slot(tokens.list.len(), cursor::Cursor::whole);
    (expr, cursor.problems)
}

/// A unit as it is typed in brackets, these left off, and what could not be read of it; spans count from the start of
/// `text`.
#[must_use]
pub fn unit(text: &str) -> (UnitText, Vec<Problem>) {
    unit::read_unit(crate::lex::characters::trimmed(text), 0, true)
}
