//! Vortex lattice: one or several thin lifting surfaces, symmetrical about the plane y = 0.

use crate::elementary;
use crate::numeric::{Factorised, Sum};
use crate::planform::half_area;
use crate::quantity::constants::PI;

/// Strips over the half span of the widest surface.
const STRIPS: usize = 36;
/// At least so many between a tip and the next station.
const AT_TIP: usize = 6;
/// Vortices along the chord.
const ROWS: usize = 6;

/// A surface by stations of one half, from root to tip.
#[derive(Clone, Debug, Default)]
pub(super) struct Shape {
    pub(super) y: Vec<f64>,
    pub(super) z: Vec<f64>,
    pub(super) chord: Vec<f64>,
    pub(super) x_le: Vec<f64>,
    /// Twist less zero-lift angle.
    pub(super) angle: Vec<f64>,
    /// Section moment coefficient about the quarter chord.
    pub(super) cm: Vec<f64>,
}

/// A strip of a surface between two lines of constant y.
#[derive(Clone, Debug)]
pub(super) struct Strip {
    pub(super) surface: usize,
    /// The inner and the outer edge: y, z, leading edge, chord.
    edges: [[f64; 4]; 2],
    /// y where the flow is looked at: in the middle of the angle by which strips grow close to tips and stations. With
    /// points there the lift of a wing is met by few strips; in the middle of the strip they would read high.
    pub(super) heart: f64,
    /// Twist less zero-lift angle there.
    pub(super) angle: f64,
    /// Mean of the section moment coefficient.
    pub(super) cm: f64,
}

/// A horseshoe vortex: its bound part from inside to outside, and the point where the flow is tangential.
#[derive(Clone, Copy, Debug)]
struct Horseshoe {
    strip: usize,
    from: [f64; 3],
    to: [f64; 3],
    point: [f64; 3],
}

/// How the lattice is laid out.
#[derive(Clone, Copy, Debug)]
pub(super) enum Layout {
    /// By itself.
    Own,
    /// Half as many strips and rows.
    #[cfg(test)]
    Half,
    /// So many strips of equal width a surface, so many rows.
    #[cfg(test)]
    Equal(usize, usize),
}

/// Surfaces with the strengths for one radian of angle of attack, and for their own angles.
#[derive(Clone, Debug)]
pub(super) struct Lattice {
    pub(super) strips: Vec<Strip>,
    shoes: Vec<Horseshoe>,
    /// Circulation over the speed for alpha of one radian.
    lifted: Vec<f64>,
    /// The same for twist and zero-lift angles.
    twisted: Vec<f64>,
}

/// What one solution comes to, linear in the angles.
#[derive(Clone, Debug)]
pub(super) struct Sums {
    /// Lift over dynamic pressure of each surface, both halves.
    pub(super) lift: Vec<f64>,
    /// Moment over dynamic pressure about x = 0, nose up, lift alone.
    pub(super) moment: f64,
    /// Circulation over the speed of each strip.
    pub(super) circulation: Vec<f64>,
}

impl Shape {
    pub(super) fn is_sound(&self) -> bool {
        let n = self.y.len();
        let lines = [&self.z, &self.chord, &self.x_le, &self.angle, &self.cm];
        let whole = lines
            .iter()
            .all(|l| l.len() == n && l.iter().all(|v| v.is_finite()));
        whole && half_area(&self.y, &self.chord).is_some_and(|a| a > 0.0)
    }

    /// Everything at a place, straight between stations; at a jump the side asked for.
    fn at(&self, y: f64, outward: bool) -> [f64; 6] {
        let last = self.y.len() - 1;
        let above = if outward {
            self.y.partition_point(|s| *s <= y).clamp(1, last)
        } else {
            self.y.partition_point(|s| *s < y).clamp(1, last)
        };
        let (a, b) = (self.y[above - 1], self.y[above]);
        let part = if b > a {
            ((y - a) / (b - a)).clamp(0.0, 1.0)
        } else {
            0.0
        };
        let of = |line: &[f64]| line[above - 1] + (line[above] - line[above - 1]) * part;
        [
            y,
            of(&self.z),
            of(&self.x_le),
            of(&self.chord),
            of(&self.angle),
            of(&self.cm),
        ]
    }
}

