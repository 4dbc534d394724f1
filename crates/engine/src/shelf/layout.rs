//! What a found layout says: places, links, take-off posts, lengths to cut, barriers and remarks.

use super::board::Shelf;
use super::cell::{CellVolts, Pole, Spot, Turn};
use super::cost::{Cost, WRENCH_MM};
use super::ground::{Ground, Joint};
use super::turns::Walked;
use super::wiring::{TakeOff, Wiring};
use super::{Proof, Stand};
use crate::order::sort_short;
use crate::quantity::{Metres, Volts};

/// Above this a direct voltage is dangerous to touch, in the dry.
///
/// # Source
///
/// The limit of 60 V ripple-free for extra-low voltage that may be touched in normally dry places,
/// [`crate::source::IEC_60364_4_41`], 414.4.5; written down from memory.
pub(super) const TOUCH: Volts = Volts::new(60.0);

/// Posts further apart than this in volts ask for a barrier. *Chosen*: the limit of touch in the wet; half of the
/// string where that is less, which is what the link fitted last keeps apart.
const BARRIER: Volts = Volts::new(30.0);

/// One post of one cell.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub struct Lug {
    /// The cell's number, from 1.
    pub cell: u32,
    /// Which of its posts.
    pub pole: Pole,
}

/// One cell as it stands.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Place {
    /// The cell's number, from 1: along the first string, then along the second.
    pub cell: u32,
    /// Row, 0 at the back.
    pub row: u32,
    /// Column, 0 at the left.
    pub column: u32,
    /// Its middle.
    pub middle: Spot,
    /// How it is turned.
    pub turn: Turn,
    /// Its plus post.
    pub plus: Spot,
    /// Its minus post.
    pub minus: Spot,
    /// Its string, from 1. Always 1 with groups.
    pub string: u32,
    /// Its position in the string, from 1 at the minus end; with groups, its group.
    pub position: u32,
    /// Its place in its group, from 1. Always 1 with separate strings.
    pub beside: u32,
}

impl Place {
    /// Where a post stands.
    #[must_use]
    pub const fn post(&self, pole: Pole) -> Spot {
        match pole {
            Pole::Plus => self.plus,
            Pole::Minus => self.minus,
        }
    }
}

/// What a link does.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum LinkKind {
    /// Plus to minus.
    Series,
    /// Like to like, within a group.
    Parallel,
}

/// Where a link stands to the limit of touch, 60 V, judged by the highest a cell may read.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Touch {
    /// The string stays below up to here.
    Below,
    /// This link takes it past.
    Passes,
    /// It is past already.
    Above,
}

/// One link.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Link {
    /// In the order to fit, from 1.
    pub number: u32,
    /// What it does.
    pub kind: LinkKind,
    /// One end; the plus post where it joins in series.
    pub from: Lug,
    /// The other end.
    pub to: Lug,
    /// From hole to hole.
    pub hole_to_hole: Metres,
    /// To cut, to the whole millimetre upwards.
    pub cut: Metres,
    /// The string it belongs to, from 1.
    pub string: u32,
    /// The position or group after which it comes in series; the group it joins where it is parallel.
    pub after: u32,
    /// From the string's minus post to this link, once the string is whole.
    pub stands_at: Volts,
    /// From the string's minus post to the plus post of the cell it adds, once all links up to there are fitted.
    pub running: Volts,
    /// Against the limit of touch.
    pub touch: Touch,
    /// Whether it is the string's last: it joins the two halves.
    pub fitted_last: bool,
    /// How many cells' current it carries at most.
    pub carries: u32,
}

/// The two take-off posts of a string.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Ends {
    /// The string, from 1.
    pub string: u32,
    /// The minus post.
    pub minus: Lug,
    /// Where it stands.
    pub minus_at: Spot,
    /// The plus post.
    pub plus: Lug,
    /// Where it stands.
    pub plus_at: Spot,
    /// The whole string between them, as expected.
    pub volts: Volts,
    /// Whether one tool may bridge them.
    pub under_one_wrench: bool,
}

