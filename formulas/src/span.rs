//! Places in a sheet. A span counts bytes from the start of its statement, so that a statement that only moves
//! keeps every span; the statement itself knows where it stands.

/// A stretch of a statement's text, in bytes from the statement's first byte.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug, Default, PartialOrd, Ord)]
pub struct Span {
    /// First byte.
    pub start: u32,
    /// One past the last byte.
    pub end: u32,
}

impl Span {
    /// The stretch from `start` up to `end`.
    #[must_use]
    pub fn new(start: usize, end: usize) -> Self {
        // A sheet is at most 1 MiB long, so the cast keeps every place.
        Span {
            start: start as u32,
            end: end as u32,
        }
    }

    /// The smallest stretch that holds both.
    #[must_use]
    pub fn to(self, other: Span) -> Span {
        Span {
            start: self.start.min(other.start),
            end: self.end.max(other.end),
        }
    }

    /// The empty stretch just behind this one.
    #[must_use]
    pub fn behind(self) -> Span {
        Span {
            start: self.end,
            end: self.end,
        }
    }

    /// The text it covers, empty where it lies outside.
    #[must_use]
    pub fn of(self, text: &str) -> &str {
        text.get(self.start as usize..self.end as usize)
            .unwrap_or("")
    }
}
