//! What a unit measures.

/// Powers of length, mass, time, temperature, plane angle, magnitude and of
/// what is counted.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Dimension([i32; 7]);

impl Dimension {
    pub(super) const NONE: Dimension = Dimension([0; 7]);
    pub(super) const LENGTH: Dimension = Dimension([1, 0, 0, 0, 0, 0, 0]);
    pub(super) const MASS: Dimension = Dimension([0, 1, 0, 0, 0, 0, 0]);
    pub(super) const TIME: Dimension = Dimension([0, 0, 1, 0, 0, 0, 0]);
    pub(super) const TEMPERATURE: Dimension = Dimension([0, 0, 0, 1, 0, 0, 0]);
    pub(super) const ANGLE: Dimension = Dimension([0, 0, 0, 0, 1, 0, 0]);
    pub(super) const MAGNITUDE: Dimension = Dimension([0, 0, 0, 0, 0, 1, 0]);
    pub(super) const COUNT: Dimension = Dimension([0, 0, 0, 0, 0, 0, 1]);

    /// A product of powers of length, mass and time.
    pub(super) const fn mechanical(length: i32, mass: i32, time: i32) -> Dimension {
        Dimension([length, mass, time, 0, 0, 0, 0])
    }

    /// This dimension to a power.
    #[must_use]
    pub(super) const fn power(self, power: i32) -> Dimension {
        let mut powers = self.0;
        let mut number = 0;
        while number < powers.len() {
            powers[number] *= power;
            number += 1;
        }
        Dimension(powers)
    }

    /// The product of two.
    #[must_use]
    pub(super) fn times(self, other: Dimension) -> Dimension {
        let mut powers = self.0;
        for (power, more) in powers.iter_mut().zip(other.0) {
            *power += more;
        }
        Dimension(powers)
    }
}
