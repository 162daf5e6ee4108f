//! Tree to text: one canonical way to type every statement. Reading it again gives the same tree, places apart.

mod expression;
#[cfg(test)]
pub(crate) mod tests;

use crate::lex::characters::trimmed;
use crate::lex::words::{STATEMENT_WORDS, TITLE_WORDS, title_text};
use crate::syntax::{
    Definition, DefinitionValue, FreebodyItem, FunctionDefinition, ListItem, Name, Parameter, Row,
    Statement, StatementKind, Table, Toleranced, Tree, UnitText, Unknown, Vary, VaryPoints, Words,
};
use expression::{ADD, CONDITION, WHOLE, expression, force, quoted};

/// The tree as text. `text` is what it was read from: a statement with problems is given back as typed, and so are
/// the lines between the rows of a table.
///
/// ```
/// use formulas::{parse::parse, print::print};
/// let text = "S[ft^2]=2*(70+1);drawing OS-010\n";
/// assert_eq!(print(&parse(text), text), "S [ft^2] = 2*(70 + 1) ; drawing OS-010\n");
/// ```
#[must_use]
pub fn print(tree: &Tree, text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for statement in &tree.statements {
        let end = statement.start + statement.length;
        let typed = text.get(statement.start..end).unwrap_or("");
        let line_start = out.len();
        if statement.problems.is_empty() {
            print_statement(statement, typed, &mut out);
        } else {
            out.push_str(typed.trim_end_matches(['\n', '\r']));
        }
        let blanks = out
            .get(line_start..)
            .map_or(0, |line| line.len() - line.trim_end_matches(' ').len());
        out.truncate(out.len() - blanks);
        out.push('\n');
    }
    out
}

fn print_statement(statement: &Statement, typed: &str, out: &mut String) {
    match &statement.kind {
        StatementKind::Blank => {}
        StatementKind::Prose => out.push(';'),
        StatementKind::Title { word, text } => prose(title_text(*word), text, out),
        StatementKind::Part(text) => prose("part", text, out),
        StatementKind::Sub(text) => prose("sub", text, out),
        StatementKind::Note(text) => prose("note", text, out),
        StatementKind::Aside(text) => prose("aside", text, out),
        StatementKind::Definition(definition) => print_definition(definition, out),
        StatementKind::Function(function) => print_function(function, out),
        StatementKind::Vary(vary) => print_vary(vary, out),
        StatementKind::Table(table) => return print_table(statement, table, typed, out),
        StatementKind::Unknown(unknown) => print_unknown(unknown, out),
        StatementKind::Governing { .. } | StatementKind::Require { .. } => {
            print_judged(&statement.kind, out)
        }
        StatementKind::Freebody { name, items } => print_freebody(name, items, out),
        StatementKind::Figure { .. } => print_figure(&statement.kind, out),
        StatementKind::Use { sheet, name } => {
            out.push_str("use ");
            quoted(&sheet.text, out);
            out.push_str(" as ");
            out.push_str(&name.text);
        }
        StatementKind::Unreadable { .. } => out.push_str(trimmed(typed)),
    }
    let separator = if statement.kind == StatementKind::Prose {
        " "
    } else {
        " ; "
    };
    remark(statement.remark.as_ref(), separator, out);
}

fn remark(words: Option<&Words>, separator: &str, out: &mut String) {
    if let Some(words) = words {
        out.push_str(separator);
        out.push_str(&words.text);
    }
}

fn prose(word: &str, text: &Words, out: &mut String) {
    out.push_str(word);
    out.push(' ');
    out.push_str(&text.text);
}

fn bracket(unit: Option<&UnitText>, out: &mut String) {
    if let Some(unit) = unit {
        out.push_str(" [");
        out.push_str(&unit.text);
        out.push(']');
    }
}

/// Items with a separator between them.
fn list<T>(
    items: impl IntoIterator<Item = T>,
    separator: &str,
    out: &mut String,
    mut item: impl FnMut(T, &mut String),
) {
    for (index, value) in items.into_iter().enumerate() {
        if index > 0 {
            out.push_str(separator);
        }
        item(value, out);
    }
}

