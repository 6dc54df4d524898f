//! Where the client says that it found us, made safe to print.

/// `http://` and the host, or our default address if `host` is not a plain host and port.
///
/// The header comes from the client and goes into shell commands and HTML, so
/// nothing but letters, digits and `.-:[]` passes.
pub(super) fn base(host: &str) -> String {
    let plain = |byte: u8| byte.is_ascii_alphanumeric() || b".-:[]".contains(&byte);
    let usable = !host.is_empty() && host.len() <= LONGEST && host.bytes().all(plain);
    format!("http://{}", if usable { host } else { DEFAULT })
}

/// The longest name that DNS carries, with a port.
const LONGEST: usize = 253 + 6;
const DEFAULT: &str = "127.0.0.1:8080";

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_a_plain_host_passes() {
        assert_eq!(base("[::1]:8080"), "http://[::1]:8080");
        assert_eq!(
            base("a.larkfield.example:81"),
            "http://a.larkfield.example:81"
        );
        for hostile in [
            "",
            "a b",
            "$(reboot)",
            "<script>",
            "a';true'",
            &"a".repeat(300),
        ] {
            assert_eq!(base(hostile), "http://127.0.0.1:8080");
        }
    }
}
