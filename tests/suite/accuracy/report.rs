//! The worst figures, gathered and printed.

use std::collections::BTreeMap;
use std::fmt::Write;

/// The worst share of its bound that a quantity or a model used, and where.
#[derive(Default)]
pub(super) struct Report {
    quantities: BTreeMap<String, Worst>,
    models: BTreeMap<String, Worst>,
    failures: Vec<String>,
    compared: usize,
}

#[derive(Default)]
struct Worst {
    share: f64,
    text: String,
}

impl Report {
    /// Takes one comparison; `figure` says how large the error is.
    pub(super) fn take(&mut self, quantity: &str, model: &str, z: f64, share: f64, figure: &str) {
        self.compared += 1;
        let share = if share.is_nan() { f64::INFINITY } else { share };
        for (key, other, map) in [
            (quantity, model, &mut self.quantities),
            (model, quantity, &mut self.models),
        ] {
            let worst = map.entry(key.to_owned()).or_default();
            if share >= worst.share {
                *worst = Worst {
                    share,
                    text: format!("{figure} ({other}, z = {z:e})"),
                };
            }
        }
        if share > 1.0 {
            self.failures.push(format!(
                "{quantity} under {model} at z = {z:e}: {figure}, {share:.2} of its bound"
            ));
        }
    }

    /// Something that is wrong without a figure.
    pub(super) fn fail(&mut self, what: String) {
        self.failures.push(what);
    }

    /// Prints the tables; panics if anything failed.
    pub(super) fn conclude(self, title: &str) {
        let mut text = format!(
            "{title}: {} values; share of the bound used, worst error\n",
            self.compared
        );
        for (heading, map) in [
            ("by quantity", &self.quantities),
            ("by model", &self.models),
        ] {
            let _ = writeln!(text, "  {heading}");
            for (key, worst) in map {
                let _ = writeln!(text, "    {key:30} {:6.3}  {}", worst.share, worst.text);
            }
        }
        println!("{text}");
        let count = self.failures.len();
        let shown: Vec<&String> = self.failures.iter().take(60).collect();
        assert!(count == 0, "{title}: {count} failures\n{shown:#?}");
    }
}
