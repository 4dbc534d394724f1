//! What was read after a link, against what must be read.

use super::{CellVolts, Meter, Step};
use crate::quantity::Volts;

/// What a reading says.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Says {
    /// As it must be.
    AsItMust,
    /// As it must be, but where so many cells may read so differently that one more or less would not show.
    Wide,
    /// The meter's leads stand the other way round.
    LeadsSwapped,
    /// Two cells' volts are missing: a cell stands turned round.
    TurnedRound,
    /// One cell's volts are missing: the link sits on the wrong post, or a cell is left out.
    OneMissing,
    /// One cell's volts too many.
    OneTooMany,
    /// Nothing: no contact, or an open cell.
    NoContact,
    /// Outside, and like none of these.
    Odd,
}

impl Says {
    /// Whether the work stops here.
    #[must_use]
    pub const fn stops(self) -> bool {
        !matches!(self, Self::AsItMust | Self::Wide)
    }

    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::AsItMust => "As it must be. Go on.",
            Self::Wide => {
                "Within the band, but the band is wider than one cell. Read after every link, or enter what each cell \
                 reads now."
            }
            Self::LeadsSwapped => {
                "Below zero: the meter’s leads are swapped, or the whole part stands the other way round."
            }
            Self::TurnedRound => {
                "Two cells’ volts are missing: a cell of this part is turned round. Stop, and turn it."
            }
            Self::OneMissing => {
                "One cell’s volts are missing: a link sits on the wrong post, or passes a cell by. Stop."
            }
            Self::OneTooMany => "One cell’s volts too many: the link sits one cell further. Stop.",
            Self::NoContact => {
                "Nothing: no contact under a lug, an open cell, the leads on the wrong posts, or two equal parts one \
                 against the other. Stop."
            }
            Self::Odd => "Outside the band: read each cell of this part by itself before you go on.",
        }
    }
}

/// What `read` says where `meter` must be read, of cells that read `cell`.
///
/// Each fault's own reading is the expected one less two cells, less one, one more, none, or with its sign changed; the
/// nearest within half a cell is named.
#[must_use]
pub fn says(meter: &Meter, cell: CellVolts, read: Volts) -> Says {
    if (meter.lowest..=meter.highest).contains(&read) {
        return Says::AsItMust;
    }
    fault(meter.expected, cell.expected(), read).unwrap_or(if (-meter.highest..=-meter.lowest).contains(&read) {
        Says::LeadsSwapped
    } else {
        Says::Odd
    })
}

/// The fault whose own reading is within half a cell, where `expected` should be read of cells of `one` each.
fn fault(expected: Volts, one: Volts, read: Volts) -> Option<Says> {
    let near = |volts: Volts| (read - volts).abs() < one / 2.0;
    if near(Volts::new(0.0)) {
        return Some(Says::NoContact);
    }
    if near(expected - one * 2.0) {
        return Some(Says::TurnedRound);
    }
    if near(expected - one) {
        return Some(Says::OneMissing);
    }
    near(expected + one).then_some(Says::OneTooMany)
}

/// What the reading after step `place` says, beside `readings`, those after all steps.
///
/// Where cells may stand at any charge, the band of many is wider than one cell, and a missing one would pass. What was
/// read of the parts that the link joins tells nearer: the new reading must be what they come to, within half a cell.
///
/// `None` where nothing was read.
#[must_use]
pub fn judged(steps: &[Step], place: usize, readings: &[Option<Volts>], cell: CellVolts) -> Option<Says> {
    let step = steps.get(place)?;
    let read = readings.get(place).copied().flatten()?;
    let said = says(&step.now, cell, read);
    let sound = |(step, read): (&Step, &Option<Volts>)| {
        read.filter(|read| says(&step.now, cell, *read) == Says::AsItMust).map(|read| (step.now, read))
    };
    let earlier = || steps.iter().zip(readings).take(place).filter_map(sound);
    let same = |part: &Meter| earlier().find(|(meter, _)| (meter.black, meter.red) == (part.black, part.red));
    let parts: Vec<(Meter, Volts)> = match &step.before[..] {
        [one, other] => [one, other].into_iter().filter_map(same).collect(),
        _ => earlier().rfind(|(meter, _)| meter.black == step.now.black).into_iter().collect(),
    };
    let [as_read, as_expected] = parts
        .iter()
        .fold([Volts::new(0.0); 2], |[read, expected], (meter, volts)| [read + *volts, expected + meter.expected]);
    if parts.is_empty() {
        let wide = step.now.highest - step.now.lowest >= cell.lowest();
        return Some(if wide && said == Says::AsItMust { Says::Wide } else { said });
    }
    let share = as_read / as_expected;
    Some(fault(step.now.expected * share, cell.expected() * share, read).unwrap_or(said))
}

