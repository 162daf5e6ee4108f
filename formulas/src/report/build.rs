//! Builds the report out of the checked program and its values.

use super::convert::{Scale, condition, extreme};
use super::figure::figures;
use super::requirement::{freebodies, requirements};
use super::sensitivity;
use super::{
    Axis, FORMAT, Figure, Freebody, Governing, GoverningGroup, OtherSheet, Quantity, QuantityKind,
    Report, Spread, TitleBlock, ValueList, WRITTEN_MOST,
};
use crate::axes::{AxisId, Shape};
use crate::diagnostics::Finding;
use crate::program::{self, Kind, Program};
use crate::syntax::{StatementKind, TitleWord, Tree};
use crate::values::{GoverningValues, QuantityValues, Summary, Values, is_excluded};
use sha2::{Digest, Sha256};

/// What a report is built from.
#[derive(Clone, Debug)]
pub struct Input<'a> {
    /// The text of the sheet.
    pub text: &'a str,
    /// Its tree.
    pub tree: &'a Tree,
    /// What was checked.
    pub program: &'a Program,
    /// What was worked out.
    pub values: &'a Values,
    /// The names and texts of the other sheets that it rests on.
    pub others: Vec<(&'a str, &'a str)>,
    /// What is to be said about it.
    pub findings: Vec<Finding>,
    /// Symbols whose values are written however many there are; a record stands for all its fields.
    pub asked: &'a [String],
    /// Whether figures and free bodies are drawn; where not, figures are left out altogether.
    pub drawn: bool,
}

/// Builds the report.
#[must_use]
pub fn build(input: &Input) -> Report {
    let Input {
        tree,
        program,
        values,
        ..
    } = *input;
    Report {
        format: FORMAT,
        engine: env!("CARGO_PKG_VERSION"),
        digest: digest(input.text),
        sheet: title_block(tree),
        sheets: input.others.iter().map(other_sheet).collect(),
        axes: program.axes.iter().filter(|a| a.listed).map(axis).collect(),
        quantities: quantities(input),
        governing: governing(input.tree, program, values),
        requirements: requirements(tree, program, values),
        freebodies: freebodies(tree, program, values, input.drawn),
        figures: if input.drawn {
            figures(tree, program, values)
        } else {
            Vec::new()
        },
        findings: input.findings.clone(),
        digits: match program.digits {
            digits @ 1..=15 => digits,
            _ => crate::numbers::DIGITS,
        },
    }
}

/// Figures and free bodies alone, all drawn.
#[must_use]
pub fn drawings(tree: &Tree, program: &Program, values: &Values) -> (Vec<Figure>, Vec<Freebody>) {
    (
        figures(tree, program, values),
        freebodies(tree, program, values, true),
    )
}

/// SHA-256 of the text, in lower-case hexadecimal digits.
#[must_use]
pub(super) fn digest(text: &str) -> String {
    let hash = Sha256::digest(text.as_bytes());
    hash.iter().map(|byte| format!("{byte:02x}")).collect()
}

fn other_sheet((name, text): &(&str, &str)) -> OtherSheet {
    OtherSheet {
        name: (*name).to_string(),
        digest: digest(text),
    }
}

/// The lines of the title block; of a line given twice the first stands.
fn title_block(tree: &Tree) -> TitleBlock {
    let mut block = TitleBlock::default();
    for statement in &tree.statements {
        if let StatementKind::Title { word, text } = &statement.kind {
            let place = place_of(&mut block, *word);
            if place.is_none() {
                *place = Some(text.text.clone());
            }
        }
    }
    block
}

fn place_of(block: &mut TitleBlock, word: TitleWord) -> &mut Option<String> {
    match word {
        TitleWord::Title => &mut block.title,
        TitleWord::Revision => &mut block.revision,
        TitleWord::Date => &mut block.date,
        TitleWord::Prepared => &mut block.prepared,
        TitleWord::Checked => &mut block.checked,
        TitleWord::Basis => &mut block.basis,
        TitleWord::Digits => &mut block.digits,
        TitleWord::Units => &mut block.units,
        TitleWord::Sources => &mut block.sources,
    }
}

