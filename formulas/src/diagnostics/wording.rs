//! Phrases that several findings share.

pub(super) use crate::numbers::behind_number;
use crate::problem::{Conditions, Operand};
use engine::quantity::{Dimension, SpeedKind};

/// Longest piece of typed text that a sentence quotes whole.
const QUOTED_MOST: usize = 48;

/// Most names that a sentence lists.
const LISTED_MOST: usize = 12;

/// `a force`, `an area`.
pub(super) fn with_article(noun: &str) -> String {
    let vowel = noun.starts_with(['a', 'e', 'i', 'o', 'A', 'E', 'I', 'O']);
    format!("{} {noun}", if vowel { "an" } else { "a" })
}

/// `a force`; `a quantity in kg.m^3` where the dimension has no name.
pub(super) fn a_dimension(dimension: Dimension) -> String {
    match dimension.name() {
        Some(name) => with_article(name),
        None => format!("a quantity in {}", dimension.symbols()),
    }
}

/// What an operand is, to stand behind it: `is an area (ft^2)`, `is in ft^5`.
pub(super) fn is_what(operand: &Operand) -> String {
    match operand.dimension.name() {
        Some(name) => format!("is {}{}", with_article(name), in_unit(operand, " (", ")")),
        None => format!("is in {}", unit_or_base(operand)),
    }
}

/// An operand with what it is behind it: `S (an area, ft^2)`, `S^2*c (in ft^5)`.
pub(super) fn with_what(operand: &Operand) -> String {
    let what = match operand.dimension.name() {
        Some(name) => format!("{}{}", with_article(name), in_unit(operand, ", ", "")),
        None => format!("in {}", unit_or_base(operand)),
    };
    format!("{} ({what})", short(&operand.text))
}

fn in_unit(operand: &Operand, before: &str, behind: &str) -> String {
    match &operand.unit {
        Some(unit) => format!("{before}{unit}{behind}"),
        None => String::new(),
    }
}

fn unit_or_base(operand: &Operand) -> String {
    match &operand.unit {
        Some(unit) => unit.clone(),
        None => operand.dimension.symbols(),
    }
}

/// Typed text on one line, cut where it is long.
pub(super) fn short(text: &str) -> String {
    let line = text.split_whitespace().collect::<Vec<_>>().join(" ");
    if line.chars().count() <= QUOTED_MOST {
        return line;
    }
    let cut: String = line.chars().take(QUOTED_MOST - 1).collect();
    format!("{}…", cut.trim_end())
}

/// Typed text in quotation marks, for signs that would be lost among words.
pub(super) fn quoted(text: &str) -> String {
    format!("“{}”", short(text))
}

/// `light, gross and heavy`; long lists end in how many more there are.
pub(super) fn listed(names: &[String], joint: &str) -> String {
    let shown = if names.len() > LISTED_MOST {
        LISTED_MOST - 1
    } else {
        names.len()
    };
    let (mut words, rest): (Vec<String>, _) = match names.split_at_checked(shown) {
        Some((first, rest)) => (first.iter().map(|n| short(n)).collect(), rest),
        None => (Vec::new(), names),
    };
    if !rest.is_empty() {
        words.push(format!("{} more", grouped(rest.len() as u64)));
    }
    match words.split_last() {
        Some((last, [])) => last.clone(),
        Some((last, first)) => format!("{} {joint} {last}", first.join(", ")),
        None => String::new(),
    }
}

/// `1 value`, `2 values`, `2 entries`.
pub(super) fn counted(count: u64, noun: &str) -> String {
    let number = grouped(count);
    match noun.strip_suffix("ry") {
        _ if count == 1 => format!("{number} {noun}"),
        Some(stem) => format!("{number} {stem}ries"),
        None => format!("{number} {noun}s"),
    }
}

/// A whole number with its thousands set off by commas: `20,000`.
pub(super) fn grouped(count: u64) -> String {
    let digits = count.to_string();
    let mut out = String::new();
    for (i, digit) in digits.chars().enumerate() {
        if i > 0 && (digits.len() - i).is_multiple_of(3) {
            out.push(',');
        }
        out.push(digit);
    }
    out
}

/// A sentence with its first letter large, for phrases that may open one; names keep theirs.
pub(super) fn capital(phrase: &str) -> String {
    for (small, large) in [("the ", "The "), ("what ", "What ")] {
        if let Some(rest) = phrase.strip_prefix(small) {
            return format!("{large}{rest}");
        }
    }
    phrase.to_owned()
}

/// What two operands of a sign cannot be: `cannot be added`.
pub(super) fn cannot(sign: &str) -> String {
    match sign {
        "+" => "cannot be added".to_owned(),
        "-" | "−" => "cannot be subtracted".to_owned(),
        "<" | "<=" | ">" | ">=" | "=" | "!=" | "≤" | "≥" | "≠" => {
            "cannot be compared".to_owned()
        }
        "if" => "cannot be the branches of one if".to_owned(),
        "+/-" | "±" => "cannot be a value and its tolerance".to_owned(),
        other => format!("cannot stand side by side in {other}"),
    }
}

/// What turns one kind of airspeed into another, to stand before `it`.
pub(super) fn conversion(from: SpeedKind, to: SpeedKind) -> &'static str {
    use SpeedKind::{Calibrated, Equivalent, True};
    match (from, to) {
        (Equivalent, True) => "tas_of_eas converts",
        (True, Equivalent) => "eas_of_tas converts",
        (Calibrated, Equivalent) => "eas_of_cas converts",
        (Equivalent, Calibrated) => "cas_of_eas converts",
        (Calibrated, True) => "eas_of_cas and then tas_of_eas convert",
        (True, Calibrated) => "eas_of_tas and then cas_of_eas convert",
        _ => "nothing need convert",
    }
}

