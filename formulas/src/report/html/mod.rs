//! The printed report: one HTML document with nothing outside it, set for paper, A4 or Letter upright.

mod closing;
mod lines;
mod style;
mod tables;

use super::cautions::{CAUTIONS, POUND_IS_FORCE, shows_pounds};
use super::svg::escaped;
use super::text::closing::assumptions;
use super::{Form, Report};
use crate::assist::trail::Trail;
use crate::syntax::Tree;
use std::fmt::Write as _;

/// What a print is made of.
#[derive(Clone, Copy, Debug)]
pub struct Input<'a> {
    /// The report.
    pub report: &'a Report,
    /// The computation form of the same text.
    pub form: &'a Form,
    /// Its tree.
    pub tree: &'a Tree,
    /// One governing condition worked in full, where something governs.
    pub worked: Option<&'a Trail>,
}

/// Writes the printed report. It holds no script and asks for nothing.
#[must_use]
pub fn write(input: &Input<'_>) -> String {
    let report = input.report;
    let title = report
        .sheet
        .title
        .as_deref()
        .unwrap_or("Sheet without title");
    let mut out = String::new();
    let _ = write!(
        out,
        "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\"/>\n<title>{}</title>\n<style>{}</style>\n</head>\n<body>\n",
        escaped(title),
        style::css(report, title)
    );
    title_block(&mut out, report, title);
    lines::inputs(&mut out, report, input.form);
    assumed(&mut out, report, input.form);
    lines::form(&mut out, input);
    closing::governing(&mut out, report);
    closing::worked(&mut out, input.worked);
    closing::requirements(&mut out, report, input.form);
    closing::sensitivity(&mut out, report);
    closing::figures(&mut out, report);
    closing::freebodies(&mut out, report, input.form);
    closing::findings(&mut out, report);
    cautions(&mut out);
    signatures(&mut out);
    out += "</body>\n</html>\n";
    out
}

fn title_block(out: &mut String, report: &Report, title: &str) {
    let sheet = &report.sheet;
    let _ = writeln!(out, "<header>\n<h1>{}</h1>\n<dl>", escaped(title));
    let entries = [
        ("revision", sheet.revision.as_deref()),
        ("date", sheet.date.as_deref()),
        ("prepared", sheet.prepared.as_deref()),
        ("checked", sheet.checked.as_deref()),
        ("basis", sheet.basis.as_deref()),
        ("digest", Some(report.digest.as_str())),
        ("engine", Some(report.engine)),
    ];
    for (word, text) in entries {
        if let Some(text) = text {
            entry(out, word, text);
        }
    }
    for other in &report.sheets {
        entry(
            out,
            "rests on",
            &format!("{}, digest {}", other.name, other.digest),
        );
    }
    *out += "</dl>\n";
    if shows_pounds(report) {
        let _ = writeln!(out, "<p>{POUND_IS_FORCE}</p>");
    }
    *out += "</header>\n";
}

fn entry(out: &mut String, word: &str, text: &str) {
    let _ = writeln!(out, "<div><dt>{word}</dt><dd>{}</dd></div>", escaped(text));
}

fn assumed(out: &mut String, report: &Report, form: &Form) {
    let found = assumptions(report, form);
    if found.is_empty() {
        return;
    }
    *out += "<h2>Assumptions to be confirmed</h2>\n<ul>\n";
    for (item, text) in found {
        let _ = writeln!(out, "<li>item {}, {}</li>", escaped(&item), escaped(&text));
    }
    *out += "</ul>\n";
}

fn cautions(out: &mut String) {
    *out += "<section class=\"whole\">\n<h2>Cautions, and what is not covered</h2>\n";
    for caution in CAUTIONS {
        let _ = writeln!(out, "<p>{}</p>", escaped(caution));
    }
    *out += "</section>\n";
}

fn signatures(out: &mut String) {
    *out += "<section class=\"boxes\">\n";
    for word in ["prepared", "checked", "approved"] {
        let _ = writeln!(
            out,
            "<div><b>{word}</b><span>name</span><span>signature</span><span>date</span></div>"
        );
    }
    *out += "</section>\n<p class=\"small\">Signatures stand for the text with the digest above. A copy with another digest is another sheet.</p>\n";
}

#[cfg(test)]
mod tests {
    use crate::Sheet;

    #[test]
    fn a_title_is_text_wherever_it_stands() {
        let text = "title <script>alert(1)</script></style> \"q\"\nx [<b>] = 1 ; <script>\nfigure \"<script>\": x against x\nnote </style><script>\n";
        let print = Sheet::open(text).print();
        assert!(!print.contains("<script"), "{print}");
        assert_eq!(print.matches("</style>").count(), 2, "{print}");
    }

    #[test]
    fn the_print_says_what_a_checker_looks_for() {
        let text = "title T\nsources required\nvary cg: fwd | aft\nx [ft] by cg = 1 +/- 0.1 | 2 ; drawing\nF [lb] = 3 lb ; assumed: until tests\n\
            M [ft.lb] = F*x\ngoverning M over cg\nrequire M <= 5 ft.lb ; stated\n";
        let print = Sheet::open(text).print();
        for part in [
            "from items 2, 3",
            "Assumptions to be confirmed",
            "until tests",
            "2 conditions",
            "NOT MET",
            "Cautions",
            "<b>approved</b>",
            "lb is pound-force",
            "counter(pages)",
            "worked in full",
        ] {
            assert!(print.contains(part), "{part}: {print}");
        }
    }
}
