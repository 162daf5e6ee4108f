//! A finding in the making: words and changes by spans, before lines and columns are counted.

use super::finding::Severity;
use crate::problem::{Conditions, Mend};
use crate::span::Span;
use crate::syntax::{Statement, StatementKind, Tree};

/// Where a problem stands, and what can be read there.
#[derive(Clone, Copy)]
pub(super) struct Site<'a> {
    /// The whole tree.
    pub(super) tree: &'a Tree,
    /// The statement, unless the problem is one of the sheet as a whole.
    pub(super) statement: Option<&'a Statement>,
    /// The text that spans count in.
    pub(super) text: &'a str,
    /// The stretch at fault.
    pub(super) span: Span,
}

impl<'a> Site<'a> {
    /// The text at fault, as typed.
    pub(super) fn typed(&self) -> &'a str {
        self.span.of(self.text)
    }

    /// The text before the stretch at fault.
    pub(super) fn before(&self) -> &'a str {
        self.text.get(..self.span.start as usize).unwrap_or("")
    }

    /// The text behind the stretch at fault.
    pub(super) fn behind(&self) -> &'a str {
        self.text.get(self.span.end as usize..).unwrap_or("")
    }

    /// Where a part of the text at fault stands, for the last time.
    pub(super) fn find(&self, part: &str) -> Option<Span> {
        let at = self.span.start as usize + self.typed().rfind(part)?;
        Some(Span::new(at, at + part.len()))
    }

    /// The end of the argument, cell or right side in which the stretch at fault stands, blanks left off.
    pub(super) fn end_of_part(&self) -> Option<Span> {
        let start = self.span.start as usize;
        let rest = self.text.get(start..)?;
        let length = part_length(rest);
        // What stands behind a remark is the next line of the same part, and that is not searched for its end.
        let behind = rest.get(length..)?;
        if behind.starts_with(';') && behind.trim_end().contains('\n') {
            return None;
        }
        let end = start + rest.get(..length)?.trim_end().len();
        Some(Span::new(end, end))
    }

    /// Puts a text in the place of the stretch at fault.
    pub(super) fn replace(&self, text: impl Into<String>) -> Mend {
        put(self.span, text)
    }

    /// The text at fault with a change made, where the change lies inside it.
    pub(super) fn mended(&self, mend: &Mend) -> Option<String> {
        let start = mend.span.start.checked_sub(self.span.start)? as usize;
        let end = mend.span.end.checked_sub(self.span.start)? as usize;
        let (before, behind) = (self.typed().get(..start)?, self.typed().get(end..)?);
        Some(format!("{before}{}{behind}", mend.text))
    }

    /// Whether the sheet, or an own function's line for itself, gives that name a value.
    pub(super) fn defines(&self, name: &str) -> bool {
        let own = self.statement.is_some_and(|s| match &s.kind {
            StatementKind::Function(f) => f.parameters.iter().any(|p| p.name.text == name),
            _ => false,
        });
        own || self.tree.statements.iter().any(|s| gives(&s.kind, name))
    }
}

/// Bytes up to the first separator or closing bracket outside brackets and texts.
fn part_length(text: &str) -> usize {
    let (mut depth, mut quoted) = (0_i32, false);
    for (at, c) in text.char_indices() {
        match c {
            '"' => quoted = !quoted,
            _ if quoted => {}
            '(' | '[' => depth += 1,
            ';' => return at,
            ')' | ']' | ',' | '|' if depth == 0 => return at,
            ')' | ']' => depth -= 1,
            _ => {}
        }
    }
    text.len()
}

fn gives(kind: &StatementKind, name: &str) -> bool {
    match kind {
        StatementKind::Definition(d) => d.symbol.text == name,
        StatementKind::Vary(v) => v.name.text == name,
        StatementKind::Table(t) => t.keys.iter().chain(&t.columns).any(|p| p.name.text == name),
        StatementKind::Unknown(u) => u.unknowns.iter().any(|u| u.symbol.text == name),
        StatementKind::Unreadable { defines: Some(d) } => d.text == name,
        _ => false,
    }
}

/// Puts a text in the place of a stretch.
pub(super) fn put(span: Span, text: impl Into<String>) -> Mend {
    Mend {
        span,
        text: text.into(),
    }
}

/// Puts a text directly before a stretch.
pub(super) fn put_before(span: Span, text: impl Into<String>) -> Mend {
    let start = Span {
        start: span.start,
        end: span.start,
    };
    put(start, text)
}

/// Puts a text directly behind a stretch.
pub(super) fn put_behind(span: Span, text: impl Into<String>) -> Mend {
    put(span.behind(), text)
}

/// A finding without its place.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Draft {
    /// The sentence.
    pub(super) message: String,
    /// Another severity than that of the code.
    pub(super) severity: Option<Severity>,
    /// The conditions concerned.
    pub(super) conditions: Option<Conditions>,
    /// The fixes, likeliest first.
    pub(super) fixes: Vec<DraftFix>,
}

/// A fix by spans.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct DraftFix {
    /// What it does.
    pub(super) title: String,
    /// Whether it is always right.
    pub(super) safe: bool,
    /// The changes.
    pub(super) mends: Vec<Mend>,
}

impl Draft {
    /// A finding that says this.
    pub(super) fn says(message: impl Into<String>) -> Draft {
        Draft {
            message: message.into(),
            severity: None,
            conditions: None,
            fixes: Vec::new(),
        }
    }

    /// With another severity than that of its code.
    pub(super) fn severity(self, severity: Severity) -> Draft {
        Draft {
            severity: Some(severity),
            ..self
        }
    }

    /// About these conditions.
    pub(super) fn about(self, conditions: &Conditions) -> Draft {
        Draft {
            conditions: Some(conditions.clone()),
            ..self
        }
    }

    /// With a fix that is always right.
    pub(super) fn mends(self, title: impl Into<String>, mend: Mend) -> Draft {
        self.fix(title, true, vec![mend])
    }

    /// With a fix that is probably meant.
    pub(super) fn offers(self, title: impl Into<String>, mend: Mend) -> Draft {
        self.fix(title, false, vec![mend])
    }

    /// With a fix.
    pub(super) fn fix(mut self, title: impl Into<String>, safe: bool, mends: Vec<Mend>) -> Draft {
        self.fixes.push(DraftFix {
            title: title.into(),
            safe,
            mends,
        });
        self
    }

    /// With the name that was probably meant in the place of the one typed.
    pub(super) fn offers_name(self, site: &Site<'_>, nearest: Option<&str>) -> Draft {
        match nearest {
            Some(name) => self.offers(format!("Write {name}"), site.replace(name)),
            None => self,
        }
    }
}
