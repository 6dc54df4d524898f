"""The universes of the references: every closure, curvature and radiation content the service takes.

All are invented for the purpose or plain textbook cases; the whole range
-0.99 <= z <= 1e9 is theirs, except for LIMITED, which turn around or bounce.
"""

from universe import Universe

WHOLE = [
    Universe("one-mass", "flat, Lambda, one neutrino of 0.06 eV", 67.36, 0.3153,
             cmb_temperature=2.7255, effective_neutrino_number=3.046, neutrino_masses=[0.06]),
    Universe("flat-plain", "flat, Lambda, no radiation", 70.0, 0.3),
    Universe("massless", "flat, Lambda, three massless neutrinos", 70.0, 0.3,
             cmb_temperature=2.7255, effective_neutrino_number=3.046),
    Universe("photons-only", "flat, Lambda, photons alone", 71.0, 0.27, cmb_temperature=2.725),
    Universe("three-masses", "flat, Lambda, three masses", 68.5, 0.31,
             cmb_temperature=2.7255, effective_neutrino_number=3.044, neutrino_masses=[0.05, 0.1, 0.3]),
    Universe("light-masses", "flat, Lambda, three light masses, high N_eff", 66.0, 0.33,
             cmb_temperature=2.7255, effective_neutrino_number=4.2, neutrino_masses=[1e-4, 1e-3, 0.009]),
    Universe("heavy-mass", "flat, Lambda, one neutrino of 1 eV", 70.0, 0.35,
             cmb_temperature=2.7255, effective_neutrino_number=3.046, neutrino_masses=[1.0]),
    Universe("einstein-de-sitter", "matter alone, flat", 64.0, 1.0, dark_energy="none"),
    Universe("milne", "empty and open", 64.0, 0.0, dark_energy="none"),
    Universe("de-sitter", "Lambda alone, flat: no beginning", 64.0, 0.0),
    Universe("pure-radiation", "photons alone, flat", 669.4490338552483, 0.0, dark_energy="none",
             cmb_temperature=100.0),
    Universe("radiation-open", "photons and massless neutrinos, open", 50.0, 0.0, dark_energy="none",
             cmb_temperature=10.0, effective_neutrino_number=3.0),
    Universe("open-plain", "matter alone, open", 64.0, 0.3125, dark_energy="none"),
    Universe("open-lambda", "open, Lambda, massless neutrinos", 72.0, 0.25, curvature=0.1,
             cmb_temperature=2.7255, effective_neutrino_number=3.046),
    Universe("closed-mild", "closed, Lambda, one mass", 67.0, 0.32, curvature=-0.05,
             cmb_temperature=2.7255, effective_neutrino_number=3.046, neutrino_masses=[0.06]),
    Universe("closed-past-equator", "closed, Lambda, past the equator", 70.0, 0.3, curvature=-0.5),
    Universe("closed-past-antipode", "closed, Lambda, past the antipode, radiation", 70.0, 0.3, curvature=-0.8,
             cmb_temperature=2.7255, effective_neutrino_number=3.046),
    Universe("heavy-closed", "matter 2, Lambda, closed", 55.0, 2.0, curvature=-1.5),
    Universe("loitering", "closed, least E^2 about 1e-2", 70.0, 0.3, curvature=-1.0085),
    Universe("loitering-long", "closed, least E^2 about 6e-4, radiation", 70.0, 0.3, curvature=-1.0131,
             cmb_temperature=2.7255, effective_neutrino_number=3.046),
    Universe("phantom", "flat, w = -1.2, one mass", 69.0, 0.29, dark_energy="constant", w=-1.2,
             cmb_temperature=2.7255, effective_neutrino_number=3.046, neutrino_masses=[0.06]),
    Universe("quintessence", "flat, w = -0.8, massless neutrinos", 66.0, 0.31, dark_energy="constant", w=-0.8,
             cmb_temperature=2.7255, effective_neutrino_number=3.046),
    Universe("stiffer-than-matter", "flat, w = +0.2, massless neutrinos", 70.0, 0.3, dark_energy="constant", w=0.2,
             cmb_temperature=2.7255, effective_neutrino_number=3.046),
    Universe("everything", "open, w = -0.9, three masses", 73.0, 0.28, curvature=0.08, dark_energy="constant",
             w=-0.9, cmb_temperature=2.7255, effective_neutrino_number=3.044, neutrino_masses=[0.02, 0.06, 0.5]),
    Universe("cold", "flat, Lambda, radiation at 1e-3 K", 70.0, 0.3,
             cmb_temperature=1e-3, effective_neutrino_number=3.046),
]

# Name: least and greatest redshift the references go to.
LIMITED = [
    (Universe("bounce", "closed, Lambda: no big bang", 70.0, 0.3, curvature=-1.1), -0.99, 0.75),
    (Universe("recollapse", "matter 2, closed: turns around", 70.0, 2.0, dark_energy="none"), -0.49, 1e9),
]