impl Lattice {
    /// `None` where the surfaces cannot be solved.
    pub(super) fn new(shapes: &[Shape], layout: Layout) -> Option<Self> {
        if shapes.is_empty() || !shapes.iter().all(Shape::is_sound) {
            return None;
        }
        let rows = match layout {
            Layout::Own => ROWS,
            #[cfg(test)]
            Layout::Half => ROWS / 2,
            #[cfg(test)]
            Layout::Equal(_, rows) => rows,
        };
        let all = edges(shapes, layout);
        let mut strips = Vec::new();
        for (surface, shape) in shapes.iter().enumerate() {
            strips.extend(strips_of(surface, shape, &all));
        }
        let shoes: Vec<Horseshoe> = strips
            .iter()
            .enumerate()
            .flat_map(|(at, strip)| (0..rows).map(move |row| horseshoe(at, strip, row, rows)))
            .collect();
        let n = shoes.len();
        let (ends, pairs) = ends_of(&shoes, rows);
        let mut matrix = Vec::with_capacity(n * n);
        for at in &shoes {
            all_down(at.point, &ends, &pairs, &mut matrix);
        }
        let matrix = Factorised::new(matrix, n)?;
        let lifted = matrix.solve(&vec![1.0; n]);
        let angles: Vec<f64> = shoes.iter().map(|s| strips[s.strip].angle).collect();
        Some(Lattice {
            twisted: matrix.solve(&angles),
            lifted,
            strips,
            shoes,
        })
    }

    /// How many horseshoe vortices there are.
    pub(super) fn size(&self) -> usize {
        self.shoes.len()
    }

    /// The solution for one radian of angle of attack, or for the surfaces' own angles.
    pub(super) fn sums(&self, lifted: bool, surfaces: usize) -> Sums {
        let strength = if lifted { &self.lifted } else { &self.twisted };
        let mut lift = vec![Sum::default(); surfaces];
        let mut moment = Sum::default();
        let mut circulation = vec![0.0; self.strips.len()];
        for (shoe, gamma) in self.shoes.iter().zip(strength) {
            let width = shoe.to[1] - shoe.from[1];
            // Lift over q of both halves: rho V Gamma width, twice, over rho V^2/2.
            let force = 4.0 * gamma * width;
            lift[self.strips[shoe.strip].surface].add(force);
            moment.add(-force * (shoe.from[0] + shoe.to[0]) / 2.0);
            circulation[shoe.strip] += gamma;
        }
        Sums {
            lift: lift.iter().map(Sum::total).collect(),
            moment: moment.total(),
            circulation,
        }
    }

    /// Drag over dynamic pressure of both halves, from the wake far behind.
    pub(super) fn drag(&self, circulation: &[f64]) -> f64 {
        let mut drag = Sum::default();
        for (at, gamma) in self.strips.iter().zip(circulation) {
            let (y, z) = (at.heart, at.at_heart(1));
            let mut wash = Sum::default();
            for (of, strength) in self.strips.iter().zip(circulation) {
                for side in [1.0, -1.0] {
                    for (edge, sign) in [(of.edges[0], 1.0), (of.edges[1], -1.0)] {
                        let (dy, dz) = (y - side * edge[0], z - edge[1]);
                        let square = dy * dy + dz * dz;
                        wash.add(side * sign * strength / (2.0 * PI) * dy / square);
                    }
                }
            }
            // Twice for both halves, half the wash of the far wake at the wing, rho V over rho V^2/2.
            drag.add(2.0 * gamma * wash.total() * at.width());
        }
        drag.total()
    }

