//! A field asked of something that has none.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "field-of-number",
    severity: Severity::Error,
    what: "Only a record, or another sheet, has something behind a point.",
    why: "The field meant belongs to another symbol, or the symbol is not what it was taken for.",
    example: Some("S [ft^2] = 142\na = S.area\n"),
    fixed: Some("S [ft^2] = 142\na = S\n"),
};

pub(super) fn draft(site: &Site<'_>, name: &str, field: &str) -> Draft {
    let draft = Draft::says(format!("{name} is no record and has no field {field}."));
    match site.find(&format!(".{field}")) {
        Some(at) => draft.offers(format!("Write {name}"), put(at, "")),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn offers_the_symbol_alone() {
        let fault = Fault::FieldOfNumber {
            name: "S".to_owned(),
            field: "area".to_owned(),
        };
        check(
            "a = S.area",
            "S.area",
            fault,
            "S is no record and has no field area.",
            &[("Write S", false, "a = S")],
        );
    }
}
