//! Packed request bodies: gzip with all its members, Brotli, Zstandard.

use crate::wire::{Code, Fault};
use axum::http::HeaderValue;
use std::io::{self, Read};

/// How a body is packed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Coding {
    /// Not at all.
    Identity,
    /// RFC 1952.
    Gzip,
    /// RFC 7932.
    Brotli,
    /// RFC 8878.
    Zstandard,
}

impl Coding {
    /// The coding that the values of Content-Encoding name.
    ///
    /// # Errors
    /// `unsupported_encoding` for another one or several.
    pub(super) fn of<'h>(values: impl Iterator<Item = &'h HeaderValue>) -> Result<Coding, Fault> {
        let mut coding = Coding::Identity;
        for value in values {
            let name = value.to_str().unwrap_or("").trim().to_ascii_lowercase();
            coding = match (coding, name.as_str()) {
                (Coding::Identity, "identity" | "") => Coding::Identity,
                (Coding::Identity, "gzip" | "x-gzip") => Coding::Gzip,
                (Coding::Identity, "br") => Coding::Brotli,
                (Coding::Identity, "zstd") => Coding::Zstandard,
                _ => {
                    let detail =
                        "the body's Content-Encoding is not one of gzip, br, zstd, identity";
                    return Err(Fault::new(Code::UnsupportedEncoding, detail)
                        .value(name)
                        .allowed("gzip, br, zstd, identity"));
                }
            };
        }
        Ok(coding)
    }

    /// The unpacked bytes of `packed`, at most `limit`.
    ///
    /// # Errors
    /// `body_too_large` beyond the limit, `unsupported_encoding` if it is no such stream.
    pub(super) fn unpack(self, packed: &[u8], limit: usize) -> Result<Vec<u8>, Fault> {
        let unpacked = match self {
            Coding::Identity => take(packed, limit),
            Coding::Gzip => take(flate2::read::MultiGzDecoder::new(packed), limit),
            Coding::Brotli => take(
                brotli_decompressor::Decompressor::new(packed, BUFFER_BYTES),
                limit,
            ),
            Coding::Zstandard => zstandard(packed).and_then(|stream| take(stream, limit)),
        };
        match unpacked {
            Ok(bytes) if bytes.len() > limit => Err(too_large("the unpacked body", limit)),
            Ok(bytes) => Ok(bytes),
            Err(fault) => {
                let detail =
                    format!("the body can't be unpacked as its Content-Encoding says: {fault}");
                Err(Fault::new(Code::UnsupportedEncoding, detail))
            }
        }
    }
}

/// Reads one byte more than the limit at most, so that the caller sees the excess.
fn take(stream: impl Read, limit: usize) -> io::Result<Vec<u8>> {
    let mut bytes = Vec::new();
    let most = u64::try_from(limit).unwrap_or(u64::MAX).saturating_add(1);
    stream.take(most).read_to_end(&mut bytes)?;
    Ok(bytes)
}

fn zstandard(packed: &[u8]) -> io::Result<impl Read + '_> {
    let mut stream = zstd::stream::read::Decoder::with_buffer(packed)?;
    // A frame may ask for a window of 128 MiB by a few bytes of header.
    stream.window_log_max(WINDOW_LOG)?;
    Ok(stream)
}

const BUFFER_BYTES: usize = 16 * 1024;
/// 8 MiB, what RFC 8878 recommends every decoder to support.
const WINDOW_LOG: u32 = 23;

/// The refusal of something with more than `limit` bytes.
pub(super) fn too_large(what: &str, limit: usize) -> Fault {
    let detail = format!(
        "{what} has more than {limit} bytes; send it in parts, rows don't depend on one another"
    );
    Fault::new(Code::BodyTooLarge, detail)
}
