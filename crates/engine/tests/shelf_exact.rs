//! The search for a layout against trying every way and every turn, with the cost counted afresh from its definition.

use engine::quantity::{Metres, Volts};
use engine::shelf::{
    Cell, CellVolts, Cost, Parallel, PlusOn, Pole, Posts, Proof, Shelf, Stand, TakeOff, Turn, Wiring, Wish, lay_out,
};

type Point = (f64, f64);
type Standing = (u32, u32, Turn);

fn mm(number: f64) -> Metres {
    Metres::new(number / 1000.0)
}

struct Trial<'a> {
    shelf: &'a Shelf,
    series: usize,
    strings: usize,
    take_off: TakeOff,
    least: Option<Cost>,
}

fn aside(p: Point, a: Point, b: Point) -> f64 {
    let (dx, dy) = (b.0 - a.0, b.1 - a.1);
    let along = (((p.0 - a.0) * dx + (p.1 - a.1) * dy) / (dx * dx + dy * dy)).clamp(0.0, 1.0);
    (p.0 - a.0 - along * dx).hypot(p.1 - a.1 - along * dy)
}

fn cross((a, b): (Point, Point), (c, d): (Point, Point)) -> bool {
    let side = |p: Point, q: Point, r: Point| (q.0 - p.0) * (r.1 - p.1) - (q.1 - p.1) * (r.0 - p.0);
    side(a, b, c) * side(a, b, d) < 0.0 && side(c, d, a) * side(c, d, b) < 0.0
}

impl Trial<'_> {
    /// In millimetres.
    fn post(&self, (row, column, turn): Standing, pole: Pole) -> Point {
        let (middle, post) = (self.shelf.middle(row, column), self.shelf.cell().post(pole, turn));
        ((middle.across + post.across).get() * 1e3, (middle.forward + post.forward).get() * 1e3)
    }

    fn go(&mut self, way: &mut Vec<Standing>) {
        if way.len() == self.series * self.strings {
            let cost = self.cost(way);
            self.least = Some(self.least.map_or(cost, |least| least.min(cost)));
            return;
        }
        let new_string = way.len().is_multiple_of(self.series);
        for (row, column) in (0..self.shelf.rows()).flat_map(|r| (0..self.shelf.columns()).map(move |c| (r, c))) {
            let taken = way.iter().any(|&(r, c, _)| (r, c) == (row, column));
            let far = way.last().is_some_and(|&(r, c, _)| r.abs_diff(row) + c.abs_diff(column) != 1);
            if taken || far && !new_string {
                continue;
            }
            for &turn in self.shelf.stand().turns() {
                way.push((row, column, turn));
                self.go(way);
                way.pop();
            }
        }
    }

    /// As the documentation says it: every link against every post and every other link.
    fn cost(&self, way: &[Standing]) -> Cost {
        let pairs = way.chunks(self.series).flat_map(|string| string.windows(2));
        let links: Vec<(Point, Point)> =
            pairs.map(|p| (self.post(p[0], Pole::Plus), self.post(p[1], Pole::Minus))).collect();
        let mut cost = Cost::default();
        let mut lengths: Vec<i64> = Vec::new();
        for (i, &(a, b)) in links.iter().enumerate() {
            let length = (b.0 - a.0).hypot(b.1 - a.1);
            cost.copper += (length * 1e3).round() as u64;
            lengths.push(length.round() as i64);
            let posts = way.iter().flat_map(|&cell| [Pole::Plus, Pole::Minus].map(|pole| self.post(cell, pole)));
            let own = |p: Point| (p.0 - a.0).hypot(p.1 - a.1) < 1e-6 || (p.0 - b.0).hypot(p.1 - b.1) < 1e-6;
            cost.over_posts += posts.filter(|&p| !own(p) && aside(p, a, b) < 10.0).count() as u32;
            cost.over_posts += links[..i].iter().filter(|&&other| cross((a, b), other)).count() as u32;
        }
        lengths.sort_unstable();
        lengths.dedup();
        let pitch = self.shelf.pitch_in_row().min(self.shelf.pitch_of_rows());
        cost.copper += lengths.len().saturating_sub(1) as u64 * (pitch.get() * 1e6).round() as u64;
        let (mut one, mut other) = (0, 0);
        for string in way.chunks(self.series) {
            let (first, last) = (string[0], string[string.len() - 1]);
            let (a, b) = (self.post(first, Pole::Minus), self.post(last, Pole::Plus));
            let near = first.0.abs_diff(last.0) <= 1 && first.1.abs_diff(last.1) <= 1;
            let reach = (a.0 - b.0).hypot(a.1 - b.1) < 250.0;
            cost.under_one_wrench += u32::from(self.series > 1 && (near || reach));
            let right = self.shelf.columns() - 1;
            let off = |cell: Standing, column: u32| u32::from(cell.1 != column);
            let (for_one, for_other) = match self.take_off {
                TakeOff::Anywhere => (0, 0),
                TakeOff::SameSide => (off(first, 0) + off(last, 0), off(first, right) + off(last, right)),
                TakeOff::OppositeEnds => (off(first, 0) + off(last, right), off(first, right) + off(last, 0)),
                TakeOff::Front => {
                    let front = |cell: Standing| u32::from(cell.0 + 1 != self.shelf.rows());
                    (front(first) + front(last), front(first) + front(last))
                }
            };
            one += for_one;
            other += for_other;
        }
        cost.take_off_missed = one.min(other);
        cost
    }
}

