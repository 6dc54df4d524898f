//! Tests of closed_forms.
