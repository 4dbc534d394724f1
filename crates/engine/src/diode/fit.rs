//! The five parameters from what stands on the nameplate.
//!
//! Five conditions at reference: I = Isc at V = 0; I = 0 at Voc; I = Imp at Vmp; dP/dV = 0 there; dVoc/dT = µVoc.
//! The last is taken in closed form, not by a step of temperature: see [`Diode::voc_coefficient`].
//!
//! For a given ideality a and series resistance Rs the first three are linear in IL, I0 and 1/Rsh. That leaves two
//! unknowns, sought one inside the other, each in a bracket: Rs so that power peaks at Vmp, a so that Voc falls as it should.

use super::curve::Kernel;
use super::nameplate::{Figure, FitError, ISC_COEFFICIENT, Nameplate, Resistance, VOC_COEFFICIENT};
use super::root::{self, NotConverged};
use super::{BandGap, Diode, NoDiode, Parameters, REFERENCE_CELL};
use crate::quantity::{Amps, AmpsPerKelvin, Ohms, PercentPerKelvin, Volts, VoltsPerKelvin};

/// A fit in which the coefficient of Voc may have given way.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Nearest {
    /// The module.
    pub diode: Diode,
    /// How the coefficient gave way; none where all five conditions are met.
    pub gave_way: Option<GaveWay>,
}

/// How the coefficient of Voc gave way.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct GaveWay {
    /// The resistance that would have had to be negative.
    pub resistance: Resistance,
    /// The coefficient that the module has instead of the nameplate's.
    pub voc_coefficient: VoltsPerKelvin,
}

/// The diode, of silicon, that meets all five conditions of the nameplate.
///
/// # Errors
///
/// [`FitError`]: figures that no module has; or figures that no diode with real resistances meets together, as rounding on
/// a nameplate can make them. For those, see [`fit_nearest`].
pub fn fit(nameplate: &Nameplate) -> Result<Diode, FitError> {
    let nearest = fit_nearest(nameplate)?;
    match nearest.gave_way {
        None => Ok(nearest.diode),
        Some(GaveWay { resistance, voc_coefficient }) => Err(FitError::NoRealResistance {
            resistance,
            given: nameplate.voc_coefficient,
            nearest: Some(voc_coefficient),
        }),
    }
}

/// As [`fit`]; but where no real resistances meet all five conditions, the coefficient of Voc gives way, as little as it
/// must, and the other four are met. The result says what the coefficient became.
///
/// # Errors
///
/// [`FitError`]; among them [`FitError::NoRealResistance`] where the coefficient would have to leave what modules have.
pub fn fit_nearest(nameplate: &Nameplate) -> Result<Nearest, FitError> {
    let search = Search::new(nameplate)?;
    let (diode, gave_way) = match search.ideality()? {
        Ideality::Meets(best) => (search.diode(best)?, None),
        Ideality::Bound { best, resistance } if usual_voc_coefficient(best.voc_slope, nameplate.voc) => {
            let voc_coefficient = VoltsPerKelvin::new(best.voc_slope);
            (search.diode(best)?, Some(GaveWay { resistance, voc_coefficient }))
        }
        Ideality::Bound { resistance, .. } | Ideality::Never { resistance } => {
            let given = nameplate.voc_coefficient;
            return Err(FitError::NoRealResistance { resistance, given, nearest: None });
        }
    };
    Ok(Nearest { diode, gave_way })
}

/// Whether Voc falls as modules' do.
fn usual_voc_coefficient(volt_per_kelvin: f64, voc: Volts) -> bool {
    let [least, greatest] = VOC_COEFFICIENT;
    (least.get()..=greatest.get()).contains(&(100.0 * volt_per_kelvin / voc.get()))
}

