//! Tests of accuracy.
