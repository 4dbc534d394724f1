//! The span of voltages that a string of cells covers, from its lowest in use to its highest on charge.

use super::Ask;
use super::ask::{finite, origin, positive};
use crate::check::{Basis, Origin, Steps};
use crate::chemistry::{Chemistry, Figures, RATED_AT, rested};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Celsius, Kelvins, Percent, Quantity, Volts, VoltsPerKelvin};
use crate::show;

/// A stage of charging.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Stage {
    /// Held until the cell takes no more.
    Absorb,
    /// Held while the cell is full.
    Float,
    /// Held now and then, to even the cells out.
    Equalise,
}

/// The voltages of a whole string.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Window {
    /// At the end of discharge.
    pub lowest: Volts,
    /// As the trade counts it.
    pub nominal: Volts,
    /// Full and rested.
    pub rested: Volts,
    /// Floating, at 25 °C.
    pub float: Option<Volts>,
    /// Absorbing, at 25 °C.
    pub absorb: Volts,
    /// Equalising, at 25 °C.
    pub equalise: Option<Volts>,
    /// The highest of all, at the coldest.
    pub highest: Volts,
    /// In which stage that is.
    pub highest_in: Stage,
}

/// Temperature that the charge voltages are compensated for. Where nothing was entered no compensation is counted, and
/// the check says so: it rests on an assumption.
pub(super) fn coldest(ask: &Ask, basis: &mut Basis) -> Option<Celsius> {
    let figures = ask.chemistry(&mut Basis::default()).map(|(_, figures)| figures);
    let per_kelvin = figures.and_then(|figures| compensation(ask, figures, &mut Basis::default()));
    // Where nothing is compensated, the room plays no part.
    if per_kelvin == Some(VoltsPerKelvin::new(0.0)) {
        return Some(RATED_AT);
    }
    basis.assume(Field::ColdestInTheRoom, finite(ask.coldest), RATED_AT)
}

