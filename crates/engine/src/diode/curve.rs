//! The current-voltage curve of one module at one irradiance and cell temperature.
//!
//! Everything is sought in the voltage across the diode, Vd = V + I·Rs. In it both current and terminal voltage are
//! plain formulas, I(Vd) falls and V(Vd) rises throughout, so each question is one root inside a known bracket:
//!
//! I(Vd) = IL − I0·(exp(Vd / a) − 1) − Vd / Rsh, V(Vd) = Vd − Rs·I(Vd)

use super::root::{self, NotConverged};
use super::{CurveError, Parameters};
use crate::quantity::{Amps, Ohms, Volts, Watts};

/// A point of a curve.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PowerPoint {
    /// At the terminals.
    pub voltage: Volts,
    /// Out of the positive terminal.
    pub current: Amps,
}

impl PowerPoint {
    /// P = V·I.
    #[must_use]
    pub fn power(self) -> Watts {
        self.voltage * self.current
    }
}

/// The five parameters as bare numbers, the shunt as a conductance so that the dark needs no infinity.
#[derive(Clone, Copy, Debug)]
pub(super) struct Kernel {
    pub light_amp: f64,
    pub saturation_amp: f64,
    pub ideality_volt: f64,
    pub series_ohm: f64,
    pub shunt_siemens: f64,
}

impl Kernel {
    pub fn new(five: Parameters) -> Self {
        Self {
            light_amp: five.light_current.get(),
            saturation_amp: five.saturation_current.get(),
            ideality_volt: five.ideality.get(),
            series_ohm: five.series.get(),
            shunt_siemens: 1.0 / five.shunt.get(),
        }
    }

    /// I, dI/dVd and d²I/dVd² at a voltage across the diode.
    fn current(self, diode_volt: f64) -> (f64, f64, f64) {
        let a = self.ideality_volt;
        let grown = self.saturation_amp * (diode_volt / a).exp_m1();
        let slope = (grown + self.saturation_amp) / a;
        (self.light_amp - grown - self.shunt_siemens * diode_volt, -slope - self.shunt_siemens, -slope / a)
    }

    /// The voltage across the diode at the current `amp`.
    fn diode_voltage_at_current(self, amp: f64) -> Result<f64, NotConverged> {
        // Without the shunt the diode stands higher.
        let above = self.ideality_volt * ((self.light_amp - amp) / self.saturation_amp).ln_1p();
        // A shade more, so that rounding does not put the root outside.
        let above = above * (1.0 + 1e-12) + 1e-12 * self.ideality_volt;
        root::rising("voltage at a current", 0.0, above, above, |vd| {
            let (current, slope, _) = self.current(vd);
            (amp - current, -slope)
        })
    }

    /// The voltage across the diode at the terminal voltage `volt`, zero or more.
    fn diode_voltage_at_voltage(self, volt: f64) -> Result<f64, NotConverged> {
        let rs = self.series_ohm;
        // Where current flows out the diode stands above the terminals by no more than Rs·IL; else below them.
        let (low, high) = if self.current(volt).0 >= 0.0 { (volt, volt + rs * self.light_amp) } else { (0.0, volt) };
        root::rising("current at a voltage", low, high, high, |vd| {
            let (current, slope, _) = self.current(vd);
            (vd - rs * current - volt, 1.0 - rs * slope)
        })
    }

    pub fn current_at(self, volt: f64) -> Result<f64, NotConverged> {
        let vd = self.diode_voltage_at_voltage(volt)?;
        // (Vd − V) / Rs would lose digits where Rs is small.
        root::finite("current at a voltage", self.current(vd).0)
    }

    pub fn voltage_at(self, amp: f64) -> Result<f64, NotConverged> {
        root::finite("voltage at a current", self.diode_voltage_at_current(amp)? - self.series_ohm * amp)
    }

