//! Panels: the tables of one history, found by the bits of 1 + z.
//!
//! The top bits of the double v = 1 + z number the half-octaves, so that no
//! logarithm is taken; most have one panel, and a short search over the edges
//! finds the right one where a history needs more. On a panel the integrals are
//! polynomials in a local coordinate that is linear in z (not in v, so that a
//! tiny z loses nothing), or, beside a turning point, in the root of the
//! distance to it, which is where the integrals are smooth.

use crate::numerics::{DoubleDouble, LARGEST_NODES};

/// The smallest stretch a table covers, 2⁻⁷: z = −0.9921875.
pub(super) const LOWEST_OCTAVE: i32 = -7;
/// One above the last octave a table covers: v < 2³¹.
pub(super) const HIGHEST_OCTAVE: i32 = 31;
/// Half-octaves between them.
pub(super) const HALF_OCTAVES: usize = 2 * (HIGHEST_OCTAVE - LOWEST_OCTAVE) as usize;
/// The leading bits of the double 2⁻⁷: exponent and first bit of the mantissa.
const FIRST_KEY: u64 = ((1023 + LOWEST_OCTAVE) as u64) << 1;

/// Values evaluated together, so that one's multiplication need not wait for
/// another's sum; more of them would not fit the registers.
pub(super) const LANES: usize = 8;

/// Coefficients of one polynomial on a panel.
pub(super) type Powers = [f64; LARGEST_NODES];

/// Values of the four integrals at one redshift, in units of 1/H0.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(super) struct Sums {
    pub comoving: f64,
    /// What `comoving` leaves out.
    pub comoving_low: f64,
    pub lookback: f64,
    pub conformal: f64,
    pub age: f64,
}

impl Sums {
    pub(super) fn set_comoving(&mut self, sum: DoubleDouble) {
        self.comoving = sum.value();
        self.comoving_low = (sum + -self.comoving).value();
    }
}

/// One panel with its local coordinate u.
#[derive(Clone, Debug)]
pub(super) struct Panel {
    /// The redshift at which the local coordinate vanishes, as an unevaluated sum.
    pub centre: f64,
    pub centre_low: f64,
    /// u = (z − centre) · scale, or its root beside a turning point.
    pub scale: f64,
    pub beside_turning_point: bool,
    /// The integrals at u = 0.
    pub at_centre: Sums,
    /// ∫ dz/E from the centre to u is u · Σ `distance[k]` uᵏ.
    pub distance: Powers,
    /// ∫ dz/((1+z) E) likewise.
    pub time: Powers,
    /// E itself, Σ `rate[k]` uᵏ; beside a turning point E/u.
    pub rate: Powers,
}

/// The panels that meet one half-octave: from `first` to `last`.
#[derive(Clone, Copy, Debug, Default)]
struct Cell {
    first: u32,
    last: u32,
}

/// All panels of one history, ascending in redshift, with the integrals at their edges.
#[derive(Clone, Debug)]
pub(super) struct Panels {
    cells: [Cell; HALF_OCTAVES],
    panels: Vec<Panel>,
    /// Redshifts of the edges: one more than there are panels.
    pub edges: Vec<f64>,
    /// The integrals at the edges, each column for itself so that a search stays in cache.
    pub comoving: Vec<f64>,
    pub lookback: Vec<f64>,
    pub conformal: Vec<f64>,
    pub age: Vec<f64>,
}

/// The lower end of a half-octave by its number; the number after the last gives the top.
pub(super) fn half_octave(number: usize) -> f64 {
    let octave = LOWEST_OCTAVE + (number / 2) as i32;
    let mantissa = if number.is_multiple_of(2) { 1.0 } else { 1.5 };
    libm::ldexp(mantissa, octave)
}

impl Panels {
    /// Joins panels with their edges and the sums there.
    pub(super) fn new(panels: Vec<Panel>, edges: Vec<f64>, sums: &[Sums]) -> Self {
        let last_panel = panels.len().saturating_sub(1);
        let mut cells = [Cell::default(); HALF_OCTAVES];
        for (number, cell) in cells.iter_mut().enumerate() {
            let (low, high) = (half_octave(number) - 1.0, half_octave(number + 1) - 1.0);
            let first = edges.partition_point(|edge| *edge <= low).saturating_sub(1);
            let last = edges.partition_point(|edge| *edge < high).saturating_sub(1);
            *cell = Cell {
                first: first.min(last_panel) as u32,
                last: last.min(last_panel) as u32,
            };
        }
        Panels {
            cells,
            panels,
            edges,
            comoving: sums.iter().map(|sum| sum.comoving).collect(),
            lookback: sums.iter().map(|sum| sum.lookback).collect(),
            conformal: sums.iter().map(|sum| sum.conformal).collect(),
            age: sums.iter().map(|sum| sum.age).collect(),
        }
    }