fn axis(axis: &program::Axis) -> Axis {
    // A temperature scale stands at an axis only for absolute temperatures, as at the sides of a comparison.
    let scale = Scale::of_sides(axis.unit.as_ref());
    let number = |value: &f64| scale.number(*value).unwrap_or(0.0);
    Axis {
        name: axis.name.clone(),
        labels: axis.labels.clone(),
        unit: axis.unit.as_ref().map(|u| u.text.to_string()),
        values: axis.values.as_ref().map(|v| v.iter().map(number).collect()),
    }
}

fn quantities(input: &Input) -> Vec<Quantity> {
    let unknown = QuantityValues::default();
    let program = input.program;
    let pairs = program.quantities.iter().enumerate();
    pairs
        .filter(|(_, line)| line.listed)
        .filter_map(|(i, line)| {
            let found = input.values.quantities.get(i).unwrap_or(&unknown);
            quantity(program, input.asked, line, found)
        })
        .collect()
}

/// One quantity by itself, with its values however many they are, where its column was kept.
pub(crate) fn quantity_named(program: &Program, values: &Values, symbol: &str) -> Option<Quantity> {
    let mut lines = program.quantities.iter().zip(&values.quantities);
    let (line, found) = lines.find(|(line, _)| line.listed && line.symbol == symbol)?;
    quantity(program, &[symbol.to_owned()], line, found)
}

/// A record itself is none: its fields are.
fn quantity(
    program: &Program,
    asked: &[String],
    line: &program::Quantity,
    found: &QuantityValues,
) -> Option<Quantity> {
    let kind = match line.kind {
        Kind::Number(_) => QuantityKind::Number,
        Kind::Condition => QuantityKind::Condition,
        Kind::Text => QuantityKind::Text,
        Kind::Record(_) => return None,
    };
    let scale = Scale::of(line.unit.as_ref(), line.kind);
    let summary = summary_of(found);
    let number = kind == QuantityKind::Number;
    let end = |at| extreme(&program.axes, &found.shape, scale, at).filter(|_| number);
    let written = is_written(asked, &line.symbol, found.shape.conditions());
    Some(Quantity {
        symbol: line.symbol.clone(),
        line: line.line,
        kind,
        unit: line.unit.as_ref().map(|u| u.text.to_string()),
        axes: axis_names(program, &found.shape),
        conditions: found.shape.conditions(),
        without_value: summary.without_value,
        excluded: summary.excluded,
        values: written
            .then(|| value_list(program, kind, scale, found))
            .flatten(),
        largest: end(summary.largest),
        smallest: end(summary.smallest),
        spread: written
            .then(|| spread(scale.of_differences(), found))
            .flatten(),
        input: line.input,
        remark: line.remark.clone(),
        part: line.part.clone(),
    })
}

/// Of a line that failed no condition has a value.
fn summary_of(found: &QuantityValues) -> Summary {
    if found.known {
        return found.summary;
    }
    Summary {
        without_value: found.shape.conditions() as u64,
        ..Summary::default()
    }
}

fn is_written(asked: &[String], symbol: &str, conditions: usize) -> bool {
    let record = symbol.rsplit_once('.').map(|(record, _)| record);
    conditions <= WRITTEN_MOST
        || asked
            .iter()
            .any(|a| a == symbol || Some(a.as_str()) == record)
}

fn value_list(
    program: &Program,
    kind: QuantityKind,
    scale: Scale,
    found: &QuantityValues,
) -> Option<ValueList> {
    let missing;
    let values = match &found.column {
        Some(column) if found.known => &column.values,
        // A column that was too large to keep is not the same as one without values.
        _ if found.known => return None,
        _ => {
            missing = vec![crate::values::NONE; found.shape.conditions()];
            &missing
        }
    };
    let text = |value: &f64| value_of_text(program, *value);
    Some(match kind {
        QuantityKind::Number => {
            ValueList::Numbers(values.iter().map(|v| scale.number(*v)).collect())
        }
        QuantityKind::Condition => {
            ValueList::Conditions(values.iter().map(|v| truth(*v)).collect())
        }
        QuantityKind::Text => ValueList::Texts(values.iter().map(text).collect()),
    })
}

fn truth(value: f64) -> Option<bool> {
    (!value.is_nan()).then_some(value != 0.0)
}

pub(super) fn value_of_text(program: &Program, value: f64) -> Option<String> {
    if value.is_nan() || is_excluded(value) {
        return None;
    }
    program.texts.get(value as usize).cloned()
}

