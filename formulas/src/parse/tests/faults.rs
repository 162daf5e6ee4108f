//! What cannot be read: where, and why.

use crate::parse::parse;
use crate::problem::{Fault, Mend};

/// A problem as text: what it is about, its kind, and what it knows.
fn shown(text: &str, fault: &Fault) -> String {
    let mended = |mend: &Option<Mend>| match mend {
        None => "no mend".to_owned(),
        Some(mend) => {
            let (start, end) = (mend.span.start as usize, mend.span.end as usize);
            format!("{}{}{}", &text[..start], mend.text, &text[end..])
        }
    };
    match fault {
        Fault::ImpliedProduct { mend } => format!("ImpliedProduct {}", mended(mend)),
        Fault::ChainedComparison { mend } => format!("ChainedComparison {}", mended(mend)),
        Fault::ForeignSign { mend, .. } => format!("ForeignSign {mend}"),
        Fault::NumberForm { mend, .. } => format!("NumberForm {mend}"),
        Fault::DecimalComma { mend, .. } => format!("DecimalComma {mend}"),
        Fault::SecondSlash { mend, .. } => {
            format!("SecondSlash {}", mend.as_deref().unwrap_or("no mend"))
        }
        Fault::BelowTheLine { meaning, .. } => format!("BelowTheLine {meaning}"),
        Fault::Expected { what, .. } => format!("Expected {what}"),
        Fault::NoStatement { looks_like, .. } => {
            format!("NoStatement {}", looks_like.as_deref().unwrap_or("at all"))
        }
        other => {
            let debug = format!("{other:?}");
            debug.split([' ', '{']).next().unwrap_or("").to_owned()
        }
    }
}

/// Reads a text with the problems given, each as the stretch it is about and what is wrong with it.
fn check(text: &str, expected: &[(&str, &str)]) {
    let tree = parse(text);
    let found: Vec<(String, String)> = tree
        .statements
        .iter()
        .flat_map(|one| {
            let typed = &text[one.start..one.start + one.length];
            one.problems.iter().map(move |problem| {
                (
                    problem.span.of(typed).to_owned(),
                    shown(typed.trim_end(), &problem.fault),
                )
            })
        })
        .collect();
    let expected: Vec<(String, String)> = expected
        .iter()
        .map(|(at, what)| ((*at).to_owned(), (*what).to_owned()))
        .collect();
    assert_eq!(found, expected, "{text}");
}

#[test]
fn numbers_and_units_of_other_forms() {
    for (text, at, fault) in [
        ("a = 5.", "5.", "NumberForm 5"),
        ("a = 5. ft", "5.", "NumberForm 5"),
        ("a = 1 000", "1 000", "NumberForm 1000"),
        ("a = 1 000 000.5 ft", "1 000 000.5", "NumberForm 1000000.5"),
        ("a = 1_000", "1_000", "NumberForm 1000"),
        ("a = 1'000", "1'000", "NumberForm 1000"),
        ("a = 12,5", "12,5", "DecimalComma 12.5"),
        ("a = 12,5 ft + b", "12,5", "DecimalComma 12.5"),
        ("a = f((1,5))", "1,5", "DecimalComma 1.5"),
        ("a = x at (p: 1,5)", "1,5", "DecimalComma 1.5"),
        ("a = 1,000,000", "1,000,000", "NumberForm 1000000"),
        ("vary a [ft]: 1,5 | 2", "1,5", "DecimalComma 1.5"),
        ("freebody \"B\": F @ 1,5, G @ 2", "1,5", "DecimalComma 1.5"),
        ("a = 1.2.3", "1.2.3", "Expected a number"),
        (
            "a = 1e999",
            "1e999",
            "Expected a number of the size that a computer holds",
        ),
        ("a = 65 [kt]", "[kt]", "BracketAfterNumber"),
        ("a = 1 kg/m/s", "kg/m/s", "SecondSlash kg.m^-1.s^-1"),
        ("a = 1 /m/s", "/m/s", "SecondSlash m^-1.s^-1"),
        ("a = 1 kg/m.s", "kg/m.s", "BelowTheLine kg/(m.s)"),
        ("a = 1 /deg.s", "/deg.s", "BelowTheLine 1/(deg.s)"),
        ("a [kg/m s] = 1", "kg/m s", "BelowTheLine kg/(m s)"),
        ("a [kg/m/s] = 1", "kg/m/s", "SecondSlash kg.m^-1.s^-1"),
        ("a [] = 1", "", "Expected a unit"),
        ("a [kg.] = 1", "", "Expected a unit name"),
        ("a [to] = 1", "t", "Expected a unit name"),
        ("a [ft = 1", "[ft", "UnclosedBracket"),
        ("a = b/[ft + 1", "[ft", "UnclosedBracket"),
        ("a = 2 m s", "s", "ImpliedProduct a = 2 m.s"),
        ("a = 12 in 6 ft", "6", "ImpliedProduct no mend"),
        ("a = 12 ft 6", "6", "ImpliedProduct no mend"),
        ("a = 2 min(b, c)", "(", "ImpliedProduct a = 2*min(b, c)"),
    ] {
        check(text, &[(at, fault)]);
    }
}

