//! A formula with its numbers in: symbols give way to their values, each with its unit, and what was chosen on the way
//! is noted.

use super::columns::At;
use super::look::{Said, Walk};
use crate::assist::joined;
use crate::axes::{AxisId, AxisSet};
use crate::catalogue;
use crate::check::{Part, Seen};
use crate::program::{Op, Reduction};
use crate::span::Span;
use crate::syntax::{Argument, BinaryOp, Expr, ExprKind, Name, Selection, StatementKind};

/// Most values that a note lists.
const LISTED_MOST: usize = 12;

/// An expression of a statement in one condition.
pub(super) struct Render<'w, 's> {
    walk: &'w Walk<'w>,
    frame: u32,
    statement: usize,
    at: At,
    edits: Vec<(Span, String)>,
    said: &'s mut Said,
}

impl<'w, 's> Render<'w, 's> {
    pub(super) fn new(walk: &'w Walk<'w>, statement: usize, at: &At, said: &'s mut Said) -> Self {
        Render {
            walk,
            frame: 0,
            statement,
            at: at.clone(),
            edits: Vec::new(),
            said,
        }
    }

    /// The same statement elsewhere: in another condition, or in a body that is written out.
    fn other(&mut self, frame: u32, statement: usize, at: &At) -> Render<'w, '_> {
        Render {
            frame,
            ..Render::new(self.walk, statement, at, self.said)
        }
    }

