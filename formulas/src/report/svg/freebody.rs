//! A free body: forces as arrows at their stations, axial forces at their heights, couples as arcs, and the sums.

use super::axis::Numbers;
use super::pen::{Anchor, Pen, at, cut, width};
use crate::numbers;
use crate::program::EntryKind;
use crate::report::Condition;

const WIDTH: f64 = 720.0;
const LEFT: f64 = 90.0;
const RIGHT: f64 = 630.0;
/// Length of the largest arrow.
const LONGEST: f64 = 96.0;
const LINE: f64 = 15.0;
const INK: &str = r#"stroke-width="1.6""#;
const FINE: &str = r#"stroke-width="0.5" stroke-opacity="0.5""#;
const DOTTED: &str = r#"stroke-width="0.6" stroke-dasharray="1.5 2.5""#;

/// A value in the unit shown; the unit with a blank before it, empty for none.
#[derive(Clone, Debug, PartialEq)]
pub struct Shown {
    /// The value.
    pub value: f64,
    /// Its unit.
    pub unit: String,
}

/// A force, axial force or couple.
#[derive(Clone, Debug, PartialEq)]
pub struct Arrow {
    /// Which of them.
    pub kind: EntryKind,
    /// As typed.
    pub text: String,
    /// Its value.
    pub value: Shown,
    /// The same in SI, by which it is drawn to scale.
    pub si: f64,
    /// Station or height as typed; empty for a couple.
    pub at_text: String,
    /// Station or height.
    pub at: Shown,
    /// The same in SI.
    pub at_si: f64,
}

/// A free body in one condition.
#[derive(Clone, Debug, PartialEq)]
pub struct Drawn {
    /// Its name.
    pub name: String,
    /// The condition.
    pub condition: Condition,
    /// Significant figures shown.
    pub digits: u8,
    /// What acts on it.
    pub arrows: Vec<Arrow>,
    /// Sum of the forces across.
    pub force: Shown,
    /// Sum of the axial forces.
    pub axial: Shown,
    /// Sum of the moments about the first station and height.
    pub moment: Shown,
}

/// Draws a free body: nose to the left, stations aft to the right, forces up positive, couples nose up positive, which
/// is clockwise here.
#[must_use]
pub fn freebody(drawn: &Drawn) -> String {
    let mut pen = Pen::default();
    let pairs = drawn
        .condition
        .0
        .iter()
        .map(|(axis, label)| format!("{axis} {label}"));
    let condition = pairs.collect::<Vec<_>>().join(", ");
    let heading = if condition.is_empty() {
        drawn.name.clone()
    } else {
        format!("{}: {condition}", drawn.name)
    };
    pen.text((20.0, 20.0), Anchor::Start, &cut(&heading, 100));
    let mut bottom = 34.0;
    bottom = across(&mut pen, drawn, bottom);
    bottom = along(&mut pen, drawn, bottom);
    bottom = couples(&mut pen, drawn, bottom);
    for line in sums(drawn) {
        bottom += LINE;
        pen.text((20.0, bottom), Anchor::Start, &line);
    }
    let words = words(drawn, &condition);
    pen.finish((WIDTH, bottom + 12.0), &heading, &words)
}

fn of_kind(drawn: &Drawn, kind: EntryKind) -> Vec<&Arrow> {
    drawn.arrows.iter().filter(|a| a.kind == kind).collect()
}

fn shown(drawn: &Drawn, value: &Shown) -> String {
    format!(
        "{}{}",
        numbers::shown(value.value, drawn.digits),
        value.unit
    )
}

/// `P_t = 42.10 lb at 17.30 ft`.
fn label(drawn: &Drawn, arrow: &Arrow) -> String {
    let value = format!("{} = {}", cut(&arrow.text, 26), shown(drawn, &arrow.value));
    if arrow.at_text.is_empty() {
        value
    } else {
        format!("{value} at {}", shown(drawn, &arrow.at))
    }
}

fn largest(arrows: &[&Arrow]) -> f64 {
    arrows.iter().map(|a| a.si.abs()).fold(0.0, f64::max)
}

