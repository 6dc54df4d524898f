//! What a person sees first: the terminal's cheat sheet and the browser's page.

mod browser;
mod cheat_sheet;
mod examples;
mod host;

pub use browser::{CONTENT_SECURITY_POLICY, browser};
pub use cheat_sheet::cheat_sheet;
pub use examples::{EXAMPLES, Example};
