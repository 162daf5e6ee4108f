//! The sheet language: text in, checked and evaluated report out.
//!
//! The stages in the order in which they run: [`source`], lex, [`parse`], names and graph, check, plan, run,
//! [`report`]. Problems leave any stage as facts ([`problem`]) and become findings in [`diagnostics`].

pub mod axes;
pub mod catalogue;
pub mod diagnostics;
pub mod problem;
pub mod program;
pub mod report;
pub mod span;
pub mod syntax;
pub mod values;
