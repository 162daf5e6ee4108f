//! The standard atmosphere from 2 km below to 32 km above sea level.

use crate::elementary::{exp, ln, power};
use crate::quantity::constants::{
    G0, GAMMA, P0, R_AIR, RHO0, SUTHERLAND_FACTOR, SUTHERLAND_TEMPERATURE, T0,
};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Length, MassDensity, Pressure, TemperatureInterval,
    ThermodynamicTemperature, Typed, Velocity,
};

/// Lowest geopotential altitude of the table, metres.
pub const ALTITUDE_MIN_M: f64 = -2_000.0;
/// Highest geopotential altitude that is coded, metres.
pub const ALTITUDE_MAX_M: f64 = 32_000.0;

/// A layer of constant temperature gradient.
struct Layer {
    base_m: f64,
    top_m: f64,
    base_temperature_k: f64,
    gradient_k_per_m: f64,
}

/// ISO 2533:1975, table of temperature gradients; the lowest layer is counted from sea level in both directions.
const LAYERS: [Layer; 3] = [
    Layer {
        base_m: 0.0,
        top_m: 11_000.0,
        base_temperature_k: T0,
        gradient_k_per_m: -0.0065,
    },
    Layer {
        base_m: 11_000.0,
        top_m: 20_000.0,
        base_temperature_k: 216.65,
        gradient_k_per_m: 0.0,
    },
    Layer {
        base_m: 20_000.0,
        top_m: 32_000.0,
        base_temperature_k: 216.65,
        gradient_k_per_m: 0.001,
    },
];

impl Layer {
    fn temperature(&self, altitude_m: f64) -> f64 {
        self.base_temperature_k + self.gradient_k_per_m * (altitude_m - self.base_m)
    }

    /// Pressure at an altitude of the layer over the pressure at its base.
    fn pressure_ratio(&self, altitude_m: f64) -> f64 {
        if self.gradient_k_per_m == 0.0 {
            exp(-G0 * (altitude_m - self.base_m) / (R_AIR * self.base_temperature_k))
        } else {
            let ratio = self.temperature(altitude_m) / self.base_temperature_k;
            power(ratio, -G0 / (R_AIR * self.gradient_k_per_m))
        }
    }

    /// The altitude at which the density is `ratio` times that at the base.
    fn altitude_of_density_ratio(&self, ratio: f64) -> f64 {
        if self.gradient_k_per_m == 0.0 {
            return self.base_m - R_AIR * self.base_temperature_k / G0 * ln(ratio);
        }
        let exponent = -G0 / (R_AIR * self.gradient_k_per_m) - 1.0;
        let temperature = self.base_temperature_k * power(ratio, 1.0 / exponent);
        self.base_m + (temperature - self.base_temperature_k) / self.gradient_k_per_m
    }
}

/// The state of the air at an altitude of the standard atmosphere.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct StandardAtmosphere {
    /// Air temperature, with the deviation.
    pub temperature: ThermodynamicTemperature,
    /// Static pressure, which the deviation leaves as it is.
    pub pressure: Pressure,
    /// Density of dry air at that temperature and pressure.
    pub density: MassDensity,
    /// Speed of sound.
    pub sound_speed: Velocity,
    /// Dynamic viscosity.
    pub viscosity: DynamicViscosity,
    /// Dynamic viscosity over density.
    pub kinematic_viscosity: KinematicViscosity,
    /// Density over the sea-level density of the standard, sigma.
    pub density_ratio: f64,
    /// Pressure over the sea-level pressure of the standard, delta.
    pub pressure_ratio: f64,
}

/// The standard atmosphere at a geopotential (pressure) altitude, on a standard day or one warmer or colder.
///
/// - `altitude`: geopotential altitude above sea level, which is what an altimeter set to 1013.25 hPa shows.
/// - `isa_deviation`: temperature above that of the standard at the same pressure; 0 K on a standard day.
///
/// Method: layers of constant temperature gradient in hydrostatic balance, perfect gas with a ratio of specific heats of
/// 1.4, Sutherland's viscosity. The density is taken as rho0 times the pressure ratio over the temperature ratio, so that
/// it is exactly 1.225 kg/m^3 at sea level.
///
/// Holds from [`ALTITUDE_MIN_M`] to [`ALTITUDE_MAX_M`]; outside, and where the deviation leaves no temperature above 0 K,
/// every field is NaN: no value. Agrees with the printed tables to all their digits. Tables over geometric height are
/// another thing: 11,000 m there is 10,981 m here.
///
/// Source: ISO 2533:1975; US Standard Atmosphere 1976, identical below 32 km.
///
/// # Example
/// ```
/// use engine::air::standard_atmosphere;
/// use engine::quantity::{Length, TemperatureInterval, Typed};
/// let air = standard_atmosphere(Length::from_si(5000.0), TemperatureInterval::from_si(0.0));
/// assert!((air.pressure.si() - 54_019.9).abs() < 0.1);
/// let none = standard_atmosphere(Length::from_si(40_000.0), TemperatureInterval::from_si(0.0));
/// assert!(none.density.si().is_nan());
/// ```
pub fn standard_atmosphere(
    altitude: Length,
    isa_deviation: TemperatureInterval,
) -> StandardAtmosphere {
    let (standard_temperature, pressure_ratio) = standard_state(altitude.si());
    let warmed = standard_temperature + isa_deviation.si();
    let temperature = if warmed > 0.0 { warmed } else { f64::NAN };
    // The ratio carries a NaN temperature into the fields that do not depend on temperature otherwise.
    let pressure_ratio = if temperature.is_nan() {
        f64::NAN
    } else {
        pressure_ratio
    };
    let density_ratio = pressure_ratio * (T0 / temperature);
    let density = RHO0 * density_ratio;
    let viscosity = SUTHERLAND_FACTOR * temperature * temperature.sqrt()
        / (temperature + SUTHERLAND_TEMPERATURE);
    StandardAtmosphere {
        temperature: Typed::from_si(temperature),
        pressure: Typed::from_si(P0 * pressure_ratio),
        density: Typed::from_si(density),
        sound_speed: Typed::from_si((GAMMA * R_AIR * temperature).sqrt()),
        viscosity: Typed::from_si(viscosity),
        kinematic_viscosity: Typed::from_si(viscosity / density),
        density_ratio,
        pressure_ratio,
    }
}

