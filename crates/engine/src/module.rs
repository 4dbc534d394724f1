//! A photovoltaic module, as its nameplate tells it, and its voltages in cold and heat.

use crate::assumed;
use crate::check::{Basis, Origin, Steps};
use crate::choice::Mounting;
use crate::entry::Entry;
use crate::family::cold_factor;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{
    Amps, AmpsPerKelvin, Celsius, Kelvins, Percent, PercentPerKelvin, Quantity, Volts, VoltsPerKelvin, Watts,
};
use crate::show;
use crate::source;
use crate::unit::Unit;

/// Cell temperature of the rating conditions.
///
/// Source: IEC 61215-1, standard test conditions: 25 °C, 1000 W/m², AM 1.5.
pub const RATED_AT: Celsius = Celsius::new(25.0);

/// The steepest and the flattest that the voltage coefficient of a whole crystalline or thin-film module can be, by size.
///
/// *Chosen* to hold the spread of published module test reports, 0.21 to 0.40 %/K. Outside it the figure is likeliest
/// that of one cell, read as that of a module, or one in °F.
pub const COEFFICIENT_SIZES: (PercentPerKelvin, PercentPerKelvin) =
    (PercentPerKelvin::new(0.2), PercentPerKelvin::new(0.4));

/// The flattest and the steepest that the coefficient of greatest power can be, by size.
///
/// *Chosen* to hold every technology with room to spare: amorphous silicon 0.13, early crystalline 0.50 %/K.
pub const POWER_COEFFICIENT_SIZES: (PercentPerKelvin, PercentPerKelvin) =
    (PercentPerKelvin::new(0.1), PercentPerKelvin::new(0.7));

/// The most that the coefficient of short-circuit current can be, by size. *Chosen*: twice the steepest known.
pub const CURRENT_COEFFICIENT_SIZE: PercentPerKelvin = PercentPerKelvin::new(0.25);

/// How a module's voltage changes with temperature, in the way its nameplate says it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum VoltageCoefficient {
    /// As a part of the rated voltage.
    Relative(PercentPerKelvin),
    /// In volts of the whole module.
    Absolute(VoltsPerKelvin),
}

impl VoltageCoefficient {
    /// The same as a part of `rated`.
    #[must_use]
    pub fn relative(self, rated: Volts) -> PercentPerKelvin {
        match self {
            Self::Relative(relative) => relative,
            Self::Absolute(absolute) => PercentPerKelvin::new(100.0 * absolute.get() / rated.get()),
        }
    }

    /// The same with the sign that physics gives it: the voltage of every module falls as it warms.
    ///
    /// Nameplates and people often leave the sign out.
    #[must_use]
    pub fn falling(self) -> Self {
        match self {
            Self::Relative(relative) => Self::Relative(-relative.abs()),
            Self::Absolute(absolute) => Self::Absolute(-absolute.abs()),
        }
    }
}

/// How a module's current changes with temperature, in the way its nameplate says it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum CurrentCoefficient {
    /// As a part of the rated current.
    Relative(PercentPerKelvin),
    /// In amperes of the whole module.
    Absolute(AmpsPerKelvin),
}

/// A module's nameplate.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Module {
    /// Open-circuit voltage.
    pub voc: Entry<Volts>,
    /// Voltage at greatest power.
    pub vmp: Entry<Volts>,
    /// Short-circuit current.
    pub isc: Entry<Amps>,
    /// Current at greatest power.
    pub imp: Entry<Amps>,
    /// Change of open-circuit voltage with temperature.
    pub voc_coefficient: Entry<VoltageCoefficient>,
    /// Change of greatest power with temperature.
    pub pmax_coefficient: Entry<PercentPerKelvin>,
    /// Change of short-circuit current with temperature.
    pub isc_coefficient: Entry<CurrentCoefficient>,
    /// How far above its nameplate the open-circuit voltage may lie.
    pub voc_tolerance: Entry<Percent>,
    /// Greatest fuse in series.
    pub series_fuse: Entry<Amps>,
    /// Greatest system voltage.
    pub system_voltage: Entry<Volts>,
    /// What light from behind adds to the current.
    pub rear_gain: Entry<Percent>,
}

impl Module {
    /// Reads a module from its fields.
    #[must_use]
    pub fn read(pad: &impl Pad) -> Self {
        Self {
            voc: pad.entry(Field::Voc),
            vmp: pad.entry(Field::Vmp),
            isc: pad.entry(Field::Isc),
            imp: pad.entry(Field::Imp),
            voc_coefficient: voltage_coefficient(pad),
            pmax_coefficient: pad.entry::<PercentPerKelvin>(Field::PmaxCoefficient).map(|typed| -typed.abs()),
            isc_coefficient: current_coefficient(pad),
            voc_tolerance: pad.entry(Field::VocTolerance),
            series_fuse: pad.entry(Field::SeriesFuseRating),
            system_voltage: pad.entry(Field::SystemVoltage),
            rear_gain: pad.entry(Field::RearGain),
        }
    }

