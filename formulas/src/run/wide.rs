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
fn machine() -> pulp::Arch {
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

/// Takes the sign off zeros; says whether all values are finite numbers.
pub(super) fn settle(values: &mut [f64]) -> bool {
    widest(
        #[inline(always)]
        || {
            let mut lanes = [0.0f64; 8];
            let (chunks, rest) = values.as_chunks_mut::<8>();
            for chunk in chunks {
                for i in 0..8 {
                    let value = chunk[i] + 0.0;
                    chunk[i] = value;
                    lanes[i] += nothing_of(value);
                }
            }
            let mut sum = 0.0;
            for lane in lanes {
                sum += lane;
            }
            for value in rest {
                *value += 0.0;
                sum += nothing_of(*value);
            }
            sum == 0.0
        },
    )
}

#[inline(always)]
fn larger(a: f64, b: f64) -> f64 {
    if a > b { a } else { b }
}

#[inline(always)]
fn smaller(a: f64, b: f64) -> f64 {
    if a < b { a } else { b }
}

/// The largest and smallest of a block of finite numbers.
#[cfg(target_arch = "wasm32")]
pub(super) fn extremes(values: &[f64]) -> (f64, f64) {
    let (mut high, mut low) = ([f64::NEG_INFINITY; 8], [f64::INFINITY; 8]);
    let (chunks, rest) = values.as_chunks::<8>();
    for chunk in chunks {
        for i in 0..8 {
            high[i] = larger(chunk[i], high[i]);
        }
        for i in 0..8 {
            low[i] = smaller(chunk[i], low[i]);
        }
    }
    let high = high
        .iter()
        .chain(rest)
        .fold(f64::NEG_INFINITY, |h, v| larger(*v, h));
    let low = low
        .iter()
        .chain(rest)
        .fold(f64::INFINITY, |l, v| smaller(*v, l));
    (high, low)
}

/// The largest and smallest of a block of finite numbers. Written with vectors by hand: the compiler makes one value
/// at a time of this loop where registers are wide.
#[cfg(not(target_arch = "wasm32"))]
pub(super) fn extremes(values: &[f64]) -> (f64, f64) {
    machine().dispatch(Extremes(values))
}

#[cfg(not(target_arch = "wasm32"))]
struct Extremes<'a>(&'a [f64]);

#[cfg(not(target_arch = "wasm32"))]
impl pulp::WithSimd for Extremes<'_> {
    type Output = (f64, f64);

    #[inline(always)]
    fn with_simd<S: pulp::Simd>(self, simd: S) -> (f64, f64) {
        let (lanes, rest) = S::as_simd_f64s(self.0);
        let lowest = simd.splat_f64s(f64::NEG_INFINITY);
        let highest = simd.splat_f64s(f64::INFINITY);
        let (mut high, mut low) = ([lowest; 2], [highest; 2]);
        let (pairs, odd) = lanes.as_chunks::<2>();
        for [a, b] in pairs {
            high = [simd.max_f64s(high[0], *a), simd.max_f64s(high[1], *b)];
            low = [simd.min_f64s(low[0], *a), simd.min_f64s(low[1], *b)];
        }
        for a in odd {
            high[0] = simd.max_f64s(high[0], *a);
            low[0] = simd.min_f64s(low[0], *a);
        }
        let mut largest = simd.reduce_max_f64s(simd.max_f64s(high[0], high[1]));
        let mut smallest = simd.reduce_min_f64s(simd.min_f64s(low[0], low[1]));
        for value in rest {
            largest = larger(*value, largest);
            smallest = smaller(*value, smallest);
        }
        (largest, smallest)
    }
}
