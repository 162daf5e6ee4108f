//! What is offered and told at places of a sheet, whole and broken.

use super::complete::Completions;
use super::hover::Hover;
use crate::sheet::Sheet;

const SHEET: &str = "title Osier\n\
vary flap: up | down\n\
vary alpha [deg]: -4 to 12 step 4\n\
S [ft^2] = 142 +/- 1 ; drawing\n\
q [lb/ft^2] by flap = up: 12 | down: 8\n\
CL = 0.1 /deg*alpha + (if flap = \"down\" then 0.5 else 0)\n\
arm(x [ft]) = x - 6.1 ft\n\
air = standard_atmosphere(1000 ft)\n\
L = q*S*CL\n";

/// The sheet with a line behind it that ends, or is cut in two, at `¦`.
fn at(line: &str) -> (Sheet, u32, u32) {
    let (before, behind) = line.split_once('¦').expect("a place");
    let text = format!("{SHEET}{before}{behind}");
    let column = before.chars().count() as u32 + 1;
    (Sheet::open(&text), 10, column)
}

fn offered(line: &str) -> Completions {
    let (sheet, line, column) = at(line);
    sheet.complete(line, column)
}

fn labels(line: &str) -> Vec<String> {
    let items = offered(line).items.into_iter();
    items.map(|item| item.label).collect()
}

fn told(line: &str) -> Option<Hover> {
    let (sheet, line, column) = at(line);
    sheet.hover(line, column)
}

#[test]
fn each_place_is_offered_what_can_stand_there() {
    for (line, first) in [
        ("x = al¦", "alpha"),
        ("x = pitching_mo¦", "pitching_moment"),
        ("x = air.den¦", "density"),
        ("x = air.¦", "temperature"),
        ("x = CL at (¦", "flap"),
        ("x = CL at (alp¦", "alpha"),
        ("x = CL at (flap: ¦", "up"),
        ("x = CL at (flap: \"d¦", "down"),
        ("x = CL at (flap: \"d¦\", alpha: 3 deg)", "down"),
        ("x = CL at (alpha: 3 deg, he¦", "held"),
        ("x = max(CL over ¦", "flap"),
        ("x = max(CL over flap, al¦)", "alpha"),
        ("x = if flap = \"¦", "up"),
        ("x by ¦", "flap"),
        ("x [ft] by fl¦ = 1", "flap"),
        ("x by flap = ¦", "up"),
        ("x by flap = up: 1 | do¦", "down"),
        ("L [¦", "N"),
        ("S [f¦", "ft^2"),
        ("x = S + 3 ¦", "m^2"),
        ("x = arm(3 f¦", "ft"),
        ("x = pitching_moment(-0.05, q, 142 ¦", "m^2"),
        ("x = pitching_moment(-0.05, q: ¦", "Cm"),
        ("x = 3 lb/f¦", "ft"),
        ("gov¦", "governing"),
        ("figure \"F\": CL against alpha each ¦", "flap"),
        ("figure \"F\": CL aga¦", "against"),
        ("unknown x be¦", "between"),
        ("require CL <= C¦", "CL"),
        ("x = ar¦(2 ft)", "arm"),
        ("x = g¦", "g0"),
    ] {
        let labels = labels(line);
        assert_eq!(
            labels.first().map(String::as_str),
            Some(first),
            "{line}: {labels:?}"
        );
    }
}

#[test]
fn nothing_is_offered_where_text_is_free() {
    for line in ["note fl¦", "x = 3 ; fl¦", "x = 12¦", "part ¦", "aside S¦"] {
        assert_eq!(labels(line), Vec::<String>::new(), "{line}");
    }
    let sheet = Sheet::open("title fl\nunits k");
    assert!(sheet.complete(1, 9).items.is_empty());
    assert_eq!(sheet.complete(2, 8).items[0].label, "kt");
    assert_eq!(sheet.complete(1, 3).items[0].label, "title");
}

#[test]
fn a_function_comes_with_its_arguments() {
    let item = offered("x = pitching_m¦").items.remove(0);
    assert_eq!(item.insert, "pitching_moment(Cm, q, S, c)");
    assert_eq!(item.holes[1], (20, 1));
    let named = offered("x = pitching_moment(¦");
    assert_eq!(named.items[0].insert, "Cm: ");
    assert!(
        named.items[0].detail.contains("pure number"),
        "{:?}",
        named.items[0]
    );
}

#[test]
fn what_is_typed_is_replaced() {
    let found = offered("x = 2*alp¦");
    let replaces = found.replaces;
    assert_eq!(
        (replaces.line, replaces.column, replaces.length),
        (10, 7, 3)
    );
    let found = offered("x = \u{1d6fc}lp¦");
    assert_eq!((found.replaces.column, found.replaces.column16), (5, 5));
    assert_eq!((found.replaces.length, found.replaces.length16), (3, 4));
}

