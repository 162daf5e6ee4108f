//! Lines of plain text: rules, wrapped prose, cells beside each other. Widths count characters.

/// Characters to a line.
pub(super) const WIDTH: usize = 120;

/// The text as it grows.
#[derive(Default)]
pub(super) struct Page {
    out: String,
}

/// A cell: what stands in it, how wide it is, and whether it stands to the right.
pub(super) struct Cell<'a> {
    pub(super) text: &'a str,
    pub(super) width: usize,
    pub(super) right: bool,
}

impl Page {
    pub(super) fn finish(self) -> String {
        self.out
    }

    /// A line, blanks at its end left off.
    pub(super) fn line(&mut self, text: &str) {
        self.out.push_str(text.trim_end());
        self.out.push('\n');
    }

    pub(super) fn blank(&mut self) {
        self.out.push('\n');
    }

    pub(super) fn rule(&mut self, sign: &str) {
        self.line(&sign.repeat(WIDTH));
    }

    /// A heading over a thin rule.
    pub(super) fn heading(&mut self, text: &str) {
        self.blank();
        self.paragraph("", text);
        self.rule("-");
    }

    /// Prose behind a lead (`3. `), its further lines set in as far as the lead.
    pub(super) fn paragraph(&mut self, lead: &str, text: &str) {
        let indent = lead.chars().count();
        let mut lead = lead.to_owned();
        for part in wrapped(text, WIDTH.saturating_sub(indent).max(20)) {
            self.line(&format!("{lead}{part}"));
            lead = " ".repeat(indent);
        }
    }

    /// Cells beside each other, one blank between, each wrapped in its width.
    pub(super) fn cells(&mut self, cells: &[Cell]) {
        let columns: Vec<Vec<String>> = cells.iter().map(|c| wrapped(c.text, c.width)).collect();
        let height = columns.iter().map(Vec::len).max().unwrap_or(0);
        for i in 0..height {
            let parts = cells.iter().zip(&columns).map(|(cell, lines)| {
                let part = lines.get(i).map_or("", String::as_str);
                padded(part, cell.width, cell.right)
            });
            let line: Vec<String> = parts.collect();
            self.line(&line.join(" "));
        }
    }
}

/// The text filled up with blanks.
pub(super) fn padded(text: &str, width: usize, right: bool) -> String {
    let fill = " ".repeat(width.saturating_sub(text.chars().count()));
    if right {
        format!("{fill}{text}")
    } else {
        format!("{text}{fill}")
    }
}

/// The text in lines of at most so many characters, broken at blanks where it can be; at least one line.
pub(super) fn wrapped(text: &str, width: usize) -> Vec<String> {
    let mut lines = vec![String::new()];
    let mut used = 0;
    for word in text.split_whitespace().flat_map(|word| pieces(word, width)) {
        let length = word.chars().count();
        if used > 0 && used + 1 + length > width {
            lines.push(String::new());
            used = 0;
        }
        if let Some(line) = lines.last_mut() {
            if used > 0 {
                line.push(' ');
                used += 1;
            }
            line.push_str(&word);
            used += length;
        }
    }
    lines
}

/// A word cut where it is wider than the column.
fn pieces(word: &str, width: usize) -> Vec<String> {
    let letters: Vec<char> = word.chars().collect();
    let chunks = letters.chunks(width.max(1));
    chunks.map(|chunk| chunk.iter().collect()).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn text_is_broken_at_blanks_and_long_words_are_cut() {
        assert_eq!(wrapped("a bc def", 4), ["a bc", "def"]);
        assert_eq!(wrapped("abcdefgh i", 3), ["abc", "def", "gh", "i"]);
        assert_eq!(wrapped("", 3), [""]);
        assert_eq!(wrapped("wörter zählen", 6), ["wörter", "zählen"]);
    }

    #[test]
    fn cells_stand_beside_each_other() {
        let cell = |text, width, right| Cell { text, width, right };
        let mut page = Page::default();
        page.cells(&[
            cell("7", 3, true),
            cell("a long one", 6, false),
            cell("x", 2, false),
        ]);
        assert_eq!(page.finish(), "  7 a long x\n    one\n");
    }
}
