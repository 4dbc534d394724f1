//! Values of attributes, properties, classes and styles.

use std::borrow::Cow;

use leptos::prelude::{Get, RwSignal};

use crate::derived::Memo;

/// A value.
pub enum Value {
    /// There is none: the attribute is away, the property is false.
    No,
    /// There is one, and no more to say: the attribute is empty, the property is true.
    Yes,
    /// Text.
    Text(Cow<'static, str>),
    /// Read again whenever what it reads changes.
    Live(Box<dyn Read>),
}

/// What reads a value, as often as it is asked.
pub trait Read {
    /// Reads it.
    fn read(&self) -> Value;
}

impl<F: Fn() -> T, T: IntoValue> Read for F {
    fn read(&self) -> Value {
        self().value()
    }
}

/// What can be the value of an attribute.
pub trait IntoValue {
    /// It as a value.
    fn value(self) -> Value;
}

impl IntoValue for Value {
    fn value(self) -> Value {
        self
    }
}

impl IntoValue for bool {
    fn value(self) -> Value {
        if self { Value::Yes } else { Value::No }
    }
}

impl IntoValue for &'static str {
    fn value(self) -> Value {
        Value::Text(Cow::Borrowed(self))
    }
}

impl IntoValue for String {
    fn value(self) -> Value {
        Value::Text(Cow::Owned(self))
    }
}

impl<T: IntoValue> IntoValue for Option<T> {
    fn value(self) -> Value {
        self.map_or(Value::No, T::value)
    }
}

impl<F: Fn() -> T + 'static, T: IntoValue> IntoValue for F {
    fn value(self) -> Value {
        Value::Live(Box::new(self))
    }
}

impl<T: IntoValue + Clone + Send + Sync + 'static> IntoValue for RwSignal<T> {
    fn value(self) -> Value {
        Value::Live(Box::new(move || self.get()))
    }
}

impl<T: IntoValue + Clone + 'static> IntoValue for Memo<T> {
    fn value(self) -> Value {
        Value::Live(Box::new(move || self.get()))
    }
}

/// A value as it is now.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Now {
    /// As [`Value::No`].
    No,
    /// As [`Value::Yes`].
    Yes,
    /// As [`Value::Text`].
    Text(Cow<'static, str>),
}

impl Value {
    /// What it is now, whatever it reads.
    pub fn now(self) -> Now {
        match self {
            Self::No => Now::No,
            Self::Yes => Now::Yes,
            Self::Text(text) => Now::Text(text),
            Self::Live(read) => read.read().now(),
        }
    }
}
