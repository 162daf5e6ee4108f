//! The table of codes, and which facts each of them tells. One file a code: its row, its wording and fixes, its tests.

mod argument_count;
mod argument_dimension;
mod argument_missing;
mod argument_name;
mod argument_range;
mod argument_speed_kind;
mod argument_twice;
mod axis_empty;
mod axis_end_left_out;
mod axis_limit;
mod axis_not_varied;
mod axis_numbers;
mod axis_order;
mod axis_point_twice;
mod axis_steps;
mod below_the_line;
mod bracket_after_number;
mod bracket_dimension;
mod bracket_speed_kind;
mod by_count;
mod calibrated_in_pressure;
mod chained_comparison;
mod circular_definition;
mod condition_limit;
mod dangling_sign;
mod decimal_comma;
mod dimension_limit;
mod dimension_mismatch;
mod downwash_twice;
mod duplicate_symbol;
mod end_without_table;
mod equation_count;
mod equations_mixed;
mod equivalent_with_density;
mod exponent_not_fixed;
mod field_of_number;
mod figure_axes;
mod figure_limit;
mod foreign_sign;
mod free_body_open;
mod free_body_units;
mod function_as_symbol;
mod further_solutions;
mod hides_constant;
mod if_in_arithmetic;
mod if_without_else;
mod implied_product;
mod input_without_source;
mod label_limit;
mod label_missing;
mod label_twice;
mod likely_other_unit;
mod load_factor_unit;
mod made_axis_place;
mod made_axis_texts;
mod mass_for_force;
mod memory_limit;
mod missing_sheet;
mod mixed_list;
mod nesting_limit;
mod never_used;
mod no_statement;
mod not_a_function;
mod not_a_pure_number;
mod number_as_angle;
mod number_form;
mod operation_limit;
mod operator_limit;
mod outside_validity;
mod over_missing;
mod over_not_taken;
mod record_as_number;
mod reference_trap;
mod row_length;
mod rows_missing;
mod rules_mixed;
mod sheet_axis;
mod sheet_depth;
mod sheet_findings;
mod sheet_name;
mod sheet_too_large;
mod slope_per_degree;
mod speed_kinds;
mod table_without_end;
mod temperature_difference;
mod temperature_in_arithmetic;
mod title_late;
mod title_twice;
mod title_value;
mod tolerance_place;
mod two_axes;
mod two_slashes;
mod unclosed_text;
mod unexpected_text;
mod unit_or_symbol;
mod unknown_axis;
mod unknown_character;
mod unknown_field;
mod unknown_function;
mod unknown_label;
mod unknown_limit;
mod unknown_symbol;
mod unknown_unit;
mod unknown_word;
mod unmatched_bracket;
mod without_value;
mod word_as_name;
mod wrong_kind;

use super::draft::{Draft, Site};
use super::finding::Code;
use crate::problem::Fault;

