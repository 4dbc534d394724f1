//! How parallel strings share the bank's current, by where on the bus bars the bank is taken off.
//!
//! Every string hangs between two bars; ties join it to its neighbours on each. The string nearest the take-off
//! sees the fewest ties and works hardest, unless each string's way through both bars is made alike.

use core::fmt;

use crate::check::{Origin, Steps};
use crate::network::{Behind, Network, NetworkError};
use crate::quantity::{Amps, Count, Ohms, Quantity, Volts};
use crate::show;

/// The most strings that are solved. *Chosen*: with both bars and both take-offs they stay within the network's nodes.
pub const MOST_STRINGS: usize = 96;

/// Where on a bar the cable is fixed. Strings are numbered from 0 along the bars.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum TakeOff {
    /// At this string's post.
    At(usize),
    /// In the middle of the tie from this string to the next.
    After(usize),
}

/// The ways in which a bank is usually taken off.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Arrangement {
    /// Both cables at the first string.
    SameEnd,
    /// Plus at the first string, minus at the last.
    OppositeEnds,
    /// Both cables in the middle of the bars: at the middle string, or between the two middle ones.
    Middle,
}

impl Arrangement {
    /// All of them.
    pub const ALL: [Self; 3] = [Self::SameEnd, Self::OppositeEnds, Self::Middle];

    /// The take-off on the positive and on the negative bar of a bank of so many strings.
    #[must_use]
    pub const fn take_offs(self, strings: usize) -> (TakeOff, TakeOff) {
        let last = strings.saturating_sub(1);
        match self {
            Self::SameEnd => (TakeOff::At(0), TakeOff::At(0)),
            Self::OppositeEnds => (TakeOff::At(0), TakeOff::At(last)),
            Self::Middle if last.is_multiple_of(2) => (TakeOff::At(last / 2), TakeOff::At(last / 2)),
            Self::Middle => (TakeOff::After(last / 2), TakeOff::After(last / 2)),
        }
    }
}

/// Parallel strings on two bars.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Paralleled<'a> {
    /// The strings in order along the bars: volts and resistance of each from bar to bar.
    pub strings: &'a [Behind],
    /// Resistance of each tie on the positive bar: one fewer than strings.
    pub positive_ties: &'a [Ohms],
    /// Resistance of each tie on the negative bar: one fewer than strings.
    pub negative_ties: &'a [Ohms],
    /// Where the positive cable is fixed.
    pub positive: TakeOff,
    /// Where the negative cable is fixed.
    pub negative: TakeOff,
}

/// How the strings share.
#[derive(Clone, Debug, PartialEq)]
pub struct Sharing {
    /// Current out of each string, in order; negative where it is charged.
    pub currents: Vec<Amps>,
    /// Volts from take-off to take-off.
    pub volts: Volts,
    /// The string that carries most of what the bank carries, from 0.
    pub hardest: usize,
    /// Its current over the even share; none where the bank carries nothing, for then there is nothing to share.
    pub greatest_over_even: Option<f64>,
}

/// Why there is no sharing to speak of.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum SharingError {
    /// No string, or more than [`MOST_STRINGS`].
    Strings {
        /// How many there are.
        count: usize,
    },
    /// A bar that does not have one tie fewer than there are strings.
    Ties {
        /// How many are needed on each bar.
        needed: usize,
        /// How many the positive bar has.
        positive: usize,
        /// How many the negative bar has.
        negative: usize,
    },
    /// A take-off at a string or tie that does not exist.
    TakeOff(TakeOff),
    /// The network of strings and ties has no answer.
    Network(NetworkError),
}

impl fmt::Display for SharingError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Strings { count } => write!(f, "{count} strings; 1 to {MOST_STRINGS} can be solved"),
            Self::Ties { needed, positive, negative } => {
                write!(f, "{needed} ties are needed on each bar; there are {positive} and {negative}")
            }
            Self::TakeOff(TakeOff::At(string)) => write!(f, "there is no string {} to take off at", string + 1),
            Self::TakeOff(TakeOff::After(string)) => write!(f, "there is no tie after string {}", string + 1),
            Self::Network(error) => error.fmt(f),
        }
    }
}

impl core::error::Error for SharingError {}

impl From<NetworkError> for SharingError {
    fn from(error: NetworkError) -> Self {
        Self::Network(error)
    }
}

