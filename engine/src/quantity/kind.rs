//! The kind of a speed: equivalent, calibrated or true.

use std::fmt;

/// Which airspeed a speed is, where its unit says so.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub enum SpeedKind {
    /// Equivalent airspeed: the speed of the same dynamic pressure at the standard sea-level density.
    Equivalent,
    /// Calibrated airspeed: the speed of the same impact pressure at standard sea-level conditions.
    Calibrated,
    /// True airspeed: the speed relative to the undisturbed air.
    True,
}

impl SpeedKind {
    /// Every kind, in a fixed order.
    pub const ALL: [Self; 3] = [Self::Equivalent, Self::Calibrated, Self::True];

    /// The short word of the trade: `"EAS"`, `"CAS"` or `"TAS"`.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Equivalent => "EAS",
            Self::Calibrated => "CAS",
            Self::True => "TAS",
        }
    }

    /// The kind written out, such as `"equivalent airspeed"`.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Equivalent => "equivalent airspeed",
            Self::Calibrated => "calibrated airspeed",
            Self::True => "true airspeed",
        }
    }

    /// The kind of a short word, letter for letter.
    ///
    /// # Example
    /// ```
    /// use engine::quantity::SpeedKind;
    /// assert_eq!(SpeedKind::of_word("CAS"), Some(SpeedKind::Calibrated));
    /// assert_eq!(SpeedKind::of_word("IAS"), None);
    /// ```
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|kind| kind.word() == word)
    }
}

impl fmt::Display for SpeedKind {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        out.write_str(self.word())
    }
}
