//! Where everything on a span bar stands, in percent of the ruler. Pure.
//!
//! Posts line up down the page: an upper limit at 72 %, a lower one at 10 %; a lower limit alone, or one that is
//! broken, at 28 %, which leaves its flag room. Linear between and beyond; what lies off the ruler ends at its edge.

/// Where an upper limit stands.
pub const UPPER: f64 = 72.0;
/// Where a lower limit stands beside an upper one.
pub const LOWER: f64 = 10.0;
/// Where a lower limit stands alone, or broken.
pub const LOWER_ALONE: f64 = 28.0;
/// Half the gap that a broken post leaves between what is allowed and what is past it.
const BREAK: f64 = 0.6;
/// How much of the ruler a label takes: nearer ones clash.
const CROWDED: f64 = 22.0;
/// Sums of decimal fractions end in the last bit: what is over by less than this part of the limit is not over.
const LAST_BIT: f64 = 1e-9;

/// A limit.
#[derive(Clone, Debug, PartialEq)]
pub struct Post {
    /// Where it is.
    pub at: f64,
    /// How far inside it a careful hand stays; 0 for no reserve.
    pub reserve: f64,
    /// What sets it, in two or three words.
    pub name: String,
    /// Its figure with the unit.
    pub shown: String,
}

/// A value of interest on the ruler.
#[derive(Clone, Debug, PartialEq)]
pub struct Mark {
    /// Where it is.
    pub at: f64,
    /// What it is, in two or three words.
    pub name: String,
    /// Its figure with the unit.
    pub shown: String,
}

/// What a span bar shows.
#[derive(Clone, Debug, PartialEq)]
pub struct Ruler {
    /// The limit from below.
    pub low: Option<Post>,
    /// The limit from above.
    pub high: Option<Post>,
    /// What is covered, from one value to another. `None` where that is not known: the span is then a dotted blank.
    pub covered: Option<(From, f64)>,
    /// The values that are named below.
    pub marks: Vec<Mark>,
}

/// Where a span begins.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum From {
    /// At a value.
    Value(f64),
    /// At the left edge, or at the lower limit where that is the only one: a single value is set against its limit.
    Start,
}

/// How a post stands.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Stand {
    /// Upright.
    Free,
    /// The span leans on it: it ends in the reserve.
    Near,
    /// Run through.
    Snapped,
}

/// Where a label hangs from its point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Hang {
    /// Centred.
    Middle,
    /// To the right of it.
    Start,
    /// To the left of it.
    End,
    /// Centred, and one lane lower where the bar is short.
    Drops,
}

/// How a tick is drawn.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum TickKind {
    /// Within the span.
    Inside,
    /// At its left end.
    Left,
    /// At its right end.
    Right,
    /// Outside the limits.
    Outside,
}

/// Everything drawn, in percent from the left.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Geometry {
    /// The lower edge of the channel.
    pub lo: Option<f64>,
    /// The upper edge of the channel.
    pub hi: Option<f64>,
    /// The edge of the reserve inside the lower limit.
    pub low_reserve: Option<f64>,
    /// The edge of the reserve inside the upper limit.
    pub high_reserve: Option<f64>,
    /// What is covered and allowed.
    pub solid: Option<(f64, f64)>,
    /// What is covered inside the upper reserve.
    pub high_tight: Option<(f64, f64)>,
    /// What is covered inside the lower reserve.
    pub low_tight: Option<(f64, f64)>,
    /// What is covered past the upper limit.
    pub over: Option<(f64, f64)>,
    /// What is covered past the lower limit.
    pub under: Option<(f64, f64)>,
    /// The dotted blank of an unknown span.
    pub blank: Option<(f64, f64)>,
    /// How the lower post stands.
    pub low_post: Option<Stand>,
    /// How the upper post stands.
    pub high_post: Option<Stand>,
    /// The marks' places, in the order given.
    pub marks: Vec<(f64, TickKind, Hang)>,
    /// Distance of the long graduations.
    pub major: f64,
    /// Distance of the short graduations.
    pub minor: f64,
    /// The first long graduation.
    pub major_from: f64,
    /// The first short graduation.
    pub minor_from: f64,
}

