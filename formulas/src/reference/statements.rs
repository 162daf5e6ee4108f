//! The statements.

use super::Row;

/// Every statement, the title block first.
pub const STATEMENTS: &[Row] = &[
    Row {
        word: "title",
        form: "title text",
        meaning: "The title of the sheet. The lines of the title block stand before everything but blank lines and asides, one of each.",
        example: "title Osier single-seater, horizontal tail\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "revision",
        form: "revision text",
        meaning: "The revision of the sheet, for the title block.",
        example: "revision C\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "date",
        form: "date text",
        meaning: "The date of the revision, for the title block.",
        example: "date 2 March\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "prepared",
        form: "prepared text",
        meaning: "Who prepared the sheet, for the title block.",
        example: "prepared design office\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "checked",
        form: "checked text",
        meaning: "Who checked the sheet, for the title block.",
        example: "checked stress office\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "basis",
        form: "basis text",
        meaning: "The requirements on which the sheet is based, for the title block.",
        example: "basis CS-VLA 331, 421\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "digits",
        form: "digits 4",
        meaning: "Significant figures shown, 1 to 15, 4 where the line is absent. Nothing is rounded on the way.",
        example: "digits 6\nx = 2/3\ny = 3*x\n",
    },
    Row {
        word: "units",
        form: "units lb ft kt",
        meaning: "The units that results without a bracket prefer.",
        example: "units N m\nW = 100 lb\nM = W*2 ft\n",
    },
    Row {
        word: "sources",
        form: "sources required",
        meaning: "An input without a remark is a warning.",
        example: "sources required\nS [ft^2] = 142 ; drawing OS-010\nd = 2*S\n",
    },
    Row {
        word: "part",
        form: "part text",
        meaning: "A heading.",
        example: "part Geometry\nS [ft^2] = 142\nd = 2*S\n",
    },
    Row {
        word: "sub",
        form: "sub text",
        meaning: "A sub-heading.",
        example: "sub Wing\nS [ft^2] = 142\nd = 2*S\n",
    },
    Row {
        word: "note",
        form: "note text",
        meaning: "Prose that is printed. A line that holds only a remark is prose too.",
        example: "note Flaps up throughout.\n; so is this line\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "aside",
        form: "aside text",
        meaning: "A private remark that is not printed; it may stand between the rows of a table.",
        example: "aside ask the test pilot\nx = 2\ny = 3*x\n",
    },
    Row {
        word: "definition",
        form: "symbol [unit] = expression ; remark",
        meaning: "Gives a symbol its value. Under a bracket unit-less numbers are so many of its unit; anything else keeps its own units, and the bracket names the unit shown. A definition whose right side uses no symbol and no function of the trade is an input, and may carry a tolerance: x +/- t, the t a width or a part in %.",
        example: "S [ft^2] = 142 +/- 1 ; drawing OS-010\nq [lb/ft^2] = 12\nL [lb] = q*S ; lift\n",
    },
    Row {
        word: "by",
        form: "symbol [unit] by axis = value | value, or = label: value | label: value",
        meaning: "An input with a value for each label of an axis, in their order or by their labels.",
        example: "vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95 | aft: 6.45\nd = x - 6 ft\n",
    },
    Row {
        word: "vary",
        form: "vary name: label | label, or vary name [unit]: a to b step d, a to b count k, v | v",
        meaning: "Declares an axis of conditions, of labels or of numbers. A line varies over the axes that its inputs vary over. The name is also a text or a quantity along itself. [1] stands for pure numbers.",
        example: "vary flap: up | down\nvary alpha [deg]: -4 to 12 step 4\nCL = 0.1 /deg*alpha + (if flap = \"down\" then 0.5 else 0)\n",
    },
    Row {
        word: "table end",
        form: "table key, key | symbol [unit] | symbol, then rows, then end",
        meaning: "Declares the axis of each key, unless it was declared before, and one quantity a column. A key with a bracket is an axis of numbers. A cell that is only a dash is none.",
        example: "table point | V [KEAS] | n ; envelope, sheet 2\nA | 55 | 3.8\nD | 90 | 3.8\nend\nq = dynamic_pressure_of_eas(V)\nL = n*560 lb\n",
    },
    Row {
        word: "function",
        form: "name(a, b [unit]) [unit] = expression",
        meaning: "An own function. Its body sees its parameters, then the sheet's symbols; it can be called above its line, but not by itself.",
        example: "arm(x [ft]) = x - 6.1 ft\nd = arm(6.45 ft)\n",
    },
    Row {
        word: "unknown",
        form: "unknown symbol [unit] between a and b such that left = right",
        meaning: "Solves for a symbol within its bounds, condition by condition: the first solution from the lower bound. Several symbols: unknown a between p and q, d between r and s such that l1 = r1 and l2 = r2.",
        example: "k = 2\nunknown x between 0 and 3 such that x^2 = k\ny = 2*x\n",
    },
    Row {
        word: "governing",
        form: "governing symbol, symbol over axis, axis",
        meaning: "The largest and the smallest value over those axes (over all, where none are named), and the condition where each stands.",
        example: "vary cg: fwd | aft\nP [lb] by cg = -30 | 40\ngoverning P over cg\n",
    },
    Row {
        word: "require",
        form: "require condition ; reason",
        meaning: "Met, not met or not shown; the condition of least reserve, its reserve and margin.",
        example: "CL_max = 1.55\nCL = 1.2\nrequire CL <= CL_max ; flaps up\n",
    },
    Row {
        word: "freebody",
        form: "freebody \"name\": F @ x, axial A @ z, couple M",
        meaning: "Checks that forces and moments close in every condition. Forces are positive up at a station x, axial forces positive aft at a height z, couples positive nose up; F at x has the moment -F (x - x0) about the first station.",
        example: "W = 560 lb\nL = W\nfreebody \"Level\": L @ 6 ft, -W @ 6 ft\n",
    },
    Row {
        word: "figure",
        form: "figure \"name\": y, y against x each axis, axis closed",
        meaning: "Curves over a numeric x, marks over labels; a curve for each label of the axes behind each. each and closed may be left out; closed joins the points into an outline with their labels. Every other axis is to be picked. At most 200 curves, and 100,000 points in all.",
        example: "vary alpha [deg]: -4 to 12 step 4\nCL = 0.1 /deg*alpha\nfigure \"Lift\": CL against alpha\n",
    },
    Row {
        word: "use",
        form: "use \"sheet-name\" as g",
        meaning: "Reads another sheet beside this one: g.S is that sheet's quantity, g.air.density a field. Its axes are the same as ours of the same name where labels and order agree; an axis that this sheet lacks is taken over and stands where the sheet is used. Its findings count as one, its tolerances come along, its requirements do not.",
        example: "use \"osier-geometry\" as g\nL [lb] = 12 lb/ft^2*g.S\n",
    },
];
