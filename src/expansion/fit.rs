//! One panel's polynomials, fitted to the functions they replace.

use super::Densities;
use super::panels::{Panel, Powers, Sums};
use super::turning::End;
use crate::numerics::{Chebyshev, LARGEST_NODES, Origin, gauss_legendre_16};

/// A panel is halved while its last coefficient exceeds this share of the first;
/// what is cut off is then smaller by the decay of the series, at least 5 a step.
const CONVERGED: f64 = 4e-16;

/// A stretch interval with the polynomials fitted there.
pub(super) struct Fit {
    /// The stretches at its ends.
    pub low: f64,
    pub high: f64,
    shape: Shape,
    /// dD_C/du, dt/du and E (beside a turning point E/u) in powers of the local coordinate u.
    pub distance_slope: Powers,
    pub time_slope: Powers,
    pub rate: Powers,
    pub converged: bool,
}

/// What the local coordinate is.
#[derive(Clone, Copy)]
enum Shape {
    /// Linear in z.
    Line(Origin),
    /// The root of the distance to a turning point, above (+1) or below (−1) it.
    Root { end: End, side: f64 },
}

/// What the polynomials stand for at one point: dD_C/du, dt/du, E; beside a
/// turning point E/u, which does not vanish there.
pub(super) struct Exact {
    pub distance_slope: f64,
    pub time_slope: f64,
    pub rate: f64,
}

impl Fit {
    /// A panel from one stretch to another; if one of them is 1 the local
    /// coordinate vanishes there, so that every integral keeps its digits as z → 0.
    pub(super) fn line(densities: &Densities, plan: &Chebyshev, low: f64, high: f64) -> Fit {
        let origin = if low == 1.0 {
            Origin::LeftEnd
        } else if high == 1.0 {
            Origin::RightEnd
        } else {
            Origin::Centre
        };
        let mut fit = Fit::of(densities, plan, low, high, Shape::Line(origin), origin);
        if origin != Origin::Centre {
            // E(z = 0) = 1 exactly. What rounding left there is taken away with a
            // line that vanishes at the other end, where the slopes may be smaller.
            let outward = if origin == Origin::LeftEnd { 1.0 } else { -1.0 };
            for (powers, today) in [
                (&mut fit.distance_slope, high - low),
                (&mut fit.time_slope, high - low),
                (&mut fit.rate, 1.0),
            ] {
                powers[1] -= outward * (today - powers[0]);
                powers[0] = today;
            }
        }
        fit
    }

    /// A panel that begins at a turning point and ends at the stretch `other`.
    pub(super) fn root(densities: &Densities, plan: &Chebyshev, end: End, other: f64) -> Fit {
        let side = if other > end.stretch { 1.0 } else { -1.0 };
        let (low, high) = if side > 0.0 {
            (end.stretch, other)
        } else {
            (other, end.stretch)
        };
        Fit::of(
            densities,
            plan,
            low,
            high,
            Shape::Root { end, side },
            Origin::LeftEnd,
        )
    }

    fn of(
        densities: &Densities,
        plan: &Chebyshev,
        low: f64,
        high: f64,
        shape: Shape,
        origin: Origin,
    ) -> Fit {
        let zero = [0.0; LARGEST_NODES];
        let mut fit = Fit {
            low,
            high,
            shape,
            distance_slope: zero,
            time_slope: zero,
            rate: zero,
            converged: true,
        };
        let (mut distance, mut time, mut rate) = (zero, zero, zero);
        for (j, node) in plan.nodes().iter().enumerate() {
            let exact = fit.exact(densities, fit.coordinate(*node));
            (distance[j], time[j], rate[j]) = (exact.distance_slope, exact.time_slope, exact.rate);
        }
        let last = plan.nodes().len() - 1;
        let mut powers = [distance, time, rate].map(|samples| {
            let series = plan.series(&samples);
            // The one before guards against an accidental zero.
            let end = series[last].abs().max(0.1 * series[last - 1].abs());
            fit.converged &= end <= CONVERGED * series[0].abs();
            plan.in_powers(&series, origin)
        });
        [fit.distance_slope, fit.time_slope, fit.rate] = std::mem::replace(&mut powers, [zero; 3]);
        fit
    }

