//! Finding, acting and seeing on the page, over WebDriver.