/// How parallel strings share `current`, counted out of the bank; negative: charging.
///
/// Kirchhoff's and Ohm's laws on the strings and the ties of both bars. Share: Iₖ / (I / n).
///
/// For one moment: volts and resistance of the strings as given. In time a string that works harder empties, its
/// volts fall, and it works less; so the spread is greatest at the start of a discharge and turns around at its end.
///
/// # Errors
///
/// A [`SharingError`] where strings, ties and take-offs do not fit one another, or the network has no answer.
///
/// # Source
///
/// [`crate::source::MODIFIED_NODAL`].
///
/// # Example
///
/// Two equal strings of 12 mΩ, ties of 1 mΩ, both cables at the first: the second string's way is 2 mΩ longer, so they
/// share 60 A as 14 to 12.
///
/// ```
/// use engine::check::Steps;
/// use engine::network::Behind;
/// use engine::quantity::{Amps, Ohms, Volts};
/// use engine::sharing::{Arrangement, Paralleled, share};
///
/// let strings = [Behind { emf: Volts::new(25.6), resistance: Ohms::new(0.012) }; 2];
/// let ties = [Ohms::new(0.001)];
/// let (positive, negative) = Arrangement::SameEnd.take_offs(2);
/// let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
/// let found = share(bank, Amps::new(52.0), &mut Steps::silent())?;
/// assert!((found.currents[0].get() - 28.0).abs() < 1e-9);
/// assert!((found.greatest_over_even.unwrap() - 28.0 / 26.0).abs() < 1e-9);
/// # Ok::<(), engine::sharing::SharingError>(())
/// ```
pub fn share(bank: Paralleled<'_>, current: Amps, steps: &mut Steps) -> Result<Sharing, SharingError> {
    let count = bank.strings.len();
    if count == 0 || count > MOST_STRINGS {
        return Err(SharingError::Strings { count });
    }
    let (positive, negative) = (bank.positive_ties.len(), bank.negative_ties.len());
    if positive != count - 1 || negative != count - 1 {
        return Err(SharingError::Ties { needed: count - 1, positive, negative });
    }
    let mut network = Network::new();
    let plus: Vec<_> = (0..count).map(|_| network.node("positive bar")).collect();
    let minus: Vec<_> = (0..count).map(|_| network.node("negative bar")).collect();
    let mut bar = |posts: &[_], ties: &[Ohms], take_off| {
        let middle = match take_off {
            TakeOff::At(string) => posts.get(string).copied().ok_or(SharingError::TakeOff(take_off))?,
            TakeOff::After(tie) if tie < ties.len() => network.node("take-off"),
            TakeOff::After(_) => return Err(SharingError::TakeOff(take_off)),
        };
        for (tie, resistance) in ties.iter().enumerate() {
            if take_off == TakeOff::After(tie) {
                network.resistor(posts[tie], middle, *resistance / 2.0);
                network.resistor(middle, posts[tie + 1], *resistance / 2.0);
            } else {
                network.resistor(posts[tie], posts[tie + 1], *resistance);
            }
        }
        Ok(middle)
    };
    let plus_post = bar(&plus, bank.positive_ties, bank.positive)?;
    let minus_post = bar(&minus, bank.negative_ties, bank.negative)?;
    let elements: Vec<_> =
        (0..count).map(|string| network.source(plus[string], minus[string], bank.strings[string])).collect();
    network.draw_current(plus_post, minus_post, current);
    network.refer_to(minus_post);

    let found = network.solve()?;
    // Whatever the network solved, it has every element and node that was put in here.
    let currents: Vec<Amps> = elements.iter().filter_map(|string| found.current(*string)).collect();
    let volts = found.across(plus_post, minus_post).unwrap_or_default();

    let even = steps.step("Even share", current / count as f64, || {
        ("I / n", format!("{} / {count}", show::step(current.amount())), Origin::Before)
    });
    for one in &currents {
        steps.step("Current of the next string along the bars", *one, || {
            let formula = "Kirchhoff's laws on all strings and ties";
            (formula, format!("{count} strings, {} ties", 2 * (count - 1)), Origin::Before)
        });
    }
    let along = |string: &usize| currents[*string].get() * if current.get() < 0.0 { -1.0 } else { 1.0 };
    let hardest = (0..currents.len()).max_by(|a, b| along(a).total_cmp(&along(b))).unwrap_or(0);
    let greatest_over_even = (current.get() != 0.0).then(|| {
        let share = Count::new(currents[hardest] / even);
        let word = || {
            let put_in = format!("{} / {}", show::step(currents[hardest].amount()), show::step(even.amount()));
            ("greatest Iₖ / (I / n)", put_in, Origin::Before)
        };
        steps.step("Greatest share over the even share", share, word).get()
    });
    Ok(Sharing { currents, volts, hardest, greatest_over_even })
}
