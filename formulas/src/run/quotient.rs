//! Division of a block by what is known beforehand, exactly as the divider would round it but several times faster.
//!
//! With `y` the rounded reciprocal of the divisor `b`, the steps `q = a*y`, `r = a - q*b`, `q + r*y`, the last two fused,
//! give the correctly rounded quotient as long as nothing underflows: P. W. Markstein, Computation of elementary
//! functions on the IBM RISC System/6000 processor, IBM J. Res. Develop. 34 (1990); N. Brisebarre, J.-M. Muller,
//! S. K. Raina, Accelerating correctly rounded floating-point division when the divisor is known in advance, IEEE Trans.
//! Computers 53 (2004). Operands outside the range in which that holds go to the divider, so that no bit depends on the
//! machine.

use super::wide::Source;

/// Divisors between this and its reciprocal have reciprocals far from underflow.
const DIVISOR_LEAST: f64 = f64::from_bits((1023 - 500) << 52);
/// Numerators from this on leave remainders that are exact.
#[cfg(target_arch = "x86_64")]
const NUMERATOR_LEAST: f64 = f64::from_bits((1023 - 400) << 52);

/// The reciprocal of a divisor, where the short division holds for it.
#[inline(always)]
fn reciprocal(divisor: f64) -> Option<f64> {
    let size = divisor.abs();
    (DIVISOR_LEAST..=1.0 / DIVISOR_LEAST)
        .contains(&size)
        .then(|| 1.0 / divisor)
}

/// The reciprocals of a column of divisors; `None` where one has none, or the machine has no use for them.
pub(super) fn reciprocals(divisors: &[f64]) -> Option<Vec<f64>> {
    if !fused_products() {
        return None;
    }
    divisors.iter().map(|d| reciprocal(*d)).collect()
}

/// Divides a block by one value. False where it has to be left to the divider; then `out` holds nothing of use.
pub(super) fn by_value(a: Source<'_>, divisor: f64, out: &mut [f64]) -> bool {
    match (a, reciprocal(divisor)) {
        (Source::Block(a), Some(y)) => by_blocks(a, Divisor::Value(divisor, y), out),
        _ => false,
    }
}

/// Divides a block by a block whose reciprocals are known; false as before.
pub(super) fn by_known(
    a: Source<'_>,
    divisor: Source<'_>,
    known: Source<'_>,
    out: &mut [f64],
) -> bool {
    match (a, divisor, known) {
        (Source::Block(a), Source::Block(b), Source::Block(y)) => {
            by_blocks(a, Divisor::Block(b, y), out)
        }
        (Source::Block(a), Source::Value(b), Source::Value(y)) => {
            by_blocks(a, Divisor::Value(b, y), out)
        }
        _ => false,
    }
}

/// What is divided by, with its reciprocals.
#[derive(Clone, Copy)]
#[cfg_attr(
    not(target_arch = "x86_64"),
    expect(dead_code, reason = "only the short division reads them")
)]
enum Divisor<'a> {
    Value(f64, f64),
    Block(&'a [f64], &'a [f64]),
}

/// Whether the machine multiplies and adds in one rounding.
#[cfg(target_arch = "x86_64")]
fn fused_products() -> bool {
    matches!(super::wide::machine(), pulp::Arch::V3(_))
}

#[cfg(not(target_arch = "x86_64"))]
fn fused_products() -> bool {
    false
}

#[cfg(not(target_arch = "x86_64"))]
fn by_blocks(_: &[f64], _: Divisor<'_>, _: &mut [f64]) -> bool {
    false
}

#[cfg(target_arch = "x86_64")]
fn by_blocks(a: &[f64], divisor: Divisor<'_>, out: &mut [f64]) -> bool {
    if !fused_products() {
        return false;
    }
    let a = &a[..out.len()];
    super::wide::machine().dispatch(Quotients { a, divisor, out })
}

#[cfg(target_arch = "x86_64")]
struct Quotients<'a> {
    a: &'a [f64],
    divisor: Divisor<'a>,
    out: &'a mut [f64],
}