/// A straight line from values to percent of the ruler.
#[derive(Clone, Copy, Debug)]
struct Scale {
    value: f64,
    percent: f64,
    per_unit: f64,
}

impl Scale {
    fn through((value, percent): (f64, f64), (other, other_percent): (f64, f64)) -> Option<Self> {
        let per_unit = (other_percent - percent) / (other - value);
        (per_unit.is_finite() && per_unit > 0.0).then_some(Self { value, percent, per_unit })
    }

    fn exact(self, value: f64) -> f64 {
        self.percent + (value - self.value) * self.per_unit
    }

    fn at(self, value: f64) -> f64 {
        self.exact(value).clamp(0.0, 100.0)
    }
}

impl Ruler {
    /// Where everything stands. Numbers that are not finite are not drawn.
    #[must_use]
    pub fn geometry(&self) -> Geometry {
        let finite = |post: &&Post| post.at.is_finite();
        let (low, high) = (self.low.as_ref().filter(finite), self.high.as_ref().filter(finite));
        let covered =
            self.covered.filter(|(from, to)| to.is_finite() && !matches!(from, From::Value(from) if !from.is_finite()));
        // A window that is upside down is no window: its upper limit is the one that destroys.
        let low = low.filter(|low| high.is_none_or(|high| low.at < high.at));
        let (least, most) = match covered {
            Some((From::Value(from), to)) => (Some(from.min(to)), Some(from.max(to))),
            Some((From::Start, to)) => (None, Some(to)),
            None => (None, None),
        };
        let under_at = |low: &Post| low.at - LAST_BIT * low.at.abs();
        let under = low.is_some_and(|low| least.or(most).is_some_and(|value| value < under_at(low)));
        let over = high.is_some_and(|high| most.is_some_and(|value| value > high.at + LAST_BIT * high.at.abs()));

        let Some(scale) = scale(low, high, under, most) else { return Geometry::default() };
        let lo = low.map(|_| if under || high.is_none() { LOWER_ALONE } else { LOWER });
        let hi = high.map(|_| UPPER);
        let mut drawn = Geometry { lo, hi, ..Geometry::default() };
        drawn.graduate(scale);

        drawn.low_reserve = low.filter(|low| low.reserve > 0.0 && !under).map(|low| scale.at(low.at + low.reserve));
        drawn.high_reserve = high.filter(|high| high.reserve > 0.0).map(|high| scale.at(high.at - high.reserve));

        let Some(most) = most else {
            drawn.blank = Some((lo.unwrap_or(0.0), lo.unwrap_or(0.0) + 36.0));
            drawn.low_post = low.map(|_| Stand::Free);
            drawn.high_post = high.map(|_| Stand::Free);
            drawn.mark(scale, &self.marks, low, high);
            return drawn;
        };
        let left = match (least, lo) {
            (Some(least), _) => scale.at(least),
            (None, Some(lo)) if high.is_none() && !under => lo,
            (None, _) => 0.0,
        };
        let right = scale.at(most);

        let mut solid = (left, right);
        if let Some(hi) = hi.filter(|_| over) {
            drawn.over = Some((left.max(hi + BREAK - 0.2), right.max(hi + BREAK - 0.2)));
            solid.1 = hi - BREAK;
        }
        if let Some(lo) = lo.filter(|_| under) {
            // A single value below its limit: what is missing lies between the two.
            let from = if least.is_none() { right } else { left };
            let end = lo - BREAK + 0.2;
            drawn.under = Some((from.min(end), if least.is_some() { right.min(end) } else { end }));
            solid.0 = if least.is_none() { 100.0 } else { lo + BREAK };
        }
        drawn.solid = (solid.0 < solid.1).then_some(solid);

        let near_high = high.is_some_and(|high| !over && most > high.at - high.reserve && high.reserve > 0.0);
        let near_low =
            low.is_some_and(|low| !under && least.unwrap_or(most) < low.at + low.reserve && low.reserve > 0.0);
        if let Some(reserve) = drawn.high_reserve.filter(|_| near_high) {
            drawn.high_tight = Some((reserve.max(left), right));
        }
        if let Some(reserve) = drawn.low_reserve.filter(|_| near_low) {
            drawn.low_tight = Some((left, reserve.min(right)));
        }
        let stand = |broken: bool, near: bool| match (broken, near) {
            (true, _) => Stand::Snapped,
            (false, true) => Stand::Near,
            (false, false) => Stand::Free,
        };
        drawn.low_post = low.map(|_| stand(under, near_low));
        drawn.high_post = high.map(|_| stand(over, near_high));
        drawn.mark(scale, &self.marks, low, high);
        drawn
    }
}

