//! Short texts of trees, for comparing.

use crate::syntax::{
    DefinitionValue, Expr, ExprKind, FreebodyItem, Name, Parameter, Statement, StatementKind,
    Toleranced, UnitText, VaryPoints, Words,
};

fn joined<T>(items: &[T], separator: &str, show: impl Fn(&T) -> String) -> String {
    items.iter().map(show).collect::<Vec<_>>().join(separator)
}

fn names(items: &[Name]) -> String {
    joined(items, ", ", |name| name.text.clone())
}

pub(super) fn unit(unit: &UnitText) -> String {
    let factors = joined(&unit.factors, " ", |factor| match factor.power {
        1 => factor.name.text.clone(),
        power => format!("{}^{power}", factor.name.text),
    });
    let kind = unit
        .kind
        .as_ref()
        .map_or(String::new(), |kind| format!(" as {}", kind.text));
    format!("<{factors}{kind}>")
}

fn opt_unit(unit_text: Option<&UnitText>) -> String {
    unit_text.map_or(String::new(), unit)
}

/// An expression with brackets around everything.
pub(super) fn expr(tree: &Expr) -> String {
    match &tree.kind {
        ExprKind::Number { value, unit, more } => {
            let more = joined(more, "", |(value, part)| {
                format!("+{value}{}", self::unit(part))
            });
            format!("{value}{}{more}", opt_unit(unit.as_ref()))
        }
        ExprKind::UnitOne(one) => format!("one{}", unit(one)),
        ExprKind::Text(text) => format!("{text:?}"),
        ExprKind::Name(name) => name.clone(),
        ExprKind::Field { base, field } => format!("{}.{}", expr(base), field.text),
        ExprKind::None => "none".to_owned(),
        ExprKind::Excluded => "excluded".to_owned(),
        ExprKind::Negate(inner) => format!("(-{})", expr(inner)),
        ExprKind::Not(inner) => format!("(not {})", expr(inner)),
        ExprKind::Binary {
            op, left, right, ..
        } => {
            format!("({} {} {})", expr(left), op.sign(), expr(right))
        }
        ExprKind::If {
            condition,
            then,
            otherwise,
        } => {
            format!(
                "(if {} then {} else {})",
                expr(condition),
                expr(then),
                expr(otherwise)
            )
        }
        ExprKind::Call {
            function,
            arguments,
            over,
        } => {
            let arguments = joined(arguments, ", ", |argument| {
                let name = argument
                    .name
                    .as_ref()
                    .map_or(String::new(), |name| format!("{}: ", name.text));
                name + &expr(&argument.value)
            });
            let over = over
                .as_ref()
                .map_or(String::new(), |over| format!(" over {}", names(over)));
            format!("{}({arguments}{over})", function.text)
        }
        ExprKind::Pick {
            base,
            selections,
            word,
        } => {
            let at = joined(selections, ", ", |one| {
                format!("{}: {}", one.axis.text, expr(&one.position))
            });
            let word = word.map_or(String::new(), |(word, _)| format!(" {word:?}"));
            format!("{}@({at}{word})", expr(base))
        }
        ExprKind::Error => "ERROR".to_owned(),
    }
}

pub(super) fn toleranced(value: &Toleranced) -> String {
    let tolerance = value.tolerance.as_ref().map_or(String::new(), |tolerance| {
        format!(" +/- {}", expr(tolerance))
    });
    expr(&value.value) + &tolerance
}

fn parameters(items: &[Parameter]) -> String {
    joined(items, ", ", |one| {
        one.name.text.clone() + &opt_unit(one.unit.as_ref())
    })
}

fn words(items: &[Words]) -> String {
    joined(items, ", ", |words| format!("{:?}", words.text))
}

