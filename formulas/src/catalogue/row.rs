//! What a row of the function table holds.

use engine::quantity::{Dimension, SpeedKind};

/// A function that a sheet can call.
pub struct Entry {
    /// Its name.
    pub name: &'static str,
    /// The group under which the catalogue lists it.
    pub group: &'static str,
    /// Its arguments, in order.
    pub parameters: &'static [Parameter],
    /// What it gives: one nameless field, or the fields of a record.
    pub fields: &'static [Field],
    /// How it is worked out.
    pub compute: Compute,
    /// The axis that it makes, named as the result.
    pub makes: Option<Makes>,
    /// Where the method holds, if that can be told from the arguments.
    pub validity: Option<Validity>,
    /// What its arguments make suspect where it holds, if that can be told from them.
    pub trap: Option<Validity>,
    /// What it computes, in a sentence.
    pub what: &'static str,
    /// The method, with signs.
    pub method: &'static str,
    /// Where it holds, in words.
    pub holds: &'static str,
    /// Where the method was published.
    pub source: &'static str,
    /// A small sheet that runs.
    pub example: &'static str,
}

impl Entry {
    /// Whether it gives a record rather than a single value.
    #[must_use]
    pub fn is_record(&self) -> bool {
        self.fields.first().is_some_and(|f| !f.name.is_empty())
    }

    /// Whether it consumes an axis.
    #[must_use]
    pub fn takes_lines(&self) -> bool {
        self.parameters.iter().any(|p| p.line)
    }
}

impl std::fmt::Debug for Entry {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(self.name)
    }
}

impl PartialEq for Entry {
    fn eq(&self, other: &Self) -> bool {
        self.name == other.name
    }
}

/// An argument of a catalogue function.
#[derive(Clone, Copy, Debug)]
pub struct Parameter {
    /// Its name.
    pub name: &'static str,
    /// What may be given.
    pub wants: Wants,
    /// The airspeed it means.
    pub speed: Option<SpeedKind>,
    /// A temperature difference rather than a temperature.
    pub difference: bool,
    /// Whether it is a whole line of values along the consumed axis.
    pub line: bool,
    /// The value taken where it is not given, in SI; a NaN stands for `none`.
    pub default: Option<f64>,
    /// The text taken where it is not given.
    pub default_text: Option<&'static str>,
    /// Whether it is a lift slope per radian, for which a bare number below 1 looks like one per degree.
    pub slope: bool,
    /// The largest bare number that it can be; above it a percentage was meant.
    pub most: Option<f64>,
    /// The words that a text can be; any where there are none here.
    pub words: &'static [&'static str],
}

/// What an argument may be.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Wants {
    /// A number of this dimension.
    Dimension(Dimension),
    /// A force or a mass.
    ForceOrMass,
    /// A mass, or a weight, which is taken as the mass that weighs so much.
    MassOrWeight,
    /// Text.
    Text,
    /// A number of any dimension.
    Any,
    /// A condition.
    Condition,
}

/// A result of a catalogue function; a function that gives a single value has one field without a name.
#[derive(Clone, Copy, Debug)]
pub struct Field {
    /// Its name.
    pub name: &'static str,
    /// Its dimension.
    pub gives: Gives,
    /// The airspeed it is.
    pub speed: Option<SpeedKind>,
    /// A temperature above absolute zero.
    pub absolute: bool,
    /// The unit in which it is shown where no bracket says otherwise: `deg` or `%`.
    pub shown: Option<&'static str>,
    /// Whether it varies along the consumed axis.
    pub line: bool,
    /// Whether it varies along the axis that the function makes.
    pub made: bool,
    /// What it is, in a few words.
    pub what: &'static str,
}

/// The dimension of a result.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Gives {
    /// Always the same.
    Dimension(Dimension),
    /// That of the argument of this index, times a dimension.
    Argument(usize, Dimension),
}

/// The labels of an axis that a function makes. They are known before anything is worked out.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Makes {
    /// 1, 2, ... up to the argument of this index, a number typed.
    Count(usize),
    /// The texts of the argument of this index, a column or list of texts, each once.
    Texts(usize),
}

/// A whole line of values along the consumed axis.
pub type Line<'a> = &'a [f64];

/// How a function is worked out.
#[derive(Clone, Copy)]
pub enum Compute {
    /// Condition by condition: arguments in SI, text arguments beside them (empty where a number stands), results.
    Each(fn(&[f64], &[&str], &mut [f64])),
    /// Whole lines: every argument as a line (an argument that is no line has one value); each result is filled with
    /// one value, or with one for each label.
    Lines(fn(&[Line<'_>], &[&str], &mut [Vec<f64>])),
    /// Whole lines, of which the part that does not depend on the swept arguments is done once for all conditions that
    /// share it.
    Prepared(Prepared),
    /// By the language itself: general mathematics and the functions of axes.
    Language,
}

/// A function of whole lines in two parts.
#[derive(Clone, Copy)]
pub struct Prepared {
    /// The arguments that only the second part needs, by index.
    pub swept: &'static [usize],
    /// The first part: given all arguments, of which it looks at no swept one.
    pub prepare: fn(&[Line<'_>], &[&str]) -> Box<dyn std::any::Any>,
    /// The second part: what the first made, all arguments, and the results.
    pub apply: fn(&dyn std::any::Any, &[Line<'_>], &mut [Vec<f64>]),
}

/// Where a method holds.
#[derive(Clone, Copy, Debug)]
pub struct Validity {
    /// Whether the arguments (in SI, defaults filled in) lie where the method holds. An optional argument that is not
    /// given is a NaN; required ones that are missing are not asked about.
    pub holds: fn(&[f64]) -> bool,
    /// The advice where they do not: a sentence without its full stop that names the range with units.
    pub advice: &'static str,
    /// Of an argument that is a whole line, by its index, the value that is looked at; lines that are not listed are a NaN.
    pub lines: &'static [(usize, Extreme)],
}

/// One of a line's values.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Extreme {
    /// The smallest.
    Least,
    /// The largest.
    Most,
}
