//! Texts and their tokens.

use super::lex;
use crate::token::TokenKind;

/// The pieces of a text that are no blanks, with their kinds.
fn check(text: &str, expected: &[(&str, &str)]) {
    let tokens = lex(text);
    let together: String = tokens.iter().map(|token| token.span.of(text)).collect();
    assert_eq!(together, text);
    let found: Vec<(String, String)> = tokens
        .iter()
        .filter(|token| !matches!(token.kind, TokenKind::Blank | TokenKind::LineEnd))
        .map(|token| (token.span.of(text).to_owned(), format!("{:?}", token.kind)))
        .collect();
    let expected: Vec<(String, String)> = expected
        .iter()
        .map(|(text, kind)| ((*text).to_owned(), (*kind).to_owned()))
        .collect();
    assert_eq!(found, expected, "{text}");
}

#[test]
fn code() {
    check(
        "P_t [lb] = 2 ft/s*x' +/- 5 % ; \"why\"\n",
        &[
            ("P_t", "Name"),
            ("[lb]", "Bracket"),
            ("=", "Equals"),
            ("2", "Number"),
            ("ft/s", "Unit"),
            ("*", "Sign(Times)"),
            ("x'", "Name"),
            ("+/-", "Sign(Tolerance)"),
            ("5", "Number"),
            ("%", "Unit"),
            ("; \"why\"", "Remark"),
        ],
    );
    check(
        "1_000 “a” \"b;\"\"c\" [x y²",
        &[
            ("1_000", "BrokenNumber"),
            ("“a”", "Foreign"),
            ("\"b;\"\"c\"", "Text"),
            ("[x y²", "OpenBracket"),
        ],
    );
}

#[test]
fn a_unit_ends_where_the_language_says() {
    for (text, unit) in [
        ("2 kg/m^3", "kg/m^3"),
        ("2 /deg", "/deg"),
        ("2 ft-lb", "ft-lb"),
        ("2 ft*x", "ft"),
        ("2 ft-3", "ft"),
        ("2 lb/3", "lb"),
        ("2 m^0.5", "m"),
        ("2 m^-2", "m^-2"),
        ("2 m²s", "m²"),
        ("2 kg/m/s", "kg/m/s"),
        ("2 ft then", "ft"),
        ("2 lb.over", "lb"),
        ("2 then", ""),
        ("2/deg", ""),
        ("2 / deg", ""),
        ("2 to", ""),
    ] {
        let found = lex(text)
            .iter()
            .find(|token| token.kind == TokenKind::Unit)
            .map_or("", |token| token.span.of(text));
        assert_eq!(found, unit, "{text}");
    }
}

#[test]
fn lines_of_plain_text() {
    check(
        "  note a ; b \n",
        &[("note", "Word(Note)"), ("a ; b", "Prose")],
    );
    check("title  x", &[("title", "Title(Title)"), ("x", "Prose")]);
    check(
        "title = x",
        &[("title", "Name"), ("=", "Equals"), ("x", "Name")],
    );
}

#[test]
fn labels() {
    check(
        "vary x: a b | \"c|d\" |\n 1/4\" ; e",
        &[
            ("vary", "Word(Vary)"),
            ("x", "Name"),
            (":", "Colon"),
            ("a b", "Label"),
            ("|", "Bar"),
            ("\"c|d\"", "Label"),
            ("|", "Bar"),
            ("1/4\"", "Label"),
            ("; e", "Remark"),
        ],
    );
    check(
        "table a, b [ft] | c\nx y, 2 | z 1\naside q\nend",
        &[
            ("table", "Word(Table)"),
            ("a", "Name"),
            (",", "Comma"),
            ("b", "Name"),
            ("[ft]", "Bracket"),
            ("|", "Bar"),
            ("c", "Name"),
            ("x y", "Label"),
            (",", "Comma"),
            ("2", "Number"),
            ("|", "Bar"),
            ("z", "Name"),
            ("1", "Number"),
            ("aside", "Word(Aside)"),
            ("q", "Prose"),
            ("end", "Word(End)"),
        ],
    );
}
