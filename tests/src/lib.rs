//! Promises across crates: what the tests share.
