//! Equivalent, calibrated and true airspeed, and the pressures that belong to them.

use crate::elementary::{exp_m1, ln_1p};
use crate::quantity::constants::{P0, RHO0, sound_speed_0};
use crate::quantity::{
    CalibratedAirspeed, EquivalentAirspeed, KinematicViscosity, Length, MassDensity, Pressure,
    TrueAirspeed, Typed, Velocity,
};

/// Highest Mach number of the isentropic relations: beyond it a shock stands before the pitot tube.
pub const MACH_MAX: f64 = 1.0;

/// Dynamic pressure, 1/2 rho V^2.
///
/// - `speed`: true airspeed.
/// - `density`: density of the air flown through.
///
/// Exact as a definition. Design speeds are equivalent airspeeds: see [`dynamic_pressure_of_eas`].
///
/// Source: definition.
///
/// # Example
/// ```
/// use engine::air::dynamic_pressure;
/// use engine::quantity::{MassDensity, TrueAirspeed, Typed};
/// let q = dynamic_pressure(TrueAirspeed::from_si(50.0), MassDensity::from_si(1.225));
/// assert_eq!(q.si(), 1531.25);
/// ```
pub fn dynamic_pressure(speed: TrueAirspeed, density: MassDensity) -> Pressure {
    Pressure::from_si(0.5 * density.si() * (speed.si() * speed.si()))
}

/// Dynamic pressure of an equivalent airspeed, 1/2 rho0 EAS^2, the same at every altitude.
///
/// - `eas`: equivalent airspeed.
///
/// Exact as a definition.
///
/// Source: definition, with rho0 of ISO 2533:1975.
///
/// # Example
/// ```
/// use engine::air::dynamic_pressure_of_eas;
/// use engine::quantity::{EquivalentAirspeed, Typed};
/// assert_eq!(dynamic_pressure_of_eas(EquivalentAirspeed::from_si(50.0)).si(), 1531.25);
/// ```
pub fn dynamic_pressure_of_eas(eas: EquivalentAirspeed) -> Pressure {
    Pressure::from_si(0.5 * RHO0 * (eas.si() * eas.si()))
}

/// Impact pressure, total less static, of a flow brought to rest without loss.
///
/// - `mach`: Mach number.
/// - `pressure`: static pressure.
///
/// Method: p ((1 + 0.2 M^2)^3.5 - 1), the isentropic relation with a ratio of specific heats of 1.4, evaluated without
/// loss of digits at low speed. Holds from 0 to [`MACH_MAX`]; outside it is NaN: no value.
///
/// Source: isentropic flow, as in NACA Report 1135.
///
/// # Example
/// ```
/// use engine::air::impact_pressure;
/// use engine::quantity::{Pressure, Typed};
/// let p = Pressure::from_si(101_325.0);
/// assert!((impact_pressure(0.5, p).si() - 18_868.0).abs() < 1.0);
/// assert!(impact_pressure(1.2, p).si().is_nan());
/// ```
pub fn impact_pressure(mach: f64, pressure: Pressure) -> Pressure {
    Pressure::from_si(pressure.si() * impact_ratio(mach))
}

/// True airspeed of an equivalent airspeed, EAS sqrt(rho0/rho).
///
/// - `eas`: equivalent airspeed.
/// - `density`: density of the air flown through; where it is not above zero the result is no value.
///
/// Exact as a definition.
///
/// Source: definition, with rho0 of ISO 2533:1975.
///
/// # Example
/// ```
/// use engine::air::tas_of_eas;
/// use engine::quantity::{EquivalentAirspeed, MassDensity, Typed};
/// let tas = tas_of_eas(EquivalentAirspeed::from_si(60.0), MassDensity::from_si(1.225 / 4.0));
/// assert_eq!(tas.si(), 120.0);
/// assert!(tas_of_eas(EquivalentAirspeed::from_si(60.0), MassDensity::from_si(0.0)).si().is_nan());
/// ```
pub fn tas_of_eas(eas: EquivalentAirspeed, density: MassDensity) -> TrueAirspeed {
    TrueAirspeed::from_si(eas.si() / root_of_positive(density.si() / RHO0))
}

