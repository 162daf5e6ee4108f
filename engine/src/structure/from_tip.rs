//! Shear, bending and torsion of one half, summed from the tip.

use crate::quantity::{Force, ForcePerLength, Length, Torque, Typed};

/// Whether stations run from root to tip. Two at one place hold a jump of the load.
pub(super) fn outward(y: &[Length]) -> bool {
    y.windows(2).all(|pair| match pair {
        [inner, outer] => inner.si() <= outer.si(),
        _ => true,
    })
}

/// What lies outboard of each station: `step` takes shear and moment at the outer end of a bay, its width and the loads
/// at its inner and outer end, and gives shear and moment at the inner end. NaN everywhere where the stations do not run
/// outward, or are not as many as the loads.
fn summed(load: &[f64], y: &[Length]) -> Vec<(f64, f64)> {
    if load.len() != y.len() || !outward(y) {
        return vec![(f64::NAN, f64::NAN); load.len()];
    }
    let mut out = vec![(0.0, 0.0); load.len()];
    let (mut shear, mut moment) = (0.0, 0.0);
    let bays = load.windows(2).zip(y.windows(2)).zip(out.iter_mut());
    for ((load, y), place) in bays.rev() {
        if let ([inner, outer], [from, to]) = (load, y) {
            let h = (*to - *from).si();
            moment += shear * h + h * h * (inner + 2.0 * outer) / 6.0;
            shear += h * (inner + outer) / 2.0;
        }
        *place = (shear, moment);
    }
    // A load that is missing at the tip is missing there too.
    if let (Some(last), Some(load)) = (out.last_mut(), load.last()) {
        *last = (0.0 * load, 0.0 * load);
    }
    out
}

/// Shear at each station, the sum of the load outboard of it, with the sign of the load.
///
/// - `load`: load per span of one half, from root to tip, straight between the stations.
/// - `y`: stations from root to tip; two at one place hold a jump of the load.
///
/// Exact for a load that is straight between the stations. Stations that do not run outward give NaN, no value.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::quantity::{ForcePerLength, Length, Typed};
/// use engine::structure::shear_from_tip;
/// let load = [300.0, 300.0, 0.0].map(ForcePerLength::from_si);
/// let shear = shear_from_tip(&load, &[0.0, 2.0, 4.0].map(Length::from_si));
/// assert_eq!(shear.first().map(|v| v.si()), Some(900.0));
/// ```
pub fn shear_from_tip(load: &[ForcePerLength], y: &[Length]) -> Vec<Force> {
    let load: Vec<f64> = load.iter().map(|w| w.si()).collect();
    let sums = summed(&load, y).into_iter();
    sums.map(|(shear, _)| Force::from_si(shear)).collect()
}

/// Bending moment at each station, of the load outboard of it about the station; a load up gives a positive moment.
///
/// - `load`: load per span of one half, from root to tip, straight between the stations.
/// - `y`: stations from root to tip.
///
/// Exact for a load that is straight between the stations. Stations that do not run outward give NaN, no value.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::quantity::{ForcePerLength, Length, Typed};
/// use engine::structure::bending_from_tip;
/// let load = [300.0, 300.0].map(ForcePerLength::from_si);
/// let bending = bending_from_tip(&load, &[0.0, 4.0].map(Length::from_si));
/// assert_eq!(bending.first().map(|m| m.si()), Some(2400.0));
/// ```
pub fn bending_from_tip(load: &[ForcePerLength], y: &[Length]) -> Vec<Torque> {
    let load: Vec<f64> = load.iter().map(|w| w.si()).collect();
    let sums = summed(&load, y).into_iter();
    sums.map(|(_, moment)| Torque::from_si(moment)).collect()
}

/// Torsion at each station, the sum of the torque outboard of it, with the sign of the torque: nose up positive.
///
/// - `torque`: moment per span of one half about the axis chosen, from root to tip, straight between the stations. It has
///   the dimension of a force.
/// - `y`: stations from root to tip.
///
/// The axis is straight and lies along the span; a swept one turns part of the bending into torsion. Exact for a torque
/// that is straight between the stations. Stations that do not run outward give NaN, no value.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::quantity::{Force, Length, Typed};
/// use engine::structure::torsion_from_tip;
/// let torque = [-40.0, -20.0].map(Force::from_si);
/// let torsion = torsion_from_tip(&torque, &[0.0, 4.0].map(Length::from_si));
/// assert_eq!(torsion.first().map(|t| t.si()), Some(-120.0));
/// ```
pub fn torsion_from_tip(torque: &[Force], y: &[Length]) -> Vec<Torque> {
    let torque: Vec<f64> = torque.iter().map(|t| t.si()).collect();
    let sums = summed(&torque, y).into_iter();
    sums.map(|(sum, _)| Torque::from_si(sum)).collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn stations(y: &[f64]) -> Vec<Length> {
        y.iter().map(|v| Length::from_si(*v)).collect()
    }

    fn bending(load: &[f64], y: &[f64]) -> Vec<f64> {
        let load: Vec<_> = load.iter().map(|v| ForcePerLength::from_si(*v)).collect();
        let out = bending_from_tip(&load, &stations(y));
        out.into_iter().map(Typed::si).collect()
    }

    fn shear(load: &[f64], y: &[f64]) -> Vec<f64> {
        let load: Vec<_> = load.iter().map(|v| ForcePerLength::from_si(*v)).collect();
        let out = shear_from_tip(&load, &stations(y));
        out.into_iter().map(Typed::si).collect()
    }

    /// A triangular load w (1 - y/l): root shear w l/2, root moment w l^2/6, and w (l - y)^3/(6 l) at y.
    #[test]
    fn a_triangular_load_by_its_closed_form() {
        let (w, l) = (600.0, 5.0);
        let y = [0.0, 1.0, 2.5, 4.0, 5.0];
        let load = y.map(|y| w * (1.0 - y / l));
        assert_relative_eq!(shear(&load, &y)[0], w * l / 2.0, max_relative = 1e-14);
        for (found, y) in bending(&load, &y).into_iter().zip(y) {
            let rest = l - y;
            let expected = w * rest * rest * rest / (6.0 * l);
            assert_relative_eq!(found, expected, max_relative = 1e-13);
        }
    }

    #[test]
    fn a_jump_of_the_load_stands_at_one_station() {
        let y = [0.0, 2.0, 2.0, 4.0];
        let load = [100.0, 100.0, 50.0, 50.0];
        assert_eq!(shear(&load, &y), [300.0, 100.0, 100.0, 0.0]);
        assert_eq!(bending(&load, &y), [500.0, 100.0, 100.0, 0.0]);
    }

    #[test]
    fn stations_from_tip_to_root_have_no_value() {
        assert!(shear(&[1.0, 2.0], &[4.0, 0.0]).iter().all(|v| v.is_nan()));
        assert!(shear(&[1.0], &[4.0, 5.0]).iter().all(|v| v.is_nan()));
        assert!(shear(&[], &[]).is_empty());
    }

    #[test]
    fn a_missing_load_leaves_what_lies_outboard() {
        let found = shear(&[1.0, f64::NAN, 1.0, 1.0], &[0.0, 1.0, 2.0, 3.0]);
        assert!(found[0].is_nan() && found[1].is_nan());
        assert_eq!(&found[2..], [1.0, 0.0]);
        assert!(shear(&[1.0, f64::NAN], &[0.0, 1.0])[1].is_nan());
    }
}
