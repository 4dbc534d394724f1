//! Every work that a table, a rule or a method is taken from, once each.
//!
//! Code, workings on screen and tests point to these same items. `seen` tells how far the figures were met:
//! see the notes by each table.

/// A publication.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Work {
    /// Short name as the trade says it, such as "IEC 62548".
    pub name: &'static str,
    /// Title.
    pub title: &'static str,
    /// Edition or year.
    pub edition: &'static str,
}

/// A place in a publication.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Clause {
    /// The publication.
    pub work: &'static Work,
    /// Clause, table or chapter in it.
    pub at: &'static str,
}

macro_rules! works {
    ($($(#[$doc:meta])* $id:ident: $name:literal, $title:literal, $edition:literal;)*) => {
        $($(#[$doc])* pub static $id: Work = Work { name: $name, title: $title, edition: $edition };)*

        /// All of them, for the list of sources on the page.
        pub static ALL: &[&Work] = &[$(&$id),*];
    };
}

works! {
    /// Wire gauge.
    ASTM_B258: "ASTM B258", "Standard Nominal Diameters and Cross-Sectional Areas of AWG Sizes of Solid Round Wires", "2018";
    /// North American code.
    NEC: "NFPA 70", "National Electrical Code", "2023";
    /// PV arrays, design.
    IEC_62548: "IEC 62548", "Photovoltaic (PV) arrays: design requirements", "2016";
    /// Fuse-links for PV.
    IEC_60269_6: "IEC 60269-6", "Low-voltage fuses: fuse-links for the protection of solar photovoltaic energy systems", "2010";
    /// Corrections of measured I-V curves for temperature and irradiance.
    IEC_60891: "IEC 60891", "Photovoltaic devices: procedures for temperature and irradiance corrections to measured I-V characteristics", "2021";
    /// Rating conditions of modules.
    IEC_61215: "IEC 61215", "Terrestrial photovoltaic (PV) modules: design qualification and type approval", "2021";
    /// Five-parameter model.
    DE_SOTO: "De Soto et al. 2006", "Improvement and validation of a model for photovoltaic array performance, Solar Energy 80", "2006";
    /// Solar textbook: cell temperature, geometry, monthly means.
    DUFFIE_BECKMAN: "Duffie and Beckman", "Solar Engineering of Thermal Processes", "4th, 2013";
    /// Constants of nature.
    CODATA: "CODATA", "Recommended values of the fundamental physical constants", "2018";
    /// Efficiency weighting by power level for a dull climate.
    EN_50530: "EN 50530", "Overall efficiency of grid connected photovoltaic inverters", "2010";
    /// Efficiency weighting by power level for a sunny climate.
    CEC_WEIGHTS: "CEC weighting", "Performance test protocol for evaluating inverters, California Energy Commission", "2004";
    /// Nodal analysis with currents of ideal sources among the unknowns.
    MODIFIED_NODAL: "Ho, Ruehli and Brennan 1975", "The modified nodal approach to network analysis, IEEE Transactions on Circuits and Systems 22", "1975";
    /// When Newton's iteration falls steadily toward a solution, chapter 13. From memory.
    MONOTONE_NEWTON: "Ortega and Rheinboldt 1970", "Iterative solution of nonlinear equations in several variables", "1970";
    /// Protection of cables against overload and short circuit.
    IEC_60364_4_43: "IEC 60364-4-43", "Low-voltage electrical installations: protection against overcurrent", "2008";
    /// Earthing and protective conductors; annex A gives the heating of a conductor that loses no heat.
    IEC_60364_5_54: "IEC 60364-5-54", "Low-voltage electrical installations: earthing arrangements and protective conductors", "2011";
    /// Protection against electric shock.
    IEC_60364_4_41: "IEC 60364-4-41", "Low-voltage electrical installations: protection against electric shock", "2005+A1:2017";
    /// Dealing numbers to sets of nearly equal sums.
    KARMARKAR_KARP: "Karmarkar and Karp 1982", "The differencing method of set partitioning, University of California report", "1982";
    /// Rested voltage and specific gravity of vented lead cells. Met in two technical pages and from memory.
    BCI: "BCI service manual", "Battery service manual: open-circuit voltage and specific gravity by state of charge", "as reproduced in handbooks";
    /// Freezing of sulphuric acid in water. Met in three vehicle manuals and from memory.
    ACID_FREEZING: "lead battery handbooks", "Freezing point of battery acid by specific gravity", "army technical manuals";
    /// Lead capacity against temperature. Factors from memory; the table's range was met.
    IEEE_485: "IEEE 485", "Recommended practice for sizing lead-acid batteries for stationary applications", "2010";
    /// Nickel-cadmium capacity against temperature. It points to the maker's curve; typical values from memory.
    IEEE_1115: "IEEE 1115", "Recommended practice for sizing nickel-cadmium batteries for stationary applications", "2014";
    /// Ranges of the cell chemistries. From memory; a maker's data sheet always wins.
    BATTERY_HANDBOOK: "Handbook of Batteries", "Handbook of Batteries, with IEEE 450, 1188 and 1106 for upkeep", "4th ed.";
    /// Charging limits of lithium cells.
    IEC_62133_2: "IEC 62133-2", "Secondary cells and batteries: safety requirements for portable sealed lithium cells", "2017";
    /// Ventilation and distance. Formula, opening and valve-regulated float met; other rows from memory.
    IEC_62485_2: "IEC 62485-2", "Safety requirements for secondary batteries and battery installations: stationary batteries", "2010";
    /// Capacity against the rate of discharge.
    PEUKERT: "Peukert 1897", "On the dependence of the capacity of lead accumulators on the current of discharge", "1897";
    /// Values that stand apart from the rest of a list.
    NIST_HANDBOOK: "NIST/SEMATECH e-Handbook", "e-Handbook of Statistical Methods", "2012";
    /// A fact every practitioner knows, with no one publication behind it.
    COMMON_PRACTICE: "common practice", "what careful practitioners do", "";
    /// A value of ours, with its reason given where it stands.
    CHOSEN: "chosen", "a cautious value of ours, with its reason", "";
    /// Resistance of copper.
    IEC_60028: "IEC 60028", "International standard of resistance for copper", "1925";
    /// Resistance of aluminium.
    IEC_60889: "IEC 60889", "Hard-drawn aluminium wire for overhead line conductors", "1987";
    /// Conductors of cables.
    IEC_60228: "IEC 60228", "Conductors of insulated cables", "2004";
    /// Current rating of cables from their losses.
    IEC_60287: "IEC 60287-1-1", "Electric cables: calculation of the current rating", "2006";
    /// Ampacity and voltage drop.
    IEC_60364_5_52: "IEC 60364-5-52", "Low-voltage electrical installations: wiring systems", "2009";
    /// Cable for PV.
    EN_50618: "EN 50618", "Electric cables for photovoltaic systems", "2014";
    /// Small circuit-breakers.
    IEC_60898: "IEC 60898-1", "Circuit-breakers for overcurrent protection for household and similar installations", "2015";
    /// Installations with PV. From memory.
    IEC_60364_7_712: "IEC 60364-7-712", "Low-voltage electrical installations: photovoltaic (PV) systems", "2017";
    /// Installations fed by generating sets. From memory.
    IEC_60364_5_55: "IEC 60364-5-55", "Low-voltage electrical installations: other equipment, generating sets", "2011+A1";
    /// Ranges of starting currents by kind of load. From memory; sources differ widely.
    MOTOR_GUIDES: "motor and generator guides", "Starting multiples and times of motors and other loads, engineering handbooks", "";
    /// Fuses.
    IEC_60269: "IEC 60269-1", "Low-voltage fuses: general requirements", "2006";
}

impl Work {
    /// A clause of this work.
    #[must_use]
    pub const fn at(&'static self, at: &'static str) -> Clause {
        Clause { work: self, at }
    }
}
