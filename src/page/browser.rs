//! What a browser gets at `/`: one page that needs nothing from outside and no script.

use super::examples::EXAMPLES;
use super::host::base;
use std::fmt::Write;

/// The page of the service that a client reached as `host`; it listens on `port`.
pub fn browser(host: &str, port: u16) -> String {
    let base = base(host, port);
    let mut examples = String::new();
    for example in EXAMPLES {
        // Writing to a String cannot fail.
        let _ = writeln!(
            examples,
            "<dt>{}</dt>\n<dd><pre>{}</pre></dd>",
            escaped(example.says),
            escaped(&example.at(&base))
        );
    }
    TEMPLATE
        .replace("{style}", STYLE)
        .replace("{version}", env!("CARGO_PKG_VERSION"))
        .replace("{examples}", examples.trim_end())
}

/// The value of the `Content-Security-Policy` header to send with the page.
pub const CONTENT_SECURITY_POLICY: &str = "default-src 'none'; form-action 'self'; base-uri 'none'; \
     frame-ancestors 'none'; style-src 'sha256-n5S62zn+3K+MWr8y34t9jPTnHl53e9+Gsq2B21NSAZg='";

const TEMPLATE: &str = include_str!("browser.html");
const STYLE: &str = include_str!("browser.css");

fn escaped(text: &str) -> String {
    text.replace('&', "&amp;")
        .replace('<', "&lt;")
        .replace('>', "&gt;")
}

#[cfg(test)]
mod tests {
    use super::*;
    use sha2::{Digest, Sha256};

    #[test]
    fn the_policy_names_the_style_that_is_served() {
        let hash = base64(&Sha256::digest(STYLE));
        assert!(
            CONTENT_SECURITY_POLICY.contains(&format!("'sha256-{hash}'")),
            "the style's hash is {hash}"
        );
        assert!(browser("a", 8080).contains(&format!("<style>{STYLE}</style>")));
    }

    #[test]
    fn nothing_comes_from_outside() {
        let page = browser("127.0.0.1:8080", 8080);
        for outside in [
            "src=",
            "<script",
            "<link",
            "url(",
            "@import",
            "{examples}",
            "{base}",
        ] {
            assert!(!page.contains(outside), "{outside}");
        }
        for target in page.split("href=\"").skip(1) {
            assert!(target.starts_with('/'), "{target}");
        }
    }

    fn base64(bytes: &[u8]) -> String {
        const DIGITS: &[u8; 64] =
            b"ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";
        let digit = |chunk: &[u8], index: usize| {
            let word = (0..3).fold(0_u32, |word, at| {
                word << 8 | u32::from(chunk.get(at).copied().unwrap_or(0))
            });
            if index > chunk.len() {
                '='
            } else {
                char::from(DIGITS[(word >> (18 - 6 * index)) as usize & 63])
            }
        };
        bytes
            .chunks(3)
            .flat_map(|chunk| (0..4).map(move |index| digit(chunk, index)))
            .collect()
    }
}
