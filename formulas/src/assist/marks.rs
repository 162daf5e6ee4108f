//! What each piece of a sheet's text is, for highlighting while it is typed.

use crate::lex::lex;
use crate::parse::parse;
use crate::span::Span;
use crate::syntax::{Definition, DefinitionValue, Statement, StatementKind};
use crate::token::{Token, TokenKind, Word};

/// The kinds of marks, by the names that styles know them by.
pub const KINDS: [&str; 9] = [
    "word", "name", "function", "number", "unit", "text", "label", "remark", "prose",
];

/// The marks of `text`: from, to and kind of each, one after the other. Places count in UTF-16 units, as a browser's
/// strings do; kinds are positions in [`KINDS`]. What has no kind, such as signs, has no mark.
#[must_use]
pub fn marks(text: &str) -> Vec<u32> {
    let mut marks = Marks::default();
    // How a line is to be read depends on the statement that it belongs to, so the statements are found first.
    for statement in parse(text).statements {
        let end = statement.start.saturating_add(statement.length);
        let own = text.get(statement.start..end).unwrap_or("");
        marks.units = utf16_length(text, marks.byte, statement.start).saturating_add(marks.units);
        marks.statement(&statement, own);
        marks.byte = end;
    }
    marks.flat
}

/// Marks on their way, with the place reached in bytes of the text and in UTF-16 units.
#[derive(Default)]
struct Marks {
    flat: Vec<u32>,
    byte: usize,
    units: u32,
}

impl Marks {
    fn statement(&mut self, statement: &Statement, text: &str) {
        let tokens = lex(text);
        let labels = label_spans(&statement.kind);
        let mut labels = labels.iter().peekable();
        let mut before = None;
        for (index, token) in tokens.iter().enumerate() {
            let start = self.units;
            self.units += utf16_length(text, token.span.start as usize, token.span.end as usize);
            while labels
                .next_if(|label| label.end <= token.span.start)
                .is_some()
            {}
            let in_label = labels
                .peek()
                .is_some_and(|label| label.start <= token.span.start);
            let next = behind(&tokens, index);
            let word = is_word_here(&statement.kind, *token, token.span.of(text), before, next);
            let kind = if in_label && token.kind != TokenKind::Blank {
                position("label")
            } else if word {
                position("word")
            } else {
                kind_of(token.kind, next)
            };
            if let Some(kind) = kind {
                self.flat.extend([start, self.units, kind]);
            }
            if word {
                before = Some(BEHIND_WORD);
            } else if !token.kind.is_trivia() {
                before = Some(token.kind);
            }
        }
    }
}

/// What a word in its place counts as for the name behind it.
const BEHIND_WORD: TokenKind = TokenKind::Word(Word::Over);

fn utf16_length(text: &str, start: usize, end: usize) -> u32 {
    let stretch = text.get(start..end).unwrap_or("");
    stretch.chars().map(|c| c.len_utf16() as u32).sum()
}

/// The first token behind `index` that is no blank.
fn behind(tokens: &[Token], index: usize) -> Option<TokenKind> {
    let rest = tokens.iter().skip(index + 1).map(|token| token.kind);
    rest.into_iter().find(|kind| *kind != TokenKind::Blank)
}

fn kind_of(kind: TokenKind, next: Option<TokenKind>) -> Option<u32> {
    let name = match kind {
        TokenKind::Word(_) | TokenKind::Title(_) => "word",
        TokenKind::Name if next == Some(TokenKind::Open) => "function",
        TokenKind::Name => "name",
        TokenKind::Number | TokenKind::BrokenNumber => "number",
        TokenKind::Unit | TokenKind::Bracket | TokenKind::OpenBracket => "unit",
        TokenKind::Text | TokenKind::OpenText => "text",
        TokenKind::Label => "label",
        TokenKind::Remark => "remark",
        TokenKind::Prose => "prose",
        _ => return None,
    };
    position(name)
}

fn position(name: &str) -> Option<u32> {
    let position = KINDS.iter().position(|known| *known == name);
    position.and_then(|position| u32::try_from(position).ok())
}

/// Where the labels of a list by axis stand.
fn label_spans(kind: &StatementKind) -> Vec<Span> {
    match kind {
        StatementKind::Definition(Definition {
            value: DefinitionValue::ByAxis { items, .. },
            ..
        }) => {
            let labels = items.iter().filter_map(|item| item.label.as_ref());
            labels.map(|label| label.span).collect()
        }
        _ => Vec::new(),
    }
}

