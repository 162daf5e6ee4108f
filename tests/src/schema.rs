//! A value held against a JSON Schema: as much of the standard as the report's schema uses, and stricter in one thing: a
//! name that the schema does not have is an error here, so that the schema cannot fall behind.

use serde_json::Value;

/// What is wrong with a value, each with its place.
#[must_use]
pub fn faults(schema: &Value, value: &Value) -> Vec<String> {
    let mut faults = Vec::new();
    let check = Check { root: schema };
    check.value(schema, value, "$", &mut faults);
    faults
}

struct Check<'a> {
    root: &'a Value,
}

impl Check<'_> {
    fn value(&self, schema: &Value, value: &Value, at: &str, faults: &mut Vec<String>) {
        if let Some(name) = schema["$ref"].as_str() {
            let target = name.strip_prefix('#').and_then(|p| self.root.pointer(p));
            match target {
                Some(target) => self.value(target, value, at, faults),
                None => faults.push(format!("{at}: the schema has no {name}")),
            }
        }
        if let Some(any) = schema["anyOf"].as_array() {
            let fits = |one: &Value| {
                let mut inner = Vec::new();
                self.value(one, value, at, &mut inner);
                inner
            };
            let all: Vec<Vec<String>> = any.iter().map(fits).collect();
            if !all.iter().any(Vec::is_empty) {
                faults.push(format!("{at}: fits none: {all:?}"));
            }
        }
        if schema.get("const").is_some_and(|wanted| wanted != value) {
            faults.push(format!("{at}: is {value}, not {}", schema["const"]));
        }
        if schema["enum"]
            .as_array()
            .is_some_and(|all| !all.contains(value))
        {
            faults.push(format!("{at}: {value} is none of {}", schema["enum"]));
        }
        if schema.get("type").is_some_and(|t| !has_type(t, value)) {
            faults.push(format!("{at}: {value} is no {}", schema["type"]));
        }
        bounds(schema, value, at, faults);
        self.parts(schema, value, at, faults);
    }

    fn parts(&self, schema: &Value, value: &Value, at: &str, faults: &mut Vec<String>) {
        if let (Some(items), Some(list)) = (schema.get("items"), value.as_array()) {
            for (place, item) in list.iter().enumerate() {
                self.value(items, item, &format!("{at}[{place}]"), faults);
            }
        }
        let Some(object) = value.as_object() else {
            return;
        };
        for name in schema["required"].as_array().into_iter().flatten() {
            if name.as_str().is_none_or(|name| !object.contains_key(name)) {
                faults.push(format!("{at}: lacks {name}"));
            }
        }
        let named = schema.get("properties");
        let other = schema.get("additionalProperties");
        for (name, part) in object {
            let inner = format!("{at}.{name}");
            match named.and_then(|n| n.get(name)).or(other) {
                Some(schema) => self.value(schema, part, &inner, faults),
                None if named.is_some() => {
                    faults.push(format!("{inner} is not in format.schema.json"));
                }
                None => {}
            }
        }
    }
}

fn has_type(wanted: &Value, value: &Value) -> bool {
    let is = |name: &str| match name {
        "null" => value.is_null(),
        "boolean" => value.is_boolean(),
        "number" => value.is_number(),
        "integer" => value.is_i64() || value.is_u64(),
        "string" => value.is_string(),
        "array" => value.is_array(),
        "object" => value.is_object(),
        _ => false,
    };
    match wanted {
        Value::Array(any) => any.iter().filter_map(Value::as_str).any(is),
        one => one.as_str().is_some_and(is),
    }
}

fn bounds(schema: &Value, value: &Value, at: &str, faults: &mut Vec<String>) {
    if let (Some(least), Some(number)) = (schema["minimum"].as_f64(), value.as_f64())
        && number < least
    {
        faults.push(format!("{at}: {number} is below {least}"));
    }
    let length = value.as_str().map(|text| text.chars().count() as u64);
    if let Some(length) = length {
        let short = schema["minLength"]
            .as_u64()
            .is_some_and(|least| length < least);
        let long = schema["maxLength"]
            .as_u64()
            .is_some_and(|most| length > most);
        if short || long {
            faults.push(format!("{at}: is {length} characters long"));
        }
    }
}
