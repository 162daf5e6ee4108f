//! The checked program: every line with its axes, dimension and unit settled. Made by `check`, only read afterwards.

use crate::axes::{AxisId, AxisSet};
use crate::catalogue::{Entry, Validity};
use crate::span::Span;
use crate::syntax::BinaryOp;
use engine::quantity::{Dimension, SpeedKind, Unit};
use std::rc::Rc;

/// Index into [`Program::nodes`].
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, PartialOrd, Ord)]
pub struct NodeId(pub u32);

/// Index into [`Program::quantities`].
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, PartialOrd, Ord)]
pub struct QuantityId(pub u32);

/// Index into [`Program::texts`]; a text value is carried as this number.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, PartialOrd, Ord)]
pub struct TextId(pub u32);

/// A whole sheet, checked.
#[derive(Debug, Default)]
pub struct Program {
    /// The axes in the order in which the sheet declares them.
    pub axes: Vec<Axis>,
    /// Every text that a value may take, each once.
    pub texts: Vec<String>,
    /// All operations; the arguments of a node stand before it.
    pub nodes: Vec<Node>,
    /// Everything with a name and a value, in the order of the sheet (a record's fields in theirs).
    pub quantities: Vec<Quantity>,
    /// Order in which the quantities can be worked out.
    pub order: Vec<QuantityId>,
    /// The `governing` statements, one entry for each symbol.
    pub governing: Vec<Governing>,
    /// The `require` statements.
    pub requirements: Vec<Requirement>,
    /// The `freebody` statements.
    pub freebodies: Vec<Freebody>,
    /// The `figure` statements.
    pub figures: Vec<Figure>,
    /// The `unknown` statements.
    pub unknowns: Vec<Unknown>,
    /// Calls of functions that say where their method holds.
    pub guards: Vec<Guard>,
    /// The inputs that carry a tolerance.
    pub tolerances: Vec<Tolerance>,
    /// Significant figures shown.
    pub digits: u8,
}

/// An axis of conditions.
#[derive(Clone, Debug)]
pub struct Axis {
    /// Its name.
    pub name: String,
    /// The statement that declares it.
    pub statement: usize,
    /// Its labels; of an axis of numbers the values as shown.
    pub labels: Vec<String>,
    /// The labels as text values; empty on an axis of numbers.
    pub label_texts: Vec<TextId>,
    /// The values in SI, of an axis of numbers.
    pub values: Option<Vec<f64>>,
    /// The unit in which the values are shown.
    pub unit: Option<ShownUnit>,
    /// Whether it is told of: an axis of another sheet only where a line of this one varies over it.
    pub listed: bool,
}

impl Axis {
    /// The place of a label; on an axis of numbers a number in the axis's unit will do.
    #[must_use]
    pub fn find(&self, text: &str) -> Option<usize> {
        if let Some(at) = self.labels.iter().position(|l| l == text) {
            return Some(at);
        }
        let number: f64 = text.parse().ok()?;
        let si = self.unit.as_ref().map_or(number, |u| u.unit.to_si(number));
        self.values
            .as_ref()?
            .iter()
            .position(|v| (v - si).abs() <= 1e-12 * v.abs().max(si.abs()))
    }
}

/// A unit with the text by which it is shown, `lb/ft^2`.
#[derive(Clone, PartialEq, Debug)]
pub struct ShownUnit {
    /// As printed.
    pub text: Rc<str>,
    /// What it means.
    pub unit: Unit,
}

/// What kind of value a node has.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Kind {
    /// A number of a dimension.
    Number(NumberKind),
    /// True or false.
    Condition,
    /// Text.
    Text,
    /// A record of a catalogue function: index of the fields is by the entry.
    Record(&'static Entry),
}

/// Dimension of a number and what is kept beside it.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct NumberKind {
    /// The dimension, the angle with it.
    pub dimension: Dimension,
    /// EAS, CAS or TAS.
    pub speed: Option<SpeedKind>,
    /// A temperature above absolute zero rather than a difference.
    pub absolute: bool,
    /// `none`, `excluded` or a lone `0`: fits any dimension.
    pub any: bool,
}

/// One operation.
#[derive(Clone, Debug)]
pub struct Node {
    /// What it does.
    pub op: Op,
    /// The axes over which its value varies.
    pub axes: AxisSet,
}

