//! Fitting the links one at a time: what to do, and what the meter must read now.

use super::cell::Pole;
use super::layout::{Layout, Link, LinkKind, Lug, TOUCH};
use crate::quantity::Volts;

/// Stands over every bank, whatever its volts.
pub const BURNS: &str = "At any voltage a bank welds a wrench and burns, and nothing switches it off: insulate tools, \
                         one wrench in hand and none left on the bank, take off rings, cover the posts you are not \
                         working on. Local codes and licensed practice come first.";

/// Before the loop of two parallel cells is closed they must read alike within this.
///
/// *Chosen*: 0.02 V drives some 20 to 40 A through two large cells and their links of half a milliohm to one in all.
const ALIKE: Volts = Volts::new(0.02);

/// What the meter must read between two posts.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Meter {
    /// Where the black lead goes.
    pub black: Lug,
    /// Where the red lead goes.
    pub red: Lug,
    /// No less than this.
    pub lowest: Volts,
    /// Most likely this.
    pub expected: Volts,
    /// No more than this.
    pub highest: Volts,
}

/// What to beware of at a step.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Caution {
    /// Any bank burns.
    Burns,
    /// With this link the part being joined passes 60 V.
    PassesTouch,
    /// The part being joined is above 60 V.
    AboveTouch,
    /// It joins the halves: last of all, barriers first.
    FitLast,
    /// It closes a loop between cells: only where they read alike.
    AlikeFirst,
}

impl Caution {
    /// What is said.
    #[must_use]
    pub const fn text(self) -> &'static str {
        match self {
            Self::Burns => BURNS,
            Self::PassesTouch => {
                "This link takes the string past 60 V, where touch is dangerous. One hand, dry gloves rated for it, \
                 and nobody alone."
            }
            Self::AboveTouch => "Above 60 V: touch is dangerous.",
            Self::FitLast => "Fit barriers and cover both take-off posts before this link.",
            Self::AlikeFirst => {
                "Cells joined at unequal volts drive a great current through one another. If they do \
                                 not read alike, charge them alike first."
            }
        }
    }
}

/// One step: one link.
#[derive(Clone, Debug, PartialEq)]
pub struct Step {
    /// The link's number.
    pub link: u32,
    /// What to do.
    pub what: String,
    /// What must be read before the link is fitted.
    pub before: Vec<Meter>,
    /// What must be read once it is.
    pub now: Meter,
    /// What to beware of.
    pub cautions: Vec<Caution>,
}

/// The steps for a layout, one for each link, in the order to fit.
#[must_use]
pub fn steps(layout: &Layout) -> Vec<Step> {
    let half = layout.series / 2;
    layout
        .links
        .iter()
        .filter_map(|link| match link.kind {
            LinkKind::Parallel => parallel(layout, link),
            LinkKind::Series => series(layout, link, half),
        })
        .collect()
}

/// From the minus end of position `from` to the plus end of position `to` of a string.
fn meter(layout: &Layout, string: u32, from: u32, to: u32) -> Option<Meter> {
    let of = |position| layout.places.iter().filter(move |p| p.string == string && p.position == position);
    let black = Lug { cell: of(from).next()?.cell, pole: Pole::Minus };
    let red = Lug { cell: of(to).next_back()?.cell, pole: Pole::Plus };
    let cells = f64::from(to + 1 - from);
    let cell = layout.cell;
    Some(Meter {
        black,
        red,
        lowest: cell.lowest() * cells,
        expected: cell.expected() * cells,
        highest: cell.highest() * cells,
    })
}

fn series(layout: &Layout, link: &Link, half: u32) -> Option<Step> {
    let read = |from, to| meter(layout, link.string, from, to);
    let (before, now) = if link.fitted_last {
        (vec![read(1, half)?, read(half + 1, layout.series)?], read(1, layout.series)?)
    } else {
        let start = if link.after < half { 1 } else { half + 1 };
        (Vec::new(), read(start, link.after + 1)?)
    };
    let mut cautions = Vec::new();
    if link.number == 1 || link.fitted_last {
        cautions.push(Caution::Burns);
    }
    if link.fitted_last {
        cautions.push(Caution::FitLast);
    }
    if now.highest > TOUCH {
        // What stood before: the greater half, or the same part less the cell that this link adds.
        let was = before.iter().map(|m| m.highest).reduce(Volts::max).unwrap_or(now.highest - layout.cell.highest());
        cautions.push(if was > TOUCH { Caution::AboveTouch } else { Caution::PassesTouch });
    }
    let what = format!("Join plus of cell {} to minus of cell {}.", link.from.cell, link.to.cell);
    Some(Step { link: link.number, what, before, now, cautions })
}

fn parallel(layout: &Layout, link: &Link) -> Option<Step> {
    let mut cautions = Vec::new();
    if link.number == 1 {
        cautions.push(Caution::Burns);
    }
    let pole = link.from.pole;
    // Minus goes first, so that plus to plus closes the loop.
    let before = match pole {
        Pole::Minus => Vec::new(),
        Pole::Plus => {
            cautions.push(Caution::AlikeFirst);
            vec![Meter { black: link.from, red: link.to, lowest: -ALIKE, expected: Volts::new(0.0), highest: ALIKE }]
        }
    };
    let cell = layout.cell;
    let now = Meter {
        black: Lug { cell: link.from.cell, pole: Pole::Minus },
        red: Lug { cell: link.to.cell, pole: Pole::Plus },
        lowest: cell.lowest(),
        expected: cell.expected(),
        highest: cell.highest(),
    };
    let word = pole.word();
    let what = format!("Join {word} of cell {} to {word} of cell {}.", link.from.cell, link.to.cell);
    Some(Step { link: link.number, what, before, now, cautions })
}