/// The axis of stations and the forces across it.
fn across(pen: &mut Pen, drawn: &Drawn, top: f64) -> f64 {
    let arrows = of_kind(drawn, EntryKind::Force);
    if arrows.is_empty() {
        return top;
    }
    let axis = Numbers::of(arrows.iter().map(|a| a.at.value), 6.0, false);
    let mut placed = Vec::new();
    let mut tips = Vec::new();
    for arrow in &arrows {
        let x = LEFT + (RIGHT - LEFT) * axis.part(arrow.at.value);
        let x = beside(&tips, x, arrow.si < 0.0);
        let part = arrow.si / largest(&arrows);
        tips.push((x, if part.is_finite() { part } else { 0.0 }));
    }
    let up: Vec<Row> = rows(drawn, &arrows, &tips, &mut placed, false);
    let up_rows = up.iter().map(|r| r.row + 1).max().unwrap_or(0) as f64;
    let line = top + 8.0 + up_rows * LINE + LONGEST + 14.0;
    placed.clear();
    let down: Vec<Row> = rows(drawn, &arrows, &tips, &mut placed, true);
    let down_rows = down.iter().map(|r| r.row + 1).max().unwrap_or(0) as f64;
    pen.line(
        (LEFT - 40.0, line),
        (RIGHT + 40.0, line),
        r#"stroke-width="2.4""#,
    );
    let above = up
        .into_iter()
        .map(|row| (line - LONGEST - 14.0 - row.row as f64 * LINE, 4.0, row));
    let below = down
        .into_iter()
        .map(|row| (line + LONGEST + 22.0 + row.row as f64 * LINE, -12.0, row));
    let all: Vec<(f64, f64, Row)> = above.chain(below).collect();
    // Labels come last: their halo keeps the lines that pass behind them off their letters.
    all.iter()
        .for_each(|(y, short, row)| force(pen, row, line, y + short));
    for (y, _, row) in &all {
        pen.text((row.centre, *y), Anchor::Middle, &row.text);
    }
    let ruler = line
        + if down_rows > 0.0 {
            LONGEST + 22.0 + down_rows * LINE
        } else {
            26.0
        };
    ruled(pen, &axis, ruler, &format!("station{}", of_unit(&arrows)))
}

fn of_unit(arrows: &[&Arrow]) -> String {
    let unit = arrows.first().map_or("", |a| a.at.unit.trim());
    if unit.is_empty() {
        String::new()
    } else {
        format!(", {unit}")
    }
}

/// Forces at one station that point the same way stand side by side.
fn beside(tips: &[(f64, f64)], wanted: f64, down: bool) -> f64 {
    let taken = |x: f64| {
        tips.iter()
            .any(|(other, part)| (other - x).abs() < 7.0 && (*part < 0.0) == down)
    };
    let tries = (0..20).map(|i| wanted + f64::from(i) * 8.0);
    tries.into_iter().find(|x| !taken(*x)).unwrap_or(wanted)
}

/// An arrow with the row of its label, counted away from the body.
struct Row {
    x: f64,
    part: f64,
    text: String,
    centre: f64,
    row: usize,
}

/// Gives each label of the forces that point one way the first row in which it touches no other.
fn rows(
    drawn: &Drawn,
    arrows: &[&Arrow],
    tips: &[(f64, f64)],
    placed: &mut Vec<(usize, f64, f64)>,
    down: bool,
) -> Vec<Row> {
    let mut rows = Vec::new();
    for (arrow, (x, part)) in arrows.iter().zip(tips) {
        if (*part < 0.0) != down {
            continue;
        }
        let text = label(drawn, arrow);
        let half = 0.5 * width(&text) + 6.0;
        let centre = x.max(half + 4.0).min(WIDTH - half - 4.0);
        let free = |row: usize| {
            !placed
                .iter()
                .any(|(r, from, to)| *r == row && centre - half < *to && centre + half > *from)
        };
        let row = (0..arrows.len())
            .find(|row| free(*row))
            .unwrap_or(arrows.len());
        placed.push((row, centre - half, centre + half));
        rows.push(Row {
            x: *x,
            part: *part,
            text,
            centre,
            row,
        });
    }
    rows
}

/// An arrow to scale and a dotted line from its tip to its label.
fn force(pen: &mut Pen, row: &Row, line: f64, leader: f64) {
    let tip = line - LONGEST * row.part;
    pen.line((row.x, tip), (row.x, leader), DOTTED);
    arrow(pen, (row.x, line), (row.x, tip));
}

/// A straight arrow; a circle where it has no length.
fn arrow(pen: &mut Pen, from: (f64, f64), to: (f64, f64)) {
    let (dx, dy) = (to.0 - from.0, to.1 - from.1);
    let length = (dx * dx + dy * dy).sqrt();
    if length < 1.0 {
        let (x, y) = from;
        let (left, right, y) = (at(x - 3.0), at(x + 3.0), at(y));
        pen.shape(
            &format!("M{left} {y}A3 3 0 1 1 {right} {y}A3 3 0 1 1 {left} {y}Z"),
            false,
        );
        return;
    }
    pen.line(from, to, INK);
    head(pen, to, (dx / length, dy / length), length.min(9.0));
}

/// The head of an arrow that points along a unit vector.
fn head(pen: &mut Pen, tip: (f64, f64), (ux, uy): (f64, f64), size: f64) {
    let back = (tip.0 - ux * size, tip.1 - uy * size);
    let side = 0.4 * size;
    let corner = |sign: f64| {
        format!(
            "{} {}",
            at(back.0 - sign * uy * side),
            at(back.1 + sign * ux * side)
        )
    };
    let d = format!(
        "M{} {}L{}L{}Z",
        at(tip.0),
        at(tip.1),
        corner(1.0),
        corner(-1.0)
    );
    pen.shape(&d, true);
}

