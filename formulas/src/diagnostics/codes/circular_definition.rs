//! Symbols that rest on themselves.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "circular-definition",
    severity: Severity::Error,
    what: "No symbol rests on itself, neither directly nor by way of others.",
    why: "Such a line has no first value to start from; what is to be solved for is an unknown.",
    example: Some("x = y + 1\ny = x\n"),
    fixed: Some("x = 2\ny = x\n"),
};

pub(super) fn draft(chain: &[String]) -> Draft {
    Draft::says(spelt_out(chain))
}

/// The chain from its first name back to it, which need not be repeated at the end.
fn spelt_out(chain: &[String]) -> String {
    let Some((first, rest)) = chain.split_first() else {
        return "This line rests on itself.".to_owned();
    };
    let between = match rest.split_last() {
        Some((last, between)) if last == first => between,
        _ => rest,
    };
    let Some((second, others)) = between.split_first() else {
        return format!("{first} rests on itself.");
    };
    let others = others.iter().map(|name| format!(", which rests on {name}"));
    format!(
        "{first} rests on {second}{}, which rests on {first}.",
        others.collect::<String>()
    )
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn the_circle_is_spelt_out() {
        for (chain, message) in [
            (&["x", "y", "x"][..], "x rests on y, which rests on x."),
            (&["x", "y"][..], "x rests on y, which rests on x."),
            (
                &["x", "y", "z", "x"][..],
                "x rests on y, which rests on z, which rests on x.",
            ),
            (&["x"][..], "x rests on itself."),
            (&["x", "x"][..], "x rests on itself."),
        ] {
            check(
                "x = y + 1",
                "x",
                Fault::Circular {
                    chain: names(chain),
                },
                message,
                &[],
            );
        }
    }
}