/// The ruler's scale; none where neither limit nor value spans one.
fn scale(low: Option<&Post>, high: Option<&Post>, under: bool, most: Option<f64>) -> Option<Scale> {
    match (low, high) {
        (Some(low), Some(high)) => Scale::through((low.at, if under { LOWER_ALONE } else { LOWER }), (high.at, UPPER)),
        (None, Some(high)) => Scale::through((0.0, 0.0), (high.at, UPPER))
            // A limit at or below zero, as of a temperature: as wide as the value is away, so that both are seen.
            .or_else(|| Scale::through((high.at - spread(high, most), LOWER), (high.at, UPPER))),
        // The right edge lies at 1.9 times the limit. Chosen: 5 % of reserve are still 4 % of the bar, and a value
        // comfortably above is still on it. A limit at or below zero is spread as above.
        (Some(low), None) => Scale::through((low.at, LOWER_ALONE), (low.at * 1.9, 100.0))
            .or_else(|| Scale::through((low.at, LOWER_ALONE), (low.at + spread(low, most), UPPER))),
        (None, None) => most.and_then(|most| Scale::through((0.0, 0.0), (most, UPPER))),
    }
}

fn spread(post: &Post, most: Option<f64>) -> f64 {
    let away = most.map_or(0.0, |most| (most - post.at).abs());
    away.max(post.reserve * 2.0).max(post.at.abs() * 0.5).max(1.0)
}

impl Geometry {
    /// Graduations at round numbers: 8 to 16 long ones on the ruler.
    fn graduate(&mut self, scale: Scale) {
        let spanned = 100.0 / scale.per_unit;
        let decade = 10f64.powf((spanned / 16.0).log10().floor());
        let (step, parts) = [(1.0, 5.0), (2.0, 4.0), (2.5, 5.0), (5.0, 5.0), (10.0, 5.0)]
            .into_iter()
            .map(|(step, parts)| (step * decade, parts))
            .find(|(step, _)| spanned / step <= 16.0)
            .unwrap_or((spanned / 10.0, 5.0));
        let first = |step: f64| {
            let zero = scale.value - scale.percent / scale.per_unit;
            ((zero / step).ceil() * step - zero) * scale.per_unit
        };
        self.major = step * scale.per_unit;
        self.minor = self.major / parts;
        self.major_from = first(step);
        self.minor_from = first(step / parts);
    }

    fn mark(&mut self, scale: Scale, marks: &[Mark], low: Option<&Post>, high: Option<&Post>) {
        let ends = self.solid.or(self.over).or(self.under);
        let outer = (
            self.under.map_or(ends.map(|ends| ends.0), |under| Some(under.0)),
            self.over.map_or(ends.map(|ends| ends.1), |over| Some(over.1)),
        );
        self.marks = marks
            .iter()
            .map(|mark| {
                let at = scale.at(if mark.at.is_finite() { mark.at } else { 0.0 });
                let past = high.is_some_and(|high| mark.at > high.at) || low.is_some_and(|low| mark.at < low.at);
                let beside = |end: Option<f64>| end.is_some_and(|end| (end - at).abs() < 0.05);
                let kind = match (past, beside(outer.0), beside(outer.1)) {
                    (true, ..) => TickKind::Outside,
                    (false, true, _) => TickKind::Left,
                    (false, false, true) => TickKind::Right,
                    (false, false, false) => TickKind::Inside,
                };
                let hang = match at {
                    at if at < 9.0 => Hang::Start,
                    at if at > 88.0 => Hang::End,
                    _ => Hang::Middle,
                };
                (at, kind, hang)
            })
            .collect();
        self.unclash();
    }

