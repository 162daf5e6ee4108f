//! Requirements and free bodies as facts of the report.

use super::convert::{Scale, condition};
use super::sensitivity;
use super::svg::{self, Arrow, Drawn, Shown};
use super::{Condition, Freebody, FreebodyCouple, FreebodyForce, Requirement, WorstCondition};
use crate::axes::Shape;
use crate::program::{self, Comparison, EntryKind, FreebodyEntry, Program, ShownUnit};
use crate::run::scalar;
use crate::syntax::{BinaryOp, Tree};
use crate::values::{FreebodyDrawn, FreebodyValues, RequirementValues, Values};

/// A requirement `=` is met within this part of the larger side.
const REQUIRED_EQUAL_WITHIN: f64 = 1e-9;

/// All requirements in the order of the sheet.
pub(super) fn requirements(tree: &Tree, program: &Program, values: &Values) -> Vec<Requirement> {
    let pairs = program.requirements.iter().enumerate();
    pairs
        .map(|(i, line)| {
            let unknown = RequirementValues::default();
            let found = values.requirements.get(i).unwrap_or(&unknown);
            let statement = tree.statements.get(line.statement);
            Requirement {
                line: statement.map_or(0, |s| s.line),
                text: line.text.clone(),
                reason: statement.and_then(|s| s.remark.as_ref().map(|r| r.text.clone())),
                met: if found.not_met > 0 {
                    Some(false)
                } else {
                    found.met
                },
                conditions: found.shape.conditions(),
                not_met: found.not_met,
                without_value: found.without_value,
                worst: worst(program, &line.parts, found),
                met_at_worst: found.met_at_worst,
                sensitivity: sensitivity::requirement(program, line, found),
                corner: sensitivity::requirement_corner(program, line, found),
            }
        })
        .collect()
}

fn worst(
    program: &Program,
    parts: &[Comparison],
    found: &RequirementValues,
) -> Option<WorstCondition> {
    let at = found.worst?;
    let part = parts.get(at.part)?;
    let scale = Scale::of_sides(part.unit.as_ref());
    let (left, right) = (scale.number(at.left)?, scale.number(at.right)?);
    let margin = if part.margin {
        margin(part.op, at.left, at.right)
    } else {
        None
    };
    Some(WorstCondition {
        condition: condition(&program.axes, &found.shape, at.condition),
        left,
        right,
        unit: part.unit.as_ref().map(|u| u.text.to_string()),
        reserve: reserve(part.op, left, right),
        margin,
    })
}

/// Distance to the limit in the unit of both sides: positive where there is room, 0 at the limit, negative where it is
/// passed. Sides that count as equal are at the limit; of `=` only 0 is met, so every other distance is negative.
#[must_use]
pub(super) fn reserve(op: BinaryOp, left: f64, right: f64) -> f64 {
    let apart = (left - right).abs();
    let larger = left.abs().max(right.abs());
    let equal = scalar::equal(left, right);
    match op {
        BinaryOp::NotEqual if equal => 0.0,
        BinaryOp::NotEqual => apart,
        BinaryOp::Equal if apart <= REQUIRED_EQUAL_WITHIN * larger => 0.0,
        BinaryOp::Equal => -apart,
        _ if equal => 0.0,
        BinaryOp::Greater | BinaryOp::GreaterOrEqual => left - right,
        _ => right - left,
    }
}

/// Allowable over applied, minus one, the allowable being the side that must be the larger in magnitude. `None` where
/// the signs differ, a side is 0, or the comparison sets no limit.
#[must_use]
pub(super) fn margin(op: BinaryOp, left: f64, right: f64) -> Option<f64> {
    let below = match op {
        BinaryOp::Less | BinaryOp::LessOrEqual => true,
        BinaryOp::Greater | BinaryOp::GreaterOrEqual => false,
        _ => return None,
    };
    let positive = left > 0.0 && right > 0.0;
    let negative = left < 0.0 && right < 0.0;
    if !positive && !negative {
        return None;
    }
    let ratio = if below == positive {
        right / left
    } else {
        left / right
    };
    Some(ratio - 1.0).filter(|margin| margin.is_finite())
}

