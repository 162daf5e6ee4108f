//! The constants of the trade, each with its source.

use super::dimension::Dimension;

/// Ratio of a circle's circumference to its diameter.
pub const PI: f64 = std::f64::consts::PI;
/// Standard acceleration of gravity, m/s^2, exact.
pub const G0: f64 = 9.80665;
/// Air density at sea level of the standard atmosphere, kg/m^3.
pub const RHO0: f64 = 1.225;
/// Air pressure at sea level of the standard atmosphere, Pa.
pub const P0: f64 = 101_325.0;
/// Air temperature at sea level of the standard atmosphere, K.
pub const T0: f64 = 288.15;
/// Specific gas constant of dry air, J/(kg K).
pub const R_AIR: f64 = 287.05287;
/// Ratio of the specific heats of air.
pub const GAMMA: f64 = 1.4;
/// First constant of Sutherland's formula for air, kg/(m s K^(1/2)).
pub const SUTHERLAND_FACTOR: f64 = 1.458e-6;
/// Second constant of Sutherland's formula for air, K.
pub const SUTHERLAND_TEMPERATURE: f64 = 110.4;

/// Speed of sound at sea level of the standard atmosphere, 340.294 m/s: the square root of gamma R T0.
pub fn sound_speed_0() -> f64 {
    (GAMMA * R_AIR * T0).sqrt()
}

/// A constant that a sheet can name.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct ConstantRow {
    /// The name by which it is typed.
    pub name: &'static str,
    /// The value in SI units.
    pub value: f64,
    /// The dimension.
    pub dimension: Dimension,
    /// The unit in which it is usually shown, one that [`super::Unit`] can make of its parts.
    pub unit: &'static str,
    /// What it is.
    pub meaning: &'static str,
    /// Where the value stands.
    pub source: &'static str,
}

/// The constants that a sheet can name.
///
/// # Example
/// ```
/// use engine::quantity::constants;
/// let g0 = constants::rows().iter().find(|row| row.name == "g0").unwrap();
/// assert_eq!(g0.value, 9.80665);
/// ```
pub fn rows() -> &'static [ConstantRow] {
    ROWS
}

const ATMOSPHERE: &str = "ISO 2533:1975; US Standard Atmosphere 1976";

const ROWS: &[ConstantRow] = &[
    ConstantRow {
        name: "pi",
        value: PI,
        dimension: Dimension::NONE,
        unit: "",
        meaning: "circumference of a circle over its diameter",
        source: "definition",
    },
    ConstantRow {
        name: "g0",
        value: G0,
        dimension: Dimension::ACCELERATION,
        unit: "m/s^2",
        meaning: "standard acceleration of gravity",
        source: "BIPM SI Brochure; ISO 2533:1975",
    },
    ConstantRow {
        name: "rho0",
        value: RHO0,
        dimension: Dimension::DENSITY,
        unit: "kg/m^3",
        meaning: "air density at sea level, standard atmosphere",
        source: ATMOSPHERE,
    },
    ConstantRow {
        name: "p0",
        value: P0,
        dimension: Dimension::PRESSURE,
        unit: "Pa",
        meaning: "air pressure at sea level, standard atmosphere",
        source: ATMOSPHERE,
    },
    ConstantRow {
        name: "T0",
        value: T0,
        dimension: Dimension::TEMPERATURE,
        unit: "K",
        meaning: "air temperature at sea level, standard atmosphere",
        source: ATMOSPHERE,
    },
];

#[cfg(test)]
mod tests {
    use super::*;

    /// ISO 2533: the constants are tied by p0 = rho0 R T0; the standard
    /// prints the gas constant to eight digits.
    #[test]
    fn the_atmosphere_constants_agree_with_each_other() {
        assert!((P0 / (R_AIR * T0) / RHO0 - 1.0).abs() < 4e-8);
    }

    /// ISO 2533: speed of sound at sea level 340.294 m/s.
    #[test]
    fn the_speed_of_sound_is_the_standards() {
        assert!((sound_speed_0() - 340.294).abs() < 5e-5);
    }

    #[test]
    fn names_are_unique_and_have_sources() {
        for (i, row) in rows().iter().enumerate() {
            assert!(
                rows()
                    .iter()
                    .skip(i + 1)
                    .all(|other| other.name != row.name)
            );
            assert!(!row.source.is_empty() && row.value.is_finite());
        }
    }
}
