//! The dimension of a quantity as a value, with the plane angle kept beside it.

use super::exponent::Exponent;

/// The exponents of length, mass, time and temperature, and beside them that of the plane angle.
///
/// Two dimensions are equal when every exponent is, the angle included; [`Dimension::matches`] leaves the angle aside.
///
/// # Example
/// ```
/// use engine::quantity::Dimension;
/// let pressure = Dimension::FORCE.over(Dimension::AREA).unwrap();
/// assert_eq!(pressure, Dimension::PRESSURE);
/// assert_eq!(pressure.name(), Some("pressure"));
/// assert_eq!(Dimension::MOMENT.symbols(), "kg.m^2/s^2");
/// assert!(Dimension::LENGTH.over(Dimension::LENGTH).unwrap().is_number());
/// ```
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub struct Dimension {
    /// Exponent of length.
    pub length: Exponent,
    /// Exponent of mass.
    pub mass: Exponent,
    /// Exponent of time.
    pub time: Exponent,
    /// Exponent of thermodynamic temperature.
    pub temperature: Exponent,
    /// Exponent of the plane angle, kept beside the dimension: 1 for an angle, -1 for a value per angle.
    pub angle: Exponent,
}

impl Dimension {
    /// A pure number.
    pub const NONE: Self = Self::of(0, 0, 0, 0, 0);
    /// Length.
    pub const LENGTH: Self = Self::of(1, 0, 0, 0, 0);
    /// Area.
    pub const AREA: Self = Self::of(2, 0, 0, 0, 0);
    /// Volume.
    pub const VOLUME: Self = Self::of(3, 0, 0, 0, 0);
    /// Second moment of area.
    pub const SECOND_MOMENT_OF_AREA: Self = Self::of(4, 0, 0, 0, 0);
    /// One over a length.
    pub const PER_LENGTH: Self = Self::of(-1, 0, 0, 0, 0);
    /// Mass.
    pub const MASS: Self = Self::of(0, 1, 0, 0, 0);
    /// Time.
    pub const TIME: Self = Self::of(0, 0, 1, 0, 0);
    /// Thermodynamic temperature, absolute or a difference.
    pub const TEMPERATURE: Self = Self::of(0, 0, 0, 1, 0);
    /// Plane angle.
    pub const ANGLE: Self = Self::of(0, 0, 0, 0, 1);
    /// A number per angle, as a lift slope is.
    pub const PER_ANGLE: Self = Self::of(0, 0, 0, 0, -1);
    /// Speed.
    pub const SPEED: Self = Self::of(1, 0, -1, 0, 0);
    /// Acceleration.
    pub const ACCELERATION: Self = Self::of(1, 0, -2, 0, 0);
    /// Force.
    pub const FORCE: Self = Self::of(1, 1, -2, 0, 0);
    /// Pressure, stress, and wing loading as a force per area.
    pub const PRESSURE: Self = Self::of(-1, 1, -2, 0, 0);
    /// Moment of a force; energy has the same dimension.
    pub const MOMENT: Self = Self::of(2, 1, -2, 0, 0);
    /// Density.
    pub const DENSITY: Self = Self::of(-3, 1, 0, 0, 0);
    /// Power.
    pub const POWER: Self = Self::of(2, 1, -3, 0, 0);
    /// Force per length, as a spanwise load.
    pub const FORCE_PER_LENGTH: Self = Self::of(0, 1, -2, 0, 0);
    /// Force per volume, as specific weight.
    pub const FORCE_PER_VOLUME: Self = Self::of(-2, 1, -2, 0, 0);
    /// Mass moment of inertia.
    pub const INERTIA: Self = Self::of(2, 1, 0, 0, 0);
    /// First moment of a mass.
    pub const MASS_MOMENT: Self = Self::of(1, 1, 0, 0, 0);
    /// Mass per length.
    pub const MASS_PER_LENGTH: Self = Self::of(-1, 1, 0, 0, 0);
    /// Mass per area.
    pub const MASS_PER_AREA: Self = Self::of(-2, 1, 0, 0, 0);
    /// Frequency, without angle.
    pub const FREQUENCY: Self = Self::of(0, 0, -1, 0, 0);
    /// Angle per time.
    pub const ANGULAR_SPEED: Self = Self::of(0, 0, -1, 0, 1);
    /// Angle per time squared.
    pub const ANGULAR_ACCELERATION: Self = Self::of(0, 0, -2, 0, 1);
    /// Dynamic viscosity.
    pub const VISCOSITY: Self = Self::of(-1, 1, -1, 0, 0);
    /// Kinematic viscosity.
    pub const KINEMATIC_VISCOSITY: Self = Self::of(2, 0, -1, 0, 0);
    /// Momentum.
    pub const MOMENTUM: Self = Self::of(1, 1, -1, 0, 0);
    /// Mass per time.
    pub const MASS_FLOW: Self = Self::of(0, 1, -1, 0, 0);
    /// Volume per time.
    pub const VOLUME_FLOW: Self = Self::of(3, 0, -1, 0, 0);

