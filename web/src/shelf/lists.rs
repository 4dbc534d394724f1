//! The shelf in words: what can hurt, what could not be had, links to cut, lugs, and every link in the order to fit.

use std::sync::Arc;

use crate::derived::{dynamic, memo};
use crate::piece::{Piece, view};
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amount, Metres, Quantity, SquareMillimetres};
use engine::shelf::{BURNS, Caution, Layout, Meter, Pole, Proof, Touch};
use engine::show;
use engine::unit::Unit;

use super::Laid;
use crate::cells::TOOL;
use crate::draft::use_draft;
use crate::fold::fold;
use crate::tool_page::figures;

/// What can hurt, before any link is fitted: the last link first of all.
pub fn caution(layout: &Layout) -> Piece {
    let numbers = |which: fn(&engine::shelf::Link) -> bool| -> Vec<u32> {
        layout.links.iter().filter(|link| which(link)).map(|link| link.number).collect()
    };
    let last = numbers(|link| link.fitted_last);
    let past = numbers(|link| link.touch == Touch::Passes);
    let title = if last.is_empty() { "Caution".to_owned() } else { format!("Fit {} last", links(&last)) };
    let past = (!past.is_empty()).then(|| {
        let so = format!("From {} on: past 60 V d.c., which shocks. {}", links(&past), Caution::PassesTouch.text());
        view! { <p>{so}</p> }
    });
    view! {
        <div class="caution" role="note">
            <b>{title}</b>
            {layout.last_link_reason.clone().map(|why| view! { <p>{why}</p> })}
            {past}
            <p>{BURNS}</p>
        </div>
    }
}

/// What could not be had, where barriers belong, and how good the layout is.
pub fn remarks(layout: &Layout) -> Piece {
    let mut lines: Vec<String> = layout.remarks.iter().map(ToString::to_string).collect();
    if let Some(barrier) = layout.barriers.first() {
        lines.push(format!(
            "Put a barrier between cells {} and {}, dashed in the picture: {} between posts that one tool can bridge{}.",
            barrier.one,
            barrier.other,
            show::computed(barrier.volts.amount()),
            if layout.barriers.len() > 1 { ", and between the others listed below" } else { "" }
        ));
    }
    lines.push(
        match layout.proof {
            Proof::Least => "No layout with links between neighbours needs less.",
            Proof::Found => "The best that was found; a better one may exist.",
        }
        .to_owned(),
    );
    let lines: Vec<Piece> = lines.into_iter().map(|line| view! { <li>{line}</li> }).collect();
    view! { <ul class="notes">{lines}</ul> }
}

/// Links to cut, lugs, barriers, and the order of fitting in words.
pub fn lists(laid: Arc<Laid>) -> Piece {
    let order: Vec<Piece> = laid
        .steps
        .iter()
        .map(|step| {
            let mut says = vec![step.what.clone()];
            says.extend(step.before.iter().map(|meter| format!("Before it: {}: {}.", leads(meter), band(meter))));
            says.push(format!("Then {}: {}.", leads(&step.now), band(&step.now)));
            says.extend(step.cautions.iter().filter(|one| **one != Caution::Burns).map(|one| one.text().to_owned()));
            view! { <li value=step.link.to_string()>{says.join(" ")}</li> }
        })
        .collect();
    view! {
        {fold("cells/links", "Links to cut", memo(|| "by length, and lugs to pack".to_owned()), move || view! {             {
                let laid = laid.clone();
                dynamic(move || {
                    let size = use_draft().with(|pads| pads.of(TOOL).entry::<SquareMillimetres>(Field::LinkSize).typed());
                    figures(packing(&laid, size))
                })
            }
            <p class="ranked-say">
                "Cut for flat bar, 10 mm beyond each hole; a bar has holes in place of lugs. Of cable, make one, try it, then \
                 the rest. Lengths hang on the gaps and posts above: measure your cells."
            </p>
         })}
        <details class="in-words">
            <summary>"Every link in words"</summary>
            <ol class="order">{order}</ol>
        </details>
    }
}