/// A ruler with round numbers; gives where it ends.
fn ruled(pen: &mut Pen, axis: &Numbers, y: f64, title: &str) -> f64 {
    pen.line((LEFT, y), (RIGHT, y), r#"stroke-width="1""#);
    for (value, text) in &axis.ticks {
        let x = LEFT + (RIGHT - LEFT) * axis.part(*value);
        pen.line((x, y), (x, y + 5.0), r#"stroke-width="1""#);
        pen.text((x, y + 18.0), Anchor::Middle, text);
    }
    pen.text((0.5 * (LEFT + RIGHT), y + 34.0), Anchor::Middle, title);
    y + 44.0
}

/// Axial forces, each at its height, aft to the right.
fn along(pen: &mut Pen, drawn: &Drawn, top: f64) -> f64 {
    let arrows = of_kind(drawn, EntryKind::Axial);
    if arrows.is_empty() {
        return top;
    }
    let mut order = arrows.clone();
    order.sort_by(|a, b| b.at_si.total_cmp(&a.at_si));
    let axis = Numbers::of(arrows.iter().map(|a| a.at.value), 3.0, false);
    let field = (LINE * 2.0 * order.len() as f64).max(80.0);
    let (from, x) = (top + 22.0, 0.35 * WIDTH);
    pen.text(
        (20.0, top + 14.0),
        Anchor::Start,
        &format!("axial forces at their heights{}", of_unit(&arrows)),
    );
    pen.line((x, from), (x, from + field), FINE);
    let mut last = from - LINE;
    for one in order {
        let y = from + field * (1.0 - axis.part(one.at.value));
        let part = one.si / largest(&arrows);
        let part = if part.is_finite() { part } else { 0.0 };
        arrow(pen, (x, y), (x + LONGEST * part, y));
        let below = (last + LINE).max(y);
        last = below;
        let start = x + LONGEST + 24.0;
        pen.line(
            (x + LONGEST * part.max(0.0), y),
            (start - 4.0, below),
            DOTTED,
        );
        pen.text((start, below + 4.0), Anchor::Start, &label(drawn, one));
    }
    last.max(from + field) + 16.0
}

/// Couples as three quarters of a circle, clockwise where they lift the nose.
fn couples(pen: &mut Pen, drawn: &Drawn, top: f64) -> f64 {
    let arrows = of_kind(drawn, EntryKind::Couple);
    let mut y = top;
    for one in &arrows {
        let (x, middle, r) = (46.0, y + 22.0, 15.0);
        if one.si == 0.0 {
            arrow(pen, (x, middle), (x, middle));
        } else {
            arc(pen, (x, middle), r, one.si > 0.0);
        }
        pen.text(
            (x + 28.0, middle + 4.0),
            Anchor::Start,
            &format!("couple {}", label(drawn, one)),
        );
        y += 42.0;
    }
    if arrows.is_empty() { top } else { y + 4.0 }
}

fn arc(pen: &mut Pen, (x, y): (f64, f64), r: f64, clockwise: bool) {
    let (start, end) = if clockwise {
        ((x - r, y), (x, y + r))
    } else {
        ((x + r, y), (x, y + r))
    };
    let sweep = u8::from(clockwise);
    let d = format!(
        "M{} {}A{r} {r} 0 1 {sweep} {} {}",
        at(start.0),
        at(start.1),
        at(end.0),
        at(end.1)
    );
    pen.path(&d, INK);
    let along = if clockwise { -1.0 } else { 1.0 };
    head(pen, (end.0 + 4.0 * along, end.1), (along, 0.0), 9.0);
}

/// The closing sums in words.
fn sums(drawn: &Drawn) -> Vec<String> {
    let mut lines = vec![format!("sum of forces: {}", shown(drawn, &drawn.force))];
    if drawn.arrows.iter().any(|a| a.kind == EntryKind::Axial) {
        lines.push(format!(
            "sum of axial forces: {}",
            shown(drawn, &drawn.axial)
        ));
    }
    let first = drawn.arrows.iter().find(|a| a.kind == EntryKind::Force);
    let about = first.map_or_else(String::new, |a| {
        format!(" about station {}", shown(drawn, &a.at))
    });
    lines.push(format!(
        "sum of moments{about}: {}",
        shown(drawn, &drawn.moment)
    ));
    lines
}

fn words(drawn: &Drawn, condition: &str) -> String {
    let mut parts = Vec::new();
    if !condition.is_empty() {
        parts.push(format!("Condition {condition}"));
    }
    parts.extend(drawn.arrows.iter().map(|a| label(drawn, a)));
    parts.extend(sums(drawn));
    parts.join("; ") + "."
}
