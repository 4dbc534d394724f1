//! What each part asks, with the figures that follow from other parts put in where nobody typed them.
//!
//! What was typed always goes first: a figure that follows from others only stands where a field is blank.

use core::cell::OnceCell;

use super::Site;
use super::part::{Part, PartKind};
use super::view::{Subject, View};
use crate::bank;
use crate::conductor::{Conductor, Size, resistance};
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Amps, Celsius, Count, Metres, Ohms, Volts, Watts};
use crate::run::{self, Kind};
use crate::start;
use crate::string;

/// The figure that was typed, else the one that follows.
fn else_from<T: Copy>(entry: Entry<T>, follows: Option<T>) -> Entry<T> {
    match (entry, follows) {
        (Entry::Blank, Some(value)) => Entry::Typed(value),
        (entry, _) => entry,
    }
}

/// What the checks of `array` read: its own figures, its controller's, and what the bank is charged to.
#[must_use]
pub fn string_ask(site: &Site, array: &Part) -> string::Ask {
    Survey::new(site).string(array)
}

/// What the checks of `part`, a bank, read: its own figures and those of everything on its bus.
#[must_use]
pub fn bank_ask(site: &Site, part: &Part) -> bank::Ask {
    Survey::new(site).bank(part)
}

/// What the checks of the run that leads from `part` read. `None` where none does.
#[must_use]
pub fn run_ask(site: &Site, part: &Part) -> Option<run::Ask> {
    Survey::new(site).run(part)
}

/// What the checks of the start of `part`, a load, read: its own figures, its inverter's, and the bus by the bank's cells.
#[must_use]
pub fn start_ask(site: &Site, part: &Part) -> start::Ask {
    Survey::new(site).start(part)
}

/// A site with what was read of it so far: what several parts ask about is read and worked out once.
pub struct Survey<'a> {
    site: &'a Site,
    /// What the first bank asks, and the same with its counts.
    bank: OnceCell<Option<(bank::Ask, bank::Ask)>>,
    /// The first bank's voltages.
    window: OnceCell<Option<bank::Window>>,
    /// What each run asks, in the order of the parts.
    runs: Vec<OnceCell<Option<run::Ask>>>,
    /// The first bank's own least resistance, and that of its run, cold.
    source: OnceCell<Option<(Ohms, Ohms)>>,
    /// The cable of the bank and of the first inverter together.
    cable: OnceCell<Option<Ohms>>,
}

impl<'a> Survey<'a> {
    /// Of a site of which nothing was read yet.
    #[must_use]
    pub fn new(site: &'a Site) -> Self {
        Self {
            site,
            bank: OnceCell::new(),
            window: OnceCell::new(),
            runs: site.parts.iter().map(|_| OnceCell::new()).collect(),
            source: OnceCell::new(),
            cable: OnceCell::new(),
        }
    }

    /// As [`string_ask`].
    #[must_use]
    pub fn string(&self, array: &Part) -> string::Ask {
        let mut ask = string::Ask::read(&View::new(self.site, Subject::Part(array.id)));
        // The bank's absorb voltage at 25 °C: a warm bank with compensation is charged to less, never to more.
        if ask.controller.highest_charge == Entry::Blank {
            let charged_to = self.first_bank().and_then(|(ask, _)| Some(bank::window(ask)?.absorb));
            ask.controller.highest_charge = else_from(Entry::Blank, charged_to);
        }
        ask
    }

    /// As [`bank_ask`].
    #[must_use]
    pub fn bank(&self, part: &Part) -> bank::Ask {
        self.settled_bank(part).0
    }

    /// The same, and with the counts that follow where none were entered.
    fn settled_bank(&self, part: &Part) -> (bank::Ask, bank::Ask) {
        match self.site.first(PartKind::Bank) {
            Some(first) if first.id == part.id => self.first_bank().copied(),
            _ => None,
        }
        .unwrap_or_else(|| {
            let ask = read_bank(self.site, part);
            (ask, bank::settled(&ask))
        })
    }

    fn first_bank(&self) -> Option<&(bank::Ask, bank::Ask)> {
        let read = || {
            let ask = read_bank(self.site, self.site.first(PartKind::Bank)?);
            Some((ask, bank::settled(&ask)))
        };
        self.bank.get_or_init(read).as_ref()
    }

    /// What the first bank asks, with its counts.
    pub(super) fn settled(&self, part: &Part) -> bank::Ask {
        self.settled_bank(part).1
    }

    fn window(&self) -> Option<&bank::Window> {
        self.window.get_or_init(|| bank::window(&self.first_bank()?.1)).as_ref()
    }

