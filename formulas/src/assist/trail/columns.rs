//! The values of a trail: quantities, and parts of expressions worked out beside them.

use super::TrailError;
use crate::axes::{AxisId, AxisSet, Shape};
use crate::check::Trace;
use crate::plan;
use crate::program::{Kind, NodeId, Op, Program, Quantity, QuantityId, ShownUnit};
use crate::report::{Scale, condition};
use crate::run::{self, Limits};
use crate::span::Span;
use crate::values::{EXCLUDED, NONE, Values, is_excluded};
use rustc_hash::FxHashMap;

/// Most values of parts that are worked out and kept.
const PARTS_MOST: f64 = 2e7;

/// A label of every axis, by the number of the axis.
pub(super) type At = Vec<usize>;

/// The program of a sheet with the parts of its expressions as quantities beside the others, and all their values.
pub(super) struct Columns {
    pub(super) program: Program,
    values: Values,
    parts: FxHashMap<NodeId, usize>,
    lengths: Vec<usize>,
}

/// The labels that a caller names, as axes and places along them.
pub(super) fn labels(
    program: &Program,
    wanted: &[(String, String)],
) -> Result<Vec<(AxisId, usize)>, TrailError> {
    let one = |(name, label): &(String, String)| {
        let id = program.axes.iter().position(|a| a.name == *name);
        let id = id.ok_or_else(|| TrailError::UnknownAxis(name.clone()))?;
        let place = program.axes.get(id).and_then(|axis| axis.find(label));
        let place = place.ok_or_else(|| TrailError::UnknownLabel(name.clone(), label.clone()))?;
        Ok((AxisId(id as u8), place))
    };
    wanted.iter().map(one).collect()
}

impl Columns {
    /// Works out the statements that are marked, with every part that was traced.
    pub(super) fn of(program: Program, trace: &Trace, statements: &[bool], limits: Limits) -> Self {
        let mut program = program;
        let own = |program: &Program, id: &QuantityId| {
            let quantity = program.quantities.get(id.0 as usize);
            quantity.is_some_and(|q| statements.get(q.statement).copied().unwrap_or(false))
        };
        let order = std::mem::take(&mut program.order);
        program.order = order.into_iter().filter(|q| own(&program, q)).collect();
        // What the sheet asks of its values is worked out already.
        program.governing.clear();
        program.requirements.clear();
        program.freebodies.clear();
        program.tolerances.clear();
        let lengths: Vec<usize> = program.axes.iter().map(|a| a.labels.len()).collect();
        let parts = add_parts(&mut program, trace, &lengths);
        let asked = large(&program, &lengths);
        let plan = plan::plan(&program);
        let (values, _) = run::run(&program, &plan, limits, &asked);
        Columns {
            program,
            values,
            parts,
            lengths,
        }
    }

    pub(super) fn quantity(&self, id: QuantityId) -> Option<&Quantity> {
        self.program.quantities.get(id.0 as usize)
    }

    /// What tells a step from another: the quantity, and the labels of its own axes.
    pub(super) fn key(&self, id: QuantityId, at: &At) -> (QuantityId, Vec<(u8, usize)>) {
        let axes = self.quantity(id).map_or(AxisSet::NONE, |q| q.axes);
        let label = |axis: AxisId| (axis.0, at.get(axis.0 as usize).copied().unwrap_or(0));
        (id, axes.iter().map(label).collect())
    }

    /// The condition of a quantity's own axes, with the names of axes and labels.
    pub(super) fn condition(&self, axes: AxisSet, at: &At) -> crate::report::Condition {
        let shape = Shape::of(axes, &self.lengths);
        condition(&self.program.axes, &shape, index(&shape, at))
    }

    /// `loading gross, cg aft`.
    pub(super) fn labels_text(&self, axes: AxisSet, at: &At) -> String {
        let pairs = self.condition(axes, at).0;
        let pairs: Vec<String> = pairs.iter().map(|(a, l)| format!("{a} {l}")).collect();
        pairs.join(", ")
    }

