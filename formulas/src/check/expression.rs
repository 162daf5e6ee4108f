//! Expressions: names, numbers, and the way down through the tree.

use super::{CALL_DEPTH_MOST, Checker, Marks, Meaning, Typed, WRITTEN_OUT_MOST};
use crate::axes::AxisSet;
use crate::problem::Fault;
use crate::program::{Kind, NumberKind, Op, QuantityId};
use crate::span::Span;
use crate::syntax::{BinaryOp, Expr, ExprKind, Name, UnitText};
use engine::quantity::{Dimension, constants};

impl Checker<'_> {
    /// Checks an expression. `None` where it failed; then a problem is reported, here or at what it rests on.
    pub(crate) fn expression(&mut self, expr: &Expr) -> Option<Typed> {
        self.count_written_out(expr.span)?;
        let typed = self.expression_of(expr);
        self.trace(expr.span, typed.as_ref());
        typed
    }

    fn expression_of(&mut self, expr: &Expr) -> Option<Typed> {
        match &expr.kind {
            ExprKind::Number { value, unit, more } => {
                self.typed_number(expr.span, *value, unit.as_ref(), more)
            }
            ExprKind::UnitOne(unit) => self.typed_number(expr.span, 1.0, Some(unit), &[]),
            ExprKind::Text(text) => Some(self.text_value(text, expr.span)),
            ExprKind::Name(name) => self.name_value(name, expr.span),
            ExprKind::Field { base, field } => self.field_value(base, field, expr.span),
            ExprKind::None => Some(self.missing(Op::None, expr.span)),
            ExprKind::Excluded => Some(self.missing(Op::Excluded, expr.span)),
            ExprKind::Negate(inner) => {
                let inner = self.expression(inner)?;
                self.opposite(inner, expr.span)
            }
            ExprKind::Not(inner) => {
                let inner = self.expression(inner)?;
                let inner = self.wants_condition(inner, "what stands behind not")?;
                let axes = self.axes_of(inner.node);
                let node = self.node(Op::Not(inner.node), axes);
                Some(Typed::condition(node, expr.span))
            }
            ExprKind::Binary { .. } => self.chain(expr),
            ExprKind::If {
                condition,
                then,
                otherwise,
            } => {
                let condition = self.expression(condition);
                let then = self.expression(then);
                let otherwise = self.expression(otherwise);
                self.choice(condition?, then?, otherwise?, expr.span)
            }
            ExprKind::Call {
                function,
                arguments,
                over,
            } => self.call(function, arguments, over.as_deref(), expr.span),
            ExprKind::Pick {
                base,
                selections,
                word,
            } => self.pick(base, selections, *word, expr.span),
            ExprKind::Error => None,
        }
    }

    /// Signs in a row lean to the left: a long sum is worked through without going deep.
    fn chain(&mut self, expr: &Expr) -> Option<Typed> {
        let mut links: Vec<(BinaryOp, Span, &Expr, Span)> = Vec::new();
        let mut first = expr;
        while let ExprKind::Binary {
            op,
            op_span,
            left,
            right,
        } = &first.kind
        {
            links.push((*op, *op_span, right, first.span));
            first = left;
        }
        let mut result = self.expression(first);
        while let Some((op, op_span, right, span)) = links.pop() {
            self.count_written_out(span)?;
            let right = self.expression(right);
            result = match (result, right) {
                (Some(left), Some(right)) => self.sign(op, op_span, left, right, span),
                _ => None,
            };
        }
        result
    }

    fn sign(
        &mut self,
        op: BinaryOp,
        op_span: Span,
        left: Typed,
        right: Typed,
        span: Span,
    ) -> Option<Typed> {
        match op {
            BinaryOp::Add | BinaryOp::Subtract => self.sum(op, op_span, left, right, span),
            BinaryOp::Multiply | BinaryOp::Divide => self.product(op, left, right, span),
            BinaryOp::Power => self.raised(left, right, span),
            BinaryOp::And | BinaryOp::Or => self.joined(op, left, right, span),
            _ => self.comparison(op, op_span, left, right, span),
        }
    }

    /// Own functions written out may grow without end; this keeps them within the limit.
    fn count_written_out(&mut self, span: Span) -> Option<()> {
        if self.frames.is_empty() {
            return Some(());
        }
        self.written_out += 1;
        if self.written_out == WRITTEN_OUT_MOST + 1 {
            self.report(
                span,
                Fault::OperatorLimit {
                    limit: WRITTEN_OUT_MOST,
                },
            );
        }
        (self.written_out <= WRITTEN_OUT_MOST && self.frames.len() <= CALL_DEPTH_MOST).then_some(())
    }

    /// A number as typed, with its unit.
    pub(crate) fn typed_number(
        &mut self,
        span: Span,
        value: f64,
        unit: Option<&UnitText>,
        more: &[(f64, UnitText)],
    ) -> Option<Typed> {
        let mut marks = Marks {
            literal: true,
            ..Marks::default()
        };
        let Some(unit) = unit else {
            marks.zero = value == 0.0;
            marks.bare = true;
            let node = self.number(value);
            let kind = Kind::Number(NumberKind::of(Dimension::NONE));
            return Some(Typed {
                node,
                kind,
                unit: None,
                span,
                marks,
            });
        };
        let shown = self.resolve_unit(unit)?;
        let mut value = value;
        for (part, unit) in more {
            // Counted in the first unit, so that 1 ft 6 in is 1.5 ft to the last digit.
            let smaller = self.resolve_unit(unit)?.unit;
            value += smaller.factor.over(shown.unit.factor).scale(*part);
        }
        let si = shown.unit.to_si(value);
        let dimension = shown.unit.dimension;
        marks.scale = shown.unit.absolute;
        marks.sea_level = dimension == Dimension::DENSITY && (si - constants::RHO0).abs() <= 1e-12;
        let kind = NumberKind {
            speed: shown.unit.speed_kind,
            absolute: shown.unit.absolute,
            ..NumberKind::of(dimension)
        };
        let node = self.number(si);
        marks = marks.in_system_of(Some(&shown));
        // `[1]` is a unit of pure numbers: nothing is shown behind the value.
        let unit = (!shown.text.is_empty()).then_some(shown);
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks,
        })
    }

    fn text_value(&mut self, text: &str, span: Span) -> Typed {
        let id = self.text_id(text);
        let node = self.number(f64::from(id.0));
        Typed {
            node,
            kind: Kind::Text,
            unit: None,
            span,
            marks: Marks {
                literal: true,
                ..Marks::default()
            },
        }
    }

    fn missing(&mut self, op: Op, span: Span) -> Typed {
        let node = self.node(op, AxisSet::NONE);
        let kind = Kind::Number(NumberKind {
            any: true,
            ..NumberKind::of(Dimension::NONE)
        });
        Typed {
            node,
            kind,
            unit: None,
            span,
            marks: Marks {
                literal: true,
                bare: true,
                ..Marks::default()
            },
        }
    }

    fn name_value(&mut self, name: &str, span: Span) -> Option<Typed> {
        if let Some(frame) = self.frames.last()
            && let Some((_, typed)) = frame.parameters.iter().find(|(n, _)| n == name)
        {
            return Some(Typed {
                span,
                ..typed.clone()
            });
        }
        let Some(index) = self.names.index(name) else {
            return self.constant_value(name, span);
        };
        match self.meanings.get(index)?.clone() {
            Meaning::Unknown => None,
            Meaning::Sheet(_) => self.sheet_as_value(name, span),
            Meaning::Value {
                quantity,
                unit,
                marks,
            } => self.quantity_value(quantity, unit, marks, span),
            Meaning::Record { entry, .. } => {
                let node = self.node(Op::None, AxisSet::NONE);
                Some(Typed {
                    node,
                    kind: Kind::Record(entry),
                    unit: None,
                    span,
                    marks: Marks::default(),
                })
            }
        }
    }

    fn constant_value(&mut self, name: &str, span: Span) -> Option<Typed> {
        let row = super::constant(name)?;
        let node = self.number(row.value);
        let absolute = row.dimension == Dimension::TEMPERATURE;
        let kind = NumberKind {
            absolute,
            ..NumberKind::of(row.dimension)
        };
        let marks = Marks {
            sea_level: row.dimension == Dimension::DENSITY,
            ..Marks::default()
        };
        let unit = if row.dimension.is_number() {
            None
        } else {
            super::units::unit_of_text(row.unit)
        };
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks,
        })
    }

    /// The value of a line that is checked.
    pub(crate) fn quantity_value(
        &mut self,
        quantity: QuantityId,
        unit: Option<crate::program::ShownUnit>,
        marks: Marks,
        span: Span,
    ) -> Option<Typed> {
        let (kind, axes) = {
            let quantity = self.program.quantities.get(quantity.0 as usize)?;
            quantity.node?;
            (quantity.kind, quantity.axes)
        };
        let node = self.node(Op::Quantity(quantity), axes);
        let marks = marks.in_system_of(unit.as_ref());
        Some(Typed {
            node,
            kind,
            unit,
            span,
            marks,
        })
    }

    fn field_value(&mut self, base: &Expr, field: &Name, span: Span) -> Option<Typed> {
        if let Some((sheet, mut path)) = self.used_path(base) {
            path.push(field);
            return self.used_value(&sheet, &path, span);
        }
        if let ExprKind::Name(name) = &base.kind
            && !self
                .frames
                .last()
                .is_some_and(|f| f.parameters.iter().any(|(n, _)| n == name))
            && let Some(index) = self.names.index(name)
            && let Some(Meaning::Record { entry, fields }) = self.meanings.get(index).cloned()
        {
            let Some(at) = entry.fields.iter().position(|f| f.name == field.text) else {
                return self.unknown_field(name.clone(), field, entry);
            };
            let quantity = *fields.get(at)?;
            let unit = self
                .program
                .quantities
                .get(quantity.0 as usize)?
                .unit
                .clone();
            return self.quantity_value(quantity, unit, Marks::default(), span);
        }
        let base_typed = self.expression(base)?;
        let Kind::Record(entry) = base_typed.kind else {
            let fault = Fault::FieldOfNumber {
                name: self.words(base.span),
                field: field.text.clone(),
            };
            self.report(field.span, fault);
            return None;
        };
        let Some(at) = entry.fields.iter().position(|f| f.name == field.text) else {
            return self.unknown_field(self.words(base.span), field, entry);
        };
        self.field_of_call(entry, base_typed.node, at, span)
    }

    fn unknown_field(
        &mut self,
        record: String,
        field: &Name,
        entry: &crate::catalogue::Entry,
    ) -> Option<Typed> {
        let fields = entry.fields.iter().map(|f| f.name.to_string()).collect();
        let nearest = crate::nearest::nearest(&field.text, entry.fields.iter().map(|f| f.name));
        self.report(
            field.span,
            Fault::UnknownField {
                record,
                field: field.text.clone(),
                fields,
                nearest,
            },
        );
        None
    }
}