/// Equivalent airspeed of a true airspeed, TAS sqrt(rho/rho0).
///
/// - `tas`: true airspeed.
/// - `density`: density of the air flown through; where it is not above zero the result is no value.
///
/// Exact as a definition.
///
/// Source: definition, with rho0 of ISO 2533:1975.
///
/// # Example
/// ```
/// use engine::air::eas_of_tas;
/// use engine::quantity::{MassDensity, TrueAirspeed, Typed};
/// assert_eq!(eas_of_tas(TrueAirspeed::from_si(120.0), MassDensity::from_si(1.225 / 4.0)).si(), 60.0);
/// ```
pub fn eas_of_tas(tas: TrueAirspeed, density: MassDensity) -> EquivalentAirspeed {
    EquivalentAirspeed::from_si(tas.si() * root_of_positive(density.si() / RHO0))
}

/// Equivalent airspeed of a calibrated airspeed at a static pressure.
///
/// - `cas`: calibrated airspeed: indicated, corrected for instrument and position error.
/// - `pressure`: static pressure at the flight altitude.
///
/// Method: impact pressure of the calibrated airspeed at sea level, Mach number of that impact pressure at `pressure`,
/// then M a0 sqrt(p/p0). Holds up to Mach 1, at sea level and at altitude; beyond, below zero speed or without a
/// pressure above zero it is NaN: no value.
///
/// Source: definitions of the airspeeds with the isentropic relation, ratio of specific heats 1.4.
///
/// # Example
/// ```
/// use engine::air::eas_of_cas;
/// use engine::quantity::{CalibratedAirspeed, Pressure, Typed};
/// let eas = eas_of_cas(CalibratedAirspeed::from_si(50.0), Pressure::from_si(101_325.0));
/// assert!((eas.si() - 50.0).abs() < 1e-12);
/// ```
pub fn eas_of_cas(cas: CalibratedAirspeed, pressure: Pressure) -> EquivalentAirspeed {
    let sea_level_mach = cas.si() / sound_speed_0();
    let mach = mach_of_impact_ratio(impact_ratio(sea_level_mach) * (P0 / pressure.si()));
    EquivalentAirspeed::from_si(mach * sound_speed_0() * root_of_positive(pressure.si() / P0))
}

/// Calibrated airspeed of an equivalent airspeed at a static pressure, the inverse of [`eas_of_cas`].
///
/// - `eas`: equivalent airspeed.
/// - `pressure`: static pressure at the flight altitude.
///
/// Holds up to Mach 1, at sea level and at altitude; beyond, below zero speed or without a pressure above zero it is
/// NaN: no value.
///
/// Source: definitions of the airspeeds with the isentropic relation, ratio of specific heats 1.4.
///
/// # Example
/// ```
/// use engine::air::cas_of_eas;
/// use engine::quantity::{EquivalentAirspeed, Pressure, Typed};
/// let cas = cas_of_eas(EquivalentAirspeed::from_si(100.0), Pressure::from_si(50_000.0));
/// assert!(cas.si() > 100.0 && cas.si() < 102.0);
/// ```
pub fn cas_of_eas(eas: EquivalentAirspeed, pressure: Pressure) -> CalibratedAirspeed {
    let mach = eas.si() / (sound_speed_0() * root_of_positive(pressure.si() / P0));
    let sea_level_mach = mach_of_impact_ratio(impact_ratio(mach) * (pressure.si() / P0));
    CalibratedAirspeed::from_si(sea_level_mach * sound_speed_0())
}

/// Mach number, speed over the speed of sound.
///
/// - `speed`: true airspeed.
/// - `sound_speed`: speed of sound in the air flown through.
///
/// Source: definition.
///
/// # Example
/// ```
/// use engine::air::mach_number;
/// use engine::quantity::{TrueAirspeed, Typed, Velocity};
/// assert_eq!(mach_number(TrueAirspeed::from_si(85.0), Velocity::from_si(340.0)), 0.25);
/// ```
pub fn mach_number(speed: TrueAirspeed, sound_speed: Velocity) -> f64 {
    speed.si() / sound_speed.si()
}