/// All free bodies in the order of the sheet.
pub(super) fn freebodies(
    tree: &Tree,
    program: &Program,
    values: &Values,
    drawn: bool,
) -> Vec<Freebody> {
    let pairs = program.freebodies.iter().enumerate();
    pairs
        .map(|(i, body)| {
            let unknown = FreebodyValues::default();
            let found = values.freebodies.get(i).unwrap_or(&unknown);
            let of_kind = |kind: EntryKind| body.items.iter().filter(move |e| e.kind == kind);
            let force = |entry: &FreebodyEntry| force(program, entry);
            Freebody {
                name: body.name.clone(),
                line: tree.statements.get(body.statement).map_or(0, |s| s.line),
                closes: found.known.then_some(found.closes),
                by_construction: found.taken_up_by.is_some(),
                force_residual: finite(found.force_residual),
                axial_residual: finite(found.axial_residual),
                moment_residual: finite(found.moment_residual),
                worst: worst_condition(program, &found.shape, found.worst),
                forces: of_kind(EntryKind::Force).map(force).collect(),
                axials: of_kind(EntryKind::Axial).map(force).collect(),
                couples: of_kind(EntryKind::Couple)
                    .map(|entry| FreebodyCouple {
                        text: entry.text.clone(),
                        quantity: symbol(program, entry),
                    })
                    .collect(),
                taken_up_by: found.taken_up_by.clone(),
                svg: found
                    .drawn
                    .as_ref()
                    .filter(|_| drawn)
                    .map(|d| draw(program, body, found, d)),
            }
        })
        .collect()
}

/// The drawing of one condition.
fn draw(
    program: &Program,
    body: &program::Freebody,
    found: &FreebodyValues,
    drawn: &FreebodyDrawn,
) -> String {
    let of_kind = |kinds: &[EntryKind]| {
        let mut entries = body.items.iter().filter(|e| kinds.contains(&e.kind));
        entries.find_map(|e| e.unit.as_ref())
    };
    let shown = |value: f64, unit: Option<&ShownUnit>| Shown {
        value: Scale::of_sides(unit).number(value).unwrap_or(0.0),
        unit: unit.map_or_else(String::new, |u| format!(" {}", u.text)),
    };
    let arrow = |(entry, (value, at)): (&FreebodyEntry, &(f64, f64))| Arrow {
        kind: entry.kind,
        text: entry.text.clone(),
        value: shown(*value, entry.unit.as_ref()),
        si: *value,
        at_text: entry.at_text.clone(),
        at: shown(*at, entry.at_unit.as_ref()),
        at_si: *at,
    };
    let force = of_kind(&[EntryKind::Force, EntryKind::Axial]);
    let moment = of_kind(&[EntryKind::Couple]);
    let si = |unit: Option<&ShownUnit>, name: &str, value: f64| match unit {
        Some(_) => shown(value, unit),
        None => Shown {
            value,
            unit: format!(" {name}"),
        },
    };
    svg::freebody(&Drawn {
        name: body.name.clone(),
        condition: condition(&program.axes, &found.shape, drawn.condition),
        digits: program.digits,
        arrows: body.items.iter().zip(&drawn.items).map(arrow).collect(),
        force: si(force, "N", drawn.force),
        axial: si(force, "N", drawn.axial),
        moment: si(moment, "N.m", drawn.moment),
    })
}

fn force(program: &Program, entry: &FreebodyEntry) -> FreebodyForce {
    FreebodyForce {
        text: entry.text.clone(),
        quantity: symbol(program, entry),
        station: entry.at_text.clone(),
    }
}

fn symbol(program: &Program, entry: &FreebodyEntry) -> Option<String> {
    let quantity = program.quantities.get(entry.quantity?.0 as usize)?;
    Some(quantity.symbol.clone())
}

fn worst_condition(program: &Program, shape: &Shape, worst: Option<usize>) -> Option<Condition> {
    worst.map(|at| condition(&program.axes, shape, at))
}

