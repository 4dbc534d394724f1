//! Where everything stands in the picture of the shelf. Pure.
//!
//! Seen from above, not to scale: cells keep about their shape, and there is room for figures everywhere. A unit is a
//! pixel on the smallest screen, where the picture is 296 wide; a long row makes it wider, and it is then scrolled.

use engine::shelf::{Ends, Layout, LinkKind, Lug, Pole, Shelf, Touch};
use engine::show;

use super::board::{Area, At, Board, PLATE};

/// One cell.
#[derive(Clone, Debug, PartialEq)]
pub struct Cell {
    /// Its number.
    pub cell: u32,
    /// Its string.
    pub string: u32,
    /// Where it stands.
    pub area: Area,
    /// Where the band at its plus end stands.
    pub band: Area,
    /// Its plus and minus post.
    pub posts: [At; 2],
    /// What the meter reads from the string's minus post to its plus post, once it is linked that far.
    pub volts: String,
    /// Whether that may be past 60 V.
    pub past: bool,
}

/// One link.
#[derive(Clone, Debug, PartialEq)]
pub struct Bar {
    /// Its number.
    pub number: u32,
    /// From post to post.
    pub ends: [At; 2],
    /// The signs of those posts.
    pub signs: [&'static str; 2],
    /// Whether it joins like to like.
    pub beside: bool,
    /// Whether it joins the two halves, last of all.
    pub last: bool,
}

/// One take-off post.
#[derive(Clone, Debug, PartialEq)]
pub struct Plate {
    /// The post.
    pub post: At,
    /// Where it stands.
    pub area: Area,
    /// What stands on it.
    pub words: String,
}

/// The picture.
#[derive(Clone, Debug, PartialEq)]
pub struct Drawing {
    /// Its width and height.
    pub size: At,
    /// The board.
    pub board: Area,
    /// Places without a cell.
    pub free: Vec<Area>,
    /// The cells.
    pub cells: Vec<Cell>,
    /// Barriers, from point to point.
    pub barriers: Vec<[At; 2]>,
    /// The links.
    pub bars: Vec<Bar>,
    /// The take-off posts.
    pub plates: Vec<Plate>,
}

impl Drawing {
    /// The picture of `layout` on `shelf`.
    pub fn of(shelf: &Shelf, layout: &Layout) -> Self {
        let board = Board::of(shelf, layout);
        let mut cells = Vec::new();
        for place in &layout.places {
            let area = board.cell(place);
            let posts = [board.post(place, Pole::Plus), board.post(place, Pole::Minus)];
            let past = |link: &engine::shelf::Link| {
                link.touch == Touch::Passes && link.string == place.string && link.after < place.position
            };
            cells.push(Cell {
                cell: place.cell,
                string: place.string,
                area,
                band: plus_end(area, posts),
                posts,
                volts: format!("{:.1}", (layout.cell.expected() * f64::from(place.position)).get()),
                past: layout.links.iter().any(past),
            });
        }
        let post = |lug: Lug| layout.place(lug.cell).map_or((0.0, 0.0), |place| board.post(place, lug.pole));
        let mut bars = Vec::new();
        for link in &layout.links {
            bars.push(Bar {
                number: link.number,
                ends: [post(link.from), post(link.to)],
                signs: [link.from.pole.sign(), link.to.pole.sign()],
                beside: link.kind == LinkKind::Parallel,
                last: link.fitted_last,
            });
        }
        let mut barriers = Vec::new();
        for barrier in &layout.barriers {
            if let (Some(one), Some(other)) = (layout.place(barrier.one), layout.place(barrier.other)) {
                barriers.push(board.between(one, other));
            }
        }
        let mut plates = Vec::new();
        for ends in &layout.ends {
            for lug in [ends.minus, ends.plus] {
                let y = layout.place(lug.cell).map_or(0.0, |place| board.plate(place, lug.pole));
                plates.push(plate(ends, lug.pole, layout.ends.len() > 1, post(lug), y));
            }
        }
        spread(&mut plates, board.size.0);
        Self { size: board.size, board: board.area, free: board.free(layout), cells, barriers, bars, plates }
    }
}

/// The band at the plus end: along the edge that the plus post is nearer to than the minus post.
fn plus_end([x, y, w, h]: Area, [plus, minus]: [At; 2]) -> Area {
    const THICK: f64 = 4.0;
    if (plus.1 - minus.1).abs() >= (plus.0 - minus.0).abs() {
        [x, if plus.1 < minus.1 { y } else { y + h - THICK }, w, THICK]
    } else {
        [if plus.0 < minus.0 { x } else { x + w - THICK }, y, THICK, h]
    }
}

fn plate(ends: &Ends, pole: Pole, many: bool, post: At, y: f64) -> Plate {
    let volts = if pole == Pole::Plus { format!("{:.1}", ends.volts.get()) } else { "0".to_owned() };
    let string = if many { format!("{}: ", ends.string) } else { String::new() };
    let words = format!("{string}{} {volts}{}V", pole.sign(), show::NARROW);
    let wide = words.chars().count() as f64 * 6.2 + 10.0;
    Plate { post, area: [post.0 - wide / 2.0, y, wide, PLATE], words }
}

/// Moves plates at one height apart, and into the picture.
fn spread(plates: &mut [Plate], wide: f64) {
    engine::order::sort_short(plates, |a, b| {
        a.area[1].total_cmp(&b.area[1]).then_with(|| a.post.0.total_cmp(&b.post.0))
    });
    let (mut height, mut from) = (0.0, 0.0);
    for plate in &mut *plates {
        let [x, y, w, _] = plate.area;
        from = if y == height { x.max(from) } else { x.max(2.0) };
        (plate.area[0], height) = (from, y);
        from += w + 2.0;
    }
    let mut to = 0.0;
    height = 0.0;
    for plate in plates.iter_mut().rev() {
        let [x, y, w, _] = plate.area;
        to = x.min(if y == height { to } else { wide - 2.0 } - w);
        (plate.area[0], height) = (to, y);
        to -= 2.0;
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::quantity::{Metres, Volts};
    use engine::shelf::{self, CellVolts, Parallel, PlusOn, Posts, Stand, TakeOff, Turn, Wiring, Wish, lay_out};

    /// A bar is this thick.
    const BAR: f64 = 17.0;

    type Of = (u32, u32, Posts, Stand, u32, u32, Parallel, TakeOff);

    fn drawn((rows, columns, posts, stand, series, strings, parallel, take_off): Of) -> (Layout, Drawing) {
        let mm = |mm: f64| Metres::new(mm / 1000.0);
        let cell = shelf::Cell::new(mm(174.0), mm(72.0), posts, mm(20.0)).unwrap();
        let shelf = Shelf::new(rows, columns, cell, stand, mm(2.0), mm(60.0)).unwrap();
        let wiring = Wiring::new(series, strings, parallel).unwrap();
        let volts = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.4)).unwrap();
        let layout = lay_out(&shelf, &wiring, volts, Wish { take_off, ..Wish::default() }).unwrap();
        let drawing = Drawing::of(&shelf, &layout);
        (layout, drawing)
    }

