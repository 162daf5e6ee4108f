//! A text that the argument does not know.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{listed, meant, quoted};

pub(super) const ROW: Code = Code {
    code: "unknown-word",
    severity: Severity::Error,
    what: "An argument that chooses a rule, a category or a manner is given one of its words.",
    why: "A set of rules that is not coded gives no number, rather than a guess.",
    example: Some("f = pitch_rate_angle(3.8, 90 KTAS, 11 ft, \"loop\")\n"),
    fixed: Some("f = pitch_rate_angle(3.8, 90 KTAS, 11 ft, \"turn\")\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    function: &str,
    argument: &str,
    found: &str,
    words: &[String],
    nearest: &Option<String>,
) -> Draft {
    let known = listed(words, "or");
    let meant = meant(nearest.as_deref());
    let own = argument == "rule" && found == engine::envelope::Rule::Stated.word();
    let found = quoted(found);
    let draft = Draft::says(if own {
        format!(
            "{function} has no number for {found} factors: give them in lines of their own, or take {known}."
        )
    } else if argument == "rule" {
        format!(
            "The rule {found} is not coded in {function}: state the factors, or take {known}.{meant}"
        )
    } else {
        format!("The argument {argument} of {function} is to be {known}, and not {found}.{meant}")
    });
    match nearest {
        Some(near) => draft.offers(format!("Write {near}"), site.replace(in_quotes(site, near))),
        None => draft,
    }
}

/// Keeps the quotation marks where the place holds them.
fn in_quotes(site: &Site<'_>, text: &str) -> String {
    if site.typed().starts_with('"') {
        format!("\"{text}\"")
    } else {
        text.to_owned()
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    fn word(argument: &str, found: &str, words: &[&str], nearest: Option<&str>) -> Fault {
        Fault::UnknownWord {
            function: "pitch_rate_angle".to_owned(),
            argument: argument.to_owned(),
            found: found.to_owned(),
            words: names(words),
            nearest: nearest.map(str::to_owned),
        }
    }

    #[test]
    fn lists_the_words() {
        let text = "a = pitch_rate_angle(n, V, l, \"trun\")";
        check(
            text,
            "\"trun\"",
            word("maneuver", "trun", &["pull-up", "turn"], Some("turn")),
            "The argument maneuver of pitch_rate_angle is to be pull-up or turn, and not “trun”. Did you mean turn?",
            &[(
                "Write turn",
                false,
                "a = pitch_rate_angle(n, V, l, \"turn\")",
            )],
        );
    }

    #[test]
    fn a_rule_that_is_not_coded_says_so() {
        let message = "The rule “CS 99” is not coded in pitch_rate_angle: state the factors, or take CS-VLA or 14 CFR 23.";
        let fault = word("rule", "CS 99", &["CS-VLA", "14 CFR 23"], None);
        check("f = g(\"CS 99\")", "\"CS 99\"", fault, message, &[]);
        let message = "pitch_rate_angle has no number for “stated” factors: give them in lines of their own, or take CS-VLA.";
        let fault = word("rule", "stated", &["CS-VLA"], None);
        check("f = g(\"stated\")", "\"stated\"", fault, message, &[]);
    }
}
