//! Four- and five-digit designations: what their digits say, mean line and thickness.

use crate::elementary;
use crate::quantity::constants::PI;

/// A four- or five-digit section.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Designation {
    line: MeanLine,
    thickness: f64,
}

#[derive(Clone, Copy, PartialEq, Debug)]
enum MeanLine {
    /// Greatest camber and its place.
    Four { camber: f64, place: f64 },
    /// Place where the cubic ends, its factor, and that of the cubic behind it (0 where the line is straight there).
    Five {
        place: f64,
        factor: f64,
        behind: f64,
    },
}

/// Code of the place, end of the cubic and its factor for a design lift coefficient of 0.3: NACA Report 537; NASA TM 4741.
const PLAIN: [(u32, f64, f64); 5] = [
    (1, 0.0580, 361.400),
    (2, 0.1260, 51.640),
    (3, 0.2025, 15.957),
    (4, 0.2900, 6.643),
    (5, 0.3910, 3.230),
];

/// The same of reflexed lines, with the ratio of the factors behind and ahead: NACA Report 537; NASA TM 4741.
#[allow(clippy::approx_constant, reason = "a place along the chord, not 1/pi")]
const REFLEXED: [(u32, f64, f64, f64); 4] = [
    (2, 0.1300, 51.990, 0.000_764),
    (3, 0.2170, 15.793, 0.006_77),
    (4, 0.3180, 6.520, 0.0303),
    (5, 0.4410, 3.191, 0.1355),
];

impl Designation {
    /// Reads a designation of four digits (`2412`), or of five (`23012`, reflexed `23112`). `None` where it is none of
    /// these or its mean line is not among the published ones.
    ///
    /// # Example
    /// ```
    /// use engine::section::Designation;
    /// assert!(Designation::read("2412").is_some());
    /// assert!(Designation::read("23112").is_some());
    /// assert!(Designation::read("63-215").is_none());
    /// ```
    #[must_use]
    pub fn read(text: &str) -> Option<Self> {
        let digits: Option<Vec<u32>> = text.chars().map(|c| c.to_digit(10)).collect();
        let digits = digits?;
        let percent = |a: u32, b: u32| f64::from(10 * a + b) / 100.0;
        match digits[..] {
            [m, p, a, b] if (m == 0) == (p == 0) && a + b > 0 => Some(Designation {
                line: MeanLine::Four {
                    camber: f64::from(m) / 100.0,
                    place: f64::from(p) / 10.0,
                },
                thickness: percent(a, b),
            }),
            [lift, place, reflex, a, b] if lift > 0 && a + b > 0 => Some(Designation {
                line: five(lift, place, reflex)?,
                thickness: percent(a, b),
            }),
            _ => None,
        }
    }

    /// Height and slope of the mean line at a place of the chord from 0 to 1.
    pub(super) fn mean_line(&self, x: f64) -> (f64, f64) {
        match self.line {
            MeanLine::Four { camber: 0.0, .. } => (0.0, 0.0),
            MeanLine::Four { camber, place } => {
                let ahead = 2.0 * place * x - x * x;
                let part = if x < place {
                    camber / (place * place)
                } else {
                    camber / ((1.0 - place) * (1.0 - place))
                };
                let rest = if x < place { 0.0 } else { 1.0 - 2.0 * place };
                (part * (rest + ahead), 2.0 * part * (place - x))
            }
            MeanLine::Five {
                place: m,
                factor,
                behind,
            } => {
                let cube = |v: f64| v * v * v;
                let r = if x < m { 1.0 } else { behind };
                let from = x - m;
                // The line through the trailing edge; without reflex it is that of the cubic at its end.
                let (slope, height) = (behind * cube(1.0 - m) + cube(m), cube(m));
                let z = factor / 6.0 * (r * cube(from) - slope * x + height);
                (z, factor / 6.0 * (3.0 * r * from * from - slope))
            }
        }
    }

    /// Where the formula of the mean line changes.
    pub(super) fn joint(&self) -> f64 {
        match self.line {
            MeanLine::Four { place, .. } | MeanLine::Five { place, .. } => place,
        }
    }