/// What a node does. Numbers are SI; a condition is 1 or 0; a text is its index.
#[derive(Clone, Debug)]
#[allow(missing_docs)]
pub enum Op {
    Constant(f64),
    None,
    Excluded,
    /// The labels of an axis, as text.
    Labels(AxisId),
    /// The values of an axis of numbers.
    Points(AxisId),
    /// One node for each label of the axis.
    List {
        axis: AxisId,
        items: Vec<NodeId>,
    },
    /// One node for each combination of labels of several axes, row-major; `None` where a table has no row.
    Grid {
        axes: Vec<AxisId>,
        items: Vec<Option<NodeId>>,
    },
    /// The value of a quantity.
    Quantity(QuantityId),
    /// What a statement of [`Program::unknowns`] solves for: its index, and which of its symbols.
    Unknown(usize, usize),
    Negate(NodeId),
    Not(NodeId),
    Binary(BinaryOp, NodeId, NodeId),
    /// A power with a fixed exponent.
    Power(NodeId, f64),
    /// `if`.
    Select {
        condition: NodeId,
        then: NodeId,
        otherwise: NodeId,
    },
    /// A general function of numbers.
    Function(Function, Vec<NodeId>),
    HasValue(NodeId),
    /// A catalogue function, condition by condition or whole lines along `over`.
    Call {
        entry: &'static Entry,
        arguments: Vec<Option<NodeId>>,
        over: Option<AxisId>,
        /// The axis that it makes.
        made: Option<AxisId>,
    },
    /// A field of a record, by its index in the entry.
    Field(NodeId, usize),
    Pick {
        base: NodeId,
        selections: Vec<(AxisId, NodeId, PickMode)>,
    },
    Reduce {
        how: Reduction,
        value: NodeId,
        over: AxisSet,
    },
    /// Methods that take whole lines along one axis.
    Along {
        how: Along,
        value: NodeId,
        x: Option<NodeId>,
        axis: AxisId,
    },
}

/// How a position on an axis picks a value.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum PickMode {
    /// The position is a text: the label itself.
    Label,
    Linear,
    Smooth,
    Nearest,
    Held,
}

/// General functions, condition by condition.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum Function {
    Sqrt,
    Cbrt,
    Abs,
    Sign,
    Exp,
    Ln,
    Log10,
    Sin,
    Cos,
    Tan,
    Asin,
    Acos,
    Atan,
    Atan2,
    Hypot,
    Floor,
    Ceil,
    Round,
    Min,
    Max,
    Clamp,
}

/// Reductions over axes.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum Reduction {
    Max,
    Min,
    Sum,
    Mean,
    Count,
    CountTrue,
    Rms,
    All,
    Any,
    /// The label (text) or value (axis of numbers) where the largest stands.
    WhereMax(AxisId),
    WhereMin(AxisId),
}

/// Methods along an axis.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum Along {
    Integral,
    RunningIntegral,
    Difference,
    Slope,
    Intercept,
}

/// A named value.
#[derive(Clone, Debug)]
pub struct Quantity {
    /// `P_t`, `air.density`.
    pub symbol: String,
    /// The statement that gives it.
    pub statement: usize,
    /// Line of the statement, or of a table's header.
    pub line: u32,
    /// The place of the symbol in the statement.
    pub span: Span,
    /// Number, condition or text (a record itself is no quantity: its fields are).
    pub kind: Kind,
    /// The unit shown.
    pub unit: Option<ShownUnit>,
    /// Its value; `None` where the line could not be checked.
    pub node: Option<NodeId>,
    /// Its axes.
    pub axes: AxisSet,
    /// Whether it is an input.
    pub input: bool,
    /// Whether it is an axis along itself.
    pub is_axis: bool,
    /// Remark of its line.
    pub remark: Option<String>,
    /// The part under which it stands.
    pub part: Option<String>,
    /// Whether it is one of this sheet's own. What another sheet gives is worked out here, but not told of.
    pub listed: bool,
    /// The sheet that it comes from, with what it is there.
    pub origin: Option<Origin>,
}

/// Where a quantity of another sheet stands there.
#[derive(Clone, PartialEq, Eq, Hash, Debug)]
pub struct Origin {
    /// The sheet's name.
    pub sheet: Rc<str>,
    /// Its symbol in that sheet.
    pub symbol: Rc<str>,
}

/// An `unknown` statement.
#[derive(Clone, Debug)]
pub struct Unknown {
    /// The statement.
    pub statement: usize,
    /// The symbols it solves for.
    pub symbols: Vec<String>,
    /// The place of the first symbol.
    pub span: Span,
    /// The bounds of each symbol.
    pub bounds: Vec<(NodeId, NodeId)>,
    /// Both sides of each equation; empty where one could not be checked.
    pub equations: Vec<(NodeId, NodeId)>,
    /// The axes of all bounds and sides.
    pub axes: AxisSet,
}

