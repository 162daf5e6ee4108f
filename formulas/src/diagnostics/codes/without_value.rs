//! Conditions in which a line has no value.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{first_conditions, in_conditions};
use crate::problem::{Cause, Conditions};

pub(super) const ROW: Code = Code {
    code: "without-value",
    severity: Severity::Warning,
    what: "A line has a value in every condition in which what it rests on has one.",
    why: "The largest and smallest are sought among the values there are, and the missing one may be the one that governs.",
    example: Some("n = 0\ny = 1/n\n"),
    fixed: Some("n = 2\ny = 1/n\n"),
};

pub(super) fn draft(symbol: &str, cause: Cause, conditions: &Conditions) -> Draft {
    let (count, first) = (in_conditions(conditions), first_conditions(conditions));
    let message = format!("{symbol} has no value{count}{first}: {}.", reason(cause));
    Draft::says(message).about(conditions)
}

fn reason(cause: Cause) -> String {
    match cause {
        Cause::ContourRepeated(point) if point > 1 => {
            let before = point - 1;
            format!("points {before} and {point} of the contour are at one place")
        }
        Cause::ContourCrossing(first, second) if first > 0 && second > 0 => {
            let (after, later) = (first.saturating_add(1), second.saturating_add(1));
            format!(
                "the contour crosses itself between points {first} and {after} and between points {second} and {later}"
            )
        }
        other => plain(other).to_owned(),
    }
}

fn plain(cause: Cause) -> &'static str {
    match cause {
        Cause::DivisionByZero => "it divides by zero",
        Cause::Domain => "a function is given a number for which it has no value",
        Cause::Overflow => "the result is too large for a number",
        Cause::BeyondEnd => "the position lies beyond the end of its axis",
        Cause::NoSuchLabel => "the axis has no such label",
        Cause::NoValue => "the method finds no value",
        Cause::NoSolution => "no solution lies between the bounds",
        Cause::NotCoded => {
            "the set of rules does not have it, or it is not coded: state the factors"
        }
        Cause::Designation => {
            "the designation is not one of four or five digits whose mean line is published"
        }
        Cause::ContourPoints => "a contour takes at least five points, all of them numbers",
        Cause::ContourRepeated(_) => "two points of the contour are at one place",
        Cause::ContourCrossing(..) => "the contour crosses itself",
        Cause::ContourOpen => "the contour does not come back to the trailing edge where it began",
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, conditions};
    use crate::problem::{Cause, Conditions, Fault};

    fn says(cause: Cause, conditions: &Conditions, message: &str) {
        let fault = Fault::WithoutValue {
            symbol: "y".to_owned(),
            cause,
            conditions: conditions.clone(),
        };
        let found = check("y = 1/n", "y", fault, message, &[]);
        assert_eq!(
            found.conditions.map(|c| (c.count, c.first)),
            Some((conditions.count, conditions.first.clone()))
        );
    }

    #[test]
    fn a_single_value_is_told_plainly() {
        let one = Conditions {
            count: 1,
            first: vec![vec![]],
        };
        for (cause, message) in [
            (Cause::DivisionByZero, "y has no value: it divides by zero."),
            (
                Cause::ContourRepeated(5),
                "y has no value: points 4 and 5 of the contour are at one place.",
            ),
            (
                Cause::ContourCrossing(2, 9),
                "y has no value: the contour crosses itself between points 2 and 3 and between points 9 and 10.",
            ),
            (
                Cause::Domain,
                "y has no value: a function is given a number for which it has no value.",
            ),
            (
                Cause::Overflow,
                "y has no value: the result is too large for a number.",
            ),
            (
                Cause::BeyondEnd,
                "y has no value: the position lies beyond the end of its axis.",
            ),
            (
                Cause::NoSuchLabel,
                "y has no value: the axis has no such label.",
            ),
            (Cause::NoValue, "y has no value: the method finds no value."),
            (
                Cause::NoSolution,
                "y has no value: no solution lies between the bounds.",
            ),
            (
                Cause::NotCoded,
                "y has no value: the set of rules does not have it, or it is not coded: state the factors.",
            ),
        ] {
            says(cause, &one, message);
        }
    }

    #[test]
    fn conditions_are_counted_and_the_first_named() {
        let message = "y has no value in 1 condition (point A, cg aft): it divides by zero.";
        says(
            Cause::DivisionByZero,
            &conditions(1, &[("A", "aft")]),
            message,
        );
        let message = "y has no value in 1,200 conditions (point A, cg fwd; point A, cg aft; …): it divides by zero.";
        says(
            Cause::DivisionByZero,
            &conditions(1200, &[("A", "fwd"), ("A", "aft")]),
            message,
        );
    }
}
