//! Straight lines between the points of a table.

/// The value at `x` of a table whose first column rises; outside it, the end's value.
pub(crate) fn held_at_ends(points: &[(f64, f64)], x: f64) -> f64 {
    let (Some(first), Some(last)) = (points.first(), points.last()) else { return f64::NAN };
    if x <= first.0 {
        return first.1;
    }
    if x >= last.0 {
        return last.1;
    }
    between(points, x)
}

/// The value at `x`; below the table along its first stretch, above it the last value.
pub(crate) fn straight_on_below(points: &[(f64, f64)], x: f64) -> f64 {
    match points {
        [first, second, ..] if x < first.0 => line(*first, *second, x),
        _ => held_at_ends(points, x),
    }
}

fn between(points: &[(f64, f64)], x: f64) -> f64 {
    points.windows(2).find(|pair| x <= pair[1].0).map_or(f64::NAN, |pair| line(pair[0], pair[1], x))
}

fn line(from: (f64, f64), to: (f64, f64), x: f64) -> f64 {
    from.1 + (to.1 - from.1) * (x - from.0) / (to.0 - from.0)
}

/// Where the second column of a rising table reaches `y`; outside it, the end's place.
pub(crate) fn inverse(points: &[(f64, f64)], y: f64) -> f64 {
    let (Some(first), Some(last)) = (points.first(), points.last()) else { return f64::NAN };
    if y <= first.1 {
        return first.0;
    }
    if y >= last.1 {
        return last.0;
    }
    points
        .windows(2)
        .find(|pair| y <= pair[1].1)
        .map_or(f64::NAN, |pair| line((pair[0].1, pair[0].0), (pair[1].1, pair[1].0), y))
}

#[cfg(test)]
mod tests {
    use super::*;

    const TABLE: &[(f64, f64)] = &[(0.0, 1.0), (10.0, 2.0), (20.0, 4.0)];

    #[test]
    fn between_points_it_is_a_straight_line_and_the_ends_hold() {
        assert_eq!(held_at_ends(TABLE, 5.0), 1.5);
        assert_eq!(held_at_ends(TABLE, 15.0), 3.0);
        assert_eq!(held_at_ends(TABLE, -5.0), 1.0);
        assert_eq!(held_at_ends(TABLE, 99.0), 4.0);
        assert_eq!(straight_on_below(TABLE, -5.0), 0.5);
        assert_eq!(straight_on_below(TABLE, 99.0), 4.0);
    }

    #[test]
    fn the_inverse_finds_the_place_again() {
        assert_eq!(inverse(TABLE, 3.0), 15.0);
        assert_eq!(inverse(TABLE, 9.0), 20.0);
    }
}
