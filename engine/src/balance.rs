//! Balance of the airplane: tail load, wing lift and inertia loads of one condition.

#![allow(
    non_snake_case,
    reason = "arguments carry the symbols of the trade: M for a moment"
)]

use crate::quantity::constants::G0;
use crate::quantity::{AngularAcceleration, Force, Length, MomentOfInertia, Torque, Typed};

/// Tail load that balances the airplane, (M + M_other + n W (x_cg - x_ac))/(x_tail - x_ac), positive up.
///
/// - `M`: moment of the airplane less tail about `x_ac` at this condition, nose up.
/// - `n`: load factor, positive up.
/// - `weight`: weight, a force.
/// - `x_cg`: station of the centre of gravity, positive aft.
/// - `x_ac`: aerodynamic centre of the airplane less tail, where its lift acts.
/// - `x_tail`: station at which the tail load acts. A canard's is ahead of the wing, and the sign comes out by itself.
/// - `M_other`: any other couple, of thrust and drag for one; 0 where there is none.
///
/// Method: moments about `x_ac` with the lift of the airplane less tail n W - P, see [`wing_lift`]. Exact statics of the
/// forces named; the arm from `x_ac` and not from the centre of gravity is what makes it so. `x_tail` at `x_ac` gives no
/// value (a number that is not finite).
///
/// Source: statics; T. H. G. Megson, Aircraft Structures for Engineering Students, has the same sum with the arms of drag
/// and thrust.
///
/// # Example
/// ```
/// use engine::balance::{balancing_load, wing_lift};
/// use engine::quantity::{Force, Length, Torque, Typed};
/// let (m, weight) = (Length::from_si, Force::from_si(5000.0));
/// let tail = balancing_load(Torque::from_si(-900.0), 2.0, weight, m(2.03), m(2.0), m(6.0), Torque::from_si(0.0));
/// assert!((tail.si() + 150.0).abs() < 1e-9);
/// assert_eq!(wing_lift(2.0, weight, Force::from_si(-150.0)).si(), 10_150.0);
/// ```
pub fn balancing_load(
    M: Torque,
    n: f64,
    weight: Force,
    x_cg: Length,
    x_ac: Length,
    x_tail: Length,
    M_other: Torque,
) -> Force {
    let moment = M.si() + M_other.si() + n * weight.si() * (x_cg - x_ac).si();
    Force::from_si(moment / (x_tail - x_ac).si())
}

/// Lift of the airplane less tail, n W - P, positive up.
///
/// - `n`: load factor, positive up.
/// - `weight`: weight, a force.
/// - `tail_load`: load on the tail, positive up.
///
/// Exact statics where no other vertical force acts, a tilted thrust for one.
///
/// Source: statics.
///
/// # Example
/// ```
/// use engine::balance::wing_lift;
/// use engine::quantity::{Force, Typed};
/// assert_eq!(wing_lift(3.8, Force::from_si(1000.0), Force::from_si(-200.0)).si(), 4000.0);
/// ```
pub fn wing_lift(n: f64, weight: Force, tail_load: Force) -> Force {
    Force::from_si(n * weight.si() - tail_load.si())
}

/// Inertia load on an item, -weight (n - pitch_acceleration (x - x_cg)/g0), positive up.
///
/// - `n`: load factor at the centre of gravity, positive up.
/// - `weight`: weight of the item, a force.
/// - `pitch_acceleration`: positive nose up; it relieves an item aft of the centre of gravity, which moves down.
/// - `x`: station of the item, positive aft.
/// - `x_cg`: station of the airplane's centre of gravity.
///
/// Exact for a rigid airplane; the centripetal part of a pitch rate lies along the fuselage and is left out.
///
/// Source: rigid-body dynamics.
///
/// # Example
/// ```
/// use engine::balance::inertia_load;
/// use engine::quantity::{AngularAcceleration, Force, Length, Typed};
/// let at_rest = AngularAcceleration::from_si(0.0);
/// let load = inertia_load(2.5, Force::from_si(400.0), at_rest, Length::from_si(3.0), Length::from_si(2.0));
/// assert_eq!(load.si(), -1000.0);
/// ```
pub fn inertia_load(
    n: f64,
    weight: Force,
    pitch_acceleration: AngularAcceleration,
    x: Length,
    x_cg: Length,
) -> Force {
    let local = n - pitch_acceleration.si() * (x - x_cg).si() / G0;
    Force::from_si(-(weight.si() * local))
}

