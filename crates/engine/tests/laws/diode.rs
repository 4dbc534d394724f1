//! Laws of the single-diode model, on random modules of silicon.

use arbtest::arbitrary::{Result, Unstructured};
use arbtest::arbtest;
use engine::diode::{BandGap, Curve, Diode, Nameplate, Parameters, fit, fit_nearest};
use engine::quantity::{Amps, AmpsPerKelvin, Celsius, Ohms, Volts, VoltsPerKelvin, WattsPerSquareMetre};

use crate::draw::{between, scaled};

/// A plausible module: 20 to 150 cells of 0.60 to 0.74 V with ideality 0.95 to 1.3, 1 to 20 A, series resistance up to 8 %
/// and shunt resistance from 5 times of Voc/IL. So Voc falls by 0.2 to 0.6 %/K, as a fit expects.
fn module(u: &mut Unstructured<'_>) -> Result<Diode> {
    let cells = between(u, 20.0, 150.0)?;
    let voc = cells * between(u, 0.60, 0.74)?;
    let ideality = cells * between(u, 0.95, 1.3)? * 0.025_69;
    let light = scaled(u, 1.0, 20.0)?;
    let five = Parameters {
        light_current: Amps::new(light),
        saturation_current: Amps::new(light * (-voc / ideality).exp()),
        ideality: Volts::new(ideality),
        series: Ohms::new(voc / light * between(u, 0.001, 0.08)?),
        shunt: Ohms::new(voc / light * scaled(u, 5.0, 2000.0)?),
    };
    let isc_coefficient = AmpsPerKelvin::new(light * between(u, 0.0, 0.0012)?);
    Ok(Diode::new(five, isc_coefficient, BandGap::SILICON).unwrap())
}

/// An irradiance from 1 to 1300 W/m² and a cell temperature from -60 to 90 °C.
fn weather(u: &mut Unstructured<'_>) -> Result<(WattsPerSquareMetre, Celsius)> {
    Ok((WattsPerSquareMetre::new(scaled(u, 1.0, 1300.0)?), Celsius::new(between(u, -60.0, 90.0)?)))
}

fn voc(curve: &Curve) -> f64 {
    curve.open_circuit_voltage().unwrap().get()
}

/// By how much the equation is missed at a point of the curve, as a part of the light current.
fn miss(curve: &Curve, volt: f64, amp: f64) -> f64 {
    let five = curve.parameters();
    let vd = volt + amp * five.series.get();
    let through = five.saturation_current.get() * (vd / five.ideality.get()).exp_m1();
    (five.light_current.get() - through - vd / five.shunt.get() - amp).abs() / five.light_current.get()
}

#[test]
fn every_answer_solves_the_equation() {
    arbtest(|u| {
        let (module, (sun, cell)) = (module(u)?, weather(u)?);
        let curve = module.at(sun, cell).unwrap();
        let open = voc(&curve);
        // Up to a fifth above open circuit, where current flows in.
        let volt = open * between(u, 0.0, 1.2)?;
        let current = curve.current_at(Volts::new(volt)).unwrap();
        // A voltage near 60 V carries 1e-14 of itself, which the exponential makes about 60 times as much of the current.
        let rounding = 1e-11 * (1.0 + current.get().abs() / curve.parameters().light_current.get());
        assert!(miss(&curve, volt, current.get()) < rounding, "{module:?} {sun:?} {cell:?} {volt} {current:?}");
        assert!(miss(&curve, open, 0.0) < 1e-11);
        // And back. Where the curve is flat a rounding of the current moves the voltage by shunt times rounding.
        let back = curve.voltage_at(current).unwrap().get();
        let flat = 1e-14 * curve.parameters().shunt.get() * curve.parameters().light_current.get();
        assert!((back - volt).abs() < 1e-10 * open + flat, "{back} {volt} {module:?} {sun:?} {cell:?}");
        Ok(())
    });
}

#[test]
fn the_greatest_power_is_the_greatest_and_inside_the_corner() {
    arbtest(|u| {
        let (module, (sun, cell)) = (module(u)?, weather(u)?);
        let curve = module.at(sun, cell).unwrap();
        let (open, short) = (voc(&curve), curve.short_circuit_current().unwrap().get());
        let top = curve.greatest_power().unwrap();
        let (volt, amp, watt) = (top.voltage.get(), top.current.get(), top.power().get());
        assert!(0.0 < volt && volt < open && 0.0 < amp && amp < short, "{top:?}");
        assert!(short <= curve.parameters().light_current.get());
        assert!(watt > 0.25 * open * short && watt < open * short);
        let elsewhere = open * between(u, 0.0, 1.0)?;
        let there = elsewhere * curve.current_at(Volts::new(elsewhere)).unwrap().get();
        assert!(there <= watt * (1.0 + 1e-12), "{there} W at {elsewhere} V is more than {watt} W at {volt} V");
        // dP/dV = 0: a hundredth of a per mille aside is less, on both sides, by a share near 1e-10 times the bend.
        for aside in [0.999, 1.001] {
            let beside = volt * aside;
            assert!(beside * curve.current_at(Volts::new(beside)).unwrap().get() < watt);
        }
        Ok(())
    });
}