/// What to cut and to pack.
fn packing(laid: &Laid, size: Option<SquareMillimetres>) -> Vec<(String, String)> {
    let layout = &laid.layout;
    let size = size.map_or_else(String::new, |size| format!(" of {}", show::given(size.amount())));
    let mut rows: Vec<(String, String)> = Vec::new();
    for cut in &layout.cuts {
        let count = cut.links.len();
        let name = format!("{count} {}{size}: {}", if count == 1 { "link" } else { "links" }, runs(&cut.links));
        rows.push((name, format!("cut {}, holes {} apart", millimetres(cut.cut), millimetres(cut.hole_to_hole))));
    }
    let (of_links, of_posts) = (layout.links.len() * 2, layout.ends.len() * 2);
    rows.push((
        format!("Lugs{size}"),
        format!("{}: {of_links} on links, {of_posts} on take-off leads", of_links + of_posts),
    ));
    for ends in &layout.ends {
        let place = |pole: Pole, cell: u32| {
            let (row, column) = layout.place(cell).map_or((0, 0), |place| (place.row + 1, place.column + 1));
            format!("{} on cell {cell}, row {row} from the back, column {column} from the left", pole.word())
        };
        let name =
            if layout.ends.len() > 1 { format!("Take-off, string {}", ends.string) } else { "Take-off".to_owned() };
        let at = [place(Pole::Minus, ends.minus.cell), place(Pole::Plus, ends.plus.cell)];
        rows.push((name, at.join("; ")));
    }
    for one in &layout.barriers {
        rows.push((format!("Barrier between {} and {}", one.one, one.other), show::computed(one.volts.amount())));
    }
    rows
}

fn millimetres(metres: Metres) -> String {
    show::computed(Amount { number: metres.get() * 1000.0, unit: Unit::Millimetre })
}

/// Where the leads go.
pub fn leads(meter: &Meter) -> String {
    let at = |lug: engine::shelf::Lug| format!("{} of cell {}", lug.pole.word(), lug.cell);
    format!("black on {}, red on {}", at(meter.black), at(meter.red))
}

/// Between what the meter must read.
pub fn band(meter: &Meter) -> String {
    format!("{} to {}", show::computed(meter.lowest.amount()), show::computed(meter.highest.amount()))
}

fn links(numbers: &[u32]) -> String {
    format!("{} {}", if numbers.len() == 1 { "link" } else { "links" }, runs(numbers))
}

/// Rising numbers with those that follow one another drawn together: "1 to 7, 9, 11 to 15".
fn runs(numbers: &[u32]) -> String {
    let mut words = String::new();
    let mut from = 0;
    for (index, number) in numbers.iter().enumerate() {
        if numbers.get(index + 1) == Some(&(number + 1)) {
            continue;
        }
        if !words.is_empty() {
            words.push_str(", ");
        }
        match index - from {
            0 => {}
            1 => words.push_str(&format!("{}, ", numbers[from])),
            _ => words.push_str(&format!("{} to ", numbers[from])),
        }
        words.push_str(&number.to_string());
        from = index + 1;
    }
    words
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::shelf::{Asked, lay_out, steps};

    fn laid() -> Laid {
        use engine::quantity::Volts;
        use engine::shelf::{Cell, CellVolts, Parallel, Posts, Shelf, Stand, TakeOff, Wiring, Wish};
        let mm = |mm: f64| Metres::new(mm / 1000.0);
        let cell = Cell::new(mm(174.0), mm(72.0), Posts::Ends, mm(26.0)).unwrap();
        let asked = Asked {
            shelf: Shelf::new(2, 8, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap(),
            wiring: Wiring::new(16, 1, Parallel::SeparateStrings).unwrap(),
            volts: CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.4)).unwrap(),
            wish: Wish { take_off: TakeOff::SameSide, ..Wish::default() },
        };
        let layout = lay_out(&asked.shelf, &asked.wiring, asked.volts, asked.wish).unwrap();
        let steps = steps(&layout);
        Laid { asked, layout, steps }
    }

    #[test]
    fn every_link_is_cut_once_and_has_a_lug_at_each_end() {
        let rows = packing(&laid(), Some(SquareMillimetres::new(70.0)));
        let cut: usize = rows
            .iter()
            .filter(|(name, _)| name.contains("link"))
            .map(|(name, _)| name.split(' ').next().unwrap().parse::<usize>().unwrap())
            .sum();
        assert_eq!(cut, 15);
        let lugs = rows.iter().find(|(name, _)| name.starts_with("Lugs")).unwrap();
        assert_eq!(lugs.0.replace(show::NARROW, " "), "Lugs of 70 mm²");
        assert!(lugs.1.starts_with("32: 30 on links, 2 "), "{}", lugs.1);
        // A pitch of 74 mm, and 10 mm beyond each hole.
        let short = rows.iter().find(|(_, figure)| figure.replace(show::NARROW, " ") == "cut 94 mm, holes 74 mm apart");
        assert!(short.is_some(), "{rows:?}");
    }

    #[test]
    fn numbers_in_a_row_are_drawn_together() {
        assert_eq!(runs(&[1, 2, 3, 5, 7, 8, 10]), "1 to 3, 5, 7, 8, 10");
        assert_eq!(runs(&[8]), "8");
        assert_eq!(runs(&[]), "");
    }
}
