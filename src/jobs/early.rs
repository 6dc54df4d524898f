//! Decoupling, the drag epoch, and the sound horizons to them.

use super::description::{Early, EarlyEpoch, Scalar};
use crate::expansion::History;
use crate::expansion::tail::to_infinity;
use crate::model::{Citation, Printed};
use crate::numerics::gauss_legendre_16;

/// Redshifts that the paper of a published set prints.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct PrintedEpochs {
    /// Of decoupling.
    pub decoupling_redshift: Option<f64>,
    /// Of the drag epoch.
    pub drag_redshift: Option<f64>,
}

impl From<&Printed> for PrintedEpochs {
    fn from(printed: &Printed) -> Self {
        PrintedEpochs {
            decoupling_redshift: printed.decoupling_redshift,
            drag_redshift: printed.drag_redshift,
        }
    }
}

/// The sound horizon at the drag epoch in Mpc: the integral to the printed drag
/// redshift, or to that of the fit; `None` without baryons and radiation.
#[must_use]
pub fn sound_horizon_at_drag_mpc(history: &History, printed: PrintedEpochs) -> Option<f64> {
    let fit = Composition::of(history)
        .ok()
        .map(|composition| composition.drag_redshift());
    let redshift = printed.drag_redshift.or(fit)?;
    sound_horizon_mpc(history, redshift)
}

/// ∫_z^∞ c_s dz/H in Mpc with c_s = c/√(3(1 + R)), R = 3ρ_b/4ρ_γ; `None` without
/// baryons and radiation, where it diverges, or for z outside 0 … 1e8.
///
/// # References
/// Eisenstein & Hu 1998, ApJ 496, 605, eqs. 5 and 6, with R from the densities.
fn sound_horizon_mpc(history: &History, redshift: f64) -> Option<f64> {
    let spec = history.spec();
    let photons = spec.photons();
    let baryons = spec.baryons?;
    if !(photons > 0.0 && redshift > 0.0 && redshift < 1e8) {
        return None;
    }
    let loading = 0.75 * baryons / photons;
    let densities = history.densities();
    let slowness = |v: f64| 1.0 / (densities.rate(v) * (1.0 + loading / v).sqrt());
    // A bounce is no beginning.
    history.conformal_time_today()?;
    // Above, R is small and its change no power law of its own.
    let top = (1.0 + history.range().1).max(1e3 * loading);
    if !densities.rate(top).is_finite() {
        return None;
    }
    let mut low = 1.0 + redshift;
    let mut sum = 0.0;
    while low < top {
        let high = (1.5 * low).min(top);
        sum += gauss_legendre_16(low, high, slowness);
        low = high;
    }
    let whole = sum + to_infinity(top, slowness);
    let horizon = history.hubble_distance_mpc() / 3.0_f64.sqrt() * whole;
    Some(horizon).filter(|horizon| horizon.is_finite())
}

/// The early epochs of a model.
pub(super) fn early(history: &History, printed: PrintedEpochs) -> Early {
    let composition = Composition::of(history);
    let fit = |fit: fn(&Composition) -> f64, unit: &'static str, source: String| match &composition
    {
        Ok(composition) => {
            let value = Some(fit(composition)).filter(|value| *value > 0.0 && *value < 1e8);
            Scalar::optional(value, unit, "the fit does not reach to such densities")
                .with_source(&source)
        }
        Err(reason) => Scalar::none(unit, reason),
    };
    let usual = composition.as_ref().is_ok_and(Composition::is_usual);
    let named = |citation: &Citation, error: &str| {
        let error = if usual { error } else { UNUSUAL };
        format!("fit of {citation}; {error}")
    };
    let decoupling = named(&HU_SUGIYAMA, "within 0.2 % of detailed recombination");
    let drag = named(&AIZPURU, "within 5e-5 of four printed values");
    let historical = named(
        &EISENSTEIN_HU,
        "historical, 4 % below detailed recombination",
    );
    let decoupling = fit(Composition::decoupling_redshift, "1", decoupling);
    let drag = fit(Composition::drag_redshift, "1", drag);
    Early {
        decoupling: epoch(history, printed.decoupling_redshift, decoupling),
        drag: epoch(history, printed.drag_redshift, drag),
        sound_horizon_fit: fit(
            Composition::sound_horizon_mpc,
            "Mpc",
            if usual {
                format!("fit of {AUBOURG}")
            } else {
                named(&AUBOURG, UNUSUAL)
            },
        ),
        drag_redshift_historical: fit(Composition::historical_drag_redshift, "1", historical),
    }
}

