//! What findings say of operands, and small questions about kinds.

use super::{Checker, Marks, Typed};
use crate::problem::{Fault, Operand};
use crate::program::{Kind, NodeId, NumberKind};
use crate::span::Span;
use engine::quantity::Dimension;

/// What a kind is called in a sentence.
pub(crate) fn kind_name(kind: Kind) -> &'static str {
    match kind {
        Kind::Number(_) => "a number",
        Kind::Condition => "a condition",
        Kind::Text => "text",
        Kind::Record(_) => "a record",
    }
}

impl Typed {
    /// A condition of that node.
    pub(crate) fn condition(node: NodeId, span: Span) -> Self {
        Typed {
            node,
            kind: Kind::Condition,
            unit: None,
            span,
            marks: Marks::default(),
        }
    }

    /// The dimension, of a number.
    pub(crate) fn dimension(&self) -> Dimension {
        match self.kind {
            Kind::Number(n) => n.dimension,
            _ => Dimension::NONE,
        }
    }

    /// What is known of a number.
    pub(crate) fn number_kind(&self) -> NumberKind {
        match self.kind {
            Kind::Number(n) => n,
            _ => NumberKind::of(Dimension::NONE),
        }
    }

    /// Whether it fits any dimension: `none`, `excluded`, or a lone `0` where that counts.
    pub(crate) fn fits_any(&self) -> bool {
        self.marks.zero || matches!(self.kind, Kind::Number(n) if n.any)
    }
}

impl Checker<'_> {
    /// The facts of an operand for a sentence.
    pub(crate) fn operand(&self, typed: &Typed) -> Operand {
        Operand {
            text: self.words(typed.span),
            dimension: typed.dimension(),
            unit: typed.unit.as_ref().map(|u| u.text.to_string()),
            span: typed.span,
        }
    }

    /// Passes a number on; anything else is reported.
    pub(crate) fn wants_number(&mut self, typed: Typed, place: &str) -> Option<Typed> {
        match typed.kind {
            Kind::Number(_) => Some(typed),
            Kind::Record(entry) => {
                let record = self.words(typed.span);
                let fields = entry.fields.iter().map(|f| f.name.to_string()).collect();
                self.report(typed.span, Fault::RecordAsNumber { record, fields });
                None
            }
            kind => self.wrong_kind(typed.span, place, "a number", kind),
        }
    }

    /// Passes a condition on; anything else is reported.
    pub(crate) fn wants_condition(&mut self, typed: Typed, place: &str) -> Option<Typed> {
        match typed.kind {
            Kind::Condition => Some(typed),
            Kind::Number(n) if n.any => Some(Typed {
                kind: Kind::Condition,
                ..typed
            }),
            kind => self.wrong_kind(typed.span, place, "a condition", kind),
        }
    }

    pub(crate) fn wrong_kind(
        &mut self,
        span: Span,
        place: &str,
        wanted: &'static str,
        found: Kind,
    ) -> Option<Typed> {
        let fault = Fault::WrongKind {
            place: place.to_string(),
            wanted,
            found: kind_name(found),
            quote: None,
        };
        self.report(span, fault);
        None
    }

    /// Two dimensions that had to be the same. A mass beside a force is told as what it is.
    pub(crate) fn mismatch(
        &mut self,
        sign: &str,
        left: &Typed,
        right: &Typed,
        span: Span,
    ) -> Option<Typed> {
        let (l, r) = (left.dimension(), right.dimension());
        if l.times(Dimension::ACCELERATION)
            .is_some_and(|d| d.matches(r))
        {
            self.report_mass(left);
        } else if r
            .times(Dimension::ACCELERATION)
            .is_some_and(|d| d.matches(l))
        {
            self.report_mass(right);
        } else {
            let fault = Fault::DimensionMismatch {
                sign: sign.to_string(),
                left: self.operand(left),
                right: self.operand(right),
            };
            self.report(span, fault);
            self.likely_other_unit(left, r);
            self.likely_other_unit(right, l);
        }
        None
    }

    /// `600 kg` where a force is due.
    pub(crate) fn report_mass(&mut self, typed: &Typed) {
        let fault = Fault::MassForForce {
            value: self.operand(typed),
            is_number: typed.marks.literal,
        };
        self.report(typed.span, fault);
    }

    /// Advice where one unit was typed and its near twin would fit.
    pub(crate) fn likely_other_unit(&mut self, typed: &Typed, wanted: Dimension) {
        if !typed.marks.literal {
            return;
        }
        let Some(unit) = &typed.unit else { return };
        let likely = match &*unit.text {
            "kN" if wanted.matches(Dimension::SPEED) => "kn",
            "kn" | "kt" if wanted.matches(Dimension::FORCE) => "kN",
            "g" if wanted.matches(Dimension::ACCELERATION) => "g0",
            "g" if wanted.is_number() => "a load factor without unit",
            "nm" if wanted.matches(Dimension::LENGTH) => "NM",
            _ => return,
        };
        let fault = Fault::LikelyOtherUnit {
            unit: unit.text.to_string(),
            likely: likely.to_string(),
        };
        self.report(typed.span, fault);
    }
}