#[test]
fn signs_of_other_notations() {
    for (text, at, mend) in [
        ("a == 1", "==", "="),
        ("a := 1", ":=", "="),
        ("a = b == c", "==", "="),
        ("a = b ** c", "**", "^"),
        ("a = b && c", "&&", "and"),
        ("a = b || c", "||", "or"),
        ("a = !b", "!", "not "),
        ("a = b <> c", "<>", "!="),
        ("a = b => c", "=>", ">="),
        ("a = b =< c", "=<", "<="),
        ("a = b – c", "–", "-"),
        ("a = b // c", "//", ";"),
        ("# c", "#", ";"),
        ("// c", "//", ";"),
        ("a = “q”", "“q”", "\"q\""),
        ("a = b . c", ".", "*"),
        ("unknown a between 0 and 1 such that a == 2", "==", "="),
    ] {
        check(text, &[(at, &format!("ForeignSign {mend}"))]);
    }
}

#[test]
fn expressions() {
    for (text, at, fault) in [
        ("a = 2 (x)", "(", "ImpliedProduct a = 2*(x)"),
        ("a = S c", "c", "ImpliedProduct a = S*c"),
        ("a = (b + 2) ft", "ft", "ImpliedProduct a = (b + 2)*[ft]"),
        ("a = (b + 2) W", "W", "ImpliedProduct a = (b + 2)*W"),
        ("a = (b)(c)", "(", "ImpliedProduct a = (b)*(c)"),
        ("a = x 5", "5", "ImpliedProduct a = x*5"),
        (
            "a = b < c < d",
            "b < c < d",
            "ChainedComparison a = b < c and c < d",
        ),
        (
            "a = b < c + 1 <= d and e",
            "b < c + 1 <= d",
            "ChainedComparison a = b < c + 1 and c + 1 <= d and e",
        ),
        ("a = 2*if b then 1 else 2", "if", "IfPlace"),
        ("require if b then c else d", "if", "IfPlace"),
        ("a = if b then 1", "if", "IfWithoutElse"),
        ("a =", "=", "Dangling"),
        ("a = b +", "+", "Dangling"),
        ("a = b and", "and", "Dangling"),
        ("a = (b", "(", "UnclosedBracket"),
        ("a = f(", "(", "UnclosedBracket"),
        ("a = b)", ")", "UnopenedBracket"),
        ("a = b]", "]", "UnopenedBracket"),
        ("a = f(b,)", ")", "Expected a value"),
        ("a = ()", ")", "Expected a value"),
        ("a = \"b", "\"b", "UnclosedText"),
        ("a = thin_section(2412\")", "\"", "UnclosedText"),
        ("a = $", "$", "UnknownCharacter"),
        ("a = b ? c", "?", "UnknownCharacter"),
        ("a = over + 1", "over", "WordAsName"),
        ("a = (6 +/- 1)", "+/-", "TolerancePlace"),
        ("a = 6 +/- 1 +/- 2", "+/-", "TolerancePlace"),
        ("f(x) = x +/- 1", "+/-", "TolerancePlace"),
        ("a = b at x", "x", "Expected `(`"),
        ("a = b at (x)", ")", "Expected `:` behind the axis"),
        (
            "a = b not c",
            "not",
            "Expected an operator or the end of the line",
        ),
        ("a = b + not c", "not", "Expected a value"),
    ] {
        check(text, &[(at, fault)]);
    }
}

