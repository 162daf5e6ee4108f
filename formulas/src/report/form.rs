//! The rows of the computation form: each statement as the page and the text report set it out.

use crate::lex::words::title_text;
use crate::program::{EntryKind, Program, Quantity};
use crate::span::Span;
use crate::syntax::{
    Definition, DefinitionValue, Name, Parameter, Row, Statement, StatementKind, Table, Tree,
    UnitText,
};
use serde::Serialize;

/// The computation form, one row for each statement, blank lines and asides included.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize)]
pub struct Form {
    /// The rows in the order of the sheet.
    pub rows: Vec<FormRow>,
}

/// What a row is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "lowercase")]
#[allow(missing_docs)]
pub enum RowKind {
    Title,
    Part,
    Sub,
    Note,
    Prose,
    Aside,
    Blank,
    Definition,
    Function,
    Vary,
    Table,
    Unknown,
    Governing,
    Require,
    Freebody,
    Figure,
    Use,
    Unreadable,
}

/// A statement as a row of the form.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct FormRow {
    /// Running number of what is computed, defined or required; `None` for headings, prose and what cannot be read.
    pub item: Option<u32>,
    /// Its first line, from 1.
    pub line: u32,
    /// How many lines it takes.
    pub lines: u32,
    /// What it is.
    pub kind: RowKind,
    /// The word that opens the statement, where one does.
    pub word: Option<String>,
    /// The symbol it gives; of an own function the name with its parameters.
    pub symbol: Option<String>,
    /// The unit in its bracket, as typed.
    pub unit: Option<String>,
    /// What stands right of the symbol or of the word, as typed, lines joined by a blank; of a heading its text.
    pub how: String,
    /// The remark.
    pub remark: Option<String>,
    /// The symbols of [`super::Report::quantities`] whose values belong to the row.
    pub quantities: Vec<String>,
    /// The statement as it stands in the text, without its last line end.
    pub text: String,
    /// A table's cells.
    pub table: Option<FormTable>,
}

/// A table as typed.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize)]
pub struct FormTable {
    /// Its keys.
    pub keys: Vec<FormHead>,
    /// Its columns.
    pub columns: Vec<FormHead>,
    /// Its rows.
    pub rows: Vec<FormTableRow>,
}

/// Head of a key or column.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize)]
pub struct FormHead {
    /// The symbol.
    pub symbol: String,
    /// The unit in its bracket, as typed.
    pub unit: Option<String>,
}

/// A row of a table.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize)]
pub struct FormTableRow {
    /// Its line, from 1.
    pub line: u32,
    /// The cells as typed, keys first.
    pub cells: Vec<String>,
    /// The remark.
    pub remark: Option<String>,
}

/// Sets the sheet out as a form.
#[must_use]
pub fn form(text: &str, tree: &Tree, program: &Program) -> Form {
    let symbols = symbols_by_statement(tree.statements.len(), program);
    let mut item = 0;
    let rows = tree.statements.iter().zip(symbols);
    Form {
        rows: rows
            .map(|(statement, symbols)| {
                let mut row = row(text, statement, symbols);
                if is_item(row.kind) {
                    item += 1;
                    row.item = Some(item);
                }
                row
            })
            .collect(),
    }
}

fn is_item(kind: RowKind) -> bool {
    use RowKind::{
        Definition, Figure, Freebody, Function, Governing, Require, Table, Unknown, Use, Vary,
    };
    matches!(
        kind,
        Definition
            | Function
            | Vary
            | Table
            | Unknown
            | Governing
            | Require
            | Freebody
            | Figure
            | Use
    )
}

/// The symbols that each statement gives or, of `governing` and `freebody`, looks at.
fn symbols_by_statement(statements: usize, program: &Program) -> Vec<Vec<String>> {
    let mut symbols: Vec<Vec<String>> = vec![Vec::new(); statements];
    let mut put = |statement: usize, quantity: &Quantity| {
        let list = symbols.get_mut(statement).filter(|_| quantity.listed);
        let Some(list) = list else { return };
        let symbol = &quantity.symbol;
        if !list.contains(symbol) {
            list.push(symbol.clone());
        }
    };
    for quantity in &program.quantities {
        put(quantity.statement, quantity);
    }
    let quantity = |id: crate::program::QuantityId| program.quantities.get(id.0 as usize);
    for governing in &program.governing {
        if let Some(found) = quantity(governing.quantity) {
            put(governing.statement, found);
        }
    }
    for body in &program.freebodies {
        let kinds = [EntryKind::Force, EntryKind::Axial, EntryKind::Couple];
        for kind in kinds {
            let entries = body.items.iter().filter(|entry| entry.kind == kind);
            for found in entries.filter_map(|entry| entry.quantity.and_then(quantity)) {
                put(body.statement, found);
            }
        }
    }
    symbols
}