/// Tail load that gives the airplane a pitch acceleration, -I a/(x_tail - x_cg), positive up.
///
/// - `inertia`: mass moment of inertia in pitch about the centre of gravity.
/// - `acceleration`: pitch acceleration, positive nose up.
/// - `x_tail`: station at which the tail load acts, positive aft.
/// - `x_cg`: station of the centre of gravity.
///
/// It is the increment over the balancing load. Method: moments about the centre of gravity; the change of wing load that
/// the force itself brings about is left out. `x_tail` at `x_cg` gives no value (a number that is not finite).
///
/// Source: rigid-body dynamics.
///
/// # Example
/// ```
/// use engine::balance::pitch_acceleration_load;
/// use engine::quantity::{AngularAcceleration, Length, MomentOfInertia, Typed};
/// let load = pitch_acceleration_load(
///     MomentOfInertia::from_si(800.0), AngularAcceleration::from_si(3.0), Length::from_si(6.0), Length::from_si(2.0));
/// assert_eq!(load.si(), -600.0);
/// ```
pub fn pitch_acceleration_load(
    inertia: MomentOfInertia,
    acceleration: AngularAcceleration,
    x_tail: Length,
    x_cg: Length,
) -> Force {
    Force::from_si(-(inertia.si() * acceleration.si()) / (x_tail - x_cg).si())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::air::dynamic_pressure_of_eas;
    use crate::moment::{drag_moment, pitching_moment, thrust_moment};
    use crate::quantity::{Angle, Area, EquivalentAirspeed};
    use approx::{assert_abs_diff_eq, assert_relative_eq};

    fn m(value: f64) -> Length {
        Length::from_si(value)
    }

    /// A condition in the coordinates of the mean chord, which begins at station 0.
    struct Case {
        mass_kg: f64,
        n: f64,
        eas: f64,
        area: f64,
        mac: f64,
        cg: f64,
        tail: f64,
        cm: f64,
    }

    impl Case {
        fn tail_load(&self, other: Torque) -> Force {
            let q = dynamic_pressure_of_eas(EquivalentAirspeed::from_si(self.eas));
            let moment = pitching_moment(self.cm, q, Area::from_si(self.area), m(self.mac));
            let (cg, ac) = (m(self.cg * self.mac), m(0.25 * self.mac));
            balancing_load(moment, self.n, self.weight(), cg, ac, m(self.tail), other)
        }

        fn weight(&self) -> Force {
            Force::from_si(self.mass_kg * 9.80665)
        }
    }

    const SMALL: Case = Case {
        mass_kg: 600.0,
        n: 1.0,
        eas: 50.0,
        area: 9.0,
        mac: 1.2,
        cg: 0.2,
        tail: 4.9,
        cm: -0.06,
    };
    const LARGE: Case = Case {
        mass_kg: 750.0,
        n: 3.8,
        eas: 55.0,
        area: 10.5,
        mac: 1.25,
        cg: 0.18,
        tail: 5.2,
        cm: -0.075,
    };

    /// Closed form P = (n W (x_cg - x_ac) + M)/(x_t - x_ac), worked with g0 = 9.80665 m/s^2 and rho0 = 1.225 kg/m^3.
    #[test]
    fn balancing_loads_of_four_conditions() {
        for (case, tail, wing) in [
            (SMALL, -292.454_217_4, 6_176.444_217),
            (Case { cg: 0.35, ..SMALL }, -62.211_130_43, 5_946.201_13),
            (LARGE, -873.533_636_5, 28_822.486_14),
            (
                Case {
                    n: 0.0,
                    eas: 78.0,
                    ..LARGE
                },
                -750.531_809_5,
                750.531_809_5,
            ),
        ] {
            let load = case.tail_load(Torque::from_si(0.0));
            assert_abs_diff_eq!(load.si(), tail, epsilon = 1e-6);
            assert_abs_diff_eq!(
                wing_lift(case.n, case.weight(), load).si(),
                wing,
                epsilon = 1e-4
            );
        }
    }

    /// The same with drag 0.15 m above and thrust 0.10 m below the centre of gravity, both nose up.
    #[test]
    fn drag_and_thrust_enter_as_couples() {
        let case = Case { n: 1.0, ..LARGE };
        let drag = drag_moment(Force::from_si(1200.0), m(0.15), m(0.0));
        let thrust = thrust_moment(
            Force::from_si(1500.0),
            m(-0.10),
            m(0.0),
            Angle::from_si(0.0),
            m(0.0),
            m(0.0),
        );
        assert_abs_diff_eq!(
            case.tail_load(drag + thrust).si(),
            -437.324_544_4,
            epsilon = 1e-6
        );
    }

    /// Forces and moments of the balanced airplane add to zero about any point, for a tail behind and a canard ahead.
    #[test]
    fn the_balanced_airplane_is_in_equilibrium() {
        let (moment, weight) = (-700.0, 5200.0);
        let (x_cg, x_ac) = (2.1, 2.3);
        for x_tail in [6.5, -0.4] {
            let m_other = Torque::from_si(45.0);
            let load = balancing_load(
                Torque::from_si(moment),
                3.0,
                Force::from_si(weight),
                m(x_cg),
                m(x_ac),
                m(x_tail),
                m_other,
            );
            let lift = wing_lift(3.0, Force::from_si(weight), load);
            for x in [0.0, 2.1, 5.0] {
                let sum = moment + 45.0 - load.si() * (x_tail - x) - lift.si() * (x_ac - x)
                    + 3.0 * weight * (x_cg - x);
                assert_abs_diff_eq!(sum, 0.0, epsilon = 1e-9);
            }
        }
    }

    /// A tail load and the inertia of two point masses: force and moment close about the centre of gravity.
    #[test]
    fn inertia_loads_carry_the_pitch_acceleration() {
        let (weights, stations, x_cg) = ([3000.0, 1000.0], [1.5, 3.5], 2.0);
        let inertia = (3000.0 * 0.25 + 1000.0 * 2.25) / G0;
        let acceleration = AngularAcceleration::from_si(2.5);
        let tail = pitch_acceleration_load(
            MomentOfInertia::from_si(inertia),
            acceleration,
            m(6.0),
            m(x_cg),
        );
        let n = tail.si() / 4000.0;
        let loads = weights.map(Force::from_si);
        let loads =
            [0, 1].map(|i| inertia_load(n, loads[i], acceleration, m(stations[i]), m(x_cg)).si());
        assert_abs_diff_eq!(loads[0] + loads[1] + tail.si(), 0.0, epsilon = 1e-10);
        let moment =
            loads[0] * (stations[0] - x_cg) + loads[1] * (stations[1] - x_cg) + tail.si() * 4.0;
        assert_abs_diff_eq!(moment, 0.0, epsilon = 1e-9);
        assert!(tail.si() < 0.0);
    }

    #[test]
    fn a_tail_at_the_aerodynamic_center_cannot_balance() {
        let zero = Torque::from_si(0.0);
        let load = balancing_load(
            Torque::from_si(-1.0),
            1.0,
            Force::from_si(1.0),
            m(2.0),
            m(2.0),
            m(2.0),
            zero,
        );
        assert!(!load.si().is_finite());
        assert_relative_eq!(
            wing_lift(0.0, Force::from_si(1.0), Force::from_si(-3.0)).si(),
            3.0
        );
    }
}
