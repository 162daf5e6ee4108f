//! Dimensions, kinds and axes of every line are settled here; what comes out is the checked program. A line that
//! fails takes only its users with it.

mod arithmetic;
mod axes;
mod bracket;
mod builder;
mod call;
mod compare;
mod definition;
mod downwash;
mod expression;
mod figure;
mod general;
mod guards;
mod linking;
mod made;
mod operand;
mod outputs;
mod pick;
mod reduce;
mod rules;
mod shown;
mod table;
mod trace;
mod units;
mod unknown;
mod used;

use crate::axes::{AxisId, AxisSet};
use crate::catalogue::Entry;
use crate::graph::Order;
use crate::names::{Names, located};
use crate::problem::{Fault, Located};
use crate::program::{Kind, NodeId, NumberKind, Origin, Program, QuantityId, ShownUnit, TextId};
use crate::span::Span;
use crate::syntax::{StatementKind, Tree};
use crate::used::{UsedSheet, UsedSheets};
use engine::quantity::{Dimension, SpeedKind, System, constants};
use rustc_hash::FxHashMap;
use std::rc::Rc;

pub(crate) use shown::usual_units;
pub use trace::{Part, Seen, Trace};

/// Most operators with own functions written out.
const WRITTEN_OUT_MOST: u32 = 100_000;
/// Deepest nesting of own functions that call each other.
const CALL_DEPTH_MOST: usize = 200;

/// The constants that a sheet can name: name, and index into the engine's table.
pub(crate) fn constant(name: &str) -> Option<&'static constants::ConstantRow> {
    constants::rows().iter().find(|row| row.name == name)
}

/// A checked expression: its node, and what is known of its value.
#[derive(Clone, Debug)]
pub(crate) struct Typed {
    pub(crate) node: NodeId,
    pub(crate) kind: Kind,
    pub(crate) unit: Option<ShownUnit>,
    pub(crate) span: Span,
    pub(crate) marks: Marks,
}

/// What is remembered of an operand beside its dimension.
#[derive(Clone, Copy, Debug, Default)]
pub(crate) struct Marks {
    /// A lone `0`.
    pub(crate) zero: bool,
    /// Made of numbers typed in the line and nothing else.
    pub(crate) literal: bool,
    /// Made of unit-less numbers only.
    pub(crate) bare: bool,
    /// The density of the standard sea level.
    pub(crate) sea_level: bool,
    /// The difference of two temperatures.
    pub(crate) difference: bool,
    /// A number typed in degC or degF, which stands alone.
    pub(crate) scale: bool,
    /// A factor of the product is an equivalent or calibrated airspeed, standing here.
    pub(crate) airspeed: Option<(SpeedKind, Span)>,
    /// A factor of the product is a density other than that of the standard sea level, standing here.
    pub(crate) density: Option<Span>,
    /// A factor of the product is any density at all.
    pub(crate) any_density: bool,
    /// Something typed or named in it has a US unit.
    pub(crate) us: bool,
    /// Something typed or named in it has a metric unit.
    pub(crate) metric: bool,
}

impl Marks {
    /// The unit systems of a value with a unit.
    pub(crate) fn in_system_of(self, unit: Option<&ShownUnit>) -> Self {
        let system = unit.map(|u| u.unit.system);
        Marks {
            us: system == Some(System::Us),
            metric: system == Some(System::Metric),
            ..self
        }
    }

    /// The unit systems of operands, and nothing else of them.
    pub(crate) fn systems_of(operands: &[&Typed]) -> Self {
        Marks {
            us: operands.iter().any(|t| t.marks.us),
            metric: operands.iter().any(|t| t.marks.metric),
            ..Marks::default()
        }
    }
}

/// What a symbol means once its line is checked.
#[derive(Clone, Debug)]
pub(crate) enum Meaning {
    /// Its line failed, or is not reached yet.
    Unknown,
    /// One value.
    Value {
        quantity: QuantityId,
        unit: Option<ShownUnit>,
        marks: Marks,
    },
    /// A record, with a quantity for each field.
    Record {
        entry: &'static Entry,
        fields: Vec<QuantityId>,
    },
    /// Another sheet.
    Sheet(Rc<UsedSheet>),
}

/// An own function being written out: its parameters with what they stand for.
pub(crate) struct Frame {
    statement: usize,
    parameters: Vec<(String, Typed)>,
}