    /// Downwash angle at the quarter chord of a surface's strips from all other surfaces, weighted by the chord.
    pub(super) fn downwash(&self, surface: usize, lifted: bool) -> f64 {
        let strength = if lifted { &self.lifted } else { &self.twisted };
        let (mut sum, mut weight) = (Sum::default(), Sum::default());
        for strip in self.strips.iter().filter(|s| s.surface == surface) {
            let (y, z) = (strip.heart, strip.at_heart(1));
            let x = strip.line(0.25);
            let others = self.shoes.iter().zip(strength);
            let others = others.filter(|(s, _)| self.strips[s.strip].surface != surface);
            let angle = others.fold(0.0, |a, (shoe, g)| a + g * down([x, y, z], shoe));
            let area = strip.chord() * strip.width();
            sum.add(angle * area);
            weight.add(area);
        }
        sum.total() / weight.total()
    }
}

impl Strip {
    pub(super) fn width(&self) -> f64 {
        self.edges[1][0] - self.edges[0][0]
    }

    pub(super) fn chord(&self) -> f64 {
        (self.edges[0][3] + self.edges[1][3]) / 2.0
    }

    /// What the edges hold, at the heart: y, z, leading edge, chord.
    fn at_heart(&self, index: usize) -> f64 {
        let [inner, outer] = &self.edges;
        let part = (self.heart - inner[0]) / self.width();
        inner[index] + (outer[index] - inner[index]) * part
    }

    /// Station of a part of the chord at the heart.
    fn line(&self, part: f64) -> f64 {
        self.at_heart(2) + part * self.at_heart(3)
    }
}

/// Strips between lines of constant y, each with its heart, which all surfaces share, so that the wake of one passes between
/// the points of another: all stations, and between them closer together at both ends, by the cosine of an angle.
fn edges(shapes: &[Shape], layout: Layout) -> Vec<[f64; 3]> {
    let mut breaks: Vec<f64> = shapes.iter().flat_map(|s| s.y.iter().copied()).collect();
    breaks.sort_by(f64::total_cmp);
    breaks.dedup();
    let tips: Vec<f64> = shapes.iter().filter_map(|s| s.y.last().copied()).collect();
    let far = breaks.last().copied().unwrap_or(1.0);
    let mut edges = Vec::new();
    for pair in breaks.windows(2) {
        let (a, b) = (pair[0], pair[1]);
        let least = if tips.contains(&b) { AT_TIP } else { 1 };
        let own = ((STRIPS as f64 * (b - a) / far).ceil() as usize).max(least);
        let (count, equal) = match layout {
            Layout::Own => (own, false),
            #[cfg(test)]
            Layout::Half => (own.div_ceil(2), false),
            #[cfg(test)]
            Layout::Equal(strips, _) => (strips, true),
        };
        let place = |half_steps: usize| {
            let part = half_steps as f64 / (2 * count) as f64;
            if half_steps == 2 * count {
                b
            } else if equal {
                a + (b - a) * part
            } else {
                a + (b - a) * (1.0 - elementary::cos(part * PI)) / 2.0
            }
        };
        edges.extend((0..count).map(|i| [place(2 * i), place(2 * i + 1), place(2 * i + 2)]));
    }
    edges
}

fn strips_of(surface: usize, shape: &Shape, edges: &[[f64; 3]]) -> Vec<Strip> {
    let (root, tip) = (shape.y[0], shape.y[shape.y.len() - 1]);
    let inside = edges.iter().filter(|e| e[0] >= root && e[2] <= tip);
    inside
        .map(|edge| {
            let [y0, z0, x0, c0, _, m0] = shape.at(edge[0], true);
            let [y1, z1, x1, c1, _, m1] = shape.at(edge[2], false);
            Strip {
                surface,
                edges: [[y0, z0, x0, c0], [y1, z1, x1, c1]],
                heart: edge[1],
                angle: shape.at(edge[1], true)[4],
                cm: (m0 + m1) / 2.0,
            }
        })
        .collect()
}

