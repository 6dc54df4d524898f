//! The printed statements that are a conversion of one value, as data.

/// A printed value under the cosmology its source adopted.
pub(super) struct Statement {
    /// Author, year, place; "from memory" where no text was at hand.
    pub source: &'static str,
    pub statement: &'static str,
    /// Hubble constant, matter; flat with Λ, no radiation unless `radiation` says so.
    pub model: (f64, f64),
    /// Temperature and effective number of neutrinos.
    pub radiation: Option<(f64, f64)>,
    /// Quantity, unit, value.
    pub from: (&'static str, &'static str, f64),
    /// Quantity, unit.
    pub to: (&'static str, &'static str),
    pub printed: f64,
    /// Half a unit of the last printed digit, or of what "about" leaves.
    pub half_unit: f64,
}

/// Flat, H0 = 70, Ω_m = 0.3.
const ROUND: (f64, f64) = (70.0, 0.3);
/// Flat, H0 = 71, Ω_m = 0.27.
const WMAP: (f64, f64) = (71.0, 0.27);
/// Flat, H0 = 67.9, Ω_m = 0.306.
const MERGERS: (f64, f64) = (67.9, 0.306);
/// h = 1, for statements per h; Ω_m does not matter at z = 0.
const PER_H: (f64, f64) = (100.0, 0.3);

/// A statement without radiation.
const fn plain(
    source: &'static str,
    statement: &'static str,
    model: (f64, f64),
    from: (&'static str, &'static str, f64),
    to: (&'static str, &'static str),
    (printed, half_unit): (f64, f64),
) -> Statement {
    Statement {
        source,
        statement,
        model,
        radiation: None,
        from,
        to,
        printed,
        half_unit,
    }
}

const fn at(redshift: f64) -> (&'static str, &'static str, f64) {
    ("redshift", "1", redshift)
}

const fn far(mpc: f64) -> (&'static str, &'static str, f64) {
    ("luminosity_distance", "Mpc", mpc)
}

const AGE_GYR: (&str, &str) = ("age", "Gyr");
const AGE_MYR: (&str, &str) = ("age", "Myr");
const REDSHIFT: (&str, &str) = ("redshift", "1");
const KPC_PER_ARCSEC: (&str, &str) = ("angular_scale", "kpc/arcsec");
const PC_PER_MAS: (&str, &str) = ("angular_scale", "pc/mas");