/// dVoc/dT at reference: the equation at open circuit, differentiated.
///
/// `growth` is d(ln I0)/dT; a grows as T, the shunt does not change with temperature.
pub(super) fn voc_slope(five: &Kernel, voc_volt: f64, isc_slope: f64, growth: f64) -> f64 {
    let kelvin = REFERENCE_CELL.above_absolute_zero().get();
    let a = five.ideality_volt;
    let through = five.saturation_amp * (voc_volt / a).exp();
    (isc_slope - growth * (through - five.saturation_amp) + through * voc_volt / (a * kelvin))
        / (through / a + five.shunt_siemens)
}

/// A module that meets the first four conditions.
#[derive(Clone, Copy)]
struct Candidate {
    five: Kernel,
    /// Its dVoc/dT.
    voc_slope: f64,
}

/// What one ideality gives.
enum Peak {
    /// Power peaks at Vmp.
    At(Candidate),
    /// It would, with a resistance below zero.
    Unreal(Resistance),
}

/// Where the search for the ideality ended.
enum Ideality {
    /// All five conditions met.
    Meets(Candidate),
    /// The greatest ideality with real resistances, short of what the coefficient asks.
    Bound { best: Candidate, resistance: Resistance },
    /// No ideality in reach has real resistances.
    Never { resistance: Resistance },
}

/// The coefficient counts as met within this part of itself: far inside what nameplates are rounded to.
const MET: f64 = 1e-9;

/// Steps after which the search for the ideality gives up: many times what growing by a twentieth, or halving, needs.
const MOST_ROUNDS: usize = 200;

/// The least a, as a part of Voc, that the search goes down to. Cells of silicon have Voc/a from 15 to 35.
const LEAST_IDEALITY: f64 = 1.0 / 80.0;

/// A nameplate in bare numbers, found plausible.
struct Search {
    isc: f64,
    voc: f64,
    imp: f64,
    vmp: f64,
    voc_slope: f64,
    isc_slope: f64,
    growth: f64,
}

impl Search {
    fn new(plate: &Nameplate) -> Result<Self, FitError> {
        let (isc, voc, imp, vmp) = (plate.isc.get(), plate.voc.get(), plate.imp.get(), plate.vmp.get());
        for (figure, given) in [(Figure::Isc, isc), (Figure::Voc, voc), (Figure::Imp, imp), (Figure::Vmp, vmp)] {
            if !(given > 0.0 && given.is_finite()) {
                return Err(FitError::NotPositive { figure, given });
            }
        }
        for (figure, given, of) in [(Figure::Imp, imp, isc), (Figure::Vmp, vmp, voc)] {
            if !(of / 2.0 < given && given < of) {
                return Err(FitError::PowerPoint { figure, given, of });
            }
        }
        let (voc_slope, isc_slope) = (plate.voc_coefficient.get(), plate.isc_coefficient.get());
        for (figure, slope, of, [least, greatest]) in [
            (Figure::VocCoefficient, voc_slope, voc, VOC_COEFFICIENT),
            (Figure::IscCoefficient, isc_slope, isc, ISC_COEFFICIENT),
        ] {
            let given = PercentPerKelvin::new(100.0 * slope / of);
            if !(least..=greatest).contains(&given) {
                return Err(FitError::Coefficient { figure, given, least, greatest });
            }
        }
        Ok(Self { isc, voc, imp, vmp, voc_slope, isc_slope, growth: BandGap::SILICON.saturation_growth_per_kelvin() })
    }

    /// How far short circuit and power point stand below Voc across the diode, each with the share of the diode's current
    /// at Voc that has died away there: 1 − exp(−x/a).
    fn below(&self, a: f64, rs: f64) -> [(f64, f64); 2] {
        [self.voc - self.isc * rs, self.voc - self.vmp - self.imp * rs].map(|x| (x, -(-x / a).exp_m1()))
    }

