//! Interleaved rounds and paired ratios: each round measures every case once, a ratio compares within a round.

/// One thing that is measured.
pub(crate) struct Case<'a> {
    /// Its name in the table.
    pub(crate) name: &'static str,
    /// Measures once; nanoseconds per unit (a request, a value).
    pub(crate) measure: Box<dyn FnMut() -> f64 + 'a>,
}

/// What two cases cost relative to one another, and what was aimed at.
pub(crate) struct Ratio {
    pub(crate) case: &'static str,
    pub(crate) to: &'static str,
    pub(crate) goal: f64,
}

/// Measures `cases` in `rounds` rounds and prints their times and `ratios`.
pub(crate) fn compare(
    title: &str,
    unit: &str,
    rounds: usize,
    cases: &mut [Case],
    ratios: &[Ratio],
) {
    let mut times = vec![Vec::with_capacity(rounds); cases.len()];
    for case in cases.iter_mut() {
        // The first pass fills caches and tables and does not count.
        (case.measure)();
    }
    for round in 0..rounds {
        // Each round begins elsewhere, so that no case always follows the same one.
        for step in 0..cases.len() {
            let index = (round + step) % cases.len();
            times[index].push((cases[index].measure)());
        }
    }
    println!("\n{title} ({rounds} rounds)");
    println!(
        "  {:<44}{:>12}{:>12}{:>12}",
        unit, "median", "quartile", "quartile"
    );
    for (case, times) in cases.iter().zip(&times) {
        row(case.name, times.clone(), "");
    }
    let times_of = |name: &str| {
        cases
            .iter()
            .position(|case| case.name == name)
            .map(|index| &times[index])
    };
    for ratio in ratios {
        let (Some(case), Some(to)) = (times_of(ratio.case), times_of(ratio.to)) else {
            panic!("no case {} or {}", ratio.case, ratio.to);
        };
        let paired = case.iter().zip(to).map(|(case, to)| case / to).collect();
        row(
            &format!("= {} / {}", ratio.case, ratio.to),
            paired,
            &format!("   aim {}", ratio.goal),
        );
    }
}

fn row(name: &str, mut values: Vec<f64>, note: &str) {
    values.sort_by(f64::total_cmp);
    let at = |share: f64| values[((values.len() - 1) as f64 * share).round() as usize];
    println!(
        "  {name:<44}{:>12.3}{:>12.3}{:>12.3}{note}",
        at(0.5),
        at(0.25),
        at(0.75)
    );
}
