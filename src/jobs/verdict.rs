//! What is to be said about a row as a whole.

use super::code::Code;
use super::remarks::Detail;
use crate::quantity::{Frame, Inverter, Miss};

/// How a row stands.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub(super) enum Standing {
    /// It has a redshift of 0 or more.
    #[default]
    Usual,
    /// It has a redshift below 0, which was asked for.
    Ahead,
    /// It has none.
    Null,
}

/// Judges rows by what was given and the redshift found for it.
pub(super) struct Verdict<'a, 'b> {
    frame: Frame<'a>,
    inverter: &'b Inverter<'a>,
    future: bool,
    /// Redshifts from 0 to this need no remark.
    quiet: f64,
}

/// Electron–positron pairs matter above.
const PAIRS: f64 = 1e8;
/// Radiation matters above.
const RADIATION: f64 = 20.0;

impl<'a, 'b> Verdict<'a, 'b> {
    pub(super) fn new(frame: Frame<'a>, inverter: &'b Inverter<'a>, future: bool) -> Self {
        let physics = if frame.history.spec().photons() > 0.0 {
            PAIRS
        } else {
            RADIATION
        };
        let quiet = physics.min(frame.history.range().1);
        Verdict {
            frame,
            inverter,
            future,
            quiet,
        }
    }

    /// Whether there is nothing to be said about a block.
    pub(super) fn all_usual(&self, redshifts: &[f64]) -> bool {
        let quiet = self.quiet;
        // Without an early end, so that it is done in lanes.
        redshifts
            .iter()
            .fold(true, |usual, z| usual & (*z >= 0.0) & (*z <= quiet))
    }

    /// How a row stands, with what is to be said: `value` as it came, `given` in
    /// the unit of the catalogue.
    pub(super) fn on(
        &self,
        value: f64,
        given: f64,
        redshift: f64,
        branch: usize,
    ) -> (Standing, Option<(Code, Detail)>) {
        if redshift >= 0.0 && redshift <= self.quiet {
            return (Standing::Usual, None);
        }
        let (low, high) = self.frame.history.range();
        let null = |code, detail| (Standing::Null, Some((code, detail)));
        if value.is_nan() {
            null(Code::Missing, Detail::None)
        } else if value.is_infinite() {
            null(Code::NotFinite, Detail::None)
        } else if redshift.is_nan() {
            let (code, detail) = self.on_miss(given, branch);
            null(code, detail)
        } else if redshift <= -1.0 {
            null(Code::OutsideDomain, Detail::None)
        } else if redshift < 0.0 && !self.future {
            null(Code::Blueshift, Detail::None)
        } else if redshift < low || redshift > high {
            null(Code::BeyondModelRange, Detail::Between(low, high))
        } else if redshift > self.quiet {
            (Standing::Usual, Some((Code::BeyondPhysics, Detail::None)))
        } else {
            (Standing::Ahead, None)
        }
    }

    fn on_miss(&self, given: f64, branch: usize) -> (Code, Detail) {
        let (low, high) = self.frame.history.range();
        match self.inverter.miss(given, branch) {
            Miss::Blueshift => (Code::Blueshift, Detail::None),
            Miss::OutsideDomain => (Code::OutsideDomain, Detail::None),
            Miss::BeyondMaximum(largest) if largest.is_finite() => (
                Code::BeyondMaximum,
                Detail::Largest(largest, self.inverter.quantity().unit),
            ),
            Miss::BeyondMaximum(_) => (Code::BeyondMaximum, Detail::None),
            Miss::BelowMinimum(lowest, taken) => {
                let unit = self.inverter.quantity().unit;
                let detail = if taken {
                    Detail::Smallest(lowest, unit)
                } else {
                    Detail::StaysAbove(lowest, unit)
                };
                (Code::OutsideDomain, detail)
            }
            Miss::BeforeBeginning => (Code::BeforeBeginning, Detail::None),
            Miss::NoBeginning => (Code::NoBeginning, Detail::None),
            Miss::Divergent => (Code::Divergent, Detail::None),
            Miss::BeyondRange => (Code::BeyondModelRange, Detail::Between(low, high)),
        }
    }
}
