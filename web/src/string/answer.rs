//! The answer of the String tool, worded and drawn. Pure: from what was typed to what is shown.

use engine::check::{Check, Verdict};
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Count, Quantity, Volts};
use engine::show;
use engine::string::{self, Ask, Requirement};

use super::TOOL;
use crate::answer::{Answer, Offer, besides, without_unit};
use crate::form::{as_entered, names};
use crate::pads::Typed;
use crate::span_bar::Bar;
use crate::span_bar::geometry::{From, Mark, Post, Ruler};

/// The answer to what was typed into `pad`, all of whose checks are `checks`.
///
/// `None` only where no cold check was made, which `assess` always makes.
pub fn answer(pad: &impl Pad, ask: &Ask, checks: &[Check<Requirement>]) -> Option<Answer> {
    let check = *checks.iter().find(|check| check.id == Requirement::ColdController)?;
    let longest = string::longest(ask);
    let volts = string::cold_voltage(ask);
    Some(Answer {
        of: of(pad, ask),
        number: number(&check, volts),
        unit: "V".into(),
        verdict: check.verdict,
        cost: check.cost,
        says: says(&check, longest),
        most: longest.map(longest_words),
        rests: rests(&check, ask),
        besides: besides(checks, Some(Requirement::ColdController), Requirement::name),
        bar: Some(bar(pad, ask, &check, volts)),
        second: None,
        offer: offer(&check),
    })
}

fn of(pad: &impl Pad, ask: &Ask) -> String {
    let series = match ask.series.typed() {
        Some(series) => format!("{} in series", series.get()),
        None => "A string".to_owned(),
    };
    match as_entered(pad, Field::RecordLow) {
        Some(low) => format!("{series} at {low}, the record low"),
        None => format!("{series} at the record low"),
    }
}

/// Where nothing but the assumed tolerance stands between the string and its verdict's last word, one tap enters it.
fn offer(check: &Check<Requirement>) -> Option<Offer> {
    let rests = check.verdict != Verdict::Asks && check.assumed.contains(Field::VocTolerance);
    let typed = Typed { text: engine::assumed::VOC_TOLERANCE.get().to_string(), unit: None };
    rests.then(|| Offer {
        words: "The nameplate says +3 %".to_owned(),
        fill: vec![((TOOL, Field::VocTolerance), typed)],
    })
}

fn number(check: &Check<Requirement>, volts: Option<Volts>) -> String {
    let shown = match (check.value, check.limit, volts) {
        (Some(value), Some(limit), _) => show::apart(value, limit.amount).0,
        (_, _, Some(volts)) => show::computed(volts.amount()),
        _ => return show::NONE.to_owned(),
    };
    without_unit(&shown).to_owned()
}

fn says(check: &Check<Requirement>, longest: Option<u32>) -> String {
    let Some((distance, limit)) = check.distance().zip(check.limit) else { return asks(check, longest) };
    let size = show::room(distance);
    let share = check.margin.map_or_else(String::new, |margin| show::room(margin.abs().amount()));
    let limit = show::given(limit.amount);
    match check.verdict {
        Verdict::Breaks => format!("{size} ({share}) over the input limit of {limit}: a cold morning can destroy it."),
        Verdict::Close if inside_reserve(check) => {
            let reserve = show::given(check.reserve.amount());
            format!("{size} ({share}) under the input limit of {limit}, inside the {reserve} kept in reserve.")
        }
        _ => format!("{size} ({share}) under the input limit of {limit}."),
    }
}

fn inside_reserve(check: &Check<Requirement>) -> bool {
    check.margin.is_some_and(|margin| margin < check.reserve)
}

