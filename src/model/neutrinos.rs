//! Energy density and pressure of a relic neutrino species with a mass.
//!
//! With y = m c²/(k T), relative to a massless species of the same temperature:
//! F(y) = 120/(7π⁴) ∫ p² √(p² + y²)/(eᵖ + 1) dp for the energy density and
//! G(y) = 120/(7π⁴) ∫ p⁴/√(p² + y²)/(eᵖ + 1) dp = F − y F′ for three times the
//! pressure. Two polynomials an octave between 2⁻¹⁰ and 2⁹, series outside.

use std::f64::consts::PI;

use super::neutrino_coefficients::{ENERGY, LARGE, PRESSURE, Panel, SMALL};

/// F(y) for y ≥ 0, within 2.5·10⁻¹⁶ of the exact integral.
#[inline]
#[must_use]
pub fn energy(y: f64) -> f64 {
    if y < SMALLEST {
        return small_energy(y);
    }
    if y >= LARGEST {
        return large_energy(y);
    }
    let (index, u, _) = place(y);
    ENERGY.get(index).map_or(f64::NAN, |panel| value(panel, u))
}

/// F(y) and F′(y) for y ≥ 0 in one pass, F as [`energy`], F′ within 10⁻¹⁵.
#[inline]
#[must_use]
pub fn energy_and_slope(y: f64) -> (f64, f64) {
    if y < SMALLEST {
        return (small_energy(y), small_slope(y));
    }
    if y >= LARGEST {
        return (large_energy(y), large_slope(y));
    }
    let (index, u, scale) = place(y);
    ENERGY.get(index).map_or((f64::NAN, f64::NAN), |panel| {
        (value(panel, u), slope(panel, u) * scale)
    })
}

/// G(y), three times the pressure over the energy density of a massless species,
/// for y ≥ 0, within 5·10⁻¹⁶.
#[inline]
#[must_use]
pub fn pressure(y: f64) -> f64 {
    if y < SMALLEST {
        return small_pressure(y);
    }
    if y >= LARGEST {
        return large_pressure(y);
    }
    let (index, u, _) = place(y);
    PRESSURE
        .get(index)
        .map_or(f64::NAN, |panel| value(panel, u))
}

const SMALLEST: f64 = 1.0 / 1024.0;
const LARGEST: f64 = 512.0;
/// Top 13 bits of [`SMALLEST`]: sign, exponent and half of the octave.
const FIRST_PANEL: u64 = (1023 - 10) << 1;

/// Panel, place u ∈ [−1, 1] in it, and du/dy; every step is exact.
#[inline]
fn place(y: f64) -> (usize, f64, f64) {
    let bits = y.to_bits();
    let index = (bits >> 51).wrapping_sub(FIRST_PANEL) as usize;
    let middle = f64::from_bits((bits >> 51 << 51) | (1 << 50));
    let scale = f64::from_bits((2048 - (bits >> 52)) << 52);
    (index, (y - middle) * scale, scale)
}

/// The polynomial at u, even and odd powers apart so that the two chains overlap.
#[inline]
fn value(a: &Panel, u: f64) -> f64 {
    let s = u * u;
    let odd = a[2]
        + s * (a[4]
            + s * (a[6] + s * (a[8] + s * (a[10] + s * (a[12] + s * (a[14] + s * a[16]))))));
    let even = a[3] + s * (a[5] + s * (a[7] + s * (a[9] + s * (a[11] + s * (a[13] + s * a[15])))));
    a[0] + (a[1] + (u * odd + s * even))
}

/// The derivative of the polynomial with respect to u.
#[inline]
fn slope(a: &Panel, u: f64) -> f64 {
    let s = u * u;
    let high = 9.0 * a[10] + s * (11.0 * a[12] + s * (13.0 * a[14] + s * (15.0 * a[16])));
    let even = a[2] + s * (3.0 * a[4] + s * (5.0 * a[6] + s * (7.0 * a[8] + s * high)));
    let high = 8.0 * a[9] + s * (10.0 * a[11] + s * (12.0 * a[13] + s * (14.0 * a[15])));
    let odd = 2.0 * a[3] + s * (4.0 * a[5] + s * (6.0 * a[7] + s * high));
    even + u * odd
}

/// Coefficients of y² and of y⁴ ln y for small y.
const SMALL_SQUARE: f64 = 5.0 / (7.0 * PI * PI);
const SMALL_LOGARITHM: f64 = 15.0 / (14.0 * PI * PI * PI * PI);

/// y⁴ and the factor of the logarithmic term, a ln y + b.
fn small_logarithm(y: f64) -> (f64, f64) {
    if y < 1e-30 {
        return (0.0, 0.0);
    }
    let square = y * y;
    (square * square, SMALL_LOGARITHM * libm::log(y) + SMALL[0])
}

fn small_energy(y: f64) -> f64 {
    let (fourth, bracket) = small_logarithm(y);
    let bracket = bracket + y * (SMALL[1] + y * SMALL[2]);
    1.0 + (SMALL_SQUARE * (y * y) + fourth * bracket)
}

