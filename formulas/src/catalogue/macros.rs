//! Rows made from the engine functions themselves: the types named in a row are those of the function, or it does not
//! compile, and dimensions, airspeed kinds and temperature differences are read off them.
//!
//! A row is written as the engine function is declared, `air::mach_number(speed: TrueAirspeed, sound_speed: Velocity) ->
//! f64`, a default in SI behind a `=`, a whole line of values as `[Length]`, a record as its fields in braces. A mark with
//! an `@` before an argument or a result says what its type cannot: `@lift_slope slope: PerAngle`, `-> @percent f64`.

use super::row::{Entry, Extreme, Field, Gives, Line, Parameter, Validity, Wants};
use crate::values::is_excluded;
use engine::quantity::{Dimension, Typed};

/// A type that an argument of an engine function can have: a quantity, or a slice of them.
pub(super) trait Argument {
    /// The argument without its name, required.
    const PARAMETER: Parameter;
    /// What holds the value or values for the call.
    type Held;
    /// What the engine function is given.
    type Lent<'a>
    where
        Self: 'a;

    /// The quantity or quantities of so many SI units.
    fn hold(line: Line<'_>) -> Self::Held;
    /// Lends them for the call.
    fn lend(held: &Self::Held) -> Self::Lent<'_>;
}

impl<T: Typed> Argument for T {
    const PARAMETER: Parameter = Parameter {
        name: "",
        wants: Wants::Dimension(T::DIMENSION),
        speed: T::SPEED_KIND,
        difference: T::DIFFERENCE,
        line: false,
        default: None,
        default_text: None,
        slope: false,
        most: None,
        words: &[],
    };
    type Held = T;
    type Lent<'a>
        = T
    where
        T: 'a;

    fn hold(line: Line<'_>) -> T {
        T::from_si(line.first().copied().unwrap_or(f64::NAN))
    }

    fn lend(held: &T) -> T {
        *held
    }
}

impl<T: Typed> Argument for [T] {
    const PARAMETER: Parameter = Parameter {
        line: true,
        ..<T as Argument>::PARAMETER
    };
    type Held = Vec<T>;
    type Lent<'a>
        = &'a [T]
    where
        T: 'a;

    fn hold(line: Line<'_>) -> Vec<T> {
        line.iter().map(|value| T::from_si(*value)).collect()
    }

