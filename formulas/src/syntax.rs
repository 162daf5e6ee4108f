//! The tree: what a sheet says, with nothing resolved. Made by `parse`, only read afterwards.

use crate::problem::Problem;
use crate::span::Span;

/// A whole sheet, one entry for each statement, blank lines and asides included, in order.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Tree {
    /// The statements in the order of the text. Put together, their texts are the text that was read.
    pub statements: Vec<Statement>,
    /// Problems of the sheet as a whole (its size), with spans from the start of the text.
    pub problems: Vec<Problem>,
}

/// One statement with all the lines it takes.
#[derive(Clone, PartialEq, Debug)]
pub struct Statement {
    /// Byte in the text at which it starts; spans inside count from here.
    pub start: usize,
    /// Length in bytes, the ends of its lines included.
    pub length: usize,
    /// Its first line, counted from 1.
    pub line: u32,
    /// How many lines it takes.
    pub lines: u32,
    /// What it says.
    pub kind: StatementKind,
    /// The text behind `;`, blanks trimmed.
    pub remark: Option<Words>,
    /// What could not be read in it.
    pub problems: Vec<Problem>,
}

/// A piece of plain text and where it stands.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Words {
    /// The text, blanks trimmed; of a quoted text what stands between the quotes.
    pub text: String,
    /// Where it stands (with its quotes, if it has some).
    pub span: Span,
}

/// A symbol, axis, function or field name: NFC, as compared.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Name {
    /// The name.
    pub text: String,
    /// Where it stands.
    pub span: Span,
}

/// Words that open a line of the title block.
#[derive(Clone, Copy, PartialEq, Eq, Debug, PartialOrd, Ord)]
#[allow(missing_docs)]
pub enum TitleWord {
    Title,
    Revision,
    Date,
    Prepared,
    Checked,
    Basis,
    Digits,
    Units,
    Sources,
}

/// What a statement says.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub enum StatementKind {
    /// Nothing, or blanks.
    Blank,
    /// A line that holds only a remark; the text is in `remark`.
    Prose,
    /// A line of the title block.
    Title {
        word: TitleWord,
        text: Words,
    },
    /// A heading.
    Part(Words),
    /// A sub-heading.
    Sub(Words),
    /// Printed prose.
    Note(Words),
    /// A private remark.
    Aside(Words),
    Definition(Definition),
    Function(FunctionDefinition),
    Vary(Vary),
    Table(Table),
    Unknown(Unknown),
    /// `governing symbol, symbol over axis, axis`; a symbol may be a field.
    Governing {
        symbols: Vec<Expr>,
        over: Option<Vec<Name>>,
    },
    Require {
        condition: Expr,
    },
    Freebody {
        name: Words,
        items: Vec<FreebodyItem>,
    },
    Figure {
        name: Words,
        curves: Vec<Expr>,
        against: Expr,
        each: Vec<Name>,
        closed: bool,
    },
    Use {
        sheet: Words,
        name: Name,
    },
    /// Could not be read; the problems say why. `defines` is the symbol it was about to give a value, where that can
    /// be told, so that its users are not called unknown.
    Unreadable {
        defines: Option<Name>,
    },
}

/// `symbol [unit] = expression` or `symbol [unit] by axis = list`.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Definition {
    pub symbol: Name,
    pub unit: Option<UnitText>,
    pub value: DefinitionValue,
}

/// The right side of a definition.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub enum DefinitionValue {
    One(Toleranced),
    ByAxis { axis: Name, items: Vec<ListItem> },
}

/// `x +/- t`, or `x` alone.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Toleranced {
    pub value: Expr,
    pub tolerance: Option<Expr>,
}

/// One value of a list by axis.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct ListItem {
    pub label: Option<Words>,
    pub value: Toleranced,
    pub span: Span,
}

/// `name(a, b [unit]) [unit] = expression`.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct FunctionDefinition {
    pub name: Name,
    pub parameters: Vec<Parameter>,
    pub unit: Option<UnitText>,
    pub body: Expr,
}

/// A parameter of an own function.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Parameter {
    pub name: Name,
    pub unit: Option<UnitText>,
}

/// `vary name [unit]: …`.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Vary {
    pub name: Name,
    pub unit: Option<UnitText>,
    pub points: VaryPoints,
}

/// The points of an axis. A `vary` without a bracket whose values are all numbers is still an axis of labels.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub enum VaryPoints {
    Labels(Vec<Words>),
    Step { from: Expr, to: Expr, step: Expr },
    Count { from: Expr, to: Expr, count: Expr },
    List(Vec<Expr>),
}

/// `table key | symbol [unit] | …`, its rows, `end`.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Table {
    pub keys: Vec<Parameter>,
    pub columns: Vec<Parameter>,
    pub rows: Vec<Row>,
    /// False where the table ran out without `end`.
    pub ended: bool,
}

/// A row of a table.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Row {
    /// Line of the row, counted from the statement's first line as 0.
    pub line: u32,
    pub span: Span,
    /// One for each key; text as typed.
    pub keys: Vec<Words>,
    /// For a key with a bracket, the number, one entry for each key.
    pub key_values: Vec<Option<Expr>>,
    pub cells: Vec<Toleranced>,
    pub remark: Option<Words>,
}

