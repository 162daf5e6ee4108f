//! Expressions as text, with the brackets they need and no more.

use crate::syntax::{Argument, BinaryOp, Expr, ExprKind, PickWord, UnitText};

/// How tightly a place binds what stands in it; an expression that binds less gets brackets. `WHOLE` takes `if` too.
pub(super) const WHOLE: u8 = 0;
pub(super) const CONDITION: u8 = 1;
const NOT: u8 = 3;
pub(super) const ADD: u8 = 5;
const UNARY: u8 = 7;
const POWER: u8 = 8;
const POSTFIX: u8 = 9;

/// How tightly the signs of an expression bind.
fn binding(expr: &Expr) -> u8 {
    match &expr.kind {
        ExprKind::If { .. } => WHOLE,
        ExprKind::Binary { op, .. } => sign_binding(*op),
        ExprKind::Not(_) => NOT,
        ExprKind::Negate(_) => UNARY,
        // A sign that belongs to the number stands before it all the same.
        ExprKind::Number { value, .. } if value.is_sign_negative() => UNARY,
        _ => POSTFIX,
    }
}

fn sign_binding(op: BinaryOp) -> u8 {
    match op {
        BinaryOp::Or => CONDITION,
        BinaryOp::And => 2,
        BinaryOp::Add | BinaryOp::Subtract => ADD,
        BinaryOp::Multiply | BinaryOp::Divide => 6,
        BinaryOp::Power => POWER,
        _ => 4,
    }
}

/// The expression, in brackets where the place binds tighter than it does.
pub(super) fn expression(expr: &Expr, place: u8, out: &mut String) {
    if binding(expr) < place {
        out.push('(');
        bare(expr, out);
        out.push(')');
    } else {
        bare(expr, out);
    }
}

fn bare(expr: &Expr, out: &mut String) {
    match &expr.kind {
        ExprKind::Number { value, unit, more } => number(*value, unit.as_ref(), more, out),
        ExprKind::UnitOne(unit) => {
            out.push('[');
            out.push_str(&unit.text);
            out.push(']');
        }
        ExprKind::Text(text) => quoted(text, out),
        ExprKind::Name(name) => out.push_str(name),
        ExprKind::Field { base, field } => {
            operand(base, out);
            out.push('.');
            out.push_str(&field.text);
        }
        ExprKind::None | ExprKind::Error => out.push_str("none"),
        ExprKind::Excluded => out.push_str("excluded"),
        ExprKind::Negate(inner) => negation(inner, out),
        ExprKind::Not(inner) => {
            out.push_str("not ");
            expression(inner, NOT, out);
        }
        ExprKind::Binary { .. } => binary(expr, out),
        ExprKind::If {
            condition,
            then,
            otherwise,
        } => {
            out.push_str("if ");
            expression(condition, CONDITION, out);
            out.push_str(" then ");
            expression(then, WHOLE, out);
            out.push_str(" else ");
            expression(otherwise, WHOLE, out);
        }
        ExprKind::Call { .. } | ExprKind::Pick { .. } => with_brackets(&expr.kind, out),
    }
}

/// What a field or a pick is taken of.
fn operand(expr: &Expr, out: &mut String) {
    let place = match expr.kind {
        ExprKind::Number { .. } => POSTFIX + 1,
        _ => POSTFIX,
    };
    expression(expr, place, out);
}

fn with_brackets(kind: &ExprKind, out: &mut String) {
    match kind {
        ExprKind::Call {
            function,
            arguments,
            over,
        } => {
            out.push_str(&function.text);
            out.push('(');
            super::list(arguments, ", ", out, argument);
            if let Some(over) = over {
                out.push_str(" over ");
                super::names(over, out);
            }
            out.push(')');
        }
        ExprKind::Pick {
            base,
            selections,
            word,
        } => {
            operand(base, out);
            out.push_str(" at (");
            super::list(selections, ", ", out, |selection, out| {
                out.push_str(&selection.axis.text);
                out.push_str(": ");
                expression(&selection.position, WHOLE, out);
            });
            out.push_str(match word {
                Some((PickWord::Smooth, _)) => ", smooth)",
                Some((PickWord::Nearest, _)) => ", nearest)",
                Some((PickWord::Held, _)) => ", held)",
                None => ")",
            });
        }
        _ => {}
    }
}

fn argument(argument: &Argument, out: &mut String) {
    if let Some(name) = &argument.name {
        out.push_str(&name.text);
        out.push_str(": ");
    }
    expression(&argument.value, WHOLE, out);
}