#[cfg(test)]
mod tests {
    use super::super::{Cell, Lug, Parallel, Pole, Posts, Shelf, Stand, Wiring, Wish, lay_out, steps};
    use super::*;
    use crate::quantity::Metres;

    /// Twenty-four cells of lead at any charge: 1.96 V to 2.13 V each.
    fn long_string() -> (Vec<Step>, CellVolts) {
        let mm = |mm: f64| Metres::new(mm / 1000.0);
        let cell = Cell::new(mm(200.0), mm(100.0), Posts::Ends, mm(30.0)).unwrap();
        let shelf = Shelf::new(2, 12, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap();
        let wiring = Wiring::new(24, 1, Parallel::SeparateStrings).unwrap();
        let volts = CellVolts::new(Volts::new(1.96), Volts::new(2.05), Volts::new(2.13)).unwrap();
        (steps(&lay_out(&shelf, &wiring, volts, Wish::default()).unwrap()), volts)
    }

    /// The readings of a sound bank whose every cell reads `each`.
    fn read(steps: &[Step], each: f64, cell: CellVolts) -> Vec<Option<Volts>> {
        steps.iter().map(|step| Some(Volts::new(each) * (step.now.expected / cell.expected()))).collect()
    }

    #[test]
    fn a_missing_cell_shows_beside_what_was_read_before_though_the_band_is_wide() {
        let (steps, cell) = long_string();
        let last = steps.len() - 1;
        for each in [1.97, 2.05, 2.12] {
            let sound = read(&steps, each, cell);
            for place in 0..steps.len() {
                assert_eq!(judged(&steps, place, &sound, cell), Some(Says::AsItMust), "{place} at {each}");
            }
            for (off, says) in [(-1.0, Says::OneMissing), (-2.0, Says::TurnedRound), (1.0, Says::OneTooMany)] {
                for place in [3, 9, last] {
                    let mut readings = sound.clone();
                    readings[place] = readings[place].map(|volts| volts + Volts::new(each * off));
                    assert_eq!(judged(&steps, place, &readings, cell), Some(says), "{place} at {each}, {off} cells");
                }
            }
        }
        // By the band alone it would have passed; so where nothing else was read, that is said.
        let short = steps[last].now.expected - cell.expected();
        assert_eq!(says(&steps[last].now, cell, short), Says::AsItMust);
        let mut alone = vec![None; steps.len()];
        alone[last] = Some(short);
        assert_eq!(judged(&steps, last, &alone, cell), Some(Says::Wide));
        assert!(!Says::Wide.stops() && Says::OneMissing.stops() && !Says::AsItMust.stops());
    }

    #[test]
    fn nothing_read_says_nothing_and_a_wrong_reading_before_counts_for_nothing() {
        let (steps, cell) = long_string();
        let mut readings = read(&steps, 2.05, cell);
        readings[4] = None;
        assert_eq!(judged(&steps, 4, &readings, cell), None);
        readings[5] = Some(Volts::new(0.1));
        assert_eq!(judged(&steps, 6, &readings, cell), Some(Says::AsItMust));
        assert_eq!(judged(&steps, 99, &readings, cell), None);
    }

    #[test]
    fn each_fault_is_told_by_its_volts() {
        let lug = |pole| Lug { cell: 1, pole };
        let cell = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.4)).unwrap();
        let meter = Meter {
            black: lug(Pole::Minus),
            red: lug(Pole::Plus),
            lowest: cell.lowest() * 5.0,
            expected: cell.expected() * 5.0,
            highest: cell.highest() * 5.0,
        };
        let told = |volts: f64| says(&meter, cell, Volts::new(volts));
        // Five cells of 3.3 V are 16.5 V; one turned round takes two cells away: 9.9 V.
        assert_eq!(told(16.5), Says::AsItMust);
        assert_eq!(told(9.9), Says::TurnedRound);
        assert_eq!(told(13.2), Says::OneMissing);
        assert_eq!(told(19.8), Says::OneTooMany);
        assert_eq!(told(0.0), Says::NoContact);
        assert_eq!(told(-16.5), Says::LeadsSwapped);
        assert_eq!(told(6.0), Says::Odd);
    }
}
