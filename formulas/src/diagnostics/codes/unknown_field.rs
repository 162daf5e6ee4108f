//! A field that a record does not have.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{listed, meant};

pub(super) const ROW: Code = Code {
    code: "unknown-field",
    severity: Severity::Error,
    what: "A name behind a point is one of the fields of the record before it.",
    why: "A field spelt wrong has no value.",
    example: Some("air = standard_atmosphere(0 m)\nr = air.densty\n"),
    fixed: Some("air = standard_atmosphere(0 m)\nr = air.density\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    record: &str,
    field: &str,
    fields: &[String],
    nearest: &Option<String>,
) -> Draft {
    let has = listed(fields, "and");
    let message = format!(
        "{record} has no field {field}; it has {has}.{}",
        meant(nearest.as_deref())
    );
    let draft = Draft::says(message);
    match (nearest, site.find(field)) {
        (Some(name), Some(at)) => draft.offers(format!("Write {record}.{name}"), put(at, name)),
        _ => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    fn field(nearest: Option<&str>) -> Fault {
        Fault::UnknownField {
            record: "air".to_owned(),
            field: "densty".to_owned(),
            fields: names(&["pressure", "density"]),
            nearest: nearest.map(str::to_owned),
        }
    }

    #[test]
    fn proposes_the_nearest() {
        let message = "air has no field densty; it has pressure and density. Did you mean density?";
        for part in ["densty", "air.densty"] {
            let fixes = [("Write air.density", false, "r = air.density")];
            check(
                "r = air.densty",
                part,
                field(Some("density")),
                message,
                &fixes,
            );
        }
    }

    #[test]
    fn lists_the_fields() {
        let message = "air has no field densty; it has pressure and density.";
        check("r = air.densty", "densty", field(None), message, &[]);
    }
}
