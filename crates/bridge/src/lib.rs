//! The only crate that knows how Linehut stores and sends what a person typed.
