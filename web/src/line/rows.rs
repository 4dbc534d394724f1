//! The rows of the line: parts and the runs between them, in the order of the conductor.

use crate::piece::{Piece, view};
use engine::check::FieldSet;
use engine::choice::words;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Count, Quantity};
use engine::run;
use engine::show;
use engine::site::{Assessment, Part, PartId, PartKind, Place, Site, Subject, Survey};

use super::link;
use crate::check_row::bar;
use crate::form::as_entered;
use crate::icon::icon;
use crate::span_bar::slim_bar;
use crate::verdict::verdict_mark;

/// One row of the line.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Row {
    /// A part.
    Part(PartId),
    /// The run that leads from a part.
    Run(PartId),
}

/// The rows, from sun to socket: arrays and sources with their controllers, the bus, what hangs on it, and what hangs on
/// that. Parts joined to nothing come last.
pub fn row_of(site: &Site) -> Vec<Row> {
    let mut rows = Vec::new();
    let mut done: Vec<PartId> = Vec::new();
    let put = |part: &Part, run_first: bool, rows: &mut Vec<Row>, done: &mut Vec<PartId>| {
        if done.contains(&part.id) {
            return;
        }
        done.push(part.id);
        let run = part.run.is_some().then_some(Row::Run(part.id));
        if run_first {
            rows.extend(run);
        }
        rows.push(Row::Part(part.id));
        if !run_first {
            rows.extend(run);
        }
    };
    // What feeds a controller stands above it, its run between the two.
    for controller in site.of_kind(PartKind::Controller) {
        for source in site.joined_to(controller.id) {
            put(source, false, &mut rows, &mut done);
        }
        put(controller, false, &mut rows, &mut done);
    }
    for kind in [PartKind::Array, PartKind::OtherSource] {
        for source in site.of_kind(kind) {
            put(source, false, &mut rows, &mut done);
        }
    }
    for bus in site.of_kind(PartKind::Bus) {
        put(bus, false, &mut rows, &mut done);
    }
    // What hangs on the bus stands below it, its run before it.
    for kind in [PartKind::Bank, PartKind::Inverter, PartKind::DcPanel] {
        for part in site.of_kind(kind) {
            put(part, true, &mut rows, &mut done);
            for below in site.joined_to(part.id) {
                put(below, true, &mut rows, &mut done);
                for last in site.joined_to(below.id) {
                    put(last, true, &mut rows, &mut done);
                }
            }
        }
    }
    for part in &site.parts {
        put(part, true, &mut rows, &mut done);
    }
    rows
}

/// The rows, drawn.
pub fn rows(site: &Site, found: &Assessment, open: Option<Subject>) -> Vec<Piece> {
    let sun = site.first(PartKind::Array).is_some().then(|| {
        view! {
            <li>
                <div class="rail"><i class="wire lower"></i><span class="node">{icon("s-sun", "sym")}</span></div>
                <p class="end-cap">"sun"</p>
            </li>
        }
    });
    let survey = Survey::new(site);
    let sized: Vec<(PartId, Sized)> =
        site.parts.iter().filter_map(|part| Some((part.id, run::size(&survey.run(part)?)))).collect();
    let of = |id: PartId| sized.iter().find(|(one, _)| *one == id).map(|(_, sized)| sized);
    let rest = row_of(site).into_iter().filter_map(|row| match row {
        Row::Part(id) => site.part(id).map(|part| part_row(site, part, of(id), found, open)),
        Row::Run(id) => site.part(id).map(|part| run_row(site, part, of(id), found, open)),
    });
    sun.into_iter().chain(rest).collect()
}

/// A run with its conductor and breaker, or what is missing for them.
type Sized = Result<run::Sizing, FieldSet>;

/// Wire width on screen shows the size: 2 + 1.1 · √mm².
fn width(sized: Option<&Sized>) -> String {
    let area = sized
        .and_then(|sized| sized.as_ref().ok()?.conductor)
        .map_or(4.0, |one| one.size.area().get() * f64::from(one.parallel));
    format!("{:.1}px", (2.0 + 1.1 * area.sqrt()).min(18.0))
}