/// A statement in a form in which all of it shows.
pub(super) fn statement(statement: &Statement) -> String {
    match &statement.kind {
        StatementKind::Blank => "blank".to_owned(),
        StatementKind::Prose => "prose".to_owned(),
        StatementKind::Title { word, text } => format!("{word:?} {:?}", text.text),
        StatementKind::Part(text) => format!("part {:?}", text.text),
        StatementKind::Sub(text) => format!("sub {:?}", text.text),
        StatementKind::Note(text) => format!("note {:?}", text.text),
        StatementKind::Aside(text) => format!("aside {:?}", text.text),
        StatementKind::Definition(one) => {
            let value = match &one.value {
                DefinitionValue::One(value) => toleranced(value),
                DefinitionValue::ByAxis { axis, items } => {
                    let items = joined(items, " | ", |item| {
                        let label = item
                            .label
                            .as_ref()
                            .map_or(String::new(), |label| format!("{:?}: ", label.text));
                        label + &toleranced(&item.value)
                    });
                    format!("by {}: {items}", axis.text)
                }
            };
            format!(
                "{}{} = {value}",
                one.symbol.text,
                opt_unit(one.unit.as_ref())
            )
        }
        StatementKind::Function(one) => format!(
            "{}({}){} := {}",
            one.name.text,
            parameters(&one.parameters),
            opt_unit(one.unit.as_ref()),
            expr(&one.body)
        ),
        StatementKind::Vary(one) => {
            let points = match &one.points {
                VaryPoints::Labels(labels) => words(labels),
                VaryPoints::Step { from, to, step } => {
                    format!("{} to {} step {}", expr(from), expr(to), expr(step))
                }
                VaryPoints::Count { from, to, count } => {
                    format!("{} to {} count {}", expr(from), expr(to), expr(count))
                }
                VaryPoints::List(points) => joined(points, " | ", expr),
            };
            format!(
                "vary {}{}: {points}",
                one.name.text,
                opt_unit(one.unit.as_ref())
            )
        }
        StatementKind::Table(table) => {
            let rows = joined(&table.rows, "", |row| {
                let remark = row
                    .remark
                    .as_ref()
                    .map_or(String::new(), |remark| format!(" ; {}", remark.text));
                let values: Vec<String> = row.key_values.iter().flatten().map(expr).collect();
                format!(
                    "\n{}: {}{} | {}{remark}",
                    row.line,
                    words(&row.keys),
                    if values.is_empty() {
                        String::new()
                    } else {
                        format!(" ({})", values.join(", "))
                    },
                    joined(&row.cells, " | ", toleranced)
                )
            });
            let end = if table.ended { "end" } else { "no end" };
            format!(
                "table {} | {}{rows}\n{end}",
                parameters(&table.keys),
                parameters(&table.columns)
            )
        }
        StatementKind::Unknown(one) => {
            let symbols = joined(&one.unknowns, ", ", |one| {
                let unit = opt_unit(one.unit.as_ref());
                format!(
                    "{}{unit} in {}..{}",
                    one.symbol.text,
                    expr(&one.low),
                    expr(&one.high)
                )
            });
            let equations = joined(&one.equations, " and ", |(left, right)| {
                format!("{} = {}", expr(left), expr(right))
            });
            format!("unknown {symbols}: {equations}")
        }
        StatementKind::Governing { symbols, over } => {
            let over = over
                .as_ref()
                .map_or(String::new(), |over| format!(" over {}", names(over)));
            format!("governing {}{over}", joined(symbols, ", ", expr))
        }
        StatementKind::Require { condition } => format!("require {}", expr(condition)),
        StatementKind::Freebody { name, items } => {
            let items = joined(items, ", ", |item| match item {
                FreebodyItem::Force { force, station } => {
                    format!("{} @ {}", expr(force), expr(station))
                }
                FreebodyItem::Axial { force, height } => {
                    format!("axial {} @ {}", expr(force), expr(height))
                }
                FreebodyItem::Couple { moment } => format!("couple {}", expr(moment)),
            });
            format!("freebody {:?}: {items}", name.text)
        }
        StatementKind::Figure {
            name,
            curves,
            against,
            each,
            closed,
        } => format!(
            "figure {:?}: {} against {} each [{}]{}",
            name.text,
            joined(curves, ", ", expr),
            expr(against),
            names(each),
            if *closed { " closed" } else { "" }
        ),
        StatementKind::Use { sheet, name } => format!("use {:?} as {}", sheet.text, name.text),
        StatementKind::Unreadable { defines } => {
            format!(
                "unreadable {}",
                defines.as_ref().map_or("", |name| &name.text)
            )
        }
    }
}
