//! The nearest known name to a misspelt one.

/// The known name that takes the fewest edits to reach from `word`, if few enough to be meant.
pub fn nearest<'a>(word: &str, known: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    if word.len() > 100 {
        return None;
    }
    let word = word.to_ascii_lowercase();
    known
        .into_iter()
        .map(|name| (edits(&word, name), name))
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
    use super::nearest;

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
