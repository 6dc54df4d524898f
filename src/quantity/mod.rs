//! The catalogue of quantities: name, unit, domain, accuracy, forward, inverse, source; and the unit grammar.
