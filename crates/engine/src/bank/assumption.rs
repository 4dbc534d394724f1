//! What stands in for an input of a bank that was not entered, with its reason.

use super::{Ask, settled, window};
use crate::assumed;
use crate::check::{Assumption, Basis};
use crate::chemistry::{Figure, RATED_AT};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Percent, Quantity};
use crate::source::{self, Clause};

fn figure<Q: Quantity>(figure: Figure<Q>) -> Assumption {
    Assumption { amount: Some(figure.chosen.amount()), choice: None, why: figure.why, source: figure.source }
}

fn chosen(choice: Option<&'static str>, why: &'static str) -> Assumption {
    Assumption { amount: None, choice, why, source: CHOSEN }
}

const CHOSEN: Clause = source::CHOSEN.at("");

/// What stands in for `field` in this bank. Many depend on the chemistry. `None` where nothing can stand in, or where the
/// inputs that it depends on are missing.
#[must_use]
pub fn assumption(ask: &Ask, field: Field) -> Option<Assumption> {
    let basis = &mut Basis::default();
    let figures = || ask.chemistry(&mut Basis::default()).map(|(_, figures)| figures);
    Some(match field {
        Field::ColdestInTheRoom => Assumption {
            amount: Some(RATED_AT.amount()),
            choice: None,
            why: "as rated: neither compensation nor cold is counted until the room's coldest is entered",
            source: CHOSEN,
        },
        Field::CellEnd => figure(figures()?.end),
        Field::CellAbsorb => figure(figures()?.absorb),
        Field::CellFloat => figure(figures()?.float?),
        Field::CellEqualise => {
            figure(figures()?.equalise.filter(|_| figures().is_some_and(|one| one.equalise_is_usual))?)
        }
        Field::CellCompensation => figure(figures()?.compensation?),
        Field::DepthUsed => figure(figures()?.depth_used),
        Field::LowestCharge => Assumption {
            amount: Some(ask.lowest_charge(figures()?, basis)?.amount()),
            choice: None,
            why: "what the depth used leaves; a dull fortnight may take more",
            source: CHOSEN,
        },
        Field::InverterLow | Field::InverterHigh => Assumption {
            amount: Some(super::devices::usual_for(ask, field)?.amount()),
            choice: None,
            why: "usual for the class of the bus: read the nameplate",
            source: source::COMMON_PRACTICE.at("10.5 to 16 V for each 12 V of the bus"),
        },
        Field::CellsInABlock => Assumption {
            amount: Some(ask.block_cells(basis)?.amount()),
            choice: None,
            why: "by the block's voltage, which is the name of a class: confirm on its nameplate",
            source: CHOSEN,
        },
        Field::CellsInSeries | Field::StringsOfCells => {
            let counted = settled(ask);
            let series = counted.series.typed()?;
            let strings = counted.strings(basis)?;
            Assumption {
                amount: Some(if field == Field::CellsInSeries { series } else { strings }.amount()),
                choice: None,
                why: if ask.series == Entry::Blank {
                    "of the best layout of the cells at hand"
                } else {
                    "as many as the cells at hand make, or one"
                },
                source: CHOSEN,
            }
        }
        Field::GreatestLoad => chosen(None, "no faster than the capacity is rated for"),
        Field::PostsCovered => chosen(Some("no"), "bare posts within reach"),
        Field::WetRoom => chosen(Some("no"), "dry"),
        Field::SleepingRoom => chosen(Some("no"), "nobody sleeps there: confirm"),
        Field::ChargeCurrent => {
            let capacity = super::rates::bank_capacity(&settled(ask), basis, &mut crate::check::Steps::silent())?;
            Assumption {
                amount: Some((capacity / figures()?.greatest_charge.chosen).amount()),
                choice: None,
                why: "the greatest that the cells take",
                source: figures()?.greatest_charge.source,
            }
        }
        Field::UsedADay => {
            let full = super::energy(&settled(ask))?;
            let depth: Percent = full.depth;
            let volts = window(&settled(ask))?.nominal;
            Assumption {
                amount: Some((volts * full.capacity * depth.share()).amount()),
                choice: None,
                why: "the whole depth used, every day: the thirsty end",
                source: CHOSEN,
            }
        }
        Field::TakeOff => {
            chosen(Some("same-end"), "both leads at one end, as most banks are first wired: the worst of the three")
        }
        Field::TieResistance => Assumption {
            amount: Some(super::parallel::TIE.amount()),
            choice: None,
            why: "half a metre of 1/0 AWG and two lugs",
            source: CHOSEN,
        },
        field => return assumed::of(field),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chemistry::Chemistry;
    use crate::entry::Entry;

    /// Whatever a check or a result names as assumed can be shown with its reason.
    #[test]
    fn everything_assumed_has_its_reason() {
        for chemistry in Chemistry::ALL {
            let ask = Ask {
                chemistry: Entry::Typed(*chemistry),
                cell_voltage: Entry::of(12.0),
                cell_capacity: Entry::of(200.0),
                count: Entry::of(4.0),
                bus_voltage: Entry::of(24.0),
                ..Ask::default()
            };
            let ask = if *chemistry == Chemistry::Nmc {
                Ask { cell_voltage: Entry::of(3.65), count: Entry::of(7.0), ..ask }
            } else {
                ask
            };
            let mut fields: Vec<Field> = super::super::assess(&ask).iter().flat_map(|one| one.assumed.iter()).collect();
            fields.extend(super::super::air_and_water(&ask).iter().flat_map(|one| one.assumed.iter()));
            fields.extend(super::super::settings(&ask).iter().flat_map(|one| one.assumed.iter()));
            assert!(fields.contains(&Field::CellAbsorb), "{chemistry:?}");
            for field in fields {
                let stands = assumption(&ask, field);
                assert!(stands.is_some_and(|stands| !stands.why.is_empty()), "{chemistry:?} {field:?}");
            }
        }
    }
}
