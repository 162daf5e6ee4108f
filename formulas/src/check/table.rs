//! Tables: rows found by their keys, one quantity a column.

use super::definition::{Judged, PointTolerance};
use super::{Checker, Marks, Typed};
use crate::axes::{AxisId, AxisSet};
use crate::names::Role;
use crate::problem::Fault;
use crate::program::Op;
use crate::syntax::{Parameter, Row, Table};

/// The axes of a table's keys, and for each row the index along each; `None` for a row that could not be placed.
type Places = (Vec<AxisId>, Vec<Option<Vec<usize>>>);

impl Checker<'_> {
    pub(crate) fn check_table(&mut self, table: &Table) {
        for (at, key) in table.keys.iter().enumerate() {
            if self
                .names
                .symbol(&key.name.text)
                .is_some_and(|s| s.statement == self.statement && s.role == Role::Key(at))
            {
                self.define_axis(&key.name.text, key.name.span);
            }
        }
        let places = self.row_places(table);
        for (at, column) in table.columns.iter().enumerate() {
            self.check_column(table, at, column, places.as_ref());
        }
    }

    /// For each row the index along each key; rows that could not be placed are `None`.
    fn row_places(&mut self, table: &Table) -> Option<Places> {
        let axes: Option<Vec<AxisId>> = table
            .keys
            .iter()
            .map(|k| self.axis_of_symbol.get(&k.name.text).copied())
            .collect();
        let axes = axes?;
        let mut places: Vec<Option<Vec<usize>>> = Vec::with_capacity(table.rows.len());
        let mut seen = rustc_hash::FxHashSet::default();
        for row in &table.rows {
            let place: Option<Vec<usize>> = axes
                .iter()
                .enumerate()
                .map(|(i, axis)| self.key_place(table, row, i, *axis))
                .collect();
            if let Some(place) = &place
                && !seen.insert(place.clone())
            {
                let label = row
                    .keys
                    .iter()
                    .map(|k| k.text.clone())
                    .collect::<Vec<_>>()
                    .join(", ");
                let axis = table
                    .keys
                    .iter()
                    .map(|k| k.name.text.clone())
                    .collect::<Vec<_>>()
                    .join(", ");
                let span = row.keys.first().map_or(row.span, |k| k.span);
                self.report(span, Fault::LabelTwice { axis, label });
                places.push(None);
                continue;
            }
            places.push(place);
        }
        self.advise_missing_rows(table, &axes, &places);
        Some((axes, places))
    }

    fn key_place(&mut self, table: &Table, row: &Row, at: usize, axis: AxisId) -> Option<usize> {
        let key = row.keys.get(at)?;
        let labelled = table.keys.get(at)?.unit.is_none();
        // Under a key without bracket, a number is one in the unit of the axis declared before.
        if labelled || self.program.axes[axis.0 as usize].values.is_none() {
            return self.place_of_label(axis, key);
        }
        let expr = row.key_values.get(at)?.as_ref()?;
        let name = table.keys.get(at)?.name.text.clone();
        let unit = table.keys.get(at)?.unit.clone();
        let bracket = self.bracket(unit.as_ref(), &name).ok()?;
        let told = self.problems.len();
        let typed = self.value_under(expr, bracket.as_ref());
        if self.program.axes[axis.0 as usize].statement == self.statement {
            // The same expression was read when the axis was declared; what was wrong with it is told already.
            self.problems.truncate(told);
        }
        let value = typed.and_then(|t| self.constant_of(t.node))?;
        let values = self.program.axes[axis.0 as usize].values.as_ref()?;
        let found = values
            .iter()
            .position(|v| (v - value).abs() <= 1e-12 * v.abs().max(value.abs()));
        if found.is_none() {
            let fault = Fault::UnknownLabel {
                axis: name,
                label: key.text.clone(),
                nearest: None,
            };
            self.report(key.span, fault);
        }
        found
    }

    /// A label of an axis declared before, without a row here: advice.
    fn advise_missing_rows(
        &mut self,
        table: &Table,
        axes: &[AxisId],
        places: &[Option<Vec<usize>>],
    ) {
        for (at, axis) in axes.iter().enumerate() {
            let labels = self.program.axes[axis.0 as usize].labels.clone();
            let mut has = vec![false; labels.len()];
            places.iter().flatten().for_each(|p| has[p[at]] = true);
            let missing: Vec<String> = labels
                .into_iter()
                .zip(&has)
                .filter(|(_, h)| !**h)
                .map(|(l, _)| l)
                .collect();
            if !missing.is_empty() && places.iter().all(Option::is_some) {
                let key = &table.keys[at].name;
                self.report(
                    key.span,
                    Fault::RowsMissing {
                        axis: key.text.clone(),
                        labels: missing,
                    },
                );
            }
        }
    }

    fn check_column(
        &mut self,
        table: &Table,
        at: usize,
        column: &Parameter,
        places: Option<&Places>,
    ) {
        let name = &column.name.text;
        let stands = self
            .names
            .symbol(name)
            .is_some_and(|s| s.statement == self.statement && s.role == Role::Column(at));
        let input = self.column_is_input(table, at);
        let value = self.column_value(table, at, column, places, input);
        if stands {
            self.define(name, column.name.span, value, input);
        }
    }

    fn column_value(
        &mut self,
        table: &Table,
        at: usize,
        column: &Parameter,
        places: Option<&Places>,
        input: bool,
    ) -> Option<(Typed, Vec<PointTolerance>)> {
        let bracket = self.bracket(column.unit.as_ref(), &column.name.text).ok()?;
        let mut cells: Vec<Option<Judged>> = Vec::with_capacity(table.rows.len());
        let mut failed = false;
        for row in &table.rows {
            let cell = row
                .cells
                .get(at)
                .and_then(|c| self.judged(c, bracket.as_ref(), input));
            failed |= cell.is_none();
            cells.push(cell);
        }
        let (axes, places) = places?;
        if failed || places.iter().any(Option::is_none) {
            return None;
        }
        let name = &column.name.text;
        if let [axis] = axes.as_slice() {
            let mut ordered: Vec<Option<Judged>> = self.program.axes[axis.0 as usize]
                .labels
                .iter()
                .map(|_| None)
                .collect();
            for (place, cell) in places.iter().flatten().zip(cells) {
                ordered[place[0]] = cell;
            }
            return self.column(name, *axis, ordered);
        }
        self.grid(name, axes, places, cells)
    }

    /// A table of several keys: one node for each combination.
    fn grid(
        &mut self,
        name: &str,
        axes: &[AxisId],
        places: &[Option<Vec<usize>>],
        cells: Vec<Option<Judged>>,
    ) -> Option<(Typed, Vec<PointTolerance>)> {
        let lengths: Vec<usize> = axes
            .iter()
            .map(|a| self.program.axes[a.0 as usize].labels.len())
            .collect();
        let size = lengths.iter().map(|n| *n as f64).product::<f64>();
        if size > super::outputs::CONDITIONS_MOST {
            let fault = Fault::ConditionLimit {
                symbol: name.to_string(),
                found: size,
                limit: super::outputs::CONDITIONS_MOST,
            };
            self.report(crate::span::Span::default(), fault);
            return None;
        }
        let mut items = vec![None; size as usize];
        let mut all: Option<Typed> = None;
        let mut tolerances = Vec::new();
        let mut inner = AxisSet::NONE;
        for (place, cell) in places.iter().flatten().zip(cells) {
            let judged = cell?;
            let at = place.iter().zip(&lengths).fold(0, |at, (i, n)| at * n + i);
            inner = inner.with(self.axes_of(judged.typed.node));
            items[at] = Some(judged.typed.node);
            if let Some(width) = judged.width {
                let at = axes.iter().copied().zip(place.iter().copied()).collect();
                tolerances.push(PointTolerance { at, width });
            }
            all = Some(self.merge(name, all, judged.typed)?);
        }
        let mut all = all.unwrap_or_else(|| self.no_value());
        let over = axes.iter().fold(inner, |set, a| set.with(AxisSet::of(*a)));
        all.node = self.node(
            Op::Grid {
                axes: axes.to_vec(),
                items,
            },
            over,
        );
        all.marks = Marks::default();
        Some((all, tolerances))
    }

    fn column_is_input(&self, table: &Table, at: usize) -> bool {
        let mut input = true;
        for cell in table.rows.iter().filter_map(|row| row.cells.get(at)) {
            crate::names::uses(&cell.value, &mut |used| input &= self.leaves_input(used));
        }
        input
    }
}
