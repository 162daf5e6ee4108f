//! The unit in which a result without a bracket is shown.

use super::units::unit_of_text;
use super::{Checker, Typed};
use crate::program::ShownUnit;
use engine::quantity::{Dimension, System, Unit};
use std::rc::Rc;

/// The usual units of a dimension: metric, US, and how it is made of force, mass, length, speed and time. Common
/// practice in load reports.
struct Usual {
    dimension: Dimension,
    metric: &'static str,
    us: &'static str,
    /// Powers of a force, mass and length unit of the sheet's own `units` that make the same dimension.
    force: i32,
    mass: i32,
    length: i32,
}

const fn usual(
    dimension: Dimension,
    metric: &'static str,
    us: &'static str,
    powers: [i32; 3],
) -> Usual {
    Usual {
        dimension,
        metric,
        us,
        force: powers[0],
        mass: powers[1],
        length: powers[2],
    }
}

const USUAL: &[Usual] = &[
    usual(Dimension::LENGTH, "m", "ft", [0, 0, 1]),
    usual(Dimension::AREA, "m^2", "ft^2", [0, 0, 2]),
    usual(Dimension::VOLUME, "m^3", "ft^3", [0, 0, 3]),
    usual(Dimension::SECOND_MOMENT_OF_AREA, "m^4", "ft^4", [0, 0, 4]),
    usual(Dimension::PER_LENGTH, "/m", "/ft", [0, 0, -1]),
    usual(Dimension::MASS, "kg", "slug", [0, 1, 0]),
    usual(Dimension::TIME, "s", "s", [0, 0, 0]),
    usual(Dimension::SPEED, "m/s", "kt", [0, 0, 0]),
    usual(Dimension::ACCELERATION, "m/s^2", "ft/s^2", [0, 0, 0]),
    usual(Dimension::FORCE, "N", "lb", [1, 0, 0]),
    usual(Dimension::PRESSURE, "Pa", "lb/ft^2", [1, 0, -2]),
    usual(Dimension::MOMENT, "N.m", "ft.lb", [1, 0, 1]),
    usual(Dimension::FORCE_PER_LENGTH, "N/m", "lb/ft", [1, 0, -1]),
    usual(Dimension::FORCE_PER_VOLUME, "N/m^3", "lb/ft^3", [1, 0, -3]),
    usual(Dimension::DENSITY, "kg/m^3", "slug/ft^3", [0, 1, -3]),
    usual(Dimension::MASS_PER_AREA, "kg/m^2", "slug/ft^2", [0, 1, -2]),
    usual(Dimension::MASS_PER_LENGTH, "kg/m", "slug/ft", [0, 1, -1]),
    usual(Dimension::MASS_MOMENT, "kg.m", "slug.ft", [0, 1, 1]),
    usual(Dimension::INERTIA, "kg.m^2", "slug.ft^2", [0, 1, 2]),
    usual(Dimension::POWER, "W", "hp", [0, 0, 0]),
    usual(Dimension::TEMPERATURE, "K", "degR", [0, 0, 0]),
    usual(Dimension::FREQUENCY, "/s", "/s", [0, 0, 0]),
    usual(Dimension::ANGULAR_SPEED, "rad/s", "rad/s", [0, 0, 0]),
    usual(
        Dimension::ANGULAR_ACCELERATION,
        "rad/s^2",
        "rad/s^2",
        [0, 0, 0],
    ),
    usual(Dimension::VISCOSITY, "Pa.s", "lb.s/ft^2", [0, 0, 0]),
    usual(Dimension::KINEMATIC_VISCOSITY, "m^2/s", "ft^2/s", [0, 0, 0]),
    usual(Dimension::VOLUME_FLOW, "m^3/s", "ft^3/s", [0, 0, 0]),
    usual(Dimension::MASS_FLOW, "kg/s", "slug/s", [0, 0, 0]),
];

/// The usual units of each dimension, metric and US.
pub(crate) fn usual_units() -> impl Iterator<Item = (Dimension, &'static str)> {
    let both = |row: &'static Usual| [row.metric, row.us].map(|text| (row.dimension, text));
    USUAL.iter().flat_map(both)
}

fn unit_dimension(quantity: &Typed) -> Dimension {
    quantity
        .unit
        .as_ref()
        .map_or(Dimension::NONE, |u| u.unit.dimension)
}

