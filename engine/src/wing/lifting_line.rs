//! Prandtl's lifting line in Glauert's series, for a wing given by stations.

use crate::elementary;
use crate::numeric::Factorised;
use crate::planform::{half_area, numbers};
use crate::quantity::constants::PI;
use crate::quantity::{Angle, Length, PerAngle, Typed};

/// Terms of the coarser of two solutions; the finer has twice as many.
const TERMS: usize = 120;

/// A wing whose lifting line is solved for any angle of attack.
#[derive(Clone, Debug)]
pub struct LiftingLine {
    aspect_ratio: f64,
    mean_chord: f64,
    chord: Vec<f64>,
    solutions: [Solution; 2],
}

/// Coefficients of the series at a given resolution: for one radian on all sections, and for twist and zero-lift angles.
#[derive(Clone, Debug)]
struct Solution {
    /// Odd coefficients for one radian.
    additional: Vec<f64>,
    /// Odd coefficients of the twist alone.
    twisted: Vec<f64>,
    /// For each station, sin(n theta) times 4 b/chord, one row a station.
    stations: Vec<Vec<f64>>,
}

/// What a lifting line comes to at an angle of attack.
#[derive(Clone, PartialEq, Debug)]
#[allow(non_snake_case)]
pub struct LineResult {
    /// Lift coefficient of the wing.
    pub CL: f64,
    /// Lift slope of the wing.
    pub CL_alpha: PerAngle,
    /// Angle of attack at which the wing has no lift.
    pub alpha_zero_lift: Angle,
    /// Coefficient of induced drag.
    pub CDi: f64,
    /// CL^2/(pi A CDi); no value without lift.
    pub efficiency: f64,
    /// Section lift coefficient at each station.
    pub cl: Vec<f64>,
    /// That part of it which is there without lift of the wing.
    pub cl_basic: Vec<f64>,
    /// That part of it which goes with the lift, at CL = 1.
    pub cl_additional: Vec<f64>,
    /// cl chord/(mean chord CL) at each station; no value without lift.
    pub load_share: Vec<f64>,
}

impl LiftingLine {
    /// Sets the lifting line of a wing up and solves it; `None` where the stations do not run outward from the plane of
    /// symmetry, a chord or slope is not positive (a pointed tip may be 0), or the lines differ in length.
    ///
    /// - `y`: stations of one half from root to tip; the first in the plane of symmetry.
    /// - `chord`, `twist` (positive nose up, against the datum line), `zero_lift` (angle of no lift of the section against
    ///   its own chord line), `section_slope`: at each station, straight between them.
    ///
    /// Symmetrical, unswept, incompressible, attached flow; no dihedral. Odd terms of Glauert's series at points clustered
    /// to the tip, 120 and 240 of them, and what a kink of the planform leaves of the difference extrapolated (the error
    /// falls with the square of the number of terms): coefficients of straight-tapered wings to 1e-6.
    ///
    /// Source: H. Glauert, The Elements of Aerofoil and Airscrew Theory, chapter XI.
    ///
    /// # Example
    /// ```
    /// use engine::quantity::{Angle, Length, PerAngle, Typed};
    /// use engine::wing::LiftingLine;
    /// let y = [0.0, 3.0].map(Length::from_si);
    /// let flat = [0.0; 2].map(Angle::from_si);
    /// let slope = [2.0 * std::f64::consts::PI; 2].map(PerAngle::from_si);
    /// let wing = LiftingLine::new(&y, &[1.0; 2].map(Length::from_si), &flat, &flat, &slope).unwrap();
    /// let at = wing.at(Angle::from_si(0.1));
    /// assert!((at.CL_alpha.si() - 4.530_425).abs() < 2e-6);
    /// ```
    pub fn new(
        y: &[Length],
        chord: &[Length],
        twist: &[Angle],
        zero_lift: &[Angle],
        section_slope: &[PerAngle],
    ) -> Option<Self> {
        let (y, chord) = (numbers(y), numbers(chord));
        let slope = numbers(section_slope);
        let angle: Vec<f64> = twist
            .iter()
            .zip(zero_lift)
            .map(|(t, z)| t.si() - z.si())
            .collect();
        let half = half_area(&y, &chord)?;
        let whole = angle.len() == y.len() && slope.len() == y.len() && *y.first()? == 0.0;
        let inner = &chord[..chord.len() - 1];
        let sound = slope.iter().all(|s| *s > 0.0 && s.is_finite())
            && inner.iter().all(|c| *c > 0.0)
            && angle.iter().all(|a| a.is_finite());
        if !whole || !sound {
            return None;
        }
        let semispan = *y.last()?;
        let at = |theta: f64| {
            let place = semispan * elementary::cos(theta);
            (
                straight(&y, &chord, place),
                straight(&y, &slope, place),
                straight(&y, &angle, place),
            )
        };
        let solve = |terms: usize| Solution::new(terms, semispan, at, &y, &chord);
        Some(LiftingLine {
            aspect_ratio: 2.0 * semispan * semispan / half,
            mean_chord: half / semispan,
            chord: chord.clone(),
            solutions: [solve(TERMS)?, solve(2 * TERMS)?],
        })
    }

