//! Why a conversion was refused, in the words of the request.

use super::super::code::Code;
use super::super::fault::Fault;
use super::unit::unit_fault;
use crate::jobs::{At, ConvertFault};

/// The fault with its place in the body.
pub fn convert_fault(fault: &ConvertFault) -> Fault {
    let detail = fault.to_string();
    match fault {
        ConvertFault::NotInvertible { quantity } => Fault::new(Code::UnknownQuantity, detail)
            .at("/from/quantity")
            .value(*quantity),
        ConvertFault::Undefined { at, quantity, .. } => Fault::new(Code::UndefinedInModel, detail)
            .at(place(*at, "quantity"))
            .value(*quantity),
        ConvertFault::Unit { at, fault } => unit_fault(fault).at(place(*at, "unit")),
        ConvertFault::NoSuchForm { at, form, .. } => {
            let member = form.replace(' ', "_");
            Fault::new(Code::UnitMismatch, detail).at(place(*at, &member))
        }
        ConvertFault::Duplicate { output, quantity } => Fault::new(Code::DuplicateOutput, detail)
            .at(format!("/to/{output}"))
            .value(*quantity),
        ConvertFault::NoSuchBranch {
            quantity,
            number,
            branches,
        } => {
            let count = match branches {
                1 => "one branch".to_owned(),
                _ => format!("{branches} branches"),
            };
            let detail =
                format!("{quantity} has {count} in this model, so none is number {number}");
            let numbers = match branches {
                1 => "1".to_owned(),
                _ => format!("1 to {branches}"),
            };
            Fault::new(Code::OutOfRange, detail)
                .at("/from/branch")
                .value(number.to_string())
                .allowed(format!("{numbers}, near, far, all"))
        }
    }
}

fn place(at: At, member: &str) -> String {
    match at {
        At::Source => format!("/from/{member}"),
        // An output may be a name without members.
        At::Output(number) if member == "quantity" => format!("/to/{number}"),
        At::Output(number) => format!("/to/{number}/{member}"),
    }
}
