//! Picking: `P_t at (point: "D")`, `Cm at (alpha: a_w, held)`.

use super::{Checker, Marks, Typed};
use crate::axes::{AxisId, AxisSet};
use crate::problem::Fault;
use crate::program::{Kind, NodeId, Op, PickMode};
use crate::span::Span;
use crate::syntax::{Expr, ExprKind, PickWord, Selection};

impl Checker<'_> {
    pub(crate) fn pick(
        &mut self,
        base: &Expr,
        selections: &[Selection],
        word: Option<(PickWord, Span)>,
        span: Span,
    ) -> Option<Typed> {
        let value = self.expression(base);
        let mut picked: Vec<(AxisId, NodeId, PickMode)> = Vec::new();
        let mut failed = false;
        for selection in selections {
            match self.selection(selection, word.map(|w| w.0)) {
                Some(pick) => picked.push(pick),
                None => failed = true,
            }
        }
        let value = value?;
        if failed {
            return None;
        }
        if let Kind::Record(_) = value.kind {
            return self.wants_number(value, "what stands before at");
        }
        self.picked(value, selections, picked, span)
    }

    fn picked(
        &mut self,
        value: Typed,
        selections: &[Selection],
        picked: Vec<(AxisId, NodeId, PickMode)>,
        span: Span,
    ) -> Option<Typed> {
        let has = self.axes_of(value.node);
        let mut gone = AxisSet::NONE;
        for ((axis, _, mode), selection) in picked.iter().zip(selections) {
            if !has.has(*axis) {
                let function = "at".to_string();
                let fault = Fault::AxisNotVaried {
                    function,
                    axis: selection.axis.text.clone(),
                    refused: true,
                };
                self.report(selection.axis.span, fault);
                return None;
            }
            if !matches!(value.kind, Kind::Number(_))
                && *mode != PickMode::Label
                && *mode != PickMode::Nearest
            {
                self.wrong_kind(value.span, "what stands before at", "a number", value.kind);
                return None;
            }
            gone = gone.with(AxisSet::of(*axis));
        }
        let positions: Vec<NodeId> = picked.iter().map(|p| p.1).collect();
        let axes = has.without(gone).with(self.axes_of_all(&positions));
        let node = self.node(
            Op::Pick {
                base: value.node,
                selections: picked,
            },
            axes,
        );
        Some(Typed {
            node,
            span,
            marks: Marks::systems_of(&[&value]),
            ..value
        })
    }

    /// A label for an axis of labels, a number for an axis of numbers.
    fn selection(
        &mut self,
        selection: &Selection,
        word: Option<PickWord>,
    ) -> Option<(AxisId, NodeId, PickMode)> {
        let position = self.expression(&selection.position);
        let axis = *self.axis_of_symbol.get(&selection.axis.text)?;
        let position = position?;
        let (kind, _) = self.axis_kind(axis);
        if kind == Kind::Text {
            if position.kind != Kind::Text && !position.number_kind().any {
                let place = format!("the selection of {}", selection.axis.text);
                self.wrong_kind(selection.position.span, &place, "text", position.kind);
                return None;
            }
            self.known_label(axis, selection)?;
            return Some((axis, position.node, PickMode::Label));
        }
        let place = format!("the selection of {}", selection.axis.text);
        let position = self.wants_number(position, &place)?;
        let values = Typed {
            node: position.node,
            kind,
            unit: self.axis_kind(axis).1,
            span: selection.axis.span,
            marks: Marks::default(),
        };
        self.common("at", &values, &position, selection.position.span)?;
        let mode = match word {
            None => PickMode::Linear,
            Some(PickWord::Smooth) => PickMode::Smooth,
            Some(PickWord::Nearest) => PickMode::Nearest,
            Some(PickWord::Held) => PickMode::Held,
        };
        Some((axis, position.node, mode))
    }

    /// A label typed in quotes has to be one of the axis's.
    fn known_label(&mut self, axis: AxisId, selection: &Selection) -> Option<()> {
        let ExprKind::Text(text) = &selection.position.kind else {
            return Some(());
        };
        let words = crate::syntax::Words {
            text: text.clone(),
            span: selection.position.span,
        };
        self.place_of_label(axis, &words).map(|_| ())
    }
}
