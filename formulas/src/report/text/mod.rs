//! The report as plain text: a ruled computation form, what governs, requirements, free bodies, assumptions, findings.

pub(super) mod closing;
mod page;
pub(super) mod rows;
pub(super) mod values;

use super::cautions::{CAUTIONS, POUND_IS_FORCE, shows_pounds};
use super::{Condition, Form, Report};
use page::{Page, WIDTH, padded};

/// Writes the report; lines are at most 120 characters long.
///
/// `form` is the computation form of the same text.
#[must_use]
pub fn write(report: &Report, form: &Form) -> String {
    let mut page = Page::default();
    title_block(&mut page, report);
    rows::write(&mut page, report, form);
    closing::write(&mut page, report, form);
    cautions(&mut page);
    signatures(&mut page, report);
    page.finish()
}

fn title_block(page: &mut Page, report: &Report) {
    let sheet = &report.sheet;
    page.rule("=");
    page.paragraph("", sheet.title.as_deref().unwrap_or("Sheet without title"));
    page.rule("-");
    let entries = [
        ("revision", sheet.revision.as_deref()),
        ("date", sheet.date.as_deref()),
        ("prepared", sheet.prepared.as_deref()),
        ("checked", sheet.checked.as_deref()),
        ("basis", sheet.basis.as_deref()),
        ("digest", Some(report.short_digest())),
        ("engine", Some(report.engine)),
    ];
    for (word, text) in entries {
        if let Some(text) = text {
            page.paragraph(&padded(word, 10, false), text);
        }
    }
    for other in &report.sheets {
        let digest = other.digest.get(..16).unwrap_or(&other.digest);
        let text = format!("{}, digest {digest}", other.name);
        page.paragraph(&padded("rests on", 10, false), &text);
    }
    if shows_pounds(report) {
        page.line(POUND_IS_FORCE);
    }
    page.rule("=");
}

fn cautions(page: &mut Page) {
    page.heading("Cautions");
    for caution in CAUTIONS {
        page.paragraph("", caution);
    }
}

fn signatures(page: &mut Page, report: &Report) {
    page.blank();
    let boxes =
        ["prepared", "checked", "approved"].map(|word| format!("{word} {}", "_".repeat(26)));
    page.line(&boxes.join("   "));
    page.blank();
    page.rule("=");
    let ends = [
        format!("engine {}", report.engine),
        format!("digest {}", report.short_digest()),
    ];
    let gap = WIDTH.saturating_sub(ends.iter().map(|e| e.chars().count()).sum());
    page.line(&ends.join(&" ".repeat(gap)));
}

/// `point A, cg aft`; nothing for a single value.
pub(super) fn condition_text(condition: &Condition) -> String {
    let pairs = condition.0.iter();
    let pairs: Vec<String> = pairs
        .map(|(axis, label)| format!("{axis} {label}"))
        .collect();
    pairs.join(", ")
}

/// ` at point A, cg aft`; nothing for a single value.
pub(super) fn at_condition(condition: &Condition) -> String {
    if condition.0.is_empty() {
        return String::new();
    }
    format!(" at {}", condition_text(condition))
}

/// `1 condition`, `24 conditions`.
pub(super) fn counted(count: u64, what: &str) -> String {
    let plural = if count == 1 { "" } else { "s" };
    format!("{count} {what}{plural}")
}

/// The unit behind a blank; nothing for a pure number.
pub(super) fn behind(unit: Option<&str>) -> String {
    unit.map_or_else(String::new, |unit| format!(" {unit}"))
}

#[cfg(test)]
mod tests {
    use super::super::form::form;
    use super::super::sample::{TEXT, sample};
    use super::*;

    fn written() -> String {
        let sheet = sample();
        write(&sheet.report(), &form(TEXT, &sheet.tree, &sheet.program))
    }

    /// Whether some line holds these pieces in this order.
    fn has_line(text: &str, pieces: &[&str]) -> bool {
        text.lines().any(|line| {
            let mut rest = Some(line);
            for piece in pieces {
                rest = rest
                    .and_then(|r| r.split_once(piece))
                    .map(|(_, behind)| behind);
            }
            rest.is_some()
        })
    }

    #[test]
    fn the_form_shows_items_values_and_what_they_come_to() {
        let text = written();
        for pieces in [
            &["Osier; tail load"][..],
            &["lb is pound-force."],
            &["3 W", "lb", "560", "560.0", "weighing report;"],
            &["fwd", "aft"],
            &["15.00", "-"],
            &["point \\ cg", "fwd", "aft"],
            &["A", "-20.00", "-"],
            &["C", "700.0", "-"],
            &["6 slow", "P < W", "true"],
            &["8", "require P <= W", "NOT MET"],
            &["10", "freebody", "OPEN"],
            &["P over point: 4 conditions, 1 without value, 1 excluded"],
            &["largest", "700.0 lb at point C, cg fwd"],
            &["cg aft:"],
            &["no value"],
            &[
                "worst at point C, cg fwd: left 700.0 lb, right 560.0 lb, reserve -140.0 lb, margin -0.2000",
            ],
            &["\"Tail, all\": DOES NOT CLOSE"],
            &["force 0.25, axial 0, moment 0.50; farthest from closing at point C, cg fwd"],
            &["A structure is proved by test."],
            &["prepared ____", "checked ____", "approved ____"],
        ] {
            assert!(has_line(&text, pieces), "{pieces:?} in\n{text}");
        }
    }

    #[test]
    fn lines_fit_the_page() {
        let text = written();
        assert!(
            text.lines().all(|line| line.chars().count() <= WIDTH),
            "{text}"
        );
        assert!(text.lines().all(|line| line == line.trim_end()));
    }

    #[test]
    fn an_assumption_is_listed() {
        let mut sheet = sample();
        sheet.program.quantities[0].remark = Some("assumed: until weighed".to_owned());
        let text = write(&sheet.report(), &form(TEXT, &sheet.tree, &sheet.program));
        assert!(
            has_line(&text, &["3", "W: assumed: until weighed"]),
            "{text}"
        );
        assert!(!written().contains("Assumptions"));
    }
}
