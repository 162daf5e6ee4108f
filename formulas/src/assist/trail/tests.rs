//! What a trail says of each kind of line.

use super::*;
use crate::sheet::Sheet;

const OSIER: &str = r#"title Osier single-seater, horizontal tail
digits 15
S [ft^2] = 142 ; drawing OS-010
c [ft] = 4.6 ; mean aerodynamic chord
x_ac [ft] = 6.10 +/- 0.05 ; sheet 3
x_tail [ft] = 17.30 ; quarter chord of the tail
table point | V [KEAS] | n | Cm ; sheet 3
A | 55 | 3.8 | -0.055
D | 90 | 3.8 | -0.062 ; read again
end
vary loading: light | gross
W [lb] by loading = light: 430 | gross: 560 ; weighing report 2
vary cg: fwd | aft
x_cg [ft] by cg = 5.95 | 6.45 ; assumed
arm(x) = (x - x_ac)/(x_tail - x_ac)
q [lb/ft^2] = dynamic_pressure_of_eas(V)
M [ft.lb] = pitching_moment(Cm, q, S, c)
P_t [lb] = M/(x_tail - x_ac) + ; the moment first
  n*W*arm(x_cg) ; limit load, up positive
P_max = max(abs(P_t) over point, cg)
twice = 2*mean(P_t over point)
P_D = P_t at (point: "D", cg: "aft")
up = if P_t < 0 lb then -P_t else P_t*2
vary alpha [deg]: -4 to 12 step 4
cl = 0.1 /deg*alpha + 0.2
L = cl at (alpha: 3 deg)*S
rho = 2*standard_atmosphere(1000 ft).density
unknown a_t [deg] between -10 and 20 such that S*q*0.1 /deg*a_t = n*W
power = V^2/[KEAS]^2
wide = integral(cl, alpha)
first = where_max(P_t over point)
"#;

fn trail(symbol: &str, condition: &[(&str, &str)]) -> Trail {
    let condition: Vec<(String, String)> = condition
        .iter()
        .map(|(axis, label)| ((*axis).to_owned(), (*label).to_owned()))
        .collect();
    Sheet::open(OSIER)
        .trail(symbol, &condition)
        .expect("a trail")
}

fn first(symbol: &str) -> Step {
    trail(symbol, &[]).steps.remove(0)
}

#[test]
fn the_formula_stands_with_its_numbers_and_everything_it_rests_on_once() {
    let trail = trail(
        "P_t",
        &[("point", "A"), ("loading", "light"), ("cg", "aft")],
    );
    let symbols: Vec<&str> = trail.steps.iter().map(|s| s.symbol.as_str()).collect();
    assert_eq!(
        symbols,
        [
            "P_t", "M", "x_tail", "x_ac", "n", "W", "x_cg", "Cm", "q", "S", "c", "V"
        ]
    );
    let step = &trail.steps[0];
    assert_eq!(step.formula, "M/(x_tail - x_ac) + n*W*arm(x_cg)");
    let numbers = step.numbers.as_deref().unwrap();
    assert!(numbers.ends_with("3.80000000000000*430.000000000000 lb*arm(6.45000000000000 ft)"));
    assert_eq!(
        step.remark.as_deref(),
        Some("the moment first limit load, up positive")
    );
    assert_eq!(step.rests_on, [1, 2, 3, 4, 5, 6]);
    let row = &trail.steps[4];
    assert_eq!((row.line, row.kind), (8, StepKind::Input));
    assert_eq!(row.formula, "3.8");
    let weight = &trail.steps[5];
    assert_eq!(
        weight.condition.0,
        [("loading".to_owned(), "light".to_owned())]
    );
    assert_eq!(weight.formula, "430");
}

#[test]
fn without_a_condition_the_largest_magnitude_is_taken() {
    let step = first("P_t");
    let labels: Vec<&str> = step.condition.0.iter().map(|(_, l)| l.as_str()).collect();
    assert_eq!(labels, ["D", "gross", "fwd"]);
}

#[test]
fn a_row_brings_its_own_remark() {
    let trail = trail("Cm", &[("point", "D")]);
    assert_eq!(
        trail.steps[0].remark.as_deref(),
        Some("read again; sheet 3")
    );
}