/// Reynolds number, V l/nu.
///
/// - `speed`: true airspeed.
/// - `length`: reference length, usually the chord.
/// - `kinematic_viscosity`: dynamic viscosity over density.
///
/// Source: definition.
///
/// # Example
/// ```
/// use engine::air::reynolds_number;
/// use engine::quantity::{KinematicViscosity, Length, TrueAirspeed, Typed};
/// let (speed, chord) = (TrueAirspeed::from_si(40.0), Length::from_si(1.5));
/// let re = reynolds_number(speed, chord, KinematicViscosity::from_si(1.5e-5));
/// assert!((re - 4e6).abs() < 1e-6);
/// ```
pub fn reynolds_number(
    speed: TrueAirspeed,
    length: Length,
    kinematic_viscosity: KinematicViscosity,
) -> f64 {
    speed.si() * length.si() / kinematic_viscosity.si()
}

/// Impact pressure over static pressure, (1 + 0.2 M^2)^3.5 - 1; NaN outside the isentropic relation.
fn impact_ratio(mach: f64) -> f64 {
    if (0.0..=MACH_MAX).contains(&mach) {
        exp_m1(3.5 * ln_1p(0.2 * (mach * mach)))
    } else {
        f64::NAN
    }
}

/// Mach number of an impact ratio, the inverse of [`impact_ratio`], NaN beyond [`MACH_MAX`].
fn mach_of_impact_ratio(ratio: f64) -> f64 {
    let mach = (5.0 * exp_m1(ln_1p(ratio) / 3.5)).sqrt();
    // A unit or two in the last place must not turn Mach 1 itself away.
    if mach <= MACH_MAX + 1e-12 {
        mach
    } else {
        f64::NAN
    }
}

fn root_of_positive(value: f64) -> f64 {
    if value > 0.0 { value.sqrt() } else { f64::NAN }
}

#[cfg(test)]
mod tests {
    use super::super::atmosphere::standard_atmosphere;
    use super::*;
    use crate::quantity::TemperatureInterval;
    use approx::{assert_abs_diff_eq, assert_relative_eq};

    const KNOT: f64 = 1852.0 / 3600.0;

    fn air_at_feet(feet: f64) -> crate::air::StandardAtmosphere {
        standard_atmosphere(
            Length::from_si(feet * 0.3048),
            TemperatureInterval::from_si(0.0),
        )
    }

    /// Defining relations evaluated in another order: qc = p0 ((1 + 0.2 (CAS/a0)^2)^3.5 - 1), M from qc/p, TAS = M a,
    /// EAS = TAS sqrt(sigma); CAS kt, altitude ft, Mach, EAS kt, TAS kt.
    #[test]
    fn calibrated_speeds_at_altitude() {
        let rows = [
            (100.0, 0.0, 0.151_176_471_7, 100.0, 100.0),
            (120.0, 5_000.0, 0.198_716_897_8, 119.901_547, 129.167_777_1),
            (
                150.0,
                10_000.0,
                0.272_667_870_8,
                149.572_117_6,
                174.053_010_4,
            ),
            (
                250.0,
                25_000.0,
                0.603_684_525_9,
                243.257_700_2,
                363.387_469_3,
            ),
        ];
        for (cas, feet, mach, eas, tas) in rows {
            let air = air_at_feet(feet);
            let equivalent = eas_of_cas(CalibratedAirspeed::from_si(cas * KNOT), air.pressure);
            let airspeed = tas_of_eas(equivalent, air.density);
            assert_abs_diff_eq!(equivalent.si() / KNOT, eas, epsilon = 1e-5);
            assert_abs_diff_eq!(airspeed.si() / KNOT, tas, epsilon = 1e-5);
            assert_abs_diff_eq!(mach_number(airspeed, air.sound_speed), mach, epsilon = 2e-8);
        }
    }

