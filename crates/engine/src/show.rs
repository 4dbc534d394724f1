//! placeholder
#![allow(missing_docs)]
use crate::quantity::Amount;
pub fn computed(a: Amount) -> String {
    format!("{:.1} {}", a.number, a.unit.symbol())
}
pub fn given(a: Amount) -> String {
    format!("{} {}", a.number, a.unit.symbol())
}
pub fn step(a: Amount) -> String {
    format!("{:.3} {}", a.number, a.unit.symbol())
}
pub fn number(n: f64, digits: usize) -> String {
    format!("{n:.digits$}")
}
