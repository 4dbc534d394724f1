//! One file per command.

pub mod assess;
pub mod bench;
pub mod pack;
pub mod serve;
pub mod stamp;
pub mod test;
