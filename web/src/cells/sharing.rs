//! Strings side by side: what each carries, by where the bank's leads are taken off.

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{Piece, view};
use engine::bank::{Ask, shares};
use engine::choice::words;
use engine::field::Field;
use engine::quantity::Percent;
use engine::sharing::Arrangement;
use engine::show;

use crate::fold::fold;
use crate::tool_page::figures;

/// The most strings that are told one by one.
const TOLD: usize = 8;

/// The shares for every take-off, where strings stand side by side.
pub fn sharing(ask: Memo<Ask>) -> Piece {
    when(
        move || ask.with(|ask| shares(ask).is_some()),
        move || {
            view! {
                {fold("cells/sharing", "Sharing", memo(|| "string by string, by take-off".to_owned()), move || view! {                     {dynamic(move || ask.with(told))}
                 })}
            }
        },
    )
}

fn told(ask: &Ask) -> Piece {
    let rows = shares(ask).unwrap_or_default().into_iter().map(|one| {
        let each: Vec<String> = one.over_even.iter().take(TOLD).map(|percent| plain(*percent)).collect();
        let more = if one.over_even.len() > TOLD { " …" } else { "" };
        (name(one.take_off), format!("{} %{more}", each.join(" · ")))
    });
    view! {
        {figures(rows.collect())}
        <p class="ranked-say">
            "String by string along the bars, each as a part of an even share, at the start of a discharge: equal strings, \
             new and warm, on equal ties. Above 120 % the hardest string ages first."
        </p>
    }
}

fn plain(percent: Percent) -> String {
    show::number(percent.get(), 0)
}

fn name(take_off: Arrangement) -> String {
    let key = match take_off {
        Arrangement::SameEnd => "same-end",
        Arrangement::OppositeEnds => "opposite-ends",
        Arrangement::Middle => "middle",
    };
    format!("Take-off: {}", words(Field::TakeOff, key).unwrap_or_default())
}
