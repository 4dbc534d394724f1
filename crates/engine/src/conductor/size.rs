//! Sizes that conductors are sold in.

use crate::quantity::SquareMillimetres;

/// A size of conductor.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Size {
    /// American wire gauge; 1/0 is 0, 2/0 is −1 and so on.
    Gauge(i8),
    /// Thousand circular mils.
    Kcmil(u16),
    /// Nominal square millimetres, counted in hundredths.
    Metric(u16),
    /// Any other cross-section.
    Other(SquareMillimetres),
}

use Size::{Gauge, Kcmil, Metric};

/// The sizes of the North American ladder, thin to thick. The odd small gauges are not sold.
pub const AMERICAN: [Size; 20] = [
    Gauge(18),
    Gauge(16),
    Gauge(14),
    Gauge(12),
    Gauge(10),
    Gauge(8),
    Gauge(6),
    Gauge(4),
    Gauge(3),
    Gauge(2),
    Gauge(1),
    Gauge(0),
    Gauge(-1),
    Gauge(-2),
    Gauge(-3),
    Kcmil(250),
    Kcmil(300),
    Kcmil(350),
    Kcmil(400),
    Kcmil(500),
];

/// Areas of [`AMERICAN`] in mm².
///
/// # Source
///
/// [`crate::source::ASTM_B258`]: computed from its law (see [`crate::unit::awg_area`]), not typed.
const AMERICAN_AREAS: [f64; 20] = [
    0.823_047,
    1.308_696,
    2.080_908,
    3.308_773,
    5.261_155,
    8.365_564,
    13.301_768,
    21.150_639,
    26.670_464,
    33.630_834,
    42.407_699,
    53.475_121,
    67.430_882,
    85.028_773,
    107.219_303,
    126.676_9,
    152.012_2,
    177.347_6,
    202.683,
    253.353_7,
];

/// The nominal sizes of IEC 60228, thin to thick.
pub const METRIC: [Size; 19] = [
    Metric(50),
    Metric(75),
    Metric(100),
    Metric(150),
    Metric(250),
    Metric(400),
    Metric(600),
    Metric(1000),
    Metric(1600),
    Metric(2500),
    Metric(3500),
    Metric(5000),
    Metric(7000),
    Metric(9500),
    Metric(12000),
    Metric(15000),
    Metric(18500),
    Metric(24000),
    Metric(30000),
];

const METRIC_AREAS: [f64; 19] =
    [0.5, 0.75, 1.0, 1.5, 2.5, 4.0, 6.0, 10.0, 16.0, 25.0, 35.0, 50.0, 70.0, 95.0, 120.0, 150.0, 185.0, 240.0, 300.0];

/// How far a typed cross-section may lie from a size and still mean it. *Chosen*: no two sizes of both ladders lie
/// nearer than 1 %, and the four figures of the wire tables differ by less than 0.1 %.
const SAME: f64 = 0.005;

impl Size {
    /// The size that a cross-section means: one of the ladders where it lies within half a percent, else itself.
    ///
    /// # Example
    ///
    /// ```
    /// use engine::conductor::Size;
    /// use engine::quantity::SquareMillimetres;
    /// assert_eq!(Size::of_area(SquareMillimetres::new(67.43)), Size::Gauge(-1));
    /// assert_eq!(Size::of_area(SquareMillimetres::new(70.0)), Size::Metric(7000));
    /// ```
    #[must_use]
    pub fn of_area(area: SquareMillimetres) -> Self {
        let same = |standard: &f64| (area.get() - standard).abs() <= SAME * standard;
        if let Some(at) = METRIC_AREAS.iter().position(same) {
            return METRIC[at];
        }
        if let Some(at) = AMERICAN_AREAS.iter().position(same) {
            return AMERICAN[at];
        }
        Self::Other(area)
    }

    /// Its cross-section.
    #[must_use]
    pub fn area(self) -> SquareMillimetres {
        if let Some(row) = self.american_row() {
            return SquareMillimetres::new(AMERICAN_AREAS[row]);
        }
        SquareMillimetres::new(match self {
            Gauge(gauge) => crate::unit::awg_area(f64::from(gauge)),
            Kcmil(thousands) => crate::unit::Unit::Kcmil.to_base(f64::from(thousands)),
            Metric(hundredths) => f64::from(hundredths) / 100.0,
            Self::Other(area) => return area,
        })
    }

