//! A line value by value: what a block whose result holds anything but finite numbers is worked out with. Every
//! operation knows what a missing operand makes of it, and a value lost here carries its cause.

use super::scalar;
use super::wide::Source;
use crate::catalogue::{Compute, Entry};
use crate::missing::{lost, of_operands};
use crate::plan::Instruction;
use crate::problem::Cause;
use crate::syntax::BinaryOp;

type Block = Vec<f64>;

/// The stack of blocks.
#[derive(Default)]
pub(super) struct Stack {
    blocks: Vec<Block>,
    top: usize,
    /// Where a result is written before it takes the place of its first operand.
    scratch: Block,
    length: usize,
}

/// Works out a kernel over one block.
pub(super) fn run(
    stack: &mut Stack,
    code: &[Instruction],
    reads: &[Source<'_>],
    texts: &[String],
    out: &mut [f64],
) {
    stack.length = out.len();
    stack.top = 0;
    stack.scratch.resize(out.len(), 0.0);
    for instruction in code {
        stack.execute(instruction, reads, texts);
    }
    if let Some(result) = stack.blocks.first() {
        out.copy_from_slice(&result[..out.len()]);
    }
}

impl Stack {
    fn push(&mut self) -> &mut [f64] {
        if self.top == self.blocks.len() {
            self.blocks.push(Vec::new());
        }
        let length = self.length;
        let block = &mut self.blocks[self.top];
        block.resize(length, 0.0);
        self.top += 1;
        &mut block[..length]
    }

    fn execute(&mut self, instruction: &Instruction, reads: &[Source<'_>], texts: &[String]) {
        match instruction {
            Instruction::Load(read) => {
                let Some(read) = reads.get(*read) else { return };
                match read {
                    Source::Block(values) => self.push().copy_from_slice(values),
                    Source::Value(value) => self.push().fill(*value),
                }
            }
            Instruction::Constant(value) => self.push().fill(*value),
            Instruction::Negate => self.each(1, |v| 0.0 - v[0], Cause::Overflow),
            Instruction::Not => self.each(1, |v| f64::from(u8::from(v[0] == 0.0)), Cause::NoValue),
            Instruction::Binary(op) => self.binary(*op),
            Instruction::Power(exponent) => {
                self.each(1, |v| scalar::power(v[0], *exponent), Cause::Domain)
            }
            Instruction::Select => self.select(),
            Instruction::Function(function, count) => {
                self.each(*count, |v| scalar::function(*function, v), Cause::Domain);
            }
            Instruction::HasValue => {
                let length = self.length;
                let Some(block) = self.blocks.get_mut(self.top.wrapping_sub(1)) else {
                    return;
                };
                block[..length]
                    .iter_mut()
                    .for_each(|v| *v = f64::from(u8::from(!v.is_nan())));
            }
            Instruction::Call(entry, mask) => self.call(entry, *mask, texts),
        }
    }

    /// Takes `count` operands off and puts the result in the place of the first.
    fn finish(&mut self, count: usize) {
        self.top -= count - 1;
        std::mem::swap(&mut self.blocks[self.top - 1], &mut self.scratch);
    }

    fn binary(&mut self, op: BinaryOp) {
        let n = self.length;
        let (a, b) = (
            &self.blocks[self.top - 2][..n],
            &self.blocks[self.top - 1][..n],
        );
        let out = &mut self.scratch[..n];
        let pairs = || a.iter().zip(b);
        match op {
            BinaryOp::Add => out
                .iter_mut()
                .zip(pairs())
                .for_each(|(o, (x, y))| *o = x + y),
            BinaryOp::Subtract => out
                .iter_mut()
                .zip(pairs())
                .for_each(|(o, (x, y))| *o = x - y),
            BinaryOp::Multiply => out
                .iter_mut()
                .zip(pairs())
                .for_each(|(o, (x, y))| *o = x * y + 0.0),
            BinaryOp::Divide => out
                .iter_mut()
                .zip(pairs())
                .for_each(|(o, (x, y))| *o = x / y + 0.0),
            BinaryOp::And | BinaryOp::Or => {
                out.iter_mut()
                    .zip(pairs())
                    .for_each(|(o, (x, y))| *o = logical(op, *x, *y));
                return self.finish(2);
            }
            _ => {
                let cause = if op == BinaryOp::Power {
                    Cause::Domain
                } else {
                    Cause::NoValue
                };
                return self.each(2, |v| scalar::binary(op, v[0], v[1]), cause);
            }
        }
        if out.iter().any(|v| !v.is_finite()) {
            for (o, (x, y)) in out
                .iter_mut()
                .zip(a.iter().zip(b))
                .filter(|(o, _)| !o.is_finite())
            {
                let by_zero = op == BinaryOp::Divide && *y == 0.0;
                let cause = if by_zero {
                    Cause::DivisionByZero
                } else {
                    Cause::Overflow
                };
                *o = of_operands([*x, *y].into_iter()).unwrap_or_else(|| lost(cause));
            }
        }
        self.finish(2);
    }

    /// Any function of `count` operands; one that has no value gives none.
    fn each(&mut self, count: usize, f: impl Fn(&[f64]) -> f64, cause: Cause) {
        let mut operands = [0.0; 4];
        let mut many = vec![0.0; if count > 4 { count } else { 0 }];
        let base = self.top - count;
        for i in 0..self.length {
            let operands = if count > 4 {
                &mut many[..]
            } else {
                &mut operands[..count]
            };
            for (at, operand) in operands.iter_mut().enumerate() {
                *operand = self.blocks[base + at][i];
            }
            self.scratch[i] = match of_operands(operands.iter().copied()) {
                Some(missing) => missing,
                None => finite_or(f(operands), cause),
            };
        }
        self.finish(count);
    }

    fn select(&mut self) {
        let base = self.top - 3;
        for i in 0..self.length {
            let (c, a, b) = (
                self.blocks[base][i],
                self.blocks[base + 1][i],
                self.blocks[base + 2][i],
            );
            self.scratch[i] = if c.is_nan() {
                c
            } else if c != 0.0 {
                a
            } else {
                b
            };
        }
        self.finish(3);
    }

    fn call(&mut self, entry: &Entry, mask: u32, texts: &[String]) {
        let count = mask.count_ones() as usize;
        let Compute::Each(compute) = entry.compute else {
            return;
        };
        let mut arguments = Arguments::new(entry);
        if count == 0 {
            let _ = self.push();
        }
        let base = self.top - count.max(1);
        for i in 0..self.length {
            let operands = (0..count).map(|at| self.blocks[base + at][i]);
            self.scratch[i] = arguments.result(compute, operands, mask, texts).0;
        }
        self.finish(count.max(1));
    }
}

fn finite_or(value: f64, cause: Cause) -> f64 {
    if value.is_finite() {
        value
    } else {
        lost(if value == f64::INFINITY {
            Cause::Overflow
        } else {
            cause
        })
    }
}

/// `false and none` is false, `true or none` is true.
pub(super) fn logical(op: BinaryOp, a: f64, b: f64) -> f64 {
    let decides = |v: f64| !v.is_nan() && (v != 0.0) == (op == BinaryOp::Or);
    if decides(a) || decides(b) {
        return f64::from(u8::from(op == BinaryOp::Or));
    }
    of_operands([a, b].into_iter()).unwrap_or(f64::from(u8::from(op == BinaryOp::And)))
}

/// The arguments of a catalogue function, put together for one condition at a time.
pub(super) struct Arguments<'t> {
    entry: &'static str,
    parameters: &'static [crate::catalogue::Parameter],
    numbers: Vec<f64>,
    texts: Vec<&'t str>,
    results: Vec<f64>,
    /// Why a result is no number: what a set of rules does not have is not coded.
    cause: Cause,
}

impl<'t> Arguments<'t> {
    pub(super) fn new(entry: &Entry) -> Self {
        Arguments {
            entry: entry.name,
            parameters: entry.parameters,
            numbers: vec![0.0; entry.parameters.len()],
            texts: vec![""; entry.parameters.len()],
            results: vec![0.0; entry.fields.len()],
            cause: match entry.parameters.iter().any(|p| p.name == "rule") {
                true => Cause::NotCoded,
                false => Cause::Domain,
            },
        }
    }

    /// Works the function out; every result is finite or has no value. Gives the first of them, and all.
    pub(super) fn result(
        &mut self,
        compute: fn(&[f64], &[&str], &mut [f64]),
        mut operands: impl Iterator<Item = f64>,
        mask: u32,
        texts: &'t [String],
    ) -> (f64, &[f64]) {
        let mut missing: Option<f64> = None;
        for (at, parameter) in self.parameters.iter().enumerate() {
            let given = if mask & (1 << at) == 0 {
                None
            } else {
                operands.next()
            };
            let optional = parameter.default.is_some_and(f64::is_nan);
            match given {
                Some(value) if value.is_nan() && !optional => {
                    missing = of_operands(missing.into_iter().chain([value]));
                }
                Some(value) => self.numbers[at] = value,
                None => self.numbers[at] = parameter.default.unwrap_or(f64::NAN),
            }
            if parameter.wants == crate::catalogue::Wants::Text {
                self.texts[at] = match given {
                    Some(value) => texts.get(value as usize).map_or("", String::as_str),
                    None => parameter.default_text.unwrap_or(""),
                };
            }
        }
        match missing {
            Some(missing) => self.results.fill(missing),
            None => {
                compute(&self.numbers, &self.texts, &mut self.results);
                for value in self.results.iter_mut() {
                    // What a function says of its own reason stands.
                    if crate::missing::cause(*value).is_none() {
                        *value = finite_or(*value + 0.0, self.cause);
                    }
                }
            }
        }
        debug_assert!(!self.results.is_empty(), "{} gives nothing", self.entry);
        (
            self.results.first().copied().unwrap_or(f64::NAN),
            &self.results,
        )
    }
}
