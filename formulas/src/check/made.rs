//! Axes that functions make: named as the result, their labels known before any expression is checked.

use super::Checker;
use crate::axes::AxisId;
use crate::catalogue::{self, Entry, Makes};
use crate::names::Role;
use crate::problem::Fault;
use crate::span::Span;
use crate::syntax::{
    Argument, Definition, DefinitionValue, Expr, ExprKind, Name, StatementKind, Toleranced,
};

/// Fewest points that a function may be asked for.
const POINTS_LEAST: f64 = 2.0;

impl Checker<'_> {
    /// Declares the axis that the right side of a definition makes, if it makes one.
    pub(super) fn declare_made(&mut self, definition: &Definition) {
        let DefinitionValue::One(Toleranced {
            value,
            tolerance: None,
        }) = &definition.value
        else {
            return;
        };
        let ExprKind::Call {
            function,
            arguments,
            ..
        } = &value.kind
        else {
            return;
        };
        let entry = self.row_that_makes(function);
        let Some((entry, makes)) = entry.and_then(|e| Some((e, e.makes?))) else {
            return;
        };
        let name = &definition.symbol;
        let labels = match makes {
            Makes::Count(at) => argument(entry, arguments, at)
                .and_then(|expr| self.counted_labels(&name.text, expr)),
            Makes::Texts(at) => {
                argument(entry, arguments, at).and_then(|expr| self.text_labels(entry, at, expr))
            }
        };
        self.declare_labels(&name.text, name.span, Role::Definition, labels);
    }

    fn row_that_makes(&self, function: &Name) -> Option<&'static Entry> {
        if self.names.function(&function.text).is_some() {
            return None;
        }
        catalogue::entry(&function.text).filter(|e| e.makes.is_some())
    }

    /// 1, 2, ... up to a number typed.
    fn counted_labels(&mut self, axis: &str, count: &Expr) -> Option<Vec<String>> {
        let n = self.fixed(count, None, axis)?;
        if n != n.floor() || n < POINTS_LEAST {
            self.report(
                count.span,
                Fault::AxisSteps {
                    axis: axis.to_string(),
                },
            );
            return None;
        }
        self.within_labels(axis, count.span, n)?;
        Some((1..=n as usize).map(|i| i.to_string()).collect())
    }

    /// The texts of a column or list, each once, in the order of their first appearance.
    fn text_labels(&mut self, entry: &Entry, at: usize, expr: &Expr) -> Option<Vec<String>> {
        let texts = self.typed_texts(expr);
        let Some(texts) = texts.filter(|t| !t.is_empty()) else {
            let argument = entry.parameters.get(at).map_or("", |p| p.name);
            let fault = Fault::MadeAxisTexts {
                function: entry.name.to_string(),
                argument: argument.to_string(),
            };
            self.report(expr.span, fault);
            return None;
        };
        let mut labels: Vec<String> = Vec::new();
        for text in texts {
            if !labels.contains(&text) {
                labels.push(text);
            }
        }
        Some(labels)
    }

    /// The texts typed in a table's column or in a list.
    fn typed_texts(&self, expr: &Expr) -> Option<Vec<String>> {
        let ExprKind::Name(name) = &expr.kind else {
            return None;
        };
        let symbol = self.names.symbol(name)?;
        let values: Vec<&Expr> = match (
            &self.tree.statements.get(symbol.statement)?.kind,
            symbol.role,
        ) {
            (StatementKind::Table(table), Role::Column(at)) => {
                let cells = table.rows.iter().filter_map(|row| row.cells.get(at));
                cells.map(|cell| &cell.value).collect()
            }
            (StatementKind::Definition(definition), Role::Definition) => match &definition.value {
                DefinitionValue::ByAxis { items, .. } => {
                    items.iter().map(|item| &item.value.value).collect()
                }
                DefinitionValue::One(_) => return None,
            },
            _ => return None,
        };
        let text = |expr: &&Expr| match &expr.kind {
            ExprKind::Text(text) => Some(text.clone()),
            _ => None,
        };
        values.iter().map(text).collect()
    }

    /// The axis made by the call in hand. A function that makes one stands alone as a right side.
    pub(super) fn made_axis(
        &mut self,
        entry: &'static Entry,
        span: Span,
    ) -> Option<Option<AxisId>> {
        if entry.makes.is_none() {
            return Some(None);
        }
        match self.making.take() {
            // Where the axis could not be declared, that was told there.
            Some((place, axis)) if place == span => axis.map(Some),
            _ => {
                let fault = Fault::MadeAxisPlace {
                    function: entry.name.to_string(),
                };
                self.report(span, fault);
                None
            }
        }
    }

    /// The axis that a definition makes, and the place of the call that makes it.
    pub(super) fn making_of(&self, definition: &Definition) -> Option<(Span, Option<AxisId>)> {
        let DefinitionValue::One(Toleranced { value, .. }) = &definition.value else {
            return None;
        };
        let ExprKind::Call { function, .. } = &value.kind else {
            return None;
        };
        self.row_that_makes(function)?;
        let axis = self.axis_of_symbol.get(&definition.symbol.text).copied();
        Some((value.span, axis))
    }
}

/// An argument by its name, or else by its place.
fn argument<'a>(entry: &Entry, arguments: &'a [Argument], at: usize) -> Option<&'a Expr> {
    let name = entry.parameters.get(at)?.name;
    let named = arguments
        .iter()
        .find(|a| a.name.as_ref().is_some_and(|n| n.text == name));
    let placed = arguments.get(at).filter(|a| a.name.is_none());
    named.or(placed).map(|a| &a.value)
}