    /// The panel of a redshift; the nearest one outside the range.
    #[inline]
    pub(super) fn panel(&self, redshift: f64) -> &Panel {
        let key = ((1.0 + redshift).to_bits() >> 51).saturating_sub(FIRST_KEY) as usize;
        let Cell { first, last } = self.cells[key.min(HALF_OCTAVES - 1)];
        if first == last {
            return &self.panels[first as usize];
        }
        self.search(redshift, first as usize, last as usize)
    }

    fn search(&self, redshift: f64, first: usize, last: usize) -> &Panel {
        let above = self.edges[first + 1..=last].partition_point(|edge| *edge <= redshift);
        &self.panels[first + above]
    }

    /// A panel by its number.
    #[inline]
    pub(super) fn nth(&self, number: usize) -> &Panel {
        &self.panels[number]
    }

    /// Heap bytes of the tables.
    pub(super) fn bytes(&self) -> usize {
        self.panels.capacity() * size_of::<Panel>() + 5 * self.edges.capacity() * size_of::<f64>()
    }
}

impl Panel {
    /// The local coordinate of a redshift.
    #[inline]
    pub(super) fn coordinate(&self, redshift: f64) -> f64 {
        let offset = ((redshift - self.centre) - self.centre_low) * self.scale;
        if self.beside_turning_point {
            offset.max(0.0).sqrt()
        } else {
            offset
        }
    }

    /// The same on a panel of a history without turning points.
    #[inline]
    pub(super) fn linear_coordinate(&self, redshift: f64) -> f64 {
        (redshift - self.centre) * self.scale
    }

    /// What Σ `rate[k]` uᵏ is to be multiplied with to give E.
    #[inline]
    pub(super) fn rate_factor(&self, u: f64) -> f64 {
        if self.beside_turning_point { u } else { 1.0 }
    }

    /// The redshift of a local coordinate.
    #[inline]
    pub(super) fn redshift(&self, u: f64) -> f64 {
        let offset = if self.beside_turning_point { u * u } else { u };
        self.centre + (self.centre_low + offset / self.scale)
    }
}

/// Σ `powers[k]` uᵏ: even and odd powers by Horner's rule in u², two chains that
/// need not wait for each other.
#[inline]
pub(super) fn polynomial(powers: &Powers, u: f64) -> f64 {
    let square = u * u;
    let mut even = powers[LAST];
    let mut odd = powers[LAST - 1];
    for k in (0..LAST - 1).rev().step_by(2) {
        even = even * square + powers[k];
    }
    for k in (1..LAST - 2).rev().step_by(2) {
        odd = odd * square + powers[k];
    }
    even + u * odd
}

/// A polynomial a lane, each lane with the very operations of [`polynomial`].
#[inline(always)]
pub(super) fn polynomials(powers: [&Powers; LANES], u: &[f64; LANES]) -> [f64; LANES] {
    let square: [f64; LANES] = std::array::from_fn(|lane| u[lane] * u[lane]);
    let mut even: [f64; LANES] = std::array::from_fn(|lane| powers[lane][LAST]);
    let mut odd: [f64; LANES] = std::array::from_fn(|lane| powers[lane][LAST - 1]);
    for k in (1..=LAST / 2).rev() {
        for lane in 0..LANES {
            even[lane] = even[lane] * square[lane] + powers[lane][2 * k - 2];
        }
        if k > 1 {
            for lane in 0..LANES {
                odd[lane] = odd[lane] * square[lane] + powers[lane][2 * k - 3];
            }
        }
    }
    std::array::from_fn(|lane| even[lane] + u[lane] * odd[lane])
}

/// The highest power, an even one.
const LAST: usize = LARGEST_NODES - 1;
const _: () = assert!(LAST.is_multiple_of(2));