#[test]
fn more_sun_is_more_voltage_and_current_and_warmer_is_less_voltage_and_power() {
    arbtest(|u| {
        let (module, (sun, cell)) = (module(u)?, weather(u)?);
        let curve = module.at(sun, cell).unwrap();
        let brighter = module.at(sun * between(u, 1.01, 1.5)?, cell).unwrap();
        assert!(voc(&brighter) > voc(&curve));
        assert!(brighter.short_circuit_current().unwrap() > curve.short_circuit_current().unwrap());
        assert!(brighter.greatest_power().unwrap().power() > curve.greatest_power().unwrap().power());
        let warm = Celsius::new(cell.get() + between(u, 0.5, 10.0)?);
        let warmer = module.at(sun, warm).unwrap();
        assert!(voc(&warmer) < voc(&curve));
        Ok(())
    });
}

#[test]
fn without_a_leak_voltage_grows_by_ideality_times_the_log_of_the_sun() {
    arbtest(|u| {
        let (module, (sun, cell)) = (module(u)?, weather(u)?);
        let tight = Parameters { shunt: Ohms::new(f64::INFINITY), ..module.reference() };
        let module = Diode::new(tight, module.isc_coefficient(), BandGap::SILICON).unwrap();
        let times = between(u, 1.0, 10.0)?;
        let sun = WattsPerSquareMetre::new(sun.get().min(200.0));
        let (one, other) = (module.at(sun, cell).unwrap(), module.at(sun * times, cell).unwrap());
        let grown = voc(&other) - voc(&one);
        let a = one.parameters().ideality.get();
        // ln(1 + IL/I0) is ln(IL/I0) but for I0/IL, which warm cells in the dimmest light bring to some 1e-4.
        let short_by = one.parameters().saturation_current / one.parameters().light_current;
        assert!((grown - a * times.ln()).abs() <= a * (short_by + 1e-9), "{grown} {}", a * times.ln());
        Ok(())
    });
}

#[test]
fn with_a_leak_the_log_of_the_sun_still_tells_the_voltage_roughly() {
    arbtest(|u| {
        let module = module(u)?;
        let cell = Celsius::new(between(u, -40.0, 60.0)?);
        let at = |sun| module.at(WattsPerSquareMetre::new(sun), cell).unwrap();
        let sun = scaled(u, 100.0, 1000.0)?;
        let (full, dull) = (at(1000.0), at(sun));
        let by_log = voc(&full) + full.parameters().ideality.get() * (sun / 1000.0).ln();
        // The leak goes with the sun, as the light current does, so it takes away alike from both: 1 % of Voc is ample.
        assert!((voc(&dull) - by_log).abs() < 0.01 * voc(&full), "{} {by_log}", voc(&dull));
        Ok(())
    });
}

#[test]
fn the_coefficient_of_voltage_is_the_slope_of_the_curve_itself() {
    arbtest(|u| {
        let module = module(u)?;
        let at = |degc| voc(&module.at(WattsPerSquareMetre::new(1000.0), Celsius::new(degc)).unwrap());
        let by_step = (at(25.5) - at(24.5)) / 1.0;
        let slope = module.voc_coefficient().unwrap().get();
        // A step of half a kelvin each way leaves the third derivative, below 1e-6 of the slope.
        assert!((slope - by_step).abs() < 1e-6 * slope.abs(), "{slope} {by_step}");
        Ok(())
    });
}

#[test]
fn a_fit_to_its_own_nameplate_gives_the_module_back() {
    arbtest(|u| {
        let module = module(u)?;
        let plate = module.nameplate().unwrap();
        let fitted = fit(&plate).unwrap_or_else(|error| panic!("{module:?}: {error}"));
        let (found, made) = (fitted.reference(), module.reference());
        let near = |found: f64, made: f64, part: f64| (found - made).abs() <= part * made.abs();
        // The coefficient is met to 1e-9; ideality and Rs follow it, and a small leak is the difference of large things.
        assert!(near(found.light_current.get(), made.light_current.get(), 1e-7), "{found:?} {made:?}");
        assert!(near(found.ideality.get(), made.ideality.get(), 1e-7), "{found:?} {made:?}");
        let corner = plate.voc / plate.isc;
        assert!((found.series - made.series).abs() < corner * 1e-6, "{found:?} {made:?}");
        assert!((corner / found.shunt - corner / made.shunt).abs() < 1e-6, "{found:?} {made:?}");
        // What anyone sees of it, in any weather, agrees.
        let (sun, cell) = weather(u)?;
        let (one, other) = (module.at(sun, cell).unwrap(), fitted.at(sun, cell).unwrap());
        let (top_one, top_other) = (one.greatest_power().unwrap(), other.greatest_power().unwrap());
        assert!(near(voc(&other), voc(&one), 1e-6), "{} {}", voc(&other), voc(&one));
        assert!(near(top_other.voltage.get(), top_one.voltage.get(), 1e-5), "{top_one:?} {top_other:?}");
        assert!(near(top_other.current.get(), top_one.current.get(), 1e-5), "{top_one:?} {top_other:?}");
        Ok(())
    });
}

