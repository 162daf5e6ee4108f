//! Expressions, numbers and units that can be read.

use super::shown;
use crate::parse::{expression, unit};

/// Reads an expression without problems as the tree shown.
fn check(text: &str, expected: &str) {
    let (tree, problems) = expression(text);
    assert_eq!(shown::expr(&tree), expected, "{text}");
    assert_eq!(problems, [], "{text}");
}

#[test]
fn signs_bind_as_the_language_says() {
    for (text, expected) in [
        ("a + b*c - d/e", "((a + (b * c)) - (d / e))"),
        ("a - b - c", "((a - b) - c)"),
        ("a/b/c*d", "(((a / b) / c) * d)"),
        ("-2^2", "(-(2 ^ 2))"),
        ("2^-1*3", "((2 ^ (-1)) * 3)"),
        ("a^b^c", "(a ^ (b ^ c))"),
        ("a^-b^c", "(a ^ (-(b ^ c)))"),
        ("-a*-b", "((-a) * (-b))"),
        ("--a", "(-(-a))"),
        ("a - -b", "(a - (-b))"),
        ("+3.8", "3.8"),
        ("(a + b)*c", "((a + b) * c)"),
        ("not a = b and c or d", "(((not (a = b)) and c) or d)"),
        ("not not a", "(not (not a))"),
        ("a < b + 1", "(a < (b + 1))"),
        (
            "a <= b and c >= d or e != f",
            "(((a <= b) and (c >= d)) or (e != f))",
        ),
        ("(a < b) = c", "((a < b) = c)"),
        ("if a > 3 then 4 else 5", "(if (a > 3) then 4 else 5)"),
        (
            "if a then 1 else if b then 2 else 3",
            "(if a then 1 else (if b then 2 else 3))",
        ),
        (
            "if a then if b then 1 else 2 else 3",
            "(if a then (if b then 1 else 2) else 3)",
        ),
        ("2*(if a then 1 else 2)", "(2 * (if a then 1 else 2))"),
        ("a × b · c ÷ d − e", "((((a * b) * c) / d) - e)"),
        ("a ≤ b", "(a <= b)"),
        ("a ≥ b", "(a >= b)"),
        ("a ≠ b", "(a != b)"),
        ("x² + y⁻¹", "((x ^ 2) + (y ^ (-1)))"),
        ("x²^3", "(x ^ (2 ^ 3))"),
        ("-x²", "(-(x ^ 2))"),
    ] {
        check(text, expected);
    }
}

#[test]
fn what_stands_behind_an_operand_binds_tightest() {
    for (text, expected) in [
        ("air.density*2", "(air.density * 2)"),
        ("g.air.density", "g.air.density"),
        ("-P at (p: \"D\")", "(-P@(p: \"D\"))"),
        ("a^P at (p: 1)", "(a ^ P@(p: 1))"),
        ("P at (p: \"D\", cg: \"aft\")", "P@(p: \"D\", cg: \"aft\")"),
        ("Cm at (alpha: a_w) held", "Cm@(alpha: a_w Held)"),
        ("Cm at (alpha: a_w, smooth)", "Cm@(alpha: a_w Smooth)"),
        ("Cm at (alpha: a_w nearest)", "Cm@(alpha: a_w Nearest)"),
        ("Cm at (alpha: held)", "Cm@(alpha: held)"),
        (
            "x at (p: if a then 1 else 2)",
            "x@(p: (if a then 1 else 2))",
        ),
        ("(a + b) at (p: 1)", "(a + b)@(p: 1)"),
        ("f()", "f()"),
        ("f(a, -b, c: 2*d)", "f(a, (-b), c: (2 * d))"),
        ("max(P over cg, loading)", "max(P over cg, loading)"),
        ("f(x, y: 2 over s)", "f(x, y: 2 over s)"),
        ("f (x)", "f(x)"),
        (
            "standard_atmosphere(h).density",
            "standard_atmosphere(h).density",
        ),
        ("min(3, count)", "min(3, count)"),
        ("\"a\"\"b\"", "\"a\\\"b\""),
        ("none", "none"),
        ("excluded", "excluded"),
        ("δ_é*Q'", "(δ_é * Q')"),
        ("e\u{301}", "é"),
    ] {
        check(text, expected);
    }
}

