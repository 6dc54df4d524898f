//! A running service and a plain HTTP/1.1 client for it.

use redfathom::api::{Limits, State, app};
use redfathom::serve::{ListenerLimits, listen};
use std::io::{Read, Write};
use std::net::{SocketAddr, TcpListener, TcpStream};
use std::sync::{Arc, LazyLock};
use std::time::Duration;

/// An answer as it came.
pub(crate) struct Answer {
    pub(crate) status: u16,
    pub(crate) headers: Vec<(String, String)>,
    pub(crate) body: Vec<u8>,
}

impl Answer {
    pub(crate) fn header(&self, name: &str) -> Option<&str> {
        let mut found = self.headers.iter().filter(|(other, _)| other == name);
        let first = found.next().map(|(_, value)| value.as_str());
        assert!(found.next().is_none(), "{name} is there twice");
        first
    }

    pub(crate) fn text(&self) -> String {
        String::from_utf8(self.body.clone()).unwrap()
    }

    pub(crate) fn json(&self) -> serde_json::Value {
        serde_json::from_slice(&self.body)
            .unwrap_or_else(|fault| panic!("{fault}: {}", self.text()))
    }
}

/// The address of a service that all tests share.
pub(crate) fn shared() -> SocketAddr {
    static SHARED: LazyLock<SocketAddr> = LazyLock::new(|| start(State::shipped().unwrap()));
    *SHARED
}

/// The address of a service whose limits are small.
pub(crate) fn narrow() -> SocketAddr {
    static NARROW: LazyLock<SocketAddr> = LazyLock::new(|| {
        let limits = Limits {
            body_bytes: 20_000,
            values: 500,
            results: 1000,
            body_seconds: 0.2,
        };
        start(State {
            limits,
            ..State::shipped().unwrap()
        })
    });
    *NARROW
}

/// Starts a service and tells its address.
pub(crate) fn start(state: State) -> SocketAddr {
    start_app(app(Arc::new(state)))
}

/// Starts a service with these routes and tells its address.
pub(crate) fn start_app(app: axum::Router) -> SocketAddr {
    let listener = TcpListener::bind("127.0.0.1:0").unwrap();
    listener.set_nonblocking(true).unwrap();
    let address = listener.local_addr().unwrap();
    std::thread::spawn(move || {
        let runtime = tokio::runtime::Builder::new_multi_thread()
            .worker_threads(2)
            .enable_all()
            .build();
        runtime.unwrap().block_on(async {
            let listener = tokio::net::TcpListener::from_std(listener).unwrap();
            let limits = ListenerLimits {
                connections: 100,
                headers: Duration::from_secs(10),
                grace: Duration::from_secs(1),
            };
            listen(listener, app, limits, std::future::pending()).await
        })
    });
    address
}

pub(crate) fn get(target: &str) -> Answer {
    get_with(target, &[])
}

pub(crate) fn get_with(target: &str, headers: &[(&str, &str)]) -> Answer {
    ask(shared(), "GET", target, headers, None)
}

pub(crate) fn post(target: &str, body: &str) -> Answer {
    let headers = [("content-type", "application/json")];
    ask(shared(), "POST", target, &headers, Some(body.as_bytes()))
}

/// Sends one request on a connection of its own.
pub(crate) fn ask(
    address: SocketAddr,
    method: &str,
    target: &str,
    headers: &[(&str, &str)],
    body: Option<&[u8]>,
) -> Answer {
    let mut request =
        format!("{method} {target} HTTP/1.1\r\nhost: {address}\r\nconnection: close\r\n");
    for (name, value) in headers {
        request.push_str(&format!("{name}: {value}\r\n"));
    }
    if let Some(body) = body {
        request.push_str(&format!("content-length: {}\r\n", body.len()));
    }
    request.push_str("\r\n");
    let mut bytes = request.into_bytes();
    bytes.extend_from_slice(body.unwrap_or_default());
    raw(address, &bytes, method == "HEAD")
}

/// Sends bytes and reads the answer to the end of the connection.
pub(crate) fn raw(address: SocketAddr, request: &[u8], head_only: bool) -> Answer {
    let mut stream = TcpStream::connect(address).unwrap();
    stream
        .set_read_timeout(Some(Duration::from_secs(60)))
        .unwrap();
    // A service that refuses a body unread closes the connection while we write.
    let _ = stream.write_all(request);
    let mut bytes = Vec::new();
    let mut buffer = vec![0; 65_536];
    loop {
        match stream.read(&mut buffer) {
            Ok(0) | Err(_) => break,
            Ok(count) => bytes.extend_from_slice(&buffer[..count]),
        }
    }
    parsed(&bytes, head_only)
}

fn parsed(bytes: &[u8], head_only: bool) -> Answer {
    let end = bytes.windows(4).position(|window| window == b"\r\n\r\n");
    let end = end.unwrap_or_else(|| panic!("no answer: {:?}", String::from_utf8_lossy(bytes)));
    let head = std::str::from_utf8(&bytes[..end]).unwrap();
    let mut lines = head.split("\r\n");
    let status = lines
        .next()
        .unwrap()
        .split(' ')
        .nth(1)
        .unwrap()
        .parse()
        .unwrap();
    let split = |line: &str| {
        line.split_once(": ")
            .map(|(name, value)| (name.to_owned(), value.to_owned()))
    };
    let mut answer = Answer {
        status,
        headers: lines.map(|line| split(line).unwrap()).collect(),
        body: bytes[end + 4..].to_vec(),
    };
    if answer.header("transfer-encoding") == Some("chunked") {
        answer.body = joined(&answer.body);
    } else if let Some(length) = answer.header("content-length") {
        let expected: usize = length.parse().unwrap();
        assert!(head_only || answer.body.len() == expected, "a cut answer");
    }
    answer
}

fn joined(mut chunks: &[u8]) -> Vec<u8> {
    let mut body = Vec::new();
    loop {
        let line = chunks
            .windows(2)
            .position(|window| window == b"\r\n")
            .expect("a cut answer");
        let size =
            usize::from_str_radix(std::str::from_utf8(&chunks[..line]).unwrap(), 16).unwrap();
        if size == 0 {
            return body;
        }
        body.extend_from_slice(&chunks[line + 2..line + 2 + size]);
        chunks = &chunks[line + 2 + size + 2..];
    }
}