    /// Voltage and current where dP/dV = 0. I falls and bends down along V, so V·I has one top only.
    pub fn greatest_power(self) -> Result<(f64, f64), NotConverged> {
        let open = self.diode_voltage_at_current(0.0)?;
        let (rs, a) = (self.series_ohm, self.ideality_volt);
        // Where the knee of a diode without resistances lies.
        let guess = open - a * (open / a).ln_1p();
        let vd = root::rising("greatest power", 0.0, open, guess, |vd| {
            let (current, slope, bend) = self.current(vd);
            let (volt, volt_slope, volt_bend) = (vd - rs * current, 1.0 - rs * slope, -rs * bend);
            // dP/dVd falls through zero: its negative rises.
            let power_slope = current * volt_slope + volt * slope;
            let power_bend = 2.0 * slope * volt_slope + current * volt_bend + volt * bend;
            (-power_slope, -power_bend)
        })?;
        let current = self.current(vd).0;
        Ok((root::finite("greatest power", vd - rs * current)?, root::finite("greatest power", current)?))
    }
}

/// The curve of a module at one irradiance and cell temperature, made by [`Diode::at`](super::Diode::at).
///
/// Holds between short circuit and open circuit and, with current flowing in, above open circuit. It knows nothing of
/// bypass diodes nor of breakdown: below zero volts there is no answer.
#[derive(Clone, Copy, Debug)]
pub struct Curve {
    kernel: Kernel,
}

impl Curve {
    pub(super) const fn new(kernel: Kernel) -> Self {
        Self { kernel }
    }

    /// The five parameters at this irradiance and temperature. In the dark the shunt is infinite.
    #[must_use]
    pub fn parameters(&self) -> Parameters {
        Parameters {
            light_current: Amps::new(self.kernel.light_amp),
            saturation_current: Amps::new(self.kernel.saturation_amp),
            ideality: Volts::new(self.kernel.ideality_volt),
            series: Ohms::new(self.kernel.series_ohm),
            shunt: Ohms::new(1.0 / self.kernel.shunt_siemens),
        }
    }

    /// The current at a terminal voltage: I = IL − I0·(exp((V + I·Rs) / a) − 1) − (V + I·Rs) / Rsh.
    ///
    /// Negative above open circuit, where the module takes current up.
    ///
    /// # Errors
    ///
    /// [`CurveError::Reversed`] below zero volts, [`CurveError::NotConverged`] where no root was found.
    pub fn current_at(&self, voltage: Volts) -> Result<Amps, CurveError> {
        // Written so that a NaN is refused.
        if !(voltage.get() >= 0.0 && voltage.get().is_finite()) {
            return Err(CurveError::Reversed { voltage });
        }
        Ok(Amps::new(self.kernel.current_at(voltage.get())?))
    }

    /// The terminal voltage at a current.
    ///
    /// # Errors
    ///
    /// [`CurveError::BeyondShortCircuit`] above the short-circuit current, [`CurveError::NotConverged`] where no root
    /// was found.
    pub fn voltage_at(&self, current: Amps) -> Result<Volts, CurveError> {
        let short_circuit = self.short_circuit_current()?;
        if !(current <= short_circuit && current.get().is_finite()) {
            return Err(CurveError::BeyondShortCircuit { current, short_circuit });
        }
        Ok(Volts::new(self.kernel.voltage_at(current.get())?))
    }

    /// Isc, the current at zero volts.
    ///
    /// # Errors
    ///
    /// [`CurveError::NotConverged`] where no root was found.
    pub fn short_circuit_current(&self) -> Result<Amps, CurveError> {
        self.current_at(Volts::new(0.0))
    }

    /// Voc, the voltage at no current.
    ///
    /// # Errors
    ///
    /// [`CurveError::NotConverged`] where no root was found.
    pub fn open_circuit_voltage(&self) -> Result<Volts, CurveError> {
        Ok(Volts::new(self.kernel.voltage_at(0.0)?))
    }