    fn seen(&self, span: Span) -> Option<&'w Seen> {
        self.walk.seen(self.frame, self.statement, span)
    }

    fn value(&self, seen: &Seen) -> Option<f64> {
        self.walk.columns.of_node(seen.node, &self.at)
    }

    fn shown(&self, seen: &Seen) -> String {
        let unit = seen.unit.as_ref();
        self.walk.columns.shown(self.value(seen), seen.kind, unit)
    }

    /// A stretch of the statement with the numbers put in.
    pub(super) fn text(&self, span: Span) -> String {
        let text = self.walk.text(self.statement);
        let mut edits: Vec<&(Span, String)> = self
            .edits
            .iter()
            .filter(|(at, _)| at.start >= span.start && at.end <= span.end)
            .collect();
        edits.sort_by_key(|(at, _)| (at.start, std::cmp::Reverse(at.end)));
        let mut out = String::new();
        let mut from = span.start;
        for (at, by) in edits {
            if at.start < from {
                continue;
            }
            out += Span {
                start: from,
                end: at.start,
            }
            .of(text);
            out += by;
            from = at.end;
        }
        out += Span {
            start: from,
            end: span.end,
        }
        .of(text);
        joined(&out)
    }

    fn typed(&self, span: Span) -> String {
        joined(span.of(self.walk.text(self.statement)))
    }

    /// Puts a value in the place of a part, in brackets where its sign or unit would be read otherwise.
    fn put(&mut self, span: Span, seen: &Seen) {
        let unit = seen.unit.as_ref();
        let value = self.walk.columns.typed(self.value(seen), seen.kind, unit);
        let text = self.walk.text(self.statement);
        let before = text.get(..span.start as usize).unwrap_or("");
        let before = before.trim_end_matches([' ', '\t', '\n', '\r']);
        let behind = text.get(span.end as usize..).unwrap_or("").trim_start();
        let power = behind.starts_with(['^', '²', '³']);
        let signed = before.ends_with(['+', '-', '*', '/', '^', '−', '·', '×', '÷', '±']);
        let open = value.starts_with('-') && (signed || power)
            || power && value.contains(' ')
            || value.contains('*') && signed;
        let value = if open { format!("({value})") } else { value };
        self.edits.push((span, value));
    }

    /// Goes through an expression. `whole` says that it is the whole right side, whose value is the result itself.
    pub(super) fn walk(&mut self, expr: &Expr, whole: bool) {
        match &expr.kind {
            ExprKind::Name(name) => self.name(name, expr.span),
            ExprKind::Field { base, .. } => self.field(base, expr.span, whole),
            ExprKind::Negate(inner) | ExprKind::Not(inner) => self.walk(inner, false),
            ExprKind::Binary { .. } => self.chain(expr),
            ExprKind::If {
                condition,
                then,
                otherwise,
            } => self.choice(condition, then, otherwise),
            ExprKind::Call {
                function,
                arguments,
                ..
            } => self.call(expr.span, function, arguments, whole),
            ExprKind::Pick {
                base, selections, ..
            } => self.pick(expr.span, base, selections, whole),
            ExprKind::Number { .. }
            | ExprKind::UnitOne(_)
            | ExprKind::Text(_)
            | ExprKind::None
            | ExprKind::Excluded
            | ExprKind::Error => {}
        }
    }

    /// A long sum is as deep as it is long.
    fn chain(&mut self, expr: &Expr) {
        let mut first = expr;
        let mut right_sides: Vec<(&Expr, BinaryOp)> = Vec::new();
        while let ExprKind::Binary {
            op, left, right, ..
        } = &first.kind
        {
            right_sides.push((right, *op));
            first = left;
        }
        self.walk(first, false);
        for (right, _) in right_sides.into_iter().rev() {
            self.walk(right, false);
        }
    }

    fn is_parameter(&self, name: &str) -> bool {
        let kind = self.walk.statement(self.statement).map(|s| &s.kind);
        matches!(kind, Some(StatementKind::Function(f)) if f.parameters.iter().any(|p| p.name.text == name))
    }

    fn name(&mut self, name: &str, span: Span) {
        let Some(seen) = self.seen(span) else { return };
        if matches!(seen.kind, crate::program::Kind::Record(_)) {
            return;
        }
        self.put(span, seen);
        // What an argument rests on was said where it was given.
        if !self.is_parameter(name) {
            self.rest(seen);
        }
    }

    fn rest(&mut self, seen: &Seen) {
        if let Some(id) = self.walk.quantity_of(seen) {
            self.said.rests.push((id, self.at.clone()));
        }
    }

    fn field(&mut self, base: &Expr, span: Span, whole: bool) {
        let Some(seen) = self.seen(span) else { return };
        if self.walk.quantity_of(seen).is_some() {
            self.put(span, seen);
            return self.rest(seen);
        }
        self.walk(base, true);
        if !whole {
            let note = format!("{} is {}", self.text(span), self.shown(seen));
            self.said.note(note);
        }
    }

    fn choice(&mut self, condition: &Expr, then: &Expr, otherwise: &Expr) {
        self.walk(condition, false);
        let truth = self.seen(condition.span).and_then(|s| self.value(s));
        let text = self.text(condition.span);
        let Some(truth) = truth.filter(|t| !t.is_nan()) else {
            return self.said.note(format!("{text} has no value"));
        };
        let (branch, word) = if truth != 0.0 {
            (then, "true")
        } else {
            (otherwise, "false")
        };
        self.said.note(format!(
            "{text} is {word}: {} counts",
            self.typed(branch.span)
        ));
        self.walk(branch, false);
    }

    fn call(&mut self, span: Span, function: &Name, arguments: &[Argument], whole: bool) {
        let own = self.walk.sheet.names.function(&function.text);
        let Some(seen) = self.seen(span) else {
            return self.arguments(arguments);
        };
        if let Some(statement) = own {
            self.arguments(arguments);
            return self.own(span, statement, seen);
        }
        let entry = catalogue::entry(&function.text);
        if let Some(entry) = entry {
            self.said.method(entry);
        }
        let op = self.walk.columns.op(seen.node).cloned();
        match op {
            Some(Op::Reduce { how, value, over }) => {
                if let Some(argument) = arguments.first() {
                    let reduced = (how, value, over);
                    self.reduction(span, seen, reduced, &argument.value);
                    self.settle(span, seen, whole);
                }
            }
            Some(Op::Along { axis, .. }) => self.whole_line(span, seen, axis, arguments, whole),
            Some(Op::Field(call, _)) => match self.walk.columns.op(call) {
                Some(Op::Call {
                    over: Some(axis), ..
                }) => self.whole_line(span, seen, *axis, arguments, whole),
                _ => self.plain(span, seen, arguments, whole, entry),
            },
            _ => self.plain(span, seen, arguments, whole, entry),
        }
    }

    fn arguments(&mut self, arguments: &[Argument]) {
        for argument in arguments {
            self.walk(&argument.value, true);
        }
    }

    /// A function condition by condition.
    fn plain(
        &mut self,
        span: Span,
        seen: &Seen,
        arguments: &[Argument],
        whole: bool,
        entry: Option<&catalogue::Entry>,
    ) {
        self.arguments(arguments);
        let record = matches!(seen.kind, crate::program::Kind::Record(_));
        let general = entry.is_none_or(|e| e.group == catalogue::GENERAL);
        if !whole && !record && !general {
            let note = format!("{} is {}", self.text(span), self.shown(seen));
            self.said.note(note);
        }
    }

    /// The body of an own function with the arguments in the place of its parameters.
    fn own(&mut self, span: Span, statement: usize, seen: &Seen) {
        let part = Part {
            frame: self.frame,
            statement: self.statement,
            span,
        };
        let walk = self.walk;
        let kind = walk.statement(statement).map(|s| &s.kind);
        let (Some(frame), Some(StatementKind::Function(f))) = (walk.trace.bodies.get(&part), kind)
        else {
            return;
        };
        let (call, value) = (self.text(span), self.shown(seen));
        let place = self.said.notes.len();
        let at = self.at.clone();
        let mut body = self.other(*frame, statement, &at);
        body.walk(&f.body, true);
        let (typed, numbers) = (body.typed(f.body.span), body.text(f.body.span));
        let note = if typed == numbers {
            format!("{call}: {typed} = {value}")
        } else {
            format!("{call}: {typed} = {numbers} = {value}")
        };
        self.said.notes.insert(place, note);
    }

    /// What a part came to stands in its place, unless it is the whole right side.
    fn settle(&mut self, span: Span, seen: &Seen, whole: bool) {
        if !whole {
            self.put(span, seen);
        }
    }

    fn reduction(
        &mut self,
        span: Span,
        seen: &Seen,
        (how, value, over): (Reduction, crate::program::NodeId, AxisSet),
        argument: &Expr,
    ) {
        let walk = self.walk;
        let places = || walk.columns.along(over, &self.at);
        let values: Vec<f64> = places()
            .map(|at| walk.columns.of_node(value, &at).unwrap_or(f64::NAN))
            .collect();
        let result = self.value(seen).unwrap_or(f64::NAN);
        let Some(chosen) = chosen(how, &values, result) else {
            return;
        };
        let Some(at) = places().nth(chosen) else {
            return;
        };
        let labels = walk.columns.labels_text(over, &at);
        let (call, shown) = (self.typed(span), self.shown(seen));
        let note = if matches!(
            how,
            Reduction::Max | Reduction::Min | Reduction::WhereMax(_) | Reduction::WhereMin(_)
        ) {
            format!("{call} is {shown}, the value at {labels}")
        } else {
            let argument = self.seen(argument.span).unwrap_or(seen);
            let list = self.listed(&values, argument);
            format!("{call} is {shown}, of {list}; that at {labels} is followed")
        };
        self.said.note(note);
        self.followed(argument, &at, &labels);
    }

    /// An argument in the condition that is followed.
    fn followed(&mut self, argument: &Expr, at: &At, labels: &str) {
        let seen = self.seen(argument.span);
        let (frame, statement) = (self.frame, self.statement);
        let mut inner = self.other(frame, statement, at);
        inner.walk(argument, true);
        if matches!(argument.kind, ExprKind::Name(_) | ExprKind::Field { .. }) {
            return;
        }
        let (typed, numbers) = (inner.typed(argument.span), inner.text(argument.span));
        if let Some(seen) = seen {
            let value = inner.shown(seen);
            let equal = if typed == numbers {
                String::new()
            } else {
                format!(" = {numbers}")
            };
            self.said
                .note(format!("at {labels}, {typed}{equal} = {value}"));
        }
    }

    /// `12 values: 1 lb, 2 lb, …`.
    fn listed(&self, values: &[f64], seen: &Seen) -> String {
        let unit = seen.unit.as_ref();
        let show = |v: &f64| self.walk.columns.shown(Some(*v), seen.kind, unit);
        let mut list: Vec<String> = values.iter().take(LISTED_MOST).map(show).collect();
        if values.len() > LISTED_MOST {
            list.push("…".to_string());
        }
        let plural = if values.len() == 1 { "" } else { "s" };
        format!("{} value{plural}: {}", values.len(), list.join(", "))
    }

    /// A method that takes whole lines along an axis.
    fn whole_line(
        &mut self,
        span: Span,
        seen: &Seen,
        axis: AxisId,
        arguments: &[Argument],
        whole: bool,
    ) {
        let walk = self.walk;
        let over = AxisSet::of(axis);
        let places: Vec<At> = walk.columns.along(over, &self.at).collect();
        let name = walk.columns.program.axes.get(axis.0 as usize);
        let name = name.map_or("", |a| a.name.as_str());
        let note = format!("{} is {}, along {name}", self.typed(span), self.shown(seen));
        self.said.note(note);
        let mut followed: Option<At> = None;
        for argument in arguments {
            let Some(part) = self.seen(argument.value.span) else {
                continue;
            };
            let values: Vec<f64> = places
                .iter()
                .map(|at| walk.columns.of_node(part.node, at).unwrap_or(f64::NAN))
                .collect();
            let varies = values.windows(2).any(|w| w[0].to_bits() != w[1].to_bits());
            if varies {
                let list = self.listed(&values, part);
                let typed = self.typed(argument.value.span);
                self.said.note(format!("{typed} along {name}: {list}"));
            }
            let at = followed
                .get_or_insert_with(|| {
                    let largest = greatest(&values);
                    places.get(largest).cloned().unwrap_or_default()
                })
                .clone();
            let labels = walk.columns.labels_text(over, &at);
            self.followed(&argument.value, &at, &labels);
        }
        self.settle(span, seen, whole);
    }

    fn pick(&mut self, span: Span, base: &Expr, selections: &[Selection], whole: bool) {
        let Some(seen) = self.seen(span) else { return };
        let walk = self.walk;
        let Some(Op::Pick {
            selections: picked, ..
        }) = walk.columns.op(seen.node)
        else {
            return self.walk(base, whole);
        };
        // Positions stand in our condition, the base in that which they pick.
        let (frame, statement, at) = (self.frame, self.statement, self.at.clone());
        let mut positions = self.other(frame, statement, &at);
        for selection in selections {
            positions.walk(&selection.position, true);
        }
        let typed = positions.text(span);
        let edits = std::mem::take(&mut positions.edits);
        let mut corners: Vec<At> = vec![at.clone()];
        for (axis, node, _) in picked {
            let value = walk.columns.of_node(*node, &at).unwrap_or(f64::NAN);
            let places = self.neighbours(*axis, value);
            corners = corners
                .iter()
                .flat_map(|corner| {
                    places.iter().map(move |place| {
                        let mut at = corner.clone();
                        if let Some(slot) = at.get_mut(axis.0 as usize) {
                            *slot = *place;
                        }
                        at
                    })
                })
                .collect();
        }
        let axes = picked.iter().map(|(axis, ..)| AxisSet::of(*axis));
        let axes = axes.fold(AxisSet::NONE, AxisSet::with);
        let mut said = Vec::new();
        for at in &corners {
            let labels = walk.columns.labels_text(axes, at);
            if let Some(part) = self.seen(base.span) {
                let value = walk.columns.of_node(part.node, at);
                let value = walk.columns.shown(value, part.kind, part.unit.as_ref());
                said.push(format!("{value} at {labels}"));
            }
            self.followed(base, at, &labels);
        }
        let shown = self.shown(seen);
        let between = if said.len() > 1 {
            format!(", between {}", said.join(" and "))
        } else {
            String::new()
        };
        self.said.note(format!("{typed} is {shown}{between}"));
        self.edits.extend(edits);
        self.settle(span, seen, whole);
    }

    /// The places of an axis that a position lies at or between.
    fn neighbours(&self, axis: AxisId, position: f64) -> Vec<usize> {
        let Some(axis) = self.walk.columns.program.axes.get(axis.0 as usize) else {
            return Vec::new();
        };
        let Some(values) = &axis.values else {
            let is = |text: &crate::program::TextId| f64::from(text.0) == position;
            return axis.label_texts.iter().position(is).into_iter().collect();
        };
        let span = values
            .iter()
            .fold(0.0f64, |m, v| m.max((v - values[0]).abs()));
        let on = |v: &f64| (v - position).abs() <= 1e-9 * span.max(f64::MIN_POSITIVE);
        if let Some(at) = values.iter().position(on) {
            return vec![at];
        }
        let within = |pair: &[f64]| {
            let (low, high) = (pair[0].min(pair[1]), pair[0].max(pair[1]));
            low < position && position < high
        };
        match values.windows(2).position(within) {
            Some(at) => vec![at, at + 1],
            // Beyond an end: the end is what is held, or nothing.
            None if position.is_nan() => Vec::new(),
            None => {
                let far = |at: &usize| (values[*at] - position).abs();
                let ends = [0, values.len().saturating_sub(1)];
                let near = ends.into_iter().min_by(|a, b| far(a).total_cmp(&far(b)));
                near.into_iter().collect()
            }
        }
    }
}