    /// IL, I0 and 1/Rsh from the three points of the curve, for given a and Rs. The shunt may come out negative.
    ///
    /// With J = I0·exp(Voc/a) the differences from the open-circuit point are
    /// J·(1 − exp(−x/a)) + x/Rsh = I, x being how far the diode stands below Voc.
    fn through_points(&self, a: f64, rs: f64) -> Kernel {
        let [(x_sc, s), (x_mp, m)] = self.below(a, rs);
        let determinant = s * x_mp - m * x_sc;
        let at_voc = (self.isc * x_mp - self.imp * x_sc) / determinant;
        let shunt_siemens = (s * self.imp - m * self.isc) / determinant;
        let saturation_amp = at_voc * (-self.voc / a).exp();
        let light_amp = at_voc - saturation_amp + self.voc * shunt_siemens;
        Kernel { light_amp, saturation_amp, ideality_volt: a, series_ohm: rs, shunt_siemens }
    }

    /// dP/dV at Vmp for given a and Rs, as the current by which the slope misses: zero where power peaks, positive where
    /// the curve is too steep.
    fn slope_miss(&self, a: f64, rs: f64) -> f64 {
        let five = self.through_points(a, rs);
        let steep = five.saturation_amp / a * ((self.vmp + self.imp * rs) / a).exp() + five.shunt_siemens;
        steep * (self.vmp - self.imp * rs) - self.imp
    }

    /// The series resistance above which the shunt would have to be negative; none where it has to be from the start.
    fn greatest_series(&self, a: f64) -> Result<Option<f64>, NotConverged> {
        // Which is where a curve without any shunt passes the three points.
        let miss = |rs: f64| {
            let [(_, s), (_, m)] = self.below(a, rs);
            s * self.imp - m * self.isc
        };
        if miss(0.0) > 0.0 {
            return Ok(None);
        }
        let top = (self.voc - self.vmp) / self.imp;
        root::between("greatest series resistance", 0.0, top, |rs| Ok(miss(rs))).map(Some)
    }

    /// The module whose power peaks at Vmp, for a given a.
    ///
    /// As Rs grows from zero to its greatest, the slope's miss rises through zero once at most.
    fn peak(&self, a: f64) -> Result<Peak, NotConverged> {
        let Some(most) = self.greatest_series(a)? else { return Ok(Peak::Unreal(Resistance::Shunt)) };
        if self.slope_miss(a, most) < 0.0 {
            return Ok(Peak::Unreal(Resistance::Shunt));
        }
        if self.slope_miss(a, 0.0) > 0.0 {
            return Ok(Peak::Unreal(Resistance::Series));
        }
        let rs = root::between("series resistance", 0.0, most, |rs| Ok(self.slope_miss(a, rs)))?;
        let five = self.through_points(a, rs);
        Ok(Peak::At(Candidate { five, voc_slope: voc_slope(&five, self.voc, self.isc_slope, self.growth) }))
    }

