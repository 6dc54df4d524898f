//! Tests of laws.
