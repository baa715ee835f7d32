//! Tests of all charts.
