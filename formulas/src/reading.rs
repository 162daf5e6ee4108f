//! From a text to a checked program, the other sheets that it uses on the way.

use crate::diagnostics::{self, Severity};
use crate::graph::Order;
use crate::names::{self, Names};
use crate::problem::Located;
use crate::program::Program;
use crate::run::Limits;
use crate::syntax::{StatementKind, Tree};
use crate::used::{self, DEPTH_MOST, Used, UsedSheet, UsedSheets};
use crate::{check, graph, parse, plan, run};
use std::collections::BTreeMap;
use std::rc::Rc;

/// What a sheet without a name is called in a sentence.
const THIS_SHEET: &str = "this sheet";

/// Finds the text of another sheet by its name.
pub type Lookup<'a> = &'a dyn Fn(&str) -> Option<String>;

/// A text as far as it is checked.
pub(crate) struct Checked {
    pub(crate) tree: Tree,
    pub(crate) names: Names,
    pub(crate) order: Order,
    pub(crate) used: UsedSheets,
    pub(crate) program: Program,
    pub(crate) problems: Vec<Located>,
    circles: Vec<Vec<String>>,
}

/// Reads a sheet and those that it uses.
pub(crate) struct Reader<'a> {
    lookup: Lookup<'a>,
    limits: Limits,
    /// The sheets being read, outermost first: name, where it is known, and text.
    open: Vec<(Option<String>, String)>,
    /// Those that were read.
    known: BTreeMap<String, Rc<UsedSheet>>,
    /// Every text that a value of a sheet read so far may take, each once.
    texts: Vec<String>,
    /// The text of the outermost sheet before an edit, and its tree.
    before: Option<(String, Tree)>,
}

impl<'a> Reader<'a> {
    pub(crate) fn new(lookup: Lookup<'a>, limits: Limits) -> Self {
        Reader {
            lookup,
            limits,
            open: Vec::new(),
            known: BTreeMap::new(),
            texts: Vec::new(),
            before: None,
        }
    }

    /// The same where the text to be read came by an edit from another one, which is given with its tree.
    pub(crate) fn edited_from(self, text: String, tree: Tree) -> Self {
        Reader {
            before: Some((text, tree)),
            ..self
        }
    }

    /// The same, with sheets that were read before: those whose texts, and all that they use, are as they were need not
    /// be read again.
    pub(crate) fn again(
        lookup: Lookup<'a>,
        limits: Limits,
        before: &BTreeMap<String, Rc<UsedSheet>>,
    ) -> Self {
        let mut reader = Reader::new(lookup, limits);
        let same = |(name, sheet): &(&String, &Rc<UsedSheet>)| {
            sheet.circles.is_empty() && lookup(name).as_deref() == Some(sheet.text.as_str())
        };
        let kept = before.iter().filter(same);
        let mut kept: BTreeMap<String, Rc<UsedSheet>> = kept
            .map(|(name, sheet)| (name.clone(), sheet.clone()))
            .collect();
        loop {
            let whole = |sheet: &Rc<UsedSheet>| sheet.uses().all(|name| kept.contains_key(name));
            let gone: Vec<String> = kept
                .iter()
                .filter(|(_, sheet)| !whole(sheet))
                .map(|(name, _)| name.clone())
                .collect();
            if gone.is_empty() {
                break;
            }
            kept.retain(|name, _| !gone.contains(name));
        }
        // Texts were numbered one sheet after the other, so the longest list begins with every other one.
        let longest = before.values().map(|sheet| &sheet.program.texts);
        let longest = longest.max_by_key(|texts| texts.len());
        reader.texts = longest.cloned().unwrap_or_default();
        reader.known = kept;
        reader
    }

    /// The sheets that a tree uses, and those that they use.
    pub(crate) fn used_by(&self, tree: &Tree) -> BTreeMap<String, Rc<UsedSheet>> {
        let mut found = BTreeMap::new();
        let mut open: Vec<&str> = used::uses(tree).collect();
        while let Some(name) = open.pop() {
            if let Some(sheet) = self.known.get(name)
                && found.insert(name.to_string(), sheet.clone()).is_none()
            {
                open.extend(sheet.uses());
            }
        }
        found
    }

