//! Lifting surfaces by the vortex lattice: one alone, or several together.

#![allow(
    non_snake_case,
    reason = "fields carry the symbols of the trade: CL, Cm"
)]

use super::lattice::{Lattice, Layout, Shape};
use crate::elementary;
use crate::numeric::Sum;
use crate::planform::{numbers, planform};
use crate::quantity::constants::PI;
use crate::quantity::{Angle, Area, Length, PerAngle, Typed};

/// Stations of one surface, one half from root to tip.
#[derive(Clone, Debug, Default)]
pub struct Stations {
    /// Distance from the plane of symmetry.
    pub y: Vec<Length>,
    /// Height.
    pub z: Vec<Length>,
    /// Chord.
    pub chord: Vec<Length>,
    /// Station of the leading edge.
    pub x_le: Vec<Length>,
    /// Twist against the datum line, nose up positive; incidence is in it.
    pub twist: Vec<Angle>,
    /// Angle of no lift of the section, against its chord line.
    pub zero_lift: Vec<Angle>,
    /// Section moment coefficient about the quarter chord.
    pub cm: Vec<f64>,
}

impl Stations {
    fn shape(&self) -> Shape {
        let angles = self.twist.iter().zip(&self.zero_lift);
        Shape {
            y: numbers(&self.y),
            z: numbers(&self.z),
            chord: numbers(&self.chord),
            x_le: numbers(&self.x_le),
            angle: angles.map(|(t, z)| t.si() - z.si()).collect(),
            cm: self.cm.clone(),
        }
    }
}

/// Surfaces solved for any angle of attack.
#[derive(Clone, Debug)]
pub struct LiftingSurfaces {
    lattice: Lattice,
    shapes: Vec<Shape>,
    areas: Vec<f64>,
    /// Which surface gives area and chord of reference.
    reference: usize,
    mac: f64,
    /// Moment of the sections over dynamic pressure, both halves.
    section_moment: f64,
}

/// What surfaces come to at an angle of attack.
#[derive(Clone, PartialEq, Debug)]
pub struct SurfaceResult {
    /// Area of reference: of the largest surface, both halves.
    pub area: Area,
    /// Its mean aerodynamic chord.
    pub mac: Length,
    /// Lift coefficient of all together.
    pub CL: f64,
    /// Lift slope.
    pub CL_alpha: PerAngle,
    /// Moment coefficient about the reference station, nose up.
    pub Cm: f64,
    /// Its slope.
    pub Cm_alpha: PerAngle,
    /// Station about which the moment does not change: aerodynamic centre of one, neutral point of several.
    pub x_ac: Length,
    /// Coefficient of induced drag.
    pub CDi: f64,
    /// Section lift coefficient at each station, surface by surface.
    pub cl: Vec<Vec<f64>>,
    /// Lift coefficient of each surface on its own area.
    pub CL_surface: Vec<f64>,
    /// Downwash angle at each surface's quarter chord from the others, weighted by the chord.
    pub downwash: Vec<Angle>,
    /// Its slope with the angle of attack.
    pub downwash_slope: Vec<f64>,
}

impl LiftingSurfaces {
    /// Lays surfaces out and solves them; `None` where stations do not run outward, lines differ in length or a surface has
    /// no area.
    ///
    /// A lattice of horseshoe vortices on thin surfaces, six along the chord and 36 strips over the widest half span, more
    /// where stations ask for them; between stations strips are closer together at both ends, by the cosine of an angle, and
    /// the flow is tangential in the middle of that angle, at three quarters of each panel. Strips of all surfaces lie
    /// behind one another, so that the wake of one passes between the points of another. Twist less angle of no lift goes
    /// into the condition; section slopes are 2 pi. The wake runs straight aft. Section moments are added. Area and chord of
    /// reference are those of the largest surface.
    ///
    /// Symmetrical, incompressible, attached flow at small angles; no body. Of the limit of ever finer lattices, lift slopes
    /// are within 0.25 %, induced drag within 0.5 %, the aerodynamic centre or neutral point within 0.5 % of the mean chord
    /// and downwash slopes within 0.01. A surface close to the height of another's wake, and a wake that rolls up or is
    /// displaced, are less well met.
    ///
    /// Source: J. J. Bertin and M. L. Smith, Aerodynamics for Engineers (vortex lattice); the law of Biot and Savart.
    ///
    /// # Example
    /// ```
    /// use engine::quantity::{Angle, Length, Typed};
    /// use engine::wing::{LiftingSurfaces, Stations};
    /// let m = |v: [f64; 2]| v.map(Length::from_si).to_vec();
    /// let flat = vec![Angle::from_si(0.0); 2];
    /// let wing = Stations {
    ///     y: m([0.0, 4.0]), z: m([0.0; 2]), chord: m([1.0; 2]), x_le: m([0.0; 2]),
    ///     twist: flat.clone(), zero_lift: flat, cm: vec![0.0; 2],
    /// };
    /// let found = LiftingSurfaces::new(&[wing]).unwrap().at(Angle::from_si(0.1), Length::from_si(0.25));
    /// assert!(found.CL > 0.4 && found.CL < 0.5);
    /// assert!((found.x_ac.si() - 0.25).abs() < 0.02);
    /// ```
    pub fn new(surfaces: &[Stations]) -> Option<Self> {
        Self::laid_out(surfaces, Layout::Own)
    }

