//! The accept loop: a bounded number of connections, each with a deadline for its headers.

use axum::Router;
use hyper::server::conn::http1;
use hyper_util::rt::{TokioIo, TokioTimer};
use hyper_util::server::graceful::GracefulShutdown;
use hyper_util::service::TowerToHyperService;
use std::sync::Arc;
use std::time::Duration;
use tokio::net::{TcpListener, TcpStream};
use tokio::sync::{OwnedSemaphorePermit, Semaphore};

/// What a listener allows.
#[derive(Clone, Copy, Debug)]
pub struct ListenerLimits {
    /// Connections open at once; further ones wait in the kernel's queue.
    pub connections: usize,
    /// Time for the next request's headers to be complete, counted also while a connection is idle.
    pub headers: Duration,
    /// Time for requests under way to finish after the stop.
    pub grace: Duration,
}

/// How a listener ended.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Stopped {
    /// Every request under way was answered.
    Drained,
    /// Some were cut off when the grace ran out.
    CutOff,
}

/// Serves `app` on `listener` until `stop` comes, then finishes what is under way.
pub async fn listen(
    listener: TcpListener,
    app: Router,
    limits: ListenerLimits,
    stop: impl Future<Output = ()>,
) -> Stopped {
    let connections = Arc::new(Semaphore::new(
        limits.connections.min(Semaphore::MAX_PERMITS),
    ));
    let open = GracefulShutdown::new();
    let protocol = protocol(limits);
    tokio::pin!(stop);
    loop {
        let accepted = tokio::select! {
            biased;
            () = &mut stop => break,
            accepted = accept(&listener, &connections) => accepted,
        };
        if let Some((stream, permit)) = accepted {
            let service = TowerToHyperService::new(app.clone());
            let connection = open.watch(protocol.serve_connection(TokioIo::new(stream), service));
            tokio::spawn(async move {
                if let Err(fault) = connection.await {
                    tracing::debug!(%fault, "connection ended early");
                }
                drop(permit);
            });
        }
    }
    drop(listener);
    match tokio::time::timeout(limits.grace, open.shutdown()).await {
        Ok(()) => Stopped::Drained,
        Err(_) => Stopped::CutOff,
    }
}

/// HTTP/1.1 as we speak it. A half-sent header does not hold its connection for ever.
fn protocol(limits: ListenerLimits) -> http1::Builder {
    let mut protocol = http1::Builder::new();
    protocol
        .timer(TokioTimer::new())
        .header_read_timeout(limits.headers);
    protocol
}

/// The next connection and its place among those allowed; `None` if this one failed.
async fn accept(
    listener: &TcpListener,
    connections: &Arc<Semaphore>,
) -> Option<(TcpStream, OwnedSemaphorePermit)> {
    let permit = Arc::clone(connections).acquire_owned().await.ok()?;
    match listener.accept().await {
        Ok((stream, _)) => {
            // Small answers must not wait for the acknowledgement of the one before.
            if let Err(fault) = stream.set_nodelay(true) {
                tracing::debug!(%fault, "TCP_NODELAY was refused");
            }
            Some((stream, permit))
        }
        Err(fault) => {
            tracing::warn!(%fault, "a connection could not be accepted");
            // Out of files, most likely: wait for some to be closed instead of spinning.
            tokio::time::sleep(RETRY).await;
            None
        }
    }
}

const RETRY: Duration = Duration::from_millis(50);

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;
    use axum::routing::get;
    use tokio::io::{AsyncReadExt, AsyncWriteExt};
    use tokio::sync::oneshot;
    use tokio::task::JoinHandle;

    const LIMITS: ListenerLimits = ListenerLimits {
        connections: 2,
        headers: Duration::from_millis(200),
        grace: Duration::from_millis(600),
    };

    struct Running {
        address: std::net::SocketAddr,
        stop: oneshot::Sender<()>,
        ended: JoinHandle<Stopped>,
    }

    async fn start() -> Running {
        let pause = |milliseconds| async move {
            tokio::time::sleep(Duration::from_millis(milliseconds)).await;
            "done"
        };
        let app = Router::new()
            .route("/", get(|| async { "hello" }))
            .route("/short", get(move || pause(150)))
            .route("/long", get(move || pause(60_000)));
        let listener = TcpListener::bind("127.0.0.1:0").await.unwrap();
        let address = listener.local_addr().unwrap();
        let (stop, stopped) = oneshot::channel();
        let wait = async move {
            let _ = stopped.await;
        };
        let ended = tokio::spawn(listen(listener, app, LIMITS, wait));
        Running {
            address,
            stop,
            ended,
        }
    }

    async fn send(address: std::net::SocketAddr, text: &str) -> TcpStream {
        let mut stream = TcpStream::connect(address).await.unwrap();
        stream.write_all(text.as_bytes()).await.unwrap();
        stream
    }

    async fn rest(mut stream: TcpStream) -> String {
        let mut text = String::new();
        stream.read_to_string(&mut text).await.unwrap();
        text
    }

    #[tokio::test]
    async fn a_half_sent_header_is_cut_off_at_its_deadline() {
        let running = start().await;
        let started = std::time::Instant::now();
        let answer = rest(send(running.address, "GET / HTTP/1.1\r\nHost: a").await).await;
        assert!(!answer.contains("hello"), "{answer}");
        assert!(started.elapsed() >= LIMITS.headers);
        assert!(started.elapsed() < LIMITS.headers * 10);
    }

    #[tokio::test]
    async fn a_connection_beyond_the_cap_waits_for_a_place() {
        let running = start().await;
        let held = [
            send(running.address, "").await,
            send(running.address, "").await,
        ];
        let request = "GET / HTTP/1.1\r\nHost: a\r\nConnection: close\r\n\r\n";
        let waiting = tokio::spawn(rest(send(running.address, request).await));
        tokio::time::sleep(Duration::from_millis(60)).await;
        assert!(!waiting.is_finished());
        drop(held);
        assert!(waiting.await.unwrap().ends_with("hello"));
    }

    #[tokio::test]
    async fn what_is_under_way_is_answered_after_the_stop() {
        let running = start().await;
        let asked = tokio::spawn(rest(
            send(running.address, "GET /short HTTP/1.1\r\nHost: a\r\n\r\n").await,
        ));
        tokio::time::sleep(Duration::from_millis(50)).await;
        running.stop.send(()).unwrap();
        assert!(asked.await.unwrap().ends_with("done"));
        assert_eq!(running.ended.await.unwrap(), Stopped::Drained);
        assert!(TcpStream::connect(running.address).await.is_err());
    }

    #[tokio::test]
    async fn the_grace_has_an_end() {
        let running = start().await;
        let _asked = send(running.address, "GET /long HTTP/1.1\r\nHost: a\r\n\r\n").await;
        tokio::time::sleep(Duration::from_millis(50)).await;
        running.stop.send(()).unwrap();
        assert_eq!(running.ended.await.unwrap(), Stopped::CutOff);
    }
}