    /// The wing at an angle of attack of its datum line.
    #[allow(non_snake_case)]
    pub fn at(&self, alpha: Angle) -> LineResult {
        let alpha = alpha.si();
        // Lift goes with the first coefficient, so that slope and angle of no lift are those of the extrapolated ones.
        let first = |part: fn(&Solution) -> &Vec<f64>| {
            self.extrapolated(|s| part(s).first().copied().unwrap_or(f64::NAN))
        };
        let (slope, twisted) = (first(|s| &s.additional), first(|s| &s.twisted));
        let lift = PI * self.aspect_ratio;
        let CL = lift * (slope * alpha + twisted);
        let CDi = self.extrapolated(|s| {
            let each = s.additional.iter().zip(&s.twisted).enumerate();
            lift * each.fold(0.0, |sum, (i, (a, t))| {
                let coefficient = a * alpha + t;
                sum + (2 * i + 1) as f64 * coefficient * coefficient
            })
        });
        let stations = 0..self.chord.len();
        let section = |coefficients: fn(&Solution, usize, f64, f64) -> f64, a: f64, t: f64| {
            let at = |station: usize| self.extrapolated(|s| coefficients(s, station, a, t));
            stations.clone().map(at).collect::<Vec<f64>>()
        };
        let cl = section(Solution::section, alpha, 1.0);
        let cl_additional = section(Solution::section, 1.0 / (lift * slope), 0.0);
        let cl_basic = section(Solution::section, -twisted / slope, 1.0);
        let share = |(cl, chord): (&f64, &f64)| cl * chord / (self.mean_chord * CL);
        LineResult {
            CL,
            CL_alpha: PerAngle::from_si(lift * slope),
            alpha_zero_lift: Angle::from_si(-twisted / slope),
            CDi,
            efficiency: CL * CL / (lift * CDi),
            load_share: cl.iter().zip(&self.chord).map(share).collect(),
            cl,
            cl_basic,
            cl_additional,
        }
    }

    /// A result that is off by the square of the number of terms, without that part.
    fn extrapolated(&self, of: impl Fn(&Solution) -> f64) -> f64 {
        let [coarse, fine] = &self.solutions;
        let (coarse, fine) = (of(coarse), of(fine));
        fine + (fine - coarse) / 3.0
    }
}

impl Solution {
    /// `at` gives chord, section slope and angle beyond alpha at an angle theta from tip (0) to root (pi/2).
    fn new(
        terms: usize,
        semispan: f64,
        at: impl Fn(f64) -> (f64, f64, f64),
        y: &[f64],
        chord: &[f64],
    ) -> Option<Self> {
        let mut matrix = Vec::with_capacity(terms * terms);
        let (mut unit, mut twisted) = (Vec::new(), Vec::new());
        for j in 1..=terms {
            let theta = PI / 2.0 * j as f64 / terms as f64;
            let (chord, slope, angle) = at(theta);
            let (mu, sine) = (slope * chord / (8.0 * semispan), elementary::sin(theta));
            for i in 0..terms {
                let n = (2 * i + 1) as f64;
                matrix.push(elementary::sin(n * theta) * (n * mu + sine));
            }
            unit.push(mu * sine);
            twisted.push(mu * sine * angle);
        }
        let matrix = Factorised::new(matrix, terms)?;
        let station = |(y, chord): (&f64, &f64)| {
            let theta = elementary::acos((y / semispan).clamp(0.0, 1.0));
            let factor = if *chord > 0.0 {
                8.0 * semispan / chord
            } else {
                0.0
            };
            (0..terms)
                .map(|i| factor * elementary::sin((2 * i + 1) as f64 * theta))
                .collect()
        };
        Some(Solution {
            additional: matrix.solve(&unit),
            twisted: matrix.solve(&twisted),
            stations: y.iter().zip(chord).map(station).collect(),
        })
    }