/// What was assumed, and what the number would be without it.
fn rests(check: &Check<Requirement>, ask: &Ask) -> Option<String> {
    check.value?;
    let mut parts = Vec::new();
    if check.assumed.contains(Field::VocCoefficient) {
        parts.push("No coefficient entered: the code’s cold table for crystalline modules stands in.".to_owned());
    }
    if check.assumed.contains(Field::VocTolerance)
        && let Some(plain) = string::without_tolerance(ask)
    {
        parts.push(format!(
            "{} by the nameplate; a tolerance of +{} is assumed on top.",
            show::computed(plain.amount()),
            show::given(engine::assumed::VOC_TOLERANCE.amount())
        ));
    }
    if check.verdict == Verdict::Close && !inside_reserve(check) && !check.assumed.is_empty() {
        parts.push(format!("Close until that is confirmed: {}.", names(check.assumed)));
    }
    (!parts.is_empty()).then(|| parts.join(" "))
}

fn asks(check: &Check<Requirement>, longest: Option<u32>) -> String {
    if check.asks.len() == 1 && check.asks.contains(Field::VocCoefficient) {
        return "That Voc coefficient is outside 0.2 to 0.4 %/K of the module’s Voc, where every module lies. Is it the \
                figure of one cell, or another unit?"
            .to_owned();
    }
    let waits = names(check.asks);
    match longest {
        Some(_) => format!("Enter {waits} to judge a string."),
        None => format!("Waits for {waits}."),
    }
}

fn longest_words(longest: u32) -> String {
    match longest {
        0 => "Longest safe string: none. A single module is over the limit.".to_owned(),
        count => format!("Longest safe string: {count}"),
    }
}

fn bar(pad: &impl Pad, ask: &Ask, check: &Check<Requirement>, cold: Option<Volts>) -> Bar {
    let limit = ask.controller.input_limit.typed();
    let hot = string::hottest_working(ask);
    let low = low_post(ask);
    let high = limit.map(|limit| Post {
        at: limit.get(),
        reserve: limit.get() * check.reserve.share(),
        name: "input limit".to_owned(),
        shown: show::given(limit.amount()),
    });
    let shown = |volts: Volts| match limit {
        Some(limit) => show::apart(volts.amount(), limit.amount()).0,
        None => show::computed(volts.amount()),
    };
    let mut marks = Vec::new();
    if let Some(hot) = hot {
        let name = as_entered(pad, Field::RecordHigh).map_or_else(|| "hot".to_owned(), |high| format!("hot {high}"));
        marks.push(Mark { at: hot.get(), name, shown: shown(hot) });
    }
    if let (Some(cold), Some(voc), Some(series)) = (cold, ask.module.voc.typed(), ask.series.typed()) {
        let rated = voc * series.get();
        if rated < cold {
            marks.push(Mark { at: rated.get(), name: "open, 25 °C".to_owned(), shown: shown(rated) });
        }
        let name = as_entered(pad, Field::RecordLow).map_or_else(|| "cold".to_owned(), |low| format!("cold {low}"));
        marks.push(Mark { at: cold.get(), name, shown: shown(cold) });
    }
    let room = check.distance().map(show::room);
    let says = sentence(low.as_ref(), high.as_ref(), hot, cold, check, room.as_deref(), ask.series.typed());
    Bar {
        ruler: Ruler {
            low,
            high,
            covered: cold.map(|cold| (hot.map_or(From::Start, |hot| From::Value(hot.get())), cold.get())),
            marks,
        },
        verdict: check.verdict,
        room,
        says,
    }
}

/// The lower post: what charging needs, or where tracking begins, whichever is higher.
fn low_post(ask: &Ask) -> Option<Post> {
    let charging = string::charging_voltage(ask).map(|volts| (volts, "charging needs"));
    let tracking = ask.controller.window_low.typed().map(|volts| (volts, "tracks from"));
    let (at, name) = match (charging, tracking) {
        (Some(charging), Some(tracking)) if tracking.0 > charging.0 => tracking,
        (Some(charging), _) => charging,
        (None, tracking) => tracking?,
    };
    Some(Post { at: at.get(), reserve: 0.0, name: name.to_owned(), shown: show::given(at.amount()) })
}

