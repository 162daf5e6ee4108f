//! Typed quantities of the public functions: the `uom` crate's SI types and a few kinds that it lacks.

use uom::si::{ISQ, SI};
use uom::typenum::{Integer, N1, N2, P1, Z0};

use super::dimension::Dimension;
use super::exponent::Exponent;
use super::kind::SpeedKind;

pub use uom::si::f64::{
    Acceleration, Angle, AngularAcceleration, AngularVelocity, Area, DynamicViscosity, Force,
    Frequency, KinematicViscosity, Length, Mass, MassDensity, MomentOfInertia, Power, Pressure,
    Ratio, TemperatureInterval, ThermodynamicTemperature, Time, Torque, Velocity, Volume,
};

/// Force per length, as a spanwise load: what a force over a length is.
pub type ForcePerLength = uom::si::Quantity<ISQ<Z0, P1, N2, Z0, Z0, Z0, Z0>, SI<f64>, f64>;

/// A number per length, as the gearing of a control: its angle over the travel of the grip.
pub type PerLength = uom::si::Quantity<ISQ<N1, Z0, Z0, Z0, Z0, Z0, Z0>, SI<f64>, f64>;

/// First moment of a mass: what a mass times a length is.
pub type MassMoment = uom::si::Quantity<ISQ<P1, P1, Z0, Z0, Z0, Z0, Z0>, SI<f64>, f64>;

/// A quantity whose dimension, speed kind and SI value can be read off its type.
///
/// # Example
/// ```
/// use engine::quantity::{Dimension, Force, SpeedKind, TrueAirspeed, Typed};
/// assert_eq!(Force::DIMENSION, Dimension::FORCE);
/// assert_eq!(TrueAirspeed::SPEED_KIND, Some(SpeedKind::True));
/// assert_eq!(Force::from_si(12.5).si(), 12.5);
/// ```
pub trait Typed: Copy {
    /// The dimension, with the angle beside it.
    const DIMENSION: Dimension;
    /// Which airspeed the type is, if it is one.
    const SPEED_KIND: Option<SpeedKind> = None;
    /// Whether the type is the difference of two temperatures.
    const DIFFERENCE: bool = false;

    /// The quantity of that many SI units.
    fn from_si(value: f64) -> Self;
    /// The number of SI units. A NaN stands for 'no value'.
    fn si(self) -> f64;
}

/// What the kind of a `uom` type says beside the dimension.
pub trait Kinded {
    /// Whether the kind is that of angles and of what is made with them.
    const ANGULAR: bool = false;
    /// Whether the kind is that of absolute temperatures.
    const ABSOLUTE: bool = false;
}

impl Kinded for dyn uom::Kind {}
impl Kinded for dyn uom::si::marker::KinematicViscosityKind {}
impl Kinded for dyn uom::si::marker::SurfaceTensionKind {}
impl Kinded for dyn uom::si::marker::AngleKind {
    const ANGULAR: bool = true;
}
impl Kinded for dyn uom::si::marker::TemperatureKind {
    const ABSOLUTE: bool = true;
}

/// The exponents of a `uom` dimension as a value.
///
/// The crate marks torque as angular to keep it from energy; a moment of a force has no angle in it, so only what has
/// no mass is counted as made with an angle.
const fn dimension_of<D: uom::si::Dimension + ?Sized>() -> Dimension
where
    D::Kind: Kinded,
{
    let angular = <D::Kind as Kinded>::ANGULAR && <D::M as Integer>::I32 == 0;
    Dimension {
        length: Exponent::whole(<D::L as Integer>::I32),
        mass: Exponent::whole(<D::M as Integer>::I32),
        time: Exponent::whole(<D::T as Integer>::I32),
        temperature: Exponent::whole(<D::Th as Integer>::I32),
        angle: if angular {
            Exponent::ONE
        } else {
            Exponent::ZERO
        },
    }
}

impl<D> Typed for uom::si::Quantity<D, SI<f64>, f64>
where
    D: uom::si::Dimension + ?Sized,
    D::Kind: Kinded,
{
    const DIMENSION: Dimension = dimension_of::<D>();
    const DIFFERENCE: bool = <D::Th as Integer>::I32 == 1
        && <D::L as Integer>::I32 == 0
        && <D::M as Integer>::I32 == 0
        && <D::T as Integer>::I32 == 0
        && !<D::Kind as Kinded>::ABSOLUTE;

    fn from_si(value: f64) -> Self {
        Self {
            dimension: std::marker::PhantomData,
            units: std::marker::PhantomData,
            value,
        }
    }

    fn si(self) -> f64 {
        self.value
    }
}

impl Typed for f64 {
    const DIMENSION: Dimension = Dimension::NONE;

    fn from_si(value: f64) -> Self {
        value
    }