    /// Of labels that would lie on one another: two by themselves hang away from each other where the ruler leaves
    /// room; else every other one drops, the outer ones staying where they can.
    fn unclash(&mut self) {
        let mut order: Vec<usize> = (0..self.marks.len()).collect();
        engine::order::sort_short(&mut order, |a, b| self.marks[*a].0.total_cmp(&self.marks[*b].0));
        for pair in 1..order.len() {
            self.part(&order, pair);
        }
        let mut dropped_before = false;
        for index in 0..order.len() {
            let after = index + 1 < order.len() && self.clash(&order, index);
            // What hangs at the right edge would drop off the page: the one before it gives way, be it the first.
            let yields = after && (index > 0 || self.marks[order[index + 1]].2 == Hang::End);
            let drops = !dropped_before && (yields || (index > 0 && self.clash(&order, index - 1)));
            if drops {
                self.marks[order[index]].2 = Hang::Drops;
            }
            dropped_before = drops;
        }
    }

    /// Hangs the label at `right` in `order` and the one before it away from each other, where that mends a clash and
    /// makes none.
    fn part(&mut self, order: &[usize], right: usize) {
        let (a, b) = (order[right - 1], order[right]);
        let centred = self.marks[a].2 == Hang::Middle && self.marks[b].2 == Hang::Middle;
        let room = self.marks[a].0 >= CROWDED && self.marks[b].0 <= 100.0 - CROWDED;
        if !centred || !room || !self.clash(order, right - 1) {
            return;
        }
        (self.marks[a].2, self.marks[b].2) = (Hang::End, Hang::Start);
        let outer =
            (right > 1 && self.clash(order, right - 2)) || (right + 1 < order.len() && self.clash(order, right));
        if outer {
            (self.marks[a].2, self.marks[b].2) = (Hang::Middle, Hang::Middle);
        }
    }