    /// As [`run_ask`].
    #[must_use]
    pub fn run(&self, part: &Part) -> Option<run::Ask> {
        let at = self.site.parts.iter().position(|one| one.id == part.id)?;
        *self.runs[at].get_or_init(|| self.read_run(part))
    }

    /// As [`start_ask`].
    #[must_use]
    pub fn start(&self, part: &Part) -> start::Ask {
        let (site, bank) = (self.site, self.site.first(PartKind::Bank));
        let view = View::new(site, Subject::Part(part.id));
        let mut ask = match self.first_bank() {
            Some((bank, _)) => start::Ask::read_beside(&view, *bank),
            None => start::Ask::read(&view),
        };
        if bank.is_some() {
            let guarded = ask.bank.strings.typed().filter(|_| ask.bank.guards_itself() == Some(true));
            ask.packs = else_from(ask.packs, guarded);
            ask.bank_temperature = else_from(ask.bank_temperature, ask.bank.coldest.typed());
        }
        let inverter = site.first(PartKind::Inverter);
        ask.cut_off = else_from(ask.cut_off, ask.bank.inverter_low.typed());
        if ask.cable == Entry::Blank {
            ask.cable = self.cable().map_or(Entry::Blank, Entry::Typed);
        }
        if ask.breaker == Entry::Blank
            && let Some(run) = inverter.and_then(|part| part.run.as_ref())
        {
            ask.breaker = run.entry(Field::Breaker);
        }
        // Everything else that can be switched on runs already: the cautious end.
        if ask.already == Entry::Blank {
            let others = site.of_kind(PartKind::Load).filter(|other| other.id != part.id);
            let watts: f64 = others
                .filter_map(|other| {
                    let many = other.entries.entry::<Count>(Field::HowMany).typed().map_or(1.0, Count::get);
                    Some(other.entries.entry::<Watts>(Field::RunningPower).typed()?.get() * many)
                })
                .sum();
            ask.already = Entry::Typed(Watts::new(watts));
        }
        ask
    }

    /// The run of the bank and that of the first inverter, each there and back at its own temperature.
    fn cable(&self) -> Option<Ohms> {
        let warm = |part: &Part| Some(run::size(&self.run(part)?).ok()?.drop?.way);
        let both = || {
            let parts = [PartKind::Bank, PartKind::Inverter].map(|kind| self.site.first(kind));
            let ways: Vec<Ohms> = parts.into_iter().flatten().filter_map(warm).collect();
            (!ways.is_empty()).then(|| ways.into_iter().fold(Ohms::new(0.0), |all, way| all + way))
        };
        *self.cable.get_or_init(both)
    }
}

fn read_bank(site: &Site, part: &Part) -> bank::Ask {
    let view = View::new(site, Subject::Part(part.id));
    let mut ask = bank::Ask::read(&view);
    let output = |part: &Part| part.entries.entry::<Amps>(Field::OutputCurrent);
    ask.charge_current = match ask.charge_current {
        Entry::Blank => sum(site.of_kind(PartKind::Controller).map(output)),
        typed => typed,
    };
    // The highest that any controller's output can reach: the bus sees the worst of them.
    let limits =
        || site.of_kind(PartKind::Controller).map(|part| part.entries.entry::<Volts>(Field::ControllerOutputLimit));
    ask.controller_output_limit = greatest(limits());
    // The strictest of several inverters and panels counts.
    let inverters = |field| site.of_kind(PartKind::Inverter).map(move |part| part.entries.entry::<Volts>(field));
    ask.inverter_low = greatest(inverters(Field::InverterLow));
    ask.inverter_high = least(inverters(Field::InverterHigh));
    if ask.greatest_load == Entry::Blank {
        ask.greatest_load = inverters_at_full(site);
    }
    ask.without_inverter = site.first(PartKind::Inverter).is_none();
    let panels = |field| site.of_kind(PartKind::DcPanel).map(move |part| part.entries.entry::<Volts>(field));
    ask.loads_low = greatest(panels(Field::LoadsLow));
    ask.loads_high = least(panels(Field::LoadsHigh));
    ask
}

/// What all inverters draw at their full power: the cautious end of the greatest steady load. Blank where there is none, or
/// one does not tell.
fn inverters_at_full(site: &Site) -> Entry<Watts> {
    let mut all = None;
    for part in site.of_kind(PartKind::Inverter) {
        match part.entries.entry::<Watts>(Field::InverterContinuous) {
            Entry::Typed(watts) => {
                let drawn = watts / run::assumed::INVERTER_EFFICIENCY.share();
                all = Some(all.unwrap_or_default() + drawn);
            }
            other => return other,
        }
    }
    all.map_or(Entry::Blank, Entry::Typed)
}