/// The state of the check.
pub(crate) struct Checker<'a> {
    pub(crate) text: &'a str,
    pub(crate) tree: &'a Tree,
    pub(crate) names: &'a Names,
    pub(crate) order: &'a Order,
    /// The other sheets that this one uses.
    used: &'a UsedSheets,
    links: FxHashMap<String, linking::Links>,
    origins: FxHashMap<Origin, QuantityId>,
    fresh: Vec<(QuantityId, QuantityId)>,
    trace: Option<Trace>,
    /// The axes that each unknown is taken to vary over, by its statement.
    unknown_axes: &'a FxHashMap<usize, AxisSet>,
    pub(crate) program: Program,
    pub(crate) problems: Vec<Located>,
    pub(crate) statement: usize,
    pub(crate) meanings: Vec<Meaning>,
    pub(crate) axis_of_symbol: FxHashMap<String, AxisId>,
    /// The axis that the line in hand makes, and the place of the call that makes it.
    making: Option<(Span, Option<AxisId>)>,
    pub(crate) frames: Vec<Frame>,
    pub(crate) written_out: u32,
    pub(crate) prefer: Vec<ShownUnit>,
    texts: FxHashMap<String, TextId>,
    unit_cache: FxHashMap<String, ShownUnit>,
    constants: FxHashMap<u64, NodeId>,
    pub(crate) call_results: FxHashMap<NodeId, (Vec<Dimension>, Vec<Typed>)>,
    /// The sets of rules that calls ask for.
    rules_asked: Vec<rules::RuleAsked>,
    downwash_asked: Vec<downwash::DownwashAsked>,
    remarks: Rc<[Option<String>]>,
    parts: Rc<[Option<String>]>,
}

/// Checks a sheet whose names are settled.
///
/// The axes of an unknown are those of its equations, which may rest on it: the sheet is checked with the fewest axes
/// first, and again with those found, until they agree.
#[must_use]
pub fn check(
    text: &str,
    tree: &Tree,
    names: &Names,
    order: &Order,
    used: &UsedSheets,
) -> (Program, Vec<Located>) {
    let checker = checked(text, tree, (names, order), used, None);
    (checker.0, checker.1)
}

/// Checks a sheet once more, and keeps what every part of some of its statements came to.
#[must_use]
pub fn trace(
    text: &str,
    tree: &Tree,
    (names, order): (&Names, &Order),
    used: &UsedSheets,
    wanted: &[bool],
) -> (Program, Trace) {
    let (program, _, trace) = checked(text, tree, (names, order), used, Some(wanted));
    (program, trace)
}

fn checked(
    text: &str,
    tree: &Tree,
    names: (&Names, &Order),
    used: &UsedSheets,
    traced: Option<&[bool]>,
) -> (Program, Vec<Located>, Trace) {
    let mut unknown_axes = FxHashMap::default();
    loop {
        let mut checker = Checker::new(text, tree, names, used, &unknown_axes);
        checker.trace = traced.map(Trace::of);
        checker.check_all();
        let found = checker.unknown_axes_found();
        if found == unknown_axes {
            checker.finish();
            let trace = checker.trace.unwrap_or_default();
            return (checker.program, checker.problems, trace);
        }
        unknown_axes = found;
    }
}

/// The numbers of the texts that other sheets have.
fn text_ids(texts: &[String]) -> FxHashMap<String, TextId> {
    let each = texts.iter().enumerate();
    each.map(|(at, text)| (text.clone(), TextId(at as u32)))
        .collect()
}

/// The part under which each statement stands.
fn parts(tree: &Tree) -> Rc<[Option<String>]> {
    let mut part = None;
    let of = |s: &crate::syntax::Statement| {
        if let StatementKind::Part(words) = &s.kind {
            part = Some(words.text.clone());
        }
        part.clone()
    };
    tree.statements.iter().map(of).collect()
}

impl<'a> Checker<'a> {
    fn new(
        text: &'a str,
        tree: &'a Tree,
        (names, order): (&'a Names, &'a Order),
        used: &'a UsedSheets,
        unknown_axes: &'a FxHashMap<usize, AxisSet>,
    ) -> Self {
        Checker {
            text,
            tree,
            names,
            order,
            used,
            links: FxHashMap::default(),
            origins: FxHashMap::default(),
            fresh: Vec::new(),
            trace: None,
            unknown_axes,
            program: Program {
                digits: 4,
                texts: used.texts.clone(),
                ..Program::default()
            },
            problems: Vec::new(),
            statement: 0,
            meanings: vec![Meaning::Unknown; names.symbols.len()],
            axis_of_symbol: FxHashMap::default(),
            making: None,
            frames: Vec::new(),
            written_out: 0,
            prefer: Vec::new(),
            texts: text_ids(&used.texts),
            unit_cache: FxHashMap::default(),
            constants: FxHashMap::default(),
            call_results: FxHashMap::default(),
            rules_asked: Vec::new(),
            downwash_asked: Vec::new(),
            remarks: tree
                .statements
                .iter()
                .map(|s| s.remark.as_ref().map(|r| r.text.clone()))
                .collect(),
            parts: parts(tree),
        }
    }

