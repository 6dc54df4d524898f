//! Roots inside a bracket.

/// The root of `function` between `low` and `high`, where its values differ in sign.
///
/// Bisection by halving the bracket, sped up by the Illinois rule of false
/// position (Dowell & Jarratt 1971, BIT 11, 168); it ends when the bracket
/// cannot shrink any more or a value is exactly zero. `None` where the end
/// values have the same sign or one is not a number.
pub fn bracketed_root(
    mut low: f64,
    mut high: f64,
    mut function: impl FnMut(f64) -> f64,
) -> Option<f64> {
    let mut at_low = function(low);
    let mut at_high = function(high);
    if at_low == 0.0 {
        return Some(low);
    }
    if at_high == 0.0 {
        return Some(high);
    }
    if at_low.is_nan() || at_high.is_nan() || (at_low < 0.0) == (at_high < 0.0) {
        return None;
    }
    let negative_at_low = at_low < 0.0;
    for step in 0..200 {
        let middle = low + 0.5 * (high - low);
        let secant = high - at_high * (high - low) / (at_high - at_low);
        // Every third step halves, so that a flat side cannot stall the bracket.
        let inside = secant > low.min(high) && secant < low.max(high);
        let guess = if inside && step % 3 != 2 {
            secant
        } else {
            middle
        };
        if guess == low || guess == high {
            break;
        }
        let value = function(guess);
        if value == 0.0 {
            return Some(guess);
        }
        if (value < 0.0) == negative_at_low {
            low = guess;
            at_low = value;
            at_high *= 0.5;
        } else {
            high = guess;
            at_high = value;
            at_low *= 0.5;
        }
    }
    Some(low + 0.5 * (high - low))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_root_is_found_to_the_last_digit() {
        let root = bracketed_root(0.0, 2.0, |x| x * x - 2.0).unwrap_or(f64::NAN);
        assert!(
            (root - std::f64::consts::SQRT_2).abs() <= 2.0 * f64::EPSILON,
            "{root}"
        );
    }

    #[test]
    fn a_flat_side_does_not_stall() {
        let mut calls = 0;
        let root = bracketed_root(0.0, 1.0, |x| {
            calls += 1;
            libm::pow(x, 20.0) - 1e-12
        });
        let expected = libm::pow(1e-12, 0.05);
        assert!((root.unwrap_or(f64::NAN) - expected).abs() < 1e-14);
        assert!(calls < 120, "{calls}");
    }

    #[test]
    fn without_a_change_of_sign_there_is_none() {
        assert_eq!(bracketed_root(1.0, 2.0, |x| x), None);
        assert_eq!(bracketed_root(-1.0, 2.0, |_| f64::NAN), None);
    }
}