fn spread(scale: Scale, found: &QuantityValues) -> Option<Spread> {
    let list = |values: &Vec<f64>| values.iter().map(|v| scale.number(*v)).collect();
    Some(Spread {
        worst: list(found.worst.as_ref()?),
        rss: list(found.rss.as_ref()?),
    })
}

fn axis_name(program: &Program, axis: AxisId) -> Option<String> {
    Some(program.axes.get(axis.0 as usize)?.name.clone())
}

fn axis_names(program: &Program, shape: &Shape) -> Vec<String> {
    let names = shape.axes.iter();
    names.filter_map(|a| axis_name(program, *a)).collect()
}

fn governing(tree: &Tree, program: &Program, values: &Values) -> Vec<Governing> {
    let unknown = (GoverningValues::default(), QuantityValues::default());
    let pairs = program.governing.iter().enumerate();
    pairs
        .filter_map(|(i, line)| {
            let index = line.quantity.0 as usize;
            let quantity = program.quantities.get(index)?;
            let found = values.governing.get(i).unwrap_or(&unknown.0);
            let column = values.quantities.get(index).unwrap_or(&unknown.1);
            let at = tree.statements.get(line.statement).map_or(0, |s| s.line);
            Some(governing_one(program, (line, at), quantity, found, column))
        })
        .collect()
}

fn governing_one(
    program: &Program,
    (line, at): (&program::Governing, u32),
    quantity: &program::Quantity,
    found: &GoverningValues,
    column: &QuantityValues,
) -> Governing {
    let shape = &column.shape;
    let scale = Scale::of(quantity.unit.as_ref(), quantity.kind);
    let end = |at| extreme(&program.axes, shape, scale, at);
    let over = line.over.common(quantity.axes);
    let all = if column.known {
        found.all
    } else {
        summary_of(column)
    };
    let groups = found.groups.iter().enumerate();
    Governing {
        symbol: quantity.symbol.clone(),
        line: at,
        unit: quantity.unit.as_ref().map(|u| u.text.to_string()),
        over: over.iter().filter_map(|a| axis_name(program, a)).collect(),
        conditions: shape.conditions(),
        without_value: all.without_value,
        excluded: all.excluded,
        largest: end(all.largest),
        smallest: end(all.smallest),
        groups: groups
            .map(|(i, group)| GoverningGroup {
                condition: condition(&program.axes, &found.group_shape, i),
                largest: end(group.largest),
                smallest: end(group.smallest),
            })
            .collect(),
        sensitivity: sensitivity::governing(program, scale.of_differences(), found),
        corners: sensitivity::corners(program, shape, scale, found),
        others: sensitivity::others(program, shape, found),
    }
}

#[cfg(test)]
mod tests {
    use super::super::sample::{TEXT, sample};
    use super::*;
    use crate::report::json;

    /// FIPS 180-4, the example of the NIST page on hash functions: SHA-256 of "abc".
    #[test]
    fn the_digest_is_sha_256_in_hexadecimal() {
        assert_eq!(
            digest("abc"),
            "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"
        );
        let report = sample().report();
        assert_eq!(report.digest, digest(TEXT));
        assert_eq!(report.short_digest(), &digest(TEXT)[..16]);
    }

