//! One cell or block, seen from above: its size, where its posts stand, and how it is turned.

use super::refused::{self, ShelfError};
use crate::quantity::{Metres, Volts};

/// Plus or minus.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Pole {
    /// The positive post.
    Plus,
    /// The negative post.
    Minus,
}

impl Pole {
    /// The sign on the post.
    #[must_use]
    pub const fn sign(self) -> &'static str {
        match self {
            Self::Plus => "+",
            Self::Minus => "−",
        }
    }

    /// The word.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Plus => "plus",
            Self::Minus => "minus",
        }
    }
}

/// On which hand the plus post is, as one looks at the cell with its posts' edge nearest.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum PlusOn {
    /// Plus on the left.
    Left,
    /// Plus on the right.
    Right,
}

/// Where the posts stand on a cell's top. Length is the side named so, whichever is longer.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Posts {
    /// One at each end of the length, on the centre line.
    Ends,
    /// Both along one long edge.
    LongEdge(PlusOn),
    /// Side by side at one end of the length.
    ShortEdge(PlusOn),
    /// In opposite corners; looked at from the minus end, plus is at the far corner on this hand.
    Diagonal(PlusOn),
}

/// How far a cell is turned, clockwise seen from above.
///
/// Unturned: length from back to front. [`Posts::Ends`] and [`Posts::Diagonal`] have plus at the back,
/// [`Posts::ShortEdge`] has both at the front, [`Posts::LongEdge`] has both at the left.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Turn {
    /// Not turned.
    None,
    /// 90°.
    Quarter,
    /// 180°.
    Half,
    /// 270°.
    ThreeQuarters,
}

impl Turn {
    /// All four.
    pub const ALL: [Self; 4] = [Self::None, Self::Quarter, Self::Half, Self::ThreeQuarters];

    /// In degrees, clockwise seen from above.
    #[must_use]
    pub const fn degrees(self) -> u32 {
        90 * self as u32
    }

    /// Whether the length now runs along the row.
    #[must_use]
    pub const fn lies_along_the_row(self) -> bool {
        matches!(self, Self::Quarter | Self::ThreeQuarters)
    }
}

/// A point on the shelf or on a cell, seen from above.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Spot {
    /// Along the rows, to the right.
    pub across: Metres,
    /// From back to front.
    pub forward: Metres,
}

impl Spot {
    pub(super) const fn new(across: f64, forward: f64) -> Self {
        Self { across: Metres::new(across), forward: Metres::new(forward) }
    }

    /// The straight distance to `other`.
    #[must_use]
    pub fn distance(self, other: Self) -> Metres {
        let (dx, dy) = (self.across - other.across, self.forward - other.forward);
        Metres::new(dx.get().hypot(dy.get()))
    }

    pub(super) fn moved(self, by: Self) -> Self {
        Self { across: self.across + by.across, forward: self.forward + by.forward }
    }

    /// Turned about the cell's middle; with `forward` pointing down the page, (x, y) goes to (−y, x).
    fn turned(self, turn: Turn) -> Self {
        let Self { across, forward } = self;
        match turn {
            Turn::None => self,
            Turn::Quarter => Self { across: -forward, forward: across },
            Turn::Half => Self { across: -across, forward: -forward },
            Turn::ThreeQuarters => Self { across: forward, forward: -across },
        }
    }
}

/// A cell or block as it stands on the shelf.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Cell {
    length: Metres,
    width: Metres,
    posts: Posts,
    inset: Metres,
}

impl Cell {
    /// A cell `length` by `width`, its posts `inset` from the edges they stand at, to the middle of the post.
    ///
    /// # Errors
    ///
    /// [`ShelfError::NotALength`]; [`ShelfError::PostsMeet`] where the inset is half of the side or more.
    pub fn new(length: Metres, width: Metres, posts: Posts, inset: Metres) -> Result<Self, ShelfError> {
        let length = refused::length("cell length", length)?;
        let width = refused::length("cell width", width)?;
        let inset = refused::length("post from the edge", inset)?;
        let below = match posts {
            Posts::Ends => length / 2.0,
            Posts::LongEdge(_) | Posts::ShortEdge(_) | Posts::Diagonal(_) => length.min(width) / 2.0,
        };
        if inset >= below {
            return Err(ShelfError::PostsMeet { inset, below });
        }
        Ok(Self { length, width, posts, inset })
    }

    /// Its length.
    #[must_use]
    pub const fn length(&self) -> Metres {
        self.length
    }

    /// Its width.
    #[must_use]
    pub const fn width(&self) -> Metres {
        self.width
    }

