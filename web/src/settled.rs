//! A value a moment after it last changed. The answer is painted at once; what else hangs on it may follow.

use std::time::Duration;

use leptos::leptos_dom::helpers::TimeoutHandle;
use leptos::prelude::*;

/// How long a value rests before what is below the answer is made again.
const MOMENT: Duration = Duration::from_millis(30);

/// `value`, told only once it has rested.
pub fn settled<T: Clone + PartialEq + Send + Sync + 'static>(value: Memo<T>) -> ReadSignal<T> {
    rested(value, MOMENT)
}

/// `value`, told only once it has rested so long.
pub fn rested<T: Clone + PartialEq + Send + Sync + 'static>(value: Memo<T>, moment: Duration) -> ReadSignal<T> {
    let (settled, settle) = signal(value.get_untracked());
    let timer = StoredValue::new(None::<TimeoutHandle>);
    let stop = move || {
        if let Some(earlier) = timer.try_update_value(Option::take).flatten() {
            earlier.clear();
        }
    };
    Effect::new(move |before: Option<()>| {
        let now = value.get();
        stop();
        if before.is_some() {
            timer.set_value(set_timeout_with_handle(move || settle.set(now.clone()), moment).ok());
        }
    });
    on_cleanup(stop);
    settled
}