#[test]
fn a_unit_belongs_to_the_number_before_it() {
    for (text, expected) in [
        ("4.6 ft", "4.6<ft>"),
        ("4.6ft", "4.6<ft>"),
        (".5 + 2e-3 + 2E3", "((0.5 + 0.002) + 2000)"),
        ("1.225 kg/m^3", "1.225<kg m^-3>"),
        ("0.105 /deg", "0.105<deg^-1>"),
        ("0.105 / deg", "(0.105 / deg)"),
        ("0.105/deg", "(0.105 / deg)"),
        ("2 m", "2<m>"),
        ("2*m", "(2 * m)"),
        ("2·m", "(2 * m)"),
        ("2 N·m", "2<N m>"),
        ("2 N*m", "(2<N> * m)"),
        ("3 ft-lb", "3<ft lb>"),
        ("3 ft-2", "(3<ft> - 2)"),
        ("3 ft - lb", "(3<ft> - lb)"),
        ("V/1 kt", "(V / 1<kt>)"),
        ("12 lb/3 ft", "(12<lb> / 3<ft>)"),
        ("2 m^2", "2<m^2>"),
        ("2 m² + 3 s⁻¹", "(2<m^2> + 3<s^-1>)"),
        ("2 m^0.5", "(2<m> ^ 0.5)"),
        ("2 m ^2", "(2<m> ^ 2)"),
        ("2 m^(2)", "(2<m> ^ 2)"),
        ("560 lb/S", "560<lb S^-1>"),
        ("10 % + 0", "(10<%> + 0)"),
        ("3%", "3<%>"),
        ("5°", "5<°>"),
        ("if a then 3 else 4", "(if a then 3 else 4)"),
        ("3 or a", "(3 or a)"),
        ("[kt]", "one<kt>"),
        ("V/[m/s EAS]", "(V / one<m s^-1 as EAS>)"),
        ("12 ft 6 in", "12<ft>+6<in>"),
        ("1 h 30 min 5 s", "1<h>+30<min>+5<s>"),
        ("-12 ft 6 in", "-12<ft>+-6<in>"),
        ("- 12 ft 6 in", "(-12<ft>+6<in>)"),
        ("a - 12 ft 6 in", "(a - 12<ft>+6<in>)"),
        ("-5 degC", "-5<degC>"),
        ("- 5 degC", "(-5<degC>)"),
        ("-5 K", "(-5<K>)"),
        ("a -5 degC", "(a - 5<degC>)"),
        ("f(1,2)", "f(1, 2)"),
        ("f(1,2,x: 3)", "f(1, 2, x: 3)"),
    ] {
        check(text, expected);
    }
}

#[test]
fn brackets_hold_more_than_a_unit_behind_a_number() {
    for (text, expected) in [
        ("lb/ft^2", "<lb ft^-2>"),
        (" lb / ft^2 ", "<lb ft^-2>"),
        ("1/deg", "<deg^-1>"),
        ("/deg", "<deg^-1>"),
        ("1", "<>"),
        ("-", "<>"),
        ("N*m", "<N m>"),
        ("N m", "<N m>"),
        ("N × m", "<N m>"),
        ("kg/(m.s)", "<kg m^-1 s^-1>"),
        ("kg/(m s^2)", "<kg m^-1 s^-2>"),
        ("(m/s)^2", "<m^2 s^-2>"),
        ("(m/s)/(ft/s)", "<m s^-1 ft^-1 s>"),
        ("m/s EAS", "<m s^-1 as EAS>"),
        ("km/h CAS", "<km h^-1 as CAS>"),
        ("m^-2·s⁻¹", "<m^-2 s^-1>"),
        ("%", "<%>"),
        ("°", "<°>"),
    ] {
        let (read, problems) = unit(text);
        assert_eq!(shown::unit(&read), expected, "{text}");
        assert_eq!(problems, [], "{text}");
    }
}

#[test]
fn spans_leave_outer_brackets_off() {
    let text = "(a + b)*(c)";
    let (tree, _) = expression(text);
    let crate::syntax::ExprKind::Binary {
        left,
        right,
        op_span,
        ..
    } = &tree.kind
    else {
        panic!("no product");
    };
    let spans = [tree.span, left.span, right.span, *op_span].map(|span| span.of(text));
    assert_eq!(spans, ["(a + b)*(c)", "a + b", "c", "*"]);
}
