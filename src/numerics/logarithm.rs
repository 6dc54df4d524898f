//! Natural logarithms to more than double precision, and exponentials of them.

use super::DoubleDouble;

/// ln 2 as an unevaluated sum.
const LN_2: DoubleDouble = DoubleDouble {
    hi: std::f64::consts::LN_2,
    lo: 2.3190468138462996e-17,
};

/// ln(1 + i/32) for i from 0 to 32, as unevaluated sums (computed with 60 digits).
const LN_OF_GRID: [(f64, f64); 33] = [
    (0.0, 0.0),
    (0.030771658666753687, 1.0431732029005968e-18),
    (0.06062462181643484, 2.6424025938726934e-18),
    (0.08961215868968714, -5.4268129336647135e-18),
    (0.11778303565638346, -1.1971685747593677e-18),
    (0.1451820098444979, 8.242418783022475e-18),
    (0.17185025692665923, -6.0224538210113705e-18),
    (0.19782574332991987, 1.2821194372980142e-17),
    (0.22314355131420976, -9.091270597324799e-18),
    (0.24783616390458127, -1.2432209578702523e-17),
    (0.27193371548364176, 7.83319637697442e-19),
    (0.2954642128938359, -2.16461086040599e-17),
    (0.3184537311185346, 2.7114779367326236e-17),
    (0.3409265869705932, 1.7467136443544747e-17),
    (0.3629054936893685, -2.1492361455310972e-17),
    (0.38441169891033206, -1.612149700764673e-17),
    (0.4054651081081644, -2.8811380259626426e-18),
    (0.4260843953109001, -2.499176776547466e-17),
    (0.44628710262841953, -1.8182541194649598e-17),
    (0.46608972992459924, -1.4116523239904406e-17),
    (0.4855078157817008, -1.6618350693852048e-17),
    (0.5045560107523953, -2.4888518873597905e-17),
    (0.5232481437645479, -3.1833882216350925e-17),
    (0.5415972824327444, -3.748764246125639e-17),
    (0.5596157879354227, 2.685492580212308e-17),
    (0.5773153650348236, -8.903591846974013e-18),
    (0.5947071077466928, 1.3751689964323675e-17),
    (0.6118015411059929, -3.7397759448726e-17),
    (0.6286086594223741, 4.3538742607970387e-17),
    (0.6451379613735847, 9.346960920120906e-19),
    (0.661398482245365, -7.603333785634003e-18),
    (0.6773988235918061, -2.0978183882652005e-18),
    (std::f64::consts::LN_2, 2.3190468138462996e-17),
];

/// The natural logarithm of a positive finite normal number as an unevaluated
/// sum with an error below 10⁻¹⁸ + 2⁻¹⁰⁰ |ln x|.
///
/// Method: x = 2ᵏ · c · (1 + r) with c on a grid of 1/32, so that only the
/// short logarithm of 1 + r is rounded to a double (Tang 1990, ACM Transactions
/// on Mathematical Software 16, 378).
#[must_use]
pub fn natural_logarithm(x: f64) -> DoubleDouble {
    let bits = x.to_bits();
    let exponent = f64::from(((bits >> 52) & 0x7ff) as i32 - 1023);
    let mantissa = f64::from_bits((bits & 0x000f_ffff_ffff_ffff) | 0x3ff0_0000_0000_0000);
    let step = libm::round((mantissa - 1.0) * 32.0);
    let grid = 1.0 + step / 32.0;
    let (hi, lo) = LN_OF_GRID
        .get(step as usize)
        .copied()
        .unwrap_or((f64::NAN, 0.0));
    let rest = libm::log1p((mantissa - grid) / grid);
    LN_2 * exponent + DoubleDouble { hi, lo } + rest
}

/// The exponential of an unevaluated sum, as one double, within about an ulp.
#[inline]
#[must_use]
pub fn exponential(x: DoubleDouble) -> f64 {
    let leading = libm::exp(x.hi);
    leading + leading * x.lo
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Values with 32 digits from a multiple-precision computation.
    #[test]
    fn logarithms_carry_more_than_a_double() {
        close(10.0, std::f64::consts::LN_10, -2.1707562233822494e-16);
        close(0.01, -4.605170185988091, -4.332104933119537e-16);
        close(1.0000001, 9.999999505838704e-08, 1.5249709528441489e-24);
        close(1090.92, 6.9947766559217674, -2.315490591053386e-16);
        close(2147483647.5, 21.487562597125475, -9.464571296996983e-16);
    }

    fn close(x: f64, hi: f64, lo: f64) {
        let difference = natural_logarithm(x) - DoubleDouble { hi, lo };
        assert!(difference.value().abs() < 2e-18, "{x}: {difference:?}");
    }

    #[test]
    fn an_exponential_undoes_a_logarithm() {
        for x in [0.01, 0.5, 1.0, 3.0, 1e3, 1e9] {
            let back = exponential(natural_logarithm(x));
            assert!((back / x - 1.0).abs() <= 2.0 * f64::EPSILON, "{x} {back}");
        }
    }
}
