//! Which universe: constants, parameters and their ranges, dark-energy forms, neutrinos, published sets, fingerprints.
