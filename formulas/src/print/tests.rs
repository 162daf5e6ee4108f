//! Reading what was printed gives the same tree, places apart.

use super::print;
use crate::parse::parse;
use crate::syntax::Tree;

/// What a tree says, spans and lines left out.
pub(crate) fn said(tree: &Tree) -> Vec<String> {
    let strip = |text: String| {
        let mut out = String::with_capacity(text.len());
        let mut rest = text.as_str();
        while let Some(at) = rest.find("Span { start: ") {
            out.push_str(&rest[..at]);
            rest = rest[at..].split_once('}').map_or("", |(_, rest)| rest);
        }
        out.push_str(rest);
        let mut parts = out.split("Row { line: ");
        let first = parts.next().unwrap_or("").to_owned();
        parts.fold(first, |out, part| {
            out + "Row" + part.trim_start_matches(|c: char| c.is_ascii_digit())
        })
    };
    tree.statements
        .iter()
        .map(|statement| strip(format!("{:?} {:?}", statement.kind, statement.remark)))
        .collect()
}

fn check(text: &str) {
    let tree = parse(text);
    for statement in &tree.statements {
        assert!(
            statement.problems.is_empty(),
            "{text:?}: {:?}",
            statement.problems
        );
    }
    let printed = print(&tree, text);
    let again = parse(&printed);
    assert_eq!(said(&tree), said(&again), "{printed}");
    assert_eq!(print(&again, &printed), printed);
}

#[test]
fn printed_text_says_the_same() {
    for text in [
        "title A ; b\n\nrevision\naside x\npart  P\nsub S\nnote n\n; prose\n;\n",
        "a [ft]=1+2*(3-4)/5^-x^2 ; r",
        "a = -2^2 - (-2)^2 - -x + (a^b)^c",
        "a = (2 m)^2 + 2 m^2 + (2 m)/(3 s) + 5 lb / x - 5 lb/3 ft",
        "a = - 5 degC\na = -5 degC\na = -(12 ft 6 in)\na = -12 ft 6 in\na = (-12 ft 6 in)^2",
        "a = 1e-30 + 1e300 + 0.1 + 12345678",
        "a = if x < 1 and not (y = 2 or z) then (if q then 1 else 2) else if p then 3 else 4",
        "a = 2*(if x then 1 else 2) +/- 5 %",
        "a = (a < b) = c\na = not (not a)\na = (a or b) and c",
        "a = f(x, y: if c then 1 else 2 over s, t)",
        "a = (x + y) at (p: \"D\"\"\", h: 5 ft) held\na = air.b.c*2 at (x: 1)\na = (5 ft) at (x: 1)",
        "a = [kt]/[m/s EAS]*[1/deg]",
        "a by x = 1 | - | none | excluded | 2 ft +/- 1 in",
        "a [lb] by x = p: 1 | \"q:|\": - | \"\": 2 | (max): 3",
        "vary x: a | \"b|c\" | 1/4\" | 5. | part | a = b | -",
        "vary x [ft]: 0 to 2*5 step 1\nvary x [1]: 0 to 1 count 5\nvary x [ft]: 0 | 5 ft | -3",
        "f(a, b [ft]) [lb] = a*b\ng() = 2",
        "table k, m [deg] | x [ft] |\n y ; head\nup, -4 | 2 | - ; r\naside q\n\n\"a,b\", 5 | 1 +/- 2 | none\n; p\nend ; over\n",
        "table k\na\nb\nend",
        "table piece | x\nnote | 1\n\"part load\" | 2\n\"a = b\" | 3\nend",
        "unknown a [deg] between -5 and 5, b between 0 and x*2 such that\n    M(a) = 0 and (a < b) = 2\n",
        "governing P_t, air.density over point\ngoverning P",
        "require a <= b and c > d ; why",
        "freebody \"B\": L @ x, axial -T @ z, couple -M, couple @ 3, (axial - 2) @ 1, axial*2 @ 3",
        "figure \"F\": a, 2*b against c each d, e closed\nfigure \"F\": n against V",
        "use \"s-1\" as g",
        "units [1] = 5\ndate by x = 1 | 2",
        "a = x² + y⁻¹^2 × 2 − 3 ÷ 4",
        "\u{feff}a = 1\r\n\r\nb = 2\rc = 3",
    ] {
        check(text);
    }
}

#[test]
fn statements_with_problems_stay_as_typed() {
    let text = "a  =  = 2\nb  = 3\n";
    assert_eq!(print(&parse(text), text), "a  =  = 2\nb = 3\n");
}
