//! The categories of airplanes that the rules tell apart.

/// A category of airplanes. CS-22 has utility and acrobatic only; CS-VLA and F2245 have one, called normal here.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Category {
    /// Normal.
    Normal,
    /// Utility; category U of CS-22.
    Utility,
    /// Acrobatic; category A of CS-22.
    Acrobatic,
    /// Commuter, of 14 CFR 23 only.
    Commuter,
}

impl Category {
    /// Every category, in a fixed order.
    pub const ALL: [Self; 4] = [Self::Normal, Self::Utility, Self::Acrobatic, Self::Commuter];

    /// The word by which it is chosen.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Normal => "normal",
            Self::Utility => "utility",
            Self::Acrobatic => "acrobatic",
            Self::Commuter => "commuter",
        }
    }

    /// The category of a word, letter for letter.
    pub fn of_word(word: &str) -> Option<Self> {
        Self::ALL
            .into_iter()
            .find(|category| category.word() == word)
    }
}
