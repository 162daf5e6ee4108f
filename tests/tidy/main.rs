//! Tidy.