/// The sum. Blank where one is blank, unread where one is unread.
fn sum(entries: impl Iterator<Item = Entry<Amps>>) -> Entry<Amps> {
    let mut total = None;
    for entry in entries {
        match entry {
            Entry::Typed(value) => total = Some(total.unwrap_or_default() + value),
            other => return other,
        }
    }
    total.map_or(Entry::Blank, Entry::Typed)
}

/// The greatest. Blank or unread where one is: what is not known may be greater.
fn greatest(entries: impl Iterator<Item = Entry<Volts>>) -> Entry<Volts> {
    extreme(entries, Volts::max)
}

/// The least. Blank or unread where one is.
fn least(entries: impl Iterator<Item = Entry<Volts>>) -> Entry<Volts> {
    extreme(entries, Volts::min)
}

fn extreme(entries: impl Iterator<Item = Entry<Volts>>, of: fn(Volts, Volts) -> Volts) -> Entry<Volts> {
    let mut found = None;
    for entry in entries {
        match entry {
            Entry::Typed(value) => found = Some(found.map_or(value, |before| of(before, value))),
            other => return other,
        }
    }
    found.map_or(Entry::Blank, Entry::Typed)
}

/// The kind of the run that leads from a part.
#[must_use]
pub const fn run_kind(part: &Part) -> Option<Kind> {
    Some(match part.kind {
        PartKind::Array => Kind::PvArray,
        PartKind::OtherSource | PartKind::Controller => Kind::ControllerOutput,
        PartKind::Bank => Kind::BankMain,
        PartKind::Inverter => Kind::InverterFeed,
        PartKind::DcPanel => Kind::DcFeeder,
        PartKind::DcCircuit => Kind::DcBranch,
        PartKind::AcPanel => Kind::AcOutput,
        PartKind::Generator => Kind::Generator,
        PartKind::Bus | PartKind::Load => return None,
    })
}

impl Survey<'_> {
    fn read_run(&self, part: &Part) -> Option<run::Ask> {
        let kind = run_kind(part)?;
        part.run.as_ref()?;
        let mut ask = run::Ask::read(&View::new(self.site, Subject::Run(part.id)));
        ask.kind = else_from(ask.kind, Some(kind));
        let told = ask.current != Entry::Blank || ask.power != Entry::Blank;
        if !told {
            match self.load(part) {
                Some(Carries::Amps(current)) => ask.current = current,
                Some(Carries::Watts(power)) => ask.power = power,
                None => {}
            }
        }
        if ask.voltage == Entry::Blank {
            ask.voltage = self.voltage(part);
        }
        if kind.on_bank() && ask.bank_resistance == Entry::Blank {
            ask.bank_resistance = self.source_of(part).map_or(Entry::Blank, Entry::Typed);
        }
        Some(ask)
    }

    /// What stands between the bank's cells and the breaker of the run that leads from `part`: the bank, the bank's own run,
    /// and a panel's feeder, cold. A run whose size nobody entered counts for nothing, as it may be thicker yet.
    fn source_of(&self, part: &Part) -> Option<Ohms> {
        let site = self.site;
        let bank = site.first(PartKind::Bank)?;
        let source = || Some((least_resistance(&self.settled(bank))?, cold_way(bank)));
        let (mut all, way) = (*self.source.get_or_init(source))?;
        if part.id != bank.id {
            all = all + way;
            let feeder = part.to.and_then(|to| site.part(to)).filter(|to| to.kind == PartKind::DcPanel);
            all = all + feeder.map_or(Ohms::new(0.0), cold_way);
        }
        Some(all)
    }

    fn load(&self, part: &Part) -> Option<Carries> {
        let own = |field| part.entries.entry::<Amps>(field);
        match part.kind {
            PartKind::Array => {
                let strings = match part.entries.entry::<Count>(Field::Strings) {
                    Entry::Blank => Entry::of(1.0),
                    entry => entry,
                };
                Some(Carries::Amps(times(own(Field::Isc), strings)))
            }
            PartKind::Controller => Some(Carries::Amps(own(Field::OutputCurrent))),
            PartKind::OtherSource => Some(Carries::Watts(part.entries.entry(Field::SourcePower))),
            PartKind::Bank => Some(Carries::Amps(self.bank_current())),
            PartKind::Inverter => Some(Carries::Watts(part.entries.entry(Field::InverterContinuous))),
            PartKind::AcPanel => {
                let inverter = part.to.and_then(|to| self.site.part(to)).filter(|to| to.kind == PartKind::Inverter)?;
                Some(Carries::Watts(inverter.entries.entry(Field::InverterContinuous)))
            }
            PartKind::DcPanel => Some(Carries::Amps(self.circuits(part))),
            PartKind::DcCircuit | PartKind::Generator | PartKind::Bus | PartKind::Load => None,
        }
    }

    /// All circuits of a panel together, where each of them tells its own.
    fn circuits(&self, panel: &Part) -> Entry<Amps> {
        sum(self
            .site
            .joined_to(panel.id)
            .filter(|part| part.kind == PartKind::DcCircuit)
            .map(|circuit| self.drawn(circuit)))
    }

    /// Current of the run that leads from `part`, of direct current.
    fn drawn(&self, part: &Part) -> Entry<Amps> {
        let Some(ask) = self.run(part) else { return Entry::Blank };
        run::working_current(&ask).map_or(Entry::Blank, Entry::Typed)
    }

    /// The greatest that flows for long, either way: all that charges, or all that draws.
    fn bank_current(&self) -> Entry<Amps> {
        let charging =
            sum(self.site.of_kind(PartKind::Controller).map(|part| part.entries.entry(Field::OutputCurrent)));
        let draws = sum(self
            .site
            .parts
            .iter()
            .filter(|part| matches!(part.kind, PartKind::Inverter | PartKind::DcPanel))
            .map(|part| self.drawn(part)));
        match (charging, draws) {
            (Entry::Typed(charging), Entry::Typed(draws)) => Entry::Typed(charging.max(draws)),
            // Loads whose sum is not known may be the greater.
            _ => Entry::Blank,
        }
    }

    /// Nominal voltage of the run that leads from `part`.
    fn voltage(&self, part: &Part) -> Entry<Volts> {
        match part.kind {
            PartKind::Array => {
                let (vmp, series) =
                    (part.entries.entry::<Volts>(Field::Vmp), part.entries.entry::<Count>(Field::Series));
                match (vmp, series) {
                    (Entry::Typed(vmp), Entry::Typed(series)) => Entry::Typed(vmp * series.get()),
                    (Entry::Unread, _) | (_, Entry::Unread) => Entry::Unread,
                    _ => Entry::Blank,
                }
            }
            PartKind::AcPanel | PartKind::Generator => {
                let inverter = part
                    .to
                    .and_then(|to| self.site.part(to))
                    .filter(|to| to.kind == PartKind::Inverter)
                    .or_else(|| self.site.first(PartKind::Inverter));
                inverter.map_or(Entry::Blank, |inverter| inverter.entries.entry(Field::AcVolts))
            }
            _ => self.bus_voltage(),
        }
    }

    /// Nominal voltage of the bank, else the one entered for the bus.
    fn bus_voltage(&self) -> Entry<Volts> {
        match (self.window(), self.first_bank()) {
            (Some(window), _) => Entry::Typed(window.nominal),
            (None, Some((ask, _))) => ask.bus_voltage,
            (None, None) => Entry::Blank,
        }
    }
}

