//! Reference lengths and mass properties: mean chord stations, tail volume, centre of gravity, pitch inertia.

use crate::numeric::sum;
use crate::quantity::constants::G0;
use crate::quantity::{Area, Force, Length, Mass, MassMoment, MomentOfInertia, Torque, Typed};

/// A station as a fraction of the mean aerodynamic chord, (x - x_le_mac)/mac.
///
/// - `x`: station, positive aft from the datum.
/// - `x_le_mac`: station of the leading edge of the mean aerodynamic chord.
/// - `mac`: mean aerodynamic chord.
///
/// A fraction: 0.25 is 25 %. A chord of zero gives no value (a number that is not finite).
///
/// Source: FAA-H-8083-1, Weight and Balance Handbook (definition).
///
/// # Example
/// ```
/// use engine::mass::percent_mac;
/// use engine::quantity::{Length, Typed};
/// let m = Length::from_si;
/// assert_eq!(percent_mac(m(2.5), m(2.0), m(1.25)), 0.4);
/// ```
pub fn percent_mac(x: Length, x_le_mac: Length, mac: Length) -> f64 {
    (x - x_le_mac).si() / mac.si()
}

/// The station at a fraction of the mean aerodynamic chord, the inverse of [`percent_mac`].
///
/// - `percent`: fraction of the chord aft of its leading edge; 25 % is 0.25.
/// - `x_le_mac`: station of the leading edge of the mean aerodynamic chord.
/// - `mac`: mean aerodynamic chord.
///
/// Source: FAA-H-8083-1, Weight and Balance Handbook (definition).
///
/// # Example
/// ```
/// use engine::mass::station_at_percent;
/// use engine::quantity::{Length, Typed};
/// let m = Length::from_si;
/// assert_eq!(station_at_percent(0.4, m(2.0), m(1.25)).si(), 2.5);
/// ```
pub fn station_at_percent(percent: f64, x_le_mac: Length, mac: Length) -> Length {
    Length::from_si(x_le_mac.si() + percent * mac.si())
}

/// Tail volume, S_t l/(S c).
///
/// - `tail_area`: area of the horizontal tail.
/// - `arm`: distance from the aerodynamic centre of the airplane less tail to that of the tail, positive aft.
/// - `wing_area`: reference area.
/// - `mac`: reference chord.
///
/// An arm from the centre of gravity gives another number that is also called tail volume: this one does not move with
/// the loading.
///
/// Source: definition, as in B. Etkin and L. D. Reid, Dynamics of Flight.
///
/// # Example
/// ```
/// use engine::mass::tail_volume;
/// use engine::quantity::{Area, Length, Typed};
/// let volume = tail_volume(Area::from_si(2.0), Length::from_si(4.5), Area::from_si(12.0), Length::from_si(1.5));
/// assert_eq!(volume, 0.5);
/// ```
pub fn tail_volume(tail_area: Area, arm: Length, wing_area: Area, mac: Length) -> f64 {
    tail_area.si() * arm.si() / (wing_area.si() * mac.si())
}

/// What an item of a weight list may be given as: a force or a mass.
pub trait Weight: Typed {
    /// The type of the weight times a length.
    type Moment: Typed;

    /// The mass in kilograms; a force is divided by the standard acceleration of gravity.
    fn kilograms(self) -> f64;
}

impl Weight for Force {
    type Moment = Torque;

    fn kilograms(self) -> f64 {
        self.si() / G0
    }
}

impl Weight for Mass {
    type Moment = MassMoment;

    fn kilograms(self) -> f64 {
        self.si()
    }
}

/// Total weight and where it acts.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct CenterOfGravity<W: Weight> {
    /// Sum of the weights.
    pub weight: W,
    /// Station of the centre of gravity.
    pub x: Length,
    /// Height of the centre of gravity.
    pub z: Length,
    /// Sum of weight times station, positive for weight aft of the datum: a loading sheet's moment, not nose-up.
    pub moment: W::Moment,
}

