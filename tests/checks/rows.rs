//! The rows of the checks: read from the tables beside this file, one row for each value, with its source.

/// The tables, by the name of their file.
const TABLES: [(&str, &str); 10] = [
    ("moment", include_str!("moment.csv")),
    ("balance", include_str!("balance.csv")),
    ("trim", include_str!("trim.csv")),
    ("mass", include_str!("mass.csv")),
    ("atmosphere", include_str!("atmosphere.csv")),
    ("units", include_str!("units.csv")),
    ("envelope", include_str!("envelope.csv")),
    ("structure", include_str!("structure.csv")),
    ("section", include_str!("section.csv")),
    ("wing", include_str!("wing.csv")),
];

/// First line of every table.
const HEAD: &str = "id,quantity,expected,unit,tolerance,source,kind,sheet,symbol,condition,note";

/// What a source may be.
const KINDS: [&str; 5] = [
    "published",
    "closed form",
    "library",
    "common practice",
    "from memory",
];

/// How far off a value may be.
#[derive(Clone, Copy, Debug)]
pub(crate) enum Tolerance {
    /// By so much, in the unit of the row.
    Absolute(f64),
    /// By that part of the value expected.
    Relative(f64),
}

impl Tolerance {
    /// How far off a value may be, in the unit of the row.
    pub(crate) fn of(self, expected: f64) -> f64 {
        match self {
            Tolerance::Absolute(by) => by,
            Tolerance::Relative(part) => part * expected.abs(),
        }
    }
}

/// Where a value comes out: a sheet, a symbol of it and the labels of one condition, `axis=label; axis=label`.
#[derive(Clone, Debug)]
pub(crate) struct Place {
    pub(crate) sheet: String,
    pub(crate) symbol: String,
    pub(crate) condition: Vec<(String, String)>,
}

/// One value from outside.
#[derive(Clone, Debug)]
pub(crate) struct Row {
    pub(crate) id: String,
    pub(crate) quantity: String,
    pub(crate) expected: f64,
    /// In the language's own spelling; `1` for a pure number.
    pub(crate) unit: String,
    pub(crate) tolerance: Tolerance,
    pub(crate) source: String,
    pub(crate) kind: String,
    /// Where it is worked out; `None` for a row left out.
    pub(crate) place: Option<Place>,
    /// A remark; of a row left out the reason.
    pub(crate) note: String,
}

/// All rows of a table.
pub(crate) fn table(name: &str) -> Vec<Row> {
    let (_, text) = TABLES
        .iter()
        .find(|(n, _)| *n == name)
        .unwrap_or_else(|| panic!("no table {name}"));
    let mut lines = text.lines();
    assert_eq!(lines.next(), Some(HEAD), "{name}");
    lines.map(row).collect()
}

/// All rows of all tables.
pub(crate) fn all() -> Vec<Row> {
    TABLES.iter().flat_map(|(name, _)| table(name)).collect()
}

fn row(line: &str) -> Row {
    let fields = fields(line);
    let [
        id,
        quantity,
        expected,
        unit,
        tolerance,
        source,
        kind,
        sheet,
        symbol,
        condition,
        note,
    ] = fields.as_slice()
    else {
        panic!("{line}: {} fields", fields.len());
    };
    assert!(
        !quantity.is_empty() && !source.is_empty(),
        "{id} has no source"
    );
    assert!(
        KINDS.contains(&kind.as_str()),
        "{id}: a source is no {kind}"
    );
    let place = (!sheet.is_empty()).then(|| Place {
        sheet: sheet.clone(),
        symbol: symbol.clone(),
        condition: labels(condition),
    });
    Row {
        id: id.clone(),
        quantity: quantity.clone(),
        expected: expected
            .parse()
            .unwrap_or_else(|_| panic!("{id}: {expected}")),
        unit: unit.clone(),
        tolerance: read_tolerance(id, tolerance),
        source: source.clone(),
        kind: kind.clone(),
        place,
        note: note.clone(),
    }
}

fn read_tolerance(id: &str, text: &str) -> Tolerance {
    let (grade, by) = text
        .split_once(' ')
        .unwrap_or_else(|| panic!("{id}: {text}"));
    let by: f64 = by.parse().unwrap_or_else(|_| panic!("{id}: {text}"));
    assert!(by > 0.0 && by.is_finite(), "{id}: {text}");
    match grade {
        "abs" => Tolerance::Absolute(by),
        "rel" => Tolerance::Relative(by),
        _ => panic!("{id}: {text}"),
    }
}

fn labels(text: &str) -> Vec<(String, String)> {
    text.split("; ")
        .filter(|part| !part.is_empty())
        .map(|part| {
            let (axis, label) = part.split_once('=').unwrap_or_else(|| panic!("{text}"));
            (axis.to_owned(), label.to_owned())
        })
        .collect()
}

/// The fields of a line of RFC 4180; no field of these tables holds a line break.
fn fields(line: &str) -> Vec<String> {
    let mut fields = vec![String::new()];
    let mut quoted = false;
    let mut characters = line.chars().peekable();
    while let Some(character) = characters.next() {
        let field = fields.last_mut().expect("one at least");
        match character {
            '"' if quoted && characters.peek() == Some(&'"') => {
                characters.next();
                field.push('"');
            }
            '"' => quoted = !quoted,
            ',' if !quoted => fields.push(String::new()),
            other => field.push(other),
        }
    }
    fields
}
