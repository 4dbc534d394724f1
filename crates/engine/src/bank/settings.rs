//! The card to key into controllers and inverter.

use super::ask::{finite, positive};
use super::rates::bank_capacity;
use super::window::{Stage, cells, compensation, held, lowest};
use super::{Ask, settled};
use crate::check::{Basis, FieldSet, Step, Steps};
use crate::chemistry::{Figures, RATED_AT, Span};
use crate::entry::Entry;
use crate::quantity::{Amount, Celsius, Percent, Quantity, Volts, VoltsPerKelvin};
use crate::source::{self, Clause};
use crate::unit::Unit;

/// One line of the card.
#[derive(Clone, Debug, PartialEq)]
pub struct Setting {
    /// What is set.
    pub name: &'static str,
    /// To what, for the whole bank. None where it is to be switched off.
    pub amount: Option<Amount>,
    /// The same for one cell, where that is asked for.
    pub each: Option<Amount>,
    /// Between which values of the whole bank makers lie.
    pub range: Option<Span<Amount>>,
    /// Why, or what to mind.
    pub note: &'static str,
    /// Where the range is from.
    pub source: Clause,
}

/// The card.
#[derive(Clone, Debug, PartialEq)]
pub struct Settings {
    /// Its lines.
    pub lines: Vec<Setting>,
    /// The inputs that were assumed.
    pub assumed: FieldSet,
}

impl Settings {
    /// The line called `name`.
    #[must_use]
    pub fn line(&self, name: &str) -> Option<&Setting> {
        self.lines.iter().find(|line| line.name == name)
    }
}

/// Charge that is kept above the lowest one before the inverter comes on again. *Chosen*: so that it does not hunt.
const BACK_AFTER: f64 = 20.0;

/// The settings of a bank. `None` where the chemistry or the counts are missing.
///
/// The maker's data sheet goes before every line.
#[must_use]
pub fn settings(ask: &Ask) -> Option<Settings> {
    let ask = &settled(ask);
    let basis = &mut Basis::default();
    let (_, figures) = ask.chemistry(basis)?;
    let cells = cells(ask, basis, &mut Steps::silent())?;
    let mut lines = Vec::new();
    charge_voltages(ask, figures, cells, basis, &mut lines)?;
    let per_kelvin = compensation(ask, figures, basis)?;
    lines.push(Setting {
        name: "Compensation",
        amount: (per_kelvin.get() != 0.0).then(|| millivolts(per_kelvin * cells)),
        each: (per_kelvin.get() != 0.0).then(|| millivolts(per_kelvin)),
        range: figures.compensation.map(|figure| Span {
            least: millivolts(figure.range.least * cells),
            greatest: millivolts(figure.range.greatest * cells),
        }),
        note: if per_kelvin.get() == 0.0 {
            "Off: these cells are charged to the same voltage warm and cold."
        } else {
            "For the whole bank. Some chargers ask for one cell or for 12 V: see the figure for a cell. Sensor on a cell."
        },
        source: figures.compensation.map_or(figures.absorb.source, |figure| figure.source),
    });
    cut_offs(ask, figures, cells, basis, &mut lines)?;
    currents(ask, figures, basis, &mut lines);
    lines.push(Setting {
        name: "Charge only from",
        amount: Some(figures.charging.lowest.chosen.amount()),
        each: None,
        range: Some(Span {
            least: figures.charging.lowest.range.least.amount(),
            greatest: figures.charging.lowest.range.greatest.amount(),
        }),
        note: figures.charging.lowest.why,
        source: figures.charging.lowest.source,
    });
    lines.push(Setting {
        name: "Charge only up to",
        amount: Some(figures.charging.highest.amount()),
        each: None,
        range: None,
        note: "Cell temperature.",
        source: figures.charging.lowest.source,
    });
    Some(Settings { lines, assumed: basis.assumed() })
}

/// As chargers ask for it.
fn millivolts(per_kelvin: VoltsPerKelvin) -> Amount {
    Amount { number: per_kelvin.get() * 1000.0, unit: Unit::MillivoltPerKelvin }
}

/// The steps to the absorb voltage at 25 °C, the first line of the card.
#[must_use]
pub fn settings_working(ask: &Ask) -> Vec<Step> {
    let mut steps = Steps::written();
    held(&settled(ask), Stage::Absorb, Some(RATED_AT), &mut Basis::default(), &mut steps);
    steps.into_steps()
}

