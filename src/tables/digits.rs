//! Numbers as text: all their digits for machines, some for people.

/// Appends the shortest digits that read back as `number`, which must be finite.
#[inline]
pub fn shortest(out: &mut Vec<u8>, number: f64) {
    let mut buffer = zmij::Buffer::new();
    out.extend_from_slice(buffer.format_finite(number).as_bytes());
}

/// `number` rounded to `digits` significant digits, without an exponent where that stays short.
pub fn rounded(number: f64, digits: usize) -> String {
    let scientific = format!("{number:.*e}", digits.saturating_sub(1));
    let Some((mantissa, exponent)) = scientific.split_once('e') else {
        return scientific;
    };
    let exponent: i32 = exponent.parse().unwrap_or(0);
    if !(-4..=LARGEST_PLAIN).contains(&exponent) {
        return format!("{}e{exponent}", trimmed(mantissa));
    }
    let decimals = i32::try_from(digits).unwrap_or(0) - 1 - exponent;
    let decimals = usize::try_from(decimals).unwrap_or(0);
    // Rounded once, to the digits asked for; what stands after them in a large number is zero.
    let rounded: f64 = scientific.parse().unwrap_or(number);
    trimmed(&format!("{rounded:.decimals$}")).to_owned()
}

const LARGEST_PLAIN: i32 = 11;

fn trimmed(text: &str) -> &str {
    match text.contains('.') {
        true => text.trim_end_matches('0').trim_end_matches('.'),
        false => text,
    }
}

#[cfg(test)]
mod tests {
    use super::rounded;

    #[test]
    fn people_get_few_digits() {
        for (number, text) in [
            (0.0, "0"),
            (1.0, "1"),
            (-0.5, "-0.5"),
            (13.787_123_456, "13.78712"),
            (0.000_123_456_789, "0.0001234568"),
            (0.000_012_345_678, "1.234568e-5"),
            (45_678.912_3, "45678.91"),
            (123_456_789.0, "123456800"),
            (9.999_999_99, "10"),
            (1.5e15, "1.5e15"),
        ] {
            assert_eq!(rounded(number, 7), text);
        }
    }
}