/// Centre of gravity of a list of items.
///
/// - `weight`: weight of each item, as forces or as masses; one removed is negative.
/// - `x`: station of each item, positive aft from the datum.
/// - `z`: height of each item, positive up.
///
/// Method: sums of moments over the sum of weights, each sum in the fixed order of [`crate::numeric::Sum`]. Lists of
/// different lengths, a NaN in a list, and a total weight of zero give no value.
///
/// Source: FAA-H-8083-1, Weight and Balance Handbook (definition).
///
/// # Example
/// ```
/// use engine::mass::center_of_gravity;
/// use engine::quantity::{Length, Mass, Typed};
/// let items = [Mass::from_si(300.0), Mass::from_si(100.0)];
/// let x = [Length::from_si(2.0), Length::from_si(3.0)];
/// let z = [Length::from_si(0.0), Length::from_si(0.4)];
/// let cg = center_of_gravity(&items, &x, &z);
/// assert_eq!((cg.weight.si(), cg.x.si(), cg.z.si(), cg.moment.si()), (400.0, 2.25, 0.1, 900.0));
/// assert!(center_of_gravity(&items, &x[..1], &z).x.si().is_nan());
/// ```
pub fn center_of_gravity<W: Weight>(
    weight: &[W],
    x: &[Length],
    z: &[Length],
) -> CenterOfGravity<W> {
    let complete = weight.len() == x.len() && weight.len() == z.len();
    let total = if complete {
        sum(weight.iter().map(|w| w.si()))
    } else {
        f64::NAN
    };
    let moment =
        |stations: &[Length]| sum(weight.iter().zip(stations).map(|(w, s)| w.si() * s.si()));
    CenterOfGravity {
        weight: W::from_si(total),
        x: Length::from_si(moment(x) / total),
        z: Length::from_si(moment(z) / total),
        moment: Typed::from_si(if complete { moment(x) } else { f64::NAN }),
    }
}

