//! Unit symbols and prefixes.

use super::Dimension;
use crate::model::constants;
use crate::numerics::{DoubleDouble, two_product};

/// A symbol that the service knows.
pub(super) struct Symbol {
    pub name: &'static str,
    pub dimension: Dimension,
    /// In metres, kilograms, seconds, kelvins, degrees, magnitudes, counts.
    pub size: fn() -> DoubleDouble,
    /// Whether SI prefixes go with it.
    pub prefixed: bool,
}

const fn symbol(
    name: &'static str,
    dimension: Dimension,
    prefixed: bool,
    size: fn() -> DoubleDouble,
) -> Symbol {
    Symbol {
        name,
        dimension,
        size,
        prefixed,
    }
}

const ENERGY: Dimension = Dimension::mechanical(2, 1, -2);
const SOLID_ANGLE: Dimension = Dimension::ANGLE.power(2);
const FREQUENCY: Dimension = Dimension::TIME.power(-1);

/// Every symbol, without prefixes. Angles are in degrees, so that all whole
/// fractions of the circle are exact.
pub(super) static SYMBOLS: &[Symbol] = &[
    symbol("m", Dimension::LENGTH, true, || exact(1.0)),
    symbol("pc", Dimension::LENGTH, true, parsec),
    symbol("AU", Dimension::LENGTH, false, || {
        exact(ASTRONOMICAL_UNIT_M)
    }),
    symbol("au", Dimension::LENGTH, false, || {
        exact(ASTRONOMICAL_UNIT_M)
    }),
    symbol("lyr", Dimension::LENGTH, true, || exact(LIGHT_YEAR_M)),
    symbol("Angstrom", Dimension::LENGTH, false, || tenths(10)),
    symbol("angstrom", Dimension::LENGTH, false, || tenths(10)),
    symbol("g", Dimension::MASS, true, || tenths(3)),
    symbol("solMass", Dimension::MASS, false, solar_mass),
    symbol("u", Dimension::MASS, true, || exact(1.660_539_066_60e-27)),
    symbol("s", Dimension::TIME, true, || exact(1.0)),
    symbol("min", Dimension::TIME, false, || exact(60.0)),
    symbol("h", Dimension::TIME, false, || exact(3600.0)),
    symbol("d", Dimension::TIME, false, || exact(86_400.0)),
    symbol("yr", Dimension::TIME, true, || exact(31_557_600.0)),
    symbol("a", Dimension::TIME, true, || exact(31_557_600.0)),
    symbol("Hz", FREQUENCY, true, || exact(1.0)),
    symbol("K", Dimension::TEMPERATURE, true, || exact(1.0)),
    symbol("rad", Dimension::ANGLE, true, radian),
    symbol("deg", Dimension::ANGLE, false, || exact(1.0)),
    symbol("arcmin", Dimension::ANGLE, false, || {
        exact(1.0) / exact(60.0)
    }),
    symbol("arcsec", Dimension::ANGLE, true, || {
        exact(1.0) / exact(3600.0)
    }),
    symbol("mas", Dimension::ANGLE, false, || {
        exact(1.0) / exact(3_600_000.0)
    }),
    symbol("sr", SOLID_ANGLE, true, || radian() * radian()),
    symbol("mag", Dimension::MAGNITUDE, true, || exact(1.0)),
    symbol("%", Dimension::NONE, false, || tenths(2)),
    symbol("J", ENERGY, true, || exact(1.0)),
    symbol("erg", ENERGY, true, || tenths(7)),
    symbol("eV", ENERGY, true, || exact(1.602_176_634e-19)),
    symbol("W", Dimension::mechanical(2, 1, -3), true, || exact(1.0)),
    symbol("N", Dimension::mechanical(1, 1, -2), true, || exact(1.0)),
    symbol("Pa", Dimension::mechanical(-1, 1, -2), true, || exact(1.0)),
    symbol("Jy", Dimension::mechanical(0, 1, -2), true, || tenths(26)),
    symbol("mol", Dimension::COUNT, true, || exact(1.0)),
    symbol("ct", Dimension::COUNT, true, || exact(1.0)),
    symbol("count", Dimension::COUNT, true, || exact(1.0)),
    symbol("photon", Dimension::COUNT, true, || exact(1.0)),
    symbol("pix", Dimension::COUNT, true, || exact(1.0)),
    symbol("pixel", Dimension::COUNT, true, || exact(1.0)),
];

/// SI prefixes with their powers of ten; the longest first.
pub(super) static PREFIXES: &[(&str, i32)] = &[
    ("da", 1),
    ("y", -24),
    ("z", -21),
    ("a", -18),
    ("f", -15),
    ("p", -12),
    ("n", -9),
    ("u", -6),
    ("m", -3),
    ("c", -2),
    ("d", -1),
    ("h", 2),
    ("k", 3),
    ("M", 6),
    ("G", 9),
    ("T", 12),
    ("P", 15),
    ("E", 18),
    ("Z", 21),
    ("Y", 24),
];

/// IAU 2012 resolution B2, in metres.
const ASTRONOMICAL_UNIT_M: f64 = 149_597_870_700.0;

/// A Julian year of light: 299792458 × 31557600 m, a double.
const LIGHT_YEAR_M: f64 = 9_460_730_472_580_800.0;

fn exact(value: f64) -> DoubleDouble {
    DoubleDouble::from(value)
}

/// 10 to the power −`power`.
fn tenths(power: i32) -> DoubleDouble {
    exact(1.0) / ten_to(power)
}

/// 10 to a power, to double-double accuracy.
pub(super) fn ten_to(power: i32) -> DoubleDouble {
    let mut product = exact(1.0);
    for _ in 0..power.unsigned_abs() {
        product = product * 10.0;
    }
    if power < 0 {
        exact(1.0) / product
    } else {
        product
    }
}

fn pi() -> DoubleDouble {
    DoubleDouble {
        hi: std::f64::consts::PI,
        lo: 1.224_646_799_147_353_2e-16,
    }
}

/// IAU 2015 resolution B2: 648000/π au, in metres.
fn parsec() -> DoubleDouble {
    let (hi, lo) = two_product(648_000.0, ASTRONOMICAL_UNIT_M);
    DoubleDouble { hi, lo } / pi()
}

fn radian() -> DoubleDouble {
    exact(180.0) / pi()
}

/// IAU 2015 resolution B3: the nominal solar mass parameter over G, in kg.
fn solar_mass() -> DoubleDouble {
    exact(1.327_124_4e20) / exact(constants::GRAVITATION)
}
