//! `cargo outside [filter]`: only the comparisons with libraries of Python, which `cargo verify` makes too.

use std::process::ExitCode;
use tests::outside;

fn main() -> ExitCode {
    let filter = std::env::args().nth(1).unwrap_or_default();
    match outside::compare(&filter) {
        Ok(compared) => {
            println!("{} passed, {} failed", compared.passed, compared.failed);
            ExitCode::from(u8::from(compared.failed > 0))
        }
        Err(message) => {
            eprintln!("{message}");
            ExitCode::FAILURE
        }
    }
}
