//! Who means whom: every name that a sheet defines, every name that a statement uses, and an order in which the
//! lines can be checked. Circles are found here, on names alone.

use crate::problem::{Fault, Located, Problem};
use crate::program::Program;
use crate::span::Span;
use crate::syntax::{
    Argument, DefinitionValue, Expr, ExprKind, FreebodyItem, Name, Statement, StatementKind,
    Toleranced, Tree,
};
use rustc_hash::FxHashMap;

/// What a symbol stands for.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Role {
    /// A definition.
    Definition,
    /// The axis of a `vary`.
    Axis,
    /// The key of a table, by its index.
    Key(usize),
    /// The column of a table, by its index.
    Column(usize),
    /// An unknown, by its index.
    Unknown(usize),
    /// The name of another sheet.
    Sheet,
    /// A line that could not be read, but would have given the symbol a value.
    Unreadable,
}

/// A symbol and where it gets its value.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Symbol {
    /// The name.
    pub name: String,
    /// The statement that defines it.
    pub statement: usize,
    /// As what.
    pub role: Role,
    /// Where the name stands in the statement.
    pub span: Span,
}

/// All names of a sheet.
#[derive(Clone, Debug, Default)]
pub struct Names {
    /// In the order of the sheet; the first definition of a name stands.
    pub symbols: Vec<Symbol>,
    by_name: FxHashMap<String, usize>,
    functions: FxHashMap<String, usize>,
    /// The own functions with their statements, in the order of the sheet.
    pub function_list: Vec<(String, usize)>,
}

impl Names {
    /// The symbol of that name.
    #[must_use]
    pub fn symbol(&self, name: &str) -> Option<&Symbol> {
        self.by_name.get(name).and_then(|i| self.symbols.get(*i))
    }

    /// Index of a symbol.
    #[must_use]
    pub fn index(&self, name: &str) -> Option<usize> {
        self.by_name.get(name).copied()
    }

    /// The statement that defines an own function.
    #[must_use]
    pub fn function(&self, name: &str) -> Option<usize> {
        self.functions.get(name).copied()
    }

    /// The names of the axes.
    pub fn axis_names(&self) -> impl Iterator<Item = &str> {
        self.symbols
            .iter()
            .filter(|s| matches!(s.role, Role::Axis | Role::Key(_)))
            .map(|s| s.name.as_str())
    }

    /// What a statement is called in a sentence: the first symbol it defines, or its own function.
    #[must_use]
    pub fn of_statement(&self, statement: usize) -> (&str, Span) {
        if let Some(symbol) = self.symbols.iter().find(|s| s.statement == statement) {
            return (&symbol.name, symbol.span);
        }
        let function = self.function_list.iter().find(|(_, s)| *s == statement);
        (function.map_or("", |(name, _)| name), Span::default())
    }

    /// Takes over the axes of another sheet that this one lacks; a name that stands here keeps its meaning.
    pub fn take_axes(&mut self, statement: usize, span: Span, other: &Program) {
        for axis in &other.axes {
            if self.by_name.contains_key(&axis.name) {
                continue;
            }
            self.by_name.insert(axis.name.clone(), self.symbols.len());
            self.symbols.push(Symbol {
                name: axis.name.clone(),
                statement,
                role: Role::Axis,
                span,
            });
        }
    }

    fn add(
        &mut self,
        name: &Name,
        statement: usize,
        role: Role,
        tree: &Tree,
        problems: &mut Vec<Located>,
    ) {
        if let Some(first) = self.by_name.get(&name.text) {
            let first = &self.symbols[*first];
            let same_axis =
                matches!(role, Role::Key(_)) && matches!(first.role, Role::Axis | Role::Key(_));
            if !same_axis && role != Role::Unreadable {
                let first_line = tree.statements.get(first.statement).map_or(0, |s| s.line);
                let fault = Fault::Duplicate {
                    name: name.text.clone(),
                    first_line,
                };
                problems.push(located(statement, name.span, fault));
            }
            return;
        }
        self.by_name.insert(name.text.clone(), self.symbols.len());
        self.symbols.push(Symbol {
            name: name.text.clone(),
            statement,
            role,
            span: name.span,
        });
    }
}

/// A problem at a place of a statement.
pub(crate) fn located(statement: usize, span: Span, fault: Fault) -> Located {
    Located {
        statement: Some(statement),
        problem: Problem { span, fault },
    }
}

/// Collects every name that the sheet defines.
#[must_use]
pub fn collect(tree: &Tree, problems: &mut Vec<Located>) -> Names {
    let mut names = Names::default();
    for (index, statement) in tree.statements.iter().enumerate() {
        collect_statement(&mut names, index, statement, tree, problems);
    }
    names
}

