//! Functions of the catalogue in words.

use crate::catalogue::{Compute, Entry, Field, Gives, Parameter, Wants};
use crate::report::json::plain_number;
use engine::quantity::{Dimension, SpeedKind};

/// `dynamic_pressure(V, rho)`; what may be left out stands in brackets with what is taken then.
#[must_use]
pub fn signature(entry: &Entry) -> String {
    let names: Vec<&str> = entry.parameters.iter().map(|p| p.name).collect();
    let axes = entry.group == crate::catalogue::AXES;
    let over = if (entry.takes_lines() || axes) && !names.is_empty() {
        " over axis"
    } else {
        ""
    };
    format!("{}({}{over})", entry.name, names.join(", "))
}

/// `rho: density`, with what else is to be known of an argument.
#[must_use]
pub fn parameter(parameter: &Parameter) -> String {
    let mut line = format!("{}: {}", parameter.name, wanted(parameter));
    if let Some(kind) = parameter.speed {
        line += &format!(" ({})", kind.name());
    }
    if parameter.difference {
        line += ", a difference";
    }
    if parameter.slope {
        line += ", per radian where it is a bare number";
    }
    if parameter.line {
        line += ", a whole line of values along the axis";
    }
    if let Some(most) = parameter.most {
        line += &format!(", at most {}", plain_number(most));
    }
    match (parameter.default, parameter.default_text) {
        (Some(value), _) if value.is_nan() => line += "; may be left out",
        (Some(value), _) => line += &format!("; {} in SI where left out", plain_number(value)),
        (None, Some(text)) => line += &format!("; \"{text}\" where left out"),
        (None, None) => {}
    }
    line
}

/// What an argument is to be.
#[must_use]
pub fn wanted(parameter: &Parameter) -> String {
    match parameter.wants {
        Wants::Dimension(dimension) => dimension_name(dimension),
        Wants::ForceOrMass => "force or mass".to_owned(),
        Wants::MassOrWeight => "mass, or the weight of one".to_owned(),
        Wants::Text if !parameter.words.is_empty() => {
            let words = parameter.words.iter().map(|w| format!("\"{w}\""));
            words.collect::<Vec<_>>().join(" or ")
        }
        Wants::Text => "text".to_owned(),
        Wants::Any => "any dimension".to_owned(),
        Wants::Condition => "condition".to_owned(),
    }
}

/// What a function gives, a line for each field.
#[must_use]
pub fn results(entry: &Entry) -> Vec<String> {
    if matches!(entry.compute, Compute::Language) {
        return vec![language_result(entry.name).to_owned()];
    }
    entry.fields.iter().map(|f| field(entry, f)).collect()
}

/// What the functions give whose dimensions the language itself works out.
fn language_result(name: &str) -> &'static str {
    match name {
        "sqrt" => "the square root of the dimension of x",
        "cbrt" => "the cube root of the dimension of x",
        "asin" | "acos" | "atan" | "atan2" => "angle, shown in deg",
        "has_value" | "all" | "any" => "condition",
        "where_max" | "where_min" => "the label, or the value of an axis of numbers",
        "integral" | "running_integral" => "the dimension of f times that of y",
        "slope" => "the dimension of y over that of x",
        "intercept" => "the dimension of y",
        "difference" => "the dimension of f",
        "abs" | "sum" | "mean" | "rms" => "the dimension of its argument",
        "min" | "max" | "clamp" | "hypot" => "the dimension that its arguments share",
        _ => "pure number",
    }
}

/// `density: density`, with what else is to be known of a result.
#[must_use]
pub fn field(entry: &Entry, field: &Field) -> String {
    let dimension = match field.gives {
        Gives::Dimension(dimension) => dimension_name(dimension),
        Gives::Argument(index, factor) => {
            let argument = entry.parameters.get(index).map_or("argument", |p| p.name);
            if factor == Dimension::NONE {
                format!("dimension of {argument}")
            } else {
                format!("dimension of {argument} times {}", dimension_name(factor))
            }
        }
    };
    let head = if field.name.is_empty() {
        dimension
    } else {
        format!("{}: {dimension}", field.name)
    };
    let kind = field.speed.map(SpeedKind::name);
    let kind = kind.map_or_else(String::new, |kind| format!(" ({kind})"));
    let shown = field.shown;
    let shown = shown.map_or_else(String::new, |unit| format!(", shown in {unit}"));
    let line = if field.line { ", along the axis" } else { "" };
    let what = if field.what.is_empty() {
        String::new()
    } else {
        format!(", {}", field.what)
    };
    format!("{head}{kind}{shown}{line}{what}")
}

/// The name of a dimension, its base units where it has none.
#[must_use]
pub fn dimension_name(dimension: Dimension) -> String {
    match dimension.name() {
        Some(name) => name.to_owned(),
        None if dimension.is_number() => "pure number".to_owned(),
        None => dimension.symbols(),
    }
}