    /// Open-circuit voltage of one module at the cell temperature `low`, at the upper end of its tolerance.
    ///
    /// Voc(T) = Voc · (1 + β · (T − 25 °C)) · (1 + tolerance)
    ///
    /// At record cold the cell is at the air's temperature, before the sun warms it. The straight line in T lies a
    /// little above the true curve in the cold. Without β the code family's factor on Voc stands in, noted as assumed.
    /// A β outside [`COEFFICIENT_SIZES`] is asked for again: the millivolts of one cell, read as those of a module,
    /// are the trap.
    ///
    /// # Source
    ///
    /// [`source::IEC_60891`], voltage correction at zero current; [`source::NEC`], 690.7(A).
    pub fn cold_open_circuit(self, low: Celsius, basis: &mut Basis, steps: &mut Steps) -> Option<Volts> {
        let voc = basis.need(Field::Voc, self.voc);
        let tolerance = basis.assume(Field::VocTolerance, self.voc_tolerance, assumed::VOC_TOLERANCE);
        let coefficient = basis.assume(Field::VocCoefficient, self.voc_coefficient.map(Some), None);
        let (voc, tolerance, coefficient) = (voc?, tolerance?, coefficient?);
        let cold = match coefficient {
            Some(coefficient) => {
                let coefficient = coefficient.falling();
                let size = coefficient.relative(voc).abs();
                // An accepted 118 mV/K on 29.5 V is 0.400 000 000 01 %/K.
                let slack = PercentPerKelvin::new(1e-9);
                if size + slack < COEFFICIENT_SIZES.0 || size - slack > COEFFICIENT_SIZES.1 {
                    basis.ask(Field::VocCoefficient);
                    return None;
                }
                corrected(voc, coefficient, low, steps)
            }
            None => {
                let (factor, clause) = cold_factor(low);
                steps.step("One module, open, in the cold", voc * factor, || {
                    (
                        "Voc · factor at the record low",
                        format!("{} × {}", show::given(voc.amount()), show::number(factor, 4)),
                        Origin::Published(clause),
                    )
                })
            }
        };
        let origin = origin(Field::VocTolerance, self.voc_tolerance);
        Some(steps.step("With the nameplate's tolerance", cold * tolerance.more(), || {
            (
                "Voc(T) · (1 + tolerance)",
                format!("{} × {}", show::step(cold.amount()), show::number(tolerance.more(), 4)),
                origin,
            )
        }))
    }

    /// Voltage at greatest power of one module at the cell temperature `at`.
    ///
    /// Vmp(T) = Vmp · (1 + (γ − α) · (T − 25 °C))
    ///
    /// γ is the coefficient of greatest power and α that of short-circuit current: as Pmp = Vmp · Imp, and Imp follows
    /// Isc, what is left of γ is the voltage's. Good to about 1 % of Vmp between 0 and 75 °C. A γ or an α of a size
    /// that no module has is asked for again.
    ///
    /// # Source
    ///
    /// [`source::IEC_60891`]; the difference of coefficients is common practice.
    pub fn greatest_power_voltage(self, at: Celsius, basis: &mut Basis, steps: &mut Steps) -> Option<Volts> {
        let vmp = basis.need(Field::Vmp, self.vmp);
        let gamma = basis.assume(Field::PmaxCoefficient, self.pmax_coefficient, assumed::PMAX_COEFFICIENT);
        let alpha = basis.assume(
            Field::IscCoefficient,
            self.isc_coefficient,
            CurrentCoefficient::Relative(assumed::ISC_COEFFICIENT),
        );
        let alpha = match alpha {
            Some(CurrentCoefficient::Relative(relative)) => Some(relative),
            Some(CurrentCoefficient::Absolute(absolute)) => {
                basis.need(Field::Isc, self.isc).map(|isc| PercentPerKelvin::new(100.0 * absolute.get() / isc.get()))
            }
            None => None,
        };
        let (vmp, gamma, alpha) = (vmp?, gamma?, alpha?);
        if gamma.abs() < POWER_COEFFICIENT_SIZES.0 || gamma.abs() > POWER_COEFFICIENT_SIZES.1 {
            basis.ask(Field::PmaxCoefficient);
            return None;
        }
        if alpha.abs() > CURRENT_COEFFICIENT_SIZE {
            basis.ask(Field::IscCoefficient);
            return None;
        }
        let from_assumption =
            [Field::PmaxCoefficient, Field::IscCoefficient].map(|field| basis.assumed().contains(field));
        let coefficient = steps.step("Coefficient of Vmp", gamma - alpha, || {
            let origin = match from_assumption {
                [true, _] => Origin::Assumed(Field::PmaxCoefficient),
                [false, true] => Origin::Assumed(Field::IscCoefficient),
                [false, false] => Origin::Entered(Field::PmaxCoefficient),
            };
            ("γ(Pmax) − α(Isc)", format!("{} − {}", show::step(gamma.amount()), show::step(alpha.amount())), origin)
        });
        let warmer = at - RATED_AT;
        Some(steps.step("One module at greatest power", vmp * (coefficient * warmer).more(), || {
            (
                "Vmp · (1 + β(Vmp) · (T − 25 °C))",
                format!(
                    "{} × (1 + {} × {})",
                    show::given(vmp.amount()),
                    show::step(coefficient.amount()),
                    show::step(warmer.amount())
                ),
                Origin::Entered(Field::Vmp),
            )
        }))
    }

