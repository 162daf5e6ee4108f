//! Air: atmosphere, airspeeds, pressures of flight.

use super::macros::{Argument, at, each, entry, field, parameter, positive, within};
use super::row::{Compute, Entry, Parameter};
use engine::air::{ALTITUDE_MAX_M, ALTITUDE_MIN_M, DEW_POINT_MAX_K, DEW_POINT_MIN_K, MACH_MAX};
use engine::quantity::{
    CalibratedAirspeed, DynamicViscosity, EquivalentAirspeed, KinematicViscosity, Length,
    MassDensity, Pressure, TemperatureInterval, ThermodynamicTemperature, TrueAirspeed, Typed,
    Velocity,
};

const GROUP: &str = "Air";
const STANDARD: &str = "ISO 2533:1975; US Standard Atmosphere 1976, identical below 32 km";
const SPEEDS: &str =
    "definitions of the airspeeds with the isentropic relation, ratio of specific heats 1.4";
const EQUIVALENT: &str = "definition, with rho0 of ISO 2533:1975";
const SUBSONIC: &str = "the method holds from speed 0 to Mach 1, which is 661.5 KCAS (340.3 m/s) at sea level, and for \
                        pressures above 0";
const THIN_AIR: &str = "the method holds for densities above 0 kg/m^3";