pub(super) const STATEMENTS: &[Statement] = &[
    plain(
        "Clowe et al. 2006, ApJL 648, L109, sect. 2",
        "4.413 kpc/arcsec at z = 0.296",
        ROUND,
        at(0.296),
        KPC_PER_ARCSEC,
        (4.413, 0.0005),
    ),
    plain(
        "Fabian et al. 2006, MNRAS 366, 417, sect. 1 (from memory)",
        "luminosity distance 78.4 Mpc at z = 0.0183",
        WMAP,
        at(0.0183),
        ("luminosity_distance", "Mpc"),
        (78.4, 0.05),
    ),
    plain(
        "Lister et al. 2009, AJ 138, 1874, source table (from memory)",
        "3C 279: 6.31 pc/mas at z = 0.536",
        WMAP,
        at(0.536),
        PC_PER_MAS,
        (6.31, 0.005),
    ),
    plain(
        "Lister et al. 2009, AJ 138, 1874, source table (from memory)",
        "3C 273: 2.70 pc/mas at z = 0.158",
        WMAP,
        at(0.158),
        PC_PER_MAS,
        (2.70, 0.005),
    ),
    plain(
        "Broadhurst et al. 2005, ApJ 621, 53 (from memory)",
        "3.08 kpc/arcsec at z = 0.183",
        ROUND,
        at(0.183),
        KPC_PER_ARCSEC,
        (3.08, 0.005),
    ),
    plain(
        "Walter et al. 2004, ApJL 615, L17 (from memory)",
        "5.6 kpc/arcsec at z = 6.42",
        WMAP,
        at(6.42),
        KPC_PER_ARCSEC,
        (5.6, 0.05),
    ),
    plain(
        "Davis & Lineweaver 2004, PASA 21, 97, fig. 1 (from memory)",
        "today's recession velocity is c at z = 1.46",
        ROUND,
        ("recession_velocity", "km/s", 299_792.458),
        REDSHIFT,
        (1.46, 0.005),
    ),
    plain(
        "Davis & Lineweaver 2004, PASA 21, 97, fig. 1 (from memory)",
        "particle horizon 46 Gly today",
        ROUND,
        at(0.0),
        ("conformal_time", "Gyr"),
        (46.0, 0.5),
    ),
    plain(
        "Hogg 1999, arXiv:astro-ph/9905116, sect. 2 (from memory)",
        "Hubble distance 3000 h^-1 Mpc",
        PER_H,
        at(0.0),
        ("hubble_distance", "Mpc"),
        (3000.0, 50.0),
    ),
    plain(
        "Particle Data Group 2024, Phys. Rev. D 110, 030001, constants table (from memory)",
        "critical density 1.87834e-26 h² kg/m³",
        PER_H,
        at(0.0),
        ("critical_density", "kg.m**-3"),
        (1.878_34e-26, 5e-32),
    ),
    Statement {
        source: "Particle Data Group 2024, Phys. Rev. D 110, 030001, constants table (from memory)",
        statement: "photons: Ω h² = 2.473e-5 at 2.7255 K",
        model: PER_H,
        radiation: Some((2.7255, 0.0)),
        from: at(0.0),
        to: ("radiation_fraction", "1"),
        printed: 2.473e-5,
        half_unit: 5e-9,
    },
    Statement {
        source: "Ryden 2003, Introduction to Cosmology, table 6.2 (from memory)",
        statement: "benchmark model, Ω_r = 8.4e-5: age 13.5 Gyr",
        model: ROUND,
        radiation: Some((2.725, 3.0)),
        from: at(0.0),
        to: AGE_GYR,
        printed: 13.5,
        half_unit: 0.05,
    },
    Statement {
        source: "Ryden 2017, Introduction to Cosmology, table 5.2 (from memory)",
        statement: "benchmark model, Ω_r = 9.0e-5: age 13.7 Gyr",
        model: (68.0, 0.31),
        radiation: Some((2.7255, 3.0)),
        from: at(0.0),
        to: AGE_GYR,
        printed: 13.7,
        half_unit: 0.05,
    },
    plain(
        "Oesch et al. 2016, ApJ 819, 129, abstract; cosmology from memory",
        "about 400 Myr old at z = 11.09",
        ROUND,
        at(11.09),
        AGE_MYR,
        (400.0, 50.0),
    ),
    plain(
        "Mortlock et al. 2011, Nature 474, 616, abstract; cosmology from memory",
        "0.77 Gyr old at z = 7.085",
        (70.4, 0.272),
        at(7.085),
        AGE_GYR,
        (0.77, 0.005),
    ),
    Statement {
        source: "Bañados et al. 2018, Nature 553, 473, abstract; cosmology from memory",
        statement: "690 Myr old at z = 7.54",
        model: (67.7, 0.307),
        radiation: Some((2.7255, 3.046)),
        from: at(7.54),
        to: AGE_MYR,
        printed: 690.0,
        half_unit: 5.0,
    },
    plain(
        "Wang et al. 2021, ApJL 907, L1, abstract; cosmology from memory",
        "670 Myr old at z = 7.642",
        ROUND,
        at(7.642),
        AGE_MYR,
        (670.0, 5.0),
    ),
    plain(
        "Carnall et al. 2023, Nature 619, 716, abstract; cosmology from memory",
        "about 800 Myr old at z = 6.5",
        ROUND,
        at(6.5),
        AGE_MYR,
        (800.0, 50.0),
    ),
    plain(
        "Tanvir et al. 2009, Nature 461, 1254, abstract; cosmology from memory",
        "about 630 Myr old at z = 8.2",
        WMAP,
        at(8.2),
        AGE_MYR,
        (630.0, 5.0),
    ),
    plain(
        "Glazebrook et al. 2017, Nature 544, 71, abstract; cosmology from memory",
        "3 Gyr old at z = 2",
        ROUND,
        at(2.0),
        AGE_GYR,
        (3.0, 0.5),
    ),
    plain(
        "Abbott et al. 2016, PRL 116, 061102, abstract; cosmology from memory",
        "410 Mpc: z = 0.09",
        MERGERS,
        far(410.0),
        REDSHIFT,
        (0.09, 0.005),
    ),
    plain(
        "Abbott et al. 2016, PRL 116, 061102, abstract; cosmology from memory",
        "upper limit 570 Mpc: z = 0.12",
        MERGERS,
        far(570.0),
        REDSHIFT,
        (0.12, 0.005),
    ),
    plain(
        "Abbott et al. 2016, PRL 116, 061102, abstract; cosmology from memory",
        "lower limit 230 Mpc: z = 0.05",
        MERGERS,
        far(230.0),
        REDSHIFT,
        (0.05, 0.005),
    ),
    plain(
        "Abbott et al. 2017, PRL 118, 221101, abstract; cosmology from memory",
        "880 Mpc: z = 0.18",
        MERGERS,
        far(880.0),
        REDSHIFT,
        (0.18, 0.005),
    ),
    plain(
        "Abbott et al. 2017, PRL 118, 221101, abstract; cosmology from memory",
        "upper limit 1330 Mpc: z = 0.26",
        MERGERS,
        far(1330.0),
        REDSHIFT,
        (0.26, 0.005),
    ),
    plain(
        "Abbott et al. 2020, PRL 125, 101102, abstract; cosmology from memory",
        "5.3 Gpc: z = 0.82",
        MERGERS,
        ("luminosity_distance", "Gpc", 5.3),
        REDSHIFT,
        (0.82, 0.005),
    ),
    plain(
        "Abbott et al. 2017, PRL 119, 141101, abstract (from memory)",
        "540 Mpc: z = 0.11",
        MERGERS,
        far(540.0),
        REDSHIFT,
        (0.11, 0.005),
    ),
    plain(
        "Abbott et al. 2016, PRL 116, 241103, abstract (from memory)",
        "440 Mpc: z = 0.09",
        MERGERS,
        far(440.0),
        REDSHIFT,
        (0.09, 0.005),
    ),
];
