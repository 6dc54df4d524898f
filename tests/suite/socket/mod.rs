//! Tests against the running service over a real socket.

mod client;
