//! Massive neutrinos: the energy density and pressure of a relic Fermi–Dirac gas.

/// F(y) = 120/(7π⁴) ∫₀^∞ p² √(p² + y²)/(eᵖ + 1) dp, the energy density of a
/// species over that of a massless one; y = m c²/(k T).
#[must_use]
pub fn energy(y: f64) -> f64 {
    integral(|p| p * p * (p * p + y * y).sqrt())
}

/// G(y) = 120/(7π⁴) ∫₀^∞ p⁴/√(p² + y²)/(eᵖ + 1) dp, three times its pressure
/// over the energy density of a massless one: F − y F′.
#[must_use]
pub fn pressure(y: f64) -> f64 {
    integral(|p| p * p * p * p / (p * p + y * y).sqrt())
}

fn integral(weight: impl Fn(f64) -> f64) -> f64 {
    // 120/(7π⁴)
    const NORM: f64 = 0.17598826722316005;
    let step = 1.0 / 8.0;
    let mut sum = 0.0;
    for i in -200..=40 {
        let p = libm::exp(step * f64::from(i));
        sum += p * weight(p) / (libm::exp(p) + 1.0);
    }
    NORM * step * sum
}