fn sentence(
    low: Option<&Post>,
    high: Option<&Post>,
    hot: Option<Volts>,
    cold: Option<Volts>,
    check: &Check<Requirement>,
    room: Option<&str>,
    series: Option<Count>,
) -> String {
    let allowed = match (low, high) {
        (Some(low), Some(high)) => format!("Allowed {} to {}.", low.shown, high.shown),
        (Some(low), None) => format!("Needs {}.", low.shown),
        (None, Some(high)) => format!("Allowed up to {}.", high.shown),
        (None, None) => String::new(),
    };
    let series = series.map_or_else(|| "The string".to_owned(), |series| format!("{} in series", series.get()));
    let covers = match (hot, cold) {
        (Some(hot), Some(cold)) => format!(
            "{series} cover {} at the hottest to {} at record cold.",
            show::computed(hot.amount()),
            show::computed(cold.amount())
        ),
        (None, Some(cold)) => format!("{series} reach {} at record cold.", show::computed(cold.amount())),
        _ => "What the string covers is not known yet.".to_owned(),
    };
    let end = match (check.verdict, room) {
        (Verdict::Breaks, Some(room)) => format!(" {room} past the limit."),
        (Verdict::Close | Verdict::Clears, Some(room)) => format!(" {room} left."),
        _ => String::new(),
    };
    format!("String volts. {allowed} {covers}{end}")
}

/// What else there is to say of a check, under its name.
pub fn note(ask: &Ask, requirement: Requirement) -> Option<String> {
    match requirement {
        Requirement::Fuse => fuse_note(ask),
        Requirement::ColdCircuit => Some(
            "Breakers, fuses, cables and arresters of this circuit must be rated for the same volts, d.c.".to_owned(),
        ),
        Requirement::PwmMatch => Some(
            "Some PWM controllers join the positives. With an earthed negative that is a short circuit: read yours."
                .to_owned(),
        ),
        Requirement::Clip => Some(
            "Six power levels stand for a year, as long as the site’s own sun is not known; good to a few percent."
                .to_owned(),
        ),
        _ => None,
    }
}

