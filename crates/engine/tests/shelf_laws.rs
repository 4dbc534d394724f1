//! What every layout of a shelf keeps to, whatever the cells and the wiring.

use arbtest::arbitrary::{Result, Unstructured};
use engine::quantity::{Metres, Volts};
use engine::shelf::{
    Cell, CellVolts, Layout, LinkKind, Lug, Parallel, PlusOn, Pole, Posts, Shelf, Spot, Stand, TakeOff, Wiring, Wish,
    lay_out, steps,
};

fn mm(number: u32) -> Metres {
    Metres::new(f64::from(number) / 1000.0)
}

fn volts() -> CellVolts {
    CellVolts::new(Volts::new(3.20), Volts::new(3.30), Volts::new(3.35)).unwrap()
}

fn any_shelf(u: &mut Unstructured) -> Result<Shelf> {
    let posts = *u.choose(&[
        Posts::Ends,
        Posts::LongEdge(PlusOn::Left),
        Posts::LongEdge(PlusOn::Right),
        Posts::ShortEdge(PlusOn::Left),
        Posts::Diagonal(PlusOn::Left),
        Posts::Diagonal(PlusOn::Right),
    ])?;
    let (length, width) = (u.int_in_range(60..=300)?, u.int_in_range(60..=300)?);
    let inset = length.min(width) * u.int_in_range(10..=40)? / 100;
    let cell = Cell::new(mm(length), mm(width), posts, mm(inset)).expect("inset below half of each side");
    let stand = *u.choose(&[Stand::SideBySide, Stand::EndToEnd, Stand::EitherWay])?;
    let (rows, columns) = (u.int_in_range(1..=3)?, u.int_in_range(1..=4)?);
    let (beside, between) = (mm(u.int_in_range(0..=80)?), mm(u.int_in_range(0..=80)?));
    Ok(Shelf::new(rows, columns, cell, stand, beside, between).expect("a shelf"))
}

fn any_layout(u: &mut Unstructured) -> Result<(Shelf, Wiring, Layout)> {
    let shelf = any_shelf(u)?;
    let series = u.int_in_range(1..=shelf.places())?;
    let strings = u.int_in_range(1..=shelf.places() / series)?;
    let parallel = *u.choose(&[Parallel::SeparateStrings, Parallel::Groups])?;
    let wiring = Wiring::new(series, strings, parallel).expect("some cells");
    let take_off = *u.choose(&[TakeOff::Anywhere, TakeOff::SameSide, TakeOff::OppositeEnds, TakeOff::Front])?;
    let wish = Wish { take_off, seed: u.arbitrary()?, ..Wish::default() };
    let layout = lay_out(&shelf, &wiring, volts(), wish).expect("it fits");
    Ok((shelf, wiring, layout))
}

/// Whether two segments pass through one another, ends not counted.
fn cross(one: (Spot, Spot), other: (Spot, Spot)) -> bool {
    let at = |spot: Spot| (spot.across.get(), spot.forward.get());
    let side = |p: (f64, f64), q: (f64, f64), r: (f64, f64)| (q.0 - p.0) * (r.1 - p.1) - (q.1 - p.1) * (r.0 - p.0);
    let (a, b, c, d) = (at(one.0), at(one.1), at(other.0), at(other.1));
    side(a, b, c) * side(a, b, d) < -1e-12 && side(c, d, a) * side(c, d, b) < -1e-12
}

fn cells_stand_once_and_as_allowed(shelf: &Shelf, wiring: &Wiring, layout: &Layout) {
    assert_eq!(layout.places.len() as u32, wiring.series() * wiring.in_parallel());
    for (i, place) in layout.places.iter().enumerate() {
        assert_eq!(place.cell as usize, i + 1);
        assert!(place.row < shelf.rows() && place.column < shelf.columns());
        assert!(shelf.stand().turns().contains(&place.turn));
        assert!(layout.places[..i].iter().all(|p| (p.row, p.column) != (place.row, place.column)));
    }
    for position in 1..=wiring.series() {
        let there = layout.places.iter().filter(|p| p.position == position).count() as u32;
        assert_eq!(there, wiring.in_parallel());
    }
}

