//! A conductor where it lies: table, corrections, terminals.

use super::correction::{self, Arrangement};
use super::{Insulation, Method, Terminals, iec, north_america, pv_cable};
use crate::conductor::{AMERICAN, Conductor, METRIC, Metal, Size};
use crate::family::CodeFamily;
use crate::quantity::{Amps, Celsius};

/// Where and how a conductor lies.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Laid {
    /// Whose tables hold.
    pub family: CodeFamily,
    /// What it is made of.
    pub conductor: Conductor,
    /// What it is insulated with.
    pub insulation: Insulation,
    /// How it is laid.
    pub method: Method,
    /// The air round it.
    pub ambient: Celsius,
    /// Conductors that carry current together in one conduit or bundle.
    pub together: f64,
}

/// Ampacity of `size` in the table of its family, before any correction.
///
/// A size of the other trade takes the next thinner row. `None` where the table has no such row.
///
/// # Source
///
/// [`north_america::TABLE_310_16`], [`north_america::TABLE_310_17`], [`iec`], [`pv_cable::EN_50618`].
#[must_use]
pub fn tabled(laid: &Laid, insulation: Insulation, size: Size) -> Option<Amps> {
    let metal = laid.conductor.metal();
    let number = match laid.family {
        CodeFamily::NorthAmerica => north_america::tabled(laid.method, metal, insulation, size),
        CodeFamily::Iec => match (insulation, metal) {
            (Insulation::PvCable, Metal::Copper) => pv_cable::tabled(laid.method, size),
            _ => iec::tabled(laid.method, metal, insulation, size),
        },
    }?;
    Some(Amps::new(number))
}

/// Factor for the air round a conductor. `None` where it is so hot that the insulation leaves no room.
///
/// # Source
///
/// [`correction`]; [`pv_cable::ambient`].
#[must_use]
pub fn ambient_factor(laid: &Laid, insulation: Insulation) -> Option<f64> {
    match laid.family {
        CodeFamily::NorthAmerica => correction::north_american_ambient(insulation, laid.ambient),
        CodeFamily::Iec if insulation == Insulation::PvCable && pv_cable::tables(laid) => {
            pv_cable::ambient(laid.ambient)
        }
        CodeFamily::Iec => correction::iec_ambient(insulation, laid.ambient),
    }
}

/// Factor for other conductors that lie with it and carry current too.
///
/// North America counts conductors, IEC circuits of two conductors.
///
/// # Source
///
/// [`correction`].
#[must_use]
pub fn together_factor(laid: &Laid) -> f64 {
    match laid.family {
        CodeFamily::NorthAmerica => correction::north_american_together(laid.together),
        CodeFamily::Iec => {
            let arrangement = match laid.method {
                Method::Conduit => Arrangement::Bunched,
                Method::Surface => Arrangement::OnWall,
                Method::CableInAir | Method::SinglesInAir => Arrangement::PerforatedTray,
            };
            correction::iec_grouping(arrangement, (laid.together / 2.0).ceil())
        }
    }
}

/// Ampacity of `size` where it lies: table × ambient × together. Zero where the air leaves no room.
///
/// `None` where the table has no such row.
#[must_use]
pub fn corrected(laid: &Laid, size: Size) -> Option<Amps> {
    let factor = ambient_factor(laid, laid.insulation).unwrap_or(0.0) * together_factor(laid);
    Some(tabled(laid, laid.insulation, size)? * factor)
}

/// The current that warms `size` to what its insulation bears, where it lies.
///
/// It is [`corrected`] where the table has a row. A size thinner than the table is taken from its thinnest row in
/// proportion to the area. *Chosen*: an ampacity falls slower than the area, so the conductor is never taken for cooler
/// than it is.
#[must_use]
pub fn warms(laid: &Laid, size: Size) -> Amps {
    let ladder = if laid.family == CodeFamily::NorthAmerica { &AMERICAN[..] } else { &METRIC[..] };
    let thicker = || {
        let row =
            *ladder.iter().find(|row| row.area() > size.area() && tabled(laid, laid.insulation, **row).is_some())?;
        Some(corrected(laid, row)? * (size.area() / row.area()))
    };
    corrected(laid, size).or_else(thicker).unwrap_or_default()
}