fn row(text: &str, statement: &Statement, quantities: Vec<String>) -> FormRow {
    let end = statement.start.saturating_add(statement.length);
    let whole = text.get(statement.start..end).unwrap_or("");
    let source = Source(whole);
    let kind = kind_of(&statement.kind);
    let mut row = FormRow {
        item: None,
        line: statement.line,
        lines: statement.lines,
        kind,
        word: None,
        symbol: None,
        unit: None,
        how: String::new(),
        remark: statement.remark.as_ref().map(|r| r.text.clone()),
        quantities,
        text: without_line_end(whole).to_owned(),
        table: None,
    };
    fill(&mut row, &source, statement);
    row
}

fn kind_of(kind: &StatementKind) -> RowKind {
    match kind {
        StatementKind::Blank => RowKind::Blank,
        StatementKind::Prose => RowKind::Prose,
        StatementKind::Title { .. } => RowKind::Title,
        StatementKind::Part(_) => RowKind::Part,
        StatementKind::Sub(_) => RowKind::Sub,
        StatementKind::Note(_) => RowKind::Note,
        StatementKind::Aside(_) => RowKind::Aside,
        StatementKind::Definition(_) => RowKind::Definition,
        StatementKind::Function(_) => RowKind::Function,
        StatementKind::Vary(_) => RowKind::Vary,
        StatementKind::Table(_) => RowKind::Table,
        StatementKind::Unknown(_) => RowKind::Unknown,
        StatementKind::Governing { .. } => RowKind::Governing,
        StatementKind::Require { .. } => RowKind::Require,
        StatementKind::Freebody { .. } => RowKind::Freebody,
        StatementKind::Figure { .. } => RowKind::Figure,
        StatementKind::Use { .. } => RowKind::Use,
        StatementKind::Unreadable { .. } => RowKind::Unreadable,
    }
}

/// Word, symbol, unit and right side, each kind of statement in its way.
fn fill(row: &mut FormRow, source: &Source, statement: &Statement) {
    match &statement.kind {
        StatementKind::Blank => {}
        StatementKind::Prose => row.how = row.remark.take().unwrap_or_default(),
        StatementKind::Title { word, text } => worded(row, title_text(*word), &text.text),
        StatementKind::Part(text) => worded(row, "part", &text.text),
        StatementKind::Sub(text) => worded(row, "sub", &text.text),
        StatementKind::Note(text) => worded(row, "note", &text.text),
        StatementKind::Aside(text) => worded(row, "aside", &text.text),
        StatementKind::Definition(definition) => fill_definition(row, source, definition),
        StatementKind::Function(function) => {
            let head = source.code_up_to(function.name.span.start as usize, ')');
            row.symbol = Some(head.unwrap_or_else(|| function.name.text.clone()));
            row.unit = unit_text(function.unit.as_ref());
            let last = function.parameters.last().map(behind_parameter);
            let from = last.unwrap_or(function.name.span.end as usize);
            row.how = source.code_behind(from.max(behind_unit(function.unit.as_ref())), '=');
        }
        StatementKind::Vary(vary) => {
            row.word = Some("vary".to_owned());
            named(row, &vary.name, vary.unit.as_ref());
            let from = (vary.name.span.end as usize).max(behind_unit(vary.unit.as_ref()));
            row.how = source.code_behind(from, ':');
        }
        StatementKind::Table(table) => fill_table(row, source, statement, table),
        StatementKind::Unknown(unknown) => {
            row.word = Some("unknown".to_owned());
            row.how = source.code_behind_word("unknown");
            if let [only] = unknown.unknowns.as_slice() {
                named(row, &only.symbol, only.unit.as_ref());
                let bracket = only.unit.as_ref().map(|u| source.behind_bracket(u.span));
                let from = bracket.unwrap_or(only.symbol.span.end as usize);
                row.how = source.code_from(from);
            }
        }
        StatementKind::Governing { .. } => behind_word(row, source, "governing"),
        StatementKind::Require { .. } => behind_word(row, source, "require"),
        StatementKind::Freebody { .. } => behind_word(row, source, "freebody"),
        StatementKind::Figure { .. } => behind_word(row, source, "figure"),
        StatementKind::Use { name, .. } => {
            row.symbol = Some(name.text.clone());
            behind_word(row, source, "use");
        }
        StatementKind::Unreadable { defines } => {
            row.symbol = defines.as_ref().map(|name| name.text.clone());
            row.how = source.code_from(0);
        }
    }
}

