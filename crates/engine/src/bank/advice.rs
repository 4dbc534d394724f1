//! What to do with the cells at hand, in a sentence or two.

use core::fmt;

use super::ask::positive;
use super::{Ask, Layout, Layouts, layouts, window};
use crate::check::Basis;
use crate::chemistry::Chemistry;
use crate::quantity::{Count, Quantity, Volts};
use crate::show;

/// A piece of advice. Shown by its `Display`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Advice {
    /// As many cells as the bus has volts: the trap of counting cells as volts.
    CellsAreNotVolts {
        /// What the cells are made of.
        chemistry: Chemistry,
        /// How many there are.
        cells: Count,
        /// The bus they were counted for.
        bus: Volts,
        /// What so many in series are called.
        nominal: Volts,
        /// What they reach on absorb.
        absorb: Volts,
        /// The highest they reach.
        highest: Volts,
    },
    /// The best layout.
    Take {
        /// Cells or blocks in series.
        series: u32,
        /// Strings in parallel.
        strings: u32,
        /// Cells or blocks left over.
        left_over: u32,
    },
    /// A refused layout, and the window of devices that would take it.
    OrWiderWindow {
        /// Cells or blocks in series.
        series: u32,
        /// The cut-off that uses all of it.
        low: Volts,
        /// What every device must tolerate.
        high: Volts,
    },
    /// No layout stands.
    NothingFits,
}

impl fmt::Display for Advice {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match *self {
            Self::CellsAreNotVolts { chemistry, cells, bus, nominal, absorb, highest } => write!(
                f,
                "{0} cells are not {1}: {0} {2} cells in series are {3} nominal, {4} on absorb and up to {5}.",
                show::number(cells.get(), 0),
                show::given(bus.amount()),
                chemistry.word(),
                show::computed(nominal.amount()),
                show::computed(absorb.amount()),
                show::computed(highest.amount()),
            ),
            Self::Take { series, strings, left_over } => {
                write!(f, "{series} in series")?;
                if strings > 1 {
                    write!(f, ", {strings} strings")?;
                }
                match left_over {
                    0 => write!(f, ", none left over."),
                    left_over => write!(f, ", {left_over} left over."),
                }
            }
            Self::OrWiderWindow { series, low, high } => write!(
                f,
                "Or {series} in series, with devices that run from {} and tolerate {}.",
                show::computed(low.amount()),
                show::computed(high.amount()),
            ),
            Self::NothingFits => write!(f, "No count of these cells fits these devices."),
        }
    }
}

/// How far from the bus a refused layout's nominal voltage may lie to be worth a device of another window. *Chosen*.
const NEAR: f64 = 0.3;

/// Advice on the cells at hand: the trap first, then the best layout, then what other devices would take.
#[must_use]
pub fn advice(ask: &Ask) -> Vec<Advice> {
    advice_on(ask, &layouts(ask))
}

/// The same, where the layouts of `ask` are made already.
#[must_use]
pub fn advice_on(ask: &Ask, found: &Layouts) -> Vec<Advice> {
    let mut said = Vec::new();
    said.extend(trap(ask));
    if found.ranked.is_empty() && found.rejected.is_empty() {
        return said;
    }
    said.push(found.best().map_or(Advice::NothingFits, |best| Advice::Take {
        series: best.series,
        strings: best.strings,
        left_over: best.left_over,
    }));
    let bus = positive(ask.bus_voltage).typed();
    let off = |layout: &Layout| bus.map_or(0.0, |bus| (layout.window.nominal / bus - 1.0).abs());
    let near = || found.rejected.iter().filter(|layout| bus.is_some() && off(layout) <= NEAR);
    let closest = near().min_by(|a, b| off(a).total_cmp(&off(b)));
    let fullest = near().min_by_key(|layout| layout.left_over);
    let less_than_best = found.best().map_or(u32::MAX, |best| best.left_over);
    for layout in [closest, fullest].into_iter().flatten().filter(|layout| layout.left_over < less_than_best) {
        let piece =
            Advice::OrWiderWindow { series: layout.series, low: layout.window.lowest, high: layout.window.highest };
        if !said.contains(&piece) {
            said.push(piece);
        }
    }
    said
}

/// As many single cells in series, or at hand, as the bus has volts.
fn trap(ask: &Ask) -> Option<Advice> {
    let basis = &mut Basis::default();
    let (chemistry, _) = ask.chemistry(basis)?;
    if ask.block_cells(basis)?.get() > 1.0 {
        return None;
    }
    let bus = positive(ask.bus_voltage).typed()?;
    let cells = positive(ask.series).typed().or(positive(ask.count).typed())?;
    if (cells.get() - bus.get()).abs() > 0.5 {
        return None;
    }
    let all = Ask { series: crate::entry::Entry::Typed(cells), strings: crate::entry::Entry::of(1.0), ..*ask };
    let window = window(&all)?;
    Some(Advice::CellsAreNotVolts {
        chemistry,
        cells,
        bus,
        nominal: window.nominal,
        absorb: window.absorb,
        highest: window.highest,
    })
}
