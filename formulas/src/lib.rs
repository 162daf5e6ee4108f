//! The sheet language: text in, checked and evaluated report out.
