//! What an expression is made of, from the loosest to the tightest.

use super::Row;

/// Signs and words of expressions.
pub const EXPRESSIONS: &[Row] = &[
    Row {
        word: "if then else",
        form: "if condition then a else b",
        meaning: "One of two values, condition by condition. A whole right side, argument, list value, cell, branch or bracket; else is required.",
        example: "V = 80 KEAS\nCL = if V < 60 KEAS then 1.9 else 1.4\n",
    },
    Row {
        word: "or",
        form: "a or b",
        meaning: "True where either condition is. true or none is true.",
        example: "n = 3.8\nx = if n > 3 or n < -1 then 1 else 0\n",
    },
    Row {
        word: "and",
        form: "a and b",
        meaning: "True where both conditions are. false and none is false.",
        example: "n = 3.8\nx = if n > 3 and n < 4 then 1 else 0\n",
    },
    Row {
        word: "not",
        form: "not a",
        meaning: "The contrary of a condition.",
        example: "n = 3.8\nx = if not n > 3 then 1 else 0\n",
    },
    Row {
        word: "< <= > >= = !=",
        form: "a < b",
        meaning: "Compares two values of one dimension, or texts with = and !=. Numbers are equal when they differ by at most 1e-12 of the larger; <= and >= include that. Comparisons are not chained.",
        example: "n = 3.8\nrequire n >= 3.8 and n != 4\n",
    },
    Row {
        word: "+ -",
        form: "a + b, a - b",
        meaning: "Sum and difference of one dimension and one kind of airspeed. A lone 0 fits any dimension. A sign before a value is looser than a power: -2^2 is -4.",
        example: "a = 3 ft + 6 in\nb = 2*a - 1 ft\n",
    },
    Row {
        word: "* /",
        form: "a*b, a/b",
        meaning: "Product and quotient; a division by zero is none. There is no product without a sign besides a number and its unit.",
        example: "q = 12 lb/ft^2\nL = q*142 ft^2/2\n",
    },
    Row {
        word: "^",
        form: "a^b",
        meaning: "Power, from the right: 2^3^2 is 2^9. The exponent of a quantity with a dimension is made of numbers only.",
        example: "a = 3 m\nb = a^2\nc = sqrt(b)\n",
    },
    Row {
        word: "number",
        form: "12, 1.5, .5, 2e-3, 4.6 ft, 12 ft 6 in",
        meaning: "A number and its unit are one operand before every sign: 12 lb/3 ft is 4 lb/ft, 2 m^2 two square metres.",
        example: "h = 12 ft 6 in\nS = 2*h^2\n",
    },
    Row {
        word: "[unit]",
        form: "V/[kt]",
        meaning: "One of that unit: V/[kt] is the number of knots, for formulas with dimensional constants.",
        example: "V = 65 kt\nn = V/[kt]/10\n",
    },
    Row {
        word: "text",
        form: "\"aft\"",
        meaning: "Text, for labels and words; \"\" is one quote in it.",
        example: "vary cg: fwd | aft\nx = if cg = \"aft\" then 1 else 2\n",
    },
    Row {
        word: "call",
        form: "name(a, b, name: c)",
        meaning: "A function of the catalogue or of the sheet; arguments by position, then by name.",
        example: "M = pitching_moment(-0.055, 12 lb/ft^2, S: 142 ft^2, c: 4.6 ft)\n",
    },
    Row {
        word: "over",
        form: "max(P over cg), integral(f, y over station)",
        meaning: "The axes that a reduction or a method along an axis consumes; it stands last in its own call. With no over a reduction takes all axes.",
        example: "vary cg: fwd | aft\nP [lb] by cg = -30 | 40\nmost = max(P over cg)\n",
    },
    Row {
        word: "at",
        form: "P at (point: \"D\", cg: \"aft\"), Cm at (alpha: a)",
        meaning: "Picks a value by its label, or at a position along an axis of numbers, where it interpolates linearly; beyond an end it is none.",
        example: "vary alpha [deg]: -4 to 12 step 4\nCL = 0.1 /deg*alpha\nx = CL at (alpha: 3 deg)\n",
    },
    Row {
        word: "smooth nearest held",
        form: "Cm at (alpha: a, held)",
        meaning: "Behind the selections of a pick: smooth takes a monotone cubic, nearest the nearest point, held the value at the end beyond it.",
        example: "vary alpha [deg]: -4 to 12 step 4\nCL = 0.1 /deg*alpha\nx = CL at (alpha: 15 deg, held)\n",
    },
    Row {
        word: ".",
        form: "air.density",
        meaning: "A field of a record, or a quantity of another sheet. Only fields can be calculated with.",
        example: "air = standard_atmosphere(1000 ft)\nm = air.density*2 m^3\n",
    },
    Row {
        word: "none",
        form: "none",
        meaning: "A missing value; it fits any dimension, and arithmetic with it gives it.",
        example: "vary cg: fwd | aft\nx [ft] by cg = 5.95 | none\ny = count(x over cg)\n",
    },
    Row {
        word: "excluded",
        form: "excluded",
        meaning: "A value left out on purpose: reductions skip it and count it apart.",
        example: "vary cg: fwd | aft\nx [ft] by cg = 5.95 | excluded\ny = max(x over cg)\n",
    },
    Row {
        word: "+/-",
        form: "x +/- t, x +/- 2 %",
        meaning: "A tolerance, outermost in an input, list value or cell. Everything is worked out with it at both ends.",
        example: "x [ft] = 6.10 +/- 0.05\ny = 2*x\n",
    },
    Row {
        word: "pi g0 rho0 p0 T0",
        form: "n*m*g0",
        meaning: "Constants: 9.80665 m/s^2, 1.225 kg/m^3, 101325 Pa, 288.15 K exactly. An own definition hides one, with advice.",
        example: "m = 300 kg\nW = m*g0\n",
    },
];