/// One symbol of a `governing` statement.
#[derive(Clone, Debug)]
pub struct Governing {
    /// The statement.
    pub statement: usize,
    /// The symbol.
    pub quantity: QuantityId,
    /// The axes over which the extremes are sought; what is left gives the groups.
    pub over: AxisSet,
}

/// A `require` statement.
#[derive(Clone, Debug)]
pub struct Requirement {
    /// The statement.
    pub statement: usize,
    /// The whole condition; `None` where it could not be checked.
    pub condition: Option<NodeId>,
    /// Its axes.
    pub axes: AxisSet,
    /// The comparisons joined by `and`; empty for any other form.
    pub parts: Vec<Comparison>,
    /// The condition as typed.
    pub text: String,
}

/// A comparison of a requirement.
#[derive(Clone, Debug)]
pub struct Comparison {
    /// The sign.
    pub op: BinaryOp,
    /// Left side.
    pub left: NodeId,
    /// Right side.
    pub right: NodeId,
    /// Unit in which both sides are shown.
    pub unit: Option<ShownUnit>,
    /// Whether a margin means something: both sides are forces, moments, pressures or loads per length.
    pub margin: bool,
}

/// A `freebody` statement.
#[derive(Clone, Debug)]
pub struct Freebody {
    /// The statement.
    pub statement: usize,
    /// Its name.
    pub name: String,
    /// The entries; empty where one could not be checked.
    pub items: Vec<FreebodyEntry>,
    /// Axes of all of them together.
    pub axes: AxisSet,
}

/// A `figure` statement.
#[derive(Clone, Debug)]
pub struct Figure {
    /// The statement.
    pub statement: usize,
    /// Its name.
    pub name: String,
    /// What it is drawn against, as typed.
    pub x_text: String,
    /// The same, checked; `None` where it or a curve could not be.
    pub x: Option<FigureEntry>,
    /// What is drawn; empty where something could not be checked.
    pub curves: Vec<FigureEntry>,
    /// The axes for each of whose labels there is a curve.
    pub each: AxisSet,
    /// The axis along which curves run; `None` where each is a single point.
    pub along: Option<AxisId>,
    /// Whether the points are joined into an outline.
    pub closed: bool,
}

/// What a figure draws, or draws it against.
#[derive(Clone, Debug)]
pub struct FigureEntry {
    /// As typed.
    pub text: String,
    /// Its value.
    pub node: NodeId,
    /// Number or text.
    pub kind: Kind,
    /// The unit in which it is shown.
    pub unit: Option<ShownUnit>,
    /// Its axes.
    pub axes: AxisSet,
}

/// What an entry of a free body is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
#[allow(missing_docs)]
pub enum EntryKind {
    Force,
    Axial,
    Couple,
}

/// One force or couple.
#[derive(Clone, Debug)]
pub struct FreebodyEntry {
    /// Force across, axial force, or couple.
    pub kind: EntryKind,
    /// The force or couple as typed.
    pub text: String,
    /// Its value.
    pub value: NodeId,
    /// The unit in which it is shown.
    pub unit: Option<ShownUnit>,
    /// The symbol, where the entry is nothing but one.
    pub quantity: Option<QuantityId>,
    /// Station or height as typed; empty for a couple.
    pub at_text: String,
    /// Station or height.
    pub at: Option<NodeId>,
    /// Unit of the station.
    pub at_unit: Option<ShownUnit>,
}

/// A call whose arguments are looked at: outside the range of its method there is advice.
#[derive(Clone, Debug)]
pub struct Guard {
    /// The statement.
    pub statement: usize,
    /// The place of the call.
    pub span: Span,
    /// The function.
    pub entry: &'static Entry,
    /// What is asked of them.
    pub validity: Validity,
    /// Whether it is a suspicion rather than the range of the method.
    pub trap: bool,
    /// Its arguments, with the units in which they are shown; of a whole line one of its values.
    pub arguments: Vec<Option<(NodeId, Option<ShownUnit>)>>,
    /// The axes of all of them.
    pub axes: AxisSet,
}

/// An input with `+/-`.
#[derive(Clone, Debug)]
pub struct Tolerance {
    /// The quantity that carries it.
    pub quantity: QuantityId,
    /// Where in a list or column it stands, as pairs of axis and label index; empty for a single value.
    pub at: Vec<(AxisId, usize)>,
    /// Its half width, in SI, or as a part of the value.
    pub width: ToleranceWidth,
}

/// Half width of a tolerance.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum ToleranceWidth {
    /// Worked out by a node, in the dimension of the value.
    Node(NodeId),
    /// A part of the value.
    Part(f64),
}
