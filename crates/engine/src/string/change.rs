//! The smallest single change that lets all modules be used.
//!
//! Only what can be bought or added is changed: one more controller, or one that takes more. Nameplates of modules,
//! assumptions and the code family are never edited.

use super::{Ask, Layout, layouts};
use crate::check::Steps;
use crate::controller::Controller;
use crate::entry::Entry;
use crate::quantity::{Amps, Volts};

/// What is changed.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum What {
    /// One more controller like number `like`.
    OneMore {
        /// Which controller it is like, counted from 0.
        like: usize,
    },
    /// Controller number `controller` replaced by one whose input survives at least this.
    InputLimit {
        /// Which controller.
        controller: usize,
        /// The least that does.
        least: Volts,
    },
    /// Controller number `controller` replaced by one whose input takes at least this short-circuit current.
    PvCurrentLimit {
        /// Which controller.
        controller: usize,
        /// The least that does.
        least: Amps,
    },
    /// Controller number `controller` replaced by one that delivers at least this to the bank.
    OutputCurrent {
        /// Which controller.
        controller: usize,
        /// The least that does.
        least: Amps,
    },
}

/// A change, and the layout that it makes possible.
#[derive(Clone, Debug, PartialEq)]
pub struct Change {
    /// What is changed.
    pub what: What,
    /// The layout of all modules that holds then.
    pub layout: Layout,
}

/// The single changes that let all `modules` be used with no check broken, each kind once, the smallest of its kind.
///
/// Empty where nothing needs changing, where no single change does, and where the inputs do not tell.
#[must_use]
pub fn changes(ask: &Ask, modules: u32, controllers: &[Controller]) -> Vec<Change> {
    if modules == 0 || controllers.is_empty() || all_used(ask, modules, controllers).is_some() {
        return Vec::new();
    }
    let mut found = Vec::new();
    if controllers.len() < 8 {
        for like in distinct(controllers) {
            let mut more = controllers.to_vec();
            more.push(controllers[like]);
            if let Some(layout) = all_used(ask, modules, &more) {
                found.push(Change { what: What::OneMore { like }, layout });
                break;
            }
        }
    }
    for controller in distinct(controllers) {
        found.extend(raised(ask, modules, controllers, controller));
    }
    found
}

/// The best layout of all modules that breaks nothing.
fn all_used(ask: &Ask, modules: u32, controllers: &[Controller]) -> Option<Layout> {
    layouts(ask, modules, controllers).ranked.into_iter().find(|layout| layout.left_over == 0 && layout.holds())
}

fn distinct(controllers: &[Controller]) -> Vec<usize> {
    (0..controllers.len()).filter(|index| !controllers[..*index].contains(&controllers[*index])).collect()
}

/// The least rise of each of one controller's ratings that does it.
fn raised(ask: &Ask, modules: u32, controllers: &[Controller], which: usize) -> Vec<Change> {
    let mut found = Vec::new();
    let with = |change: &dyn Fn(&mut Controller)| {
        let mut changed = controllers.to_vec();
        change(&mut changed[which]);
        all_used(ask, modules, &changed)
    };
    let mut basis = crate::check::Basis::default();
    let on = ask.on(controllers[which]);
    if let (Some(limit), Some(each)) = (
        controllers[which].input_limit.typed(),
        super::cold::cold_string(&on.with_counts(1, 1), &mut basis, &mut Steps::silent()),
    ) {
        let candidates = (1..=modules).map(|count| each * f64::from(count)).filter(|volts| *volts > limit);
        // A longer string never needs less: the first that does is the least.
        let least = candidates.take(24).find_map(|least| {
            with(&|one| {
                one.input_limit = Entry::Typed(least);
                // A window that ends with the old limit would only refuse the longer string again.
                one.window_high = Entry::Blank;
            })
            .map(|layout| (least, layout))
        });
        found.extend(
            least.map(|(least, layout)| Change { what: What::InputLimit { controller: which, least }, layout }),
        );
    }
    if let (Some(limit), Some(each)) = (controllers[which].pv_current_limit.typed(), string_current(&on)) {
        let candidates = (1..=modules).map(|count| each * f64::from(count)).filter(|amps| *amps > limit);
        let least = candidates
            .take(24)
            .find_map(|least| with(&|one| one.pv_current_limit = Entry::Typed(least)).map(|layout| (least, layout)));
        found.extend(
            least.map(|(least, layout)| Change { what: What::PvCurrentLimit { controller: which, least }, layout }),
        );
    }
    if let Some(output) = controllers[which].output_current.typed() {
        // In steps of 5 A, as controllers are made.
        let first = (output.get() / 5.0).floor() * 5.0 + 5.0;
        let candidates = (0..24).map(|step| Amps::new(first + 5.0 * f64::from(step)));
        let least = candidates
            .into_iter()
            .find_map(|least| with(&|one| one.output_current = Entry::Typed(least)).map(|layout| (least, layout)));
        found.extend(
            least.map(|(least, layout)| Change { what: What::OutputCurrent { controller: which, least }, layout }),
        );
    }
    found
}

/// What one string counts as against the PV current limit.
fn string_current(ask: &Ask) -> Option<Amps> {
    let check = super::Requirement::ShortCircuit.check(&ask.with_counts(1, 1))?;
    check.value.map(|value| Amps::new(value.number))
}
