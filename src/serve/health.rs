//! `redfathom healthcheck`: asks a running service whether it is ready, without any client program.

use std::io::{Read, Write};
use std::net::{IpAddr, Ipv4Addr, Ipv6Addr, SocketAddr, TcpStream};
use std::time::Duration;

/// Asks the service at `listen` for `/readyz`.
///
/// # Errors
/// In words: it could not be reached within 3 seconds, or its answer was not 200.
pub(super) fn check(listen: SocketAddr) -> Result<(), String> {
    let address = reachable(listen);
    let status = status(address).map_err(|fault| format!("{address} does not answer: {fault}"))?;
    match status.split_whitespace().nth(1) {
        Some("200") => Ok(()),
        _ => Err(format!("{address} is not ready: {status}")),
    }
}

/// The first line of the answer.
fn status(address: SocketAddr) -> std::io::Result<String> {
    let mut stream = TcpStream::connect_timeout(&address, DEADLINE)?;
    stream.set_read_timeout(Some(DEADLINE))?;
    stream.set_write_timeout(Some(DEADLINE))?;
    write!(
        stream,
        "GET /readyz HTTP/1.1\r\nHost: {address}\r\nConnection: close\r\n\r\n"
    )?;
    let mut answer = Vec::new();
    stream.take(LONGEST_ANSWER).read_to_end(&mut answer)?;
    let text = String::from_utf8_lossy(&answer);
    Ok(text.lines().next().unwrap_or_default().to_owned())
}

/// Where a service that listens on `listen` is reached from its own machine.
fn reachable(listen: SocketAddr) -> SocketAddr {
    let ip = match listen.ip() {
        IpAddr::V4(ip) if ip.is_unspecified() => Ipv4Addr::LOCALHOST.into(),
        IpAddr::V6(ip) if ip.is_unspecified() => Ipv6Addr::LOCALHOST.into(),
        ip => ip,
    };
    SocketAddr::new(ip, listen.port())
}

const DEADLINE: Duration = Duration::from_secs(3);
const LONGEST_ANSWER: u64 = 8192;