#[test]
fn notes_tell_what_was_chosen() {
    for (symbol, note) in [
        ("P_max", "max(abs(P_t) over point, cg) is 127."),
        ("P_max", "the value at point D, cg fwd"),
        ("twice", "of 2 values: -61."),
        (
            "P_t",
            "arm(5.95000000000000 ft): (x - x_ac)/(x_tail - x_ac) = (5.95",
        ),
        ("up", "lb < 0 lb is true: -P_t counts"),
        ("L", "between 0.200000000000000 at alpha 0 deg and 0.6"),
        ("rho", "standard_atmosphere(1000 ft).density is 0.0023"),
        ("a_t", "looked for between -10 deg and 20 deg"),
        ("a_t", "left 2128"),
        ("wide", "cl along alpha: 5 values: -0.2"),
        ("first", "is \"A\", the value at point A"),
    ] {
        let notes = first(symbol).notes;
        assert!(
            notes.iter().any(|n| n.contains(note)),
            "{symbol}: {notes:?}"
        );
    }
}

/// The numbers of a step, typed as a formula of their own, give its value again.
#[test]
fn the_numbers_give_the_value_again() {
    for symbol in ["P_t", "M", "q", "twice", "up", "L", "rho", "power"] {
        let step = first(symbol);
        let unit = step.unit.map_or(String::new(), |u| format!(" [{u}]"));
        let numbers = step.numbers.unwrap_or(step.formula);
        let definitions = "x_ac = 6.1 ft\nx_tail = 17.3 ft\narm(x) = (x - x_ac)/(x_tail - x_ac)\n\
                           P_t = 0 lb\n";
        let sheet = Sheet::open(&format!("{definitions}again{unit} = {numbers}\n"));
        let report = sheet.report(&[]);
        let again = report.quantity("again").and_then(|q| q.largest.as_ref());
        let again = again.unwrap_or_else(|| panic!("{symbol}: {numbers}: {:?}", report.findings));
        let TrailValue::Number(Some(value)) = step.value else {
            panic!("{symbol} has no value");
        };
        let near = (again.value - value).abs() <= 1e-9 * value.abs();
        assert!(
            near,
            "{symbol}: {numbers} is {} and not {value}",
            again.value
        );
    }
}

#[test]
fn methods_come_with_their_source() {
    let step = first("M");
    assert_eq!(step.methods[0].function, "pitching_moment");
    assert!(!step.methods[0].source.is_empty());
}

#[test]
fn what_another_sheet_gives_is_followed_there() {
    let geometry = "vary h [m]: 0 | 304.8\nb [ft] = 30 ; drawing\nS = b*5 ft + h*0 m\n";
    let beside = |name: &str| (name == "geometry").then(|| geometry.to_owned());
    let text = "use \"geometry\" as g\nvary h [ft]: 0 | 1000\nL = 2*g.S\n";
    let sheet = Sheet::open_with(text, &beside);
    let condition = [("h".to_owned(), "1000 ft".to_owned())];
    let trail = sheet.trail("L", &condition).expect("a trail");
    let steps: Vec<(Option<&str>, &str, u32)> = trail
        .steps
        .iter()
        .map(|s| (s.sheet.as_deref(), s.symbol.as_str(), s.line))
        .collect();
    assert_eq!(
        steps,
        [
            (None, "L", 3),
            (Some("g"), "S", 3),
            (Some("g"), "b", 2),
            (Some("g"), "h", 1)
        ]
    );
    assert_eq!(trail.steps[0].rests_on, [1]);
    assert_eq!(trail.steps[1].rests_on, [2, 3]);
    assert_eq!(trail.steps[2].remark.as_deref(), Some("drawing"));
}

#[test]
fn what_is_not_there_is_said() {
    let sheet = Sheet::open(OSIER);
    let label = |axis: &str, label: &str| [(axis.to_owned(), label.to_owned())];
    let message = |symbol: &str, at: &[(String, String)]| {
        sheet.trail(symbol, at).map(|_| ()).unwrap_err().to_string()
    };
    assert_eq!(
        message("Pt", &[]),
        "the sheet has no symbol Pt; did you mean P_t?"
    );
    assert_eq!(
        message("P_t", &label("flap", "up")),
        "the sheet has no axis flap"
    );
    assert_eq!(
        message("P_t", &label("cg", "mid")),
        "the axis cg has no label mid"
    );
}

#[test]
fn the_text_has_a_paragraph_for_each_step() {
    let text = write(&trail("M", &[("point", "A")]));
    let expected = "M at point A = -367.";
    assert!(text.starts_with(expected), "{text}");
    assert!(text.contains("\n    input: 4.6\n    ; mean aerodynamic chord\n"));
    assert!(text.contains("source: "));
}
