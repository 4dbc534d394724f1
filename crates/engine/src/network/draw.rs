//! One draw of constant power behind one source: what an inverter does to a bus, in closed form.

use core::fmt;

use crate::check::{Origin, Steps};
use crate::quantity::{Amps, Ohms, Quantity, Volts, Watts};
use crate::show;

/// A source: electromotive force behind a resistance. A cell, a string, a bank, or a bank with its cables.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Behind {
    /// Volts with nothing drawn.
    pub emf: Volts,
    /// All resistance between them and the terminals.
    pub resistance: Ohms,
}

/// What stands at the terminals under a draw.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Loaded {
    /// Volts at the terminals.
    pub volts: Volts,
    /// Current out of the source.
    pub current: Amps,
}

/// Why a draw has no operating point.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum DrawError {
    /// A negative force or resistance, or a value that is not a finite number.
    NotPossible {
        /// The source.
        source: Behind,
        /// The draw.
        draw: Watts,
    },
    /// Collapse: the draw is more than the source can deliver at any voltage.
    NoOperatingPoint {
        /// What was asked of it.
        draw: Watts,
        /// The most that it can deliver, E²/4R.
        greatest: Watts,
    },
}

impl fmt::Display for DrawError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NotPossible { source, draw } => write!(
                f,
                "{} V behind {} Ω under {} W is not a circuit",
                source.emf.get(),
                source.resistance.get(),
                draw.get()
            ),
            Self::NoOperatingPoint { draw, greatest } => {
                write!(f, "collapse: {} W asked for, {} W is the most there is", draw.get(), greatest.get())
            }
        }
    }
}

impl core::error::Error for DrawError {}

impl Behind {
    /// The same source with more resistance in its way, such as a cable's both ways.
    #[must_use]
    pub fn and(self, resistance: Ohms) -> Self {
        Self { resistance: self.resistance + resistance, ..self }
    }

    /// `count` such sources end to end, with `tie` between each and the next.
    #[must_use]
    pub fn in_series(self, count: u32, tie: Ohms) -> Self {
        let times = f64::from(count);
        Self { emf: self.emf * times, resistance: self.resistance * times + tie * (times - 1.0).max(0.0) }
    }

    /// The most power that the source can deliver, at half its volts: E²/4R. Infinite where it has no resistance.
    #[must_use]
    pub fn greatest_draw(self) -> Watts {
        self.emf * self.emf_over(4.0 * self.resistance)
    }

    fn emf_over(self, resistance: Ohms) -> Amps {
        if self.emf.get() == 0.0 { Amps::default() } else { self.emf / resistance }
    }

