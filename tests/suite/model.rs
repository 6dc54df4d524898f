//! Tests of model.
