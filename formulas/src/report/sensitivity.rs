//! What tolerances do to governing values and requirements, as facts of the report.

use super::convert::{Scale, condition};
use super::{
    Condition, CornerInput, GoverningCorner, GoverningOthers, GoverningSensitivity,
    RequirementCorner, RequirementSensitivity,
};
use crate::axes::Shape;
use crate::program::{self, Program};
use crate::values::{Corner, GoverningValues, Influence, RequirementValues, Sensitivity};

/// The inputs by their effect on the largest value, then on the smallest; `scale` is that of a difference.
pub(super) fn governing(
    program: &Program,
    scale: Scale,
    found: &GoverningValues,
) -> Vec<GoverningSensitivity> {
    let ends = [("largest", &found.largest), ("smallest", &found.smallest)];
    let each = ends.into_iter().flat_map(|(of, sensitivity)| {
        shares(sensitivity).map(move |(influence, share)| (of, influence, share))
    });
    each.filter_map(|(of, influence, share)| {
        let (symbol, condition) = input(program, influence.tolerance)?;
        Some(GoverningSensitivity {
            of,
            symbol,
            condition,
            effect: scale.number(influence.effect)?,
            share,
        })
    })
    .collect()
}

/// The worst corner for the largest value and for the smallest.
pub(super) fn corners(
    program: &Program,
    shape: &Shape,
    scale: Scale,
    found: &GoverningValues,
) -> Vec<GoverningCorner> {
    let ends = [("largest", &found.largest), ("smallest", &found.smallest)];
    ends.into_iter()
        .filter_map(|(of, sensitivity)| {
            let corner = sensitivity.corner.as_ref()?;
            Some(GoverningCorner {
                of,
                value: scale.number(corner.value)?,
                condition: condition(&program.axes, shape, corner.condition),
                inputs: inputs(program, corner),
            })
        })
        .collect()
}

/// Other conditions that could govern.
pub(super) fn others(
    program: &Program,
    shape: &Shape,
    found: &GoverningValues,
) -> Vec<GoverningOthers> {
    let ends = [("largest", &found.largest), ("smallest", &found.smallest)];
    let named = |at: &usize| condition(&program.axes, shape, *at);
    let each = ends.into_iter().map(|(of, sensitivity)| GoverningOthers {
        of,
        conditions: sensitivity.others.iter().map(named).collect(),
    });
    each.filter(|o| !o.conditions.is_empty()).collect()
}

/// The inputs by their effect on the reserve.
pub(super) fn requirement(
    program: &Program,
    line: &program::Requirement,
    found: &RequirementValues,
) -> Vec<RequirementSensitivity> {
    let scale = scale_of(line, found).of_differences();
    shares(&found.sensitivity)
        .filter_map(|(influence, share)| {
            let (symbol, condition) = input(program, influence.tolerance)?;
            Some(RequirementSensitivity {
                symbol,
                condition,
                effect: scale.number(influence.effect)?,
                share,
            })
        })
        .collect()
}

/// The worst corner of a requirement.
pub(super) fn requirement_corner(
    program: &Program,
    line: &program::Requirement,
    found: &RequirementValues,
) -> Option<RequirementCorner> {
    let corner = found.sensitivity.corner.as_ref()?;
    Some(RequirementCorner {
        reserve: scale_of(line, found)
            .of_differences()
            .number(corner.value)?,
        condition: condition(&program.axes, &found.shape, corner.condition),
        inputs: inputs(program, corner),
    })
}

fn scale_of(line: &program::Requirement, found: &RequirementValues) -> Scale {
    let part = found.worst.and_then(|worst| line.parts.get(worst.part));
    Scale::of_sides(part.and_then(|part| part.unit.as_ref()))
}

/// Each influence with its part of the sum of all.
fn shares(sensitivity: &Sensitivity) -> impl Iterator<Item = (&Influence, f64)> {
    let all: f64 = sensitivity.ranked.iter().map(|i| i.effect).sum();
    sensitivity.ranked.iter().map(move |i| (i, i.effect / all))
}

/// The symbol of an input with a tolerance, and where in a list it stands.
fn input(program: &Program, tolerance: usize) -> Option<(String, Condition)> {
    let tolerance = program.tolerances.get(tolerance)?;
    let quantity = program.quantities.get(tolerance.quantity.0 as usize)?;
    let label = |(axis, label): &(crate::axes::AxisId, usize)| {
        let axis = program.axes.get(axis.0 as usize)?;
        Some((axis.name.clone(), axis.labels.get(*label)?.clone()))
    };
    let condition = Condition(tolerance.at.iter().filter_map(label).collect());
    Some((quantity.symbol.clone(), condition))
}

fn inputs(program: &Program, corner: &Corner) -> Vec<CornerInput> {
    let each = corner.moves.iter().filter_map(|(tolerance, up)| {
        let (symbol, condition) = input(program, *tolerance)?;
        let end = if *up { "+" } else { "-" };
        Some(CornerInput {
            symbol,
            condition,
            end,
        })
    });
    each.collect()
}