/// An epoch at its printed redshift, or else at that of a fit.
fn epoch(history: &History, printed: Option<f64>, fit: Scalar) -> EarlyEpoch {
    let redshift = match printed {
        Some(redshift) => Scalar::from(redshift, "1").with_source("printed with the set"),
        None => fit,
    };
    let horizon = redshift
        .value
        .and_then(|redshift| sound_horizon_mpc(history, redshift));
    let missing = redshift
        .reason
        .or(Composition::of(history).err())
        .unwrap_or("the integral diverges");
    EarlyEpoch {
        sound_horizon: Scalar::optional(horizon, "Mpc", missing),
        redshift,
    }
}

/// What is said of a fit outside the densities it was made for.
const UNUSUAL: &str = "its error is not known here, outside 0.0025 <= omega_b <= 0.25, 0.025 <= omega_m <= 0.64, 2.7 K <= T0 <= 2.75 K";

const HU_SUGIYAMA: Citation = Citation {
    authors: "Hu & Sugiyama",
    year: 1996,
    reference: "ApJ 471, 542, arXiv:astro-ph/9510117",
    locator: "eq. E-1",
};
const AIZPURU: Citation = Citation {
    authors: "Aizpuru, Arjona & Nesseris",
    year: 2021,
    reference: "Phys. Rev. D 104, 043521",
    locator: "fit of the drag redshift (place from memory)",
};
const EISENSTEIN_HU: Citation = Citation {
    authors: "Eisenstein & Hu",
    year: 1998,
    reference: "ApJ 496, 605, arXiv:astro-ph/9709112",
    locator: "eq. 4",
};
const AUBOURG: Citation = Citation {
    authors: "Aubourg et al.",
    year: 2015,
    reference: "Phys. Rev. D 92, 123516, arXiv:1411.1074",
    locator: "eq. 16",
};

/// Physical densities Ω h² of a model with baryons and radiation.
struct Composition {
    baryons: f64,
    matter: f64,
    massive_neutrinos: f64,
    cmb_temperature: f64,
}