/// `-x`. A number to which the sign would belong stands in brackets.
fn negation(inner: &Expr, out: &mut String) {
    out.push('-');
    let takes_sign = matches!(&inner.kind, ExprKind::Number { unit: Some(_), .. });
    expression(inner, if takes_sign { POSTFIX + 1 } else { UNARY }, out);
}

/// A chain of signs, from its innermost left operand on; the chain can be long, so that it is not walked by calls.
fn binary(expr: &Expr, out: &mut String) {
    let mut chain = Vec::new();
    let mut left = expr;
    while let ExprKind::Binary {
        op,
        left: inner,
        right,
        ..
    } = &left.kind
    {
        chain.push((*op, &**inner, &**right));
        if binding(inner) < left_place(*op) {
            break;
        }
        left = inner;
    }
    if let Some((op, inner, _)) = chain.last() {
        expression(inner, base_place(*op, inner), out);
    }
    for (op, inner, right) in chain.iter().rev() {
        sign(*op, ends_in_unit(inner) && !out.ends_with(')'), out);
        expression(right, right_place(*op), out);
    }
}

/// The place left of a sign. Comparisons are not chained, and powers are read from the right.
fn left_place(op: BinaryOp) -> u8 {
    match op {
        BinaryOp::Power => POSTFIX,
        op if op.compares() => ADD,
        op => sign_binding(op),
    }
}

/// A number with a unit would take a power as the unit's.
fn base_place(op: BinaryOp, base: &Expr) -> u8 {
    match &base.kind {
        ExprKind::Number { unit: Some(_), .. } if op == BinaryOp::Power => POSTFIX + 1,
        _ => left_place(op),
    }
}

fn right_place(op: BinaryOp) -> u8 {
    match op {
        BinaryOp::Power => UNARY,
        op => sign_binding(op) + 1,
    }
}

fn sign(op: BinaryOp, behind_unit: bool, out: &mut String) {
    let hard = matches!(op, BinaryOp::Multiply | BinaryOp::Power)
        || (op == BinaryOp::Divide && !behind_unit);
    if hard {
        out.push_str(op.sign());
    } else {
        out.push(' ');
        out.push_str(op.sign());
        out.push(' ');
    }
}

/// Whether the text of an expression ends in the unit of a number, unless it ends in a bracket.
fn ends_in_unit(expr: &Expr) -> bool {
    let mut last = expr;
    loop {
        last = match &last.kind {
            ExprKind::Number { unit, .. } => return unit.is_some(),
            ExprKind::Binary { right, .. } => right,
            ExprKind::Negate(inner) | ExprKind::Not(inner) => inner,
            _ => return false,
        };
    }
}

fn number(value: f64, unit: Option<&UnitText>, more: &[(f64, UnitText)], out: &mut String) {
    if value.is_sign_negative() {
        out.push('-');
    }
    magnitude(value, out);
    for (part, unit) in unit
        .map(|unit| (None, unit))
        .into_iter()
        .chain(more.iter().map(|(value, unit)| (Some(value), unit)))
    {
        if let Some(part) = part {
            out.push(' ');
            magnitude(*part, out);
        }
        out.push(' ');
        out.push_str(&unit.text);
    }
}

/// The shortest decimal that gives the number back, without its sign.
fn magnitude(value: f64, out: &mut String) {
    use std::fmt::Write;
    const LARGE: f64 = 1e16;
    const SMALL: f64 = 1e-5;
    let size = value.abs();
    let plain = size == 0.0 || (SMALL..LARGE).contains(&size);
    // Writing to a text never fails.
    let _ = if plain {
        write!(out, "{size}")
    } else {
        write!(out, "{size:e}")
    };
}

/// A force of a free body. One that begins with a symbol `axial` would be taken for an axial force.
pub(super) fn force(expr: &Expr, out: &mut String) {
    let mut first = expr;
    while let ExprKind::Binary { left, .. } = &first.kind {
        first = left;
    }
    let begins = matches!(&first.kind, ExprKind::Name(name) if name == "axial");
    let whole = matches!(expr.kind, ExprKind::Name(_));
    expression(expr, if begins && !whole { POSTFIX + 1 } else { ADD }, out);
}

/// Text in quotes.
pub(super) fn quoted(text: &str, out: &mut String) {
    out.push('"');
    out.push_str(&text.replace('"', "\"\""));
    out.push('"');
}
