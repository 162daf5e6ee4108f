//! What a bracket does to the value on the right: bare numbers take its unit, anything else has to fit it.

use super::{Checker, Marks, Typed};
use crate::problem::Fault;
use crate::program::{Kind, NodeId, NumberKind, ShownUnit};
use crate::span::Span;
use crate::syntax::{BinaryOp, Expr, ExprKind};
use engine::quantity::Dimension;

/// A bracket and the symbol it belongs to, for findings.
#[derive(Clone, Debug)]
pub(crate) struct Bracket {
    pub(crate) unit: ShownUnit,
    pub(crate) symbol: String,
}

/// Whether an expression is made of unit-less numbers only.
pub(crate) fn is_bare(expr: &Expr) -> bool {
    match &expr.kind {
        ExprKind::Number { unit: None, .. } | ExprKind::None | ExprKind::Excluded => true,
        ExprKind::Negate(inner) => is_bare(inner),
        ExprKind::Binary {
            op, left, right, ..
        } => {
            use BinaryOp::{Add, Divide, Multiply, Power, Subtract};
            matches!(op, Add | Subtract | Multiply | Divide | Power)
                && is_bare(right)
                && is_bare(left)
        }
        _ => false,
    }
}

impl Checker<'_> {
    /// A right side, list value, cell or bound: under a bracket, each value is judged by itself.
    pub(crate) fn value_under(&mut self, expr: &Expr, bracket: Option<&Bracket>) -> Option<Typed> {
        let Some(under) = bracket else {
            return self.expression(expr);
        };
        if let ExprKind::If {
            condition,
            then,
            otherwise,
        } = &expr.kind
        {
            let condition = self.expression(condition);
            let then = self.value_under(then, bracket);
            let otherwise = self.value_under(otherwise, bracket);
            let choice = self.choice(condition?, then?, otherwise?, expr.span)?;
            let unit = (!under.unit.text.is_empty()).then(|| under.unit.clone());
            return Some(Typed { unit, ..choice });
        }
        let typed = self.expression(expr)?;
        if is_bare(expr) {
            return Some(self.bare_under(typed, &under.unit));
        }
        self.fits_bracket(typed, expr, under)
    }

    /// So many of the bracket's unit.
    pub(crate) fn bare_under(&mut self, typed: Typed, unit: &ShownUnit) -> Typed {
        let node = match self.constant_of(typed.node) {
            Some(value) => self.number(unit.unit.to_si(value)),
            None if typed.number_kind().any
                && self.axes_of(typed.node).is_empty()
                && self.is_missing(typed.node) =>
            {
                typed.node
            }
            None => self.scaled(typed.node, unit),
        };
        let kind = NumberKind {
            speed: unit.unit.speed_kind,
            absolute: unit.unit.absolute,
            any: false,
            dimension: unit.unit.dimension,
        };
        let marks = Marks {
            literal: true,
            sea_level: self.is_sea_level(node, kind.dimension),
            ..Marks::default()
        };
        let unit = (!unit.text.is_empty()).then(|| unit.clone());
        Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span: typed.span,
            marks,
        }
    }

    fn is_missing(&self, node: NodeId) -> bool {
        use crate::program::Op;
        matches!(
            self.program.nodes.get(node.0 as usize).map(|n| &n.op),
            Some(Op::None | Op::Excluded)
        )
    }

    fn is_sea_level(&self, node: NodeId, dimension: Dimension) -> bool {
        dimension == Dimension::DENSITY
            && self
                .constant_of(node)
                .is_some_and(|v| (v - engine::quantity::constants::RHO0).abs() <= 1e-12)
    }

    /// A bare value that could not be worked out in advance (a division by zero): scaled when it is.
    fn scaled(&mut self, node: NodeId, unit: &ShownUnit) -> NodeId {
        let factor = self.number(unit.unit.to_si(1.0) - unit.unit.to_si(0.0));
        let scaled = self.binary(BinaryOp::Multiply, node, factor);
        let offset = self.number(unit.unit.to_si(0.0));
        self.binary(BinaryOp::Add, scaled, offset)
    }

    /// An ordinary value: the bracket names the unit shown, and the dimension has to match.
    fn fits_bracket(&mut self, typed: Typed, expr: &Expr, bracket: &Bracket) -> Option<Typed> {
        let typed = self.wants_number(typed, &bracket.symbol)?;
        let unit = bracket.unit.unit;
        let kind = typed.number_kind();
        if !kind.any && !kind.dimension.matches(unit.dimension) {
            if kind
                .dimension
                .times(Dimension::ACCELERATION)
                .is_some_and(|d| d.matches(unit.dimension))
            {
                self.report_mass(&typed);
                return None;
            }
            let fault = Fault::BracketDimension {
                symbol: bracket.symbol.clone(),
                bracket: bracket.unit.text.to_string(),
                bracket_dimension: unit.dimension,
                value: self.operand(&typed),
            };
            self.report(typed.span, fault);
            self.likely_other_unit(&typed, unit.dimension);
            return None;
        }
        if let (Some(wanted), Some(value)) = (unit.speed_kind, kind.speed)
            && wanted != value
        {
            let symbol = bracket.symbol.clone();
            self.report(
                typed.span,
                Fault::BracketSpeedKind {
                    symbol,
                    bracket: wanted,
                    value,
                },
            );
            return None;
        }
        if unit.absolute && typed.marks.difference {
            self.report(
                typed.span,
                Fault::TemperatureDifference {
                    text: self.words(typed.span),
                },
            );
            return None;
        }
        if unit.dimension.is_angle() && !kind.dimension.is_angle() && !kind.any {
            self.warn_angle(expr, &bracket.symbol.clone());
        }
        let kind = NumberKind {
            dimension: unit.dimension,
            speed: unit
                .speed_kind
                .or(kind.speed.filter(|_| unit.dimension == Dimension::SPEED)),
            absolute: unit.absolute || kind.absolute,
            any: false,
        };
        let unit = (!bracket.unit.text.is_empty()).then(|| bracket.unit.clone());
        Some(Typed {
            kind: Kind::Number(kind),
            unit,
            ..typed
        })
    }

    /// A pure number where an angle is due keeps its value in radians; the number that may have wanted a unit is named.
    pub(crate) fn warn_angle(&mut self, expr: &Expr, place: &str) {
        let number =
            |e: &Expr| matches!(e.kind, ExprKind::Number { unit: None, .. }).then_some(e.span);
        let (mut factor, mut divisor): (Option<Span>, Option<Span>) = (None, None);
        match &expr.kind {
            ExprKind::Binary {
                op: BinaryOp::Divide,
                left,
                right,
                ..
            } => {
                divisor = number(right);
                factor = number(left);
            }
            ExprKind::Binary {
                op: BinaryOp::Multiply,
                left,
                right,
                ..
            } => factor = number(left).or(number(right)),
            ExprKind::Number { unit: None, .. } => factor = Some(expr.span),
            _ => {}
        }
        let fault = Fault::NumberAsAngle {
            place: place.to_string(),
            number: factor,
            divides: divisor,
        };
        self.report(expr.span, fault);
    }
}