const fn symbol(kind: PartKind) -> &'static str {
    match kind {
        PartKind::Array => "s-array",
        PartKind::OtherSource | PartKind::Generator => "s-gen",
        PartKind::Controller => "s-conv",
        PartKind::Bus => "s-earth",
        PartKind::Bank => "s-bank",
        PartKind::Inverter => "s-inv",
        PartKind::AcPanel | PartKind::DcPanel => "s-panel",
        PartKind::DcCircuit => "s-socket",
        PartKind::Load => "s-motor",
    }
}

fn part_row(site: &Site, part: &Part, sized: Option<&Sized>, found: &Assessment, open: Option<Subject>) -> Piece {
    let place = Place::Part(part.id);
    if part.kind == PartKind::Bus {
        let volts = bus_volts(site).map_or_else(String::new, |volts| format!("{volts} d.c."));
        return view! {
            <li class="bus"><a class="bus-strip" href=link(place).href()>{part.title().to_owned()} " " <span>{volts}</span></a></li>
        };
    }
    let worst = found.worst_at(place).map(|one| one.check);
    let is_open = open == Some(Subject::Part(part.id));
    let wide = width(sized);
    let typical = part.typical.then(|| view! { <span class="typical">"typical: read your nameplate"</span> });
    let torn = worst.is_some_and(|check| check.verdict == engine::check::Verdict::Breaks);
    view! {
        <li class:is-open=is_open class:hangs=hangs(site, part)>
            <div class="rail">
                <i class="wire" style=("--w", wide)></i>
                {torn.then(|| view! { <i class="tear"></i> })}
                <span class="node">{icon(symbol(part.kind), "sym")}</span>
            </div>
            <div class="part">
                <div class="part-head">
                    <h2 class="part-name"><a href=link(place).href() aria-current=is_open.then_some("true")>{part.title().to_owned()}</a></h2>
                    {worst.map(|check| view! { {verdict_mark(check.verdict, false)} })}
                </div>
                <p class="part-key">{key(site, part)} " " {typical}</p>
                {worst.and_then(|check| bar(check.id.name(), &check)).map(slim_bar)}
            </div>
        </li>
    }
}

/// Whether a part hangs on one that hangs on the bus.
fn hangs(site: &Site, part: &Part) -> bool {
    let joined = part.to.and_then(|to| site.part(to));
    joined.is_some_and(|to| matches!(to.kind, PartKind::Inverter | PartKind::DcPanel | PartKind::AcPanel))
}

fn run_row(site: &Site, part: &Part, sized: Option<&Sized>, found: &Assessment, open: Option<Subject>) -> Piece {
    let place = Place::Run(part.id);
    let worst = found.worst_at(place).map(|one| one.check);
    let to = part.to.and_then(|to| site.part(to)).map_or("nothing yet", Part::title).to_owned();
    let is_open = open == Some(Subject::Run(part.id));
    let fuse = part.run.as_ref().is_some_and(|run| run.typed(Field::BreakerType).0 == "fuse");
    let name =
        if part.kind == PartKind::Array || part.kind == PartKind::Controller || part.kind == PartKind::OtherSource {
            format!("Run to {to}")
        } else {
            format!("Run from {to}")
        };
    view! {
        <li class:is-open=is_open class:hangs=hangs(site, part)>
            <div class="rail">
                <i class="wire" style=("--w", width(sized))></i>
                <span class="node sz30">{icon(if fuse { "s-fuse" } else { "s-breaker" }, "sym")}</span>
            </div>
            <div class="run">
                <div class="run-head">
                    <h3 class="run-name"><a href=link(place).href() aria-current=is_open.then_some("true")>{name}</a></h3>
                    {worst.map(|check| view! { {verdict_mark(check.verdict, false)} })}
                </div>
                <p class="run-key">{run_key(part, sized)}</p>
            </div>
        </li>
    }
}

/// "35 mm², 1.5 m, breaker 100 A".
fn run_key(part: &Part, sized: Option<&Sized>) -> String {
    let Some(sized) = sized else { return String::new() };
    let mut words = Vec::new();
    match sized {
        Ok(found) => {
            let chosen = if found.entered { "" } else { ", the least that holds" };
            words.extend(found.conductor.map(|one| format!("{one}{chosen}")));
            let what = if found.protection.protects == run::BreakerType::Fuse { "fuse" } else { "breaker" };
            words.push(format!("{what} {}", show::given(found.protection.rating.amount())));
        }
        Err(missing) if !missing.is_empty() => words.push(format!("needs {}", crate::form::names(*missing))),
        Err(_) => words.push("past every standard rating".to_owned()),
    }
    if let Some(entries) = &part.run {
        words.extend(as_entered(entries, Field::RunLength).map(|length| format!("{length} one way")));
    }
    words.join(", ")
}

