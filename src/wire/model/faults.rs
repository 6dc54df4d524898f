//! What is wrong with a declared model, in the words of the request.

use super::super::code::Code;
use super::super::fault::Fault;
use crate::model::{ModelFault, ModelFaultKind};

/// The faults of a model that stands at `pointer` in the body.
pub fn model_faults(faults: &[ModelFault], pointer: &str) -> Vec<Fault> {
    faults
        .iter()
        .map(|fault| model_fault(fault, pointer))
        .collect()
}

fn model_fault(fault: &ModelFault, pointer: &str) -> Fault {
    let code = match fault.kind {
        ModelFaultKind::MissingField => Code::MissingField,
        ModelFaultKind::UnknownField => Code::UnknownField,
        ModelFaultKind::OutOfRange | ModelFaultKind::UnknownForm => Code::OutOfRange,
        ModelFaultKind::InconsistentClosure => Code::InconsistentClosure,
        ModelFaultKind::Impossible => Code::ImpossibleModel,
    };
    let mut placed =
        Fault::new(code, fault.detail.as_str()).at(format!("{pointer}{}", fault.pointer));
    if let Some(value) = &fault.value {
        placed = placed.value(value.as_str());
    }
    placed.allowed.clone_from(&fault.allowed);
    placed
}
