//! The grammar: expression = product ['/' term]; product = term {'.' term};
//! term = symbol ['**' power] | '(' expression ')'.

use super::symbols::{PREFIXES, SYMBOLS, Symbol, ten_to};
use std::sync::Arc;

use super::{Dimension, Factor, Parts, Unit, UnitFault};

/// The longest unit that is read.
const LONGEST: usize = 64;
/// The deepest nesting of parentheses.
const DEEPEST: u32 = 8;
/// The highest power of one symbol.
const HIGHEST_POWER: i32 = 9;

pub(super) fn parse(text: &str) -> Result<Unit, UnitFault> {
    if text == "1" || text.is_empty() {
        return Ok(Unit::dimensionless());
    }
    let mut reader = Reader {
        text,
        rest: text,
        unit: Parts::one(text),
    };
    if text.len() > LONGEST {
        return Err(reader.malformed("it is longer than 64 bytes"));
    }
    reader.expression(1, DEEPEST)?;
    if !reader.rest.is_empty() {
        let reason = if reader.rest.starts_with('/') {
            "one '/' at most; write a/(b.c)"
        } else if reader.rest.starts_with(['*', '^', ' ']) {
            "products are written '.', powers '**'"
        } else {
            "it goes on after its end"
        };
        return Err(reader.malformed(reason));
    }
    let size = reader.unit.size.value();
    if !(size.is_finite() && size > 0.0) {
        return Err(reader.malformed("its size is out of range"));
    }
    Ok(Unit(Arc::new(reader.unit)))
}

struct Reader<'a> {
    text: &'a str,
    rest: &'a str,
    unit: Parts,
}

impl Reader<'_> {
    fn expression(&mut self, sign: i32, depth: u32) -> Result<(), UnitFault> {
        self.term(sign, depth)?;
        while self.take(".") {
            self.term(sign, depth)?;
        }
        if self.take("/") {
            self.term(-sign, depth)?;
        }
        Ok(())
    }

    fn term(&mut self, sign: i32, depth: u32) -> Result<(), UnitFault> {
        if self.take("(") {
            if depth == 0 {
                return Err(self.malformed("its parentheses are nested too deep"));
            }
            self.expression(sign, depth - 1)?;
            if !self.take(")") {
                return Err(self.malformed("a parenthesis is not closed"));
            }
            return Ok(());
        }
        let length = self
            .rest
            .find(|letter: char| !letter.is_ascii_alphabetic() && letter != '%');
        let (symbol, rest) = self.rest.split_at(length.unwrap_or(self.rest.len()));
        if symbol.is_empty() {
            return Err(self.malformed("a unit symbol is missing"));
        }
        self.rest = rest;
        let power = if self.take("**") { self.power()? } else { 1 };
        self.multiply(symbol, sign * power)
    }

    /// An integer, bare or in parentheses.
    fn power(&mut self) -> Result<i32, UnitFault> {
        let enclosed = self.take("(");
        let end = self
            .rest
            .find(|letter: char| !letter.is_ascii_digit() && letter != '-' && letter != '+');
        let (digits, rest) = self.rest.split_at(end.unwrap_or(self.rest.len()));
        self.rest = rest;
        if enclosed && !self.take(")") {
            return Err(self.malformed("powers are whole numbers"));
        }
        match digits.parse::<i32>() {
            Ok(power) if power != 0 && power.abs() <= HIGHEST_POWER => Ok(power),
            _ => Err(self.malformed("powers are whole numbers from -9 to 9, without 0")),
        }
    }

    fn multiply(&mut self, symbol: &str, power: i32) -> Result<(), UnitFault> {
        let (known, prefix) = find(symbol).ok_or_else(|| UnitFault::Unknown {
            symbol: symbol.to_owned(),
        })?;
        let size = (known.size)() * ten_to(prefix);
        for _ in 0..power.unsigned_abs() {
            self.unit.size = if power > 0 {
                self.unit.size * size
            } else {
                self.unit.size / size
            };
        }
        self.unit.dimension = self
            .unit
            .dimension
            .times(Dimension::power(known.dimension, power));
        self.unit.factors.push(Factor {
            symbol: symbol.to_owned(),
            power,
        });
        Ok(())
    }

    fn take(&mut self, token: &str) -> bool {
        match self.rest.strip_prefix(token) {
            Some(rest) => {
                self.rest = rest;
                true
            }
            None => false,
        }
    }

    fn malformed(&self, reason: &str) -> UnitFault {
        UnitFault::Malformed {
            text: self.text.chars().take(LONGEST).collect(),
            reason: reason.to_owned(),
        }
    }
}

/// A symbol with the power of ten of its prefix; a symbol of its own comes first,
/// so that Pa is a pascal and min a minute.
fn find(text: &str) -> Option<(&'static Symbol, i32)> {
    let known = |name: &str| SYMBOLS.iter().find(|symbol| symbol.name == name);
    if let Some(symbol) = known(text) {
        return Some((symbol, 0));
    }
    PREFIXES.iter().find_map(|(prefix, power)| {
        let symbol = known(text.strip_prefix(prefix)?)?;
        symbol.prefixed.then_some((symbol, *power))
    })
}
