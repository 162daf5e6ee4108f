//! Problems as facts. Every stage may report some; only `diagnostics` turns them into words, severities and fixes.

use crate::span::Span;
use engine::quantity::{Dimension, SpeedKind};

/// Something wrong, or worth a look, at a place of a statement.
#[derive(Clone, PartialEq, Debug)]
pub struct Problem {
    /// Where, inside the statement (of `Tree::problems`, inside the text).
    pub span: Span,
    /// What.
    pub fault: Fault,
}

/// A problem and the statement it stands in; `None` for the sheet as a whole.
#[derive(Clone, PartialEq, Debug)]
pub struct Located {
    /// Index into `Tree::statements`.
    pub statement: Option<usize>,
    /// The problem.
    pub problem: Problem,
}

/// What a sentence needs to know of one operand.
#[derive(Clone, PartialEq, Debug)]
pub struct Operand {
    /// The operand as typed.
    pub text: String,
    /// Its dimension.
    pub dimension: Dimension,
    /// The unit in which it is shown, where it has one.
    pub unit: Option<String>,
    /// Where it stands.
    pub span: Span,
}

/// Conditions that share a fate.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Conditions {
    /// How many.
    pub count: u64,
    /// The first five, each as pairs of axis and label.
    pub first: Vec<Vec<(String, String)>>,
}

/// An own edit of the text: replace `span` by `text`.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Mend {
    /// What to replace, inside the statement.
    pub span: Span,
    /// By what.
    pub text: String,
}

/// Why a result has no value although what it rests on has.
#[derive(Clone, Copy, PartialEq, Eq, Debug, PartialOrd, Ord)]
pub enum Cause {
    /// A division by zero.
    DivisionByZero,
    /// A function outside its domain (the root of a negative number).
    Domain,
    /// A result too large for a number.
    Overflow,
    /// A position beyond the end of an axis of numbers.
    BeyondEnd,
    /// A label that the axis does not have.
    NoSuchLabel,
    /// A method that found no value.
    NoValue,
    /// An unknown without a solution in its bounds.
    NoSolution,
    /// A text that is no designation of a section.
    Designation,
    /// A contour of too few points.
    ContourPoints,
    /// A contour with two points at one place: the number of the later one, counted from 1; 0 where it is not known.
    ContourRepeated(u16),
    /// A contour that crosses itself, behind the points of these numbers.
    ContourCrossing(u16, u16),
    /// A contour whose ends are apart.
    ContourOpen,
    /// Something that a set of rules does not have, or that is not coded.
    NotCoded,
}

