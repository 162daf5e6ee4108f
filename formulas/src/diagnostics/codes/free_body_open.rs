//! A free body that does not close.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{first_conditions, in_conditions, quoted};
use crate::problem::Conditions;

pub(super) const ROW: Code = Code {
    code: "free-body-open",
    severity: Severity::Warning,
    what: "In every condition the forces of a free body, and their moments, come to nothing.",
    why: "A force or a couple is missing, counted twice, or has the wrong sign or station.",
    example: Some("L [lb] = 500\nW [lb] = 560\nx [ft] = 6\nfreebody \"Balance\": L @ x, -W @ x\n"),
    fixed: Some("L [lb] = 560\nW [lb] = 560\nx [ft] = 6\nfreebody \"Balance\": L @ x, -W @ x\n"),
};

pub(super) fn draft(
    name: &str,
    conditions: &Conditions,
    force: &str,
    axial: &Option<String>,
    moment: &str,
) -> Draft {
    let (count, first) = (in_conditions(conditions), first_conditions(conditions));
    let axial = axial
        .as_ref()
        .map_or(String::new(), |axial| format!(", {axial} along the axis"));
    let worst = if count.is_empty() {
        ""
    } else {
        " in the worst"
    };
    let message = format!(
        "The free body {} does not close{count}{first}: {force}{axial} and a moment of {moment} are left over{worst}.",
        quoted(name)
    );
    Draft::says(message).about(conditions)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, conditions};
    use crate::problem::{Conditions, Fault};

    fn open(conditions: Conditions, axial: Option<&str>) -> Fault {
        Fault::FreebodyOpen {
            name: "Balance".to_owned(),
            conditions,
            force: "-60 lb".to_owned(),
            axial: axial.map(str::to_owned),
            moment: "360 ft.lb".to_owned(),
        }
    }

    const TEXT: &str = "freebody \"Balance\": L @ x, -W @ x";

    #[test]
    fn names_what_is_left_over() {
        let message = "The free body “Balance” does not close: -60 lb and a moment of 360 ft.lb are left over.";
        check(
            TEXT,
            "\"Balance\"",
            open(
                Conditions {
                    count: 1,
                    first: vec![vec![]],
                },
                None,
            ),
            message,
            &[],
        );
    }

    #[test]
    fn names_the_conditions() {
        let message = "The free body “Balance” does not close in 2 conditions (point A, cg fwd; point A, cg aft): -60 lb, 3 lb along the axis and a moment of 360 ft.lb are left over in the worst.";
        let fault = open(conditions(2, &[("A", "fwd"), ("A", "aft")]), Some("3 lb"));
        let found = check(TEXT, "\"Balance\"", fault, message, &[]);
        assert_eq!(found.conditions.map(|c| c.count), Some(2));
    }
}
