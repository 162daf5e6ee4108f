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

#[cfg(test)]
mod tests {
    use crate::report::ValueList;
    use crate::sheet::{Around, Sheet};

    const LONG: &str = "vary x [1]: 1 to 1000 step 1\nvary k [1]: 1 to 100 step 1\ny = k*x\n\
        figure \"Long\": y against x each k\n";

    /// A column longer than those that are kept for all lines is kept for a figure, in a first run and after an edit.
    #[test]
    fn long_columns_are_there_to_be_drawn() {
        let editing = Around {
            editing: true,
            ..Around::default()
        };
        let mut sheet = Sheet::open_around(LONG, &editing);
        sheet.update(&LONG.replace("k*x", "2*k*x"));
        for (sheet, factor) in [(Sheet::open(LONG), 1.0), (sheet, 2.0)] {
            let report = sheet.report(&[]);
            let curves = &report.figures[0].curves;
            assert_eq!(curves.len(), 100);
            let ValueList::Numbers(last) = &curves[99].y else {
                panic!("numbers");
            };
            assert_eq!(last.len(), 1000);
            assert_eq!(last[999], Some(factor * 100.0 * 1000.0));
        }
    }

    /// A figure after edits is that of the text opened anew.
    #[test]
    fn an_edit_gives_the_figure_of_the_new_text() {
        let first = "vary c: a | b\nx by c = 1 | 2\ny by c = 3 | none\nfigure \"F\": y, 2*x against x closed\n";
        let editing = Around {
            editing: true,
            ..Around::default()
        };
        let mut sheet = Sheet::open_around(first, &editing);
        let mut text = first.to_owned();
        for (old, new) in [
            ("none", "5"),
            ("2*x", "3*x"),
            ("closed", ""),
            ("a | b", "b | a"),
        ] {
            text = text.replace(old, new);
            sheet.update(&text);
            assert_eq!(
                sheet.report(&[]).figures,
                Sheet::open(&text).report(&[]).figures
            );
        }
    }
}
