//! Every check of a site.

use super::Site;
use super::derive::Survey;
use super::part::{Part, PartId, PartKind};
use super::rules::Requirement;
use crate::bank;
use crate::check::{Check, Step, Verdict};
use crate::entry::Entry;
use crate::order::sort_short;
use crate::run;
use crate::start;
use crate::string;

/// Where on the line a check belongs.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Place {
    /// The site as a whole.
    Site,
    /// A part.
    Part(PartId),
    /// The run that leads from a part.
    Run(PartId),
}

/// A requirement of any of the tools, or of the site.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum CheckId {
    /// Of strings on a controller.
    String(string::Requirement),
    /// Of a bank.
    Bank(bank::Requirement),
    /// Of a run.
    Run(run::Requirement),
    /// Of a start.
    Start(start::Requirement),
    /// Of the site.
    Site(Requirement),
}

impl CheckId {
    /// The id, as in the documents of the engine.
    #[must_use]
    pub const fn id(self) -> &'static str {
        match self {
            Self::String(one) => one.id(),
            Self::Bank(one) => one.id(),
            Self::Run(one) => one.id(),
            Self::Start(one) => one.id(),
            Self::Site(one) => one.id(),
        }
    }

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::String(one) => one.name(),
            Self::Bank(one) => one.name(),
            Self::Run(one) => one.name(),
            Self::Start(one) => one.name(),
            Self::Site(one) => one.name(),
        }
    }
}

/// A check, and where it belongs.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SiteCheck {
    /// Where on the line.
    pub place: Place,
    /// The judged requirement.
    pub check: Check<CheckId>,
}

/// Every check of a site, worst first: hazard before loss, then what asks, what is close, what clears.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Assessment {
    /// The checks.
    pub checks: Vec<SiteCheck>,
}

impl Assessment {
    /// The worst check at `place`.
    #[must_use]
    pub fn worst_at(&self, place: Place) -> Option<&SiteCheck> {
        self.checks.iter().find(|one| one.place == place)
    }

    /// The worst of all; none on a site with no part.
    #[must_use]
    pub fn worst(&self) -> Option<&SiteCheck> {
        self.checks.first()
    }

    /// How many checks have `verdict`.
    #[must_use]
    pub fn count(&self, verdict: Verdict) -> usize {
        self.checks.iter().filter(|one| one.check.verdict == verdict).count()
    }
}

/// Judges every requirement that arises anywhere on the site.
#[must_use]
pub fn assess(site: &Site) -> Assessment {
    let survey = Survey::new(site);
    let mut checks = Vec::new();
    let mut put = |place, check: Option<Check<CheckId>>| {
        checks.extend(check.map(|check| SiteCheck { place, check }));
    };
    for requirement in Requirement::ALL {
        put(Place::Site, requirement.check(site, None).map(|check| check.named(CheckId::Site(requirement))));
    }
    for part in &site.parts {
        let place = Place::Part(part.id);
        match part.kind {
            PartKind::Array => {
                let ask = survey.string(part);
                for one in string::Requirement::ALL {
                    put(place, one.check(&ask).map(|check| check.named(CheckId::String(one))));
                }
            }
            PartKind::Bank => {
                let ask = survey.settled(part);
                for one in bank::Requirement::ALL.into_iter().filter(|one| bank_arises(site, &ask, *one)) {
                    put(place, one.check(&ask).map(|check| check.named(CheckId::Bank(one))));
                }
            }
            // A load of direct current has no inverter to start it.
            PartKind::Load if site.first(PartKind::Inverter).is_some() => {
                let ask = survey.start(part);
                for one in start::Requirement::ALL {
                    put(place, one.check(&ask).map(|check| check.named(CheckId::Start(one))));
                }
            }
            _ => {}
        }
        for requirement in Requirement::ALL {
            put(place, requirement.check(site, Some(part)).map(|check| check.named(CheckId::Site(requirement))));
        }
        if let Some(ask) = survey.run(part) {
            for check in run::assess(&ask) {
                put(Place::Run(part.id), Some(check.named(CheckId::Run(check.id))));
            }
        }
    }
    // By their places, as a check is large.
    let mut order: Vec<usize> = (0..checks.len()).collect();
    sort_short(&mut order, |a, b| checks[*a].check.order(&checks[*b].check));
    Assessment { checks: order.into_iter().map(|at| checks[at]).collect() }
}

/// Whether a requirement of the bank arises on this site: a room with no inverter has no inverter's window.
fn bank_arises(site: &Site, ask: &bank::Ask, requirement: bank::Requirement) -> bool {
    use bank::Requirement as R;
    let has = |kind| site.first(kind).is_some();
    match requirement {
        R::WindowHigh | R::WindowHighAbsorb => has(PartKind::Inverter),
        R::WindowLow => has(PartKind::Inverter) || ask.loads_low != Entry::Blank,
        R::WindowHighLoads => has(PartKind::DcPanel) || has(PartKind::DcCircuit),
        R::Orphan => has(PartKind::Controller),
        _ => true,
    }
}

/// The steps of one check, made by the same code as its value. Empty where the check does not arise there.
#[must_use]
pub fn working(site: &Site, place: Place, id: CheckId) -> Vec<Step> {
    let survey = Survey::new(site);
    let part = |id: PartId| site.part(id);
    let found: Option<Vec<Step>> = (|| {
        Some(match (place, id) {
            (Place::Part(at), CheckId::String(one)) => string::working(&survey.string(part(at)?), one),
            (Place::Part(at), CheckId::Bank(one)) => bank::working(&survey.bank(part(at)?), one),
            (Place::Part(at), CheckId::Start(one)) => start::working(&survey.start(part(at)?), one),
            (Place::Run(at), CheckId::Run(one)) => run::working(&survey.run(part(at)?)?, one),
            (Place::Site, CheckId::Site(one)) => one.working(site, None),
            (Place::Part(at), CheckId::Site(one)) => one.working(site, Some(part(at)?)),
            _ => return None,
        })
    })();
    found.unwrap_or_default()
}

/// The name of a place on the line.
#[must_use]
pub fn place_name(site: &Site, place: Place) -> String {
    let titled = |id| site.part(id).map_or("", Part::title);
    match place {
        Place::Site => "Site".to_owned(),
        Place::Part(id) => titled(id).to_owned(),
        Place::Run(id) => {
            let to = site.part(id).and_then(|part| part.to).map_or("", titled);
            format!("{} to {to}", titled(id))
        }
    }
}
