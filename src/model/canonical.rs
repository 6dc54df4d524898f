//! The canonical bytes of a model, and its fingerprint.
//!
//! Layout, all numbers as the big-endian bits of an IEEE 754 double with −0
//! replaced by 0:
//!
//! 1. the eight ASCII bytes `rf1model`;
//! 2. hubble_constant, matter, curvature;
//! 3. one byte 1 and baryons, or one byte 0;
//! 4. cmb_temperature, effective_neutrino_number and three neutrino masses,
//!    ascending (all zero without radiation);
//! 5. the density of dark energy;
//! 6. the name of the simplest equal form of dark energy in ASCII, one zero
//!    byte, then that form's numbers in the order of its parameters; a density
//!    of zero is the form `none`.

use sha2::{Digest, Sha256};

use super::{NONE, Spec};

impl Spec {
    /// The bytes two specs share exactly when they are the same universe.
    #[must_use]
    pub fn canonical_bytes(&self) -> Vec<u8> {
        let mut bytes = b"rf1model".to_vec();
        let put =
            |bytes: &mut Vec<u8>, number: f64| bytes.extend((number + 0.0).to_bits().to_be_bytes());
        for number in [self.hubble_constant, self.matter, self.curvature] {
            put(&mut bytes, number);
        }
        bytes.push(u8::from(self.baryons.is_some()));
        if let Some(baryons) = self.baryons {
            put(&mut bytes, baryons);
        }
        let radiation = self
            .radiation
            .filter(|radiation| radiation.cmb_temperature > 0.0);
        put(
            &mut bytes,
            radiation.map_or(0.0, |radiation| radiation.cmb_temperature),
        );
        put(
            &mut bytes,
            radiation.map_or(0.0, |radiation| radiation.effective_neutrino_number),
        );
        for mass in radiation.map_or([0.0; 3], |radiation| radiation.neutrino_masses) {
            put(&mut bytes, mass);
        }
        put(&mut bytes, self.dark_energy.density);
        let (form, numbers) = self.simplest_form();
        bytes.extend(form.as_bytes());
        bytes.push(0);
        for number in numbers {
            put(&mut bytes, *number);
        }
        bytes
    }

    /// A label: `rf1-` and the first 16 hexadecimal digits of the SHA-256 of
    /// the canonical bytes.
    #[must_use]
    pub fn fingerprint(&self) -> String {
        let digest = Sha256::digest(self.canonical_bytes());
        digest
            .iter()
            .take(8)
            .fold("rf1-".to_owned(), |label, byte| {
                format!("{label}{byte:02x}")
            })
    }

    fn simplest_form(&self) -> (&'static str, &[f64]) {
        let dark_energy = &self.dark_energy;
        if dark_energy.density == 0.0 {
            return (NONE.name, &[]);
        }
        match (dark_energy.form.simplest)(&dark_energy.parameters) {
            // Every simpler form so far has no numbers of its own.
            Some(simpler) => (simpler.name, &[]),
            None => (dark_energy.form.name, &dark_energy.parameters),
        }
    }
}
