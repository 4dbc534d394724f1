//! The ground of the picture: how large cells are drawn, where rows stand, and the lanes between them. Pure.

use engine::shelf::{Layout, Place, Pole, Posts, Shelf, Stand};

/// The picture is at least this wide.
const WIDE: f64 = 296.0;
const EDGE: f64 = 8.0;
/// A plate is this high.
pub const PLATE: f64 = 18.0;
/// Room for a row of plates.
const PLATES: f64 = PLATE + 3.0;
/// Between two rows of cells, beside plates: room for the number on a bar across it.
const LANE: f64 = 16.0;
/// A post's middle from the edge of its cell.
const INSET: At = (10.0, 11.0);

/// A point.
pub type At = (f64, f64);

/// A rectangle: left, top, width, height.
pub type Area = [f64; 4];

/// The ground.
#[derive(Clone, Debug, PartialEq)]
pub struct Board {
    /// Width and height of the picture.
    pub size: At,
    /// The board.
    pub area: Area,
    pitch: f64,
    lying: At,
    upright: At,
    row_high: f64,
    left: f64,
    lanes: Vec<Lane>,
}

/// The room above a row, and below the last: plates of the row above it at its top, of the row below it at its foot.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
struct Lane {
    top: f64,
    high: f64,
    plates: [bool; 2],
}

impl Board {
    /// The ground for `layout` on `shelf`.
    pub fn of(shelf: &Shelf, layout: &Layout) -> Self {
        let (length, width) = (shelf.cell().length().get(), shelf.cell().width().get());
        // Poles side by side, or at the ends of a lying cell, need more than a number does.
        let (across, least) = match (shelf.stand(), shelf.cell().posts()) {
            (Stand::SideBySide, Posts::Ends) => (width, 30.0),
            (Stand::SideBySide, _) => (width, 44.0),
            (Stand::EndToEnd, _) => (length, 68.0),
            (Stand::EitherWay, _) => (length.max(width), 76.0),
        };
        let columns = f64::from(shelf.columns());
        let pitch = ((WIDE - 2.0 * EDGE) / columns).clamp(least, 76.0);
        let scale = (pitch - 2.0) / across;
        let lying = ((length * scale).min(pitch - 2.0), (width * scale).clamp(54.0, 112.0));
        let upright = ((width * scale).clamp(28.0, pitch - 2.0), (length * scale).clamp(76.0, 112.0));
        let row_high = match shelf.stand() {
            Stand::SideBySide => upright.1,
            Stand::EndToEnd => lying.1,
            Stand::EitherWay => upright.1.max(lying.1),
        };
        let wide = (pitch * columns + 2.0 * EDGE).max(WIDE);
        let left = (wide - pitch * columns) / 2.0;
        let lanes = vec![Lane::default(); shelf.rows() as usize + 1];
        let mut board = Self { size: (wide, 0.0), area: [0.0; 4], pitch, lying, upright, row_high, left, lanes };
        for lug in layout.ends.iter().flat_map(|ends| [ends.minus, ends.plus]) {
            if let Some(place) = layout.place(lug.cell) {
                let (lane, side) = board.lane(place, lug.pole);
                board.lanes[lane].plates[side] = true;
            }
        }
        let last = board.lanes.len() - 1;
        let mut y = 2.0;
        for (index, lane) in board.lanes.iter_mut().enumerate() {
            let [above, below] = lane.plates.map(f64::from);
            lane.top = y;
            lane.high = (above + below) * PLATES + if index == 0 || index == last { EDGE } else { LANE };
            y += lane.high + row_high;
        }
        let (first, end) = (board.row(0), y - row_high);
        board.size.1 = end + 2.0;
        board.area = [left - 5.0, first - 5.0, pitch * columns + 10.0, board.lanes[last].top - first + 10.0];
        board
    }

    /// Where row `row` begins.
    fn row(&self, row: usize) -> f64 {
        let Lane { top, high, .. } = self.lanes[row];
        top + high
    }

    /// The middle of a place.
    fn middle(&self, row: u32, column: u32) -> At {
        (self.left + self.pitch * (f64::from(column) + 0.5), self.row(row as usize) + self.row_high / 2.0)
    }

    fn size_of(&self, place: &Place) -> At {
        if place.turn.lies_along_the_row() { self.lying } else { self.upright }
    }

    /// Where a cell stands.
    pub fn cell(&self, place: &Place) -> Area {
        around(self.middle(place.row, place.column), self.size_of(place))
    }

    /// Where a post stands from its cell's middle: at the edges it is nearest to.
    fn off(&self, place: &Place, pole: Pole) -> At {
        let spot = place.post(pole);
        let (wide, high) = self.size_of(place);
        let [x, y] = [spot.across - place.middle.across, spot.forward - place.middle.forward].map(|off| {
            let off = off.get();
            if off.abs() < 1e-6 { 0.0 } else { off.signum() }
        });
        (x * (wide / 2.0 - INSET.0), y * (high / 2.0 - INSET.1))
    }

    /// Where a post stands.
    pub fn post(&self, place: &Place, pole: Pole) -> At {
        let ((x, y), (dx, dy)) = (self.middle(place.row, place.column), self.off(place, pole));
        (x + dx, y + dy)
    }

    /// In which lane the plate of a post stands, and on which side of it: at its top, or at its foot.
    fn lane(&self, place: &Place, pole: Pole) -> (usize, usize) {
        let (row, down) = (place.row as usize, self.off(place, pole).1);
        if down > 0.0 || down == 0.0 && row * 2 + 1 >= self.lanes.len() { (row + 1, 0) } else { (row, 1) }
    }

    /// The top of the plate of a post.
    pub fn plate(&self, place: &Place, pole: Pole) -> f64 {
        let (lane, side) = self.lane(place, pole);
        if side == 0 { self.lanes[lane].top + 2.0 } else { self.row(lane) - PLATE - 2.0 }
    }

    /// A line between two neighbours.
    pub fn between(&self, one: &Place, other: &Place) -> [At; 2] {
        let (a, b) = (self.middle(one.row, one.column), self.middle(other.row, other.column));
        if one.row == other.row {
            let (x, half) = (f64::midpoint(a.0, b.0), self.row_high / 2.0);
            return [(x, a.1 - half), (x, a.1 + half)];
        }
        // Between the plates of the row above and those of the row below.
        let lane = self.lanes[one.row.max(other.row) as usize];
        let y = lane.top + f64::from(lane.plates[0]) * PLATES + LANE / 2.0;
        [(a.0 - self.pitch / 2.0, y), (a.0 + self.pitch / 2.0, y)]
    }

    /// Places without a cell.
    pub fn free(&self, layout: &Layout) -> Vec<Area> {
        let columns = ((self.size.0 - 2.0 * self.left) / self.pitch).round() as u32;
        let mut free = Vec::new();
        for row in 0..self.lanes.len() as u32 - 1 {
            for column in 0..columns {
                if !layout.places.iter().any(|place| (place.row, place.column) == (row, column)) {
                    free.push(around(self.middle(row, column), (self.pitch - 2.0, self.row_high)));
                }
            }
        }
        free
    }
}

fn around((x, y): At, (wide, high): At) -> Area {
    [x - wide / 2.0, y - high / 2.0, wide, high]
}
