//! The picture of the shelf, seen from above: every cell with its number and its poles, every link with its number and
//! the volts after it. Units: the shelf is 296 wide, so that 12 units are 12 px on the smallest screen.

use engine::quantity::Quantity;
use engine::shelf::{Ends, Layout, Link, LinkKind, Place, Pole, Spot, Touch};
use engine::show;
use leptos::prelude::*;

const WIDE: f64 = 296.0;
const EDGE: f64 = 8.0;
/// Room above and below for the take-off plates.
const PLATES: f64 = 24.0;

/// From metres to units.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Scale {
    units_a_metre: f64,
    left: f64,
    top: f64,
    /// Height of the whole picture.
    pub high: f64,
}

impl Scale {
    /// The scale at which all of `layout` fits across.
    pub fn of(layout: &Layout) -> Self {
        let half = layout.places.first().map_or((0.05, 0.05), half);
        let bounds = layout.places.iter().fold((f64::MAX, f64::MIN, f64::MAX, f64::MIN), |(l, r, t, b), place| {
            let (x, y) = (place.middle.across.get(), place.middle.forward.get());
            (l.min(x - half.0), r.max(x + half.0), t.min(y - half.1), b.max(y + half.1))
        });
        let (left, right, top, bottom) = bounds;
        // A few cells are not blown up past what a hand would draw.
        let units_a_metre = ((WIDE - 2.0 * EDGE) / (right - left).max(0.01)).min(420.0);
        Self { units_a_metre, left, top, high: (bottom - top) * units_a_metre + 2.0 * (EDGE + PLATES) }
    }

    /// Where a spot stands.
    pub fn at(self, spot: Spot) -> (f64, f64) {
        (
            (spot.across.get() - self.left) * self.units_a_metre + EDGE,
            (spot.forward.get() - self.top) * self.units_a_metre + EDGE + PLATES,
        )
    }
}

/// Half of a cell's size as it stands: half the way between its posts at least, and a margin around them.
fn half(place: &Place) -> (f64, f64) {
    let across = (place.plus.across - place.minus.across).get().abs() / 2.0;
    let forward = (place.plus.forward - place.minus.forward).get().abs() / 2.0;
    let long = across.max(forward) / 0.7;
    (if across > forward { long } else { long * 0.42 }, if across > forward { long * 0.42 } else { long })
}

fn number(value: f64) -> String {
    format!("{value:.1}")
}

/// The figure.
pub fn figure(layout: &Layout) -> AnyView {
    let scale = Scale::of(layout);
    // Figures shrink where cells are small, never under what can be read in print.
    let step = pitch(layout, scale);
    let size = (step * 0.42).clamp(6.0, 13.0);
    let cells: Vec<AnyView> = layout.places.iter().map(|place| cell(place, layout, scale, size)).collect();
    let links: Vec<AnyView> = layout.links.iter().filter_map(|one| link(one, layout, scale, size)).collect();
    let ends: Vec<AnyView> = layout.ends.iter().flat_map(|end| plates(end, scale)).collect();
    let high = number(scale.high);
    let board = number(scale.high - 2.0 * PLATES);
    view! {
        <figure class="shelf">
            <svg viewBox=format!("0 0 296 {high}") role="img" aria-label=words(layout)>
                <rect class="board" x="2" y=number(PLATES) width="292" height=board rx="2"/>
                {cells}
                {links}
                {ends}
            </svg>
            <figcaption>"Seen from above; the back is at the top. Volts at the likely charge."</figcaption>
        </figure>
    }
    .into_any()
}

/// Units from one cell to its neighbour.
fn pitch(layout: &Layout, scale: Scale) -> f64 {
    let first = layout.places.first();
    let next =
        first.and_then(|first| layout.places.iter().find(|one| one.row == first.row && one.column != first.column));
    match (first, next) {
        (Some(one), Some(other)) => {
            let apart = f64::from(one.column.abs_diff(other.column));
            (scale.at(one.middle).0 - scale.at(other.middle).0).abs() / apart
        }
        _ => 30.0,
    }
}

fn cell(place: &Place, layout: &Layout, scale: Scale, size: f64) -> AnyView {
    let (x, y) = scale.at(place.middle);
    let step = pitch(layout, scale);
    let (half_x, half_y) = half(place);
    let (w, h) = ((half_x * 2.0 * scale.units_a_metre).min(step - 2.0), half_y * 2.0 * scale.units_a_metre);
    let pole = |pole: Pole| {
        let (px, py) = scale.at(place.post(pole));
        let class = if pole == Pole::Plus { "post plus" } else { "post" };
        view! {
            <circle class=class cx=number(px) cy=number(py) r=number(size * 0.62)/>
            <text class="pole" x=number(px) y=number(py + size * 0.36) font-size=number(size)>{pole.sign()}</text>
        }
        .into_any()
    };
    let (left, top) = (number(x - w / 2.0), number(y - h / 2.0));
    view! {
        <rect class="cell" x=left y=top width=number(w) height=number(h) data-string=place.string.to_string()/>
        <text class="num" x=number(x) y=number(y + size * 0.4) font-size=number(size * 1.15)>{place.cell}</text>
        {pole(Pole::Plus)}
        {pole(Pole::Minus)}
    }
    .into_any()
}

