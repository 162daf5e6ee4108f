//! Quantities: dimensions and units as values, the unit table, the constants, and the typed quantities of the public
//! functions.

pub mod constants;
mod dimension;
mod exponent;
mod factor;
mod kind;
mod nearest;
mod typed;
mod unit;
pub mod units;

pub use dimension::Dimension;
pub use exponent::Exponent;
pub use factor::Factor;
pub use kind::SpeedKind;
pub use nearest::nearest_unit;
pub use typed::{
    Acceleration, Angle, AngularAcceleration, AngularVelocity, Area, CalibratedAirspeed,
    DynamicViscosity, EquivalentAirspeed, Force, ForcePerLength, Frequency, Kinded,
    KinematicViscosity, Length, Mass, MassDensity, MassMoment, MomentOfInertia, PerAngle,
    PerLength, Power, Pressure, Ratio, TemperatureInterval, ThermodynamicTemperature, Time, Torque,
    TrueAirspeed, Typed, Velocity, Volume,
};
pub use unit::Unit;
pub use units::{Prefix, System, UnitRow};
