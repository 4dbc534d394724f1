//! Short circuits: what the bank can drive into one, and how long a cable lives through it.

use core::fmt;

use crate::check::{Origin, Steps};
use crate::network::Behind;
use crate::quantity::{Amps, Ohms, Quantity, Seconds, SquareMillimetres, Volts};
use crate::show;
use crate::source::{self, Clause};

/// The least and the greatest that a value may be.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Bounds<Q> {
    /// The least it may be.
    pub least: Q,
    /// The greatest it may be.
    pub greatest: Q,
}

impl<Q: Copy> Bounds<Q> {
    /// A value that is known.
    pub const fn known(value: Q) -> Self {
        Self { least: value, greatest: value }
    }
}

/// Prospective short-circuit current at one place.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Prospective {
    /// The greatest: what a breaker there must be able to interrupt.
    pub greatest: Amps,
    /// The least: what must still open the breaker in time.
    pub least: Amps,
}

/// Why there is no short-circuit current to speak of.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum FaultError {
    /// A negative value, bounds the wrong way round, or a value that is not a finite number.
    NotPossible,
    /// No resistance at all at the least: no current is great enough.
    NoResistance,
    /// No current, no cross-section or no time to work with.
    Nothing,
}

impl fmt::Display for FaultError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self {
            Self::NotPossible => "a value is negative or no number, or the least is above the greatest",
            Self::NoResistance => "there is no resistance in the circuit at all",
            Self::Nothing => "there is no current, cross-section or time",
        })
    }
}

impl core::error::Error for FaultError {}

/// Short-circuit current that a bank can drive, at most and at least, through a `way` of cables both ways, links, joints
/// and breakers.
///
/// greatest = E max / (R min + way min), least = E min / (R max + way max)
///
/// E max and R min: the bank new, warm and full. E min and R max: old, cold and low. Steady value without the rise
/// through inductance; the arc's own volts are left out, so that a real fault through an arc may be weaker than the
/// least. A pack's electronics are not credited with anything.
///
/// # Errors
///
/// [`FaultError::NoResistance`] where nothing limits the greatest; [`FaultError::NotPossible`].
///
/// # Source
///
/// Ohm's law with bounds.
///
/// # Example
///
/// 24 to 27 V behind 2 to 5 mΩ, 1 mΩ of way: 27 V over 3 mΩ at most, 24 V over 6 mΩ at least.
///
/// ```
/// use engine::check::Steps;
/// use engine::fault::{Bounds, prospective};
/// use engine::quantity::{Ohms, Volts};
///
/// let emf = Bounds { least: Volts::new(24.0), greatest: Volts::new(27.0) };
/// let bank = Bounds { least: Ohms::new(0.002), greatest: Ohms::new(0.005) };
/// let fault = prospective(emf, bank, Bounds::known(Ohms::new(0.001)), &mut Steps::silent())?;
/// assert!((fault.greatest.get() - 9000.0).abs() < 1e-9);
/// assert!((fault.least.get() - 4000.0).abs() < 1e-9);
/// # Ok::<(), engine::fault::FaultError>(())
/// ```
pub fn prospective(
    emf: Bounds<Volts>,
    bank: Bounds<Ohms>,
    way: Bounds<Ohms>,
    steps: &mut Steps,
) -> Result<Prospective, FaultError> {
    let bounds = [(emf.least.get(), emf.greatest.get())]
        .into_iter()
        .chain([bank, way].map(|bounds| (bounds.least.get(), bounds.greatest.get())));
    for (least, greatest) in bounds {
        if !(0.0..=greatest).contains(&least) || !greatest.is_finite() {
            return Err(FaultError::NotPossible);
        }
    }
    let mut short = |what, emf: Volts, bank, way| {
        let source = Behind { emf, resistance: bank }.and(way);
        let current = if emf.get() == 0.0 { Amps::default() } else { emf / source.resistance };
        if !current.get().is_finite() {
            return Err(FaultError::NoResistance);
        }
        Ok(steps.step(what, current, || {
            let [bank, way] = [bank, way].map(|ohms: Ohms| show::step(ohms.amount()));
            let put_in = format!("{} / ({bank} + {way})", show::step(emf.amount()));
            ("E / (R + way)", put_in, Origin::Before)
        }))
    };
    Ok(Prospective {
        greatest: short("Greatest short-circuit current: new, warm, full", emf.greatest, bank.least, way.least)?,
        least: short("Least short-circuit current: old, cold, low", emf.least, bank.greatest, way.greatest)?,
    })
}

