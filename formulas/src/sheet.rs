//! The front door: a sheet with everything that was found out about it. The only holder of state.

use crate::diagnostics::{self, Finding};
use crate::graph;
use crate::names;
use crate::parse;
use crate::plan;
use crate::problem::Located;
use crate::program::Program;
use crate::report::{self, Report};
use crate::run::{self, Limits};
use crate::syntax::Tree;
use crate::values::Values;

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
    text: String,
    asked: Vec<String>,
    tree: Tree,
    program: Program,
    values: Values,
    problems: Vec<Located>,
    limits: Limits,
}

impl Sheet {
    /// Reads, checks and works out a sheet. Never fails: what is wrong with it is among the findings.
    #[must_use]
    pub fn open(text: &str) -> Self {
        Self::open_within(text, Limits::default(), &[])
    }

    /// The same within lower limits; `asked` names quantities whose values are kept however many they are.
    #[must_use]
    pub fn open_within(text: &str, limits: Limits, asked: &[String]) -> Self {
        let tree = parse::parse(text);
        let mut problems = reading_problems(&tree);
        let names = names::collect(&tree, &mut problems);
        let order = graph::order(&tree, &names, &mut problems);
        let (program, checked) = crate::check::check(text, &tree, &names, &order);
        problems.extend(checked);
        let plan = plan::plan(&program);
        let (values, found) = run::run(&program, &plan, limits, asked);
        problems.extend(found);
        Sheet {
            text: text.to_string(),
            asked: asked.to_vec(),
            tree,
            program,
            values,
            problems,
            limits,
        }
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
        let findings = self.findings();
        let input = report::Input {
            text: &self.text,
            tree: &self.tree,
            program: &self.program,
            values: &self.values,
            findings,
            asked,
        };
        report::build(&input)
    }

    /// The rows of the computation form.
    #[must_use]
    pub fn form(&self) -> report::Form {
        report::form(&self.text, &self.tree, &self.program)
    }

    /// Replaces the right side of an input by another, and works the sheet out again.
    ///
    /// # Errors
    /// Gives a sentence where the symbol is no input or the expression cannot stand there; then nothing changes.
    pub fn set(&mut self, symbol: &str, expression: &str) -> Result<(), String> {
        let text =
            crate::setting::replaced(&self.text, &self.tree, &self.program, symbol, expression)?;
        let other = Self::open_within(&text, self.limits, &self.asked);
        let errors = |s: &Sheet| {
            s.findings()
                .into_iter()
                .filter(|f| f.severity == diagnostics::Severity::Error)
        };
        let known: Vec<String> = errors(self).map(|f| f.message).collect();
        if let Some(finding) = errors(&other).find(|f| !known.contains(&f.message)) {
            return Err(finding.message);
        }
        *self = other;
        Ok(())
    }
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