fn names(names: &[Name], out: &mut String) {
    list(names, ", ", out, |name, out| out.push_str(&name.text));
}

fn parameters(parameters: &[Parameter], separator: &str, out: &mut String) {
    list(parameters, separator, out, |parameter, out| {
        out.push_str(&parameter.name.text);
        bracket(parameter.unit.as_ref(), out);
    });
}

fn toleranced(value: &Toleranced, out: &mut String) {
    expression(&value.value, WHOLE, out);
    if let Some(tolerance) = &value.tolerance {
        out.push_str(" +/- ");
        expression(tolerance, ADD, out);
    }
}

fn print_definition(definition: &Definition, out: &mut String) {
    out.push_str(&definition.symbol.text);
    bracket(definition.unit.as_ref(), out);
    match &definition.value {
        DefinitionValue::One(value) => {
            out.push_str(" = ");
            toleranced(value, out);
        }
        DefinitionValue::ByAxis { axis, items } => {
            out.push_str(" by ");
            out.push_str(&axis.text);
            out.push_str(" = ");
            list(items, " | ", out, list_item);
        }
    }
}

fn list_item(item: &ListItem, out: &mut String) {
    if let Some(label) = &item.label {
        print_label(&label.text, ":,=()[]", out);
        out.push_str(": ");
    }
    toleranced(&item.value, out);
}

/// A label, in quotes where it would not be read as it is.
fn print_label(text: &str, special: &str, out: &mut String) {
    let first = text
        .split(|character: char| !character.is_alphanumeric())
        .next()
        .unwrap_or("");
    let plain = !text.is_empty()
        && trimmed(text) == text
        && !text
            .contains(|character: char| "|;\"".contains(character) || special.contains(character))
        && !STATEMENT_WORDS.contains(&first)
        && !TITLE_WORDS.contains(&first);
    if plain {
        out.push_str(text);
    } else {
        quoted(text, out);
    }
}

fn print_function(function: &FunctionDefinition, out: &mut String) {
    out.push_str(&function.name.text);
    out.push('(');
    parameters(&function.parameters, ", ", out);
    out.push(')');
    bracket(function.unit.as_ref(), out);
    out.push_str(" = ");
    expression(&function.body, WHOLE, out);
}

fn print_vary(vary: &Vary, out: &mut String) {
    out.push_str("vary ");
    out.push_str(&vary.name.text);
    bracket(vary.unit.as_ref(), out);
    out.push_str(": ");
    let range = |from, to, word: &str, last, out: &mut String| {
        expression(from, ADD, out);
        out.push_str(" to ");
        expression(to, ADD, out);
        out.push_str(word);
        expression(last, ADD, out);
    };
    match &vary.points {
        VaryPoints::Labels(labels) => list(labels, " | ", out, |label, out| {
            print_label(&label.text, "", out)
        }),
        VaryPoints::List(points) => {
            list(points, " | ", out, |point, out| expression(point, ADD, out))
        }
        VaryPoints::Step { from, to, step } => range(from, to, " step ", step, out),
        VaryPoints::Count { from, to, count } => range(from, to, " count ", count, out),
    }
}

fn print_table(statement: &Statement, table: &Table, typed: &str, out: &mut String) {
    out.push_str("table ");
    parameters(&table.keys, ", ", out);
    for column in &table.columns {
        out.push_str(" | ");
        parameters(std::slice::from_ref(column), "", out);
    }
    remark(statement.remark.as_ref(), " ; ", out);
    let first = header_lines(table, typed);
    let mut rows = table.rows.iter().peekable();
    for (index, line) in lines(typed).enumerate().skip(first) {
        out.push('\n');
        match rows.next_if(|row| row.line as usize == index) {
            Some(row) => print_row(row, table, out),
            None => out.push_str(trimmed(line)),
        }
    }
}

