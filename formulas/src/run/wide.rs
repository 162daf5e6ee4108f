//! Loops over whole blocks, compiled for the widest vector registers of the machine at hand. Every loop does the same
//! operations on each value in the same order, so that the width changes no bit.

use crate::plan::code::Arithmetic;

/// An operand of a block: a value for each condition, or one for all.
#[derive(Clone, Copy, Debug)]
pub(super) enum Source<'a> {
    Block(&'a [f64]),
    Value(f64),
}

impl Source<'_> {
    /// The value of a condition.
    #[inline(always)]
    pub(super) fn at(&self, condition: usize) -> f64 {
        match self {
            Source::Block(values) => values[condition],
            Source::Value(value) => *value,
        }
    }
}

/// Runs a loop with the widest instructions there are.
#[cfg(not(target_arch = "wasm32"))]
#[inline(always)]
fn widest<R>(loops: impl FnOnce() -> R) -> R {
    machine().dispatch(loops)
}

/// What the machine can do, found out once.
#[cfg(not(target_arch = "wasm32"))]
#[inline(always)]
pub(super) fn machine() -> pulp::Arch {
    static MACHINE: std::sync::OnceLock<pulp::Arch> = std::sync::OnceLock::new();
    *MACHINE.get_or_init(pulp::Arch::new)
}

/// Runs a loop with the widest instructions there are: those that the module was compiled for.
#[cfg(target_arch = "wasm32")]
#[inline(always)]
fn widest<R>(loops: impl FnOnce() -> R) -> R {
    loops()
}

/// A sign over a block. The results are those of IEEE arithmetic: no check, and a zero may carry a sign.
pub(super) fn arithmetic(op: Arithmetic, a: Source<'_>, b: Source<'_>, out: &mut [f64]) {
    match op {
        Arithmetic::Add => pairs(a, b, out, |x, y| x + y),
        Arithmetic::Subtract => pairs(a, b, out, |x, y| x - y),
        Arithmetic::Multiply => pairs(a, b, out, |x, y| x * y),
        Arithmetic::Divide => pairs(a, b, out, |x, y| x / y),
    }
}

/// Any plain function of two operands over a block.
#[inline(always)]
pub(super) fn pairs(
    a: Source<'_>,
    b: Source<'_>,
    out: &mut [f64],
    f: impl Fn(f64, f64) -> f64 + Copy,
) {
    let n = out.len();
    match (a, b) {
        (Source::Block(a), Source::Block(b)) => {
            let (a, b) = (&a[..n], &b[..n]);
            widest(
                #[inline(always)]
                || (0..n).for_each(|i| out[i] = f(a[i], b[i])),
            );
        }
        (Source::Block(a), Source::Value(b)) => {
            let a = &a[..n];
            widest(
                #[inline(always)]
                || (0..n).for_each(|i| out[i] = f(a[i], b)),
            );
        }
        (Source::Value(a), Source::Block(b)) => {
            let b = &b[..n];
            widest(
                #[inline(always)]
                || (0..n).for_each(|i| out[i] = f(a, b[i])),
            );
        }
        (Source::Value(a), Source::Value(b)) => out.fill(f(a, b)),
    }
}

/// Any plain function of one operand over a block.
#[inline(always)]
pub(super) fn singles(a: Source<'_>, out: &mut [f64], f: impl Fn(f64) -> f64 + Copy) {
    let n = out.len();
    match a {
        Source::Block(a) => {
            let a = &a[..n];
            widest(
                #[inline(always)]
                || (0..n).for_each(|i| out[i] = f(a[i])),
            );
        }
        Source::Value(a) => out.fill(f(a)),
    }
}

/// 0 of a finite number; of anything else no number, which stays so in a sum.
#[inline(always)]
fn nothing_of(value: f64) -> f64 {
    value * 0.0
}

/// Whether all values are finite numbers.
pub(super) fn finite(values: Source<'_>) -> bool {
    match values {
        Source::Value(value) => value.is_finite(),
        Source::Block(values) => widest(
            #[inline(always)]
            || {
                let mut lanes = [0.0f64; 8];
                let (chunks, rest) = values.as_chunks::<8>();
                for chunk in chunks {
                    for i in 0..8 {
                        lanes[i] += nothing_of(chunk[i]);
                    }
                }
                let mut sum = 0.0;
                for lane in lanes {
                    sum += lane;
                }
                for value in rest {
                    sum += nothing_of(*value);
                }
                sum == 0.0
            },
        ),
    }
}

#[inline(always)]
fn larger(a: f64, b: f64) -> f64 {
    if a > b { a } else { b }
}

#[inline(always)]
fn smaller(a: f64, b: f64) -> f64 {
    if a < b { a } else { b }
}