    /// Section lift coefficient at a station for so much of either solution.
    fn section(&self, station: usize, additional: f64, twisted: f64) -> f64 {
        let both = self.additional.iter().zip(&self.twisted);
        let sines = self
            .stations
            .get(station)
            .map(Vec::as_slice)
            .unwrap_or_default();
        let terms = both
            .zip(sines)
            .map(|((a, t), sine)| (a * additional + t * twisted) * sine);
        terms.fold(0.0, |sum, term| sum + term)
    }
}

/// The value at a place, straight between the stations.
fn straight(y: &[f64], values: &[f64], place: f64) -> f64 {
    let above = y.partition_point(|y| *y < place).clamp(1, y.len() - 1);
    let (a, b) = (y[above - 1], y[above]);
    let part = if b > a {
        ((place - a) / (b - a)).clamp(0.0, 1.0)
    } else {
        0.0
    };
    values[above - 1] + (values[above] - values[above - 1]) * part
}

#[cfg(test)]
mod tests {
    use super::*;

    fn wing(y: &[f64], chord: &[f64], twist: &[f64]) -> LiftingLine {
        let lengths = |v: &[f64]| v.iter().map(|v| Length::from_si(*v)).collect::<Vec<_>>();
        let angles = |v: &[f64]| v.iter().map(|v| Angle::from_si(*v)).collect::<Vec<_>>();
        let slope = vec![PerAngle::from_si(2.0 * PI); y.len()];
        let none = vec![Angle::from_si(0.0); y.len()];
        LiftingLine::new(&lengths(y), &lengths(chord), &angles(twist), &none, &slope).unwrap()
    }

    /// Series of 500 terms and more, extrapolated: computed from Prandtl's theory, second method a Galerkin solution.
    #[test]
    fn rectangular_and_tapered_wings_have_the_tabulated_slopes() {
        for (aspect, taper, slope, delta) in [
            (4.0, 1.0, 4.028_387, 0.028_477),
            (6.0, 1.0, 4.530_425, 0.048_290),
            (10.0, 1.0, 5.046_791, 0.085_907),
            (6.0, 0.5, 4.653_166, 0.011_679),
            (6.0, 0.4, 4.667_688, 0.008_781),
            (10.0, 0.4, 5.187_856, 0.017_182),
            (7.0, 0.7, 4.780_250, 0.028_757),
        ] {
            let root = 2.0 / (1.0 + taper);
            let wing = wing(&[0.0, aspect / 2.0], &[root, root * taper], &[0.0, 0.0]);
            let at = wing.at(Angle::from_si(0.1));
            assert!(
                (at.CL_alpha.si() - slope).abs() < 2e-6,
                "{aspect} {taper} {}",
                at.CL_alpha.si()
            );
            assert!(
                (1.0 / at.efficiency - 1.0 - delta).abs() < 2e-6,
                "{aspect} {taper} {}",
                1.0 / at.efficiency - 1.0
            );
        }
    }

    /// The elliptic wing: CL_alpha = a0/(1 + a0/(pi A)), all terms but the first 0.
    #[test]
    fn the_elliptic_wing_is_the_closed_form() {
        let (semispan, root) = (4.0, 1.0);
        let at = |theta: f64| (root * elementary::sin(theta), 2.0 * PI, 0.0);
        let solution = Solution::new(60, semispan, at, &[0.0], &[root]).unwrap();
        let aspect = 2.0 * semispan * semispan / (PI / 4.0 * semispan * root);
        let slope = PI * aspect * solution.additional[0];
        let exact = 2.0 * PI / (1.0 + 2.0 / aspect);
        assert!((slope - exact).abs() < 1e-10, "{slope} {exact}");
        assert!(solution.additional[1..].iter().all(|a| a.abs() < 1e-12));
    }

    #[test]
    fn basic_and_additional_lift_make_up_the_section_lift() {
        let wing = wing(&[0.0, 2.0, 4.0], &[1.4, 1.2, 0.7], &[0.02, 0.01, -0.04]);
        let at = wing.at(Angle::from_si(0.07));
        for i in 0..3 {
            let sum = at.cl_basic[i] + at.CL * at.cl_additional[i];
            assert!((sum - at.cl[i]).abs() < 1e-12);
        }
        let none = wing.at(at.alpha_zero_lift);
        assert!(none.CL.abs() < 1e-14);
    }

    /// Root angle of no lift for one degree of linear washout, A = 8, rectangular: 0.458851 deg (lifting line).
    #[test]
    fn washout_moves_the_angle_of_no_lift() {
        let wing = wing(&[0.0, 4.0], &[1.0, 1.0], &[0.0, -1.0_f64.to_radians()]);
        let at = wing.at(Angle::from_si(0.0));
        assert!((at.alpha_zero_lift.si().to_degrees() - 0.458_851).abs() < 3e-6);
    }
}
