//! The inputs of the String tool: what the first verdict needs, and more in groups.

use crate::derived::derived;
use engine::assumed;
use engine::check::{Check, Verdict};
use engine::field::{Field, Takes};
use engine::string::Requirement;
use leptos::prelude::*;

use super::TOOL;
use super::question::OTHERS;
use crate::draft::use_draft;
use crate::field::{ChoiceField, CountField, NumberField, StandIn};
use crate::fold::{Fold, Folds};
use crate::tools::Tool;

/// The fold that holds everything but the first fields.
const MORE: &str = "string/more";
const OTHER_CONTROLLERS: &str = "string/other-controllers";

/// The fields that always stand open, in the order of the ten-second path.
const FIRST: [Field; 8] = [
    Field::Voc,
    Field::VocCoefficient,
    Field::RecordLow,
    Field::InputLimit,
    Field::Series,
    Field::Strings,
    Field::ModulesAtHand,
    Field::CodeFamily,
];

/// The rest, by group.
const GROUPS: [(&str, &[Field]); 3] = [
    (
        "Module",
        &[
            Field::Vmp,
            Field::Imp,
            Field::Isc,
            Field::VocTolerance,
            Field::PmaxCoefficient,
            Field::IscCoefficient,
            Field::SeriesFuseRating,
            Field::SystemVoltage,
            Field::RearGain,
            Field::StringFuse,
        ],
    ),
    (
        "Controller",
        &[
            Field::ControllerKind,
            Field::HighestCharge,
            Field::WindowLow,
            Field::WindowHigh,
            Field::PvCurrentLimit,
            Field::LimitHoldsFactor,
            Field::OutputCurrent,
            Field::ControllersAtHand,
            Field::RunningHeadroom,
            Field::StartingHeadroom,
        ],
    ),
    (
        "Place and mounting",
        &[Field::RecordHigh, Field::Mounting, Field::StandsOn, Field::ArrayDrop, Field::ColdReserve],
    ),
];

/// What differs between one kind of controller and another on the same bank.
const OF_A_CONTROLLER: [Field; 7] = [
    Field::InputLimit,
    Field::ControllersAtHand,
    Field::WindowLow,
    Field::WindowHigh,
    Field::PvCurrentLimit,
    Field::OutputCurrent,
    Field::LimitHoldsFactor,
];

/// The inputs.
#[component]
pub fn Fields(checks: Memo<Vec<Check<Requirement>>>) -> impl IntoView {
    let draft = use_draft();
    let says = derived(move || {
        let blank = |field: &&Field| draft.with(|pads| pads.typed((TOOL, **field)).text.is_empty());
        let rest = || GROUPS.iter().flat_map(|(_, fields)| fields.iter());
        let entered = rest().count() - rest().filter(blank).count();
        match entered {
            0 => "each lets more checks speak".to_owned(),
            entered => format!("{entered} of {} entered", rest().count()),
        }
    });
    view! {
        <h2 class="sub">"Module and controller" <span>"from the nameplates"</span></h2>
        <div class="fields">{FIRST.into_iter().map(|field| one(field, checks)).collect_view()}</div>
        <Fold id=MORE title="More" says=says>
            {GROUPS
                .iter()
                .map(|(title, fields)| {
                    view! {
                        <h3 class="group">{*title}</h3>
                        <div class="fields">{fields.iter().map(|field| one(*field, checks)).collect_view()}</div>
                    }
                })
                .collect_view()}
        </Fold>
        <Fold
            id=OTHER_CONTROLLERS
            title="Other controllers"
            says=derived(|| "for layouts over unequal ones".to_owned())
        >
            {OTHERS
                .iter()
                .map(|other| {
                    view! {
                        <h3 class="group">{other.name()}</h3>
                        <div class="fields">{OF_A_CONTROLLER.iter().map(|field| of_another(*other, *field)).collect_view()}</div>
                    }
                })
                .collect_view()}
        </Fold>
    }
}

/// Opens what holds `field`, and puts the caret into it.
pub fn go_to(folds: Folds, field: Field) {
    if !FIRST.contains(&field) {
        folds.open(MORE);
    }
    // Once the fold has put its fields up.
    request_animation_frame(move || crate::field::focus(&format!("{}-{}", TOOL.key(), field.key())));
}

fn one(field: Field, checks: Memo<Vec<Check<Requirement>>>) -> AnyView {
    let label = short(field);
    let stand_in = derived(move || assumed::of(field).map(|assumption| StandIn::of(&assumption)));
    let asks = derived(move || checks.with(|checks| asks(field, checks)));
    match field.takes() {
        Takes::Number { .. } => {
            view! { <NumberField tool=TOOL field=field label=label assumed=stand_in asks=asks note=note(field)/> }
                .into_any()
        }
        Takes::Whole { .. } => view! { <CountField tool=TOOL field=field label=label asks=asks/> }.into_any(),
        Takes::Choice(_) => view! { <ChoiceField tool=TOOL field=field label=label assumed=stand_in/> }.into_any(),
    }
}

fn of_another(other: Tool, field: Field) -> AnyView {
    let label = short(field);
    match field.takes() {
        Takes::Number { .. } => view! { <NumberField tool=other field=field label=label of=other.name()/> }.into_any(),
        Takes::Whole { .. } => view! { <CountField tool=other field=field label=label of=other.name()/> }.into_any(),
        Takes::Choice(_) => view! { <ChoiceField tool=other field=field label=label of=other.name()/> }.into_any(),
    }
}

/// The word above a field: at most twelve letters or so, contained in the field's name.
const fn short(field: Field) -> &'static str {
    match field {
        Field::Series => "In series",
        Field::SeriesFuseRating => "Series fuse",
        Field::PvCurrentLimit => "PV current",
        Field::HighestCharge => "Highest charge",
        Field::ControllerKind => "Controller",
        Field::ControllersAtHand => "Controllers",
        other => other.name(),
    }
}

/// What waits for a field of the ten-second path, or of a check that waits for nothing else.
fn asks(field: Field, checks: &[Check<Requirement>]) -> Option<String> {
    let cold = checks.iter().find(|check| check.id == Requirement::ColdController)?;
    if cold.verdict == Verdict::Asks {
        return cold.asks.contains(field).then(|| "the answer waits for this".to_owned());
    }
    let alone = checks.iter().find(|check| check.asks.len() == 1 && check.asks.contains(field))?;
    Some(match alone.id {
        Requirement::Fuse => "string fuses wait for this".to_owned(),
        Requirement::ColdCircuit => "the circuit’s volts wait for this".to_owned(),
        _ => "a check waits for this".to_owned(),
    })
}

/// What is said under a field that holds a value.
fn note(field: Field) -> Signal<Option<String>> {
    let draft = use_draft();
    derived(move || {
        let reading = draft.with(|pads| {
            let typed = pads.typed((TOOL, field));
            field.read(&typed.text, typed.unit).ok().flatten()
        })?;
        let taken_as_falling =
            matches!(field, Field::VocCoefficient | Field::PmaxCoefficient) && reading.number() > 0.0;
        taken_as_falling.then(|| "taken as falling: minus".to_owned())
    })
}
