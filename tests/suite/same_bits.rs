//! Tests of same_bits.