/// The altitude at which the standard atmosphere has this density.
///
/// - `density`: air density.
///
/// Gives the geopotential altitude. Method: the inverse of [`standard_atmosphere`], exact in each layer. Holds for the
/// densities of -2 to 32 km, 1.478 to 0.01323 kg/m^3; outside it is NaN: no value.
///
/// Source: ISO 2533:1975; US Standard Atmosphere 1976.
///
/// # Example
/// ```
/// use engine::air::density_altitude;
/// use engine::quantity::{MassDensity, Typed};
/// assert_eq!(density_altitude(MassDensity::from_si(1.225)).si(), 0.0);
/// assert!(density_altitude(MassDensity::from_si(0.0)).si().is_nan());
/// ```
pub fn density_altitude(density: MassDensity) -> Length {
    let ratio = density.si() / RHO0;
    let mut base_ratio = 1.0;
    for layer in &LAYERS {
        let altitude = layer.altitude_of_density_ratio(ratio / base_ratio);
        if altitude <= layer.top_m {
            return Length::from_si(if altitude >= ALTITUDE_MIN_M {
                altitude
            } else {
                f64::NAN
            });
        }
        base_ratio *= layer.pressure_ratio(layer.top_m) * layer.base_temperature_k
            / layer.temperature(layer.top_m);
    }
    Length::from_si(f64::NAN)
}

