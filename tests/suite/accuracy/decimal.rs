//! Differences between a double and a decimal of more digits, without loss.

/// Digits kept of the double: enough to hold the shift of the reference.
const DIGITS: usize = 34;

/// `value` − `reference`, the latter a decimal of at most 22 digits.
pub(super) fn difference(value: f64, reference: &str) -> f64 {
    if !value.is_finite() {
        return f64::NAN;
    }
    let (of_value, power) = parse(&format!("{value:.*e}", DIGITS - 1));
    let (of_reference, reference_power) = parse(reference);
    let shift = reference_power - power;
    if value == 0.0 || of_reference == 0 || !(0..=16).contains(&shift) {
        return value - reference.parse::<f64>().unwrap();
    }
    let aligned = of_reference * 10_i128.pow(shift.unsigned_abs());
    let rest = of_value - aligned;
    format!("{rest}e{power}").parse().unwrap()
}

/// One unit in the last place of a double.
pub(super) fn ulp(value: f64) -> f64 {
    let size = value.abs();
    size.next_up() - size
}

/// A decimal as digits and a power of ten.
fn parse(text: &str) -> (i128, i32) {
    let (digits, power) = text.split_once('e').unwrap_or((text, "0"));
    let fraction = digits.split_once('.').map_or("", |parts| parts.1);
    let whole: i128 = digits.replace('.', "").parse().unwrap();
    let power: i32 = power.parse().unwrap();
    (whole, power - i32::try_from(fraction.len()).unwrap())
}

#[test]
fn differences_keep_what_doubles_lose() {
    // 1/3 as a double is 1/3 − 1.85e-17.
    let third = difference(1.0 / 3.0, "0.333333333333333333333");
    assert!((third + 1.8503717077085943e-17).abs() < 1e-21);
    let large = difference(1e20, "100000000000000000001");
    assert_eq!(large, -1.0);
    assert_eq!(difference(0.0, "0"), 0.0);
    assert_eq!(difference(2.0, "-1.5"), 3.5);
    assert_eq!(ulp(4.0), 8.0 * f64::EPSILON / 2.0);
}
