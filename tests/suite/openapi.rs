//! Tests of openapi.
