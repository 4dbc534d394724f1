//! run-ampacity: whether the conductor carries the run's current.

use super::{Candidate, Load, worse};
use crate::ampacity::{Laid, Terminals, ambient_factor, at_terminals, tabled, together_factor};
use crate::check::{Limit, Origin, Outcome, Steps};
use crate::family::CodeFamily;
use crate::quantity::{Amps, Count, Quantity};
use crate::show;
use crate::source;

/// What a conductor carries.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Ampacity {
    /// Where it lies, all corrections taken off.
    pub corrected: Amps,
    /// What its terminals let it carry.
    pub at_terminals: Amps,
}

impl Ampacity {
    /// What it may carry in all: the lesser.
    #[must_use]
    pub fn permitted(self) -> Amps {
        self.corrected.min(self.at_terminals)
    }
}

/// What `candidate` carries. `None` where the family's table has no such conductor.
pub(super) fn ampacity(candidate: Candidate, laid: &Laid, terminals: Terminals, steps: &mut Steps) -> Option<Ampacity> {
    let several = f64::from(candidate.parallel);
    let table = tabled(laid, laid.insulation, candidate.size)? * several;
    let table = steps.step("Ampacity by the table", table, || {
        let bears = laid.insulation.bears(laid.family);
        let put_in = format!("{candidate}, {} column", show::given(bears.amount()));
        let clause = match laid.family {
            CodeFamily::NorthAmerica => source::NEC.at("Table 310.16; in free air 310.17"),
            CodeFamily::Iec => source::IEC_60364_5_52.at("Tables B.52.2 to B.52.13"),
        };
        ("", put_in, Origin::Published(clause))
    });
    let air = Count::new(ambient_factor(laid, laid.insulation).unwrap_or(0.0));
    let air = steps.step("Factor for the air round it", air, || {
        let clause = match laid.family {
            CodeFamily::NorthAmerica => source::NEC.at("Table 310.15(B)(1)(1)"),
            CodeFamily::Iec => source::IEC_60364_5_52.at("Table B.52.14"),
        };
        ("", format!("at {}", show::given(laid.ambient.amount())), Origin::Published(clause))
    });
    let together = steps.step("Factor for conductors together", Count::new(together_factor(laid)), || {
        let clause = match laid.family {
            CodeFamily::NorthAmerica => source::NEC.at("Table 310.15(C)(1)"),
            CodeFamily::Iec => source::IEC_60364_5_52.at("Table B.52.17"),
        };
        ("", format!("{} conductors", show::number(laid.together, 0)), Origin::Published(clause))
    });
    let where_it_lies = steps.step("Ampacity where it lies", table * (air.get() * together.get()), || {
        let put_in = format!(
            "{} × {} × {}",
            show::given(table.amount()),
            show::number(air.get(), 2),
            show::number(together.get(), 2)
        );
        ("table × air × together", put_in, Origin::Before)
    });
    let at_terminals =
        steps.step("Ampacity at its terminals", at_terminals(laid, candidate.size, terminals)? * several, || {
            let clause = match laid.family {
                CodeFamily::NorthAmerica => source::NEC.at("110.14(C)"),
                CodeFamily::Iec => source::IEC_60364_5_52.at("523.1"),
            };
            ("", format!("terminals of {}", show::given(terminals.bear().amount())), Origin::Published(clause))
        });
    Some(Ampacity { corrected: where_it_lies, at_terminals })
}

/// Sets what the conductor carries against what the run asks.
///
/// North America: the table at the terminals ≥ the continuous rule, and where it lies ≥ the load; the worse counts.
/// IEC: the lesser of both ≥ the load.
pub(super) fn carry(load: &Load, family: CodeFamily, ampacity: Option<Ampacity>, steps: &mut Steps) -> Outcome {
    let Some(ampacity) = ampacity else {
        let limit = Limit::at_least(load.carried);
        return Outcome::Impossible { value: Amps::new(0.0).amount(), limit };
    };
    let carried = asked("It must carry where it lies", load, load.carried, load.rule.carried, steps);
    match family {
        CodeFamily::Iec => Outcome::Held { value: ampacity.permitted().amount(), limit: Limit::at_least(carried) },
        CodeFamily::NorthAmerica => {
            let continuous =
                asked("It must carry at its terminals", load, load.continuous, load.rule.continuous, steps);
            worse(
                Outcome::Held { value: ampacity.at_terminals.amount(), limit: Limit::at_least(continuous) },
                Outcome::Held { value: ampacity.corrected.amount(), limit: Limit::at_least(carried) },
            )
        }
    }
}

/// A factor on the working current, worded.
pub(super) fn asked(what: &'static str, load: &Load, current: Amps, factor: f64, steps: &mut Steps) -> Amps {
    steps.step(what, current, || {
        let put_in = format!("{} × {}", show::number(factor, 4), show::step(load.working.amount()));
        ("factor · I", put_in, Origin::Published(load.rule.clause))
    })
}