/// Mass moment of inertia in pitch about the centre of gravity of the items.
///
/// - `weight`: weight of each item, as forces or as masses.
/// - `x`: station of each item's own centre of gravity, positive aft.
/// - `z`: its height, positive up.
/// - `own`: moment of inertia in pitch of each item about its own centre of gravity; 0 for a point mass.
///
/// Method: parallel-axis theorem, sum of own + m ((x - x_cg)^2 + (z - z_cg)^2); a force is divided by 9.80665 m/s^2. Lists
/// of different lengths, a NaN in a list, and a total weight of zero give no value.
///
/// Source: parallel-axis theorem.
///
/// # Example
/// ```
/// use engine::mass::pitch_inertia;
/// use engine::quantity::{Length, Mass, MomentOfInertia, Typed};
/// let items = [Mass::from_si(10.0), Mass::from_si(10.0)];
/// let x = [Length::from_si(1.0), Length::from_si(3.0)];
/// let z = [Length::from_si(0.5), Length::from_si(0.5)];
/// let own = [MomentOfInertia::from_si(0.0), MomentOfInertia::from_si(2.0)];
/// assert_eq!(pitch_inertia(&items, &x, &z, &own).si(), 22.0);
/// ```
pub fn pitch_inertia<W: Weight>(
    weight: &[W],
    x: &[Length],
    z: &[Length],
    own: &[MomentOfInertia],
) -> MomentOfInertia {
    let center = center_of_gravity(weight, x, z);
    if weight.len() != own.len() {
        return MomentOfInertia::from_si(f64::NAN);
    }
    let items = weight.iter().zip(x).zip(z).zip(own);
    MomentOfInertia::from_si(sum(items.map(|(((w, x), z), own)| {
        let (dx, dz) = ((*x - center.x).si(), (*z - center.z).si());
        own.si() + w.kilograms() * (dx * dx + dz * dz)
    })))
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn lengths(values: &[f64]) -> Vec<Length> {
        values.iter().copied().map(Length::from_si).collect()
    }

    #[test]
    fn stations_and_fractions_are_inverse() {
        let (le, mac) = (Length::from_si(1.7), Length::from_si(1.3));
        for x in [0.0, 1.7, 2.1, 3.4] {
            let back = station_at_percent(percent_mac(Length::from_si(x), le, mac), le, mac);
            assert_relative_eq!(back.si(), x, epsilon = 1e-15);
        }
    }

    /// J. D. Anderson, Introduction to Flight, Prob. 7.4: tail of 0.4 m^2 at 1.0 m, wing of 1.5 m^2 and 0.45 m chord,
    /// volume 0.593.
    #[test]
    fn tail_volume_of_a_textbook_problem() {
        let v = tail_volume(
            Area::from_si(0.4),
            Length::from_si(1.0),
            Area::from_si(1.5),
            Length::from_si(0.45),
        );
        assert_relative_eq!(v, 0.593, epsilon = 5e-4);
    }

    /// Weight shift: weight moved over total weight is the change of the centre of gravity over the distance moved
    /// (FAA-H-8083-1).
    #[test]
    fn moving_an_item_moves_the_center_in_proportion() {
        let items: Vec<Force> = [3000.0, 850.0, 200.0].map(Force::from_si).to_vec();
        let z = lengths(&[0.1, 0.0, -0.2]);
        let before = center_of_gravity(&items, &lengths(&[2.0, 2.4, 3.0]), &z);
        let after = center_of_gravity(&items, &lengths(&[2.0, 2.4, 4.5]), &z);
        assert_relative_eq!(
            (after.x - before.x).si() / 1.5,
            200.0 / 4050.0,
            max_relative = 1e-13
        );
        assert_eq!(before.z, after.z);
    }

    #[test]
    fn forces_and_masses_have_the_same_center_and_inertia() {
        let masses = [Mass::from_si(40.0), Mass::from_si(12.0), Mass::from_si(7.5)];
        let forces = masses.map(|m| Force::from_si(m.si() * G0));
        let (x, z) = (lengths(&[1.0, 2.5, 6.0]), lengths(&[0.0, 0.3, 0.5]));
        let own = [0.5, 0.0, 0.1].map(MomentOfInertia::from_si);
        let (by_mass, by_force) = (
            center_of_gravity(&masses, &x, &z),
            center_of_gravity(&forces, &x, &z),
        );
        assert_relative_eq!(by_mass.x.si(), by_force.x.si(), max_relative = 1e-15);
        let inertia = pitch_inertia(&masses, &x, &z, &own).si();
        assert_relative_eq!(
            inertia,
            pitch_inertia(&forces, &x, &z, &own).si(),
            max_relative = 1e-14
        );
        // The same by pairs of points: sum over pairs of m_i m_j d_ij^2 over the total mass, plus the items' own.
        let pairs = [(0, 1), (0, 2), (1, 2)].map(|(i, j)| {
            let (dx, dz): (Length, Length) = (x[i] - x[j], z[i] - z[j]);
            masses[i].si() * masses[j].si() * (dx.si() * dx.si() + dz.si() * dz.si())
        });
        assert_relative_eq!(
            inertia,
            pairs.iter().sum::<f64>() / 59.5 + 0.6,
            max_relative = 1e-14
        );
    }

    #[test]
    fn broken_lists_have_no_value() {
        let one = [Force::from_si(1.0)];
        let none = center_of_gravity(&one, &lengths(&[1.0, 2.0]), &lengths(&[0.0]));
        assert!(none.weight.si().is_nan() && none.z.si().is_nan() && none.moment.si().is_nan());
        assert!(!center_of_gravity::<Mass>(&[], &[], &[]).x.si().is_finite());
        assert!(
            pitch_inertia(&one, &lengths(&[1.0]), &lengths(&[0.0]), &[])
                .si()
                .is_nan()
        );
        let nan = center_of_gravity(
            &[Force::from_si(f64::NAN)],
            &lengths(&[1.0]),
            &lengths(&[0.0]),
        );
        assert!(nan.weight.si().is_nan() && nan.x.si().is_nan());
    }
}
