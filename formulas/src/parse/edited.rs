//! Reading after an edit: only statements that the edit may touch are read, the others are taken over.

use super::lines::Reader;
use crate::source::{Limits, Source};
use crate::syntax::{Statement, StatementKind, Tree};

/// All statements of a text that came from another by an edit, given with its tree: what [`super::lines::read`] gives.
pub(super) fn read(source: &Source<'_>, limits: &Limits, before: (&str, Tree)) -> Tree {
    let (text, (before, mut old)) = (source.text(), before);
    let cut = !source.problems().is_empty() || !old.problems.is_empty();
    let (first, last) = if cut { (0, 0) } else { common(before, text) };
    let mut kept = untouched(&old.statements, first);
    // Within the title block it counts which of its lines stand above.
    if !closed(old.statements.get(..kept).unwrap_or(&[])) {
        kept = 0;
    }
    let line = old.statements.get(..kept).and_then(|kept| kept.last());
    let line = line.map_or(0, |s| (s.line + s.lines) as usize - 1);
    let mut reader = Reader::new(source, limits, line, kept > 0);
    let mut rest = old.statements.split_off(kept);
    let mut statements = old.statements;
    // From here to its end the text is what it was; statements that begin at the same place there are the same.
    let same_from = text.len() - last;
    let mut next = 0;
    while !reader.is_done() {
        let at = reader.byte();
        if at >= same_from && last > 0 && reader.block_is_closed() {
            let place = at + before.len() - text.len();
            while rest.get(next).is_some_and(|s| s.start < place) {
                next += 1;
            }
            let meets = rest.get(next).is_some_and(|s| s.start == place);
            let block_was_closed = kept > 0 || closed(rest.get(..next).unwrap_or(&[]));
            if meets && block_was_closed {
                let line = reader.line() as u32 + 1;
                statements.extend(moved(rest.split_off(next), at, line));
                return Tree {
                    statements,
                    problems: Vec::new(),
                };
            }
        }
        statements.push(reader.statement());
    }
    Tree {
        statements,
        problems: source.problems().to_vec(),
    }
}

/// Statements as they were, the first of them at another byte and line.
fn moved(mut statements: Vec<Statement>, start: usize, line: u32) -> Vec<Statement> {
    let Some((from, first)) = statements.first().map(|s| (s.start, s.line)) else {
        return statements;
    };
    for statement in &mut statements {
        statement.start = statement.start - from + start;
        statement.line = statement.line - first + line;
    }
    statements
}

/// How many statements a change behind the first `same` bytes cannot touch.
///
/// A statement may go on in the line behind it, and a table without an end looks past blank lines, remarks and asides.
fn untouched(statements: &[Statement], same: usize) -> usize {
    let mut kept = statements.partition_point(|s| s.start + s.length <= same);
    let passed = |s: &Statement| {
        matches!(
            s.kind,
            StatementKind::Blank | StatementKind::Prose | StatementKind::Aside(_)
        )
    };
    while kept > 0 && statements.get(kept - 1).is_some_and(passed) {
        kept -= 1;
    }
    kept.saturating_sub(1)
}

/// Whether statements close the title block.
fn closed(statements: &[Statement]) -> bool {
    let passes = |s: &Statement| {
        matches!(
            s.kind,
            StatementKind::Blank | StatementKind::Title { .. } | StatementKind::Aside(_)
        )
    };
    !statements.iter().all(passes)
}

/// How many bytes two texts begin and end with in common, no byte counted twice.
fn common(one: &str, two: &str) -> (usize, usize) {
    let pairs = one.bytes().zip(two.bytes());
    let first = pairs.take_while(|(a, b)| a == b).count();
    let rest = one.len().min(two.len()) - first;
    let pairs = one.bytes().rev().zip(two.bytes().rev()).take(rest);
    (first, pairs.take_while(|(a, b)| a == b).count())
}

#[cfg(test)]
mod tests {
    use super::super::{parse, parse_edited};

    #[test]
    fn what_an_edit_leaves_is_what_reading_anew_gives() {
        let text = "title t\n\nnote n\ntable k | a ; all\np | 1\n\n; remark\nq | 2\n\naside x\nx = 1 +\n 2\ny = x\nz = 3";
        let pieces = [
            "",
            "\n",
            "end\n",
            "|",
            "+",
            "title u\n",
            "= ",
            "\r",
            "r | 3\n",
            "not ",
            "é",
        ];
        for at in 0..=text.len() {
            for length in [0, 1, 9] {
                for piece in pieces {
                    let to = (at + length).min(text.len());
                    let new = [&text[..at], piece, &text[to..]].concat();
                    let tree = parse_edited(&new, (text, parse(text)));
                    assert_eq!(tree, parse(&new), "{new:?}");
                    let back = parse_edited(text, (&new, parse(&new)));
                    assert_eq!(back, parse(text), "back from {new:?}");
                }
            }
        }
    }
}
