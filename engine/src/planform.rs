//! The planform of a wing or tail: area, mean aerodynamic chord and where it stands.

use crate::elementary;
use crate::numeric::Sum;
use crate::quantity::{Angle, Area, Length, Typed};

/// What a planform comes to, for the whole wing.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Planform {
    /// Area of both halves.
    pub area: Area,
    /// From tip to tip: twice the last station.
    pub span: Length,
    /// Span squared over area.
    pub aspect_ratio: f64,
    /// Chord at the last station over that at the first.
    pub taper: f64,
    /// Area over span.
    pub mean_chord: Length,
    /// Mean aerodynamic chord, 2/S times the integral of chord squared over one half.
    pub mac: Length,
    /// Distance of the mean aerodynamic chord from the plane of symmetry.
    pub y_mac: Length,
    /// Station of its leading edge.
    pub x_le_mac: Length,
    /// Station of its quarter point.
    pub x_quarter_mac: Length,
    /// Sweep of the quarter-chord line from the first station to the last, positive aft.
    pub sweep_quarter: Angle,
}

/// One panel between two stations.
#[derive(Clone, Copy)]
pub(crate) struct Bay {
    y: [f64; 2],
    chord: [f64; 2],
}

impl Bay {
    fn width(&self) -> f64 {
        self.y[1] - self.y[0]
    }

    /// Integral of the chord.
    fn area(&self) -> f64 {
        self.width() * (self.chord[0] + self.chord[1]) / 2.0
    }

    /// Integral of the chord squared.
    fn square(&self) -> f64 {
        let [a, b] = self.chord;
        self.width() * (a * a + a * b + b * b) / 3.0
    }

    /// Integral of the chord times something that is straight between the stations.
    fn moment(&self, of: [f64; 2]) -> f64 {
        let [a, b] = self.chord;
        self.width() * (of[0] * (2.0 * a + b) + of[1] * (a + 2.0 * b)) / 6.0
    }
}

/// The bays of stations from root to tip. `None` where the stations do not run outward or a chord is no length.
pub(crate) fn bays(y: &[f64], chord: &[f64]) -> Option<Vec<Bay>> {
    let outward = y.windows(2).all(|w| w[1] >= w[0]) && y.first().is_some_and(|y| *y >= 0.0);
    let lengths = chord.iter().all(|c| *c >= 0.0 && c.is_finite());
    let far = y
        .last()
        .is_some_and(|last| y.first().is_some_and(|first| last > first));
    if y.len() != chord.len() || !outward || !lengths || !far {
        return None;
    }
    let pairs = y.windows(2).zip(chord.windows(2));
    Some(
        pairs
            .map(|(y, c)| Bay {
                y: [y[0], y[1]],
                chord: [c[0], c[1]],
            })
            .collect(),
    )
}

/// Area of one half. `None` where there is no planform.
pub(crate) fn half_area(y: &[f64], chord: &[f64]) -> Option<f64> {
    Some(bays(y, chord)?.iter().map(Bay::area).sum())
}

/// The numbers of quantities.
pub(crate) fn numbers<T: Typed>(line: &[T]) -> Vec<f64> {
    line.iter().map(|value| value.si()).collect()
}