    /// Reads and checks a text; the name is that by which others use it, where it is known.
    pub(crate) fn read(&mut self, name: Option<&str>, text: &str) -> Checked {
        self.open.push((name.map(str::to_string), text.to_string()));
        let tree = match self.before.take() {
            Some((before, tree)) => parse::parse_edited(text, (&before, tree)),
            None => parse::parse(text),
        };
        let mut problems = reading_problems(&tree);
        let mut names = names::collect(&tree, &mut problems);
        let mut circles = Vec::new();
        let used = self.used(&tree, &mut names, &mut circles);
        let order = graph::order(&tree, &names, &mut problems);
        let (program, checked) = check::check(text, &tree, &names, &order, &used);
        problems.extend(checked);
        self.texts.clone_from(&program.texts);
        self.open.pop();
        Checked {
            tree,
            names,
            order,
            used,
            program,
            problems,
            circles,
        }
    }

    /// The sheets that the `use` statements name, their axes among the names.
    fn used(
        &mut self,
        tree: &Tree,
        names: &mut Names,
        circles: &mut Vec<Vec<String>>,
    ) -> UsedSheets {
        let mut used = UsedSheets::default();
        for (index, statement) in tree.statements.iter().enumerate() {
            let StatementKind::Use { sheet, name } = &statement.kind else {
                continue;
            };
            let one = self.sheet(&sheet.text, circles);
            if let Used::Sheet(sheet) = &one {
                names.take_axes(index, name.span, &sheet.program);
            }
            used.by_statement.insert(index, one);
        }
        used.texts.clone_from(&self.texts);
        used
    }

    fn sheet(&mut self, name: &str, circles: &mut Vec<Vec<String>>) -> Used {
        if !is_name(name) {
            return Used::NotAName;
        }
        let Some(text) = (self.lookup)(name) else {
            return Used::Missing;
        };
        let is_this = |(known, own): &(Option<String>, String)| match known {
            Some(known) => known == name,
            None => *own == text,
        };
        if let Some(at) = self.open.iter().position(is_this) {
            let chain = self.chain(at);
            circles.push(chain.clone());
            return if at + 1 == self.open.len() {
                Used::NotAName
            } else {
                Used::Circular(chain)
            };
        }
        if self.open.len() > DEPTH_MOST {
            return Used::TooDeep;
        }
        let sheet = match self.known.get(name) {
            Some(sheet) => sheet.clone(),
            None => self.open_used(name, text),
        };
        circles.extend(sheet.circles.iter().cloned());
        let own = self.called(self.open.len() - 1);
        match sheet.circles.iter().find(|c| c.contains(&own)) {
            Some(circle) => {
                // A sentence begins with a name, not with 'this sheet'.
                let first = if own == THIS_SHEET { name } else { &own };
                Used::Circular(turned(circle, first))
            }
            None => Used::Sheet(sheet),
        }
    }

    fn open_used(&mut self, name: &str, text: String) -> Rc<UsedSheet> {
        let checked = self.read(Some(name), &text);
        let mut problems = checked.problems;
        let plan = plan::plan(&checked.program);
        let (_, found) = run::run(&checked.program, &plan, self.limits, &[]);
        problems.extend(of_this_sheet(&checked.tree, found));
        let findings = diagnostics::findings(&problems, &checked.tree, &text);
        let count = |severity| findings.iter().filter(|f| f.severity == severity).count();
        let counts = (count(Severity::Error), count(Severity::Warning));
        let stages = (checked.tree, checked.program);
        let sheet = UsedSheet::new((name, text), stages, counts, checked.circles);
        let sheet = Rc::new(sheet);
        self.known.insert(name.to_string(), sheet.clone());
        sheet
    }

    /// The sheets from one of those open back to itself.
    fn chain(&self, from: usize) -> Vec<String> {
        let open = (from..self.open.len()).map(|at| self.called(at));
        open.chain([self.called(from)]).collect()
    }

    fn called(&self, at: usize) -> String {
        let name = self.open.get(at).and_then(|(name, _)| name.clone());
        name.unwrap_or_else(|| THIS_SHEET.to_string())
    }
}

/// A circle so that it begins and ends with one of its names.
fn turned(circle: &[String], name: &str) -> Vec<String> {
    let open = circle.split_last().map_or(circle, |(_, rest)| rest);
    let at = open.iter().position(|n| n == name).unwrap_or(0);
    let mut turned = open.to_vec();
    turned.rotate_left(at);
    turned.extend(turned.first().cloned());
    turned
}

/// A name without folders and ending.
fn is_name(text: &str) -> bool {
    let foreign = |c: char| matches!(c, '/' | '\\' | ':') || c.is_control();
    !text.is_empty()
        && !text.starts_with('.')
        && !text.contains(foreign)
        && !text.ends_with(".pitchwright")
}

