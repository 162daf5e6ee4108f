//! A unit that is also a symbol of the sheet.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "unit-or-symbol",
    severity: Severity::Advice,
    what: "A unit joined on by - or / that is also a symbol of the sheet is pointed out.",
    why: "12 lb/m is pounds per metre even where the sheet has a symbol m.",
    example: Some("m [kg] = 3\np = 12 lb/m\nr = m\n"),
    fixed: Some("m [kg] = 3\np = 12 lb / m\nr = m\n"),
};

pub(super) fn draft(site: &Site<'_>, name: &str, sign: char) -> Draft {
    let message = format!(
        "{name} behind “{sign}” is read as a unit and not as this sheet's symbol {name}; blanks round the sign make it the symbol."
    );
    let draft = Draft::says(message);
    match joint(site, name, sign) {
        Some(at) => draft.offers(
            format!("Read {name} as the symbol"),
            put(at, format!(" {sign} ")),
        ),
        None => draft,
    }
}

/// Where the sign before the name stands, inside the text at fault or directly before it.
fn joint(site: &Site<'_>, name: &str, sign: char) -> Option<Span> {
    let length = sign.len_utf8();
    if let Some(both) = site.find(&format!("{sign}{name}")) {
        let start = both.start as usize;
        return Some(Span::new(start, start + length));
    }
    let start = site.before().strip_suffix(sign)?.len();
    Some(Span::new(start, start + length))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn offers_the_symbol() {
        let message = "m behind “/” is read as a unit and not as this sheet's symbol m; blanks round the sign make it the symbol.";
        for part in ["m", "lb/m"] {
            let fault = Fault::UnitIsSymbol {
                name: "m".to_owned(),
                sign: '/',
            };
            check(
                "p = 12 lb/m",
                part,
                fault,
                message,
                &[("Read m as the symbol", false, "p = 12 lb / m")],
            );
        }
    }
}
