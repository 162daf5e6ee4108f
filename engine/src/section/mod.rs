//! Sections: mean lines and ordinates of designations, thin-airfoil theory, flaps, vortex panels.

mod designation;
mod flap;
mod panels;
mod spline;
mod thin;

pub use designation::{Designation, SectionPoints, section_points};
pub use flap::{FlapEffect, flap_effect};
pub use panels::{PanelResult, Panels, Trouble};
pub use thin::{ThinSection, thin_section, thin_section_of};
