//! The floor of reading: one pass over the text of a sheet of plain definitions that reads, checks dimensions and works
//! out, with no tree, no place of anything, and no way on after a fault.

use rustc_hash::FxHashMap;

/// Powers of mass, length and time, doubled so that square roots stay whole.
type Dimension = [i8; 3];

#[derive(Clone, Copy)]
struct Value {
    si: f64,
    dimension: Dimension,
}

struct Reader<'t> {
    text: &'t [u8],
    at: usize,
    names: FxHashMap<&'t [u8], usize>,
    values: Vec<Value>,
    units: [(&'static [u8], f64, Dimension); 8],
}

/// The value of the last line in SI; `None` where the text is anything but definitions that fit.
#[must_use]
pub(crate) fn last_value(text: &str) -> Option<f64> {
    let lines = text.len() / 30 + 8;
    let mut reader = Reader {
        text: text.as_bytes(),
        at: 0,
        names: FxHashMap::with_capacity_and_hasher(lines, rustc_hash::FxBuildHasher),
        values: Vec::with_capacity(lines),
        units: [
            (b"ft", 0.3048, [0, 2, 0]),
            (b"lbf", 4.448_221_615_260_5, [2, 2, -4]),
            (b"slug", 14.593_902_937_206_364, [2, 0, 0]),
            (b"kn", 1852.0 / 3600.0, [0, 2, -2]),
            (b"s", 1.0, [0, 0, 2]),
            (b"m", 1.0, [0, 2, 0]),
            (b"kg", 1.0, [2, 0, 0]),
            (b"N", 1.0, [2, 2, -4]),
        ],
    };
    let mut last = None;
    while reader.at < reader.text.len() {
        last = Some(reader.line()?);
    }
    last
}

impl<'t> Reader<'t> {
    fn line(&mut self) -> Option<f64> {
        let name = self.name();
        self.blanks();
        self.expect(b'=')?;
        let value = self.sum()?;
        self.expect(b'\n')?;
        let next = self.values.len();
        if self.names.insert(name, next).is_some() {
            return None;
        }
        self.values.push(value);
        Some(value.si)
    }

    fn peek(&self) -> u8 {
        self.text.get(self.at).copied().unwrap_or(b'\n')
    }

    fn expect(&mut self, sign: u8) -> Option<()> {
        (self.peek() == sign).then(|| self.at += 1)
    }

    fn blanks(&mut self) {
        while self.peek() == b' ' {
            self.at += 1;
        }
    }

    fn name(&mut self) -> &'t [u8] {
        let start = self.at;
        while self.peek().is_ascii_alphanumeric() || self.peek() == b'_' {
            self.at += 1;
        }
        self.text.get(start..self.at).unwrap_or(b"")
    }

    fn sum(&mut self) -> Option<Value> {
        let mut left = self.product()?;
        loop {
            self.blanks();
            let sign = self.peek();
            if sign != b'+' && sign != b'-' {
                return Some(left);
            }
            self.at += 1;
            let right = self.product()?;
            if left.dimension != right.dimension {
                return None;
            }
            left.si = if sign == b'+' {
                left.si + right.si
            } else {
                left.si - right.si
            };
        }
    }

    fn product(&mut self) -> Option<Value> {
        let mut left = self.operand()?;
        loop {
            let sign = self.peek();
            if sign != b'*' && sign != b'/' {
                return Some(left);
            }
            self.at += 1;
            let right = self.operand()?;
            left = if sign == b'*' {
                Value {
                    si: left.si * right.si,
                    dimension: joined(left.dimension, right.dimension, 1),
                }
            } else {
                Value {
                    si: left.si / right.si,
                    dimension: joined(left.dimension, right.dimension, -1),
                }
            };
        }
    }

    fn operand(&mut self) -> Option<Value> {
        self.blanks();
        let value = match self.peek() {
            b'0'..=b'9' => self.quantity()?,
            b'(' => {
                self.at += 1;
                let value = self.sum()?;
                self.blanks();
                self.expect(b')')?;
                value
            }
            b'-' => {
                self.at += 1;
                let value = self.operand()?;
                Value {
                    si: -value.si,
                    ..value
                }
            }
            _ => {
                let name = self.name();
                *self.values.get(*self.names.get(name)?)?
            }
        };
        if self.peek() != b'^' {
            return Some(value);
        }
        self.at += 1;
        let exponent = self.number();
        let mut dimension = value.dimension;
        for power in &mut dimension {
            let raised = f64::from(*power) * exponent;
            if raised.fract() != 0.0 {
                return None;
            }
            *power = raised as i8;
        }
        let si = match exponent {
            2.0 => value.si * value.si,
            0.5 => value.si.sqrt(),
            other => libm::pow(value.si, other),
        };
        Some(Value { si, dimension })
    }

    /// A number with its unit, where it has one.
    fn quantity(&mut self) -> Option<Value> {
        let mut value = Value {
            si: self.number(),
            dimension: [0; 3],
        };
        let next = self.text.get(self.at + 1);
        if self.peek() != b' ' || !next.is_some_and(u8::is_ascii_alphabetic) {
            return Some(value);
        }
        self.at += 1;
        let mut sign = 1;
        loop {
            let name = self.name();
            let (_, factor, dimension) = self.units.iter().find(|(unit, ..)| *unit == name)?;
            let mut power = 1;
            if self.peek() == b'^' {
                power = i8::try_from(self.text.get(self.at + 1)?.checked_sub(b'0')?).ok()?;
                self.at += 2;
            }
            for _ in 0..power {
                value.si = if sign == 1 {
                    value.si * factor
                } else {
                    value.si / factor
                };
            }
            value.dimension = joined(value.dimension, *dimension, sign * power);
            match self.peek() {
                b'*' | b'.' => sign = 1,
                b'/' => sign = -1,
                _ => return Some(value),
            }
            self.at += 1;
        }
    }

    fn number(&mut self) -> f64 {
        const TENS: [f64; 17] = [
            1.0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15,
            1e16,
        ];
        let (mut digits, mut behind) = (0u64, 0usize);
        while self.peek().is_ascii_digit() {
            digits = digits.wrapping_mul(10) + u64::from(self.peek() - b'0');
            self.at += 1;
        }
        if self.peek() == b'.' {
            self.at += 1;
            while self.peek().is_ascii_digit() {
                digits = digits.wrapping_mul(10) + u64::from(self.peek() - b'0');
                behind += 1;
                self.at += 1;
            }
        }
        digits as f64 / TENS.get(behind).copied().unwrap_or(f64::INFINITY)
    }
}

fn joined(mut left: Dimension, right: Dimension, sign: i8) -> Dimension {
    for (a, b) in left.iter_mut().zip(right) {
        *a += sign * b;
    }
    left
}
