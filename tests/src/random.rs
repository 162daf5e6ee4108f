//! Random numbers for generated sheets: the same on every machine and in every run.

/// A generator by G. Marsaglia's xorshift method (Journal of Statistical Software 8, 2003).
pub struct Random(u64);

impl Random {
    /// Starts from a seed.
    #[must_use]
    pub fn new(seed: u64) -> Self {
        Random(seed.wrapping_mul(0x9e37_79b9_7f4a_7c15) | 1)
    }

    /// The next 64 bits.
    pub fn bits(&mut self) -> u64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        self.0
    }

    /// A whole number below a bound.
    pub fn below(&mut self, bound: usize) -> usize {
        (self.bits() >> 11) as usize % bound.max(1)
    }

    /// One of a list.
    pub fn of<'a, T>(&mut self, list: &'a [T]) -> &'a T {
        &list[self.below(list.len())]
    }
}
