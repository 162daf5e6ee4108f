//! Dense linear systems: factorised once, solved for any number of right sides.

/// Columns that are eliminated in one pass over the matrix.
const TOGETHER: usize = 4;

/// A square matrix, factorised with the largest pivot of each column.
///
/// # Example
/// ```
/// use engine::numeric::Factorised;
/// let matrix = Factorised::new(vec![2.0, 1.0, 1.0, 3.0], 2).unwrap();
/// assert_eq!(matrix.solve(&[3.0, 4.0]), [1.0, 1.0]);
/// assert!(Factorised::new(vec![1.0, 2.0, 2.0, 4.0], 2).is_none());
/// ```
#[derive(Clone, Debug)]
pub struct Factorised {
    rows: Vec<f64>,
    order: Vec<usize>,
    size: usize,
}

impl Factorised {
    /// Factorises a matrix given row by row. `None` where it is singular, holds no finite number or is not square.
    #[must_use]
    pub fn new(mut rows: Vec<f64>, size: usize) -> Option<Self> {
        if rows.len() != size * size || rows.iter().any(|v| !v.is_finite()) {
            return None;
        }
        let mut order: Vec<usize> = (0..size).collect();
        let mut from = 0;
        while from < size {
            let to = (from + TOGETHER).min(size);
            for column in from..to {
                eliminate(&mut rows, &mut order, size, column, to)?;
            }
            finish(&mut rows, size, from, to);
            from = to;
        }
        Some(Factorised { rows, order, size })
    }

    /// The solution for a right side; a missing value of it counts as 0.
    #[must_use]
    pub fn solve(&self, right: &[f64]) -> Vec<f64> {
        let n = self.size;
        let at = |i: &usize| right.get(*i).copied().unwrap_or(0.0);
        let mut x: Vec<f64> = self.order.iter().map(at).collect();
        for row in 1..n {
            let line = &self.rows[row * n..row * n + row];
            let known: f64 = line.iter().zip(&x).fold(0.0, |sum, (a, x)| sum + a * x);
            x[row] -= known;
        }
        for row in (0..n).rev() {
            let line = &self.rows[row * n..(row + 1) * n];
            let later = line.iter().zip(&x).skip(row + 1);
            let known: f64 = later.fold(0.0, |sum, (a, x)| sum + a * x);
            x[row] = (x[row] - known) / line[row];
        }
        x
    }
}

/// Brings the largest value of a column to its diagonal, and takes the column out of the rows below as far as the columns
/// of this pass go. `None` where there is none but 0.
fn eliminate(
    rows: &mut [f64],
    order: &mut [usize],
    size: usize,
    column: usize,
    to: usize,
) -> Option<()> {
    let larger = |best: usize, row: usize| {
        let at = |row: usize| rows[row * size + column].abs();
        if at(row) > at(best) { row } else { best }
    };
    let pivot = (column..size).fold(column, larger);
    if rows[pivot * size + column] == 0.0 {
        return None;
    }
    if pivot != column {
        order.swap(pivot, column);
        let (above, below) = rows.split_at_mut(pivot * size);
        above[column * size..(column + 1) * size].swap_with_slice(&mut below[..size]);
    }
    let (above, below) = rows.split_at_mut((column + 1) * size);
    let lead = &above[column * size..];
    let (diagonal, lead) = (lead[column], &lead[column + 1..to]);
    for row in below.chunks_exact_mut(size) {
        let factor = row[column] / diagonal;
        row[column] = factor;
        for (value, lead) in row[column + 1..to].iter_mut().zip(lead) {
            *value -= factor * lead;
        }
    }
    Some(())
}

/// Takes the columns of a pass out of all later ones. Each value is read and written once for all of them, in the order in
/// which they would be taken one by one, so that the bits are the same.
fn finish(rows: &mut [f64], size: usize, from: usize, to: usize) {
    let (above, below) = rows.split_at_mut(to * size);
    let mut leads: Vec<&mut [f64]> = above[from * size..].chunks_exact_mut(size).collect();
    for at in 1..leads.len() {
        let (known, rest) = leads.split_at_mut(at);
        let Some(row) = rest.first_mut() else { break };
        let (factors, row) = row.split_at_mut(to);
        for (lead, factor) in known.iter().zip(&factors[from..]) {
            for (value, lead) in row.iter_mut().zip(&lead[to..]) {
                *value -= factor * lead;
            }
        }
    }
    let leads: Vec<&[f64]> = leads.iter().map(|lead| &lead[to..]).collect();
    for row in below.chunks_exact_mut(size) {
        let (factors, row) = row.split_at_mut(to);
        match (leads.as_slice(), &factors[from..]) {
            ([a, b, c, d], [e, f, g, h]) => {
                let leads = a.iter().zip(*b).zip(c.iter().zip(*d));
                for (value, ((a, b), (c, d))) in row.iter_mut().zip(leads) {
                    *value = *value - e * a - f * b - g * c - h * d;
                }
            }
            (leads, factors) => {
                for (lead, factor) in leads.iter().zip(factors) {
                    for (value, lead) in row.iter_mut().zip(*lead) {
                        *value -= factor * lead;
                    }
                }
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::Factorised;

    #[test]
    fn solves_what_it_factorised() {
        let size = 7;
        let entry =
            |i: usize, j: usize| 1.0 / (1.0 + (i + 2 * j) as f64) + f64::from(u8::from(i == j));
        let rows: Vec<f64> = (0..size * size)
            .map(|k| entry(k / size, k % size))
            .collect();
        let exact: Vec<f64> = (0..size).map(|i| i as f64 - 2.5).collect();
        let right: Vec<f64> = (0..size)
            .map(|i| (0..size).map(|j| entry(i, j) * exact[j]).sum())
            .collect();
        let found = Factorised::new(rows, size).unwrap().solve(&right);
        for (a, b) in found.iter().zip(&exact) {
            assert!((a - b).abs() < 1e-12);
        }
    }

    #[test]
    fn rows_are_exchanged_where_a_pivot_is_zero() {
        let found = Factorised::new(vec![0.0, 1.0, 1.0, 0.0], 2)
            .unwrap()
            .solve(&[2.0, 3.0]);
        assert_eq!(found, [3.0, 2.0]);
    }
}