/// Links of one length.
#[derive(Clone, Debug, PartialEq)]
pub struct Cut {
    /// From hole to hole, to the millimetre.
    pub hole_to_hole: Metres,
    /// To cut: the longest of them.
    pub cut: Metres,
    /// Their numbers.
    pub links: Vec<u32>,
}

/// Two neighbouring cells with posts far apart in volts and near one another: a barrier belongs between them.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Barrier {
    /// The one cell.
    pub one: u32,
    /// The other.
    pub other: u32,
    /// The greatest difference between two posts that one tool could bridge, as expected.
    pub volts: Volts,
}

/// What could not be had.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Remark {
    /// So many take-off posts stand elsewhere than wanted.
    TakeOffMissed(u32),
    /// The string's two take-off posts stand where one tool can bridge them.
    UnderOneWrench {
        /// The string, from 1.
        string: u32,
        /// Whether that was proven unavoidable with this wish.
        unavoidable: bool,
    },
    /// So many links pass over a post that they do not join, or over another link: use insulated cable there.
    OverPosts(u32),
}

impl core::fmt::Display for Remark {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match self {
            Self::TakeOffMissed(1) => write!(f, "One take-off post stands elsewhere than wanted."),
            Self::TakeOffMissed(many) => write!(f, "{many} take-off posts stand elsewhere than wanted."),
            Self::UnderOneWrench { string, unavoidable } => {
                let why = if *unavoidable { "This shelf allows no better" } else { "No better was found" };
                write!(
                    f,
                    "The two take-off posts of string {string} stand under one wrench. {why}: fit the barrier first."
                )
            }
            Self::OverPosts(many) => {
                write!(f, "{many} times a link passes over a post it does not join: use insulated cable there.")
            }
        }
    }
}

/// A bank on its shelf.
#[derive(Clone, Debug, PartialEq)]
pub struct Layout {
    /// Every cell, by number.
    pub places: Vec<Place>,
    /// Every link, in the order to fit.
    pub links: Vec<Link>,
    /// Links by length, the most frequent first.
    pub cuts: Vec<Cut>,
    /// The take-off posts of each string; of the bank, with groups.
    pub ends: Vec<Ends>,
    /// Where barriers belong, the greatest difference first.
    pub barriers: Vec<Barrier>,
    /// What could not be had.
    pub remarks: Vec<Remark>,
    /// What it costs.
    pub cost: Cost,
    /// What the plain back-and-forth along the rows costs, from the back left corner, turned as well as can be.
    pub plain: Cost,
    /// How far the search went.
    pub proof: Proof,
    /// What a cell reads.
    pub cell: CellVolts,
    /// Cells or groups in series.
    pub series: u32,
    /// Why the last link is the last.
    pub last_link_reason: Option<String>,
}

impl Layout {
    /// All links together, from hole to hole.
    #[must_use]
    pub fn hole_to_hole(&self) -> Metres {
        self.links.iter().map(|link| link.hole_to_hole).sum()
    }

    /// The cell of a number.
    #[must_use]
    pub fn place(&self, cell: u32) -> Option<&Place> {
        self.places.get((cell as usize).checked_sub(1)?)
    }

    /// What a post stands at, from the bank's minus post, once everything is joined.
    #[must_use]
    pub fn volts_at(&self, lug: Lug) -> Option<Volts> {
        let below = match lug.pole {
            Pole::Plus => 0,
            Pole::Minus => 1,
        };
        self.place(lug.cell).map(|place| self.cell.expected() * f64::from(place.position - below))
    }
}