#[test]
fn the_names_of_another_sheet_are_offered_and_told() {
    let beside =
        |_: &str| Some("S [ft^2] = 142 ; drawing\nair = standard_atmosphere(0 ft)\n".to_owned());
    let text = "use \"geometry\" as g\nx = g.air.density\n";
    let sheet = Sheet::open_with(text, &beside);
    let names = |column| {
        let items = sheet.complete(2, column).items.into_iter();
        items.map(|i| i.label).collect::<Vec<_>>()
    };
    assert_eq!(names(7), ["S", "air"]);
    assert_eq!(names(13)[0], "density");
    assert_eq!(names(5)[0], "g");
    let hover = sheet.hover(2, 12).expect("a field");
    assert_eq!(hover.title, "g.air.density");
    assert_eq!(sheet.hover(2, 5).expect("a sheet").text, "another sheet");
}

#[test]
fn a_symbol_is_told_with_its_values() {
    let hover = told("x = 2*L¦").expect("a symbol");
    assert_eq!(hover.title, "L");
    assert_eq!(hover.text, "force in lb");
    let facts: Vec<(&str, &str)> = hover
        .facts
        .iter()
        .map(|f| (f.name, f.text.as_str()))
        .collect();
    assert_eq!(facts[0], ("value", "-681.6 to 2045 lb"));
    assert_eq!(facts[1], ("varies over", "flap, alpha"));
    assert_eq!(facts[2], ("line", "9"));
    assert_eq!((hover.at.column, hover.at.length), (7, 1));
}

#[test]
fn what_stands_at_a_place_is_told() {
    for (line, title, text) in [
        ("x = 2*S¦", "S", "input, area in ft^2"),
        ("x = f¦lap", "flap", "axis, text"),
        ("x = ar¦m(2 ft)", "arm(x)", "own function: x - 6.1 ft"),
        ("x = air.dens¦ity", "air.density", "density in slug/ft^3"),
        ("x = a¦ir.density", "air", "record"),
        ("x = 3 l¦b", "lb", "1 lb is 4.4482216152605 kg.m/s^2; force"),
        (
            "x [lb/f¦t^2] = 3",
            "lb/ft^2",
            "1 lb/ft^2 is 47.880258980335846 kg/m.s^2; pressure",
        ),
        (
            "x = g¦0",
            "g0",
            "constant: standard acceleration of gravity",
        ),
        (
            "x = max(L ov¦er flap)",
            "max(P over cg), integral(f, y over station)",
            "The axes",
        ),
        (
            "requi¦re L < 0",
            "require condition ; reason",
            "Met, not met",
        ),
        (
            "x = pitching_moment(C¦m: 3)",
            "Cm: pure number",
            "argument of pitching_moment",
        ),
    ] {
        let hover = told(line).unwrap_or_else(|| panic!("{line}"));
        assert_eq!(hover.title, title, "{line}");
        let told = hover.text.to_lowercase();
        assert!(
            told.starts_with(&text.to_lowercase()),
            "{line}: {}",
            hover.text
        );
    }
    let function = told("x = pitching_mo¦ment(").expect("a function");
    let names: Vec<&str> = function.facts.iter().map(|f| f.name).collect();
    assert!(
        names.contains(&"source") && names.contains(&"arguments"),
        "{names:?}"
    );
    assert_eq!(told("x = 2 + ¦ "), None);
}

/// Numbers that look random but are the same each time.
fn next(seed: &mut u64) -> usize {
    *seed ^= *seed << 13;
    *seed ^= *seed >> 7;
    *seed ^= *seed << 17;
    (*seed >> 33) as usize
}

#[test]
fn every_place_of_any_text_has_an_answer() {
    let odd = "table p | V [kt\nA 1 | 5\u{301}5 |\nx = \"a\nf(a,(b at (c:\"\r\n\u{feff}é\u{1d6fc} = .5 /\n";
    let mut texts = vec![
        SHEET.to_owned(),
        odd.to_owned(),
        String::new(),
        "\n".to_owned(),
    ];
    let mut seed = 0x9e37_79b9_7f4a_7c15;
    for _ in 0..40 {
        let characters: Vec<char> = SHEET.chars().collect();
        let from = next(&mut seed) % characters.len();
        let to = from + next(&mut seed) % (characters.len() - from);
        let mut cut = characters.clone();
        cut.drain(from..to);
        texts.push(cut.into_iter().collect());
    }
    for text in texts {
        let sheet = Sheet::open(&text);
        let desk = sheet.desk();
        for byte in 0..=text.len() + 1 {
            if !text.is_char_boundary(byte.min(text.len())) {
                continue;
            }
            let found = super::complete::complete(&desk, byte);
            assert!(found.replaces.line >= 1, "{text:?} at {byte}");
            let _ = super::hover::hover(&desk, byte);
        }
        for line in 0..14 {
            for column in [0, 1, 5, 90] {
                let _ = sheet.complete(line, column);
                let _ = sheet.hover(line, column);
            }
        }
    }
}
