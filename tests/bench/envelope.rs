//! The envelope workload as a sheet.

const AXES: [(&str, f64, f64); 5] = [
    ("h [ft]", 12_000.0, 0.0),
    ("W [lbf]", 1600.0, 2550.0),
    ("x_cg [ft]", 5.6, 6.5),
    ("V [kn]", 60.0, 180.0),
    ("n [1]", -1.52, 3.8),
];

const LINES: &str = include_str!("sheets/envelope.pitchwright");

/// The sheet with axes of these lengths.
#[must_use]
pub(crate) fn text(lengths: [usize; 5]) -> String {
    let axes = AXES.iter().zip(lengths);
    let axes = axes.map(|((name, from, to), count)| match count {
        1 => format!("vary {name}: {to}\n"),
        _ => format!("vary {name}: {from} to {to} count {count}\n"),
    });
    axes.chain([LINES.to_owned()]).collect()
}
