//! Each statement of the language in its forms.

use super::shown;
use crate::parse::parse;

/// Reads a text without problems as the statements shown.
fn check(text: &str, expected: &[&str]) {
    let tree = parse(text);
    for statement in &tree.statements {
        assert_eq!(statement.problems, [], "{text}");
    }
    let found: Vec<String> = tree.statements.iter().map(shown::statement).collect();
    assert_eq!(found, expected, "{text}");
}

#[test]
fn plain_text() {
    check(
        "title Osier ; x\nrevision C\nprepared by the office\ndigits 4\nunits lb ft kt\nsources required\n\naside q\npart  A b \nsub c\nnote d ; e\n",
        &[
            "Title \"Osier ; x\"",
            "Revision \"C\"",
            "Prepared \"by the office\"",
            "Digits \"4\"",
            "Units \"lb ft kt\"",
            "Sources \"required\"",
            "blank",
            "aside \"q\"",
            "part \"A b\"",
            "sub \"c\"",
            "note \"d ; e\"",
        ],
    );
    check("; x", &["prose"]);
}

#[test]
fn definitions() {
    for (text, expected) in [
        ("S [ft^2] = 142 ; drawing", "S<ft^2> = 142"),
        ("x [ft] = 6.10 +/- 0.05", "x<ft> = 6.1 +/- 0.05"),
        ("x = 6.1 ft ± 1 %", "x = 6.1<ft> +/- 1<%>"),
        ("x = a = b", "x = (a = b)"),
        ("x = -", "x = none"),
        ("units [1] = 5", "units<> = 5"),
        ("date = 3", "date = 3"),
        ("checked by x = 1 | 2", "checked = by x: 1 | 2"),
        ("count = step + to", "count = (step + to)"),
        (
            "W [lb] by l = light: 430 | gross: 560",
            "W<lb> = by l: \"light\": 430 | \"gross\": 560",
        ),
        (
            "W by l = 1 | - | | – | none | excluded",
            "W = by l: 1 | none | none | none | none | excluded",
        ),
        ("W by l = 1 | -", "W = by l: 1 | none"),
        (
            "W by l = p: - | q: | \"r:|\": 2 ft +/- 1 in",
            "W = by l: \"p\": none | \"q\": none | \"r:|\": 2<ft> +/- 1<in>",
        ),
        (
            "W by l = a, b: 1 | 2.: 2 | x [y:z]: 3",
            "W = by l: \"a, b\": 1 | \"2.\": 2 | \"x [y:z]\": 3",
        ),
        ("W by l = f(x: 1) | 2", "W = by l: f(x: 1) | 2"),
        (
            "W by l = if a then 1 else 2 | 3",
            "W = by l: (if a then 1 else 2) | 3",
        ),
        ("f(a, b [ft]) [lb] = a*b", "f(a, b<ft>)<lb> := (a * b)"),
        ("f() = 2", "f() := 2"),
        ("f(a) = if a then 1 else 2", "f(a) := (if a then 1 else 2)"),
    ] {
        check(text, &[expected]);
    }
}

#[test]
fn axes() {
    for (text, expected) in [
        ("vary x: light | gross", "vary x: \"light\", \"gross\""),
        (
            "vary x: \"a|b\" | c, d | 5. | 12,5 | a = b",
            "vary x: \"a|b\", \"c, d\", \"5.\", \"12,5\", \"a = b\"",
        ),
        (
            "vary x: 1/4\" | 3/8\" ; bolts",
            "vary x: \"1/4\\\"\", \"3/8\\\"\"",
        ),
        ("vary x: 12000", "vary x: \"12000\""),
        ("vary x: 0 to 5 step 1", "vary x: \"0 to 5 step 1\""),
        (
            "vary a [deg]: -4 to 12 step 2",
            "vary a<deg>: (-4) to 12 step 2",
        ),
        (
            "vary h [ft]: 0 to 2*5 count 3",
            "vary h<ft>: 0 to (2 * 5) count 3",
        ),
        ("vary h [ft]: 0 | 5 m | -3", "vary h<ft>: 0 | 5<m> | (-3)"),
        ("vary n [1]: 3", "vary n<>: 3"),
    ] {
        check(text, &[expected]);
    }
}

#[test]
fn tables() {
    check(
        "table point | V [KEAS] |\n  n ; head\nA | 55 | -0.05 ; row\naside q\n\n; p\n\"B|c\" | - | 2 +/- 1 %\nD | | none\nnote | 1 | 2\nend | 3 | 4\n5. | 1 | 2\nend ; over",
        &[
            "table point | V<KEAS>, n\n2: \"A\" | 55 | (-0.05) ; row\n6: \"B|c\" | none | 2 +/- 1<%>\n7: \"D\" | none | none\n8: \"note\" | 1 | 2\n9: \"end\" | 3 | 4\n10: \"5.\" | 1 | 2\nend",
        ],
    );
    check(
        "table flap, alpha [deg] | CL [1]\nup, -4 | 0.2\n\"a,b\" ,5 | x + 1\nend",
        &[
            "table flap, alpha<deg> | CL<>\n1: \"up\", \"-4\" ((-4)) | 0.2\n2: \"a,b\", \"5\" (5) | (x + 1)\nend",
        ],
    );
    check("table k\na\nend", &["table k | \n1: \"a\" | \nend"]);
}

#[test]
fn statements_that_open_with_a_word() {
    for (text, expected) in [
        (
            "unknown a [deg] between -5 and 5 such that M(a) = 0",
            "unknown a<deg> in (-5)..5: M(a) = 0",
        ),
        (
            "unknown a between 0 and 1, b [ft] between 0 ft and 2*c such that f(a, b) = 1 and g = 2*b",
            "unknown a in 0..1, b<ft> in 0<ft>..(2 * c): f(a, b) = 1 and g = (2 * b)",
        ),
        (
            "governing P_t, air.density over point, cg",
            "governing P_t, air.density over point, cg",
        ),
        ("governing P_t", "governing P_t"),
        (
            "require CL <= CL_max and x > 2 ; flaps",
            "require ((CL <= CL_max) and (x > 2))",
        ),
        (
            "freebody \"B\": L @ x, axial -T @ z, couple M, couple @ 3, axial @ 2, axial*2 @ 1, -n*W @ f(1, 2)",
            "freebody \"B\": L @ x, axial (-T) @ z, couple M, couple @ 3, axial @ 2, (axial * 2) @ 1, ((-n) * W) @ f(1, 2)",
        ),
        (
            "figure \"F\": P, 2*y against point each cg, loading closed",
            "figure \"F\": P, (2 * y) against point each [cg, loading] closed",
        ),
        (
            "figure \"F\": against against closed closed",
            "figure \"F\": against against closed each [] closed",
        ),
        ("use \"osier-geometry\" as g", "use \"osier-geometry\" as g"),
    ] {
        check(text, &[expected]);
    }
}
