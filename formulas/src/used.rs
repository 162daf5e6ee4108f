//! Other sheets that a sheet uses: read and checked before it, each once however many lines and sheets name it.

use crate::program::{Program, QuantityId};
use crate::syntax::{StatementKind, Tree};
use rustc_hash::FxHashMap;
use std::collections::BTreeMap;
use std::rc::Rc;

/// How deep sheets may use one another.
pub const DEPTH_MOST: usize = 16;

/// Another sheet, checked.
#[derive(Debug)]
pub struct UsedSheet {
    /// Its name.
    pub name: String,
    /// Its text.
    pub text: String,
    /// What it says.
    pub tree: Tree,
    /// What was checked. Its text values are numbered as in every sheet read after it.
    pub program: Program,
    /// How many errors it has.
    pub errors: usize,
    /// How many warnings.
    pub warnings: usize,
    /// The circles of sheets met on the way to it, each from a name back to itself.
    pub circles: Vec<Vec<String>>,
    symbols: FxHashMap<String, QuantityId>,
    tolerances: FxHashMap<QuantityId, Vec<usize>>,
}

impl UsedSheet {
    /// A sheet with its numbers of errors and warnings, and the circles that it stands in.
    #[must_use]
    pub fn new(
        (name, text): (&str, String),
        (tree, program): (Tree, Program),
        (errors, warnings): (usize, usize),
        circles: Vec<Vec<String>>,
    ) -> Self {
        let mut symbols = FxHashMap::default();
        for (at, quantity) in program.quantities.iter().enumerate() {
            if quantity.listed {
                let id = QuantityId(at as u32);
                symbols.entry(quantity.symbol.clone()).or_insert(id);
            }
        }
        let mut tolerances: FxHashMap<QuantityId, Vec<usize>> = FxHashMap::default();
        for (at, tolerance) in program.tolerances.iter().enumerate() {
            tolerances.entry(tolerance.quantity).or_default().push(at);
        }
        UsedSheet {
            name: name.to_string(),
            text,
            tree,
            program,
            errors,
            warnings,
            circles,
            symbols,
            tolerances,
        }
    }

    /// The quantity of that symbol, fields as `air.density`; what it uses of further sheets is not its own.
    #[must_use]
    pub fn quantity(&self, symbol: &str) -> Option<QuantityId> {
        self.symbols.get(symbol).copied()
    }

    /// The tolerances that a quantity carries, as indices into the program's.
    #[must_use]
    pub fn tolerances_of(&self, quantity: QuantityId) -> &[usize] {
        self.tolerances.get(&quantity).map_or(&[], Vec::as_slice)
    }

    /// The symbols that it gives, in the order of the sheet.
    pub fn symbols(&self) -> impl Iterator<Item = &str> {
        let own = self.program.quantities.iter().filter(|q| q.listed);
        own.map(|q| q.symbol.as_str())
    }

    /// The names of the sheets that it uses itself.
    pub fn uses(&self) -> impl Iterator<Item = &str> {
        uses(&self.tree)
    }

    /// The fields of a record.
    #[must_use]
    pub fn fields(&self, record: &str) -> Vec<String> {
        let field = |symbol: &str| {
            let rest = symbol.strip_prefix(record)?.strip_prefix('.')?;
            Some(rest.to_string())
        };
        self.symbols().filter_map(field).collect()
    }
}

/// The names of the sheets that a tree uses.
pub fn uses(tree: &Tree) -> impl Iterator<Item = &str> {
    tree.statements.iter().filter_map(|s| match &s.kind {
        StatementKind::Use { sheet, .. } => Some(sheet.text.as_str()),
        _ => None,
    })
}

/// What became of a `use` statement.
#[derive(Clone, Debug)]
pub enum Used {
    /// The sheet is there.
    Sheet(Rc<UsedSheet>),
    /// There is no such sheet.
    Missing,
    /// The text is no name of a sheet.
    NotAName,
    /// The sheet rests on this one: the names from this sheet back to itself.
    Circular(Vec<String>),
    /// Sheets use one another deeper than [`DEPTH_MOST`].
    TooDeep,
}

/// The other sheets of a sheet.
#[derive(Clone, Debug, Default)]
pub struct UsedSheets {
    /// By the statement that names them.
    pub by_statement: BTreeMap<usize, Used>,
    /// The text values that they number; those of this sheet follow.
    pub texts: Vec<String>,
}

impl UsedSheets {
    /// The sheet that a statement uses.
    #[must_use]
    pub fn sheet(&self, statement: usize) -> Option<&Rc<UsedSheet>> {
        match self.by_statement.get(&statement)? {
            Used::Sheet(sheet) => Some(sheet),
            _ => None,
        }
    }
}
