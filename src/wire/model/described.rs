//! From the description of the job to that of the wire.

use super::super::convert::Accuracy;
use super::super::service::SERVICE;
use super::ModelEcho;
use super::describe::{
    Densities, DescribeAnswer, Early, EarlyEpoch, Equality, Fate, Horizons, Milestones, Past,
    Scalar, Today,
};
use crate::jobs::{self, Description, FateKind, PastKind};

impl<'a> DescribeAnswer<'a> {
    /// The answer for a model and its description.
    pub fn of(model: ModelEcho<'a>, described: Description) -> DescribeAnswer<'a> {
        let accuracy = described.accuracy.into_iter();
        DescribeAnswer {
            model,
            service: SERVICE,
            densities: Densities::of(described.densities),
            today: Today::of(described.today),
            milestones: Milestones::of(described.milestones),
            early: Early::of(described.early),
            horizons: Horizons {
                particle: Scalar::of(described.horizons.particle),
                event: Scalar::of(described.horizons.event),
            },
            past: Past {
                kind: match described.past.kind {
                    PastKind::HotBeginning => "hot_beginning",
                    PastKind::Bounce => "bounce",
                    PastKind::None => "none",
                },
                redshift: described.past.redshift,
            },
            fate: Fate {
                kind: match described.fate.kind {
                    FateKind::ExpandsForEver => "expands_for_ever",
                    FateKind::Recollapses => "recollapses",
                    FateKind::Rip => "rip",
                },
                time: Scalar::of(described.fate.time),
            },
            redshift_range: [described.redshift_range.0, described.redshift_range.1],
            accuracy: accuracy
                .map(|(quantity, stated)| (quantity.name, Accuracy::of(stated)))
                .collect(),
            table_bytes: described.table_bytes,
        }
    }
}

impl Scalar {
    fn of(scalar: jobs::Scalar) -> Scalar {
        Scalar {
            value: scalar.value,
            unit: scalar.unit,
            reason: scalar.reason,
            source: scalar.source,
        }
    }
}

impl Densities {
    fn of(budget: jobs::Budget) -> Densities {
        Densities {
            matter: budget.matter,
            baryons: budget.baryons,
            massive_neutrinos: budget.massive_neutrinos,
            radiation: budget.radiation,
            photons: budget.photons,
            massless_neutrinos: budget.massless_neutrinos,
            curvature: budget.curvature,
            dark_energy: budget.dark_energy,
        }
    }
}

impl Today {
    fn of(today: jobs::Today) -> Today {
        Today {
            age: Scalar::of(today.age),
            hubble_time: Scalar::of(today.hubble_time),
            hubble_distance: Scalar::of(today.hubble_distance),
            deceleration_parameter: Scalar::of(today.deceleration_parameter),
        }
    }
}

impl Milestones {
    fn of(milestones: jobs::Milestones) -> Milestones {
        let scalars = |scalars: Vec<jobs::Scalar>| scalars.into_iter().map(Scalar::of).collect();
        Milestones {
            equality: Equality {
                all_neutrinos_massless: Scalar::of(milestones.equality.all_neutrinos_massless),
                pressure_split: Scalar::of(milestones.equality.pressure_split),
            },
            matter_dark_energy_equality: Scalar::of(milestones.matter_dark_energy_equality),
            acceleration: scalars(milestones.acceleration),
            angular_diameter_peaks: scalars(milestones.angular_diameter_peaks),
        }
    }
}

impl Early {
    fn of(early: jobs::Early) -> Early {
        let epoch = |epoch: jobs::EarlyEpoch| EarlyEpoch {
            source: epoch.redshift.source.clone(),
            redshift: Scalar::of(jobs::Scalar {
                source: None,
                ..epoch.redshift
            }),
            sound_horizon: Scalar::of(epoch.sound_horizon),
        };
        Early {
            decoupling: epoch(early.decoupling),
            drag: epoch(early.drag),
            sound_horizon_fit: Scalar::of(early.sound_horizon_fit),
            drag_redshift_historical: Scalar::of(early.drag_redshift_historical),
        }
    }
}
