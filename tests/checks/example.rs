//! The starting sheet, worked out a second time by the closed form of the balance: moments about the aerodynamic centre
//! of the airplane less tail, equilibrium of vertical forces. Source: statics; T. H. G. Megson, Introduction to Aircraft
//! Structural Analysis, section 13.2 (steady manoeuvres), written for a station axis positive aft.

use formulas::Sheet;
use formulas::diagnostics::Severity;
use formulas::report::{Extreme, Governing, Report, ValueList};

const SHEET: &str = include_str!("../../www/sheets/osier-balancing-loads.pitchwright");

/// Pound-force in newtons, foot and knot in SI: NIST SP 811, App. B, exact.
const LBF: f64 = 4.448_221_615_260_5;
const FT: f64 = 0.3048;
const KT: f64 = 1852.0 / 3600.0;
/// Sea-level density of ISO 2533:1975, kg/m^3.
const RHO_0: f64 = 1.225;

/// Wing area in ft^2, mean chord and stations in ft, as on the sheet.
const AREA: f64 = 142.0;
const CHORD: f64 = 4.6;
const X_AC: f64 = 6.10;
const X_TAIL: f64 = 17.30;

/// Label, speed in KEAS, load factor, moment coefficient.
const POINTS: [(&str, f64, f64, f64); 6] = [
    ("A", 55.0, 3.8, -0.055),
    ("C", 65.0, 1.0, -0.060),
    ("D", 90.0, 3.8, -0.062),
    ("E", 90.0, 0.0, -0.068),
    ("F", 65.0, -1.5, -0.052),
    ("G", 48.0, -1.5, -0.048),
];
/// Weights in lb, centres of gravity in ft.
const LOADINGS: [(&str, f64); 2] = [("light", 430.0), ("gross", 560.0)];
const STATIONS: [(&str, f64); 2] = [("fwd", 5.95), ("aft", 6.45)];