    fn laid_out(surfaces: &[Stations], layout: Layout) -> Option<Self> {
        let shapes: Vec<Shape> = surfaces.iter().map(Stations::shape).collect();
        let lattice = Lattice::new(&shapes, layout)?;
        let plans = surfaces.iter().map(|s| planform(&s.y, &s.chord, &s.x_le));
        let plans: Vec<_> = plans.collect();
        let areas: Vec<f64> = plans.iter().map(|p| p.area.si()).collect();
        let larger = |best: usize, at: usize| if areas[at] > areas[best] { at } else { best };
        let reference = (0..areas.len()).fold(0, larger);
        let mut moment = Sum::default();
        for strip in &lattice.strips {
            moment.add(2.0 * strip.cm * strip.chord() * strip.chord() * strip.width());
        }
        Some(LiftingSurfaces {
            mac: plans.get(reference)?.mac.si(),
            section_moment: moment.total(),
            lattice,
            shapes,
            areas,
            reference,
        })
    }

    /// How many panels the lattice has: unknowns of the system that was solved.
    #[must_use]
    pub fn size(&self) -> usize {
        self.lattice.size()
    }

    /// The surfaces at an angle of attack of the datum line, moments about a station.
    pub fn at(&self, alpha: Angle, x_ref: Length) -> SurfaceResult {
        let (alpha, x_ref) = (alpha.si(), x_ref.si());
        let count = self.shapes.len();
        let (lifted, twisted) = (
            self.lattice.sums(true, count),
            self.lattice.sums(false, count),
        );
        let area = self.areas[self.reference];
        let all = |lift: &[f64]| lift.iter().fold(0.0, |sum, l| sum + l);
        let (slope, own) = (all(&lifted.lift), all(&twisted.lift));
        let about = |moment: f64, lift: f64| moment + lift * x_ref;
        let moment_slope = about(lifted.moment, slope) / (area * self.mac);
        let moment = about(twisted.moment, own) + self.section_moment;
        let mixed = |a: &[f64], b: &[f64]| {
            a.iter()
                .zip(b)
                .map(|(a, b)| a * alpha + b)
                .collect::<Vec<f64>>()
        };
        let circulation = mixed(&lifted.circulation, &twisted.circulation);
        let surface = |at: usize| (lifted.lift[at] * alpha + twisted.lift[at]) / self.areas[at];
        let slopes: Vec<f64> = (0..count).map(|s| self.lattice.downwash(s, true)).collect();
        let downwash = |at: usize| slopes[at] * alpha + self.lattice.downwash(at, false);
        SurfaceResult {
            area: Area::from_si(area),
            mac: Length::from_si(self.mac),
            CL: (slope * alpha + own) / area,
            CL_alpha: PerAngle::from_si(slope / area),
            Cm: moment_slope * alpha + moment / (area * self.mac),
            Cm_alpha: PerAngle::from_si(moment_slope),
            x_ac: Length::from_si(x_ref - self.mac * moment_slope / (slope / area)),
            CDi: self.lattice.drag(&circulation) / area,
            cl: (0..count).map(|s| self.stations(s, &circulation)).collect(),
            CL_surface: (0..count).map(surface).collect(),
            downwash: (0..count).map(|s| Angle::from_si(downwash(s))).collect(),
            downwash_slope: slopes.clone(),
        }
    }

