//! What the String tool is asked: one array, and the controllers at hand. Pure.

use engine::check::Check;
use engine::controller::Controller;
use engine::entry::Entry;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::Count;
use engine::string::{self, Ask, Requirement};

use super::TOOL;
use crate::pads::Pads;
use crate::tools::Tool;

/// The most controllers that layouts are made for.
pub const MOST_CONTROLLERS: usize = 8;

/// The other kinds of controllers that there may be.
pub const OTHERS: [Tool; 2] = [Tool::SecondController, Tool::ThirdController];

/// Everything that the page computes from.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Question {
    /// The array and its controller.
    pub ask: Ask,
    /// Modules that there are; none where the field is blank or not understood.
    pub modules: Option<u32>,
    /// Every controller at hand, the array's own first.
    pub controllers: Vec<Controller>,
}

impl Question {
    /// Reads the pads of the tool.
    pub fn read(pads: &Pads) -> Self {
        let pad = pads.of(TOOL);
        let ask = pads.string_ask();
        let mut controllers = vec![ask.controller; count(&pad).unwrap_or(1)];
        for other in OTHERS {
            let pad = pads.of(other);
            let controller = other_kind(&ask.controller, &pad);
            // A kind of which nothing was entered is not there.
            if controller.input_limit.typed().is_some() {
                controllers.extend(std::iter::repeat_n(controller, count(&pad).unwrap_or(1)));
            }
        }
        controllers.truncate(MOST_CONTROLLERS);
        Self { ask, modules: whole(pad.entry::<Count>(Field::ModulesAtHand)), controllers }
    }

    /// All checks of the array, worst first.
    pub fn checks(&self) -> Vec<Check<Requirement>> {
        string::assess(&self.ask)
    }
}

/// Another kind of controller on the same bank: what it charges to is one figure for all.
fn other_kind(first: &Controller, pad: &impl Pad) -> Controller {
    Controller { highest_charge: first.highest_charge, ..Controller::read(pad) }
}

fn count(pad: &impl Pad) -> Option<usize> {
    whole(pad.entry::<Count>(Field::ControllersAtHand)).map(|count| count as usize)
}

fn whole(entry: Entry<Count>) -> Option<u32> {
    // Within the field's range by its reading, so it fits.
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "the field takes 1 to 400")]
    entry.typed().map(|count| count.get() as u32)
}
