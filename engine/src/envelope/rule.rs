//! The sets of rules.

/// A set of rules for the loads of light airplanes.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Rule {
    /// 14 CFR part 23 before its amendment 64, which replaced the numbers by aims.
    Part23,
    /// Certification Specifications for Very Light Aeroplanes.
    CsVla,
    /// ASTM F2245, light sport airplanes.
    F2245,
    /// Certification Specifications for Sailplanes and Powered Sailplanes.
    Cs22,
    /// No set: the designer states the factors.
    Stated,
}

impl Rule {
    /// Every set, in a fixed order.
    pub const ALL: [Self; 5] = [
        Self::Part23,
        Self::CsVla,
        Self::F2245,
        Self::Cs22,
        Self::Stated,
    ];

    /// The word by which it is chosen.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Part23 => "14 CFR 23",
            Self::CsVla => "CS-VLA",
            Self::F2245 => "F2245",
            Self::Cs22 => "CS-22",
            Self::Stated => "stated",
        }
    }

    /// The set of a word, letter for letter.
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|rule| rule.word() == word)
    }
}
