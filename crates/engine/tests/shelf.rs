//! Layouts of a shelf whose totals were worked out by hand, and the steps to fit their links.

use engine::quantity::{Metres, Volts};
use engine::shelf::{
    Caution, Cell, CellVolts, Layout, LinkKind, Parallel, PlusOn, Posts, Proof, Remark, Shelf, ShelfError, Stand,
    TakeOff, Touch, Wiring, Wish, lay_out, steps,
};

fn mm(number: f64) -> Metres {
    Metres::new(number / 1000.0)
}

fn lithium_volts() -> CellVolts {
    CellVolts::new(Volts::new(3.20), Volts::new(3.30), Volts::new(3.35)).unwrap()
}

fn lithium_shelf(rows: u32, columns: u32) -> Shelf {
    let cell = Cell::new(mm(174.0), mm(72.0), Posts::Ends, mm(26.0)).unwrap();
    Shelf::new(rows, columns, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap()
}

fn want(take_off: TakeOff) -> Wish {
    Wish { take_off, ..Wish::default() }
}

const ONE: Parallel = Parallel::SeparateStrings;

fn lithium(rows: u32, columns: u32, wiring: (u32, u32, Parallel), take_off: TakeOff) -> Layout {
    let wiring = Wiring::new(wiring.0, wiring.1, wiring.2).unwrap();
    lay_out(&lithium_shelf(rows, columns), &wiring, lithium_volts(), want(take_off)).unwrap()
}

/// Counts and lengths to the millimetre, most frequent first.
fn cuts(layout: &Layout) -> Vec<(usize, i64)> {
    layout.cuts.iter().map(|cut| (cut.links.len(), (cut.hole_to_hole.get() * 1e3).round() as i64)).collect()
}

#[track_caller]
fn check_total(layout: &Layout, by_hand_mm: f64) {
    let found = layout.hole_to_hole().get() * 1e3;
    assert!((found - by_hand_mm).abs() < 1e-6, "{found} mm, by hand {by_hand_mm} mm");
}

// Two rows of eight, both posts at one side: along one row and back along the other.
// In the row 72 + 2 = 74 mm. Across, from the front post of the one to the back post of the other: 60 + 26 + 26 = 112 mm.
#[test]
fn sixteen_cells_in_two_rows_go_out_and_back() {
    let layout = lithium(2, 8, (16, 1, ONE), TakeOff::SameSide);
    assert_eq!(layout.proof, Proof::Least);
    assert_eq!(cuts(&layout), [(14, 74), (1, 112)]);
    check_total(&layout, 14.0 * 74.0 + 112.0);
    // The cost: 1148 mm, and one further length at a pitch of 74 mm.
    assert_eq!(layout.cost.copper, 1_222_000);

    // The last link joins cells 8 and 9, across the rows; until then 8 · 3.30 = 26.4 V, after it 16 · 3.30 = 52.8 V.
    let last = layout.links.last().unwrap();
    assert!(last.fitted_last);
    assert_eq!((last.number, last.from.cell, last.to.cell), (15, 8, 9));
    assert!((last.stands_at.get() - 26.4).abs() < 1e-9);
    let reason = layout.last_link_reason.as_deref().unwrap();
    assert!(reason.contains("26.4 V") && reason.contains("52.8 V"), "{reason}");

    // Both posts at one side of two rows are neighbours whatever one does: said so, and a barrier asked for.
    assert_eq!(layout.remarks, [Remark::UnderOneWrench { string: 1, unavoidable: true }]);
    let worst = layout.barriers[0];
    assert_eq!((worst.one.min(worst.other), worst.one.max(worst.other)), (1, 16));
    assert!((worst.volts.get() - 52.8).abs() < 1e-9);
}

// Where the posts may be anywhere they are kept out of reach of one wrench, at the price of six links across.
#[test]
fn sixteen_cells_keep_their_posts_apart_where_they_may_stand_anywhere() {
    let layout = lithium(2, 8, (16, 1, ONE), TakeOff::Anywhere);
    assert_eq!(layout.cost.under_one_wrench, 0);
    assert!(layout.remarks.is_empty());
    assert_eq!(cuts(&layout), [(9, 74), (6, 112)]);
    check_total(&layout, 9.0 * 74.0 + 6.0 * 112.0);
    let ends = layout.ends[0];
    assert!(ends.minus_at.distance(ends.plus_at) >= mm(250.0));
    // The plain way costs less copper, and is not taken: its posts are neighbours.
    assert!(layout.plain.under_one_wrench == 1 && layout.plain.copper < layout.cost.copper);
}

// Opposite ends of two rows: up and down, across in every column and along between the columns.
#[test]
fn sixteen_cells_with_posts_at_opposite_ends_go_up_and_down() {
    let layout = lithium(2, 8, (16, 1, ONE), TakeOff::OppositeEnds);
    assert_eq!(cuts(&layout), [(8, 112), (7, 74)]);
    check_total(&layout, 8.0 * 112.0 + 7.0 * 74.0);
    let ends = layout.ends[0];
    let columns = [ends.minus.cell, ends.plus.cell].map(|cell| layout.place(cell).unwrap().column);
    assert!(columns == [0, 7] || columns == [7, 0]);
    assert!(layout.barriers.is_empty());
}

// Forty cells in four rows, posts at one side: out, back, out, back. Ten cells that turn alternately enter and leave a
// row at opposite ends of their length; the two middle rows are entered and left at the wrong one, so that each has
// one pair turned alike, whose link runs aslant over 74 mm and, between the posts, 174 − 2 · 26 = 122 mm.
#[test]
fn forty_cells_in_four_rows() {
    let layout = lithium(4, 10, (40, 1, ONE), TakeOff::SameSide);
    assert_eq!(layout.proof, Proof::Least);
    assert_eq!(cuts(&layout), [(34, 74), (3, 112), (2, 143)]);
    check_total(&layout, 34.0 * 74.0 + 3.0 * 112.0 + 2.0 * 74f64.hypot(122.0));
    assert!(layout.remarks.is_empty());
    assert!((layout.ends[0].volts.get() - 132.0).abs() < 1e-9);
    // 60 V are passed by the link that adds the 18th cell: 18 · 3.35 = 60.3 V, where 17 · 3.35 = 56.95 V.
    let passing: Vec<u32> = layout.links.iter().filter(|l| l.touch == Touch::Passes).map(|l| l.after).collect();
    assert_eq!(passing, [17]);
    // As they are fitted: once in each half of twenty.
    let steps = steps(&layout);
    let passing: Vec<u32> =
        steps.iter().filter(|s| s.cautions.contains(&Caution::PassesTouch)).map(|s| s.link).collect();
    assert_eq!(passing, [17, 19 + 17]);
}

// Twelve nickel-iron cells, 160 × 130 mm, posts in opposite corners: 30 mm aside and 45 mm along from the middle.
// All of a row turned alike, each link runs aslant over 132 − 60 = 72 mm and 90 mm. Across, from row to row, the
// pitch of 160 + 60 = 220 mm.
#[test]
fn twelve_nickel_iron_cells_in_two_rows() {
    let cell = Cell::new(mm(160.0), mm(130.0), Posts::Diagonal(PlusOn::Left), mm(35.0)).unwrap();
    let shelf = Shelf::new(2, 6, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap();
    let volts = CellVolts::new(Volts::new(1.25), Volts::new(1.30), Volts::new(1.45)).unwrap();
    let wiring = Wiring::new(12, 1, ONE).unwrap();
    let layout = lay_out(&shelf, &wiring, volts, want(TakeOff::SameSide)).unwrap();
    assert_eq!(layout.proof, Proof::Least);
    assert_eq!(cuts(&layout), [(10, 115), (1, 220)]);
    check_total(&layout, 10.0 * 72f64.hypot(90.0) + 220.0);
    assert!((layout.ends[0].volts.get() - 15.6).abs() < 1e-9);
}

// Twenty-four lead cells of 2 V, 206 × 147 mm, posts along one long edge: 38.5 mm aside, 68 mm along from the middle.
// Up and down each column, all cells of it turned alike: 206 + 60 − 2 · 68 = 130 mm. Between columns the posts' edges
// face one another, 149 − 77 = 72 mm, or stand apart, 149 + 77 = 226 mm, by turns: 3 and 2 of them.
#[test]
fn twenty_four_lead_cells_in_four_rows() {
    let cell = Cell::new(mm(206.0), mm(147.0), Posts::LongEdge(PlusOn::Left), mm(35.0)).unwrap();
    let shelf = Shelf::new(4, 6, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap();
    let volts = CellVolts::new(Volts::new(2.05), Volts::new(2.10), Volts::new(2.15)).unwrap();
    let wiring = Wiring::new(24, 1, ONE).unwrap();
    let layout = lay_out(&shelf, &wiring, volts, want(TakeOff::OppositeEnds)).unwrap();
    assert_eq!(layout.proof, Proof::Least);
    assert_eq!(cuts(&layout), [(18, 130), (3, 72), (2, 226)]);
    check_total(&layout, 18.0 * 130.0 + 3.0 * 72.0 + 2.0 * 226.0);
    assert!((layout.ends[0].volts.get() - 50.4).abs() < 1e-9);
    assert_eq!(layout.cost.take_off_missed, 0);
    // With 20 mm more than hole to hole.
    assert!((layout.cuts[0].cut.get() - 0.150).abs() < 1e-9);
}

#[test]
fn the_meter_climbs_cell_by_cell_in_each_half_and_the_last_link_shows_the_whole() {
    let layout = lithium(2, 8, (16, 1, ONE), TakeOff::SameSide);
    let steps = steps(&layout);
    assert_eq!(steps[0].what, "Join plus of cell 1 to minus of cell 2.");
    let cells = |volts: Volts| (volts.get() / 3.30).round() as u32;
    let read: Vec<u32> = steps.iter().map(|step| cells(step.now.expected)).collect();
    assert_eq!(read, [2, 3, 4, 5, 6, 7, 8, 2, 3, 4, 5, 6, 7, 8, 16]);
    // The second half is read from its own minus post.
    assert_eq!((steps[7].now.black.cell, steps[7].now.red.cell), (9, 10));
    let last = &steps[14];
    assert_eq!(last.before.iter().map(|m| cells(m.expected)).collect::<Vec<_>>(), [8, 8]);
    assert!((last.now.lowest.get() - 51.2).abs() < 1e-9 && (last.now.highest.get() - 53.6).abs() < 1e-9);
    assert_eq!(last.cautions, [Caution::Burns, Caution::FitLast]);
}

#[test]
fn groups_are_joined_before_they_are_put_in_series_and_read_alike_before_a_loop_is_closed() {
    let layout = lithium(2, 8, (8, 2, Parallel::Groups), TakeOff::SameSide);
    // Eight groups of two: 8 · 2 parallel links and 7 in series; 22 of 74 mm and one across.
    assert_eq!(cuts(&layout), [(22, 74), (1, 112)]);
    assert!(layout.links[..16].iter().all(|link| link.kind == LinkKind::Parallel));
    let steps = steps(&layout);
    assert_eq!(steps[1].cautions, [Caution::AlikeFirst]);
    assert_eq!(steps[1].before[0].expected, Volts::new(0.0));
    assert!((steps[22].now.expected.get() - 26.4).abs() < 1e-9);
    // The series link carries the whole group.
    assert_eq!(layout.links[16].carries, 2);
}

#[test]
fn what_does_not_fit_is_refused() {
    let lay = |series, strings| {
        let wiring = Wiring::new(series, strings, ONE).unwrap();
        lay_out(&lithium_shelf(2, 4), &wiring, lithium_volts(), Wish::default()).map(|_| ())
    };
    assert_eq!(lay(9, 1), Err(ShelfError::TooFewPlaces { cells: 9, places: 8 }));
    assert!(lay(u32::MAX, u32::MAX).is_err());
    assert_eq!(Wiring::new(0, 1, ONE).unwrap_err(), ShelfError::NoCells);
    let shelf = |rows, columns, beside| {
        Shelf::new(rows, columns, *lithium_shelf(1, 1).cell(), Stand::SideBySide, mm(beside), mm(60.0)).map(|_| ())
    };
    assert_eq!(shelf(0, 4, 2.0), Err(ShelfError::NoPlaces));
    assert!(matches!(shelf(u32::MAX, u32::MAX, 2.0), Err(ShelfError::TooManyPlaces { .. })));
    assert!(matches!(shelf(1, 4, -2.0), Err(ShelfError::NotAGap { .. })));
    assert!(matches!(shelf(1, 4, f64::NAN), Err(ShelfError::NotAGap { .. })));
}

#[test]
fn one_cell_is_a_layout_without_links() {
    let layout = lithium(1, 1, (1, 1, ONE), TakeOff::Anywhere);
    assert!(layout.links.is_empty() && steps(&layout).is_empty());
    assert_eq!(layout.last_link_reason, None);
}

#[test]
fn one_row_cannot_have_both_posts_at_one_side_and_says_so() {
    let layout = lithium(1, 8, (8, 1, ONE), TakeOff::SameSide);
    assert_eq!(layout.proof, Proof::Least);
    assert_eq!(layout.remarks, [Remark::TakeOffMissed(1)]);
}

#[test]
fn a_shelf_too_large_to_search_through_is_never_worse_than_plain_and_the_same_each_time() {
    let once = lithium(8, 9, (72, 1, ONE), TakeOff::OppositeEnds);
    assert_eq!(once, lithium(8, 9, (72, 1, ONE), TakeOff::OppositeEnds));
    assert_eq!(once.proof, Proof::Found);
    assert!(once.cost < once.plain);
}