/// Metal of a conductor and what covers it: what decides how much heat it takes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Core {
    /// Copper under PVC for 70 °C.
    CopperPvc,
    /// Copper under cross-linked polyethylene or ethylene rubber for 90 °C.
    CopperXlpe,
    /// Aluminium under PVC for 70 °C.
    AluminiumPvc,
    /// Aluminium under cross-linked polyethylene or ethylene rubber for 90 °C.
    AluminiumXlpe,
}

/// Above this cross-section PVC may only come to 140 °C in place of 160 °C.
const THICK_PVC: SquareMillimetres = SquareMillimetres::new(300.0);

/// How long the heat may be taken as staying in the conductor.
///
/// Source: [`source::IEC_60364_4_43`], clause 434.5.2. From memory.
pub const LONGEST_ADIABATIC: Seconds = Seconds::new(5.0);

/// Heat that a conductor takes, as current times root of time by cross-section, in A·√s/mm².
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct HeatConstant(f64);

impl HeatConstant {
    /// Where the figures are from.
    pub const SOURCE: Clause = source::IEC_60364_4_43.at("table 43A");

    /// The constant k of a conductor that was at its greatest working temperature when the fault struck.
    ///
    /// Copper: 115 under PVC, 103 above 300 mm², 143 under cross-linked polyethylene; aluminium: 76, 68, 94.
    ///
    /// # Source
    ///
    /// [`source::IEC_60364_4_43`], table 43A. From memory; each agrees with annex A of [`source::IEC_60364_5_54`].
    #[must_use]
    pub fn of(core: Core, area: SquareMillimetres) -> Self {
        let thick = area > THICK_PVC;
        Self(match core {
            Core::CopperPvc if thick => 103.0,
            Core::CopperPvc => 115.0,
            Core::CopperXlpe => 143.0,
            Core::AluminiumPvc if thick => 68.0,
            Core::AluminiumPvc => 76.0,
            Core::AluminiumXlpe => 94.0,
        })
    }

    /// The number, in A·√s/mm².
    #[must_use]
    pub const fn get(self) -> f64 {
        self.0
    }
}

/// The longest that a conductor may carry `current` in a short circuit before its insulation is spoilt.
///
/// t = (k · S / I)²
///
/// All heat is taken to stay in the conductor: holds up to [`LONGEST_ADIABATIC`], beyond which it is too strict. Below
/// 0.1 s of a fuse or breaker that limits current, its own let-through I²t counts in place of I² · t.
///
/// # Errors
///
/// [`FaultError::Nothing`] where there is no current; [`FaultError::NotPossible`].
///
/// # Source
///
/// [`source::IEC_60364_4_43`], clause 434.5.2.
///
/// # Example
///
/// 10 mm² of copper under PVC, 1150 A: k·S is 1150 A·√s, so one second.
///
/// ```
/// use engine::check::Steps;
/// use engine::fault::{Core, longest};
/// use engine::quantity::{Amps, SquareMillimetres};
///
/// let time = longest(Core::CopperPvc, SquareMillimetres::new(10.0), Amps::new(1150.0), &mut Steps::silent())?;
/// assert_eq!(time.get(), 1.0);
/// # Ok::<(), engine::fault::FaultError>(())
/// ```
pub fn longest(core: Core, area: SquareMillimetres, current: Amps, steps: &mut Steps) -> Result<Seconds, FaultError> {
    let (k, size, amps) = (HeatConstant::of(core, area).get(), area.get(), current.get());
    work_with([size, amps])?;
    let time = (k * size / amps).powi(2);
    if !time.is_finite() {
        return Err(FaultError::Nothing);
    }
    Ok(steps.step("Longest time in the short circuit", Seconds::new(time), || {
        let put_in = format!("({k} A·√s/mm² × {} / {})²", show::given(area.amount()), show::step(current.amount()));
        ("t = (k · S / I)²", put_in, Origin::Published(HeatConstant::SOURCE))
    }))
}