    fn lend(held: &Vec<T>) -> &[T] {
        held
    }
}

/// Marks an argument as a lift slope, for which a bare number below 1 is suspect.
pub(super) const fn lift_slope(parameter: Parameter) -> Parameter {
    Parameter {
        slope: true,
        ..parameter
    }
}

/// Marks a weight that may be given as a mass, which the results then are made of.
pub(super) const fn force_or_mass(parameter: Parameter) -> Parameter {
    Parameter {
        wants: Wants::ForceOrMass,
        ..parameter
    }
}

/// Marks a mass that may be given as a weight, and then is the mass that weighs so much.
pub(super) const fn mass_or_weight(parameter: Parameter) -> Parameter {
    Parameter {
        wants: Wants::MassOrWeight,
        ..parameter
    }
}

/// Marks a part of a chord: a bare number well above 1 was meant as a percentage.
pub(super) const fn part_of_chord(parameter: Parameter) -> Parameter {
    Parameter {
        most: Some(1.5),
        ..parameter
    }
}

/// Marks a result that is shown in per cent.
pub(super) const fn percent(field: Field) -> Field {
    Field {
        shown: Some("%"),
        ..field
    }
}

/// Marks a result that has the dimension of the first argument.
pub(super) const fn of_first(field: Field) -> Field {
    Field {
        gives: Gives::Argument(0, Dimension::NONE),
        ..field
    }
}

/// Marks a result that has the dimension of the first argument times a length.
pub(super) const fn of_first_times_length(field: Field) -> Field {
    Field {
        gives: Gives::Argument(0, Dimension::LENGTH),
        ..field
    }
}

/// A result of a type: an angle is shown in degrees, a temperature that is no difference is absolute.
pub(super) const fn field_of<T: Typed>(name: &'static str, what: &'static str) -> Field {
    let d = T::DIMENSION;
    let of_a_kind = d.length.is_zero() && d.mass.is_zero() && d.time.is_zero();
    let angle = of_a_kind && d.temperature.is_zero() && d.angle.numerator() == 1;
    let temperature = of_a_kind && d.angle.is_zero() && d.temperature.numerator() == 1;
    Field {
        name,
        gives: Gives::Dimension(d),
        speed: T::SPEED_KIND,
        absolute: temperature && !T::DIFFERENCE,
        shown: if angle { Some("deg") } else { None },
        line: false,
        made: false,
        what,
    }
}

/// Marks a result that varies along the consumed axis.
pub(super) const fn along(field: Field) -> Field {
    Field {
        line: true,
        ..field
    }
}

/// Marks a result that varies along the axis that the function makes.
pub(super) const fn made(field: Field) -> Field {
    Field {
        made: true,
        ..field
    }
}

/// A whole line as quantities.
pub(super) fn line<T: Typed>(given: &[Line<'_>], index: usize) -> Vec<T> {
    let values = given.get(index).copied().unwrap_or_default();
    values.iter().map(|value| T::from_si(*value)).collect()
}

/// The one value of what is no line.
pub(super) fn one<T: Typed>(given: &[Line<'_>], index: usize) -> T {
    let values = given.get(index).copied().unwrap_or_default();
    T::from_si(at(values, 0))
}

/// Puts results along the stations in their places.
pub(super) fn put_along(out: &mut [Vec<f64>], lines: impl IntoIterator<Item = Vec<f64>>) {
    out.iter_mut()
        .zip(lines)
        .for_each(|(out, line)| *out = line);
}

/// The numbers of quantities.
pub(super) fn numbers<T: Typed>(line: Vec<T>) -> Vec<f64> {
    line.into_iter().map(Typed::si).collect()
}

/// The row with the range where its method holds.
pub(super) const fn within(holds: fn(&[f64]) -> bool, advice: &'static str, entry: Entry) -> Entry {
    within_lines(&[], holds, advice, entry)
}

/// Whether the flow can stay on a wing or section at an angle of attack; 15 degrees and a rounding of it.
pub(super) fn attached(alpha: f64) -> bool {
    alpha.abs() <= 0.262
}

/// A function of whole lines with the range in which it holds, by one value of each line that is listed.
pub(super) const fn within_lines(
    lines: &'static [(usize, Extreme)],
    holds: fn(&[f64]) -> bool,
    advice: &'static str,
    entry: Entry,
) -> Entry {
    Entry {
        validity: Some(Validity {
            holds,
            advice,
            lines,
        }),
        ..entry
    }
}

/// A function whose arguments are suspect where `sound` is false, though its method holds.
pub(super) const fn trap(
    lines: &'static [(usize, Extreme)],
    sound: fn(&[f64]) -> bool,
    advice: &'static str,
    entry: Entry,
) -> Entry {
    Entry {
        trap: Some(Validity {
            holds: sound,
            advice,
            lines,
        }),
        ..entry
    }
}

/// The argument of that index, a NaN where it is missing.
pub(super) fn at(given: &[f64], index: usize) -> f64 {
    given.get(index).copied().unwrap_or(f64::NAN)
}

/// Whether each of these arguments is above zero.
pub(super) fn positive<const N: usize>(given: &[f64], indices: [usize; N]) -> bool {
    indices.into_iter().all(|index| at(given, index) > 0.0)
}

/// Puts the fields of a result in their places.
pub(super) fn put(out: &mut [f64], fields: &[f64]) {
    out.iter_mut()
        .zip(fields)
        .for_each(|(out, value)| *out = *value);
}

/// Puts the fields of a result that does not vary along the axis in their places.
pub(super) fn put_lines(out: &mut [Vec<f64>], fields: &[f64]) {
    out.iter_mut()
        .zip(fields)
        .for_each(|(out, value)| *out = vec![*value]);
}

/// The lines without the points that are left out on purpose in any of them; what is no line stays.
pub(super) fn left_in(given: &[Line<'_>], parameters: &[Parameter]) -> Vec<Vec<f64>> {
    let lines = || given.iter().zip(parameters).filter(|(_, p)| p.line);
    let out = |i: usize| lines().any(|(line, _)| line.get(i).is_some_and(|v| is_excluded(*v)));
    let kept = |(line, parameter): (&Line<'_>, &Parameter)| {
        let points = line
            .iter()
            .enumerate()
            .filter(|(i, _)| !parameter.line || !out(*i));
        points.map(|(_, value)| *value).collect()
    };
    given.iter().zip(parameters).map(kept).collect()
}

/// An argument of a type, required or with a default in SI.
macro_rules! parameter {
    ($(@$mark:ident)? $name:ident: $type:ty $(= $default:expr)?) => {{
        let parameter = Parameter {
            name: stringify!($name),
            $(default: Some($default),)?
            ..<$type as Argument>::PARAMETER
        };
        $(let parameter = super::macros::$mark(parameter);)?
        parameter
    }};
}

/// A result of a type.
macro_rules! field {
    ($(@$mark:ident)? $name:expr, $type:ty, $what:expr) => {{
        let field = super::macros::field_of::<$type>($name, $what);
        $(let field = super::macros::$mark(field);)?
        field
    }};
}

/// The texts of a row, and what is not said otherwise.
macro_rules! entry {
    ($group:expr, $name:ident, $parameters:expr, $fields:expr, $compute:expr;
        $what:expr, $method:expr, $holds:expr, $source:expr, $example:expr) => {
        Entry {
            name: stringify!($name),
            group: $group,
            parameters: const { $parameters },
            fields: const { $fields },
            compute: $compute,
            makes: None,
            validity: None,
            trap: None,
            what: $what,
            method: $method,
            holds: $holds,
            source: $source,
            example: $example,
        }
    };
}

/// A function worked out condition by condition: of one result, or of a record.
macro_rules! each {
    ($group:expr, $module:ident::$name:ident(
            $($(@$mark:ident)? $arg:ident: $type:ty $(= $default:expr)?),* $(,)?)
        -> { $($(@$f_mark:ident)? $field:ident: $f_type:ty = $f_what:expr),* $(,)? }; $($texts:expr),* $(,)?) => {
        super::macros::entry!($group, $name,
            &[$(super::macros::parameter!($(@$mark)? $arg: $type $(= $default)?)),*],
            &[$(super::macros::field!($(@$f_mark)? stringify!($field), $f_type, $f_what)),*],
            Compute::Each(|given, _, out| {
                let mut given = given.iter().copied();
                let mut next = || given.next().unwrap_or(f64::NAN);
                let result = engine::$module::$name($(<$type as Typed>::from_si(next())),*);
                super::macros::put(out, &[$(<$f_type as Typed>::si(result.$field)),*]);
            });
            $($texts),*)
    };
    ($group:expr, $module:ident::$name:ident(
            $($(@$mark:ident)? $arg:ident: $type:ty $(= $default:expr)?),* $(,)?)
        -> $(@$f_mark:ident)? $result:ty; $($texts:expr),* $(,)?) => {
        super::macros::entry!($group, $name,
            &[$(super::macros::parameter!($(@$mark)? $arg: $type $(= $default)?)),*],
            &[super::macros::field!($(@$f_mark)? "", $result, "")],
            Compute::Each(|given, _, out| {
                let mut given = given.iter().copied();
                let mut next = || given.next().unwrap_or(f64::NAN);
                let result = engine::$module::$name($(<$type as Typed>::from_si(next())),*);
                super::macros::put(out, &[<$result as Typed>::si(result)]);
            });
            $($texts),*)
    };
}

/// A function of points or items, given as whole lines; those that are left out on purpose do not reach it.
macro_rules! points {
    ($group:expr, $module:ident::$name:ident($($(@$mark:ident)? $arg:ident: $type:ty),* $(,)?)
        -> { $($(@$f_mark:ident)? $field:ident: $f_type:ty = $f_what:expr),* $(,)? }; $($texts:expr),* $(,)?) => {
        super::macros::entry!($group, $name,
            &[$(super::macros::parameter!($(@$mark)? $arg: $type)),*],
            &[$(super::macros::field!($(@$f_mark)? stringify!($field), $f_type, $f_what)),*],
            Compute::Lines(|given, _, out| {
                let given = super::macros::left_in(given, &[$(<$type as Argument>::PARAMETER),*]);
                let mut given = given.iter().map(Vec::as_slice);
                let mut next = || given.next().unwrap_or_default();
                let result = engine::$module::$name(
                    $(<$type as Argument>::lend(&<$type as Argument>::hold(next()))),*);
                super::macros::put_lines(out, &[$(<$f_type as Typed>::si(result.$field)),*]);
            });
            $($texts),*)
    };
    ($group:expr, $module:ident::$name:ident($($(@$mark:ident)? $arg:ident: $type:ty),* $(,)?)
        -> $(@$f_mark:ident)? $result:ty; $($texts:expr),* $(,)?) => {
        super::macros::entry!($group, $name,
            &[$(super::macros::parameter!($(@$mark)? $arg: $type)),*],
            &[super::macros::field!($(@$f_mark)? "", $result, "")],
            Compute::Lines(|given, _, out| {
                let given = super::macros::left_in(given, &[$(<$type as Argument>::PARAMETER),*]);
                let mut given = given.iter().map(Vec::as_slice);
                let mut next = || given.next().unwrap_or_default();
                let result = engine::$module::$name(
                    $(<$type as Argument>::lend(&<$type as Argument>::hold(next()))),*);
                super::macros::put_lines(out, &[<$result as Typed>::si(result)]);
            });
            $($texts),*)
    };
}

/// A function that the language works out itself: it gives no fields, as its dimension follows from its arguments.
macro_rules! language {
    ($group:expr, $name:ident($($arg:ident: $wants:expr),*); $($texts:expr),* $(,)?) => {
        super::macros::entry!($group, $name,
            &[$(Parameter {
                name: stringify!($arg),
                wants: $wants,
                ..<f64 as Argument>::PARAMETER
            }),*],
            &[],
            Compute::Language;
            $($texts),*)
    };
}

pub(super) use {each, entry, field, language, parameter, points};
