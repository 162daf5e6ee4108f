//! Which lines a statement takes.

use super::shown;
use crate::parse::parse;

/// Reads a text as statements of so many lines each.
fn check(text: &str, expected: &[(u32, &str)]) {
    let tree = parse(text);
    let found: Vec<(u32, String)> = tree
        .statements
        .iter()
        .map(|one| (one.lines, shown::statement(one)))
        .collect();
    let expected: Vec<(u32, String)> = expected
        .iter()
        .map(|(lines, shown)| (*lines, (*shown).to_owned()))
        .collect();
    assert_eq!(found, expected, "{text}");
    let together: String = tree
        .statements
        .iter()
        .map(|one| &text[one.start..one.start + one.length])
        .collect();
    assert_eq!(together, text);
}

#[test]
fn a_statement_goes_on_behind_what_asks_for_more() {
    check(
        "a = b +\n  c - ; one\n d ; two",
        &[(3, "a = ((b + c) - d)")],
    );
    check(
        "a = b and\nc or\nnot\nd",
        &[(4, "a = ((b and c) or (not d))")],
    );
    check(
        "a = if b then\n1 else\n2",
        &[(3, "a = (if b then 1 else 2)")],
    );
    check("a = f(\nb,\nc)", &[(3, "a = f(b, c)")]);
    check("a = f(x: -\n1)", &[(2, "a = f(x: (-1))")]);
    check(
        "a = b *\r\nc\r\rd = 1",
        &[(2, "a = (b * c)"), (1, "blank"), (1, "d = 1")],
    );
    check("e by x = 1 |\n2", &[(2, "e = by x: 1 | 2")]);
    check("vary x: a |\nb", &[(2, "vary x: \"a\", \"b\"")]);
    check("governing a,\nb over\nc", &[(3, "governing a, b over c")]);
    check(
        "freebody \"B\": a @\nb,\ncouple c",
        &[(3, "freebody \"B\": a @ b, couple c")],
    );
    check(
        "unknown a between 0 and 1 such that\n  a = b and\n  c = d",
        &[(3, "unknown a in 0..1: a = b and c = d")],
    );
}

#[test]
fn some_lines_are_never_taken_in() {
    check("a = b +\nc = 3", &[(1, "a = ERROR"), (1, "c = 3")]);
    check(
        "a = b +\n\nc = 1",
        &[(1, "a = ERROR"), (1, "blank"), (1, "c = 1")],
    );
    check(
        "a = b +\n; r\nc = 1",
        &[(1, "a = ERROR"), (1, "prose"), (1, "c = 1")],
    );
    check("a = b +\nnote x", &[(1, "a = ERROR"), (1, "note \"x\"")]);
    check(
        "a = b +\nf(x) [ft] = x",
        &[(1, "a = ERROR"), (1, "f(x)<ft> := x")],
    );
    check(
        "a = b +\nc by x = 1",
        &[(1, "a = ERROR"), (1, "c = by x: 1")],
    );
    check(
        "require a and\nb == c",
        &[(1, "require ERROR"), (1, "b = ERROR")],
    );
    check(
        "unknown a between 0 and 1 such that\na = b",
        &[(1, "unknown a in 0..1: ERROR = ERROR"), (1, "a = b")],
    );
}

#[test]
fn some_ends_are_ends() {
    check(
        "e by x = 1 | -\n2",
        &[(1, "e = by x: 1 | none"), (1, "unreadable ")],
    );
    check(
        "e by x = p: -\n2",
        &[(1, "e = by x: \"p\": none"), (1, "unreadable ")],
    );
    check("a =\n2", &[(1, "a = ERROR"), (1, "unreadable ")]);
    check(
        "vary x: a +\nb",
        &[(1, "vary x: \"a +\""), (1, "unreadable ")],
    );
    check("note a +\nb = 1", &[(1, "note \"a +\""), (1, "b = 1")]);
    check(
        "table k | x\na | 1 +\nb | 2\nend",
        &[(4, "table k | x\n1: \"a\" | ERROR\n2: \"b\" | 2\nend")],
    );
}

#[test]
fn a_table_without_end_ends_before_what_cannot_be_a_row() {
    let table = "table k | x\n1: \"a\" | 1\nno end";
    check(
        "table k | x\na | 1\n\n; r\nb = 2",
        &[(2, table), (1, "blank"), (1, "prose"), (1, "b = 2")],
    );
    check(
        "table k | x\na | 1\nrequire x",
        &[(2, table), (1, "require x")],
    );
    check(
        "table k | x\na | 1\ntitle x",
        &[(2, table), (1, "Title \"x\"")],
    );
    check("table k | x\na | 1\n", &[(2, table)]);
    check("table k | x", &[(1, "table k | x\nno end")]);
}

#[test]
fn remarks_of_all_lines_are_one() {
    let tree = parse("a = b + ; one\nc ;; two\n");
    let remark = tree.statements[0]
        .remark
        .as_ref()
        .map(|remark| remark.text.as_str());
    assert_eq!(remark, Some("one ; two"));
    assert_eq!(parse("a = \"x;y\" ;").statements[0].remark, None);
}
