//! Strings and their escapes.

use super::super::fault::Fault;
use super::reader::{Reader, malformed};
use std::borrow::Cow;

impl<'a> Reader<'a, '_> {
    /// The string whose opening quote is next.
    pub(super) fn string(&mut self) -> Result<Cow<'a, str>, Fault> {
        self.at += 1;
        let mut unescaped: Option<String> = None;
        loop {
            let start = self.at;
            let rest = self.bytes.get(start..).unwrap_or_default();
            let stop = rest
                .iter()
                .position(|byte| matches!(byte, b'"' | b'\\' | 0..0x20));
            self.at += stop.unwrap_or(rest.len());
            let plain = self.text.get(start..self.at).unwrap_or_default();
            match self.bytes.get(self.at) {
                Some(b'"') => {
                    self.at += 1;
                    return Ok(match unescaped {
                        None => Cow::Borrowed(plain),
                        Some(text) => Cow::Owned(text + plain),
                    });
                }
                Some(b'\\') => {
                    let text = unescaped.get_or_insert_default();
                    text.push_str(plain);
                    text.push(self.escape()?);
                }
                Some(_) => {
                    let what = "a control character in a string must be escaped";
                    return Err(malformed(self.bytes, self.at, what));
                }
                None => return Err(self.unexpected("'\"'")),
            }
        }
    }

    fn escape(&mut self) -> Result<char, Fault> {
        let start = self.at;
        let kind = self.bytes.get(self.at + 1).copied();
        self.at += 2;
        match kind {
            Some(plain @ (b'"' | b'\\' | b'/')) => Ok(char::from(plain)),
            Some(b'b') => Ok('\u{8}'),
            Some(b'f') => Ok('\u{c}'),
            Some(b'n') => Ok('\n'),
            Some(b'r') => Ok('\r'),
            Some(b't') => Ok('\t'),
            Some(b'u') => self
                .code_point()
                .ok_or_else(|| malformed(self.bytes, start, "a \\u escape is no character")),
            _ => Err(malformed(self.bytes, start, "there is no such escape")),
        }
    }

    /// The character of four hexadecimal digits, or of two such escapes that form a pair.
    fn code_point(&mut self) -> Option<char> {
        let first = self.hexadecimal()?;
        if !(0xD800..0xDC00).contains(&first) {
            return char::from_u32(first);
        }
        if self.bytes.get(self.at..self.at + 2)? != b"\\u" {
            return None;
        }
        self.at += 2;
        let second = self
            .hexadecimal()?
            .checked_sub(0xDC00)
            .filter(|low| *low < 0x400)?;
        char::from_u32(0x10000 + ((first - 0xD800) << 10) + second)
    }

    fn hexadecimal(&mut self) -> Option<u32> {
        let digits = self.bytes.get(self.at..self.at + 4)?;
        self.at += 4;
        digits.iter().try_fold(0, |value, digit| {
            char::from(*digit)
                .to_digit(16)
                .map(|digit| value * 16 + digit)
        })
    }
}
