//! What could stand at a place while a sheet is typed.

use super::desk::{Desk, Spot, Stretch, dimension_of, tokens_before, what_it_is};
use super::place::{Place, place};
use crate::catalogue::{self, Entry};
use crate::names::Role;
use crate::program::Quantity;
use crate::reference::{STATEMENTS, dimension_name, wanted};
use crate::syntax::{StatementKind, TitleWord};
use engine::quantity::{Dimension, constants, units};
use rustc_hash::FxHashMap;
use serde::Serialize;

/// What could stand at a place.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Completions {
    /// What is replaced: the piece of a word before the place.
    pub replaces: Stretch,
    /// The likeliest first.
    pub items: Vec<Completion>,
}

/// One of them.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Completion {
    /// As listed.
    pub label: String,
    /// What it is.
    pub kind: CompletionKind,
    /// What is put in the place of the piece typed.
    pub insert: String,
    /// Stretches of `insert` that are to be typed over, as first character and length: the arguments of a function.
    pub holes: Vec<(u32, u32)>,
    /// Unit and dimension, or what it means in a few words.
    pub detail: String,
}

/// What a completion is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "lowercase")]
#[allow(missing_docs)]
pub enum CompletionKind {
    Symbol,
    Axis,
    Constant,
    Function,
    Argument,
    Field,
    Sheet,
    Label,
    Text,
    Unit,
    Word,
}

/// What could stand at a byte of the text.
#[must_use]
pub fn complete(desk: &Desk<'_>, byte: usize) -> Completions {
    let whole = crate::source::Source::new(desk.text).text();
    let byte = (0..=byte.min(whole.len()))
        .rev()
        .find(|at| whole.is_char_boundary(*at))
        .unwrap_or(0);
    let spot = desk.spot(byte);
    let (place, piece) = match &spot {
        Some(spot) => {
            let tokens = tokens_before(spot.text, spot.at);
            place(desk, spot, &tokens)
        }
        None => (Place::Line, 0),
    };
    let from = byte.saturating_sub(piece);
    let typed = desk.text.get(from..byte).unwrap_or("");
    let offered = Offered {
        desk,
        spot: spot.as_ref(),
    };
    let mut items = offered.at(&place);
    let typed = typed.to_lowercase();
    items.retain(|item| item.label.to_lowercase().contains(&typed));
    // What begins so comes first; otherwise the order is kept.
    items.sort_by_key(|item| !item.label.to_lowercase().starts_with(&typed));
    Completions {
        replaces: desk.stretch(from, byte),
        items,
    }
}

struct Offered<'a> {
    desk: &'a Desk<'a>,
    spot: Option<&'a Spot<'a>>,
}

fn item(label: &str, kind: CompletionKind, detail: String) -> Completion {
    Completion {
        label: label.to_string(),
        kind,
        insert: label.to_string(),
        holes: Vec::new(),
        detail,
    }
}

