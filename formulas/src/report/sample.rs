//! A small sheet made by hand, tree, program and values, for the tests of the report.

use super::{Input, Report, build};
use crate::axes::{AxisId, AxisSet, Shape};
use crate::problem::Conditions;
use crate::program::{
    self, Axis, Comparison, EntryKind, Freebody, FreebodyEntry, Kind, Node, NodeId, NumberKind, Op,
    Program, Quantity, QuantityId, Requirement, ShownUnit,
};
use crate::span::Span;
use crate::syntax::{
    BinaryOp, Definition, DefinitionValue, Expr, ExprKind, Name, Statement, StatementKind,
    TitleWord, Toleranced, Tree, UnitText, Vary, VaryPoints, Words,
};
use crate::values::{
    Column, EXCLUDED, Extreme, FreebodyValues, GoverningValues, NONE, QuantityValues,
    RequirementValues, Summary, Values, WorstCondition,
};
use engine::quantity::{Dimension, Unit};

/// The text of the sheet, CR LF in one line and a statement over two lines.
pub(super) const TEXT: &str = "\
title Osier; tail load
vary point: A | C
vary cg: fwd | aft\r
W [lb] = 560 ; weighing report; part 2
T [degC] by cg = fwd: 15 | aft: -
P [lb] = W * ; to be
  f            ; checked
slow = P < W
name = \"at \" ; text
require P <= W ; strength
governing P over point
freebody \"Tail, all\": P @ x, -W @ 1 ft
";

/// So many pound-force in newtons, by the unit table.
fn lb(value: f64) -> f64 {
    Unit::named("lb").unwrap().to_si(value)
}

pub(super) struct Sample {
    pub(super) tree: Tree,
    pub(super) program: Program,
    pub(super) values: Values,
}

impl Sample {
    pub(super) fn report(&self) -> Report {
        build(&Input {
            text: TEXT,
            tree: &self.tree,
            program: &self.program,
            values: &self.values,
            others: Vec::new(),
            findings: Vec::new(),
            asked: &[],
            drawn: true,
        })
    }
}

pub(super) fn sample() -> Sample {
    Sample {
        tree: tree(),
        program: program(),
        values: values(),
    }
}

/// The place of a piece of text inside statement `index`.
fn span(index: usize, piece: &str) -> Span {
    let (start, length, _) = places()[index];
    let text = &TEXT[start..start + length];
    let at = text.find(piece).unwrap();
    Span::new(at, at + piece.len())
}

/// Start, length and number of lines of each statement.
fn places() -> Vec<(usize, usize, u32)> {
    let mut places: Vec<(usize, usize, u32)> = Vec::new();
    let mut start = 0;
    for line in TEXT.split_inclusive('\n') {
        match places.last_mut() {
            Some(last) if line.starts_with("  f") => {
                last.1 += line.len();
                last.2 += 1;
            }
            _ => places.push((start, line.len(), 1)),
        }
        start += line.len();
    }
    places
}

fn words(index: usize, text: &str) -> Words {
    Words {
        text: text.to_owned(),
        span: span(index, text),
    }
}

fn name(index: usize, text: &str) -> Name {
    Name {
        text: text.to_owned(),
        span: span(index, text),
    }
}

fn expression() -> Expr {
    Expr {
        span: Span::default(),
        kind: ExprKind::None,
    }
}

fn definition(index: usize, symbol: &str, unit: Option<&str>) -> StatementKind {
    StatementKind::Definition(Definition {
        symbol: name(index, symbol),
        unit: unit.map(|u| UnitText {
            text: u.to_owned(),
            span: span(index, u),
            ..UnitText::default()
        }),
        value: DefinitionValue::One(Toleranced {
            value: expression(),
            tolerance: None,
        }),
    })
}

