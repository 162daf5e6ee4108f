//! What every part of an expression came to when it was checked, for whoever follows a value back.

use super::{Checker, Typed};
use crate::program::{Kind, NodeId, ShownUnit};
use crate::span::Span;
use rustc_hash::FxHashMap;

/// A part of an expression: where it stands, and in which writing out of an own function.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub struct Part {
    /// 0 in a statement itself, else the number of the call whose body is written out.
    pub frame: u32,
    /// The statement.
    pub statement: usize,
    /// Its place there.
    pub span: Span,
}

/// What a part came to.
#[derive(Clone, Debug)]
pub struct Seen {
    /// Its node.
    pub node: NodeId,
    /// What kind of value it has.
    pub kind: Kind,
    /// The unit in which it is shown.
    pub unit: Option<ShownUnit>,
}

/// Everything that was looked at in some statements.
#[derive(Debug, Default)]
pub struct Trace {
    /// By part; what failed is not there.
    pub seen: FxHashMap<Part, Seen>,
    /// For each call of an own function the frame of its body.
    pub bodies: FxHashMap<Part, u32>,
    wanted: Vec<bool>,
    frame: u32,
    frames: u32,
}

impl Trace {
    /// An empty trace of those statements.
    pub(super) fn of(wanted: &[bool]) -> Self {
        Trace {
            wanted: wanted.to_vec(),
            ..Trace::default()
        }
    }

    fn is_wanted(&self, statement: usize) -> bool {
        self.frame > 0 || self.wanted.get(statement).copied().unwrap_or(false)
    }
}

impl Checker<'_> {
    /// Remembers what a part came to.
    pub(super) fn trace(&mut self, span: Span, typed: Option<&Typed>) {
        let statement = self.statement;
        let (Some(trace), Some(typed)) = (self.trace.as_mut(), typed) else {
            return;
        };
        if trace.is_wanted(statement) {
            let part = Part {
                frame: trace.frame,
                statement,
                span,
            };
            let seen = Seen {
                node: typed.node,
                kind: typed.kind,
                unit: typed.unit.clone(),
            };
            trace.seen.insert(part, seen);
        }
    }

    /// Opens the body of an own function that is called at a place; gives the frame to come back to.
    pub(super) fn trace_body(&mut self, caller: usize, call: Span) -> u32 {
        let Some(trace) = self.trace.as_mut() else {
            return 0;
        };
        let outer = trace.frame;
        if trace.is_wanted(caller) {
            trace.frames += 1;
            let part = Part {
                frame: outer,
                statement: caller,
                span: call,
            };
            trace.bodies.insert(part, trace.frames);
            trace.frame = trace.frames;
        }
        outer
    }

    /// Closes it.
    pub(super) fn trace_back(&mut self, outer: u32) {
        if let Some(trace) = self.trace.as_mut() {
            trace.frame = outer;
        }
    }
}
