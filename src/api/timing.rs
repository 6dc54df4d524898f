//! Where the time of a request went, for the header Server-Timing.

use axum::http::{HeaderMap, HeaderName, HeaderValue};
use std::time::{Duration, Instant};

pub(super) const SERVER_TIMING: HeaderName = HeaderName::from_static("server-timing");

/// A watch that notes the stages of a request.
#[derive(Debug)]
pub(crate) struct Timing {
    last: Instant,
    stages: String,
}

impl Timing {
    /// Starts.
    pub(crate) fn start() -> Timing {
        Timing {
            last: Instant::now(),
            stages: String::with_capacity(96),
        }
    }

    /// Notes that the stage `name` ends here.
    pub(crate) fn end(&mut self, name: &str) {
        let now = Instant::now();
        push(&mut self.stages, name, now - self.last);
        self.last = now;
    }

    /// Puts what was noted into the headers of the response.
    pub(crate) fn tell(self, headers: &mut HeaderMap) {
        if let Ok(stages) = HeaderValue::try_from(self.stages) {
            headers.insert(SERVER_TIMING, stages);
        }
    }
}

/// Appends an entry of the header, in milliseconds.
fn push(stages: &mut String, name: &str, duration: Duration) {
    if !stages.is_empty() {
        stages.push_str(", ");
    }
    stages.push_str(name);
    stages.push_str(";dur=");
    // In microseconds, three digits of them after the point; minutes at most.
    let mut rest = u32::try_from(duration.as_micros()).unwrap_or(u32::MAX);
    let mut divisor = 1_000_000_000;
    let mut begun = false;
    while divisor > 0 {
        let digit = rest / divisor;
        rest %= divisor;
        begun |= digit > 0 || divisor <= 1000;
        if begun {
            stages.extend(char::from_digit(digit, 10));
        }
        if divisor == 1000 {
            stages.push('.');
        }
        divisor /= 10;
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn milliseconds_have_three_digits_after_the_point() {
        let mut stages = String::new();
        push(&mut stages, "read", Duration::from_micros(7));
        push(&mut stages, "model", Duration::from_micros(1_234_567));
        assert_eq!(stages, "read;dur=0.007, model;dur=1234.567");
    }
}
