//! Order among findings: by place, each once, and no code in a crowd.

use super::finding::{Finding, Fix};
use std::collections::BTreeMap;

/// Most findings of one code that are listed one by one.
const LISTED_MOST: usize = 100;

/// Sorts, drops doubles and sums up what is beyond a hundred of one code.
pub(super) fn gather(mut findings: Vec<Finding>) -> Vec<Finding> {
    // A stable sort: of doubles the one reported first stays.
    findings.sort_by(|a, b| place(a).cmp(&place(b)));
    findings.dedup_by(|later, first| place(later) == place(first) && says_the_same(later, first));
    sum_up(findings)
}

fn place(finding: &Finding) -> (u32, u32, &'static str) {
    (finding.line, finding.column, finding.code)
}

/// Two findings about conditions may tell of different causes at one place; any others are doubles.
fn says_the_same(a: &Finding, b: &Finding) -> bool {
    a.conditions.is_none() || a.message == b.message
}

fn sum_up(findings: Vec<Finding>) -> Vec<Finding> {
    let mut totals: BTreeMap<&'static str, usize> = BTreeMap::new();
    for finding in &findings {
        *totals.entry(finding.code).or_default() += 1;
    }
    let mut seen: BTreeMap<&'static str, usize> = BTreeMap::new();
    let kept = findings.into_iter().filter_map(|finding| {
        let seen = seen.entry(finding.code).or_default();
        *seen += 1;
        let total = totals.get(finding.code).copied().unwrap_or(0);
        match *seen {
            n if n <= LISTED_MOST => Some(finding),
            n if n == LISTED_MOST + 1 && total > n => Some(summary(finding, total - LISTED_MOST)),
            n if n == LISTED_MOST + 1 => Some(finding),
            _ => None,
        }
    });
    kept.collect()
}

/// Stands in the place of the first one left out.
fn summary(first: Finding, left_out: usize) -> Finding {
    Finding {
        message: format!(
            "This and {} more like it are not listed one by one.",
            left_out - 1
        ),
        conditions: None,
        fixes: Vec::<Fix>::new(),
        ..first
    }
}

#[cfg(test)]
mod tests {
    use super::super::finding::{FoundConditions, Severity};
    use super::*;

    fn at(line: u32, column: u32, code: &'static str, message: &str) -> Finding {
        Finding {
            severity: Severity::Error,
            code,
            line,
            column,
            length: 1,
            column16: column,
            length16: 1,
            message: message.to_owned(),
            conditions: None,
            fixes: Vec::new(),
        }
    }

    fn messages(findings: Vec<Finding>) -> Vec<String> {
        findings.into_iter().map(|f| f.message).collect()
    }

    #[test]
    fn findings_stand_in_the_order_of_line_column_and_code() {
        let found = vec![
            at(2, 1, "a", "4"),
            at(1, 9, "a", "3"),
            at(1, 2, "b", "2"),
            at(1, 2, "a", "1"),
        ];
        assert_eq!(messages(gather(found)), ["1", "2", "3", "4"]);
    }

    #[test]
    fn of_one_code_at_one_place_the_first_stays() {
        let found = vec![
            at(1, 1, "a", "first"),
            at(1, 1, "a", "second"),
            at(1, 1, "b", "other"),
        ];
        assert_eq!(messages(gather(found)), ["first", "other"]);
    }

    #[test]
    fn two_causes_at_one_place_are_both_told() {
        let about = |message| Finding {
            conditions: Some(FoundConditions::default()),
            ..at(1, 1, "without-value", message)
        };
        let found = vec![about("division"), about("domain"), about("domain")];
        assert_eq!(messages(gather(found)), ["division", "domain"]);
    }

    #[test]
    fn a_crowd_of_one_code_is_summed_up() {
        let crowd = |n: u32| {
            (1..=n)
                .map(|line| at(line, 1, "a", "one"))
                .collect::<Vec<_>>()
        };
        assert_eq!(gather(crowd(100)).len(), 100);
        assert!(gather(crowd(101)).iter().all(|f| f.message == "one"));
        let many = gather(crowd(250));
        assert_eq!(many.len(), 101);
        let last = many.last().unwrap();
        assert_eq!((last.line, last.code), (101, "a"));
        assert_eq!(
            last.message,
            "This and 149 more like it are not listed one by one."
        );
    }
}
