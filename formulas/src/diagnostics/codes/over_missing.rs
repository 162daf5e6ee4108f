//! A method along an axis that does not say which.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::listed;
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "over-missing",
    severity: Severity::Error,
    what: "A method that consumes an axis names it behind over, unless only one is possible.",
    why: "A sum over the flight conditions and one over the stations are two different things.",
    example: Some(
        "vary a: p | q\nvary b: r | s\nx by a = 1 | 2\ny by b = 3 | 4\nz = difference(x*y)\n",
    ),
    fixed: Some(
        "vary a: p | q\nvary b: r | s\nx by a = 1 | 2\ny by b = 3 | 4\nz = difference(x*y over a)\n",
    ),
};

pub(super) fn draft(site: &Site<'_>, function: &str, axes: &[String]) -> Draft {
    let message = format!(
        "{function} could run along {}; name the axis behind over.",
        listed(axes, "or")
    );
    let draft = Draft::says(message);
    let Some(open) = site.typed().strip_suffix(')') else {
        return draft;
    };
    let close = site.span.start as usize + open.trim_end().len();
    axes.iter().fold(draft, |draft, axis| {
        let over = put(Span::new(close, close), format!(" over {axis}"));
        draft.offers(format!("Add over {axis}"), over)
    })
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn offers_each_axis() {
        let fault = Fault::OverMissing {
            function: "difference".to_owned(),
            axes: names(&["a", "b"]),
        };
        check(
            "z = difference(x*y)",
            "difference(x*y)",
            fault,
            "difference could run along a or b; name the axis behind over.",
            &[
                ("Add over a", false, "z = difference(x*y over a)"),
                ("Add over b", false, "z = difference(x*y over b)"),
            ],
        );
    }

    #[test]
    fn offers_nothing_where_the_end_is_unknown() {
        let fault = Fault::OverMissing {
            function: "difference".to_owned(),
            axes: names(&["a", "b"]),
        };
        let message = "difference could run along a or b; name the axis behind over.";
        check("z = difference(x*y)", "difference", fault, message, &[]);
    }
}
