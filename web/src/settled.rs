//! A value a moment after it last changed. The answer is painted at once; what else hangs on it may follow.

use crate::derived::{Memo, follower};
use std::sync::Arc;
use std::time::Duration;

use leptos::leptos_dom::helpers::TimeoutHandle;
use leptos::prelude::*;

/// How long a value rests before what is below the answer is made again.
const MOMENT: Duration = Duration::from_millis(30);

/// `value`, told only once it has rested.
pub fn settled<T: Clone + PartialEq + Send + Sync + 'static>(value: Memo<T>) -> Memo<T> {
    rested(value, MOMENT)
}

/// `value`, told only once it has rested so long.
pub fn rested<T: Clone + PartialEq + Send + Sync + 'static>(value: Memo<T>, moment: Duration) -> Memo<T> {
    let (settled, settle) = follower(value);
    on_rest(Box::new(move || value.track()), Arc::new(settle), moment);
    settled
}

/// Does `then` once what `watch` reads has rested. Boxed, as what waits is large.
fn on_rest(watch: Box<dyn Fn()>, then: Arc<dyn Fn() + Send + Sync>, moment: Duration) {
    let timer = StoredValue::new(None::<TimeoutHandle>);
    let stop = move || {
        if let Some(earlier) = timer.try_update_value(Option::take).flatten() {
            earlier.clear();
        }
    };
    Effect::new(move |before: Option<()>| {
        watch();
        stop();
        if before.is_some() {
            let then = then.clone();
            timer.set_value(set_timeout_with_handle(move || then(), moment).ok());
        }
    });
    on_cleanup(stop);
}
