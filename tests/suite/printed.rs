//! Tests of printed.