/// Whether a conductor lives through `current` for `time`: k² · S² ≥ I² · t. Equal is allowed.
///
/// # Errors
///
/// As [`longest`], and where `time` is negative or no number.
pub fn withstands(
    core: Core,
    area: SquareMillimetres,
    current: Amps,
    time: Seconds,
    steps: &mut Steps,
) -> Result<bool, FaultError> {
    if time.get().is_nan() || time.get() < 0.0 {
        return Err(FaultError::NotPossible);
    }
    Ok(time <= longest(core, area, current, steps)?)
}

/// The least cross-section that lives through `current` for `time`.
///
/// S = I · √t / k
///
/// As far as [`longest`] holds. PVC above 300 mm² takes less heat; the answer counts that in.
///
/// # Errors
///
/// [`FaultError::Nothing`] where there is no current or no time; [`FaultError::NotPossible`].
///
/// # Source
///
/// [`source::IEC_60364_4_43`], clause 434.5.2.
pub fn least_area(
    core: Core,
    current: Amps,
    time: Seconds,
    steps: &mut Steps,
) -> Result<SquareMillimetres, FaultError> {
    let (amps, seconds) = (current.get(), time.get());
    work_with([amps, seconds])?;
    let with = |k: HeatConstant| amps * seconds.sqrt() / k.get();
    let mut k = HeatConstant::of(core, SquareMillimetres::default());
    if with(k) > THICK_PVC.get() {
        k = HeatConstant::of(core, SquareMillimetres::new(with(k)));
    }
    let area = with(k);
    if !area.is_finite() {
        return Err(FaultError::NotPossible);
    }
    Ok(steps.step("Least cross-section for the short circuit", SquareMillimetres::new(area), || {
        let put_in =
            format!("{} × √({}) / {} A·√s/mm²", show::step(current.amount()), show::given(time.amount()), k.get());
        ("S = I · √t / k", put_in, Origin::Published(HeatConstant::SOURCE))
    }))
}