impl Offered<'_> {
    fn at(&self, place: &Place) -> Vec<Completion> {
        match place {
            Place::Nothing => Vec::new(),
            Place::Line => self.line(),
            Place::Unit(wanted) => units_for(*wanted),
            Place::Fields(path) => self.fields(path),
            Place::Axes => self.axes(false),
            Place::PickAxes => {
                let mut items = self.axes(true);
                items.extend(["smooth", "nearest", "held"].map(expression_word));
                items
            }
            Place::Labels { axis, quoted } => self.labels(axis, *quoted),
            Place::ListLabels(axis) => self.list_labels(axis),
            Place::TitleWords(words) | Place::Words(words) => words
                .iter()
                .map(|word| item(word, CompletionKind::Text, String::new()))
                .collect(),
            Place::Sheets => self.sheets(),
            Place::Selection { axis, call } => {
                let mut items = self.labels(axis, true);
                items.extend(self.expression(call.as_deref(), &[]));
                items
            }
            Place::Expression { call, words } => self.expression(call.as_deref(), words),
        }
    }

    /// The first word of a line.
    fn line(&self) -> Vec<Completion> {
        let statements = self.desk.tree.statements.iter();
        let before = |s: &&crate::syntax::Statement| {
            self.spot.is_none_or(|spot| s.start < spot.statement.start)
        };
        let in_title = statements.filter(before).all(|s| {
            use StatementKind::{Aside, Blank, Title};
            matches!(s.kind, Title { .. } | Blank | Aside(_))
        });
        let words = STATEMENTS.iter().flat_map(|row| {
            let named = row.word.split(' ').filter(|w| opens(w));
            named.map(move |word| (word, row))
        });
        let mut items: Vec<Completion> = words
            .filter(|(word, _)| in_title || crate::lex::words::title_word(word).is_none())
            .map(|(word, row)| Completion {
                insert: format!("{word} "),
                ..item(word, CompletionKind::Word, row.form.to_string())
            })
            .collect();
        // A symbol that another line rests on but none gives is likely what is typed next.
        items.extend(self.symbols());
        items
    }

    fn symbols(&self) -> Vec<Completion> {
        let quantities = self.desk.program.quantities.iter().filter(|q| q.listed);
        let quantities: FxHashMap<&str, &Quantity> =
            quantities.map(|q| (q.symbol.as_str(), q)).collect();
        let symbols = self.desk.names.symbols.iter();
        symbols
            .map(|symbol| self.symbol(symbol, quantities.get(symbol.name.as_str()).copied()))
            .collect()
    }

    fn symbol(&self, symbol: &crate::names::Symbol, quantity: Option<&Quantity>) -> Completion {
        let (kind, detail) = match symbol.role {
            Role::Sheet => {
                let sheet = self.desk.sheet(&symbol.name);
                let name = sheet.map(|s| s.name.clone()).unwrap_or_default();
                (CompletionKind::Sheet, name)
            }
            Role::Axis | Role::Key(_) => {
                let axis = self
                    .desk
                    .program
                    .axes
                    .iter()
                    .find(|a| a.name == symbol.name);
                let labels = axis.map_or(0, |a| a.labels.len());
                (CompletionKind::Axis, format!("axis, {labels} labels"))
            }
            _ => (
                CompletionKind::Symbol,
                quantity.map_or_else(|| "record".to_string(), detail),
            ),
        };
        item(&symbol.name, kind, detail)
    }

    fn fields(&self, path: &[String]) -> Vec<Completion> {
        let Some((first, rest)) = path.split_first() else {
            return Vec::new();
        };
        if let Some(sheet) = self.desk.sheet(first) {
            let within = rest.join(".");
            return crate::assist::sheet_fields(sheet, &within)
                .into_iter()
                .map(|(name, detail)| item(&name, CompletionKind::Field, detail))
                .collect();
        }
        let record = path.join(".");
        let quantities = self.desk.program.quantities.iter();
        let field = |q: &Quantity| {
            let name = q.symbol.strip_prefix(record.as_str())?.strip_prefix('.')?;
            Some(item(name, CompletionKind::Field, detail(q)))
        };
        quantities.filter_map(field).collect()
    }

    fn axes(&self, selects: bool) -> Vec<Completion> {
        let symbols = self.desk.names.symbols.iter();
        let axes = symbols.filter(|s| matches!(s.role, Role::Axis | Role::Key(_)));
        axes.map(|symbol| {
            let item = self.symbol(symbol, None);
            if selects {
                Completion {
                    insert: format!("{}: ", item.label),
                    ..item
                }
            } else {
                item
            }
        })
        .collect()
    }

    fn labels(&self, axis: &str, quoted: bool) -> Vec<Completion> {
        let labels = self.desk.labels(axis).unwrap_or_default();
        let one = |label: &String| Completion {
            insert: if quoted {
                format!("\"{}\"", label.replace('"', "\"\""))
            } else {
                label.clone()
            },
            ..item(label, CompletionKind::Label, format!("label of {axis}"))
        };
        labels.iter().map(one).collect()
    }

    fn list_labels(&self, axis: &str) -> Vec<Completion> {
        let labels = self.labels(axis, false).into_iter();
        labels
            .map(|item| Completion {
                insert: format!("{}: ", item.label),
                ..item
            })
            .collect()
    }

    fn sheets(&self) -> Vec<Completion> {
        let used = self.desk.used.by_statement.keys();
        let names = used.filter_map(|s| Some(self.desk.used.sheet(*s)?.name.clone()));
        names
            .map(|name| item(&name, CompletionKind::Sheet, String::new()))
            .collect()
    }

    fn expression(&self, call: Option<&str>, words: &[&'static str]) -> Vec<Completion> {
        let mut items = Vec::new();
        if let Some(function) = call {
            items.extend(self.arguments(function));
        }
        if let Some(StatementKind::Function(f)) = self.spot.map(|s| &s.statement.kind) {
            let parameters = f.parameters.iter();
            items.extend(parameters.map(|p| {
                let unit = p
                    .unit
                    .as_ref()
                    .map_or(String::new(), |u| format!(" in {}", u.text));
                item(
                    &p.name.text,
                    CompletionKind::Argument,
                    format!("argument{unit}"),
                )
            }));
        }
        items.extend(self.symbols());
        items.extend(words.iter().map(|word| expression_word(word)));
        let constants = constants::rows().iter();
        items.extend(constants.map(|c| item(c.name, CompletionKind::Constant, constant(c))));
        items.extend(self.own_functions());
        items.extend(catalogue::entries().map(function));
        let anywhere = ["if", "and", "or", "not", "none", "excluded"];
        items.extend(anywhere.map(expression_word));
        items
    }

    fn own_functions(&self) -> Vec<Completion> {
        let names = self.desk.names.function_list.iter();
        let one = |(name, _): &(String, usize)| {
            let (statement, function) = self.desk.own_function(name)?;
            let parameters = function.parameters.iter().map(|p| p.name.text.as_str());
            let body = self.desk.typed(statement, &function.body);
            Some(called(name, parameters, body))
        };
        names.filter_map(one).collect()
    }

    /// The arguments of the call in hand by their names.
    fn arguments(&self, function: &str) -> Vec<Completion> {
        if let Some((_, own)) = self.desk.own_function(function) {
            let names = own.parameters.iter().map(|p| p.name.text.clone());
            return names
                .map(|name| Completion {
                    insert: format!("{name}: "),
                    ..item(
                        &name,
                        CompletionKind::Argument,
                        format!("argument of {function}"),
                    )
                })
                .collect();
        }
        let parameters = catalogue::entry(function).map_or(&[][..], |e| e.parameters);
        let one = |p: &catalogue::Parameter| Completion {
            insert: format!("{}: ", p.name),
            ..item(
                p.name,
                CompletionKind::Argument,
                format!("argument of {function}: {}", wanted(p)),
            )
        };
        parameters.iter().map(one).collect()
    }
}

