//! From SI to the unit shown: the only place where a value leaves SI.

use super::{Condition, Extreme};
use crate::axes::Shape;
use crate::program::{Axis, Kind, ShownUnit};
use crate::values;
use engine::quantity::Unit;

/// How the SI values of one quantity are shown.
#[derive(Clone, Copy)]
pub(crate) struct Scale {
    unit: Option<Unit>,
}

impl Scale {
    /// For values of that kind. The zero of a temperature scale counts only for absolute temperatures.
    pub(crate) fn of(unit: Option<&ShownUnit>, kind: Kind) -> Self {
        let absolute = matches!(kind, Kind::Number(number) if number.absolute);
        let unit = unit.map(|shown| shown.unit);
        Scale {
            unit: if absolute {
                unit
            } else {
                unit.map(without_zero)
            },
        }
    }

    /// For both sides of a comparison: a temperature scale is only shown for absolute temperatures.
    pub(super) fn of_sides(unit: Option<&ShownUnit>) -> Self {
        Scale {
            unit: unit.map(|shown| shown.unit),
        }
    }

    /// The same for differences of such values.
    pub(super) fn of_differences(self) -> Self {
        Scale {
            unit: self.unit.map(without_zero),
        }
    }

    /// The number shown, `None` for whatever is no finite number. Never -0.
    pub(crate) fn number(self, si: f64) -> Option<f64> {
        let shown = match self.unit {
            Some(unit) if si.is_finite() => unit.from_si(si),
            _ => si,
        };
        shown.is_finite().then_some(shown + 0.0)
    }
}

/// The unit as it counts differences.
fn without_zero(unit: Unit) -> Unit {
    Unit {
        offset: 0.0,
        absolute: false,
        ..unit
    }
}

/// The labels of one condition of a shape.
pub(crate) fn condition(axes: &[Axis], shape: &Shape, condition: usize) -> Condition {
    let label = |(id, index): (&crate::axes::AxisId, usize)| {
        let axis = axes.get(id.0 as usize)?;
        Some((axis.name.clone(), axis.labels.get(index)?.clone()))
    };
    let indices = shape.indices(condition);
    Condition(shape.axes.iter().zip(indices).filter_map(label).collect())
}

/// An extreme in the unit shown.
pub(super) fn extreme(
    axes: &[Axis],
    shape: &Shape,
    scale: Scale,
    found: Option<values::Extreme>,
) -> Option<Extreme> {
    let found = found?;
    Some(Extreme {
        value: scale.number(found.value)?,
        condition: condition(axes, shape, found.condition),
    })
}