/// The current at which `size` keeps to what `terminals` bear. `None` where the table has no such row.
///
/// North America: the column of the terminals in Table 310.16, uncorrected, whatever the method (110.14(C)).
/// IEC, *chosen*: the column of the terminals' temperature, corrected for the air but not for conductors together,
/// as the terminals stand apart from the bundle.
///
/// # Source
///
/// [`crate::source::NEC`], 110.14(C); [`crate::source::IEC_60364_5_52`], 523.1.
#[must_use]
pub fn at_terminals(laid: &Laid, size: Size, terminals: Terminals) -> Option<Amps> {
    let column = column(terminals, laid.insulation, laid.family);
    match laid.family {
        CodeFamily::NorthAmerica => tabled(&Laid { method: Method::Conduit, ..*laid }, column, size),
        CodeFamily::Iec => Some(tabled(laid, column, size)? * ambient_factor(laid, column).unwrap_or(0.0)),
    }
}

/// The insulation whose column keeps the conductor from passing what the terminals bear.
fn column(terminals: Terminals, insulation: Insulation, family: CodeFamily) -> Insulation {
    if terminals.bear() >= insulation.bears(family) {
        return insulation;
    }
    match (family, terminals) {
        (CodeFamily::NorthAmerica, Terminals::At60 | Terminals::At70) | (CodeFamily::Iec, Terminals::At60) => {
            Insulation::Bears60
        }
        (CodeFamily::Iec, Terminals::At70 | Terminals::At75) => Insulation::Pvc70,
        (CodeFamily::NorthAmerica, Terminals::At75) => Insulation::Bears75,
        (_, Terminals::At90) => Insulation::Bears90,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn laid(family: CodeFamily, insulation: Insulation) -> Laid {
        Laid {
            family,
            conductor: Conductor::CopperStranded,
            insulation,
            method: Method::Conduit,
            ambient: Celsius::new(45.0),
            together: 2.0,
        }
    }

    #[test]
    fn the_insulation_column_is_corrected_and_the_terminal_column_is_not() {
        let laid = laid(CodeFamily::NorthAmerica, Insulation::Bears90);
        let eight = Size::Gauge(8);
        assert!((corrected(&laid, eight).unwrap().get() - 55.0 * 0.87).abs() < 1e-9);
        assert_eq!(at_terminals(&laid, eight, Terminals::At75), Some(Amps::new(50.0)));
        assert_eq!(at_terminals(&laid, eight, Terminals::At60), Some(Amps::new(40.0)));
    }

    #[test]
    fn a_size_of_the_other_trade_takes_the_row_below() {
        let laid = laid(CodeFamily::NorthAmerica, Insulation::Bears75);
        // 10 mm² lies between 8 and 6 AWG.
        assert_eq!(tabled(&laid, laid.insulation, Size::Metric(1000)), Some(Amps::new(50.0)));
    }

    #[test]
    fn a_size_thinner_than_the_table_is_warmed_by_its_share_of_the_thinnest_row() {
        let laid = laid(CodeFamily::NorthAmerica, Insulation::PvCable);
        let (thin, thick) = (Size::Gauge(16), Size::Gauge(14));
        assert_eq!(corrected(&laid, thin), None);
        let share = warms(&laid, thin) / warms(&laid, thick);
        assert!((share - thin.area() / thick.area()).abs() < 1e-9, "{share}");
        assert_eq!(warms(&laid, thick), corrected(&laid, thick).unwrap());
    }

    #[test]
    fn no_terminal_lets_a_conductor_carry_more_than_its_insulation() {
        for family in CodeFamily::ALL {
            for insulation in Insulation::ALL {
                for terminals in Terminals::ALL {
                    let column = column(*terminals, *insulation, family);
                    assert!(column.bears(family) <= insulation.bears(family));
                    assert!(column.bears(family) <= terminals.bear() || *terminals == Terminals::At70);
                }
            }
        }
    }
}
