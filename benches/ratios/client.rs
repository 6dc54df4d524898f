//! A client that costs little and speaks just enough HTTP to keep one connection busy.

use std::io::{Read, Write};
use std::net::{SocketAddr, TcpStream};

/// One keep-alive connection.
pub(crate) struct Client {
    stream: TcpStream,
    buffer: Vec<u8>,
}

impl Client {
    /// Connects.
    pub(crate) fn new(address: SocketAddr) -> Client {
        let stream = TcpStream::connect(address).expect("the service listens");
        stream
            .set_nodelay(true)
            .expect("a TCP socket has the option");
        Client {
            stream,
            buffer: vec![0; 1 << 20],
        }
    }

    /// Sends `request` and reads the whole answer.
    pub(crate) fn exchange(&mut self, request: &[u8]) {
        self.stream.write_all(request).expect("the service reads");
        let mut filled = 0;
        let mut whole = None;
        loop {
            if filled == self.buffer.len() {
                self.buffer.resize(2 * filled, 0);
            }
            let got = self
                .stream
                .read(&mut self.buffer[filled..])
                .expect("the service answers");
            assert!(got > 0, "the service closed the connection");
            filled += got;
            let answer = &self.buffer[..filled];
            if whole.is_none() {
                whole = end_of_head(answer)
                    .map(|head| whole_length(&answer[..head]).map(|body| head + body));
            }
            match whole {
                Some(Some(length)) if filled >= length => return,
                Some(None) if answer.ends_with(b"\r\n0\r\n\r\n") => return,
                _ => {}
            }
        }
    }
}

fn end_of_head(answer: &[u8]) -> Option<usize> {
    answer
        .windows(4)
        .position(|window| window == b"\r\n\r\n")
        .map(|at| at + 4)
}

/// The declared length of the body; `None` for one in chunks.
fn whole_length(head: &[u8]) -> Option<usize> {
    let head = std::str::from_utf8(head)
        .expect("heads are ASCII")
        .to_ascii_lowercase();
    assert!(head.starts_with("http/1.1 200"), "{head}");
    let length = head.split("content-length:").nth(1)?.lines().next()?;
    Some(length.trim().parse().expect("a length is a number"))
}
