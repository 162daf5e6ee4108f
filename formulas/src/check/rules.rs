//! Sets of rules: a sheet takes its numbers from one, the one that its `basis` line names.

use super::{Checker, Typed};
use crate::names::located;
use crate::problem::Fault;
use crate::program::Op;
use crate::span::Span;
use crate::syntax::{StatementKind, TitleWord};
use engine::envelope::Rule;

/// How a `basis` line may name a set of rules: letters and digits only, `PART` left out.
const NAMES: &[(&str, Rule)] = &[
    ("14CFR23", Rule::Part23),
    ("FAR23", Rule::Part23),
    ("CSVLA", Rule::CsVla),
    ("JARVLA", Rule::CsVla),
    ("F2245", Rule::F2245),
    ("CS22", Rule::Cs22),
    ("JAR22", Rule::Cs22),
];

/// A set of rules asked for by a call.
pub(crate) struct RuleAsked {
    rule: Rule,
    statement: usize,
    span: Span,
}

/// The sets of rules that a text names. A number that goes on is another one: 14 CFR 230 is not 14 CFR 23.
fn named_in(text: &str) -> Vec<Rule> {
    let plain: String = text
        .to_uppercase()
        .chars()
        .filter(|c| c.is_alphanumeric() || matches!(c, '.' | ',' | ';'))
        .collect();
    let plain = plain.replace("PART", "");
    // Paragraph or edition may follow (CS-VLA 331, F2245-16c), but the number of a part goes on only behind a point.
    let names = |name: &str| {
        let mut places = plain.match_indices(name);
        places.any(|(at, _)| {
            let rest = plain.get(at + name.len()..).unwrap_or("");
            let part = name.ends_with("23") || name.ends_with("22");
            !part || !rest.starts_with(|c: char| c.is_ascii_digit())
        })
    };
    NAMES
        .iter()
        .filter(|(name, _)| names(name))
        .map(|(_, rule)| *rule)
        .collect()
}

impl Checker<'_> {
    /// The text of a value that is the same in every condition.
    pub(crate) fn fixed_text(&self, typed: &Typed) -> Option<&str> {
        let mut node = typed.node;
        while let Op::Quantity(id) = self.program.nodes.get(node.0 as usize)?.op {
            node = self.program.quantities.get(id.0 as usize)?.node?;
        }
        let at = self.constant_of(node)?;
        self.program.texts.get(at as usize).map(String::as_str)
    }

    /// Remembers which set of rules a call asks for. Stated factors are of no set.
    pub(crate) fn note_rule(&mut self, word: &str, span: Span) {
        if let Some(rule) = Rule::of_word(word).filter(|rule| *rule != Rule::Stated) {
            let statement = self.statement;
            self.rules_asked.push(RuleAsked {
                rule,
                statement,
                span,
            });
        }
    }

    /// Advice where a sheet takes from several sets of rules, or from one that its `basis` line does not name.
    pub(super) fn advise_rules(&mut self) {
        self.rules_asked
            .sort_by_key(|a| (a.statement, a.span.start));
        let mut firsts: Vec<&RuleAsked> = Vec::new();
        for asked in &self.rules_asked {
            if firsts.iter().all(|first| first.rule != asked.rule) {
                firsts.push(asked);
            }
        }
        let basis = self.tree.statements.iter().find_map(|s| match &s.kind {
            StatementKind::Title {
                word: TitleWord::Basis,
                text,
            } => Some(text.text.trim()),
            _ => None,
        });
        let named = basis.map(named_in);
        let foreign =
            |asked: &&&RuleAsked| named.as_ref().is_some_and(|n| !n.contains(&asked.rule));
        let place = firsts.iter().find(foreign).or(firsts.get(1));
        if let Some(place) = place {
            let rules = firsts.iter().map(|a| a.rule.word().to_string()).collect();
            let basis = basis.filter(|_| foreign(&place)).map(str::to_string);
            let fault = Fault::RulesMixed { rules, basis };
            self.problems
                .push(located(place.statement, place.span, fault));
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_basis_line_may_name_a_set_in_several_ways() {
        for (text, rules) in [
            ("CS-VLA 331, 421", &[Rule::CsVla][..]),
            ("14 CFR 23.423, amendment 62", &[Rule::Part23]),
            ("14 CFR Part 23 and F2245-16c", &[Rule::Part23, Rule::F2245]),
            ("FAR 23", &[Rule::Part23]),
            ("JAR-22, AMC 22.423", &[Rule::Cs22]),
            ("14 CFR 103", &[]),
            ("14 CFR 230", &[]),
            ("stated factors", &[]),
        ] {
            assert_eq!(named_in(text), rules, "{text}");
        }
    }
}