#[expect(clippy::too_many_arguments, reason = "called once, with all that was settled before")]
pub(super) fn describe(
    ground: &Ground,
    shelf: &Shelf,
    wiring: &Wiring,
    volts: CellVolts,
    allowance: Metres,
    best: &Walked,
    plain: Cost,
    proof: Proof,
) -> Layout {
    let places = stand(ground, shelf, wiring, best);
    let links = link_up(ground, wiring, volts, allowance, &places);
    let chain = ground.chain_length;
    let ends: Vec<Ends> = places
        .chunks(chain)
        .zip(best.places.chunks(chain).zip(best.turns.chunks(chain)))
        .filter_map(|(string, (slots, turns))| {
            let (first, last) = (string.first()?, string.last()?);
            let under = ground.under_one_wrench((*slots.first()?, *turns.first()?), (*slots.last()?, *turns.last()?));
            Some(Ends {
                string: first.string,
                minus: Lug { cell: first.cell, pole: Pole::Minus },
                minus_at: first.minus,
                plus: Lug { cell: last.cell, pole: Pole::Plus },
                plus_at: last.plus,
                volts: volts.expected() * f64::from(wiring.series()),
                under_one_wrench: under,
            })
        })
        .collect();
    let mut remarks = Vec::new();
    if best.cost.take_off_missed > 0 {
        remarks.push(Remark::TakeOffMissed(best.cost.take_off_missed));
    }
    for end in ends.iter().filter(|end| end.under_one_wrench) {
        remarks.push(Remark::UnderOneWrench { string: end.string, unavoidable: proof == Proof::Least });
    }
    if best.cost.over_posts > 0 {
        remarks.push(Remark::OverPosts(best.cost.over_posts));
    }
    let half = wiring.series() / 2;
    let last_link_reason = (half > 0).then(|| {
        let most = volts.expected() * f64::from(wiring.series() - half);
        let all = volts.expected() * f64::from(wiring.series());
        format!(
            "It joins the two halves. Until then no two posts of a string stand more than {:.1} V apart. \
             After it, {:.1} V waits between its two take-off posts and nothing switches it off.",
            most.get(),
            all.get()
        )
    });
    Layout {
        barriers: barriers(ground, wiring, volts, &places, &links),
        cuts: cuts(&links),
        places,
        links,
        ends,
        remarks,
        cost: best.cost,
        plain,
        proof,
        cell: volts,
        series: wiring.series(),
        last_link_reason,
    }
}

fn stand(ground: &Ground, shelf: &Shelf, wiring: &Wiring, best: &Walked) -> Vec<Place> {
    let (chain, group) = (wiring.chain_length(), wiring.in_group());
    (0u32..)
        .zip(best.places.iter().zip(&best.turns))
        .map(|(i, (&slot, &turn))| {
            let (row, column) = ((slot / ground.columns) as u32, (slot % ground.columns) as u32);
            let middle = shelf.middle(row, column);
            Place {
                cell: i + 1,
                row,
                column,
                middle,
                turn,
                plus: middle.moved(shelf.cell().post(Pole::Plus, turn)),
                minus: middle.moved(shelf.cell().post(Pole::Minus, turn)),
                string: i / chain + 1,
                position: i % chain / group + 1,
                beside: i % chain % group + 1,
            }
        })
        .collect()
}

