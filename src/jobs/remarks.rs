//! What is said about rows that could not be converted, or only with a warning.

use super::code::Code;

/// One remark.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Remark {
    /// From 0.
    pub row: usize,
    /// The output it is about; `None` for the whole row.
    pub column: Option<usize>,
    /// What it says.
    pub code: Code,
    /// What makes it exact.
    pub detail: Detail,
}

/// What makes a remark exact; written out with `Display`.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub enum Detail {
    /// Nothing.
    #[default]
    None,
    /// The largest value of a quantity, in a unit of the catalogue.
    Largest(f64, &'static str),
    /// The smallest value of a quantity, in a unit of the catalogue.
    Smallest(f64, &'static str),
    /// What the values of a quantity come near to but never reach, likewise.
    StaysAbove(f64, &'static str),
    /// Whatever the request says, the quantity has no value there.
    NotBelowZero(&'static str),
    /// By how much rounding moves the redshift.
    RedshiftUncertain(f64),
    /// Redshifts between which the history is told.
    Between(f64, f64),
    /// The branch (from 1) that the remark is about.
    Branch(u32),
}

impl Detail {
    /// Whether there is nothing to add.
    #[must_use]
    pub fn is_none(&self) -> bool {
        *self == Detail::None
    }
}

impl std::fmt::Display for Detail {
    fn fmt(&self, formatter: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Detail::None => Ok(()),
            Detail::Largest(value, unit) => {
                write!(formatter, "the largest value is {value} {unit}")
            }
            Detail::Smallest(value, unit) => {
                write!(formatter, "the smallest value is {value} {unit}")
            }
            Detail::StaysAbove(value, unit) => {
                write!(formatter, "all values are above {value} {unit}")
            }
            Detail::NotBelowZero(quantity) => {
                write!(formatter, "{quantity} is not defined for z < 0")
            }
            Detail::RedshiftUncertain(spread) => {
                write!(formatter, "dz = {spread:.1e} from rounding alone")
            }
            Detail::Between(low, high) => write!(formatter, "{low} <= z <= {high:e}"),
            Detail::Branch(branch) => write!(formatter, "on branch {branch}"),
        }
    }
}

/// Remarks on a table: the first thousand, and a count of the rows of each code.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Remarks {
    /// The first thousand, ordered by row.
    pub first: Vec<Remark>,
    /// Rows with each code, in the order of [`Code::ALL`]; codes without rows are left out.
    pub counts: Vec<(Code, u64)>,
    /// One bit a code, one word a row; empty without remarks.
    rows: Vec<u32>,
}

/// Remarks kept in full.
const KEPT: usize = 1000;

impl Remarks {
    /// The codes of one row.
    pub fn row_codes(&self, row: usize) -> impl Iterator<Item = Code> + use<> {
        let mask = self.rows.get(row).copied().unwrap_or(0);
        Code::ALL
            .into_iter()
            .filter(move |code| mask & code.bit() != 0)
    }

    /// Takes the remarks of a block of rows, whose order within the block is free.
    pub(super) fn take_block(&mut self, block: &mut Vec<Remark>, all_rows: usize) {
        if block.is_empty() {
            return;
        }
        block.sort_by_key(|remark| (remark.row, remark.column));
        self.rows.resize(all_rows, 0);
        for remark in block.drain(..) {
            if self.first.len() < KEPT {
                self.first.push(remark);
            }
            let Some(mask) = self.rows.get_mut(remark.row) else {
                continue;
            };
            if *mask & remark.code.bit() == 0 {
                *mask |= remark.code.bit();
                self.count(remark.code);
            }
        }
    }

    fn count(&mut self, code: Code) {
        match self.counts.binary_search_by_key(&code, |(code, _)| *code) {
            Ok(place) => self.counts[place].1 += 1,
            Err(place) => self.counts.insert(place, (code, 1)),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_thousand_are_kept_and_all_are_counted() {
        let mut remarks = Remarks::default();
        let remark = |row, code| Remark {
            row,
            column: None,
            code,
            detail: Detail::None,
        };
        let mut block: Vec<Remark> = (0..3000)
            .rev()
            .map(|row| remark(row, Code::Missing))
            .collect();
        block.push(remark(7, Code::BeyondPhysics));
        remarks.take_block(&mut block, 3000);
        assert_eq!(remarks.first.len(), 1000);
        assert!(remarks.first.is_sorted_by_key(|remark| remark.row));
        assert_eq!(
            remarks.counts,
            [(Code::Missing, 3000), (Code::BeyondPhysics, 1)]
        );
        let codes: Vec<Code> = remarks.row_codes(7).collect();
        assert_eq!(codes, [Code::Missing, Code::BeyondPhysics]);
        assert_eq!(remarks.row_codes(99_999).count(), 0);
    }
}
