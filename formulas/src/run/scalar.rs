//! One value at a time: what every sign and general function does with finite numbers. The columnar kernels call
//! these, and constants are folded with them, so that both give the same bits.

use crate::program::Function;
use crate::syntax::BinaryOp;
use engine::elementary;

/// Numbers are equal when they differ by at most this part of the larger.
const EQUAL_WITHIN: f64 = 1e-12;

/// Whether two numbers count as equal.
#[must_use]
pub(crate) fn equal(a: f64, b: f64) -> bool {
    a == b || (a - b).abs() <= EQUAL_WITHIN * a.abs().max(b.abs())
}

fn truth(condition: bool) -> f64 {
    f64::from(u8::from(condition))
}

/// A sign between two finite values. A result that is no finite number has no value.
#[must_use]
pub(crate) fn binary(op: BinaryOp, a: f64, b: f64) -> f64 {
    match op {
        BinaryOp::Add => a + b,
        BinaryOp::Subtract => a - b,
        BinaryOp::Multiply => a * b + 0.0,
        BinaryOp::Divide => a / b + 0.0,
        BinaryOp::Power => power(a, b),
        BinaryOp::Less => truth(a < b && !equal(a, b)),
        BinaryOp::LessOrEqual => truth(a < b || equal(a, b)),
        BinaryOp::Greater => truth(a > b && !equal(a, b)),
        BinaryOp::GreaterOrEqual => truth(a > b || equal(a, b)),
        BinaryOp::Equal => truth(equal(a, b)),
        BinaryOp::NotEqual => truth(!equal(a, b)),
        BinaryOp::And => truth(a != 0.0 && b != 0.0),
        BinaryOp::Or => truth(a != 0.0 || b != 0.0),
    }
}

/// A power: 0.5 is the square root, a whole exponent up to 16 repeated squaring, any other that of `libm`.
#[must_use]
pub(crate) fn power(base: f64, exponent: f64) -> f64 {
    elementary::power(base, exponent) + 0.0
}

/// A general function of finite values.
#[must_use]
pub(crate) fn function(function: Function, v: &[f64]) -> f64 {
    let a = v.first().copied().unwrap_or(f64::NAN);
    let b = v.get(1).copied().unwrap_or(f64::NAN);
    let c = v.get(2).copied().unwrap_or(f64::NAN);
    let result = match function {
        Function::Sqrt => a.sqrt(),
        Function::Cbrt => elementary::cbrt(a),
        Function::Abs => a.abs(),
        Function::Sign => f64::from(i8::from(a > 0.0) - i8::from(a < 0.0)),
        Function::Exp => elementary::exp(a),
        Function::Ln => elementary::ln(a),
        Function::Log10 => elementary::log10(a),
        Function::Sin => elementary::sin(a),
        Function::Cos => elementary::cos(a),
        Function::Tan => elementary::tan(a),
        Function::Asin => elementary::asin(a),
        Function::Acos => elementary::acos(a),
        Function::Atan => elementary::atan(a),
        Function::Atan2 => elementary::atan2(a, b),
        Function::Hypot => elementary::hypot(a, b),
        Function::Floor => a.floor(),
        Function::Ceil => a.ceil(),
        Function::Round => a.round(),
        Function::Min => v.iter().copied().fold(f64::INFINITY, f64::min),
        Function::Max => v.iter().copied().fold(f64::NEG_INFINITY, f64::max),
        // Bounds that cross have no value between them.
        Function::Clamp if b > c => f64::NAN,
        Function::Clamp => a.max(b).min(c),
    };
    result + 0.0
}