pub(super) static ROWS: &[Entry] = &[
    within(
        |given| (ALTITUDE_MIN_M..=ALTITUDE_MAX_M).contains(&at(given, 0)),
        "the atmosphere is coded for altitudes from -2 to 32 km (-6562 to 104,987 ft)",
        each!(GROUP, air::standard_atmosphere(altitude: Length, isa_deviation: TemperatureInterval = 0.0) -> {
                temperature: ThermodynamicTemperature = "air temperature, with the deviation",
                pressure: Pressure = "static pressure, which the deviation leaves as it is",
                density: MassDensity = "density of dry air at that temperature and pressure",
                sound_speed: Velocity = "speed of sound",
                viscosity: DynamicViscosity = "dynamic viscosity",
                kinematic_viscosity: KinematicViscosity = "dynamic viscosity over density",
                density_ratio: f64 = "density over rho0, sigma",
                pressure_ratio: f64 = "pressure over p0, delta",
            };
            "The standard atmosphere at a geopotential (pressure) altitude, on a standard day or one warmer or colder.",
            "Layers of constant temperature gradient in hydrostatic balance, perfect gas, ratio of specific heats 1.4, \
             Sutherland's viscosity. The deviation, a temperature difference positive on a warm day, changes the \
             temperature at the same pressure.",
            "From -2 to 32 km. A table over geometric height is another thing: 11,000 m there is 10,981 m here.",
            STANDARD,
            "h [ft] = 5000 ; pressure altitude of the field\n\
             warm [K] = 15 ; hot day, above the standard\n\
             air = standard_atmosphere(h, warm)\n\
             rho [slug/ft^3] = air.density\n\
             T [degC] = air.temperature\n"),
    ),
    within(
        |given| {
            let dew_point = at(given, 2);
            dew_point.is_nan()
                || (DEW_POINT_MIN_K..=DEW_POINT_MAX_K).contains(&dew_point)
                    && dew_point <= at(given, 1)
        },
        "the method holds for dew points from -40 to 50 degC (-40 to 122 degF) that are not above the temperature",
        // The engine takes the dew point as an option, for which `none` stands.
        entry!(GROUP, air_density,
            &[
                parameter!(pressure: Pressure),
                parameter!(temperature: ThermodynamicTemperature),
                parameter!(dew_point: ThermodynamicTemperature = f64::NAN),
            ],
            &[field!("", MassDensity, "")],
            Compute::Each(|given, _, out| {
                let dew_point = Some(at(given, 2)).filter(|dew_point| !dew_point.is_nan());
                let density: MassDensity = engine::air::air_density(
                    Pressure::from_si(at(given, 0)),
                    ThermodynamicTemperature::from_si(at(given, 1)),
                    dew_point.map(ThermodynamicTemperature::from_si),
                );
                out.fill(density.si());
            });
            "Density of the air at a pressure and temperature, moist where a dew point is given.",
            "Perfect gases: dry air has rho0 (p/p0)(T0/T), and vapour of pressure e makes it thinner by the factor \
             1 - 0.378 e/p. Vapour pressure by an improved Magnus form. Without a dew point the air is dry.",
            "Dew points from -40 to 50 degC, there to 0.1 % of the density. No value where the dew point is above the \
             temperature.",
            "O. A. Alduchov and R. E. Eskridge, Improved Magnus Form Approximation of Saturation Vapor Pressure, \
             Journal of Applied Meteorology 35 (1996); ISO 2533:1975 for dry air",
            "p [hPa] = 980 ; barometer of the field\n\
             T [degC] = 31 ; thermometer of the field\n\
             T_d [degC] = 24 ; dew point\n\
             rho [kg/m^3] = air_density(p, T, T_d)\n"),
    ),
    within(
        |given| {
            engine::air::density_altitude(MassDensity::from_si(at(given, 0)))
                .si()
                .is_finite()
        },
        "the method holds for densities from 0.01323 to 1.478 kg/m^3, those from 32 to -2 km",
        each!(GROUP, air::density_altitude(density: MassDensity) -> Length;
            "The altitude at which the standard atmosphere has this density.",
            "The standard atmosphere the other way round, exact in each layer; a geopotential altitude.",
            "Densities from 0.01323 to 1.478 kg/m^3, those from 32 to -2 km.",
            STANDARD,
            "rho = air_density(980 hPa, 31 degC)\n\
             h [ft] = density_altitude(rho)\n"),
    ),
    within(
        |given| at(given, 1) >= 0.0,
        "the method holds for densities not below 0 kg/m^3",
        each!(GROUP, air::dynamic_pressure(speed: TrueAirspeed, density: MassDensity) -> Pressure;
            "Dynamic pressure of a true airspeed in air of a density.",
            "1/2 rho V^2. An equivalent airspeed passes where the density is rho0; a calibrated one never does.",
            "Everywhere, as a definition. The pressure at a stagnation point is higher: see impact_pressure.",
            "definition",
            "V [KTAS] = 80 ; flight test\n\
             air = standard_atmosphere(5000 ft)\n\
             q [lb/ft^2] = dynamic_pressure(V, air.density)\n"),
    ),
    each!(GROUP, air::dynamic_pressure_of_eas(eas: EquivalentAirspeed) -> Pressure;
        "Dynamic pressure of an equivalent airspeed, the same at every altitude.",
        "1/2 rho0 EAS^2. Design speeds are equivalent airspeeds.",
        "Everywhere, as a definition.",
        EQUIVALENT,
        "V_D [KEAS] = 90 ; design dive speed\n\
         q [lb/ft^2] = dynamic_pressure_of_eas(V_D)\n"),
    within(
        |given| (0.0..=MACH_MAX).contains(&at(given, 0)),
        "the method holds for Mach numbers from 0 to 1",
        each!(GROUP, air::impact_pressure(mach: f64, pressure: Pressure) -> Pressure;
            "Impact pressure, total less static: what moves an airspeed indicator.",
            "p ((1 + 0.2 M^2)^3.5 - 1), a flow brought to rest without loss, ratio of specific heats 1.4.",
            "Mach 0 to 1; beyond it a shock stands before the pitot tube, and there is no value.",
            "isentropic flow, as in NACA Report 1135",
            "air = standard_atmosphere(5000 ft)\n\
             q_c [lb/ft^2] = impact_pressure(0.2, air.pressure)\n"),
    ),
    within(
        |given| positive(given, [1]),
        THIN_AIR,
        each!(GROUP, air::tas_of_eas(eas: EquivalentAirspeed, density: MassDensity) -> TrueAirspeed;
            "True airspeed of an equivalent one.",
            "EAS sqrt(rho0/rho).",
            "Densities above 0.",
            EQUIVALENT,
            "V [KEAS] = 80 ; cruise\n\
             air = standard_atmosphere(5000 ft)\n\
             V_t [KTAS] = tas_of_eas(V, air.density)\n"),
    ),
    within(
        |given| positive(given, [1]),
        THIN_AIR,
        each!(GROUP, air::eas_of_tas(tas: TrueAirspeed, density: MassDensity) -> EquivalentAirspeed;
            "Equivalent airspeed of a true one.",
            "TAS sqrt(rho/rho0).",
            "Densities above 0.",
            EQUIVALENT,
            "V [KTAS] = 85 ; flight test\n\
             air = standard_atmosphere(5000 ft)\n\
             V_e [KEAS] = eas_of_tas(V, air.density)\n"),
    ),
    within(
        |given| {
            let cas = CalibratedAirspeed::from_si(at(given, 0));
            engine::air::eas_of_cas(cas, Pressure::from_si(at(given, 1)))
                .si()
                .is_finite()
        },
        SUBSONIC,
        each!(GROUP, air::eas_of_cas(cas: CalibratedAirspeed, pressure: Pressure) -> EquivalentAirspeed;
            "Equivalent airspeed of a calibrated one, at a static pressure.",
            "The impact pressure that the calibrated airspeed has at sea level gives the Mach number at the static \
             pressure; EAS is that times a0 sqrt(p/p0).",
            "Speed 0 to Mach 1, at sea level and at altitude; no value beyond.",
            SPEEDS,
            "V [KCAS] = 100 ; flight test, position error taken off\n\
             air = standard_atmosphere(10000 ft)\n\
             V_e [KEAS] = eas_of_cas(V, air.pressure)\n"),
    ),
    within(
        |given| {
            let eas = EquivalentAirspeed::from_si(at(given, 0));
            engine::air::cas_of_eas(eas, Pressure::from_si(at(given, 1)))
                .si()
                .is_finite()
        },
        SUBSONIC,
        each!(GROUP, air::cas_of_eas(eas: EquivalentAirspeed, pressure: Pressure) -> CalibratedAirspeed;
            "Calibrated airspeed of an equivalent one, at a static pressure.",
            "The impact pressure at the Mach number EAS/(a0 sqrt(p/p0)), read as a speed at sea level.",
            "Speed 0 to Mach 1, at sea level and at altitude; no value beyond.",
            SPEEDS,
            "V [KEAS] = 100 ; design speed\n\
             air = standard_atmosphere(10000 ft)\n\
             V_c [KCAS] = cas_of_eas(V, air.pressure)\n"),
    ),
    within(
        |given| positive(given, [1]),
        "the method holds for speeds of sound above 0 m/s",
        each!(GROUP, air::mach_number(speed: TrueAirspeed, sound_speed: Velocity) -> f64;
            "Mach number.",
            "True airspeed over the speed of sound in the air flown through.",
            "Everywhere, as a definition.",
            "definition",
            "V [KTAS] = 110 ; cruise\n\
             air = standard_atmosphere(5000 ft)\n\
             mach = mach_number(V, air.sound_speed)\n"),
    ),
    within(
        |given| at(given, 0) >= 0.0 && positive(given, [1, 2]),
        "the method holds for speeds not below 0 m/s, lengths above 0 m and viscosities above 0 m^2/s",
        each!(GROUP, air::reynolds_number(speed: TrueAirspeed, length: Length,
                kinematic_viscosity: KinematicViscosity) -> f64;
            "Reynolds number of a length, usually the chord.",
            "True airspeed times length over kinematic viscosity, which is dynamic viscosity over density.",
            "Everywhere, as a definition.",
            "definition",
            "V [KTAS] = 80 ; cruise\n\
             c [ft] = 4.6 ; mean aerodynamic chord\n\
             air = standard_atmosphere(5000 ft)\n\
             Re = reynolds_number(V, c, air.kinematic_viscosity)\n"),
    ),
];
