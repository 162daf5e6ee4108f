//! Command.

fn main() {}
