//! Published parameter sets: what one holds, and how sure we are of it.

use std::fmt;

use super::{Citation, Declaration, ModelFault, Spec};

/// The model of requests that name none, unless the operator says otherwise.
pub const DEFAULT_MODEL: &str = "planck-2018-cmb-lensing";

/// A parameter set under a name that keeps its numbers for ever.
#[derive(Clone, Copy, Debug)]
pub struct PublishedSet {
    /// Name in requests.
    pub name: &'static str,
    /// Name for people.
    pub title: &'static str,
    /// How sure we are of the numbers.
    pub status: Status,
    /// Who stands for them.
    pub source: Origin,
    /// The table of the source; empty where there is none.
    pub table: &'static str,
    /// The column of the table; empty where there is none.
    pub column: &'static str,
    /// What is not said elsewhere: rounding, assumptions; may be empty.
    pub note: &'static str,
    /// The numbers as printed.
    pub declaration: fn() -> Declaration,
    /// Their errors.
    pub uncertainty: Option<Uncertainty>,
    /// What the source prints about the model besides its parameters.
    pub printed: Printed,
}

/// Who stands for the numbers of a set.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Origin {
    /// A paper or a book.
    Published(Citation),
    /// Nobody in particular: round numbers in use everywhere.
    CommonPractice,
}

/// How sure we are that the numbers are those of the source.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Status {
    /// Compared with a public text of the source.
    Confirmed,
    /// Some of the numbers were compared.
    PartlyConfirmed,
    /// None was compared.
    FromMemory,
}

/// Standard deviations of some parameters and, where known, their correlations.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Uncertainty {
    /// Members of the model, with dots: `dark_energy.w0`.
    pub parameters: &'static [&'static str],
    /// One a parameter, in its unit.
    pub standard_deviations: &'static [f64],
    /// Rows of the correlation matrix; `None` where it is not known.
    pub correlations: Option<&'static [&'static [f64]]>,
    /// Where the correlations come from, above all when they are derived.
    pub correlations_source: &'static str,
}

/// What a source prints that follows from its parameters.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Printed {
    /// Age today, Gyr.
    pub age_gyr: Option<f64>,
    /// Its standard deviation, Gyr.
    pub age_standard_deviation_gyr: Option<f64>,
    /// Redshift of decoupling (unit optical depth).
    pub decoupling_redshift: Option<f64>,
    /// Comoving sound horizon at decoupling, Mpc.
    pub decoupling_sound_horizon_mpc: Option<f64>,
    /// Redshift of the drag epoch, from a computation of recombination.
    pub drag_redshift: Option<f64>,
    /// Comoving sound horizon at the drag epoch, Mpc.
    pub drag_sound_horizon_mpc: Option<f64>,
    /// Redshift of equality, all neutrinos counted massless.
    pub equality_redshift: Option<f64>,
}

impl PublishedSet {
    /// The numbers as printed.
    #[must_use]
    pub fn declaration(&self) -> Declaration {
        (self.declaration)()
    }

    /// The closed model.
    ///
    /// # Errors
    /// Those of [`Declaration::close`]; a test excludes them for every shipped set.
    pub fn spec(&self) -> Result<Spec, Vec<ModelFault>> {
        self.declaration().close()
    }
}

impl Status {
    /// The word for it in answers.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Status::Confirmed => "confirmed",
            Status::PartlyConfirmed => "partly_confirmed",
            Status::FromMemory => "from_memory",
        }
    }
}

impl fmt::Display for Origin {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Origin::Published(citation) => citation.fmt(f),
            Origin::CommonPractice => f.write_str("common practice"),
        }
    }
}