fn link(link: &Link, layout: &Layout, scale: Scale, size: f64) -> Option<AnyView> {
    let from = scale.at(layout.place(link.from.cell)?.post(link.from.pole));
    let to = scale.at(layout.place(link.to.cell)?.post(link.to.pole));
    let (x, y) = ((from.0 + to.0) / 2.0, (from.1 + to.1) / 2.0);
    // The bar stops short of the signs at its ends, so that both poles stay readable.
    let long = (to.0 - from.0).hypot(to.1 - from.1).max(0.1);
    let cut = (size * 0.7).min(long * 0.3);
    let (ux, uy) = ((to.0 - from.0) / long * cut, (to.1 - from.1) / long * cut);
    let d = format!("M{:.1} {:.1}L{:.1} {:.1}", from.0 + ux, from.1 + uy, to.0 - ux, to.1 - uy);
    let class = match (link.kind, link.fitted_last, link.touch) {
        (_, true, _) => "link last",
        (LinkKind::Parallel, ..) => "link beside",
        (_, _, Touch::Passes | Touch::Above) => "link high",
        _ => "link",
    };
    let volts = show::number(link.running.get(), 1);
    // Volts stand in the free lane: outside the cells beside a level bar, right of an upright one.
    let level = (to.0 - from.0).abs() >= (to.1 - from.1).abs();
    let middle = scale.at(layout.place(link.from.cell)?.middle).1;
    let (vx, vy, anchor) = match (level, y < middle) {
        (true, true) => (x, y - size * 1.55, "middle"),
        (true, false) => (x, y + size * 2.2, "middle"),
        (false, _) => (x + size * 0.62, y + size * 0.3, "start"),
    };
    let running = (link.kind == LinkKind::Series).then(|| {
        view! {
            <text class="volts" x=number(vx) y=number(vy) font-size=number(size * 0.74) style:text-anchor=anchor>
                {volts}
            </text>
        }
        .into_any()
    });
    Some(
        view! {
            <path class=class d=d stroke-width=number(size * 0.95)/>
            <text class="link-n" x=number(x) y=number(y + size * 0.33) font-size=number(size * 0.9)>{link.number}</text>
            {running}
        }
        .into_any(),
    )
}

/// The two take-off posts, as plates above or below the shelf.
fn plates(ends: &Ends, scale: Scale) -> Vec<AnyView> {
    let plate = |spot: Spot, sign: &str, volts: String| {
        let (x, y) = scale.at(spot);
        let up = y < scale.high / 2.0;
        let plate_y = if up { 2.0 } else { scale.high - 20.0 };
        let left = (x - 31.0).clamp(2.0, WIDE - 64.0);
        let end = if up { plate_y + 18.0 } else { plate_y };
        view! {
            <path class="lead" d=format!("M{x:.1} {y:.1}V{end:.1}")/>
            <rect class="plate" x=number(left) y=number(plate_y) width="62" height="18" rx="2"/>
            <text class="plate-t" x=number(left + 31.0) y=number(plate_y + 13.0)>{format!("{sign} {volts}")}</text>
        }
        .into_any()
    };
    vec![plate(ends.minus_at, "−", "0 V".to_owned()), plate(ends.plus_at, "+", show::computed(ends.volts.amount()))]
}

/// The picture in words.
pub fn words(layout: &Layout) -> String {
    let rows = layout.places.iter().map(|place| place.row).max().map_or(0, |row| row + 1);
    let volts = layout.ends.first().map_or_else(String::new, |ends| show::computed(ends.volts.amount()));
    format!(
        "Shelf seen from above, {rows} {}, {} cells, {} links. The meter rises with each link to {volts} at the plus post.",
        if rows == 1 { "row" } else { "rows" },
        layout.places.len(),
        layout.links.len(),
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::quantity::{Metres, Volts};
    use engine::shelf::{Cell, CellVolts, Parallel, Posts, Shelf, Stand, Wiring, Wish, lay_out};

    fn layout(rows: u32, columns: u32, series: u32, strings: u32) -> Layout {
        let mm = |mm: f64| Metres::new(mm / 1000.0);
        let cell = Cell::new(mm(174.0), mm(72.0), Posts::Ends, mm(26.0)).unwrap();
        let shelf = Shelf::new(rows, columns, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap();
        let wiring = Wiring::new(series, strings, Parallel::SeparateStrings).unwrap();
        let volts = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.35)).unwrap();
        lay_out(&shelf, &wiring, volts, Wish::default()).unwrap()
    }

    #[test]
    fn everything_stands_inside_the_picture() {
        for (rows, columns, series, strings) in [(1, 4, 4, 1), (2, 8, 16, 1), (4, 10, 20, 2), (1, 1, 1, 1)] {
            let layout = layout(rows, columns, series, strings);
            let scale = Scale::of(&layout);
            for place in &layout.places {
                for spot in [place.middle, place.plus, place.minus] {
                    let (x, y) = scale.at(spot);
                    assert!((0.0..=WIDE).contains(&x) && (0.0..=scale.high).contains(&y), "{x} {y} {}", scale.high);
                }
            }
        }
    }

    /// The running volts, added up from the drawing alone: each link leads from a plus post to the minus post of the next.
    #[test]
    fn the_volts_beside_the_links_are_those_of_the_posts_drawn() {
        let layout = layout(2, 8, 16, 1);
        for link in &layout.links {
            assert_eq!((link.from.pole, link.to.pole), (Pole::Plus, Pole::Minus));
            let at = layout.volts_at(link.to).unwrap();
            assert!((at.get() - 3.3 * f64::from(link.after)).abs() < 1e-9, "{link:?}");
            assert!((link.running.get() - 3.3 * f64::from(link.after + 1)).abs() < 1e-9, "{link:?}");
        }
    }
}