    /// Volts and current under a draw of constant power; negative: a feed.
    ///
    /// V = (E + √(E² − 4RP)) / 2, I = P / V
    ///
    /// Of the two roots the upper one, where a bus works: at the lower one more current would mean less power. Below
    /// the root there is no voltage at all that satisfies the draw: collapse. E and R stay as they are while the
    /// draw lasts.
    ///
    /// # Errors
    ///
    /// [`DrawError::NoOperatingPoint`] in collapse; [`DrawError::NotPossible`].
    ///
    /// # Source
    ///
    /// Ohm's law and V·I = P, a quadratic in V. The way round 4RP/E² keeps it from overflowing.
    ///
    /// # Example
    ///
    /// 10 V behind 1 Ω: 16 W stand at 8 V and 2 A, 25 W is the most there is.
    ///
    /// ```
    /// use engine::check::Steps;
    /// use engine::network::{Behind, DrawError};
    /// use engine::quantity::{Ohms, Volts, Watts};
    ///
    /// let source = Behind { emf: Volts::new(10.0), resistance: Ohms::new(1.0) };
    /// let found = source.under(Watts::new(16.0), &mut Steps::silent())?;
    /// assert!((found.volts.get() - 8.0).abs() < 1e-12 && (found.current.get() - 2.0).abs() < 1e-12);
    /// assert!(matches!(source.under(Watts::new(25.1), &mut Steps::silent()), Err(DrawError::NoOperatingPoint { .. })));
    /// # Ok::<(), DrawError>(())
    /// ```
    pub fn under(self, draw: Watts, steps: &mut Steps) -> Result<Loaded, DrawError> {
        let (emf, ohms, watts) = (self.emf.get(), self.resistance.get(), draw.get());
        let not_possible = DrawError::NotPossible { source: self, draw };
        if ![emf, ohms, watts].iter().all(|number| number.is_finite()) || emf < 0.0 || ohms < 0.0 {
            return Err(not_possible);
        }
        if watts == 0.0 {
            return Ok(Loaded { volts: self.emf, current: Amps::default() });
        }
        // With no force of its own, 4RP/E² has no meaning: such a source can only be fed.
        let root = if emf > 0.0 {
            let asked = 4.0 * (ohms / emf) * (watts / emf);
            emf * f64::midpoint(1.0, (1.0 - asked).sqrt())
        } else {
            (-ohms * watts).sqrt()
        };
        if root.is_nan() || root == 0.0 {
            return Err(DrawError::NoOperatingPoint { draw, greatest: self.greatest_draw() });
        }
        if !root.is_finite() || !(watts / root).is_finite() {
            return Err(not_possible);
        }
        let volts = steps.step("Volts under the draw", Volts::new(root), || {
            let [emf, ohms, watts] = [self.emf.amount(), self.resistance.amount(), draw.amount()].map(show::step);
            let put_in = format!("({emf} + √(({emf})² − 4 × {ohms} × {watts})) / 2");
            ("V = (E + √(E² − 4RP)) / 2", put_in, Origin::Before)
        });
        let current = steps.step("Current under the draw", draw / volts, || {
            ("I = P / V", format!("{} / {}", show::step(draw.amount()), show::step(volts.amount())), Origin::Before)
        });
        Ok(Loaded { volts, current })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::check::Steps;

    fn under(emf: f64, ohms: f64, watts: f64) -> Result<(f64, f64), DrawError> {
        let source = Behind { emf: Volts::new(emf), resistance: Ohms::new(ohms) };
        source.under(Watts::new(watts), &mut Steps::silent()).map(|found| (found.volts.get(), found.current.get()))
    }

    #[test]
    fn the_very_edge_stands_at_half_the_volts() {
        assert_eq!(under(10.0, 1.0, 25.0), Ok((5.0, 5.0)));
        assert!(matches!(under(10.0, 1.0, 25.000_001), Err(DrawError::NoOperatingPoint { .. })));
    }

    #[test]
    fn a_feed_raises_the_volts() {
        // V² − 10 V − 11 = 0: 11 V, one ampere in.
        assert_eq!(under(10.0, 1.0, -11.0), Ok((11.0, -1.0)));
        assert_eq!(under(0.0, 1.0, -16.0), Ok((4.0, -4.0)));
    }

    #[test]
    fn with_no_resistance_nothing_sags_and_with_no_volts_nothing_is_drawn() {
        assert_eq!(under(12.0, 0.0, 1200.0), Ok((12.0, 100.0)));
        assert_eq!(under(12.0, 0.5, 0.0), Ok((12.0, 0.0)));
        assert_eq!(under(0.0, 0.5, 0.0), Ok((0.0, 0.0)));
        assert!(matches!(under(0.0, 0.5, 1.0), Err(DrawError::NoOperatingPoint { .. })));
        assert!(matches!(under(0.0, 0.0, -1.0), Err(DrawError::NoOperatingPoint { .. })));
    }

    #[test]
    fn what_is_no_circuit_is_refused_and_extremes_do_not_overflow() {
        assert!(matches!(under(f64::NAN, 1.0, 1.0), Err(DrawError::NotPossible { .. })));
        assert!(matches!(under(12.0, -1.0, 1.0), Err(DrawError::NotPossible { .. })));
        assert!(matches!(under(12.0, f64::INFINITY, 1.0), Err(DrawError::NotPossible { .. })));
        assert_eq!(under(1e200, 1.0, 1e200), Ok((1e200, 1.0)));
        assert!(matches!(under(1e-300, 1e300, 1e300), Err(DrawError::NoOperatingPoint { .. })));
    }

    #[test]
    fn the_working_ends_in_the_same_numbers() {
        let source = Behind { emf: Volts::new(52.0), resistance: Ohms::new(0.019_96) };
        let mut written = Steps::written();
        let found = source.under(Watts::new(7491.5), &mut written).unwrap();
        let results: Vec<f64> = written.steps().iter().map(|step| step.result.number).collect();
        assert_eq!(results, [found.volts.get(), found.current.get()]);
        let put_in = &written.steps()[0].put_in;
        assert!(put_in.contains("52\u{202F}V") && put_in.contains("7491.5\u{202F}W"), "{put_in}");
    }
}
