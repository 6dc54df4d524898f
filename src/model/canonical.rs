//! The canonical bytes of a model and its fingerprint.
//!
//! Layout, all numbers big-endian, all reals the bits of an IEEE 754 double
//! with −0 written as 0:
//!
//! | bytes | what |
//! |---|---|
//! | 13 | ASCII `rf1-declared` and one zero byte |
//! | 8 | Hubble constant, km/s/Mpc |
//! | 8 | matter |
//! | 8 | curvature |
//! | 1 + 8 | 1 and the baryons, or 0 and eight zero bytes when not declared |
//! | 8 | temperature of the microwave background, K; 0 without radiation |
//! | 8 | effective neutrino number; 0 without radiation |
//! | 3 × 8 | neutrino masses, eV, ascending, massless ones first as 0 |
//! | 1 + n | length and ASCII name of the dark-energy form, the simplest equal one |
//! | 8 | its density |
//! | 4 + 8 n | count and numbers of its parameters, in the order of the form |

use sha2::{Digest, Sha256};

use super::Spec;

impl Spec {
    /// The bytes that are equal for equal models and only for them.
    #[must_use]
    pub fn canonical_bytes(&self) -> Vec<u8> {
        let mut bytes = Vec::with_capacity(160);
        bytes.extend_from_slice(b"rf1-declared\0");
        push_real(&mut bytes, self.hubble_constant);
        push_real(&mut bytes, self.matter);
        push_real(&mut bytes, self.curvature);
        bytes.push(u8::from(self.baryons.is_some()));
        push_real(&mut bytes, self.baryons.unwrap_or(0.0));
        self.push_radiation(&mut bytes);
        self.push_dark_energy(&mut bytes);
        bytes
    }

    /// `rf1-` and the first 16 hexadecimal digits of the SHA-256 of the canonical bytes.
    #[must_use]
    pub fn fingerprint(&self) -> String {
        use std::fmt::Write;
        let digest = Sha256::digest(self.canonical_bytes());
        let mut text = String::from("rf1-");
        for byte in digest.iter().take(8) {
            // Writing to a string does not fail.
            let _ = write!(text, "{byte:02x}");
        }
        text
    }

    fn push_radiation(&self, bytes: &mut Vec<u8>) {
        let (temperature, number, masses) =
            self.radiation.map_or((0.0, 0.0, [0.0; 3]), |radiation| {
                (
                    radiation.cmb_temperature,
                    radiation.effective_neutrino_number,
                    radiation.neutrino_masses,
                )
            });
        push_real(bytes, temperature);
        push_real(bytes, number);
        for mass in masses {
            push_real(bytes, mass);
        }
    }

    fn push_dark_energy(&self, bytes: &mut Vec<u8>) {
        let name = self.dark_energy.form.name.as_bytes();
        bytes.push(name.len() as u8);
        bytes.extend_from_slice(name);
        push_real(bytes, self.dark_energy.density);
        let parameters = &self.dark_energy.parameters;
        bytes.extend_from_slice(&(parameters.len() as u32).to_be_bytes());
        for parameter in parameters {
            push_real(bytes, *parameter);
        }
    }
}

fn push_real(bytes: &mut Vec<u8>, value: f64) {
    // −0 + 0 is 0, and every other number is kept.
    bytes.extend_from_slice(&(value + 0.0).to_bits().to_be_bytes());
}
