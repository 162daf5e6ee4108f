//! Air: atmosphere, airspeeds, pressures of flight.

use super::macros::{each, field, parameter};
use super::row::{Compute, Entry, Field, Gives, Parameter, Validity, Wants};
use engine::quantity::{
    CalibratedAirspeed, EquivalentAirspeed, KinematicViscosity, Length, MassDensity, Pressure,
    TemperatureInterval, ThermodynamicTemperature, TrueAirspeed, Typed, Velocity,
};

const GROUP: &str = "Air";
const SPEEDS: &str =
    "definitions of the airspeeds with the isentropic relation, ratio of specific heats 1.4";
const SUBSONIC: &str = "below the speed of sound";

pub(super) static ROWS: &[Entry] = &[
    Entry {
        name: "standard_atmosphere",
        group: GROUP,
        parameters: &[
            parameter!(altitude, Length),
            parameter!(isa_deviation, TemperatureInterval, 0.0),
        ],
        fields: &[
            Field {
                absolute: true,
                ..field!(
                    "temperature",
                    ThermodynamicTemperature,
                    None,
                    "air temperature, with the deviation"
                )
            },
            field!("pressure", Pressure, None, "static pressure"),
            field!("density", MassDensity, None, "air density"),
            field!("sound_speed", Velocity, None, "speed of sound"),
            field!(
                "viscosity",
                engine::quantity::DynamicViscosity,
                None,
                "dynamic viscosity"
            ),
            field!(
                "kinematic_viscosity",
                KinematicViscosity,
                None,
                "viscosity over density"
            ),
            field!(
                "density_ratio",
                f64,
                None,
                "density over that of sea level, sigma"
            ),
            field!(
                "pressure_ratio",
                f64,
                None,
                "pressure over that of sea level, delta"
            ),
        ],
        compute: Compute::Each(atmosphere),
        validity: None,
        what: "The standard atmosphere at a geopotential (pressure) altitude.",
        method: "Layers of constant temperature gradient in hydrostatic balance; the deviation changes the temperature \
                 at the same pressure; viscosity by Sutherland's formula.",
        holds: "from -2 to 32 km",
        source: "ISO 2533:1975; US Standard Atmosphere 1976, identical below 32 km",
        example: "h [ft] = 5000 ; field elevation\nair = standard_atmosphere(h)\nrho [slug/ft^3] = air.density\n",
    },
    Entry {
        name: "air_density",
        group: GROUP,
        parameters: &[
            parameter!(pressure, Pressure),
            parameter!(temperature, ThermodynamicTemperature),
            parameter!(dew_point, ThermodynamicTemperature, f64::NAN),
        ],
        fields: &[field!("", MassDensity, None, "")],
        compute: Compute::Each(|given, _, out| {
            let at = |i: usize| given.get(i).copied().unwrap_or(f64::NAN);
            let dew_point = Some(at(2)).filter(|d| !d.is_nan());
            let density = engine::air::air_density(
                Pressure::from_si(at(0)),
                ThermodynamicTemperature::from_si(at(1)),
                dew_point.map(ThermodynamicTemperature::from_si),
            );
            out.fill(density.si());
        }),
        validity: None,
        what: "Density of the air, moist where a dew point is given.",
        method: "Perfect gas; vapour pressure by an improved Magnus form.",
        holds: "dew points from -40 to 50 degC",
        source: "O. A. Alduchov and R. E. Eskridge, Improved Magnus Form Approximation of Saturation Vapor Pressure, \
                 Journal of Applied Meteorology 35 (1996); ISO 2533:1975 for dry air",
        example: "p [hPa] = 980\nT [degC] = 31\nrho [kg/m^3] = air_density(p, T, dew_point: 24 degC)\n",
    },
    each!(GROUP, air::density_altitude(density: MassDensity) -> Length;
        "The altitude at which the standard atmosphere has this density.",
        "The standard atmosphere the other way round.",
        "densities found from -2 to 32 km",
        "ISO 2533:1975; US Standard Atmosphere 1976",
        "rho [kg/m^3] = 1.10\nh [ft] = density_altitude(rho)\n"),
    each!(GROUP, air::dynamic_pressure(speed: TrueAirspeed, density: MassDensity) -> Pressure;
        "Dynamic pressure of a true airspeed.",
        "1/2 rho V^2. An equivalent airspeed passes where the density is rho0.",
        "everywhere",
        "definition",
        "V [KTAS] = 80\nq [lb/ft^2] = dynamic_pressure(V, 0.00220 slug/ft^3)\n"),
    each!(GROUP, air::dynamic_pressure_of_eas(eas: EquivalentAirspeed) -> Pressure;
        "Dynamic pressure of an equivalent airspeed.",
        "1/2 rho0 EAS^2. Design speeds are equivalent airspeeds.",
        "everywhere",
        "definition, with rho0 of ISO 2533:1975",
        "V [KEAS] = 80\nq [lb/ft^2] = dynamic_pressure_of_eas(V)\n"),
    each!(GROUP, air::impact_pressure(mach: f64, pressure: Pressure) -> Pressure;
        "Impact pressure, total less static, which an airspeed indicator is moved by.",
        "Isentropic flow, ratio of specific heats 1.4.",
        SUBSONIC,
        "isentropic flow, as in NACA Report 1135",
        "qc [Pa] = impact_pressure(0.2, p0)\n"),
    each!(GROUP, air::tas_of_eas(eas: EquivalentAirspeed, density: MassDensity) -> TrueAirspeed;
        "True airspeed of an equivalent one.",
        "EAS sqrt(rho0/rho).",
        "everywhere",
        "definition, with rho0 of ISO 2533:1975",
        "V [KEAS] = 80\nVt [KTAS] = tas_of_eas(V, 1.05 kg/m^3)\n"),
    each!(GROUP, air::eas_of_tas(tas: TrueAirspeed, density: MassDensity) -> EquivalentAirspeed;
        "Equivalent airspeed of a true one.",
        "TAS sqrt(rho/rho0).",
        "everywhere",
        "definition, with rho0 of ISO 2533:1975",
        "V [KTAS] = 85\nVe [KEAS] = eas_of_tas(V, 1.05 kg/m^3)\n"),
    each!(GROUP, air::eas_of_cas(cas: CalibratedAirspeed, pressure: Pressure) -> EquivalentAirspeed;
        "Equivalent airspeed of a calibrated one, at a static pressure.",
        "The impact pressure of the calibrated airspeed at sea level, taken at the static pressure.",
        SUBSONIC,
        SPEEDS,
        "V [KCAS] = 100\nair = standard_atmosphere(10000 ft)\nVe [KEAS] = eas_of_cas(V, air.pressure)\n"),
    each!(GROUP, air::cas_of_eas(eas: EquivalentAirspeed, pressure: Pressure) -> CalibratedAirspeed;
        "Calibrated airspeed of an equivalent one, at a static pressure.",
        "The impact pressure of the equivalent airspeed, read at sea level.",
        SUBSONIC,
        SPEEDS,
        "V [KEAS] = 100\nair = standard_atmosphere(10000 ft)\nVc [KCAS] = cas_of_eas(V, air.pressure)\n"),
    each!(GROUP, air::mach_number(speed: TrueAirspeed, sound_speed: Velocity) -> f64;
        "Mach number.",
        "True airspeed over the speed of sound.",
        "everywhere",
        "definition",
        "air = standard_atmosphere(5000 ft)\nV [KTAS] = 110\nM = mach_number(V, air.sound_speed)\n"),
    Entry {
        validity: Some(Validity {
            holds: |given| given.first().copied().unwrap_or(0.0) >= 0.0,
            advice: "a speed is not negative",
        }),
        ..each!(GROUP, air::reynolds_number(speed: TrueAirspeed, length: Length,
            kinematic_viscosity: KinematicViscosity) -> f64;
        "Reynolds number.",
        "True airspeed times length over kinematic viscosity.",
        "everywhere",
        "definition",
        "air = standard_atmosphere(0 m)\nc [m] = 1.3\nV [m/s TAS] = 50\nRe = reynolds_number(V, c, \
         air.kinematic_viscosity)\n")
    },
];

fn atmosphere(given: &[f64], _: &[&str], out: &mut [f64]) {
    let at = |i: usize| given.get(i).copied().unwrap_or(f64::NAN);
    let air = engine::air::standard_atmosphere(
        Length::from_si(at(0)),
        TemperatureInterval::from_si(at(1)),
    );
    let fields = [
        air.temperature.si(),
        air.pressure.si(),
        air.density.si(),
        air.sound_speed.si(),
        air.viscosity.si(),
        air.kinematic_viscosity.si(),
        air.density_ratio,
        air.pressure_ratio,
    ];
    out.iter_mut()
        .zip(fields)
        .for_each(|(out, value)| *out = value);
}