/// Every code, in the order of the stages that report them.
pub const CODES: &[&Code] = &[
    &unknown_character::ROW,
    &unclosed_text::ROW,
    &unmatched_bracket::ROW,
    &number_form::ROW,
    &decimal_comma::ROW,
    &two_slashes::ROW,
    &below_the_line::ROW,
    &foreign_sign::ROW,
    &unexpected_text::ROW,
    &dangling_sign::ROW,
    &implied_product::ROW,
    &chained_comparison::ROW,
    &bracket_after_number::ROW,
    &word_as_name::ROW,
    &title_late::ROW,
    &title_twice::ROW,
    &title_value::ROW,
    &if_without_else::ROW,
    &if_in_arithmetic::ROW,
    &table_without_end::ROW,
    &end_without_table::ROW,
    &row_length::ROW,
    &no_statement::ROW,
    &nesting_limit::ROW,
    &operator_limit::ROW,
    &sheet_too_large::ROW,
    &tolerance_place::ROW,
    &mixed_list::ROW,
    &unknown_symbol::ROW,
    &unknown_function::ROW,
    &not_a_function::ROW,
    &function_as_symbol::ROW,
    &unknown_axis::ROW,
    &duplicate_symbol::ROW,
    &circular_definition::ROW,
    &never_used::ROW,
    &hides_constant::ROW,
    &unknown_field::ROW,
    &record_as_number::ROW,
    &field_of_number::ROW,
    &unknown_unit::ROW,
    &unit_or_symbol::ROW,
    &likely_other_unit::ROW,
    &bracket_dimension::ROW,
    &mass_for_force::ROW,
    &dimension_mismatch::ROW,
    &not_a_pure_number::ROW,
    &argument_dimension::ROW,
    &exponent_not_fixed::ROW,
    &dimension_limit::ROW,
    &number_as_angle::ROW,
    &slope_per_degree::ROW,
    &speed_kinds::ROW,
    &bracket_speed_kind::ROW,
    &calibrated_in_pressure::ROW,
    &equivalent_with_density::ROW,
    &argument_speed_kind::ROW,
    &temperature_in_arithmetic::ROW,
    &temperature_difference::ROW,
    &load_factor_unit::ROW,
    &wrong_kind::ROW,
    &argument_count::ROW,
    &argument_name::ROW,
    &argument_twice::ROW,
    &argument_missing::ROW,
    &unknown_word::ROW,
    &argument_range::ROW,
    &over_missing::ROW,
    &over_not_taken::ROW,
    &axis_not_varied::ROW,
    &by_count::ROW,
    &unknown_label::ROW,
    &label_twice::ROW,
    &label_missing::ROW,
    &two_axes::ROW,
    &axis_order::ROW,
    &axis_numbers::ROW,
    &axis_end_left_out::ROW,
    &axis_steps::ROW,
    &axis_point_twice::ROW,
    &axis_empty::ROW,
    &axis_limit::ROW,
    &label_limit::ROW,
    &condition_limit::ROW,
    &operation_limit::ROW,
    &rows_missing::ROW,
    &without_value::ROW,
    &free_body_open::ROW,
    &free_body_units::ROW,
    &input_without_source::ROW,
    &outside_validity::ROW,
    &reference_trap::ROW,
    &downwash_twice::ROW,
    &rules_mixed::ROW,
    &further_solutions::ROW,
    &equation_count::ROW,
    &equations_mixed::ROW,
    &made_axis_place::ROW,
    &made_axis_texts::ROW,
    &unknown_limit::ROW,
    &figure_axes::ROW,
    &figure_limit::ROW,
    &memory_limit::ROW,
    &missing_sheet::ROW,
    &sheet_name::ROW,
    &sheet_axis::ROW,
    &sheet_depth::ROW,
    &sheet_findings::ROW,
];

/// One arm a fault, and none left over: a fault without a code does not compile.
macro_rules! told_by {
    ($site:ident: $(
        $fault:ident $({ $($field:ident),* })? => $code:ident::$draft:ident($($argument:tt)*),
    )*) => {
        /// The code that tells of a fault, and what it says.
        pub(super) fn draft($site: &Site<'_>, fault: &Fault) -> (&'static Code, Draft) {
            match fault {
                $(Fault::$fault $({ $($field),* })? => (&$code::ROW, $code::$draft($($argument)*)),)*
            }
        }
    };
}