/// Every kind of problem. The names are those of the faults, not of their remedies.
#[derive(Clone, PartialEq, Debug)]
#[allow(missing_docs)]
pub enum Fault {
    // --- reading ---
    /// A character the language does not use.
    UnknownCharacter {
        character: char,
    },
    UnclosedText,
    UnclosedBracket {
        bracket: char,
    },
    UnopenedBracket {
        bracket: char,
    },
    /// `5.`, `1 000`, `1_000`.
    NumberForm {
        text: String,
        mend: String,
    },
    /// `12,5`.
    DecimalComma {
        text: String,
        mend: String,
    },
    /// `kg/m^3/s`.
    SecondSlash {
        text: String,
        mend: Option<String>,
    },
    /// `kg/m.s`: stands, with advice that shows its meaning.
    BelowTheLine {
        text: String,
        meaning: String,
    },
    /// `==`, `:=`, `**`, `&&` …
    ForeignSign {
        text: String,
        mend: String,
    },
    /// Something else was due. `what` reads after 'expected'; `found` is empty at the end of the statement.
    Expected {
        what: &'static str,
        found: String,
    },
    /// The statement stops after a sign that asks for more.
    Dangling {
        sign: String,
    },
    /// `2 (x)`, `S c`.
    ImpliedProduct {
        mend: Option<Mend>,
    },
    /// `a < b < c`.
    ChainedComparison {
        mend: Option<Mend>,
    },
    /// `65 [kt]`.
    BracketAfterNumber {
        unit: String,
    },
    /// A word of the language in the place of a name.
    WordAsName {
        word: String,
    },
    /// A line of the title block after other statements.
    TitleLate {
        word: String,
    },
    TitleTwice {
        word: String,
    },
    /// `digits 20`, `sources maybe`.
    TitleValue {
        word: String,
        found: String,
    },
    IfWithoutElse,
    /// `if` inside arithmetic without brackets.
    IfPlace,
    TableWithoutEnd {
        key: String,
    },
    EndWithoutTable,
    RowLength {
        expected: usize,
        found: usize,
    },
    /// A line that is no statement; `looks_like` is a statement word it may have meant.
    NoStatement {
        found: String,
        looks_like: Option<String>,
    },
    NestingLimit {
        limit: u32,
    },
    OperatorLimit {
        limit: u32,
    },
    SizeLimit {
        bytes: usize,
        limit: usize,
    },
    LineLimit {
        lines: usize,
        limit: usize,
    },
    /// `+/-` that does not stand outermost.
    TolerancePlace,
    /// A list value without label among labelled ones, or the reverse.
    MixedList,
    // --- names ---
    /// `defined` lists nothing more than the nearest one; `other_script` says that it only looks the same.
    UnknownSymbol {
        name: String,
        nearest: Option<String>,
        other_script: bool,
    },
    UnknownFunction {
        name: String,
        nearest: Option<String>,
    },
    /// A symbol used like a function, or a function like a symbol.
    NotAFunction {
        name: String,
    },
    FunctionAsSymbol {
        name: String,
    },
    UnknownAxis {
        name: String,
        nearest: Option<String>,
    },
    Duplicate {
        name: String,
        first_line: u32,
    },
    /// The names from the line back to itself.
    Circular {
        chain: Vec<String>,
    },
    NeverUsed {
        name: String,
    },
    /// A sheet's own definition hides a constant.
    HidesConstant {
        name: String,
    },
    UnknownField {
        record: String,
        field: String,
        fields: Vec<String>,
        nearest: Option<String>,
    },
    RecordAsNumber {
        record: String,
        fields: Vec<String>,
    },
    FieldOfNumber {
        name: String,
        field: String,
    },
    // --- units ---
    UnknownUnit {
        name: String,
        nearest: Option<String>,
        mend: Option<Mend>,
    },
    /// `-` or `/` before a name that is also a symbol: advice.
    UnitIsSymbol {
        name: String,
        sign: char,
    },
    /// `nm` beside `NM`, `kN` beside `kn`, `g` where an acceleration is due: advice.
    LikelyOtherUnit {
        unit: String,
        likely: String,
    },
    /// A bracket of another dimension than the value.
    BracketDimension {
        symbol: String,
        bracket: String,
        bracket_dimension: Dimension,
        value: Operand,
    },
    /// `600 kg` where a force is due.
    MassForForce {
        value: Operand,
        is_number: bool,
    },
    /// Adding, comparing, choosing between different dimensions. `sign` is as typed (`+`, `max`, `if`).
    DimensionMismatch {
        sign: String,
        left: Operand,
        right: Operand,
    },
    /// A power, root or function that wants a pure number. `place` reads before 'is to be a pure number' (`the
    /// exponent`, `the argument of exp`); the span is the value.
    NotANumber {
        place: String,
        value: Operand,
    },
    /// An argument of another dimension.
    ArgumentDimension {
        function: String,
        argument: String,
        wanted: Dimension,
        value: Operand,
    },
    /// The exponent of a quantity with a dimension is not made of numbers, or is no simple fraction.
    ExponentNotFixed {
        base: Operand,
    },
    DimensionLimit,
    /// A pure number where an angle is due: the value is kept in radians. The span is the whole value; `place` reads
    /// before 'is to be an angle' (a symbol, `the argument incidence of tail_lift`). `number` is the whole value where
    /// it is a number typed in place, `divides` the number below the line for which the fix `/deg` applies.
    NumberAsAngle {
        place: String,
        number: Option<Span>,
        divides: Option<Span>,
    },
    /// A bare lift slope below 1.
    SlopePerDegree {
        argument: String,
        value: f64,
        number: Option<Span>,
    },
    SpeedKinds {
        sign: String,
        left: (String, SpeedKind),
        right: (String, SpeedKind),
    },
    BracketSpeedKind {
        symbol: String,
        bracket: SpeedKind,
        value: SpeedKind,
    },
    /// A calibrated airspeed in a dynamic pressure.
    CalibratedInPressure {
        speed: String,
    },
    /// An equivalent airspeed with a density other than rho0.
    EquivalentWithDensity {
        speed: String,
        density: String,
    },
    ArgumentSpeedKind {
        function: String,
        argument: String,
        wanted: Option<SpeedKind>,
        given: SpeedKind,
    },
    /// degC or degF in arithmetic; the mend is in K.
    TemperatureInArithmetic {
        text: String,
        kelvin: String,
    },
    /// degC or degF where a difference is due.
    TemperatureDifference {
        text: String,
    },
    /// `3.8 g`: a load factor is a bare number.
    LoadFactorUnit {
        text: String,
        mend: String,
    },
    // --- kinds ---
    /// Text for a number, a condition for a text and so on. `place` reads before 'is to be' (`what stands behind if`),
    /// `wanted` and `found` carry their article (`a number`, `text`, `a condition`); the span is the value. `quote` is
    /// the fix for a designation typed as a number.
    WrongKind {
        place: String,
        wanted: &'static str,
        found: &'static str,
        quote: Option<Mend>,
    },
    ArgumentCount {
        function: String,
        least: usize,
        most: usize,
        found: usize,
    },
    ArgumentName {
        function: String,
        name: String,
        names: Vec<String>,
        nearest: Option<String>,
    },
    /// A text that is none of the words the argument knows: `rule: "CS 99"`, `maneuver: "loop"`. The span is the text.
    UnknownWord {
        function: String,
        argument: String,
        found: String,
        words: Vec<String>,
        nearest: Option<String>,
    },
    ArgumentTwice {
        function: String,
        name: String,
    },
    ArgumentMissing {
        function: String,
        name: String,
    },
    /// A whole-line function without `over`, and more than one axis possible.
    OverMissing {
        function: String,
        axes: Vec<String>,
    },
    /// `over` where the function takes none.
    OverNotTaken {
        function: String,
    },
    /// An axis that the value does not have: error for some functions, advice for others.
    AxisNotVaried {
        function: String,
        axis: String,
        refused: bool,
    },
    // --- axes ---
    ByCount {
        symbol: String,
        axis: String,
        labels: Vec<String>,
        found: usize,
    },
    UnknownLabel {
        axis: String,
        label: String,
        nearest: Option<String>,
    },
    LabelTwice {
        axis: String,
        label: String,
    },
    LabelMissing {
        symbol: String,
        axis: String,
        labels: Vec<String>,
    },
    /// `by a, b`: the fix proposes a table.
    TwoAxes {
        axes: Vec<String>,
    },
    /// The points of an axis of numbers neither rise nor fall all along.
    AxisOrder {
        axis: String,
    },
    /// A point of an axis of numbers that is not made of numbers and units alone.
    AxisNumbers {
        axis: String,
    },
    /// Steps that do not lead from one end of the axis to the other; the span is the step or the count.
    AxisSteps {
        axis: String,
    },
    /// Steps that pass over the end of the axis; the span is the step.
    AxisEndLeftOut {
        axis: String,
        /// The last point, and the end that is left out, as shown.
        last: String,
        end: String,
    },
    AxisPointTwice {
        axis: String,
        value: String,
    },
    AxisEmpty {
        axis: String,
    },
    AxisLimit {
        limit: usize,
    },
    LabelLimit {
        axis: String,
        limit: usize,
        found: u64,
    },
    ConditionLimit {
        symbol: String,
        found: f64,
        limit: f64,
    },
    OperationLimit {
        limit: f64,
    },
    /// A table whose rows leave out labels: advice.
    RowsMissing {
        axis: String,
        labels: Vec<String>,
    },
    // --- results ---
    WithoutValue {
        symbol: String,
        cause: Cause,
        conditions: Conditions,
    },
    /// `force`, `axial` and `moment` are the sums left over in the worst condition, as shown, with their units.
    FreebodyOpen {
        name: String,
        conditions: Conditions,
        force: String,
        axial: Option<String>,
        moment: String,
    },
    FreebodyUnits {
        name: String,
    },
    InputWithoutSource {
        symbol: String,
    },
    /// A method outside its validity: `numbers` says the value and the range.
    Validity {
        function: String,
        text: String,
        conditions: Conditions,
    },
    /// Arguments that a method takes but that are suspect: `text` says what of them, and with which numbers.
    ReferenceTrap {
        function: String,
        text: String,
        conditions: Conditions,
    },
    /// Downwash by both functions for it in one sheet; `function` is the later one, `other` the one called before.
    DownwashTwice {
        function: String,
        other: String,
    },
    /// `basis` is the line that names other rules than those, where there is one.
    RulesMixed {
        rules: Vec<String>,
        basis: Option<String>,
    },
    /// A method outside what its argument may be at all: `text` reads after 'is to be' (`at most 1.5, such as 0.25 or
    /// 25 %`); the span is the value.
    ArgumentRange {
        function: String,
        argument: String,
        text: String,
    },
    /// An unknown with more sign changes in its bounds than the one taken: advice.
    FurtherSolutions {
        symbol: String,
        conditions: Conditions,
    },
    /// More unknowns than equations in a statement, or the reverse.
    EquationCount {
        unknowns: usize,
        equations: usize,
    },
    /// A function that makes an axis, elsewhere than alone as a right side.
    MadeAxisPlace {
        function: String,
    },
    /// An argument whose texts name the labels of an axis, and that is no column or list of texts typed.
    MadeAxisTexts {
        function: String,
        argument: String,
    },
    /// More unknowns in a statement than can be solved for together.
    UnknownLimit {
        found: usize,
        limit: usize,
    },
    /// Equations that mix the conditions over which their unknown varies.
    UnknownCoupled {
        symbol: String,
    },
    /// Axes of a figure that are neither named behind `each` nor picked.
    FigureAxes {
        symbol: String,
        axes: Vec<String>,
    },
    /// A figure of too many curves or points.
    FigureLimit {
        what: &'static str,
        found: f64,
        limit: f64,
    },
    // --- other sheets ---
    /// A symbol that another sheet does not give.
    UnknownInSheet {
        sheet: String,
        name: String,
        nearest: Option<String>,
    },
    /// Sheets that use one another too deep.
    SheetDepth {
        limit: usize,
    },
    /// An axis of another sheet by a name that means something else here.
    SheetAxisHidden {
        sheet: String,
        axis: String,
    },
    MissingSheet {
        sheet: String,
    },
    /// A name of another sheet that is a path, or this sheet itself.
    SheetName {
        sheet: String,
    },
    /// An axis of both sheets with other labels, or in another order.
    SheetAxis {
        sheet: String,
        axis: String,
    },
    /// The other sheet has findings of its own.
    SheetFindings {
        sheet: String,
        errors: usize,
        warnings: usize,
    },
    MemoryLimit {
        symbol: String,
    },
}