    /// The same relations: CAS kt, altitude ft, impact pressure Pa, dynamic pressure Pa.
    #[test]
    fn impact_and_dynamic_pressure() {
        let rows = [
            (24.0, 0.0, 93.400, 93.370),
            (60.0, 5_000.0, 584.761, 583.319),
            (100.0, 10_000.0, 1_630.283, 1_616.840),
            (200.0, 20_000.0, 6_633.546, 6_321.106),
        ];
        for (cas, feet, impact, dynamic) in rows {
            let air = air_at_feet(feet);
            let eas = eas_of_cas(CalibratedAirspeed::from_si(cas * KNOT), air.pressure);
            let tas = tas_of_eas(eas, air.density);
            let mach = mach_number(tas, air.sound_speed);
            assert_abs_diff_eq!(
                impact_pressure(mach, air.pressure).si(),
                impact,
                epsilon = 1e-3
            );
            assert_abs_diff_eq!(dynamic_pressure_of_eas(eas).si(), dynamic, epsilon = 1e-3);
            assert_relative_eq!(
                dynamic_pressure(tas, air.density).si(),
                dynamic_pressure_of_eas(eas).si(),
                max_relative = 1e-14
            );
        }
        // 1/2 rho0 EAS^2 at 100 kt.
        assert_abs_diff_eq!(
            dynamic_pressure_of_eas(EquivalentAirspeed::from_si(100.0 * KNOT)).si(),
            1_621.000_154,
            epsilon = 1e-6
        );
    }

    /// rho V c/mu of the standard atmosphere at sea level, 50 m/s and 1.3 m, checked with the `fluids` library.
    #[test]
    fn reynolds_number_of_a_chord() {
        let air = air_at_feet(0.0);
        let re = reynolds_number(
            TrueAirspeed::from_si(50.0),
            Length::from_si(1.3),
            air.kinematic_viscosity,
        );
        assert_relative_eq!(re, 4_449_864.691, max_relative = 5e-8);
    }

    #[test]
    fn speeds_come_back_from_their_other_kind() {
        for knots in [0.0, 1.0, 24.0, 55.0, 150.0, 300.0] {
            for feet in [-5_000.0, 0.0, 8_000.0, 30_000.0] {
                let air = air_at_feet(feet);
                let cas = CalibratedAirspeed::from_si(knots * KNOT);
                let eas = eas_of_cas(cas, air.pressure);
                assert_relative_eq!(
                    cas_of_eas(eas, air.pressure).si(),
                    cas.si(),
                    max_relative = 1e-14
                );
                let tas = tas_of_eas(eas, air.density);
                assert_relative_eq!(
                    eas_of_tas(tas, air.density).si(),
                    eas.si(),
                    max_relative = 1e-15
                );
            }
        }
    }

    #[test]
    fn outside_the_domain_there_is_no_value() {
        let p = Pressure::from_si(P0);
        assert!(
            eas_of_cas(CalibratedAirspeed::from_si(-1.0), p)
                .si()
                .is_nan()
        );
        assert!(
            eas_of_cas(CalibratedAirspeed::from_si(341.0), p)
                .si()
                .is_nan()
        );
        assert!(
            eas_of_cas(CalibratedAirspeed::from_si(300.0), Pressure::from_si(2e4))
                .si()
                .is_nan()
        );
        assert!(
            eas_of_cas(CalibratedAirspeed::from_si(50.0), Pressure::from_si(0.0))
                .si()
                .is_nan()
        );
        assert!(
            cas_of_eas(EquivalentAirspeed::from_si(50.0), Pressure::from_si(-1.0))
                .si()
                .is_nan()
        );
        assert!(
            impact_pressure(-0.1, p).si().is_nan() && impact_pressure(f64::NAN, p).si().is_nan()
        );
        assert!(
            eas_of_tas(TrueAirspeed::from_si(1.0), MassDensity::from_si(-1.0))
                .si()
                .is_nan()
        );
    }
}