    /// Half the thickness at a place of the chord, the trailing edge closed.
    fn half_thickness(&self, x: f64) -> f64 {
        let polynomial = ((-0.1036 * x + 0.2843) * x - 0.3516) * x - 0.1260;
        5.0 * self.thickness * (0.2969 * x.max(0.0).sqrt() + polynomial * x)
    }
}

fn five(lift: u32, place: u32, reflex: u32) -> Option<MeanLine> {
    // The first digit is two thirds of the design lift coefficient in tenths; the tables are for 0.3.
    let scale = f64::from(lift) / 2.0;
    match reflex {
        0 => PLAIN
            .iter()
            .find(|row| row.0 == place)
            .map(|row| MeanLine::Five {
                place: row.1,
                factor: scale * row.2,
                behind: 0.0,
            }),
        1 => REFLEXED
            .iter()
            .find(|row| row.0 == place)
            .map(|row| MeanLine::Five {
                place: row.1,
                factor: scale * row.2,
                behind: row.3,
            }),
        _ => None,
    }
}

/// Points of a contour, chord 1.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct SectionPoints {
    /// From the trailing edge forward over the upper side and back under the lower side.
    pub x: Vec<f64>,
    /// Height above the chord line.
    pub z: Vec<f64>,
}

/// Points of a four- or five-digit section: trailing edge, upper side, leading edge, lower side, trailing edge.
///
/// - `designation`: see [`Designation::read`].
/// - `count`: points; the first and the last are the trailing edge, all are closer together at the edges. An odd number has
///   the leading edge among them.
///
/// Thickness is laid off square to the mean line; the trailing edge is closed (last coefficient -0.1036). Empty where the
/// designation is none or there are fewer than 5 points.
///
/// Source: NACA Reports 460 and 537; NASA TM 4741.
///
/// # Example
/// ```
/// use engine::section::section_points;
/// let points = section_points("2412", 121);
/// assert_eq!((points.x[0], points.z[0], points.x[120]), (1.0, 0.0, 1.0));
/// assert!(points.x[60].abs() < 1e-12);
/// ```
#[must_use]
pub fn section_points(designation: &str, count: usize) -> SectionPoints {
    let Some(section) = Designation::read(designation).filter(|_| count >= 5) else {
        return SectionPoints::default();
    };
    let mut points = SectionPoints::default();
    for i in 0..count {
        let around = 2.0 * PI * i as f64 / (count - 1) as f64;
        let at = (1.0 + elementary::cos(around)) / 2.0;
        let (z, slope) = section.mean_line(at);
        let half = if i == 0 || i == count - 1 {
            0.0
        } else {
            section.half_thickness(at)
        };
        let length = (1.0 + slope * slope).sqrt();
        let side = if 2 * i < count { 1.0 } else { -1.0 };
        points.x.push(at - side * half * slope / length);
        points.z.push(z + side * half / length);
    }
    points
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn mean_lines_meet_the_chord_at_both_ends_and_join_smoothly() {
        for text in [
            "2412", "6712", "23012", "21012", "25012", "23112", "25112", "43018",
        ] {
            let section = Designation::read(text).unwrap();
            assert!(section.mean_line(0.0).0.abs() < 1e-12, "{text}");
            assert!(section.mean_line(1.0).0.abs() < 1e-6, "{text}");
            let m = section.joint();
            let (a, b) = (section.mean_line(m - 1e-9), section.mean_line(m + 1e-9));
            assert!(
                (a.0 - b.0).abs() < 1e-8 && (a.1 - b.1).abs() < 1e-6,
                "{text}"
            );
        }
    }

    #[test]
    fn what_is_no_designation_is_refused() {
        for text in [
            "", "24", "0412", "2012", "241", "23212", "26012", "2a12", "230123",
        ] {
            assert!(Designation::read(text).is_none(), "{text}");
        }
        assert!(section_points("0012", 4).x.is_empty());
    }
}