    /// The ideality with which Voc falls as it should.
    ///
    /// The greater a is, the faster Voc falls; and from some a on, a resistance would have to be negative.
    fn ideality(&self) -> Result<Ideality, NotConverged> {
        const WHAT: &str = "modified ideality";
        let met = |one: &Candidate| (one.voc_slope - self.voc_slope).abs() <= MET * self.voc_slope.abs();
        // Without a shunt, and with all of Isc through the diode at Voc, this would be the answer.
        let kelvin = REFERENCE_CELL.above_absolute_zero().get();
        let guess = (self.voc / kelvin - self.voc_slope) / (self.growth - self.isc_slope / self.isc);
        let least = LEAST_IDEALITY * self.voc;
        // Down to where Voc falls too slowly, or just as it should.
        let mut low = guess.max(least);
        let mut unreal = None;
        let mut best = loop {
            match self.peak(low)? {
                Peak::At(one) if one.voc_slope >= self.voc_slope => break one,
                Peak::At(_) if low <= least => return Err(NotConverged { what: WHAT, low, high: guess }),
                Peak::Unreal(resistance) if low <= least => return Ok(Ideality::Never { resistance }),
                Peak::At(_) => {}
                Peak::Unreal(resistance) => unreal = Some((low, resistance)),
            }
            low = (0.95 * low).max(least);
        };
        // Up to where it falls too fast; or, where resistances end before that, close to their end.
        let mut high = unreal.map_or(1.05 * low, |(a, _)| a);
        for _ in 0..MOST_ROUNDS {
            if met(&best) {
                return Ok(Ideality::Meets(best));
            }
            match self.peak(high)? {
                Peak::At(one) if one.voc_slope <= self.voc_slope => {
                    let a = root::between(WHAT, low, high, |a| match self.peak(a)? {
                        Peak::At(one) => Ok(self.voc_slope - one.voc_slope),
                        Peak::Unreal(_) => Err(NotConverged { what: WHAT, low, high }),
                    })?;
                    let Peak::At(one) = self.peak(a)? else {
                        return Err(NotConverged { what: WHAT, low, high });
                    };
                    best = one;
                    if !met(&best) {
                        return Err(NotConverged { what: WHAT, low, high });
                    }
                }
                Peak::At(one) => {
                    (low, best) = (high, one);
                    high = unreal.map_or(1.05 * low, |(a, _)| 0.5 * (low + a));
                }
                Peak::Unreal(resistance) => {
                    unreal = Some((high, resistance));
                    high = 0.5 * (low + high);
                }
            }
            if let Some((a, resistance)) = unreal
                && !met(&best)
                && a - low <= 1e-12 * a
            {
                return Ok(Ideality::Bound { best, resistance });
            }
        }
        Err(NotConverged { what: WHAT, low, high })
    }