/// Refuses what is no number or negative, and what is nothing.
fn work_with(numbers: [f64; 2]) -> Result<(), FaultError> {
    if numbers.iter().any(|number| !number.is_finite() || *number < 0.0) {
        return Err(FaultError::NotPossible);
    }
    if numbers.contains(&0.0) { Err(FaultError::Nothing) } else { Ok(()) }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::check::Steps;

    fn volts(least: f64, greatest: f64) -> Bounds<Volts> {
        Bounds { least: Volts::new(least), greatest: Volts::new(greatest) }
    }

    fn ohms(least: f64, greatest: f64) -> Bounds<Ohms> {
        Bounds { least: Ohms::new(least), greatest: Ohms::new(greatest) }
    }

    #[test]
    fn nothing_in_the_way_is_an_error_and_not_infinity() {
        let fault = |emf, bank, way| prospective(emf, bank, way, &mut Steps::silent());
        assert_eq!(fault(volts(24.0, 27.0), ohms(0.0, 0.01), ohms(0.0, 0.0)), Err(FaultError::NoResistance));
        assert_eq!(fault(volts(28.0, 27.0), ohms(0.01, 0.01), ohms(0.0, 0.0)), Err(FaultError::NotPossible));
        assert_eq!(fault(volts(24.0, 27.0), ohms(-0.01, 0.01), ohms(0.0, 0.0)), Err(FaultError::NotPossible));
        assert_eq!(fault(volts(24.0, f64::INFINITY), ohms(0.01, 0.01), ohms(0.0, 0.0)), Err(FaultError::NotPossible));
        let dead = fault(volts(0.0, 0.0), ohms(0.0, 0.0), ohms(0.0, 0.0)).unwrap();
        assert_eq!((dead.greatest.get(), dead.least.get()), (0.0, 0.0));
    }

    #[test]
    fn the_least_area_lives_exactly_as_long_as_asked() {
        for core in [Core::CopperPvc, Core::CopperXlpe, Core::AluminiumPvc, Core::AluminiumXlpe] {
            for amps in [50.0, 4000.0, 60_000.0] {
                let (current, time) = (Amps::new(amps), Seconds::new(0.4));
                let area = least_area(core, current, time, &mut Steps::silent()).unwrap();
                let held = longest(core, area, current, &mut Steps::silent()).unwrap();
                assert!((held.get() - 0.4).abs() < 1e-12, "{core:?} {amps}");
            }
        }
    }

    #[test]
    fn the_limit_itself_is_withstood_and_no_more() {
        let (area, current) = (SquareMillimetres::new(10.0), Amps::new(1150.0));
        let lives = |seconds| withstands(Core::CopperPvc, area, current, Seconds::new(seconds), &mut Steps::silent());
        assert_eq!(lives(1.0), Ok(true));
        assert_eq!(lives(1.000_001), Ok(false));
        assert_eq!(lives(f64::NAN), Err(FaultError::NotPossible));
    }

    #[test]
    fn no_current_and_no_conductor_are_errors() {
        let time =
            |area, amps| longest(Core::CopperPvc, SquareMillimetres::new(area), Amps::new(amps), &mut Steps::silent());
        assert_eq!(time(10.0, 0.0), Err(FaultError::Nothing));
        assert_eq!(time(0.0, 10.0), Err(FaultError::Nothing));
        assert_eq!(time(-1.0, 10.0), Err(FaultError::NotPossible));
        assert_eq!(time(1.0, f64::NAN), Err(FaultError::NotPossible));
    }

    /// k from the metal's heat, resistivity and temperatures: IEC 60364-5-54 annex A, figures from memory.
    /// Table 43A is rounded to whole numbers, aluminium under XLPE by up to 0.5.
    #[test]
    fn each_constant_follows_from_the_metal_and_its_temperatures() {
        // Heat capacity J/(K·mm³), −temperature of no resistance °C, resistivity at 20 °C Ω·mm.
        let copper = (3.45e-3, 234.5, 17.241e-6);
        let aluminium = (2.5e-3, 228.0, 28.264e-6);
        let rows = [
            (Core::CopperPvc, 300.0, copper, 70.0, 160.0),
            (Core::CopperPvc, 301.0, copper, 70.0, 140.0),
            (Core::CopperXlpe, 300.0, copper, 90.0, 250.0),
            (Core::AluminiumPvc, 300.0, aluminium, 70.0, 160.0),
            (Core::AluminiumPvc, 301.0, aluminium, 70.0, 140.0),
            (Core::AluminiumXlpe, 300.0, aluminium, 90.0, 250.0),
        ];
        for (core, area, (heat, beta, rho), before, after) in rows {
            let heat: f64 = heat * (beta + 20.0) / rho * f64::ln((beta + after) / (beta + before));
            let k = HeatConstant::of(core, SquareMillimetres::new(area)).get();
            assert!((heat.sqrt() - k).abs() < 0.6, "{core:?} {area}: {} against {k}", heat.sqrt());
        }
    }

    #[test]
    fn workings_end_in_the_answer() {
        let mut written = Steps::written();
        let fault = prospective(volts(24.0, 27.0), ohms(0.002, 0.005), ohms(0.001, 0.001), &mut written).unwrap();
        let results: Vec<f64> = written.steps().iter().map(|step| step.result.number).collect();
        assert_eq!(results, [fault.greatest.get(), fault.least.get()]);
    }
}