#[cfg(target_arch = "x86_64")]
impl pulp::WithSimd for Quotients<'_> {
    type Output = bool;

    #[inline(always)]
    fn with_simd<S: pulp::Simd>(self, simd: S) -> bool {
        let n = self.out.len();
        let (a, a_rest) = S::as_simd_f64s(self.a);
        let (out, out_rest) = S::as_mut_simd_f64s(self.out);
        let mut least = simd.splat_f64s(f64::INFINITY);
        let quotient = |a, b, y, least: &mut S::f64s| {
            *least = simd.min_f64s(simd.abs_f64s(a), *least);
            let q = simd.mul_f64s(a, y);
            let r = simd.negate_mul_add_f64s(q, b, a);
            simd.mul_add_f64s(r, y, q)
        };
        match self.divisor {
            Divisor::Value(b, y) => {
                let (wide_b, wide_y) = (simd.splat_f64s(b), simd.splat_f64s(y));
                for (out, a) in out.iter_mut().zip(a) {
                    *out = quotient(*a, wide_b, wide_y, &mut least);
                }
                for (out, a) in out_rest.iter_mut().zip(a_rest) {
                    *out = a / b;
                }
            }
            Divisor::Block(b, y) => {
                let (b, b_rest) = S::as_simd_f64s(&b[..n]);
                let (y, _) = S::as_simd_f64s(&y[..n]);
                for (((out, a), b), y) in out.iter_mut().zip(a).zip(b).zip(y) {
                    *out = quotient(*a, *b, *y, &mut least);
                }
                for ((out, a), b) in out_rest.iter_mut().zip(a_rest).zip(b_rest) {
                    *out = a / b;
                }
            }
        }
        simd.reduce_min_f64s(least) >= NUMERATOR_LEAST
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A row of numbers with every kind of significand, the same on every machine.
    fn numbers(seed: u64, count: usize) -> Vec<f64> {
        let mut state = seed;
        let mut next = || {
            state = state
                .wrapping_mul(6_364_136_223_846_793_005)
                .wrapping_add(1_442_695_040_888_963_407);
            state
        };
        let number = |bits: u64, exponent: u64| {
            let significand = match bits % 7 {
                0 => bits >> 60,
                1 => 0x000f_ffff_ffff_ffff - (bits >> 60),
                2 => bits & 0xffff_f000_0000,
                _ => bits >> 12,
            };
            f64::from_bits((bits & 1 << 63) | (1023 - 30 + exponent % 60) << 52 | significand)
        };
        (0..count).map(|_| number(next(), next() >> 40)).collect()
    }

    #[test]
    fn quotients_are_those_of_the_divider() {
        let a = numbers(1, 4099);
        for round in 0..200 {
            let b = numbers(2 + round, a.len());
            let mut out = vec![0.0; a.len()];
            if let Some(y) = reciprocals(&b) {
                assert!(by_known(
                    Source::Block(&a),
                    Source::Block(&b),
                    Source::Block(&y),
                    &mut out
                ));
                let same = |((a, b), q): ((&f64, &f64), &f64)| (a / b).to_bits() == q.to_bits();
                assert!(a.iter().zip(&b).zip(&out).all(same));
            }
            let one = b[round as usize];
            if by_value(Source::Block(&a), one, &mut out) {
                let same = |(a, q): (&f64, &f64)| (a / one).to_bits() == q.to_bits();
                assert!(a.iter().zip(&out).all(same));
            }
        }
    }

    #[test]
    fn operands_near_underflow_are_left_to_the_divider() {
        let mut out = [0.0; 8];
        for tiny in [0.0, 1e-300, f64::MIN_POSITIVE, 1e-310, f64::NAN] {
            let a = [1.0, 2.0, 3.0, tiny, 5.0, 6.0, 7.0, 8.0];
            let done = by_value(Source::Block(&a), 3.0, &mut out);
            assert!(!done || tiny.is_nan());
        }
        for divisor in [0.0, 1e-200, 1e200, f64::INFINITY, f64::NAN] {
            assert!(!by_value(Source::Block(&[1.0; 8]), divisor, &mut out));
        }
    }
}
