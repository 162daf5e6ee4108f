//! Replacing the right side of an input from outside: `--set` on the command line, `set` elsewhere.

use crate::program::{Program, Quantity};
use crate::syntax::{Definition, DefinitionValue, StatementKind, Table, Toleranced, Tree};

/// The text of the sheet with the right side of an input replaced. One value for a list stands at every label.
///
/// # Errors
/// Gives a sentence where the symbol is no input of the sheet, or the expression is none.
pub(crate) fn replaced(
    text: &str,
    tree: &Tree,
    program: &Program,
    symbol: &str,
    expression: &str,
) -> Result<String, String> {
    let expression = expression.trim();
    if expression.is_empty() || expression.contains(['\n', '\r', ';']) {
        return Err(format!(
            "{symbol} is to be set to an expression or a list, not to '{expression}'."
        ));
    }
    let quantity = program
        .quantities
        .iter()
        .find(|q| q.listed && q.symbol == symbol);
    let Some(quantity) = quantity else {
        return Err(format!("Nothing in this sheet is called {symbol}."));
    };
    if !quantity.input {
        return Err(format!(
            "{symbol} is no input of this sheet, so it cannot be set."
        ));
    }
    let Some(statement) = tree.statements.get(quantity.statement) else {
        return Ok(text.to_string());
    };
    let places = match &statement.kind {
        StatementKind::Definition(definition) => definition_places(definition),
        StatementKind::Table(table) => column_places(table, quantity),
        _ => Vec::new(),
    };
    let values = values_for(symbol, expression, places.len(), &statement.kind)?;
    let mut out = text.to_string();
    for ((from, to), value) in places.into_iter().zip(values).rev() {
        let (from, to) = (statement.start + from, statement.start + to);
        if out.get(from..to).is_some() {
            out.replace_range(from..to, &value);
        }
    }
    Ok(out)
}

fn place(value: &Toleranced) -> (usize, usize) {
    let end = value
        .tolerance
        .as_ref()
        .map_or(value.value.span, |t| t.span);
    (value.value.span.start as usize, end.end as usize)
}

fn definition_places(definition: &Definition) -> Vec<(usize, usize)> {
    match &definition.value {
        DefinitionValue::One(value) => vec![place(value)],
        DefinitionValue::ByAxis { items, .. } => items.iter().map(|i| place(&i.value)).collect(),
    }
}

fn column_places(table: &Table, quantity: &Quantity) -> Vec<(usize, usize)> {
    let Some(at) = table
        .columns
        .iter()
        .position(|c| c.name.text == quantity.symbol)
    else {
        return Vec::new();
    };
    table
        .rows
        .iter()
        .filter_map(|row| row.cells.get(at))
        .map(place)
        .collect()
}

/// The text for each place: one value for all, or a list as in the sheet.
fn values_for(
    symbol: &str,
    expression: &str,
    count: usize,
    kind: &StatementKind,
) -> Result<Vec<String>, String> {
    let parts: Vec<&str> = expression.split('|').map(str::trim).collect();
    if parts.len() == 1 {
        return Ok(vec![expression.to_string(); count]);
    }
    if parts.len() != count || count == 1 {
        return Err(format!(
            "{symbol} takes {count} values, and {} are given.",
            parts.len()
        ));
    }
    let StatementKind::Definition(Definition {
        value: DefinitionValue::ByAxis { items, .. },
        ..
    }) = kind
    else {
        return Ok(parts.into_iter().map(str::to_string).collect());
    };
    let labelled: Option<Vec<(&str, &str)>> = parts
        .iter()
        .map(|p| p.split_once(':').map(|(l, v)| (l.trim(), v.trim())))
        .collect();
    match labelled {
        None => Ok(parts.into_iter().map(str::to_string).collect()),
        Some(pairs) => items
            .iter()
            .enumerate()
            .map(|(at, item)| {
                let label = item.label.as_ref().map(|l| l.text.as_str());
                let found = match label {
                    Some(label) => pairs.iter().find(|(l, _)| *l == label),
                    None => pairs.get(at),
                };
                found.map(|(_, v)| (*v).to_string()).ok_or_else(|| {
                    format!(
                        "{symbol} takes a value for {}, and none is given.",
                        label.unwrap_or("each label")
                    )
                })
            })
            .collect(),
    }
}