fn fuse_note(ask: &Ask) -> Option<String> {
    let fuses = string::string_fuses(ask)?;
    let back = show::computed(fuses.backfeed.amount());
    let most = show::given(fuses.module_most.amount());
    if !fuses.needed {
        return Some(format!("The others can feed back {back}; the module allows {most}. No string fuses needed."));
    }
    let Some(advised) = fuses.advised else {
        return Some(format!(
            "The others can feed back {back}, the module allows {most}, and no made fuse lies from {} up to that: fewer \
             strings, or another module.",
            show::computed(fuses.least.amount())
        ));
    };
    let fitting: Vec<String> = fuses.fitting.iter().map(|amps| show::number(amps.get(), 1)).collect();
    Some(format!(
        "The others can feed back {back}; the module allows {most}. Fuse every string: {} A fits by the rule; {} where \
         the box stands in heat. Class gPV, rated for the cold volts, in both poles where neither is earthed.",
        fitting.join(" or "),
        show::given(advised.amount())
    ))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::{Rows, plain};

    #[track_caller]
    fn of_rows(rows: &[(Field, &str)]) -> Answer {
        let ask = Ask::read(&Rows(rows));
        answer(&Rows(rows), &ask, &string::assess(&ask)).expect("there is always an answer")
    }

    const RIDGE: &[(Field, &str)] = &[
        (Field::Voc, "49.3"),
        (Field::VocCoefficient, "-0.27"),
        (Field::RecordLow, "-31"),
        (Field::InputLimit, "150"),
        (Field::Series, "3"),
    ];

    #[test]
    fn three_in_series_break_and_the_sentence_says_by_how_much_and_which_tolerance() {
        let answer = of_rows(RIDGE);
        assert_eq!(plain(&answer.of), "3 in series at −31 °C, the record low");
        assert_eq!(answer.number, "175.4");
        assert_eq!(answer.verdict, Verdict::Breaks);
        assert_eq!(
            plain(&answer.says),
            "25.4 V (16.9 %) over the input limit of 150 V: a cold morning can destroy it."
        );
        assert_eq!(
            answer.rests.as_deref().map(plain).as_deref(),
            Some("170.3 V by the nameplate; a tolerance of +3 % is assumed on top.")
        );
        assert_eq!(answer.most.as_deref(), Some("Longest safe string: 2"));
    }

    #[test]
    fn with_its_tolerance_entered_the_number_is_the_nameplates() {
        let answer = of_rows(&[RIDGE, &[(Field::VocTolerance, "0")]].concat());
        assert_eq!(answer.number, "170.3");
        assert!(plain(&answer.says).starts_with("20.3 V (13.5 %) over"));
        assert_eq!(answer.rests, None);
    }

    #[test]
    fn an_assumption_keeps_it_close_and_is_named() {
        let answer = of_rows(&[RIDGE, &[(Field::Series, "2")]].concat());
        assert_eq!(answer.verdict, Verdict::Close);
        assert!(answer.rests.is_some_and(|rests| rests.ends_with("Close until that is confirmed: Voc tolerance.")));
    }

    #[test]
    fn what_is_missing_is_named() {
        let answer = of_rows(&[]);
        assert_eq!(answer.number, show::NONE);
        assert_eq!(answer.says, "Waits for Voc, Record low, Input limit and Modules in series.");
        assert_eq!(answer.bar.expect("a bar").ruler.covered, None);
        let no_count = of_rows(&RIDGE[..4]);
        assert_eq!(no_count.says, "Enter Modules in series to judge a string.");
        assert_eq!(no_count.most.as_deref(), Some("Longest safe string: 2"));
    }

    #[test]
    fn a_record_low_in_fahrenheit_is_said_in_fahrenheit() {
        let answer = of_rows(&[RIDGE, &[(Field::RecordLow, "-24 F")]].concat());
        assert_eq!(plain(&answer.of), "3 in series at −24 °F, the record low");
    }

    #[test]
    fn the_bar_runs_from_hot_to_cold_between_what_charging_needs_and_the_limit() {
        let rows = [
            RIDGE,
            &[
                (Field::Vmp, "41.1"),
                (Field::PmaxCoefficient, "-0.30"),
                (Field::RecordHigh, "34"),
                (Field::HighestCharge, "56"),
                (Field::VocTolerance, "0"),
            ],
        ]
        .concat();
        let bar = of_rows(&rows).bar.expect("a bar");
        assert_eq!(bar.ruler.low.as_ref().map(|post| (post.at, post.name.as_str())), Some((57.0, "charging needs")));
        assert_eq!(bar.ruler.high.as_ref().map(|post| post.at), Some(150.0));
        let shown: Vec<String> = bar.ruler.marks.iter().map(|mark| plain(&mark.shown)).collect();
        assert_eq!(shown, ["106.5 V", "147.9 V", "170.3 V"]);
        assert_eq!(
            plain(&bar.says),
            "String volts. Allowed 57 V to 150 V. 3 in series cover 106.5 V at the hottest to 170.3 V at record cold. \
             20.3 V past the limit."
        );
    }

    #[test]
    fn the_fuse_note_names_what_fits() {
        let rows =
            [(Field::Isc, "10.6"), (Field::SeriesFuseRating, "20"), (Field::Strings, "4"), (Field::CodeFamily, "iec")];
        let note = note(&Ask::read(&Rows(&rows)), Requirement::Fuse).expect("a note");
        assert!(plain(&note).contains("Fuse every string: 16 or 20 A fits by the rule; 20 A where"), "{note}");
    }
}