fn by_axis(index: usize, symbol: &str, unit: &str, axis: &str) -> StatementKind {
    let StatementKind::Definition(mut made) = definition(index, symbol, Some(unit)) else {
        return StatementKind::Blank;
    };
    made.value = DefinitionValue::ByAxis {
        axis: name(index, axis),
        items: Vec::new(),
    };
    StatementKind::Definition(made)
}

fn vary(index: usize, axis: &str) -> StatementKind {
    StatementKind::Vary(Vary {
        name: name(index, axis),
        unit: None,
        points: VaryPoints::Labels(Vec::new()),
    })
}

fn tree() -> Tree {
    let kinds = vec![
        StatementKind::Title {
            word: TitleWord::Title,
            text: words(0, "Osier; tail load"),
        },
        vary(1, "point"),
        vary(2, "cg"),
        definition(3, "W", Some("lb")),
        by_axis(4, "T", "degC", "cg"),
        definition(5, "P", Some("lb")),
        definition(6, "slow", None),
        definition(7, "name", None),
        StatementKind::Require {
            condition: expression(),
        },
        StatementKind::Governing {
            symbols: Vec::new(),
            over: None,
        },
        StatementKind::Freebody {
            name: words(10, "Tail, all"),
            items: Vec::new(),
        },
    ];
    let remarks = [
        (3, "weighing report; part 2"),
        (5, "to be"),
        (7, "text"),
        (8, "strength"),
    ];
    let mut line = 1;
    let mut statements = Vec::new();
    for (index, (kind, (start, length, lines))) in kinds.into_iter().zip(places()).enumerate() {
        let remark = remarks.iter().find(|(i, _)| *i == index);
        statements.push(Statement {
            start,
            length,
            line,
            lines,
            kind,
            remark: remark.map(|(i, text)| words(*i, text)),
            problems: Vec::new(),
        });
        line += lines;
    }
    Tree {
        statements,
        problems: Vec::new(),
    }
}

fn shown(text: &str) -> Option<ShownUnit> {
    Some(ShownUnit {
        text: text.into(),
        unit: Unit::named(text).unwrap(),
    })
}

fn number(dimension: Dimension, absolute: bool) -> Kind {
    Kind::Number(NumberKind {
        dimension,
        speed: None,
        absolute,
        any: false,
    })
}

fn label_axis(label: &str, statement: usize, labels: &[&str]) -> Axis {
    Axis {
        name: label.to_owned(),
        statement,
        labels: labels.iter().map(|l| (*l).to_owned()).collect(),
        label_texts: Vec::new(),
        listed: true,
        values: None,
        unit: None,
    }
}

const POINT: AxisId = AxisId(0);
const CG: AxisId = AxisId(1);

fn quantity(symbol: &str, statement: usize, kind: Kind, unit: Option<ShownUnit>) -> Quantity {
    let tree = tree();
    let place = &tree.statements[statement];
    Quantity {
        symbol: symbol.to_owned(),
        statement,
        line: place.line,
        span: Span::default(),
        kind,
        unit,
        node: Some(NodeId(0)),
        axes: AxisSet::NONE,
        input: symbol == "W" || symbol == "T",
        is_axis: false,
        listed: true,
        origin: None,
        remark: place.remark.as_ref().map(|r| r.text.clone()),
        part: None,
    }
}