    /// The candidate as a module.
    fn diode(&self, candidate: Candidate) -> Result<Diode, NoDiode> {
        let five = candidate.five;
        // At the bound the shunt's conductance is zero but for rounding.
        let shunt = if five.shunt_siemens > 1e-12 * self.isc / self.voc {
            Ohms::new(1.0 / five.shunt_siemens)
        } else {
            Ohms::new(f64::INFINITY)
        };
        let reference = Parameters {
            light_current: Amps::new(five.light_amp),
            saturation_current: Amps::new(five.saturation_amp),
            ideality: Volts::new(five.ideality_volt),
            series: Ohms::new(five.series_ohm),
            shunt,
        };
        Diode::new(reference, AmpsPerKelvin::new(self.isc_slope), BandGap::SILICON)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// An invented module of 72 cells, as a nameplate rounds it.
    fn plate() -> Nameplate {
        Nameplate {
            isc: Amps::new(9.44),
            voc: Volts::new(46.9),
            imp: Amps::new(8.87),
            vmp: Volts::new(38.3),
            voc_coefficient: VoltsPerKelvin::new(-0.15),
            isc_coefficient: AmpsPerKelvin::new(0.0048),
        }
    }

    fn close(given: f64, wanted: f64, part: f64) {
        assert!((given - wanted).abs() <= part * wanted.abs(), "{given} is not {wanted} within {part}");
    }

    #[test]
    fn all_five_conditions_hold_at_reference() {
        let back = fit(&plate()).unwrap().nameplate().unwrap();
        close(back.isc.get(), 9.44, 1e-9);
        close(back.voc.get(), 46.9, 1e-9);
        close(back.imp.get(), 8.87, 1e-7);
        close(back.vmp.get(), 38.3, 1e-7);
        close(back.voc_coefficient.get(), -0.15, 1e-8);
    }

    #[test]
    fn the_coefficient_of_one_cell_is_refused_with_a_question() {
        let error = fit(&Nameplate { voc_coefficient: VoltsPerKelvin::new(-0.0021), ..plate() }).unwrap_err();
        assert!(matches!(error, FitError::Coefficient { figure: Figure::VocCoefficient, .. }));
        assert_eq!(
            error.to_string(),
            "the coefficient of Voc is -0.004 %/K; modules have -0.6 to -0.15 %/K. Is it that of one cell, or in another unit?"
        );
    }

    #[test]
    fn a_percentage_read_as_amperes_is_refused() {
        let error = fit(&Nameplate { isc_coefficient: AmpsPerKelvin::new(0.05), ..plate() }).unwrap_err();
        assert!(matches!(error, FitError::Coefficient { figure: Figure::IscCoefficient, .. }), "{error}");
    }

    #[test]
    fn a_power_point_outside_its_corner_is_refused() {
        for (plate, figure) in [
            (Nameplate { vmp: Volts::new(46.9), ..plate() }, Figure::Vmp),
            (Nameplate { vmp: Volts::new(23.0), ..plate() }, Figure::Vmp),
            (Nameplate { imp: Amps::new(9.5), ..plate() }, Figure::Imp),
            (Nameplate { imp: Amps::new(4.7), ..plate() }, Figure::Imp),
        ] {
            let error = fit(&plate).unwrap_err();
            assert!(matches!(error, FitError::PowerPoint { figure: found, .. } if found == figure), "{error}");
        }
    }

    #[test]
    fn figures_that_are_none_are_refused() {
        for bad in [f64::NAN, f64::INFINITY, 0.0, -1.0] {
            for plate in [
                Nameplate { isc: Amps::new(bad), ..plate() },
                Nameplate { voc: Volts::new(bad), ..plate() },
                Nameplate { imp: Amps::new(bad), ..plate() },
                Nameplate { vmp: Volts::new(bad), ..plate() },
                Nameplate { voc_coefficient: VoltsPerKelvin::new(bad), ..plate() },
                Nameplate { isc_coefficient: AmpsPerKelvin::new(bad), ..plate() },
            ] {
                // An Isc that does not change with temperature is no error.
                assert!(fit(&plate).is_err() || plate.isc_coefficient.get() == 0.0);
            }
        }
    }

    #[test]
    fn a_power_point_too_far_out_is_refused_and_the_nearest_gives_up_the_coefficient_only() {
        let square = Nameplate { vmp: Volts::new(40.6), imp: Amps::new(9.1), ..plate() };
        let error = fit(&square).unwrap_err();
        let FitError::NoRealResistance { resistance: Resistance::Shunt, nearest: Some(coefficient), .. } = error else {
            panic!("{error}");
        };
        let nearest = fit_nearest(&square).unwrap();
        assert_eq!(nearest.gave_way.unwrap().voc_coefficient, coefficient);
        assert!(coefficient > square.voc_coefficient);
        let back = nearest.diode.nameplate().unwrap();
        close(back.isc.get(), 9.44, 1e-9);
        close(back.voc.get(), 46.9, 1e-9);
        // At the bound the search stops 1e-12 of the ideality short of it.
        close(back.imp.get(), 9.1, 1e-6);
        close(back.vmp.get(), 40.6, 1e-6);
        close(back.voc_coefficient.get(), coefficient.get(), 1e-9);
        // And what it says would fit does.
        let eased = VoltsPerKelvin::new(coefficient.get() * 0.9999);
        assert!(fit(&Nameplate { voc_coefficient: eased, ..square }).is_ok());
    }

    #[test]
    fn a_power_point_no_silicon_reaches_is_refused_even_so() {
        let impossible = Nameplate { vmp: Volts::new(45.9), imp: Amps::new(9.4), ..plate() };
        assert!(matches!(fit_nearest(&impossible), Err(FitError::NoRealResistance { nearest: None, .. })));
    }

    #[test]
    fn a_steep_curve_that_would_need_a_negative_series_resistance_is_refused() {
        let steep = Nameplate { vmp: Volts::new(41.0), imp: Amps::new(6.0), ..plate() };
        assert!(matches!(fit(&steep), Err(FitError::NoRealResistance { resistance: Resistance::Series, .. })));
    }
}
