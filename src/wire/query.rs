//! Query strings: keys and values, each key once.

use super::code::Code;
use super::fault::Fault;
use super::nearest::meant;
use std::borrow::Cow;

/// The parameters of a query in the order they were written.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Query<'q> {
    pairs: Vec<(Cow<'q, str>, Cow<'q, str>)>,
}

impl<'q> Query<'q> {
    /// Reads a query string; `+` stands for itself, as in `1e+3`.
    ///
    /// # Errors
    /// `malformed_query` for a bad percent escape or a key without a value, `duplicate_field` for
    /// a repeated key.
    pub fn read(text: Option<&'q str>) -> Result<Query<'q>, Fault> {
        let mut pairs: Vec<(Cow<'q, str>, Cow<'q, str>)> = Vec::with_capacity(8);
        let parts = text
            .unwrap_or("")
            .split('&')
            .filter(|part| !part.is_empty());
        for part in parts {
            let Some((key, value)) = part.split_once('=') else {
                let detail = "a query parameter has the form name=value";
                return Err(Fault::new(Code::MalformedQuery, detail).parameter(cut(part)));
            };
            let value = decoded(value).map_err(|fault| fault.parameter(cut(key)));
            let key = decoded(key).map_err(|fault| fault.parameter(cut(key)))?;
            let value = value?;
            if pairs.iter().any(|(earlier, _)| *earlier == key) {
                let detail = format!("the query parameter \"{}\" is there twice", cut(&key));
                return Err(Fault::new(Code::DuplicateField, detail).parameter(cut(&key)));
            }
            pairs.push((key, value));
        }
        Ok(Query { pairs })
    }

    /// The value of the parameter of this name.
    pub fn value(&self, name: &str) -> Option<&str> {
        let pair = self.pairs.iter().find(|(key, _)| key == name)?;
        Some(&pair.1)
    }

    /// Takes the parameter of this name out.
    pub fn take(&mut self, name: &str) -> Option<Cow<'q, str>> {
        let index = self.pairs.iter().position(|(key, _)| key == name)?;
        Some(self.pairs.remove(index).1)
    }

    /// Takes out the first parameter whose name passes.
    pub fn take_any(
        &mut self,
        wanted: impl Fn(&str) -> bool,
    ) -> Option<(Cow<'q, str>, Cow<'q, str>)> {
        let index = self.pairs.iter().position(|(key, _)| wanted(key))?;
        Some(self.pairs.remove(index))
    }

    /// Refuses whatever was not taken.
    ///
    /// # Errors
    /// `unknown_parameter` with the nearest of the `known` names.
    pub fn finish<'a>(self, known: impl Iterator<Item = &'a str>) -> Result<(), Fault> {
        let Some((key, value)) = self.pairs.into_iter().next() else {
            return Ok(());
        };
        let key = cut(&key);
        let known: Vec<&str> = known.collect();
        let meant = meant(key, known.iter().copied());
        let detail = format!("there is no query parameter \"{key}\" here{meant}");
        let fault = Fault::new(Code::UnknownParameter, detail)
            .parameter(key)
            .value(value);
        Err(match known.is_empty() {
            true => fault,
            false => fault.allowed(known.join(", ")),
        })
    }

    /// The same text for the same parameters in any order.
    pub fn canonical(&self) -> String {
        let mut pairs: Vec<_> = self.pairs.iter().collect();
        pairs.sort();
        let length = pairs
            .iter()
            .map(|(key, value)| key.len() + value.len() + 2)
            .sum();
        let mut text = String::with_capacity(length);
        for part in pairs.into_iter().flat_map(|(key, value)| [key, value]) {
            text.push_str(part);
            text.push('\0');
        }
        text
    }
}