    fn si(self) -> f64 {
        self
    }
}

/// A number per angle, such as a lift slope; held per radian.
///
/// # Example
/// ```
/// use engine::quantity::PerAngle;
/// assert!((PerAngle::per_degree(0.1).per_radian() - 5.729_578).abs() < 1e-6);
/// ```
#[derive(Clone, Copy, PartialEq, PartialOrd, Debug)]
pub struct PerAngle(f64);

impl PerAngle {
    /// From a value per radian.
    pub const fn new(per_radian: f64) -> Self {
        Self(per_radian)
    }

    /// From a value per degree.
    pub fn per_degree(value: f64) -> Self {
        Self(value * (180.0 / std::f64::consts::PI))
    }

    /// The value per radian.
    pub const fn per_radian(self) -> f64 {
        self.0
    }
}

impl Typed for PerAngle {
    const DIMENSION: Dimension = Dimension::PER_ANGLE;

    fn from_si(value: f64) -> Self {
        Self(value)
    }

    fn si(self) -> f64 {
        self.0
    }
}

macro_rules! airspeed {
    ($(#[$doc:meta])* $name:ident, $kind:ident) => {
        $(#[$doc])*
        #[derive(Clone, Copy, PartialEq, PartialOrd, Debug)]
        pub struct $name(Velocity);

        impl $name {
            /// From a speed that is known to be of this kind.
            pub const fn new(speed: Velocity) -> Self {
                Self(speed)
            }

            /// The speed without its kind.
            pub const fn speed(self) -> Velocity {
                self.0
            }
        }

        impl Typed for $name {
            const DIMENSION: Dimension = Dimension::SPEED;
            const SPEED_KIND: Option<SpeedKind> = Some(SpeedKind::$kind);

            fn from_si(value: f64) -> Self {
                Self(Velocity::from_si(value))
            }

            fn si(self) -> f64 {
                self.0.si()
            }
        }
    };
}

airspeed! {
    /// Equivalent airspeed: the speed that has the same dynamic pressure at the standard sea-level density.
    EquivalentAirspeed, Equivalent
}
airspeed! {
    /// Calibrated airspeed: the speed that has the same impact pressure at standard sea-level conditions.
    CalibratedAirspeed, Calibrated
}
airspeed! {
    /// True airspeed: the speed relative to the undisturbed air.
    TrueAirspeed, True
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn dimensions_are_read_off_the_types() {
        assert_eq!(Length::DIMENSION, Dimension::LENGTH);
        assert_eq!(Torque::DIMENSION, Dimension::MOMENT);
        assert_eq!(Pressure::DIMENSION, Dimension::PRESSURE);
        assert_eq!(MassDensity::DIMENSION, Dimension::DENSITY);
        assert_eq!(MomentOfInertia::DIMENSION, Dimension::INERTIA);
        assert_eq!(DynamicViscosity::DIMENSION, Dimension::VISCOSITY);
        assert_eq!(
            KinematicViscosity::DIMENSION,
            Dimension::KINEMATIC_VISCOSITY
        );
        assert_eq!(ForcePerLength::DIMENSION, Dimension::FORCE_PER_LENGTH);
        assert_eq!(MassMoment::DIMENSION, Dimension::MASS_MOMENT);
        assert_eq!(Ratio::DIMENSION, Dimension::NONE);
        assert_eq!(f64::DIMENSION, Dimension::NONE);
    }

    #[test]
    fn angles_are_kept_beside() {
        assert_eq!(Angle::DIMENSION, Dimension::ANGLE);
        assert_eq!(AngularVelocity::DIMENSION, Dimension::ANGULAR_SPEED);
        assert_eq!(
            AngularAcceleration::DIMENSION,
            Dimension::ANGULAR_ACCELERATION
        );
        assert_eq!(Frequency::DIMENSION, Dimension::FREQUENCY);
        assert_eq!(PerAngle::DIMENSION, Dimension::PER_ANGLE);
    }

    #[test]
    fn temperatures_and_their_differences_are_told_apart() {
        assert_eq!(
            ThermodynamicTemperature::DIMENSION,
            TemperatureInterval::DIMENSION
        );
        const { assert!(TemperatureInterval::DIFFERENCE && !ThermodynamicTemperature::DIFFERENCE) };
        const { assert!(!Force::DIFFERENCE && !f64::DIFFERENCE) };
    }

    #[test]
    fn derived_types_are_what_arithmetic_gives() {
        let load: ForcePerLength = Force::from_si(6.0) / Length::from_si(2.0);
        assert_eq!(load.si(), 3.0);
        let moment: MassMoment = Mass::from_si(6.0) * Length::from_si(2.0);
        assert_eq!(moment.si(), 12.0);
    }
}
