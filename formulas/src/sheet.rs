//! The front door: a sheet with everything that was found out about it. The only holder of state.

use crate::assist::complete::{self, Completions};
use crate::assist::desk::Desk;
use crate::assist::hover::{self, Hover};
use crate::assist::trail::{self, Followed, Trail, TrailError};
use crate::diagnostics::{self, Finding, Fix};
use crate::graph::Order;
use crate::names::Names;
use crate::plan;
use crate::problem::Located;
use crate::program::Program;
use crate::reading::{Checked, Lookup, Reader, of_this_sheet};
use crate::report::{self, Report};
use crate::run::{self, Limits, Memo};
use crate::syntax::Tree;
use crate::used::{UsedSheet, UsedSheets};
use crate::values::Values;
use std::collections::BTreeMap;
use std::rc::Rc;

/// A sheet that was read, checked and worked out.
///
/// # Example
/// ```
/// use formulas::sheet::Sheet;
/// let sheet = Sheet::open("S [ft^2] = 142\nq = 12 lb/ft^2\nF = q*S\n");
/// let report = sheet.report(&[]);
/// let force = report.quantity("F").unwrap();
/// assert_eq!(force.unit.as_deref(), Some("lb"));
/// ```
#[derive(Debug)]
pub struct Sheet {
    name: Option<String>,
    text: String,
    asked: Vec<String>,
    tree: Tree,
    names: Names,
    program: Program,
    values: Values,
    problems: Vec<Located>,
    limits: Limits,
    order: Order,
    uses: UsedSheets,
    used: BTreeMap<String, Rc<UsedSheet>>,
    memo: Option<Memo>,
    ran: Vec<usize>,
}

/// What a sheet leaves to the one that follows an edit.
struct Before {
    memo: Memo,
    /// Its text and tree.
    read: (String, Tree),
}

/// Beside what, and within what limits, a sheet is worked out.
#[derive(Clone, Copy)]
pub struct Around<'a> {
    /// The name by which other sheets use this one, where it has one: so a sheet that uses itself is found out.
    pub name: Option<&'a str>,
    /// The texts of other sheets.
    pub sheets: Lookup<'a>,
    /// Limits of the run.
    pub limits: Limits,
    /// Quantities whose values are kept however many they are.
    pub asked: &'a [String],
    /// Whether edits are to follow: what is worked out is kept for them.
    pub editing: bool,
}

impl Default for Around<'_> {
    fn default() -> Self {
        Around {
            name: None,
            sheets: &|_| None,
            limits: Limits::default(),
            asked: &[],
            editing: false,
        }
    }
}

impl Sheet {
    /// Reads, checks and works out a sheet. Never fails: what is wrong with it is among the findings.
    #[must_use]
    pub fn open(text: &str) -> Self {
        Self::open_within(text, Limits::default(), &[])
    }

    /// The same with other sheets to be used: `sheets` gives the text of a sheet by its name.
    ///
    /// What a line takes from another sheet is worked out here anew, so that its tolerances and conditions come along.
    /// An axis that only the other sheet has stands where the sheet is used; it is among the report's axes where a line
    /// of this sheet varies over it. The report lists the quantities of this sheet only.
    ///
    /// # Example
    /// ```
    /// use formulas::sheet::Sheet;
    /// let text = "use \"osier-geometry\" as g\nL [lb] = 12 lb/ft^2*g.S\n";
    /// let beside = |name: &str| (name == "osier-geometry").then(|| "S [ft^2] = 142\n".to_owned());
    /// let report = Sheet::open_with(text, &beside).report(&[]);
    /// assert_eq!(report.quantity("L").unwrap().largest.as_ref().unwrap().value, 1704.0);
    /// ```
    #[must_use]
    pub fn open_with(text: &str, sheets: Lookup<'_>) -> Self {
        Self::open_around(
            text,
            &Around {
                sheets,
                ..Around::default()
            },
        )
    }