/// Area, span, aspect ratio, taper and mean aerodynamic chord of a wing given by stations of one half.
///
/// - `y`: stations from root to tip, from the plane of symmetry; two at one place hold a jump.
/// - `chord`: chord at each station.
/// - `x_le`: station of the leading edge at each.
///
/// Between stations chord and leading edge are straight, and the integrals over them exact. `y_mac`, `x_le_mac` and
/// `x_quarter_mac` are the means weighted by the chord. Of a first station off the plane of symmetry the part inside is
/// not counted in the area. All fields are NaN where the stations do not run outward, a chord is negative, the slices
/// differ in length or there is no area.
///
/// Source: definitions of the mean aerodynamic chord, as in NACA TR 824 and every handbook.
///
/// # Example
/// ```
/// use engine::planform::planform;
/// use engine::quantity::{Length, Typed};
/// let metres = |values: [f64; 2]| values.map(Length::from_si);
/// let wing = planform(&metres([0.0, 5.0]), &metres([1.5, 0.9]), &metres([0.0, 0.1746]));
/// assert!((wing.mac.si() - 1.225).abs() < 1e-12);
/// assert_eq!(wing.area.si(), 12.0);
/// ```
pub fn planform(y: &[Length], chord: &[Length], x_le: &[Length]) -> Planform {
    let (y, chord, x_le) = (numbers(y), numbers(chord), numbers(x_le));
    let found = bays(&y, &chord).filter(|_| x_le.len() == y.len());
    let bays = found.unwrap_or_default();
    let (mut area, mut square, mut lateral, mut leading) = (
        Sum::default(),
        Sum::default(),
        Sum::default(),
        Sum::default(),
    );
    for (bay, x) in bays.iter().zip(x_le.windows(2)) {
        area.add(bay.area());
        square.add(bay.square());
        lateral.add(bay.moment(bay.y));
        leading.add(bay.moment([x[0], x[1]]));
    }
    let half = if area.total() > 0.0 {
        area.total()
    } else {
        f64::NAN
    };
    let end = |line: &[f64]| line.last().copied().unwrap_or(f64::NAN);
    let start = |line: &[f64]| line.first().copied().unwrap_or(f64::NAN);
    let span = if half.is_nan() {
        f64::NAN
    } else {
        2.0 * end(&y)
    };
    let mac = square.total() / half;
    let x_le_mac = leading.total() / half;
    let quarter = |x: f64, c: f64| x + c / 4.0;
    let aft = quarter(end(&x_le), end(&chord)) - quarter(start(&x_le), start(&chord));
    let sweep = elementary::atan2(aft, end(&y) - start(&y));
    Planform {
        area: Area::from_si(2.0 * half),
        span: Length::from_si(span),
        aspect_ratio: span * span / (2.0 * half),
        taper: if half.is_nan() {
            f64::NAN
        } else {
            end(&chord) / start(&chord)
        },
        mean_chord: Length::from_si(2.0 * half / span),
        mac: Length::from_si(mac),
        y_mac: Length::from_si(lateral.total() / half),
        x_le_mac: Length::from_si(x_le_mac),
        x_quarter_mac: Length::from_si(x_le_mac + mac / 4.0),
        sweep_quarter: Angle::from_si(if half.is_nan() { f64::NAN } else { sweep }),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn metres(values: &[f64]) -> Vec<Length> {
        values.iter().map(|v| Length::from_si(*v)).collect()
    }

    /// Closed form of a straight-tapered wing: MAC = (2/3) cr (1+l+l^2)/(1+l), y = (b/6)(1+2l)/(1+l).
    #[test]
    fn straight_taper_is_the_closed_form() {
        let (b, cr, ct) = (10.0, 1.5, 0.9);
        let tip = b / 2.0 * elementary::tan(2.0_f64.to_radians());
        let wing = planform(
            &metres(&[0.0, b / 2.0]),
            &metres(&[cr, ct]),
            &metres(&[0.0, tip]),
        );
        let l = ct / cr;
        assert_relative_eq!(
            wing.mac.si(),
            2.0 / 3.0 * cr * (1.0 + l + l * l) / (1.0 + l),
            max_relative = 1e-15
        );
        let y = b / 6.0 * (1.0 + 2.0 * l) / (1.0 + l);
        assert_relative_eq!(wing.y_mac.si(), y, max_relative = 1e-15);
        assert_relative_eq!(
            wing.x_le_mac.si(),
            y * elementary::tan(2.0_f64.to_radians()),
            max_relative = 1e-14
        );
        assert_relative_eq!(wing.taper, 0.6, max_relative = 1e-15);
    }

    #[test]
    fn what_is_no_planform_has_no_value() {
        let bad = [
            planform(
                &metres(&[0.0, 1.0, 0.5]),
                &metres(&[1.0; 3]),
                &metres(&[0.0; 3]),
            ),
            planform(
                &metres(&[0.0, 1.0]),
                &metres(&[1.0, -1.0]),
                &metres(&[0.0; 2]),
            ),
            planform(&metres(&[0.0]), &metres(&[1.0]), &metres(&[0.0])),
            planform(&[], &[], &[]),
            planform(
                &metres(&[0.0, 1.0]),
                &metres(&[0.0, 0.0]),
                &metres(&[0.0; 2]),
            ),
        ];
        for wing in bad {
            assert!(
                wing.area.si().is_nan()
                    && wing.mac.si().is_nan()
                    && wing.sweep_quarter.si().is_nan()
            );
        }
    }
}
