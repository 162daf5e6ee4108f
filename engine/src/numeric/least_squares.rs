//! Least-squares fits.

use super::sum::sum;

/// A straight line, with the largest departure of the points from it.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Line {
    /// Rise of y per unit of x.
    pub slope: f64,
    /// y at x = 0.
    pub intercept: f64,
    /// Largest magnitude of y less the line over the points.
    pub residual: f64,
}

/// The least-squares line of y over x through the points (`x[i]`, `y[i]`).
///
/// The slope is that of the centred points, which keeps its digits where x is far from 0. All fields are NaN where the
/// slices differ in length, hold fewer than two points, hold a NaN, or all x are the same.
///
/// # Example
/// ```
/// use engine::numeric::line_through;
/// let line = line_through(&[0.0, 1.0, 2.0], &[1.0, 3.0, 5.0]);
/// assert_eq!((line.slope, line.intercept, line.residual), (2.0, 1.0, 0.0));
/// assert!(line_through(&[1.0], &[1.0]).slope.is_nan());
/// ```
pub fn line_through(x: &[f64], y: &[f64]) -> Line {
    if x.len() != y.len() || x.len() < 2 {
        return Line {
            slope: f64::NAN,
            intercept: f64::NAN,
            residual: f64::NAN,
        };
    }
    let count = x.len() as f64;
    let points = || x.iter().copied().zip(y.iter().copied());
    let x_mean = sum(x.iter().copied()) / count;
    let y_mean = sum(y.iter().copied()) / count;
    let spread = sum(x.iter().map(|x| (x - x_mean) * (x - x_mean)));
    let product = sum(points().map(|(x, y)| (x - x_mean) * (y - y_mean)));
    let slope = if spread > 0.0 {
        product / spread
    } else {
        f64::NAN
    };
    let intercept = y_mean - slope * x_mean;
    // A NaN slope must not be lost in the maximum, which passes NaN over.
    let residual = points()
        .map(|(x, y)| (y - y_mean - slope * (x - x_mean)).abs())
        .fold(0.0, f64::max);
    Line {
        slope,
        intercept,
        residual: if slope.is_nan() { f64::NAN } else { residual },
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// The residuals of a least-squares line are orthogonal to 1 and to x.
    #[test]
    fn residuals_are_orthogonal() {
        let x = [1.0, 2.0, 4.0, 7.0, 11.0];
        let y = [0.3, -0.2, 1.4, 2.2, 8.0];
        let line = line_through(&x, &y);
        let rest: Vec<f64> = x
            .iter()
            .zip(y)
            .map(|(x, y)| y - line.intercept - line.slope * x)
            .collect();
        assert!(sum(rest.iter().copied()).abs() < 1e-13);
        assert!(sum(rest.iter().zip(x).map(|(r, x)| r * x)).abs() < 1e-12);
        let largest = rest.iter().fold(0.0, |a: f64, r| a.max(r.abs()));
        assert_relative_eq!(line.residual, largest, max_relative = 1e-12);
    }

    #[test]
    fn lines_that_are_not_determined_have_no_value() {
        for (x, y) in [
            (&[1.0, 1.0][..], &[0.0, 1.0][..]),
            (&[], &[]),
            (&[1.0, 2.0], &[1.0]),
            (&[1.0, f64::NAN], &[1.0, 2.0]),
        ] {
            let line = line_through(x, y);
            assert!(line.slope.is_nan() && line.intercept.is_nan() && line.residual.is_nan());
        }
        let line = line_through(&[1.0, 2.0], &[1.0, f64::NAN]);
        assert!(line.slope.is_nan() && line.residual.is_nan());
    }
}
