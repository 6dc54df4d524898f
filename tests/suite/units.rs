//! Tests of units.