/// A limit or a count that may be too large for a whole number type.
pub(super) fn grouped_f64(count: f64) -> String {
    // Above 2^53 the last digits would be invented; such counts come only from products of many axes.
    if (0.0..9e15).contains(&count) {
        grouped(count as u64)
    } else {
        format!("{count:.1e}")
    }
}

/// `Did you mean P_t?` behind a sentence, or nothing.
pub(super) fn meant(nearest: Option<&str>) -> String {
    match nearest {
        Some(name) => format!(" Did you mean {name}?"),
        None => String::new(),
    }
}

/// ` in 24 conditions`, or nothing where the value has no axes.
pub(super) fn in_conditions(conditions: &Conditions) -> String {
    if conditions.first.iter().all(Vec::is_empty) && conditions.count <= 1 {
        String::new()
    } else {
        format!(" in {}", counted(conditions.count, "condition"))
    }
}

/// ` (point A, cg aft; point B, cg aft; …)`: the first conditions, or nothing where there are no axes.
pub(super) fn first_conditions(conditions: &Conditions) -> String {
    let named: Vec<String> = conditions
        .first
        .iter()
        .filter(|pairs| !pairs.is_empty())
        .map(|pairs| {
            let labels = pairs
                .iter()
                .map(|(axis, label)| format!("{axis} {}", short(label)));
            labels.collect::<Vec<_>>().join(", ")
        })
        .collect();
    if named.is_empty() {
        return String::new();
    }
    let more = if conditions.count > named.len() as u64 {
        "; …"
    } else {
        ""
    };
    format!(" ({}{more})", named.join("; "))
}

/// Whether a text is one operand before every sign: a symbol, a number with its unit, a call, or brackets all round.
pub(super) fn is_one_operand(text: &str) -> bool {
    let outside = outside_brackets(text);
    let mut words = outside.split_whitespace();
    let first = words.next().unwrap_or("");
    let number = first.starts_with(|c: char| c.is_ascii_digit() || c == '.');
    let unit = words.next();
    let signs: &[char] = if number { &[] } else { &['/', '-'] };
    words.next().is_none()
        && (number || unit.is_none())
        && !first.contains(['/', '-'])
        && !outside.contains(['+', '*', '×', '÷', '−', '<', '>', '=', '≤', '≥', '≠'])
        && !outside.contains(signs)
}

/// A text with everything inside brackets, and these, left out.
fn outside_brackets(text: &str) -> String {
    let mut depth = 0_i32;
    let mut outside = String::new();
    for c in text.chars() {
        depth += i32::from(matches!(c, '(' | '['));
        if depth == 0 {
            outside.push(c);
        }
        depth -= i32::from(matches!(c, ')' | ']'));
    }
    outside
}

/// A text in brackets unless it is one operand.
pub(super) fn bracketed(text: &str) -> String {
    if is_one_operand(text) {
        text.to_owned()
    } else {
        format!("({text})")
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lists_read_like_sentences() {
        let names = |n: usize| (1..=n).map(|i| format!("a{i}")).collect::<Vec<_>>();
        assert_eq!(listed(&names(0), "and"), "");
        assert_eq!(listed(&names(1), "and"), "a1");
        assert_eq!(listed(&names(2), "or"), "a1 or a2");
        assert_eq!(listed(&names(3), "and"), "a1, a2 and a3");
        assert!(listed(&names(40), "and").ends_with("a11 and 29 more"));
    }

    #[test]
    fn thousands_are_set_off() {
        for (count, text) in [(0, "0"), (999, "999"), (1000, "1,000"), (20_000, "20,000")] {
            assert_eq!(grouped(count), text);
        }
        assert_eq!(grouped_f64(2e10), "20,000,000,000");
        assert_eq!(grouped_f64(1e30), "1.0e30");
    }

    #[test]
    fn counts_agree_with_their_nouns() {
        assert_eq!(counted(1, "entry"), "1 entry");
        assert_eq!(counted(2, "entry"), "2 entries");
        assert_eq!(counted(1200, "condition"), "1,200 conditions");
    }

    #[test]
    fn units_are_typed_behind_numbers_where_they_may() {
        for (unit, typed) in [("ft", " ft"), ("1/deg", " /deg"), ("kt EAS", "*[kt EAS]")] {
            assert_eq!(behind_number(unit), typed);
        }
    }

    #[test]
    fn long_text_is_cut() {
        assert_eq!(short("a\n  +  b"), "a + b");
        assert_eq!(short(&"x".repeat(60)).chars().count(), QUOTED_MOST);
    }

    #[test]
    fn operands_that_need_brackets_are_told_from_others() {
        for one in [
            "S",
            "600 kg",
            "4.6",
            "0.105 /deg",
            "f(a + b)",
            "(a + b)",
            "air.density",
            "[ft]",
            "1 kg/m^3",
        ] {
            assert!(is_one_operand(one), "{one}");
        }
        for several in [
            "a + b",
            "a*b",
            "-a",
            "a/b",
            "a - b",
            "if a then b else c",
            "2 kg*n",
            "x at (p: 1)",
        ] {
            assert!(!is_one_operand(several), "{several}");
        }
    }
}