    /// The local coordinate of a point between −1 (low end) and 1 (high end).
    pub(super) fn coordinate(&self, point: f64) -> f64 {
        match self.shape {
            Shape::Line(Origin::Centre) => point,
            Shape::Line(Origin::RightEnd) => 0.5 * (point - 1.0),
            Shape::Line(Origin::LeftEnd) | Shape::Root { .. } => 0.5 * (point + 1.0),
        }
    }

    /// The local coordinates of the low and the high end.
    pub(super) fn ends(&self) -> (f64, f64) {
        match self.shape {
            Shape::Root { side, .. } if side < 0.0 => (1.0, 0.0),
            _ => (self.coordinate(-1.0), self.coordinate(1.0)),
        }
    }

    /// The redshift that one unit of the local coordinate spans.
    fn unit(&self) -> f64 {
        match self.shape {
            Shape::Line(Origin::Centre) => 0.5 * (self.high - self.low),
            Shape::Line(_) | Shape::Root { .. } => self.high - self.low,
        }
    }

    /// The functions themselves.
    pub(super) fn exact(&self, densities: &Densities, u: f64) -> Exact {
        match self.shape {
            Shape::Line(origin) => {
                let base = match origin {
                    Origin::Centre => 0.5 * (self.low + self.high),
                    Origin::LeftEnd => self.low,
                    Origin::RightEnd => self.high,
                };
                let stretch = base + self.unit() * u;
                let rate = densities.rate(stretch);
                let distance_slope = self.unit() / rate;
                Exact {
                    distance_slope,
                    time_slope: distance_slope / stretch,
                    rate,
                }
            }
            Shape::Root { end, side } => {
                let offset = side * self.unit() * u * u;
                let stretch = end.stretch + offset;
                // E² = offset · (mean slope of E² since the turning point), without a difference.
                let mean = gauss_legendre_16(0.0, 1.0, |share| {
                    densities.rate_squared_slope(end.stretch + share * offset)
                });
                let rate = (side * self.unit() * mean).sqrt();
                let distance_slope = 2.0 * side * self.unit() / rate;
                Exact {
                    distance_slope,
                    time_slope: distance_slope / stretch,
                    rate,
                }
            }
        }
    }

    /// What the polynomials say of the same.
    pub(super) fn fitted(&self, u: f64) -> Exact {
        let value = |powers: &Powers| super::panels::polynomial(powers, u);
        Exact {
            distance_slope: value(&self.distance_slope),
            time_slope: value(&self.time_slope),
            rate: value(&self.rate),
        }
    }

    /// The panel, its integrals at the centre still to be summed.
    pub(super) fn panel(&self) -> Panel {
        let integral = |slope: &Powers| {
            let mut integral = *slope;
            for (k, power) in integral.iter_mut().enumerate() {
                *power /= (k + 1) as f64;
            }
            integral
        };
        let (centre, centre_low, side) = match self.shape {
            Shape::Line(Origin::Centre) => {
                ((self.low - 1.0) + 0.5 * (self.high - self.low), 0.0, 1.0)
            }
            Shape::Line(_) => (0.0, 0.0, 1.0),
            Shape::Root { end, side } => {
                let (centre, error) = crate::numerics::two_sum(end.stretch, -1.0);
                (centre, error + end.stretch_low, side)
            }
        };
        Panel {
            centre,
            centre_low,
            scale: side / self.unit(),
            beside_turning_point: matches!(self.shape, Shape::Root { .. }),
            at_centre: Sums::default(),
            distance: integral(&self.distance_slope),
            time: integral(&self.time_slope),
            rate: self.rate,
        }
    }
}
