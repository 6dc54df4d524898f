//! Where a formula or a value was published.

use std::fmt;

/// A published source.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Citation {
    /// Family names, "et al." for many.
    pub authors: &'static str,
    /// Year of publication.
    pub year: u16,
    /// Journal, volume and page, or the archive number.
    pub reference: &'static str,
    /// Equation, table or section; empty for the whole work.
    pub locator: &'static str,
}

impl fmt::Display for Citation {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(
            formatter,
            "{} {}, {}",
            self.authors, self.year, self.reference
        )?;
        if !self.locator.is_empty() {
            write!(formatter, ", {}", self.locator)?;
        }
        Ok(())
    }
}