    /// A dimension of whole exponents, in the order length, mass, time, temperature, angle.
    pub const fn of(length: i32, mass: i32, time: i32, temperature: i32, angle: i32) -> Self {
        Self {
            length: Exponent::whole(length),
            mass: Exponent::whole(mass),
            time: Exponent::whole(time),
            temperature: Exponent::whole(temperature),
            angle: Exponent::whole(angle),
        }
    }

    /// The dimension of a product; `None` where an exponent overflows.
    pub fn times(self, other: Self) -> Option<Self> {
        self.combined(other, Exponent::add)
    }

    /// The dimension of a quotient; `None` where an exponent overflows.
    pub fn over(self, other: Self) -> Option<Self> {
        self.combined(other, Exponent::sub)
    }

    /// The dimension of a power; `None` where an exponent overflows.
    pub fn power(self, exponent: Exponent) -> Option<Self> {
        self.combined(self, |own, _| own.mul(exponent))
    }

    /// Whether the two are the same apart from the angle.
    pub fn matches(self, other: Self) -> bool {
        self.without_angle() == other.without_angle()
    }

    /// The same dimension with the angle left off.
    pub const fn without_angle(self) -> Self {
        Self {
            angle: Exponent::ZERO,
            ..self
        }
    }

    /// Whether every exponent but that of the angle is zero.
    pub fn is_number(self) -> bool {
        self.matches(Self::NONE)
    }

    /// Whether this is a plane angle: a number apart from an angle exponent of exactly 1.
    pub fn is_angle(self) -> bool {
        self == Self::ANGLE
    }

    /// The usual name of the dimension, such as `"pressure"`; `None` where it has none.
    pub fn name(self) -> Option<&'static str> {
        NAMES
            .iter()
            .find(|(dimension, _)| *dimension == self)
            .map(|(_, name)| *name)
    }

    /// The dimension in SI base units, such as `"kg.m/s^2"`; `"1"` for a pure number.
    ///
    /// A fractional exponent stands in brackets: `"m^(1/2)"`.
    pub fn symbols(self) -> String {
        let exponents = [
            self.mass,
            self.length,
            self.time,
            self.temperature,
            self.angle,
        ];
        let bases = || exponents.into_iter().zip(["kg", "m", "s", "K", "rad"]);
        let above: Vec<_> = bases()
            .filter(|(e, _)| *e > Exponent::ZERO)
            .map(|(e, base)| raised(base, e))
            .collect();
        let below: Vec<_> = bases()
            .filter(|(e, _)| *e < Exponent::ZERO)
            .filter_map(|(e, base)| Exponent::ZERO.sub(e).map(|e| raised(base, e)))
            .collect();
        let above = if above.is_empty() {
            "1".to_owned()
        } else {
            above.join(".")
        };
        if below.is_empty() {
            above
        } else {
            format!("{above}/{}", below.join("."))
        }
    }

    fn combined(
        self,
        other: Self,
        act: impl Fn(Exponent, Exponent) -> Option<Exponent>,
    ) -> Option<Self> {
        Some(Self {
            length: act(self.length, other.length)?,
            mass: act(self.mass, other.mass)?,
            time: act(self.time, other.time)?,
            temperature: act(self.temperature, other.temperature)?,
            angle: act(self.angle, other.angle)?,
        })
    }
}