fn links_join_what_they_should(wiring: &Wiring, layout: &Layout) {
    let (series, strings) = (wiring.series(), wiring.in_parallel());
    let groups = wiring.parallel() == Parallel::Groups;
    let expected = if groups { series * 2 * (strings - 1) + series - 1 } else { strings * (series - 1) };
    assert_eq!(layout.links.len() as u32, expected);
    for (number, link) in (1..).zip(&layout.links) {
        assert_eq!(link.number, number);
        let (a, b) = (layout.place(link.from.cell).unwrap(), layout.place(link.to.cell).unwrap());
        assert_eq!(a.row.abs_diff(b.row) + a.column.abs_diff(b.column), 1, "neighbours only");
        assert_eq!((a.string, b.string), (link.string, link.string));
        match link.kind {
            LinkKind::Series => {
                assert_eq!((link.from.pole, link.to.pole), (Pole::Plus, Pole::Minus));
                assert_eq!(b.position, a.position + 1);
                assert!((link.running.get() - f64::from(b.position) * 3.30).abs() < 1e-9);
                assert!((link.stands_at.get() - f64::from(a.position) * 3.30).abs() < 1e-9);
            }
            LinkKind::Parallel => {
                assert_eq!(link.from.pole, link.to.pole);
                assert_eq!(b.position, a.position);
            }
        }
        assert_eq!(layout.volts_at(link.from), layout.volts_at(link.to), "one link, one potential");
        assert!(link.cut > link.hole_to_hole);
        // No post bears more than two lugs.
        for lug in [link.from, link.to] {
            assert!(layout.links.iter().filter(|l| l.from == lug || l.to == lug).count() <= 2);
        }
    }
    let last = layout.links.iter().filter(|l| l.fitted_last).count() as u32;
    let chains = if groups { 1 } else { strings };
    assert_eq!(last, if series > 1 { chains } else { 0 });
    assert!(layout.links.iter().rev().take(last as usize).all(|l| l.fitted_last));
    assert_eq!(layout.cuts.iter().map(|c| c.links.len()).sum::<usize>(), layout.links.len());
}

fn links_do_not_cross(layout: &Layout) {
    let post = |lug: Lug| layout.place(lug.cell).unwrap().post(lug.pole);
    for (i, a) in layout.links.iter().enumerate() {
        for b in &layout.links[..i] {
            if cross((post(a.from), post(a.to)), (post(b.from), post(b.to))) {
                assert_eq!(a.string, b.string, "links {} and {} of two strings cross", a.number, b.number);
                assert!(layout.cost.over_posts > 0, "links {} and {} cross untold", a.number, b.number);
            }
        }
    }
}

fn every_link_has_its_step(wiring: &Wiring, layout: &Layout) {
    let steps = steps(layout);
    assert_eq!(steps.len(), layout.links.len());
    assert!(steps.iter().all(|s| s.now.lowest <= s.now.expected && s.now.expected <= s.now.highest));
    let half = 3.35 * f64::from(wiring.series().div_ceil(2)).max(1.0);
    for (step, link) in steps.iter().zip(&layout.links) {
        if link.fitted_last {
            assert!((step.now.expected.get() - 3.30 * f64::from(wiring.series())).abs() < 1e-9);
        } else {
            assert!(step.now.highest.get() <= half + 1e-9, "more than the greater half before the last link");
        }
    }
}

#[test]
fn every_layout_keeps_the_laws() {
    arbtest::arbtest(|u| {
        let (shelf, wiring, layout) = any_layout(u)?;
        cells_stand_once_and_as_allowed(&shelf, &wiring, &layout);
        links_join_what_they_should(&wiring, &layout);
        links_do_not_cross(&layout);
        every_link_has_its_step(&wiring, &layout);
        assert!(layout.cost <= layout.plain, "worse than plain");
        Ok(())
    })
    .budget_ms(2_000);
}