    /// Power of one module at the rating conditions. Pmp = Vmp · Imp.
    pub fn rated_power(self, basis: &mut Basis) -> Option<Watts> {
        let (vmp, imp) = (basis.need(Field::Vmp, self.vmp), basis.need(Field::Imp, self.imp));
        Some(vmp? * imp?)
    }

    /// Short-circuit current of one module in the brightest sun that the code reckons with.
    ///
    /// I = Isc · factor · (1 + rear gain)
    pub fn bright_current(self, factor: f64, basis: &mut Basis, steps: &mut Steps) -> Option<Amps> {
        let isc = basis.need(Field::Isc, self.isc);
        let rear = basis.assume(Field::RearGain, self.rear_gain, assumed::REAR_GAIN);
        let (isc, rear) = (isc?, rear?);
        Some(steps.step("One string in bright sun", isc * factor * rear.more(), || {
            let rear_part =
                if rear.get() == 0.0 { String::new() } else { format!(" × {}", show::number(rear.more(), 4)) };
            (
                "Isc · sunlight factor · (1 + rear gain)",
                format!("{} × {}{rear_part}", show::given(isc.amount()), show::number(factor, 4)),
                Origin::Entered(Field::Isc),
            )
        }))
    }
}

/// How far over air the cells run in full sun.
#[must_use]
pub const fn rise(mounting: Mounting) -> Kelvins {
    match mounting {
        Mounting::OpenRack => assumed::RISE_OPEN_RACK,
        Mounting::StandOff => assumed::RISE_STAND_OFF,
        Mounting::Flush => assumed::RISE_FLUSH,
    }
}

/// Whether `entry` was entered in `field` or assumed.
pub(crate) const fn origin<T: Copy>(field: Field, entry: Entry<T>) -> Origin {
    match entry {
        Entry::Blank => Origin::Assumed(field),
        Entry::Typed(_) | Entry::Unread => Origin::Entered(field),
    }
}

fn corrected(voc: Volts, coefficient: VoltageCoefficient, low: Celsius, steps: &mut Steps) -> Volts {
    let colder = steps.step("Colder than the rating", RATED_AT - low, || {
        ("25 °C − record low", format!("25 − ({})", show::number(low.get(), 4)), Origin::Entered(Field::RecordLow))
    });
    match coefficient {
        VoltageCoefficient::Relative(beta) => {
            let gain = steps.step("Volts gained", -beta * colder, || {
                (
                    "β · (25 °C − T)",
                    format!("{} × {}", show::step((-beta).amount()), show::step(colder.amount())),
                    Origin::Entered(Field::VocCoefficient),
                )
            });
            steps.step("One module, open", voc * gain.more(), || {
                (
                    "Voc · (1 + gain)",
                    format!("{} × {}", show::given(voc.amount()), show::number(gain.more(), 5)),
                    Origin::Published(CORRECTION),
                )
            })
        }
        VoltageCoefficient::Absolute(beta) => {
            let gain = steps.step("Volts gained", -beta * colder, || {
                (
                    "β · (25 °C − T)",
                    format!("{} × {}", show::step((-beta).amount()), show::step(colder.amount())),
                    Origin::Entered(Field::VocCoefficient),
                )
            });
            steps.step("One module, open", voc + gain, || {
                (
                    "Voc + gain",
                    format!("{} + {}", show::given(voc.amount()), show::step(gain.amount())),
                    Origin::Published(CORRECTION),
                )
            })
        }
    }
}

fn voltage_coefficient(pad: &impl Pad) -> Entry<VoltageCoefficient> {
    let (text, unit) = pad.typed(Field::VocCoefficient);
    match Field::VocCoefficient.read(text, unit) {
        Ok(None) => Entry::Blank,
        Ok(Some(reading)) => Entry::Typed(match reading.unit() {
            Unit::MillivoltPerKelvin | Unit::VoltPerKelvin => {
                VoltageCoefficient::Absolute(VoltsPerKelvin::of(reading.base()))
            }
            _ => VoltageCoefficient::Relative(PercentPerKelvin::of(reading.base())),
        }),
        Err(_) => Entry::Unread,
    }
}

fn current_coefficient(pad: &impl Pad) -> Entry<CurrentCoefficient> {
    let (text, unit) = pad.typed(Field::IscCoefficient);
    match Field::IscCoefficient.read(text, unit) {
        Ok(None) => Entry::Blank,
        Ok(Some(reading)) => Entry::Typed(match reading.unit() {
            Unit::MilliampPerKelvin | Unit::AmpPerKelvin => {
                CurrentCoefficient::Absolute(AmpsPerKelvin::of(reading.base()))
            }
            _ => CurrentCoefficient::Relative(PercentPerKelvin::of(reading.base())),
        }),
        Err(_) => Entry::Unread,
    }
}

/// Where the straight line in temperature is from.
const CORRECTION: source::Clause = source::IEC_60891.at("voltage correction at zero current");
