//! The shelf: where each cell of a bank stands, how it is turned, and which link goes where.
//!
//! Cells stand on rows and columns. A string is a way over neighbouring places; each link joins two neighbours, so no
//! link can cross one of another string. [`lay_out`] looks for the way and the turns of least [`Cost`], and never
//! returns one that costs more than the plain back-and-forth along the rows with its cells turned as well as can be.
//!
//! Up to 64 places a branch-and-bound search is tried first; where it comes to its end the layout is
//! [`Proof::Least`], and says so. Measured with its share of work: one string, two turns, every wish of the take-off,
//! up to 6 × 6 and 4 × 10; two strings up to 4 × 8; all four turns up to 4 × 6, and not always at 6 × 6. Five strings on
//! 4 × 10 are too many. Beyond, a local search works from the best way known.
//!
//! A one-row shelf cannot bring both take-off posts to one side, as no link skips a cell.

mod asked;
mod board;
mod cell;
mod cost;
mod exact;
mod fitting;
mod ground;
mod layout;
mod local;
mod reading;
mod refused;
mod turns;
mod wiring;

pub use asked::{Asked, Lacks, asked, assumption, usual};
pub use board::{MOST_PLACES, Shelf, Stand};
pub use cell::{Cell, CellVolts, PlusOn, Pole, Posts, Spot, Turn};
pub use cost::Cost;
pub use fitting::{BURNS, Caution, Meter, Step, steps};
pub use layout::{Barrier, Cut, Ends, Layout, Link, LinkKind, Lug, Place, Remark, Touch};
pub use reading::{Says, judged, says};
pub use refused::ShelfError;
pub use wiring::{ADVICE, Advice, Family, Parallel, TakeOff, Wiring, advice};

use crate::quantity::Metres;
use ground::Ground;
use turns::{Walk, Walked};

/// How much the exact search may do, in partly turned layouts looked at. *Chosen*: a tenth to
/// half of a second natively.
const EXACT_WORK: u64 = 2_000_000;

/// How much the local search may do, in the same measure. *Chosen*: about a fifth of a second
/// natively.
const LOCAL_WORK: u64 = 2_500_000;

/// How far the search for a layout went.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Proof {
    /// No layout with links between neighbours costs less.
    Least,
    /// The best that was found; a better one may exist.
    Found,
}

/// What is wanted of a layout beside the wiring itself.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Wish {
    /// Where the take-off posts should be.
    pub take_off: TakeOff,
    /// What a link is longer than from hole to hole, both ends together.
    pub allowance: Metres,
    /// Where the local search's chances come from. The same seed gives the same layout.
    pub seed: u64,
}

impl Default for Wish {
    /// Anywhere; 20 mm more than hole to hole, which leaves a 20 mm bar 10 mm beyond each hole's middle (*chosen*).
    fn default() -> Self {
        Self { take_off: TakeOff::Anywhere, allowance: Metres::new(0.020), seed: 1 }
    }
}

/// The layout of least cost that is found.
///
/// # Errors
///
/// [`ShelfError::TooFewPlaces`]; [`ShelfError::NotAGap`] where the allowance is negative.
///
/// # Example
///
/// ```
/// use engine::quantity::{Metres, Volts};
/// use engine::shelf::{Cell, CellVolts, Parallel, Posts, Shelf, Stand, Wiring, Wish, lay_out};
///
/// let mm = |mm: f64| Metres::new(mm / 1000.0);
/// let cell = Cell::new(mm(174.0), mm(72.0), Posts::Ends, mm(26.0))?;
/// let shelf = Shelf::new(1, 5, cell, Stand::SideBySide, mm(2.0), mm(60.0))?;
/// let wiring = Wiring::new(5, 1, Parallel::SeparateStrings)?;
/// let volts = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.35))?;
///
/// let layout = lay_out(&shelf, &wiring, volts, Wish::default())?;
/// assert_eq!(layout.links.len(), 4);
/// assert!((layout.hole_to_hole().get() - 4.0 * 0.074).abs() < 1e-9);
/// # Ok::<(), engine::shelf::ShelfError>(())
/// ```
pub fn lay_out(shelf: &Shelf, wiring: &Wiring, volts: CellVolts, wish: Wish) -> Result<Layout, ShelfError> {
    let cells = wiring.cells_on(shelf)?;
    let allowance = refused::gap("allowance", wish.allowance)?;
    let ground = Ground::new(shelf, wiring, cells, wish.take_off);
    let plain = walked(&ground, &snake(&ground, Start { by_columns: false, right: false, front: false }));
    let mut best = plain.clone();
    for start in Start::all() {
        let mut places = snake(&ground, start);
        for _ in 0..2 {
            let tried = walked(&ground, &places);
            if tried.cost < best.cost {
                best = tried;
            }
            places.reverse();
        }
    }
    let (mut best, mut ended) = exact::better(&ground, best, EXACT_WORK);
    if ended == exact::Ended::OutOfWork {
        let before = best.cost;
        best = local::better(&ground, best, wish.seed, LOCAL_WORK);
        if best.cost < before {
            // A tighter bound may let the search come to its end.
            (best, ended) = exact::better(&ground, best, EXACT_WORK);
        }
    }
    let proof = match ended {
        exact::Ended::Proven => Proof::Least,
        exact::Ended::OutOfWork => Proof::Found,
    };
    Ok(layout::describe(&ground, shelf, wiring, volts, allowance, &best, plain.cost, proof))
}

fn walked(ground: &Ground, places: &[usize]) -> Walked {
    Walk::new(ground).through(places).unwrap_or_else(|| Walked {
        // Cannot be reached: a back-and-forth takes every place once. Kept so that nothing can panic.
        cost: Cost { over_posts: u32::MAX, ..Cost::default() },
        places: places.to_vec(),
        turns: vec![ground.turns[0]; places.len()],
    })
}

/// Where a back-and-forth begins.
#[derive(Clone, Copy)]
struct Start {
    by_columns: bool,
    right: bool,
    front: bool,
}

impl Start {
    fn all() -> impl Iterator<Item = Self> {
        (0..8).map(|bits| Self { by_columns: bits & 4 != 0, right: bits & 2 != 0, front: bits & 1 != 0 })
    }
}

/// Back and forth over the shelf, as many places as there are cells.
fn snake(ground: &Ground, start: Start) -> Vec<usize> {
    let (lines, along) = if start.by_columns { (ground.columns, ground.rows) } else { (ground.rows, ground.columns) };
    let mut places = Vec::with_capacity(lines * along);
    for line in 0..lines {
        for step in 0..along {
            let step = if line % 2 == 0 { step } else { along - 1 - step };
            let (row, column) = if start.by_columns { (step, line) } else { (line, step) };
            let row = if start.front { ground.rows - 1 - row } else { row };
            let column = if start.right { ground.columns - 1 - column } else { column };
            places.push(row * ground.columns + column);
        }
    }
    places.truncate(ground.joints.len());
    places
}