/// One condition by hand, in lb, ft.lb and ft.
struct Case {
    labels: [&'static str; 3],
    /// Moment about the aerodynamic centre, nose up.
    moment: f64,
    /// Tail load and wing lift, up.
    tail: f64,
    lift: f64,
    /// Weight times load factor, and where it acts.
    inertia: f64,
    x_cg: f64,
    lift_coefficient: f64,
}

/// All conditions, in the order of the sheet.
fn cases() -> Vec<Case> {
    let mut cases = Vec::new();
    for (point, speed, n, cm) in POINTS {
        let q = 0.5 * RHO_0 * (speed * KT) * (speed * KT) * (FT * FT) / LBF;
        let moment = cm * q * AREA * CHORD;
        let arm = X_TAIL - X_AC;
        for (loading, weight) in LOADINGS {
            for (cg, x_cg) in STATIONS {
                // The lift by moments about the tail, the tail load by moments about the aerodynamic centre.
                let lift = (n * weight * (X_TAIL - x_cg) - moment) / arm;
                let tail = (moment + n * weight * (x_cg - X_AC)) / arm;
                cases.push(Case {
                    labels: [point, loading, cg],
                    moment,
                    tail,
                    lift,
                    inertia: n * weight,
                    x_cg,
                    lift_coefficient: lift / (q * AREA),
                });
            }
        }
    }
    cases
}

fn report() -> Report {
    Sheet::open(SHEET).report(&[])
}

/// The values of a symbol, which is to be in that unit.
fn numbers(report: &Report, symbol: &str, unit: Option<&str>) -> Vec<f64> {
    let quantity = report.quantity(symbol).expect("a symbol of the sheet");
    assert_eq!(quantity.unit.as_deref(), unit, "{symbol}");
    assert_eq!(quantity.axes, ["point", "loading", "cg"], "{symbol}");
    match &quantity.values {
        Some(ValueList::Numbers(list)) => list.iter().map(|v| v.expect("a value")).collect(),
        other => panic!("{symbol} is {other:?}"),
    }
}

#[test]
fn the_sheet_is_sound() {
    for finding in &report().findings {
        assert_eq!(finding.severity, Severity::Advice, "{}", finding.message);
    }
}

#[test]
fn every_condition_equals_the_closed_form() {
    let (report, cases) = (report(), cases());
    let tail = numbers(&report, "P_t", Some("lb"));
    let lift = numbers(&report, "L_w", Some("lb"));
    let coefficient = numbers(&report, "CL", None);
    assert_eq!((tail.len(), cases.len()), (24, 24));
    println!("P_t by statics, lb: expected, obtained, difference; relative tolerance 1e-11");
    for (at, case) in cases.iter().enumerate() {
        println!(
            "{:?} {:14.9} {:14.9} {:9.1e}",
            case.labels,
            case.tail,
            tail[at],
            tail[at] - case.tail
        );
        for (obtained, expected) in [
            (tail[at], case.tail),
            (lift[at], case.lift),
            (coefficient[at], case.lift_coefficient),
        ] {
            assert!(
                (obtained - expected).abs() <= 1e-11 * expected.abs(),
                "{:?}: {obtained} is not {expected}",
                case.labels
            );
        }
        // Forces, and moments about the datum, which neither formula was written about.
        let force = lift[at] + tail[at] - case.inertia;
        let moment = case.moment - lift[at] * X_AC - tail[at] * X_TAIL + case.inertia * case.x_cg;
        assert!(
            force.abs() < 1e-9 && moment.abs() < 1e-8,
            "{:?}",
            case.labels
        );
    }
}

#[test]
fn what_governs_is_where_statics_puts_it() {
    let (report, cases) = (report(), cases());
    assert_eq!(report.governing.len(), 2);
    for governing in &report.governing {
        assert_eq!(governing.conditions, 24);
        let of = |case: &Case| match governing.symbol.as_str() {
            "P_t" => case.tail,
            "CL" => case.lift_coefficient,
            other => panic!("{other} does not govern"),
        };
        let mut by_hand: Vec<&Case> = cases.iter().collect();
        by_hand.sort_by(|a, b| of(a).total_cmp(&of(b)));
        let (smallest, largest) = (by_hand[0], by_hand[by_hand.len() - 1]);
        stands_at(
            governing,
            governing.smallest.as_ref(),
            smallest,
            of(smallest),
        );
        stands_at(governing, governing.largest.as_ref(), largest, of(largest));
    }
}

/// The extreme is the value of that condition, and in that condition.
fn stands_at(governing: &Governing, extreme: Option<&Extreme>, case: &Case, value: f64) {
    let extreme = extreme.expect("an extreme");
    let labels: Vec<(&str, &str)> = extreme
        .condition
        .0
        .iter()
        .map(|(axis, label)| (axis.as_str(), label.as_str()))
        .collect();
    let [point, loading, cg] = case.labels;
    let expected = [("point", point), ("loading", loading), ("cg", cg)];
    assert_eq!(labels, expected, "{}", governing.symbol);
    assert!((extreme.value - value).abs() <= 1e-11 * value.abs());
}

#[test]
fn the_free_body_closes_by_construction() {
    let report = report();
    let body = report.freebodies.first().expect("a free body");
    assert_eq!(body.closes, Some(true));
    assert!(body.by_construction);
    assert_eq!(body.taken_up_by.as_deref(), Some("L_w"));
    assert!(body.force_residual < 1e-9 && body.moment_residual < 1e-9);
}

#[test]
fn the_requirement_is_judged_at_its_least_reserve() {
    let (report, cases) = (report(), cases());
    let requirement = report.requirements.first().expect("a requirement");
    assert_eq!((requirement.met, requirement.not_met), (Some(true), 0));
    let worst = requirement.worst.as_ref().expect("a worst condition");
    let highest = cases
        .iter()
        .map(|c| c.lift_coefficient)
        .fold(f64::MIN, f64::max);
    assert!((worst.left - highest).abs() <= 1e-11 * highest);
    assert!((worst.reserve - (1.55 - highest)).abs() <= 1e-11);
    assert_eq!(
        worst.margin, None,
        "a margin of a coefficient means nothing"
    );
}