#[track_caller]
fn check(shelf: &Shelf, series: u32, strings: u32) {
    let volts = CellVolts::new(Volts::new(3.20), Volts::new(3.30), Volts::new(3.35)).unwrap();
    let wiring = Wiring::new(series, strings, Parallel::SeparateStrings).unwrap();
    for take_off in [TakeOff::Anywhere, TakeOff::SameSide, TakeOff::OppositeEnds, TakeOff::Front] {
        let layout = lay_out(shelf, &wiring, volts, Wish { take_off, ..Wish::default() }).unwrap();
        assert_eq!(layout.proof, Proof::Least);
        let mut trial = Trial { shelf, series: series as usize, strings: strings as usize, take_off, least: None };
        trial.go(&mut Vec::new());
        // Each length is rounded to a millionth of a metre on either side.
        let least = trial.least.unwrap();
        let close = layout.cost.copper.abs_diff(least.copper) <= u64::from(series * strings);
        assert_eq!(Cost { copper: 0, ..layout.cost }, Cost { copper: 0, ..least }, "{take_off:?}");
        assert!(close, "{take_off:?}: found {:?}, least {least:?}", layout.cost);
    }
}

fn shelf(rows: u32, columns: u32, posts: Posts, stand: Stand) -> Shelf {
    let cell = Cell::new(mm(174.0), mm(82.0), posts, mm(24.0)).unwrap();
    Shelf::new(rows, columns, cell, stand, mm(3.0), mm(60.0)).unwrap()
}

#[test]
fn one_string_with_posts_at_the_ends() {
    check(&shelf(1, 5, Posts::Ends, Stand::SideBySide), 5, 1);
    check(&shelf(2, 4, Posts::Ends, Stand::SideBySide), 8, 1);
    check(&shelf(3, 2, Posts::Ends, Stand::EndToEnd), 6, 1);
}

#[test]
fn one_string_with_posts_along_an_edge_or_in_corners() {
    check(&shelf(2, 4, Posts::LongEdge(PlusOn::Left), Stand::SideBySide), 8, 1);
    check(&shelf(3, 3, Posts::ShortEdge(PlusOn::Right), Stand::SideBySide), 6, 1);
    check(&shelf(2, 3, Posts::Diagonal(PlusOn::Right), Stand::EndToEnd), 6, 1);
}

#[test]
fn cells_that_may_turn_either_way() {
    check(&shelf(2, 2, Posts::Diagonal(PlusOn::Left), Stand::EitherWay), 4, 1);
    check(&shelf(1, 4, Posts::LongEdge(PlusOn::Right), Stand::EitherWay), 4, 1);
}

#[test]
fn two_and_three_strings() {
    check(&shelf(2, 3, Posts::Ends, Stand::SideBySide), 3, 2);
    check(&shelf(2, 3, Posts::Diagonal(PlusOn::Left), Stand::SideBySide), 2, 3);
    check(&shelf(3, 2, Posts::LongEdge(PlusOn::Left), Stand::SideBySide), 2, 2);
}