    /// The same within lower limits; `asked` names quantities whose values are kept however many they are.
    #[must_use]
    pub fn open_within(text: &str, limits: Limits, asked: &[String]) -> Self {
        Self::open_around(
            text,
            &Around {
                limits,
                asked,
                ..Around::default()
            },
        )
    }

    /// The same with everything that can be said about its surroundings.
    #[must_use]
    pub fn open_around(text: &str, around: &Around<'_>) -> Self {
        let reader = Reader::new(around.sheets, around.limits);
        Self::read(text, around, reader, around.editing.then(Memo::default))
    }

    fn read(
        text: &str,
        around: &Around<'_>,
        mut reader: Reader<'_>,
        mut memo: Option<Memo>,
    ) -> Self {
        let mut checked = reader.read(around.name, text);
        let plan = plan::plan(&checked.program);
        let (values, found, ran) = match &mut memo {
            None => {
                let (values, found) =
                    run::run(&checked.program, &plan, around.limits, around.asked);
                (values, found, Vec::new())
            }
            Some(memo) => {
                let program = &checked.program;
                let outcome = run::run_again(program, &plan, around.limits, around.asked, memo);
                (outcome.values, outcome.problems, outcome.ran)
            }
        };
        let found = of_this_sheet(&checked.tree, found);
        checked.problems.extend(found);
        let used = reader.used_by(&checked.tree);
        Sheet {
            memo,
            ran,
            ..Self::of(checked, values, text, around, used)
        }
    }

    /// Reads and checks only: for what needs no values, such as completion and the form. Its report has none.
    #[must_use]
    pub fn open_unrun(text: &str, around: &Around<'_>) -> Self {
        let mut reader = Reader::new(around.sheets, around.limits);
        let checked = reader.read(around.name, text);
        let used = reader.used_by(&checked.tree);
        Self::of(checked, Values::default(), text, around, used)
    }

    fn of(
        checked: Checked,
        values: Values,
        text: &str,
        around: &Around<'_>,
        used: BTreeMap<String, Rc<UsedSheet>>,
    ) -> Self {
        Sheet {
            name: around.name.map(str::to_string),
            text: text.to_string(),
            asked: around.asked.to_vec(),
            tree: checked.tree,
            names: checked.names,
            order: checked.order,
            uses: checked.used,
            program: checked.program,
            values,
            problems: checked.problems,
            limits: around.limits,
            used,
            memo: None,
            ran: Vec::new(),
        }
    }

    /// Takes the text after an edit: only lines that the edit changes, or whose values it changes, are worked out
    /// again. The result is that of opening the text, bit for bit.
    ///
    /// # Example
    /// ```
    /// use formulas::sheet::{Around, Sheet};
    /// let editing = Around { editing: true, ..Around::default() };
    /// let mut sheet = Sheet::open_around("a = 2\nb = 3*a\nc = 5\nd = 2*c\n", &editing);
    /// sheet.update("a = 2\nb = 3*a\nc = 6\nd = 2*c\n");
    /// assert_eq!(sheet.ran(), ["d"]);
    /// ```
    pub fn update(&mut self, text: &str) {
        let before = self.given_up();
        *self = self.again(text, &|name| self.text_of(name), before);
    }

    /// The same where other sheets may have changed, or others may be used.
    pub fn update_with(&mut self, text: &str, sheets: Lookup<'_>) {
        let before = self.given_up();
        *self = self.again(text, sheets, before);
    }

    /// What the sheet that follows an edit takes over.
    fn given_up(&mut self) -> Before {
        let read = (
            std::mem::take(&mut self.text),
            std::mem::take(&mut self.tree),
        );
        Before {
            memo: self.memo.take().unwrap_or_default(),
            read,
        }
    }

    /// The text of another sheet, as it was read.
    fn text_of(&self, sheet: &str) -> Option<String> {
        self.used.get(sheet).map(|sheet| sheet.text.clone())
    }

    fn again(&self, text: &str, sheets: Lookup<'_>, before: Before) -> Sheet {
        let around = Around {
            name: self.name.as_deref(),
            sheets,
            limits: self.limits,
            asked: &self.asked,
            editing: true,
        };
        let (old, tree) = before.read;
        let reader = Reader::again(sheets, self.limits, &self.used).edited_from(old, tree);
        Self::read(text, &around, reader, Some(before.memo))
    }

