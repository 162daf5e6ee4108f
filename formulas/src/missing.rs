//! Missing values while a line is worked out. A value lost in this very line carries its cause in the bits of its
//! NaN, so that an `if` keeps only the losses of the branch taken and the line can count them at its end.

use crate::problem::Cause;
use crate::values::{EXCLUDED, NONE, is_excluded};

const LOST_BITS: u64 = 0x7ff8_0000_0000_0100;

/// The bits that hold the cause and two numbers of points.
const NUMBERED: u64 = 0x0000_ffff_ffff_00ff;

const CAUSES: [Cause; 13] = [
    Cause::DivisionByZero,
    Cause::Domain,
    Cause::Overflow,
    Cause::BeyondEnd,
    Cause::NoSuchLabel,
    Cause::NoValue,
    Cause::NoSolution,
    Cause::NotCoded,
    Cause::Designation,
    Cause::ContourPoints,
    Cause::ContourRepeated(0),
    Cause::ContourCrossing(0, 0),
    Cause::ContourOpen,
];

/// A value lost here, for a cause.
#[must_use]
pub fn lost(cause: Cause) -> f64 {
    let kind = std::mem::discriminant(&cause);
    let same = |c: &Cause| std::mem::discriminant(c) == kind;
    let at = CAUSES.iter().position(same).unwrap_or(0) as u64;
    let (first, second) = match cause {
        Cause::ContourRepeated(point) => (point, 0),
        Cause::ContourCrossing(first, second) => (first, second),
        _ => (0, 0),
    };
    f64::from_bits(LOST_BITS | at | u64::from(first) << 16 | u64::from(second) << 32)
}

/// The cause of a value lost in this line.
#[must_use]
pub fn cause(value: f64) -> Option<Cause> {
    let bits = value.to_bits();
    if bits & !NUMBERED != LOST_BITS {
        return None;
    }
    let cause = CAUSES.get((bits & 0xff) as usize).copied()?;
    let (first, second) = ((bits >> 16) as u16, (bits >> 32) as u16);
    Some(match cause {
        Cause::ContourRepeated(_) => Cause::ContourRepeated(first),
        Cause::ContourCrossing(..) => Cause::ContourCrossing(first, second),
        _ => cause,
    })
}

/// What a result becomes where an operand has no value: `none` wins over a fresh loss, and that over `excluded`.
#[must_use]
pub fn of_operands(operands: impl Iterator<Item = f64>) -> Option<f64> {
    let mut worst: Option<f64> = None;
    for value in operands.filter(|v| v.is_nan()) {
        let rank =
            |v: f64| u8::from(!is_excluded(v)) + u8::from(!is_excluded(v) && cause(v).is_none());
        if worst.is_none_or(|w| rank(value) > rank(w)) {
            worst = Some(value);
        }
    }
    worst.map(|w| {
        if is_excluded(w) {
            EXCLUDED
        } else if cause(w).is_some() {
            w
        } else {
            NONE
        }
    })
}