/// `unknown a between p and q, … such that l = r and …`.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Unknown {
    pub unknowns: Vec<UnknownSymbol>,
    pub equations: Vec<(Expr, Expr)>,
}

/// One symbol to be solved for.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct UnknownSymbol {
    pub symbol: Name,
    pub unit: Option<UnitText>,
    pub low: Expr,
    pub high: Expr,
}

/// One entry of a free body.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub enum FreebodyItem {
    Force { force: Expr, station: Expr },
    Axial { force: Expr, height: Expr },
    Couple { moment: Expr },
}

/// A unit as typed: factors with whole powers, those below the line negative.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
#[allow(missing_docs)]
pub struct UnitText {
    /// The text without brackets, blanks trimmed, as typed.
    pub text: String,
    /// Where the text stands (without its brackets).
    pub span: Span,
    pub factors: Vec<UnitFactor>,
    /// `EAS`, `CAS` or `TAS` behind a unit in a bracket. Boxed, as it is rare and a tree holds many units.
    pub kind: Option<Box<Name>>,
}

/// One unit name and its power.
#[derive(Clone, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub struct UnitFactor {
    pub name: Name,
    pub power: i32,
    /// The sign that stood directly before the name: `.`, `-`, `/`, or none for the first.
    pub joined_by: Option<char>,
}

/// An expression.
#[derive(PartialEq, Debug)]
pub struct Expr {
    /// Where it stands, outer brackets left off.
    pub span: Span,
    /// What it says.
    pub kind: ExprKind,
}

impl Clone for Expr {
    /// Walks down a chain of signs step by step: a sum of 2,000 terms is as deep as it is long, and a call for each
    /// would need more stack than a browser gives.
    fn clone(&self) -> Self {
        let mut chain = Vec::new();
        let mut first = self;
        while let ExprKind::Binary {
            op,
            op_span,
            left,
            right,
        } = &first.kind
        {
            chain.push((first.span, *op, *op_span, right));
            first = left;
        }
        let leaf = Expr {
            span: first.span,
            kind: first.kind.clone(),
        };
        chain
            .into_iter()
            .rev()
            .fold(leaf, |left, (span, op, op_span, right)| Expr {
                span,
                kind: ExprKind::Binary {
                    op,
                    op_span,
                    left: Box::new(left),
                    right: right.clone(),
                },
            })
    }
}

/// What an expression says.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub enum ExprKind {
    /// A number with its unit, or a compound number such as `12 ft 6 in`: each part is a number and a unit.
    /// A sign that belongs to the number (a temperature in degC or degF, a compound number) is in the parts.
    Number {
        value: f64,
        unit: Option<UnitText>,
        more: Vec<(f64, UnitText)>,
    },
    /// `[unit]`: one of that unit.
    UnitOne(UnitText),
    Text(String),
    Name(String),
    /// `base.field`; the base is a `Name` or a `Field`.
    Field {
        base: Box<Expr>,
        field: Name,
    },
    None,
    Excluded,
    Negate(Box<Expr>),
    Not(Box<Expr>),
    Binary {
        op: BinaryOp,
        op_span: Span,
        left: Box<Expr>,
        right: Box<Expr>,
    },
    If {
        condition: Box<Expr>,
        then: Box<Expr>,
        otherwise: Box<Expr>,
    },
    Call {
        function: Name,
        arguments: Vec<Argument>,
        over: Option<Vec<Name>>,
    },
    Pick {
        base: Box<Expr>,
        selections: Vec<Selection>,
        word: Option<(PickWord, Span)>,
    },
    /// Could not be read; a problem says why.
    Error,
}

/// An argument of a call.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Argument {
    pub name: Option<Name>,
    pub value: Expr,
}

/// `axis: position` of a pick.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub struct Selection {
    pub axis: Name,
    pub position: Expr,
}

/// A word behind the selections of a pick.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum PickWord {
    Smooth,
    Nearest,
    Held,
}

/// Signs between two operands.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum BinaryOp {
    Add,
    Subtract,
    Multiply,
    Divide,
    Power,
    Less,
    LessOrEqual,
    Greater,
    GreaterOrEqual,
    Equal,
    NotEqual,
    And,
    Or,
}

impl BinaryOp {
    /// As typed in plain text.
    #[must_use]
    pub fn sign(self) -> &'static str {
        match self {
            BinaryOp::Add => "+",
            BinaryOp::Subtract => "-",
            BinaryOp::Multiply => "*",
            BinaryOp::Divide => "/",
            BinaryOp::Power => "^",
            BinaryOp::Less => "<",
            BinaryOp::LessOrEqual => "<=",
            BinaryOp::Greater => ">",
            BinaryOp::GreaterOrEqual => ">=",
            BinaryOp::Equal => "=",
            BinaryOp::NotEqual => "!=",
            BinaryOp::And => "and",
            BinaryOp::Or => "or",
        }
    }

    /// Whether it compares.
    #[must_use]
    pub fn compares(self) -> bool {
        use BinaryOp::{Equal, Greater, GreaterOrEqual, Less, LessOrEqual, NotEqual};
        matches!(
            self,
            Less | LessOrEqual | Greater | GreaterOrEqual | Equal | NotEqual
        )
    }
}
