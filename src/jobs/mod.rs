//! Pure functions from prepared histories and columns to columns, one job a file.

mod accuracy;
mod code;
mod conversion;
mod convert;
mod describe;
mod description;
mod early;
mod future;
mod milestones;
mod remarks;
mod rows;
mod verdict;

#[cfg(test)]
mod tests;

pub use accuracy::{Basis, StatedAccuracy};
pub use code::Code;
pub use conversion::{At, Branch, Conversion, ConvertFault, Output, Source};
pub use convert::{BranchRange, BranchValues, Column, Converted, convert};
pub use describe::describe;
pub use description::{
    Budget, Description, Early, EarlyEpoch, Equality, Fate, FateKind, Horizons, Milestones, Past,
    PastKind, Scalar, Today,
};
pub use early::{PrintedEpochs, sound_horizon_at_drag_mpc};
pub use remarks::{Detail, Remark, Remarks};