#[test]
fn any_nameplate_is_met_or_refused() {
    arbtest(|u| {
        // Plausible ones and absurd ones, some of them no numbers at all.
        let wild = u.ratio(1u8, 4u8)?;
        let number = |u: &mut Unstructured<'_>, low, high| if wild { u.arbitrary() } else { between(u, low, high) };
        let (voc, isc) = (number(u, 10.0, 80.0)?, number(u, 1.0, 20.0)?);
        let plate = Nameplate {
            isc: Amps::new(isc),
            voc: Volts::new(voc),
            imp: Amps::new(isc * number(u, 0.45, 1.02)?),
            vmp: Volts::new(voc * number(u, 0.45, 1.02)?),
            voc_coefficient: VoltsPerKelvin::new(voc * number(u, -0.007, -0.001)?),
            isc_coefficient: AmpsPerKelvin::new(isc * number(u, -0.001, 0.003)?),
        };
        let exact = fit(&plate);
        if let Err(error) = &exact {
            assert!(!matches!(error, engine::diode::FitError::NotConverged(_)), "{plate:?}: {error}");
        }
        let Ok(nearest) = fit_nearest(&plate) else {
            assert!(exact.is_err());
            return Ok(());
        };
        assert_eq!(exact.is_ok(), nearest.gave_way.is_none());
        let back = nearest.diode.nameplate().unwrap();
        let near = |found: f64, given: f64, part: f64| (found - given).abs() <= part * given.abs();
        assert!(near(back.isc.get(), plate.isc.get(), 1e-9), "{plate:?} {back:?}");
        assert!(near(back.voc.get(), plate.voc.get(), 1e-9), "{plate:?} {back:?}");
        // Power is flat on top: the place of the greatest is known to fewer digits than its height.
        assert!(near(back.vmp.get() * back.imp.get(), plate.vmp.get() * plate.imp.get(), 1e-9), "{plate:?} {back:?}");
        assert!(near(back.vmp.get(), plate.vmp.get(), 1e-6), "{plate:?} {back:?}");
        assert!(near(back.imp.get(), plate.imp.get(), 1e-6), "{plate:?} {back:?}");
        let coefficient = nearest.gave_way.map_or(plate.voc_coefficient, |gave_way| gave_way.voc_coefficient);
        assert!(near(back.voc_coefficient.get(), coefficient.get(), 1e-8), "{plate:?} {back:?}");
        Ok(())
    });
}

#[test]
fn no_answer_is_ever_not_a_number() {
    arbtest(|u| {
        let five = Parameters {
            light_current: Amps::new(u.arbitrary()?),
            saturation_current: Amps::new(u.arbitrary()?),
            ideality: Volts::new(u.arbitrary()?),
            series: Ohms::new(u.arbitrary()?),
            shunt: Ohms::new(u.arbitrary()?),
        };
        let module = if u.arbitrary()? {
            module(u)?
        } else {
            match Diode::new(five, AmpsPerKelvin::new(u.arbitrary()?), BandGap::SILICON) {
                Ok(module) => module,
                Err(_) => return Ok(()),
            }
        };
        let (sun, cell) = if u.arbitrary()? {
            weather(u)?
        } else {
            (WattsPerSquareMetre::new(u.arbitrary()?), Celsius::new(u.arbitrary()?))
        };
        let Ok(curve) = module.at(sun, cell) else { return Ok(()) };
        let (volt, amp) = (Volts::new(u.arbitrary()?), Amps::new(u.arbitrary()?));
        let answers = [
            curve.current_at(volt).map(Amps::get),
            curve.voltage_at(amp).map(Volts::get),
            curve.open_circuit_voltage().map(Volts::get),
            curve.short_circuit_current().map(Amps::get),
            curve.greatest_power().map(|top| top.voltage.get()),
            curve.greatest_power().map(|top| top.current.get()),
            module.voc_coefficient().map(VoltsPerKelvin::get),
        ];
        for answer in answers.into_iter().flatten() {
            assert!(answer.is_finite(), "{answers:?} {module:?} {sun:?} {cell:?} {volt:?} {amp:?}");
        }
        Ok(())
    });
}
