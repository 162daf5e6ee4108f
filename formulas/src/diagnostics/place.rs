//! From bytes to the lines and columns that people and editors count.

/// The lines of a text.
pub(super) struct Lines<'a> {
    text: &'a str,
    /// The byte at which each line starts.
    starts: Vec<usize>,
}

/// A stretch of one line: characters, and UTF-16 units.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) struct Place {
    pub(super) line: u32,
    pub(super) column: u32,
    pub(super) length: u32,
    pub(super) column16: u32,
    pub(super) length16: u32,
}

impl<'a> Lines<'a> {
    /// Finds the lines.
    pub(super) fn of(text: &'a str) -> Self {
        let ends = text.match_indices('\n').map(|(at, _)| at + 1);
        Lines {
            text,
            starts: std::iter::once(0).chain(ends).collect(),
        }
    }

    /// A stretch of bytes, cut at the end of the line in which it starts.
    pub(super) fn shown(&self, start: usize, end: usize) -> Place {
        let rest = self.slice(start, end);
        let line = rest.split('\n').next().unwrap_or("");
        // A carriage return belongs to the end of the line only where a line feed follows.
        let line = if line.len() < rest.len() {
            line.strip_suffix('\r').unwrap_or(line)
        } else {
            line
        };
        self.place(start, line)
    }

    /// A stretch of bytes, over as many lines as it takes.
    pub(super) fn whole(&self, start: usize, end: usize) -> Place {
        self.place(start, self.slice(start, end))
    }

    fn place(&self, start: usize, stretch: &str) -> Place {
        let line = self.starts.partition_point(|s| *s <= start).max(1);
        let line_start = self.starts.get(line - 1).copied().unwrap_or(0);
        let before = self.slice(line_start, start);
        let (column, column16) = lengths(before);
        let (length, length16) = lengths(stretch);
        Place {
            line: line as u32,
            column: column + 1,
            length,
            column16: column16 + 1,
            length16,
        }
    }

    fn slice(&self, start: usize, end: usize) -> &'a str {
        self.text.get(start..end).unwrap_or("")
    }
}

fn lengths(text: &str) -> (u32, u32) {
    let units = text.chars().map(char::len_utf16).sum::<usize>();
    (text.chars().count() as u32, units as u32)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn place(line: u32, column: u32, length: u32, column16: u32, length16: u32) -> Place {
        Place {
            line,
            column,
            length,
            column16,
            length16,
        }
    }

    #[test]
    fn columns_count_characters_and_utf16_units() {
        let text = "α = 1\n𝑞 = βx\n";
        let at = text.find('β').unwrap();
        assert_eq!(Lines::of(text).shown(at, at + 3), place(2, 5, 2, 6, 2));
        assert_eq!(
            Lines::of(text).shown(text.len(), text.len()),
            place(3, 1, 0, 1, 0)
        );
    }

    #[test]
    fn a_stretch_is_shown_up_to_the_end_of_its_line() {
        let text = "x = (a +\r\n b)\n";
        assert_eq!(Lines::of(text).shown(4, 13), place(1, 5, 4, 5, 4));
        assert_eq!(Lines::of(text).whole(4, 13), place(1, 5, 9, 5, 9));
    }

    #[test]
    fn places_outside_the_text_are_empty() {
        assert_eq!(Lines::of("ab").shown(7, 9).length, 0);
    }
}
