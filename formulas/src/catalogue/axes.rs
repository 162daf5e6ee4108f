//! The functions that run along an axis or over several. The language works them out itself; their rows are for readers.

use super::AXES as GROUP;
use super::macros::{Argument, language};
use super::row::{Compute, Entry, Parameter, Wants};

const DEFINITION: &str = "definition";
const EVERYWHERE: &str = "Everywhere.";
const LEAST_SQUARES: &str = "least squares";
const ANY: Wants = Wants::Any;
const CONDITION: Wants = Wants::Condition;

/// A spanwise load, for the examples.
macro_rules! spanwise {
    ($last:literal) => {
        concat!(
            "vary y [m]: 0 | 2 | 4\n",
            "w [N/m] by y = 900 | 800 | 300 ; lift of one half\n",
            $last
        )
    };
}

/// Tail loads of several points, for the examples.
macro_rules! loads {
    ($last:literal) => {
        concat!(
            "vary point: A | D | G\n",
            "P_t [lb] by point = -12 | -33 | 8 ; sheet 5\n",
            $last
        )
    };
}

pub(super) static ROWS: &[Entry] = &[
    language!(GROUP, sum(x: ANY);
        "Sum over axes.",
        "Over the axes behind `over`, or over all; in a fixed order, missing values skipped.",
        "Over axes that the value varies over.",
        DEFINITION,
        loads!("total = sum(P_t over point)\n")),
    language!(GROUP, mean(x: ANY);
        "Mean over axes.",
        "Sum over the number of values, missing ones skipped.",
        EVERYWHERE,
        DEFINITION,
        loads!("middle = mean(P_t over point)\n")),
    language!(GROUP, count(x: ANY);
        "How many.",
        "Of numbers those that have a value; of a condition the cases in which it is true. A pure number.",
        "Over axes that the value varies over.",
        DEFINITION,
        loads!("downward = count(P_t < 0 over point)\n")),
    language!(GROUP, rms(x: ANY);
        "Root of the mean of the squares.",
        "Missing values are skipped.",
        EVERYWHERE,
        DEFINITION,
        loads!("size = rms(P_t over point)\n")),
    language!(GROUP, all(x: CONDITION);
        "Whether a condition holds everywhere.",
        "Over the axes behind `over`, or over all; missing values are skipped.",
        EVERYWHERE,
        DEFINITION,
        loads!("small = all(abs(P_t) < 50 lb over point)\n")),
    language!(GROUP, any(x: CONDITION);
        "Whether a condition holds anywhere.",
        "Over the axes behind `over`, or over all; missing values are skipped.",
        EVERYWHERE,
        DEFINITION,
        loads!("upward = any(P_t > 0 over point)\n")),
    language!(GROUP, where_max(x: ANY);
        "Label at which the largest value stands.",
        "Along one axis, of equals the first; on an axis of numbers its value. The sign counts.",
        "Over one axis.",
        DEFINITION,
        loads!("worst_up = where_max(P_t over point)\n")),
    language!(GROUP, where_min(x: ANY);
        "Label at which the smallest value stands.",
        "Along one axis, of equals the first; on an axis of numbers its value. The sign counts.",
        "Over one axis.",
        DEFINITION,
        loads!("worst_down = where_min(P_t over point)\n")),
    language!(GROUP, integral(f: ANY, y: ANY);
        "Integral of f over y along an axis.",
        "Straight lines between the points, in the order of the axis. A line that lacks a value has none.",
        "Over one axis.",
        "trapezoidal rule",
        spanwise!("half [N] = integral(w, y over y)\n")),
    language!(GROUP, running_integral(f: ANY, y: ANY);
        "Integral of f over y from the first point on.",
        "0 at the first point; straight lines between the points. Varies over the axis.",
        "Over one axis.",
        "trapezoidal rule",
        spanwise!("inboard [N] = running_integral(w, y over y)\n")),
    language!(GROUP, difference(x: ANY);
        "Each value less the one before along an axis.",
        "None at the first point. Varies over the axis.",
        "Over one axis.",
        DEFINITION,
        spanwise!("step = difference(w over y)\n")),
    language!(GROUP, slope(y: ANY, x: ANY);
        "Slope of the straight line through points.",
        "Least squares of y over x; points that lack a value are left out.",
        "Two points or more, of different x.",
        LEAST_SQUARES,
        "vary alpha [deg]: -4 | 0 | 4\n\
         CL by alpha = -0.05 | 0.28 | 0.61 ; wind tunnel\n\
         a [/deg] = slope(CL, alpha over alpha)\n"),
    language!(GROUP, intercept(y: ANY, x: ANY);
        "Where the straight line through points meets x = 0.",
        "Least squares of y over x; points that lack a value are left out.",
        "Two points or more, of different x.",
        LEAST_SQUARES,
        "vary alpha [deg]: -4 | 0 | 4\n\
         CL by alpha = -0.05 | 0.28 | 0.61 ; wind tunnel\n\
         CL_0 = intercept(CL, alpha over alpha)\n"),
];
