//! A step for each kind of statement.

use super::columns::At;
use super::look::{Said, Walk};
use super::numbers::Render;
use super::{Step, StepKind};
use crate::assist::joined;
use crate::program::{Kind, Quantity};
use crate::span::Span;
use crate::syntax::{
    Definition, DefinitionValue, Expr, ExprKind, ListItem, Name, Row, StatementKind, Table,
    Toleranced, Unknown, Vary, VaryPoints,
};

impl Walk<'_> {
    /// Formula, numbers, notes and what the line rests on.
    pub(super) fn fill(&self, step: &mut Step, quantity: &Quantity, at: &At, said: &mut Said) {
        let Some(statement) = self.statement(quantity.statement) else {
            return;
        };
        if quantity.input {
            step.kind = StepKind::Input;
        }
        if quantity.is_axis {
            step.kind = StepKind::Axis;
        }
        match &statement.kind {
            StatementKind::Definition(d) => self.definition(step, quantity, d, at, said),
            StatementKind::Table(table) if !quantity.is_axis => {
                self.table(step, quantity, table, at, said);
            }
            StatementKind::Table(table) => {
                let keys: Vec<&str> = table.keys.iter().map(|k| k.name.text.as_str()).collect();
                step.formula = format!("a key of the table {}", keys.join(", "));
            }
            StatementKind::Vary(vary) => step.formula = self.points(quantity.statement, vary),
            StatementKind::Unknown(unknown) => {
                step.kind = StepKind::Unknown;
                self.unknown(step, quantity, unknown, at, said);
            }
            StatementKind::Use { sheet, .. } => {
                step.formula = format!("an axis of the sheet \"{}\"", sheet.text);
            }
            _ => {}
        }
    }

    fn slice(&self, statement: usize, from: u32, to: u32) -> String {
        let span = Span {
            start: from,
            end: to,
        };
        joined(span.of(self.text(statement)))
    }

    fn points(&self, statement: usize, vary: &Vary) -> String {
        let text = self.text(statement);
        let head = vary
            .unit
            .as_ref()
            .map_or(vary.name.span.end, |u| u.span.end);
        let rest = text.get(head as usize..).unwrap_or("");
        let points = rest.split_once(':').map_or("", |(_, points)| points);
        let all = joined(points);
        match &vary.points {
            VaryPoints::Labels(labels) if labels.len() > 12 => format!("{} labels", labels.len()),
            _ => all,
        }
    }

    fn definition(
        &self,
        step: &mut Step,
        quantity: &Quantity,
        definition: &Definition,
        at: &At,
        said: &mut Said,
    ) {
        match &definition.value {
            DefinitionValue::One(value) => self.right_side(step, quantity, value, at, said),
            DefinitionValue::ByAxis { axis, items } => {
                let Some((item, label)) = self.item(axis, items, at) else {
                    return;
                };
                self.right_side(step, quantity, &item.value, at, said);
                said.note(format!("the value for {} {label}", axis.text));
            }
        }
    }

    /// The item of a list that counts, and its label.
    fn item<'e>(
        &self,
        axis: &Name,
        items: &'e [ListItem],
        at: &At,
    ) -> Option<(&'e ListItem, String)> {
        let axes = &self.columns.program.axes;
        let id = axes.iter().position(|a| a.name == axis.text)?;
        let place = at.get(id).copied()?;
        let axis = axes.get(id)?;
        let label = axis.labels.get(place)?.clone();
        let labelled = |item: &&ListItem| {
            let typed = item.label.as_ref();
            typed.is_some_and(|l| axis.find(&l.text) == Some(place))
        };
        let item = match items.iter().find(labelled) {
            Some(item) => Some(item),
            None => items.get(place).filter(|item| item.label.is_none()),
        };
        Some((item?, label))
    }

    /// `x +/- t` or a formula, with its numbers.
    fn right_side(
        &self,
        step: &mut Step,
        quantity: &Quantity,
        value: &Toleranced,
        at: &At,
        said: &mut Said,
    ) {
        let statement = quantity.statement;
        let end = value
            .tolerance
            .as_ref()
            .map_or(value.value.span, |t| t.span);
        step.formula = self.slice(statement, value.value.span.start, end.end);
        let mut render = Render::new(self, statement, at, said);
        render.walk(&value.value, true);
        let numbers = render.text(value.value.span);
        if !quantity.input && numbers != step.formula {
            step.numbers = Some(numbers);
        }
    }

    fn table(&self, step: &mut Step, quantity: &Quantity, table: &Table, at: &At, said: &mut Said) {
        let column = table
            .columns
            .iter()
            .position(|c| c.name.text == quantity.symbol);
        let row = table.rows.iter().find(|row| self.is_row(table, row, at));
        let (Some(column), Some(row)) = (column, row) else {
            step.formula = "no row of the table".to_string();
            return;
        };
        if let Some(cell) = row.cells.get(column) {
            self.right_side(step, quantity, cell, at, said);
        }
        step.line = step.line.saturating_add(row.line);
        let keys: Vec<&str> = row.keys.iter().map(|k| k.text.as_str()).collect();
        said.note(format!("the row {} of the table", keys.join(", ")));
        if let Some(remark) = &row.remark {
            step.remark = Some(match &step.remark {
                Some(header) => format!("{}; {header}", remark.text),
                None => remark.text.clone(),
            });
        }
    }

    fn is_row(&self, table: &Table, row: &Row, at: &At) -> bool {
        let axes = &self.columns.program.axes;
        let same = |(key, cell): (&crate::syntax::Parameter, usize)| {
            let id = axes.iter().position(|a| a.name == key.name.text)?;
            let axis = axes.get(id)?;
            let typed = row.keys.get(cell)?;
            let bare = row.key_values.get(cell).and_then(Option::as_ref);
            let found = axis
                .find(&typed.text)
                .or_else(|| self.key_place(axis, bare?));
            Some(found? == *at.get(id)?)
        };
        let keys = table.keys.iter().enumerate();
        keys.map(|(cell, key)| (key, cell))
            .all(|key| same(key).unwrap_or(false))
    }

    /// The place of a key typed with a unit of its own.
    fn key_place(&self, axis: &crate::program::Axis, key: &Expr) -> Option<usize> {
        let ExprKind::Number {
            value,
            unit: Some(unit),
            ..
        } = &key.kind
        else {
            return None;
        };
        let unit = engine::quantity::Unit::named(&unit.text)?;
        let si = unit.to_si(*value);
        let near = |v: &f64| (v - si).abs() <= 1e-12 * v.abs().max(si.abs());
        axis.values.as_ref()?.iter().position(near)
    }

    fn unknown(
        &self,
        step: &mut Step,
        quantity: &Quantity,
        unknown: &Unknown,
        at: &At,
        said: &mut Said,
    ) {
        let statement = quantity.statement;
        let mut typed = Vec::new();
        let mut numbers = Vec::new();
        for (left, right) in &unknown.equations {
            let side = |side: &Expr, said: &mut Said| {
                let mut render = Render::new(self, statement, at, said);
                render.walk(side, false);
                (
                    joined(side.span.of(self.text(statement))),
                    render.text(side.span),
                )
            };
            let (l, l_numbers) = side(left, said);
            let (r, r_numbers) = side(right, said);
            typed.push(format!("{l} = {r}"));
            numbers.push(format!("{l_numbers} = {r_numbers}"));
            self.residual(statement, left, right, at, said);
        }
        step.formula = format!("such that {}", typed.join(" and "));
        step.numbers = Some(numbers.join(" and "));
        let own = unknown.unknowns.iter();
        for symbol in own.filter(|u| u.symbol.text == quantity.symbol) {
            let bound = |bound: &Expr| {
                let text = self.slice(statement, bound.span.start, bound.span.end);
                match symbol.unit.as_ref().filter(|_| is_number(bound)) {
                    Some(unit) => format!("{text} {}", unit.text),
                    None => text,
                }
            };
            let (low, high) = (bound(&symbol.low), bound(&symbol.high));
            said.notes
                .insert(0, format!("looked for between {low} and {high}"));
            for bound in [&symbol.low, &symbol.high] {
                Render::new(self, statement, at, said).walk(bound, true);
            }
        }
    }

    /// Both sides of an equation at the solution, and what is left between them.
    fn residual(&self, statement: usize, left: &Expr, right: &Expr, at: &At, said: &mut Said) {
        let sides = [left, right].map(|side| self.seen(0, statement, side.span));
        let [Some(l), Some(r)] = sides else { return };
        let values = [l, r].map(|side| self.columns.of_node(side.node, at));
        let unit = l.unit.as_ref().or(r.unit.as_ref());
        let kind = if l.unit.is_some() { l.kind } else { r.kind };
        let rest = values[0].zip(values[1]).map(|(a, b)| a - b);
        let plain = match kind {
            Kind::Number(n) => Kind::Number(crate::program::NumberKind {
                absolute: false,
                ..n
            }),
            kind => kind,
        };
        said.note(format!(
            "left {}, right {}, left less right {}",
            self.columns.shown(values[0], kind, unit),
            self.columns.shown(values[1], kind, unit),
            self.columns.shown(rest, plain, unit)
        ));
    }
}

/// Whether a bound takes the unit of its bracket.
fn is_number(expr: &Expr) -> bool {
    match &expr.kind {
        ExprKind::Number { unit: None, .. } => true,
        ExprKind::Negate(inner) => is_number(inner),
        _ => false,
    }
}
