//! The report as comma-separated values (RFC 4180): one row for each condition of each quantity.
//!
//! The columns are `symbol`, then one for each axis of the sheet in its order, headed by the axis, then `value` and
//! `unit`. Under an axis stands the label, or nothing where the quantity does not vary over it. The value is nothing
//! where there is none, `true` or `false` for a condition, else the text or the shortest decimal that gives the number
//! back. Rows end with CR LF.

use super::{Quantity, Report, ValueList, json};
use std::collections::BTreeMap;

/// Writes the values that the report holds; a quantity whose values were left out has no rows.
#[must_use]
pub fn write(report: &Report) -> String {
    let mut out = String::new();
    let axes = report.axes.iter().map(|axis| axis.name.as_str());
    let head = std::iter::once("symbol").chain(axes);
    record(&mut out, head.chain(["value", "unit"]));
    for quantity in &report.quantities {
        if let Some(values) = &quantity.values {
            rows(&mut out, report, quantity, values);
        }
    }
    out
}

fn rows(out: &mut String, report: &Report, quantity: &Quantity, values: &ValueList) {
    let axes = Axes::of(report, quantity);
    for condition in 0..values.len() {
        let labels = axes.labels(report, condition);
        let value = value_text(values, condition);
        let unit = quantity.unit.as_deref().unwrap_or("");
        let fields = std::iter::once(quantity.symbol.as_str()).chain(labels);
        record(out, fields.chain([value.as_str(), unit]));
    }
}

/// For each axis of the sheet, how far apart its labels stand in the values of a quantity; `None` where it lacks it.
struct Axes(Vec<Option<usize>>);

impl Axes {
    fn of(report: &Report, quantity: &Quantity) -> Self {
        let mut stride = 1;
        let mut strides: BTreeMap<&str, usize> = BTreeMap::new();
        for name in quantity.axes.iter().rev() {
            strides.insert(name, stride);
            let axis = report.axes.iter().find(|axis| axis.name == *name);
            stride *= axis.map_or(1, |axis| axis.labels.len().max(1));
        }
        let axes = report.axes.iter();
        Axes(
            axes.map(|axis| strides.get(axis.name.as_str()).copied())
                .collect(),
        )
    }

    fn labels<'a>(
        &'a self,
        report: &'a Report,
        condition: usize,
    ) -> impl Iterator<Item = &'a str> + 'a {
        let pairs = report.axes.iter().zip(&self.0);
        pairs.map(move |(axis, stride)| {
            let index = stride.map(|s| condition / s % axis.labels.len().max(1));
            let label = index.and_then(|i| axis.labels.get(i));
            label.map_or("", String::as_str)
        })
    }
}

fn value_text(values: &ValueList, condition: usize) -> String {
    match values {
        ValueList::Numbers(list) => {
            let value = list.get(condition).copied().flatten();
            value.map_or_else(String::new, json::plain_number)
        }
        ValueList::Conditions(list) => {
            let value = list.get(condition).copied().flatten();
            value.map_or_else(String::new, |v| v.to_string())
        }
        ValueList::Texts(list) => list.get(condition).cloned().flatten().unwrap_or_default(),
    }
}

fn record<'a>(out: &mut String, fields: impl Iterator<Item = &'a str>) {
    for (i, field) in fields.enumerate() {
        if i > 0 {
            out.push(',');
        }
        push_field(out, field);
    }
    out.push_str("\r\n");
}

fn push_field(out: &mut String, field: &str) {
    if !field.contains(['"', ',', '\r', '\n']) {
        out.push_str(field);
        return;
    }
    out.push('"');
    out.push_str(&field.replace('"', "\"\""));
    out.push('"');
}

#[cfg(test)]
mod tests {
    use super::super::sample::sample;
    use super::{push_field, write};

    /// RFC 4180, section 2, points 5 to 7.
    #[test]
    fn fields_are_quoted_where_they_must_be() {
        let cases = [
            ("plain", "plain"),
            ("with blank", "with blank"),
            ("", ""),
            ("a,b", "\"a,b\""),
            ("say \"so\"", "\"say \"\"so\"\"\""),
            ("two\nlines", "\"two\nlines\""),
        ];
        for (field, written) in cases {
            let mut out = String::new();
            push_field(&mut out, field);
            assert_eq!(out, written);
        }
    }

    #[test]
    fn each_condition_of_each_quantity_has_a_row() {
        let rows = [
            "symbol,point,cg,value,unit",
            "W,,,560,lb",
            "T,,fwd,15,degC",
            "T,,aft,,degC",
            "P,A,fwd,-20,lb",
            "P,A,aft,,lb",
            "P,C,fwd,700,lb",
            "P,C,aft,,lb",
            "slow,,,true,",
            "name,,,\"at \"\"\",",
            "",
        ];
        assert_eq!(write(&sample().report()), rows.join("\r\n"));
    }
}