fn raised(base: &str, exponent: Exponent) -> String {
    if exponent == Exponent::ONE {
        base.to_owned()
    } else {
        format!("{base}^{exponent}")
    }
}

/// The names that findings and reports use.
const NAMES: &[(Dimension, &str)] = &[
    (Dimension::NONE, "pure number"),
    (Dimension::LENGTH, "length"),
    (Dimension::AREA, "area"),
    (Dimension::VOLUME, "volume"),
    (Dimension::SECOND_MOMENT_OF_AREA, "second moment of area"),
    (Dimension::PER_LENGTH, "number per length"),
    (Dimension::MASS, "mass"),
    (Dimension::TIME, "time"),
    (Dimension::TEMPERATURE, "temperature"),
    (Dimension::ANGLE, "angle"),
    (Dimension::PER_ANGLE, "number per angle"),
    (Dimension::SPEED, "speed"),
    (Dimension::ACCELERATION, "acceleration"),
    (Dimension::FORCE, "force"),
    (Dimension::PRESSURE, "pressure"),
    (Dimension::MOMENT, "moment"),
    (Dimension::DENSITY, "density"),
    (Dimension::POWER, "power"),
    (Dimension::FORCE_PER_LENGTH, "force per length"),
    (Dimension::FORCE_PER_VOLUME, "force per volume"),
    (Dimension::INERTIA, "mass moment of inertia"),
    (Dimension::MASS_MOMENT, "first moment of mass"),
    (Dimension::MASS_PER_LENGTH, "mass per length"),
    (Dimension::MASS_PER_AREA, "mass per area"),
    (Dimension::FREQUENCY, "frequency"),
    (Dimension::ANGULAR_SPEED, "angular speed"),
    (Dimension::ANGULAR_ACCELERATION, "angular acceleration"),
    (Dimension::VISCOSITY, "viscosity"),
    (Dimension::KINEMATIC_VISCOSITY, "kinematic viscosity"),
    (Dimension::MOMENTUM, "momentum"),
    (Dimension::MASS_FLOW, "mass flow"),
    (Dimension::VOLUME_FLOW, "volume flow"),
];

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn products_quotients_and_powers_follow_the_laws() {
        let d = Dimension::FORCE;
        assert_eq!(d.times(Dimension::LENGTH), Some(Dimension::MOMENT));
        assert_eq!(d.over(d), Some(Dimension::NONE));
        assert_eq!(d.power(Exponent::whole(2)), d.times(d));
        let half = Exponent::ratio(1, 2).unwrap();
        assert_eq!(Dimension::AREA.power(half), Some(Dimension::LENGTH));
        assert_eq!(
            Dimension::LENGTH
                .power(Exponent::whole(i32::MAX))
                .and_then(|x| x.times(d)),
            None
        );
    }

    #[test]
    fn the_angle_is_kept_beside_the_dimension() {
        assert!(Dimension::PER_ANGLE.is_number() && !Dimension::PER_ANGLE.is_angle());
        assert!(Dimension::ANGULAR_SPEED.matches(Dimension::FREQUENCY));
        assert_ne!(Dimension::ANGULAR_SPEED, Dimension::FREQUENCY);
        assert_eq!(
            Dimension::ANGLE.times(Dimension::PER_ANGLE),
            Some(Dimension::NONE)
        );
    }

    #[test]
    fn symbols_spell_base_units() {
        assert_eq!(Dimension::NONE.symbols(), "1");
        assert_eq!(Dimension::PRESSURE.symbols(), "kg/m.s^2");
        assert_eq!(Dimension::FREQUENCY.symbols(), "1/s");
        assert_eq!(
            Dimension::LENGTH
                .power(Exponent::ratio(1, 2).unwrap())
                .unwrap()
                .symbols(),
            "m^(1/2)"
        );
        assert_eq!(Dimension::PER_ANGLE.symbols(), "1/rad");
    }

    #[test]
    fn names_are_unique() {
        for (i, (dimension, name)) in NAMES.iter().enumerate() {
            assert_eq!(dimension.name(), Some(*name));
            assert!(
                NAMES.iter().skip(i + 1).all(|(_, other)| other != name),
                "{name}"
            );
        }
    }
}
