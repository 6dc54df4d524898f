//! From distance or time back to redshift.

use super::History;
use super::panels::{Panel, Powers, polynomials};
use crate::numerics::LARGEST_NODES;

/// The integrals of a history that grow or fall steadily with redshift.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Curve {
    /// Comoving distance, growing with z.
    Comoving,
    /// Lookback time, growing with z.
    Lookback,
    /// Age, falling with z.
    Age,
    /// Conformal time, falling with z.
    Conformal,
}

/// Newton steps of every inversion: from the secant of a panel, whose error is
/// below a third of its width, each step at least squares it; the fifth is below
/// rounding. A fixed number keeps the bits independent of the neighbours.
const STEPS: usize = 5;

impl History {
    /// The redshifts at which a curve has the given values (units of 1/H0, c/H0).
    ///
    /// # Accuracy
    /// The curve at the result is within 4 ulp of the value plus what one ulp of
    /// the redshift makes.
    ///
    /// # Errors
    /// NaN where a value is not on the curve between the ends of the tables or
    /// the curve is infinite.
    pub fn invert(&self, curve: Curve, values: &[f64], redshifts: &mut Vec<f64>) {
        redshifts.resize(values.len(), 0.0);
        for (values, redshifts) in values.chunks(8).zip(redshifts.chunks_mut(8)) {
            let mut eight = [f64::NAN; 8];
            eight[..values.len()].copy_from_slice(values);
            let found = self.invert_eight(curve, &eight);
            redshifts.copy_from_slice(&found[..redshifts.len()]);
        }
    }

    /// The values of a curve at the lower and the upper end of the tables.
    #[must_use]
    pub fn reach(&self, curve: Curve) -> (f64, f64) {
        let knots = self.knots(curve);
        (
            knots.first().copied().unwrap_or(f64::NAN),
            knots.last().copied().unwrap_or(f64::NAN),
        )
    }

    fn knots(&self, curve: Curve) -> &[f64] {
        match curve {
            Curve::Comoving => &self.panels.comoving,
            Curve::Lookback => &self.panels.lookback,
            Curve::Age => &self.panels.age,
            Curve::Conformal => &self.panels.conformal,
        }
    }

    fn invert_eight(&self, curve: Curve, values: &[f64; 8]) -> [f64; 8] {
        let falling = matches!(curve, Curve::Age | Curve::Conformal);
        let knots = self.knots(curve);
        let last = knots.len() - 2;
        let numbers = values.map(|value| {
            let above = knots.partition_point(|knot| {
                if falling {
                    *knot >= value
                } else {
                    *knot <= value
                }
            });
            above.saturating_sub(1).min(last)
        });
        let panels = numbers.map(|number| self.panels.nth(number));
        let powers = panels.map(|panel| curve.powers(panel));
        // What the polynomial must come to, and where on the panel that is about.
        let mut goal = [0.0; 8];
        let mut u = [0.0; 8];
        let mut ends = [(0.0, 0.0); 8];
        for lane in 0..8 {
            let (number, panel) = (numbers[lane], panels[lane]);
            let base = curve.base(panel);
            goal[lane] = if falling {
                base - values[lane]
            } else {
                values[lane] - base
            };
            let edges = &self.panels.edges;
            let (low, high) = (
                panel.coordinate(edges[number]),
                panel.coordinate(edges[number + 1]),
            );
            ends[lane] = (low.min(high), low.max(high));
            let share = (values[lane] - knots[number]) / (knots[number + 1] - knots[number]);
            u[lane] = low + share * (high - low);
        }
        for _ in 0..STEPS {
            let (integral, slope) = integrals(powers, &u);
            for lane in 0..8 {
                let next = u[lane] - (integral[lane] - goal[lane]) / slope[lane];
                u[lane] = next.clamp(ends[lane].0, ends[lane].1);
            }
        }
        let mut redshifts = [0.0; 8];
        for lane in 0..8 {
            let inside = values[lane] >= knots[0].min(knots[last + 1])
                && values[lane] <= knots[0].max(knots[last + 1]);
            let redshift = panels[lane].redshift(u[lane]);
            redshifts[lane] = if inside && knots[0].is_finite() {
                redshift
            } else {
                f64::NAN
            };
        }
        redshifts
    }
}

impl Curve {
    fn powers(self, panel: &Panel) -> &Powers {
        match self {
            Curve::Comoving | Curve::Conformal => &panel.distance,
            Curve::Lookback | Curve::Age => &panel.time,
        }
    }

    fn base(self, panel: &Panel) -> f64 {
        match self {
            Curve::Comoving => panel.at_centre.comoving,
            Curve::Lookback => panel.at_centre.lookback,
            Curve::Age => panel.at_centre.age,
            Curve::Conformal => panel.at_centre.conformal,
        }
    }
}

/// u · Σ powers[k] uᵏ with its derivative, eight lanes at once.
fn integrals(powers: [&Powers; 8], u: &[f64; 8]) -> ([f64; 8], [f64; 8]) {
    let value = polynomials(powers, u);
    let mut slope = [0.0; 8];
    for k in (0..LARGEST_NODES).rev() {
        let weight = (k + 1) as f64;
        for lane in 0..8 {
            slope[lane] = slope[lane] * u[lane] + weight * powers[lane][k];
        }
    }
    let mut integral = [0.0; 8];
    for lane in 0..8 {
        integral[lane] = u[lane] * value[lane];
    }
    (integral, slope)
}