fn worded(row: &mut FormRow, word: &str, text: &str) {
    row.word = Some(word.to_owned());
    row.how = text.to_owned();
}

fn behind_word(row: &mut FormRow, source: &Source, word: &str) {
    row.word = Some(word.to_owned());
    row.how = source.code_behind_word(word);
}

fn named(row: &mut FormRow, name: &Name, unit: Option<&UnitText>) {
    row.symbol = Some(name.text.clone());
    row.unit = unit_text(unit);
}

fn unit_text(unit: Option<&UnitText>) -> Option<String> {
    unit.map(|u| u.text.clone())
}

fn behind_unit(unit: Option<&UnitText>) -> usize {
    unit.map_or(0, |u| u.span.end as usize)
}

fn behind_parameter(parameter: &Parameter) -> usize {
    (parameter.name.span.end as usize).max(behind_unit(parameter.unit.as_ref()))
}

fn fill_definition(row: &mut FormRow, source: &Source, definition: &Definition) {
    named(row, &definition.symbol, definition.unit.as_ref());
    let head = definition.symbol.span.end as usize;
    let head = head.max(behind_unit(definition.unit.as_ref()));
    row.how = match &definition.value {
        DefinitionValue::One(_) => source.code_behind(head, '='),
        DefinitionValue::ByAxis { axis, .. } => {
            let list = source.code_behind(head.max(axis.span.end as usize), '=');
            format!("by {} = {list}", axis.text)
        }
    };
}

fn fill_table(row: &mut FormRow, source: &Source, statement: &Statement, table: &Table) {
    row.word = Some("table".to_owned());
    let header = source.header_lines(table.rows.first().map(|r| r.line as usize));
    row.how = Source(header).code_behind_word("table");
    let head = |parameter: &Parameter| FormHead {
        symbol: parameter.name.text.clone(),
        unit: unit_text(parameter.unit.as_ref()),
    };
    row.table = Some(FormTable {
        keys: table.keys.iter().map(head).collect(),
        columns: table.columns.iter().map(head).collect(),
        rows: table
            .rows
            .iter()
            .map(|row| table_row(source, statement.line, row))
            .collect(),
    });
}

fn table_row(source: &Source, first_line: u32, row: &Row) -> FormTableRow {
    let code = code_of(source.slice(row.span));
    let cells = split_cells(code).into_iter().skip(1);
    let keys = row.keys.iter().map(|key| key.text.clone());
    FormTableRow {
        line: first_line.saturating_add(row.line),
        cells: keys.chain(cells.map(str::to_owned)).collect(),
        remark: row.remark.as_ref().map(|r| r.text.clone()),
    }
}

/// The text of one statement.
struct Source<'a>(&'a str);

impl<'a> Source<'a> {
    fn slice(&self, span: Span) -> &'a str {
        span.of(self.0)
    }

    /// The code from a byte on: remarks left off, blanks trimmed, lines joined by a blank.
    fn code_from(&self, start: usize) -> String {
        let rest = self.0.get(start..).unwrap_or("");
        let lines = rest.lines().map(|line| code_of(line).trim());
        let lines: Vec<&str> = lines.filter(|line| !line.is_empty()).collect();
        lines.join(" ")
    }

    /// The code behind the first such character at or behind a byte; all of it from there where there is none.
    fn code_behind(&self, start: usize, sign: char) -> String {
        let rest = self.0.get(start..).unwrap_or("");
        let found = rest.find(sign).map_or(0, |at| at + sign.len_utf8());
        self.code_from(start + found)
    }

    /// The text from a byte up to and with the first such character behind it.
    fn code_up_to(&self, start: usize, sign: char) -> Option<String> {
        let rest = self.0.get(start..)?;
        let end = rest.find(sign)? + sign.len_utf8();
        Some(rest.get(..end)?.to_owned())
    }

    fn code_behind_word(&self, word: &str) -> String {
        let code = self.code_from(0);
        let rest = code.strip_prefix(word).unwrap_or(&code);
        rest.trim_start().to_owned()
    }

    /// One past the bracket that closes behind a unit.
    fn behind_bracket(&self, unit: Span) -> usize {
        let end = unit.end as usize;
        let rest = self.0.get(end..).unwrap_or("");
        end + rest.find(']').map_or(0, |at| at + 1)
    }

    /// The lines before the first row of a table, or before its `end` where it has none.
    fn header_lines(&self, first_row: Option<usize>) -> &'a str {
        let is_end = |line: &str| code_of(line).trim() == "end";
        let lines = self.0.split_inclusive('\n');
        let length: usize = match first_row {
            Some(first) => lines.take(first).map(str::len).sum(),
            None => lines.take_while(|line| !is_end(line)).map(str::len).sum(),
        };
        self.0.get(..length).unwrap_or("")
    }
}

