//! A table without its last line.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::problem::Mend;
use crate::span::Span;
use crate::syntax::{StatementKind, Table};

pub(super) const ROW: Code = Code {
    code: "table-without-end",
    severity: Severity::Error,
    what: "A table closes with a line end.",
    why: "Without it the table stops at the first line that looks like another statement, and a row with a slip may be that line.",
    example: Some("table point | n\nA | 3.8\nm = 2*n\n"),
    fixed: Some("table point | n\nA | 3.8\nend\nm = 2*n\n"),
};

pub(super) fn draft(site: &Site<'_>, key: &str) -> Draft {
    let message = format!("The table of {key} has no line “end”");
    let Some((statement, StatementKind::Table(table))) = site.statement.map(|s| (s, &s.kind))
    else {
        return Draft::says(message + ".");
    };
    let rows = table.rows.last().map_or(0, |row| row.line);
    let last = statement.line + rows;
    Draft::says(format!("{message}; it is read up to line {last}."))
        .mends("Add the line end", closing(site.text, table))
}

/// Puts the line behind the last row, or behind the header of a table without rows.
fn closing(text: &str, table: &Table) -> Mend {
    let rows = table.rows.iter().map(|row| row.span);
    let header = table.keys.iter().chain(&table.columns).map(|p| p.name.span);
    let last = rows.chain(header).map(|span| span.end).max().unwrap_or(0) as usize;
    let rest = text.get(last..).unwrap_or("");
    match rest.find('\n').or_else(|| rest.find('\r')) {
        Some(at) => put(Span::new(last + at + 1, last + at + 1), "end\n"),
        None => put(Span::new(text.len(), text.len()), "\nend\n"),
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check_in, place, sheet};
    use crate::problem::Fault;
    use crate::syntax::{StatementKind, Table};

    use crate::syntax::{Name, Parameter, Row};

    fn table(text: &str, row: Option<&str>) -> StatementKind {
        let name = |part: &str| Parameter {
            name: Name {
                text: part.to_owned(),
                span: place(text, part),
            },
            unit: None,
        };
        StatementKind::Table(Table {
            keys: vec![name("point")],
            columns: vec![name("n")],
            rows: row
                .map(|row| Row {
                    line: 1,
                    span: place(text, row),
                    keys: vec![],
                    key_values: vec![],
                    cells: vec![],
                    remark: None,
                })
                .into_iter()
                .collect(),
            ended: false,
        })
    }

    fn closes(text: &str, row: Option<&str>, mended: &str) {
        let fault = Fault::TableWithoutEnd {
            key: "point".to_owned(),
        };
        let last = if row.is_some() { 2 } else { 1 };
        let message =
            format!("The table of point has no line “end”; it is read up to line {last}.");
        let fixes = [("Add the line end", true, mended)];
        check_in(
            &sheet(text, table(text, row)),
            text,
            place(text, "table"),
            fault,
            &message,
            &fixes,
        );
    }

    #[test]
    fn the_line_goes_behind_the_last_row() {
        let rest = "table point | n\nA | 3.8 ; remark\n";
        closes(
            &format!("{rest}\n"),
            Some("A | 3.8"),
            &format!("{rest}end\n\n"),
        );
    }

    #[test]
    fn the_line_goes_behind_a_header_alone() {
        closes("table point | n", None, "table point | n\nend\n");
    }
}
