//! The same bits everywhere: whatever the machine, the block or the neighbours.

mod blocks;
mod fingerprint;
