//! What the language has, as rows: statements, and what an expression is made of. Each has a form, a meaning and a small
//! sheet that runs. Help while typing and the written reference are made of them.

mod expressions;
mod functions;
mod statements;
mod units;
mod write;

pub use expressions::EXPRESSIONS;
pub use functions::{dimension_name, field, parameter, results, signature, wanted};
pub use statements::STATEMENTS;
pub use units::{unit_meaning, unit_row, unit_value};
pub use write::write;

/// A statement, a sign, or a word of an expression.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Row {
    /// The word that opens it, or the sign; what it is called where it has neither.
    pub word: &'static str,
    /// How it is typed.
    pub form: &'static str,
    /// What it means.
    pub meaning: &'static str,
    /// A small sheet that runs.
    pub example: &'static str,
}

/// The row of a word or sign, a statement before a part of an expression.
#[must_use]
pub fn row(word: &str) -> Option<&'static Row> {
    let all = STATEMENTS.iter().chain(EXPRESSIONS);
    let named = |row: &&Row| row.word.split(' ').any(|w| w == word);
    all.into_iter().find(named)
}