/// The vortex of a row at its quarter, the point at its three quarters.
fn horseshoe(at: usize, strip: &Strip, row: usize, rows: usize) -> Horseshoe {
    let part = |quarters: f64| (row as f64 + quarters / 4.0) / rows as f64;
    let bound = |edge: &[f64; 4]| [edge[2] + part(1.0) * edge[3], edge[0], edge[1]];
    Horseshoe {
        strip: at,
        from: bound(&strip.edges[0]),
        to: bound(&strip.edges[1]),
        point: [strip.line(part(3.0)), strip.heart, strip.at_heart(1)],
    }
}

/// Downward velocity at a point for a circulation of 1, of a vortex and of its image in the other half.
fn down(at: [f64; 3], shoe: &Horseshoe) -> f64 {
    let of = |at: [f64; 3]| upward(&seen(at, shoe.from), &seen(at, shoe.to));
    -(of(at) + of(mirrored(at))) / (4.0 * PI)
}

/// The same of all vortices. Most ends belong to two vortices, and each is looked at once.
fn all_down(at: [f64; 3], ends: &[[f64; 3]], pairs: &[(usize, usize)], row: &mut Vec<f64>) {
    let near: Vec<Seen> = ends.iter().map(|end| seen(at, *end)).collect();
    let image = mirrored(at);
    let far: Vec<Seen> = ends.iter().map(|end| seen(image, *end)).collect();
    row.extend(pairs.iter().map(|(from, to)| {
        let both = upward(&near[*from], &near[*to]) + upward(&far[*from], &far[*to]);
        -both / (4.0 * PI)
    }));
}

/// The ends of all bound vortices, each once, and which two each vortex has.
fn ends_of(shoes: &[Horseshoe], rows: usize) -> (Vec<[f64; 3]>, Vec<(usize, usize)>) {
    let mut ends: Vec<[f64; 3]> = Vec::new();
    let mut pairs: Vec<(usize, usize)> = Vec::with_capacity(shoes.len());
    for (at, shoe) in shoes.iter().enumerate() {
        // The strip inside has its vortices, as many, just before.
        let before = at.checked_sub(rows).and_then(|at| pairs.get(at));
        let shared = before
            .map(|pair| pair.1)
            .filter(|end| ends[*end] == shoe.from);
        let from = shared.unwrap_or_else(|| {
            ends.push(shoe.from);
            ends.len() - 1
        });
        ends.push(shoe.to);
        pairs.push((from, ends.len() - 1));
    }
    (ends, pairs)
}

fn mirrored(at: [f64; 3]) -> [f64; 3] {
    [at[0], -at[1], at[2]]
}

/// An end of a bound vortex seen from a point: the way from it, how far, and what a straight vortex from there aft for ever
/// does, upward.
struct Seen {
    way: [f64; 3],
    length: f64,
    trailing: f64,
}

fn seen(at: [f64; 3], end: [f64; 3]) -> Seen {
    let way = minus(at, end);
    let length = dot(way, way).sqrt();
    let square = way[1] * way[1] + way[2] * way[2];
    let trailing = if square == 0.0 {
        0.0
    } else {
        way[1] * (length + way[0]) / (square * length)
    };
    Seen {
        way,
        length,
        trailing,
    }
}

/// The law of Biot and Savart for a bound part and two straight parts that run aft for ever, the third component, times 4 pi.
fn upward(from: &Seen, to: &Seen) -> f64 {
    let (a, b) = (from.way, to.way);
    let bound = minus(a, b);
    let cross = [
        a[1] * b[2] - a[2] * b[1],
        a[2] * b[0] - a[0] * b[2],
        a[0] * b[1] - a[1] * b[0],
    ];
    let square = dot(cross, cross);
    let lengths = from.length * to.length;
    let longer = from.length.max(to.length);
    // A point on the line of the bound part feels nothing of it. The inner leg comes from behind, the outer one goes there.
    let legs = to.trailing - from.trailing;
    if square > 1e-20 * dot(bound, bound) * (longer * longer) {
        legs + cross[2] * (dot(bound, a) * to.length - dot(bound, b) * from.length)
            / (square * lengths)
    } else {
        legs
    }
}

