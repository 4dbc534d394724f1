//! The picture of the shelf, as SVG. Written as text: hundreds of marks, none of which anything is bound to.

use crate::piece::{Piece, view};
use engine::quantity::Quantity;
use engine::shelf::{Layout, Shelf};
use engine::show;

use super::board::{Area, At};
use super::drawing::Drawing;

/// The figure.
pub fn figure(shelf: &Shelf, layout: &Layout) -> Piece {
    let drawing = Drawing::of(shelf, layout);
    let past = drawing.cells.iter().any(|cell| cell.past);
    let past = if past { " Dark: past 60 V, where touch is dangerous." } else { "" };
    let beside = if drawing.bars.iter().any(|bar| bar.beside) { " Grey bars join like to like." } else { "" };
    view! {
        <figure class="shelf">
            <div class="shelf-scroll" inner_html=svg(&drawing, &words(layout))></div>
            <figcaption>
                "From above, back at the top, not to scale. Solid band: plus end. Bars: in the order to fit, the last with \
                 a rim. In each cell: volts from the minus post to its plus, at the likely charge."
                {beside}
                {past}
            </figcaption>
        </figure>
    }
}

/// All of it. The width is the least at which it can be read: a tenth less than drawn.
fn svg(drawing: &Drawing, words: &str) -> String {
    let (wide, high) = drawing.size;
    let [least, wide, high] = [wide * 0.9, wide, high].map(number);
    let mut marks = Marks(String::new());
    marks.put(&[
        "<svg width=\"",
        &least,
        "\" viewBox=\"0 0 ",
        &wide,
        " ",
        &high,
        "\" role=\"img\" aria-label=\"",
        words,
        "\">",
    ]);
    put_all(&mut marks, drawing);
    marks.put(&["</svg>"]);
    marks.0
}

fn number(value: f64) -> String {
    format!("{value:.1}")
}

/// All marks, those on top last.
fn put_all(marks: &mut Marks, drawing: &Drawing) {
    marks.area("board", drawing.board);
    for free in &drawing.free {
        marks.area("free", *free);
    }
    for cell in &drawing.cells {
        marks.area(if cell.string % 2 == 0 { "cell other" } else { "cell" }, cell.area);
        marks.area("band", cell.band);
        for (post, sign) in cell.posts.into_iter().zip(["+", "−"]) {
            marks.text("pole", (post.0, post.1 + 4.5), sign);
        }
    }
    for [from, to] in &drawing.barriers {
        marks.line("barrier", *from, *to);
    }
    for bar in &drawing.bars {
        let [from, to] = bar.ends;
        if bar.last {
            marks.line("rim", from, to);
        }
        marks.line(if bar.beside { "link beside" } else { "link" }, from, to);
    }
    // Signs and numbers over all bars: where two meet at a post, both stay readable.
    for bar in &drawing.bars {
        let [from, to] = bar.ends;
        for (post, sign) in bar.ends.into_iter().zip(bar.signs) {
            marks.text("pole on", (post.0, post.1 + 4.5), sign);
        }
        let middle = (f64::midpoint(from.0, to.0), f64::midpoint(from.1, to.1) + 4.0);
        marks.text("link-n", middle, &bar.number.to_string());
    }
    for cell in &drawing.cells {
        let [x, y, w, h] = cell.area;
        let middle = (x + w / 2.0, y + h / 2.0);
        marks.text("num", (middle.0, middle.1 - 1.0), &cell.cell.to_string());
        if cell.past {
            marks.area("past", [middle.0 - 14.0, middle.1 + 1.5, 28.0, 12.0]);
        }
        marks.text(if cell.past { "volts on" } else { "volts" }, (middle.0, middle.1 + 11.0), &cell.volts);
    }
    for plate in &drawing.plates {
        let [x, y, w, h] = plate.area;
        // From beside the sign to the nearest edge.
        let (near, off) = if y < plate.post.1 { (y + h, -8.0) } else { (y, 8.0) };
        let to = (plate.post.0.clamp(x + 3.0, x + w - 3.0), near);
        marks.line("lead", (plate.post.0, plate.post.1 + off), to);
        marks.area("plate", plate.area);
        marks.text("plate-t", (x + w / 2.0, y + 13.0), &plate.words);
    }
}

struct Marks(String);

impl Marks {
    fn put(&mut self, parts: &[&str]) {
        for part in parts {
            self.0.push_str(part);
        }
    }

    fn area(&mut self, class: &str, area: Area) {
        let [x, y, w, h] = area.map(number);
        self.put(&[
            "<rect class=\"",
            class,
            "\" x=\"",
            &x,
            "\" y=\"",
            &y,
            "\" width=\"",
            &w,
            "\" height=\"",
            &h,
            "\"/>",
        ]);
    }

    fn line(&mut self, class: &str, from: At, to: At) {
        let [a, b, c, d] = [from.0, from.1, to.0, to.1].map(number);
        self.put(&["<path class=\"", class, "\" d=\"M", &a, " ", &b, "L", &c, " ", &d, "\"/>"]);
    }

    fn text(&mut self, class: &str, at: At, words: &str) {
        let [x, y] = [at.0, at.1].map(number);
        self.put(&["<text class=\"", class, "\" x=\"", &x, "\" y=\"", &y, "\">", words, "</text>"]);
    }
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
    use engine::shelf::{Cell, CellVolts, Parallel, Posts, Stand, Wiring, Wish, lay_out};

    #[test]
    fn the_text_holds_every_mark_and_nothing_that_is_not_closed() {
        let mm = |mm: f64| Metres::new(mm / 1000.0);
        let cell = Cell::new(mm(174.0), mm(72.0), Posts::Ends, mm(26.0)).unwrap();
        let shelf = Shelf::new(3, 8, cell, Stand::SideBySide, mm(2.0), mm(60.0)).unwrap();
        let wiring = Wiring::new(20, 1, Parallel::SeparateStrings).unwrap();
        let volts = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.4)).unwrap();
        let layout = lay_out(&shelf, &wiring, volts, Wish::default()).unwrap();
        let text = svg(&Drawing::of(&shelf, &layout), &words(&layout));
        let count = |part: &str| text.matches(part).count();
        assert_eq!(count("class=\"cell\""), 20);
        assert_eq!(count("class=\"num\""), 20);
        assert_eq!(count("class=\"link\""), 19);
        assert_eq!(count("class=\"free\""), 4);
        assert_eq!(count("class=\"plate\""), 2);
        assert_eq!(count("class=\"rim\""), 1);
        assert_eq!(count("<text"), count("</text>"));
        assert_eq!(count("<rect") + count("<path"), count("/>"));
        assert!(!text.contains("NaN") && !text.contains("inf"));
        // Eighteen cells of 3.4 V pass 60 V: so three stand dark.
        assert_eq!(count("class=\"past\""), 3);
    }
}