fn across(figure: crate::chemistry::Figure<Volts>, cells: f64) -> Span<Amount> {
    Span { least: (figure.range.least * cells).amount(), greatest: (figure.range.greatest * cells).amount() }
}

fn charge_voltages(
    ask: &Ask,
    figures: &Figures,
    cells: f64,
    basis: &mut Basis,
    lines: &mut Vec<Setting>,
) -> Option<()> {
    let mut of = |stage, at: Celsius| held(ask, stage, Some(at), basis, &mut Steps::silent());
    let absorb = of(Stage::Absorb, RATED_AT)??;
    lines.push(Setting {
        name: "Absorb",
        amount: Some(absorb.amount()),
        each: Some((absorb / cells).amount()),
        range: Some(across(figures.absorb, cells)),
        note: figures.absorb.why,
        source: figures.absorb.source,
    });
    for (name, entry) in [("Absorb at the coldest", ask.coldest), ("Absorb at the warmest", ask.warmest)] {
        let Entry::Typed(at) = finite(entry) else { continue };
        let compensated = of(Stage::Absorb, at)??;
        if compensated != absorb {
            lines.push(Setting {
                name,
                amount: Some(compensated.amount()),
                each: Some((compensated / cells).amount()),
                range: None,
                note: "What the charger makes of it there: for checking, not for keying in.",
                source: figures.absorb.source,
            });
        }
    }
    let float = of(Stage::Float, RATED_AT)?;
    lines.push(Setting {
        name: "Float",
        amount: float.map(|float| float.amount()),
        each: float.map(|float| (float / cells).amount()),
        range: figures.float.map(|figure| across(figure, cells)),
        note: figures.float.map_or("Off, or as low as it goes.", |figure| figure.why),
        source: figures.float.map_or(figures.absorb.source, |figure| figure.source),
    });
    let equalise = of(Stage::Equalise, RATED_AT)?;
    lines.push(Setting {
        name: "Equalise",
        amount: equalise.map(|equalise| equalise.amount()),
        each: equalise.map(|equalise| (equalise / cells).amount()),
        range: figures.equalise.map(|figure| across(figure, cells)),
        note: figures.equalise.map_or("Never: it harms these cells. Switch it off.", |figure| figure.why),
        source: figures.equalise.map_or(figures.absorb.source, |figure| figure.source),
    });
    Some(())
}

fn cut_offs(ask: &Ask, figures: &Figures, cells: f64, basis: &mut Basis, lines: &mut Vec<Setting>) -> Option<()> {
    let end = lowest(ask, basis, &mut Steps::silent())?;
    let left = Percent::new(100.0) - ask.depth(figures, basis)?;
    let shape = source::CHOSEN.at("a typical discharge at the rated rate");
    let stop = (figures.loaded(left) * cells).max(end);
    let back = (figures.loaded(left + Percent::new(BACK_AFTER)) * cells).max(stop);
    let line = |name, volts: Volts, range, note, source| Setting {
        name,
        amount: Some(volts.amount()),
        each: Some((volts / cells).amount()),
        range,
        note,
        source,
    };
    lines.push(line(
        "Cut-off",
        stop,
        None,
        "About where the depth used is reached, under the rated load. Heavier loads sag below it sooner.",
        shape,
    ));
    lines.push(line("Back on", back, None, "So much charge above the cut-off that it does not hunt.", shape));
    lines.push(line("Last cut-off", end, Some(across(figures.end, cells)), figures.end.why, figures.end.source));
    Some(())
}

fn currents(ask: &Ask, figures: &Figures, basis: &mut Basis, lines: &mut Vec<Setting>) {
    let Some(capacity) = bank_capacity(ask, basis, &mut Steps::silent()) else { return };
    let greatest = figures.greatest_charge;
    let mut limit = capacity / greatest.chosen;
    // A pack's own limit goes before the chemistry's.
    if let (Entry::Typed(pack), Some(strings)) = (positive(ask.pack_charge_limit), ask.strings(basis)) {
        limit = limit.min(pack * strings.get());
    }
    lines.push(Setting {
        name: "Charge current, all chargers",
        amount: Some(limit.amount()),
        each: None,
        range: Some(Span {
            least: figures
                .least_charge
                .map_or((capacity / greatest.range.greatest).amount(), |least| (capacity / least.chosen).amount()),
            greatest: (capacity / greatest.range.least).amount(),
        }),
        note: greatest.why,
        source: greatest.source,
    });
}
