//! The report as plain text.
