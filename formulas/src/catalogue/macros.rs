//! Rows made from the engine functions themselves: the types named in a row are those of the function, or it does not
//! compile, and dimensions, airspeed kinds and temperature differences are read off them.

use engine::quantity::Dimension;

/// Whether a dimension is that of a lift slope.
pub(super) const fn is_slope(d: Dimension) -> bool {
    d.angle.numerator() == -1
        && d.length.is_zero()
        && d.mass.is_zero()
        && d.time.is_zero()
        && d.temperature.is_zero()
}

/// An argument of a type, required or with a default in SI.
macro_rules! parameter {
    ($name:ident, $type:ty) => {
        Parameter {
            name: stringify!($name),
            wants: Wants::Dimension(<$type as Typed>::DIMENSION),
            speed: <$type as Typed>::SPEED_KIND,
            difference: <$type as Typed>::DIFFERENCE,
            line: false,
            default: None,
            default_text: None,
            slope: super::macros::is_slope(<$type as Typed>::DIMENSION),
        }
    };
    ($name:ident, $type:ty, $default:expr) => {
        Parameter {
            default: Some($default),
            ..parameter!($name, $type)
        }
    };
}

/// A field of a type.
macro_rules! field {
    ($name:expr, $type:ty, $shown:expr, $what:expr) => {
        Field {
            name: $name,
            gives: Gives::Dimension(<$type as Typed>::DIMENSION),
            speed: <$type as Typed>::SPEED_KIND,
            absolute: false,
            shown: $shown,
            line: false,
            what: $what,
        }
    };
}

/// A function of one result, condition by condition.
macro_rules! each {
    ($group:expr, $module:ident::$name:ident($($arg:ident: $type:ty $(= $default:expr)?),* $(,)?) -> $result:ty
        $(, shown $shown:expr)?; $what:expr, $method:expr, $holds:expr, $source:expr, $example:expr) => {
        Entry {
            name: stringify!($name),
            group: $group,
            parameters: &[$(parameter!($arg, $type $(, $default)?)),*],
            fields: &[field!("", $result, each!(@shown $($shown)?), "")],
            compute: Compute::Each(|given, _, out| {
                let mut given = given.iter().copied();
                let mut next = || given.next().unwrap_or(f64::NAN);
                let result: $result = engine::$module::$name($(<$type as Typed>::from_si(next())),*);
                out.fill(result.si());
            }),
            validity: None,
            what: $what,
            method: $method,
            holds: $holds,
            source: $source,
            example: $example,
        }
    };
    (@shown) => { None };
    (@shown $shown:expr) => { Some($shown) };
}

pub(super) use {each, field, parameter};
