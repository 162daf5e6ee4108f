//! Chordwise pressures of tail surfaces.

use crate::quantity::{Force, ForcePerLength, Length, Pressure, Typed};

/// A chordwise distribution.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Shape {
    /// Figure A7 of 14 CFR 23, appendix A: straight from the leading edge to the hinge and on to none at the trailing edge,
    /// with the centre of pressure where it is asked for.
    FigureA7,
    /// Straight from the leading edge to none at the trailing edge: centre of pressure at a third of the chord.
    Triangle,
}

impl Shape {
    /// Every shape, in a fixed order.
    pub const ALL: [Self; 2] = [Self::FigureA7, Self::Triangle];

    /// The words by which it is chosen.
    pub const fn word(self) -> &'static str {
        match self {
            Self::FigureA7 => "Fig. A7",
            Self::Triangle => "triangle",
        }
    }

    /// The shape of a word, letter for letter.
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|shape| shape.word() == word)
    }
}

/// Pressures of a chordwise distribution, straight from one to the next, and the load of a rib.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct ChordwiseLoad {
    /// At the leading edge.
    pub p_leading: Pressure,
    /// At the hinge.
    pub p_hinge: Pressure,
    /// At the trailing edge.
    pub p_trailing: Pressure,
    /// Load of a rib from its bay.
    pub rib_load: Force,
}

/// Pressures along the chord of a tail surface, positive with the load.
///
/// - `shape`: the distribution. Of figure A7, with w the load over the chord, E the chord ratio and d the centre of
///   pressure, the pressure is 2 w (2 - E - 3 d)/(1 - E) at the leading edge, 2 w (3 d + E - 1) at the hinge and none at
///   the trailing edge; of the triangle 2 w, 2 w E and none.
/// - `load`: load per span at the station.
/// - `chord`: chord at the station, control within.
/// - `chord_ratio`: chord aft of the hinge over the whole chord, above 0, below 1.
/// - `x_cp`: centre of pressure aft of the leading edge over the chord; the triangle has its own, 1/3, and takes none.
/// - `bay`: span from which a rib takes its load, half of each bay beside it; a NaN leaves the rib load out.
///
/// The appendix asks for every centre of pressure from the leading edge to half the chord, and for half as much again on
/// the leading 10 % of the chord of a fixed surface, the rest reduced. A chord ratio outside the range gives NaN, no value.
///
/// Source: 14 CFR 23 before amendment 64, appendix A, A23.11(c) and figure A7.
///
/// # Example
/// ```
/// use engine::quantity::{ForcePerLength, Length, Typed};
/// use engine::structure::{Shape, chordwise_load};
/// let m = Length::from_si;
/// let load = chordwise_load(Shape::FigureA7, ForcePerLength::from_si(15.0), m(1.0), 0.4, 0.25, m(0.3));
/// assert!((load.p_leading.si() - 42.5).abs() < 1e-12);
/// assert!((load.p_hinge.si() - 4.5).abs() < 1e-12);
/// assert!((load.rib_load.si() - 4.5).abs() < 1e-12);
/// ```
pub fn chordwise_load(
    shape: Shape,
    load: ForcePerLength,
    chord: Length,
    chord_ratio: f64,
    x_cp: f64,
    bay: Length,
) -> ChordwiseLoad {
    let e = if chord_ratio > 0.0 && chord_ratio < 1.0 {
        chord_ratio
    } else {
        f64::NAN
    };
    let mean = load.si() / chord.si();
    let (leading, hinge) = match shape {
        Shape::FigureA7 => (
            2.0 * (2.0 - e - 3.0 * x_cp) / (1.0 - e),
            2.0 * (3.0 * x_cp + e - 1.0),
        ),
        Shape::Triangle => (2.0, 2.0 * e),
    };
    ChordwiseLoad {
        p_leading: Pressure::from_si(mean * leading),
        p_hinge: Pressure::from_si(mean * hinge),
        p_trailing: Pressure::from_si(0.0),
        rib_load: Force::from_si(load.si() * bay.si()),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn of(shape: Shape, chord_ratio: f64, x_cp: f64) -> (f64, f64) {
        let (load, chord) = (ForcePerLength::from_si(30.0), Length::from_si(2.0));
        let found = chordwise_load(shape, load, chord, chord_ratio, x_cp, Length::from_si(1.0));
        assert_eq!(found.p_trailing.si(), 0.0);
        (found.p_leading.si(), found.p_hinge.si())
    }

    /// 14 CFR 23 appendix A, figure A7, with a mean pressure of 15 and a chord ratio of 0.4.
    #[test]
    fn pressures_of_figure_a7() {
        for (x_cp, leading, hinge) in [(0.25, 42.5, 4.5), (0.5, 5.0, 27.0), (0.1, 65.0, -9.0)] {
            let found = of(Shape::FigureA7, 0.4, x_cp);
            assert_relative_eq!(found.0, leading, max_relative = 1e-12);
            assert_relative_eq!(found.1, hinge, max_relative = 1e-12);
        }
    }

    /// Area and first moment of the two straight pieces, over a chord of 1.
    #[test]
    fn pressures_add_up_to_the_load_at_its_centre() {
        for (chord_ratio, x_cp) in [(0.3, 0.2), (0.55, 0.45), (0.4, 0.0)] {
            let (leading, hinge) = of(Shape::FigureA7, chord_ratio, x_cp);
            let (front, back) = (1.0 - chord_ratio, chord_ratio);
            let area = front * (leading + hinge) / 2.0 + back * hinge / 2.0;
            let moment = front * front * (leading + 2.0 * hinge) / 6.0
                + back * hinge / 2.0 * (front + back / 3.0);
            assert_relative_eq!(area, 15.0, max_relative = 1e-12);
            assert_relative_eq!(moment, 15.0 * x_cp, max_relative = 1e-12, epsilon = 1e-12);
        }
    }

    #[test]
    fn the_triangle_is_figure_a7_at_a_third_of_the_chord() {
        let found = of(Shape::Triangle, 0.4, f64::NAN);
        let expected = of(Shape::FigureA7, 0.4, 1.0 / 3.0);
        assert_relative_eq!(found.0, expected.0, max_relative = 1e-12);
        assert_relative_eq!(found.1, expected.1, max_relative = 1e-12);
        assert!(of(Shape::Triangle, 0.0, 0.3).1.is_nan());
        assert_eq!(Shape::of_word("Fig. A7"), Some(Shape::FigureA7));
    }
}
