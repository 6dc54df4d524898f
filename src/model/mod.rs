//! Which universe: constants, parameters and their ranges, dark-energy forms,
//! neutrinos, published sets, fingerprints.

mod canonical;
mod check;
mod citation;
mod closure;
pub mod constants;
mod dark_energy;
mod declaration;
mod fault;
mod instant;
pub mod neutrinos;
pub mod parameter;
mod published;
mod published_sets;
mod spec;

pub use citation::Citation;
pub use dark_energy::{CONSTANT, COSMOLOGICAL_CONSTANT, DARK_ENERGY_FORMS, DarkEnergyForm, NONE};
pub use declaration::{DarkEnergyDeclaration, Declaration, RadiationDeclaration};
pub use fault::{ModelFault, ModelFaultKind};
pub use instant::Instant;
pub use parameter::Parameter;
pub use published::{DEFAULT_MODEL, Origin, Printed, PublishedSet, Status, Uncertainty};
pub use published_sets::PUBLISHED_SETS;
pub use spec::{DarkEnergy, MassiveNeutrino, Radiation, Spec};