/// Which of the values supplied a reduction, or is the greatest among those that all count.
fn chosen(how: Reduction, values: &[f64], result: f64) -> Option<usize> {
    let known = || values.iter().enumerate().filter(|(_, v)| !v.is_nan());
    match how {
        Reduction::Max | Reduction::Min => known().find(|(_, v)| **v == result).map(|(at, _)| at),
        Reduction::WhereMax(_) => best(known(), |a, b| a > b),
        Reduction::WhereMin(_) => best(known(), |a, b| a < b),
        Reduction::All => known()
            .find(|(_, v)| **v == 0.0)
            .map(|(at, _)| at)
            .or(Some(0)),
        Reduction::Any | Reduction::CountTrue => known()
            .find(|(_, v)| **v != 0.0)
            .map(|(at, _)| at)
            .or(Some(0)),
        Reduction::Sum | Reduction::Mean | Reduction::Count | Reduction::Rms => {
            Some(greatest(values))
        }
    }
}

fn best<'v>(
    values: impl Iterator<Item = (usize, &'v f64)>,
    better: impl Fn(f64, f64) -> bool,
) -> Option<usize> {
    let mut best: Option<(usize, f64)> = None;
    for (at, value) in values {
        if best.is_none_or(|(_, known)| better(*value, known)) {
            best = Some((at, *value));
        }
    }
    best.map(|(at, _)| at)
}

/// The place of the largest magnitude, the first of equals.
fn greatest(values: &[f64]) -> usize {
    let known = values.iter().enumerate().filter(|(_, v)| !v.is_nan());
    best(known, |a, b| a.abs() > b.abs()).unwrap_or(0)
}
