//! The starting sheet, worked out a second time by the closed form of the balance: moments about the aerodynamic centre
//! of the airplane less tail, equilibrium of vertical forces. Source: statics; T. H. G. Megson, Introduction to Aircraft
//! Structural Analysis, section 13.2 (steady manoeuvres), written for a station axis positive aft.

use formulas::Sheet;

const SHEET: &str = include_str!("../../www/sheets/osier-balancing-loads.pitchwright");

/// Pound-force in newtons, foot and knot in SI: NIST SP 811, App. B, exact.
const LBF: f64 = 4.448_221_615_260_5;
const FT: f64 = 0.3048;
const KT: f64 = 1852.0 / 3600.0;

#[test]
fn every_condition_equals_the_closed_form() {
    let report = Sheet::open(SHEET).report(&[]);
    let errors = report
        .findings
        .iter()
        .filter(|f| f.severity != formulas::diagnostics::Severity::Advice);
    assert_eq!(errors.count(), 0);
    let values =
        serde_json::to_value(&report.quantity("P_t").expect("P_t").values).expect("values");
    let obtained: Vec<f64> = values
        .as_array()
        .expect("a list")
        .iter()
        .filter_map(serde_json::Value::as_f64)
        .collect();
    let points = [
        (55.0, 3.8, -0.055),
        (65.0, 1.0, -0.060),
        (90.0, 3.8, -0.062),
        (90.0, 0.0, -0.068),
        (65.0, -1.5, -0.052),
        (48.0, -1.5, -0.048),
    ];
    let mut at = 0;
    let (mut largest, mut smallest) = ((f64::MIN, 0), (f64::MAX, 0));
    for (v, n, cm) in points {
        for weight in [430.0, 560.0] {
            for x_cg in [5.95, 6.45] {
                let q = 0.5 * 1.225 * (v * KT) * (v * KT);
                let m = cm * q * (142.0 * FT * FT) * (4.6 * FT);
                let p = (m + n * weight * LBF * (x_cg - 6.10) * FT) / ((17.30 - 6.10) * FT) / LBF;
                assert!(
                    (obtained[at] - p).abs() <= 1e-11 * p.abs(),
                    "condition {at}: {} is not {p}",
                    obtained[at]
                );
                if p > largest.0 {
                    largest = (p, at);
                }
                if p < smallest.0 {
                    smallest = (p, at);
                }
                at += 1;
            }
        }
    }
    assert_eq!(obtained.len(), 24);
    governing_is_at(&report, "largest", largest.1);
    governing_is_at(&report, "smallest", smallest.1);
    let body = report.freebodies.first().expect("a free body");
    let body = serde_json::to_value(body).expect("plain");
    assert_eq!(
        (&body["closes"], &body["by_construction"]),
        (&true.into(), &true.into())
    );
}

/// The condition of an extreme of P_t is the one of that number in condition order.
fn governing_is_at(report: &formulas::report::Report, which: &str, condition: usize) {
    let governing =
        serde_json::to_value(report.governing.first().expect("P_t governs")).expect("plain");
    let labels = [
        ["A", "C", "D", "E", "F", "G"][condition / 4],
        ["light", "gross"][condition / 2 % 2],
        ["fwd", "aft"][condition % 2],
    ];
    let found = &governing[which]["condition"];
    for (axis, label) in ["point", "loading", "cg"].into_iter().zip(labels) {
        assert_eq!(found[axis], label, "{which}");
    }
}
