//! A record where one number is due.

use crate::diagnostics::draft::{Draft, Site, put_behind};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::listed;

pub(super) const ROW: Code = Code {
    code: "record-as-number",
    severity: Severity::Error,
    what: "Only the fields of a record can be calculated with.",
    why: "A record is several values of different kinds, and the formula has to say which it means.",
    example: Some("air = standard_atmosphere(0 m)\nr = 2*air\n"),
    fixed: Some("air = standard_atmosphere(0 m)\nr = 2*air.density\n"),
};

/// Most fields that are offered one by one.
const OFFERED_MOST: usize = 8;

pub(super) fn draft(site: &Site<'_>, record: &str, fields: &[String]) -> Draft {
    let has = listed(fields, "and");
    let message = format!("{record} is a record of several values; name one of its fields: {has}.");
    let offered = fields.iter().take(OFFERED_MOST);
    offered.fold(Draft::says(message), |draft, field| {
        draft.offers(
            format!("Write {record}.{field}"),
            put_behind(site.span, format!(".{field}")),
        )
    })
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn offers_the_fields() {
        check(
            "r = 2*air",
            "air",
            Fault::RecordAsNumber {
                record: "air".to_owned(),
                fields: names(&["pressure", "density"]),
            },
            "air is a record of several values; name one of its fields: pressure and density.",
            &[
                ("Write air.pressure", false, "r = 2*air.pressure"),
                ("Write air.density", false, "r = 2*air.density"),
            ],
        );
    }
}