    /// The quantities that the last edit made work out again, in the order of the sheet; all of them after the first
    /// reading. Numbers typed are no work.
    #[must_use]
    pub fn ran(&self) -> Vec<&str> {
        let symbol = |at: &usize| self.program.quantities.get(*at).map(|q| q.symbol.as_str());
        self.ran.iter().filter_map(symbol).collect()
    }

    /// The text that was read.
    #[must_use]
    pub fn text(&self) -> &str {
        &self.text
    }

    /// What it says.
    #[must_use]
    pub fn tree(&self) -> &Tree {
        &self.tree
    }

    /// What it names.
    #[must_use]
    pub fn names(&self) -> &Names {
        &self.names
    }

    /// The other sheets that were read for it, by their names.
    #[must_use]
    pub fn used(&self) -> &BTreeMap<String, Rc<UsedSheet>> {
        &self.used
    }

    /// What was checked.
    #[must_use]
    pub fn program(&self) -> &Program {
        &self.program
    }

    /// What was worked out, in SI.
    #[must_use]
    pub fn values(&self) -> &Values {
        &self.values
    }

    /// Everything that is wrong with it or deserves a look, in the order of the text.
    #[must_use]
    pub fn findings(&self) -> Vec<Finding> {
        diagnostics::findings(&self.problems, &self.tree, &self.text)
    }

    /// The report; `asked` names quantities whose values are written however many they are.
    #[must_use]
    pub fn report(&self, asked: &[String]) -> Report {
        self.reported(asked, true)
    }

    /// The report without figures and without the drawings of free bodies, for whoever wants the numbers first.
    #[must_use]
    pub fn report_undrawn(&self, asked: &[String]) -> Report {
        self.reported(asked, false)
    }

    /// What [`Sheet::report_undrawn`] leaves out: the figures, and the free bodies with their drawings.
    #[must_use]
    pub fn drawings(&self) -> (Vec<report::Figure>, Vec<report::Freebody>) {
        report::drawings(&self.tree, &self.program, &self.values)
    }

    fn reported(&self, asked: &[String], drawn: bool) -> Report {
        let findings = self.findings();
        let input = report::Input {
            text: &self.text,
            tree: &self.tree,
            program: &self.program,
            values: &self.values,
            others: self
                .used
                .iter()
                .map(|(name, sheet)| (name.as_str(), sheet.text.as_str()))
                .collect(),
            findings,
            asked,
            drawn,
        };
        report::build(&input)
    }

    /// One quantity as the report has it, with its values however many they are; `None` where nothing has that symbol.
    /// Its values are `None` where there were too many to keep and they were not asked for when the sheet was opened.
    ///
    /// # Example
    /// ```
    /// let sheet = formulas::Sheet::open("S [ft^2] = 142\nq = 12 lb/ft^2\nF = q*S\n");
    /// assert_eq!(sheet.quantity("F").unwrap().largest.unwrap().value, 1704.0);
    /// assert!(sheet.quantity("G").is_none());
    /// ```
    #[must_use]
    pub fn quantity(&self, symbol: &str) -> Option<report::Quantity> {
        report::quantity_named(&self.program, &self.values, symbol)
    }

    /// The rows of the computation form.
    #[must_use]
    pub fn form(&self) -> report::Form {
        report::form(&self.text, &self.tree, &self.program)
    }

    /// The printed report as an HTML document with nothing outside it: figures as vectors, one governing condition
    /// worked in full, page numbers and digest set in the margins of each page. No script is in it.
    ///
    /// # Example
    /// ```
    /// let print = formulas::Sheet::open("title Osier & others\nS [ft^2] = 142 ; drawing OS-010\n").print();
    /// assert!(print.contains("<h1>Osier &amp; others</h1>"));
    /// ```
    #[must_use]
    pub fn print(&self) -> String {
        let report = self.report(&self.asked);
        let worked = report.governing.first().and_then(|line| {
            let ends = [line.largest.as_ref(), line.smallest.as_ref()];
            let ends = ends.into_iter().flatten();
            let worst = ends.max_by(|a, b| a.value.abs().total_cmp(&b.value.abs()))?;
            self.trail(&line.symbol, &worst.condition.0).ok()
        });
        report::html::write(&report::html::Input {
            report: &report,
            form: &self.form(),
            tree: &self.tree,
            worked: worked.as_ref(),
        })
    }

