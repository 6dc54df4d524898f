//! The codes of what can be said about rows.

/// What can be said about a row.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Code {
    /// No value was given.
    Missing,
    /// Infinite or not a number.
    NotFinite,
    /// A cell that is no number.
    Unreadable,
    /// −1 < z < 0.
    Blueshift,
    /// No redshift above −1 has it.
    OutsideDomain,
    /// Outside the limits that the request set.
    OutsideAcceptedRange,
    /// More than the quantity reaches.
    BeyondMaximum,
    /// Before the universe began.
    BeforeBeginning,
    /// The model has no beginning.
    NoBeginning,
    /// Outside the redshifts for which the expansion history is tabulated.
    BeyondModelRange,
    /// Where the physics of the model stops being that of the universe.
    BeyondPhysics,
    /// Infinite.
    Divergent,
    /// Rounding of the input alone moves it.
    IllConditioned,
    /// A distribution cut at the end of the range.
    Truncated,
    /// Linear propagation misses the curvature.
    NotLinear,
    /// A probability density that is none.
    BadDensity,
    /// A probability density that did not integrate to 1.
    Renormalised,
    /// The background lies before the lens.
    Foreground,
}

/// Name, meaning and whether the value stays, in the order of [`Code`].
const ENTRIES: [(Code, &str, &str, bool); 18] = [
    (Code::Missing, "missing", "no value was given", false),
    (
        Code::NotFinite,
        "not_finite",
        "the value is infinite or not a number",
        false,
    ),
    (
        Code::Unreadable,
        "unreadable",
        "the cell is not a number",
        false,
    ),
    (
        Code::Blueshift,
        "blueshift",
        "-1 < z < 0, where distances, volumes and scales are not defined; times, rates and fractions are given with \"future\": true",
        false,
    ),
    (
        Code::OutsideDomain,
        "outside_domain",
        "no redshift above -1 has this value",
        false,
    ),
    (
        Code::OutsideAcceptedRange,
        "outside_accepted_range",
        "outside the limits that the request sets",
        false,
    ),
    (
        Code::BeyondMaximum,
        "beyond_maximum",
        "more than the quantity reaches in this model",
        false,
    ),
    (
        Code::BeforeBeginning,
        "before_beginning",
        "before the beginning of the universe in this model",
        false,
    ),
    (
        Code::NoBeginning,
        "no_beginning",
        "the model has no beginning to count from",
        false,
    ),
    (
        Code::BeyondModelRange,
        "beyond_model_range",
        "outside the redshifts for which the expansion history is tabulated",
        false,
    ),
    (
        Code::BeyondPhysics,
        "beyond_physics",
        "z > 1e8, where electron-positron pairs are missing in the model, or z > 20 without radiation; the value stays",
        true,
    ),
    (Code::Divergent, "divergent", "the value is infinite", false),
    (
        Code::IllConditioned,
        "ill_conditioned",
        "the rounding of one double, 2**-52 of the given value or of a declared number, may move the result by more than 1e-9 of itself; the value stays",
        true,
    ),
    (
        Code::Truncated,
        "truncated",
        "the distribution was cut at the end of the range; the value stays",
        true,
    ),
    (
        Code::NotLinear,
        "not_linear",
        "linear propagation misses the curvature; the value stays",
        true,
    ),
    (
        Code::BadDensity,
        "bad_density",
        "the probability density is zero, negative or not a number",
        false,
    ),
    (
        Code::Renormalised,
        "renormalised",
        "the probability density did not integrate to 1; the value stays",
        true,
    ),
    (
        Code::Foreground,
        "foreground",
        "the background lies before the lens",
        false,
    ),
];

impl Code {
    /// All of them, in the order of their documentation.
    pub const ALL: [Code; 18] = {
        let mut all = [Code::Missing; 18];
        let mut number = 0;
        while number < all.len() {
            all[number] = ENTRIES[number].0;
            number += 1;
        }
        all
    };

    /// As answers write it.
    #[must_use]
    pub const fn name(self) -> &'static str {
        ENTRIES[self as usize].1
    }

    /// One line on what it says.
    #[must_use]
    pub const fn meaning(self) -> &'static str {
        ENTRIES[self as usize].2
    }

    /// Whether the value stays beside the remark.
    #[must_use]
    pub const fn keeps_value(self) -> bool {
        ENTRIES[self as usize].3
    }

    pub(super) const fn bit(self) -> u32 {
        1 << self as u32
    }
}

#[cfg(test)]
mod tests {
    use super::Code;

    #[test]
    fn codes_stand_in_their_own_order() {
        for (number, code) in Code::ALL.into_iter().enumerate() {
            assert_eq!(code as usize, number, "{}", code.name());
        }
    }
}