    /// The point of greatest power, where dP/dV = 0. Nothing at all in the dark.
    ///
    /// # Errors
    ///
    /// [`CurveError::NotConverged`] where no root was found.
    pub fn greatest_power(&self) -> Result<PowerPoint, CurveError> {
        let (volt, amp) = self.kernel.greatest_power()?;
        Ok(PowerPoint { voltage: Volts::new(volt), current: Amps::new(amp) })
    }
}

#[cfg(test)]
mod tests {
    use super::super::{BandGap, Diode};
    use super::*;
    use crate::quantity::{AmpsPerKelvin, Celsius, WattsPerSquareMetre};

    /// An invented module of 36 cells.
    fn module(series: f64, shunt: f64) -> Diode {
        let five = Parameters {
            light_current: Amps::new(5.6),
            saturation_current: Amps::new(1.1e-9),
            ideality: Volts::new(0.981),
            series: Ohms::new(series),
            shunt: Ohms::new(shunt),
        };
        Diode::new(five, AmpsPerKelvin::new(0.0031), BandGap::SILICON).unwrap()
    }

    fn curve(series: f64, shunt: f64, irradiance: f64) -> Curve {
        module(series, shunt).at(WattsPerSquareMetre::new(irradiance), Celsius::new(25.0)).unwrap()
    }

    #[test]
    fn without_resistances_open_and_short_circuit_are_closed_forms() {
        let ideal = curve(0.0, f64::INFINITY, 1000.0);
        assert_eq!(ideal.short_circuit_current().unwrap(), Amps::new(5.6));
        let voc = ideal.open_circuit_voltage().unwrap().get();
        assert!((voc - 0.981 * (5.6f64 / 1.1e-9).ln_1p()).abs() < 1e-12, "{voc}");
        // Vmp then meets exp(V/a)·(1 + V/a) = IL/I0 + 1.
        let x = ideal.greatest_power().unwrap().voltage.get() / 0.981;
        assert!((x.exp() * (1.0 + x) / (5.6 / 1.1e-9 + 1.0) - 1.0).abs() < 1e-11);
    }

    #[test]
    fn in_the_dark_there_is_nothing_and_it_takes_current_up() {
        let dark = curve(0.21, 95.0, 0.0);
        assert_eq!(dark.short_circuit_current().unwrap(), Amps::new(0.0));
        assert_eq!(dark.open_circuit_voltage().unwrap(), Volts::new(0.0));
        assert_eq!(dark.greatest_power().unwrap().power(), Watts::new(0.0));
        assert!(dark.current_at(Volts::new(20.0)).unwrap() < Amps::new(0.0));
    }

    #[test]
    fn far_past_open_circuit_the_series_resistance_holds_the_current() {
        let current = curve(0.21, 95.0, 1000.0).current_at(Volts::new(1e5)).unwrap().get();
        // All but some tens of volts stands across 0.21 Ω.
        assert!(current < -1e5 / 0.21 * 0.99 && current > -1e5 / 0.21, "{current}");
    }

    #[test]
    fn what_the_model_knows_nothing_of_is_refused() {
        let curve = curve(0.21, 95.0, 1000.0);
        for bad in [-0.1, f64::NAN, f64::INFINITY] {
            assert!(matches!(curve.current_at(Volts::new(bad)), Err(CurveError::Reversed { .. })));
        }
        for bad in [5.6, f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
            assert!(matches!(curve.voltage_at(Amps::new(bad)), Err(CurveError::BeyondShortCircuit { .. })));
        }
        let module = module(0.21, 95.0);
        for bad in [-1.0, 2001.0, f64::NAN] {
            let given = WattsPerSquareMetre::new(bad);
            assert!(matches!(module.at(given, Celsius::new(25.0)), Err(CurveError::Irradiance { .. })));
        }
        for bad in [-101.0, 151.0, f64::NAN] {
            let given = WattsPerSquareMetre::new(500.0);
            assert!(matches!(module.at(given, Celsius::new(bad)), Err(CurveError::Cell { .. })));
        }
    }
}
