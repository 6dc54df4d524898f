//! Fingerprint to shared tables: the bounded cache, one build however many wait, and the bounded CPU pool.