    /// Whether the label at `index` in `order` would lie on the next one. What has dropped lies on none.
    fn clash(&self, order: &[usize], index: usize) -> bool {
        let ends = |index: usize| {
            let (at, _, hang) = self.marks[order[index]];
            match hang {
                Hang::Start => Some((at, at + CROWDED)),
                Hang::End => Some((at - CROWDED, at)),
                Hang::Middle => Some((at - CROWDED / 2.0, at + CROWDED / 2.0)),
                Hang::Drops => None,
            }
        };
        ends(index).zip(ends(index + 1)).is_some_and(|(left, right)| left.1 > right.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn post(at: f64, reserve: f64) -> Option<Post> {
        Some(Post { at, reserve, name: String::new(), shown: String::new() })
    }

    fn marks(at: &[f64]) -> Vec<Mark> {
        at.iter().map(|at| Mark { at: *at, name: String::new(), shown: String::new() }).collect()
    }

    fn ruler(low: Option<Post>, high: Option<Post>, from: f64, to: f64) -> Ruler {
        Ruler { low, high, covered: Some((From::Value(from), to)), marks: marks(&[from, to]) }
    }

    #[track_caller]
    fn near(got: Option<(f64, f64)>, want: (f64, f64)) {
        let got = got.expect("drawn");
        assert!((got.0 - want.0).abs() < 0.06 && (got.1 - want.1).abs() < 0.06, "{got:?} for {want:?}");
    }

    /// 61 to 150 V allowed, 106.5 to 170.3 V covered: 0.6966 % a volt, by hand.
    #[test]
    fn past_the_upper_limit_the_span_is_torn_at_the_post() {
        let mut ruler = ruler(post(61.0, 0.0), post(150.0, 3.0), 106.5, 170.3);
        ruler.marks = marks(&[106.5, 141.9, 170.3]);
        let drawn = ruler.geometry();
        assert_eq!((drawn.lo, drawn.hi), (Some(10.0), Some(72.0)));
        near(drawn.solid, (41.7, 71.4));
        near(drawn.over, (72.4, 86.1));
        near(drawn.high_reserve.map(|at| (at, at)), (69.9, 69.9));
        assert_eq!((drawn.low_post, drawn.high_post), (Some(Stand::Free), Some(Stand::Snapped)));
        let kinds: Vec<_> = drawn.marks.iter().map(|mark| (mark.1, mark.2)).collect();
        assert_eq!(
            kinds,
            [(TickKind::Left, Hang::Middle), (TickKind::Inside, Hang::Drops), (TickKind::Outside, Hang::Middle)]
        );
    }

    /// 38 to 62 V allowed, 30 to 43.8 V covered: the lower post moves to 28 %, 1.833 % a volt.
    #[test]
    fn past_the_lower_limit_it_is_mirrored_and_the_post_moves() {
        let drawn = ruler(post(38.0, 2.0), post(62.0, 2.0), 30.0, 43.8).geometry();
        assert_eq!(drawn.lo, Some(28.0));
        near(drawn.under, (13.3, 27.6));
        near(drawn.solid, (28.6, 38.6));
        assert_eq!(drawn.low_post, Some(Stand::Snapped));
        assert_eq!(drawn.low_reserve, None);
    }

    /// 6,000 W allowed, 15 % of reserve, 1,400 to 5,800 W covered: 0.012 % a watt from zero.
    #[test]
    fn in_the_reserve_it_leans_on_the_post() {
        let drawn = ruler(None, post(6000.0, 900.0), 1400.0, 5800.0).geometry();
        assert_eq!((drawn.lo, drawn.hi), (None, Some(72.0)));
        near(drawn.solid, (16.8, 69.6));
        near(drawn.high_tight, (61.2, 69.6));
        assert_eq!(drawn.high_post, Some(Stand::Near));
        // Ruler of 8,333 W: 1,000 W steps would be 8.3.
        assert!((drawn.major - 12.0).abs() < 1e-9 && (drawn.minor - 2.4).abs() < 1e-9, "{drawn:?}");
    }

    /// 38 to 62 V allowed, 40 to 58.4 V covered.
    #[test]
    fn between_two_limits_it_stands_free() {
        let drawn = ruler(post(38.0, 1.9), post(62.0, 3.1), 40.0, 58.4).geometry();
        near(drawn.solid, (15.2, 62.7));
        near(Some((drawn.low_reserve.unwrap(), drawn.high_reserve.unwrap())), (14.9, 64.0));
        assert_eq!((drawn.low_post, drawn.high_post), (Some(Stand::Free), Some(Stand::Free)));
        assert_eq!((drawn.over, drawn.under, drawn.high_tight, drawn.low_tight), (None, None, None, None));
    }

    #[test]
    fn a_lower_limit_alone_stands_at_28_and_its_value_begins_there() {
        let single =
            |to: f64| Ruler { low: post(61.0, 0.0), high: None, covered: Some((From::Start, to)), marks: vec![] };
        near(single(106.5).geometry().solid, (28.0, 87.7));
        let short = single(50.0).geometry();
        near(short.under, (13.6, 27.6));
        assert_eq!((short.solid, short.low_post), (None, Some(Stand::Snapped)));
    }

    #[test]
    fn the_limit_itself_is_allowed_to_the_last_bit() {
        let drawn = ruler(None, post(150.0, 3.0), 0.0, 150.000_000_000_01).geometry();
        assert_eq!((drawn.over, drawn.high_post), (None, Some(Stand::Near)));
    }

    #[test]
    fn what_lies_off_the_ruler_ends_at_its_edge() {
        let drawn = ruler(post(61.0, 0.0), post(150.0, 3.0), 20.0, 4000.0).geometry();
        near(drawn.over, (72.4, 100.0));
        assert_eq!(drawn.marks[1].2, Hang::End);
    }

    #[test]
    fn a_span_wholly_past_the_limit_leaves_nothing_solid() {
        let drawn = ruler(None, post(100.0, 2.0), 120.0, 130.0).geometry();
        assert_eq!(drawn.solid, None);
        near(drawn.over, (86.4, 93.6));
    }

    fn hung(at: &[f64]) -> Vec<Hang> {
        let ruler = Ruler { marks: marks(at), ..ruler(None, post(72.0, 0.0), 0.0, 60.0) };
        ruler.geometry().marks.iter().map(|mark| mark.2).collect()
    }

    #[test]
    fn two_near_labels_hang_away_from_each_other_and_never_off_the_ruler() {
        assert_eq!(hung(&[33.0, 36.0]), [Hang::End, Hang::Start]);
        assert_eq!(hung(&[36.0, 33.0]), [Hang::Start, Hang::End]);
        assert_eq!(hung(&[15.0, 30.0]), [Hang::Middle, Hang::Drops], "no room to the left");
        assert_eq!(hung(&[30.0, 60.0]), [Hang::Middle, Hang::Middle]);
        // One that begins at the left edge reaches further than half its width.
        assert_eq!(hung(&[8.0, 31.0, 61.0]), [Hang::Start, Hang::Drops, Hang::Middle]);
        // What hangs at the right edge stays; the one before it drops.
        assert_eq!(hung(&[70.0, 95.0]), [Hang::Drops, Hang::End]);
        assert_eq!(hung(&[40.0, 50.0, 60.0]), [Hang::Middle, Hang::Drops, Hang::Middle], "three are not parted");
    }

    #[test]
    fn what_is_not_known_is_a_blank_under_the_posts() {
        let drawn = Ruler { low: None, high: post(3000.0, 0.0), covered: None, marks: vec![] }.geometry();
        assert_eq!((drawn.blank, drawn.high_post), (Some((0.0, 36.0)), Some(Stand::Free)));
    }

    #[test]
    fn graduations_stand_at_round_numbers() {
        let drawn = ruler(post(61.0, 0.0), post(150.0, 3.0), 106.5, 140.0).geometry();
        // 143.5 V of ruler, from 46.6 V: 10 V steps, the first at 50 V.
        assert!((drawn.major - 6.966).abs() < 0.001);
        assert!((drawn.major_from - (50.0 - 46.645) * 0.696_63).abs() < 0.01, "{}", drawn.major_from);
    }

    /// Whatever the numbers: everything drawn lies on the ruler, left before right, 8 to 16 long graduations.
    #[test]
    fn nothing_is_ever_drawn_off_the_ruler() {
        let values = [
            -1e300,
            -4000.0,
            -31.0,
            -0.0,
            0.0,
            1e-12,
            0.3,
            37.9,
            38.0,
            61.0,
            150.0,
            150.1,
            1e6,
            1e300,
            f64::NAN,
            f64::INFINITY,
        ];
        let some = |value: f64| [None, post(value, 0.0), post(value, value.abs() * 0.05)];
        for low in values.into_iter().flat_map(some) {
            for high in values.into_iter().flat_map(some) {
                for from in [None, Some(-5.0), Some(0.0), Some(40.0), Some(f64::NAN)] {
                    for to in values {
                        let from = from.map_or(From::Start, From::Value);
                        let ruler = Ruler {
                            low: low.clone(),
                            high: high.clone(),
                            covered: Some((from, to)),
                            marks: marks(&[to]),
                        };
                        let drawn = ruler.geometry();
                        let pairs =
                            [drawn.solid, drawn.over, drawn.under, drawn.high_tight, drawn.low_tight, drawn.blank];
                        for (a, b) in pairs.into_iter().flatten() {
                            assert!(0.0 <= a && a <= b && b <= 100.0, "{ruler:?} {drawn:?}");
                        }
                        if drawn.major != 0.0 {
                            let majors = 100.0 / drawn.major;
                            assert!((6.0..=16.001).contains(&majors), "{majors} {ruler:?}");
                        }
                    }
                }
            }
        }
    }
}