    /// The value of a quantity; `None` where its line failed or has too many conditions.
    pub(super) fn of_quantity(&self, id: QuantityId, at: &At) -> Option<f64> {
        self.value(id.0 as usize, at)
    }

    fn value(&self, quantity: usize, at: &At) -> Option<f64> {
        let column = self.values.quantities.get(quantity)?.column.as_ref()?;
        column.values.get(index(&column.shape, at)).copied()
    }

    /// The value of a part of an expression.
    pub(super) fn of_node(&self, node: NodeId, at: &At) -> Option<f64> {
        let along = |axis: &AxisId| at.get(axis.0 as usize).copied().unwrap_or(0);
        match &self.program.nodes.get(node.0 as usize)?.op {
            Op::Constant(value) => Some(*value),
            Op::None => Some(NONE),
            Op::Excluded => Some(EXCLUDED),
            Op::Quantity(id) => self.of_quantity(*id, at),
            Op::Labels(axis) => {
                let axis_row = self.program.axes.get(axis.0 as usize)?;
                axis_row
                    .label_texts
                    .get(along(axis))
                    .map(|t| f64::from(t.0))
            }
            Op::Points(axis) => {
                let values = self.program.axes.get(axis.0 as usize)?.values.as_ref()?;
                values.get(along(axis)).copied()
            }
            _ => self.value(*self.parts.get(&node)?, at),
        }
    }

    pub(super) fn op(&self, node: NodeId) -> Option<&Op> {
        self.program.nodes.get(node.0 as usize).map(|n| &n.op)
    }

    /// The conditions that differ from one only along some axes, in order; none where they are too many to look at.
    pub(super) fn along<'c>(&'c self, axes: AxisSet, at: &'c At) -> impl Iterator<Item = At> + 'c {
        let shape = Shape::of(axes, &self.lengths);
        let count = if shape.conditions_f64() > PARTS_MOST {
            0
        } else {
            shape.conditions()
        };
        (0..count).map(move |condition| put(at, &shape, condition))
    }

    /// Where a quantity is looked at: the labels that are fixed, along other axes its largest magnitude.
    pub(super) fn place(&self, id: QuantityId, fixed: &[(AxisId, usize)]) -> At {
        let mut at: At = vec![0; self.lengths.len()];
        let mut free = self.quantity(id).map_or(AxisSet::NONE, |q| q.axes);
        let all = free;
        for (axis, label) in fixed {
            if let Some(slot) = at.get_mut(axis.0 as usize) {
                *slot = *label;
            }
            free = free.without(AxisSet::of(*axis));
        }
        let number = matches!(self.quantity(id).map(|q| q.kind), Some(Kind::Number(_)));
        if !number {
            return at;
        }
        if free == all {
            return self.extreme(id, &at).unwrap_or(at);
        }
        let mut best: Option<(f64, At)> = None;
        for place in self.along(free, &at) {
            let size = self.of_quantity(id, &place).map_or(f64::NAN, f64::abs);
            if !size.is_nan() && best.as_ref().is_none_or(|(most, _)| size > *most) {
                best = Some((size, place));
            }
        }
        best.map_or(at, |(_, place)| place)
    }

    /// The condition of the largest magnitude of all, as the run found it.
    fn extreme(&self, id: QuantityId, at: &At) -> Option<At> {
        let found = self.values.quantities.get(id.0 as usize)?;
        let (high, low) = (found.summary.largest?, found.summary.smallest?);
        let (larger, smaller) = (high.value.abs(), low.value.abs());
        let first = high.condition <= low.condition;
        let most = if larger > smaller || larger == smaller && first {
            high
        } else {
            low
        };
        Some(put(at, &found.shape, most.condition))
    }

    /// A value as shown, with its unit.
    pub(super) fn shown(&self, value: Option<f64>, kind: Kind, unit: Option<&ShownUnit>) -> String {
        self.written(value, kind, unit, |unit| format!(" {unit}"))
    }

