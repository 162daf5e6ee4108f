//! How the print looks: ruled like a computation form, black on white; page n of m, digest and engine on each page.

use crate::report::Report;
use std::fmt::Write as _;

const SHEET: &str = "\
@page{size:portrait;margin:18mm 14mm 20mm 16mm}\
*{box-sizing:border-box}\
body{font:10pt/1.35 system-ui,sans-serif;color:#000;background:#fff;margin:0 auto;max-width:182mm;font-variant-numeric:tabular-nums}\
h1{font-size:15pt;margin:0 0 2mm}\
h2{font-size:11.5pt;margin:6mm 0 1.5mm;border-bottom:1.2pt solid #000;break-after:avoid}\
h3{font-size:10pt;margin:3mm 0 1mm;break-after:avoid}\
p{margin:1mm 0}\
header{border:1.2pt solid #000;padding:3mm}\
dl{margin:0;display:grid;grid-template-columns:1fr 1fr;gap:0 6mm}\
dl div{display:flex;gap:2mm;border-top:.4pt solid #888;padding:.6mm 0}\
dt{min-width:18mm;font-size:8.5pt}\
dd{margin:0;overflow-wrap:anywhere}\
table{border-collapse:collapse;width:100%;margin:1mm 0 2mm}\
table.form{table-layout:fixed}col.item{width:5.5%}col.symbol{width:15%}col.unit{width:10%}\
col.value{width:10.5%}col.remark{width:24%}\
thead{display:table-header-group}\
tr{break-inside:avoid}\
th,td{border:.4pt solid #777;padding:.5mm 1.2mm;text-align:left;vertical-align:top;overflow-wrap:break-word}\
th{font-weight:600;font-size:8.5pt;border-bottom:.8pt solid #000}\
td.n,th.n{text-align:right;white-space:nowrap;overflow-wrap:normal}\
td.f,td.r{overflow-wrap:anywhere}\
td.f{font-family:ui-monospace,monospace;font-size:8.8pt}\
tr.part,tr.sub{break-after:avoid}tr.part td{font-weight:700;border-bottom:.8pt solid #000;padding-top:2mm}\
tr.sub td{font-style:italic}\
table.block{width:auto;margin:.5mm 0;font-size:8.8pt}\
.small,.from{font-size:8.5pt}\
.query{font-size:8.5pt;border-left:2pt solid #000;padding-left:1.5mm;margin:.8mm 0}\
.bad{font-weight:700;text-decoration:underline}\
.whole,figure{break-inside:avoid}\
figure{margin:2mm 0}\
figure svg{width:100%;height:auto;max-height:215mm}\
.boxes{display:grid;grid-template-columns:repeat(3,1fr);break-inside:avoid;margin-top:6mm;border:1.2pt solid #000}\
.boxes div{min-height:30mm;padding:1.5mm;border-right:.8pt solid #000;display:flex;flex-direction:column}\
.boxes div:last-child{border-right:0}\
.boxes span{font-size:8pt;flex:1;border-bottom:.4pt solid #777;display:flex;align-items:flex-end}\
@media screen{body{padding:8mm}}\
:root{--figure-ink:#000;--figure-paper:#fff;color-scheme:light}";

/// The style with what stands in the margins of each page.
pub(super) fn css(report: &Report, title: &str) -> String {
    let foot = format!(
        "digest {} · engine {}",
        report.short_digest(),
        report.engine
    );
    let revision = report.sheet.revision.as_deref();
    let head = match revision {
        Some(revision) => format!("{title} · revision {revision}"),
        None => title.to_owned(),
    };
    let head: String = head.chars().take(110).collect();
    format!(
        "{SHEET}@page{{@top-left{{content:\"{}\";font:8pt system-ui,sans-serif}}\
         @bottom-left{{content:\"{}\";font:8pt system-ui,sans-serif}}\
         @bottom-right{{content:\"page \" counter(page) \" of \" counter(pages);font:8pt system-ui,sans-serif}}}}",
        quoted(&head),
        quoted(&foot)
    )
}

/// A text as it may stand in a string of a style sheet inside a page: all but letters, digits and blanks by their codes.
fn quoted(text: &str) -> String {
    let mut out = String::new();
    for c in text.chars() {
        if c.is_alphanumeric() || c == ' ' {
            out.push(c);
        } else {
            let _ = write!(out, "\\{:x} ", c as u32);
        }
    }
    out
}
