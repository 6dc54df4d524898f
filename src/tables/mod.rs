//! Table formats, one a file.