fn small_slope(y: f64) -> f64 {
    let (fourth, bracket) = small_logarithm(y);
    let third = if fourth > 0.0 { fourth / y } else { 0.0 };
    let bracket = 4.0 * bracket + SMALL_LOGARITHM + y * (5.0 * SMALL[1] + 6.0 * y * SMALL[2]);
    2.0 * SMALL_SQUARE * y + third * bracket
}

fn small_pressure(y: f64) -> f64 {
    let (fourth, bracket) = small_logarithm(y);
    let bracket = 3.0 * bracket + SMALL_LOGARITHM + y * (4.0 * SMALL[1] + 5.0 * y * SMALL[2]);
    1.0 - (SMALL_SQUARE * (y * y) + fourth * bracket)
}

fn large_energy(y: f64) -> f64 {
    y * (LARGE[0] + large_sum(y, |_| 1.0))
}

fn large_slope(y: f64) -> f64 {
    LARGE[0] + large_sum(y, |k| 1.0 - 2.0 * k)
}

fn large_pressure(y: f64) -> f64 {
    y * large_sum(y, |k| 2.0 * k)
}

/// Σ factor(k) c_k y^(−2k) from k = 1 on.
fn large_sum(y: f64, factor: impl Fn(f64) -> f64) -> f64 {
    let inverse = 1.0 / (y * y);
    let mut sum = 0.0;
    for (k, coefficient) in LARGE.iter().enumerate().skip(1).rev() {
        sum = (sum + factor(k as f64) * coefficient) * inverse;
    }
    sum
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::numerics::DoubleDouble;

    type Digits = (f64, f64);

    /// y, then F, G and F′ to 32 digits: `neutrino_table.py values`.
    const VALUES: [(f64, Digits, Digits, Digits); 28] = [
        (
            9.5367431640625e-07,
            (1.0000000000000657, 9.69967278246324e-17),
            (0.9999999999999342, 1.4025574886823277e-17),
            (1.3803915792458066e-07, 8.237542300211607e-24),
        ),
        (
            0.00048828125,
            (1.0000000172548897, 3.5520407877673336e-17),
            (0.9999999827451196, -5.472734409444475e-17),
            (7.067600945740185e-05, -4.19913089545505e-21),
        ),
        (
            0.0009765624999999999,
            (1.0000000690195063, 1.0769925665508728e-16),
            (0.9999999309806286, 4.6502602489333673e-17),
            (0.00014135181090196177, -5.23273979667186e-21),
        ),
        (
            0.0009765625,
            (1.0000000690195063, 1.0769927198048133e-16),
            (0.9999999309806286, 4.650258716399738e-17),
            (0.00014135181090196177, 1.046040456778212e-20),
        ),
        (
            0.001,
            (1.0000000723721945, 9.216315478713592e-17),
            (0.9999999276279534, -1.0210157807969206e-17),
            (0.00014474424113976, 1.3110063293978936e-20),
        ),
        (
            0.001953125,
            (1.0000002760772664, -2.784189732275782e-17),
            (0.9999997239246727, 1.2170734211881388e-17),
            (0.00028270212792674544, 2.0594355949717757e-20),
        ),
        (
            0.01,
            (1.0000072366853583, 8.748645294877633e-17),
            (0.9999927642893225, 4.639535406412391e-17),
            (0.001447239603584395, -4.6471981008278355e-20),
        ),
        (
            0.03125,
            (1.0000706361898852, -8.973572259753481e-17),
            (0.9999294332110111, 7.170009047182365e-18),
            (0.004518495323968094, -1.6519932240698965e-19),
        ),
        (
            0.3,
            (1.0063644918999823, -1.1069797829651523e-16),
            (0.9938571519104481, -3.514960395456358e-18),
            (0.041691133298447106, 4.627092673965521e-19),
        ),
        (
            0.5,
            (1.017231341892762, -9.776966929089129e-17),
            (0.9839569434649091, 5.949287203899547e-18),
            (0.06654879685570571, 7.289041276351879e-19),
        ),
        (
            0.77,
            (1.039290137882321, 9.148904529514935e-17),
            (0.9652878505554333, 2.0693066906363855e-17),
            (0.09610686665829571, 1.7729519319909382e-18),
        ),
        (
            1.0,
            (1.0639626203517056, 6.959922548879566e-17),
            (0.946004137777384, -2.0816310431621408e-17),
            (0.11795848257432172, -6.728978734284132e-18),
        ),
        (
            1.9,
            (1.2007319502430125, 5.2123166896924515e-17),
            (0.8572929772239917, 1.2266722760752155e-17),
            (0.1807573542205373, 1.1896963957628908e-17),
        ),
        (
            2.0,
            (1.219072788056391, -1.1037794135819085e-16),
            (0.847046714200046, -5.82198721887683e-18),
            (0.18601303692817245, 3.233174161600815e-18),
        ),
        (
            4.4,
            (1.7683537470892534, 8.793365264720946e-17),
            (0.6309225967305284, -4.3415579355487926e-17),
            (0.25850707962698294, 2.4118738566920795e-17),
        ),
        (
            8.0,
            (2.7724566528474552, -4.245182069227317e-17),
            (0.432457580262436, -2.7247707235724293e-17),
            (0.2924998840731274, 1.8916167529653076e-17),
        ),
        (
            11.3,
            (3.7582664187380277, -1.0929455158582678e-16),
            (0.3293891659951544, 8.22473259378861e-18),
            (0.30344046484450204, -1.1795270599824441e-17),
        ),
        (
            64.0,
            (20.340617750379984, -1.0312789057443383e-15),
            (0.06391816391654818, -5.838481137240728e-18),
            (0.31682343103849114, 2.3225612009489363e-17),
        ),
        (
            77.7,
            (24.682297604591735, -8.727921413522872e-16),
            (0.05271062800728758, 2.0100499746427518e-18),
            (0.3169831013717432, 6.6880791754437956e-18),
        ),
        (
            256.0,
            (81.2424165292121, 3.1045303134288308e-15),
            (0.01603516101349309, -1.4712520427289887e-18),
            (0.3172905522195258, 3.9877497943259286e-18),
        ),
        (
            355.1,
            (112.6867761184168, -3.122960116237595e-15),
            (0.011561423885543059, -5.810501235858283e-19),
            (0.31730558911442197, 1.8274846247826557e-17),
        ),
        (
            511.9,
            (162.44107423097424, -5.7236810691761765e-15),
            (0.008020551330724084, -8.615371773123506e-19),
            (0.31731403336519537, 1.0452793849501913e-17),
        ),
        (
            511.99999999999994,
            (162.47280563446373, 7.099679970052937e-15),
            (0.008018984999810914, 5.727465051600223e-19),
            (0.31731403642473427, -1.2501857200792414e-17),
        ),
        (
            512.0,
            (162.47280563446375, -3.28481477744621e-15),
            (0.008018984999810914, -3.174356693657107e-19),
            (0.31731403642473427, -1.2500118563732793e-17),
        ),
        (
            700.0,
            (222.1282398480926, 4.045690024804079e-15),
            (0.005865474065116898, 2.4017088233110414e-19),
            (0.3173176776771821, 2.6802544960182147e-18),
        ),
        (
            1024.0,
            (324.9395968984322, 1.4789005279508959e-15),
            (0.004009668167529087, 3.082403761497137e-19),
            (0.31731990940455534, 2.6741423783531646e-17),
        ),
        (
            16384.0,
            (5199.001598099274, 2.7811767344201153e-13),
            (0.0002506079065034936, -8.858834504549047e-21),
            (0.31732185958809617, 5.140430231764627e-18),
        ),
        (
            100000.0,
            (31732.186744134033, -2.977947013609804e-15),
            (4.105960168135209e-05, -7.243873283133509e-22),
            (0.31732186703074433, -2.0262746443874727e-17),
        ),
    ];

    fn relative_error(found: f64, (hi, lo): Digits) -> f64 {
        let difference = DoubleDouble { hi, lo } - DoubleDouble::from(found);
        (difference.value() / hi).abs()
    }

    #[test]
    fn the_integrals_match_a_multiple_precision_quadrature() {
        for (y, exact, exact_pressure, exact_slope) in VALUES {
            let (with_slope, slope) = energy_and_slope(y);
            assert_eq!(energy(y), with_slope, "{y}");
            let error = relative_error(with_slope, exact);
            assert!(error <= 2.5e-16, "F({y}): {error:e}");
            let error = relative_error(slope, exact_slope);
            assert!(error <= 1e-15, "F'({y}): {error:e}");
            let error = relative_error(pressure(y), exact_pressure);
            assert!(error <= 5e-16, "G({y}): {error:e}");
        }
    }

    #[test]
    fn the_limits_are_a_massless_species_and_dust() {
        assert_eq!(energy_and_slope(0.0), (1.0, 0.0));
        assert_eq!(pressure(0.0), 1.0);
        assert_eq!(energy(1e300), 1e300 * LARGE[0]);
        assert_eq!(energy_and_slope(1e300).1, LARGE[0]);
        assert!(energy(f64::NAN).is_nan() && pressure(f64::NAN).is_nan());
    }

    #[test]
    fn pieces_meet_without_a_step() {
        let mut y = SMALLEST / 2.0;
        while y < 4.0 * LARGEST {
            let below = y.next_down();
            let step = (energy(y) - energy(below)) / energy(y);
            assert!(step.abs() <= 5e-16, "F at {y}: {step:e}");
            let step = (pressure(y) - pressure(below)) / pressure(y);
            assert!(step.abs() <= 1e-15, "G at {y}: {step:e}");
            y *= if (y.to_bits() >> 51) & 1 == 0 {
                1.5
            } else {
                4.0 / 3.0
            };
        }
    }
}
