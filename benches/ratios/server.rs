//! Servers under test: one thread of runtime each, listening as the product does.

use super::client::Client;
use super::processor::others_ns;
use axum::Router;
use redfathom::serve::{ListenerLimits, listen};
use std::net::SocketAddr;
use std::sync::mpsc::channel;
use std::time::Duration;

/// A server on a thread of its own, for the rest of the process, and a connection to it.
pub(crate) struct Server {
    client: Client,
}

impl Server {
    /// Starts `app`.
    pub(crate) fn new(app: Router) -> Server {
        Server {
            client: Client::new(start(app)),
        }
    }

    /// Nanoseconds of processor that the server spends on one `request`, the mean of `count` in a row.
    pub(crate) fn cost_ns(&mut self, request: &[u8], count: usize) -> f64 {
        let before = others_ns();
        for _ in 0..count {
            self.client.exchange(request);
        }
        (others_ns() - before) as f64 / count as f64
    }
}

/// A request without a body.
pub(crate) fn get(target: &str) -> Vec<u8> {
    format!("GET {target} HTTP/1.1\r\nHost: bench\r\nAccept: */*\r\n\r\n").into_bytes()
}

/// A request with a JSON body.
pub(crate) fn post(target: &str, body: &str) -> Vec<u8> {
    let length = body.len();
    format!(
        "POST {target} HTTP/1.1\r\nHost: bench\r\nAccept: */*\r\nContent-Type: application/json\r\n\
         Content-Length: {length}\r\n\r\n{body}"
    )
    .into_bytes()
}

fn start(app: Router) -> SocketAddr {
    let (tell, told) = channel();
    std::thread::spawn(move || {
        let runtime = tokio::runtime::Builder::new_current_thread()
            .enable_all()
            .build()
            .expect("a runtime");
        runtime.block_on(async {
            let listener = tokio::net::TcpListener::bind("127.0.0.1:0")
                .await
                .expect("a free port");
            tell.send(
                listener
                    .local_addr()
                    .expect("a bound socket has an address"),
            )
            .expect("somebody waits");
            let limits = ListenerLimits {
                connections: 16,
                headers: Duration::from_secs(600),
                grace: Duration::ZERO,
            };
            listen(listener, app, limits, std::future::pending()).await
        })
    });
    told.recv().expect("the server starts")
}