#[test]
fn statements() {
    for (text, at, fault) in [
        ("if = 3", "if", "WordAsName"),
        ("at [ft] = 3", "at", "WordAsName"),
        ("table = 3", "table", "WordAsName"),
        ("vary = 3", "vary", "WordAsName"),
        ("S ft^2 = 142", "ft", "Expected `=`, `[unit]` or `by`"),
        ("S [ft] x = 142", "x", "Expected `=` or `by`"),
        ("f(a = 2", "=", "Expected `,` or `)`"),
        ("Part x", "Part", "NoStatement part"),
        ("governning P", "governning", "NoStatement governing"),
        ("P_t", "P_t", "NoStatement at all"),
        ("A | 55", "A", "NoStatement at all"),
        (
            "a = 1 | 2",
            "|",
            "Expected `by` and an axis before the `=` of a list",
        ),
        ("a by x, y = 1 | 2", "x, y", "TwoAxes"),
        ("a by x = p: 1 | q: 2 | 3", "3", "MixedList"),
        ("a by x = 1 | 2 |", "|", "Dangling"),
        ("vary x", "", "Expected `:` behind the name of the axis"),
        ("vary x: a |", "|", "Dangling"),
        ("vary x: a | | b", "|", "Expected a label"),
        ("vary x [ft]: 1 to 2", "", "Expected `step` or `count`"),
        ("vary over: a", "over", "WordAsName"),
        (
            "unknown a 0 and 1, b between 1 and 2 such that f = 1",
            "0",
            "Expected `between`",
        ),
        ("unknown a between 0 and 1", "", "Expected `such that`"),
        (
            "governing P/2",
            "/",
            "Expected an operator or the end of the line",
        ),
        ("governing f(P)", "f(P)", "Expected a symbol"),
        ("freebody B: L @ x", "B", "Expected a name in quotes"),
        (
            "freebody \"B\": L, couple M",
            "",
            "Expected `@` and a station",
        ),
        ("use g as h", "g", "Expected the name of a sheet in quotes"),
        ("end", "end", "EndWithoutTable"),
        ("table k | x y\na | 1\nend", "y", "Expected `[unit]` or `|`"),
        ("table k | x\na | 1 | 2\nend", "a | 1 | 2", "RowLength"),
        ("table k | x\na\nend", "a", "RowLength"),
        ("table k, l | x\na | 1\nend", "a", "RowLength"),
        ("table k | x\n | 1\nend", "|", "Expected a label"),
        ("table k | x\na | 1", "table", "TableWithoutEnd"),
        ("table k | x\nend x", "x", "Expected nothing behind `end`"),
        ("note x\ntitle y", "title", "TitleLate"),
        ("title x\ntitle y", "title", "TitleTwice"),
        ("digits 20", "20", "TitleValue"),
        ("digits", "digits", "TitleValue"),
        ("sources maybe", "maybe", "TitleValue"),
    ] {
        check(text, &[(at, fault)]);
    }
}

#[test]
fn names_stay_known_where_their_values_cannot_be_read() {
    for (text, expected) in [
        ("S [ft] = = 2", "S<ft> = ERROR"),
        ("S [ft] x = 142", "unreadable S"),
        ("S ft = 142", "unreadable S"),
        ("f(a = 2", "unreadable f"),
        ("vary x", "unreadable x"),
        ("use g as h", "unreadable h"),
        (
            "unknown a 0 and 1, b [ft] between 1 and 2 such that f = 1",
            "unknown a in ERROR..ERROR, b<ft> in 1..2: ERROR = ERROR and ERROR = ERROR",
        ),
        (
            "table k | x y\na | 1\nend",
            "table k | x\n1: \"a\" | ERROR\nend",
        ),
        ("S [kg/m/s] = 1", "S<kg m^-1 s^-1> = ERROR"),
        ("W by l = 1 | $ | 3", "W = by l: 1 | ERROR | 3"),
    ] {
        let tree = parse(text);
        assert_eq!(
            super::shown::statement(&tree.statements[0]),
            expected,
            "{text}"
        );
    }
}

#[test]
fn every_broken_part_of_a_line_is_reported() {
    check(
        "a = 5. + 1,5 + b ** 2 + 2 (c)",
        &[
            ("5.", "NumberForm 5"),
            ("1,5", "DecimalComma 1.5"),
            ("**", "ForeignSign ^"),
            ("(", "ImpliedProduct a = 5. + 1,5 + b ** 2 + 2*(c)"),
        ],
    );
    check(
        "a by x = 5. | $ | (",
        &[
            ("5.", "NumberForm 5"),
            ("$", "UnknownCharacter"),
            ("(", "UnclosedBracket"),
        ],
    );
}

#[test]
fn limits_are_reported_once() {
    let nested = |depth: usize| format!("a = {}1{}", "(".repeat(depth), ")".repeat(depth));
    check(&nested(200), &[]);
    check(&nested(201), &[("1", "NestingLimit")]);
    for deep in [
        format!("a = {}1", "-".repeat(100_000)),
        format!("a = {}1", "not ".repeat(50_000)),
        format!("a = 1{}", "^2".repeat(100_000)),
        format!("a = {}", "f(".repeat(100_000)),
        format!("a = {}", "if b then ".repeat(50_000)),
        format!("a = b{}", ".c".repeat(50_000)),
        format!("a = b{}", " at (x: 1)".repeat(50_000)),
        format!("a = 1{}", "+1".repeat(100_000)),
        format!("a = 1{}", " 1 ft".repeat(50_000)),
        format!("a = b{}", " < c".repeat(50_000)),
    ] {
        let problems = &parse(&deep).statements[0].problems;
        let limits = problems.iter().filter(|problem| {
            matches!(
                problem.fault,
                Fault::NestingLimit { .. } | Fault::OperatorLimit { .. }
            )
        });
        assert_eq!(limits.count(), 1, "{}", &deep[..20]);
    }
    assert_eq!(
        parse(&format!("a = 1{}", "+1".repeat(2000))).statements[0].problems,
        []
    );
}
