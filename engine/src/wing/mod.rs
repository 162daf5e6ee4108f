//! Wings: lift slope, the lifting line, moments and spanwise loads.

mod lattice;
mod lift_slope;
mod lifting_line;
mod moment;
mod schrenk;
mod surface;

pub use lift_slope::{elliptic_lift_slope, lift_slope};
pub use lifting_line::{LiftingLine, LineResult};
pub use moment::{WingMoment, wing_moment};
pub use schrenk::schrenk_load;
pub use surface::{LiftingSurfaces, Stations, SurfaceResult};