/// How many lines the header takes: the last of them does not end in `|` or `,`.
fn header_lines(table: &Table, typed: &str) -> usize {
    let first_row = table
        .rows
        .first()
        .map_or(usize::MAX, |row| row.line as usize);
    let code = |line: &str| {
        let tokens = crate::lex::lex(line);
        let last = tokens
            .iter()
            .rev()
            .find(|token| !token.kind.is_trivia())
            .map(|token| token.kind);
        matches!(
            last,
            Some(crate::token::TokenKind::Bar | crate::token::TokenKind::Comma)
        )
    };
    let header = lines(typed)
        .take(first_row)
        .take_while(|line| code(line))
        .count();
    (header + 1).min(first_row)
}

/// The lines of a text without their ends.
fn lines(typed: &str) -> impl Iterator<Item = &str> {
    let mut from = 0;
    std::iter::from_fn(move || {
        if from >= typed.len() {
            return None;
        }
        let (to, next) = crate::lex::line_end(typed, from);
        let line = typed.get(from..to);
        from = next;
        line
    })
}

fn print_row(row: &Row, table: &Table, out: &mut String) {
    let special = if table.keys.len() > 1 { ",=" } else { "=" };
    list(
        row.keys.iter().zip(&table.keys),
        ", ",
        out,
        |(label, key), out| {
            if key.unit.is_some() {
                out.push_str(&label.text)
            } else {
                print_label(&label.text, special, out)
            }
        },
    );
    for cell in &row.cells {
        out.push_str(" | ");
        toleranced(cell, out);
    }
    remark(row.remark.as_ref(), " ; ", out);
}

fn print_unknown(unknown: &Unknown, out: &mut String) {
    out.push_str("unknown ");
    list(&unknown.unknowns, ", ", out, |one, out| {
        out.push_str(&one.symbol.text);
        bracket(one.unit.as_ref(), out);
        out.push_str(" between ");
        expression(&one.low, ADD, out);
        out.push_str(" and ");
        expression(&one.high, ADD, out);
    });
    out.push_str(" such that ");
    list(&unknown.equations, " and ", out, |(left, right), out| {
        expression(left, ADD, out);
        out.push_str(" = ");
        expression(right, ADD, out);
    });
}

fn print_judged(kind: &StatementKind, out: &mut String) {
    match kind {
        StatementKind::Governing { symbols, over } => {
            out.push_str("governing ");
            list(symbols, ", ", out, |symbol, out| {
                expression(symbol, ADD, out)
            });
            if let Some(over) = over {
                out.push_str(" over ");
                names(over, out);
            }
        }
        StatementKind::Require { condition } => {
            out.push_str("require ");
            expression(condition, CONDITION, out);
        }
        _ => {}
    }
}

fn print_freebody(name: &Words, items: &[FreebodyItem], out: &mut String) {
    out.push_str("freebody ");
    quoted(&name.text, out);
    out.push_str(": ");
    list(items, ", ", out, |item, out| match item {
        FreebodyItem::Force { force: up, station } => {
            force(up, out);
            out.push_str(" @ ");
            expression(station, ADD, out);
        }
        FreebodyItem::Axial { force, height } => {
            out.push_str("axial ");
            expression(force, ADD, out);
            out.push_str(" @ ");
            expression(height, ADD, out);
        }
        FreebodyItem::Couple { moment } => {
            out.push_str("couple ");
            expression(moment, ADD, out);
        }
    });
}

fn print_figure(kind: &StatementKind, out: &mut String) {
    let StatementKind::Figure {
        name,
        curves,
        against,
        each,
        closed,
    } = kind
    else {
        return;
    };
    out.push_str("figure ");
    quoted(&name.text, out);
    out.push_str(": ");
    list(curves, ", ", out, |curve, out| expression(curve, ADD, out));
    out.push_str(" against ");
    expression(against, ADD, out);
    if !each.is_empty() {
        out.push_str(" each ");
        names(each, out);
    }
    if *closed {
        out.push_str(" closed");
    }
}
