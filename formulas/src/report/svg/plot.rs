//! A figure: a ruled field for each unit, one above the other over the same abscissa.

use super::axis::Numbers;
use super::curves::{Stroke, curve, thinned};
use super::pen::{Anchor, LETTERS, Pen, cut, width};
use crate::report::{Figure, FigureCurve, ValueList};
use rustc_hash::FxHashMap;

const WIDTH: f64 = 720.0;
const LEFT: f64 = 82.0;
const TOP: f64 = 34.0;
const FIELD: f64 = 270.0;
const GAP: f64 = 22.0;
const LINE: f64 = 15.0;
/// Most rules over labels.
const RULES_MOST: usize = 120;
/// Most characters of a label.
const LABEL_MOST: usize = 46;
const RULE: &str = r#"stroke-width="0.5" stroke-opacity="0.35""#;
const FRAME: &str = r#"stroke-width="1""#;

/// Draws a figure.
#[must_use]
pub fn figure(figure: &Figure) -> String {
    let fields = fields(figure);
    let layout = Layout::of(figure, &fields);
    let mut pen = Pen::default();
    pen.text((LEFT, 18.0), Anchor::Start, &cut(&figure.name, 90));
    let mut top = TOP;
    for field in &fields {
        layout.field(&mut pen, field, top);
        top += field.height + GAP;
    }
    if fields.is_empty() {
        pen.text((LEFT, top + LINE), Anchor::Start, "no curve could be drawn");
        return pen.finish((WIDTH, top + 2.0 * LINE), &figure.name, &words(figure));
    }
    let bottom = layout.abscissa(&mut pen, top - GAP);
    pen.finish((WIDTH, bottom), &figure.name, &words(figure))
}

/// Curves of one unit.
struct Field<'a> {
    unit: Option<&'a str>,
    curves: Vec<&'a FigureCurve>,
    ordinate: Numbers,
    height: f64,
    /// Whether the labels of the curves have to name the symbol.
    several: bool,
}

fn fields(figure: &Figure) -> Vec<Field<'_>> {
    let mut units: Vec<Option<&str>> = Vec::new();
    for curve in &figure.curves {
        if !units.contains(&curve.unit.as_deref()) {
            units.push(curve.unit.as_deref());
        }
    }
    units
        .into_iter()
        .map(|unit| field_of(figure, unit))
        .collect()
}

fn field_of<'a>(figure: &'a Figure, unit: Option<&'a str>) -> Field<'a> {
    let of_unit = figure.curves.iter().filter(|c| c.unit.as_deref() == unit);
    let curves: Vec<&FigureCurve> = of_unit.collect();
    let values = curves.iter().flat_map(|c| numbers(&c.y)).flatten();
    let several = curves
        .windows(2)
        .any(|w| matches!(w, [a, b] if a.symbol != b.symbol));
    Field {
        unit,
        ordinate: Numbers::of(values, 6.0, true),
        height: FIELD.max(LINE * (curves.len() as f64 + 1.0)),
        several,
        curves,
    }
}

fn numbers(values: &ValueList) -> Vec<Option<f64>> {
    match values {
        ValueList::Numbers(list) => list.clone(),
        ValueList::Conditions(list) => vec![None; list.len()],
        ValueList::Texts(list) => vec![None; list.len()],
    }
}

/// Where a curve ends, how it is drawn and what it is called.
type End = (Option<(f64, f64)>, Stroke, String);

/// What all fields share: the abscissa and the room at the right.
struct Layout<'a> {
    figure: &'a Figure,
    right: f64,
    /// Labels in the order in which they come up, where the abscissa is text.
    labels: Option<Vec<&'a str>>,
    /// The place of each of them.
    places: FxHashMap<&'a str, usize>,
    numbers: Numbers,
}