fn without_line_end(text: &str) -> &str {
    let text = text.strip_suffix('\n').unwrap_or(text);
    text.strip_suffix('\r').unwrap_or(text)
}

/// A line without its remark: up to the first `;` outside quotes.
fn code_of(line: &str) -> &str {
    let end = outside_quotes(line).find(|(_, c)| *c == ';');
    end.map_or(line, |(at, _)| line.get(..at).unwrap_or(line))
}

/// The cells between `|` outside quotes, blanks trimmed.
fn split_cells(code: &str) -> Vec<&str> {
    let mut cells = Vec::new();
    let mut start = 0;
    for (at, _) in outside_quotes(code).filter(|(_, c)| *c == '|') {
        cells.push(code.get(start..at).unwrap_or("").trim());
        start = at + 1;
    }
    cells.push(code.get(start..).unwrap_or("").trim());
    cells
}

/// The characters that are not within quotes, with their bytes. A doubled quote closes and opens again.
fn outside_quotes(line: &str) -> impl Iterator<Item = (usize, char)> + '_ {
    let mut quoted = false;
    line.char_indices().filter(move |(_, c)| {
        if *c == '"' {
            quoted = !quoted;
        }
        !quoted && *c != '"'
    })
}

#[cfg(test)]
mod tests {
    use super::super::sample::{TEXT, sample};
    use super::*;

    #[test]
    fn rows_say_what_stands_in_the_sheet() {
        let sheet = sample();
        let form = form(TEXT, &sheet.tree, &sheet.program);
        let rows: Vec<_> = form
            .rows
            .iter()
            .map(|row| {
                (
                    row.item,
                    row.line,
                    row.word.as_deref(),
                    row.symbol.as_deref(),
                    row.unit.as_deref(),
                    row.how.as_str(),
                )
            })
            .collect();
        let expected = [
            (None, 1, Some("title"), None, None, "Osier; tail load"),
            (Some(1), 2, Some("vary"), Some("point"), None, "A | C"),
            (Some(2), 3, Some("vary"), Some("cg"), None, "fwd | aft"),
            (Some(3), 4, None, Some("W"), Some("lb"), "560"),
            (
                Some(4),
                5,
                None,
                Some("T"),
                Some("degC"),
                "by cg = fwd: 15 | aft: -",
            ),
            (Some(5), 6, None, Some("P"), Some("lb"), "W * f"),
            (Some(6), 8, None, Some("slow"), None, "P < W"),
            (Some(7), 9, None, Some("name"), None, "\"at \""),
            (Some(8), 10, Some("require"), None, None, "P <= W"),
            (Some(9), 11, Some("governing"), None, None, "P over point"),
            (
                Some(10),
                12,
                Some("freebody"),
                None,
                None,
                "\"Tail, all\": P @ x, -W @ 1 ft",
            ),
        ];
        assert_eq!(rows, expected);
        assert_eq!(form.rows[2].text, "vary cg: fwd | aft");
        assert_eq!(form.rows[5].lines, 2);
        assert_eq!(form.rows[9].quantities, ["P"]);
        assert_eq!(
            form.rows[3].remark.as_deref(),
            Some("weighing report; part 2")
        );
    }

    #[test]
    fn cells_and_remarks_end_outside_quotes_only() {
        assert_eq!(code_of("a | \"x;y\" ; remark"), "a | \"x;y\" ");
        assert_eq!(split_cells("a | \"x|y\" |"), ["a", "\"x|y\"", ""]);
        assert_eq!(code_of("\"say \"\";\"\"\" ; z"), "\"say \"\";\"\"\" ");
    }

