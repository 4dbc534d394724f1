//! The String tool: how many modules in series.

use engine::field::Field;
use leptos::prelude::*;

use crate::caution::Caution;
use crate::field::{ChoiceField, CountField, NumberField, Shape};
use crate::fold::Fold;
use crate::route::Route;
use crate::tools::Tool;

const TOOL: Tool = Tool::String;

/// The String tool: how many modules in series.
#[component]
pub fn StringTool() -> impl IntoView {
    view! {
        <div class="tool">
            <div class="page-head">
                <h1 tabindex="-1">"String"</h1>
                <a class="aside" href=Route::Tools.href()>"All tools"</a>
            </div>
            <div class="tool-left">
                <Caution>
                    <p>
                        "A string is live in any light. Cover or darken the array before you touch its terminals. "
                        "Above 60 V d.c. (30 V wet) it shocks, and its arc does not go out."
                    </p>
                </Caution>
            </div>
            <div class="tool-right">
                <h2 class="sub">"Module and controller"</h2>
                <div class="fields">
                    <CountField tool=TOOL field=Field::Series label="In series"/>
                    <CountField tool=TOOL field=Field::Strings/>
                    <NumberField tool=TOOL field=Field::Voc/>
                    <NumberField tool=TOOL field=Field::Vmp/>
                    <NumberField tool=TOOL field=Field::Isc/>
                    <NumberField tool=TOOL field=Field::VocCoefficient/>
                    <NumberField tool=TOOL field=Field::InputLimit/>
                    <NumberField tool=TOOL field=Field::RecordLow/>
                </div>
                <Fold id="string/more" title="Less often changed">
                    <div class="fields">
                        <NumberField tool=TOOL field=Field::Imp/>
                        <NumberField tool=TOOL field=Field::VocTolerance/>
                        <NumberField tool=TOOL field=Field::RecordHigh/>
                        <ChoiceField tool=TOOL field=Field::Mounting/>
                        <ChoiceField tool=TOOL field=Field::CodeFamily shape=Shape::Pick/>
                    </div>
                </Fold>
            </div>
        </div>
    }
}