    /// A value with its unit as it could be typed.
    pub(super) fn typed(&self, value: Option<f64>, kind: Kind, unit: Option<&ShownUnit>) -> String {
        self.written(value, kind, unit, crate::numbers::behind_number)
    }

    fn written(
        &self,
        value: Option<f64>,
        kind: Kind,
        unit: Option<&ShownUnit>,
        behind: impl Fn(&str) -> String,
    ) -> String {
        let Some(value) = value else {
            return "-".to_string();
        };
        if value.is_nan() {
            let word = if is_excluded(value) {
                "excluded"
            } else {
                "none"
            };
            return word.to_string();
        }
        match kind {
            Kind::Text => {
                let text = self.program.texts.get(value as usize);
                format!(
                    "\"{}\"",
                    text.map_or("", String::as_str).replace('"', "\"\"")
                )
            }
            Kind::Condition => (value != 0.0).to_string(),
            _ => {
                let number = Scale::of(unit, kind).number(value).unwrap_or(0.0);
                let number = crate::numbers::shown(number, self.program.digits);
                let unit = unit.map_or(String::new(), |u| behind(&u.text));
                format!("{number}{unit}")
            }
        }
    }
}

/// A condition of a shape, the labels of other axes as they are.
fn put(at: &At, shape: &Shape, condition: usize) -> At {
    let mut place = at.clone();
    for (axis, label) in shape.axes.iter().zip(shape.indices(condition)) {
        if let Some(slot) = place.get_mut(axis.0 as usize) {
            *slot = label;
        }
    }
    place
}

fn index(shape: &Shape, at: &At) -> usize {
    let pairs = shape.axes.iter().zip(&shape.lengths);
    pairs.fold(0, |index, (axis, length)| {
        index * length + at.get(axis.0 as usize).copied().unwrap_or(0)
    })
}

/// The traced parts as quantities of their own.
fn add_parts(program: &mut Program, trace: &Trace, lengths: &[usize]) -> FxHashMap<NodeId, usize> {
    let mut wanted: Vec<(NodeId, Kind)> = trace
        .seen
        .values()
        .filter(|seen| !matches!(seen.kind, Kind::Record(_)))
        .map(|seen| (seen.node, seen.kind))
        .collect();
    wanted.sort_by_key(|(node, _)| *node);
    wanted.dedup_by_key(|(node, _)| *node);
    let mut parts = FxHashMap::default();
    let mut total = 0.0;
    for (node, kind) in wanted {
        let Some(found) = program.nodes.get(node.0 as usize) else {
            continue;
        };
        let known = matches!(
            found.op,
            Op::Constant(_)
                | Op::None
                | Op::Excluded
                | Op::Quantity(_)
                | Op::Labels(_)
                | Op::Points(_)
        );
        total += Shape::of(found.axes, lengths).conditions_f64();
        if known || total > PARTS_MOST {
            continue;
        }
        let id = QuantityId(program.quantities.len() as u32);
        program.quantities.push(Quantity {
            symbol: format!("#{}", node.0),
            statement: 0,
            line: 0,
            span: Span::default(),
            kind,
            unit: None,
            node: Some(node),
            axes: found.axes,
            input: false,
            is_axis: false,
            remark: None,
            part: None,
            listed: false,
            origin: None,
        });
        program.order.push(id);
        parts.insert(node, id.0 as usize);
    }
    parts
}

/// The symbols whose columns would not be kept by themselves.
fn large(program: &Program, lengths: &[usize]) -> Vec<String> {
    let mut total = 0.0;
    let mut asked = Vec::new();
    for id in &program.order {
        let Some(quantity) = program.quantities.get(id.0 as usize) else {
            continue;
        };
        let size = Shape::of(quantity.axes, lengths).conditions_f64();
        if size > run::COLUMN_KEPT_MOST as f64 && total + size <= PARTS_MOST {
            total += size;
            asked.push(quantity.symbol.clone());
        }
    }
    asked
}
