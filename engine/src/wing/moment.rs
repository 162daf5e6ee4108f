//! Moment of a wing about its aerodynamic centre from section moments and the spanwise distribution of lift.

#![allow(non_snake_case, reason = "fields carry the symbols of the trade: Cm0")]

use crate::numeric::Sum;
use crate::planform::{half_area, numbers};
use crate::quantity::{Length, Typed};

/// Moment and aerodynamic centre of a wing.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct WingMoment {
    /// Moment coefficient about the aerodynamic centre, positive nose up, on area and mean aerodynamic chord of the wing.
    pub Cm0: f64,
    /// Station of the aerodynamic centre.
    pub x_ac: Length,
}

/// Moment coefficient about the aerodynamic centre, and its station, from section data.
///
/// - `y`, `chord`, `x_le`: the planform of one half from root to tip.
/// - `cm`: section moment coefficient about the quarter chord at each station.
/// - `cl_basic`: section lift coefficient at each station without lift of the wing.
/// - `cl_additional`: section lift coefficient at CL = 1 less the basic one.
///
/// `x_ac` = Int cl_a c x_q dy/Int cl_a c dy; `Cm0` = 2/(S mac) [Int cm c^2 dy - Int cl_b c (x_q - x_ac) dy], with x_q the
/// quarter chord. Between stations everything is straight, and the integrals of the products exact. No value where the
/// stations do not run outward or the additional lift adds up to nothing.
///
/// Source: R. F. Anderson, NACA TR 572 (method of the basic and additional lift).
///
/// # Example
/// ```
/// use engine::quantity::{Length, Typed};
/// use engine::wing::wing_moment;
/// let m = |v: [f64; 2]| v.map(Length::from_si);
/// let found = wing_moment(&m([0.0, 4.0]), &m([1.2; 2]), &m([1.0; 2]), &[-0.05; 2], &[0.0; 2], &[1.0; 2]);
/// assert!((found.Cm0 + 0.05).abs() < 1e-15);
/// assert!((found.x_ac.si() - 1.3).abs() < 1e-15);
/// ```
pub fn wing_moment(
    y: &[Length],
    chord: &[Length],
    x_le: &[Length],
    cm: &[f64],
    cl_basic: &[f64],
    cl_additional: &[f64],
) -> WingMoment {
    let (y, chord, x_le) = (numbers(y), numbers(chord), numbers(x_le));
    let whole = [x_le.len(), cm.len(), cl_basic.len(), cl_additional.len()]
        .iter()
        .all(|n| *n == y.len());
    let found = half_area(&y, &chord).filter(|half| whole && *half > 0.0);
    let none = WingMoment {
        Cm0: f64::NAN,
        x_ac: Length::from_si(f64::NAN),
    };
    if found.is_none() {
        return none;
    }
    let quarter: Vec<f64> = x_le.iter().zip(&chord).map(|(x, c)| x + c / 4.0).collect();
    let ones = vec![1.0; y.len()];
    let lift = integral(&y, [cl_additional, &chord, &ones]);
    let x_ac = integral(&y, [cl_additional, &chord, &quarter]) / lift;
    let arm: Vec<f64> = quarter.iter().map(|x| x - x_ac).collect();
    let square = integral(&y, [&ones, &chord, &chord]);
    // S mac is twice the integral of the chord squared, whatever the area.
    let moment = integral(&y, [cm, &chord, &chord]) - integral(&y, [cl_basic, &chord, &arm]);
    if lift != 0.0 {
        WingMoment {
            Cm0: moment / square,
            x_ac: Length::from_si(x_ac),
        }
    } else {
        none
    }
}

/// Integral of a product of three that are straight between stations: a cubic, for which Simpson's rule is exact.
fn integral(y: &[f64], of: [&[f64]; 3]) -> f64 {
    let mut sum = Sum::default();
    for i in 1..y.len() {
        let ends = |at: usize| of.iter().fold(1.0, |product, line| product * line[at]);
        let middle = of
            .iter()
            .fold(1.0, |product, line| product * (line[i - 1] + line[i]) / 2.0);
        sum.add((y[i] - y[i - 1]) * (ends(i - 1) + 4.0 * middle + ends(i)) / 6.0);
    }
    sum.total()
}
