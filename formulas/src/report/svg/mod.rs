//! Drawings: figures and free bodies as SVG, ruled as on the trade's paper, to be read in black and white.
//!
//! Curves are told apart by dash, mark and a label at their end, not by colour. All ink is `currentColor` on a paper of
//! its own; both turn with the reader's light or dark, and `--figure-ink` and `--figure-paper` set them. No script, no
//! picture, nothing fetched; every text is escaped.

mod axis;
mod curves;
mod freebody;
mod pen;
mod plot;

pub use freebody::{Arrow, Drawn, Shown, freebody};
pub use pen::escaped;
pub use plot::figure;
