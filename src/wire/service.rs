//! What the service tells about itself.

use crate::model::constants;
use serde::Serialize;
use utoipa::ToSchema;

/// Which service answered.
#[derive(Clone, Copy, Debug, Serialize, ToSchema)]
pub struct Service {
    /// Its name.
    #[schema(examples("redfathom"))]
    pub name: &'static str,
    /// Its version: the same request gets the same bytes from the same version.
    #[schema(examples("0.1.0"))]
    pub version: &'static str,
}

/// This service.
pub const SERVICE: Service = Service {
    name: env!("CARGO_PKG_NAME"),
    version: env!("CARGO_PKG_VERSION"),
};

/// Version, build, constants and limits.
#[derive(Debug, Serialize, ToSchema)]
pub struct VersionAnswer {
    /// Its name.
    #[schema(examples("redfathom"))]
    pub name: &'static str,
    /// Its version.
    #[schema(examples("0.1.0"))]
    pub version: &'static str,
    /// How it was built.
    pub build: Build,
    /// The constants of nature that it computes with.
    pub constants: Vec<Constant>,
    /// How much a request may ask for.
    pub limits: StatedLimits,
}

/// How the program was built.
#[derive(Debug, Serialize, ToSchema)]
pub struct Build {
    /// `release` or `debug`; the numbers are the same.
    pub profile: &'static str,
    /// The system it was built for.
    pub target: String,
}

impl Build {
    /// Of this program.
    pub fn this() -> Build {
        Build {
            profile: if cfg!(debug_assertions) {
                "debug"
            } else {
                "release"
            },
            target: format!("{}-{}", std::env::consts::ARCH, std::env::consts::OS),
        }
    }
}

/// A constant of nature or a definition.
#[derive(Debug, Serialize, ToSchema)]
pub struct Constant {
    /// Its name.
    pub name: &'static str,
    /// Its value.
    pub value: f64,
    /// Its unit.
    pub unit: &'static str,
    /// Who fixed or measured it.
    pub source: &'static str,
}

impl Constant {
    /// Those that the numbers rest on.
    pub fn all() -> Vec<Constant> {
        let codata = "CODATA 2018: Tiesinga et al. 2021, Reviews of Modern Physics 93, 025010";
        let rows = [
            (
                "speed_of_light",
                constants::SPEED_OF_LIGHT_KM_S,
                "km/s",
                codata,
            ),
            (
                "gravitation",
                constants::GRAVITATION,
                "m**3/(kg.s**2)",
                codata,
            ),
            (
                "boltzmann_constant",
                constants::BOLTZMANN_CONSTANT_J_K,
                "J/K",
                codata,
            ),
            (
                "planck_constant",
                constants::PLANCK_CONSTANT_J_S,
                "J.s",
                codata,
            ),
            ("electronvolt", constants::ELECTRONVOLT_J, "J", codata),
            (
                "astronomical_unit",
                constants::ASTRONOMICAL_UNIT_M,
                "m",
                "IAU 2012 Resolution B2",
            ),
            (
                "megaparsec",
                constants::MEGAPARSEC_M,
                "m",
                "IAU 2015 Resolution B2, note 4: 648000/pi au",
            ),
            ("julian_year", constants::JULIAN_YEAR_S, "s", "365.25 days"),
        ];
        let constant = |(name, value, unit, source)| Constant {
            name,
            value,
            unit,
            source,
        };
        rows.into_iter().map(constant).collect()
    }
}

/// How much a request may ask for.
#[derive(Debug, Serialize, ToSchema)]
pub struct StatedLimits {
    /// Bytes of a body, as sent and unpacked.
    pub body_bytes: usize,
    /// Values to convert in one request.
    pub values: usize,
    /// Values times outputs in one request.
    pub results: usize,
    /// Values in a query.
    pub query_values: usize,
    /// Bytes of path and query.
    pub uri_bytes: usize,
    /// Bytes of all header fields.
    pub header_bytes: usize,
    /// Seconds until a body must be complete.
    pub body_seconds: f64,
}