/// The place of the first value that equals this one; 0 where there is none.
pub(super) fn position(values: &[f64], value: f64) -> usize {
    const TOGETHER: usize = 16;
    let (chunks, rest) = values.as_chunks::<TOGETHER>();
    let found = widest(
        #[inline(always)]
        || {
            let holds =
                |chunk: &[f64; TOGETHER]| chunk.iter().fold(false, |h, v| h | (*v == value));
            chunks.iter().position(holds)
        },
    );
    let (start, last) = match found {
        Some(chunk) => (chunk * TOGETHER, &chunks[chunk][..]),
        None => (chunks.len() * TOGETHER, rest),
    };
    let within = last.iter().position(|v| *v == value);
    within.map_or(0, |at| start + at)
}

/// What a block of results comes to.
#[derive(Clone, Copy, PartialEq, Debug)]
pub(super) struct Settled {
    /// Whether all values are finite numbers.
    pub(super) finite: bool,
    /// The largest and the smallest, where all are finite.
    pub(super) largest: f64,
    pub(super) smallest: f64,
}

impl Settled {
    #[cfg(target_arch = "wasm32")]
    fn of_none() -> Self {
        Settled {
            finite: true,
            largest: f64::NEG_INFINITY,
            smallest: f64::INFINITY,
        }
    }

    /// Takes one more value, and the sign off it where it is zero.
    #[inline(always)]
    fn take(&mut self, value: &mut f64) {
        *value += 0.0;
        self.finite &= nothing_of(*value) == 0.0;
        self.largest = larger(*value, self.largest);
        self.smallest = smaller(*value, self.smallest);
    }

    #[cfg(target_arch = "wasm32")]
    #[inline(always)]
    fn with(self, other: Settled) -> Self {
        Settled {
            finite: self.finite && other.finite,
            largest: larger(other.largest, self.largest),
            smallest: smaller(other.smallest, self.smallest),
        }
    }
}

/// Takes the sign off zeros; says whether all values are finite numbers, and their extremes.
#[cfg(target_arch = "wasm32")]
pub(super) fn settle(values: &mut [f64]) -> Settled {
    let (mut high, mut low) = ([f64::NEG_INFINITY; 4], [f64::INFINITY; 4]);
    let mut nothing = [0.0f64; 4];
    let (chunks, rest) = values.as_chunks_mut::<4>();
    for chunk in chunks {
        for i in 0..4 {
            let value = chunk[i] + 0.0;
            chunk[i] = value;
            nothing[i] += nothing_of(value);
            high[i] = larger(value, high[i]);
            low[i] = smaller(value, low[i]);
        }
    }
    let mut all = Settled::of_none();
    for i in 0..4 {
        all = all.with(Settled {
            finite: nothing[i] == 0.0,
            largest: high[i],
            smallest: low[i],
        });
    }
    rest.iter_mut().for_each(|value| all.take(value));
    all
}

/// Takes the sign off zeros; says whether all values are finite numbers, and their extremes. Written with vectors by
/// hand: the compiler makes one value at a time of this loop where registers are wide.
#[cfg(not(target_arch = "wasm32"))]
pub(super) fn settle(values: &mut [f64]) -> Settled {
    machine().dispatch(Settle(values))
}

#[cfg(not(target_arch = "wasm32"))]
struct Settle<'a>(&'a mut [f64]);

#[cfg(not(target_arch = "wasm32"))]
impl pulp::WithSimd for Settle<'_> {
    type Output = Settled;

    #[inline(always)]
    fn with_simd<S: pulp::Simd>(self, simd: S) -> Settled {
        let (lanes, rest) = S::as_mut_simd_f64s(self.0);
        let zero = simd.splat_f64s(0.0);
        let mut nothing = [zero; 2];
        let mut high = [simd.splat_f64s(f64::NEG_INFINITY); 2];
        let mut low = [simd.splat_f64s(f64::INFINITY); 2];
        let (pairs, odd) = lanes.as_chunks_mut::<2>();
        for pair in pairs {
            for i in 0..2 {
                pair[i] = simd.add_f64s(pair[i], zero);
                nothing[i] = simd.add_f64s(nothing[i], simd.mul_f64s(pair[i], zero));
                high[i] = simd.max_f64s(high[i], pair[i]);
                low[i] = simd.min_f64s(low[i], pair[i]);
            }
        }
        for value in odd {
            *value = simd.add_f64s(*value, zero);
            nothing[0] = simd.add_f64s(nothing[0], simd.mul_f64s(*value, zero));
            high[0] = simd.max_f64s(high[0], *value);
            low[0] = simd.min_f64s(low[0], *value);
        }
        let mut all = Settled {
            finite: simd.reduce_sum_f64s(simd.add_f64s(nothing[0], nothing[1])) == 0.0,
            largest: simd.reduce_max_f64s(simd.max_f64s(high[0], high[1])),
            smallest: simd.reduce_min_f64s(simd.min_f64s(low[0], low[1])),
        };
        rest.iter_mut().for_each(|value| all.take(value));
        all
    }
}
