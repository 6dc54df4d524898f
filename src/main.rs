//! The `redfathom` command.

fn main() {}
