//! Comparisons, `and`, `or`, and the choice of an `if`.

use super::{Checker, Marks, Typed};
use crate::program::{Kind, Op};
use crate::span::Span;
use crate::syntax::BinaryOp;

impl Checker<'_> {
    /// `a < b` and its kin.
    pub(crate) fn comparison(
        &mut self,
        op: BinaryOp,
        op_span: Span,
        left: Typed,
        right: Typed,
        span: Span,
    ) -> Option<Typed> {
        let ordered = !matches!(op, BinaryOp::Equal | BinaryOp::NotEqual);
        let any = |t: &Typed| matches!(t.kind, Kind::Number(n) if n.any);
        if left.kind == Kind::Text || right.kind == Kind::Text {
            let both = (left.kind == Kind::Text || any(&left))
                && (right.kind == Kind::Text || any(&right));
            if !both || ordered {
                return self.text_mismatch(op, left, right);
            }
        } else {
            let place = format!("what stands beside {}", op.sign());
            let l = self.wants_number(left.clone(), &place);
            let r = self.wants_number(right.clone(), &place);
            let (l, r) = (l?, r?);
            self.common(op.sign(), &l, &r, op_span)?;
        }
        // Texts are compared by their numbers, which are whole: the tolerance of numbers does not reach them.
        let axes = self.axes_of_all(&[left.node, right.node]);
        let node = self.node(Op::Binary(op, left.node, right.node), axes);
        Some(Typed::condition(node, span))
    }

    fn text_mismatch(&mut self, op: BinaryOp, left: Typed, right: Typed) -> Option<Typed> {
        let other = if left.kind == Kind::Text && right.kind != Kind::Text {
            right
        } else {
            left
        };
        let place = format!("what stands beside {}", op.sign());
        let wanted = if other.kind == Kind::Text {
            "a number"
        } else {
            "text"
        };
        self.wrong_kind(other.span, &place, wanted, other.kind)
    }

    /// `a and b`, `a or b`.
    pub(crate) fn joined(
        &mut self,
        op: BinaryOp,
        left: Typed,
        right: Typed,
        span: Span,
    ) -> Option<Typed> {
        let left = self.wants_condition(left, &format!("what stands before {}", op.sign()));
        let right = self.wants_condition(right, &format!("what stands behind {}", op.sign()));
        let (left, right) = (left?, right?);
        let axes = self.axes_of_all(&[left.node, right.node]);
        let node = self.node(Op::Binary(op, left.node, right.node), axes);
        Some(Typed::condition(node, span))
    }

    /// `if c then a else b`.
    pub(crate) fn choice(
        &mut self,
        condition: Typed,
        then: Typed,
        otherwise: Typed,
        span: Span,
    ) -> Option<Typed> {
        let condition = self.wants_condition(condition, "what stands behind if")?;
        let any = |t: &Typed| matches!(t.kind, Kind::Number(n) if n.any);
        let kind = match (then.kind, otherwise.kind) {
            (Kind::Number(_), Kind::Number(_)) => {
                Kind::Number(self.common("if", &then, &otherwise, span)?)
            }
            (a, b) if a == b && !matches!(a, Kind::Record(_)) => a,
            (a @ (Kind::Text | Kind::Condition), _) if any(&otherwise) => a,
            (_, b @ (Kind::Text | Kind::Condition)) if any(&then) => b,
            (Kind::Record(_), _) => return self.wants_number(then, "what stands behind then"),
            (_, Kind::Record(_)) => return self.wants_number(otherwise, "what stands behind else"),
            (a, b) => {
                let wanted = super::operand::kind_name(a);
                return self.wrong_kind(otherwise.span, "what stands behind else", wanted, b);
            }
        };
        let unit = self.unit_of_operands(&[&then, &otherwise]);
        let node = self.select(condition.node, then.node, otherwise.node);
        let marks = Marks::systems_of(&[&then, &otherwise]);
        Some(Typed {
            node,
            kind,
            unit,
            span,
            marks,
        })
    }

    /// The choice between more than two, for `min max clamp`: all of one dimension.
    pub(crate) fn alike(
        &mut self,
        name: &str,
        operands: &[Typed],
        span: Span,
    ) -> Option<crate::program::NumberKind> {
        let mut all = operands.first()?.clone();
        for next in operands.iter().skip(1) {
            let kind = self.common(name, &all, next, span)?;
            let carrier = if all.fits_any() { next } else { &all };
            let marks = Marks {
                zero: all.marks.zero && next.marks.zero,
                ..Marks::default()
            };
            all = Typed {
                kind: Kind::Number(kind),
                marks,
                ..carrier.clone()
            };
        }
        Some(all.number_kind())
    }
}