fn minus(a: [f64; 3], b: [f64; 3]) -> [f64; 3] {
    [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
}

fn dot(a: [f64; 3], b: [f64; 3]) -> f64 {
    a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

#[cfg(test)]
mod tests {
    use super::*;

    fn flat(y: &[f64], chord: &[f64], x_le: &[f64]) -> Shape {
        let none = vec![0.0; y.len()];
        Shape {
            y: y.to_vec(),
            z: none.clone(),
            chord: chord.to_vec(),
            x_le: x_le.to_vec(),
            angle: none.clone(),
            cm: none,
        }
    }

    fn slope(shape: &Shape, strips: usize, rows: usize) -> (f64, f64) {
        let lattice =
            Lattice::new(std::slice::from_ref(shape), Layout::Equal(strips, rows)).unwrap();
        let sums = lattice.sums(true, 1);
        let pairs = shape.y.windows(2).zip(shape.chord.windows(2));
        let area: f64 = pairs.map(|(y, c)| (y[1] - y[0]) * (c[0] + c[1])).sum();
        (sums.lift[0] / area, sums.moment / area)
    }

    /// The swept wing of aspect ratio 5 with four panels a half: J. J. Bertin and M. L. Smith, Aerodynamics for Engineers,
    /// print 3.443 from circulations rounded to four decimals, 0.0273 and 0.0287 for the two inner ones (from memory); two
    /// other lattice programs give 3.444224188 and a moment slope about the apex of -5.096463202 unrounded.
    #[test]
    fn the_swept_wing_of_four_panels_has_the_published_circulations() {
        let swept = flat(&[0.0, 2.5], &[1.0, 1.0], &[0.0, 2.5]);
        let (lift, moment) = slope(&swept, 4, 1);
        assert!((lift - 3.443).abs() < 0.002, "{lift}");
        assert!((lift - 3.444_224_188).abs() < 1e-6, "{lift}");
        assert!((moment + 5.096_463_202).abs() < 1e-6, "{moment}");
        let lattice = Lattice::new(std::slice::from_ref(&swept), Layout::Equal(4, 1)).unwrap();
        for (gamma, printed) in lattice.lifted.iter().zip([0.0273, 0.0287]) {
            let found = gamma / (4.0 * PI * 5.0);
            assert!((found - printed).abs() < 1e-4, "{found} {printed}");
        }
    }

    /// By two other lattice programs: a rectangular wing of aspect ratio 6 with 20 by 4 panels a half, 4.280796386; the
    /// Warren-12 wing (taper 1/3, leading edge swept 53.54 deg) with 10 by 3, 2.815896526.
    #[test]
    fn lattices_of_equal_panels_have_the_slopes_of_other_programs() {
        let plain = flat(&[0.0, 3.0], &[1.0, 1.0], &[0.0, 0.0]);
        let (lift, _) = slope(&plain, 20, 4);
        assert!((lift - 4.280_796_386).abs() < 1e-5, "{lift}");
        let half = 2.0_f64.sqrt();
        let sweep = elementary::tan(53.54 * PI / 180.0);
        let warren = flat(&[0.0, half], &[1.5, 0.5], &[0.0, half * sweep]);
        let (lift, _) = slope(&warren, 10, 3);
        assert!((lift - 2.815_896_526).abs() < 1e-5, "{lift}");
    }

    #[test]
    fn drag_of_the_wake_is_near_that_of_an_elliptic_wing() {
        let wing = flat(&[0.0, 3.0], &[1.2, 0.6], &[0.0, 0.15]);
        let lattice = Lattice::new(std::slice::from_ref(&wing), Layout::Own).unwrap();
        let sums = lattice.sums(true, 1);
        let area = 3.0 * 1.8;
        let (cl, cd) = (sums.lift[0] / area, lattice.drag(&sums.circulation) / area);
        let least = cl * cl / (PI * 36.0 / area);
        assert!(cd / least > 1.0 && cd / least < 1.05, "{}", cd / least);
    }
}
