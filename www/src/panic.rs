//! Keeps what a panic said, since the trap that follows it tells JavaScript nothing.

use std::cell::RefCell;
use std::panic;
use std::sync::Once;

use wasm_bindgen::prelude::wasm_bindgen;

thread_local! {
    static MESSAGE: RefCell<Option<String>> = const { RefCell::new(None) };
}

/// Listens for panics from now on.
pub(crate) fn listen() {
    static LISTENING: Once = Once::new();
    LISTENING.call_once(|| {
        panic::set_hook(Box::new(|info| {
            let message = info.to_string();
            MESSAGE.with(|kept| {
                if let Ok(mut kept) = kept.try_borrow_mut() {
                    *kept = Some(message);
                }
            });
        }));
    });
}

/// What the last panic of this instance said.
#[wasm_bindgen]
#[must_use]
pub fn last_panic() -> Option<String> {
    MESSAGE.with(|kept| kept.try_borrow().ok().and_then(|kept| kept.clone()))
}