    /// Section lift at the stations of a surface: its circulation, straight over the angle from the tip, which is 0 there.
    fn stations(&self, surface: usize, circulation: &[f64]) -> Vec<f64> {
        let shape = &self.shapes[surface];
        let tip = shape.y.last().copied().unwrap_or(1.0);
        let angle = |y: f64| elementary::acos((y / tip).clamp(0.0, 1.0));
        let strips = self.lattice.strips.iter().zip(circulation);
        let mut points: Vec<(f64, f64)> = vec![(0.0, 0.0)];
        let own = strips.filter(|(s, _)| s.surface == surface).rev();
        points.extend(own.map(|(s, g)| (angle(s.heart), *g)));
        // At the plane of symmetry the circulation is flat.
        if let Some(last) = points.last().copied() {
            points.push((PI / 2.0 + 1e-9, last.1));
        }
        let at = |(y, chord): (&f64, &f64)| {
            let theta = angle(*y);
            let above = points
                .partition_point(|p| p.0 < theta)
                .clamp(1, points.len() - 1);
            let (a, b) = (points[above - 1], points[above]);
            let part = if b.0 > a.0 {
                ((theta - a.0) / (b.0 - a.0)).clamp(0.0, 1.0)
            } else {
                0.0
            };
            let gamma = a.1 + (b.1 - a.1) * part;
            if gamma == 0.0 {
                0.0
            } else {
                2.0 * gamma / chord
            }
        };
        shape.y.iter().zip(&shape.chord).map(at).collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn surface(x: f64, semispan: f64, chord: f64, incidence: f64, z: f64) -> Stations {
        let m = |v: [f64; 2]| v.map(Length::from_si).to_vec();
        Stations {
            y: m([0.0, semispan]),
            z: m([z; 2]),
            chord: m([chord; 2]),
            x_le: m([x; 2]),
            twist: vec![Angle::from_si(incidence); 2],
            zero_lift: vec![Angle::from_si(0.0); 2],
            cm: vec![0.0; 2],
        }
    }

    /// Lifting line of the same wing: 5.046791 at aspect ratio 10, 5.58 at 20 (series of many terms).
    #[test]
    fn slender_wings_come_to_the_lifting_line() {
        let slope = |aspect: f64| {
            let wing = LiftingSurfaces::new(&[surface(0.0, aspect / 2.0, 1.0, 0.0, 0.0)]).unwrap();
            wing.at(Angle::from_si(0.1), Length::from_si(0.0))
                .CL_alpha
                .si()
        };
        let line = |aspect: f64| {
            let lengths = |v: [f64; 2]| v.map(Length::from_si);
            let flat = [Angle::from_si(0.0); 2];
            let slope = [PerAngle::from_si(2.0 * PI); 2];
            let wing = super::super::LiftingLine::new(
                &lengths([0.0, aspect / 2.0]),
                &lengths([1.0; 2]),
                &flat,
                &flat,
                &slope,
            );
            wing.unwrap().at(Angle::from_si(0.1)).CL_alpha.si()
        };
        let apart = |aspect: f64| (slope(aspect) / line(aspect) - 1.0).abs();
        assert!(apart(10.0) < 0.05, "{}", apart(10.0));
        assert!(
            apart(40.0) < apart(10.0) && apart(40.0) < 0.012,
            "{}",
            apart(40.0)
        );
    }

    #[test]
    fn a_tail_moves_the_neutral_point_aft_and_a_canard_forward() {
        let wing = surface(0.0, 4.0, 1.0, 0.0, 0.0);
        let np = |others: &[Stations]| {
            let all: Vec<Stations> = std::iter::once(wing.clone())
                .chain(others.iter().cloned())
                .collect();
            let found = LiftingSurfaces::new(&all)
                .unwrap()
                .at(Angle::from_si(0.05), Length::from_si(0.25));
            (found.x_ac.si(), found.downwash_slope)
        };
        let (alone, _) = np(&[]);
        let (tail, wash) = np(&[surface(4.0, 1.2, 0.6, 0.0, 0.3)]);
        let (canard, up) = np(&[surface(-3.0, 1.2, 0.6, 0.0, 0.1)]);
        assert!(
            tail > alone + 0.1 && canard < alone - 0.1,
            "{alone} {tail} {canard}"
        );
        // Far behind, the downwash slope is that of the wing's loading, a third to a half here; ahead there is an upwash.
        assert!(wash[1] > 0.3 && wash[1] < 0.6, "{wash:?}");
        assert!(up[1] < 0.0 && up[1] > -0.2, "{up:?}");
    }

    fn wing(y: &[f64], chord: &[f64], x_le: &[f64]) -> Stations {
        let m = |v: &[f64]| v.iter().map(|v| Length::from_si(*v)).collect::<Vec<_>>();
        let flat = vec![Angle::from_si(0.0); y.len()];
        Stations {
            y: m(y),
            z: m(&vec![0.0; y.len()]),
            chord: m(chord),
            x_le: m(x_le),
            twist: flat.clone(),
            zero_lift: flat,
            cm: vec![0.0; y.len()],
        }
    }

    /// The wings of the accuracy stated: rectangular, swept and tapered, cranked, swept forward, elliptic by 25 stations. The
    /// error of a lattice falls at least with the number of strips, so that what is left of it is no greater than its
    /// difference from one with half as many.
    #[test]
    fn lattices_are_as_near_their_limit_as_stated() {
        let out: Vec<f64> = (0..25)
            .map(|i| elementary::sin(PI / 2.0 * f64::from(i) / 24.0))
            .collect();
        let round: Vec<f64> = out.iter().map(|y| (1.0 - y * y).max(0.0).sqrt()).collect();
        let ellipse: Vec<f64> = out.iter().map(|y| 4.0 * y).collect();
        let line: Vec<f64> = round.iter().map(|c| -c / 4.0).collect();
        let wings = [
            wing(&[0.0, 4.0], &[1.0; 2], &[0.0; 2]),
            wing(&[0.0, 2.5], &[1.0; 2], &[0.0, 2.5]),
            wing(&[0.0, 1.414], &[1.5, 0.5], &[0.0, 1.914]),
            wing(&[0.0, 1.5, 4.5], &[1.4, 1.3, 0.7], &[0.0, 0.0, 0.3]),
            wing(&[0.0, 4.0], &[1.2, 0.8], &[0.0, -1.5]),
            wing(&ellipse, &round, &line),
        ];
        for (at, wing) in wings.iter().enumerate() {
            let found = |layout| {
                let surfaces = LiftingSurfaces::laid_out(std::slice::from_ref(wing), layout);
                surfaces
                    .unwrap()
                    .at(Angle::from_si(0.1), Length::from_si(0.0))
            };
            let (own, half) = (found(Layout::Own), found(Layout::Half));
            let part = |a: f64, b: f64| (a / b - 1.0).abs();
            let slope = part(own.CL_alpha.si(), half.CL_alpha.si());
            let drag = part(own.CDi, half.CDi);
            let center = (own.x_ac.si() - half.x_ac.si()).abs() / own.mac.si();
            assert!(
                slope < 2.5e-3 && drag < 5e-3 && center < 5e-3,
                "{at} {slope} {drag} {center}"
            );
        }
    }

    #[test]
    fn wing_and_tail_or_canard_are_as_near_their_limit_as_stated() {
        let wing = surface(0.0, 4.0, 1.0, 0.02, 0.0);
        for other in [
            surface(4.0, 1.2, 0.6, -0.02, 0.3),
            surface(-3.0, 1.2, 0.6, 0.03, 0.2),
        ] {
            let surfaces = [wing.clone(), other];
            let found = |layout| {
                let surfaces = LiftingSurfaces::laid_out(&surfaces, layout);
                surfaces
                    .unwrap()
                    .at(Angle::from_si(0.05), Length::from_si(0.25))
            };
            let (own, half) = (found(Layout::Own), found(Layout::Half));
            let center = (own.x_ac.si() - half.x_ac.si()).abs() / own.mac.si();
            let slope = (own.CL_alpha.si() / half.CL_alpha.si() - 1.0).abs();
            assert!(slope < 2.5e-3 && center < 5e-3, "{slope} {center}");
            for (a, b) in own.downwash_slope.iter().zip(&half.downwash_slope) {
                assert!((a - b).abs() < 0.01, "{a} {b}");
            }
        }
    }

    #[test]
    fn bad_surfaces_are_none() {
        assert!(LiftingSurfaces::new(&[]).is_none());
        assert!(LiftingSurfaces::new(&[surface(0.0, -1.0, 1.0, 0.0, 0.0)]).is_none());
        assert!(LiftingSurfaces::new(&[surface(0.0, 1.0, 0.0, 0.0, 0.0)]).is_none());
    }
}
