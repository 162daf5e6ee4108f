//! Generated sheets: every part of the language, with dimensions and axes that fit, so that most lines have values.

use crate::random::Random;
use std::fmt::Write as _;

/// Lengths and forces in several units, by the same number of metres and newtons.
const LENGTHS: [(&str, f64); 4] = [("m", 1.0), ("mm", 0.001), ("ft", 0.3048), ("in", 0.0254)];
const FORCES: [(&str, f64); 3] = [("N", 1.0), ("daN", 10.0), ("lb", 4.448_221_615_260_5)];
/// How many of each list are metric.
const METRIC: usize = 2;

/// What a generated symbol is.
#[derive(Clone, Copy, PartialEq)]
enum Kind {
    Number,
    Length,
    Force,
}

/// A symbol that lines may use, with the axes over which it varies as bits.
#[derive(Clone)]
struct Known {
    name: String,
    kind: Kind,
    axes: u32,
}

/// An axis: its name, and its labels or points.
struct Axis {
    name: String,
    labels: Vec<String>,
    numbers: bool,
}

/// Which numbers and signs a generated sheet may have.
#[derive(Clone, Copy, PartialEq)]
pub enum Style {
    /// Anything, in metric units: their factors are exact, so that other ones change no bit.
    Metric,
    /// Anything, in all units.
    Mixed,
    /// All units, but nothing that cancels or chooses, where a rounding of the last digit could be all that is left.
    Tame,
}

/// A sheet in lines: those that declare axes, whose order counts, and the others, whose order does not.
pub struct Generated {
    /// Declares the axes.
    pub declared: Vec<String>,
    /// Statements whose order does not count; one may be several lines.
    pub lines: Vec<String>,
}

impl Generated {
    /// The text of the sheet.
    #[must_use]
    pub fn text(&self) -> String {
        let all = self.declared.iter().chain(&self.lines);
        all.map(|line| format!("{line}\n")).collect()
    }

    /// Puts the lines whose order does not count into another order.
    pub fn shuffle(&mut self, random: &mut Random) {
        for i in (1..self.lines.len()).rev() {
            self.lines.swap(i, random.below(i + 1));
        }
    }

    /// Changes a line as somebody who types does: another number or name, a line away or twice, a slip.
    pub fn edit(&mut self, random: &mut Random) {
        let at = random.below(self.lines.len());
        let other = random.below(self.lines.len());
        match random.below(9) {
            0 | 1 => self.lines[at] = self.lines[at].replacen('3', "4", 1),
            2 => self.lines[at] = self.lines[at].replacen("x1", "x2", 1),
            3 => self.lines[at] += " + 0*x0",
            4 => self.lines.swap(at, other),
            5 => self.lines[at] = self.lines[at].replacen('=', "= 2*", 1),
            6 => self.lines[at] = self.lines[other].clone(),
            7 => {
                let line: Vec<char> = self.lines[at].chars().collect();
                let cut = random.below(line.len() + 1);
                self.lines[at] = line[..cut].iter().collect();
            }
            _ if self.lines.len() > 2 => {
                self.lines.remove(at);
            }
            _ => {}
        }
    }
}

/// Writes sheets: `random` decides what stands in one, `units` in which units its numbers are written.
struct Writer<'a> {
    random: &'a mut Random,
    units: &'a mut Random,
    axes: Vec<Axis>,
    known: Vec<Known>,
    functions: usize,
    style: Style,
}

/// A sheet of which `random` decides what stands in it, and `units` in which units; the same sheet in other units is
/// the same `random` with other `units`.
#[must_use]
pub fn generate(random: &mut Random, units: &mut Random, style: Style) -> Generated {
    let mut writer = Writer {
        random,
        units,
        axes: Vec::new(),
        known: Vec::new(),
        functions: 0,
        style,
    };
    let declared = writer.declare();
    let mut lines = writer.inputs();
    for _ in 0..writer.random.below(3) {
        lines.push(writer.function());
    }
    for i in 0..8 + writer.random.below(10) {
        lines.push(writer.definition(i));
    }
    lines.extend(writer.outputs());
    Generated { declared, lines }
}