impl Composition {
    fn of(history: &History) -> Result<Composition, &'static str> {
        let spec = history.spec();
        let h = spec.hubble_constant / 100.0;
        let square = h * h;
        let Some(baryons) = spec.baryons else {
            return Err("the model declares no baryons");
        };
        if spec.photons() == 0.0 {
            return Err("the model declares no radiation");
        }
        let massive_neutrinos = history.densities().terms(1.0).massive_neutrinos;
        Ok(Composition {
            baryons: baryons * square,
            matter: spec.matter * square,
            massive_neutrinos: massive_neutrinos * square,
            cmb_temperature: spec.radiation.map_or(0.0, |one| one.cmb_temperature),
        })
    }

    /// Whether the fits were made for such densities: the range of Hu & Sugiyama
    /// 1996, appendix E (from memory), around the measured temperature.
    fn is_usual(&self) -> bool {
        (0.0025..=0.25).contains(&self.baryons)
            && (0.025..=0.64).contains(&self.matter)
            && (2.7..=2.75).contains(&self.cmb_temperature)
    }

    fn decoupling_redshift(&self) -> f64 {
        let (b, m) = (self.baryons, self.matter);
        let g1 = 0.0783 * libm::pow(b, -0.238) / (1.0 + 39.5 * libm::pow(b, 0.763));
        let g2 = 0.560 / (1.0 + 21.1 * libm::pow(b, 1.81));
        1048.0 * (1.0 + 0.00124 * libm::pow(b, -0.738)) * (1.0 + g1 * libm::pow(m, g2))
    }

    fn drag_redshift(&self) -> f64 {
        let (b, m) = (self.baryons, self.matter);
        let baryonic = 428.169 * libm::pow(b, 0.256_459) * libm::pow(m, 0.616_388);
        (1.0 + baryonic + 925.56 * libm::pow(m, 0.751_615)) / libm::pow(m, 0.714_129)
    }

    fn historical_drag_redshift(&self) -> f64 {
        let (b, m) = (self.baryons, self.matter);
        let b1 = 0.313 * libm::pow(m, -0.419) * (1.0 + 0.607 * libm::pow(m, 0.674));
        let b2 = 0.238 * libm::pow(m, 0.223);
        1291.0 * libm::pow(m, 0.251) / (1.0 + 0.659 * libm::pow(m, 0.828))
            * (1.0 + b1 * libm::pow(b, b2))
    }

    fn sound_horizon_mpc(&self) -> f64 {
        let offset = self.massive_neutrinos + 0.0006;
        let cold = self.matter - self.massive_neutrinos;
        55.154 * libm::exp(-72.3 * offset * offset)
            / (libm::pow(cold, 0.253_51) * libm::pow(self.baryons, 0.128_07))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Planck Collaboration VI 2020, A&A 641, A6, table 2, TT,TE,EE+lowE+lensing.
    const PLANCK_2018: Composition = Composition {
        baryons: 0.02237,
        matter: 0.1430,
        massive_neutrinos: 0.000_645,
        cmb_temperature: 2.7255,
    };

    #[test]
    fn fits_meet_what_was_printed() {
        assert!((PLANCK_2018.drag_redshift() / 1059.94 - 1.0).abs() < 1e-4);
        assert!((PLANCK_2018.decoupling_redshift() / 1089.92 - 1.0).abs() < 2.5e-3);
        assert!((PLANCK_2018.sound_horizon_mpc() / 147.09 - 1.0).abs() < 5e-4);
        assert!((PLANCK_2018.historical_drag_redshift() - 1020.7).abs() < 0.1);
    }

    #[test]
    fn cold_photons_are_loaded_far_beyond_the_tables() {
        // In the limit of matter and baryons alone, and by the closed form of
        // Eisenstein & Hu 1998, eq. 6, which knows no massive neutrinos.
        for temperature in [0.01, 0.05, 0.1, 1.0, 2.7255] {
            let spec = crate::model::Declaration {
                hubble_constant: 70.0,
                matter: 0.3,
                baryons: Some(0.05),
                radiation: Some(crate::model::RadiationDeclaration {
                    cmb_temperature: Some(temperature),
                    effective_neutrino_number: Some(3.0),
                    neutrino_masses: Vec::new(),
                }),
                ..crate::model::Declaration::default()
            }
            .close()
            .unwrap();
            let history = History::build(&spec).unwrap();
            let redshift = 1e5;
            let loading = 0.75 * 0.05 / spec.photons();
            let radiation = spec.photons() + spec.massless_neutrinos();
            let equality = spec.matter / radiation;
            let (r, r_eq) = (loading / (1.0 + redshift), loading / equality);
            // With v = 1 + z and E² = Ω_m v³ (1 + v/v_eq), eq. 6 in our symbols.
            let ln = libm::log(((1.0 + r).sqrt() + (r + r_eq).sqrt()) / (1.0 + r_eq.sqrt()));
            let expected =
                history.hubble_distance_mpc() * 2.0 / (3.0 * spec.matter * loading).sqrt() * ln;
            let found = sound_horizon_mpc(&history, redshift).unwrap();
            assert!(
                (found / expected - 1.0).abs() < 1e-9,
                "{temperature}: {found} {expected}"
            );
        }
    }

    #[test]
    fn outside_their_range_fits_state_no_error() {
        let spec = crate::model::Declaration {
            hubble_constant: 70.0,
            matter: 1e-5,
            baryons: Some(1e-6),
            radiation: Some(crate::model::RadiationDeclaration {
                cmb_temperature: Some(2.7),
                effective_neutrino_number: Some(3.0),
                neutrino_masses: Vec::new(),
            }),
            ..crate::model::Declaration::default()
        }
        .close()
        .unwrap();
        let early = early(&History::build(&spec).unwrap(), PrintedEpochs::default());
        let source = early.decoupling.redshift.source.unwrap();
        assert!(source.contains("not known"), "{source}");
    }
}
