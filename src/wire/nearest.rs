//! What was meant by an unknown name: a misspelt one, the beginning or the end of one, a symbol.

use crate::quantity::QUANTITIES;

/// The end of a sentence that offers what may have been meant; empty where nothing comes close.
pub fn meant<'a>(word: &str, known: impl IntoIterator<Item = &'a str>) -> String {
    let known: Vec<&str> = known.into_iter().collect();
    let found = candidates(word, &known);
    let quoted: Vec<_> = found.iter().map(|name| format!("\"{name}\"")).collect();
    match quoted.len() {
        0 => String::new(),
        1..=MOST_OFFERED => format!("; did you mean {}?", quoted.join(" or ")),
        _ => String::new(),
    }
}

/// More names than these are a list, not a hint.
const MOST_OFFERED: usize = 4;

fn candidates<'a>(word: &str, known: &[&'a str]) -> Vec<&'a str> {
    let is = |wanted: &dyn Fn(&str) -> bool| -> Vec<&'a str> {
        known.iter().copied().filter(|name| wanted(name)).collect()
    };
    if let Some(name) = symbolised(word) {
        let found = is(&|known| known == name || last_segment(known) == name);
        if !found.is_empty() {
            return found;
        }
    }
    if let Some(name) = nearest(word, known.iter().copied()) {
        return vec![name];
    }
    let folded = word.to_ascii_lowercase();
    let begun = is(&|known| folded.len() >= SHORTEST_BEGINNING && known.starts_with(&folded));
    if !begun.is_empty() {
        return begun;
    }
    let ended = is(&|known| last_segment(known) == folded);
    if !ended.is_empty() {
        return ended;
    }
    is(&|known| {
        folded.len() >= SHORTEST_BEGINNING
            && known
                .split('-')
                .filter_map(|part| part.chars().next())
                .eq(folded.chars())
    })
}

/// Shorter beginnings say nothing.
const SHORTEST_BEGINNING: usize = 3;

fn last_segment(name: &str) -> &str {
    name.rsplit('.').next().unwrap_or(name)
}

/// What papers call by this symbol.
fn symbolised(word: &str) -> Option<&'static str> {
    let plain = |text: &str| text.replace('_', "");
    let parameter = PARAMETER_SYMBOLS
        .iter()
        .find(|(symbol, _)| plain(symbol) == plain(word))
        .map(|(_, name)| *name);
    let quantity = || {
        QUANTITIES
            .iter()
            .find(|quantity| plain(quantity.symbol) == plain(word))
            .map(|quantity| quantity.name)
    };
    parameter.or_else(quantity)
}

/// Symbols of a model's parameters in papers; h is H0 in units of 100 km/(s.Mpc).
const PARAMETER_SYMBOLS: [(&str, &str); 9] = [
    ("H_0", "hubble_constant"),
    ("h", "hubble_constant"),
    ("Ω_m", "matter"),
    ("Omega_m", "matter"),
    ("Ω_b", "baryons"),
    ("Omega_b", "baryons"),
    ("Ω_K", "curvature"),
    ("Omega_K", "curvature"),
    ("N_eff", "effective_neutrino_number"),
];

/// The known name that takes the fewest edits to reach from `word`, if few enough to be meant.
pub fn nearest<'a>(word: &str, known: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    if word.len() > 100 {
        return None;
    }
    let word = word.to_ascii_lowercase();
    known
        .into_iter()
        .map(|name| (edits(&word, &name.to_ascii_lowercase()), name))
        .filter(|(edits, name)| *edits <= 1 + name.len().min(word.len()) / 4)
        .min_by_key(|(edits, _)| *edits)
        .map(|(_, name)| name)
}

/// How many insertions, deletions, replacements and swaps of neighbours lead from one word to the
/// other (the restricted edit distance of Damerau 1964, Communications of the ACM 7, 171).
fn edits(from: &str, to: &str) -> usize {
    let (from, to) = (from.as_bytes(), to.as_bytes());
    let mut rows = vec![vec![0_usize; to.len() + 1]; from.len() + 1];
    for i in 0..=from.len() {
        for j in 0..=to.len() {
            rows[i][j] = if i == 0 || j == 0 {
                i + j
            } else {
                let replaced = rows[i - 1][j - 1] + usize::from(from[i - 1] != to[j - 1]);
                let swapped =
                    i > 1 && j > 1 && from[i - 1] == to[j - 2] && from[i - 2] == to[j - 1];
                let plain = replaced.min(rows[i - 1][j] + 1).min(rows[i][j - 1] + 1);
                if swapped {
                    plain.min(rows[i - 2][j - 2] + 1)
                } else {
                    plain
                }
            };
        }
    }
    rows[from.len()][to.len()]
}

#[cfg(test)]
mod tests {
    use super::{meant, nearest};

    #[test]
    fn symbols_beginnings_and_ends_are_offered() {
        let quantities = ["redshift", "age", "luminosity_distance"];
        let models = [
            "planck-2018-cmb",
            "planck-2018-best-fit",
            "einstein-de-sitter",
            "larkfield-2026",
        ];
        let parameters = ["redshift", "hubble_constant", "dark_energy.w", "to"];
        let offers = |word, known: &[&'static str]| meant(word, known.iter().copied());
        assert_eq!(
            offers("D_L", &quantities),
            "; did you mean \"luminosity_distance\"?"
        );
        assert_eq!(offers("z", &parameters), "; did you mean \"redshift\"?");
        assert_eq!(
            offers("H0", &parameters),
            "; did you mean \"hubble_constant\"?"
        );
        assert_eq!(
            offers("w", &parameters),
            "; did you mean \"dark_energy.w\"?"
        );
        assert_eq!(
            offers("larkfield", &models),
            "; did you mean \"larkfield-2026\"?"
        );
        assert_eq!(
            offers("eds", &models),
            "; did you mean \"einstein-de-sitter\"?"
        );
        let both = "; did you mean \"planck-2018-cmb\" or \"planck-2018-best-fit\"?";
        assert_eq!(offers("planck-2018", &models), both);
        assert_eq!(offers("colour", &models), "");
    }

    #[test]
    fn a_slip_finds_its_name_and_another_word_does_not() {
        let known = ["redshift", "age", "luminosity_distance"];
        assert_eq!(nearest("redshfit", known), Some("redshift"));
        assert_eq!(
            nearest("luminosty_distance", known),
            Some("luminosity_distance")
        );
        assert_eq!(nearest("Age", known), Some("age"));
        assert_eq!(nearest("colour", known), None);
        assert_eq!(nearest(&"a".repeat(1000), known), None);
    }
}