/// A number of a query.
///
/// # Errors
/// `wrong_type` if it is none, `out_of_range` if it is beyond a double.
pub fn number(parameter: &str, text: &str) -> Result<f64, Fault> {
    let words = text.strip_prefix(['+', '-']).unwrap_or(text);
    let numeric = words.starts_with(|first: char| first.is_ascii_digit() || first == '.');
    match fast_float2::parse::<f64, _>(text.strip_prefix('+').unwrap_or(text)) {
        Ok(number) if numeric && number.is_finite() => Ok(number),
        Ok(_) if numeric => Err(Fault::new(
            Code::OutOfRange,
            format!("{} is beyond the range of a double", cut(text)),
        )),
        _ => Err(Fault::new(
            Code::WrongType,
            format!("\"{}\" is not a number", cut(text)),
        )),
    }
    .map_err(|fault| fault.parameter(parameter).value(text))
}

/// A truth value of a query.
///
/// # Errors
/// `wrong_type` unless it is `true` or `false`.
pub fn boolean(parameter: &str, text: &str) -> Result<bool, Fault> {
    match text {
        "true" => Ok(true),
        "false" => Ok(false),
        _ => Err(Fault::new(
            Code::WrongType,
            format!("\"{}\" is neither true nor false", cut(text)),
        )
        .parameter(parameter)
        .value(text)
        .allowed("true, false")),
    }
}

/// The first characters of a text, enough to recognise it.
pub(super) fn cut(text: &str) -> &str {
    text.char_indices()
        .nth(40)
        .map_or(text, |(end, _)| text.get(..end).unwrap_or(text))
}

fn decoded(text: &str) -> Result<Cow<'_, str>, Fault> {
    if !text.contains('%') {
        return Ok(Cow::Borrowed(text));
    }
    let refused = || Fault::new(Code::MalformedQuery, "a percent escape is not valid").value(text);
    let mut bytes = Vec::with_capacity(text.len());
    let mut rest = text.as_bytes();
    while let [byte, after @ ..] = rest {
        rest = after;
        bytes.push(if *byte == b'%' {
            let [high, low, after @ ..] = rest else {
                return Err(refused());
            };
            rest = after;
            let digit = |digit: u8| char::from(digit).to_digit(16);
            let value = digit(*high)
                .zip(digit(*low))
                .map(|(high, low)| high * 16 + low);
            value
                .and_then(|value| u8::try_from(value).ok())
                .ok_or_else(refused)?
        } else {
            *byte
        });
    }
    String::from_utf8(bytes)
        .map(Cow::Owned)
        .map_err(|_| refused())
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    #[test]
    fn pairs_are_decoded_and_the_order_does_not_matter() {
        let query = Query::read(Some("to=age%3aMyr&redshift=1e+3&&unit=")).unwrap();
        let other = Query::read(Some("unit=&redshift=1e%2B3&to=age:Myr")).unwrap();
        assert_eq!(query.canonical(), other.canonical());
    }

    #[test]
    fn what_is_not_a_query_is_refused() {
        for (text, code) in [
            ("redshift", Code::MalformedQuery),
            ("a=%", Code::MalformedQuery),
            ("a=%4", Code::MalformedQuery),
            ("a=%gg", Code::MalformedQuery),
            ("a=%ff", Code::MalformedQuery),
            ("a=1&%61=2", Code::DuplicateField),
        ] {
            assert_eq!(Query::read(Some(text)).unwrap_err().code, code, "{text}");
        }
        let mut query = Query::read(Some("redshfit=1")).unwrap();
        assert_eq!(query.take("redshift"), None);
        let fault = query.finish(["age", "redshift"].into_iter()).unwrap_err();
        assert_eq!(fault.code, Code::UnknownParameter);
        assert!(fault.detail.contains("\"redshift\""));
    }

    #[test]
    fn numbers_of_a_query_are_finite_numbers() {
        for (text, value) in [("1e+3", 1000.0), (".5", 0.5), ("+2", 2.0), ("-0.5", -0.5)] {
            assert_eq!(number("x", text).unwrap(), value);
        }
        for text in [
            "NaN",
            "inf",
            "-Infinity",
            "",
            "1,5",
            "0x1",
            "1e",
            "--1",
            "+-1",
            " 1",
        ] {
            assert_eq!(
                number("x", text).unwrap_err().code,
                Code::WrongType,
                "{text}"
            );
        }
        assert_eq!(number("x", "1e400").unwrap_err().code, Code::OutOfRange);
    }
}