/// A word of an expression with its form.
fn expression_word(word: &str) -> Completion {
    let form = crate::reference::row(word).map_or("", |row| row.form);
    item(word, CompletionKind::Word, form.to_string())
}

/// Whether a word of a row opens lines.
fn opens(word: &str) -> bool {
    crate::lex::words::STATEMENT_WORDS.contains(&word)
        || crate::lex::words::TITLE_WORDS.contains(&word)
}

fn detail(quantity: &Quantity) -> String {
    let unit = quantity.unit.as_ref().map(|u| &*u.text);
    let what = what_it_is(quantity.kind, unit);
    match &quantity.remark {
        Some(remark) => format!("{what}; {remark}"),
        None => what,
    }
}

fn constant(row: &constants::ConstantRow) -> String {
    let value = crate::report::json::plain_number(row.value);
    format!("constant, {value} {}", row.unit)
        .trim_end()
        .to_string()
}

/// A function of the catalogue with its required arguments.
fn function(entry: &'static Entry) -> Completion {
    let required = |p: &&catalogue::Parameter| p.default.is_none() && p.default_text.is_none();
    let parameters = entry.parameters.iter().filter(required).map(|p| p.name);
    called(entry.name, parameters, entry.what.to_string())
}

fn called<'n>(name: &str, parameters: impl Iterator<Item = &'n str>, detail: String) -> Completion {
    let mut insert = format!("{name}(");
    let mut holes = Vec::new();
    for (at, parameter) in parameters.enumerate() {
        if at > 0 {
            insert += ", ";
        }
        let (from, length) = (insert.chars().count(), parameter.chars().count());
        holes.push((from as u32, length as u32));
        insert += parameter;
    }
    insert.push(')');
    Completion {
        insert,
        holes,
        ..item(name, CompletionKind::Function, detail)
    }
}

/// Units, those of a dimension first.
fn units_for(wanted: Option<Dimension>) -> Vec<Completion> {
    let mut items: Vec<(bool, Completion)> = Vec::new();
    let fits = |dimension: Dimension| wanted.is_some_and(|w| w.matches(dimension));
    for (dimension, text) in crate::check::usual_units() {
        let compound = text.contains(['/', '.', '^']);
        if compound {
            let name = dimension_name(dimension);
            items.push((fits(dimension), item(text, CompletionKind::Unit, name)));
        }
    }
    for row in units::rows() {
        for symbol in row.symbols {
            let detail = format!("{}, {}", row.name, dimension_name(row.dimension));
            items.push((
                fits(row.dimension),
                item(symbol, CompletionKind::Unit, detail),
            ));
        }
    }
    // Of those that fit, the usual ones stand first; of the others those of one name.
    items.sort_by_key(|(fits, item)| (!fits, !fits && item.label.contains(['/', '.', '^'])));
    let mut known = rustc_hash::FxHashSet::default();
    items.retain(|(_, item)| known.insert(item.label.clone()));
    items.into_iter().map(|(_, item)| item).collect()
}

/// Words of the title block that have a closed choice.
pub(super) fn title_values(word: TitleWord) -> &'static [&'static str] {
    match word {
        TitleWord::Sources => &["required"],
        TitleWord::Units => &[
            "lb", "ft", "in", "kt", "ft/s", "N", "m", "km/h", "kg", "daN",
        ],
        _ => &[],
    }
}

/// The dimension that a symbol has.
pub(super) fn symbol_dimension(desk: &Desk<'_>, symbol: &str) -> Option<Dimension> {
    let (_, quantity) = desk.quantity(symbol)?;
    quantity.node?;
    dimension_of(quantity.kind)
}