/// Resistance of a run there and back at 20 °C, by its size and length alone.
fn cold_way(part: &Part) -> Ohms {
    let Some(run) = &part.run else { return Ohms::new(0.0) };
    let (size, length) = (run.entry(Field::ConductorSize).typed(), run.entry::<Metres>(Field::RunLength).typed());
    let (Some(size), Some(length)) = (size, length) else { return Ohms::new(0.0) };
    let size = Size::of_area(size);
    let conductor = run.choice::<Conductor>(Field::Conductor).typed().unwrap_or_default();
    let several = run.entry::<Count>(Field::ConductorsInParallel).typed().map_or(1.0, Count::get).max(1.0);
    resistance(conductor, size, Celsius::new(20.0)) / several * (length * 2.0)
}

/// What a run carries, where other parts tell.
enum Carries {
    Amps(Entry<Amps>),
    Watts(Entry<Watts>),
}

fn times(current: Entry<Amps>, count: Entry<Count>) -> Entry<Amps> {
    match (current, count) {
        (Entry::Typed(current), Entry::Typed(count)) => Entry::Typed(current * count.get()),
        (Entry::Unread, _) | (_, Entry::Unread) => Entry::Unread,
        _ => Entry::Blank,
    }
}

/// Resistance of the whole bank, new, warm and full, by its chemistry, its capacity and its counts as they are settled.
///
/// R = n · R_cell / p, the least of its chemistry's span.
///
/// # Source
///
/// [`crate::chemistry`], each figure with its own.
pub(super) fn least_resistance(ask: &bank::Ask) -> Option<Ohms> {
    let figures = ask.chemistry.typed()?.figures();
    let capacity = ask.cell_capacity.typed()?;
    let strings = ask.strings.typed().map_or(1.0, Count::get);
    let cells = bank::window(ask)?.nominal / figures.nominal;
    (capacity.get() > 0.0 && strings > 0.0).then(|| figures.resistance(capacity).least * (cells / strings))
}