/// Cells in series: blocks in series times cells in each.
pub(super) fn cells(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<f64> {
    let series = ask.series(basis);
    let in_block = ask.block_cells(basis);
    let (series, in_block) = (series?, in_block?);
    let cells = crate::quantity::Count::new(series.get() * in_block.get());
    let cells = steps.step("Cells in series", cells, || {
        (
            "blocks · cells in each",
            format!("{} × {}", show::number(series.get(), 0), show::number(in_block.get(), 0)),
            // The count in series may be entered, or that of the best layout.
            Origin::Before,
        )
    });
    Some(cells.get())
}

/// What one cell is held at in `stage`, at 25 °C, with the field it may be entered in. `None` inside where the
/// chemistry has no such stage.
fn each(ask: &Ask, figures: &Figures, stage: Stage, basis: &mut Basis) -> Option<Option<Volts>> {
    let (field, entry, usual) = match stage {
        Stage::Absorb => (Field::CellAbsorb, positive(ask.absorb), Some(figures.absorb.chosen)),
        Stage::Float => (Field::CellFloat, positive(ask.float), figures.float.map(|figure| figure.chosen)),
        Stage::Equalise => {
            let usual = figures.equalise.filter(|_| figures.equalise_is_usual);
            (Field::CellEqualise, positive(ask.equalise), usual.map(|figure| figure.chosen))
        }
    };
    match (entry, usual) {
        (Entry::Blank, None) => Some(None),
        (_, usual) => basis.assume(field, entry, usual.unwrap_or(figures.absorb.chosen)).map(Some),
    }
}

const fn field(stage: Stage) -> (Field, &'static str, &'static str) {
    match stage {
        Stage::Absorb => (Field::CellAbsorb, "Absorb, a cell", "Absorb, the string"),
        Stage::Float => (Field::CellFloat, "Float, a cell", "Float, the string"),
        Stage::Equalise => (Field::CellEqualise, "Equalise, a cell", "Equalise, the string"),
    }
}

/// Change of one cell's charge voltage with temperature; zero or below.
pub(super) fn compensation(ask: &Ask, figures: &Figures, basis: &mut Basis) -> Option<VoltsPerKelvin> {
    let entry = finite(ask.compensation);
    match (entry, figures.compensation) {
        (Entry::Blank, None) => Some(VoltsPerKelvin::new(0.0)),
        (_, usual) => {
            let usual = usual.map_or(VoltsPerKelvin::new(0.0), |figure| figure.chosen);
            Some(-basis.assume(Field::CellCompensation, entry, usual)?.abs())
        }
    }
}

/// Volts of `cells` cells in `stage`, compensated for `at` and capped.
///
/// V = n · (V₂₅ + κ · (T − 25 °C)), at most the cap
pub(super) fn held(
    ask: &Ask,
    stage: Stage,
    at: Option<Celsius>,
    basis: &mut Basis,
    steps: &mut Steps,
) -> Option<Option<Volts>> {
    let figures = ask.chemistry(basis).map(|(_, figures)| figures);
    let cells = cells(ask, basis, steps);
    let figures = figures?;
    let Some(each) = each(ask, figures, stage, basis)? else { return Some(None) };
    let per_kelvin = compensation(ask, figures, basis);
    let (cells, at, per_kelvin) = (cells?, at?, per_kelvin?);
    let (field, one, all) = field(stage);
    let entry = match stage {
        Stage::Absorb => ask.absorb,
        Stage::Float => ask.float,
        Stage::Equalise => ask.equalise,
    };
    let each = steps.step(one, each, || ("", String::new(), origin(field, entry)));
    let away: Kelvins = at - RATED_AT;
    let each = if per_kelvin.get() == 0.0 || away.get() == 0.0 {
        each
    } else {
        steps.step("Compensated, a cell", each + per_kelvin * away, || {
            (
                "V + κ · (T − 25 °C)",
                format!(
                    "{} + {} mV/K × ({} − 25 °C)",
                    show::step(each.amount()),
                    show::number(per_kelvin.get() * 1000.0, 1),
                    show::given(at.amount())
                ),
                origin(Field::CellCompensation, ask.compensation),
            )
        })
    };
    let whole = steps.step(all, each * cells, || {
        ("n · V", format!("{} × {}", show::number(cells, 0), show::step(each.amount())), Origin::Before)
    });
    match positive(ask.charge_cap) {
        Entry::Blank => Some(Some(whole)),
        Entry::Unread => {
            basis.ask(Field::ChargeCap);
            None
        }
        Entry::Typed(cap) => Some(Some(steps.step("Not above the chargers' cap", whole.min(cap), || {
            let put_in = format!("min({}, {})", show::step(whole.amount()), show::given(cap.amount()));
            ("min(V, cap)", put_in, Origin::Entered(Field::ChargeCap))
        }))),
    }
}

/// Highest voltage of the string on charge, at the coldest, and its stage.
pub(super) fn highest(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<(Volts, Stage)> {
    let at = coldest(ask, basis);
    let mut silent = |stage| held(ask, stage, at, basis, &mut Steps::silent());
    let (equalise, absorb) = (silent(Stage::Equalise)?, silent(Stage::Absorb));
    // An equalise voltage below the absorb voltage is a slip that must not hide the higher one.
    let stage = match equalise {
        Some(equalise) if equalise >= absorb?? => Stage::Equalise,
        _ => Stage::Absorb,
    };
    Some((held(ask, stage, at, basis, steps)??, stage))
}

/// Voltage of the string at the end of discharge. V = n · V_end
pub(super) fn lowest(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Volts> {
    let figures = ask.chemistry(basis).map(|(_, figures)| figures);
    let cells = cells(ask, basis, steps);
    let end = basis.assume(Field::CellEnd, positive(ask.end), figures?.end.chosen);
    let (cells, end) = (cells?, end?);
    let end = steps.step("End of discharge, a cell", end, || ("", String::new(), origin(Field::CellEnd, ask.end)));
    Some(steps.step("Lowest in use, the string", end * cells, || {
        ("n · V", format!("{} × {}", show::number(cells, 0), show::step(end.amount())), Origin::Before)
    }))
}

/// The voltages of the string that `ask` has in series. `None` where an input is missing.
///
/// Never lower for more cells in series.
#[must_use]
pub fn window(ask: &Ask) -> Option<Window> {
    let basis = &mut Basis::default();
    let (chemistry, figures): (Chemistry, _) = ask.chemistry(basis)?;
    let cells = cells(ask, basis, &mut Steps::silent())?;
    let mut plain = |stage| held(ask, stage, Some(RATED_AT), basis, &mut Steps::silent());
    let (float, absorb, equalise) = (plain(Stage::Float)?, plain(Stage::Absorb)??, plain(Stage::Equalise)?);
    let (highest, highest_in) = highest(ask, basis, &mut Steps::silent())?;
    Some(Window {
        lowest: lowest(ask, basis, &mut Steps::silent())?,
        nominal: figures.nominal * cells,
        rested: rested(chemistry, Percent::new(100.0)) * cells,
        float,
        absorb,
        equalise,
        highest,
        highest_in,
    })
}
