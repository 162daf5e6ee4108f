//! The air: standard atmosphere, density on other days, airspeeds and pressures of flight.

mod airspeed;
mod atmosphere;
mod moist;

pub use airspeed::{
    MACH_MAX, cas_of_eas, dynamic_pressure, dynamic_pressure_of_eas, eas_of_cas, eas_of_tas,
    impact_pressure, mach_number, reynolds_number, tas_of_eas,
};
pub use atmosphere::{
    ALTITUDE_MAX_M, ALTITUDE_MIN_M, StandardAtmosphere, density_altitude, standard_atmosphere,
};
pub use moist::{DEW_POINT_MAX_K, DEW_POINT_MIN_K, air_density};
