//! Configuration, listener, life cycle and telemetry of the process.