impl Checker<'_> {
    /// The unit of the operands: the first with a unit; of pure numbers only a unit that all of them share.
    pub(crate) fn unit_of_operands(&self, operands: &[&Typed]) -> Option<ShownUnit> {
        let unit = operands.iter().find_map(|t| t.unit.clone())?;
        if unit.unit.is_number() {
            let same = |t: &&Typed| {
                t.number_kind().any || t.unit.as_ref().is_some_and(|u| u.text == unit.text)
            };
            return operands.iter().all(same).then_some(unit);
        }
        Some(unit)
    }

    /// The unit of a product or quotient: that of the one operand with a dimension, where the other is a pure number.
    pub(crate) fn unit_of_product(
        &mut self,
        dimension: Dimension,
        left: &Typed,
        right: &Typed,
    ) -> Option<ShownUnit> {
        if dimension.is_number() {
            return None;
        }
        for (quantity, number) in [(left, right), (right, left)] {
            if number.dimension().is_number()
                && quantity.dimension().without_angle() == dimension.without_angle()
            {
                // So many lb/rad times an angle are no longer so many lb/rad.
                let angle = unit_dimension(quantity).angle;
                let per_angle = !angle.is_zero() && angle != dimension.angle;
                if let Some(unit) = &quantity.unit
                    && !unit.unit.absolute
                    && !per_angle
                {
                    return Some(unit.clone());
                }
                break;
            }
        }
        self.usual_unit(dimension, &[left, right])
    }

    /// The sheet's `units`, else the usual unit of the dimension, else SI base units; none for a pure number.
    pub(crate) fn usual_unit(
        &mut self,
        dimension: Dimension,
        operands: &[&Typed],
    ) -> Option<ShownUnit> {
        if dimension.is_number() {
            return None;
        }
        if let Some(unit) = self
            .prefer
            .iter()
            .find(|u| u.unit.dimension.matches(dimension))
        {
            return Some(unit.clone());
        }
        let plain = dimension.without_angle();
        let row = USUAL
            .iter()
            .find(|row| row.dimension == dimension)
            .or_else(|| {
                USUAL
                    .iter()
                    .find(|row| row.dimension.without_angle() == plain)
            });
        if let Some(unit) = row.and_then(|row| self.preferred_compound(row)) {
            return Some(unit);
        }
        let us = self.is_us(operands);
        match row {
            Some(row) => unit_of_text(if us { row.us } else { row.metric }),
            None => Some(ShownUnit {
                text: Rc::from(plain.symbols().as_str()),
                unit: Unit::si(plain),
            }),
        }
    }

    /// A unit made of the sheet's own force, mass and length units: `in.lb` where it says `units lb in`.
    fn preferred_compound(&self, row: &Usual) -> Option<ShownUnit> {
        if row.force == 0 && row.mass == 0 && row.length == 0 || self.prefer.is_empty() {
            return None;
        }
        let find = |d: Dimension| {
            self.prefer
                .iter()
                .find(|u| u.unit.dimension == d)
                .map(|u| u.text.clone())
        };
        let mut above = Vec::new();
        let mut below = Vec::new();
        for (dimension, power) in [
            (Dimension::LENGTH, row.length),
            (Dimension::FORCE, row.force),
            (Dimension::MASS, row.mass),
        ] {
            if power == 0 {
                continue;
            }
            let name = find(dimension)?;
            let factor = if power.abs() == 1 {
                name.to_string()
            } else {
                format!("{name}^{}", power.abs())
            };
            if power > 0 {
                above.push(factor)
            } else {
                below.push(factor)
            }
        }
        // The trade writes ft.lb but N.m.
        if row.force > 0 && row.length > 0 && find(Dimension::FORCE)?.ends_with('N') {
            above.reverse();
        }
        let stroke = if below.is_empty() {
            String::new()
        } else {
            format!("/{}", below.join("."))
        };
        unit_of_text(&format!("{}{stroke}", above.join(".")))
    }

    /// Whether an operand has a US unit and none a metric one; where none has either, whether the sheet prefers US.
    fn is_us(&self, operands: &[&Typed]) -> bool {
        if operands.iter().any(|t| t.marks.metric) {
            return false;
        }
        operands.iter().any(|t| t.marks.us)
            || self.prefer.iter().any(|u| u.unit.system == System::Us)
    }
}