impl<'a> Layout<'a> {
    fn of(figure: &'a Figure, fields: &[Field<'_>]) -> Self {
        let texts = figure.curves.iter().map(|c| &c.x).filter_map(|x| match x {
            ValueList::Texts(list) => Some(list),
            _ => None,
        });
        let mut labels: Option<Vec<&str>> = None;
        let mut places: FxHashMap<&str, usize> = FxHashMap::default();
        for text in texts.flatten().flatten() {
            let known = labels.get_or_insert_with(Vec::new);
            places.entry(text.as_str()).or_insert_with(|| {
                known.push(text.as_str());
                known.len() - 1
            });
        }
        let values = figure.curves.iter().flat_map(|c| numbers(&c.x)).flatten();
        let widest = fields.iter().filter(|f| f.is_labelled()).flat_map(|f| {
            let each = f.curves.iter().map(|c| width(&f.label(c)));
            each.collect::<Vec<_>>()
        });
        let widest = widest.fold(0.0, f64::max);
        let room = if widest > 0.0 { widest + 46.0 } else { 24.0 };
        Layout {
            figure,
            right: (WIDTH - room).max(WIDTH * 0.5),
            labels,
            places,
            numbers: Numbers::of(values, 7.0, false),
        }
    }

    /// Where a point of a curve stands across.
    fn x(&self, curve: &FigureCurve, point: usize) -> Option<f64> {
        let span = self.right - LEFT;
        match &curve.x {
            ValueList::Numbers(list) => {
                let value = (*list.get(point)?)?;
                Some(LEFT + span * self.numbers.part(value))
            }
            ValueList::Texts(list) => {
                let text = list.get(point)?.as_deref()?;
                let labels = self.labels.as_ref()?;
                let at = *self.places.get(text)?;
                Some(LEFT + span * (at as f64 + 0.5) / labels.len() as f64)
            }
            ValueList::Conditions(_) => None,
        }
    }

    fn points(&self, field: &Field<'_>, curve: &FigureCurve, top: f64) -> Vec<Option<(f64, f64)>> {
        let y = |value: f64| top + field.height * (1.0 - field.ordinate.part(value));
        let values = numbers(&curve.y).into_iter().enumerate();
        values
            .map(|(i, value)| Some((self.x(curve, i)?, y(value?))))
            .collect()
    }

    fn field(&self, pen: &mut Pen, field: &Field<'_>, top: f64) {
        self.rules(pen, field, top);
        let mut ends = Vec::new();
        for (place, one) in field.curves.iter().enumerate() {
            let mut points = self.points(field, one, top);
            let stroke = Stroke::of(place);
            if let Some(labels) = &self.labels {
                self.set_apart(&mut points, place, field.curves.len(), labels.len());
                let marks = thinned(&points);
                marks.iter().flatten().for_each(|p| stroke.mark(pen, *p));
            } else {
                curve(pen, &points, stroke, self.figure.closed);
                self.name_points(pen, one, &points);
            }
            let end = points.iter().flatten().copied();
            let end = end.max_by(|a, b| a.0.total_cmp(&b.0));
            ends.push((end, stroke, field.label(one)));
        }
        if ends.iter().all(|(end, ..)| end.is_none()) {
            let middle = (0.5 * (LEFT + self.right), top + 0.5 * field.height);
            pen.text(middle, Anchor::Middle, "no value");
        }
        if field.is_labelled() {
            self.labels(pen, field, top, ends);
        }
    }

    /// Marks of several curves over one label stand side by side.
    fn set_apart(
        &self,
        points: &mut [Option<(f64, f64)>],
        place: usize,
        curves: usize,
        labels: usize,
    ) {
        let slot = (self.right - LEFT) / labels.max(1) as f64;
        let apart = (0.7 * slot / curves.max(1) as f64).min(10.0);
        let shift = apart * (place as f64 - 0.5 * (curves as f64 - 1.0));
        points.iter_mut().flatten().for_each(|p| p.0 += shift);
    }

    /// The points of an outline have their labels beside them, outside of it.
    fn name_points(&self, pen: &mut Pen, one: &FigureCurve, points: &[Option<(f64, f64)>]) {
        if !self.figure.closed || one.points.len() != points.len() || points.len() > 40 {
            return;
        }
        let there: Vec<(f64, f64)> = points.iter().flatten().copied().collect();
        let count = there.len().max(1) as f64;
        let middle = there
            .iter()
            .fold((0.0, 0.0), |m, p| (m.0 + p.0 / count, m.1 + p.1 / count));
        for (label, point) in one.points.iter().zip(points) {
            let Some((x, y)) = *point else { continue };
            let anchor = if x < middle.0 {
                Anchor::End
            } else {
                Anchor::Start
            };
            let across = if x < middle.0 { -7.0 } else { 7.0 };
            let down = if y < middle.1 { -5.0 } else { 13.0 };
            // At the edge of the field there is room on the inner side only.
            let (anchor, across) =
                if x + across < LEFT + 4.0 + width(label) && anchor == Anchor::End {
                    (Anchor::Start, 7.0)
                } else {
                    (anchor, across)
                };
            pen.text((x + across, y + down), anchor, &cut(label, 16));
        }
    }

    fn rules(&self, pen: &mut Pen, field: &Field<'_>, top: f64) {
        let bottom = top + field.height;
        for (value, label) in &field.ordinate.ticks {
            let y = top + field.height * (1.0 - field.ordinate.part(*value));
            let style = if *value == 0.0 && field.ordinate.crosses_zero() {
                FRAME
            } else {
                RULE
            };
            pen.line((LEFT, y), (self.right, y), style);
            pen.text((LEFT - 6.0, y + 4.0), Anchor::End, label);
        }
        for (x, style) in self.verticals() {
            pen.line((x, top), (x, bottom), style);
        }
        let frame = [
            ((LEFT, top), (self.right, top)),
            ((self.right, top), (self.right, bottom)),
            ((LEFT, bottom), (self.right, bottom)),
            ((LEFT, top), (LEFT, bottom)),
        ];
        frame.iter().for_each(|(a, b)| pen.line(*a, *b, FRAME));
        let title = cut(&field.title(), (field.height / 7.0) as usize);
        pen.turned((16.0, 0.5 * (top + bottom)), Anchor::Middle, &title, -90.0);
    }

    fn verticals(&self) -> Vec<(f64, &'static str)> {
        let span = self.right - LEFT;
        match &self.labels {
            Some(labels) => {
                let count = labels.len().max(1) as f64;
                let every = labels.len().div_ceil(RULES_MOST).max(1);
                (0..labels.len())
                    .step_by(every)
                    .map(|i| (LEFT + span * (i as f64 + 0.5) / count, RULE))
                    .collect()
            }
            None => {
                let zero = |v: f64| {
                    if v == 0.0 && self.numbers.crosses_zero() {
                        FRAME
                    } else {
                        RULE
                    }
                };
                let ticks = self.numbers.ticks.iter();
                ticks
                    .map(|(v, _)| (LEFT + span * self.numbers.part(*v), zero(*v)))
                    .collect()
            }
        }
    }

    /// The labels of the curves in the margin, none nearer to the next than a line, each led to the end of its curve.
    fn labels(&self, pen: &mut Pen, field: &Field<'_>, top: f64, ends: Vec<End>) {
        let mut order: Vec<_> = ends.into_iter().collect();
        let over_labels = self.labels.is_some();
        if !over_labels {
            let height = |end: &Option<(f64, f64)>| end.map_or(f64::INFINITY, |e| e.1);
            order.sort_by(|a, b| height(&a.0).total_cmp(&height(&b.0)));
        }
        let lowest = |rest: usize| top + field.height - LINE * rest as f64;
        let mut last = top - LINE * 0.5;
        let count = order.len();
        for (i, (end, stroke, text)) in order.into_iter().enumerate() {
            let wanted = end.filter(|_| !over_labels).map_or(last + LINE, |e| e.1);
            let y = wanted.min(lowest(count - 1 - i)).max(last + LINE);
            last = y;
            let x = self.right + 14.0;
            if let Some(end) = end.filter(|_| !over_labels) {
                pen.line(end, (x, y), RULE);
            }
            if !over_labels {
                pen.line((x, y), (x + 24.0, y), &stroke.style());
            }
            stroke.mark(pen, (x + 12.0, y));
            pen.text((x + 29.0, y + 4.0), Anchor::Start, &text);
        }
    }

    /// The numbers or labels below the lowest field and what they are; gives the height of the whole.
    fn abscissa(&self, pen: &mut Pen, bottom: f64) -> f64 {
        let title = with_unit(&self.figure.x.symbol, self.figure.x.unit.as_deref());
        let centre = 0.5 * (LEFT + self.right);
        let mut below = bottom + 17.0;
        match &self.labels {
            None => {
                for (value, label) in &self.numbers.ticks {
                    let x = LEFT + (self.right - LEFT) * self.numbers.part(*value);
                    pen.text((x, below), Anchor::Middle, label);
                }
            }
            Some(labels) => below = self.text_labels(pen, labels, bottom),
        }
        pen.text((centre, below + 19.0), Anchor::Middle, &cut(&title, 80));
        below + 32.0
    }

    /// Labels side by side where they have room, else aslant, and where they are too many only some.
    fn text_labels(&self, pen: &mut Pen, labels: &[&str], bottom: f64) -> f64 {
        let slot = (self.right - LEFT) / labels.len().max(1) as f64;
        let cut_to = |most: usize| labels.iter().map(|l| cut(l, most)).collect::<Vec<String>>();
        let widest_of = |texts: &[String]| texts.iter().map(|t| width(t)).fold(0.0, f64::max);
        let whole = cut_to(24);
        let aslant = widest_of(&whole) > slot - 6.0;
        let texts = if aslant { cut_to(14) } else { whole };
        let widest = widest_of(&texts);
        let every = ((LINE / slot).ceil() as usize).max(1);
        for (i, text) in texts.iter().enumerate().filter(|(i, _)| i % every == 0) {
            let x = LEFT + slot * (i as f64 + 0.5);
            if aslant {
                pen.turned((x + 4.0, bottom + 12.0), Anchor::End, text, -45.0);
            } else {
                pen.text((x, bottom + 17.0), Anchor::Middle, text);
            }
        }
        bottom
            + if aslant {
                12.0 + 0.71 * widest + LETTERS
            } else {
                17.0
            }
    }
}