    fn check_all(&mut self) {
        self.title_block();
        self.declare_axes();
        for statement in &self.order.statements {
            self.check_statement(*statement);
        }
        self.check_equations();
        for statement in 0..self.tree.statements.len() {
            self.statement = statement;
            self.check_output(statement);
        }
    }

    /// Reports a problem at a place of the statement in hand.
    pub(crate) fn report(&mut self, span: Span, fault: Fault) {
        self.problems.push(located(self.statement, span, fault));
    }

    /// The text of the statement in hand.
    pub(crate) fn statement_text(&self) -> &'a str {
        let Some(s) = self.tree.statements.get(self.statement) else {
            return "";
        };
        self.text.get(s.start..s.start + s.length).unwrap_or("")
    }

    /// A stretch of the statement in hand, as typed, its lines joined.
    pub(crate) fn words(&self, span: Span) -> String {
        let text = span.of(self.statement_text());
        if text.contains(['\n', '\r']) {
            text.split_whitespace().collect::<Vec<_>>().join(" ")
        } else {
            text.trim().to_string()
        }
    }

    /// The number by which a text value is carried.
    pub(crate) fn text_id(&mut self, text: &str) -> TextId {
        if let Some(id) = self.texts.get(text) {
            return *id;
        }
        let id = TextId(self.program.texts.len() as u32);
        self.program.texts.push(text.to_string());
        self.texts.insert(text.to_string(), id);
        id
    }

    fn check_statement(&mut self, statement: usize) {
        self.statement = statement;
        self.written_out = 0;
        if self.order.circular.get(statement).copied().unwrap_or(false) {
            return self.poison(statement);
        }
        let tree = self.tree;
        match &tree.statements[statement].kind {
            StatementKind::Definition(d) => self.check_definition(d),
            StatementKind::Table(t) => self.check_table(t),
            StatementKind::Vary(v) => self.check_vary_symbol(v),
            StatementKind::Function(f) => self.check_function(f),
            StatementKind::Unknown(u) => self.check_unknown(u),
            StatementKind::Use { sheet, name } => self.check_use(sheet, name),
            _ => {}
        }
    }

    /// The quantities of a line in a circle exist, without values.
    fn poison(&mut self, statement: usize) {
        let symbols: Vec<(usize, String, Span)> = self
            .names
            .symbols
            .iter()
            .enumerate()
            .filter(|(_, s)| s.statement == statement)
            .map(|(i, s)| (i, s.name.clone(), s.span))
            .collect();
        for (_, name, span) in symbols {
            self.add_failed(name, span);
        }
    }

    /// A quantity whose line failed: it is listed, without values.
    pub(crate) fn add_failed(&mut self, symbol: String, span: Span) {
        let kind = Kind::Number(NumberKind::of(Dimension::NONE));
        self.add_quantity(symbol, span, kind, None, None, false);
    }

    /// Lists a named value.
    pub(crate) fn add_quantity(
        &mut self,
        symbol: String,
        span: Span,
        kind: Kind,
        unit: Option<ShownUnit>,
        node: Option<NodeId>,
        input: bool,
    ) -> QuantityId {
        let id = QuantityId(self.program.quantities.len() as u32);
        let statement = self.statement;
        self.program.quantities.push(crate::program::Quantity {
            symbol,
            statement,
            line: self.tree.statements.get(statement).map_or(0, |s| s.line),
            span,
            kind,
            unit,
            node,
            axes: node.map_or(AxisSet::NONE, |n| self.axes_of(n)),
            input,
            is_axis: false,
            remark: self.remarks.get(statement).cloned().flatten(),
            part: self.parts.get(statement).cloned().flatten(),
            listed: true,
            origin: None,
        });
        self.program.order.push(id);
        id
    }

    fn title_block(&mut self) {
        let tree = self.tree;
        for (index, statement) in tree.statements.iter().enumerate() {
            let StatementKind::Title { word, text } = &statement.kind else {
                continue;
            };
            self.statement = index;
            match word {
                crate::syntax::TitleWord::Digits => {
                    if let Some(digits) = text
                        .text
                        .parse::<u8>()
                        .ok()
                        .filter(|d| (1..=15).contains(d))
                    {
                        self.program.digits = digits;
                    }
                }
                crate::syntax::TitleWord::Units => self.preferred_units(text),
                _ => {}
            }
        }
    }

    /// What is said of the sheet as a whole: inputs without remark, lines that nothing uses.
    fn finish(&mut self) {
        // Quantities were listed in the order in which they were checked; the sheet's order is theirs to be shown in.
        self.list_used_axes();
        self.sort_quantities();
        self.advise_unused();
        self.advise_sources();
        self.advise_rules();
        self.advise_downwash();
    }
}

impl NumberKind {
    /// A plain number of a dimension.
    #[must_use]
    pub fn of(dimension: Dimension) -> Self {
        NumberKind {
            dimension,
            speed: None,
            absolute: false,
            any: false,
        }
    }
}