impl Writer<'_> {
    fn number(&mut self) -> f64 {
        (self.random.below(900) + 100) as f64 / 64.0
    }

    /// A number of a kind in one of its units.
    fn constant(&mut self, kind: Kind) -> String {
        let number = self.number();
        match kind {
            Kind::Number => format!("{number}"),
            Kind::Length => self.in_unit(number, &LENGTHS),
            Kind::Force => self.in_unit(number, &FORCES),
        }
    }

    fn in_unit(&mut self, number: f64, list: &[(&str, f64)]) -> String {
        let all = match self.style {
            Style::Metric => &list[..METRIC],
            _ => list,
        };
        let (unit, factor) = *self.units.of(all);
        // Numbers are short binary fractions, so that in metric units they are short decimals too.
        let number = if factor < 0.01 {
            number * 1000.0
        } else {
            number / factor
        };
        format!("{number} {unit}")
    }

    fn kind(&mut self) -> Kind {
        *self.random.of(&[Kind::Number, Kind::Length, Kind::Force])
    }

    fn declare(&mut self) -> Vec<String> {
        let mut lines = Vec::new();
        for at in 0..1 + self.random.below(3) {
            let name = format!("a{at}");
            let labels: Vec<String> = (0..1 + self.random.below(4))
                .map(|l| format!("p{l}"))
                .collect();
            lines.push(format!("vary {name}: {}", labels.join(" | ")));
            self.axes.push(Axis {
                name,
                labels,
                numbers: false,
            });
        }
        if self.random.below(2) == 0 {
            let count = 2 + self.random.below(5);
            lines.push(format!("vary k [1]: 1 to {} count {count}", 2 * count - 1));
            let labels = (0..count).map(|i| (1 + 2 * i).to_string()).collect();
            self.know("k", Kind::Number, 1 << self.axes.len());
            self.axes.push(Axis {
                name: "k".into(),
                labels,
                numbers: true,
            });
        }
        if self.random.below(2) == 0 {
            lines.push(self.table());
        }
        lines
    }

    /// A table of two columns with an axis of its own.
    fn table(&mut self) -> String {
        let rows = 2 + self.random.below(4);
        let mut text = "table t [1] | y0 | z0".to_owned();
        for row in 0..rows {
            let a = self.constant(Kind::Length);
            let b = match self.random.below(8) {
                0 => "-".to_owned(),
                _ => self.constant(Kind::Force),
            };
            let _ = write!(text, "\n{row} | {a} | {b}");
        }
        text.push_str("\nend");
        let axes = 1 << self.axes.len();
        self.know("t", Kind::Number, axes);
        self.know("y0", Kind::Length, axes);
        self.know("z0", Kind::Force, axes);
        self.axes.push(Axis {
            name: "t".into(),
            labels: (0..rows).map(|r| r.to_string()).collect(),
            numbers: true,
        });
        text
    }

    fn know(&mut self, name: &str, kind: Kind, axes: u32) {
        self.known.push(Known {
            name: name.to_owned(),
            kind,
            axes,
        });
    }

    /// One symbol of each kind over an axis, and one of each for all conditions; some with a tolerance.
    fn inputs(&mut self) -> Vec<String> {
        let mut lines = Vec::new();
        let kinds = [("x", Kind::Length), ("f", Kind::Force), ("n", Kind::Number)];
        for (letter, kind) in kinds {
            let at = self.random.below(self.axes.len());
            let length = self.axes[at].labels.len();
            let values: Vec<String> = (0..length)
                .map(|_| match self.random.below(10) {
                    0 => "-".to_owned(),
                    _ => self.constant(kind),
                })
                .collect();
            let (name, axis) = (format!("{letter}0"), self.axes[at].name.clone());
            lines.push(format!("{name} by {axis} = {}", values.join(" | ")));
            self.know(&name, kind, 1 << at);
            let name = format!("{letter}1");
            let tolerance = match self.random.below(4) {
                0 => " +/- 2 %",
                _ => "",
            };
            lines.push(format!(
                "{name} = {}{tolerance} ; drawing {letter}",
                self.constant(kind)
            ));
            self.know(&name, kind, 0);
        }
        lines
    }

    /// A function of the sheet of two pure numbers.
    fn function(&mut self) -> String {
        self.functions += 1;
        let name = format!("own{}", self.functions);
        let body = *self.random.of(&[
            "u*v + 1",
            "sqrt(abs(u)) - v/3",
            "if u < v then u else 2*v",
            "max(u, v)*n1",
        ]);
        format!("{name}(u, v) = {body}")
    }

    fn definition(&mut self, at: usize) -> String {
        let kind = self.kind();
        let (text, axes) = self.expression(kind, 3);
        let letter = match kind {
            Kind::Length => 'x',
            Kind::Force => 'f',
            Kind::Number => 'n',
        };
        let name = format!("{letter}{}", at + 2);
        self.know(&name, kind, axes);
        format!("{name} = {text}")
    }

    /// A symbol of a kind.
    fn symbol(&mut self, kind: Kind) -> (String, u32) {
        let fitting: Vec<&Known> = self.known.iter().filter(|k| k.kind == kind).collect();
        let known = self.random.of(&fitting);
        (known.name.clone(), known.axes)
    }

    /// An expression of a kind, and the axes over which it varies.
    fn expression(&mut self, kind: Kind, depth: usize) -> (String, u32) {
        if depth == 0 {
            return match self.random.below(5) {
                0 => (self.constant(kind), 0),
                _ => self.symbol(kind),
            };
        }
        let depth = depth - 1;
        if self.style == Style::Tame {
            return self.tame(kind, depth);
        }
        match self.random.below(14) {
            0 | 1 => self.joined(kind, depth, " + "),
            2 => self.joined(kind, depth, " - "),
            3 => {
                let (a, one) = self.expression(Kind::Number, depth);
                let (b, two) = self.expression(kind, depth);
                (format!("({a})*({b})"), one | two)
            }
            4 => {
                let (a, one) = self.expression(kind, depth);
                let (b, two) = self.expression(Kind::Number, depth);
                (format!("({a})/({b})"), one | two)
            }
            5 => self.choice(kind, depth),
            6 => {
                let (a, one) = self.expression(kind, depth);
                let (b, two) = self.expression(kind, depth);
                let name = *self.random.of(&["max", "min"]);
                (format!("{name}({a}, -({b}))"), one | two)
            }
            7 => {
                let (a, one) = self.expression(kind, depth);
                let (b, two) = self.expression(kind, depth);
                (format!("sqrt(abs(({a})*({b})))"), one | two)
            }
            8 => self.reduced(kind, depth),
            9 => self.picked(kind),
            10 => {
                let (a, axes) = self.expression(kind, depth);
                (format!("abs({a})"), axes)
            }
            11 if kind == Kind::Number => self.ratio(depth),
            12 if kind == Kind::Number && self.functions > 0 => {
                let which = 1 + self.random.below(self.functions);
                let (a, one) = self.expression(kind, depth);
                let (b, two) = self.expression(kind, depth);
                (format!("own{which}({a}, {b})"), one | two)
            }
            13 => self.along(kind),
            _ => self.symbol(kind),
        }
    }

    /// An expression of positive numbers in which nothing cancels.
    fn tame(&mut self, kind: Kind, depth: usize) -> (String, u32) {
        let (a, one) = self.expression(kind, depth);
        let (b, two) = self.expression(kind, depth);
        let (n, three) = self.expression(Kind::Number, depth);
        match self.random.below(7) {
            0 => (format!("({a}) + ({b})"), one | two),
            1 => (format!("({n})*({a})"), one | three),
            2 => (format!("({a})/({n})"), one | three),
            3 => (format!("max({a}, {b})"), one | two),
            4 => (format!("sqrt(({a})*({b}))"), one | two),
            5 if kind == Kind::Number => self.ratio(depth),
            _ => self.reduced(kind, depth),
        }
    }

    fn joined(&mut self, kind: Kind, depth: usize, sign: &str) -> (String, u32) {
        let (a, one) = self.expression(kind, depth);
        let (b, two) = self.expression(kind, depth);
        (format!("({a}){sign}({b})"), one | two)
    }

    fn ratio(&mut self, depth: usize) -> (String, u32) {
        let kind = self.kind();
        let (a, one) = self.expression(kind, depth);
        let (b, two) = self.expression(kind, depth);
        (format!("({a})/({b})"), one | two)
    }

    fn choice(&mut self, kind: Kind, depth: usize) -> (String, u32) {
        let of = self.kind();
        let (a, one) = self.symbol(of);
        let (b, two) = self.symbol(of);
        let (mut test, mut axes) = (format!("{a} < {b}"), one | two);
        match self.random.below(4) {
            0 => test = format!("not ({test}) or has_value({a})"),
            1 => {
                let labelled = self.axes.iter().position(|a| !a.numbers);
                if let Some(at) = labelled {
                    test = format!("{} = \"p0\" and {test}", self.axes[at].name);
                    axes |= 1 << at;
                }
            }
            _ => {}
        }
        let (yes, three) = self.expression(kind, depth);
        let (no, four) = self.expression(kind, depth);
        (
            format!("(if {test} then {yes} else {no})"),
            axes | three | four,
        )
    }

    /// A reduction of what varies, over one of its axes or all.
    fn reduced(&mut self, kind: Kind, depth: usize) -> (String, u32) {
        let (a, axes) = self.expression(kind, depth);
        let Some(at) = self.axis_of(axes) else {
            return (a, axes);
        };
        let name = *self.random.of(&["max", "min", "sum", "mean", "rms"]);
        match self.random.below(2) {
            0 => (format!("{name}({a})"), 0),
            _ => (
                format!("{name}({a} over {})", self.axes[at].name),
                axes & !(1 << at),
            ),
        }
    }

    /// One of the axes of a set.
    fn axis_of(&mut self, axes: u32) -> Option<usize> {
        let all: Vec<usize> = (0..self.axes.len())
            .filter(|at| axes >> at & 1 == 1)
            .collect();
        (!all.is_empty()).then(|| *self.random.of(&all))
    }

    /// A value at a label or a position.
    fn picked(&mut self, kind: Kind) -> (String, u32) {
        let (name, axes) = self.symbol(kind);
        let Some(at) = self.axis_of(axes) else {
            return (name, axes);
        };
        let axis = &self.axes[at];
        let (key, left) = (axis.name.clone(), axes & !(1 << at));
        if !axis.numbers {
            let label = self.random.of(&axis.labels).clone();
            return (format!("({name} at ({key}: \"{label}\"))"), left);
        }
        let how = *self.random.of(&["", ", smooth", ", nearest", ", held"]);
        if self.random.below(2) == 0 {
            let (position, more) = self.symbol(Kind::Number);
            return (format!("({name} at ({key}: {position}{how}))"), left | more);
        }
        let position = self.number() / 4.0;
        (format!("({name} at ({key}: {position}{how}))"), left)
    }

    /// What is worked out along a whole axis.
    fn along(&mut self, kind: Kind) -> (String, u32) {
        let (name, axes) = self.symbol(kind);
        let numbers = (0..self.axes.len()).find(|at| self.axes[*at].numbers && axes >> at & 1 == 1);
        let Some(at) = numbers else {
            return (name, axes);
        };
        let key = self.axes[at].name.clone();
        match self.random.below(3) {
            0 => (
                format!("integral({name}, {key} over {key})"),
                axes & !(1 << at),
            ),
            1 => (format!("running_integral({name}, {key} over {key})"), axes),
            _ => (
                format!("slope({name}, {key} over {key})"),
                axes & !(1 << at),
            ),
        }
    }

    /// Statements that show and judge what there is.
    fn outputs(&mut self) -> Vec<String> {
        let mut lines = Vec::new();
        let (force, _) = self.symbol(Kind::Force);
        let (length, _) = self.symbol(Kind::Length);
        lines.push(format!("governing {force}, {length}"));
        lines.push(format!(
            "require {force} < {} ; allowable",
            self.constant(Kind::Force)
        ));
        if self.style != Style::Tame && self.random.below(2) == 0 {
            let (a, _) = self.symbol(Kind::Length);
            let low = self.units.below(2);
            let bounds = ["-50 and 50", "-(25*2) and 5*10"][low];
            lines.push(format!(
                "unknown w between {bounds} such that w*{a} = {length} + w*{length}/3"
            ));
        }
        if self.random.below(2) == 0 {
            lines.push(format!(
                "freebody \"b\": {force} @ {length}, f1 @ x1, -{force} @ {length}, couple f1*x1"
            ));
        }
        if self.random.below(2) == 0 {
            let axis = self.axes[0].name.clone();
            lines.push(format!("figure \"g\": {force} against {axis}"));
        }
        lines
    }
}
