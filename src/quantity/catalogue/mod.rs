//! All quantities, in the order in which they are listed.

mod composition;
mod distances;
mod rates;
mod redshifts;
mod scales;
mod times;
mod volumes;

use super::{Condition, Forward, HubbleScaling, Inverse, Quantity, Solved, Tolerance};
use crate::expansion::Wanted;
use crate::model::{Citation, Spec};

/// Every quantity of the service.
pub static QUANTITIES: &[Quantity] = &[
    redshifts::REDSHIFT,
    redshifts::SCALE_FACTOR,
    redshifts::OPTICAL_VELOCITY,
    redshifts::RADIO_VELOCITY,
    distances::RECESSION_VELOCITY,
    times::AGE,
    times::LOOKBACK_TIME,
    times::CONFORMAL_TIME,
    rates::HUBBLE_PARAMETER,
    distances::COMOVING_DISTANCE,
    distances::TRANSVERSE_COMOVING_DISTANCE,
    distances::ANGULAR_DIAMETER_DISTANCE,
    distances::LUMINOSITY_DISTANCE,
    distances::DISTANCE_MODULUS,
    distances::LIGHT_TRAVEL_DISTANCE,
    volumes::COMOVING_VOLUME,
    redshifts::CMB_TEMPERATURE,
    scales::ANGULAR_SCALE,
    scales::COMOVING_ANGULAR_SCALE,
    volumes::VOLUME_ELEMENT,
    composition::CRITICAL_DENSITY,
    composition::MATTER_FRACTION,
    composition::RADIATION_FRACTION,
    composition::CURVATURE_FRACTION,
    composition::DARK_ENERGY_FRACTION,
    composition::MASSIVE_NEUTRINO_FRACTION,
    rates::DECELERATION_PARAMETER,
    composition::EQUATION_OF_STATE,
    rates::REDSHIFT_DRIFT,
    rates::VELOCITY_DRIFT,
    redshifts::TIME_DILATION,
    volumes::VOLUME_AVERAGED_DISTANCE,
    scales::ALCOCK_PACZYNSKI,
    rates::HUBBLE_DISTANCE,
];

/// The quantity of a name.
#[must_use]
pub fn named(name: &str) -> Option<&'static Quantity> {
    QUANTITIES.iter().find(|quantity| quantity.name == name)
}

/// The promise for everything that is a product of few rounded factors.
const PRODUCT: Tolerance = Tolerance::Relative(2e-15);

const NOTHING: Wanted = Wanted::NOTHING;
const RATE: Wanted = Wanted {
    rate: true,
    ..NOTHING
};
const COMOVING: Wanted = Wanted {
    comoving: true,
    ..NOTHING
};
const LOOKBACK: Wanted = Wanted {
    lookback: true,
    ..NOTHING
};
const RATE_AND_COMOVING: Wanted = Wanted {
    rate: true,
    comoving: true,
    ..NOTHING
};

/// A row function, and the same over blocks.
macro_rules! forward {
    ($wanted:expr, $at:expr) => {
        Forward {
            wanted: $wanted,
            at: $at,
            fill: |block, frame, out| block.each(frame, out, $at),
        }
    };
}
use forward;

const fn always(_: &Spec) -> Option<&'static str> {
    None
}

const fn hogg(locator: &'static str) -> Citation {
    Citation {
        authors: "Hogg",
        year: 1999,
        reference: "arXiv:astro-ph/9905116",
        locator,
    }
}

const fn peebles(locator: &'static str) -> Citation {
    Citation {
        authors: "Peebles",
        year: 1993,
        reference: "Principles of Physical Cosmology",
        locator,
    }
}

const fn davis_lineweaver(locator: &'static str) -> Citation {
    Citation {
        authors: "Davis & Lineweaver",
        year: 2004,
        reference: "PASA 21, 97",
        locator,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_are_unique_and_found() {
        for quantity in QUANTITIES {
            assert!(
                std::ptr::eq(named(quantity.name).unwrap(), quantity),
                "{}",
                quantity.name
            );
            assert!(!quantity.default_unit().text().is_empty());
        }
        assert_eq!(QUANTITIES.len(), 34);
        assert!(named("warp_factor").is_none());
    }

    #[test]
    fn seventeen_invert() {
        let inverting = QUANTITIES
            .iter()
            .filter(|quantity| quantity.inverse.is_some());
        assert_eq!(inverting.count(), 17);
    }
}