    const CASES: &[Of] = &[
        (1, 1, Posts::Ends, Stand::SideBySide, 1, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
        (1, 4, Posts::Ends, Stand::SideBySide, 4, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
        (2, 8, Posts::Ends, Stand::SideBySide, 16, 1, Parallel::SeparateStrings, TakeOff::SameSide),
        (2, 8, Posts::Ends, Stand::SideBySide, 16, 1, Parallel::SeparateStrings, TakeOff::OppositeEnds),
        (4, 6, Posts::Ends, Stand::SideBySide, 24, 1, Parallel::SeparateStrings, TakeOff::Front),
        (2, 8, Posts::Ends, Stand::SideBySide, 8, 2, Parallel::Groups, TakeOff::Anywhere),
        (2, 6, Posts::Ends, Stand::SideBySide, 4, 3, Parallel::SeparateStrings, TakeOff::Anywhere),
        (2, 3, Posts::LongEdge(PlusOn::Left), Stand::SideBySide, 4, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
        (2, 2, Posts::ShortEdge(PlusOn::Right), Stand::EndToEnd, 4, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
        (2, 4, Posts::Ends, Stand::EndToEnd, 8, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
        (3, 3, Posts::Diagonal(PlusOn::Left), Stand::EitherWay, 8, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
        (2, 20, Posts::Ends, Stand::SideBySide, 40, 1, Parallel::SeparateStrings, TakeOff::Anywhere),
    ];

    fn inside([x, y, w, h]: Area, (wide, high): At) -> bool {
        x >= 0.0 && y >= 0.0 && x + w <= wide + 0.01 && y + h <= high + 0.01
    }

    fn overlap(a: Area, b: Area) -> bool {
        a[0] + a[2] > b[0] + 0.01 && b[0] + b[2] > a[0] + 0.01 && a[1] + a[3] > b[1] + 0.01 && b[1] + b[3] > a[1] + 0.01
    }

    /// The post that stands at a point of the picture.
    fn post_at(drawing: &Drawing, (x, y): At) -> (usize, Pole) {
        let mut found = Vec::new();
        for (index, cell) in drawing.cells.iter().enumerate() {
            for (pole, (px, py)) in [Pole::Plus, Pole::Minus].into_iter().zip(cell.posts) {
                if (px - x).hypot(py - y) < 0.01 {
                    found.push((index, pole));
                }
            }
        }
        assert_eq!(found.len(), 1, "one post at {x} {y}");
        found[0]
    }

    #[test]
    fn every_cell_is_drawn_once_with_room_of_its_own() {
        for case in CASES {
            let (layout, drawing) = drawn(*case);
            let mut numbers: Vec<u32> = drawing.cells.iter().map(|cell| cell.cell).collect();
            numbers.sort_unstable();
            assert_eq!(numbers, (1..=case.4 * case.5).collect::<Vec<u32>>(), "{case:?}");
            assert_eq!(drawing.bars.len(), layout.links.len());
            assert_eq!(drawing.free.len() as u32 + case.4 * case.5, case.0 * case.1);
            let mut areas: Vec<Area> = drawing.cells.iter().map(|cell| cell.area).collect();
            areas.extend(&drawing.free);
            let plates: Vec<Area> = drawing.plates.iter().map(|plate| plate.area).collect();
            for (index, area) in areas.iter().enumerate() {
                assert!(inside(*area, drawing.size), "{case:?} {area:?} in {:?}", drawing.size);
                assert!(!areas[index + 1..].iter().any(|other| overlap(*area, *other)), "{case:?}");
                assert!(!plates.iter().any(|plate| overlap(*area, *plate)), "{case:?} a plate on a cell");
            }
            for (index, plate) in plates.iter().enumerate() {
                assert!(inside(*plate, drawing.size), "{case:?} {plate:?} in {:?}", drawing.size);
                assert!(!plates[index + 1..].iter().any(|other| overlap(*plate, *other)), "{case:?} plates");
            }
        }
    }

    /// Volts from the picture alone: from the minus plate over plus and minus signs and bars, 3.3 V a cell.
    #[test]
    fn the_volts_in_the_cells_follow_from_the_signs_and_the_bars_drawn() {
        for case in CASES {
            let (_, drawing) = drawn(*case);
            let mut volts: Vec<Option<f64>> = vec![None; drawing.cells.len()];
            for plate in drawing.plates.iter().filter(|plate| plate.words.contains('−')) {
                let (cell, pole) = post_at(&drawing, plate.post);
                assert_eq!(pole, Pole::Minus);
                volts[cell] = Some(3.3);
            }
            for _ in 0..drawing.cells.len() {
                for bar in &drawing.bars {
                    let [a, b] = bar.ends.map(|end| post_at(&drawing, end));
                    assert_eq!(a.1 == b.1, bar.beside, "like to like only beside one another");
                    assert_eq!([a, b].map(|(_, pole)| pole.sign()), bar.signs, "{case:?}");
                    for ((from, pole), (to, other)) in [(a, b), (b, a)] {
                        let Some(known) = volts[from] else { continue };
                        let post = if pole == Pole::Plus { known } else { known - 3.3 };
                        let plus = if other == Pole::Plus { post } else { post + 3.3 };
                        assert!(
                            volts[to].is_none_or(|before| (before - plus).abs() < 1e-6),
                            "{case:?} a short circuit"
                        );
                        volts[to] = Some(plus);
                    }
                }
            }
            for (cell, volts) in drawing.cells.iter().zip(&volts) {
                assert_eq!(cell.volts, format!("{:.1}", volts.expect("every cell is reached")), "{case:?}");
                assert_eq!(cell.past, volts.unwrap() / 3.3 * 3.4 > 60.0, "{case:?}");
            }
            for plate in drawing.plates.iter().filter(|plate| plate.words.contains('+')) {
                let (cell, pole) = post_at(&drawing, plate.post);
                assert_eq!(pole, Pole::Plus);
                assert!(plate.words.contains(&drawing.cells[cell].volts), "{case:?}");
            }
        }
    }

    #[test]
    fn the_band_is_at_the_plus_end_and_posts_stand_where_the_turn_brings_them() {
        for case in CASES {
            let (layout, drawing) = drawn(*case);
            for (cell, place) in drawing.cells.iter().zip(&layout.places) {
                let [plus, minus] = cell.posts;
                let middle = (cell.band[0] + cell.band[2] / 2.0, cell.band[1] + cell.band[3] / 2.0);
                let far = |post: At| (post.0 - middle.0).hypot(post.1 - middle.1);
                assert!(far(plus) < far(minus), "{case:?}");
                if (case.2, place.turn) == (Posts::Ends, Turn::None) {
                    assert!(plus.1 < minus.1 && plus.0 == minus.0, "plus at the back");
                }
                if (case.2, place.turn) == (Posts::Ends, Turn::Quarter) {
                    assert!(plus.0 > minus.0 && plus.1 == minus.1, "plus at the right");
                }
            }
        }
    }

    #[test]
    fn numbers_and_volts_stand_clear_of_the_bars_of_cells_with_a_post_at_each_end() {
        for case in CASES.iter().filter(|case| case.2 == Posts::Ends && case.3 == Stand::SideBySide) {
            let (_, drawing) = drawn(*case);
            for cell in &drawing.cells {
                let [x, y, w, h] = cell.area;
                // Two lines of figures about the middle.
                let figures = [x, y + h / 2.0 - 13.0, w, 26.0];
                for bar in &drawing.bars {
                    let [a, b] = bar.ends;
                    if a.0 != b.0 && a.1 != b.1 {
                        // One across a cell, where posts are to stand apart: the figures then stand on top.
                        continue;
                    }
                    let half = BAR / 2.0;
                    let (left, top) = (a.0.min(b.0) - half, a.1.min(b.1) - half);
                    let area = [left, top, (a.0 - b.0).abs() + BAR, (a.1 - b.1).abs() + BAR];
                    assert!(!overlap(figures, area), "{case:?} bar {} on cell {}", bar.number, cell.cell);
                }
            }
        }
    }
}