/// Whether a name is one of the words that are words in their place only, between the tokens `before` and `next`.
fn is_word_here(
    kind: &StatementKind,
    token: Token,
    text: &str,
    before: Option<TokenKind>,
    next: Option<TokenKind>,
) -> bool {
    use TokenKind::{At, Close, Colon, Comma, Dot, Equals, Open, Text};
    if token.kind != TokenKind::Name {
        return false;
    }
    // Where a value is due, the same word is a symbol.
    let ends_value = !matches!(
        before,
        None | Some(TokenKind::Sign(_) | TokenKind::Word(_) | Colon | Comma | Dot | Equals | Open)
    );
    match (kind, text) {
        (StatementKind::Definition(_), "by")
        | (StatementKind::Vary(_), "to" | "step" | "count")
        | (StatementKind::Unknown(_), "between" | "such") => ends_value,
        (StatementKind::Unknown(_), "that") => before == Some(BEHIND_WORD),
        (StatementKind::Figure { .. }, "against" | "each" | "closed") => ends_value,
        (StatementKind::Freebody { .. }, "couple" | "axial") => {
            matches!(before, Some(Colon | Comma)) && next != Some(At)
        }
        (StatementKind::Use { .. }, "as") => before == Some(Text),
        (_, "smooth" | "nearest" | "held") => before == Some(Close) || next == Some(Close),
        _ => false,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The marked stretches with their kinds.
    fn check(text: &str, expected: &[(&str, &str)]) {
        let units: Vec<u16> = text.encode_utf16().collect();
        let flat = marks(text);
        let marked: Vec<(String, &str)> = flat
            .chunks(3)
            .map(|mark| {
                let stretch =
                    String::from_utf16(&units[mark[0] as usize..mark[1] as usize]).unwrap();
                (stretch, KINDS[mark[2] as usize])
            })
            .collect();
        let expected: Vec<(String, &str)> = expected
            .iter()
            .map(|(s, k)| ((*s).to_owned(), *k))
            .collect();
        assert_eq!(marked, expected);
    }

    #[test]
    fn a_definition_is_marked_piece_by_piece() {
        check(
            "q [lb/ft^2] = dynamic_pressure_of_eas(V) ; at sea level\n",
            &[
                ("q", "name"),
                ("[lb/ft^2]", "unit"),
                ("dynamic_pressure_of_eas", "function"),
                ("V", "name"),
                ("; at sea level", "remark"),
            ],
        );
    }

    #[test]
    fn places_count_in_utf_16_units() {
        check(
            "note \u{1d6fc} first\nα = 2 ; ok\n",
            &[
                ("note", "word"),
                ("\u{1d6fc} first", "prose"),
                ("α", "name"),
                ("2", "number"),
                ("; ok", "remark"),
            ],
        );
    }

    #[test]
    fn cells_of_a_table_are_marked_as_labels_and_numbers() {
        check(
            "table point | V [kt]\nA 1 | 55\nend\nW = 2 lb\n",
            &[
                ("table", "word"),
                ("point", "name"),
                ("V", "name"),
                ("[kt]", "unit"),
                ("A 1", "label"),
                ("55", "number"),
                ("end", "word"),
                ("W", "name"),
                ("2", "number"),
                ("lb", "unit"),
            ],
        );
    }

    #[test]
    fn words_are_words_in_their_place_only() {
        for (text, words) in [
            ("W by step = light: 1 | \"to\": to", vec!["by"]),
            ("vary h [ft]: 0 to 5 step 1", vec!["vary", "to", "step"]),
            ("a = step + count*to", vec![]),
            (
                "unknown a between 0 and 1 such that a = b",
                vec!["unknown", "between", "and", "such", "that"],
            ),
            (
                "figure \"F\": closed against each each cg closed",
                vec!["figure", "against", "each", "closed"],
            ),
            (
                "freebody \"B\": couple M, axial T @ z, couple @ x",
                vec!["freebody", "couple", "axial"],
            ),
            ("use \"s\" as as", vec!["use", "as"]),
            ("a = b at (c: d) held", vec!["at", "held"]),
        ] {
            let flat = marks(text);
            let marked = flat
                .chunks(3)
                .filter(|mark| KINDS[mark[2] as usize] == "word");
            let found: Vec<&str> = marked
                .map(|mark| &text[mark[0] as usize..mark[1] as usize])
                .collect();
            assert_eq!(found, words, "{text}");
        }
    }

    #[test]
    fn labels_of_a_list_are_labels() {
        check(
            "W by l = max 2: 430 | \"g\": 560",
            &[
                ("W", "name"),
                ("by", "word"),
                ("l", "name"),
                ("max", "label"),
                ("2", "label"),
                ("430", "number"),
                ("\"g\"", "label"),
                ("560", "number"),
            ],
        );
    }
}