/// The problems of a run without those that belong to another sheet, which counts its own; limits are told of anywhere.
pub(crate) fn of_this_sheet(tree: &Tree, found: Vec<Located>) -> Vec<Located> {
    use crate::problem::Fault::{MemoryLimit, OperationLimit};
    let elsewhere = |located: &Located| {
        let kind = located.statement.and_then(|s| tree.statements.get(s));
        matches!(kind.map(|s| &s.kind), Some(StatementKind::Use { .. }))
    };
    let limit = |located: &Located| {
        matches!(
            located.problem.fault,
            MemoryLimit { .. } | OperationLimit { .. }
        )
    };
    let mut found = found;
    found.retain(|located| limit(located) || !elsewhere(located));
    found
}

/// The problems of reading, with the statements they stand in.
fn reading_problems(tree: &Tree) -> Vec<Located> {
    let whole = tree.problems.iter().map(|p| Located {
        statement: None,
        problem: p.clone(),
    });
    let each = tree
        .statements
        .iter()
        .enumerate()
        .flat_map(|(index, statement)| {
            statement.problems.iter().map(move |p| Located {
                statement: Some(index),
                problem: p.clone(),
            })
        });
    whole.chain(each).collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sheet::Sheet;

    /// The sheet `s3` uses `s4`, and so on without end.
    fn next(name: &str) -> Option<String> {
        let number: usize = name.strip_prefix('s')?.parse().ok()?;
        let next = number + 1;
        Some(format!("use \"s{next}\" as s\nx = s.x\ny = 1\n"))
    }

    #[test]
    fn sheets_use_one_another_down_to_a_limit() {
        let sheet = Sheet::open_with("use \"s1\" as s\nx = s.x\nz = s.y\n", &next);
        assert_eq!(sheet.used().len(), DEPTH_MOST);
        let report = sheet.report(&[]);
        let codes: Vec<&str> = report.findings.iter().map(|f| f.code).collect();
        assert_eq!(codes, ["sheet-findings"]);
        assert_eq!(report.quantity("z").map(|q| q.without_value), Some(0));
    }

    #[test]
    fn a_sheet_is_read_again_only_where_it_or_one_that_it_uses_has_changed() {
        let text_of = |b: &'static str| {
            move |name: &str| match name {
                "a" => Some("use \"b\" as b\nx = b.x\nt = \"one\"\n".to_string()),
                "b" => Some(b.to_string()),
                "c" => Some("x = 3\nt = \"two\"\n".to_string()),
                _ => None,
            }
        };
        let text =
            "use \"a\" as a\nuse \"c\" as c\ny = a.x + c.x\nz = if a.t = c.t then 1 else 2\n";
        let first = text_of("x = 1\n");
        let second = text_of("x = 2\n");
        let mut reader = Reader::new(&first, Limits::default());
        let tree = reader.read(None, text).tree;
        let before = reader.used_by(&tree);
        assert_eq!(before.len(), 3);
        let mut again = Reader::again(&second, Limits::default(), &before);
        let tree = again.read(None, text).tree;
        let after = again.used_by(&tree);
        let same = |name: &str| Rc::ptr_eq(&before[name], &after[name]);
        assert_eq!([same("a"), same("b"), same("c")], [false, false, true]);
        let mut sheet = Sheet::open_with(text, &first);
        sheet.update_with(text, &second);
        let report = sheet.report(&[]);
        let names: Vec<&str> = report.sheets.iter().map(|s| s.name.as_str()).collect();
        assert_eq!(names, ["a", "b", "c"]);
        assert_ne!(report.sheets[0].digest, report.sheets[1].digest);
        let value = |symbol: &str| {
            report
                .quantity(symbol)
                .and_then(|q| Some(q.largest.as_ref()?.value))
        };
        assert_eq!((value("y"), value("z")), (Some(5.0), Some(2.0)));
    }

    #[test]
    fn a_circle_is_told_from_any_of_its_names() {
        let chain = |names: &[&str]| names.iter().map(|n| (*n).to_string()).collect::<Vec<_>>();
        assert_eq!(
            turned(&chain(&["a", "b", "c", "a"]), "b"),
            chain(&["b", "c", "a", "b"])
        );
        assert_eq!(turned(&chain(&["a", "a"]), "a"), chain(&["a", "a"]));
    }
}
