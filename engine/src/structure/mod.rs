//! Structure and test: shear, bending and torsion along the span, chordwise loads of tail surfaces, bags of a load test.

mod bags;
mod chordwise;
mod from_tip;

pub use bags::{BagPlan, bag_plan};
pub use chordwise::{ChordwiseLoad, Shape, chordwise_load};
pub use from_tip::{bending_from_tip, shear_from_tip, torsion_from_tip};
