//! A figure that leaves an axis open.

use crate::diagnostics::draft::{Draft, Site, put_behind};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{listed, short};
use crate::problem::Mend;
use crate::syntax::StatementKind;

pub(super) const ROW: Code = Code {
    code: "figure-axes",
    severity: Severity::Error,
    what: "Every axis of what a figure shows is its x, is named behind each, or is picked.",
    why: "A curve needs to know for which case it is drawn.",
    example: Some(
        "vary x [m]: 0 to 3 step 1\nvary cg: fwd | aft\nd [m] by cg = 1 | 2\ny = x*d\nfigure \"Load\": y against x\n",
    ),
    fixed: Some(
        "vary x [m]: 0 to 3 step 1\nvary cg: fwd | aft\nd [m] by cg = 1 | 2\ny = x*d\nfigure \"Load\": y against x each cg\n",
    ),
};

pub(super) fn draft(site: &Site<'_>, symbol: &str, axes: &[String]) -> Draft {
    let open = listed(axes, "and");
    let message = format!(
        "{} also varies over {open}; name it behind each, or pick one of its labels.",
        short(symbol)
    );
    let draft = Draft::says(if axes.len() == 1 {
        message
    } else {
        format!(
            "{} also varies over {open}; name them behind each, or pick one of their labels.",
            short(symbol)
        )
    });
    match named_behind_each(site, axes) {
        Some(mend) => draft.offers(
            format!("Draw a curve for each {}", listed(axes, "and")),
            mend,
        ),
        None => draft,
    }
}

/// Names the axes behind those that the figure has behind `each`.
fn named_behind_each(site: &Site<'_>, axes: &[String]) -> Option<Mend> {
    let StatementKind::Figure { against, each, .. } = &site.statement?.kind else {
        return None;
    };
    let axes = axes.join(", ");
    match each.last() {
        Some(last) => Some(put_behind(last.span, format!(", {axes}"))),
        // The span of an expression leaves its outer brackets off.
        None if site
            .text
            .get(against.span.end as usize..)?
            .trim_start()
            .starts_with(')') =>
        {
            None
        }
        None => Some(put_behind(against.span, format!(" each {axes}"))),
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check_in, names, place, sheet};
    use crate::problem::Fault;
    use crate::syntax::StatementKind;

    use crate::syntax::{Expr, ExprKind, Name, Words};

    fn offers(text: &str, each: &[&str], axes: &[&str], message: &str, title: &str, mended: &str) {
        let name = |part: &&str| Name {
            text: (*part).to_owned(),
            span: place(text, part),
        };
        let figure = StatementKind::Figure {
            name: Words::default(),
            curves: vec![],
            against: Expr {
                span: place(text, "x"),
                kind: ExprKind::Name("x".to_owned()),
            },
            each: each.iter().map(name).collect(),
            closed: false,
        };
        let fault = Fault::FigureAxes {
            symbol: "P".to_owned(),
            axes: names(axes),
        };
        check_in(
            &sheet(text, figure),
            text,
            place(text, "P"),
            fault,
            message,
            &[(title, false, mended)],
        );
    }

    #[test]
    fn offers_to_name_the_axes() {
        let message = "P also varies over cg; name it behind each, or pick one of its labels.";
        let title = "Draw a curve for each cg";
        offers(
            "figure \"a\": P against x",
            &[],
            &["cg"],
            message,
            title,
            "figure \"a\": P against x each cg",
        );
        let message = "P also varies over cg and loading; name them behind each, or pick one of their labels.";
        offers(
            "figure \"a\": P against x each flap",
            &["flap"],
            &["cg", "loading"],
            message,
            "Draw a curve for each cg and loading",
            "figure \"a\": P against x each flap, cg, loading",
        );
    }
}
