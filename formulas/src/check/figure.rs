//! What a figure draws: its axes settled, its size within limits.

use super::{Checker, Typed};
use crate::axes::{AxisId, AxisSet, Shape};
use crate::problem::Fault;
use crate::program::{Figure, FigureEntry, Kind};
use crate::span::Span;
use crate::syntax::{Expr, Name, Words};

/// Most curves in a figure.
pub(crate) const CURVES_MOST: f64 = 200.0;
/// Most points of all curves of a figure together.
pub(crate) const POINTS_MOST: f64 = 100_000.0;

/// A figure as it stands in the tree.
pub(super) struct Drawn<'t> {
    pub(super) name: &'t Words,
    pub(super) curves: &'t [Expr],
    pub(super) against: &'t Expr,
    pub(super) each: &'t [Name],
    pub(super) closed: bool,
}

impl Checker<'_> {
    pub(super) fn check_figure(&mut self, drawn: &Drawn<'_>) {
        let mut figure = Figure {
            statement: self.statement,
            name: drawn.name.text.clone(),
            x_text: self.words(drawn.against.span),
            x: None,
            curves: Vec::new(),
            each: self.axes_named(drawn.each),
            along: None,
            closed: drawn.closed,
        };
        figure.x = self.abscissa(drawn.against);
        // A curve that cannot be checked hides none of the others.
        let checked: Vec<(FigureEntry, Span)> = drawn
            .curves
            .iter()
            .filter_map(|y| Some((self.ordinate(y)?, y.span)))
            .collect();
        if self.settle_axes(&mut figure, drawn.against.span, checked) && !self.fits_limits(&figure)
        {
            figure.curves.clear();
        }
        self.program.figures.push(figure);
    }

    fn axes_named(&self, names: &[Name]) -> AxisSet {
        let known = names
            .iter()
            .filter_map(|name| self.axis_of_symbol.get(&name.text));
        known.fold(AxisSet::NONE, |all, id| all.with(AxisSet::of(*id)))
    }

    /// A number, or the labels along an axis.
    fn abscissa(&mut self, against: &Expr) -> Option<FigureEntry> {
        let typed = self.expression(against)?;
        if typed.kind == Kind::Text {
            return Some(self.figure_entry(&typed, against));
        }
        let typed = self.wants_number(typed, "what a figure is drawn against")?;
        Some(self.figure_entry(&typed, against))
    }

    fn ordinate(&mut self, y: &Expr) -> Option<FigureEntry> {
        let typed = self.expression(y)?;
        let typed = self.wants_number(typed, "what a figure shows")?;
        Some(self.figure_entry(&typed, y))
    }

    fn figure_entry(&self, typed: &Typed, expr: &Expr) -> FigureEntry {
        FigureEntry {
            text: self.words(expr.span),
            node: typed.node,
            kind: typed.kind,
            unit: typed.unit.clone(),
            axes: self.axes_of(typed.node),
        }
    }

    /// Finds the axis along which curves run: of those over which x varies and that `each` does not name, an axis of
    /// numbers before one of labels. Every other axis that is left open is told, and a curve that has one is not drawn;
    /// `false` where there is nothing to draw against.
    fn settle_axes(
        &mut self,
        figure: &mut Figure,
        x_span: Span,
        checked: Vec<(FigureEntry, Span)>,
    ) -> bool {
        let Some(x) = &figure.x else { return false };
        let open = x.axes.without(figure.each);
        let of_numbers = |axis: &AxisId| {
            let axis = self.program.axes.get(axis.0 as usize);
            axis.is_some_and(|a| a.values.is_some())
        };
        figure.along = open.iter().find(of_numbers).or(open.iter().next());
        let settled = figure
            .along
            .map_or(figure.each, |along| figure.each.with(AxisSet::of(along)));
        if let Some(fault) = self.left_open(x, settled) {
            self.report(x_span, fault);
            return false;
        }
        for (entry, span) in checked {
            match self.left_open(&entry, settled) {
                Some(fault) => self.report(span, fault),
                None => figure.curves.push(entry),
            }
        }
        true
    }

    fn left_open(&self, entry: &FigureEntry, settled: AxisSet) -> Option<Fault> {
        let left = entry.axes.without(settled);
        if left.is_empty() {
            return None;
        }
        let name = |id: AxisId| Some(self.program.axes.get(id.0 as usize)?.name.clone());
        Some(Fault::FigureAxes {
            symbol: entry.text.clone(),
            axes: left.iter().filter_map(name).collect(),
        })
    }

    fn fits_limits(&mut self, figure: &Figure) -> bool {
        let lengths: Vec<usize> = self.program.axes.iter().map(|a| a.labels.len()).collect();
        let x_axes = figure.x.as_ref().map_or(AxisSet::NONE, |x| x.axes);
        let all = figure.curves.iter().map(|y| y.axes.with(x_axes));
        let (mut curves, mut points) = (0.0, 0.0);
        for axes in all {
            curves += Shape::of(axes.common(figure.each), &lengths).conditions_f64();
            points += Shape::of(axes, &lengths).conditions_f64();
        }
        let over = if curves > CURVES_MOST {
            ("curves", curves, CURVES_MOST)
        } else if points > POINTS_MOST {
            ("points", points, POINTS_MOST)
        } else {
            return true;
        };
        let (what, found, limit) = over;
        let fault = Fault::FigureLimit { what, found, limit };
        self.report(Span::new(0, "figure".len()), fault);
        false
    }
}