/// A residual without value says nothing; the findings and `closes` do.
fn finite(residual: f64) -> f64 {
    if residual.is_finite() {
        residual + 0.0
    } else {
        0.0
    }
}

#[cfg(test)]
mod tests {
    use super::super::{json, sample::sample};
    use super::*;

    const NONE: Option<f64> = None;

    /// Worked by hand from the definition: allowable over applied, minus one.
    #[test]
    fn the_allowable_is_the_side_that_must_be_the_larger_in_magnitude() {
        let cases = [
            (BinaryOp::LessOrEqual, 400.0, 500.0, Some(0.25)),
            (BinaryOp::Less, 500.0, 400.0, Some(400.0 / 500.0 - 1.0)),
            (BinaryOp::Less, -500.0, -400.0, Some(0.25)),
            (BinaryOp::GreaterOrEqual, 500.0, 400.0, Some(0.25)),
            (BinaryOp::Greater, -400.0, -500.0, Some(0.25)),
            (BinaryOp::Less, -1.0, 1.0, NONE),
            (BinaryOp::Less, 0.0, 1.0, NONE),
            (BinaryOp::Greater, 1.0, 0.0, NONE),
            (BinaryOp::Equal, 1.0, 1.0, NONE),
            (BinaryOp::NotEqual, 1.0, 2.0, NONE),
            (BinaryOp::Less, 5e-324, 1e300, NONE),
        ];
        for (op, left, right, expected) in cases {
            assert_eq!(margin(op, left, right), expected, "{left} {op:?} {right}");
        }
    }

    #[test]
    fn the_reserve_is_positive_where_there_is_room() {
        let cases = [
            (BinaryOp::LessOrEqual, 3.0, 5.0, 2.0),
            (BinaryOp::Less, 5.0, 3.0, -2.0),
            (BinaryOp::Greater, 5.0, 3.0, 2.0),
            (BinaryOp::GreaterOrEqual, -5.0, 3.0, -8.0),
            (BinaryOp::Equal, 5.0, 3.0, -2.0),
            (BinaryOp::Equal, 3.0, 3.0 + 1e-9, 0.0),
            (BinaryOp::NotEqual, 5.0, 3.0, 2.0),
            (BinaryOp::LessOrEqual, 0.1 + 0.2, 0.3, 0.0),
        ];
        for (op, left, right, expected) in cases {
            assert_eq!(reserve(op, left, right), expected, "{left} {op:?} {right}");
        }
    }

    #[test]
    fn a_requirement_tells_its_worst_condition() {
        let at = sample().values.requirements[0].worst.unwrap();
        let json = json::write_any(&sample().report().requirements).unwrap();
        let expected = format!(
            r#"[{{"line":10,"text":"P <= W","reason":"strength","met":false,"conditions":4,"not_met":1,"without_value":1,"worst":{{"condition":{{"point":"C","cg":"fwd"}},"left":700.0,"right":560.0,"unit":"lb","reserve":-140.0,"margin":{}}},"met_at_worst":null,"sensitivity":[],"corner":null}}]"#,
            json::number(at.right / at.left - 1.0)
        );
        assert_eq!(json, expected);
    }

    #[test]
    fn a_margin_of_what_is_no_load_is_left_out() {
        let mut sheet = sample();
        sheet.program.requirements[0].parts[0].margin = false;
        let worst = sheet.report().requirements[0].worst.clone().unwrap();
        assert_eq!((worst.reserve, worst.margin), (-140.0, None));
    }

    #[test]
    fn a_free_body_tells_how_far_it_is_from_closing() {
        let json = json::write_any(&sample().report().freebodies).unwrap();
        assert_eq!(
            json,
            r#"[{"name":"Tail, all","line":12,"closes":false,"by_construction":false,"force_residual":0.25,"axial_residual":0.0,"moment_residual":0.5,"worst":{"point":"C","cg":"fwd"},"forces":[{"text":"P","quantity":"P","station":"x"},{"text":"-W","quantity":null,"station":"1 ft"}],"axials":[],"couples":[],"svg":null}]"#
        );
    }
}
