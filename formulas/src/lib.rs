//! The sheet language: text in, checked and evaluated report out.
//!
//! The stages in the order in which they run: [`source`], [`lex`], [`parse`], [`names`] and [`graph`], [`check`],
//! [`plan`], [`run`], [`report`]. Problems leave any stage as facts ([`problem`]) and become findings in
//! [`diagnostics`]. [`sheet`] is the front door.

pub mod assist;
pub mod axes;
pub mod catalogue;
pub mod check;
pub mod diagnostics;
pub mod graph;
pub mod lex;
pub mod missing;
pub mod names;
mod nearest;
pub mod numbers;
pub mod parse;
pub mod plan;
pub mod print;
pub mod problem;
pub mod program;
pub mod reading;
pub mod reference;
pub mod report;
pub mod run;
mod setting;
pub mod sheet;
pub mod source;
pub mod span;
pub mod syntax;
pub mod token;
pub mod used;
pub mod values;

pub use sheet::Sheet;
