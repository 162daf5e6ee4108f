//! Geometry and mass.

use super::macros::{each, field, parameter};
use super::row::{Compute, Entry, Field, Gives, Line, Parameter, Wants};
use engine::quantity::{Area, Dimension, Force, Length, Mass, MomentOfInertia, Typed};

const GROUP: &str = "Geometry and mass";
const HANDBOOK: &str = "FAA-H-8083-1, Aircraft Weight and Balance Handbook (from memory)";

/// Weight of an item: force or mass, one for each label.
const WEIGHT: Parameter = Parameter {
    wants: Wants::ForceOrMass,
    line: true,
    ..parameter!(weight, Force)
};

pub(super) static ROWS: &[Entry] = &[
    each!(GROUP, mass::tail_volume(tail_area: Area, arm: Length, wing_area: Area, mac: Length) -> f64;
        "Tail volume coefficient.",
        "tail_area arm/(wing_area mac), the arm from aerodynamic centre to aerodynamic centre.",
        "everywhere",
        "definition",
        "V = tail_volume(24 ft^2, 11.2 ft, 142 ft^2, 4.6 ft)\n"),
    each!(GROUP, mass::percent_mac(x: Length, x_le_mac: Length, mac: Length) -> f64, shown "%";
        "A station as part of the mean aerodynamic chord.",
        "(x - x_le_mac)/mac: a fraction, 0.25 is 25 %.",
        "where mac is not 0",
        HANDBOOK,
        "p = percent_mac(6.2 ft, 4.95 ft, 4.6 ft)\n"),
    each!(GROUP, mass::station_at_percent(percent: f64, x_le_mac: Length, mac: Length) -> Length;
        "The station at a part of the mean aerodynamic chord.",
        "x_le_mac + percent mac.",
        "everywhere",
        HANDBOOK,
        "x = station_at_percent(25 %, 4.95 ft, 4.6 ft)\n"),
    Entry {
        name: "center_of_gravity",
        group: GROUP,
        parameters: &[
            WEIGHT,
            Parameter {
                line: true,
                ..parameter!(x, Length)
            },
            Parameter {
                line: true,
                ..parameter!(z, Length)
            },
        ],
        fields: &[
            Field {
                gives: Gives::Argument(0, Dimension::NONE),
                ..field!("weight", Force, None, "total")
            },
            field!("x", Length, None, "station of the centre of gravity"),
            field!("z", Length, None, "its height"),
            Field {
                gives: Gives::Argument(0, Dimension::LENGTH),
                ..field!("moment", Force, None, "about the datum")
            },
        ],
        compute: Compute::Lines(|given, _, out| {
            let center = engine::mass::center_of_gravity(
                &typed::<Force>(given, 0),
                &typed(given, 1),
                &typed(given, 2),
            );
            let fields = [
                center.weight.si(),
                center.x.si(),
                center.z.si(),
                center.moment.si(),
            ];
            out.iter_mut()
                .zip(fields)
                .for_each(|(out, value)| *out = vec![value]);
        }),
        validity: None,
        what: "Total weight and centre of gravity of items.",
        method: "Sums of weights and of weights times stations; weight may be force or mass.",
        holds: "where the total is not 0",
        source: HANDBOOK,
        example: "table item | w [lb] | x [ft] | z [ft] ; weighing\nairframe | 320 | 6.4 | 2.9\npilot | 190 | 5.6 | \
                  2.6\nend\ncg = center_of_gravity(w, x, z over item)\n",
    },
    Entry {
        name: "pitch_inertia",
        group: GROUP,
        parameters: &[
            Parameter {
                wants: Wants::MassOrWeight,
                ..WEIGHT
            },
            Parameter {
                line: true,
                ..parameter!(x, Length)
            },
            Parameter {
                line: true,
                ..parameter!(z, Length)
            },
            Parameter {
                line: true,
                ..parameter!(own, MomentOfInertia)
            },
        ],
        fields: &[field!("", MomentOfInertia, None, "")],
        compute: Compute::Lines(inertia),
        validity: None,
        what: "Mass moment of inertia in pitch about the centre of gravity of the items.",
        method: "Sum of mass times squared distance, and of each item's own.",
        holds: "where the total is not 0",
        source: "parallel axes",
        example: "table item | m [kg] | x [m] | z [m] | I [kg.m^2] ; weighing\nairframe | 150 | 1.9 | 0.9 | 180\npilot | \
                  86 | 1.7 | 0.8 | 4\nend\nIyy = pitch_inertia(m, x, z, I over item)\n",
    },
];

/// A line of values as typed quantities.
fn typed<T: Typed>(given: &[Line<'_>], at: usize) -> Vec<T> {
    given
        .get(at)
        .copied()
        .unwrap_or_default()
        .iter()
        .map(|v| T::from_si(*v))
        .collect()
}

/// Weights arrive as the masses that weigh so much.
fn inertia(given: &[Line<'_>], _: &[&str], out: &mut [Vec<f64>]) {
    let inertia = engine::mass::pitch_inertia(
        &typed::<Mass>(given, 0),
        &typed(given, 1),
        &typed(given, 2),
        &typed(given, 3),
    );
    out.iter_mut().for_each(|out| *out = vec![inertia.si()]);
}
