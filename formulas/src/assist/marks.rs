//! What each piece of a sheet's text is, for highlighting while it is typed.

use crate::lex::lex;
use crate::parse::parse;
use crate::token::{Token, TokenKind};

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
        marks.statement(own);
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
    fn statement(&mut self, text: &str) {
        let tokens = lex(text);
        for (index, token) in tokens.iter().enumerate() {
            let start = self.units;
            self.units += utf16_length(text, token.span.start as usize, token.span.end as usize);
            if let Some(kind) = kind_of(token.kind, behind(&tokens, index)) {
                self.flat.extend([start, self.units, kind]);
            }
        }
    }
}

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
    KINDS
        .iter()
        .position(|known| *known == name)
        .and_then(|position| u32::try_from(position).ok())
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
}
