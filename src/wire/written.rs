//! Answers on their way out: pieces of text and columns of numbers, written chunk by chunk.

use super::numbers::{WRITTEN_BYTES, write, write_list};
use serde::Serialize;

/// An answer whose numbers are written only when they are sent.
#[derive(Debug)]
pub struct Written {
    pieces: Vec<Piece>,
    text: Vec<u8>,
}

impl Default for Written {
    fn default() -> Written {
        Written {
            pieces: Vec::new(),
            // Most answers are small and fit.
            text: Vec::with_capacity(2048),
        }
    }
}

#[derive(Debug)]
enum Piece {
    Text(Vec<u8>),
    Numbers(Vec<f64>),
}

impl Written {
    /// Appends text.
    pub fn text(&mut self, text: &str) {
        self.text.extend_from_slice(text.as_bytes());
    }

    /// Appends a string as JSON.
    pub fn string(&mut self, text: &str) {
        if text
            .bytes()
            .any(|byte| matches!(byte, b'"' | b'\\' | 0..0x20))
        {
            return self.json(&text);
        }
        self.text.push(b'"');
        self.text(text);
        self.text.push(b'"');
    }

    /// Appends one number.
    pub fn number(&mut self, number: f64) {
        write(&mut self.text, number);
    }

    /// Appends a small value as JSON.
    pub fn json(&mut self, value: &impl Serialize) {
        // Into memory, without maps that have keys other than strings: it can't fail.
        let _ = serde_json::to_writer(&mut self.text, value);
    }

    /// Appends numbers with commas between them; a few of them are written at once.
    pub fn numbers(&mut self, numbers: Vec<f64>) {
        if numbers.len() <= FEW {
            write_list(&mut self.text, &numbers);
            return;
        }
        self.pieces
            .push(Piece::Text(std::mem::take(&mut self.text)));
        self.pieces.push(Piece::Numbers(numbers));
    }

    /// About how many bytes it will be.
    pub fn estimate(&self) -> usize {
        let texts = self.pieces.iter().map(|piece| match piece {
            Piece::Text(text) => text.len(),
            Piece::Numbers(numbers) => numbers.len() * WRITTEN_BYTES,
        });
        texts.sum::<usize>() + self.text.len()
    }

    /// The bytes, in chunks of [`CHUNK_BYTES`] or a little more.
    pub fn chunks(self) -> Chunks {
        let mut pieces = self.pieces;
        pieces.push(Piece::Text(self.text));
        Chunks {
            pieces: pieces.into_iter(),
            column: Vec::new(),
            row: 0,
        }
    }

    /// All bytes at once.
    pub fn whole(self) -> Vec<u8> {
        if self.pieces.is_empty() {
            return self.text;
        }
        let mut out = Vec::with_capacity(self.estimate());
        for piece in self.pieces {
            match piece {
                Piece::Text(text) => out.extend_from_slice(&text),
                Piece::Numbers(numbers) => write_list(&mut out, &numbers),
            }
        }
        out.extend_from_slice(&self.text);
        out
    }
}

/// So few numbers are not worth a piece of their own.
const FEW: usize = 64;

/// How much is written at once: it stays in the cache of a core.
pub const CHUNK_BYTES: usize = 64 * 1024;

/// The bytes of an answer, chunk by chunk.
#[derive(Debug)]
pub struct Chunks {
    pieces: std::vec::IntoIter<Piece>,
    column: Vec<f64>,
    row: usize,
}

impl Iterator for Chunks {
    type Item = Vec<u8>;

    fn next(&mut self) -> Option<Vec<u8>> {
        let mut out = Vec::with_capacity(CHUNK_BYTES + 64);
        while out.len() < CHUNK_BYTES {
            let rest = self.column.get(self.row..).unwrap_or_default();
            let fits = 1 + (CHUNK_BYTES - out.len()) / WRITTEN_BYTES;
            for (index, number) in rest.iter().take(fits).enumerate() {
                if self.row + index > 0 {
                    out.push(b',');
                }
                write(&mut out, *number);
            }
            if rest.len() > fits {
                self.row += fits;
                continue;
            }
            (self.column, self.row) = (Vec::new(), 0);
            match self.pieces.next() {
                Some(Piece::Text(text)) => out.extend_from_slice(&text),
                Some(Piece::Numbers(numbers)) => self.column = numbers,
                None => break,
            }
        }
        (!out.is_empty()).then_some(out)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn chunks_and_whole_are_the_same_bytes() {
        for count in [0, 1, 3000, 3400, 20_000] {
            let written = || {
                let mut written = Written::default();
                written.text("[");
                written.numbers((0..count).map(|row| f64::from(row).sqrt()).collect());
                written.text("],[");
                written.numbers(vec![f64::NAN; 7]);
                written.text("]");
                written
            };
            let chunks: Vec<_> = written().chunks().collect();
            let longest = chunks.iter().map(Vec::len).max().unwrap_or(0);
            assert!(longest <= CHUNK_BYTES + 64, "{longest}");
            assert_eq!(chunks.concat(), written().whole(), "{count}");
        }
    }
}
