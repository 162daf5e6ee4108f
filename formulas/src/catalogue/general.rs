//! General mathematics, and the functions of axes. The language works them out itself; their rows are for readers.

use super::GENERAL;
use super::row::{Compute, Entry, Parameter, Wants};
use engine::quantity::Dimension;

const AXES: &str = "Along and over axes";
const DEFINITION: &str = "definition";
const ANY: &str = "everywhere";

const fn argument(name: &'static str) -> Parameter {
    Parameter {
        name,
        wants: Wants::Dimension(Dimension::NONE),
        speed: None,
        difference: false,
        line: false,
        default: None,
        default_text: None,
        slope: false,
    }
}

static X: [Parameter; 1] = [argument("x")];
static Y_X: [Parameter; 2] = [argument("y"), argument("x")];
static A_B: [Parameter; 2] = [argument("a"), argument("b")];
static BOUNDS: [Parameter; 3] = [argument("x"), argument("low"), argument("high")];
static F_X: [Parameter; 2] = [argument("f"), argument("x")];

const fn row(
    name: &'static str,
    group: &'static str,
    parameters: &'static [Parameter],
    texts: [&'static str; 4],
) -> Entry {
    Entry {
        name,
        group,
        parameters,
        fields: &[],
        compute: Compute::Language,
        validity: None,
        what: texts[0],
        method: texts[1],
        holds: texts[2],
        source: DEFINITION,
        example: texts[3],
    }
}

macro_rules! over {
    ($name:expr, $what:expr, $method:expr, $example:expr) => {
        row(
            $name,
            AXES,
            &X,
            [
                $what,
                $method,
                ANY,
                concat!("table k | v [N]\na | 3\nb | 5\nend\n", $example),
            ],
        )
    };
}

pub(super) static ROWS: &[Entry] = &[
    row(
        "sqrt",
        GENERAL,
        &X,
        [
            "Square root.",
            "Keeps half the dimension.",
            "x not negative",
            "a = sqrt(2 m^2)\n",
        ],
    ),
    row(
        "cbrt",
        GENERAL,
        &X,
        [
            "Cube root.",
            "Keeps a third of the dimension.",
            ANY,
            "a = cbrt(8 m^3)\n",
        ],
    ),
    row(
        "abs",
        GENERAL,
        &X,
        [
            "Magnitude.",
            "Keeps dimension and unit.",
            ANY,
            "a = abs(-3 N)\n",
        ],
    ),
    row(
        "sign",
        GENERAL,
        &X,
        ["1, 0 or -1.", "By the sign of x.", ANY, "a = sign(-3 N)\n"],
    ),
    row(
        "exp",
        GENERAL,
        &X,
        [
            "e to the power of x.",
            "x a pure number.",
            ANY,
            "a = exp(1.5)\n",
        ],
    ),
    row(
        "ln",
        GENERAL,
        &X,
        [
            "Natural logarithm.",
            "x a pure number.",
            "x above 0",
            "a = ln(1.5)\n",
        ],
    ),
    row(
        "log10",
        GENERAL,
        &X,
        [
            "Logarithm to base 10.",
            "x a pure number.",
            "x above 0",
            "a = log10(1.5)\n",
        ],
    ),
    row(
        "sin",
        GENERAL,
        &X,
        [
            "Sine.",
            "An angle, or a number of radians.",
            ANY,
            "a = sin(30 deg)\n",
        ],
    ),
    row(
        "cos",
        GENERAL,
        &X,
        [
            "Cosine.",
            "An angle, or a number of radians.",
            ANY,
            "a = cos(30 deg)\n",
        ],
    ),
    row(
        "tan",
        GENERAL,
        &X,
        [
            "Tangent.",
            "An angle, or a number of radians.",
            ANY,
            "a = tan(30 deg)\n",
        ],
    ),
    row(
        "asin",
        GENERAL,
        &X,
        [
            "Angle of a sine.",
            "From -90 to 90 deg.",
            "x from -1 to 1",
            "a = asin(0.5)\n",
        ],
    ),
    row(
        "acos",
        GENERAL,
        &X,
        [
            "Angle of a cosine.",
            "From 0 to 180 deg.",
            "x from -1 to 1",
            "a = acos(0.5)\n",
        ],
    ),
    row(
        "atan",
        GENERAL,
        &X,
        [
            "Angle of a tangent.",
            "From -90 to 90 deg.",
            ANY,
            "a = atan(1)\n",
        ],
    ),
    row(
        "atan2",
        GENERAL,
        &Y_X,
        [
            "Angle of the direction x, y.",
            "Any two of one dimension.",
            ANY,
            "a = atan2(1 m, 2 m)\n",
        ],
    ),
    row(
        "hypot",
        GENERAL,
        &A_B,
        [
            "Root of the sum of two squares.",
            "Any two of one dimension.",
            ANY,
            "a = hypot(3 N, 4 N)\n",
        ],
    ),
    row(
        "floor",
        GENERAL,
        &X,
        [
            "The whole number below.",
            "x a pure number.",
            ANY,
            "a = floor(2.7)\n",
        ],
    ),
    row(
        "ceil",
        GENERAL,
        &X,
        [
            "The whole number above.",
            "x a pure number.",
            ANY,
            "a = ceil(2.2)\n",
        ],
    ),
    row(
        "round",
        GENERAL,
        &X,
        [
            "The nearest whole number.",
            "A half goes away from 0.",
            ANY,
            "a = round(2.5)\n",
        ],
    ),
    row(
        "min",
        GENERAL,
        &A_B,
        [
            "The smallest.",
            "Of two or more values, element by element; of one, over the axes behind `over`, or over all.",
            ANY,
            "a = min(3 N, 4 N)\n",
        ],
    ),
    row(
        "max",
        GENERAL,
        &A_B,
        [
            "The largest.",
            "Of two or more values, element by element; of one, over the axes behind `over`, or over all.",
            ANY,
            "a = max(3 N, 4 N)\n",
        ],
    ),
    row(
        "clamp",
        GENERAL,
        &BOUNDS,
        [
            "x kept between two bounds.",
            "All of one dimension.",
            "low not above high",
            "a = clamp(7 N, 0, 5 N)\n",
        ],
    ),
    row(
        "has_value",
        GENERAL,
        &X,
        [
            "Whether there is a value.",
            "A condition.",
            ANY,
            "a = has_value(none)\n",
        ],
    ),
    over!(
        "sum",
        "Sum over axes.",
        "In a fixed order; missing values are skipped.",
        "a = sum(v over k)\n"
    ),
    over!(
        "mean",
        "Mean over axes.",
        "Sum over count; missing values are skipped.",
        "a = mean(v over k)\n"
    ),
    over!(
        "count",
        "How many.",
        "Of values those that are there; of a condition those that are true.",
        "a = count(v over k)\n"
    ),
    over!(
        "rms",
        "Root of the mean of squares.",
        "Missing values are skipped.",
        "a = rms(v over k)\n"
    ),
    over!(
        "all",
        "Whether a condition holds everywhere.",
        "Missing values are skipped.",
        "a = all(v > 0 over k)\n"
    ),
    over!(
        "any",
        "Whether a condition holds anywhere.",
        "Missing values are skipped.",
        "a = any(v > 4 N over k)\n"
    ),
    over!(
        "where_max",
        "The label at which the largest stands.",
        "Of equals the first.",
        "a = where_max(v over k)\n"
    ),
    over!(
        "where_min",
        "The label at which the smallest stands.",
        "Of equals the first.",
        "a = where_min(v over k)\n"
    ),
    row(
        "integral",
        AXES,
        &F_X,
        [
            "Integral along an axis.",
            "Straight lines between the points; of a line that lacks a value none.",
            ANY,
            "vary y [m]: 0 | 1 | 3\nw [N/m] by y = 10 | 8 | 0\na = integral(w, y over y)\n",
        ],
    ),
    row(
        "running_integral",
        AXES,
        &F_X,
        [
            "Integral from the first point on.",
            "0 at the first point; straight lines between the points.",
            ANY,
            "vary y [m]: 0 | 1 | 3\nw [N/m] by y = 10 | 8 | 0\na = running_integral(w, y over y)\n",
        ],
    ),
    row(
        "difference",
        AXES,
        &X,
        [
            "Each value less the one before.",
            "None at the first point.",
            ANY,
            "vary y [m]: 0 | 1 | 3\nw [N/m] by y = 10 | 8 | 0\na = difference(w over y)\n",
        ],
    ),
    row(
        "slope",
        AXES,
        &Y_X,
        [
            "Slope of the straight line through points.",
            "Least squares; points that lack a value are left out.",
            "two points or more",
            "vary y [m]: 0 | 1 | 3\nw [N/m] by y = 10 | 8 | 0\na = slope(w, y over y)\n",
        ],
    ),
    row(
        "intercept",
        AXES,
        &Y_X,
        [
            "Where the straight line through points meets x = 0.",
            "Least squares; points that lack a value are left out.",
            "two points or more",
            "vary y [m]: 0 | 1 | 3\nw [N/m] by y = 10 | 8 | 0\na = intercept(w, y over y)\n",
        ],
    ),
];
