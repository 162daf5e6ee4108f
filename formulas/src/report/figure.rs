//! Figures as facts of the report: columns cut into curves, in the units shown.

use super::build::value_of_text;
use super::convert::{Scale, condition};
use super::{Figure, FigureAxis, FigureCurve, ValueList, svg};
use crate::axes::{AxisId, AxisSet, Shape};
use crate::program::{self, FigureEntry, Kind, Program};
use crate::syntax::Tree;
use crate::values::{Column, FigureValues, NONE, Values};

/// All figures in the order of the sheet.
pub(super) fn figures(tree: &Tree, program: &Program, values: &Values) -> Vec<Figure> {
    let unknown = FigureValues::default();
    let pairs = program.figures.iter().enumerate();
    pairs
        .map(|(i, line)| {
            let found = values.figures.get(i).unwrap_or(&unknown);
            let unit = line.x.as_ref().and_then(|x| x.unit.as_ref());
            let mut figure = Figure {
                name: line.name.clone(),
                line: tree.statements.get(line.statement).map_or(0, |s| s.line),
                x: FigureAxis {
                    symbol: line.x_text.clone(),
                    unit: unit.map(|u| u.text.to_string()),
                },
                curves: curves(program, line, found),
                closed: line.closed,
                svg: String::new(),
            };
            figure.svg = svg::figure(&figure);
            figure
        })
        .collect()
}

fn curves(program: &Program, line: &program::Figure, found: &FigureValues) -> Vec<FigureCurve> {
    let Some(x) = &line.x else { return Vec::new() };
    let lengths: Vec<usize> = program.axes.iter().map(|a| a.labels.len()).collect();
    let mut all = Vec::new();
    for (at, y) in line.curves.iter().enumerate() {
        let column = found.curves.get(at).and_then(Option::as_ref);
        let each = Shape::of(y.axes.with(x.axes).common(line.each), &lengths);
        for one in 0..each.conditions() {
            let cut = Cut {
                program,
                along: line.along,
                points: Shape::of(line.along.map_or(AxisSet::NONE, AxisSet::of), &lengths)
                    .conditions(),
                each: each.axes.iter().copied().zip(each.indices(one)).collect(),
            };
            all.push(FigureCurve {
                symbol: y.text.clone(),
                unit: y.unit.as_ref().map(|u| u.text.to_string()),
                condition: condition(&program.axes, &each, one),
                x: cut.values(x, found.x.as_ref()),
                y: cut.values(y, column),
                points: cut.labels(),
            });
        }
    }
    all
}

/// One curve out of columns that hold several.
struct Cut<'a> {
    program: &'a Program,
    along: Option<AxisId>,
    points: usize,
    /// The label of each axis that is held.
    each: Vec<(AxisId, usize)>,
}

impl Cut<'_> {
    fn values(&self, entry: &FigureEntry, column: Option<&Column>) -> ValueList {
        let si = (0..self.points).map(|point| self.value(column, point));
        if entry.kind == Kind::Text {
            return ValueList::Texts(si.map(|v| value_of_text(self.program, v)).collect());
        }
        let scale = Scale::of(entry.unit.as_ref(), entry.kind);
        ValueList::Numbers(si.map(|v| scale.number(v)).collect())
    }

    /// The labels of the points; none on an axis of numbers, which say nothing that x does not.
    fn labels(&self) -> Vec<String> {
        let axis = self.along.and_then(|a| self.program.axes.get(a.0 as usize));
        axis.filter(|a| a.values.is_none())
            .map_or_else(Vec::new, |a| a.labels.clone())
    }

    fn value(&self, column: Option<&Column>, point: usize) -> f64 {
        let Some(column) = column else { return NONE };
        let index = |axis: &AxisId| match self.each.iter().find(|(a, _)| a == axis) {
            Some((_, index)) => *index,
            None if self.along == Some(*axis) => point,
            None => 0,
        };
        let strides = column.shape.strides();
        let place = column.shape.axes.iter().zip(strides);
        let offset: usize = place.map(|(axis, stride)| index(axis) * stride).sum();
        column.values.get(offset).copied().unwrap_or(NONE)
    }
}