    fn rows_of(text: &str) -> Vec<FormRow> {
        form(text, &crate::parse::parse(text), &Program::default()).rows
    }

    /// Word, symbol, unit and right side of the only statement of a text.
    fn cut(text: &str) -> [String; 4] {
        let rows = rows_of(text);
        assert_eq!(rows.len(), 1, "{rows:?}");
        let row = &rows[0];
        let or_none = |part: &Option<String>| part.clone().unwrap_or_default();
        [
            or_none(&row.word),
            or_none(&row.symbol),
            or_none(&row.unit),
            row.how.clone(),
        ]
    }

    #[test]
    fn each_kind_of_statement_is_cut_in_its_columns() {
        for (text, columns) in [
            (
                "f(a, b [1/ft]) [lb] = a*(b + 1) ; r",
                ["", "f(a, b [1/ft])", "lb", "a*(b + 1)"],
            ),
            ("f(a) = a", ["", "f(a)", "", "a"]),
            (
                "vary V [kt]: 60 to 90 step 5",
                ["vary", "V", "kt", "60 to 90 step 5"],
            ),
            (
                "unknown d [deg] between -10 and 10 such that M(d) = 0",
                [
                    "unknown",
                    "d",
                    "deg",
                    "between -10 and 10 such that M(d) = 0",
                ],
            ),
            (
                "unknown a between 0 and 1, b between 0 and 1 such that a = b and a + b = 1",
                [
                    "unknown",
                    "",
                    "",
                    "a between 0 and 1, b between 0 and 1 such that a = b and a + b = 1",
                ],
            ),
            (
                "figure \"Tail load; up\": P against x each cg",
                ["figure", "", "", "\"Tail load; up\": P against x each cg"],
            ),
            (
                "use \"osier-geometry\" as g",
                ["use", "g", "", "\"osier-geometry\" as g"],
            ),
            ("S c ; area", ["", "", "", "S c"]),
            (
                "sub Wing ; not a remark",
                ["sub", "", "", "Wing ; not a remark"],
            ),
            ("; only a remark", ["", "", "", "only a remark"]),
            (
                "S [ft^2] = 2* ; one\r\n  (a +\r\n  b) ; two\r\n",
                ["", "S", "ft^2", "2* (a + b)"],
            ),
        ] {
            assert_eq!(cut(text), columns, "{text}");
        }
    }

    #[test]
    fn a_table_keeps_its_cells_as_typed() {
        let text = "table flap, alpha [deg] | CL | name ; wind tunnel\n\
                    up, -4 | -0.1 | \"a|b\" ; assumed\n\
                    aside checked\n\
                    up, 2 | - |\n\
                    end\nx = 1\n";
        let rows = rows_of(text);
        let row = &rows[0];
        let table = row.table.as_ref().unwrap();
        let head = |symbol: &str, unit: Option<&str>| FormHead {
            symbol: symbol.to_owned(),
            unit: unit.map(str::to_owned),
        };
        assert_eq!(row.how, "flap, alpha [deg] | CL | name");
        assert_eq!(row.remark.as_deref(), Some("wind tunnel"));
        assert_eq!(table.keys, [head("flap", None), head("alpha", Some("deg"))]);
        assert_eq!(table.columns, [head("CL", None), head("name", None)]);
        let cells: Vec<_> = table
            .rows
            .iter()
            .map(|r| (r.line, r.cells.join("/")))
            .collect();
        assert_eq!(
            cells,
            [
                (2, "up/-4/-0.1/\"a|b\"".to_owned()),
                (4, "up/2/-/".to_owned())
            ]
        );
        assert_eq!(table.rows[0].remark.as_deref(), Some("assumed"));
        assert_eq!(
            (row.item, rows[1].item, rows[1].line),
            (Some(1), Some(2), 6)
        );
    }

    #[test]
    fn the_texts_of_all_rows_are_the_lines_of_the_sheet() {
        let text = "title a\n\nx = 1 +\n  2\ntable p | V\nA | 1\nend\n";
        let lines: Vec<String> = rows_of(text).into_iter().map(|row| row.text).collect();
        assert_eq!(lines.join("\n"), text.trim_end_matches('\n'));
    }
}