fn bus_volts(site: &Site) -> Option<String> {
    let bank = site.first(PartKind::Bank)?;
    let ask = engine::bank::settled(&engine::site::bank_ask(site, bank));
    Some(show::computed(engine::bank::window(&ask)?.nominal.amount()))
}

/// The key figures of a part.
pub fn key(site: &Site, part: &Part) -> String {
    let own = &part.entries;
    let told = |field: Field| as_entered(own, field);
    let count = |field: Field| own.entry::<Count>(field).typed().map_or(1.0, Count::get);
    let named = |field: Field| words(field, own.typed(field).0).map(str::to_owned);
    let words: Vec<Option<String>> = match part.kind {
        PartKind::Array => {
            let (series, strings) = (count(Field::Series), count(Field::Strings));
            let all = show::number(series * strings, 0);
            vec![
                Some(format!("{all} modules")),
                Some(format!("{} in series × {}", show::number(series, 0), show::number(strings, 0))),
            ]
        }
        PartKind::Controller => vec![
            told(Field::InputLimit).map(|volts| format!("{volts} in")),
            told(Field::OutputCurrent).map(|amps| format!("{amps} out")),
        ],
        PartKind::Bank => vec![
            named(Field::Chemistry),
            told(Field::CellCapacity),
            own.entry::<Count>(Field::CellsInSeries).typed().map(|series| {
                format!("{} × {}", show::number(series.get(), 0), show::number(count(Field::StringsOfCells), 0))
            }),
            energy(site, part),
        ],
        PartKind::Inverter => vec![
            told(Field::InverterContinuous),
            told(Field::InverterSurge).map(|surge| format!("{surge} surge")),
            told(Field::AcVolts),
        ],
        PartKind::Generator => vec![told(Field::GeneratorRating)],
        PartKind::OtherSource => vec![told(Field::SourcePower)],
        PartKind::DcPanel => vec![told(Field::LoadsHigh).map(|volts| format!("loads bear {volts}"))],
        PartKind::AcPanel => vec![named(Field::PanelLegs)],
        PartKind::Load => vec![named(Field::StartLoad), told(Field::RunningPower)],
        PartKind::Bus | PartKind::DcCircuit => vec![],
    };
    words.into_iter().flatten().collect::<Vec<_>>().join(", ")
}

fn energy(site: &Site, part: &Part) -> Option<String> {
    let ask = engine::bank::settled(&engine::site::bank_ask(site, part));
    let energy = engine::bank::energy(&ask)?;
    let kilo =
        engine::quantity::Amount { number: energy.usable.get() / 1000.0, unit: engine::unit::Unit::KilowattHour };
    Some(format!("{} usable", show::computed(kilo)))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_part_and_run_of_every_demo_stands_on_the_line_once() {
        for name in bridge::demo::names() {
            let site = bridge::demo::demo(name).unwrap();
            let rows = row_of(&site);
            for part in &site.parts {
                assert_eq!(rows.iter().filter(|row| **row == Row::Part(part.id)).count(), 1, "{name} {part:?}");
                let runs = rows.iter().filter(|row| **row == Row::Run(part.id)).count();
                assert_eq!(runs, usize::from(part.run.is_some()), "{name} {part:?}");
            }
        }
    }

    #[test]
    fn the_sun_stands_above_its_controller_and_the_bus_above_the_bank() {
        let site = bridge::demo::demo("Kestrel Ridge hut").unwrap();
        let rows = row_of(&site);
        let at = |kind: PartKind| {
            let id = site.first(kind).unwrap().id;
            rows.iter().position(|row| *row == Row::Part(id)).unwrap()
        };
        let order = [
            PartKind::Array,
            PartKind::Controller,
            PartKind::Bus,
            PartKind::Bank,
            PartKind::Inverter,
            PartKind::AcPanel,
        ];
        assert!(order.windows(2).all(|pair| at(pair[0]) < at(pair[1])), "{rows:?}");
    }

    #[test]
    fn the_key_figures_of_the_hut() {
        let site = bridge::demo::demo("Kestrel Ridge hut").unwrap();
        let array = site.first(PartKind::Array).unwrap();
        assert_eq!(key(&site, array), "9 modules, 3 in series × 3");
    }
}
