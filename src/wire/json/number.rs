//! Numbers: the grammar of JSON, correctly rounded, finite.

use super::super::code::Code;
use super::super::fault::Fault;
use super::reader::Reader;

impl Reader<'_, '_> {
    /// A number. The grammar of JSON is narrower than the parser's: digits on both sides of the
    /// point, no leading zero.
    #[inline]
    pub(super) fn number(&mut self) -> Result<f64, Fault> {
        let token = self.bytes.get(self.at..).unwrap_or_default();
        let unsigned = token.strip_prefix(b"-").unwrap_or(token);
        let whole = unsigned
            .iter()
            .take_while(|byte| byte.is_ascii_digit())
            .count();
        let after = unsigned.get(whole..).unwrap_or_default();
        let is_number = match (whole, unsigned, after) {
            (0, ..) => false,
            (2.., [b'0', ..], _) => false,
            (_, _, [b'.', rest @ ..]) => rest.first().is_some_and(u8::is_ascii_digit),
            _ => true,
        };
        match fast_float2::parse_partial::<f64, _>(token) {
            Ok((number, length)) if is_number && number.is_finite() => {
                self.at += length;
                Ok(number)
            }
            Ok((_, length)) if is_number => Err(self.not_finite(length)),
            _ => {
                let expected = match unsigned {
                    [b'0', b'0'..=b'9', ..] => "a number without a leading zero",
                    [b'0'..=b'9', ..] => {
                        // The point is there, its digits are not.
                        self.at += whole + 1;
                        "a digit after the point"
                    }
                    _ => "a digit",
                };
                self.at += token.len() - unsigned.len();
                Err(self.unexpected(expected))
            }
        }
    }

    #[cold]
    pub(super) fn not_finite(&self, length: usize) -> Fault {
        let token = self.text.get(self.at..self.at + length).unwrap_or_default();
        let detail = format!(
            "{} is not a finite double; send null for a missing value",
            token.get(..40).unwrap_or(token)
        );
        Fault::new(Code::JsonNotFinite, detail).value(token).at("")
    }
}
