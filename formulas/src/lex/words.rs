//! The words of the language.

use crate::syntax::TitleWord;
use crate::token::Word;

/// The word that `text` always is.
#[must_use]
pub fn word(text: &str) -> Option<Word> {
    // Most names are shorter or longer than all words, or of a length with few of them.
    Some(match text {
        "if" => Word::If,
        "or" => Word::Or,
        "at" => Word::At,
        "and" => Word::And,
        "not" => Word::Not,
        "end" => Word::End,
        "use" => Word::Use,
        "sub" => Word::Sub,
        "then" => Word::Then,
        "else" => Word::Else,
        "none" => Word::None,
        "over" => Word::Over,
        "vary" => Word::Vary,
        "part" => Word::Part,
        "note" => Word::Note,
        "table" => Word::Table,
        "aside" => Word::Aside,
        "figure" => Word::Figure,
        "unknown" => Word::Unknown,
        "require" => Word::Require,
        "excluded" => Word::Excluded,
        "freebody" => Word::Freebody,
        "governing" => Word::Governing,
        _ => return None,
    })
}

/// The word of the title block that `text` is, in its place.
#[must_use]
pub fn title_word(text: &str) -> Option<TitleWord> {
    Some(match text {
        "title" => TitleWord::Title,
        "revision" => TitleWord::Revision,
        "date" => TitleWord::Date,
        "prepared" => TitleWord::Prepared,
        "checked" => TitleWord::Checked,
        "basis" => TitleWord::Basis,
        "digits" => TitleWord::Digits,
        "units" => TitleWord::Units,
        "sources" => TitleWord::Sources,
        _ => return None,
    })
}

/// How a word of the title block is typed.
#[must_use]
pub fn title_text(word: TitleWord) -> &'static str {
    match word {
        TitleWord::Title => "title",
        TitleWord::Revision => "revision",
        TitleWord::Date => "date",
        TitleWord::Prepared => "prepared",
        TitleWord::Checked => "checked",
        TitleWord::Basis => "basis",
        TitleWord::Digits => "digits",
        TitleWord::Units => "units",
        TitleWord::Sources => "sources",
    }
}

/// Words that can open a statement, the title block left out.
pub const STATEMENT_WORDS: [&str; 13] = [
    "part",
    "sub",
    "note",
    "aside",
    "vary",
    "table",
    "end",
    "unknown",
    "governing",
    "require",
    "freebody",
    "figure",
    "use",
];

/// Words that open a line of the title block.
pub const TITLE_WORDS: [&str; 9] = [
    "title", "revision", "date", "prepared", "checked", "basis", "digits", "units", "sources",
];

/// Words that are words in their place only.
pub const PLACE_WORDS: [&str; 16] = [
    "by", "between", "such", "that", "to", "step", "count", "each", "against", "as", "couple",
    "axial", "closed", "held", "smooth", "nearest",
];

/// Whether `text` is a word of the language in any place; such a word is never a unit name.
#[must_use]
pub fn is_word(text: &str) -> bool {
    word(text).is_some() || PLACE_WORDS.contains(&text) || title_word(text).is_some()
}
