//! Geometry and mass.

use super::macros::{Argument, at, each, points, positive, within, within_lines};
use super::row::{Compute, Entry, Extreme, Parameter};
use engine::quantity::{Angle, Area, Force, Length, Mass, MomentOfInertia, Torque, Typed};

const GROUP: &str = "Geometry and mass";
const HANDBOOK: &str = "FAA-H-8083-1, Weight and Balance Handbook (definition)";
const CHORD: &str = "the method holds for a mean aerodynamic chord above 0 m";
const LEFT_OUT: &str =
    "An item with an excluded value is left out; the total weight is not to be 0.";

pub(super) static ROWS: &[Entry] = &[
    within_lines(
        &[(0, Extreme::Least)],
        |given| at(given, 0) == 0.0,
        "the method holds for a first station in the plane of symmetry, y = 0: the part inside of it is not counted",
        points!(GROUP, planform::planform(y: [Length], chord: [Length], x_le: [Length]) -> {
            area: Area = "area of both halves",
            span: Length = "from tip to tip",
            aspect_ratio: f64 = "span squared over area",
            taper: f64 = "chord at the last station over that at the first",
            mean_chord: Length = "area over span",
            mac: Length = "mean aerodynamic chord",
            y_mac: Length = "its distance from the plane of symmetry",
            x_le_mac: Length = "station of its leading edge",
            x_quarter_mac: Length = "station of its quarter point",
            sweep_quarter: Angle = "sweep of the quarter-chord line from the first station to the last, positive aft",
        };
        "Area, span, aspect ratio and mean aerodynamic chord of a wing or tail.",
        "Straight lines between stations, integrals exact; for the whole wing: mac = 2/S Int c^2 dy; y_mac, x_le_mac and \
         x_quarter_mac are means weighted by the chord. y, chord and x_le are whole lines from root to tip.",
        "Stations that run outward from the plane of symmetry; of a first station off it the part inside is not counted.",
        "definition of the mean aerodynamic chord, as in every handbook",
        "table station | y [ft] | c [ft] | x [ft] ; drawing of the wing\n\
         1 | 0 | 5.0 | 4.9\n\
         2 | 14 | 3.6 | 5.3\n\
         end\n\
         wing = planform(y, c, x over station)\n\
         S [ft^2] = wing.area\n"),
    ),
    within(
        |given| positive(given, [2, 3]),
        "the method holds for a wing area above 0 m^2 and a mean aerodynamic chord above 0 m",
        each!(GROUP, mass::tail_volume(tail_area: Area, arm: Length, wing_area: Area, mac: Length) -> f64;
            "Tail volume coefficient.",
            "tail_area arm/(wing_area mac), the arm from the aerodynamic centre of the airplane less tail to that of the \
             tail, positive aft. An arm from the centre of gravity gives another number of the same name, which moves \
             with the loading.",
            "Everywhere, as a definition.",
            "definition, as in B. Etkin and L. D. Reid, Dynamics of Flight",
            "S_t [ft^2] = 24 ; drawing of the tail\n\
             l_t [ft] = 11.2 ; aerodynamic centre to aerodynamic centre\n\
             V_h = tail_volume(S_t, l_t, 142 ft^2, 4.6 ft)\n"),
    ),
    within(
        |given| positive(given, [2]),
        CHORD,
        each!(GROUP, mass::percent_mac(x: Length, x_le_mac: Length, mac: Length) -> @percent f64;
            "A station as part of the mean aerodynamic chord.",
            "(x - x_le_mac)/mac, positive aft of the leading edge of the mean chord. A fraction: 0.25 is 25 %.",
            "Where mac is not 0.",
            HANDBOOK,
            "x_cg [ft] = 6.20 ; weighing report\n\
             x_le [ft] = 4.95 ; drawing of the wing\n\
             h = percent_mac(x_cg, x_le, 4.6 ft)\n"),
    ),
    within(
        |given| positive(given, [2]),
        CHORD,
        each!(GROUP, mass::station_at_percent(@part_of_chord percent: f64, x_le_mac: Length, mac: Length) -> Length;
            "The station at a part of the mean aerodynamic chord.",
            "x_le_mac + percent mac. The part is a fraction or stands in %: 0.25 or 25 %, and a bare 25 is refused.",
            "Everywhere, as a definition.",
            HANDBOOK,
            "x_le [ft] = 4.95 ; drawing of the wing\n\
             x_ac [ft] = station_at_percent(25 %, x_le, 4.6 ft)\n"),
    ),
    points!(GROUP, mass::center_of_gravity(@force_or_mass weight: [Force], x: [Length], z: [Length]) -> {
            @of_first weight: Force = "sum of the weights, forces or masses as given",
            x: Length = "station of the centre of gravity",
            z: Length = "height of the centre of gravity",
            @of_first_times_length moment: Torque = "sum of weight times station, positive aft of the datum",
        };
        "Total weight and centre of gravity of items.",
        "Sums of moments over the sum of weights; weight, x and z are whole lines, one value for each item, and weights \
         may be forces or masses. One removed is negative. The moment is a loading sheet's, not nose up.",
        LEFT_OUT,
        HANDBOOK,
        "table item | w [lb] | x [ft] | z [ft] ; weighing report\n\
         airframe | 320 | 6.4 | 2.9\n\
         pilot | 190 | 5.6 | 2.6\n\
         end\n\
         cg = center_of_gravity(w, x, z over item)\n\
         x_cg [ft] = cg.x\n"),
    points!(GROUP, mass::pitch_inertia(@mass_or_weight weight: [Mass], x: [Length], z: [Length],
            own: [MomentOfInertia]) -> MomentOfInertia;
        "Mass moment of inertia in pitch about the centre of gravity of the items.",
        "Sum of own + m ((x - x_cg)^2 + (z - z_cg)^2); all are whole lines, one value for each item. A weight is taken \
         as the mass of weight/g0; own is an item's moment of inertia about its own centre of gravity, 0 of a point mass.",
        LEFT_OUT,
        "parallel-axis theorem",
        "table item | m [kg] | x [m] | z [m] | own [kg.m^2] ; weighing report\n\
         airframe | 150 | 1.9 | 0.9 | 180\n\
         pilot | 86 | 1.7 | 0.8 | 4\n\
         end\n\
         I_y [kg.m^2] = pitch_inertia(m, x, z, own over item)\n"),
];
