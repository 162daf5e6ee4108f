//! A list by more than one axis.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{listed, short};

pub(super) const ROW: Code = Code {
    code: "two-axes",
    severity: Severity::Error,
    what: "A list stands by one axis; values by two or more stand in a table.",
    why: "A table shows which value belongs to which pair of labels.",
    example: Some(
        "vary cg: fwd | aft\nvary loading: light | gross\nx [ft] by loading, cg = 5.9 | 6.4 | 6.0 | 6.5\n",
    ),
    fixed: Some(
        "vary cg: fwd | aft\nvary loading: light | gross\ntable loading, cg | x [ft]\nlight, fwd | 5.9\nlight, aft | 6.4\ngross, fwd | 6.0\ngross, aft | 6.5\nend\n",
    ),
};

pub(super) fn draft(site: &Site<'_>, axes: &[String]) -> Draft {
    let keys = axes.join(", ");
    let header = format!("table {keys} | {}", symbol(site));
    let row = vec!["…"; axes.len()].join(", ");
    Draft::says(format!(
        "A list stands by one axis only; by {} it is a table: “{header}”, a row “{row} | …” for each combination, and “end”.",
        listed(axes, "and")
    ))
}

/// The symbol with its bracket, as far as the line tells.
fn symbol(site: &Site<'_>) -> String {
    let typed = site.text.split(" by ").next().unwrap_or("").trim();
    if typed.is_empty() || typed.contains('\n') {
        "…".to_owned()
    } else {
        short(typed)
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn proposes_a_table() {
        let fault = Fault::TwoAxes {
            axes: names(&["loading", "cg"]),
        };
        let message = "A list stands by one axis only; by loading and cg it is a table: “table loading, cg | x [ft]”, a row “…, … | …” for each combination, and “end”.";
        check(
            "x [ft] by loading, cg = 5.9 | 6.4",
            "loading, cg",
            fault,
            message,
            &[],
        );
    }
}
