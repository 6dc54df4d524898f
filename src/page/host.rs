//! Where the client says that it found us, made safe to print.

/// `http://` and the host, or this machine's at `port` if `host` is not a plain host and port.
///
/// The header comes from the client and goes into shell commands and HTML, so
/// nothing but letters, digits and `.-:[]` passes.
pub(super) fn base(host: &str, port: u16) -> String {
    let plain = |byte: u8| byte.is_ascii_alphanumeric() || b".-:[]".contains(&byte);
    let usable = !host.is_empty() && host.len() <= LONGEST && host.bytes().all(plain);
    match usable {
        true => format!("http://{host}"),
        false => format!("http://127.0.0.1:{port}"),
    }
}

/// The longest name that DNS carries, with a port.
const LONGEST: usize = 253 + 6;

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_a_plain_host_passes() {
        assert_eq!(base("[::1]:8080", 9), "http://[::1]:8080");
        assert_eq!(
            base("a.larkfield.example:81", 9),
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
            assert_eq!(base(hostile, 9000), "http://127.0.0.1:9000");
        }
    }
}
