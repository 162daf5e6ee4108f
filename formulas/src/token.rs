//! The smallest pieces of a statement: what they are and where they stand.

use crate::span::Span;
use crate::syntax::TitleWord;

/// One piece of a statement's text. The tokens of a statement, put together, give its text back.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Token {
    /// What it is.
    pub kind: TokenKind,
    /// Where it stands in the statement.
    pub span: Span,
}

/// What a token is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum TokenKind {
    /// Blanks and control characters.
    Blank,
    /// The end of a line.
    LineEnd,
    /// `;` and what follows it.
    Remark,
    /// A word that is never a name.
    Word(Word),
    /// A word that opens a line of the title block, in its place.
    Title(TitleWord),
    /// A symbol, function, axis or field, or a word that is one in its place only.
    Name,
    /// `12`, `1.5`, `.5`, `2e-3`.
    Number,
    /// `5.`, `1_000`, `1.2.3`: begins like a number.
    BrokenNumber,
    /// The unit behind a number.
    Unit,
    /// A unit in brackets, the brackets included.
    Bracket,
    /// `[` and what may have been a unit, without `]`.
    OpenBracket,
    /// Text in quotes, the quotes included.
    Text,
    /// A quote that nothing closes in its line, and what follows it.
    OpenText,
    /// A label where only labels can stand, blanks trimmed, its quotes included.
    Label,
    /// The text of a line of prose.
    Prose,
    /// `(`
    Open,
    /// `)`
    Close,
    /// `|`
    Bar,
    /// `,`
    Comma,
    /// `:`
    Colon,
    /// `.` before a field.
    Dot,
    /// `@`
    At,
    /// `=`
    Equals,
    /// A sign of arithmetic or comparison, or `+/-`.
    Sign(Sign),
    /// A power in raised digits: `²`, `⁻¹`.
    Raised,
    /// A sign of other notations for which this one has another.
    Foreign,
    /// A character that the language does not use.
    Unknown,
}

impl TokenKind {
    /// Whether the grammar passes it over.
    #[must_use]
    pub fn is_trivia(self) -> bool {
        matches!(
            self,
            TokenKind::Blank | TokenKind::LineEnd | TokenKind::Remark
        )
    }
}

/// Signs with a meaning of their own.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum Sign {
    Plus,
    Minus,
    Times,
    Divide,
    Power,
    Less,
    LessOrEqual,
    Greater,
    GreaterOrEqual,
    NotEqual,
    Tolerance,
}

/// Words that are never symbols, axes or parameters.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum Word {
    If,
    Then,
    Else,
    And,
    Or,
    Not,
    None,
    Excluded,
    Over,
    At,
    Vary,
    Table,
    End,
    Unknown,
    Governing,
    Require,
    Freebody,
    Figure,
    Use,
    Part,
    Sub,
    Note,
    Aside,
}