    /// Where its posts stand.
    #[must_use]
    pub const fn posts(&self) -> Posts {
        self.posts
    }

    /// Where `pole` stands from the cell's middle, once turned.
    #[must_use]
    pub fn post(&self, pole: Pole, turn: Turn) -> Spot {
        let side = (self.width / 2.0 - self.inset).get();
        let end = (self.length / 2.0 - self.inset).get();
        let (plus, minus) = match self.posts {
            Posts::Ends => ((0.0, -end), (0.0, end)),
            // Seen from the left, the left hand is at the back.
            Posts::LongEdge(PlusOn::Left) => ((-side, -end), (-side, end)),
            Posts::LongEdge(PlusOn::Right) => ((-side, end), (-side, -end)),
            Posts::ShortEdge(PlusOn::Left) => ((-side, end), (side, end)),
            Posts::ShortEdge(PlusOn::Right) => ((side, end), (-side, end)),
            Posts::Diagonal(PlusOn::Left) => ((-side, -end), (side, end)),
            Posts::Diagonal(PlusOn::Right) => ((side, -end), (-side, end)),
        };
        let (across, forward) = match pole {
            Pole::Plus => plus,
            Pole::Minus => minus,
        };
        Spot::new(across, forward).turned(turn)
    }
}

/// What one cell reads at rest: between which values, and what is likely.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct CellVolts {
    lowest: Volts,
    expected: Volts,
    highest: Volts,
}

impl CellVolts {
    /// From lowest through expected to highest.
    ///
    /// # Errors
    ///
    /// [`ShelfError::VoltsOutOfOrder`].
    pub fn new(lowest: Volts, expected: Volts, highest: Volts) -> Result<Self, ShelfError> {
        let rising = lowest.get() > 0.0 && lowest <= expected && expected <= highest && highest.get().is_finite();
        if rising { Ok(Self { lowest, expected, highest }) } else { Err(ShelfError::VoltsOutOfOrder) }
    }

    /// The lowest a sound cell may read.
    #[must_use]
    pub const fn lowest(&self) -> Volts {
        self.lowest
    }

    /// What it most likely reads.
    #[must_use]
    pub const fn expected(&self) -> Volts {
        self.expected
    }

    /// The highest a sound cell may read.
    #[must_use]
    pub const fn highest(&self) -> Volts {
        self.highest
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn at(posts: Posts, pole: Pole, turn: Turn) -> (f64, f64) {
        let cell = Cell::new(Metres::new(0.200), Metres::new(0.100), posts, Metres::new(0.020)).unwrap();
        let spot = cell.post(pole, turn);
        ((spot.across.get() * 1e3).round(), (spot.forward.get() * 1e3).round())
    }

    #[test]
    fn half_a_turn_brings_every_post_to_the_opposite_point() {
        for posts in
            [Posts::Ends, Posts::LongEdge(PlusOn::Left), Posts::ShortEdge(PlusOn::Right), Posts::Diagonal(PlusOn::Left)]
        {
            for pole in [Pole::Plus, Pole::Minus] {
                let (x, y) = at(posts, pole, Turn::None);
                assert_eq!(at(posts, pole, Turn::Half), (-x, -y));
            }
        }
    }

    #[test]
    fn a_quarter_turn_is_clockwise_seen_from_above() {
        // Plus at the back goes to the right.
        assert_eq!(at(Posts::Ends, Pole::Plus, Turn::None), (0.0, -80.0));
        assert_eq!(at(Posts::Ends, Pole::Plus, Turn::Quarter), (80.0, 0.0));
        // Both at the front, plus on the left: both at the left, plus at the back.
        assert_eq!(at(Posts::ShortEdge(PlusOn::Left), Pole::Plus, Turn::Quarter), (-80.0, -30.0));
        assert_eq!(at(Posts::ShortEdge(PlusOn::Left), Pole::Minus, Turn::Quarter), (-80.0, 30.0));
    }

    #[test]
    fn posts_that_would_meet_are_refused() {
        let new = |inset, posts| Cell::new(Metres::new(0.2), Metres::new(0.1), posts, Metres::new(inset));
        assert!(new(0.06, Posts::Ends).is_ok());
        assert_eq!(
            new(0.06, Posts::Diagonal(PlusOn::Left)).unwrap_err(),
            ShelfError::PostsMeet { inset: Metres::new(0.06), below: Metres::new(0.05) }
        );
        assert!(matches!(new(f64::NAN, Posts::Ends), Err(ShelfError::NotALength { .. })));
    }
}
