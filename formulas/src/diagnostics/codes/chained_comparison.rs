//! A comparison with three sides.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;
use crate::problem::Mend;

pub(super) const ROW: Code = Code {
    code: "chained-comparison",
    severity: Severity::Error,
    what: "A comparison has two sides.",
    why: "Joined by and, it says which two are compared, and each part can be judged and ranked by itself.",
    example: Some("n = 2\nrequire 1 < n < 3\n"),
    fixed: Some("n = 2\nrequire 1 < n and n < 3\n"),
};

pub(super) fn draft(site: &Site<'_>, mend: &Option<Mend>) -> Draft {
    let message = "A comparison has two sides";
    let Some(mend) = mend else {
        return Draft::says(format!("{message}; join several by and."));
    };
    let mend = held_together(site, mend);
    let draft = Draft::says(match site.mended(&mend) {
        Some(mended) => format!("{message}; write {}.", short(&mended)),
        None => format!("{message}; join several by and."),
    });
    draft.mends("Join two comparisons by and", mend)
}

/// A `not` before the chain would take the first comparison alone.
fn held_together(site: &Site<'_>, mend: &Mend) -> Mend {
    let negated = site.before().trim_end().ends_with("not");
    if negated && mend.span == site.span {
        put(mend.span, format!("({})", mend.text))
    } else {
        mend.clone()
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, place};
    use crate::problem::{Fault, Mend};

    const TEXT: &str = "require 1 < n < 3";

    #[test]
    fn two_comparisons_are_joined() {
        let mend = Mend {
            span: place(TEXT, "n"),
            text: "n and n".to_owned(),
        };
        check(
            TEXT,
            "1 < n < 3",
            Fault::ChainedComparison { mend: Some(mend) },
            "A comparison has two sides; write 1 < n and n < 3.",
            &[(
                "Join two comparisons by and",
                true,
                "require 1 < n and n < 3",
            )],
        );
    }

    #[test]
    fn a_not_keeps_hold_of_both() {
        let text = "require not 1 < n < 3";
        let mend = Mend {
            span: place(text, "1 < n < 3"),
            text: "1 < n and n < 3".to_owned(),
        };
        check(
            text,
            "1 < n < 3",
            Fault::ChainedComparison { mend: Some(mend) },
            "A comparison has two sides; write (1 < n and n < 3).",
            &[(
                "Join two comparisons by and",
                true,
                "require not (1 < n and n < 3)",
            )],
        );
    }

    #[test]
    fn does_without_a_mend() {
        let message = "A comparison has two sides; join several by and.";
        check(
            TEXT,
            "<",
            Fault::ChainedComparison { mend: None },
            message,
            &[],
        );
    }
}
