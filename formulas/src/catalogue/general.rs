//! General mathematics. The language works it out itself; its rows are for readers.

use super::GENERAL as GROUP;
use super::macros::{Argument, language};
use super::row::{Compute, Entry, Parameter, Wants};
use engine::quantity::Dimension;

const DEFINITION: &str = "definition";
const EVERYWHERE: &str = "Everywhere.";
const NUMBER: Wants = Wants::Dimension(Dimension::NONE);
const ANGLE: Wants = Wants::Dimension(Dimension::ANGLE);
const ANY: Wants = Wants::Any;

pub(super) static ROWS: &[Entry] = &[
    language!(GROUP, sqrt(x: ANY);
        "Square root.",
        "The root of the number and of the dimension: of an area a length.",
        "x not below 0.",
        DEFINITION,
        "S [m^2] = 12.6 ; wing area\n\
         side [m] = sqrt(S)\n"),
    language!(GROUP, cbrt(x: ANY);
        "Cube root.",
        "The root of the number and of the dimension: of a volume a length. Negative of a negative number.",
        EVERYWHERE,
        DEFINITION,
        "volume [m^3] = 8 ; cabin\n\
         side [m] = cbrt(volume)\n"),
    language!(GROUP, abs(x: ANY);
        "Magnitude.",
        "Keeps dimension, unit and kind of airspeed.",
        EVERYWHERE,
        DEFINITION,
        "P [N] = -320 ; tail load\n\
         size = abs(P)\n"),
    language!(GROUP, sign(x: ANY);
        "Sign of a number: 1, 0 or -1.",
        "1 above 0, -1 below, 0 at 0; a pure number.",
        EVERYWHERE,
        DEFINITION,
        "P [N] = -320 ; tail load\n\
         s = sign(P)\n"),
    language!(GROUP, exp(x: NUMBER);
        "e to the power of a number.",
        "x is a pure number, the result too.",
        "x up to about 709; no value where the result is too large for a number.",
        DEFINITION,
        "x = 1.5 ; exponent\n\
         a = exp(-x)\n"),
    language!(GROUP, ln(x: NUMBER);
        "Natural logarithm.",
        "x is a pure number, the result too.",
        "x above 0.",
        DEFINITION,
        "ratio = 1.5 ; pressure ratio\n\
         a = ln(ratio)\n"),
    language!(GROUP, log10(x: NUMBER);
        "Logarithm to the base 10.",
        "x is a pure number, the result too.",
        "x above 0.",
        DEFINITION,
        "Re = 2.4e6 ; Reynolds number\n\
         a = log10(Re)\n"),
    language!(GROUP, sin(x: ANGLE);
        "Sine of an angle.",
        "A pure number counts as radians.",
        EVERYWHERE,
        DEFINITION,
        "alpha [deg] = 6 ; angle of attack\n\
         a = sin(alpha)\n"),
    language!(GROUP, cos(x: ANGLE);
        "Cosine of an angle.",
        "A pure number counts as radians.",
        EVERYWHERE,
        DEFINITION,
        "alpha [deg] = 6 ; angle of attack\n\
         a = cos(alpha)\n"),
    language!(GROUP, tan(x: ANGLE);
        "Tangent of an angle.",
        "A pure number counts as radians.",
        EVERYWHERE,
        DEFINITION,
        "sweep [deg] = 4 ; of the quarter-chord line\n\
         a = tan(sweep)\n"),
    language!(GROUP, asin(x: NUMBER);
        "Angle that has this sine.",
        "An angle from -90 to 90 deg.",
        "x from -1 to 1.",
        DEFINITION,
        "rise = 0.12 ; climb over distance flown\n\
         gamma [deg] = asin(rise)\n"),
    language!(GROUP, acos(x: NUMBER);
        "Angle that has this cosine.",
        "An angle from 0 to 180 deg.",
        "x from -1 to 1.",
        DEFINITION,
        "n = 2 ; load factor of a level turn\n\
         bank [deg] = acos(1/n)\n"),
    language!(GROUP, atan(x: NUMBER);
        "Angle that has this tangent.",
        "An angle from -90 to 90 deg.",
        EVERYWHERE,
        DEFINITION,
        "glide = 12 ; lift over drag\n\
         gamma [deg] = atan(1/glide)\n"),
    language!(GROUP, atan2(y: ANY, x: ANY);
        "Angle of a direction.",
        "Angle from the x axis to the point x, y, positive towards y, from -180 to 180 deg. Both are of one dimension.",
        EVERYWHERE,
        DEFINITION,
        "rise [ft] = 1.2 ; tip above root\n\
         dihedral [deg] = atan2(rise, 15 ft)\n"),
    language!(GROUP, hypot(a: ANY, b: ANY);
        "Length of the hypotenuse.",
        "Root of a^2 + b^2; both are of one dimension, which is kept.",
        EVERYWHERE,
        DEFINITION,
        "N [N] = 300 ; across the fitting\n\
         F [N] = hypot(N, 400 N)\n"),
    language!(GROUP, floor(x: NUMBER);
        "Whole number at or below.",
        "x is a pure number.",
        EVERYWHERE,
        DEFINITION,
        "bags = 12.7 ; load over the weight of one bag\n\
         whole = floor(bags)\n"),
    language!(GROUP, ceil(x: NUMBER);
        "Whole number at or above.",
        "x is a pure number.",
        EVERYWHERE,
        DEFINITION,
        "bags = 12.2 ; load over the weight of one bag\n\
         whole = ceil(bags)\n"),
    language!(GROUP, round(x: NUMBER);
        "Nearest whole number.",
        "x is a pure number; a half goes away from 0.",
        EVERYWHERE,
        DEFINITION,
        "bags = 12.5 ; load over the weight of one bag\n\
         whole = round(bags)\n"),
    language!(GROUP, min(a: ANY, b: ANY);
        "Smallest value.",
        "Of two or more values of one dimension, element by element; of one, over the axes behind `over`, or over all \
         its axes, missing values skipped. The sign counts: -5 is smaller than 3.",
        EVERYWHERE,
        DEFINITION,
        "vary point: A | D | G\n\
         P_t [lb] by point = -12 | -33 | 8 ; sheet 5\n\
         down = min(P_t over point)\n\
         not_up = min(P_t, 0)\n"),
    language!(GROUP, max(a: ANY, b: ANY);
        "Largest value.",
        "Of two or more values of one dimension, element by element; of one, over the axes behind `over`, or over all \
         its axes, missing values skipped. The sign counts: 3 is larger than -5.",
        EVERYWHERE,
        DEFINITION,
        "vary point: A | D | G\n\
         P_t [lb] by point = -12 | -33 | 8 ; sheet 5\n\
         up = max(P_t over point)\n\
         not_down = max(P_t, 0)\n"),
    language!(GROUP, clamp(x: ANY, low: ANY, high: ANY);
        "A value kept between two bounds.",
        "low where x is below it, high where x is above it, else x; all of one dimension.",
        "low not above high.",
        DEFINITION,
        "delta [deg] = 32 ; elevator asked for\n\
         held = clamp(delta, -25 deg, 20 deg)\n"),
    language!(GROUP, has_value(x: ANY);
        "Whether there is a value.",
        "A condition: not true of none and of excluded.",
        EVERYWHERE,
        DEFINITION,
        "vary point: A | D | G\n\
         P_t [lb] by point = -12 | - | 8 ; sheet 5\n\
         P [lb] = if has_value(P_t) then P_t else 0 lb\n"),
];