fn collect_statement(
    names: &mut Names,
    index: usize,
    statement: &Statement,
    tree: &Tree,
    problems: &mut Vec<Located>,
) {
    match &statement.kind {
        StatementKind::Definition(d) => {
            names.add(&d.symbol, index, Role::Definition, tree, problems)
        }
        StatementKind::Vary(v) => names.add(&v.name, index, Role::Axis, tree, problems),
        StatementKind::Table(t) => {
            for (i, key) in t.keys.iter().enumerate() {
                names.add(&key.name, index, Role::Key(i), tree, problems);
            }
            for (i, column) in t.columns.iter().enumerate() {
                names.add(&column.name, index, Role::Column(i), tree, problems);
            }
        }
        StatementKind::Unknown(u) => {
            for (i, unknown) in u.unknowns.iter().enumerate() {
                names.add(&unknown.symbol, index, Role::Unknown(i), tree, problems);
            }
        }
        StatementKind::Use { name, .. } => names.add(name, index, Role::Sheet, tree, problems),
        StatementKind::Unreadable {
            defines: Some(name),
        } => {
            names.add(name, index, Role::Unreadable, tree, problems);
        }
        StatementKind::Function(f) => {
            if let Some(first) = names.functions.get(&f.name.text) {
                let first_line = tree.statements.get(*first).map_or(0, |s| s.line);
                let fault = Fault::Duplicate {
                    name: f.name.text.clone(),
                    first_line,
                };
                problems.push(located(index, f.name.span, fault));
            } else {
                names.functions.insert(f.name.text.clone(), index);
                names.function_list.push((f.name.text.clone(), index));
            }
        }
        _ => {}
    }
}

/// One use of a name.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Use<'a> {
    /// As a value.
    Symbol(&'a str, Span),
    /// As a function.
    Function(&'a str, Span),
    /// As an axis.
    Axis(&'a str, Span),
}

/// Reports every name that an expression uses, in the order of the text.
pub fn uses<'a>(expr: &'a Expr, report: &mut dyn FnMut(Use<'a>)) {
    match &expr.kind {
        ExprKind::Name(name) => report(Use::Symbol(name, expr.span)),
        ExprKind::Field { base, .. } => uses(base, report),
        ExprKind::Negate(inner) | ExprKind::Not(inner) => uses(inner, report),
        ExprKind::Binary { left, right, .. } => {
            uses(left, report);
            uses(right, report);
        }
        ExprKind::If {
            condition,
            then,
            otherwise,
        } => {
            uses(condition, report);
            uses(then, report);
            uses(otherwise, report);
        }
        ExprKind::Call {
            function,
            arguments,
            over,
        } => {
            report(Use::Function(&function.text, function.span));
            for Argument { value, .. } in arguments {
                uses(value, report);
            }
            for axis in over.iter().flatten() {
                report(Use::Axis(&axis.text, axis.span));
            }
        }
        ExprKind::Pick {
            base, selections, ..
        } => {
            uses(base, report);
            for selection in selections {
                report(Use::Axis(&selection.axis.text, selection.axis.span));
                uses(&selection.position, report);
            }
        }
        ExprKind::Number { .. }
        | ExprKind::UnitOne(_)
        | ExprKind::Text(_)
        | ExprKind::None
        | ExprKind::Excluded
        | ExprKind::Error => {}
    }
}

fn toleranced<'a>(value: &'a Toleranced, report: &mut dyn FnMut(Use<'a>)) {
    uses(&value.value, report);
    if let Some(tolerance) = &value.tolerance {
        uses(tolerance, report);
    }
}

/// Reports every name that a statement uses. The parameters of an own function are among them.
pub fn statement_uses<'a>(statement: &'a Statement, report: &mut dyn FnMut(Use<'a>)) {
    match &statement.kind {
        StatementKind::Definition(d) => match &d.value {
            DefinitionValue::One(value) => toleranced(value, report),
            DefinitionValue::ByAxis { axis, items } => {
                report(Use::Axis(&axis.text, axis.span));
                items
                    .iter()
                    .for_each(|item| toleranced(&item.value, report));
            }
        },
        StatementKind::Function(f) => uses(&f.body, report),
        StatementKind::Table(t) => {
            for row in &t.rows {
                row.cells.iter().for_each(|cell| toleranced(cell, report));
            }
        }
        StatementKind::Unknown(u) => {
            for unknown in &u.unknowns {
                uses(&unknown.low, report);
                uses(&unknown.high, report);
            }
            for (left, right) in &u.equations {
                uses(left, report);
                uses(right, report);
            }
        }
        StatementKind::Governing { symbols, over } => {
            symbols.iter().for_each(|symbol| uses(symbol, report));
            over.iter()
                .flatten()
                .for_each(|axis| report(Use::Axis(&axis.text, axis.span)));
        }
        StatementKind::Require { condition } => uses(condition, report),
        StatementKind::Freebody { items, .. } => {
            items.iter().for_each(|item| freebody_uses(item, report))
        }
        StatementKind::Figure {
            curves,
            against,
            each,
            ..
        } => {
            curves.iter().for_each(|curve| uses(curve, report));
            uses(against, report);
            each.iter()
                .for_each(|axis| report(Use::Axis(&axis.text, axis.span)));
        }
        _ => {}
    }
}

fn freebody_uses<'a>(item: &'a FreebodyItem, report: &mut dyn FnMut(Use<'a>)) {
    match item {
        FreebodyItem::Force { force, station } => {
            uses(force, report);
            uses(station, report);
        }
        FreebodyItem::Axial { force, height } => {
            uses(force, report);
            uses(height, report);
        }
        FreebodyItem::Couple { moment } => uses(moment, report),
    }
}