fn link_up(ground: &Ground, wiring: &Wiring, volts: CellVolts, allowance: Metres, places: &[Place]) -> Vec<Link> {
    let half = wiring.series() / 2;
    let mut links = Vec::new();
    for (pair, joint) in places.windows(2).zip(&ground.joints[1..]) {
        let (here, next) = (pair[0], pair[1]);
        for &(a, b) in joint.links() {
            let hole_to_hole = here.post(a).distance(next.post(b));
            // A millionth of a metre of rounding is no further millimetre.
            let cut = Metres::new(((hole_to_hole + allowance).get() * 1e3 - 1e-3).ceil() / 1e3);
            let kind = if *joint == Joint::Series { LinkKind::Series } else { LinkKind::Parallel };
            let added = f64::from(next.position);
            let at = if a == Pole::Plus { here.position } else { here.position - 1 };
            let passes = |cells: u32| volts.highest() * f64::from(cells) > TOUCH;
            links.push(Link {
                number: 0,
                kind,
                from: Lug { cell: here.cell, pole: a },
                to: Lug { cell: next.cell, pole: b },
                hole_to_hole,
                cut,
                string: here.string,
                after: here.position,
                stands_at: volts.expected() * f64::from(at),
                running: volts.expected() * added,
                touch: match (passes(here.position), passes(next.position)) {
                    (true, _) => Touch::Above,
                    (false, true) => Touch::Passes,
                    (false, false) => Touch::Below,
                },
                fitted_last: kind == LinkKind::Series && here.position == half,
                carries: if kind == LinkKind::Series { wiring.in_group() } else { wiring.in_group() - 1 },
            });
        }
    }
    // Groups first, then along each string, then what joins halves. The sort keeps the order within each.
    let turn = |link: &Link| match link.kind {
        LinkKind::Parallel => 0,
        LinkKind::Series if !link.fitted_last => 1,
        LinkKind::Series => 2,
    };
    sort_short(&mut links, |a, b| turn(a).cmp(&turn(b)));
    for (number, link) in (1..).zip(&mut links) {
        link.number = number;
    }
    links
}

fn cuts(links: &[Link]) -> Vec<Cut> {
    let mut cuts: Vec<Cut> = Vec::new();
    for link in links {
        let whole = Metres::new((link.hole_to_hole.get() * 1e3).round() / 1e3);
        match cuts.iter_mut().find(|cut| cut.hole_to_hole == whole) {
            Some(cut) => {
                cut.links.push(link.number);
                cut.cut = cut.cut.max(link.cut);
            }
            None => cuts.push(Cut { hole_to_hole: whole, cut: link.cut, links: vec![link.number] }),
        }
    }
    sort_short(&mut cuts, |a, b| b.links.len().cmp(&a.links.len()));
    cuts
}

fn barriers(ground: &Ground, wiring: &Wiring, volts: CellVolts, places: &[Place], links: &[Link]) -> Vec<Barrier> {
    let from = (volts.expected() * (f64::from(wiring.series()) / 2.0)).min(BARRIER);
    let mut by_slot = vec![None; ground.places];
    for place in places {
        by_slot[place.row as usize * ground.columns + place.column as usize] = Some(place);
    }
    let joined =
        |a: u32, b: u32| links.iter().any(|l| (l.from.cell, l.to.cell) == (a, b) || (l.from.cell, l.to.cell) == (b, a));
    let mut found = Vec::new();
    for (slot, one) in by_slot.iter().enumerate() {
        // To the right and to the front; the other two ways are met from the other side.
        for way in [0, 1] {
            let other = ground.neighbours[slot][way].and_then(|n| by_slot[usize::from(n)]);
            let (Some(one), Some(other)) = (*one, other) else { continue };
            if joined(one.cell, other.cell) {
                continue;
            }
            let mut most = Volts::new(0.0);
            for (p, below_p) in [(Pole::Plus, 0), (Pole::Minus, 1)] {
                for (q, below_q) in [(Pole::Plus, 0), (Pole::Minus, 1)] {
                    if one.post(p).distance(other.post(q)).get() * 1e3 < WRENCH_MM {
                        let apart = f64::from(one.position - below_p) - f64::from(other.position - below_q);
                        most = most.max((volts.expected() * apart).abs());
                    }
                }
            }
            if most >= from {
                found.push(Barrier { one: one.cell, other: other.cell, volts: most });
            }
        }
    }
    sort_short(&mut found, |a, b| b.volts.get().total_cmp(&a.volts.get()));
    found
}

/// Kept beside the types it speaks of: a wish in words, for remarks and the sheet.
impl TakeOff {
    /// The wish in words.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Anywhere => "anywhere",
            Self::SameSide => "same side",
            Self::OppositeEnds => "opposite ends",
            Self::Front => "front row",
        }
    }
}

impl Stand {
    /// In words.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::SideBySide => "side by side",
            Self::EndToEnd => "end to end",
            Self::EitherWay => "either way",
        }
    }
}
