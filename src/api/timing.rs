//! Where the time of a request went, for the header Server-Timing.

use super::around::SERVER_TIMING;
use axum::http::HeaderValue;
use axum::response::Response;
use std::time::{Duration, Instant};

/// A watch that notes the stages of a request.
#[derive(Debug)]
pub(super) struct Timing {
    last: Instant,
    stages: String,
}

impl Timing {
    /// Starts.
    pub(super) fn start() -> Timing {
        Timing {
            last: Instant::now(),
            stages: String::with_capacity(96),
        }
    }

    /// Notes that the stage `name` ends here.
    pub(super) fn end(&mut self, name: &str) {
        let now = Instant::now();
        if !self.stages.is_empty() {
            self.stages.push_str(", ");
        }
        self.stages.push_str(&entry(name, now - self.last));
        self.last = now;
    }

    /// Puts what was noted into the header of `response`.
    pub(super) fn tell(self, response: &mut Response) {
        if let Ok(stages) = HeaderValue::try_from(self.stages) {
            response.headers_mut().insert(SERVER_TIMING, stages);
        }
    }
}

/// One entry of the header, in milliseconds.
pub(super) fn entry(name: &str, duration: Duration) -> String {
    let microseconds = duration.as_micros();
    format!(
        "{name};dur={}.{:03}",
        microseconds / 1000,
        microseconds % 1000
    )
}
