//! The inputs that a person can enter: name, unit and sensible range of each.
//!
//! A check that lacks an input names its field; the page shows a field by the same item. One list serves both.

use crate::entry::Entry;
use crate::quantity::Quantity;
use crate::typed::{self, Reading, Refusal};
use crate::unit::{Dimension, Unit};

/// What kind of entry a field takes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Takes {
    /// A number with a unit, from `least` to `most` of the dimension's base unit.
    Number {
        /// The unit that stands where none is typed.
        unit: Unit,
        /// The least that can be meant.
        least: f64,
        /// The most that can be meant.
        most: f64,
    },
    /// A whole number from `least` to `most`.
    Whole {
        /// The least that can be meant.
        least: u32,
        /// The most that can be meant.
        most: u32,
    },
    /// Several numbers, one after the other, each with or without a unit.
    List {
        /// The unit that stands where none is typed.
        unit: Unit,
        /// The least that can be meant.
        least: f64,
        /// The most that can be meant.
        most: f64,
    },
    /// One of a short list: a key that is kept, and the words on screen.
    Choice(&'static [(&'static str, &'static str)]),
}

macro_rules! fields {
    ($($(#[$doc:meta])* $id:ident, $name:literal, $takes:expr;)*) => {
        /// An input.
        #[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
        #[repr(u8)]
        pub enum Field {
            $($(#[$doc])* $id,)*
        }

        impl Field {
            /// Every input.
            pub const ALL: &'static [Self] = &[$(Self::$id),*];

            /// Its full name, as screen readers and messages say it.
            #[must_use]
            pub const fn name(self) -> &'static str {
                match self { $(Self::$id => $name,)* }
            }

            /// What it takes.
            #[must_use]
            pub const fn takes(self) -> Takes {
                match self { $(Self::$id => $takes,)* }
            }

            /// The name it is kept under. Never changed once released.
            #[must_use]
            pub const fn key(self) -> &'static str {
                match self { $(Self::$id => stringify!($id),)* }
            }
        }
    };
}

const fn number(unit: Unit, least: f64, most: f64) -> Takes {
    Takes::Number { unit, least, most }
}

const fn whole(least: u32, most: u32) -> Takes {
    Takes::Whole { least, most }
}

const fn list(unit: Unit, least: f64, most: f64) -> Takes {
    Takes::List { unit, least, most }
}

fields! {
    /// Module's open-circuit voltage at the rating conditions.
    Voc, "Voc", number(Unit::Volt, 0.1, 500.0);
    /// Module's voltage at greatest power, at the rating conditions.
    Vmp, "Vmp", number(Unit::Volt, 0.1, 500.0);
    /// Module's short-circuit current at the rating conditions.
    Isc, "Isc", number(Unit::Amp, 0.01, 100.0);
    /// Module's current at greatest power, at the rating conditions.
    Imp, "Imp", number(Unit::Amp, 0.01, 100.0);
    /// Change of the module's open-circuit voltage with temperature.
    VocCoefficient, "Voc coefficient", number(Unit::PercentPerKelvin, -2.0, 2.0);
    /// Change of the module's greatest power with temperature.
    PmaxCoefficient, "Pmax coefficient", number(Unit::RelativePercentPerKelvin, -2.0, 2.0);
    /// Change of the module's short-circuit current with temperature.
    IscCoefficient, "Isc coefficient", number(Unit::CurrentPercentPerKelvin, -2.0, 2.0);
    /// How far above its nameplate a module's open-circuit voltage may lie.
    VocTolerance, "Voc tolerance", number(Unit::Percent, 0.0, 20.0);
    /// Greatest fuse that the module's maker allows in series with it.
    SeriesFuseRating, "Series fuse rating", number(Unit::Amp, 0.1, 200.0);
    /// Greatest system voltage that the module's maker allows.
    SystemVoltage, "System voltage", number(Unit::Volt, 10.0, 2000.0);
    /// How much a light from behind adds to a two-sided module's current.
    RearGain, "Rear gain", number(Unit::Percent, 0.0, 50.0);
    /// Lowest air temperature on record where the array stands.
    RecordLow, "Record low", number(Unit::DegreeCelsius, -90.0, 40.0);
    /// Highest air temperature on record where the array stands.
    RecordHigh, "Record high", number(Unit::DegreeCelsius, -20.0, 60.0);
    /// How the modules are fixed, which decides how hot they run.
    Mounting, "Mounting", Takes::Choice(&[
        ("open", "open rack"),
        ("stand-off", "stand-off on a roof"),
        ("flush", "flush on a roof"),
    ]);
    /// Where the array stands, which decides the voltage that the code allows.
    StandsOn, "Stands on", Takes::Choice(&[
        ("dwelling", "one- or two-family dwelling"),
        ("building", "other building"),
        ("ground", "ground, no building"),
    ]);
    /// Greatest voltage that the controller's input survives.
    InputLimit, "Input limit", number(Unit::Volt, 5.0, 2000.0);
    /// Lowest voltage at which the controller tracks.
    WindowLow, "Window low", number(Unit::Volt, 1.0, 2000.0);
    /// Highest voltage at which the controller tracks.
    WindowHigh, "Window high", number(Unit::Volt, 1.0, 2000.0);
    /// Greatest short-circuit current that the controller's input survives.
    PvCurrentLimit, "PV current limit", number(Unit::Amp, 0.1, 1000.0);
    /// Whether the PV current limit is already lessened by the sunlight factor.
    LimitHoldsFactor, "PV limit holds 1.25", Takes::Choice(&[
        ("no", "no, it is the full rating"),
        ("yes", "yes, it is for Isc as printed"),
    ]);
    /// Greatest current that the controller delivers to the bank.
    OutputCurrent, "Output current", number(Unit::Amp, 0.1, 1000.0);
    /// Highest voltage that the bank is charged at, warm.
    HighestCharge, "Highest charge voltage", number(Unit::Volt, 1.0, 1000.0);
    /// How the controller takes power from the array.
    ControllerKind, "Controller kind", Takes::Choice(&[
        ("mppt", "MPPT"),
        ("pwm", "PWM"),
    ]);
    /// How far above the bank's voltage the array must stand for the controller to go on charging.
    RunningHeadroom, "Running headroom", number(Unit::Volt, 0.0, 50.0);
    /// How far above the bank's voltage the array must stand for the controller to begin charging.
    StartingHeadroom, "Starting headroom", number(Unit::Volt, 0.0, 50.0);
    /// Voltage lost between array and controller at full sun.
    ArrayDrop, "Array drop", number(Unit::Percent, 0.0, 20.0);
    /// Margin that is kept on the cold voltage of a string.
    ColdReserve, "Cold reserve", number(Unit::Percent, 0.0, 50.0);
    /// Fuse fitted in each string.
    StringFuse, "String fuse", number(Unit::Amp, 0.1, 200.0);
    /// Modules in one string.
    Series, "Modules in series", whole(1, 100);
    /// Strings in parallel.
    Strings, "Strings", whole(1, 200);
    /// Modules that there are.
    ModulesAtHand, "Modules at hand", whole(1, 400);
    /// Equal controllers that there are.
    ControllersAtHand, "Controllers at hand", whole(1, 8);
    /// Which family of codes the site is built to.
    CodeFamily, "Code family", Takes::Choice(&[
        ("iec", "IEC"),
        ("north-america", "North America"),
    ]);
    /// What the cells are made of.
    Chemistry, "Chemistry", Takes::Choice(&[
        ("vented-lead", "vented lead"),
        ("agm", "AGM lead"),
        ("gel", "gel lead"),
        ("nickel-iron", "nickel-iron"),
        ("nickel-cadmium", "nickel-cadmium, vented"),
        ("lfp", "LiFePO4"),
        ("nmc", "NMC lithium-ion"),
        ("sodium-ion", "sodium-ion"),
    ]);
    /// Nominal voltage of one cell, or of one block where the cells come in blocks.
    CellVoltage, "Cell voltage", number(Unit::Volt, 0.5, 400.0);
    /// Rated capacity of one cell or block.
    CellCapacity, "Cell capacity", number(Unit::AmpHour, 0.1, 20_000.0);
    /// Cells, or blocks where the cells come in blocks.
    NumberOfCells, "Number of cells", whole(1, 400);
    /// Nominal voltage of the bus that the bank is to stand on.
    BusVoltage, "Bus voltage", number(Unit::Volt, 6.0, 400.0);
    /// Lowest temperature of the room that the bank stands in.
    ColdestInTheRoom, "Coldest in the room", number(Unit::DegreeCelsius, -60.0, 40.0);
    /// Highest temperature of the room that the bank stands in.
    WarmestInTheRoom, "Warmest in the room", number(Unit::DegreeCelsius, -20.0, 70.0);
    /// Rows of cells on the shelf.
    Rows, "Rows", whole(1, 40);
    /// Cells in each row of the shelf.
    Columns, "Columns", whole(1, 100);
    /// Length of a cell, along the line between its posts.
    CellLength, "Cell length", number(Unit::Millimetre, 0.01, 2.0);
    /// Width of a cell, across the line between its posts.
    CellWidth, "Cell width", number(Unit::Millimetre, 0.01, 2.0);
    /// Where on a cell its posts stand.
    Posts, "Posts", Takes::Choice(&[
        ("ends", "one at each end"),
        ("same-side", "both at one long side, plus left"),
        ("corners", "opposite corners, plus left"),
        ("same-side-right", "both at one long side, plus right"),
        ("short-side", "both at one short side, plus left"),
        ("short-side-right", "both at one short side, plus right"),
        ("corners-right", "opposite corners, plus right"),
    ]);
    /// Cross-section of the links between cells.
    LinkSize, "Link size", number(Unit::SquareMillimetre, 0.5, 2000.0);
    /// Where the bank's two leads leave the shelf.
    TakeOff, "Take-off", Takes::Choice(&[
        ("same-end", "same end"),
        ("opposite-ends", "opposite ends"),
        ("middle", "middle"),
    ]);
    /// Lowest voltage at which the inverter runs.
    InverterLow, "Inverter low", number(Unit::Volt, 1.0, 1000.0);
    /// Highest voltage that the inverter's battery side tolerates.
    InverterHigh, "Inverter high", number(Unit::Volt, 1.0, 1000.0);
    /// Highest voltage that the loads on the bus tolerate; blank where there are none.
    LoadsHigh, "Loads high", number(Unit::Volt, 1.0, 1000.0);
    /// Greatest current that all chargers together put into the bank.
    ChargeCurrent, "Charge current", number(Unit::Amp, 0.1, 5000.0);
    /// Greatest steady power drawn from the bank.
    GreatestLoad, "Greatest load", number(Unit::Watt, 1.0, 500_000.0);
    /// Lowest voltage at which the loads on the bus run; blank where there are none.
    LoadsLow, "Loads low", number(Unit::Volt, 1.0, 1000.0);
    /// Cells in series inside one block; blank where the block's voltage tells.
    CellsInABlock, "Cells in a block", whole(1, 130);
    /// Cells or blocks in series, where the layout is already chosen.
    CellsInSeries, "Cells in series", whole(1, 400);
    /// Strings of cells side by side, where the layout is already chosen.
    StringsOfCells, "Strings of cells", whole(1, 400);
    /// Voltage of one cell at which discharge ends.
    CellEnd, "End of discharge, a cell", number(Unit::Volt, 0.5, 5.0);
    /// Absorb voltage of one cell at 25 °C.
    CellAbsorb, "Absorb, a cell", number(Unit::Volt, 0.5, 5.0);
    /// Float voltage of one cell at 25 °C.
    CellFloat, "Float, a cell", number(Unit::Volt, 0.5, 5.0);
    /// Equalise or boost voltage of one cell at 25 °C.
    CellEqualise, "Equalise, a cell", number(Unit::Volt, 0.5, 5.0);
    /// Change of the charge voltage of one cell with temperature.
    CellCompensation, "Compensation, a cell", number(Unit::MillivoltPerKelvin, -0.02, 0.02);
    /// Highest voltage to which the chargers let compensation raise the bank.
    ChargeCap, "Charge voltage cap", number(Unit::Volt, 1.0, 1000.0);
    /// Part of the capacity that is drawn before the bank is charged again.
    DepthUsed, "Depth used", number(Unit::Percent, 1.0, 100.0);
    /// Highest voltage that a controller's output can reach when the bank is no longer there.
    ControllerOutputLimit, "Controller output limit", number(Unit::Volt, 1.0, 2000.0);
    /// Whether each block guards itself.
    OwnProtection, "Own protection", Takes::Choice(&[
        ("no", "bare cells or blocks"),
        ("yes", "packs that guard themselves"),
    ]);
    /// Greatest charge current that one pack's protection lets pass.
    PackChargeLimit, "Pack charge limit", number(Unit::Amp, 0.1, 5000.0);
    /// Greatest steady current that one pack's protection lets pass.
    PackDischargeLimit, "Pack discharge limit", number(Unit::Amp, 0.1, 5000.0);
    /// Greatest short current that one pack's protection lets pass.
    PackPeak, "Pack peak", number(Unit::Amp, 0.1, 10_000.0);
    /// How long one pack's protection lets the peak pass.
    PackPeakTime, "Pack peak time", number(Unit::Second, 0.0, 1.0);
    /// Cell temperature below which a pack refuses charge; blank where it does not.
    PackColdLock, "Pack cold lock", number(Unit::DegreeCelsius, -40.0, 30.0);
    /// Greatest power drawn from the bank while something starts; blank where nothing does.
    StartingLoad, "Starting load", number(Unit::Watt, 1.0, 500_000.0);
    /// How long the greatest start lasts.
    StartingTime, "Starting time", number(Unit::Second, 0.0, 1.0);
    /// Whether bare live posts can be touched.
    PostsCovered, "Posts covered", Takes::Choice(&[
        ("no", "bare posts within reach"),
        ("yes", "covered or behind a barrier"),
    ]);
    /// Whether the room or the hands in it may be wet.
    WetRoom, "Wet room", Takes::Choice(&[
        ("no", "dry"),
        ("yes", "may be wet"),
    ]);
    /// Free area of the air inlet; the outlet is as large.
    AirOpening, "Air opening", number(Unit::SquareCentimetre, 0.0, 100_000.0);
    /// Whether people sleep in the room that the bank stands in.
    SleepingRoom, "Sleeping room", Takes::Choice(&[
        ("no", "nobody sleeps there"),
        ("yes", "people sleep there"),
    ]);
    /// Lowest charge that the bank reaches.
    LowestCharge, "Lowest charge", number(Unit::Percent, 0.0, 100.0);
    /// Resistance of one tie between neighbouring strings, lugs counted.
    TieResistance, "Tie resistance", number(Unit::Milliohm, 0.0, 1.0);
    /// Greatest difference of rest voltage between strings or packs that are to be joined.
    VoltsApart, "Volts apart", number(Unit::Volt, 0.0, 1000.0);
    /// Energy drawn from the bank on a usual day.
    UsedADay, "Used a day", number(Unit::WattHour, 0.0, 10_000_000.0);
    /// What a run joins, which decides by what rule its current is found.
    RunKind, "Kind of run", Takes::Choice(&[
        ("pv-string", "PV string"),
        ("pv-array", "PV array"),
        ("controller", "controller output"),
        ("bank", "bank main"),
        ("inverter", "inverter feed"),
        ("dc-branch", "DC branch"),
        ("dc-feeder", "DC feeder"),
        ("ac-output", "AC output"),
        ("generator", "generator"),
    ]);
    /// Current of a run, without any factor.
    RunCurrent, "Current", number(Unit::Amp, 0.01, 5000.0);
    /// Power that a run carries; of an inverter feed, what the inverter gives.
    RunPower, "Power", number(Unit::Watt, 0.1, 500_000.0);
    /// Voltage of a run, nominal; of a PV run, at greatest power.
    RunVoltage, "Voltage", number(Unit::Volt, 1.0, 1500.0);
    /// Length of a run from end to end.
    RunLength, "Length one way", number(Unit::Metre, 0.01, 5000.0);
    /// What the conductor is made of.
    Conductor, "Conductor", Takes::Choice(&[
        ("copper", "copper, stranded"),
        ("copper-fine", "copper, fine-strand"),
        ("copper-solid", "copper, solid"),
        ("tinned", "tinned copper, stranded"),
        ("tinned-fine", "tinned copper, fine-strand"),
        ("aluminium", "aluminium"),
    ]);
    /// Size of the conductor that there is.
    ConductorSize, "Size", number(Unit::SquareMillimetre, 0.05, 1000.0);
    /// What the conductor is insulated with.
    Insulation, "Insulation", Takes::Choice(&[
        ("60", "60 °C (TW, UF)"),
        ("pvc-70", "PVC 70 °C"),
        ("75", "75 °C (THW, THWN)"),
        ("90", "90 °C (XLPE, THHN)"),
        ("pv", "PV cable"),
    ]);
    /// The air round the conductor.
    Ambient, "Ambient", number(Unit::DegreeCelsius, -60.0, 90.0);
    /// Conductors that carry current together in one conduit or bundle, these included.
    ConductorsTogether, "Conductors together", whole(1, 100);
    /// How the conductor is laid.
    Method, "Method", Takes::Choice(&[
        ("conduit", "in conduit or trunking"),
        ("surface", "sheathed, on a surface"),
        ("cable-air", "sheathed, in free air"),
        ("singles-air", "singles, in free air"),
    ]);
    /// The temperature that the terminals at both ends are made for.
    Terminals, "Terminals", Takes::Choice(&[
        ("60", "60 °C"),
        ("70", "70 °C"),
        ("75", "75 °C"),
        ("90", "90 °C"),
    ]);
    /// Part of the voltage that may be lost in a run.
    AllowedDrop, "Allowed drop", number(Unit::Percent, 0.01, 50.0);
    /// Rating of the breaker or fuse that there is.
    Breaker, "Breaker", number(Unit::Amp, 0.5, 6000.0);
    /// Current that the breaker or fuse can interrupt at the run's voltage.
    InterruptingRating, "Interrupting rating", number(Unit::Amp, 100.0, 500_000.0);
    /// Resistance of the bank, new, warm and full.
    BankResistance, "Bank resistance", number(Unit::Milliohm, 0.000_01, 10.0);
    /// What protects the run.
    BreakerType, "Breaker type", Takes::Choice(&[
        ("breaker", "breaker, not polarised"),
        ("polarised", "breaker, polarised"),
        ("fuse", "fuse"),
    ]);
    /// Equal conductors side by side for each pole.
    ConductorsInParallel, "Conductors in parallel", whole(1, 8);
    /// Which pole of the direct current is earthed.
    Earthing, "Earthing", Takes::Choice(&[
        ("negative", "negative earthed"),
        ("positive", "positive earthed"),
        ("floating", "neither earthed"),
    ]);
    /// Whether module frames, racks and cases are joined to earth.
    FramesBonded, "Frames bonded", Takes::Choice(&[
        ("no", "not all of them"),
        ("yes", "all joined to earth"),
    ]);
    /// Whether a fault to earth of the array is found and told, or opened.
    GroundFault, "Ground-fault protection", Takes::Choice(&[
        ("no", "none"),
        ("yes", "fitted"),
    ]);
    /// Surge arresters of the array's circuit.
    Arresters, "Surge arresters", Takes::Choice(&[
        ("none", "none"),
        ("one", "at the controller"),
        ("both", "at both ends"),
    ]);
    /// Where an inverter joins its neutral to earth.
    InverterBond, "Bond in the inverter", Takes::Choice(&[
        ("none", "none"),
        ("fixed", "always"),
        ("switched", "opens when passing through"),
    ]);
    /// Voltage of the alternating side.
    AcVolts, "AC voltage", number(Unit::Volt, 90.0, 500.0);
    /// Whether the panel joins neutral and earth.
    PanelBond, "Bond in the panel", Takes::Choice(&[
        ("no", "neutral and earth apart"),
        ("yes", "joined there"),
    ]);
    /// How the legs of the panel are fed.
    PanelLegs, "Panel legs", Takes::Choice(&[
        ("single", "one leg"),
        ("joined", "two legs on one 120 V source"),
        ("split", "two legs, 120/240 V source"),
    ]);
    /// Whether two circuits of the panel share a neutral.
    Multiwire, "Multiwire circuits", Takes::Choice(&[
        ("no", "none share a neutral"),
        ("yes", "some share a neutral"),
    ]);
    /// Whether the grid can ever feed the panel.
    GridFeeds, "Grid feeds the panel", Takes::Choice(&[
        ("no", "never"),
        ("yes", "it can"),
    ]);
    /// Whether a transfer switch keeps grid and inverter apart.
    TransferSwitch, "Transfer switch", Takes::Choice(&[
        ("no", "none"),
        ("yes", "fitted"),
    ]);
    /// Whether the generator joins its neutral to its frame.
    GeneratorBond, "Bond in the generator", Takes::Choice(&[
        ("no", "floating neutral"),
        ("yes", "neutral joined to frame"),
    ]);
    /// Whether what transfers between inverter and generator opens the neutral too.
    NeutralSwitched, "Neutral switched", Takes::Choice(&[
        ("no", "neutral stays joined"),
        ("yes", "neutral is switched too"),
    ]);
    /// Greatest power of a source that is not the sun.
    SourcePower, "Rated power", number(Unit::Watt, 1.0, 500_000.0);
    /// Voltage of such a source when nothing loads it and it runs as fast as it can.
    OverspeedVolts, "Open-circuit volts at overspeed", number(Unit::Volt, 1.0, 2000.0);
    /// Power of the load that takes what such a source gives when the bank is full.
    DumpLoad, "Dump load", number(Unit::Watt, 0.0, 500_000.0);
    /// Whether an inverter's capacitors are charged through a resistor before its breaker is closed.
    Precharged, "Precharged", Takes::Choice(&[
        ("no", "closed straight onto the bank"),
        ("yes", "through a resistor first"),
    ]);
    /// Power that the inverter gives for as long as it likes.
    InverterContinuous, "Inverter continuous", number(Unit::Watt, 1.0, 500_000.0);
    /// How cells side by side are joined.
    ParallelAs, "Parallel as", Takes::Choice(&[
        ("strings", "whole strings"),
        ("groups", "groups of cells"),
    ]);
    /// Voltages of single cells, rested, in the order of the cells.
    RestVoltages, "Rest voltages", list(Unit::Volt, 0.0, 100.0);
    /// Measured capacities of single cells, in the order of the cells.
    Capacities, "Measured capacities", list(Unit::AmpHour, 0.01, 20_000.0);
    /// What the meter read after each link of the shelf, in the order of fitting.
    LinkReadings, "Readings after links", list(Unit::Volt, -2000.0, 2000.0);
    /// Equal loads at equal distances along a run.
    LoadsAlong, "Loads along it", whole(1, 50);
    /// How far each load along a run is from its head, in the order of the loads.
    LoadDistances, "Distances to loads", list(Unit::Metre, 0.01, 5000.0);
    /// What each load along a run draws, in the order of the loads.
    LoadWatts, "Watts of each load", list(Unit::Watt, 0.0, 500_000.0);
    /// What is started: a class of load, whose usual figures stand in.
    StartLoad, "Load", Takes::Choice(&[
        ("well-pump", "well pump, submersible"),
        ("surface-pump", "pump on the ground"),
        ("refrigerator", "refrigerator or freezer"),
        ("air-compressor", "air compressor"),
        ("hand-tool", "hand tool or saw, brushes"),
        ("shop-motor", "table saw or shop motor"),
        ("washing-machine", "washing machine"),
        ("microwave", "microwave oven"),
        ("fan", "fan"),
        ("heater", "heater or kettle"),
        ("electronics", "lights and electronics"),
    ]);
    /// What it draws while it runs.
    RunningPower, "Running power", number(Unit::Watt, 0.1, 500_000.0);
    /// How it starts.
    StartsAs, "Starts as", Takes::Choice(&[
        ("resistive", "resistive"),
        ("electronic", "electronic"),
        ("fan", "fan"),
        ("universal", "universal motor"),
        ("compressor", "compressor"),
        ("submersible", "submersible pump"),
        ("induction", "induction motor"),
    ]);
    /// Starting over running apparent power.
    StartingMultiple, "Starting multiple", number(Unit::One, 0.1, 100.0);
    /// Letter on a motor's nameplate that tells its apparent power with the rotor standing still.
    CodeLetter, "Code letter", Takes::Choice(&[
        ("a", "A"),
        ("b", "B"),
        ("c", "C"),
        ("d", "D"),
        ("e", "E"),
        ("f", "F"),
        ("g", "G"),
        ("h", "H"),
        ("j", "J"),
        ("k", "K"),
        ("l", "L"),
        ("m", "M"),
        ("n", "N"),
        ("p", "P"),
        ("r", "R"),
        ("s", "S"),
        ("t", "T"),
        ("u", "U"),
    ]);
    /// Current of a motor with its rotor standing still, from its nameplate.
    LockedRotor, "Locked-rotor current", number(Unit::Amp, 0.1, 5000.0);
    /// Rated output of a motor.
    MotorSize, "Motor size", number(Unit::Horsepower, 1.0, 500_000.0);
    /// Power factor while it starts.
    StartingPowerFactor, "Starting power factor", number(Unit::One, 0.05, 1.0);
    /// Power factor while it runs.
    RunningPowerFactor, "Running power factor", number(Unit::One, 0.05, 1.0);
    /// How long the start lasts.
    StartingSeconds, "Starting seconds", number(Unit::Second, 0.0, 1.0);
    /// How many start at once.
    HowMany, "How many", whole(1, 50);
    /// What runs already.
    AlreadyRunning, "Already running", number(Unit::Watt, 0.0, 500_000.0);
    /// Apparent power that the inverter gives for the surge time.
    InverterSurge, "Inverter surge", number(Unit::VoltAmp, 1.0, 1_000_000.0);
    /// How long the surge lasts.
    SurgeSeconds, "Surge seconds", number(Unit::Second, 0.0, 1.0);
    /// Apparent power that the inverter gives for a shorter time, where its nameplate tells two.
    ShortSurge, "Short surge", number(Unit::VoltAmp, 1.0, 1_000_000.0);
    /// How long that lasts.
    ShortSurgeSeconds, "Short surge seconds", number(Unit::Second, 0.0, 1.0);
    /// What feeds a load.
    FedBy, "Fed by", Takes::Choice(&[
        ("ac", "the inverter"),
        ("dc", "the bus, direct current"),
    ]);
    /// How old the bank is, which decides its resistance.
    BankAge, "Bank age", Takes::Choice(&[
        ("new", "new"),
        ("used", "some years"),
        ("old", "old"),
    ]);
    /// Efficiency of the inverter in a surge.
    InverterEfficiency, "Inverter efficiency", number(Unit::Percent, 10.0, 100.0);
    /// Voltage at which the inverter lets go.
    CutOff, "Cut-off", number(Unit::Volt, 1.0, 1000.0);
    /// Air round the inverter.
    InverterAir, "Air at the inverter", number(Unit::DegreeCelsius, -40.0, 90.0);
    /// Height of the site above the sea.
    Height, "Height", number(Unit::Metre, -450.0, 8000.0);
    /// Voltage of the bank at rest, as the start begins.
    BankEmf, "Bank voltage", number(Unit::Volt, 1.0, 1000.0);
    /// Resistance of cables, links and lugs between bank and inverter, there and back.
    CableResistance, "Cable resistance", number(Unit::Milliohm, 0.0, 10.0);
    /// Charge at which it must still start.
    Charge, "Charge", number(Unit::Percent, 0.0, 100.0);
    /// Temperature of the bank.
    BankTemperature, "Bank temperature", number(Unit::DegreeCelsius, -60.0, 70.0);
    /// Packs side by side that guard themselves.
    Packs, "Packs", whole(1, 50);
    /// Trip curve of the breaker between bank and inverter.
    TripCurve, "Trip curve", Takes::Choice(&[
        ("b", "B"),
        ("c", "C"),
        ("d", "D"),
    ]);
    /// Times its rating that the breaker surely lets pass for the length of the start, where its maker says.
    TripMultiple, "Trip multiple", number(Unit::One, 1.0, 50.0);
    /// Rating of the generator.
    GeneratorRating, "Generator rating", number(Unit::VoltAmp, 100.0, 1_000_000.0);
    /// What the charger takes from the generator.
    ChargerDraw, "Charger draw", number(Unit::VoltAmp, 0.0, 1_000_000.0);
    /// Whether a source can be cut off under load, within reach.
    Isolator, "Isolator within reach", Takes::Choice(&[
        ("no", "none"),
        ("yes", "opens under load"),
    ]);
    /// From the edge of a cell to the middle of a post.
    PostInset, "Post from edge", number(Unit::Millimetre, 0.001, 1.0);
    /// Between two cells of a row of the shelf.
    CellGap, "Between cells", number(Unit::Millimetre, 0.0, 1.0);
    /// Between two rows of the shelf.
    RowGap, "Between rows", number(Unit::Millimetre, 0.0, 3.0);
    /// Which way the cells stand on the shelf.
    CellsStand, "Cells stand", Takes::Choice(&[
        ("side-by-side", "side by side"),
        ("end-to-end", "end to end"),
        ("either-way", "either way"),
    ]);
    /// Where the bank's two posts should stand on the shelf.
    TakeOffPosts, "Take-off posts", Takes::Choice(&[
        ("anywhere", "anywhere"),
        ("same-side", "same side"),
        ("opposite-ends", "opposite ends"),
        ("front", "front row"),
    ]);
    /// What a meter reads across one cell as the links are fitted.
    CellNow, "Each cell now", number(Unit::Volt, 0.2, 60.0);
}

/// What a range in percent for each kelvin is multiplied by where volts or amps for each kelvin are typed:
/// a hundredth of the greatest voltage (500 V) or current (100 A) that a module's field takes.
const fn widest(unit: Unit) -> f64 {
    match unit {
        Unit::MillivoltPerKelvin | Unit::VoltPerKelvin => 5.0,
        _ => 1.0,
    }
}

impl Field {
    /// The field that is kept under `key`.
    #[must_use]
    pub fn of_key(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|field| field.key() == key)
    }

    /// The units that may stand in it; none for choices and whole numbers.
    #[must_use]
    pub fn units(self) -> Vec<Unit> {
        match self.takes() {
            Takes::Number { unit, .. } => {
                Unit::ALL.iter().copied().filter(|other| other.dimension() == unit.dimension()).collect()
            }
            Takes::Whole { .. } | Takes::Choice(_) | Takes::List { .. } => Vec::new(),
        }
    }

    /// Reads what was typed into it. `unit` is the unit that the person chose for the field, if any.
    ///
    /// `Ok(None)` where nothing was typed.
    ///
    /// # Errors
    ///
    /// A [`Refusal`] that says, for the person, what was not understood or what range is possible.
    pub fn read(self, text: &str, unit: Option<Unit>) -> Result<Option<Reading>, Refusal> {
        if text.trim().is_empty() {
            return Ok(None);
        }
        match self.takes() {
            Takes::Number { unit: usual, least, most } => {
                let reading = typed::read(text, unit.unwrap_or(usual))?;
                let times = widest(reading.unit());
                reading.within(least * times, most * times, usual).map(Some)
            }
            Takes::Whole { least, most } => {
                let reading = typed::read(text, Unit::One)?;
                reading.whole_within(least, most).map(Some)
            }
            Takes::Choice(_) | Takes::List { .. } => Err(Refusal::NotANumber { text: text.to_owned() }),
        }
    }

    /// Reads several numbers that were typed or pasted into it.
    ///
    /// # Errors
    ///
    /// The first that was not understood: its place, from 1, and why.
    pub fn list<Q: Quantity>(self, text: &str) -> Result<Vec<Q>, (usize, Refusal)> {
        // A list's readings are of its field's dimension, which is the quantity's where the caller is right.
        Ok(self.readings(text)?.into_iter().filter_map(Reading::quantity).collect())
    }

    /// The same, each number with the unit that it was typed in.
    ///
    /// # Errors
    ///
    /// As [`Field::list`].
    pub fn readings(self, text: &str) -> Result<Vec<Reading>, (usize, Refusal)> {
        let Takes::List { unit, least, most } = self.takes() else { return Ok(Vec::new()) };
        let mut all = Vec::new();
        for (place, item) in typed::list::read_list(text, unit).into_iter().enumerate() {
            let read = item.reading.and_then(|reading| reading.within(least, most, unit));
            all.push(read.map_err(|refusal| (place + 1, refusal))?);
        }
        Ok(all)
    }

    /// Reads what was typed as a quantity. A blank field is [`Entry::Blank`]; a refused one is [`Entry::Unread`], and
    /// so is one whose unit does not turn into the quantity's, such as V/K where a percentage for each kelvin is asked.
    #[must_use]
    pub fn entry<Q: Quantity>(self, text: &str, unit: Option<Unit>) -> Entry<Q> {
        self.reading(text, unit).quantity()
    }

    /// The same in the unit that was typed.
    #[must_use]
    pub fn reading(self, text: &str, unit: Option<Unit>) -> Entry<Reading> {
        match self.read(text, unit) {
            Ok(None) => Entry::Blank,
            Ok(Some(reading)) => Entry::Typed(reading),
            Err(_) => Entry::Unread,
        }
    }

    /// What it measures, where it takes a number with a unit.
    #[must_use]
    pub const fn dimension(self) -> Option<Dimension> {
        match self.takes() {
            Takes::Number { unit, .. } => Some(unit.dimension()),
            Takes::Whole { .. } | Takes::Choice(_) | Takes::List { .. } => None,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::{Celsius, Count, Metres, PercentPerKelvin, Volts, VoltsPerKelvin};

    #[test]
    fn keys_name_one_field_each() {
        for field in Field::ALL {
            assert_eq!(Field::of_key(field.key()), Some(*field));
        }
        assert!(Field::ALL.len() <= 192, "FieldSet holds 192");
    }

    #[test]
    fn an_entry_is_in_the_units_of_its_quantity() {
        assert_eq!(Field::Voc.entry::<Volts>("49,3", None), Entry::of(49.3));
        assert_eq!(Field::Voc.entry::<Volts>("49300 mV", None), Entry::of(49.3));
        assert_eq!(Field::Voc.entry::<Volts>("", None), Entry::Blank);
        assert_eq!(Field::Voc.entry::<Volts>("49,,3", None), Entry::Unread);
        assert_eq!(Field::Series.entry::<Count>("3", None), Entry::of(3.0));
        assert_eq!(Field::RecordLow.entry::<Celsius>("−40 F", None), Entry::of(-40.0));
        assert_eq!(Field::PmaxCoefficient.entry::<PercentPerKelvin>("-0.35", None), Entry::of(-0.35));
    }

    #[test]
    fn a_list_names_the_first_that_is_not_understood() {
        let field = Field::RestVoltages;
        assert_eq!(field.list("3.31 3,31; 3.31 V"), Ok([3.31, 3.31, 3.31].map(Volts::new).to_vec()));
        assert_eq!(field.list::<Volts>(""), Ok(Vec::new()));
        let (place, _) = field.list::<Volts>("3.31 3.3.1 3.3").unwrap_err();
        assert_eq!(place, 2);
        // Whatever the list is of, what is good in it is taken.
        assert!(Field::Capacities.readings("281,5; 279 Ah").is_ok_and(|all| all.len() == 2));
        assert_eq!(Field::LoadDistances.list("2 m; 15 ft"), Ok([2.0, 4.572].map(Metres::new).to_vec()));
        assert!(Field::LoadDistances.readings("2 V").is_err());
    }

    #[test]
    fn volts_for_each_kelvin_are_never_taken_for_percent() {
        let field = Field::VocCoefficient;
        assert_eq!(field.entry::<PercentPerKelvin>("-0.27", None), Entry::of(-0.27));
        assert_eq!(field.entry::<VoltsPerKelvin>("-133 mV/K", None), Entry::of(-0.133));
        assert_eq!(field.entry::<PercentPerKelvin>("-133 mV/K", None), Entry::Unread);
        assert_eq!(field.entry::<VoltsPerKelvin>("-0.27", None), Entry::Unread);
    }
}