told_by! {
    site:
    UnknownCharacter { character } => unknown_character::draft(site, *character),
    UnclosedText => unclosed_text::draft(),
    UnclosedBracket { bracket } => unmatched_bracket::unclosed(*bracket),
    UnopenedBracket { bracket } => unmatched_bracket::unopened(site, *bracket),
    NumberForm { text, mend } => number_form::draft(site, text, mend),
    DecimalComma { text, mend } => decimal_comma::draft(site, text, mend),
    SecondSlash { text, mend } => two_slashes::draft(site, text, mend),
    BelowTheLine { text, meaning } => below_the_line::draft(text, meaning),
    ForeignSign { text, mend } => foreign_sign::draft(site, text, mend),
    Expected { what, found } => unexpected_text::draft(what, found),
    Dangling { sign } => dangling_sign::draft(sign),
    ImpliedProduct { mend } => implied_product::draft(site, mend),
    ChainedComparison { mend } => chained_comparison::draft(site, mend),
    BracketAfterNumber { unit } => bracket_after_number::draft(site, unit),
    WordAsName { word } => word_as_name::draft(word),
    TitleLate { word } => title_late::draft(word),
    TitleTwice { word } => title_twice::draft(word),
    TitleValue { word, found } => title_value::draft(word, found),
    IfWithoutElse => if_without_else::draft(site),
    IfPlace => if_in_arithmetic::draft(site),
    TableWithoutEnd { key } => table_without_end::draft(site, key),
    EndWithoutTable => end_without_table::draft(),
    RowLength { expected, found } => row_length::draft(site, *expected, *found),
    NoStatement { found, looks_like } => no_statement::draft(site, found, looks_like),
    NestingLimit { limit } => nesting_limit::draft(*limit),
    OperatorLimit { limit } => operator_limit::draft(*limit),
    SizeLimit { bytes, limit } => sheet_too_large::size(*bytes, *limit),
    LineLimit { lines, limit } => sheet_too_large::lines(*lines, *limit),
    TolerancePlace => tolerance_place::draft(),
    MixedList => mixed_list::draft(),

    UnknownSymbol { name, nearest, other_script } => unknown_symbol::draft(site, name, nearest, *other_script),
    UnknownFunction { name, nearest } => unknown_function::draft(site, name, nearest),
    NotAFunction { name } => not_a_function::draft(site, name),
    FunctionAsSymbol { name } => function_as_symbol::draft(name),
    UnknownAxis { name, nearest } => unknown_axis::draft(site, name, nearest),
    Duplicate { name, first_line } => duplicate_symbol::draft(name, *first_line),
    Circular { chain } => circular_definition::draft(chain),
    NeverUsed { name } => never_used::draft(name),
    HidesConstant { name } => hides_constant::draft(name),
    UnknownField { record, field, fields, nearest } => unknown_field::draft(site, record, field, fields, nearest),
    RecordAsNumber { record, fields } => record_as_number::draft(site, record, fields),
    FieldOfNumber { name, field } => field_of_number::draft(site, name, field),

    UnknownUnit { name, nearest, mend } => unknown_unit::draft(site, name, nearest, mend),
    UnitIsSymbol { name, sign } => unit_or_symbol::draft(site, name, *sign),
    LikelyOtherUnit { unit, likely } => likely_other_unit::draft(site, unit, likely),
    BracketDimension { symbol, bracket, bracket_dimension, value } => bracket_dimension::draft(site, symbol, bracket, *bracket_dimension, value),
    MassForForce { value, is_number } => mass_for_force::draft(value, *is_number),
    DimensionMismatch { sign, left, right } => dimension_mismatch::draft(sign, left, right),
    NotANumber { place, value } => not_a_pure_number::draft(place, value),
    ArgumentDimension { function, argument, wanted, value } => argument_dimension::draft(function, argument, *wanted, value),
    ExponentNotFixed { base } => exponent_not_fixed::draft(base),
    DimensionLimit => dimension_limit::draft(),
    NumberAsAngle { place, number, divides } => number_as_angle::draft(site, place, *number, *divides),
    SlopePerDegree { argument, value, number } => slope_per_degree::draft(site, argument, *value, *number),
    SpeedKinds { sign, left, right } => speed_kinds::draft(sign, left, right),
    BracketSpeedKind { symbol, bracket, value } => bracket_speed_kind::draft(symbol, *bracket, *value),
    CalibratedInPressure { speed } => calibrated_in_pressure::draft(speed),
    EquivalentWithDensity { speed, density } => equivalent_with_density::draft(site, speed, density),
    ArgumentSpeedKind { function, argument, wanted, given } => argument_speed_kind::draft(function, argument, *wanted, *given),
    TemperatureInArithmetic { text, kelvin } => temperature_in_arithmetic::draft(site, text, kelvin),
    TemperatureDifference { text } => temperature_difference::draft(site, text),
    LoadFactorUnit { text, mend } => load_factor_unit::draft(site, text, mend),

    WrongKind { place, wanted, found, quote } => wrong_kind::draft(site, place, wanted, found, quote),
    ArgumentCount { function, least, most, found } => argument_count::draft(function, *least, *most, *found),
    ArgumentName { function, name, names, nearest } => argument_name::draft(site, function, name, names, nearest),
    ArgumentTwice { function, name } => argument_twice::draft(function, name),
    ArgumentMissing { function, name } => argument_missing::draft(function, name),
    UnknownWord { function, argument, found, words, nearest } => unknown_word::draft(site, function, argument, found, words, nearest),
    ArgumentRange { function, argument, text } => argument_range::draft(site, function, argument, text),
    OverMissing { function, axes } => over_missing::draft(site, function, axes),
    OverNotTaken { function } => over_not_taken::draft(function),
    AxisNotVaried { function, axis, refused } => axis_not_varied::draft(function, axis, *refused),

    ByCount { symbol, axis, labels, found } => by_count::draft(symbol, axis, labels, *found),
    UnknownLabel { axis, label, nearest } => unknown_label::draft(site, axis, label, nearest),
    LabelTwice { axis, label } => label_twice::draft(axis, label),
    LabelMissing { symbol, axis, labels } => label_missing::draft(symbol, axis, labels),
    TwoAxes { axes } => two_axes::draft(site, axes),
    AxisOrder { axis } => axis_order::draft(axis),
    AxisNumbers { axis } => axis_numbers::draft(site, axis),
    AxisEndLeftOut { axis, last, end } => axis_end_left_out::draft(site, axis, last, end),
    AxisSteps { axis } => axis_steps::draft(site, axis),
    AxisPointTwice { axis, value } => axis_point_twice::draft(axis, value),
    AxisEmpty { axis } => axis_empty::draft(axis),
    AxisLimit { limit } => axis_limit::draft(*limit),
    LabelLimit { axis, limit, found } => label_limit::draft(axis, *limit, *found),
    ConditionLimit { symbol, found, limit } => condition_limit::draft(symbol, *found, *limit),
    OperationLimit { limit } => operation_limit::draft(*limit),
    RowsMissing { axis, labels } => rows_missing::draft(axis, labels),

    WithoutValue { symbol, cause, conditions } => without_value::draft(symbol, *cause, conditions),
    FreebodyOpen { name, conditions, force, axial, moment } => free_body_open::draft(name, conditions, force, axial, moment),
    FreebodyUnits { name } => free_body_units::draft(name),
    InputWithoutSource { symbol } => input_without_source::draft(symbol),
    Validity { function, text, conditions } => outside_validity::draft(function, text, conditions),
    ReferenceTrap { function, text, conditions } => reference_trap::draft(function, text, conditions),
    DownwashTwice { function, other } => downwash_twice::draft(function, other),
    RulesMixed { rules, basis } => rules_mixed::draft(rules, basis),
    FurtherSolutions { symbol, conditions } => further_solutions::draft(symbol, conditions),
    EquationCount { unknowns, equations } => equation_count::draft(*unknowns, *equations),
    MadeAxisPlace { function } => made_axis_place::draft(function),
    MadeAxisTexts { function, argument } => made_axis_texts::draft(function, argument),
    UnknownLimit { found, limit } => unknown_limit::draft(*found, *limit),
    UnknownCoupled { symbol } => equations_mixed::draft(symbol),
    FigureAxes { symbol, axes } => figure_axes::draft(site, symbol, axes),
    FigureLimit { what, found, limit } => figure_limit::draft(what, *found, *limit),
    MemoryLimit { symbol } => memory_limit::draft(symbol),

    MissingSheet { sheet } => missing_sheet::draft(sheet),
    SheetName { sheet } => sheet_name::draft(sheet),
    UnknownInSheet { sheet, name, nearest } => unknown_symbol::in_sheet(site, sheet, name, nearest),
    SheetDepth { limit } => sheet_depth::draft(*limit),
    SheetAxis { sheet, axis } => sheet_axis::draft(sheet, axis),
    SheetAxisHidden { sheet, axis } => sheet_axis::hidden(sheet, axis),
    SheetFindings { sheet, errors, warnings } => sheet_findings::draft(sheet, *errors, *warnings),
}