/// Temperature and pressure ratio of the standard day, NaN outside the table.
fn standard_state(altitude_m: f64) -> (f64, f64) {
    if altitude_m.is_nan() || altitude_m < ALTITUDE_MIN_M {
        return (f64::NAN, f64::NAN);
    }
    let mut base_ratio = 1.0;
    for layer in &LAYERS {
        if altitude_m <= layer.top_m {
            return (
                layer.temperature(altitude_m),
                base_ratio * layer.pressure_ratio(altitude_m),
            );
        }
        base_ratio *= layer.pressure_ratio(layer.top_m);
    }
    (f64::NAN, f64::NAN)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_abs_diff_eq, assert_relative_eq};

    fn at(altitude_m: f64) -> StandardAtmosphere {
        standard_atmosphere(
            Length::from_si(altitude_m),
            TemperatureInterval::from_si(0.0),
        )
    }

    /// Layers of ISO 2533 / ICAO Doc 7488 worked out from their definition, checked with the `fluids` library's US 1976
    /// atmosphere at the matching geometric height.
    #[test]
    fn the_layers_follow_their_definition() {
        let rows = [
            (
                5_000.0,
                255.65,
                54_019.888_19,
                0.736_115_547_4,
                320.529_394_4,
                1.628_117_74e-5,
            ),
            (
                11_000.0,
                216.65,
                22_632.040_1,
                0.363_917_648_1,
                295.069_493_5,
                1.421_613_08e-5,
            ),
        ];
        for (altitude, temperature, pressure, density, sound, viscosity) in rows {
            let air = at(altitude);
            assert_relative_eq!(air.temperature.si(), temperature, max_relative = 1e-14);
            assert_relative_eq!(air.pressure.si(), pressure, max_relative = 1e-9);
            assert_relative_eq!(air.density.si(), density, max_relative = 2e-8);
            assert_relative_eq!(air.sound_speed.si(), sound, max_relative = 1e-9);
            assert_relative_eq!(air.viscosity.si(), viscosity, max_relative = 1e-8);
            assert_relative_eq!(
                air.kinematic_viscosity.si(),
                viscosity / density,
                max_relative = 3e-8
            );
        }
        assert_relative_eq!(
            at(6_000.0).pressure.si(),
            47_181.002_19,
            max_relative = 1e-9
        );
        assert_relative_eq!(
            at(15_000.0).pressure.si(),
            12_044.552_81,
            max_relative = 1e-9
        );
    }

    /// The same definition at altitudes in feet: density and pressure ratio.
    #[test]
    fn ratios_at_flight_levels() {
        let rows = [
            (5_000.0, 0.861_670_454_3, 0.832_048_009_3),
            (10_000.0, 0.738_479_096_5, 0.687_704_333_8),
            (25_000.0, 0.448_118_938_2, 0.371_091_934_8),
        ];
        for (feet, sigma, delta) in rows {
            let air = at(feet * 0.3048);
            assert_relative_eq!(air.density_ratio, sigma, max_relative = 2e-8);
            assert_relative_eq!(air.pressure_ratio, delta, max_relative = 1e-9);
        }
    }

    /// Table over geometric height in the Mechanical Engineers' Handbook, vol. 4 (geopotential heights from
    /// H = r Z/(r + Z), r = 6,356,766 m): temperature K, pressure bar, density kg/m^3, speed of sound m/s.
    #[test]
    fn a_printed_table_is_met() {
        let rows = [
            (1_000.0, 281.65, 0.8988, 1.1117, 336.4),
            (5_000.0, 255.68, 0.5405, 0.7364, 320.6),
            (10_000.0, 223.25, 0.2650, 0.4135, 299.5),
            (12_000.0, 216.65, 0.1940, 0.3119, 295.1),
        ];
        for (z, temperature, bar, density, sound) in rows {
            let air = at(6_356_766.0 * z / (6_356_766.0 + z));
            assert_abs_diff_eq!(air.temperature.si(), temperature, epsilon = 0.006);
            assert_abs_diff_eq!(air.pressure.si() / 1e5, bar, epsilon = 6e-5);
            assert_abs_diff_eq!(air.density.si(), density, epsilon = 6e-5);
            assert_abs_diff_eq!(air.sound_speed.si(), sound, epsilon = 0.06);
        }
    }

    /// US Standard Atmosphere 1976, layer boundaries at 20 and 32 km: 5474.89 Pa and 868.02 Pa, 228.65 K (values from
    /// memory, sure). Its gas constant is 7e-7 larger than that of ISO 2533, and six digits are printed.
    #[test]
    fn the_upper_boundaries_are_the_standards() {
        assert_relative_eq!(at(20_000.0).pressure.si(), 5_474.89, max_relative = 4e-6);
        assert_relative_eq!(at(32_000.0).pressure.si(), 868.02, max_relative = 1e-5);
        assert_abs_diff_eq!(at(32_000.0).temperature.si(), 228.65, epsilon = 1e-12);
    }

    #[test]
    fn sea_level_is_exact() {
        let air = at(0.0);
        assert_eq!(air.temperature.si(), 288.15);
        assert_eq!(air.pressure.si(), 101_325.0);
        assert_eq!(air.density.si(), 1.225);
        assert_eq!((air.density_ratio, air.pressure_ratio), (1.0, 1.0));
    }

    /// Perfect gas: on a day 15 K and 20 K warmer than standard. Density altitudes from
    /// (T0/L)(sigma^(1/(n-1)) - 1).
    #[test]
    fn warm_days_are_thinner() {
        for (feet, deviation, density, altitude_ft) in [
            (0.0, 15.0, 1.164_386_46, 1_723.934_849),
            (5_000.0, 20.0, 0.984_762_244_5, 7_272.036_577),
        ] {
            let air = standard_atmosphere(
                Length::from_si(feet * 0.3048),
                TemperatureInterval::from_si(deviation),
            );
            assert_relative_eq!(air.density.si(), density, max_relative = 2e-8);
            assert_abs_diff_eq!(
                density_altitude(air.density).si() / 0.3048,
                altitude_ft,
                epsilon = 0.01
            );
        }
    }

    /// US Standard Atmosphere 1976: mu = 1.458e-6 T^1.5/(T + 110.4), 1.789380278e-5 Pa s at 288.15 K.
    #[test]
    fn viscosity_is_sutherlands() {
        assert_relative_eq!(
            at(0.0).viscosity.si(),
            1.789_380_278e-5,
            max_relative = 1e-9
        );
    }

    #[test]
    fn density_altitude_undoes_the_atmosphere() {
        for step in -20..=320 {
            let altitude = f64::from(step) * 100.0;
            assert_abs_diff_eq!(
                density_altitude(at(altitude).density).si(),
                altitude,
                epsilon = 1e-6
            );
        }
    }

    #[test]
    fn outside_the_table_there_is_no_value() {
        for altitude in [-2_000.5, 32_000.5, f64::NAN, f64::INFINITY] {
            let air = at(altitude);
            assert!(
                air.temperature.si().is_nan()
                    && air.pressure.si().is_nan()
                    && air.pressure_ratio.is_nan()
            );
        }
        for density in [-1.0, 0.0, 0.013, 1.48, f64::NAN, f64::INFINITY] {
            assert!(
                density_altitude(MassDensity::from_si(density))
                    .si()
                    .is_nan(),
                "{density}"
            );
        }
        let frozen =
            standard_atmosphere(Length::from_si(0.0), TemperatureInterval::from_si(-300.0));
        assert!(frozen.pressure.si().is_nan() && frozen.temperature.si().is_nan());
    }
}
