//! Density of dry and moist air.

use crate::elementary::exp;
use crate::quantity::constants::{P0, RHO0, T0};
use crate::quantity::{MassDensity, Pressure, ThermodynamicTemperature, Typed};

/// Lowest dew point of the vapour-pressure formula, -40 degC.
pub const DEW_POINT_MIN_K: f64 = 233.15;
/// Highest dew point of the vapour-pressure formula, 50 degC.
pub const DEW_POINT_MAX_K: f64 = 323.15;

/// Molar mass of water over that of dry air: 18.01528 (NIST) over 28.964420 kg/kmol (ISO 2533:1975).
const MOLAR_MASS_RATIO: f64 = 18.015_28 / 28.964_42;

/// Density of air of a pressure and temperature, moist where a dew point is given.
///
/// - `pressure`: static pressure.
/// - `temperature`: absolute air temperature.
/// - `dew_point`: absolute temperature at which the vapour begins to condense; `None` for dry air.
///
/// Method: perfect gases. Dry air has rho0 (p/p0)(T0/T); vapour of pressure e makes it thinner by the factor
/// 1 - (1 - M_v/M_a) e/p. The vapour pressure is e = 610.94 Pa exp(17.625 t/(243.04 + t)), t the dew point in degC.
///
/// Holds for dew points from [`DEW_POINT_MIN_K`] to [`DEW_POINT_MAX_K`], where the vapour pressure is good to 0.4 % and
/// the density to 0.1 %, compressibility left out included. NaN, no value, where pressure or temperature is not above
/// zero, where the dew point is above the temperature, or where the vapour pressure would exceed the pressure.
///
/// Source: O. A. Alduchov and R. E. Eskridge, Improved Magnus Form Approximation of Saturation Vapor Pressure, Journal of
/// Applied Meteorology 35 (1996); ISO 2533:1975 for dry air.
///
/// # Example
/// ```
/// use engine::air::air_density;
/// use engine::quantity::{Pressure, ThermodynamicTemperature, Typed};
/// let (p, t) = (Pressure::from_si(101_325.0), ThermodynamicTemperature::from_si(303.15));
/// let dry = air_density(p, t, None);
/// let moist = air_density(p, t, Some(ThermodynamicTemperature::from_si(298.15)));
/// assert!(moist < dry);
/// assert!(air_density(p, t, Some(ThermodynamicTemperature::from_si(310.0))).si().is_nan());
/// ```
pub fn air_density(
    pressure: Pressure,
    temperature: ThermodynamicTemperature,
    dew_point: Option<ThermodynamicTemperature>,
) -> MassDensity {
    let (pressure, temperature) = (pressure.si(), temperature.si());
    let vapour = dew_point.map_or(0.0, |dew| vapour_pressure(dew.si()));
    let saturated = dew_point.is_some_and(|dew| dew.si() > temperature);
    if !(pressure > 0.0 && temperature > 0.0 && vapour < pressure) || saturated {
        return MassDensity::from_si(f64::NAN);
    }
    let dry = RHO0 * (pressure / P0) * (T0 / temperature);
    MassDensity::from_si(dry * (1.0 - (1.0 - MOLAR_MASS_RATIO) * vapour / pressure))
}

/// Pressure of saturated vapour over water, Pa; NaN at and below the pole of the formula, -243.04 degC.
fn vapour_pressure(dew_point_k: f64) -> f64 {
    let celsius = dew_point_k - 273.15;
    if celsius > -243.04 {
        610.94 * exp(17.625 * celsius / (243.04 + celsius))
    } else {
        f64::NAN
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn density(pressure: f64, temperature: f64, dew_point: Option<f64>) -> f64 {
        let dew_point = dew_point.map(ThermodynamicTemperature::from_si);
        air_density(
            Pressure::from_si(pressure),
            ThermodynamicTemperature::from_si(temperature),
            dew_point,
        )
        .si()
    }

    #[test]
    fn dry_air_is_that_of_the_standard() {
        assert_eq!(density(101_325.0, 288.15, None), 1.225);
        // Perfect gas with the standard's gas constant: p/(R T).
        assert_relative_eq!(
            density(70_000.0, 260.0, None),
            70_000.0 / (287.05287 * 260.0),
            max_relative = 2e-8
        );
    }

    /// Saturation pressure over water at 20 degC: 2339 Pa (International Association for the Properties of Water and
    /// Steam; value from memory), within the 0.4 % that the formula claims.
    #[test]
    fn vapour_pressure_is_near_the_steam_tables() {
        assert_relative_eq!(vapour_pressure(293.15), 2339.0, max_relative = 4e-3);
        assert_eq!(vapour_pressure(273.15), 610.94);
    }

    /// Mixture of two perfect gases, by partial pressures.
    #[test]
    fn moist_air_is_a_mixture() {
        let vapour = vapour_pressure(295.0);
        let gas = 8314.32;
        let mixture = ((101_325.0 - vapour) * 28.96442 + vapour * 18.01528) / (gas * 300.0);
        assert_relative_eq!(
            density(101_325.0, 300.0, Some(295.0)),
            mixture,
            max_relative = 1e-7
        );
    }

    #[test]
    fn impossible_air_has_no_value() {
        for (pressure, temperature, dew_point) in [
            (0.0, 288.0, None),
            (1e5, 0.0, None),
            (1e5, 288.0, Some(289.0)),
            (1e3, 310.0, Some(309.0)),
            (1e5, 288.0, Some(20.0)),
            (f64::NAN, 288.0, None),
            (1e5, 288.0, Some(f64::NAN)),
        ] {
            assert!(
                density(pressure, temperature, dew_point).is_nan(),
                "{pressure} {temperature} {dew_point:?}"
            );
        }
    }
}
