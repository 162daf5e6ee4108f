//! Schrenk's approximation of the spanwise load.

use crate::planform::{half_area, numbers};
use crate::quantity::constants::PI;
use crate::quantity::{Force, ForcePerLength, Length, Typed};

/// Load per span at each station of one half by Schrenk's approximation: the mean of planform and ellipse.
///
/// - `y`, `chord`: stations and chords of one half from root to tip.
/// - `lift`: lift of the whole wing, positive up.
///
/// The load at a station is lift/S times the mean of the chord there and that of an ellipse of the same area and span.
/// Holds for unswept, untwisted wings of moderate taper; twist, flaps and sweep are not in it. NaN where the stations do
/// not run outward.
///
/// Source: O. Schrenk, NACA TM 948.
///
/// # Example
/// ```
/// use engine::quantity::{Force, Length, Typed};
/// use engine::wing::schrenk_load;
/// let m = |v: [f64; 2]| v.map(Length::from_si);
/// let load = schrenk_load(&m([0.0, 4.5]), &m([1.5, 0.9]), Force::from_si(10.8));
/// assert!((load[0].si() - 1.513_943_727).abs() < 1e-9);
/// ```
pub fn schrenk_load(y: &[Length], chord: &[Length], lift: Force) -> Vec<ForcePerLength> {
    let (y, chord) = (numbers(y), numbers(chord));
    let area = 2.0
        * half_area(&y, &chord)
            .filter(|half| *half > 0.0)
            .unwrap_or(f64::NAN);
    let span = 2.0 * y.last().copied().unwrap_or(f64::NAN);
    let load = |(y, chord): (&f64, &f64)| {
        let out = 2.0 * y / span;
        let ellipse = 4.0 * area / (PI * span) * (1.0 - out * out).max(0.0).sqrt();
        ForcePerLength::from_si(lift.si() / area * (chord + ellipse) / 2.0)
    };
    y.iter().zip(&chord).map(load).collect()
}