    /// Its row on [`AMERICAN`], where it is one of it.
    #[must_use]
    pub const fn american_row(self) -> Option<usize> {
        Some(match self {
            // The even gauges down to 4, then every one.
            Gauge(gauge @ 4..=18) if gauge % 2 == 0 => (18 - gauge as usize) / 2,
            Gauge(gauge @ -3..=3) => (11 - gauge as isize) as usize,
            Kcmil(250) => 15,
            Kcmil(300) => 16,
            Kcmil(350) => 17,
            Kcmil(400) => 18,
            Kcmil(500) => 19,
            _ => return None,
        })
    }

    /// Its row on [`METRIC`], where it is one of it.
    #[must_use]
    pub const fn metric_row(self) -> Option<usize> {
        let Metric(hundredths) = self else { return None };
        Some(match hundredths {
            50 => 0,
            75 => 1,
            100 => 2,
            150 => 3,
            250 => 4,
            400 => 5,
            600 => 6,
            1000 => 7,
            1600 => 8,
            2500 => 9,
            3500 => 10,
            5000 => 11,
            7000 => 12,
            9500 => 13,
            12000 => 14,
            15000 => 15,
            18500 => 16,
            24000 => 17,
            30000 => 18,
            _ => return None,
        })
    }

    /// Where on the North American ladder it stands, or the next thinner step; none where it is thinner than all.
    #[must_use]
    pub fn american_step(self) -> Option<usize> {
        self.american_row().or_else(|| step(&AMERICAN_AREAS, self.area().get()))
    }

    /// Where on the metric ladder it stands, or the next thinner step; none where it is thinner than all.
    #[must_use]
    pub fn metric_step(self) -> Option<usize> {
        self.metric_row().or_else(|| step(&METRIC_AREAS, self.area().get()))
    }
}

fn step(areas: &[f64], area: f64) -> Option<usize> {
    areas.partition_point(|standard| standard * (1.0 - SAME) <= area).checked_sub(1)
}

impl core::fmt::Display for Size {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match *self {
            Gauge(gauge) if gauge <= 0 => write!(f, "{}/0 AWG", 1 - i32::from(gauge)),
            Gauge(gauge) => write!(f, "{gauge} AWG"),
            Kcmil(thousands) => write!(f, "{thousands} kcmil"),
            Metric(hundredths) => write!(f, "{} mm²", f64::from(hundredths) / 100.0),
            Self::Other(area) => write!(f, "{:.2} mm²", area.get()),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::unit::{Unit, awg_area};

    #[test]
    fn areas_follow_the_law_and_rise() {
        for (size, area) in AMERICAN.iter().zip(AMERICAN_AREAS) {
            let law = match *size {
                Gauge(gauge) => awg_area(f64::from(gauge)),
                Kcmil(thousands) => Unit::Kcmil.to_base(f64::from(thousands)),
                _ => unreachable!("the ladder holds gauges and circular mils"),
            };
            assert!((area - law).abs() < 1e-4, "{size}: {area} against {law}");
        }
        assert!(AMERICAN_AREAS.is_sorted() && METRIC_AREAS.is_sorted());
        for (size, area) in METRIC.iter().zip(METRIC_AREAS) {
            assert_eq!(size.area().get(), area);
        }
    }

    #[test]
    fn sizes_are_written_as_the_trade_writes_them() {
        let written: Vec<String> = [Gauge(10), Gauge(0), Gauge(-3), Kcmil(250), Metric(150), Metric(9500)]
            .iter()
            .map(ToString::to_string)
            .collect();
        assert_eq!(written, ["10 AWG", "1/0 AWG", "4/0 AWG", "250 kcmil", "1.5 mm²", "95 mm²"]);
    }

    #[test]
    fn an_odd_size_stands_on_the_step_below_it() {
        let odd = Size::Other(SquareMillimetres::new(40.0));
        assert_eq!(METRIC[odd.metric_step().unwrap()], Metric(3500));
        assert_eq!(AMERICAN[odd.american_step().unwrap()], Gauge(2));
        assert_eq!(Size::Other(SquareMillimetres::new(0.01)).metric_step(), None);
        assert_eq!(Size::Other(SquareMillimetres::new(f64::NAN)).metric_step(), None);
    }

    #[test]
    fn every_size_is_found_by_its_own_area() {
        for size in AMERICAN.iter().chain(&METRIC) {
            assert_eq!(Size::of_area(size.area()), *size);
        }
        for (row, size) in AMERICAN.iter().enumerate() {
            assert_eq!((size.american_row(), size.american_step(), size.metric_row()), (Some(row), Some(row), None));
        }
        for (row, size) in METRIC.iter().enumerate() {
            assert_eq!((size.metric_row(), size.metric_step(), size.american_row()), (Some(row), Some(row), None));
        }
    }
}
