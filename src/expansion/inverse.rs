//! From distance or time back to redshift.

use super::History;
use super::panels::{LANES, Panel, Powers, polynomials};
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
        for (values, redshifts) in values.chunks(LANES).zip(redshifts.chunks_mut(LANES)) {
            let mut lanes = [f64::NAN; LANES];
            lanes[..values.len()].copy_from_slice(values);
            let found = self.invert_lanes(curve, &lanes);
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

    fn invert_lanes(&self, curve: Curve, values: &[f64; LANES]) -> [f64; LANES] {
        let starts: [Start; LANES] = std::array::from_fn(|lane| self.start(curve, values[lane]));
        let powers: [&Powers; LANES] = std::array::from_fn(|lane| curve.powers(starts[lane].panel));
        let mut u: [f64; LANES] = std::array::from_fn(|lane| starts[lane].u);
        for _ in 0..STEPS {
            let (integral, slope) = integrals(powers, &u);
            for lane in 0..LANES {
                let start = &starts[lane];
                let next = u[lane] - (integral[lane] - start.goal) / slope[lane];
                u[lane] = next.max(start.low).min(start.high);
            }
        }
        std::array::from_fn(|lane| {
            let start = &starts[lane];
            if start.inside {
                start.panel.redshift(u[lane])
            } else {
                f64::NAN
            }
        })
    }

    /// Where the search for one value starts.
    #[inline]
    fn start(&self, curve: Curve, value: f64) -> Start<'_> {
        let falling = matches!(curve, Curve::Age | Curve::Conformal);
        let knots = self.knots(curve);
        let last = knots.len() - 2;
        let above = knots.partition_point(|knot| {
            if falling {
                *knot >= value
            } else {
                *knot <= value
            }
        });
        let number = above.saturating_sub(1).min(last);
        let panel = self.panels.nth(number);
        let edges = &self.panels.edges;
        let (low, high) = (
            panel.coordinate(edges[number]),
            panel.coordinate(edges[number + 1]),
        );
        let share = (value - knots[number]) / (knots[number + 1] - knots[number]);
        let base = curve.base(panel);
        let (first, end) = (knots[0], knots[last + 1]);
        Start {
            panel,
            goal: if falling { base - value } else { value - base },
            u: low + share * (high - low),
            low: low.min(high),
            high: low.max(high),
            inside: first.is_finite() && value >= first.min(end) && value <= first.max(end),
        }
    }
}

/// The panel that holds a value, with the bracket of the local coordinate there.
#[derive(Clone, Copy)]
struct Start<'a> {
    panel: &'a Panel,
    /// What the polynomial must come to.
    goal: f64,
    /// On the secant of the panel.
    u: f64,
    low: f64,
    high: f64,
    /// Whether the curve takes the value at all.
    inside: bool,
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

/// u · Σ `powers[k]` uᵏ with its derivative, all lanes at once.
fn integrals(powers: [&Powers; LANES], u: &[f64; LANES]) -> ([f64; LANES], [f64; LANES]) {
    let value = polynomials(powers, u);
    let mut slope = [0.0; LANES];
    for k in (0..LARGEST_NODES).rev() {
        let weight = (k + 1) as f64;
        for lane in 0..LANES {
            slope[lane] = slope[lane] * u[lane] + weight * powers[lane][k];
        }
    }
    let mut integral = [0.0; LANES];
    for lane in 0..LANES {
        integral[lane] = u[lane] * value[lane];
    }
    (integral, slope)
}
