//! Curves: how each is told from the others, and the marks and lines it is made of.

use super::pen::{Pen, at};

/// Dashes of the curves, solid first.
const DASHES: [&str; 6] = ["", "8 4", "2 3", "10 3 2 3", "14 4", "6 3 2 3 2 3"];
/// How many different marks there are.
const MARKS: usize = 7;
/// Most points drawn of a curve: more than one across a screen says nothing more.
const DRAWN_MOST: usize = 1500;
/// Up to so many points each has its mark.
const MARKED_MOST: usize = 16;

/// How a curve is drawn.
#[derive(Clone, Copy, Debug)]
pub(super) struct Stroke {
    number: usize,
}

impl Stroke {
    /// The stroke of the curve of that number, counted from 0: no two of the first forty-two are alike.
    pub(super) fn of(number: usize) -> Self {
        Stroke { number }
    }

    pub(super) fn style(self) -> String {
        match DASHES[self.number % DASHES.len()] {
            "" => r#"stroke-width="1.4""#.to_owned(),
            dash => format!(r#"stroke-width="1.4" stroke-dasharray="{dash}""#),
        }
    }

    /// The mark of the curve around a point.
    pub(super) fn mark(self, pen: &mut Pen, (x, y): (f64, f64)) {
        let r = 3.6;
        let corners = |points: &[(f64, f64)]| {
            let each = points
                .iter()
                .map(|(dx, dy)| format!("{} {}", at(x + dx * r), at(y + dy * r)));
            format!("M{}Z", each.collect::<Vec<_>>().join("L"))
        };
        let kind = self.number % MARKS;
        let filled = (self.number / MARKS) % 2 == 1;
        match kind {
            0 => {
                let (left, right, y, r) = (at(x - r), at(x + r), at(y), at(r));
                pen.shape(
                    &format!("M{left} {y}A{r} {r} 0 1 1 {right} {y}A{r} {r} 0 1 1 {left} {y}Z"),
                    filled,
                );
            }
            1 => pen.shape(
                &corners(&[(-0.9, -0.9), (0.9, -0.9), (0.9, 0.9), (-0.9, 0.9)]),
                filled,
            ),
            2 => pen.shape(&corners(&[(0.0, -1.1), (1.1, 0.9), (-1.1, 0.9)]), filled),
            3 => pen.shape(
                &corners(&[(0.0, -1.25), (1.25, 0.0), (0.0, 1.25), (-1.25, 0.0)]),
                filled,
            ),
            4 => pen.shape(&corners(&[(0.0, 1.1), (1.1, -0.9), (-1.1, -0.9)]), filled),
            5 => cross(pen, (x, y), r, &[(1.0, 0.0), (0.0, 1.0)]),
            _ => cross(pen, (x, y), r, &[(0.8, 0.8), (0.8, -0.8)]),
        }
    }
}

fn cross(pen: &mut Pen, (x, y): (f64, f64), r: f64, arms: &[(f64, f64)]) {
    for (dx, dy) in arms {
        let ends = ((x - dx * r, y - dy * r), (x + dx * r, y + dy * r));
        pen.line(ends.0, ends.1, r#"stroke-width="1.5""#);
    }
}

/// Draws a curve through its points, broken where there is none; `closed` joins its last point to the first.
pub(super) fn curve(pen: &mut Pen, points: &[Option<(f64, f64)>], stroke: Stroke, closed: bool) {
    let points = thinned(points);
    let whole = points.iter().all(Option::is_some);
    let mut d = String::new();
    let mut pen_down = false;
    for point in &points {
        match point {
            Some((x, y)) => {
                let word = if pen_down { 'L' } else { 'M' };
                d += &format!("{word}{} {}", at(*x), at(*y));
                pen_down = true;
            }
            None => pen_down = false,
        }
    }
    if closed && whole && points.len() > 2 {
        d.push('Z');
    }
    if !d.is_empty() {
        pen.path(&d, &stroke.style());
    }
    for (i, point) in points.iter().enumerate() {
        let neighbour = |j: usize| points.get(j).copied().flatten().is_some();
        let alone = !(neighbour(i + 1) || i > 0 && neighbour(i - 1));
        let every = points.len().div_ceil(MARKED_MOST).max(1);
        if let Some(point) = point
            && (alone || i % every == 0 || i + 1 == points.len())
        {
            stroke.mark(pen, *point);
        }
    }
}

/// Of very many points the highest and lowest of each stretch, and where the curve is broken.
pub(super) fn thinned(points: &[Option<(f64, f64)>]) -> Vec<Option<(f64, f64)>> {
    if points.len() <= DRAWN_MOST {
        return points.to_vec();
    }
    let stretch = (2 * points.len()).div_ceil(DRAWN_MOST);
    let mut kept = Vec::new();
    for part in points.chunks(stretch) {
        let there = || {
            part.iter()
                .enumerate()
                .filter_map(|(i, p)| Some((i, (*p)?.1)))
        };
        let low = there().min_by(|a, b| a.1.total_cmp(&b.1)).map(|(i, _)| i);
        let high = there().max_by(|a, b| a.1.total_cmp(&b.1)).map(|(i, _)| i);
        let gap = part.iter().position(Option::is_none);
        let mut places: Vec<usize> = [low, high, gap].into_iter().flatten().collect();
        places.sort_unstable();
        places.dedup();
        kept.extend(places.into_iter().filter_map(|i| part.get(i).copied()));
    }
    kept
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn very_many_points_keep_their_peaks_and_gaps() {
        let mut points: Vec<_> = (0..100_000).map(|i| Some((f64::from(i), 0.0))).collect();
        points[777] = Some((777.0, 5.0));
        points[888] = None;
        let kept = thinned(&points);
        assert!(kept.len() <= 2 * DRAWN_MOST);
        assert!(kept.contains(&Some((777.0, 5.0))) && kept.contains(&None));
    }
}
