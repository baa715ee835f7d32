//! "Did you mean": the candidate most like a mistyped word.

/// The candidate most like `word`, or none when nothing is close: at most one
/// edit in three characters (at least one edit), capitals apart.
pub fn nearest<'a>(word: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let lower = word.to_lowercase();
    let allowed = (word.chars().count() / 3).max(1);
    let mut best: Option<(usize, usize, &str)> = None;
    for candidate in candidates {
        let plain = strsim::damerau_levenshtein(&lower, &candidate.to_lowercase());
        let exact = strsim::damerau_levenshtein(word, candidate);
        if plain <= allowed && best.is_none_or(|(p, e, _)| (plain, exact) < (p, e)) {
            best = Some((plain, exact, candidate));
        }
    }
    best.map(|(_, _, candidate)| candidate)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_nearest_candidate_is_named_and_far_ones_are_not() {
        let known = ["temperature", "title", "H3O+", "OH", "Co", "CO"];
        let cases = [
            ("temprature", Some("temperature")),
            ("Title", Some("title")),
            ("H30+", Some("H3O+")),
            ("CO", Some("CO")),
            ("banana", None),
        ];
        for (word, expected) in cases {
            assert_eq!(nearest(word, known), expected, "{word}");
        }
    }
}
