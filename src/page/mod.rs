//! The page for browsers and the cheat sheet for terminals.