    #[test]
    fn values_are_in_the_unit_shown_and_null_where_there_is_none() {
        let report = sample().report();
        let value = serde_json::to_value(&report).unwrap();
        let json = &value["quantities"];
        assert_eq!(json[2]["values"].to_string(), "[-20.0,null,700.0,null]");
        assert_eq!(json[2]["without_value"], 1);
        assert_eq!(json[2]["excluded"], 1);
        assert_eq!(json[2]["largest"]["value"].to_string(), "700.0");
        assert_eq!(json[2]["largest"]["condition"]["cg"], "fwd");
        assert_eq!(json[1]["values"].to_string(), "[15.0,null]");
        assert_eq!(json[3]["values"].to_string(), "[true]");
        assert_eq!(json[3]["kind"], "condition");
        assert_eq!(json[4]["values"].to_string(), r#"["at \""]"#);
        assert!(json[4]["largest"].is_null());
    }

    #[test]
    fn a_temperature_difference_has_no_zero_taken_off() {
        let mut sheet = sample();
        if let Kind::Number(number) = &mut sheet.program.quantities[1].kind {
            number.absolute = false;
        }
        std::rc::Rc::<Vec<f64>>::make_mut(
            &mut sheet.values.quantities[1].column.as_mut().unwrap().values,
        )[0] = 5.0;
        let report = sheet.report();
        assert_eq!(
            report.quantities[1].values,
            Some(ValueList::Numbers(vec![Some(5.0), None]))
        );
    }

    #[test]
    fn spreads_are_differences() {
        let mut sheet = sample();
        sheet.values.quantities[1].worst = Some(vec![2.0, crate::values::NONE]);
        sheet.values.quantities[1].rss = Some(vec![1.5, crate::values::NONE]);
        let report = sheet.report();
        assert_eq!(
            report.quantities[1].spread,
            Some(Spread {
                worst: vec![Some(2.0), None],
                rss: vec![Some(1.5), None],
            })
        );
    }

    #[test]
    fn a_line_that_failed_is_listed_without_values() {
        let mut sheet = sample();
        sheet.values.quantities[0] = QuantityValues::default();
        let report = sheet.report();
        let line = &report.quantities[0];
        assert_eq!(line.values, Some(ValueList::Numbers(vec![None])));
        assert_eq!((line.conditions, line.without_value), (1, 1));
        assert_eq!(line.largest, None);
    }

    #[test]
    fn many_values_are_written_only_when_asked_for() {
        let mut sheet = sample();
        sheet.program.axes[0].labels = (0..10_001).map(|i| i.to_string()).collect();
        let shape = Shape::of(crate::axes::AxisSet::of(AxisId(0)), &[10_001, 2]);
        sheet.values.quantities[0].shape = shape.clone();
        sheet.values.quantities[0].column.as_mut().unwrap().values = vec![0.0; 10_001].into();
        assert_eq!(sheet.report().quantities[0].values, None);
        let asked = ["W".to_owned()];
        let report = build(&Input {
            text: TEXT,
            tree: &sheet.tree,
            program: &sheet.program,
            values: &sheet.values,
            others: Vec::new(),
            findings: Vec::new(),
            asked: &asked,
            drawn: true,
        });
        let values = report.quantities[0].values.as_ref();
        assert_eq!(values.map(ValueList::len), Some(10_001));
        assert!(is_written(&["air".to_owned()], "air.density", 10_001));
        assert!(!is_written(&["air".to_owned()], "airs.density", 10_001));
    }

    #[test]
    fn governing_keeps_one_group_for_each_condition_left() {
        let value = serde_json::to_value(sample().report()).unwrap();
        let json = &value["governing"][0];
        assert_eq!(json["over"].to_string(), r#"["point"]"#);
        assert_eq!(json["conditions"], 4);
        assert_eq!(json["groups"].as_array().unwrap().len(), 2);
        assert_eq!(
            json["groups"][1]["condition"].to_string(),
            r#"{"cg":"aft"}"#
        );
        assert!(json["groups"][1]["largest"].is_null());
        assert_eq!(json["sensitivity"].to_string(), "[]");
    }

    #[test]
    fn the_json_has_the_names_and_the_order_of_the_contract() {
        let text = json::write(&sample().report()).unwrap();
        assert!(text.starts_with(r#"{"format":1,"engine":""#), "{text}");
        let names = [
            "format",
            "engine",
            "digest",
            "sheet",
            "axes",
            "quantities",
            "governing",
            "requirements",
            "freebodies",
            "figures",
            "findings",
        ];
        let places: Vec<usize> = names
            .iter()
            .map(|name| text.find(&format!("\"{name}\":")).unwrap())
            .collect();
        assert!(places.is_sorted(), "{places:?}");
        assert!(text.contains(r#""sheet":{"title":"Osier; tail load"}"#));
        assert!(text.contains(r#"{"name":"point","labels":["A","C"],"unit":null,"values":null}"#));
        let first = r#"{"symbol":"W","line":4,"kind":"number","unit":"lb","axes":[],"conditions":1,"without_value":0,"excluded":0,"values":[560.0],"largest":{"value":560.0,"condition":{}},"smallest":{"value":560.0,"condition":{}},"spread":null,"input":true,"remark":"weighing report; part 2","part":null}"#;
        assert!(text.contains(first), "{text}");
        assert!(!text.contains("digits"));
    }
}