impl Field<'_> {
    fn is_labelled(&self) -> bool {
        self.curves.len() > 1
    }

    /// What stands beside a curve: its symbol where the field shows several, and its condition.
    fn label(&self, curve: &FigureCurve) -> String {
        let pairs = curve
            .condition
            .0
            .iter()
            .map(|(axis, label)| format!("{axis} {label}"));
        let condition = pairs.collect::<Vec<_>>().join(", ");
        let text = match (self.several, condition.is_empty()) {
            (true, false) => format!("{}, {condition}", curve.symbol),
            (false, false) => condition,
            (_, true) => curve.symbol.clone(),
        };
        cut(&text, LABEL_MOST)
    }

    /// What stands beside the ordinate.
    fn title(&self) -> String {
        let mut symbols: Vec<&str> = Vec::new();
        for curve in &self.curves {
            if !symbols.contains(&curve.symbol.as_str()) {
                symbols.push(&curve.symbol);
            }
        }
        with_unit(&symbols.join(", "), self.unit)
    }
}

fn with_unit(symbol: &str, unit: Option<&str>) -> String {
    unit.map_or_else(|| symbol.to_owned(), |unit| format!("{symbol}, {unit}"))
}

/// What a figure shows, for those who do not see it.
fn words(figure: &Figure) -> String {
    let mut text = format!(
        "{} against {}",
        if figure.curves.len() == 1 {
            "One curve".to_owned()
        } else {
            format!("{} curves", figure.curves.len())
        },
        with_unit(&figure.x.symbol, figure.x.unit.as_deref())
    );
    for curve in figure.curves.iter().take(20) {
        let values = numbers(&curve.y).into_iter().flatten();
        let ends = values.fold(None, |ends: Option<(f64, f64)>, v| {
            Some(ends.map_or((v, v), |(low, high)| (low.min(v), high.max(v))))
        });
        let pairs = curve
            .condition
            .0
            .iter()
            .map(|(axis, label)| format!(" {axis} {label}"));
        let name = with_unit(&curve.symbol, curve.unit.as_deref()) + &pairs.collect::<String>();
        text += &match ends {
            Some((low, high)) => format!(
                "; {name}: from {} to {}",
                crate::numbers::shown(low, 4),
                crate::numbers::shown(high, 4)
            ),
            None => format!("; {name}: no value"),
        };
    }
    text + "."
}
