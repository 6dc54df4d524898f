//! How the rounding of a value moves its redshift.

use super::{ILL_CONDITIONED, Inverse, Inverter, Solved};
use crate::expansion::{Curve, Epoch, Epochs, Wanted};

/// Results may feel a change of redshift this many times over, volumes three times.
const OUTPUT: f64 = 4.0;
/// The same for edges, between which a redshift may be moved three times as much.
const MARGIN: f64 = 3.0 * OUTPUT;

impl Inverter<'_> {
    /// By how much the rounding of a value moves its redshift.
    #[must_use]
    pub fn uncertainty(&self, value: f64, redshift: f64) -> f64 {
        match self.inverse {
            Inverse::Direct { sensitivity, .. } => f64::EPSILON * sensitivity(redshift),
            Inverse::Table { .. } => {
                self.spread_in_table(value, &self.frame.history.epoch(redshift))
            }
            Inverse::Solved { given, .. } => {
                let given = given(value, &self.frame);
                let target = self.target();
                target.map_or(f64::NAN, |target| {
                    let spread = 0.25 * target.slack(value, given) * given;
                    self.near_turning(target.curve, spread, redshift)
                })
            }
        }
    }

    /// Whether the rounding of a value may move its redshift so far that a result
    /// is moved by 1e-9.
    pub(super) fn is_doubtful(&self, value: f64, redshift: f64) -> bool {
        let (lowest, highest) = self.frame.history.range();
        // Beyond the history there will be no result.
        (lowest..=highest).contains(&redshift) && {
            let spread = OUTPUT * self.uncertainty(value, redshift);
            spread.is_nan() || spread > ILL_CONDITIONED * redshift.abs()
        }
    }

    /// The solution of spread = |y′| dz + ½ |y″| dz²: next to a turning point the
    /// slope alone would promise nothing.
    fn near_turning(&self, curve: &Solved, spread: f64, redshift: f64) -> f64 {
        let (lowest, highest) = self.frame.history.range();
        let slope = |z: f64| {
            (curve.slope)(
                &self.frame.history.epoch(z.clamp(lowest, highest)),
                &self.frame,
            )
        };
        let step = 1e-5 * (1.0 + redshift);
        let bend = ((slope(redshift + step) - slope(redshift - step)) / (2.0 * step)).abs();
        let slope = slope(redshift).abs();
        2.0 * spread / (slope + (slope * slope + 2.0 * bend * spread).sqrt())
    }

    /// The widest range of redshifts, about z = 1, where rounding cannot move a
    /// redshift by a share of 1e-9, with a margin for what lies between edges.
    pub(super) fn find_settled(&self) -> (f64, f64) {
        match self.inverse {
            Inverse::Solved { .. } => self.frame.history.range(),
            Inverse::Direct { sensitivity, .. } => self.settled_in_closed_form(*sensitivity),
            Inverse::Table { .. } => self.settled_in_table(),
        }
    }

    fn settled_in_closed_form(&self, sensitivity: fn(f64) -> f64) -> (f64, f64) {
        let spread = |z: f64| MARGIN * f64::EPSILON * sensitivity(z);
        // The sensitivity per redshift never falls: one edge bounds all below it.
        let calm = |z: f64| spread(z) < ILL_CONDITIONED * z;
        let highest = self.frame.history.range().1;
        let edges = self.frame.history.edges().iter().copied();
        let high = if calm(highest) {
            highest
        } else {
            edges.filter(|edge| calm(*edge)).fold(0.0, f64::max)
        };
        (2.0 * spread(0.0) / ILL_CONDITIONED, high)
    }

    fn settled_in_table(&self) -> (f64, f64) {
        let highest = self.frame.history.range().1;
        let mut edges = self.frame.history.edges().to_vec();
        edges.retain(|edge| *edge >= 0.0 && *edge <= highest);
        let wanted = Wanted {
            rate: true,
            ..self.quantity.forward.wanted
        };
        let mut epochs = Epochs::default();
        self.frame.history.epochs(&edges, wanted, &mut epochs);
        let spread = |row: usize, z: f64| {
            let epoch = epochs.row(z, row);
            let value = (self.quantity.forward.at)(&epoch, &self.frame);
            MARGIN * self.spread_in_table(value, &epoch)
        };
        let today = edges.first().map_or(0.0, |today| spread(0, *today));
        let rows = edges.iter().enumerate().skip(1);
        let calm = rows.take_while(|(row, z)| spread(*row, **z) < ILL_CONDITIONED * **z);
        let high = calm.last().map_or(f64::NEG_INFINITY, |(_, z)| *z);
        (2.0 * today / ILL_CONDITIONED, high)
    }

    /// By how much the rounding of a value moves the redshift that a table finds.
    fn spread_in_table(&self, value: f64, epoch: &Epoch) -> f64 {
        let Inverse::Table { scale, curve } = self.inverse else {
            return f64::NAN;
        };
        let time = matches!(curve, Curve::Age | Curve::Lookback);
        let stretch = if time { 1.0 + epoch.redshift } else { 1.0 };
        f64::EPSILON * (value / scale(&self.frame)).abs() * stretch * epoch.rate
    }
}
