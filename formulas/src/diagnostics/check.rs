//! The one check of all code tests: a fault at a piece of text, the sentence it gives, and the text after each fix.

use super::finding::{Edit, Finding};
use super::findings;
use crate::problem::{Conditions, Fault, Located, Operand, Problem};
use crate::span::Span;
use crate::syntax::{
    Definition, DefinitionValue, Expr, ExprKind, Name, Statement, StatementKind, Toleranced, Tree,
};
use crate::syntax::{UnitText, Words};
use engine::quantity::Dimension;

/// The finding of `fault` at the last `part` of a sheet that is one statement, `text`, says `message`, and its fixes
/// are these: title, whether safe, the text with its edits made.
pub(super) fn check(
    text: &str,
    part: &str,
    fault: Fault,
    message: &str,
    fixes: &[(&str, bool, &str)],
) -> Finding {
    let span = place(text, part);
    let kind = StatementKind::Unreadable { defines: None };
    check_in(&sheet(text, kind), text, span, fault, message, fixes)
}

/// The same in a tree made for the purpose.
pub(super) fn check_in(
    tree: &Tree,
    text: &str,
    span: Span,
    fault: Fault,
    message: &str,
    fixes: &[(&str, bool, &str)],
) -> Finding {
    let problem = Problem { span, fault };
    let located = Located {
        statement: Some(0),
        problem,
    };
    let found = findings(&[located], tree, text).remove(0);
    assert_eq!(found.message, message);
    let mended: Vec<_> = found
        .fixes
        .iter()
        .map(|f| (f.title.clone(), f.safe, edited(text, &f.edits)))
        .collect();
    let due: Vec<_> = fixes
        .iter()
        .map(|(title, safe, text)| ((*title).to_owned(), *safe, (*text).to_owned()))
        .collect();
    assert_eq!(mended, due);
    found
}

/// The span of the last `part` of a text.
pub(super) fn place(text: &str, part: &str) -> Span {
    let start = text.rfind(part).unwrap();
    Span::new(start, start + part.len())
}

/// A tree of one statement that takes the whole text.
pub(super) fn sheet(text: &str, kind: StatementKind) -> Tree {
    Tree {
        statements: vec![statement(0, text, kind)],
        problems: Vec::new(),
    }
}

/// A statement at a byte of the sheet.
pub(super) fn statement(start: usize, text: &str, kind: StatementKind) -> Statement {
    Statement {
        start,
        length: text.len(),
        line: 1,
        lines: text.lines().count() as u32,
        kind,
        remark: None::<Words>,
        problems: Vec::new(),
    }
}

/// A definition with a bracket, where `text` has one.
pub(super) fn definition(text: &str, symbol: &str) -> StatementKind {
    let unit = text
        .find('[')
        .zip(text.find(']'))
        .map(|(open, close)| UnitText {
            text: text[open + 1..close].to_owned(),
            span: Span::new(open + 1, close),
            ..UnitText::default()
        });
    let value = Expr {
        span: Span::default(),
        kind: ExprKind::Error,
    };
    StatementKind::Definition(Definition {
        symbol: Name {
            text: symbol.to_owned(),
            span: place(text, symbol),
        },
        unit,
        value: DefinitionValue::One(Toleranced {
            value,
            tolerance: None,
        }),
    })
}

/// An operand at the last place where its text stands.
pub(super) fn operand(text: &str, part: &str, dimension: Dimension, unit: Option<&str>) -> Operand {
    Operand {
        text: part.to_owned(),
        dimension,
        unit: unit.map(str::to_owned),
        span: place(text, part),
    }
}

/// Conditions of axes `point` and `cg`.
pub(super) fn conditions(count: u64, first: &[(&str, &str)]) -> Conditions {
    let pairs = |(point, cg): &(&str, &str)| {
        vec![
            ("point".to_owned(), (*point).to_owned()),
            ("cg".to_owned(), (*cg).to_owned()),
        ]
    };
    Conditions {
        count,
        first: first.iter().map(pairs).collect(),
    }
}

/// Owned names.
pub(super) fn names(names: &[&str]) -> Vec<String> {
    names.iter().map(|n| (*n).to_owned()).collect()
}

/// Makes the edits, counting lines and characters as a reader of the JSON would.
fn edited(text: &str, edits: &[Edit]) -> String {
    let mut out: Vec<char> = text.chars().collect();
    for edit in edits.iter().rev() {
        let lines = text.split_inclusive('\n').take(edit.line as usize - 1);
        let start = lines.map(|l| l.chars().count()).sum::<usize>() + edit.column as usize - 1;
        out.splice(start..start + edit.length as usize, edit.text.chars());
    }
    out.into_iter().collect()
}