    /// How a value came about. `condition` names labels of axes; along those that it leaves the condition of largest
    /// magnitude is taken.
    ///
    /// # Errors
    /// Says which symbol, axis or label there is not.
    pub fn trail(&self, symbol: &str, condition: &[(String, String)]) -> Result<Trail, TrailError> {
        let other = |sheet: &str, symbol: &str, condition: &[(String, String)]| {
            let used = self.used.get(sheet)?;
            let condition = self.labels_in(used, condition);
            let around = Around {
                name: Some(sheet),
                sheets: &|name| self.text_of(name),
                limits: self.limits,
                ..Around::default()
            };
            let opened = Sheet::open_around(&used.text, &around);
            opened.trail(symbol, &condition).ok()
        };
        let followed = Followed {
            text: &self.text,
            tree: &self.tree,
            names: &self.names,
            order: &self.order,
            used: &self.uses,
            program: &self.program,
            limits: self.limits,
            other: &other,
        };
        trail::follow(&followed, symbol, condition)
    }

    /// What could stand at a place, line and column counted from 1, the column in Unicode characters.
    #[must_use]
    pub fn complete(&self, line: u32, column: u32) -> Completions {
        let desk = self.desk();
        complete::complete(&desk, desk.byte(line, column))
    }

    /// What stands at a place; `None` where there is nothing to say.
    #[must_use]
    pub fn hover(&self, line: u32, column: u32) -> Option<Hover> {
        let desk = self.desk();
        hover::hover(&desk, desk.byte(line, column))
    }

    /// The text with a fix of one of its findings applied; `None` where the fix is not of this text.
    #[must_use]
    pub fn fixed(&self, fix: &Fix) -> Option<String> {
        crate::assist::fix::applied(&self.text, fix)
    }

    /// What an editor's questions are answered from.
    #[must_use]
    pub fn desk(&self) -> Desk<'_> {
        Desk {
            text: &self.text,
            tree: &self.tree,
            names: &self.names,
            program: &self.program,
            values: &self.values,
            used: &self.uses,
        }
    }

    /// A condition as another sheet calls it: axes agree in place and value, but show numbers in units of their own.
    fn labels_in(
        &self,
        other: &UsedSheet,
        condition: &[(String, String)],
    ) -> Vec<(String, String)> {
        let label = |(name, label): &(String, String)| {
            let axes = |program: &Program| program.axes.iter().position(|a| a.name == *name);
            let place = self.program.axes.get(axes(&self.program)?)?.find(label)?;
            let theirs = other.program.axes.get(axes(&other.program)?)?;
            Some((name.clone(), theirs.labels.get(place)?.clone()))
        };
        condition.iter().filter_map(label).collect()
    }

    /// Replaces the right side of an input by another, and works the sheet out again.
    ///
    /// # Errors
    /// Gives a sentence where the symbol is no input or the expression cannot stand there; then nothing changes.
    pub fn set(&mut self, symbol: &str, expression: &str) -> Result<(), String> {
        let text =
            crate::setting::replaced(&self.text, &self.tree, &self.program, symbol, expression)?;
        let known = self.errors();
        let before = self.text.clone();
        self.update(&text);
        let found = self.errors();
        if let Some(message) = found.into_iter().find(|m| !known.contains(m)) {
            self.update(&before);
            return Err(message);
        }
        Ok(())
    }

    /// What the errors among the findings say.
    fn errors(&self) -> Vec<String> {
        let findings = self.findings().into_iter();
        findings
            .filter(|finding| finding.severity == diagnostics::Severity::Error)
            .map(|finding| finding.message)
            .collect()
    }
}
