//! Writes SVG: lines, paths, marks and text, every text escaped.

use std::fmt::Write as _;

/// Height of letters.
pub(super) const LETTERS: f64 = 12.0;

const STYLE: &str = ".pw-figure{color:var(--figure-ink,#161616)}.pw-paper{fill:var(--figure-paper,#ffffff)}\
.pw-halo{stroke:var(--figure-paper,#ffffff)}\
@media (prefers-color-scheme:dark){.pw-figure{color:var(--figure-ink,#e9e6df)}\
.pw-paper{fill:var(--figure-paper,#191a1c)}.pw-halo{stroke:var(--figure-paper,#191a1c)}}\
@media print{.pw-figure{color:#000}.pw-paper{fill:#fff}.pw-halo{stroke:#fff}}";

/// Where a text hangs on its point.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Anchor {
    Start,
    Middle,
    End,
}

/// A drawing in hand.
#[derive(Default)]
pub(super) struct Pen {
    out: String,
}

impl Pen {
    /// A straight line; `style` is further attributes.
    pub(super) fn line(&mut self, from: (f64, f64), to: (f64, f64), style: &str) {
        let (x1, y1, x2, y2) = (at(from.0), at(from.1), at(to.0), at(to.1));
        let _ = writeln!(
            self.out,
            r#"<path d="M{x1} {y1}L{x2} {y2}" stroke="currentColor" {style}/>"#
        );
    }

    /// A path without filling.
    pub(super) fn path(&mut self, d: &str, style: &str) {
        let _ = writeln!(
            self.out,
            r#"<path d="{d}" fill="none" stroke="currentColor" stroke-linejoin="round" {style}/>"#
        );
    }

    /// A path filled with ink or paper.
    pub(super) fn shape(&mut self, d: &str, filled: bool) {
        let fill = if filled {
            r#"fill="currentColor""#
        } else {
            r##"fill="#ffffff" class="pw-paper""##
        };
        let _ = writeln!(
            self.out,
            r#"<path d="{d}" {fill} stroke="currentColor" stroke-width="1.1"/>"#
        );
    }

    /// A text on a halo of paper, so that lines behind it do not touch its letters.
    pub(super) fn text(&mut self, place: (f64, f64), anchor: Anchor, text: &str) {
        self.turned(place, anchor, text, 0.0);
    }

    /// The same turned by so many degrees, clockwise.
    pub(super) fn turned(&mut self, place: (f64, f64), anchor: Anchor, text: &str, turn: f64) {
        let anchor = match anchor {
            Anchor::Start => "start",
            Anchor::Middle => "middle",
            Anchor::End => "end",
        };
        let (x, y) = (at(place.0), at(place.1));
        let turn = if turn == 0.0 {
            String::new()
        } else {
            format!(r#" transform="rotate({} {x} {y})""#, at(turn))
        };
        let text = escaped(text);
        let _ = writeln!(
            self.out,
            r##"<text x="{x}" y="{y}" text-anchor="{anchor}" fill="currentColor" stroke="#ffffff" class="pw-halo" stroke-width="3" stroke-linejoin="round" paint-order="stroke"{turn}>{text}</text>"##
        );
    }

    /// The whole drawing with its name and what it shows in words.
    pub(super) fn finish(self, (width, height): (f64, f64), title: &str, words: &str) -> String {
        let (w, h) = (at(width), at(height));
        let (title, words) = (escaped(title), escaped(words));
        format!(
            r##"<svg xmlns="http://www.w3.org/2000/svg" class="pw-figure" role="img" viewBox="0 0 {w} {h}" width="{w}" height="{h}" color="#161616" font-family="system-ui, sans-serif" font-size="{LETTERS}">
<title>{title}</title>
<desc>{words}</desc>
<style>{STYLE}</style>
<rect class="pw-paper" width="{w}" height="{h}" fill="#ffffff"/>
{}</svg>
"##,
            self.out
        )
    }
}

/// A coordinate as written.
pub(super) fn at(value: f64) -> String {
    if !value.is_finite() {
        return "0".to_owned();
    }
    let text = format!("{value:.1}");
    let text = text.strip_suffix(".0").unwrap_or(&text);
    if text == "-0" { "0" } else { text }.to_owned()
}

/// A text as it may stand in XML and HTML, in an element or in a quoted attribute.
#[must_use]
pub fn escaped(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for c in text.chars() {
        match c {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\'' => out.push_str("&#39;"),
            // Characters that XML or HTML does not have, written out or not.
            '\u{0}'..='\u{8}'
            | '\u{b}'
            | '\u{c}'
            | '\u{e}'..='\u{1f}'
            | '\u{7f}'..='\u{9f}'
            | '\u{fffe}'
            | '\u{ffff}' => {
                out.push('\u{fffd}');
            }
            c => out.push(c),
        }
    }
    out
}

/// About how wide a text is: no font is at hand, so letters count by how wide they usually are.
pub(super) fn width(text: &str) -> f64 {
    let of = |c: char| match c {
        'i' | 'j' | 'l' | '.' | ',' | ':' | ';' | '|' | '\'' | '!' | ' ' | '(' | ')' | '/' => 0.33,
        'm' | 'w' | 'M' | 'W' | '@' | '%' => 0.9,
        'A'..='Z' => 0.68,
        c if (c as u32) >= 0x1100 => 1.0,
        _ => 0.57,
    };
    text.chars().map(of).sum::<f64>() * LETTERS
}

/// A text cut to so many characters.
pub(super) fn cut(text: &str, most: usize) -> String {
    if text.chars().count() <= most {
        return text.to_owned();
    }
    let kept: String = text.chars().take(most.saturating_sub(1)).collect();
    kept + "…"
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn texts_are_escaped_and_hold_nothing_that_xml_refuses() {
        assert_eq!(
            escaped("<a b=\"c\" d='e'>&\u{1}\u{85}\t"),
            "&lt;a b=&quot;c&quot; d=&#39;e&#39;&gt;&amp;\u{fffd}\u{fffd}\t"
        );
    }

    #[test]
    fn coordinates_are_short_and_always_numbers() {
        assert_eq!(at(12.0), "12");
        assert_eq!(at(-0.01), "0");
        assert_eq!(at(f64::NAN), "0");
        assert_eq!(at(1.25), "1.2");
    }
}