fn program() -> Program {
    let force = || number(Dimension::FORCE, false);
    let both = AxisSet::of(POINT).with(AxisSet::of(CG));
    let mut quantities = vec![
        quantity("W", 3, force(), shown("lb")),
        quantity("T", 4, number(Dimension::TEMPERATURE, true), shown("degC")),
        quantity("P", 5, force(), shown("lb")),
        quantity("slow", 6, Kind::Condition, None),
        quantity("name", 7, Kind::Text, None),
    ];
    quantities[1].axes = AxisSet::of(CG);
    quantities[2].axes = both;
    let entry = |text: &str, quantity: Option<u32>, at: &str| FreebodyEntry {
        kind: EntryKind::Force,
        text: text.to_owned(),
        value: NodeId(0),
        unit: shown("lb"),
        quantity: quantity.map(QuantityId),
        at_text: at.to_owned(),
        at: Some(NodeId(0)),
        at_unit: shown("ft"),
    };
    Program {
        axes: vec![
            label_axis("point", 1, &["A", "C"]),
            label_axis("cg", 2, &["fwd", "aft"]),
        ],
        texts: vec!["at \"".to_owned()],
        nodes: vec![Node {
            op: Op::None,
            axes: AxisSet::NONE,
        }],
        quantities,
        governing: vec![program::Governing {
            statement: 9,
            quantity: QuantityId(2),
            over: AxisSet::of(POINT),
        }],
        requirements: vec![Requirement {
            statement: 8,
            condition: Some(NodeId(0)),
            axes: both,
            parts: vec![Comparison {
                op: BinaryOp::LessOrEqual,
                left: NodeId(0),
                right: NodeId(0),
                unit: shown("lb"),
                margin: true,
            }],
            text: "P <= W".to_owned(),
        }],
        freebodies: vec![Freebody {
            statement: 10,
            name: "Tail, all".to_owned(),
            items: vec![entry("P", Some(2), "x"), entry("-W", None, "1 ft")],
            axes: both,
        }],
        digits: 4,
        ..Program::default()
    }
}

fn column(set: AxisSet, values: Vec<f64>, summary: Summary) -> QuantityValues {
    let shape = Shape::of(set, &[2, 2]);
    QuantityValues {
        shape: shape.clone(),
        column: Some(Column {
            shape,
            values: values.into(),
        }),
        known: true,
        summary,
        worst: None,
        rss: None,
    }
}

fn extremes(largest: (f64, usize), smallest: (f64, usize)) -> Summary {
    let extreme = |(value, condition)| Some(Extreme { value, condition });
    Summary {
        without_value: 0,
        excluded: 0,
        largest: extreme(largest),
        smallest: extreme(smallest),
    }
}

fn values() -> Values {
    let both = AxisSet::of(POINT).with(AxisSet::of(CG));
    let one = AxisSet::NONE;
    let all = Summary {
        without_value: 1,
        excluded: 1,
        ..extremes((lb(700.0), 2), (lb(-20.0), 0))
    };
    let temperature = Summary {
        without_value: 1,
        ..extremes((288.15, 0), (288.15, 0))
    };
    let loads = vec![lb(-20.0), NONE, lb(700.0), EXCLUDED];
    Values {
        quantities: vec![
            column(
                one,
                vec![lb(560.0)],
                extremes((lb(560.0), 0), (lb(560.0), 0)),
            ),
            column(AxisSet::of(CG), vec![288.15, NONE], temperature),
            column(both, loads, all),
            column(one, vec![1.0], Summary::default()),
            column(one, vec![0.0], Summary::default()),
        ],
        governing: vec![GoverningValues {
            all,
            groups: vec![extremes((lb(700.0), 2), (lb(-20.0), 0)), Summary::default()],
            group_shape: Shape::of(AxisSet::of(CG), &[2, 2]),
            ..GoverningValues::default()
        }],
        requirements: vec![RequirementValues {
            shape: Shape::of(both, &[2, 2]),
            met: Some(false),
            not_met: 1,
            without_value: 1,
            excluded: 1,
            worst: Some(WorstCondition {
                part: 0,
                condition: 2,
                left: lb(700.0),
                right: lb(560.0),
            }),
            met_at_worst: None,
            sensitivity: crate::values::Sensitivity::default(),
        }],
        freebodies: vec![FreebodyValues {
            shape: Shape::of(both, &[2, 2]),
            known: true,
            closes: false,
            taken_up_by: None,
            force_residual: 0.25,
            axial_residual: 0.0,
            moment_residual: 0.5,
            worst: Some(2),
            open: Conditions::default(),
            without_value: 2,
            drawn: None,
        }],
        figures: Vec::new(),
    }
}
