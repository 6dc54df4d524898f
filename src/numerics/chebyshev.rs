//! Chebyshev interpolation on a panel, delivered as a polynomial in a local
//! coordinate.

use std::f64::consts::PI;

/// The largest number of nodes a panel may have.
///
/// With 19 nodes, panels of half an octave and the monomial form stay within a
/// few units of rounding; more nodes lose digits in the change of basis.
pub const LARGEST_NODES: usize = 19;

type Square = [[f64; LARGEST_NODES]; LARGEST_NODES];

/// The plan of an interpolation with a fixed number of nodes: where to sample a
/// function on [−1, 1], and how samples become polynomial coefficients.
#[derive(Debug)]
pub struct Chebyshev {
    count: usize,
    nodes: [f64; LARGEST_NODES],
    /// Row k: what each sample contributes to the k-th Chebyshev coefficient.
    transform: Square,
    /// Row k: Tₖ(t) in powers of t.
    centred: Square,
    /// Row k: Tₖ(2u − 1) in powers of u, for a local coordinate that vanishes
    /// at the left end; with alternating signs also for the right end.
    at_left_end: Square,
}

/// Where the local coordinate of a panel vanishes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Origin {
    /// u = t, from −1 to 1.
    Centre,
    /// u = (t + 1)/2, from 0 to 1.
    LeftEnd,
    /// u = (t − 1)/2, from −1 to 0.
    RightEnd,
}

impl Chebyshev {
    /// A plan with `count` nodes, at most [`LARGEST_NODES`].
    #[must_use]
    pub fn new(count: usize) -> Self {
        let count = count.clamp(2, LARGEST_NODES);
        let mut plan = Chebyshev {
            count,
            nodes: [0.0; LARGEST_NODES],
            transform: [[0.0; LARGEST_NODES]; LARGEST_NODES],
            centred: polynomials(1.0, 0.0),
            at_left_end: polynomials(2.0, -1.0),
        };
        for j in 0..count {
            plan.nodes[j] = -cosine(2 * j + 1, count);
            for k in 0..count {
                let weight = if k == 0 { 1.0 } else { 2.0 };
                // Nodes ascend, so the angle is counted from π downwards.
                let sign = if k % 2 == 0 { 1.0 } else { -1.0 };
                plan.transform[k][j] =
                    sign * weight / count as f64 * cosine(k * (2 * j + 1), count);
            }
        }
        plan
    }

    /// The ascending nodes on [−1, 1].
    #[must_use]
    pub fn nodes(&self) -> &[f64] {
        &self.nodes[..self.count]
    }

    /// Nine points at which an interpolant is worst: both ends and inner extrema
    /// of the Chebyshev polynomial that vanishes at all nodes.
    #[must_use]
    pub fn extrema(&self) -> [f64; 9] {
        std::array::from_fn(|k| -cosine(2 * (k * self.count / 8), self.count))
    }

    /// The coefficients of the interpolant's Chebyshev series.
    #[must_use]
    pub fn series(&self, samples: &[f64; LARGEST_NODES]) -> [f64; LARGEST_NODES] {
        let mut series = [0.0; LARGEST_NODES];
        for (coefficient, row) in series.iter_mut().zip(&self.transform).take(self.count) {
            for (weight, sample) in row.iter().zip(samples) {
                *coefficient += weight * sample;
            }
        }
        series
    }

    /// A Chebyshev series as a polynomial in the local coordinate.
    ///
    /// The high coefficients of the series are small wherever the interpolation
    /// has converged, so the large entries of the change of basis meet small
    /// factors and no digits are lost.
    #[must_use]
    pub fn in_powers(&self, series: &[f64; LARGEST_NODES], origin: Origin) -> [f64; LARGEST_NODES] {
        let basis = match origin {
            Origin::Centre => &self.centred,
            Origin::LeftEnd | Origin::RightEnd => &self.at_left_end,
        };
        let mut powers = [0.0; LARGEST_NODES];
        for (k, (coefficient, row)) in series.iter().zip(basis).enumerate().rev() {
            // Tₖ(2u + 1) = (−1)ᵏ Tₖ(2(−u) − 1)
            let sign = if origin == Origin::RightEnd && k % 2 == 1 {
                -1.0
            } else {
                1.0
            };
            for (power, entry) in powers.iter_mut().zip(row).take(k + 1) {
                *power += sign * coefficient * entry;
            }
        }
        if origin == Origin::RightEnd {
            for power in powers.iter_mut().skip(1).step_by(2) {
                *power = -*power;
            }
        }
        powers
    }
}

/// cos(π m / 2n), with the angle reduced in integers so that no digit is lost.
fn cosine(m: usize, n: usize) -> f64 {
    let m = m % (4 * n);
    let m = if m > 2 * n { 4 * n - m } else { m };
    let (m, sign) = if m > n { (2 * n - m, -1.0) } else { (m, 1.0) };
    let angle = PI * m as f64 / (2 * n) as f64;
    // Near π/2 the sine of the complement keeps relative accuracy.
    let complement = PI * (n - m) as f64 / (2 * n) as f64;
    sign * if 2 * m > n {
        libm::sin(complement)
    } else {
        libm::cos(angle)
    }
}

/// Rows of coefficients of Tₖ(a u + b): integers, exact in a double.
fn polynomials(a: f64, b: f64) -> Square {
    let mut rows = [[0.0; LARGEST_NODES]; LARGEST_NODES];
    rows[0][0] = 1.0;
    rows[1][0] = b;
    rows[1][1] = a;
    for k in 2..LARGEST_NODES {
        for j in 0..=k {
            let shifted = if j > 0 { rows[k - 1][j - 1] } else { 0.0 };
            rows[k][j] = 2.0 * (a * shifted + b * rows[k - 1][j]) - rows[k - 2][j];
        }
    }
    rows
}

#[cfg(test)]
mod tests {
    use super::*;

    fn interpolate(
        count: usize,
        origin: Origin,
        function: impl Fn(f64) -> f64,
    ) -> [f64; LARGEST_NODES] {
        let plan = Chebyshev::new(count);
        let mut samples = [0.0; LARGEST_NODES];
        for (sample, node) in samples.iter_mut().zip(plan.nodes()) {
            *sample = function(*node);
        }
        plan.in_powers(&plan.series(&samples), origin)
    }

    fn evaluate(powers: &[f64], u: f64) -> f64 {
        powers.iter().rev().fold(0.0, |sum, power| sum * u + power)
    }

    #[test]
    fn every_origin_describes_the_same_function() {
        let function = |t: f64| 1.0 / (t + 5.0);
        for (origin, coordinate) in [
            (Origin::Centre, (|t| t) as fn(f64) -> f64),
            (Origin::LeftEnd, |t| 0.5 * (t + 1.0)),
            (Origin::RightEnd, |t| 0.5 * (t - 1.0)),
        ] {
            let powers = interpolate(LARGEST_NODES, origin, function);
            for i in 0..=40 {
                let t = -1.0 + f64::from(i) / 20.0;
                let error = evaluate(&powers, coordinate(t)) / function(t) - 1.0;
                // (5 + √24)⁻¹⁹ = 1e-19: only rounding is left.
                assert!(error.abs() < 8e-16, "{origin:?} {t}: {error:e}");
            }
        }
    }

    #[test]
    fn too_few_nodes_show() {
        let powers = interpolate(5, Origin::Centre, |t| 1.0 / (t + 3.0));
        assert!((evaluate(&powers, 0.95) * 3.95 - 1.0).abs() > 1e-6);
    }
}
